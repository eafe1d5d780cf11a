#include "carlin/checks/buckling.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>

namespace carlin
{
double elastic_buckling_stress(const BucklingPlate& plate, double factor)
{
  assert(plate.short_side > 0.0 && plate.thickness > 0.0);
  const double E = plate.youngs_modulus;
  const double nu = plate.poissons_ratio;
  const double slenderness = plate.thickness / plate.short_side;
  constexpr double pi = std::numbers::pi;
  return factor * pi * pi * E / (12.0 * (1.0 - nu * nu)) * slenderness * slenderness;
}

double critical_stress(double elastic, std::optional<double> yield)
{
  if (!yield || elastic <= 0.5 * *yield)
    return elastic;
  return *yield * (1.0 - *yield / (4.0 * elastic));
}

double buckling_usage(const BucklingPlate& plate, const Vector3& membrane)
{
  const double ratio = plate.short_side / plate.long_side;
  const double across_factor = (1.0 + ratio * ratio) * (1.0 + ratio * ratio);
  std::optional<double> shear_yield;
  if (plate.yield)
    shear_yield = *plate.yield / std::numbers::sqrt3;
  const double along = critical_stress(elastic_buckling_stress(plate, 4.0), plate.yield);
  const double across = critical_stress(elastic_buckling_stress(plate, across_factor), plate.yield);
  const double shear = critical_stress(elastic_buckling_stress(plate, 5.34), shear_yield);
  const double shear_part = membrane[2] / shear;
  return std::max(0.0, -membrane[0]) / along + std::max(0.0, -membrane[1]) / across +
         shear_part * shear_part;
}
} // namespace carlin
