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
  if (a.utilisation.value_or(0.0) != b.utilisation.value_or(0.0))
    return a.utilisation.value_or(0.0) > b.utilisation.value_or(0.0);
  return a.limit_from_below ? a.demand < b.demand : std::abs(a.demand) > std::abs(b.demand);
}
} // namespace carlin
