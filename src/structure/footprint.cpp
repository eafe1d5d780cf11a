#include "build.hpp"
#include "geometry.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <map>

namespace carlin
{
namespace
{
/// Nodes are in line when they spread across by less than this part of their spread along.
constexpr double in_line_ratio = 1e-4;
/// Structure farther from the centre of a footprint than its half diagonal, a cell or this is not
/// under it [m].
constexpr double reach = 0.05;

using NodeAreas = std::map<Index, double>; // node -> weight

/// Two axes of the boat along which a footprint is measured on a surface, and the third.
struct Bearing
{
  Index along = 0, across = 1, through = 2;
};

/// On level plating x and y, on fore-and-aft plating x and z, on transverse plating y and z.
Bearing bearing_on(const Vector3& normal)
{
  Index largest = 0;
  normal.cwiseAbs().maxCoeff(&largest);
  if (largest == 2)
    return {0, 1, 2};
  return largest == 1 ? Bearing{0, 2, 1} : Bearing{1, 2, 0};
}

bool is_listed(const FootprintArea& area, const MeshPart& part)
{
  return area.parts.empty() || std::any_of(area.parts.begin(), area.parts.end(),
                                           [&](const std::string& name)
                                           { return name == part.name || name == part.family; });
}

class FootprintFinder
{
public:
  FootprintFinder(const Structure& structure, const FootprintArea& area)
      : structure_(structure), area_(area)
  {
    const std::vector<MeshPart>& parts = structure.mesh->parts;
    for (const MeshPart& part : parts)
      is_listed_.push_back(is_listed(area, part));
    shell_distance_.assign(structure.shells.size(), no_distance);
    member_distance_.assign(structure.members.size(), no_distance);
    for (std::size_t s = 0; s < structure.shells.size(); ++s)
      if (is_listed_[static_cast<std::size_t>(structure.shells[s].part)])
        note(shell_distance_[s],
             distance_to_quad(area.centre, shell_points(structure, structure.shells[s])));
    for (std::size_t m = 0; m < structure.members.size(); ++m)
      if (is_listed_[static_cast<std::size_t>(structure.members[m].part)])
        note(member_distance_[m], distance_to_line(area.centre, node(structure.members[m].nodes[0]),
                                                   node(structure.members[m].nodes[1])));
  }

  double distance() const { return nearest_; }

  /// Nodes inside the rectangle on the surface nearest to its centre; too few of them: the nodes of
  /// the nearest cells; no cells about: the nearest nodes of members.
  NodeAreas nodes() const
  {
    NodeAreas found;
    if (area_.length > 0.0)
      found = nodes_inside();
    if (!spans_a_plane(found))
    {
      NodeAreas cells = nodes_of_nearest_shells();
      if (!cells.empty())
        return cells;
    }
    return found.empty() ? nearest_member_nodes() : found;
  }

private:
  static constexpr double no_distance = 1e300;

  void note(double& slot, double distance)
  {
    slot = distance;
    nearest_ = std::min(nearest_, distance);
  }
  const Vector3& node(Index n) const { return structure_.nodes[static_cast<std::size_t>(n)]; }
  double tie() const { return nearest_ + 1e-9 + 1e-6 * structure_.mesh->mesh_size; }

  Vector3 normal_of(const Shell& shell) const
  {
    return cell_normal(*structure_.mesh,
                       structure_.mesh->cells[static_cast<std::size_t>(shell.cell)]);
  }

  NodeAreas nodes_inside() const
  {
    Bearing bearing; // members alone bear like level plating
    double nearest_shell = no_distance;
    for (std::size_t s = 0; s < structure_.shells.size(); ++s)
      if (shell_distance_[s] < nearest_shell - 1e-9)
      {
        nearest_shell = shell_distance_[s];
        bearing = bearing_on(normal_of(structure_.shells[s]));
      }
    NodeAreas found;
    for (const Shell& shell : structure_.shells)
    {
      if (!is_listed_[static_cast<std::size_t>(shell.part)] ||
          bearing_on(normal_of(shell)).through != bearing.through)
        continue;
      const std::size_t corners =
          corner_count(structure_.mesh->cells[static_cast<std::size_t>(shell.cell)]);
      const double share =
          shell_area(shell_points(structure_, shell)) / static_cast<double>(corners);
      for (std::size_t i = 0; i < corners; ++i)
        if (is_inside(shell.nodes[i], bearing))
          found[shell.nodes[i]] += share;
    }
    if (!found.empty())
      return found;
    for (const Member& member : structure_.members)
      if (is_listed_[static_cast<std::size_t>(member.part)])
        for (const Index n : member.nodes)
          if (is_inside(n, bearing))
            found[n] += 0.5 * (node(member.nodes[1]) - node(member.nodes[0])).norm();
    return found;
  }

  /// Within the rectangle, and not on another surface above or below it.
  bool is_inside(Index n, const Bearing& bearing) const
  {
    const Vector3 d = (node(n) - area_.centre).cwiseAbs();
    const double slack = 1e-6 * (area_.length + area_.width);
    const double depth = 0.5 * std::max(area_.length, area_.width) + nearest_;
    return d[bearing.along] <= 0.5 * area_.length + slack &&
           d[bearing.across] <= 0.5 * area_.width + slack && d[bearing.through] <= depth;
  }

  bool spans_a_plane(const NodeAreas& found) const
  {
    std::vector<Vector3> positions;
    for (const auto& [n, area] : found)
      positions.push_back(node(n));
    return !is_in_line(positions);
  }

  NodeAreas nodes_of_nearest_shells() const
  {
    double nearest = no_distance;
    for (const double distance : shell_distance_)
      nearest = std::min(nearest, distance);
    NodeAreas found;
    if (nearest > tie() && nearest > 0.5 * std::hypot(area_.length, area_.width))
      return found; // a member is nearer
    for (std::size_t s = 0; s < structure_.shells.size(); ++s)
    {
      if (shell_distance_[s] > nearest + 1e-9 + 1e-6 * structure_.mesh->mesh_size)
        continue;
      const Shell& shell = structure_.shells[s];
      const std::size_t corners =
          corner_count(structure_.mesh->cells[static_cast<std::size_t>(shell.cell)]);
      const double share =
          shell_area(shell_points(structure_, shell)) / static_cast<double>(corners);
      for (std::size_t i = 0; i < corners; ++i)
        found[shell.nodes[i]] += share;
    }
    return found;
  }

  NodeAreas nearest_member_nodes() const
  {
    double nearest = no_distance;
    const auto visit = [&](const auto& action)
    {
      for (const Member& member : structure_.members)
        if (is_listed_[static_cast<std::size_t>(member.part)])
          for (const Index n : member.nodes)
            action(n, (node(n) - area_.centre).norm());
    };
    visit([&](Index, double distance) { nearest = std::min(nearest, distance); });
    NodeAreas found;
    visit(
        [&](Index n, double distance)
        {
          if (distance <= nearest + 1e-9)
            found[n] = 1.0;
        });
    return found;
  }

  const Structure& structure_;
  const FootprintArea& area_;
  std::vector<bool> is_listed_;
  std::vector<double> shell_distance_, member_distance_;
  double nearest_ = no_distance;
};

void require_parts(const Structure& structure, const FootprintArea& area, const std::string& what)
{
  for (const std::string& name : area.parts)
    if (std::none_of(structure.mesh->parts.begin(), structure.mesh->parts.end(),
                     [&](const MeshPart& part)
                     { return part.name == name || part.family == name; }))
      throw SolveError(
          fmt::format("{}: its footprint stands on part '{}', which this configuration "
                      "does not have",
                      what, name));
}
} // namespace

MatrixX spreading_weights(const std::vector<Vector3>& positions, const std::vector<double>& areas,
                          const Vector3& point)
{
  const std::size_t count = positions.size();
  double total = 0.0;
  Vector3 centre = Vector3::Zero();
  for (std::size_t i = 0; i < count; ++i)
  {
    total += areas[i];
    centre += areas[i] * positions[i];
  }
  centre /= total;
  Matrix3 spread = Matrix3::Zero(); // sum of a d d'
  for (std::size_t i = 0; i < count; ++i)
    spread += areas[i] * (positions[i] - centre) * (positions[i] - centre).transpose();
  Matrix3 second = spread.trace() * Matrix3::Identity() - spread;
  Matrix3 carried_by_nodes = Matrix3::Zero(); // moments per unit turn and area, as a length squared
  const Eigen::SelfAdjointEigenSolver<Matrix3> axes(spread);
  if (spread.trace() <= 0.0) // a single node
    carried_by_nodes.setIdentity();
  else if (is_in_line(positions)) // forces on a line give no moment about it
    carried_by_nodes = spread.trace() / total * axes.eigenvectors().col(2) *
                       axes.eigenvectors().col(2).transpose();
  second += total * carried_by_nodes;
  const Eigen::LDLT<Matrix3> factor(second);

  MatrixX weights = MatrixX::Zero(static_cast<Index>(6 * count), 6);
  for (Index c = 0; c < 6; ++c)
  {
    const Vector6 unit = Vector6::Unit(c);
    const Vector3 force = unit.head<3>();
    const Vector3 moment = unit.tail<3>() + (point - centre).cross(force);
    const Vector3 turn = factor.solve(moment);
    for (std::size_t i = 0; i < count; ++i)
    {
      const auto row = static_cast<Index>(6 * i);
      weights.block<3, 1>(row, c) = areas[i] * (force / total + turn.cross(positions[i] - centre));
      weights.block<3, 1>(row + 3, c) = areas[i] * (carried_by_nodes * turn);
    }
  }
  return weights;
}

bool is_in_line(const std::vector<Vector3>& positions)
{
  if (positions.size() < 3)
    return true;
  Vector3 centre = Vector3::Zero();
  for (const Vector3& position : positions)
    centre += position / static_cast<double>(positions.size());
  Matrix3 spread = Matrix3::Zero();
  for (const Vector3& position : positions)
    spread += (position - centre) * (position - centre).transpose();
  const Eigen::SelfAdjointEigenSolver<Matrix3> axes(spread, Eigen::EigenvaluesOnly);
  return axes.eigenvalues()[1] <= in_line_ratio * in_line_ratio * axes.eigenvalues()[2];
}

Footprint footprint_over(const Structure& structure, std::span<const FootprintArea> areas,
                         const Vector3& point, const std::string& what)
{
  NodeAreas nodes;
  for (const FootprintArea& area : areas)
  {
    require_parts(structure, area, what);
    const FootprintFinder finder(structure, area);
    const double allowed =
        std::max({0.5 * std::hypot(area.length, area.width), structure.mesh->mesh_size, reach});
    if (finder.distance() > allowed)
      throw SolveError(fmt::format("{}: no structure under its footprint at {}", what,
                                   structure.mesh->place(area.centre)));
    for (const auto& [node, weight] : finder.nodes())
      nodes[node] += weight;
  }
  Footprint footprint;
  footprint.point = point;
  std::vector<Vector3> positions;
  for (const auto& [node, weight] : nodes)
  {
    footprint.nodes.push_back(node);
    footprint.areas.push_back(weight);
    positions.push_back(structure.nodes[static_cast<std::size_t>(node)]);
  }
  const MatrixX weights = spreading_weights(positions, footprint.areas, point);
  std::vector<Eigen::Triplet<double>> entries;
  for (std::size_t i = 0; i < footprint.nodes.size(); ++i)
    for (Index r = 0; r < 6; ++r)
      for (Index c = 0; c < 6; ++c)
      {
        const double weight = weights(static_cast<Index>(6 * i) + r, c);
        if (weight != 0.0)
          entries.emplace_back(static_cast<int>(6 * footprint.nodes[i] + r), static_cast<int>(c),
                               weight);
      }
  footprint.weights.resize(static_cast<Index>(6 * structure.nodes.size()), 6);
  footprint.weights.setFromTriplets(entries.begin(), entries.end());
  return footprint;
}

Footprint footprint(const Structure& structure, const FootprintArea& area, const Vector3& point,
                    const std::string& what)
{
  return footprint_over(structure, {&area, 1}, point, what);
}

Footprint point_footprint(const Structure& structure, Index node)
{
  Footprint footprint;
  footprint.point = structure.nodes[static_cast<std::size_t>(node)];
  footprint.nodes = {node};
  footprint.areas = {1.0};
  footprint.weights.resize(static_cast<Index>(6 * structure.nodes.size()), 6);
  for (Index c = 0; c < 6; ++c)
    footprint.weights.insert(6 * node + c, c) = 1.0;
  footprint.weights.makeCompressed();
  return footprint;
}
} // namespace carlin
