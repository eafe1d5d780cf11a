#include "carlin/core/error.hpp"
#include "carlin/loads/loads.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
VectorX no_forces(const Structure& structure)
{
  return VectorX::Zero(static_cast<Index>(6 * structure.nodes.size()));
}

template <typename Element, typename ElementVector>
void add_forces(VectorX& forces, const Element& element, const ElementVector& element_forces)
{
  for (std::size_t i = 0; i < element.nodes.size(); ++i)
    forces.segment<6>(6 * element.nodes[i]) +=
        element_forces.template segment<6>(static_cast<Index>(6 * i));
}

/// Which parts a list of names means. @throws ModelError for a name no part has.
std::vector<bool> parts_named(const Structure& structure, const std::vector<std::string>& names,
                              const FileLocation& where)
{
  const std::vector<MeshPart>& parts = structure.mesh->parts;
  std::vector<bool> is_named(parts.size(), false);
  for (const std::string& name : names)
  {
    bool is_found = false;
    for (std::size_t p = 0; p < parts.size(); ++p)
      if (parts[p].name == name || parts[p].family == name)
      {
        is_named[p] = true;
        is_found = true;
      }
    if (!is_found)
      throw ModelError(where, fmt::format("part '{}' is not in this configuration", name));
  }
  return is_named;
}

/// x of a named station at height z; `otherwise` for an empty name.
double station_x(const Mesh& mesh, const std::string& name, double z, double otherwise,
                 const FileLocation& where)
{
  if (name.empty())
    return otherwise;
  const auto plane = std::find_if(mesh.stations.begin(), mesh.stations.end(),
                                  [&](const NamedPlane& station) { return station.name == name; });
  if (plane == mesh.stations.end())
    throw ModelError(where, fmt::format("station '{}' does not exist", name));
  return plane->x_at_base + z * std::tan(plane->rake);
}
} // namespace

VectorX gravity_forces(const Structure& structure, const Vector3& up)
{
  VectorX field = no_forces(structure);
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
    field.segment<3>(static_cast<Index>(6 * n)) = -standard_gravity * up;
  return structure.mass * field;
}

VectorX gravity_forces(const Structure& structure)
{
  return gravity_forces(structure, Vector3::UnitZ());
}

VectorX thermal_forces(const Structure& structure, const std::vector<double>& rise_by_part)
{
  assert(rise_by_part.size() == structure.mesh->parts.size());
  VectorX forces = no_forces(structure);
  for (const Shell& shell : structure.shells)
    if (const double rise = rise_by_part[static_cast<std::size_t>(shell.part)]; rise != 0.0)
      add_forces(forces, shell,
                 shell_thermal(shell_points(structure, shell),
                               structure.shell_sections[static_cast<std::size_t>(shell.section)],
                               material_axis(structure, shell), rise));
  for (const Member& member : structure.members)
    if (const double rise = rise_by_part[static_cast<std::size_t>(member.part)]; rise != 0.0)
      add_forces(forces, member,
                 member_thermal(member_geometry(structure, member),
                                structure.member_sections[static_cast<std::size_t>(member.section)],
                                rise));
  return forces;
}

HullLoad direct_force(const Structure& structure, const DirectForce& load)
{
  if (!load.footprint && load.point.empty())
    throw ModelError(load.where, "force: give a point or a footprint for it to act on");
  const Footprint spread =
      load.footprint ? footprint(structure, *load.footprint, load.footprint->centre, "direct force")
                     : point_footprint(structure, node_at(structure, load.point));
  Vector6 components;
  components << load.force, load.moment;
  HullLoad result;
  result.forces = spread.weights * components;
  return result;
}

HullLoad line_force(const Structure& structure, const LineForce& load)
{
  const std::vector<bool> is_loaded = parts_named(structure, load.members, load.where);
  HullLoad result;
  result.forces = no_forces(structure);
  for (std::size_t m = 0; m < structure.members.size(); ++m)
  {
    const Member& member = structure.members[m];
    if (!is_loaded[static_cast<std::size_t>(member.part)])
      continue;
    const Vector12 forces = member_line_load(
        member_geometry(structure, member),
        structure.member_sections[static_cast<std::size_t>(member.section)], load.force_per_length);
    add_forces(result.forces, member, forces);
    result.member_loads.emplace_back(static_cast<Index>(m), forces);
  }
  if (result.member_loads.empty())
    throw ModelError(load.where, "line force: none of the named parts is a member");
  return result;
}

HullLoad part_pressure(const Structure& structure, const PartPressure& load)
{
  const std::vector<bool> is_loaded = parts_named(structure, load.parts, load.where);
  constexpr double far = 1e300;
  HullLoad result;
  result.forces = no_forces(structure);
  for (std::size_t s = 0; s < structure.shells.size(); ++s)
  {
    const Shell& shell = structure.shells[s];
    if (!is_loaded[static_cast<std::size_t>(shell.part)])
      continue;
    const QuadPoints points = shell_points(structure, shell);
    const Vector3 middle = 0.25 * (points[0] + points[1] + points[2] + points[3]);
    const Mesh& mesh = *structure.mesh;
    if (middle.x() < station_x(mesh, load.stations.from, middle.z(), -far, load.where) ||
        middle.x() > station_x(mesh, load.stations.to, middle.z(), far, load.where))
      continue;
    add_forces(result.forces, shell, shell_pressure(points, load.pressure));
    result.shell_pressures.emplace_back(static_cast<Index>(s), load.pressure);
  }
  if (result.shell_pressures.empty())
    throw ModelError(load.where, "pressure: no plating of the named parts between those stations");
  return result;
}
} // namespace carlin
