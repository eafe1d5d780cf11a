#include "geometry.hpp"

#include "carlin/core/error.hpp"
#include "carlin/recovery/stiffness.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>
#include <map>
#include <set>

namespace carlin
{
namespace
{
const NamedPlane& plane_named(const Mesh& mesh, const std::string& name)
{
  const auto found = std::ranges::find(mesh.stations, name, &NamedPlane::name);
  if (found != mesh.stations.end())
    return *found;
  std::vector<std::string> known;
  for (const NamedPlane& plane : mesh.stations)
    known.push_back(plane.name);
  throw ModelError({}, fmt::format("stiffness: station '{}' does not exist; stations are {}", name,
                                   fmt::join(known, ", ")));
}

bool is_on(const NamedPlane& plane, const Vector3& position)
{
  constexpr double same = 1e-6; // m: points are put on planes, this is round-off
  return std::abs(position.x() - plane.x_at_base - position.z() * std::tan(plane.rake)) <= same;
}

/// Stiffness of plating along the boat per width, free to narrow [N/m].
double axial_stiffness(const ShellSection& section) { return 1.0 / section.A.inverse()(0, 0); }

/// Sums of what bears on one edge or one point of the section, to be averaged over those that meet
/// there from aft and from forward.
struct Mean
{
  double axial = 0.0, in_plane = 0.0, count = 0.0;
};

struct Weights
{
  double axial = 0.0, in_plane = 0.0;
};

void add_plating(const Structure& base, const NamedPlane& plane, std::map<Index, Weights>& weights)
{
  std::map<PointEdge, Mean> edges;
  for (const Shell& shell : base.shells)
  {
    const ShellSection& section = base.shell_sections[static_cast<std::size_t>(shell.section)];
    int on_plane = 0;
    const int corners = corner_count(shell);
    for (int i = 0; i < corners; ++i)
      on_plane += is_on(plane, node_position(base, shell.nodes[static_cast<std::size_t>(i)]));
    if (on_plane != 2) // none, a corner, or a bulkhead in the section itself
      continue;
    for (int i = 0; i < corners; ++i)
    {
      const Vector3& from = node_position(base, shell.nodes[static_cast<std::size_t>(i)]);
      const Vector3& to =
          node_position(base, shell.nodes[static_cast<std::size_t>((i + 1) % corners)]);
      if (!is_on(plane, from) || !is_on(plane, to))
        continue;
      Mean& mean = edges[shell_edge(base, shell, i)];
      mean.axial += axial_stiffness(section) * (to - from).norm();
      mean.in_plane += section.thickness * (to - from).norm();
      mean.count += 1.0;
    }
  }
  for (const auto& [edge, mean] : edges)
    for (const Index point : {edge.first, edge.second})
    {
      weights[point].axial += 0.5 * mean.axial / mean.count;
      weights[point].in_plane += 0.5 * mean.in_plane / mean.count;
    }
}

void add_members(const Structure& base, const NamedPlane& plane, std::map<Index, Weights>& weights)
{
  std::map<std::pair<Index, Index>, Mean> ends; // by run and point
  for (const Member& member : base.members)
  {
    std::array<bool, 2> on{};
    for (std::size_t i = 0; i < 2; ++i)
      on[i] = is_on(plane, node_position(base, member.nodes[i]));
    if (on[0] == on[1]) // away from the section, or in it
      continue;
    Mean& mean = ends[{member.run, point_of(base, member.nodes[on[0] ? 0 : 1])}];
    mean.axial += base.member_sections[static_cast<std::size_t>(member.section)].axial_stiffness;
    mean.count += 1.0;
  }
  for (const auto& [run_and_point, mean] : ends)
    weights[run_and_point.second].axial += mean.axial / mean.count;
}
} // namespace

std::vector<EndSection> end_sections(const Structure& base,
                                     const std::vector<std::string>& stations)
{
  std::vector<EndSection> sections;
  for (const std::string& name : stations)
  {
    const NamedPlane& plane = plane_named(*base.mesh, name);
    std::map<Index, Weights> weights;
    add_plating(base, plane, weights);
    add_members(base, plane, weights);

    EndSection section{
        .name = name, .x = 0.0, .depth = 0.0, .points = {}, .weights = {}, .area_weights = {}};
    double total = 0.0, lowest = 0.0, highest = 0.0;
    for (const auto& [point, weight] : weights)
    {
      const Vector3& position = base.mesh->points[static_cast<std::size_t>(point)];
      lowest = section.points.empty() ? position.z() : std::min(lowest, position.z());
      highest = section.points.empty() ? position.z() : std::max(highest, position.z());
      section.points.push_back(point);
      section.weights.push_back(weight.axial);
      section.area_weights.push_back(weight.in_plane);
      section.x += weight.axial * position.x();
      total += weight.axial;
    }
    if (total <= 0.0)
      throw SolveError(
          fmt::format("stiffness: no plating or member passes through station '{}'; name "
                      "stations of the hull's body as bays",
                      name));
    section.x /= total;
    section.depth = highest - lowest;
    sections.push_back(std::move(section));
  }
  return sections;
}
} // namespace carlin
