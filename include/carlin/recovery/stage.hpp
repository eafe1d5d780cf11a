#pragma once

#include "carlin/loads/loads.hpp"
#include "carlin/mounts/mounts.hpp"
#include "carlin/solution/hull_solver.hpp"
#include "carlin/structure/structure.hpp"

#include <string>
#include <utility>
#include <vector>

namespace carlin
{
/// Result of one stage of one case on one configuration.
struct StageSolution
{
  std::string name;
  VectorX displacement; ///< 6 n, as solved (pins at rest)
  VectorX applied;      ///< 6 n: everything that acts on the hull: water, inertia, collars
  std::vector<double> temperature_rise;                  ///< by mesh part [K]; empty: none
  std::vector<std::pair<Index, double>> shell_pressures; ///< [Pa], along the inward normal
  std::vector<Vector12> member_fixed_end; ///< one a member: sum of its equivalent loads, line loads
                                          ///< and temperature alike (empty: none)
  RigidAcceleration acceleration;
  Vector6 pin_reaction = Vector6::Zero();   ///< resultant about the origin; audit
  double largest_load = 0.0;                ///< norm the audit compares with [N]
  MountStageResult mounts_low, mounts_high; ///< slides and grips at the low and the high end
  std::vector<LoadNote> notes;
};
} // namespace carlin
