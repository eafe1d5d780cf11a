#include "carlin/core/error.hpp"
#include "carlin/core/require.hpp"
#include "carlin/loads/loads.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
// Choices of this project, in one place; common practice, no source.

/// Pressure of a landing for which none is given, over the standard's larger base bottom pressure.
/// The base pressure is that of a panel; over a whole landing patch the mean is lower. Two thirds
/// gives the 9.5 t, 25 kn launch of the loads book (section 1) a patch of 4.7 m2, of its 4 to 5.
constexpr double patch_pressure_ratio = 2.0 / 3.0;

/// Middle of the patch over the length of the bottom, from aft.
double patch_middle(PatchPlace place)
{
  switch (place)
  {
  case PatchPlace::forward:
    return 0.75;
  case PatchPlace::amidships:
    return 0.5;
  case PatchPlace::aft:
    break;
  }
  return 0.25;
}

const char* name_of(PatchPlace place)
{
  switch (place)
  {
  case PatchPlace::forward:
    return "forward";
  case PatchPlace::amidships:
    return "amidships";
  case PatchPlace::aft:
    break;
  }
  return "aft";
}

struct BottomShell
{
  Index shell = -1;
  QuadPoints points;
  std::size_t corners = 4;
  double x_low = 0.0, x_high = 0.0;
  double area = 0.0;          ///< [m^2]
  double upward_per_pa = 0.0; ///< upward force of a unit pressure [m^2]
};

/// Part of a triangle's area between two transverse planes.
double area_between(std::array<Vector3, 3> triangle, double from, double to)
{
  std::array<Vector3, 8> polygon{triangle[0], triangle[1], triangle[2]};
  std::size_t count = 3;
  for (const double side : {1.0, -1.0}) // keep x >= from, then x <= to
  {
    const double limit = side > 0.0 ? from : -to;
    std::array<Vector3, 8> kept;
    std::size_t kept_count = 0;
    for (std::size_t i = 0; i < count; ++i)
    {
      const Vector3& a = polygon[i];
      const Vector3& b = polygon[(i + 1) % count];
      const double d_a = side * a.x() - limit;
      const double d_b = side * b.x() - limit;
      if (d_a >= 0.0)
        kept[kept_count++] = a;
      if ((d_a > 0.0 && d_b < 0.0) || (d_a < 0.0 && d_b > 0.0))
        kept[kept_count++] = a + d_a / (d_a - d_b) * (b - a);
    }
    polygon = kept;
    count = kept_count;
  }
  double area = 0.0;
  for (std::size_t i = 2; i < count; ++i)
    area += 0.5 * (polygon[i - 1] - polygon[0]).cross(polygon[i] - polygon[0]).norm();
  return area;
}

/// Share of a shell's area between two transverse planes [-].
double share_between(const BottomShell& shell, double from, double to)
{
  if (shell.x_low >= from && shell.x_high <= to)
    return 1.0;
  if (shell.x_high <= from || shell.x_low >= to)
    return 0.0;
  const double whole = 1e300;
  double inside = 0.0, area = 0.0;
  const auto add = [&](const std::array<Vector3, 3>& triangle)
  {
    inside += area_between(triangle, from, to);
    area += area_between(triangle, -whole, whole);
  };
  if (shell.corners == 3)
    add({shell.points[0], shell.points[1], shell.points[2]});
  else
  {
    const Vector3 middle =
        0.25 * (shell.points[0] + shell.points[1] + shell.points[2] + shell.points[3]);
    for (std::size_t i = 0; i < 4; ++i)
      add({shell.points[i], shell.points[(i + 1) % 4], middle});
  }
  return inside / area;
}

bool is_on(Sides sides, double y)
{
  return sides == Sides::both || (sides == Sides::port ? y > 0.0 : y < 0.0);
}

std::vector<BottomShell> bottom_shells(const Structure& structure, Sides sides)
{
  std::vector<BottomShell> bottom;
  for (std::size_t s = 0; s < structure.shells.size(); ++s)
  {
    const Shell& shell = structure.shells[s];
    const MeshPart& part = structure.mesh->parts[static_cast<std::size_t>(shell.part)];
    if (!part.is_outer_shell || part.surface != Surface::bottom)
      continue;
    BottomShell piece;
    piece.shell = static_cast<Index>(s);
    piece.points = shell_points(structure, shell);
    const bool is_triangle =
        structure.mesh->cells[static_cast<std::size_t>(shell.cell)].is_triangle();
    piece.corners = is_triangle ? 3 : 4;
    Vector3 middle = Vector3::Zero();
    piece.x_low = piece.x_high = piece.points[0].x();
    for (std::size_t i = 0; i < piece.corners; ++i)
    {
      middle += piece.points[i] / static_cast<double>(piece.corners);
      piece.x_low = std::min(piece.x_low, piece.points[i].x());
      piece.x_high = std::max(piece.x_high, piece.points[i].x());
    }
    if (!is_on(sides, middle.y()))
      continue;
    piece.area = shell_area(piece.points);
    const Vector24 forces = shell_pressure(piece.points, 1.0);
    for (Index i = 0; i < 4; ++i)
      piece.upward_per_pa += forces[6 * i + 2];
    bottom.push_back(piece);
  }
  return bottom;
}

struct Band
{
  double from = 0.0, to = 0.0; ///< [m]
};

double upward_area(const std::vector<BottomShell>& bottom, const Band& band)
{
  double sum = 0.0;
  for (const BottomShell& shell : bottom)
    sum += shell.upward_per_pa * share_between(shell, band.from, band.to);
  return sum;
}

/// Band about `middle` whose upward area is `target`. It grows both ways until it meets an end of
/// the bottom, then the other way alone.
Band band_for(const std::vector<BottomShell>& bottom, double middle, double target,
              const Band& whole)
{
  const auto band = [&](double half) {
    return Band{std::max(middle - half, whole.from), std::min(middle + half, whole.to)};
  };
  double low = 0.0, high = whole.to - whole.from;
  for (int i = 0; i < 200 && high - low > 1e-16 * (whole.to - whole.from); ++i)
  {
    const double half = 0.5 * (low + high);
    (upward_area(bottom, band(half)) < target ? low : high) = half;
    if (half == low && half == high)
      break;
  }
  return band(0.5 * (low + high));
}

SmallCraftFactors factors_of(const Craft& craft, double mass)
{
  return small_craft_factors(mass, craft.waterline_length, craft.chine_beam, craft.deadrise,
                             craft.speed, craft.design_category);
}

/// What a landing gives: n g if stated or by standard, and the pressure.
struct Demand
{
  std::optional<double> acceleration; ///< n g [m/s^2]
  double pressure = 0.0;              ///< [Pa]
  std::vector<LoadNote> notes;
};

Demand demand_of(const Landing& landing, const Craft& craft, double mass)
{
  Demand demand;
  demand.acceleration = landing.acceleration;
  if (landing.by_standard || !landing.pressure)
  {
    const SmallCraftFactors factors = factors_of(craft, mass);
    demand.notes = factors.notes;
    if (landing.by_standard)
      demand.acceleration = factors.dynamic_load_factor * standard_gravity;
    demand.pressure = patch_pressure_ratio *
                      std::max(factors.bottom_base_displacement, factors.bottom_base_planing);
  }
  if (landing.pressure)
    demand.pressure = require_positive("pressure", *landing.pressure, "Pa");
  else
    demand.notes.push_back({fmt::format("patch pressure {:.1f} kPa, two thirds of the larger base "
                                        "bottom pressure",
                                        demand.pressure / 1000.0),
                            "this project's choice; common practice, no source"});
  if (demand.acceleration)
    require_finite("acceleration", *demand.acceleration, "m/s^2");
  else if (!landing.length || !landing.pressure)
    throw ValueError("landing: give an acceleration, or a pressure and the length of its patch");
  return demand;
}

Band whole_bottom(const std::vector<BottomShell>& bottom)
{
  Band whole{bottom.front().x_low, bottom.front().x_high};
  for (const BottomShell& shell : bottom)
  {
    whole.from = std::min(whole.from, shell.x_low);
    whole.to = std::max(whole.to, shell.x_high);
  }
  return whole;
}
} // namespace

LandingLoad landing_load(const Structure& structure, const Landing& landing, const Craft& craft,
                         double craft_mass)
{
  require_positive("craft mass", craft_mass, "kg");
  const Demand demand = demand_of(landing, craft, craft_mass);
  const std::vector<BottomShell> bottom = bottom_shells(structure, landing.sides);
  if (bottom.empty())
    throw ValueError("landing: the structure has no bottom plating on that side to land on");
  const Band whole = whole_bottom(bottom);
  const double middle = whole.from + patch_middle(landing.place) * (whole.to - whole.from);

  Band band{std::max(middle - 0.5 * landing.length.value_or(0.0), whole.from),
            std::min(middle + 0.5 * landing.length.value_or(0.0), whole.to)};
  if (demand.acceleration)
  {
    const double force = craft_mass * (standard_gravity + *demand.acceleration);
    const double available = demand.pressure * upward_area(bottom, whole);
    if (force > available)
      throw ValueError(
          fmt::format("landing: {:.1f} kPa over the whole bottom lifts {:.1f} kN, less "
                      "than the {:.1f} kN of mass times g (1 + n); give a higher "
                      "pressure",
                      demand.pressure / 1000.0, available / 1000.0, force / 1000.0));
    band = band_for(bottom, middle, force / demand.pressure, whole);
  }

  LandingLoad result;
  result.pressure = demand.pressure;
  result.x_from = band.from;
  result.x_to = band.to;
  result.load.forces = VectorX::Zero(static_cast<Index>(6 * structure.nodes.size()));
  double upward = 0.0;
  for (const BottomShell& piece : bottom)
  {
    const double share = share_between(piece, band.from, band.to);
    if (share <= 0.0)
      continue;
    const double pressure = share * demand.pressure;
    const Vector24 forces = shell_pressure(piece.points, pressure);
    const Shell& shell = structure.shells[static_cast<std::size_t>(piece.shell)];
    for (Index i = 0; i < 4; ++i)
      result.load.forces.segment<6>(6 * shell.nodes[static_cast<std::size_t>(i)]) +=
          forces.segment<6>(6 * i);
    result.load.shell_pressures.emplace_back(piece.shell, pressure);
    result.area += share * piece.area;
    upward += pressure * piece.upward_per_pa;
  }
  result.acceleration = upward / craft_mass - standard_gravity;
  result.load.notes = demand.notes;
  result.load.notes.push_back(
      {fmt::format("landing {}: {:.1f} kPa on {:.2f} m2 of bottom, x {:.2f} to {:.2f} m, upward "
                   "{:.1f} kN, n = {:.3f}",
                   name_of(landing.place), result.pressure / 1000.0, result.area, result.x_from,
                   result.x_to, upward / 1000.0, result.acceleration / standard_gravity),
       "pressure times area = m g (1 + n); places 0.75, 0.5, 0.25 of the bottom's length: common "
       "practice, no source"});
  return result;
}
} // namespace carlin
