#include "output_sample.hpp"

#include <catch2/catch.hpp>
#include <cstdlib>
#include <set>
#include <sys/wait.h>
#include <vtkImageData.h>
#include <vtkNew.h>
#include <vtkPNGReader.h>

using namespace carlin;

namespace
{
/// Exit status of a shell command; its messages go to a file.
int status_of(const std::string& command, const std::filesystem::path& messages)
{
  const int raw = std::system((command + " >'" + messages.string() + "' 2>&1").c_str());
  return WIFEXITED(raw) ? WEXITSTATUS(raw) : -1;
}

const std::string names = " --case 'landing, midships' --stage 'landing / hard'";
} // namespace

TEST_CASE("A picture is made off screen, of the asked size and not of one colour", "[viewer]")
{
  const TestFolder folder("picture");
  write_results(folder.path() / "r", sample_result());
  const std::filesystem::path file = folder.path() / "hull.png";
  const std::string command = "CARLIN_PICTURE='" CARLIN_PICTURE "' sh '" CARLIN_SOURCE_DIR
                              "/viz/make-picture.sh' '" +
                              (folder.path() / "r").string() + "'" + names +
                              " --width 640 --height 480 --into '" + file.string() + "'";
  const int status = status_of(command, folder.path() / "messages");
  INFO(content(folder.path() / "messages"));
  REQUIRE(status == 0);
  vtkNew<vtkPNGReader> reader;
  reader->SetFileName(file.c_str());
  reader->Update();
  vtkImageData& image = *reader->GetOutput();
  REQUIRE(image.GetDimensions()[0] == 640);
  REQUIRE(image.GetDimensions()[1] == 480);
  std::set<std::array<int, 3>> upper, lower; // colours of both hulls
  for (int y = 80; y < 480; ++y)
    for (int x = 0; x < 640; ++x)
      (y < 280 ? lower : upper)
          .insert({static_cast<int>(image.GetScalarComponentAsDouble(x, y, 0, 0)),
                   static_cast<int>(image.GetScalarComponentAsDouble(x, y, 0, 1)),
                   static_cast<int>(image.GetScalarComponentAsDouble(x, y, 0, 2))});
  CHECK(upper.size() > 3);
  CHECK(lower.size() > 3);
}

TEST_CASE("Without a display the program says so and ends in order", "[viewer]")
{
  const TestFolder folder("no-display");
  write_results(folder.path() / "r", sample_result());
  for (const char* display : {"env -u DISPLAY ", "env DISPLAY=:4711 "})
  {
    const int status =
        status_of(std::string(display) + "'" CARLIN_PICTURE "' '" + (folder.path() / "r").string() +
                      "'" + names + " --into '" + (folder.path() / "x.png").string() + "'",
                  folder.path() / "messages");
    CHECK(status == 3);
    CHECK_THAT(content(folder.path() / "messages"),
               Catch::Matchers::Contains("no display can be opened"));
  }
}
