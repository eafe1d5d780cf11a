#pragma once

#include "carlin/description/model.hpp"
#include "carlin/mounts/mounts.hpp"
#include "carlin/solution/hull_solver.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// State of one tank at the end of a stage; persists until changed.
struct TankCondition
{
  double pressure = 0.0;    ///< gauge [Pa]
  double temperature = 0.0; ///< [K]
  bool is_full = false;
  double given_axial_strain = 0.0; ///< [-]
  double given_radial = 0.0;       ///< [m]
};

/// Everything that persists from stage to stage.
struct StageState
{
  std::string name;
  WaterState water = WaterState::none;
  std::vector<TankCondition> tanks;     ///< as craft.tanks
  std::vector<double> hull_temperature; ///< by mesh part [K]
  VectorX foot_motion;                  ///< imposed, 6 a foot, global axes
  const Stage* events = nullptr;        ///< stage whose events act; null: none
};

/// The states of a case in order. After a stage with events a stage "after <name>" without them is
/// put in where tanks are aboard, unless the next stage is that already: their removal is solved
/// too.
std::vector<StageState> stage_states(const Model& model, const ConfiguredCraft& craft,
                                     const Mesh& mesh, const LoadCase& load_case,
                                     const std::vector<FootRef>& feet);

/// Free growth of a tank in a condition: axial strain, and radius at the lining [m].
/// Linear in pressure and temperature from the reference at the fitting.
struct Growth
{
  double axial_strain = 0.0;
  double radial = 0.0;
};
Growth free_growth(const Tank& tank, const TankCondition& condition, double reference_temperature);

/// Mass of a tank with what is in it [kg].
double tank_mass(const Tank& tank, bool is_full);

/// A tank as the uniform rod that the mounts take it for.
MassProperties rod(const Tank& tank, double mass);
} // namespace carlin
