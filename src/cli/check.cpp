#include "commands.hpp"

#include "carlin/job/job.hpp"

#include <fmt/format.h>
#include <iostream>
#include <map>
#include <memory>

namespace carlin::cli
{
namespace
{
struct CheckOptions
{
  std::string model;
  std::string folder;
  JobOptions job;
  bool refine = false;
  std::string command_line;
};

std::string key(const Check& check)
{
  return fmt::format("{}\n{}\n{}", check.configuration, check.name, check.subject);
}

/// How far each check moved from the first run to the one at half the mesh size.
void print_movement(std::ostream& out, const std::vector<Check>& coarse,
                    const std::vector<Check>& fine)
{
  std::map<std::string, const Check*> found;
  for (const Check& check : fine)
    found.emplace(key(check), &check);
  out << "\nMoved at half the mesh size (utilisation)\n"
      << fmt::format("{:<14.14} {:<26.26} {:<28.28} {:>8} {:>8} {:>9}\n", "configuration", "check",
                     "subject", "asked", "half", "moved");
  for (const Check& check : coarse)
  {
    const auto match = found.find(key(check));
    if (match == found.end() || !check.utilisation || !match->second->utilisation)
      continue;
    const double before = *check.utilisation;
    const double after = *match->second->utilisation;
    const std::string moved =
        before > 0.0 ? fmt::format("{:+.1f} %", 100.0 * (after - before) / before) : "-";
    out << fmt::format("{:<14.14} {:<26.26} {:<28.28} {:>8.3f} {:>8.3f} {:>9}\n",
                       check.configuration, check.name, check.subject, before, after, moved);
  }
}

int run_check(const CheckOptions& options)
{
  const Model model = read_model(options.model);
  for (const std::string& warning : warnings(model))
    std::cerr << options.model << ": warning: " << warning << '\n';
  for (const Tank& tank : model.tanks)
    if (!(tank.torsional_stiffness > 0.0))
      std::cerr << options.model << ": note: " << tank.name
                << ": torsional_stiffness is not given; bending_stiffness / 1.3 is taken\n";

  RunResult result = run_job(model, options.job);
  result.command_line = options.command_line;
  print_quality(std::cout, result.quality);
  print_masses(std::cout, result);
  print_stiffness(std::cout, result);
  print_audit(std::cout, result);
  print_checks(std::cout, result);
  write_results(options.folder, result);

  if (options.refine)
  {
    JobOptions half = options.job;
    half.mesh_scale *= 0.5;
    const RunResult fine = run_job(model, half);
    print_movement(std::cout, result.checks, fine.checks);
  }
  std::cout << "\nThese figures support, and never replace, the judgement of a qualified engineer, "
               "the class or\n"
               "flag rules that apply, and the tank maker's own limits. Values marked 'from "
               "memory' are unverified.\n"
            << "results in " << options.folder << '\n';
  return exit_status(result);
}
} // namespace

void add_check_command(CLI::App& app, int& status)
{
  auto options = std::make_shared<CheckOptions>(); // shared: the callback outlives this scope
  CLI::App* command = app.add_subcommand("check", "Solve a model and judge it: the main job");
  command->add_option("model", options->model, "Model file (.yaml)")->required();
  command->add_option("--into", options->folder, "Folder for the results; replaced whole")
      ->required();
  command->add_option("--configuration", options->job.configurations,
                      "Only this configuration (and the base); may be repeated");
  command->add_option("--case", options->job.cases, "Only this case; may be repeated");
  command->add_flag("--refine", options->refine,
                    "Run again at half the mesh size and say how far each check moved");
  command->footer(
      "Example: carlin check models/starter.yaml --into results/starter\n"
      "Exit status: 0 all checks met, 1 some not met, 2 input wrong, 3 could not finish");
  command->callback(
      [options, &status]
      {
        options->command_line = "carlin check " + options->model + " --into " + options->folder;
        for (const std::string& name : options->job.configurations)
          options->command_line += " --configuration '" + name + "'";
        for (const std::string& name : options->job.cases)
          options->command_line += " --case '" + name + "'";
        if (options->refine)
          options->command_line += " --refine";
        status = run_check(*options);
      });
}
} // namespace carlin::cli
