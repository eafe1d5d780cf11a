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
/// Stress of one shell, homogeneous plate: at its centre in the frame of shell_frame (x, y, xy),
/// the inner face membrane + bending, the outer face membrane - bending [Pa].
struct ShellStress
{
  Vector3 membrane = Vector3::Zero();
  Vector3 bending = Vector3::Zero();
  double peak = 0.0; ///< largest von Mises at corners, both faces; Gauss points of a triangle [Pa]
};

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
  std::vector<ShellStress> shell_stresses; ///< one a shell, by recover_shell_stresses(); empty: not
                                           ///< yet worked out
  RigidAcceleration acceleration;
  Vector6 pin_reaction = Vector6::Zero();   ///< resultant about the origin; audit
  double largest_load = 0.0;                ///< norm the audit compares with [N]
  MountStageResult mounts_low, mounts_high; ///< slides and grips at the low and the high end
  MountStageResult mounts_crossed; ///< slides at the high end, grips at the low: what a slide that
                                   ///< locks does to a grip; empty where no grip has a range
  std::vector<LoadNote> notes;
};
} // namespace carlin
