#include "commands.hpp"

#include "carlin/output/output.hpp"

#include <iostream>
#include <memory>

namespace carlin::cli
{
namespace
{
struct DrawOptions
{
  std::string model;
  std::string folder;
};

int run_draw(const DrawOptions& options)
{
  const Model model = read_model(options.model);
  const Lattice lattice(model, model.mesh_size);
  std::vector<std::pair<ConfiguredCraft, Mesh>> meshes;
  for (const Configuration& configuration : model.configurations)
  {
    ConfiguredCraft craft = configured(model, configuration.name);
    Mesh mesh = lattice.mesh(craft);
    meshes.emplace_back(std::move(craft), std::move(mesh));
  }
  print_quality(std::cout, mesh_quality(meshes.front().second));
  write_drawing(options.folder, model, lattice, meshes);
  std::cout << "drawing in " << options.folder << '\n';
  return 0;
}
} // namespace

void add_draw_command(CLI::App& app, int& status)
{
  auto options = std::make_shared<DrawOptions>();
  CLI::App* command = app.add_subcommand(
      "draw", "Write lattice, named planes, parts and feet (VTK) before anything is solved");
  command->add_option("model", options->model, "Model file (.yaml)")->required();
  command->add_option("--into", options->folder, "Folder for the drawing; replaced whole")
      ->required();
  command->footer("Example: carlin draw models/starter.yaml --into results/starter-drawing");
  command->callback([options, &status] { status = run_draw(*options); });
}
} // namespace carlin::cli
