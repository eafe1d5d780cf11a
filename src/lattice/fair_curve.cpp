#include "fair_curve.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>

namespace carlin
{
namespace
{
double secant(const std::vector<double>& x, const std::vector<double>& value, std::size_t i)
{
  return (value[i + 1] - value[i]) / (x[i + 1] - x[i]);
}

/// Slope at point i of the parabola through it and its neighbours; at the ends one-sided.
double three_point_slope(const std::vector<double>& x, const std::vector<double>& value,
                         std::size_t i)
{
  const std::size_t last = x.size() - 1;
  if (last == 1)
    return secant(x, value, 0);
  if (i == 0 || i == last)
  {
    const std::size_t near = i == 0 ? 0 : last - 1, far = i == 0 ? 1 : last - 2;
    const double h_near = x[near + 1] - x[near], h_far = x[far + 1] - x[far];
    const double d_near = secant(x, value, near), d_far = secant(x, value, far);
    const double slope = d_near + (d_near - d_far) * h_near / (h_near + h_far);
    return slope * d_near > 0.0 ? slope : 0.0; // an end never turns against its own interval
  }
  const double h_aft = x[i] - x[i - 1], h_forward = x[i + 1] - x[i];
  const double d_aft = secant(x, value, i - 1), d_forward = secant(x, value, i);
  if (d_aft * d_forward <= 0.0)
    return 0.0;
  return (h_forward * d_aft + h_aft * d_forward) / (h_aft + h_forward);
}

void limit_slopes(const std::vector<double>& x, const std::vector<double>& value,
                  std::vector<double>& slope)
{
  for (std::size_t i = 0; i + 1 < x.size(); ++i)
  {
    const double d = secant(x, value, i);
    if (d == 0.0)
    {
      slope[i] = slope[i + 1] = 0.0;
      continue;
    }
    const double radius = std::hypot(slope[i] / d, slope[i + 1] / d);
    if (radius > 3.0)
    {
      slope[i] *= 3.0 / radius;
      slope[i + 1] *= 3.0 / radius;
    }
  }
}
} // namespace

FairCurve::FairCurve(std::vector<double> x, std::vector<double> value, Fairing fairing)
    : x_(std::move(x)), value_(std::move(value)), fairing_(fairing)
{
  assert(x_.size() >= 2 && x_.size() == value_.size());
  slope_.resize(x_.size());
  for (std::size_t i = 0; i < x_.size(); ++i)
    slope_[i] = fairing == Fairing::smooth
                    ? three_point_slope(x_, value_, i)
                    : secant(x_, value_, std::min(i, x_.size() - 2)); // used beyond the ends only
  if (fairing == Fairing::smooth)
    limit_slopes(x_, value_, slope_);
}

double FairCurve::operator()(double x) const
{
  if (x <= x_.front())
    return value_.front() + slope_.front() * (x - x_.front());
  if (x >= x_.back())
    return value_.back() + slope_.back() * (x - x_.back());
  const auto above = std::ranges::upper_bound(x_, x);
  const auto i = static_cast<std::size_t>(above - x_.begin()) - 1;
  const double h = x_[i + 1] - x_[i], s = (x - x_[i]) / h;
  const double rise = value_[i + 1] - value_[i];
  if (fairing_ == Fairing::straight || rise == 0.0)
    return value_[i] + rise * s;
  const double r = 1.0 - s;
  return value_[i] + rise * s * s * (3.0 - 2.0 * s) +
         h * s * r * (slope_[i] * r - slope_[i + 1] * s);
}

double polyline_value(const std::vector<std::pair<double, double>>& polyline, double x)
{
  assert(!polyline.empty());
  if (x <= polyline.front().first)
    return polyline.front().second;
  for (std::size_t i = 0; i + 1 < polyline.size(); ++i)
  {
    const auto& [x_aft, aft] = polyline[i];
    const auto& [x_forward, forward] = polyline[i + 1];
    if (x < x_forward)
      return aft + (forward - aft) * (x - x_aft) / (x_forward - x_aft);
  }
  return polyline.back().second;
}
} // namespace carlin
