#include "output_sample.hpp"
#include "scene.hpp"

#include <catch2/catch.hpp>
#include <vtkCellData.h>
#include <vtkDataArray.h>
#include <vtkPointData.h>

using namespace carlin;
using namespace carlin::viz;
using Catch::Matchers::Contains;

namespace
{
const SceneOptions hard_landing{"", "", "landing, midships", "landing / hard", 10.0};
}

TEST_CASE("A scene shows the base and the last configuration warped alike", "[unit][viz]")
{
  const TestFolder folder("scene");
  write_results(folder.path() / "r", sample_result());
  const Scene scene = make_scene(folder.path() / "r", hard_landing);
  REQUIRE(scene.hulls.size() == 2);
  CHECK(scene.hulls[0].title == "as built");
  CHECK(scene.hulls[1].title == "converted");
  CHECK(scene.hulls[0].tanks == nullptr);
  REQUIRE(scene.hulls[1].tanks != nullptr);
  CHECK_THAT(scene.caption, Contains("landing, midships") && Contains("drawn 10 times"));
  // Point 3 lies at z = 0.1 m; it is drawn at ten times its displacement.
  vtkUnstructuredGrid& grid = *scene.hulls[0].grid;
  const double moved = grid.GetPointData()->GetArray("displacement [m]")->GetComponent(3, 2);
  CHECK(moved != 0.0);
  CHECK(grid.GetPoint(3)[2] == Approx(0.1 + 10.0 * moved).epsilon(1e-6)); // P: float in the file
}

TEST_CASE("Colours are the largest stress of each cell in MPa, one range for both hulls",
          "[unit][viz]")
{
  const TestFolder folder("colours");
  write_results(folder.path() / "r", sample_result());
  const Scene scene = make_scene(folder.path() / "r", hard_landing);
  double largest = 0.0;
  for (const viz::Hull& hull : scene.hulls)
  {
    vtkDataArray* colours = hull.grid->GetCellData()->GetArray(scene.coloured_by.c_str());
    REQUIRE(colours != nullptr);
    largest = std::max(largest, colours->GetRange()[1]);
    vtkDataArray* outer = hull.grid->GetCellData()->GetArray("von Mises stress, outer face [Pa]");
    for (vtkIdType cell = 0; cell < 3; ++cell)
      CHECK(colours->GetComponent(cell, 0) >= 1e-6 * outer->GetComponent(cell, 0));
  }
  CHECK(scene.colour_range[0] == 0.0);
  CHECK(scene.largest_stress == largest);
  CHECK(scene.colour_range[1] == largest); // of eight cells none is left out
  CHECK(largest > 0.0);
}

TEST_CASE("Colours end where 98 of 100 cells do", "[unit][viz]")
{
  std::vector<double> values(100, 0.0);
  for (std::size_t i = 0; i < values.size(); ++i)
    values[values.size() - 1 - i] = static_cast<double>(i + 1);
  CHECK(colour_top(values) == 98.0);
  CHECK(colour_top({5.0}) == 5.0);
  CHECK(colour_top({}) == 0.0);
}

TEST_CASE("Lightness of the colours rises throughout", "[unit][viz]")
{
  double before = -1.0;
  for (int i = 0; i <= 100; ++i)
  {
    const auto [red, green, blue] = colour_at(0.01 * i);
    const double lightness = 0.2126 * red + 0.7152 * green + 0.0722 * blue; // ITU-R BT.709
    CHECK(lightness > before);
    before = lightness;
  }
  CHECK(colour_at(-1.0) == colour_at(0.0));
  CHECK(colour_at(2.0) == colour_at(1.0));
}

TEST_CASE("A warp scale is a round number", "[unit][viz]")
{
  CHECK(round_scale(1.0) == 1.0);
  CHECK(round_scale(19.9) == 10.0);
  CHECK(round_scale(20.1) == 20.0);
  CHECK(round_scale(777.0) == 500.0);
  CHECK(round_scale(0.03) == Approx(0.02).epsilon(1e-12));
}

TEST_CASE("Names that are not in the results are answered with those that are", "[unit][viz]")
{
  const TestFolder folder("names");
  write_results(folder.path() / "r", sample_result());
  SceneOptions options = hard_landing;
  options.load_case = "lifting";
  CHECK_THROWS_WITH(make_scene(folder.path() / "r", options),
                    Contains("case 'lifting' is not in") && Contains("landing, midships"));
  options = hard_landing;
  options.stage = "roll";
  CHECK_THROWS_WITH(make_scene(folder.path() / "r", options),
                    Contains("stage 'roll'") && Contains("fitting, landing / hard"));
  options = hard_landing;
  options.after = "cut";
  CHECK_THROWS_WITH(make_scene(folder.path() / "r", options),
                    Contains("configuration 'cut'") && Contains("as built, converted"));
  CHECK_THROWS_WITH(make_scene(folder.path(), hard_landing), Contains("is no results folder"));
}

TEST_CASE("CSV fields are read back as they were quoted", "[unit][viz]")
{
  const auto rows = csv_rows("a,\"b,\"\"c\"\"\nd\",\r\ne,f,g\r\n");
  REQUIRE(rows.size() == 2);
  CHECK(rows[0] == std::vector<std::string>{"a", "b,\"c\"\nd", ""});
  CHECK(rows[1] == std::vector<std::string>{"e", "f", "g"});
}
