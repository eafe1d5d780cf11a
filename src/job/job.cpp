#include "carlin/job/job.hpp"

#include "stopwatch.hpp"

#include "carlin/core/quantity.hpp"
#include "carlin/core/require.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace carlin
{
namespace
{
void require_known(const Model& model, const JobOptions& options)
{
  const auto unknown = [&](const std::string& what, const std::string& name, const auto& known)
  {
    std::string list;
    for (const auto& entry : known)
      list += (list.empty() ? "" : ", ") + entry.name;
    throw ModelError({model.file.string(), 0, 0},
                     fmt::format("{} '{}' does not exist; there are {}", what, name, list));
  };
  const auto is_there = [](const auto& known, const std::string& name)
  { return std::ranges::any_of(known, [&](const auto& entry) { return entry.name == name; }); };
  for (const std::string& name : options.configurations)
    if (!is_there(model.configurations, name))
      unknown("configuration", name, model.configurations);
  for (const std::string& name : options.cases)
    if (!is_there(model.cases, name))
      unknown("case", name, model.cases);
}

/// The reader cannot know the criteria; their names and units are checked here, before any work.
void require_known_criteria(const Model& model)
{
  std::vector<Problem> problems;
  for (const auto& [name, written] : model.criteria.written)
  {
    const auto place = model.criteria.where.find(name);
    const FileLocation where = place == model.criteria.where.end()
                                   ? FileLocation{model.file.string(), 0, 0}
                                   : place->second;
    const auto known = std::ranges::find(known_criteria(), name, &Criterion::name);
    if (known == known_criteria().end())
    {
      std::string list;
      for (const Criterion& criterion : known_criteria())
        list += (list.empty() ? "" : ", ") + criterion.name;
      problems.push_back(
          {where,
           fmt::format("criteria.{}: there is no such criterion; known are {}", name, list)});
      continue;
    }
    try
    {
      const double limit = require_positive(
          "limit",
          quantity_in_si(written, known->dimension_unit == "N/m" ? Dimension::force_per_length
                                                                 : Dimension::none),
          known->dimension_unit);
      if (name.ends_with("_used") && limit > 1.0)
        throw ValueError(fmt::format("limit is {:g}; a part that may be used is at most 1", limit));
    }
    catch (const ValueError& error)
    {
      problems.push_back({where, fmt::format("criteria.{}: {}", name, error.what())});
    }
  }
  if (!problems.empty())
    throw ModelError(std::move(problems));
}

/// The base is always solved: the others are compared with it.
std::vector<std::string> wanted(const Model& model, const JobOptions& options)
{
  std::vector<std::string> names{model.configurations.front().name};
  for (const Configuration& configuration : model.configurations)
    if (configuration.name != names.front() &&
        (options.configurations.empty() ||
         std::ranges::find(options.configurations, configuration.name) !=
             options.configurations.end()))
      names.push_back(configuration.name);
  return names;
}

std::vector<std::string> bay_stations(const Model& model)
{
  if (!model.bays.empty() || !model.hull)
    return model.bays;
  // Bulkheads of the base, in order along the hull; the stem is never loaded.
  std::vector<std::string> names;
  for (const Station& station : model.hull->stations)
    for (const PlatePart& plate : model.plates)
      if (plate.kind == PlateKind::bulkhead && plate.patch.plane == station.name &&
          plate.patch.surface == Surface::station && station.rake == 0.0)
      {
        names.push_back(station.name);
        break;
      }
  return names;
}
} // namespace

RunResult run_job(const Model& model, const JobOptions& options)
{
  require_known(model, options);
  require_known_criteria(model);
  RunResult result;
  result.model = model;
  Stopwatch watch("craft", result.timings);

  const Lattice lattice(model, model.mesh_size * options.mesh_scale);
  const ConfiguredCraft base = configured(model, model.configurations.front().name);
  const Mesh base_mesh = lattice.mesh(base);
  result.quality = mesh_quality(base_mesh);
  Outfit outfit;
  if (model.craft.displacement)
    outfit = base_outfit(model, base, base_mesh);
  watch.lap("lattice and outfit");

  std::vector<EndSection> sections;
  for (const std::string& name : wanted(model, options))
  {
    ConfigurationSolution solution =
        solve_configuration(model, lattice, configured(model, name), outfit, options.cases,
                            result.audit, result.timings);
    if (sections.empty())
      sections = end_sections(*solution.structure, bay_stations(model));
    Stopwatch laps(name, result.timings);
    if (sections.size() >= 2)
      solution.stiffness = girder_stiffness(*solution.structure, *solution.solver, sections);
    laps.lap("stiffness");
    result.configurations.push_back(std::move(solution));
    const ConfigurationSolution& here = result.configurations.back();
    const std::vector<Check> checks = make_checks(model, here, result.configurations.front());
    result.checks.insert(result.checks.end(), checks.begin(), checks.end());
    laps.lap("checks");
  }
  result.audit.displacement_stated = model.craft.displacement.value_or(0.0);
  result.audit.displacement_modelled = result.configurations.front().mass_properties.mass;
  std::ranges::stable_sort(result.checks, is_worse);
  return result;
}

int exit_status(const RunResult& result)
{
  for (const Check& check : result.checks)
    for (const ConfigurationSolution& configuration : result.configurations)
      if (configuration.craft.name == check.configuration &&
          configuration.craft.standing == Standing::judged && check.verdict == Verdict::not_met)
        return 1;
  return 0;
}
} // namespace carlin
