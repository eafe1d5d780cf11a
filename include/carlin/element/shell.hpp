#pragma once

#include "carlin/core/types.hpp"
#include "carlin/section/shell_section.hpp"

#include <array>

namespace carlin
{
using QuadPoints = std::array<Vector3, 4>;

/// Four-node shell, six freedoms a node in global axes (u v w r_x r_y r_z).
/// Transverse shear by assumed strains at the mid-sides (Dvorkin & Bathe 1984); membrane with
/// incompatible modes (Taylor, Beresford & Wilson 1976), condensed out; drilling: mean corner
/// rotation tied to the in-plane rotation at the centre, one point, 0.1 G t, and 1e-3 G t two by
/// two (after Hughes & Brezzi 1989); warped quads as flat mean plane with rigid offsets. The
/// section's material x axis is `material_axis` projected on the mean plane.
///
/// A triangle repeats its third point as the fourth: constant-strain membrane and curvature,
/// three-node assumed shear (Lee & Bathe 2004) with a shear stiffness lowered by t^2 / (t^2 + 0.1
/// h^2) against locking (Lyly, Stenberg & Vihinen 1993), the same drilling tie. All 24 rows remain;
/// those of the fourth node are zero. Natural coordinates are those of the collapsed quad.
///
/// All functions throw ValueError if the points enclose no area, if a corner is re-entrant, or if
/// the material axis is normal to the mean plane.

/// @return Symmetric 24 x 24, global axes [N/m, N, N m].
Matrix24 shell_stiffness(const QuadPoints& points, const ShellSection& section,
                         const Vector3& material_axis);

/// Consistent mass incl. rotary inertia of the section; exact for rigid translation and rotation.
Matrix24 shell_mass(const QuadPoints& points, const ShellSection& section);

/// Work-equivalent nodal forces of a uniform pressure [Pa] along the normal (right-hand side),
/// taken on the doubly ruled surface through the points: on a closed surface forces and moments sum
/// to zero exactly.
Vector24 shell_pressure(const QuadPoints& points, double pressure);

/// Work-equivalent nodal forces of free thermal strain: uniform rise [K].
Vector24 shell_thermal(const QuadPoints& points, const ShellSection& section,
                       const Vector3& material_axis, double temperature_rise);

/// Growth of the arms from the mean plane to the nodes of a warped quad, by the mean free membrane
/// strain: a hull warmed as a whole stays free of stress. Contained in shell_thermal and
/// shell_state; take it off the displacements before shell_strain_matrix.
Vector24 shell_arm_growth(const QuadPoints& points, const ShellSection& section,
                          const Vector3& material_axis, double temperature_rise);

double shell_area(const QuadPoints& points); ///< of the mean plane's projection [m^2]

/// Local frame: columns are the local x, y, z axes; z the normal by the right hand.
/// x is `material_axis` projected on the mean plane.
Matrix3 shell_frame(const QuadPoints& points, const Vector3& material_axis);

/// Strains and resultants in the local frame of shell_frame.
struct ShellState
{
  Vector3 membrane = Vector3::Zero();    ///< eps_x eps_y gamma_xy of the reference surface [-]
  Vector3 curvature = Vector3::Zero();   ///< [1/m]
  Vector2 shear = Vector2::Zero();       ///< [-]
  Vector3 force = Vector3::Zero();       ///< N [N/m]
  Vector3 moment = Vector3::Zero();      ///< M about the reference surface [N]
  Vector2 shear_force = Vector2::Zero(); ///< Q [N/m]
};

/// Generalised strains per nodal displacement: 8 x 24, rows (eps_x eps_y gamma_xy, kappa_x kappa_y
/// kappa_xy, gamma_xz gamma_yz) in the frame of shell_frame, columns as the stiffness. Serves every
/// load case of one element; the incompatible modes are included.
using ShellStrainMatrix = Eigen::Matrix<double, 8, 24>;
ShellStrainMatrix shell_strain_matrix(const QuadPoints& points, const ShellSection& section,
                                      const Vector3& material_axis, double xi, double eta);

/// State at natural coordinates (xi, eta) in -1..1 from nodal displacements in global axes.
/// @param temperature_rise Uniform [K]; its free strain is taken off before resultants.
ShellState shell_state(const QuadPoints& points, const ShellSection& section,
                       const Vector3& material_axis, const Vector24& displacement, double xi,
                       double eta, double temperature_rise);

} // namespace carlin
