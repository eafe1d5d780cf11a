#include "carlin/core/error.hpp"
#include "carlin/core/require.hpp"
#include "carlin/loads/loads.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <numbers>

namespace carlin
{
namespace
{
// ISO 12215-5:2008 (+A1:2014), motor craft, one hull. Its formulas take m, kg, knots, degrees and
// give kN/m2. Status of each: reproduced = one published worked example, every printed digit;
// memory = recalled, check the standard.
constexpr double factor_coefficient = 0.32;         // reproduced
constexpr double factor_beam_term = 0.084;          // reproduced
constexpr double factor_limit = 3.0;                // memory: above it the lesser of two formulas
constexpr double factor_cap = 7.0;                  // memory
constexpr double fast_coefficient = 0.5;            // memory
constexpr double fast_exponent = 0.17;              // memory
constexpr double displacement_coefficient = 2.4;    // reproduced
constexpr double displacement_exponent = 0.33;      // reproduced
constexpr double displacement_constant = 20.0;      // reproduced
constexpr double planing_coefficient = 0.1;         // reproduced
constexpr double side_coefficient = 0.9;            // reproduced
constexpr double deck_slope = 0.35;                 // reproduced
constexpr double deck_constant = 14.6;              // reproduced
constexpr double knot = 1852.0 / 3600.0;            // [m/s], exact
constexpr double degree = std::numbers::pi / 180.0; // [rad]
constexpr const char* source = "ISO 12215-5:2008, from memory: check the standard";

double category_factor(char design_category)
{
  switch (design_category)
  {
  case 'A':
    return 1.0;
  case 'B':
    return 0.8;
  case 'C':
    return 0.6;
  case 'D':
    return 0.4;
  default:
    throw ValueError(
        fmt::format("design_category is '{}'; it must be A, B, C or D", design_category));
  }
}

double require_within(const char* quantity, double value, double lowest, double highest,
                      const char* unit)
{
  if (std::isfinite(value) && value >= lowest && value <= highest)
    return value;
  throw ValueError(fmt::format("{} is {:g} {}; the standard's formula holds from {:g} to {:g} {}",
                               quantity, value, unit, lowest, highest, unit));
}

/// n_CG [-]: the first formula, and where it is high the lesser of both but not under the limit.
double dynamic_load_factor(double n_1, double n_2)
{
  if (n_1 <= factor_limit)
    return n_1;
  return std::min(std::max(std::min(n_1, n_2), factor_limit), factor_cap);
}
} // namespace

SmallCraftFactors small_craft_factors(double mass, double waterline_length, double chine_beam,
                                      double deadrise, double speed, char design_category)
{
  const double m = require_positive("mass", mass, "kg");
  const double L = require_positive("waterline_length", waterline_length, "m");
  const double B = require_positive("chine_beam", chine_beam, "m");
  // Half a thousandth of a degree of room for an angle that was written as exactly 10 or 30.
  const double beta = require_within("deadrise", deadrise / degree, 9.9995, 30.0005, "deg");
  require_positive("speed", speed, "m/s");
  const double V = require_within("speed", speed / knot, 0.0, 50.0005, "kn");
  const double k_dc = category_factor(design_category);

  const double n_1 =
      factor_coefficient * (L / (10.0 * B) + factor_beam_term) * (50.0 - beta) * V * V * B * B / m;
  const double n_2 = fast_coefficient * V / std::pow(m, fast_exponent);
  const double n = dynamic_load_factor(n_1, n_2);

  constexpr double kilo = 1000.0;
  SmallCraftFactors factors;
  factors.dynamic_load_factor = n;
  factors.bottom_base_displacement =
      kilo *
      (displacement_coefficient * std::pow(m, displacement_exponent) + displacement_constant);
  factors.bottom_base_planing =
      kilo * planing_coefficient * m / (L * B) * (1.0 + std::sqrt(k_dc) * n);
  factors.side_minimum = kilo * side_coefficient * L * k_dc;
  factors.deck_base = kilo * (deck_slope * L + deck_constant);
  factors.notes = {
      {fmt::format("n_CG = 0.32 (LWL/(10 BC) + 0.084) (50 - deadrise) V^2 BC^2 / m = {:.4g}, used "
                   "{:.4g}",
                   n_1, n),
       source},
      {fmt::format("bottom base pressure: displacement 2.4 m^0.33 + 20 = {:.4g} kPa, planing "
                   "0.1 m/(LWL BC) (1 + sqrt(k_DC) n_CG) = {:.4g} kPa",
                   factors.bottom_base_displacement / kilo, factors.bottom_base_planing / kilo),
       source}};
  return factors;
}
} // namespace carlin
