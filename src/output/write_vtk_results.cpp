#include "csv.hpp"
#include "names.hpp"
#include "staged_folder.hpp"
#include "write_vtk.hpp"

#include <fmt/format.h>

namespace carlin
{
namespace
{
namespace fs = std::filesystem;

/// One configuration's folder while it is written.
struct ConfigurationFolder
{
  const ConfigurationSolution& configuration;
  fs::path folder;
  std::string name; ///< of the folder
  CsvTable& contents;
  bool has_structure() const
  {
    return configuration.structure && !configuration.structure->nodes.empty();
  }
};

std::vector<NamedFile> write_stage(const ConfigurationFolder& at, const StageWriter* structure,
                                   const StageSolution& stage,
                                   const std::vector<RigidMotion>& fitting,
                                   const fs::path& stage_path)
{
  std::vector<NamedFile> files;
  ShownMotion motion{fitting, {}};
  const std::string name = stage_path.filename().string();
  const auto path = [&](const std::string& ending)
  { return stage_path.parent_path() / (name + ending); };
  if (structure != nullptr && stage.displacement.size() > 0)
  {
    motion.taken_off = structure->write(path(".vtu"), stage);
    files.push_back({"structure", name + ".vtu"});
  }
  if (!stage.mounts_high.tanks.empty())
  {
    write_stage_tanks(path("-tanks.vtp"), at.configuration, stage, motion);
    write_stage_collars(path("-collars.vtp"), at.configuration, stage, motion);
    files.push_back({"tanks", name + "-tanks.vtp"});
    files.push_back({"collars", name + "-collars.vtp"});
  }
  write_text(path(".vtm"), vtm_text(files));
  return files;
}

void write_case(const ConfigurationFolder& at, const StageWriter* structure,
                const CaseSolution& load_case, const std::string& case_name)
{
  const fs::path folder = at.folder / case_name;
  make_folder(folder);
  FileNames names({"stages"});
  std::vector<std::vector<NamedFile>> steps;
  const std::vector<RigidMotion> fitting =
      load_case.stages.empty() ? std::vector<RigidMotion>{}
                               : motion_at_fitting(at.configuration, load_case.stages.front());
  for (const StageSolution& stage : load_case.stages)
  {
    const std::string stage_name = names.make(stage.name);
    const std::string folder_name = at.name + "/" + case_name + "/";
    const std::string time = std::to_string(steps.size());
    steps.push_back(write_stage(at, structure, stage, fitting, folder / stage_name));
    for (const NamedFile& file : steps.back())
      at.contents.add({at.configuration.craft.name, word_of(at.configuration.craft.standing),
                       load_case.name, stage.name, time, file.name, folder_name + file.file});
  }
  write_text(folder / "stages.pvd", pvd_text(steps));
}

void write_configuration(const ConfigurationFolder& at)
{
  const ConfigurationSolution& configuration = at.configuration;
  make_folder(at.folder);
  const auto list = [&](const char* what, const char* file)
  {
    at.contents.add({configuration.craft.name, word_of(configuration.craft.standing), std::string(),
                     std::string(), std::string(), std::string(what), at.name + "/" + file});
  };
  std::unique_ptr<StageWriter> structure;
  if (at.has_structure())
  {
    write_structure(at.folder / "structure.vtu", configuration);
    list("structure", "structure.vtu");
    structure = std::make_unique<StageWriter>(configuration);
  }
  if (!configuration.footprints.empty())
  {
    write_footprints(at.folder / "footprints.vtp", configuration);
    list("footprints", "footprints.vtp");
  }
  if (!configuration.craft.tanks.empty())
  {
    write_tanks(at.folder / "tanks.vtp", configuration.craft.tanks);
    write_collars(at.folder / "collars.vtp", configuration.craft.tanks);
    list("tanks", "tanks.vtp");
    list("collars", "collars.vtp");
  }
  FileNames names({"structure.vtu", "footprints.vtp", "tanks.vtp", "collars.vtp"});
  for (const CaseSolution& load_case : configuration.cases)
    write_case(at, structure.get(), load_case, names.make(load_case.name));
}
} // namespace

std::string pvd_text(const std::vector<std::vector<NamedFile>>& steps)
{
  std::string text = "<?xml version=\"1.0\"?>\n<VTKFile type=\"Collection\" version=\"1.0\" "
                     "byte_order=\"LittleEndian\">\n  <Collection>\n";
  for (std::size_t step = 0; step < steps.size(); ++step)
    for (std::size_t part = 0; part < steps[step].size(); ++part)
      text += fmt::format(
          "    <DataSet timestep=\"{}\" group=\"\" part=\"{}\" name=\"{}\" file=\"{}\"/>\n", step,
          part, steps[step][part].name, steps[step][part].file);
  return text + "  </Collection>\n</VTKFile>\n";
}

std::string vtm_text(const std::vector<NamedFile>& blocks)
{
  std::string text = "<?xml version=\"1.0\"?>\n<VTKFile type=\"vtkMultiBlockDataSet\" "
                     "version=\"1.0\" byte_order=\"LittleEndian\">\n  <vtkMultiBlockDataSet>\n";
  for (std::size_t block = 0; block < blocks.size(); ++block)
    text += fmt::format("    <DataSet index=\"{}\" name=\"{}\" file=\"{}\"/>\n", block,
                        blocks[block].name, blocks[block].file);
  return text + "  </vtkMultiBlockDataSet>\n</VTKFile>\n";
}

void write_vtk_results(const fs::path& folder, const RunResult& result)
{
  make_folder(folder);
  CsvTable contents({"configuration", "standing", "case", "stage", "time step", "what", "file"});
  FileNames names({"contents.csv"});
  for (const ConfigurationSolution& configuration : result.configurations)
  {
    const std::string name = names.make(configuration.craft.name);
    write_configuration({configuration, folder / name, name, contents});
  }
  write_text(folder / "contents.csv", contents.text());
}
} // namespace carlin
