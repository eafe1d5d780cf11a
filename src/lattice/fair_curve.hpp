#pragma once

#include "carlin/description/hull.hpp"

#include <vector>

namespace carlin
{
/// Value along x through given points: straight between them, or a cubic that keeps the shape of
/// the data (no overshoot, constant where the data are). Beyond its ends it goes on straight.
///
/// Source: Fritsch & Carlson, SIAM J. Numer. Anal. 17 (1980) 238: slopes from three points, limited
/// to the circle of radius 3.
class FairCurve
{
public:
  FairCurve() = default;
  /// @pre x increases strictly; both have the same size, at least 2.
  FairCurve(std::vector<double> x, std::vector<double> value, Fairing fairing);

  double operator()(double x) const;

private:
  std::vector<double> x_, value_, slope_;
  Fairing fairing_ = Fairing::straight;
};

/// Value of a polyline of (x, value) at x; constant beyond its ends.
/// @pre x increases strictly; not empty.
double polyline_value(const std::vector<std::pair<double, double>>& polyline, double x);
} // namespace carlin
