#pragma once

#include "carlin/core/types.hpp"
#include "carlin/section/member_section.hpp"

namespace carlin
{
/// Geometry of one member element: nodes and rigid arms from the nodes to the centroid, global
/// axes. Arms are rigid and, for temperature, grow with the member (documented in the model
/// reference).
struct MemberGeometry
{
  Vector3 node_1 = Vector3::Zero(), node_2 = Vector3::Zero();     ///< [m]
  Vector3 offset_1 = Vector3::Zero(), offset_2 = Vector3::Zero(); ///< node -> centroid [m]
  Vector3 upright = Vector3::UnitZ(); ///< near the local z axis; made square to the axis
};

/// Local axes as columns (x along the centroid line, z upright, y = z x x) and flexible length [m].
struct MemberFrame
{
  Matrix3 axes = Matrix3::Identity();
  double length = 0.0;
};
MemberFrame member_frame(const MemberGeometry& geometry);

/// Two-node Timoshenko beam in space with rigid arms; exact at nodes for end loads
/// (Przemieniecki 1968, sec. 5.6, shear parameters kept), from the flexibility of the cantilever,
/// so that the product moment needs no turning to principal axes. Saint-Venant torsion: no warping
/// freedom. The member twists about its shear centre: a force through the centroid turns it, one
/// through the shear centre does not.
/// @return 12 x 12 in global axes at the nodes.
/// @throws ValueError if the ends coincide, `upright` runs along the member, or a stiffness is not
///   positive (infinite shear stiffness is allowed), as all functions below.
Matrix12 member_stiffness(const MemberGeometry& geometry, const MemberSection& section);

/// Consistent mass (cubic deflection, linear stretch and twist) with rotary inertia; exact for
/// rigid motion.
Matrix12 member_mass(const MemberGeometry& geometry, const MemberSection& section);

/// Work-equivalent nodal forces of a line load on the centroid line [N/m], global axes.
Vector12 member_line_load(const MemberGeometry& geometry, const MemberSection& section,
                          const Vector3& force_per_length);

/// Nodal forces of a uniform temperature rise [K].
Vector12 member_thermal(const MemberGeometry& geometry, const MemberSection& section,
                        double temperature_rise);

/// Section forces at both ends in local axes, tension and sagging conventions of the local frame:
/// (N, V_y, V_z, M_x, M_y, M_z) acting on the positive face; N tension +.
/// M_y = integral z sigma, M_z = - integral y sigma.
struct MemberForces
{
  Vector6 end_1 = Vector6::Zero();
  Vector6 end_2 = Vector6::Zero();
};
/// @param displacement 12 nodal displacements, global. @param fixed_end Sum of the element's
///   equivalent load vectors (line and thermal, global axes at nodes), subtracted.
MemberForces member_forces(const MemberGeometry& geometry, const MemberSection& section,
                           const Vector12& displacement, const Vector12& fixed_end);

/// Axial stress at a point (y, z from the centroid) of a section with these forces [Pa].
double member_stress(const MemberSection& section, const Vector6& forces, const Vector2& point);
} // namespace carlin
