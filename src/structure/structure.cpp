#include "carlin/structure/structure.hpp"

#include "build.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <limits>

namespace carlin
{
namespace
{
/// Everything but outfit and stiffness: what base_outfit needs to weigh the boat.
Structure build_without_stiffness(const Model& model, const ConfiguredCraft& craft,
                                  const Mesh& mesh)
{
  Structure structure;
  structure.mesh = &mesh;
  const EdgeTable edges(mesh);
  Numbering numbering = number_nodes(mesh, edges);
  structure.nodes = std::move(numbering.nodes);
  structure.node_point = std::move(numbering.node_point);
  structure.joints = std::move(numbering.joints);
  add_elements(structure, model, edges, numbering);
  structure.node_area = hull_node_areas(structure);
  assemble_mass(structure, model, craft);
  return structure;
}

/// Exponent for which masses a_i exp(decay x_i) have their centre at `target`. The centre grows
/// with the exponent all the way from one end to the other, so bisection cannot miss it.
double decay_for_centre(const VectorX& areas, const std::vector<Vector3>& positions, double target,
                        double middle, double length)
{
  const auto centre = [&](double decay)
  {
    double mass = 0.0, moment = 0.0;
    for (std::size_t i = 0; i < positions.size(); ++i)
    {
      const double weight =
          areas[static_cast<Index>(i)] * std::exp(decay * (positions[i].x() - middle));
      mass += weight;
      moment += weight * positions[i].x();
    }
    return moment / mass;
  };
  constexpr double steepest = 60.0; // exp(30) from the middle to an end: all of it at the very end
  double low = -steepest / length, high = steepest / length;
  if (!(centre(low) < target && target < centre(high)))
    return std::numeric_limits<double>::quiet_NaN();
  for (int i = 0; i < 200 && high - low > 1e-15 * steepest / length; ++i)
  {
    const double decay = 0.5 * (low + high);
    (centre(decay) < target ? low : high) = decay;
  }
  return 0.5 * (low + high);
}

/// Mass and first moment of what is modelled: structure, equipment, tanks of the base, all full.
std::pair<double, Vector3> modelled(const Structure& structure, const ConfiguredCraft& base)
{
  double mass = structure.mass_properties.mass;
  Vector3 moment = mass * structure.mass_properties.centre;
  for (const Tank& tank : base.tanks)
  {
    const double tank_mass = tank.mass + tank.contents_mass;
    mass += tank_mass;
    moment += tank_mass * 0.5 * (tank.axis_from + tank.axis_to);
  }
  return {mass, moment};
}
} // namespace

Structure build_structure(const Model& model, const ConfiguredCraft& craft, const Mesh& mesh,
                          const Outfit& outfit)
{
  Structure structure = build_without_stiffness(model, craft, mesh);
  add_outfit(structure, outfit);
  structure.mass_properties = properties_of_mass(structure);
  assemble_stiffness(structure);
  structure.supported = supported_freedoms(structure, model);
  return structure;
}

Outfit base_outfit(const Model& model, const ConfiguredCraft& base, const Mesh& mesh)
{
  Outfit outfit;
  if (!model.craft.displacement)
    return outfit;
  Structure structure = build_without_stiffness(model, base, mesh);
  structure.mass_properties = properties_of_mass(structure);
  const auto [mass, moment] = modelled(structure, base);
  const double displacement = *model.craft.displacement;
  outfit.mass = displacement - mass;
  if (outfit.mass < 0.0)
    throw ModelError(
        model.craft.where,
        fmt::format("craft.displacement: {:.0f} kg is less than the {:.0f} kg that the "
                    "model of configuration '{}' weighs without any outfit; state the "
                    "loaded displacement or lighten the model",
                    displacement, mass, base.name));
  double lowest = 0.0, highest = 0.0, area = 0.0;
  for (std::size_t i = 0; i < structure.nodes.size(); ++i)
  {
    const double x = structure.nodes[i].x();
    lowest = i == 0 ? x : std::min(lowest, x);
    highest = i == 0 ? x : std::max(highest, x);
    area += structure.node_area[static_cast<Index>(i)];
  }
  if (area <= 0.0)
    throw ModelError(model.craft.where, "craft.displacement: there is no plating to spread the "
                                        "outfit mass over; leave the displacement out");
  const double middle = 0.5 * (lowest + highest);
  if (model.craft.centre_of_gravity && outfit.mass > 0.0)
  {
    const double target =
        (displacement * model.craft.centre_of_gravity->x() - moment.x()) / outfit.mass;
    outfit.decay =
        decay_for_centre(structure.node_area, structure.nodes, target, middle, highest - lowest);
    if (std::isnan(outfit.decay))
      throw ModelError(
          model.craft.where,
          fmt::format("craft.centre_of_gravity: the outfit of {:.0f} kg would need its "
                      "centre at x {:.3f} m, outside the hull; what is modelled weighs "
                      "{:.0f} kg with its centre at x {:.3f} m",
                      outfit.mass, target, mass, moment.x() / mass));
  }
  double weights = 0.0;
  for (std::size_t i = 0; i < structure.nodes.size(); ++i)
    weights += structure.node_area[static_cast<Index>(i)] *
               std::exp(outfit.decay * (structure.nodes[i].x() - middle));
  Vector3 total_moment = moment;
  for (std::size_t i = 0; i < structure.nodes.size(); ++i)
  {
    const double share = outfit.mass * structure.node_area[static_cast<Index>(i)] *
                         std::exp(outfit.decay * (structure.nodes[i].x() - middle)) / weights;
    if (share <= 0.0)
      continue;
    outfit.point_masses.emplace_back(structure.node_point[i], share);
    total_moment += share * structure.nodes[i];
  }
  if (model.craft.centre_of_gravity)
    outfit.centre_mismatch = total_moment / displacement - *model.craft.centre_of_gravity;
  return outfit;
}

Index node_at(const Structure& structure, const std::string& point_name)
{
  const auto& named = structure.mesh->named_points;
  const auto point = std::find_if(named.begin(), named.end(),
                                  [&](const auto& entry) { return entry.first == point_name; });
  if (point == named.end())
    throw SolveError(fmt::format("point '{}' does not exist", point_name));
  const auto node =
      std::find(structure.node_point.begin(), structure.node_point.end(), point->second);
  if (node == structure.node_point.end())
    throw SolveError(
        fmt::format("point '{}' has no structure: no member or plate ends there", point_name));
  return static_cast<Index>(node - structure.node_point.begin());
}

Index nearest_node(const Structure& structure, const Vector3& position)
{
  const auto nearest =
      std::min_element(structure.nodes.begin(), structure.nodes.end(),
                       [&](const Vector3& a, const Vector3& b)
                       { return (a - position).squaredNorm() < (b - position).squaredNorm(); });
  if (nearest == structure.nodes.end())
    throw SolveError("there is no structure to find a node of");
  return static_cast<Index>(nearest - structure.nodes.begin());
}

QuadPoints shell_points(const Structure& structure, const Shell& shell)
{
  QuadPoints points;
  for (std::size_t i = 0; i < 4; ++i)
    points[i] = structure.nodes[static_cast<std::size_t>(shell.nodes[i])];
  return points;
}

MemberGeometry member_geometry(const Structure& structure, const Member& member)
{
  return {.node_1 = structure.nodes[static_cast<std::size_t>(member.nodes[0])],
          .node_2 = structure.nodes[static_cast<std::size_t>(member.nodes[1])],
          .offset_1 = member.offset_1,
          .offset_2 = member.offset_2,
          .upright = member.upright};
}

Vector24 shell_displacement(const Shell& shell, const Eigen::Ref<const VectorX>& displacement)
{
  Vector24 local;
  for (Index i = 0; i < 4; ++i)
    local.segment<6>(6 * i) = displacement.segment<6>(6 * shell.nodes[static_cast<std::size_t>(i)]);
  return local;
}

Vector12 member_displacement(const Member& member, const Eigen::Ref<const VectorX>& displacement)
{
  Vector12 local;
  local << displacement.segment<6>(6 * member.nodes[0]),
      displacement.segment<6>(6 * member.nodes[1]);
  return local;
}

MatrixX rigid_modes(const Structure& structure, const Vector3& point)
{
  MatrixX modes = MatrixX::Zero(static_cast<Index>(6 * structure.nodes.size()), 6);
  for (std::size_t i = 0; i < structure.nodes.size(); ++i)
  {
    const auto row = static_cast<Index>(6 * i);
    modes.block<6, 6>(row, 0).setIdentity();
    for (Index axis = 0; axis < 3; ++axis)
      modes.block<3, 1>(row, 3 + axis) =
          Vector3::Unit(axis).cross(structure.nodes[i] - point); // u = r x (x - point)
  }
  return modes;
}

Vector3 material_axis(const Structure& structure, const Shell& shell)
{
  const Vector3 normal =
      cell_normal(*structure.mesh, structure.mesh->cells[static_cast<std::size_t>(shell.cell)]);
  constexpr double transverse = 0.70710678; // normal within 45 degrees of x
  return std::abs(normal.x()) > transverse ? Vector3::UnitY() : Vector3::UnitX();
}
} // namespace carlin
