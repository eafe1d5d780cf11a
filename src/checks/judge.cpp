#include "carlin/checks/checks.hpp"

#include <array>
#include <cmath>
#include <limits>

namespace carlin
{
namespace
{
double utilisation_from_above(double demand, double limit)
{
  if (limit > 0.0)
    return std::abs(demand) / limit;
  return demand == 0.0 ? 0.0 : std::numeric_limits<double>::infinity();
}

double utilisation_from_below(double found, double limit)
{
  if (limit <= 0.0)
    return found >= limit ? 0.0 : std::numeric_limits<double>::infinity();
  return found > 0.0 ? limit / found : std::numeric_limits<double>::infinity();
}

int rank(const Check& check)
{
  constexpr std::array ranks{2, 0, 1}; // met, not met, not judged
  return ranks[static_cast<std::size_t>(check.verdict)];
}

/// To eight figures: port and starboard of an even keel differ by round-off, which must not decide
/// which of the two a table names.
double rounded(double value)
{
  if (value == 0.0 || !std::isfinite(value))
    return value;
  const double scale = std::pow(10.0, 7.0 - std::floor(std::log10(std::abs(value))));
  return std::round(value * scale) / scale;
}
} // namespace

Check judged(Check check)
{
  check.utilisation.reset();
  check.verdict = Verdict::not_judged;
  if (!check.limit)
    return check;
  // A demand that is no number must never pass.
  if (std::isnan(check.demand) || std::isnan(*check.limit))
    check.utilisation = std::numeric_limits<double>::infinity();
  else
    check.utilisation = check.limit_from_below ? utilisation_from_below(check.demand, *check.limit)
                                               : utilisation_from_above(check.demand, *check.limit);
  check.verdict = *check.utilisation <= 1.0 ? Verdict::met : Verdict::not_met;
  return check;
}

bool is_worse(const Check& a, const Check& b)
{
  if (rank(a) != rank(b))
    return rank(a) < rank(b);
  const double use_a = rounded(a.utilisation.value_or(0.0));
  const double use_b = rounded(b.utilisation.value_or(0.0));
  if (use_a != use_b)
    return use_a > use_b;
  const double demand_a = rounded(a.demand);
  const double demand_b = rounded(b.demand);
  return a.limit_from_below ? demand_a < demand_b : std::abs(demand_a) > std::abs(demand_b);
}
} // namespace carlin
