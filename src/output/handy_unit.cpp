#include "handy_unit.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>
#include <numbers>
#include <string_view>

namespace carlin
{
namespace
{
struct Entry
{
  std::string_view si, handy;
  double factor;
};
constexpr std::array<Entry, 11> entries{{{"Pa", "MPa", 1e-6},
                                         {"N", "kN", 1e-3},
                                         {"m", "mm", 1e3},
                                         {"N m", "kNm", 1e-3},
                                         {"N/m", "kN/m", 1e-3},
                                         {"N m/m", "kNm/m", 1e-3},
                                         {"N m^2", "MN m2", 1e-6},
                                         {"rad", "deg", 180.0 / std::numbers::pi},
                                         {"m^3", "l", 1e3},
                                         {"N m/rad", "kNm/deg", 1e-3 * std::numbers::pi / 180.0},
                                         {"-", "", 1.0}}};
} // namespace

HandyUnit handy_unit(const std::string& si_unit, double magnitude)
{
  if (si_unit == "kg")
    return std::abs(magnitude) < 1000.0 ? HandyUnit{"kg", 1.0} : HandyUnit{"t", 1e-3};
  const auto* found = std::ranges::find(entries, si_unit, &Entry::si);
  if (found == entries.end())
    return {si_unit, 1.0};
  return {std::string(found->handy), found->factor};
}

std::string figures(double value)
{
  if (std::isnan(value))
    return "not a number";
  if (std::isinf(value))
    return value > 0.0 ? "no limit" : "-no limit";
  const double size = std::abs(value);
  if (size >= 99.95)
    return fmt::format("{:.0f}", value);
  if (size >= 9.995)
    return fmt::format("{:.1f}", value);
  if (size >= 0.0995)
    return fmt::format("{:.2f}", value);
  if (size >= 0.00095)
    return fmt::format("{:.4f}", value);
  return size == 0.0 ? "0" : fmt::format("{:.2e}", value);
}
} // namespace carlin
