#include "output_sample.hpp"
#include "staged_folder.hpp"

#include "carlin/core/error.hpp"

#include <catch2/catch.hpp>
#include <fstream>
#include <map>
#include <unistd.h>
#include <vtkObject.h>

using namespace carlin;
using Catch::Matchers::Contains;
namespace fs = std::filesystem;

namespace
{
std::map<std::string, std::string> all_files(const fs::path& folder)
{
  std::map<std::string, std::string> files;
  for (const fs::directory_entry& entry : fs::recursive_directory_iterator(folder))
    if (entry.is_regular_file())
      files[fs::relative(entry.path(), folder).string()] = content(entry.path());
  return files;
}

std::size_t entries_in(const fs::path& folder)
{
  return static_cast<std::size_t>(
      std::distance(fs::directory_iterator(folder), fs::directory_iterator()));
}
} // namespace

TEST_CASE("Two runs of the same model give the same bytes", "[unit][output]")
{
  const TestFolder folder("same-bytes");
  write_results(folder.path() / "one", sample_result());
  write_results(folder.path() / "two", sample_result());
  const auto one = all_files(folder.path() / "one");
  const auto two = all_files(folder.path() / "two");
  for (const char* name :
       {"checks.csv", "stiffness.csv", "collars.csv", "masses.csv", "joints.csv", "run.json",
        "vtk/contents.csv", "vtk/converted/structure.vtu", "vtk/converted/footprints.vtp",
        "vtk/converted/landing--midships/landing---hard.vtu",
        "vtk/converted/landing--midships/landing---hard-tanks.vtp",
        "vtk/converted/landing--midships/landing---hard.vtm",
        "vtk/converted/landing--midships/stages.pvd"})
  {
    INFO(name);
    CHECK(one.contains(name));
  }
  CHECK(one == two);
}

TEST_CASE("Results replace earlier results whole and leave nothing else", "[unit][output]")
{
  const TestFolder folder("replace");
  const fs::path results = folder.path() / "deep" / "results";
  write_results(results, sample_result());
  write_text(results / "stale.txt", "of an earlier run");
  write_results(results / "", sample_result());
  CHECK_FALSE(fs::exists(results / "stale.txt"));
  CHECK(fs::exists(results / "run.json"));
  CHECK(entries_in(results.parent_path()) == 1);
}

TEST_CASE("A run that cannot be written leaves the earlier results as they were", "[unit][output]")
{
  vtkObject::GlobalWarningDisplayOff();
  const TestFolder folder("keep");
  const fs::path results = folder.path() / "results";
  write_results(results, sample_result());
  const auto before = all_files(results);
  RunResult wrong = sample_result();
  wrong.configurations[1].cases[0].stages[1].applied.resize(0);
  wrong.configurations[1].cases[0].stages[1].displacement.resize(0);
  write_results(folder.path() / "history-ended", wrong); // a tank not held: no hull to show
  CHECK_FALSE(fs::exists(folder.path() / "history-ended/vtk/converted/landing--midships/"
                                         "landing---hard.vtu"));
  CHECK(fs::exists(folder.path() / "history-ended/vtk/converted/landing--midships/"
                                   "landing---hard-tanks.vtp"));
  {
    StagedFolder abandoned(results);
    write_text(abandoned.path() / "checks.csv", "half");
    CHECK_THROWS_WITH(write_text(abandoned.path() / "no-folder" / "x.csv", "text"),
                      Contains("no-folder/x.csv: cannot be written"));
  }
  CHECK(all_files(results) == before);
  CHECK(entries_in(folder.path()) == 2);
}

TEST_CASE("What is in the way of the results is refused by name", "[unit][output]")
{
  const TestFolder folder("in-the-way");
  write_text(folder.path() / "taken", "a file");
  CHECK_THROWS_AS(write_results(folder.path() / "taken", sample_result()), IoError);
  CHECK_THROWS_WITH(write_results(folder.path() / "taken", sample_result()),
                    Contains("taken: a file is in the way"));
  CHECK(content(folder.path() / "taken") == "a file");
  CHECK_THROWS_WITH(write_results(folder.path() / "taken" / "below", sample_result()),
                    Contains("below"));
  fs::create_directories(folder.path() / "own");
  write_text(folder.path() / "own" / "thesis.txt", "precious");
  CHECK_THROWS_WITH(write_results(folder.path() / "own", sample_result()),
                    Contains("holds other files and no earlier results"));
  CHECK(content(folder.path() / "own" / "thesis.txt") == "precious");
  CHECK(entries_in(folder.path()) == 2);
}

TEST_CASE("A folder that may not be written in is said so", "[unit][output]")
{
  const TestFolder folder("read-only");
  // The kernel lets nobody, root included, make folders in /proc.
  CHECK_THROWS_AS(write_results("/proc/carlin-results", sample_result()), IoError);
  CHECK_THROWS_WITH(write_results("/proc/carlin-results", sample_result()),
                    Contains("/proc/carlin-results: no folder can be made there"));
}

TEST_CASE("run.json names what was run", "[unit][output]")
{
  const TestFolder folder("run-json");
  RunResult result = sample_result();
  write_text(folder.path() / "launch.yaml", "a");
  result.model.file = folder.path() / "launch.yaml";
  write_results(folder.path() / "results", result);
  const std::string json = content(folder.path() / "results" / "run.json");
  CHECK_THAT(json, Contains("\"model_digest_fnv1a_64\": \"af63dc4c8601ec8c\""));
  CHECK_THAT(json, Contains("\"command_line\": \"carlin check launch.yaml\""));
  CHECK_THAT(json, Contains("\"largest_pin_reaction_over_load [-]\": 2.5e-12"));
  CHECK_THAT(json, Contains("\"stage\": \"landing / hard\""));
  CHECK_THAT(json, Contains("\"version\": \"0."));
}
