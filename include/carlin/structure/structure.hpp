#pragma once

#include "carlin/core/types.hpp"
#include "carlin/element/member.hpp"
#include "carlin/element/shell.hpp"
#include "carlin/lattice/mesh.hpp"

#include <array>
#include <string>
#include <vector>

namespace carlin
{
/// Shell element of a structure.
struct Shell
{
  std::array<Index, 4> nodes{}; ///< of a triangle the last repeats the third
  Index part = -1;              ///< of Mesh::parts
  Index section = -1;           ///< of Structure::shell_sections
  Index cell = -1;              ///< of Mesh::cells
};

/// Member element of a structure.
struct Member
{
  std::array<Index, 2> nodes{};
  Index part = -1;
  Index section = -1;                                             ///< of Structure::member_sections
  Index run = -1, segment = -1;                                   ///< of Mesh::runs
  Vector3 offset_1 = Vector3::Zero(), offset_2 = Vector3::Zero(); ///< node -> centroid [m]
  Vector3 upright = Vector3::UnitZ();
};

/// Spring of a joint between the two copies of a split node; stiffness in global axes.
struct JointSpring
{
  Index joint = -1;     ///< of Mesh::joints
  Index node_part = -1; ///< copy that belongs to the fastened part
  Index node_other = -1;
  Matrix3 axes = Matrix3::Identity(); ///< columns: along, across, normal
  std::array<double, 4>
      stiffness{};               ///< along, across, normal [N/m], rotation about the line [N m/rad]
  double tributary_length = 0.0; ///< [m]
};

/// Freedoms held to ground, with imposed motion, or on springs to ground.
struct SupportedFreedom
{
  Index freedom = -1;     ///< 6 node + component
  double motion = 0.0;    ///< [m] or [rad]
  double stiffness = 0.0; ///< 0: held; else spring to ground
  Index support = -1;     ///< of Frame::supports
};

/// Row of the mass account.
struct MassEntry
{
  std::string name;  ///< part, equipment, outfit, tank
  std::string group; ///< plating, members, weld allowance, equipment, outfit, tanks, contents
  double mass = 0.0; ///< [kg]
  Vector3 centre = Vector3::Zero(); ///< [m]
};

/// Rigid-body mass properties.
struct MassProperties
{
  double mass = 0.0;                 ///< [kg]
  Vector3 centre = Vector3::Zero();  ///< [m]
  Matrix3 inertia = Matrix3::Zero(); ///< about the centre [kg m^2], tensor (products with minus
                                     ///< signs of the integral)
};

/// Finite-element structure of one configuration: elements, freedoms, masses. No supports, no
/// loads. A node is a mesh point and a group of connected parts. Every node has 6 freedoms, 6 n +
/// component.
struct Structure
{
  std::vector<Vector3> nodes;
  std::vector<Index> node_point; ///< mesh point of each node
  std::vector<Shell> shells;
  std::vector<Member> members;
  std::vector<JointSpring> joints;
  std::vector<ShellSection> shell_sections;
  std::vector<MemberSection> member_sections;
  std::vector<SupportedFreedom> supported; ///< empty for a floating hull
  SparseMatrix stiffness;                  ///< full symmetric, 6 n x 6 n, without supports
  SparseMatrix mass; ///< consistent, incl. weld allowance, equipment, outfit (tanks not)
  /// Share of each node in the area of outer shell and deck [m^2]; without a hull: of all shells
  /// (zero in a structure of members alone).
  VectorX node_area;
  std::vector<MassEntry> mass_account; ///< tanks not included
  MassProperties mass_properties;      ///< of `mass`
  const Mesh* mesh = nullptr;          ///< must outlive the structure
};

/// Spread of the outfit mass (displacement less all that is modelled) found once on the base.
struct Outfit
{
  double mass = 0.0;  ///< [kg]
  double decay = 0.0; ///< exponent lambda of the weight exp(lambda x) [1/m]
  std::vector<std::pair<Index, double>>
      point_masses; ///< mesh point, mass [kg]; hull points of the base
  /// Centre of gravity found less the one stated [m]: x is met, y and z follow from the geometry.
  Vector3 centre_mismatch = Vector3::Zero();
};

/// Elements and matrices of one configuration.
/// @param outfit From base_outfit(); empty for structures without a stated displacement.
/// @throws ModelError/SolveError naming the part: a member with no plating to stand on where it
/// should, a
///   footprint with no structure under it, a part joined to nothing.
Structure build_structure(const Model& model, const ConfiguredCraft& craft, const Mesh& mesh,
                          const Outfit& outfit);

/// Outfit of the base configuration: what is missing to the stated displacement, spread over the
/// hull's area with weight exp(lambda x), lambda from the stated centre of gravity.
/// @throws ModelError when the modelled mass already exceeds the displacement, or no lambda fits.
Outfit base_outfit(const Model& model, const ConfiguredCraft& base, const Mesh& mesh);

/// Weights that spread a force and moment at a point over nodes, and read motion back through the
/// same weights: column c of `weights` is the nodal force vector of unit component c.
struct Footprint
{
  Vector3 point = Vector3::Zero(); ///< [m]
  std::vector<Index> nodes;
  std::vector<double> areas; ///< weight of each node
  SparseMatrix weights;      ///< (6 nodes of structure) x 6; components F_x F_y F_z M_x M_y M_z
};

/// Statically equivalent weights, area-weighted least squares: forces alone where three nodes not
/// in line are covered, with nodal moments otherwise. Covered are the nodes of the surface nearest
/// to the centre inside the rectangle, measured in x and y on level plating, x and z on
/// fore-and-aft plating, y and z on transverse plating; with fewer than three the nodes of the
/// nearest cells.
/// @throws SolveError("<what>: no structure under its footprint at ...").
Footprint footprint(const Structure& structure, const FootprintArea& area, const Vector3& point,
                    const std::string& what);
/// The least squares alone: weights (6 positions) x 6 of nodes at `positions` with `areas` (any
/// unit, > 0) for unit force and moment at `point`: smallest sum of force^2 / area, so that forces
/// are area times a linear field; their resultant is exact. Nodes in line also take moments about
/// the line, a single node all moments.
MatrixX spreading_weights(const std::vector<Vector3>& positions, const std::vector<double>& areas,
                          const Vector3& point);
/// On one node: force and moment as they are.
Footprint point_footprint(const Structure& structure, Index node);
/// Structure node at a named frame point. @throws SolveError if nothing stands there.
Index node_at(const Structure& structure, const std::string& point_name);
/// Node nearest to a position (any part).
Index nearest_node(const Structure& structure, const Vector3& position);

QuadPoints shell_points(const Structure& structure, const Shell& shell);
MemberGeometry member_geometry(const Structure& structure, const Member& member);
/// Shell displacement as 24 entries, member displacement as 12, gathered from the global vector.
Vector24 shell_displacement(const Shell& shell, const Eigen::Ref<const VectorX>& displacement);
Vector12 member_displacement(const Member& member, const Eigen::Ref<const VectorX>& displacement);
/// Rigid-body fields at all nodes: (6 n) x 6, unit translations and unit rotations about `point`.
MatrixX rigid_modes(const Structure& structure, const Vector3& point);
/// Axis along which a shell's local x lies: boat's x, for transverse plates y.
Vector3 material_axis(const Structure& structure, const Shell& shell);
} // namespace carlin
