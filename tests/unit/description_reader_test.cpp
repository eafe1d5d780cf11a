#include "carlin/description/model.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <filesystem>
#include <fstream>
#include <limits>
#include <sstream>

using Catch::Matchers::Contains;
using Catch::Matchers::WithinRel;

namespace
{
const std::filesystem::path root = CARLIN_SOURCE_DIR;

std::string content(const std::filesystem::path& file)
{
  std::ifstream input(file);
  REQUIRE(input);
  std::ostringstream text;
  text << input.rdbuf();
  return text.str();
}

/// Text of the error that a model makes; empty if it is read.
std::string complaint(const std::string& text, const std::filesystem::path& file)
{
  try
  {
    carlin::read_model_text(text, file);
    return "";
  }
  catch (const carlin::ModelError& error)
  {
    return error.what();
  }
}

std::string replaced(std::string text, const std::string& what, const std::string& with)
{
  const std::size_t at = text.find(what);
  REQUIRE(at != std::string::npos);
  return text.replace(at, what.size(), with);
}

std::string without_end(std::string text)
{
  while (!text.empty() && text.back() == '\n')
    text.pop_back();
  return text;
}

template <class Things> auto named(const Things& things, const std::string& name)
{
  const auto at = std::find_if(things.begin(), things.end(),
                               [&](const auto& thing) { return thing.name == name; });
  REQUIRE(at != things.end());
  return *at;
}
} // namespace

TEST_CASE("The starter model is read as it is written", "[unit][description]")
{
  const carlin::Model model = carlin::read_model(root / "models/starter.yaml");
  CHECK(model.craft.name == "box barge");
  CHECK_THAT(model.craft.displacement.value(), WithinRel(3000.0, 1e-12));
  CHECK_THAT(model.craft.speed, WithinRel(12.0 * 1852.0 / 3600.0, 1e-12));
  CHECK_THAT(model.craft.reference_temperature, WithinRel(288.15, 1e-12));
  CHECK_THAT(model.mesh_size, WithinRel(0.15, 1e-12));
  CHECK(named(model.schedules, "web-5").line == carlin::MouldedLine::centred);
  CHECK(model.hull->dimensions->parallel_body == 1.0);
  CHECK(model.hull->stations.size() == 9);
  CHECK(model.plates.size() == 8); // bottom, side, deck, four bulkheads, girder web
  CHECK(named(model.plates, "bulkhead stem").family == "bulkhead");
  CHECK(named(model.plates, "bulkhead stem").kind == carlin::PlateKind::bulkhead);
  CHECK(named(model.plates, "girder-web").patch.heights.to == "girder-top");

  const carlin::MemberPart bar = named(model.members, "bulkhead-bar stem girder");
  CHECK(bar.surface == carlin::Surface::station);
  CHECK(bar.surface_plane == "stem");
  CHECK(bar.plane == "girder");
  CHECK(bar.plane_kind == carlin::Surface::buttock);
  CHECK(bar.stands == carlin::Stands::forward);
  CHECK(named(model.members, "deck-beam frame-1").plane_kind == carlin::Surface::station);
  CHECK(named(model.members, "deck-beam frame-1").is_primary);

  const carlin::Tank tank = named(model.tanks, "cylinder");
  CHECK(tank.collars.size() == 2);
  CHECK(tank.collars[0].kind == carlin::CollarKind::fixed);
  CHECK_FALSE(tank.collars[0].grip_force);
  CHECK(tank.collars[0].pivot_stiffness[2] == 0.0);
  CHECK(tank.collars[1].friction.low == 0.08);
  CHECK(tank.collars[1].friction.high == 0.25);
  CHECK_THAT(tank.collars[1].ring->radius, WithinRel(0.25, 1e-12)); // half the diameter
  CHECK_THAT(tank.collars[1].feet[1].stiffness[0], WithinRel(5e6, 1e-12));
  CHECK_THAT(tank.growth->pressure, WithinRel(35e6, 1e-12));
  CHECK_THAT(tank.limits.bending_moment.value(), WithinRel(5e3, 1e-12));
  CHECK_FALSE(tank.limits.torsion);

  CHECK(model.configurations.size() == 2);
  CHECK(model.configurations[0].standing == carlin::Standing::base);
  CHECK(model.cases.size() == 3);
  const auto& [event, factor] = model.cases[1].stages[2].events[0];
  CHECK(factor == 1.0);
  CHECK_THAT(std::get<carlin::Landing>(event).acceleration.value(),
             WithinRel(1.5 * 9.80665, 1e-12));
  CHECK(model.girder_bulkheads == std::vector<std::string>{"bulkhead-1", "bulkhead-2"});
  CHECK(carlin::warnings(model).empty());
}

TEST_CASE("Words stand for rigid feet, free and locked pivots", "[unit][description]")
{
  std::string text = content(root / "models/starter.yaml");
  text = replaced(text, "{along: 20 kN/mm, across: 10 kN/mm, upright: 20 kN/mm}",
                  "{along: rigid, across: 0 N/m, upright: 20 kN/mm, about_across: 3 kN m/rad}");
  text = replaced(text, "kind: fixed\n",
                  "kind: fixed\n        grip_force: [15 kN, 25 kN]\n        pivot: {about_along: "
                  "locked, about_upright: 2 kN m/rad}\n");
  const carlin::Model model = carlin::read_model_text(text, "x.yaml");
  const carlin::Collar& collar = model.tanks[0].collars[0];
  CHECK(std::isinf(collar.feet[0].stiffness[0]));
  CHECK(collar.feet[0].stiffness[1] == 0.0);
  CHECK_THAT(collar.feet[0].stiffness[4], WithinRel(3e3, 1e-12));
  CHECK_FALSE(collar.pivot_stiffness[0]);
  CHECK(collar.pivot_stiffness[1] == 0.0);
  CHECK_THAT(collar.pivot_stiffness[2].value(), WithinRel(2e3, 1e-12));
  CHECK_THAT(collar.grip_force->high, WithinRel(25e3, 1e-12));
}

TEST_CASE("Each broken model is refused with its golden messages", "[unit][description]")
{
  const std::filesystem::path folder = root / "tests/system/broken";
  int models = 0;
  for (const auto& entry : std::filesystem::directory_iterator(folder))
  {
    if (entry.path().extension() != ".yaml")
      continue;
    ++models;
    CAPTURE(entry.path().filename().string());
    std::filesystem::path golden = entry.path();
    golden.replace_extension(".txt");
    // Paths in messages are as given: read from the folder itself, as the command is run there.
    const std::filesystem::path before = std::filesystem::current_path();
    std::filesystem::current_path(folder);
    std::string found;
    try
    {
      carlin::read_model(entry.path().filename());
    }
    catch (const carlin::ModelError& error)
    {
      found = error.what();
    }
    std::filesystem::current_path(before);
    CHECK(found == without_end(content(golden)));
  }
  CHECK(models >= 30);
}

TEST_CASE("A file that cannot be read is a problem of the model", "[unit][description]")
{
  CHECK_THROWS_AS(carlin::read_model("nowhere.yaml"), carlin::ModelError);
  CHECK_THROWS_WITH(carlin::read_model("nowhere.yaml"),
                    Contains("nowhere.yaml: error: ") && Contains("cannot be opened"));
  CHECK_THROWS_WITH(carlin::read_model(root), Contains("cannot be opened"));
  CHECK_THAT(complaint("", "x.yaml"), Contains("x.yaml:1:1: error: the file holds no map"));
  CHECK_THAT(complaint("- a\n", "x.yaml"), Contains("no map of keys"));
}

TEST_CASE("A table of offsets is read from CSV, in its own units", "[unit][description]")
{
  const std::filesystem::path folder =
      std::filesystem::temp_directory_path() / "carlin-description-test";
  std::filesystem::create_directories(folder);
  std::string text = content(root / "models/starter.yaml");
  const std::size_t start = text.find("  from_dimensions:");
  const std::size_t end = text.find("  # Planes on which");
  text.replace(start, end - start, "  offsets: {file: hull.csv}\n");
  const auto with_table = [&](const std::string& table)
  {
    std::ofstream(folder / "hull.csv") << table;
    return complaint(text, folder / "x.yaml");
  };
  const std::string good = "station,point,x [mm],y [cm],z [m]\r\n"
                           "# from the drawing\n\n"
                           "aft,keel,0,0,0\naft,chine,0,130,0.1\naft,edge,0,130,1.2\n"
                           "fore,keel,9000,0,0\nfore,chine,9000,130,0.1\nfore,edge,9000,130,1.2\n";
  REQUIRE(with_table(good).empty());
  const carlin::Model model = carlin::read_model_text(text, folder / "x.yaml");
  const auto& stations = model.hull->offsets->stations;
  CHECK(stations.size() == 2);
  CHECK(stations[1].points[1].position.isApprox(carlin::Vector3(9.0, 1.3, 0.1), 1e-14));

  CHECK_THAT(with_table(replaced(good, "aft,chine,0,130", "aft,chine,0,abc")),
             Contains("hull.csv:5:13: error: 'abc' is not a number; the table's unit is cm"));
  CHECK_THAT(with_table(replaced(good, "y [cm]", "y [bar]")),
             Contains("hull.csv:1:22: error: 'bar' is not a unit of length"));
  CHECK_THAT(with_table(replaced(good, "station,point", "point,station")),
             Contains("hull.csv:1:1: error: the header is not"));
  CHECK_THAT(with_table(replaced(good, "aft,edge,0,130,1.2\n", "")),
             Contains("the same names in the same order are due"));
  CHECK_THAT(with_table(replaced(good, "aft,edge,0,130,1.2\n", "aft,edge,0,130\n")),
             Contains("hull.csv:6:1: error: 4 cells stand here; 5 are due"));
  CHECK_THAT(with_table(replaced(good, "fore,keel,9000", "fore,keel,-9000")),
             Contains("does not lie forward"));
  CHECK_THAT(with_table(replaced(good, "aft,keel,0,0,0", "aft,keel,0,5,0")),
             Contains("lies off the centreline"));
  CHECK_THAT(with_table(""), Contains("the table is empty"));
  std::filesystem::remove_all(folder);
}

TEST_CASE("Growth beyond what the fibre can bear is warned of", "[unit][description]")
{
  std::string text = content(root / "models/starter.yaml");
  text = replaced(text, "length_change: 3.2 mm", "length_change: 37.5 mm");
  const auto lines = carlin::warnings(carlin::read_model_text(text, "x.yaml"));
  REQUIRE(lines.size() == 1);
  // 37.5 / 1500 = 2.5 %; 2.1 % / 2.25 = 0.933 %
  CHECK(lines[0] == "cylinder: stated growth of length is a strain of 2.5 %, more than fibre "
                    "ultimate over burst ratio 0.93 %: an installation allowance, not a growth");
}

TEST_CASE("The reference is what its page says and its examples are read", "[unit][description]")
{
  const std::string reference = carlin::model_reference();
  CHECK(reference == content(root / "models/REFERENCE.md"));

  std::string together = "carlin: 1\n";
  int alone = 0;
  const std::string fence = "```yaml\n";
  for (std::size_t at = reference.find(fence); at != std::string::npos;
       at = reference.find(fence, at))
  {
    at += fence.size();
    const std::string example = reference.substr(at, reference.find("```", at) - at);
    if (!example.starts_with("carlin: 1"))
      together += example;
    else if (example != "carlin: 1\n")
    {
      ++alone;
      CAPTURE(example);
      CHECK(complaint(example, "example.yaml").empty());
    }
  }
  CHECK(alone == 2); // a structure of points, a rigid bed
  CAPTURE(together);
  CHECK(complaint(together, "example.yaml") == "");
  const carlin::Model model = carlin::read_model_text(together, "example.yaml");
  CHECK(model.configurations.size() == 3);
  CHECK(model.cases.size() == 3);
  CHECK(model.criteria.written.at("bending stiffness ratio") == "90 %");
}
