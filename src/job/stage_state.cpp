#include "stage_state.hpp"

#include <algorithm>

namespace carlin
{
namespace
{
bool is_named(const std::vector<std::string>& names, const std::string& name)
{
  return names.empty() || std::ranges::find(names, name) != names.end();
}

void change_tanks(StageState& state, const ConfiguredCraft& craft, const Stage& stage)
{
  for (std::size_t t = 0; t < craft.tanks.size(); ++t)
  {
    TankCondition& condition = state.tanks[t];
    for (const TankState& change : stage.tanks)
    {
      if (!is_named(change.tanks, craft.tanks[t].name))
        continue;
      condition.pressure = change.pressure.value_or(condition.pressure);
      condition.temperature = change.temperature.value_or(condition.temperature);
      condition.is_full = change.is_full.value_or(condition.is_full);
    }
    for (const GivenGrowth& growth : stage.growths)
      if (growth.tank == craft.tanks[t].name)
      {
        condition.given_axial_strain = growth.axial_strain;
        condition.given_radial = growth.radial;
      }
  }
}

void change_hull_temperature(StageState& state, const Mesh& mesh, const Stage& stage)
{
  for (const HullTemperature& change : stage.hull_temperatures)
    for (std::size_t p = 0; p < mesh.parts.size(); ++p)
      if (is_named(change.parts, mesh.parts[p].name) ||
          is_named(change.parts, mesh.parts[p].family))
        state.hull_temperature[p] = change.temperature;
}

void change_foot_motion(StageState& state, const ConfiguredCraft& craft, const Stage& stage,
                        const std::vector<FootRef>& feet)
{
  for (const FootMotion& motion : stage.foot_motions)
    for (std::size_t f = 0; f < feet.size(); ++f)
    {
      const Tank& tank = craft.tanks[static_cast<std::size_t>(feet[f].tank)];
      const Collar& collar = tank.collars[static_cast<std::size_t>(feet[f].collar)];
      if (tank.name != motion.tank || (!motion.collar.empty() && collar.name != motion.collar))
        continue;
      state.foot_motion.segment<3>(6 * static_cast<Index>(f)) = motion.translation;
      state.foot_motion.segment<3>(6 * static_cast<Index>(f) + 3) = motion.rotation;
    }
}

bool changes_nothing(const Stage& stage)
{
  return !stage.water && stage.tanks.empty() && stage.hull_temperatures.empty() &&
         stage.foot_motions.empty() && stage.growths.empty() && stage.events.empty();
}
} // namespace

std::vector<StageState> stage_states(const Model& model, const ConfiguredCraft& craft,
                                     const Mesh& mesh, const LoadCase& load_case,
                                     const std::vector<FootRef>& feet)
{
  StageState state;
  state.water = model.hull ? WaterState::afloat : WaterState::none;
  state.tanks.assign(craft.tanks.size(), TankCondition{});
  for (TankCondition& condition : state.tanks)
    condition.temperature = model.craft.reference_temperature;
  state.hull_temperature.assign(mesh.parts.size(), model.craft.reference_temperature);
  state.foot_motion = VectorX::Zero(6 * static_cast<Index>(feet.size()));

  std::vector<StageState> states;
  for (std::size_t s = 0; s < load_case.stages.size(); ++s)
  {
    const Stage& stage = load_case.stages[s];
    state.name = stage.name;
    state.water = stage.water.value_or(state.water);
    change_tanks(state, craft, stage);
    change_hull_temperature(state, mesh, stage);
    change_foot_motion(state, craft, stage, feet);
    state.events = stage.events.empty() ? nullptr : &stage;
    states.push_back(state);

    const bool is_removed_next =
        s + 1 < load_case.stages.size() && changes_nothing(load_case.stages[s + 1]);
    if (state.events != nullptr && !craft.tanks.empty() && !is_removed_next)
    {
      state.name = "after " + stage.name;
      state.events = nullptr;
      states.push_back(state);
    }
  }
  return states;
}

Growth free_growth(const Tank& tank, const TankCondition& condition, double reference_temperature)
{
  Growth growth;
  const double rise = condition.temperature - reference_temperature;
  growth.axial_strain = tank.axial_expansion * rise + condition.given_axial_strain;
  growth.radial = tank.radial_expansion * rise * 0.5 * tank.diameter + condition.given_radial;
  if (tank.growth)
  {
    const double share = condition.pressure / tank.growth->pressure;
    growth.axial_strain += share * tank.growth->length_change / tank.growth->gauge_length;
    growth.radial +=
        share * tank.growth->diameter_change / tank.growth->diameter * 0.5 * tank.diameter;
  }
  return growth;
}

double tank_mass(const Tank& tank, bool is_full)
{
  return tank.mass + (is_full ? tank.contents_mass : 0.0);
}

MassProperties rod(const Tank& tank, double mass)
{
  const Vector3 along = tank.axis_to - tank.axis_from;
  MassProperties body;
  body.mass = mass;
  body.centre = 0.5 * (tank.axis_from + tank.axis_to);
  body.inertia =
      mass / 12.0 * (along.squaredNorm() * Matrix3::Identity() - along * along.transpose());
  return body;
}
} // namespace carlin
