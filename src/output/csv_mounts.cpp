#include "csv.hpp"
#include "mount_results.hpp"
#include "names.hpp"
#include "write_tables.hpp"

#include <functional>

namespace carlin
{
namespace
{
struct Occasion
{
  const ConfigurationSolution& configuration;
  const CaseSolution& load_case;
  const StageSolution& stage;
  std::string range_end;
  const MountStageResult& mounts;
};

void for_each_occasion(const RunResult& result, const std::function<void(const Occasion&)>& visit)
{
  for (const ConfigurationSolution& configuration : result.configurations)
    for (const CaseSolution& load_case : configuration.cases)
      for (const StageSolution& stage : load_case.stages)
        for (const MountsAt& at : mounts_of(stage))
          visit({configuration, load_case, stage, at.range_end, *at.result});
}

std::vector<CsvField> key_of(const Occasion& at, const Tank& tank)
{
  return {at.configuration.craft.name, at.load_case.name, at.stage.name, at.range_end, tank.name};
}

void append(std::vector<CsvField>& fields, const std::vector<CsvField>& more)
{
  fields.insert(fields.end(), more.begin(), more.end());
}
} // namespace

std::vector<MountsAt> mounts_of(const StageSolution& stage)
{
  std::vector<MountsAt> both;
  if (!stage.mounts_low.tanks.empty() || !stage.mounts_low.not_held.empty())
    both.push_back({"low", &stage.mounts_low});
  if (!stage.mounts_high.tanks.empty() || !stage.mounts_high.not_held.empty())
    both.push_back({"high", &stage.mounts_high});
  if (!stage.mounts_crossed.tanks.empty() || !stage.mounts_crossed.not_held.empty())
    both.push_back({"high, grip low", &stage.mounts_crossed});
  return both;
}

std::string collars_csv(const RunResult& result)
{
  CsvTable table({"configuration",
                  "case",
                  "stage",
                  "range end",
                  "tank",
                  "collar",
                  "hold",
                  "force along [N]",
                  "force across [N]",
                  "force upright [N]",
                  "moment about axis [N m]",
                  "moment about across [N m]",
                  "moment about upright [N m]",
                  "clamping force [N]",
                  "friction or grip limit [N]",
                  "friction or grip force along [N]",
                  "stop force along [N]",
                  "slip [m]",
                  "turn [rad]",
                  "stroke left aft [m]",
                  "stroke left forward [m]",
                  "interference [m]",
                  "offset [m]",
                  "peak lining pressure [Pa]",
                  "ring displacement x [m]",
                  "ring displacement y [m]",
                  "ring displacement z [m]"});
  for_each_occasion(result,
                    [&](const Occasion& at)
                    {
                      for (std::size_t t = 0; t < at.mounts.tanks.size(); ++t)
                        for (std::size_t c = 0; c < at.mounts.tanks[t].collars.size(); ++c)
                        {
                          const Tank& tank = at.configuration.craft.tanks[t];
                          const CollarResult& collar = at.mounts.tanks[t].collars[c];
                          std::vector<CsvField> row = key_of(at, tank);
                          append(row, {tank.collars[c].name,
                                       word_of(collar.hold),
                                       collar.force[0],
                                       collar.force[1],
                                       collar.force[2],
                                       collar.force[3],
                                       collar.force[4],
                                       collar.force[5],
                                       collar.clamping_force,
                                       collar.friction_limit,
                                       collar.friction_force,
                                       collar.stop_force,
                                       collar.slip,
                                       collar.turn,
                                       collar.stroke_left_aft,
                                       collar.stroke_left_forward,
                                       collar.interference,
                                       collar.offset,
                                       collar.peak_lining_pressure,
                                       collar.displacement.x(),
                                       collar.displacement.y(),
                                       collar.displacement.z()});
                          table.add(row);
                        }
                    });
  return table.text();
}

std::string feet_csv(const RunResult& result)
{
  CsvTable table({"configuration", "case", "stage", "range end", "tank", "collar", "foot",
                  "force on hull x [N]", "force on hull y [N]", "force on hull z [N]",
                  "moment on hull x [N m]", "moment on hull y [N m]", "moment on hull z [N m]",
                  "slip [m]"});
  for_each_occasion(
      result,
      [&](const Occasion& at)
      {
        for (std::size_t t = 0; t < at.mounts.tanks.size(); ++t)
          for (std::size_t c = 0; c < at.mounts.tanks[t].collars.size(); ++c)
            for (std::size_t f = 0; f < at.mounts.tanks[t].collars[c].foot_forces.size(); ++f)
            {
              const Tank& tank = at.configuration.craft.tanks[t];
              const CollarResult& collar = at.mounts.tanks[t].collars[c];
              const Vector6& force = collar.foot_forces[f];
              std::vector<CsvField> row = key_of(at, tank);
              append(row,
                     {tank.collars[c].name, tank.collars[c].feet[f].name, force[0], force[1],
                      force[2], force[3], force[4], force[5],
                      f < collar.foot_slips.size() ? CsvField(collar.foot_slips[f]) : CsvField()});
              table.add(row);
            }
      });
  return table.text();
}

std::string tanks_csv(const RunResult& result)
{
  CsvTable table({"configuration", "case", "stage", "range end", "tank",
                  "largest axial force, compression + [N]", "largest bending [N m]",
                  "largest torsion [N m]", "work lost by friction, all tanks [J]",
                  "out of equilibrium [-]", "not held"});
  for_each_occasion(
      result,
      [&](const Occasion& at)
      {
        std::string not_held;
        for (const std::string& text : at.mounts.not_held)
          not_held += (not_held.empty() ? "" : "; ") + text;
        if (at.mounts.tanks.empty()) // lost: no figures, but a line a tank
          for (const Tank& tank : at.configuration.craft.tanks)
          {
            std::vector<CsvField> row = key_of(at, tank);
            append(row, {CsvField(), CsvField(), CsvField(), CsvField(), CsvField(), not_held});
            table.add(row);
          }
        for (std::size_t t = 0; t < at.mounts.tanks.size(); ++t)
        {
          const TankResult& tank = at.mounts.tanks[t];
          std::vector<CsvField> row = key_of(at, at.configuration.craft.tanks[t]);
          append(row, {tank.largest_axial_force, tank.largest_bending, tank.largest_torsion,
                       at.mounts.work_lost, at.mounts.equilibrium_residual, not_held});
          table.add(row);
        }
      });
  return table.text();
}
} // namespace carlin
