#include "geometry.hpp"
#include "surface_stress.hpp"

#include "carlin/recovery/stress.hpp"

#include <array>
#include <cassert>
#include <cmath>

namespace carlin
{
namespace
{
/// Everything about one panel and stage that the readings share.
struct PanelReading
{
  const Structure& structure;
  const Panel& panel;
  double length = 0.0;                 ///< over which stress is a mean [m]
  std::vector<Vector3> centres;        ///< of its shells
  std::vector<double> areas;           ///< of its shells
  std::vector<SurfaceStress> stresses; ///< at its shells' centres
};

PanelReading panel_reading(const Structure& structure, const Panel& panel,
                           const std::vector<ShellStress>& stresses)
{
  PanelReading reading{structure, panel, std::min(nominal_stress_length, panel.short_side),
                       {},        {},    {}};
  for (const Index s : panel.shells)
  {
    const Shell& shell = structure.shells[static_cast<std::size_t>(s)];
    reading.centres.push_back(shell_centre(structure, shell));
    reading.areas.push_back(shell_area(shell_points(structure, shell)));
    reading.stresses.push_back(
        surface_stress(structure, shell, stresses[static_cast<std::size_t>(s)]));
  }
  return reading;
}

/// Mean over the shells whose centres lie within half the stated length of a place; where there are
/// none, the shell that `own` names.
SurfaceStress mean_stress(const PanelReading& reading, const Vector3& place, std::size_t own)
{
  SurfaceStress sum;
  double area = 0.0;
  for (std::size_t i = 0; i < reading.centres.size(); ++i)
  {
    if ((reading.centres[i] - place).squaredNorm() > 0.25 * reading.length * reading.length)
      continue;
    sum.membrane += reading.areas[i] * reading.stresses[i].membrane;
    sum.bending += reading.areas[i] * reading.stresses[i].bending;
    area += reading.areas[i];
  }
  if (area == 0.0)
    return reading.stresses[own];
  return {.membrane = sum.membrane / area, .bending = sum.bending / area};
}

/// Bending read at each edge of the panel, then the mean along the edge over the stated length.
std::vector<Matrix3> edge_bending(const PanelReading& reading)
{
  const std::vector<PanelEdge>& edges = reading.panel.edges;
  std::vector<Matrix3> found;
  for (const PanelEdge& edge : edges)
  {
    Matrix3 sum = Matrix3::Zero();
    for (const auto& [shell, weight] : edge.reading)
      sum += weight * reading.stresses[static_cast<std::size_t>(shell)].bending;
    found.push_back(sum);
  }
  constexpr double parallel = 0.95; // cosine: sides of a panel, not its corner
  std::vector<Matrix3> means;
  for (const PanelEdge& edge : edges)
  {
    Matrix3 sum = Matrix3::Zero();
    double count = 0.0;
    for (std::size_t i = 0; i < edges.size(); ++i)
      if ((edges[i].middle - edge.middle).norm() <= 0.5 * reading.length &&
          std::abs(edges[i].direction.dot(edge.direction)) > parallel)
      {
        sum += found[i];
        count += 1.0;
      }
    means.push_back(sum / count); // the edge itself always counts
  }
  return means;
}

double largest_principal(const Matrix3& stress)
{
  return Eigen::SelfAdjointEigenSolver<Matrix3>(stress, Eigen::EigenvaluesOnly)
      .eigenvalues()
      .cwiseAbs()
      .maxCoeff();
}

void put(PanelStress& result, const SurfaceStress& stress, const Vector3& place)
{
  const double face = std::max(von_mises(stress.membrane + stress.bending),
                               von_mises(stress.membrane - stress.bending));
  result.membrane = std::max(result.membrane, von_mises(stress.membrane));
  if (face > result.nominal * (1.0 + 1e-9)) // first of equals, whatever the round-off
  {
    result.nominal = face;
    result.place = place;
  }
}

void put_found(PanelStress& result, const PanelReading& reading)
{
  for (std::size_t i = 0; i < reading.centres.size(); ++i)
  {
    const SurfaceStress mean = mean_stress(reading, reading.centres[i], i);
    put(result, mean, reading.centres[i]);
    result.bending_found = std::max(result.bending_found, largest_principal(mean.bending));
  }
  const std::vector<Matrix3> bending = edge_bending(reading);
  for (std::size_t e = 0; e < bending.size(); ++e)
  {
    const PanelEdge& edge = reading.panel.edges[e];
    const auto own = static_cast<std::size_t>(edge.reading.front().first);
    SurfaceStress mean = mean_stress(reading, edge.middle, own);
    mean.bending = bending[e];
    put(result, mean, edge.middle);
    result.bending_found = std::max(result.bending_found, largest_principal(mean.bending));
  }
}

/// The closed form's edge stress acts across the short side, with its Poisson part along the edge.
void put_closed_form(PanelStress& result, const PanelReading& reading, const ShellSection& section)
{
  const Vector3 across = reading.panel.axes.col(1);
  const Vector3 along = reading.panel.axes.col(0);
  const double poissons_ratio = section.A(0, 1) / section.A(0, 0);
  const Matrix3 bending = result.bending_closed_form * (across * across.transpose() +
                                                        poissons_ratio * along * along.transpose());
  for (std::size_t i = 0; i < reading.centres.size(); ++i)
  {
    const SurfaceStress mean = mean_stress(reading, reading.centres[i], i);
    put(result, {.membrane = mean.membrane, .bending = bending}, reading.centres[i]);
  }
}

Vector3 mean_membrane(const PanelReading& reading)
{
  Matrix3 sum = Matrix3::Zero();
  double area = 0.0;
  for (std::size_t i = 0; i < reading.areas.size(); ++i)
  {
    sum += reading.areas[i] * reading.stresses[i].membrane;
    area += reading.areas[i];
  }
  const Matrix3 local = reading.panel.axes.transpose() * (sum / area) * reading.panel.axes;
  return {local(0, 0), local(1, 1), local(0, 1)};
}
} // namespace

double clamped_panel_stress(double pressure, double short_side, double long_side, double thickness)
{
  assert(short_side > 0.0 && long_side >= short_side && thickness > 0.0);
  // Edge moment over p b^2 against short/long: B3; 1/12 for the endless strip.
  constexpr std::array<std::array<double, 2>, 6> table{{{0.0, 1.0 / 12.0},
                                                        {1.0 / 3.0, 0.08377},
                                                        {0.5, 0.08287},
                                                        {1.0 / 1.5, 0.07566},
                                                        {1.0 / 1.2, 0.06390},
                                                        {1.0, 0.051334}}};
  const double ratio = short_side / long_side;
  std::size_t i = 1;
  while (i + 1 < table.size() && table[i][0] < ratio)
    ++i;
  const double part = (ratio - table[i - 1][0]) / (table[i][0] - table[i - 1][0]);
  const double beta = table[i - 1][1] + part * (table[i][1] - table[i - 1][1]);
  const double slenderness = short_side / thickness;
  return 6.0 * beta * std::abs(pressure) * slenderness * slenderness;
}

std::vector<PanelStress> panel_stresses(const Structure& structure,
                                        const std::vector<Panel>& panels,
                                        const StageSolution& stage)
{
  const std::vector<ShellStress> stresses = shell_stresses_of(structure, stage);
  std::vector<double> pressure(structure.shells.size(), 0.0);
  for (const auto& [shell, value] : stage.shell_pressures)
    pressure[static_cast<std::size_t>(shell)] += value;

  std::vector<PanelStress> results;
  for (std::size_t p = 0; p < panels.size(); ++p)
  {
    const Panel& panel = panels[p];
    const PanelReading reading = panel_reading(structure, panel, stresses);
    PanelStress result;
    result.panel = static_cast<Index>(p);
    result.place = panel.centre;
    result.is_mesh_coarse = panel.cells_across < fine_cells_across;
    result.mean_membrane = mean_membrane(reading);
    put_found(result, reading);

    double force = 0.0;
    for (std::size_t i = 0; i < panel.shells.size(); ++i)
    {
      const auto shell = static_cast<std::size_t>(panel.shells[i]);
      force += reading.areas[i] * pressure[shell];
      result.peak = std::max(result.peak, stresses[shell].peak);
    }
    const Shell& shell = structure.shells[static_cast<std::size_t>(panel.shells.front())];
    const ShellSection& section = structure.shell_sections[static_cast<std::size_t>(shell.section)];
    result.bending_closed_form = clamped_panel_stress(force / panel.area, panel.short_side,
                                                      panel.long_side, section.thickness);
    if (result.is_mesh_coarse && result.bending_closed_form > result.bending_found)
      put_closed_form(result, reading, section);
    results.push_back(result);
  }
  return results;
}
} // namespace carlin
