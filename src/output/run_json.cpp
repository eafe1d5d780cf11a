#include "json.hpp"
#include "names.hpp"
#include "write_tables.hpp"

#include <cstdint>
#include <fstream>
#include <iterator>

namespace carlin
{
namespace
{
void write_model(JsonWriter& json, const RunResult& result)
{
  json.member("model_file", result.model.file.string());
  std::ifstream stream(result.model.file, std::ios::binary);
  const std::string text{std::istreambuf_iterator<char>(stream), {}};
  json.key("model_digest_fnv1a_64");
  if (stream.good() || stream.eof())
    json.value(fnv1a_digest(text));
  else
    json.null(); // a model made in a program has no file
}

void write_mesh(JsonWriter& json, const MeshQuality& mesh, double asked)
{
  json.key("mesh");
  json.open_object();
  json.member("size_asked [m]", asked);
  json.member("mean_side [m]", mesh.mean_side);
  json.member("cells", static_cast<std::int64_t>(mesh.cells));
  json.member("points_used", static_cast<std::int64_t>(mesh.points_used));
  json.member("largest_aspect [-]", mesh.largest_aspect);
  json.member("largest_skew [rad]", mesh.largest_skew);
  json.member("largest_warp [-]", mesh.largest_warp);
  json.member("fewest_cells_per_panel", static_cast<std::int64_t>(mesh.fewest_cells_per_panel));
  json.member("fewest_cells_per_span", static_cast<std::int64_t>(mesh.fewest_cells_per_span));
  json.close_object();
}

void write_audit(JsonWriter& json, const Audit& audit)
{
  json.key("audit");
  json.open_object();
  json.member("largest_pin_reaction_over_load [-]", audit.largest_pin_reaction);
  json.member("largest_solver_residual [-]", audit.largest_solver_residual);
  json.member("largest_force_imbalance_over_load [-]", audit.largest_force_imbalance);
  json.member("largest_mount_residual [-]", audit.largest_mount_residual);
  json.member("displacement_stated [kg]", audit.displacement_stated);
  json.member("displacement_modelled [kg]", audit.displacement_modelled);
  json.close_object();
}

void write_stage(JsonWriter& json, const StageSolution& stage)
{
  json.open_object();
  json.member("stage", stage.name);
  const auto vector = [&](const char* name, const Vector3& value)
  {
    json.key(name);
    json.open_array();
    for (const double component : value)
      json.value(component);
    json.close_array();
  };
  vector("centre_of_gravity [m]", stage.acceleration.centre);
  vector("acceleration [m/s^2]", stage.acceleration.linear);
  vector("angular_acceleration [rad/s^2]", stage.acceleration.angular);
  json.member("load_compared_with [N]", stage.largest_load);
  json.key("notes");
  json.open_array();
  for (const LoadNote& note : stage.notes)
    json.value(note.source.empty() ? note.text : note.text + " (" + note.source + ")");
  json.close_array();
  json.close_object();
}

void write_configuration(JsonWriter& json, const ConfigurationSolution& configuration)
{
  json.open_object();
  json.member("configuration", configuration.craft.name);
  json.member("standing", word_of(configuration.craft.standing));
  json.member("mass [kg]", configuration.mass_properties.mass);
  if (configuration.structure)
  {
    const auto count = [](const auto& list) { return static_cast<std::int64_t>(list.size()); };
    json.member("nodes", count(configuration.structure->nodes));
    json.member("shells", count(configuration.structure->shells));
    json.member("members", count(configuration.structure->members));
    json.member("joint_springs", count(configuration.structure->joints));
  }
  json.key("cases");
  json.open_array();
  for (const CaseSolution& load_case : configuration.cases)
  {
    json.open_object();
    json.member("case", load_case.name);
    json.member("class", word_of(load_case.load_class));
    json.key("stages");
    json.open_array();
    for (const StageSolution& stage : load_case.stages)
      write_stage(json, stage);
    json.close_array();
    json.close_object();
  }
  json.close_array();
  json.close_object();
}
} // namespace

std::string run_json(const RunResult& result)
{
  JsonWriter json;
  json.open_object();
  json.member("program", "carlin");
  json.member("version", CARLIN_VERSION);
  json.member("command_line", result.command_line);
  write_model(json, result);
  json.member("craft", result.model.craft.name);
  write_mesh(json, result.quality, result.model.mesh_size);
  write_audit(json, result.audit);
  json.key("configurations");
  json.open_array();
  for (const ConfigurationSolution& configuration : result.configurations)
    write_configuration(json, configuration);
  json.close_array();
  json.key("timings"); // last: all above is the same in every run of the same model
  json.open_array();
  for (const Timing& timing : result.timings)
  {
    json.open_object();
    json.member("what", timing.stage);
    json.member("seconds", timing.seconds);
    json.close_object();
  }
  json.close_array();
  json.close_object();
  return json.text() + "\n";
}
} // namespace carlin
