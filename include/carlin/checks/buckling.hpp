#pragma once

#include "carlin/core/types.hpp"

#include <optional>

namespace carlin
{
/// Homogeneous plate between supports that let its edges turn.
struct BucklingPlate
{
  double youngs_modulus = 0.0; ///< [Pa]
  double poissons_ratio = 0.0; ///< [-]
  double thickness = 0.0;      ///< [m]
  double short_side = 0.0;     ///< [m]
  double long_side = 0.0;      ///< [m]
  std::optional<double> yield; ///< 0.2 % proof; absent: elastic only [Pa]
};

/// Elastic buckling stress k pi^2 E / (12 (1 - nu^2)) (t/b)^2 [Pa], b the short side.
/// Source: Timoshenko & Gere, Theory of Elastic Stability, 2nd ed. (1961), sec. 9.2; exact.
double elastic_buckling_stress(const BucklingPlate& plate, double factor);

/// Critical stress of a metal: above half the yield, yield (1 - yield / (4 elastic)).
/// Source: Johnson's parabola as ship rules use it, from memory; yield in shear is yield / sqrt(3).
double critical_stress(double elastic, std::optional<double> yield);

/// Part of its buckling load that a simply supported plate carries: stresses over their critical
/// values, the two compressions added and the shear squared.
/// Factors: 4 along the long side (long plate), (1 + (b/a)^2)^2 across it, 5.34 in shear (long
/// plate, low for a short one). Tension counts as nothing.
/// @param membrane Along the long side, along the short side, shear; tension + [Pa].
/// Source: factors Timoshenko & Gere (1961), secs. 9.2 to 9.7; interaction common practice, no
/// source.
double buckling_usage(const BucklingPlate& plate, const Vector3& membrane);
} // namespace carlin
