#include "wetted.hpp"

#include "carlin/core/error.hpp"
#include "carlin/loads/loads.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <map>

namespace carlin
{
namespace
{
constexpr double sea_weight_density = sea_water_density * standard_gravity; // [N/m^3]

struct OuterShell
{
  Index shell = -1;
  QuadPoints points;
  std::size_t corners = 4;
};

std::vector<OuterShell> outer_shells(const Structure& structure)
{
  std::vector<OuterShell> outer;
  for (std::size_t s = 0; s < structure.shells.size(); ++s)
  {
    const Shell& shell = structure.shells[s];
    if (!structure.mesh->parts[static_cast<std::size_t>(shell.part)].is_outer_shell)
      continue;
    const bool is_triangle =
        structure.mesh->cells[static_cast<std::size_t>(shell.cell)].is_triangle();
    outer.push_back({static_cast<Index>(s), shell_points(structure, shell),
                     is_triangle ? std::size_t{3} : std::size_t{4}});
  }
  return outer;
}

/// Buoyancy less weight along the upward normal of the water [N], and its moment about the two
/// horizontal axes through the centre of gravity [N m].
Vector3 imbalance(const std::vector<OuterShell>& outer, const MassProperties& craft,
                  const WaterPlane& plane)
{
  const Vector3 up = plane.up();
  Vector3 force = -craft.mass * standard_gravity * up;
  Vector3 moment = Vector3::Zero();
  for (const OuterShell& shell : outer)
  {
    const WettedShell wetted = wetted_shell(shell.points, shell.corners, plane, sea_weight_density);
    for (std::size_t i = 0; i < shell.corners; ++i)
    {
      force += wetted.forces[i];
      moment += (shell.points[i] - craft.centre).cross(wetted.forces[i]);
    }
  }
  // The moment about `up` itself is none of the water's business; x and y remain.
  const Vector3 level = moment - moment.dot(up) * up;
  return {force.dot(up), level.x(), level.y()};
}

/// Level draught at which the hull carries its weight, by bisection: where Newton starts.
double level_draught(const std::vector<OuterShell>& outer, const MassProperties& craft, double low,
                     double high)
{
  for (int i = 0; i < 60; ++i)
  {
    const double middle = 0.5 * (low + high);
    const double excess = imbalance(outer, craft, {.draught = middle}).x();
    (excess < 0.0 ? low : high) = middle;
  }
  return 0.5 * (low + high);
}

WaterPlane moved(const WaterPlane& plane, const Vector3& step)
{
  return {plane.draught + step.x(), plane.trim + step.y(), plane.heel + step.z()};
}

/// Newton in draught, trim and heel. The derivatives are central differences: the residual alone
/// decides what is found.
WaterPlane balanced_plane(const std::vector<OuterShell>& outer, const MassProperties& craft,
                          double draught, double length)
{
  const double weight = craft.mass * standard_gravity;
  const Vector3 scale(weight, weight * length, weight * length);
  WaterPlane plane{.draught = draught};
  for (int iteration = 0; iteration < 60; ++iteration)
  {
    const Vector3 residual = imbalance(outer, craft, plane).cwiseQuotient(scale);
    if (residual.cwiseAbs().maxCoeff() < 1e-12)
      return plane;
    Matrix3 slope;
    for (Index i = 0; i < 3; ++i)
    {
      const double step = i == 0 ? 1e-6 * length : 1e-6;
      const Vector3 up = step * Vector3::Unit(i);
      slope.col(i) =
          (imbalance(outer, craft, moved(plane, up)) - imbalance(outer, craft, moved(plane, -up)))
              .cwiseQuotient(scale) /
          (2.0 * step);
    }
    Vector3 step = -slope.fullPivLu().solve(residual);
    // Not more than a tenth of the length or of a right angle at once: chines and decks bend it.
    const Vector3 relative(step.x() / (0.1 * length), step.y() / 0.1, step.z() / 0.1);
    const double excess = relative.cwiseAbs().maxCoeff();
    if (!std::isfinite(excess))
      break;
    if (excess > 1.0)
      step /= excess;
    plane = moved(plane, step);
  }
  const double left = imbalance(outer, craft, plane).cwiseQuotient(scale).cwiseAbs().maxCoeff();
  if (left < 1e-9) // round-off of a heavy hull
    return plane;
  throw SolveError(fmt::format("still water: no floating position found for {:.0f} kg with the "
                               "centre of gravity at x {:.3f} m, y {:.3f} m, z {:.3f} m; is the "
                               "weight within the hull's length, and the hull stable",
                               craft.mass, craft.centre.x(), craft.centre.y(), craft.centre.z()));
}

/// The outer shell must stand above the water all along its open edge.
void require_dry_edge(const Structure& structure, const std::vector<OuterShell>& outer,
                      const WaterPlane& plane)
{
  std::map<std::pair<Index, Index>, int> uses; // of each edge, by mesh points
  for (const OuterShell& shell : outer)
  {
    const Cell& cell = structure.mesh->cells[static_cast<std::size_t>(
        structure.shells[static_cast<std::size_t>(shell.shell)].cell)];
    for (std::size_t i = 0; i < shell.corners; ++i)
      ++uses[std::minmax(cell.points[i], cell.points[(i + 1) % shell.corners])];
  }
  Index deepest = -1;
  double depth = 0.0;
  for (const auto& [edge, count] : uses)
    if (count == 1)
      for (const Index point : {edge.first, edge.second})
        if (const double d = plane.depth(structure.mesh->points[static_cast<std::size_t>(point)]);
            d > depth)
        {
          depth = d;
          deepest = point;
        }
  if (deepest >= 0)
    throw SolveError(fmt::format(
        "still water: the edge of the outer shell is {:.3f} m under water at {}; the hull would be "
        "swamped, or its shell is open there",
        depth, structure.mesh->place(structure.mesh->points[static_cast<std::size_t>(deepest)])));
}
} // namespace

Flotation still_water(const Structure& structure, const MassProperties& craft)
{
  const std::vector<OuterShell> outer = outer_shells(structure);
  if (outer.empty())
    throw SolveError("still water: there is no outer shell to float on");
  Vector3 low = outer.front().points[0], high = low;
  for (const OuterShell& shell : outer)
    for (const Vector3& point : shell.points)
    {
      low = low.cwiseMin(point);
      high = high.cwiseMax(point);
    }
  if (imbalance(outer, craft, {.draught = high.z()}).x() < 0.0)
    throw SolveError(fmt::format("still water: the hull cannot carry {:.0f} kg even when immersed "
                                 "to its deck edge; it would be swamped",
                                 craft.mass));
  const double draught = level_draught(outer, craft, low.z(), high.z());
  const WaterPlane plane = balanced_plane(outer, craft, draught, high.x() - low.x());
  require_dry_edge(structure, outer, plane);

  Flotation flotation;
  flotation.draught = plane.draught;
  flotation.trim = plane.trim;
  flotation.heel = plane.heel;
  flotation.up = plane.up();
  flotation.load.forces = VectorX::Zero(static_cast<Index>(6 * structure.nodes.size()));
  double buoyancy = 0.0;
  for (const OuterShell& shell : outer)
  {
    const WettedShell wetted = wetted_shell(shell.points, shell.corners, plane, sea_weight_density);
    const Shell& element = structure.shells[static_cast<std::size_t>(shell.shell)];
    for (std::size_t i = 0; i < shell.corners; ++i)
    {
      flotation.load.forces.segment<3>(6 * element.nodes[i]) += wetted.forces[i];
      buoyancy += wetted.forces[i].dot(flotation.up);
    }
    if (wetted.mean_pressure > 0.0)
      flotation.load.shell_pressures.emplace_back(shell.shell, wetted.mean_pressure);
  }
  flotation.displaced_mass = buoyancy / standard_gravity;
  flotation.load.notes.push_back(
      {fmt::format("still water: draught {:.3f} m at x 0, trim {:.5f} (bow down +), heel {:.5f}, "
                   "weight and buoyancy on one normal to the water",
                   flotation.draught, flotation.trim, flotation.heel),
       fmt::format("hydrostatics, sea water {:g} kg/m3", sea_water_density)});
  return flotation;
}
} // namespace carlin
