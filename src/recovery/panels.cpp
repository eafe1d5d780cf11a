#include "carlin/recovery/panels.hpp"

#include "geometry.hpp"

#include <cmath>
#include <map>
#include <set>

namespace carlin
{
namespace
{
struct EdgeTable
{
  std::map<PointEdge, std::vector<Index>> shells;
  std::set<PointEdge> members;
};

EdgeTable edge_table(const Structure& structure)
{
  EdgeTable table;
  for (std::size_t s = 0; s < structure.shells.size(); ++s)
    for (int i = 0; i < corner_count(structure.shells[s]); ++i)
      table.shells[shell_edge(structure, structure.shells[s], i)].push_back(static_cast<Index>(s));
  for (const Member& member : structure.members)
    table.members.insert(
        point_edge(point_of(structure, member.nodes[0]), point_of(structure, member.nodes[1])));
  return table;
}

/// Shell on the other side of an edge inside the same panel; -1 where the panel ends.
Index neighbour(const Structure& structure, const EdgeTable& table, Index shell,
                const PointEdge& edge)
{
  const std::vector<Index>& on_edge = table.shells.at(edge);
  if (on_edge.size() != 2 || table.members.contains(edge))
    return -1;
  const Index other = on_edge[0] == shell ? on_edge[1] : on_edge[0];
  const Shell& here = structure.shells[static_cast<std::size_t>(shell)];
  const Shell& there = structure.shells[static_cast<std::size_t>(other)];
  if (there.part != here.part)
    return -1;
  const double turn = shell_normal(structure, here).dot(shell_normal(structure, there));
  return turn < std::cos(fold_angle) ? -1 : other;
}

struct AreaPoint
{
  Vector3 position;
  Vector3 area; // along the normal
};

/// 2 x 2 Gauss points of the bilinear surface: exact area and second moments of parallelograms.
std::vector<AreaPoint> area_points(const Structure& structure, const Panel& panel)
{
  const double g = 1.0 / std::sqrt(3.0);
  std::vector<AreaPoint> result;
  for (const Index shell : panel.shells)
  {
    const QuadPoints p = shell_points(structure, structure.shells[static_cast<std::size_t>(shell)]);
    for (const double xi : {-g, g})
      for (const double eta : {-g, g})
      {
        const Vector3 along_xi = 0.25 * ((1 - eta) * (p[1] - p[0]) + (1 + eta) * (p[2] - p[3]));
        const Vector3 along_eta = 0.25 * ((1 - xi) * (p[3] - p[0]) + (1 + xi) * (p[2] - p[1]));
        const Vector3 position = 0.25 * ((1 - xi) * ((1 - eta) * p[0] + (1 + eta) * p[3]) +
                                         (1 + xi) * ((1 - eta) * p[1] + (1 + eta) * p[2]));
        result.push_back({position, along_xi.cross(along_eta)});
      }
  }
  return result;
}

/// Mean directions of a shell's two pairs of sides, as vectors of their length.
std::array<Vector3, 2> side_vectors(const QuadPoints& p)
{
  return {0.5 * (p[1] - p[0] + p[2] - p[3]), 0.5 * (p[3] - p[0] + p[2] - p[1])};
}

int count_across(const Structure& structure, const Panel& panel)
{
  double sum = 0.0;
  for (const Index shell : panel.shells)
  {
    const std::array<Vector3, 2> sides =
        side_vectors(shell_points(structure, structure.shells[static_cast<std::size_t>(shell)]));
    sum += std::max(std::abs(sides[0].dot(panel.axes.col(1))),
                    std::abs(sides[1].dot(panel.axes.col(1))));
  }
  const double mean_side = sum / static_cast<double>(panel.shells.size());
  return std::max(1, static_cast<int>(std::lround(panel.short_side / mean_side)));
}

void set_rectangle(const Structure& structure, Panel& panel)
{
  const std::vector<AreaPoint> points = area_points(structure, panel);
  Vector3 area = Vector3::Zero();
  for (const AreaPoint& point : points)
  {
    area += point.area;
    panel.area += point.area.norm();
    panel.centre += point.area.norm() * point.position;
  }
  panel.centre /= panel.area;
  const Vector3 normal = area.normalized();

  // The first shell's side gives axes while the second moments are too alike to tell.
  const Vector3 side = side_vectors(
      shell_points(structure, structure.shells[static_cast<std::size_t>(panel.shells[0])]))[0];
  const Vector3 first = (side - side.dot(normal) * normal).normalized();
  const Vector3 second = normal.cross(first);
  Matrix2 moments = Matrix2::Zero();
  for (const AreaPoint& point : points)
  {
    const Vector3 arm = point.position - panel.centre;
    const Vector2 flat(arm.dot(first), arm.dot(second));
    moments += point.area.norm() * flat * flat.transpose();
  }
  const Eigen::SelfAdjointEigenSolver<Matrix2> principal(moments);
  Vector2 long_axis = principal.eigenvectors().col(1);
  constexpr double alike = 1.2; // ratio of second moments; sides within 10 %
  if (principal.eigenvalues()[1] < alike * principal.eigenvalues()[0])
    long_axis = moments(0, 0) >= moments(1, 1) ? Vector2(1.0, 0.0) : Vector2(0.0, 1.0);
  const Vector2 short_axis(-long_axis.y(), long_axis.x());
  const double ratio =
      std::sqrt(long_axis.dot(moments * long_axis) / short_axis.dot(moments * short_axis));
  panel.long_side = std::sqrt(panel.area * std::max(1.0, ratio));
  panel.short_side = panel.area / panel.long_side;
  panel.axes.col(0) = long_axis.x() * first + long_axis.y() * second;
  panel.axes.col(1) = normal.cross(panel.axes.col(0));
  panel.axes.col(2) = normal;
  panel.cells_across = count_across(structure, panel);
}

/// Weights of cell means in line from an edge that give the value at the edge: exact for
/// polynomials of one degree less than there are cells.
VectorX edge_weights(const std::vector<double>& lengths)
{
  const Index n = static_cast<Index>(lengths.size());
  MatrixX means(n, n);
  double from = 0.0;
  for (Index i = 0; i < n; ++i)
  {
    const double to = from + lengths[static_cast<std::size_t>(i)];
    for (Index power = 0; power < n; ++power) // mean of x^power over the cell
      means(power, i) = (std::pow(to, static_cast<double>(power + 1)) -
                         std::pow(from, static_cast<double>(power + 1))) /
                        (static_cast<double>(power + 1) * (to - from));
    from = to;
  }
  return means.partialPivLu().solve(VectorX::Unit(n, 0));
}

struct EdgeReader
{
  const Structure& structure;
  const EdgeTable& table;
  std::map<Index, Index> position_in_panel;

  Vector3 middle(const Shell& shell, int edge) const
  {
    const int next = (edge + 1) % corner_count(shell);
    return 0.5 * (node_position(structure, shell.nodes[static_cast<std::size_t>(edge)]) +
                  node_position(structure, shell.nodes[static_cast<std::size_t>(next)]));
  }

  /// Walks inward from an edge over at most `cells` quadrilaterals.
  PanelEdge read(Index shell, int edge, std::size_t cells) const
  {
    PanelEdge result;
    const Shell& first = structure.shells[static_cast<std::size_t>(shell)];
    const int next = (edge + 1) % corner_count(first);
    result.middle = middle(first, edge);
    result.direction = (node_position(structure, first.nodes[static_cast<std::size_t>(next)]) -
                        node_position(structure, first.nodes[static_cast<std::size_t>(edge)]))
                           .normalized();
    std::vector<Index> line;
    std::vector<double> lengths;
    while (shell >= 0 && line.size() < cells)
    {
      const Shell& here = structure.shells[static_cast<std::size_t>(shell)];
      if (corner_count(here) == 3)
      {
        if (line.empty()) // nothing is in line behind a triangle
          result.reading = {{position_in_panel.at(shell), 1.0}};
        break;
      }
      const int opposite = (edge + 2) % 4;
      line.push_back(position_in_panel.at(shell));
      lengths.push_back((middle(here, opposite) - middle(here, edge)).norm());
      const PointEdge passed = shell_edge(structure, here, opposite);
      shell = neighbour(structure, table, shell, passed);
      if (shell >= 0)
      {
        const Shell& there = structure.shells[static_cast<std::size_t>(shell)];
        edge = 0;
        while (shell_edge(structure, there, edge) != passed)
          ++edge;
      }
    }
    if (line.empty())
      return result;
    const VectorX weights = edge_weights(lengths);
    for (std::size_t i = 0; i < line.size(); ++i)
      result.reading.emplace_back(line[i], weights[static_cast<Index>(i)]);
    return result;
  }
};

void set_boundary(const Structure& structure, const EdgeTable& table, Panel& panel)
{
  EdgeReader reader{structure, table, {}};
  for (std::size_t i = 0; i < panel.shells.size(); ++i)
    reader.position_in_panel[panel.shells[i]] = static_cast<Index>(i);
  const std::size_t cells = panel.cells_across >= fine_cells_across ? 3 : 2;

  std::set<Index> boundary, all;
  for (const Index s : panel.shells)
  {
    const Shell& shell = structure.shells[static_cast<std::size_t>(s)];
    const int corners = corner_count(shell);
    for (int i = 0; i < corners; ++i)
    {
      const Index from = shell.nodes[static_cast<std::size_t>(i)];
      all.insert(from);
      if (neighbour(structure, table, s, shell_edge(structure, shell, i)) >= 0)
        continue;
      boundary.insert(from);
      boundary.insert(shell.nodes[static_cast<std::size_t>((i + 1) % corners)]);
      panel.edges.push_back(reader.read(s, i, cells));
    }
  }
  panel.boundary_nodes.assign(boundary.begin(), boundary.end());
  std::set_difference(all.begin(), all.end(), boundary.begin(), boundary.end(),
                      std::back_inserter(panel.inner_nodes));
}
} // namespace

std::vector<Panel> find_panels(const Structure& structure)
{
  const EdgeTable table = edge_table(structure);
  std::vector<bool> seen(structure.shells.size(), false);
  std::vector<Panel> panels;
  for (std::size_t start = 0; start < structure.shells.size(); ++start)
  {
    if (seen[start])
      continue;
    Panel panel;
    panel.part = structure.shells[start].part;
    panel.shells.push_back(static_cast<Index>(start));
    seen[start] = true;
    for (std::size_t i = 0; i < panel.shells.size(); ++i) // grows while it is walked
    {
      const Index s = panel.shells[i];
      const Shell& shell = structure.shells[static_cast<std::size_t>(s)];
      for (int edge = 0; edge < corner_count(shell); ++edge)
      {
        const Index other = neighbour(structure, table, s, shell_edge(structure, shell, edge));
        if (other < 0 || seen[static_cast<std::size_t>(other)])
          continue;
        seen[static_cast<std::size_t>(other)] = true;
        panel.shells.push_back(other);
      }
    }
    set_rectangle(structure, panel);
    set_boundary(structure, table, panel);
    panels.push_back(std::move(panel));
  }
  return panels;
}
} // namespace carlin
