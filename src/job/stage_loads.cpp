#include "stage_loads.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <variant>

namespace carlin
{
namespace
{
constexpr double smallest_rise = 1e-12; // [K]

bool is_named(const std::vector<std::string>& names, const std::string& name)
{
  return names.empty() || std::ranges::find(names, name) != names.end();
}

void add(StageLoads& loads, const HullLoad& load, double factor, std::size_t member_count)
{
  loads.hull += factor * load.forces;
  for (const auto& [shell, pressure] : load.shell_pressures)
    loads.shell_pressures.emplace_back(shell, factor * pressure);
  if (!load.member_loads.empty() && loads.member_fixed_end.empty())
    loads.member_fixed_end.assign(member_count, Vector12::Zero());
  for (const auto& [member, forces] : load.member_loads)
    loads.member_fixed_end[static_cast<std::size_t>(member)] += factor * forces;
  loads.notes.insert(loads.notes.end(), load.notes.begin(), load.notes.end());
}

bool has_landing(const StageState& state)
{
  return state.events != nullptr &&
         std::ranges::any_of(state.events->events, [](const auto& event)
                             { return std::holds_alternative<Landing>(event.first); });
}

/// The holding acceleration on this tank in this stage, if any: sum of those that name it.
std::optional<Vector3> holding(const StageState& state, const Tank& tank)
{
  std::optional<Vector3> felt;
  if (state.events == nullptr)
    return felt;
  for (const auto& [event, factor] : state.events->events)
    if (const auto* hold = std::get_if<HoldingAcceleration>(&event))
      if (is_named(hold->tanks, tank.name))
        felt = felt.value_or(Vector3::Zero()) + factor * hold->felt;
  return felt;
}
} // namespace

StageLoader::StageLoader(const Model& model, const ConfiguredCraft& craft,
                         const Structure& structure)
    : model_(model), craft_(craft), structure_(structure)
{
}

MassProperties StageLoader::whole_craft(const StageState& state) const
{
  std::vector<MassProperties> bodies{structure_.mass_properties};
  for (std::size_t t = 0; t < craft_.tanks.size(); ++t)
    bodies.push_back(rod(craft_.tanks[t], tank_mass(craft_.tanks[t], state.tanks[t].is_full)));
  return combined(bodies);
}

const Flotation& StageLoader::flotation(const StageState& state)
{
  std::vector<bool> key;
  for (const TankCondition& tank : state.tanks)
    key.push_back(tank.is_full);
  for (const auto& [known, result] : flotations_)
    if (known == key)
      return result;
  flotations_.emplace_back(key, still_water(structure_, whole_craft(state)));
  return flotations_.back().second;
}

// Gravity acts square to the water a boat floats in, which its trim tilts against z.
Vector3 StageLoader::gravity(const StageState& state)
{
  if (state.water == WaterState::none)
    return Vector3::Zero();
  const Vector3 up =
      state.water == WaterState::afloat ? flotation(state).up : Vector3::UnitZ().eval();
  return -standard_gravity * up;
}

void StageLoader::add_water(const StageState& state, StageLoads& loads)
{
  if (state.water == WaterState::none)
    return;
  loads.hull += gravity_forces(structure_, -gravity(state) / standard_gravity);
  // In a landing the patch is all the water there is.
  if (state.water == WaterState::afloat && !has_landing(state))
    add(loads, flotation(state).load, 1.0, structure_.members.size());
}

LandingLoad StageLoader::landing_patch(const Landing& landing, double mass) const
{
  try
  {
    return landing_load(structure_, landing, model_.craft, mass);
  }
  catch (const ValueError& error)
  {
    throw ModelError(landing.where, std::string("landing: ") + error.what());
  }
}

void StageLoader::add_events(const StageState& state, StageLoads& loads) const
{
  if (state.events == nullptr)
    return;
  const std::size_t members = structure_.members.size();
  for (const auto& [event, factor] : state.events->events)
  {
    if (const auto* landing = std::get_if<Landing>(&event))
    {
      add(loads, landing_patch(*landing, whole_craft(state).mass).load, factor, members);
    }
    else if (const auto* force = std::get_if<DirectForce>(&event))
      add(loads, direct_force(structure_, *force), factor, members);
    else if (const auto* line = std::get_if<LineForce>(&event))
      add(loads, line_force(structure_, *line), factor, members);
    else if (const auto* pressure = std::get_if<PartPressure>(&event))
      add(loads, part_pressure(structure_, *pressure), factor, members);
    else if (const auto* pull = std::get_if<TankForce>(&event))
      for (std::size_t t = 0; t < craft_.tanks.size(); ++t)
        if (craft_.tanks[t].name == pull->tank)
          loads.tanks[t].forces.emplace_back(pull->position, factor * pull->force);
  }
}

void StageLoader::add_temperature(const StageState& state, StageLoads& loads) const
{
  std::vector<double> rise(state.hull_temperature);
  for (double& value : rise)
    value -= model_.craft.reference_temperature;
  if (std::ranges::none_of(rise, [](double value) { return std::abs(value) > smallest_rise; }))
    return;
  loads.hull += thermal_forces(structure_, rise);
  if (loads.member_fixed_end.empty())
    loads.member_fixed_end.assign(structure_.members.size(), Vector12::Zero());
  for (std::size_t m = 0; m < structure_.members.size(); ++m)
  {
    const Member& member = structure_.members[m];
    loads.member_fixed_end[m] +=
        member_thermal(member_geometry(structure_, member),
                       structure_.member_sections[static_cast<std::size_t>(member.section)],
                       rise[static_cast<std::size_t>(member.part)]);
  }
}

// A tank that is held carries exactly its mass times the felt acceleration; the rest of the craft
// balances that and everything else by its own inertia.
void StageLoader::balance(const StageState& state, StageLoads& loads)
{
  const Vector3 weight = gravity(state);
  std::vector<MassProperties> rest{structure_.mass_properties};
  std::vector<std::optional<Vector3>> held;
  for (std::size_t t = 0; t < craft_.tanks.size(); ++t)
  {
    held.push_back(holding(state, craft_.tanks[t]));
    if (!held.back())
      rest.push_back(rod(craft_.tanks[t], loads.tanks[t].mass));
  }

  const bool is_floating = !model_.rigid_bed && structure_.supported.empty();
  if (is_floating)
  {
    const MassProperties body = combined(rest);
    Vector6 total = resultant(structure_, loads.hull, body.centre);
    const auto add_force = [&](const Vector3& force, const Vector3& at)
    {
      total.head<3>() += force;
      total.tail<3>() += (at - body.centre).cross(force);
    };
    for (std::size_t t = 0; t < craft_.tanks.size(); ++t)
    {
      const Tank& tank = craft_.tanks[t];
      const Vector3 centre = 0.5 * (tank.axis_from + tank.axis_to);
      add_force(loads.tanks[t].mass * held[t].value_or(weight), centre);
      const Vector3 along = (tank.axis_to - tank.axis_from).normalized();
      for (const auto& [position, force] : loads.tanks[t].forces)
        add_force(force, tank.axis_from + position * along);
    }
    loads.acceleration = rigid_acceleration(body, total.head<3>(), total.tail<3>());
    loads.hull += inertia_forces(structure_, loads.acceleration);
  }

  for (std::size_t t = 0; t < craft_.tanks.size(); ++t)
  {
    TankStageLoad& load = loads.tanks[t];
    load.about = 0.5 * (craft_.tanks[t].axis_from + craft_.tanks[t].axis_to);
    load.felt = held[t].value_or(weight - loads.acceleration.at(load.about));
    load.angular = held[t] ? Vector3::Zero().eval() : loads.acceleration.angular;
  }
}

StageLoads StageLoader::operator()(const StageState& state)
{
  StageLoads loads;
  loads.hull = VectorX::Zero(6 * static_cast<Index>(structure_.nodes.size()));
  for (std::size_t t = 0; t < craft_.tanks.size(); ++t)
  {
    const Growth growth =
        free_growth(craft_.tanks[t], state.tanks[t], model_.craft.reference_temperature);
    TankStageLoad load;
    load.mass = tank_mass(craft_.tanks[t], state.tanks[t].is_full);
    load.axial_strain = growth.axial_strain;
    load.radial_growth = growth.radial;
    loads.tanks.push_back(load);
  }
  if (!model_.rigid_bed)
  {
    add_water(state, loads);
    add_events(state, loads);
    add_temperature(state, loads);
  }
  else
    add_events(state, loads); // only forces on tanks reach a rigid bed
  balance(state, loads);
  return loads;
}
} // namespace carlin
