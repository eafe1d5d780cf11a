#pragma once

#include "stage_state.hpp"

#include "carlin/loads/loads.hpp"
#include "carlin/mounts/mounts.hpp"
#include "carlin/recovery/recovery.hpp"
#include "carlin/solution/hull_solver.hpp"

#include <optional>
#include <utility>
#include <vector>

namespace carlin
{
/// What acts in one stage: on the hull without its collars, and on the tanks.
struct StageLoads
{
  VectorX hull; ///< 6 n: water, gravity, inertia, direct loads, thermal; collars not
  std::vector<TankStageLoad> tanks;
  RigidAcceleration acceleration; ///< of hull and tanks that are not held
  std::vector<std::pair<Index, double>> shell_pressures;
  std::vector<Vector12> member_fixed_end; ///< empty or one a member
  std::vector<LoadNote> notes;
};

/// Balances the stages of one configuration. Keeps the flotation of each state of the tanks.
class StageLoader
{
public:
  StageLoader(const Model& model, const ConfiguredCraft& craft, const Structure& structure);

  /// @throws ValueError, SolveError from the loads (hull swamped, patch too large).
  StageLoads operator()(const StageState& state);

private:
  const Model& model_;
  const ConfiguredCraft& craft_;
  const Structure& structure_;
  std::vector<std::pair<std::vector<bool>, Flotation>> flotations_;

  const Flotation& flotation(const StageState& state);
  MassProperties whole_craft(const StageState& state) const;
  void add_water(const StageState& state, StageLoads& loads);
  LandingLoad landing_patch(const Landing& landing, double mass) const;
  void add_events(const StageState& state, StageLoads& loads) const;
  void add_temperature(const StageState& state, StageLoads& loads) const;
  void balance(const StageState& state, StageLoads& loads);
  Vector3 gravity(const StageState& state);
};
} // namespace carlin
