#include "build.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
/// Mass and first moment, summed.
struct Moment
{
  double mass = 0.0;                // [kg]
  Vector3 moment = Vector3::Zero(); // [kg m]
  void add(const Moment& other)
  {
    mass += other.mass;
    moment += other.moment;
  }
  MassEntry entry(std::string name, std::string group) const
  {
    return {std::move(name), std::move(group), mass,
            mass > 0.0 ? Vector3(moment / mass) : Vector3::Zero()};
  }
};

/// Reads mass and first moment off an element's mass matrix: the forces of a unit acceleration
/// along an axis add up to the mass, and their moment about the origin is r x (mass e).
template <typename ElementMatrix>
Moment moment_of(const ElementMatrix& matrix, std::span<const Vector3> nodes)
{
  using ElementVector = Eigen::Matrix<double, ElementMatrix::RowsAtCompileTime, 1>;
  Moment sum;
  for (const Index axis : {Index{0}, Index{2}})
  {
    ElementVector forces = ElementVector::Zero();
    for (std::size_t i = 0; i < nodes.size(); ++i)
      forces += matrix.col(static_cast<Index>(6 * i) + axis);
    Vector3 about_origin = Vector3::Zero();
    double mass = 0.0;
    for (std::size_t i = 0; i < nodes.size(); ++i)
    {
      const Vector3 force = forces.template segment<3>(static_cast<Index>(6 * i));
      mass += force[axis];
      about_origin +=
          nodes[i].cross(force) + forces.template segment<3>(static_cast<Index>(6 * i) + 3);
    }
    if (axis == 0) // r x e_x = (0, z, -y)
    {
      sum.mass = mass;
      sum.moment.z() = about_origin.y();
      sum.moment.y() = -about_origin.z();
    }
    else // r x e_z = (y, -x, 0)
      sum.moment.x() = -about_origin.y();
  }
  return sum;
}

class Account
{
public:
  void add(const std::string& name, const std::string& group, const Moment& part)
  {
    const auto found =
        std::find_if(rows_.begin(), rows_.end(),
                     [&](const Row& row) { return row.name == name && row.group == group; });
    if (found != rows_.end())
      found->sum.add(part);
    else
      rows_.push_back({name, group, part});
  }
  Moment total() const
  {
    Moment sum;
    for (const Row& row : rows_)
      sum.add(row.sum);
    return sum;
  }
  std::vector<MassEntry> entries() const
  {
    std::vector<MassEntry> entries;
    for (const Row& row : rows_)
      entries.push_back(row.sum.entry(row.name, row.group));
    return entries;
  }

private:
  struct Row
  {
    std::string name, group;
    Moment sum;
  };
  std::vector<Row> rows_;
};

const std::string& account_name(const MeshPart& part)
{
  return part.family.empty() ? part.name : part.family;
}

/// Rigid masses on footprints: the node forces of an acceleration of the centre of gravity are the
/// weights themselves, so the matrix is m w w' for each direction. Sits and pulls at the right
/// height; adds no stiffness.
void add_equipment(Structure& structure, const ConfiguredCraft& craft)
{
  if (craft.equipment.empty())
    return;
  std::vector<Eigen::Triplet<double>> entries;
  for (std::size_t e = 0; e < craft.equipment.size(); ++e)
  {
    const Equipment& equipment = craft.equipment[e];
    const Footprint footprint = footprint_over(structure, equipment.footprints, equipment.centre,
                                               fmt::format("equipment '{}'", equipment.name));
    const double root = std::sqrt(equipment.mass);
    for (int axis = 0; axis < 3; ++axis)
      for (SparseMatrix::InnerIterator it(footprint.weights, axis); it; ++it)
        entries.emplace_back(static_cast<int>(it.row()), static_cast<int>(3 * e) + axis,
                             root * it.value());
    structure.mass_account.push_back(
        {equipment.name, "equipment", equipment.mass, equipment.centre});
  }
  SparseMatrix weights(structure.mass.rows(), static_cast<Index>(3 * craft.equipment.size()));
  weights.setFromTriplets(entries.begin(), entries.end());
  const SparseMatrix transposed = weights.transpose();
  const SparseMatrix equipment_mass = weights * transposed;
  structure.mass = SparseMatrix(structure.mass + equipment_mass);
}

void add_point_mass(SparseMatrix& matrix, Index node, double mass)
{
  for (Index axis = 0; axis < 3; ++axis)
    matrix.coeffRef(6 * node + axis, 6 * node + axis) += mass;
}

void add_frame_masses(Structure& structure, const Model& model)
{
  if (!model.frame)
    return;
  for (const PointMass& point_mass : model.frame->masses)
  {
    const Index node = node_at(structure, point_mass.point);
    add_point_mass(structure.mass, node, point_mass.mass);
    structure.mass_account.push_back({point_mass.name, "equipment", point_mass.mass,
                                      structure.nodes[static_cast<std::size_t>(node)]});
  }
}
} // namespace

void assemble_mass(Structure& structure, const Model& model, const ConfiguredCraft& craft)
{
  const BlockPattern pattern = element_pattern(structure);
  structure.mass = pattern.zero();
  const double allowance = model.craft.weld_allowance;
  Account account;
  const auto account_for = [&](Index part, const char* group, const Moment& moment)
  {
    account.add(account_name(structure.mesh->parts[static_cast<std::size_t>(part)]), group, moment);
  };
  for (const Shell& shell : structure.shells)
  {
    const QuadPoints points = shell_points(structure, shell);
    const Matrix24 mass =
        shell_mass(points, structure.shell_sections[static_cast<std::size_t>(shell.section)]);
    account_for(shell.part, "plating", moment_of(mass, points));
    pattern.add(structure.mass, (1.0 + allowance) * mass, shell.nodes);
  }
  for (const Member& member : structure.members)
  {
    const MemberGeometry geometry = member_geometry(structure, member);
    const Matrix12 mass =
        member_mass(geometry, structure.member_sections[static_cast<std::size_t>(member.section)]);
    account_for(member.part, "members",
                moment_of(mass, std::array<Vector3, 2>{geometry.node_1, geometry.node_2}));
    pattern.add(structure.mass, (1.0 + allowance) * mass, member.nodes);
  }
  structure.mass_account = account.entries();
  if (allowance > 0.0)
  {
    Moment weld = account.total();
    weld.mass *= allowance;
    weld.moment *= allowance;
    structure.mass_account.push_back(weld.entry("weld allowance", "weld allowance"));
  }
  add_frame_masses(structure, model);
  add_equipment(structure, craft);
}

void add_outfit(Structure& structure, const Outfit& outfit)
{
  if (outfit.point_masses.empty())
    return;
  std::vector<Index> node_of_point(structure.mesh->points.size(), -1);
  for (std::size_t n = structure.nodes.size(); n-- > 0;) // backwards: the first copy stays
    node_of_point[static_cast<std::size_t>(structure.node_point[n])] = static_cast<Index>(n);
  Moment sum;
  for (const auto& [point, mass] : outfit.point_masses)
  {
    Index node = node_of_point[static_cast<std::size_t>(point)];
    if (node < 0) // this configuration has opened the plating there
      node = nearest_node(structure, structure.mesh->points[static_cast<std::size_t>(point)]);
    add_point_mass(structure.mass, node, mass);
    sum.add({mass, mass * structure.nodes[static_cast<std::size_t>(node)]});
  }
  structure.mass_account.push_back(sum.entry("outfit", "outfit"));
}

MassProperties properties_of_mass(const Structure& structure)
{
  MassProperties properties;
  if (structure.nodes.empty())
    return properties;
  Vector3 middle = Vector3::Zero(); // near the centre, to keep digits
  for (const Vector3& node : structure.nodes)
    middle += node / static_cast<double>(structure.nodes.size());
  const MatrixX modes = rigid_modes(structure, middle);
  const MatrixX momentum = structure.mass * modes;
  const Matrix6 rigid = modes.transpose() * momentum;
  properties.mass = rigid.diagonal().head<3>().mean();
  if (properties.mass <= 0.0)
    return properties;
  // Momentum of a unit rotation r about `middle`: m r x d, d from `middle` to the centre.
  const Vector3 d =
      Vector3(rigid(1, 5) - rigid(2, 4), rigid(2, 3) - rigid(0, 5), rigid(0, 4) - rigid(1, 3)) /
      (2.0 * properties.mass);
  properties.centre = middle + d;
  properties.inertia =
      rigid.block<3, 3>(3, 3) -
      properties.mass * (d.squaredNorm() * Matrix3::Identity() - d * d.transpose());
  return properties;
}
} // namespace carlin
