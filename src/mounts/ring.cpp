#include "carlin/mounts/ring.hpp"

#include <cassert>
#include <cmath>
#include <numbers>

namespace carlin
{
namespace
{
/// t - sin t cos t without loss of digits near t = 0 (lift-off), where it is 2 t^3 / 3.
double segment(double t)
{
  if (t > 0.1)
    return t - std::sin(t) * std::cos(t);
  const double x = 4.0 * t * t; // (2t - sin 2t)/2 as a series in (2t)^2
  return 2.0 / 3.0 * t * t * t *
         (1.0 - x / 20.0 * (1.0 - x / 42.0 * (1.0 - x / 72.0 * (1.0 - x / 110.0))));
}

/// sin t - t cos t, likewise: t^3 / 3.
double arch(double t)
{
  if (t > 0.1)
    return std::sin(t) - t * std::cos(t);
  const double x = t * t;
  return t * t * t / 3.0 * (1.0 - x / 10.0 * (1.0 - x / 28.0 * (1.0 - x / 54.0)));
}

RingResponse full_contact(double e, double d)
{
  const double pi = std::numbers::pi;
  RingResponse ring;
  ring.reaction = pi * d;
  ring.clamping = 2.0 * pi * e;
  ring.reaction_by_offset = pi;
  ring.clamping_by_interference = 2.0 * pi;
  ring.half_contact = pi;
  ring.reaction_over_offset = pi;
  return ring;
}
} // namespace

RingResponse ring_response(double interference, double offset)
{
  const double e = interference;
  const double d = offset;
  assert(d >= 0.0);
  RingResponse ring;
  if (e + d <= 0.0)
    return ring;
  if (d <= e)
    ring = full_contact(e, d);
  else
  {
    // Half angle from tan(t/2), good at both switch points, where arccos(-e/d) loses half the
    // digits.
    const double t = 2.0 * std::atan2(std::sqrt(d + e), std::sqrt(d - e));
    const double sine = std::sin(t);
    ring.reaction_over_offset = segment(t);
    ring.reaction = d * segment(t);
    ring.clamping = 2.0 * d * arch(t);
    ring.reaction_by_offset = t + sine * std::cos(t);
    ring.reaction_by_interference = 2.0 * sine;
    ring.clamping_by_interference = 2.0 * t;
    ring.half_contact = t;
  }
  ring.peak = e + d;
  ring.potential = 0.5 * (d * ring.reaction + e * ring.clamping);
  return ring;
}
} // namespace carlin
