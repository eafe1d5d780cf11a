#include "build.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
constexpr std::array<const char*, 6> component_names = {"u_x", "u_y", "u_z", "r_x", "r_y", "r_z"};

/// Nodes on the straight line between two points, one a mesh point: what a joint fastens there is
/// held through the joint.
std::vector<Index> nodes_on_edge(const Structure& structure, const Vector3& from, const Vector3& to)
{
  const Vector3 line = to - from;
  const double length = line.norm();
  const double tolerance = 1e-6 * length;
  std::vector<Index> nodes;
  Index last_point = -1;
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
  {
    const Vector3 d = structure.nodes[n] - from;
    const double along = d.dot(line) / length;
    const double aside = (d - along / length * line).norm();
    if (aside > tolerance || along < -tolerance || along > length + tolerance ||
        structure.node_point[n] == last_point)
      continue;
    last_point = structure.node_point[n];
    nodes.push_back(static_cast<Index>(n));
  }
  return nodes;
}

Vector3 point_position(const Structure& structure, const Support& support, const std::string& name)
{
  for (const auto& [point_name, point] : structure.mesh->named_points)
    if (point_name == name)
      return structure.mesh->points[static_cast<std::size_t>(point)];
  throw ModelError(support.where,
                   fmt::format("support '{}': point '{}' does not exist", support.name, name));
}

std::vector<Index> supported_nodes(const Structure& structure, const Support& support)
{
  std::vector<Index> nodes;
  for (const std::string& point : support.points)
    nodes.push_back(node_at(structure, point));
  for (const auto& [from, to] : support.edges)
  {
    const std::vector<Index> on_edge =
        nodes_on_edge(structure, point_position(structure, support, from),
                      point_position(structure, support, to));
    if (on_edge.empty())
      throw ModelError(support.where, fmt::format("support '{}': no structure on the edge {} to {}",
                                                  support.name, from, to));
    nodes.insert(nodes.end(), on_edge.begin(), on_edge.end());
  }
  std::sort(nodes.begin(), nodes.end());
  nodes.erase(std::unique(nodes.begin(), nodes.end()), nodes.end());
  return nodes;
}
} // namespace

std::vector<SupportedFreedom> supported_freedoms(const Structure& structure, const Model& model)
{
  std::vector<SupportedFreedom> supported;
  if (!model.frame)
    return supported;
  const std::vector<Support>& supports = model.frame->supports;
  for (std::size_t s = 0; s < supports.size(); ++s)
  {
    const Support& support = supports[s];
    for (const Index node : supported_nodes(structure, support))
      for (std::size_t c = 0; c < 6; ++c)
        if (support.holds[c] || support.springs[c].value_or(0.0) > 0.0)
          supported.push_back({.freedom = 6 * node + static_cast<Index>(c),
                               .motion = support.motion[static_cast<Index>(c)],
                               .stiffness = support.holds[c] ? 0.0 : *support.springs[c],
                               .support = static_cast<Index>(s)});
  }
  std::stable_sort(supported.begin(), supported.end(),
                   [](const SupportedFreedom& a, const SupportedFreedom& b)
                   { return a.freedom < b.freedom; });
  std::vector<SupportedFreedom> unique;
  for (const SupportedFreedom& freedom : supported)
  {
    const bool is_repeated = !unique.empty() && unique.back().freedom == freedom.freedom;
    if (!is_repeated)
    {
      unique.push_back(freedom);
      continue;
    }
    const SupportedFreedom& first = unique.back();
    if (first.motion == freedom.motion && first.stiffness == freedom.stiffness)
      continue; // two edges that meet in a corner say the same
    const Support& support = supports[static_cast<std::size_t>(freedom.support)];
    throw ModelError(
        support.where,
        fmt::format("support '{}' and support '{}' hold {} of the same point differently",
                    supports[static_cast<std::size_t>(first.support)].name, support.name,
                    component_names[static_cast<std::size_t>(freedom.freedom % 6)]));
  }
  return unique;
}
} // namespace carlin
