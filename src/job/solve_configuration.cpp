#include "stage_loads.hpp"
#include "stopwatch.hpp"

#include "carlin/job/job.hpp"

#include <algorithm>
#include <array>
#include <chrono>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
/// The hull as the mounts see it: footprints of all feet and the flexibility between them.
struct HullAtFeet
{
  std::vector<FootRef> feet;
  std::vector<Footprint> footprints;
  MatrixX weights;     ///< B: 6 n x 6 nf
  MatrixX deflections; ///< K^-1 B
  MatrixX flexibility; ///< B' K^-1 B, 6 nf x 6 nf, made exactly symmetric
};

HullAtFeet hull_at_feet(const Model& model, const ConfiguredCraft& craft,
                        const Structure& structure, const HullSolver* solver)
{
  HullAtFeet hull;
  hull.feet = feet_of(craft.tanks);
  const Index columns = 6 * static_cast<Index>(hull.feet.size());
  hull.flexibility = MatrixX::Zero(columns, columns);
  if (model.rigid_bed || columns == 0)
    return hull;

  hull.weights = MatrixX::Zero(6 * static_cast<Index>(structure.nodes.size()), columns);
  for (std::size_t f = 0; f < hull.feet.size(); ++f)
  {
    const FootRef& ref = hull.feet[f];
    const Tank& tank = craft.tanks[static_cast<std::size_t>(ref.tank)];
    const Collar& collar = tank.collars[static_cast<std::size_t>(ref.collar)];
    const Foot& foot = collar.feet[static_cast<std::size_t>(ref.foot)];
    hull.footprints.push_back(
        footprint(structure, foot.footprint, ref.point,
                  fmt::format("{}, {}, {}", tank.name, collar.name, foot.name)));
    hull.weights.middleCols(6 * static_cast<Index>(f), 6) = MatrixX(hull.footprints.back().weights);
  }
  hull.deflections = solver->solve(hull.weights);
  hull.flexibility = hull.weights.transpose() * hull.deflections;
  hull.flexibility = 0.5 * (hull.flexibility + hull.flexibility.transpose()).eval();
  return hull;
}

/// Foot motion of every stage, as the mounts want it: relative to the fitting, where the tank is
/// laid into the hull as it lies under its weight (feet move by nothing there).
std::vector<MountStage> mount_stages(const std::vector<StageState>& states,
                                     const std::vector<StageLoads>& loads, const HullAtFeet& hull,
                                     const MatrixX& free_displacements)
{
  std::vector<MountStage> stages;
  for (std::size_t s = 0; s < states.size(); ++s)
  {
    MountStage stage;
    stage.name = states[s].name;
    stage.tanks = loads[s].tanks;
    stage.foot_motion = states[s].foot_motion - states[0].foot_motion;
    if (hull.weights.size() > 0)
      stage.foot_motion +=
          hull.weights.transpose() *
          (free_displacements.col(static_cast<Index>(s)) - free_displacements.col(0));
    stages.push_back(std::move(stage));
  }
  return stages;
}

double largest(const Eigen::Ref<const VectorX>& forces)
{
  return forces.size() == 0 ? 0.0 : forces.cwiseAbs().maxCoeff();
}

/// Sum of the sizes of nodal forces: what the audit's imbalances are compared with [N].
double load_size(const Eigen::Ref<const VectorX>& forces)
{
  double sum = 0.0;
  for (Index node = 0; 6 * node < forces.size(); ++node)
    sum += forces.segment<3>(6 * node).norm();
  return sum;
}

/// A result that fails its own audit is no result.
void require_sound(const Audit& audit, const std::string& load_case, const std::string& stage)
{
  constexpr double largest = 1e-6;
  const std::array<std::pair<const char*, double>, 3> figures{
      {{"pins of a floating hull carry", audit.largest_pin_reaction},
       {"the solver's residual is", audit.largest_solver_residual},
       {"forces of a floating hull are out of balance by", audit.largest_force_imbalance}}};
  for (const auto& [words, figure] : figures)
    if (!(figure <= largest))
      throw SolveError(
          fmt::format("case '{}', stage '{}': {} {:.1e} of the load, more than {:.0e}; "
                      "the structure is too soft or too stiff somewhere to be solved",
                      load_case, stage, words, figure, largest));
}

void audit_stage(const Structure& structure, const HullSolver& solver, const std::string& load_case,
                 StageSolution& stage, Audit& audit)
{
  stage.largest_load = load_size(stage.applied);
  const VectorX reactions = solver.reactions(stage.displacement, stage.applied);
  if (stage.largest_load <= 0.0)
    return;
  if (solver.is_floating())
  {
    stage.pin_reaction.setZero();
    const double arm = std::max(1.0, structure.mass_properties.centre.norm());
    for (Index r = 0; r < reactions.size(); ++r)
    {
      const Index freedom = solver.held_freedoms()[static_cast<std::size_t>(r)];
      VectorX unit = VectorX::Zero(stage.applied.size());
      unit[freedom] = reactions[r];
      stage.pin_reaction += resultant(structure, unit, Vector3::Zero());
    }
    const Vector6 imbalance = resultant(structure, stage.applied, structure.mass_properties.centre);
    audit.largest_pin_reaction =
        std::max(audit.largest_pin_reaction, largest(reactions) / stage.largest_load);
    audit.largest_force_imbalance =
        std::max({audit.largest_force_imbalance, imbalance.head<3>().norm() / stage.largest_load,
                  imbalance.tail<3>().norm() / (arm * stage.largest_load)});
  }
  VectorX residual = structure.stiffness * stage.displacement - stage.applied;
  for (const Index freedom : solver.held_freedoms())
    residual[freedom] = 0.0;
  for (const SupportedFreedom& support : structure.supported)
    if (support.stiffness > 0.0)
      residual[support.freedom] += support.stiffness * stage.displacement[support.freedom];
  audit.largest_solver_residual =
      std::max(audit.largest_solver_residual, residual.norm() / stage.applied.norm());
  require_sound(audit, load_case, stage.name);
}

/// True if the hull feels the collars otherwise at the low end of friction and grip.
bool is_unlike(const MountStageResult& low, const MountStageResult& high)
{
  constexpr double noise = 1e-6;
  return low.not_held.empty() &&
         (low.foot_forces - high.foot_forces).norm() > noise * high.foot_forces.norm();
}

/// The same stage of the hull with the collar forces of the low end: the envelope is judged over
/// both.
StageSolution at_low_end(const StageSolution& stage, const HullAtFeet& hull,
                         const MountStageResult& high, const MountStageResult& low)
{
  StageSolution other = stage;
  other.name = stage.name + ", friction low";
  const VectorX change = low.foot_forces - high.foot_forces;
  other.applied += hull.weights * change;
  other.displacement += hull.deflections * change;
  other.mounts_low = {}; // both ends of the mounts stand with the stage itself
  other.mounts_high = {};
  other.mounts_crossed = {};
  return other;
}

const MountStageResult* result_of(const std::vector<MountStageResult>& results, std::size_t stage)
{
  return stage < results.size() ? &results[stage] : nullptr;
}

std::vector<double> rises(const StageState& state, double reference)
{
  std::vector<double> rise(state.hull_temperature);
  for (double& value : rise)
    value -= reference;
  return rise;
}

CaseSolution solve_case(const Model& model, const ConfiguredCraft& craft,
                        const Structure& structure, const HullSolver* solver,
                        const HullAtFeet& hull, StageLoader& loader, const LoadCase& load_case,
                        Audit& audit)
{
  const std::vector<StageState> states =
      stage_states(model, craft, *structure.mesh, load_case, hull.feet);
  std::vector<StageLoads> loads;
  MatrixX forces(6 * static_cast<Index>(structure.nodes.size()), static_cast<Index>(states.size()));
  for (std::size_t s = 0; s < states.size(); ++s)
  {
    loads.push_back(loader(states[s]));
    forces.col(static_cast<Index>(s)) = loads.back().hull;
  }
  MatrixX displacements = forces;
  if (solver != nullptr)
    displacements = solver->solve(forces).colwise() + solver->imposed_displacement();

  std::vector<MountStageResult> low;
  std::vector<MountStageResult> high;
  std::vector<MountStageResult> crossed;
  if (!craft.tanks.empty())
  {
    const std::vector<MountStage> stages = mount_stages(states, loads, hull, displacements);
    low = run_history(craft.tanks, hull.flexibility, stages, RangeEnd::low);
    high = run_history(craft.tanks, hull.flexibility, stages, RangeEnd::high);
    if (has_grip_range(craft.tanks))
      crossed = run_history(craft.tanks, hull.flexibility, stages,
                            RangeEnds{RangeEnd::high, RangeEnd::low});
  }

  CaseSolution result{load_case.name, load_case.load_class, {}};
  for (std::size_t s = 0; s < states.size(); ++s)
  {
    StageSolution stage;
    stage.name = states[s].name;
    stage.acceleration = loads[s].acceleration;
    stage.shell_pressures = std::move(loads[s].shell_pressures);
    stage.member_fixed_end = std::move(loads[s].member_fixed_end);
    stage.temperature_rise = rises(states[s], model.craft.reference_temperature);
    stage.notes = std::move(loads[s].notes);
    if (const MountStageResult* found = result_of(low, s))
      stage.mounts_low = *found;
    if (const MountStageResult* found = result_of(crossed, s))
      stage.mounts_crossed = *found;
    const MountStageResult* found = result_of(high, s);
    if (found != nullptr)
      stage.mounts_high = *found;
    if (!craft.tanks.empty() && (found == nullptr || !found->not_held.empty()))
    {
      // The hull without its tanks' forces would be out of balance: the history ends here.
      result.stages.push_back(std::move(stage));
      break;
    }
    stage.applied = forces.col(static_cast<Index>(s));
    stage.displacement = displacements.col(static_cast<Index>(s));
    if (found != nullptr && hull.weights.size() > 0)
    {
      stage.applied += hull.weights * found->foot_forces;
      stage.displacement += hull.deflections * found->foot_forces;
      audit.largest_mount_residual =
          std::max(audit.largest_mount_residual, found->equilibrium_residual);
    }
    if (solver != nullptr)
      audit_stage(structure, *solver, load_case.name, stage, audit);
    result.stages.push_back(std::move(stage));
    if (const MountStageResult* other = result_of(low, s); hull.weights.size() > 0 &&
                                                           found != nullptr && other != nullptr &&
                                                           is_unlike(*other, *found))
      result.stages.push_back(at_low_end(result.stages.back(), hull, *found, *other));
  }
  return result;
}

void account_tanks(const ConfiguredCraft& craft, ConfigurationSolution& solution)
{
  std::vector<MassProperties> bodies{solution.structure->mass_properties};
  for (const Tank& tank : craft.tanks)
  {
    const Vector3 centre = 0.5 * (tank.axis_from + tank.axis_to);
    solution.mass_account.push_back({tank.name, "tanks", tank.mass, centre});
    if (tank.contents_mass > 0.0)
      solution.mass_account.push_back({tank.name, "contents", tank.contents_mass, centre});
    bodies.push_back(rod(tank, tank_mass(tank, true)));
  }
  solution.mass_properties = combined(bodies);
}
} // namespace

ConfigurationSolution solve_configuration(const Model& model, const Lattice& lattice,
                                          const ConfiguredCraft& craft, const Outfit& outfit,
                                          const std::vector<std::string>& cases, Audit& audit,
                                          std::vector<Timing>& timings)
{
  Stopwatch watch(craft.name, timings);
  ConfigurationSolution solution;
  solution.craft = craft;
  solution.mesh = std::make_shared<const Mesh>(lattice.mesh(craft));
  watch.lap("lattice");
  solution.structure =
      std::make_shared<const Structure>(build_structure(model, craft, *solution.mesh, outfit));
  const Structure& structure = *solution.structure;
  solution.mass_account = structure.mass_account;
  account_tanks(craft, solution);
  watch.lap("structure");

  if (!model.rigid_bed)
    solution.solver = std::make_shared<const HullSolver>(structure);
  watch.lap("factor");
  const HullAtFeet hull = hull_at_feet(model, craft, structure, solution.solver.get());
  solution.feet = hull.feet;
  solution.footprints = hull.footprints;
  watch.lap("feet");

  StageLoader loader(model, craft, structure);
  for (const LoadCase& load_case : model.cases)
    if (cases.empty() || std::ranges::find(cases, load_case.name) != cases.end())
      solution.cases.push_back(solve_case(model, craft, structure, solution.solver.get(), hull,
                                          loader, load_case, audit));
  watch.lap("cases");
  std::vector<StageSolution*> solved;
  for (CaseSolution& load_case : solution.cases)
    for (StageSolution& stage : load_case.stages)
      if (stage.displacement.size() > 0)
        solved.push_back(&stage);
  recover_shell_stresses(structure, solved);
  watch.lap("shell stresses");
  solution.panels = find_panels(structure);
  watch.lap("panels");
  return solution;
}
} // namespace carlin
