#include "staged_folder.hpp"
#include "write_tables.hpp"
#include "write_vtk.hpp"

namespace carlin
{
void write_results(const std::filesystem::path& folder, const RunResult& result)
{
  StagedFolder staged(folder);
  const auto write = [&](const char* name, const std::string& text)
  { write_text(staged.path() / name, text); };
  write("checks.csv", checks_csv(result));
  write("stiffness.csv", stiffness_csv(result));
  write("collars.csv", collars_csv(result));
  write("feet.csv", feet_csv(result));
  write("tanks.csv", tanks_csv(result));
  write("masses.csv", masses_csv(result));
  write("joints.csv", joints_csv(result));
  write_vtk_results(staged.path() / "vtk", result);
  write("run.json", run_json(result)); // last: it marks a folder that is complete
  staged.move_in();
}
} // namespace carlin
