#include "nodes.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <map>
#include <set>

namespace carlin
{
namespace
{
constexpr Index rest = -1; // group of everything that is not fastened

/// Groups of parts that move together, and the edges where they meet.
struct Groups
{
  std::vector<Index> of_part; // group of each part
  std::vector<Index> joint;   // of each group
};

/// Users of one edge that a fastened part touches.
struct EdgeUsers
{
  Index a = -1, b = -1;
  std::map<Index, Vector3> normals; // by group: normal of one of its cells, or a member's upright
};

Groups fastened_groups(const Mesh& mesh)
{
  Groups groups;
  groups.of_part.assign(mesh.parts.size(), rest);
  for (std::size_t j = 0; j < mesh.joints.size(); ++j)
  {
    const Joint& joint = mesh.joints[j];
    bool is_found = false;
    for (std::size_t p = 0; p < mesh.parts.size(); ++p)
    {
      if (mesh.parts[p].name != joint.part && mesh.parts[p].family != joint.part)
        continue;
      is_found = true;
      if (groups.of_part[p] != rest)
        throw ModelError(
            joint.where,
            fmt::format("joint '{}': part '{}' is fastened by joint '{}' "
                        "too; keep one of them",
                        joint.name, joint.part,
                        mesh.joints[static_cast<std::size_t>(
                                        groups.joint[static_cast<std::size_t>(groups.of_part[p])])]
                            .name));
      groups.of_part[p] = static_cast<Index>(groups.joint.size());
      groups.joint.push_back(static_cast<Index>(j));
    }
    if (!is_found)
      throw ModelError(joint.where,
                       fmt::format("joint '{}': part '{}' is not in this configuration", joint.name,
                                   joint.part));
  }
  return groups;
}

/// A member goes with a fastened plate when all its points lie on it and at least one segment is
/// inside it, i.e. touches no other plate: a stiffener of the hatch, not the carling at its edge.
void take_members_along(const Mesh& mesh, const EdgeTable& edges, Groups& groups)
{
  std::vector<std::set<Index>> points_of_part(mesh.parts.size());
  for (const Cell& cell : mesh.cells)
    if (groups.of_part[static_cast<std::size_t>(cell.part)] != rest)
      for (std::size_t i = 0; i < corner_count(cell); ++i)
        points_of_part[static_cast<std::size_t>(cell.part)].insert(cell.points[i]);

  std::vector<std::set<Index>> candidates(mesh.parts.size()); // plates a member may go with
  std::vector<bool> is_visited(mesh.parts.size(), false);
  for (const Run& run : mesh.runs)
  {
    const auto part = static_cast<std::size_t>(run.part);
    std::set<Index> here;
    for (std::size_t p = 0; p < mesh.parts.size(); ++p)
      if (!points_of_part[p].empty() &&
          std::all_of(run.points.begin(), run.points.end(),
                      [&](Index point) { return points_of_part[p].contains(point); }))
        here.insert(static_cast<Index>(p));
    std::set<Index> inside;
    for (std::size_t s = 0; s + 1 < run.points.size(); ++s)
    {
      const auto cells = edges.cells_at(run.points[s], run.points[s + 1]);
      for (const Index p : here)
        if (!cells.empty() &&
            std::all_of(cells.begin(), cells.end(),
                        [&](const auto& entry)
                        { return mesh.cells[static_cast<std::size_t>(entry.second)].part == p; }))
          inside.insert(p);
    }
    if (!is_visited[part])
      candidates[part] = inside;
    else
      std::erase_if(candidates[part], [&](Index p) { return !inside.contains(p); });
    is_visited[part] = true;
  }
  for (std::size_t m = 0; m < mesh.parts.size(); ++m)
    if (groups.of_part[m] == rest && !candidates[m].empty())
      groups.of_part[m] = groups.of_part[static_cast<std::size_t>(*candidates[m].begin())];
}

/// Edges that two groups share. Cells come first: their normal tells the plane of the joint.
std::map<std::uint64_t, EdgeUsers> joint_edges(const Mesh& mesh, const Groups& groups)
{
  std::map<std::uint64_t, EdgeUsers> users;
  const auto note = [&](Index a, Index b, Index part, const Vector3& normal)
  {
    EdgeUsers& edge = users[edge_key(a, b)];
    edge.a = std::min(a, b);
    edge.b = std::max(a, b);
    edge.normals.emplace(groups.of_part[static_cast<std::size_t>(part)], normal);
  };
  for (const Cell& cell : mesh.cells)
  {
    const std::size_t corners = corner_count(cell);
    const Vector3 normal = cell_normal(mesh, cell);
    for (std::size_t i = 0; i < corners; ++i)
      note(cell.points[i], cell.points[(i + 1) % corners], cell.part, normal);
  }
  for (const Run& run : mesh.runs)
    for (std::size_t s = 0; s + 1 < run.points.size(); ++s)
      note(run.points[s], run.points[s + 1], run.part, run.upright[s]);
  std::erase_if(users, [](const auto& entry) { return entry.second.normals.size() < 2; });
  return users;
}

using SplitNodes = std::map<std::pair<Index, Index>, Index>; // (point, group) -> node

class Numberer
{
public:
  Numberer(const Mesh& mesh, const Groups& groups, SplitNodes split)
      : mesh_(mesh), groups_(groups), split_(std::move(split)), whole_(mesh.points.size(), -1)
  {
  }

  /// Slot of the node that `part` uses at `point`; its value is the node's number.
  Index& slot(Index point, Index part)
  {
    const Index group = groups_.of_part[static_cast<std::size_t>(part)];
    if (group != rest)
    {
      const auto found = split_.find({point, group});
      if (found != split_.end())
        return found->second;
    }
    return whole_[static_cast<std::size_t>(point)];
  }
  Index group_node(Index point, Index group) const
  {
    return group == rest ? whole_[static_cast<std::size_t>(point)] : split_.at({point, group});
  }

  Numbering run()
  {
    for (const Cell& cell : mesh_.cells)
      for (std::size_t i = 0; i < corner_count(cell); ++i)
        slot(cell.points[i], cell.part) = 0; // in use
    for (const Run& run : mesh_.runs)
      for (const Index point : run.points)
        slot(point, run.part) = 0;
    Numbering numbering;
    number(numbering);
    for (const Cell& cell : mesh_.cells)
    {
      std::array<Index, 4> nodes{};
      for (std::size_t i = 0; i < 4; ++i)
        nodes[i] = slot(cell.points[i < corner_count(cell) ? i : 2], cell.part);
      numbering.cell_nodes.push_back(nodes);
    }
    for (const Run& run : mesh_.runs)
    {
      std::vector<Index>& nodes = numbering.run_nodes.emplace_back();
      for (const Index point : run.points)
        nodes.push_back(slot(point, run.part));
    }
    return numbering;
  }

private:
  // In the order of points, so that neighbours stay near in memory; the rest before its copies.
  void number(Numbering& numbering)
  {
    auto copy = split_.begin();
    for (std::size_t p = 0; p < whole_.size(); ++p)
    {
      const auto give = [&](Index& node)
      {
        if (node < 0)
          return;
        node = static_cast<Index>(numbering.nodes.size());
        numbering.nodes.push_back(mesh_.points[p]);
        numbering.node_point.push_back(static_cast<Index>(p));
      };
      give(whole_[p]);
      for (; copy != split_.end() && copy->first.first == static_cast<Index>(p); ++copy)
        give(copy->second);
    }
  }

  const Mesh& mesh_;
  const Groups& groups_;
  SplitNodes split_;
  std::vector<Index> whole_;
};

/// Adds the share of one edge to the springs at one of its ends; edges in line share a spring.
void add_spring(std::vector<JointSpring>& springs, const JointSpring& share)
{
  constexpr double in_line = 0.866; // within 30 degrees
  for (JointSpring& spring : springs)
  {
    const double cosine = spring.axes.col(0).dot(share.axes.col(0));
    if (spring.node_part != share.node_part || spring.node_other != share.node_other ||
        std::abs(cosine) < in_line)
      continue;
    const double sum = spring.tributary_length + share.tributary_length;
    const Vector3 along = (spring.tributary_length * spring.axes.col(0) +
                           (cosine > 0.0 ? 1.0 : -1.0) * share.tributary_length * share.axes.col(0))
                              .normalized();
    const Vector3 normal = (spring.axes.col(2) + share.axes.col(2)).normalized();
    const Vector3 across = normal.cross(along).normalized();
    spring.axes << along, across, along.cross(across);
    spring.tributary_length = sum;
    return;
  }
  springs.push_back(share);
}

std::vector<JointSpring> joint_springs(const Mesh& mesh, const Groups& groups,
                                       const std::map<std::uint64_t, EdgeUsers>& edges,
                                       const Numberer& numberer)
{
  std::map<Index, std::vector<JointSpring>> by_node; // of the fastened part
  for (const auto& [key, edge] : edges)
  {
    // The fastened groups hang on the rest; without a rest the later ones on the first.
    const Index other = edge.normals.begin()->first;
    const Vector3 line = mesh.points[static_cast<std::size_t>(edge.b)] -
                         mesh.points[static_cast<std::size_t>(edge.a)];
    for (auto user = std::next(edge.normals.begin()); user != edge.normals.end(); ++user)
      for (const Index point : {edge.a, edge.b})
      {
        JointSpring share;
        share.joint = groups.joint[static_cast<std::size_t>(user->first)];
        share.node_part = numberer.group_node(point, user->first);
        share.node_other = numberer.group_node(point, other);
        const Vector3 along = line.normalized();
        const Vector3 across = user->second.cross(along).normalized();
        share.axes << along, across, along.cross(across);
        share.tributary_length = 0.5 * line.norm();
        add_spring(by_node[share.node_part], share);
      }
  }
  std::vector<JointSpring> springs;
  for (const auto& [node, at_node] : by_node)
    springs.insert(springs.end(), at_node.begin(), at_node.end());
  for (JointSpring& spring : springs)
  {
    const Joint& joint = mesh.joints[static_cast<std::size_t>(spring.joint)];
    spring.stiffness = {joint.stiffness_along * spring.tributary_length,
                        joint.stiffness_across * spring.tributary_length,
                        joint.stiffness_normal * spring.tributary_length,
                        joint.stiffness_rotation * spring.tributary_length};
  }
  return springs;
}
} // namespace

Numbering number_nodes(const Mesh& mesh, const EdgeTable& edges)
{
  Groups groups = fastened_groups(mesh);
  std::map<std::uint64_t, EdgeUsers> shared;
  SplitNodes split;
  if (!groups.joint.empty())
  {
    take_members_along(mesh, edges, groups);
    shared = joint_edges(mesh, groups);
    for (const auto& [key, edge] : shared)
      for (const auto& [group, normal] : edge.normals)
        if (group != rest)
        {
          split.emplace(std::pair(edge.a, group), -1);
          split.emplace(std::pair(edge.b, group), -1);
        }
  }
  Numberer numberer(mesh, groups, std::move(split));
  Numbering numbering = numberer.run();
  numbering.joints = joint_springs(mesh, groups, shared, numberer);
  for (std::size_t j = 0; j < mesh.joints.size(); ++j)
    if (std::none_of(numbering.joints.begin(), numbering.joints.end(),
                     [&](const JointSpring& spring)
                     { return spring.joint == static_cast<Index>(j); }))
      throw ModelError(mesh.joints[j].where,
                       fmt::format("joint '{}': part '{}' meets no other part along an edge",
                                   mesh.joints[j].name, mesh.joints[j].part));
  return numbering;
}
} // namespace carlin
