#include "carlin/core/require.hpp"

#include "carlin/core/error.hpp"

#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
std::string with_unit(double value, std::string_view unit)
{
  return unit.empty() || unit == "-" ? fmt::format("{:g}", value)
                                     : fmt::format("{:g} {}", value, unit);
}
} // namespace

double require_positive(std::string_view quantity, double value, std::string_view unit)
{
  if (std::isfinite(value) && value > 0.0)
    return value;
  throw ValueError(
      fmt::format("{} is {}; it must be greater than 0", quantity, with_unit(value, unit)));
}

double require_not_negative(std::string_view quantity, double value, std::string_view unit)
{
  if (std::isfinite(value) && value >= 0.0)
    return value;
  throw ValueError(fmt::format("{} is {}; it must be 0 or more", quantity, with_unit(value, unit)));
}

double require_finite(std::string_view quantity, double value, std::string_view unit)
{
  if (std::isfinite(value))
    return value;
  throw ValueError(
      fmt::format("{} is {}; it must be a finite number", quantity, with_unit(value, unit)));
}

double require_between(std::string_view quantity, double value, double lowest, double highest)
{
  if (std::isfinite(value) && value > lowest && value < highest)
    return value;
  throw ValueError(fmt::format("{} is {:g}; it must lie between {:g} and {:g}", quantity, value,
                               lowest, highest));
}
} // namespace carlin
