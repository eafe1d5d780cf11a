#include "csv.hpp"
#include "mass_changes.hpp"
#include "names.hpp"
#include "write_tables.hpp"

#include <algorithm>
#include <limits>

namespace carlin
{
namespace
{
CsvField optional_field(const std::optional<double>& value)
{
  return value ? CsvField(*value) : CsvField();
}

Standing standing_of(const RunResult& result, const std::string& configuration)
{
  for (const ConfigurationSolution& solution : result.configurations)
    if (solution.craft.name == configuration)
      return solution.craft.standing;
  return Standing::shown;
}

CsvField ratio(double value, double of)
{
  return of > 0.0 && value > 0.0 ? CsvField(value / of) : CsvField();
}

void add_bay(CsvTable& table, const std::string& configuration, const BayStiffness& bay,
             const BayStiffness* base, double shear)
{
  const bool has_base = base != nullptr;
  table.add({configuration, bay.from, bay.to, bay.length, bay.bending,
             has_base ? ratio(bay.bending, base->bending) : CsvField(), bay.torsion,
             bay.torsion_per_angle, has_base ? ratio(bay.torsion, base->torsion) : CsvField(),
             shear > 0.0 ? CsvField(shear) : CsvField(),
             std::string(bay.near_loaded_section ? "near the loaded end" : "")});
}
} // namespace

std::string checks_csv(const RunResult& result)
{
  CsvTable table({"configuration", "standing", "verdict", "utilisation [-]", "criterion", "subject",
                  "place", "found", "limit", "unit of found and limit", "limit is", "case", "stage",
                  "class", "formula", "source", "remark"});
  for (const Check& check : result.checks)
    table.add({check.configuration, word_of(standing_of(result, check.configuration)),
               word_of(check.verdict), optional_field(check.utilisation), check.name, check.subject,
               check.place, check.demand, optional_field(check.limit), check.unit,
               std::string(check.limit_from_below ? "least" : "largest"), check.load_case,
               check.stage, word_of(check.load_class), check.formula, check.source, check.remark});
  return table.text();
}

std::string stiffness_csv(const RunResult& result)
{
  CsvTable table({"configuration", "from", "to", "length [m]", "EI [N m^2]", "EI over base [-]",
                  "GJ [N m^2]", "torsion [N m/rad]", "GJ over base [-]", "GA [N]", "remark"});
  for (const ConfigurationSolution& configuration : result.configurations)
  {
    const GirderStiffness& base = result.configurations.front().stiffness;
    for (const BayStiffness& bay : configuration.stiffness.bays)
    {
      const auto same = std::ranges::find_if(base.bays, [&](const BayStiffness& b)
                                             { return b.from == bay.from && b.to == bay.to; });
      add_bay(table, configuration.craft.name, bay, same == base.bays.end() ? nullptr : &*same,
              0.0);
    }
    if (configuration.stiffness.whole.length > 0.0)
      add_bay(table, configuration.craft.name, configuration.stiffness.whole, &base.whole,
              configuration.stiffness.shear);
  }
  return table.text();
}

std::string masses_csv(const RunResult& result)
{
  CsvTable table({"configuration", "group", "name", "mass [kg]", "change from base [kg]",
                  "centre x [m]", "centre y [m]", "centre z [m]"});
  std::vector<MassRow> rows = mass_rows(result.configurations);
  if (!rows.empty())
    rows.push_back(total_of(rows));
  for (std::size_t c = 0; c < result.configurations.size(); ++c)
    for (const MassRow& row : rows)
    {
      const bool is_aboard = row.masses[c] > 0.0;
      const auto centre = [&](int axis)
      { return is_aboard ? CsvField(row.centres[c][axis]) : CsvField(); };
      if (is_aboard || row.masses[0] > 0.0)
        table.add({result.configurations[c].craft.name, row.group, row.name, row.masses[c],
                   row.masses[c] - row.masses[0], centre(0), centre(1), centre(2)});
    }
  return table.text();
}

std::string joints_csv(const RunResult& result)
{
  CsvTable table({"configuration", "case", "stage", "joint", "spring", "x [m]", "y [m]", "z [m]",
                  "along [N/m]", "across [N/m]", "normal [N/m]", "rotation [N m/m]",
                  "slip along [m]"});
  for (const ConfigurationSolution& configuration : result.configurations)
  {
    if (!configuration.structure || configuration.structure->joints.empty())
      continue;
    const Structure& structure = *configuration.structure;
    for (const CaseSolution& load_case : configuration.cases)
      for (const StageSolution& stage : load_case.stages)
      {
        if (stage.displacement.size() == 0)
          continue; // the history has ended: a tank is not held
        for (const JointLoad& load : joint_loads(structure, stage))
        {
          const JointSpring& spring = structure.joints[static_cast<std::size_t>(load.spring)];
          const Vector3& at = structure.nodes[static_cast<std::size_t>(spring.node_part)];
          table.add({configuration.craft.name, load_case.name, stage.name,
                     configuration.mesh->joints[static_cast<std::size_t>(load.joint)].name,
                     static_cast<double>(load.spring), at.x(), at.y(), at.z(), load.along,
                     load.across, load.normal, load.rotation, load.slip});
        }
      }
  }
  return table.text();
}
} // namespace carlin
