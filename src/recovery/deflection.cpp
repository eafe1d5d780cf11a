#include "carlin/recovery/deflection.hpp"

#include "geometry.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <limits>
#include <map>
#include <set>

namespace carlin
{
namespace
{
bool is_bottom(const Structure& structure, const Shell& shell)
{
  const MeshPart& part = structure.mesh->parts[static_cast<std::size_t>(shell.part)];
  return part.surface == Surface::bottom;
}

/// Nodes of the bottom plating nearest the centreline, one an x, in order from aft.
std::vector<Index> keel_nodes(const Structure& structure)
{
  std::set<Index> bottom;
  for (const Shell& shell : structure.shells)
    if (is_bottom(structure, shell))
      bottom.insert(shell.nodes.begin(), shell.nodes.end());
  double nearest = std::numeric_limits<double>::infinity();
  for (const Index node : bottom)
    nearest = std::min(nearest, std::abs(node_position(structure, node).y()));
  constexpr double same = 1e-6; // m: round-off of coordinates
  std::map<double, Index> by_x;
  for (const Index node : bottom)
  {
    const Vector3& position = node_position(structure, node);
    if (std::abs(position.y()) <= nearest + same)
      by_x.emplace(position.x(), node);
  }
  std::vector<Index> line;
  for (const auto& [x, node] : by_x)
    line.push_back(node);
  return line;
}

struct KeelPoint
{
  double x, u_z;
};

/// @pre x lies within the line.
double interpolated(const std::vector<KeelPoint>& line, double x)
{
  std::size_t i = 1;
  while (i + 1 < line.size() && line[i].x < x)
    ++i;
  const double part = (x - line[i - 1].x) / (line[i].x - line[i - 1].x);
  return line[i - 1].u_z + part * (line[i].u_z - line[i - 1].u_z);
}
} // namespace

VectorX shape_shown(const Structure& structure, const VectorX& displacement)
{
  if (!structure.supported.empty())
    return displacement;
  const auto count = static_cast<Index>(structure.nodes.size());
  VectorX weight = structure.node_area;
  if (weight.size() != count || weight.sum() <= 0.0)
    weight = VectorX::Ones(count);

  Vector3 centre = Vector3::Zero(), shift = Vector3::Zero();
  for (Index n = 0; n < count; ++n)
  {
    centre += weight[n] * node_position(structure, n);
    shift += weight[n] * translation(displacement, n);
  }
  centre /= weight.sum();
  shift /= weight.sum();

  Matrix3 inertia = Matrix3::Zero();
  Vector3 moment = Vector3::Zero();
  for (Index n = 0; n < count; ++n)
  {
    const Vector3 arm = node_position(structure, n) - centre;
    inertia += weight[n] * (arm.squaredNorm() * Matrix3::Identity() - arm * arm.transpose());
    moment += weight[n] * arm.cross(translation(displacement, n));
  }
  // Nodes all in line have no mean rotation about it: the least-norm answer leaves it at zero.
  const Vector3 turn = inertia.completeOrthogonalDecomposition().solve(moment);

  VectorX result = displacement;
  for (Index n = 0; n < count; ++n)
  {
    result.segment<3>(6 * n) -= shift + turn.cross(node_position(structure, n) - centre);
    result.segment<3>(6 * n + 3) -= turn;
  }
  return result;
}

GirderDeflection girder_deflection(const Structure& structure, const VectorX& displacement,
                                   double x_from, double x_to)
{
  std::vector<KeelPoint> line;
  for (const Index node : keel_nodes(structure))
    line.push_back({node_position(structure, node).x(), translation(displacement, node).z()});
  constexpr double reach = 1e-3; // m: a raked or rounded end may stop just short of its plane
  if (line.size() < 2 || line.front().x > x_from + reach || line.back().x < x_to - reach)
    throw SolveError(fmt::format("girder deflection: no bottom plating along the centreline from x "
                                 "{:.3f} m to {:.3f} m; name bulkheads that stand on it",
                                 x_from, x_to));
  const double from = interpolated(line, x_from);
  const double to = interpolated(line, x_to);
  GirderDeflection result{.deflection = 0.0, .chord = x_to - x_from, .x = x_from};
  for (const KeelPoint& point : line)
  {
    if (point.x < x_from || point.x > x_to)
      continue;
    const double deflection = point.u_z - from - (to - from) * (point.x - x_from) / result.chord;
    if (std::abs(deflection) > std::abs(result.deflection))
    {
      result.deflection = deflection;
      result.x = point.x;
    }
  }
  return result;
}

double panel_deflection(const Structure& structure, const Panel& panel, const VectorX& displacement)
{
  if (panel.inner_nodes.empty())
    return 0.0;
  const auto basis = [&](Index node)
  {
    const Vector3 arm = node_position(structure, node) - panel.centre;
    return Vector3(1.0, arm.dot(panel.axes.col(0)), arm.dot(panel.axes.col(1)));
  };
  const auto along_normal = [&](Index node)
  { return panel.axes.col(2).dot(translation(displacement, node)); };

  Matrix3 normal_matrix = Matrix3::Zero();
  Vector3 right_side = Vector3::Zero();
  for (const Index node : panel.boundary_nodes)
  {
    const Vector3 b = basis(node);
    normal_matrix += b * b.transpose();
    right_side += along_normal(node) * b;
  }
  const Vector3 plane = normal_matrix.completeOrthogonalDecomposition().solve(right_side);
  const Index middle = *std::ranges::min_element(
      panel.inner_nodes, {},
      [&](Index node) { return (node_position(structure, node) - panel.centre).squaredNorm(); });
  return along_normal(middle) - plane.dot(basis(middle));
}
} // namespace carlin
