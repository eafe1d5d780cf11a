#include "carlin/description/model.hpp"

#include <algorithm>
#include <catch2/catch.hpp>

using Catch::Matchers::Contains;

namespace
{
const carlin::Model& example()
{
  // The examples of the reference make one boat with a chain of three configurations.
  static const carlin::Model model = []
  {
    const std::string reference = carlin::model_reference();
    std::string text = "carlin: 1\n";
    const std::string fence = "```yaml\n";
    for (std::size_t at = reference.find(fence); at != std::string::npos;
         at = reference.find(fence, at))
    {
      at += fence.size();
      const std::string part = reference.substr(at, reference.find("```", at) - at);
      if (!part.starts_with("carlin: 1"))
        text += part;
    }
    return carlin::read_model_text(text, "example.yaml");
  }();
  return model;
}

template <class Things> const auto* find(const Things& things, const std::string& name)
{
  const auto at = std::find_if(things.begin(), things.end(),
                               [&](const auto& thing) { return thing.name == name; });
  return at == things.end() ? nullptr : &*at;
}
} // namespace

TEST_CASE("The base has its own parts, with the openings of its hatches", "[unit][description]")
{
  const carlin::ConfiguredCraft craft = carlin::configured(example(), "as built");
  CHECK(craft.standing == carlin::Standing::base);
  CHECK(craft.tanks.empty());
  REQUIRE(find(craft.plates, "deck"));
  CHECK(find(craft.plates, "deck")->cut_outs.size() == 2); // its own and the hatch's
  REQUIRE(find(craft.plates, "tank-hatch"));
  CHECK(find(craft.plates, "tank-hatch")->kind == carlin::PlateKind::hatch);
  CHECK(find(craft.plates, "tank-hatch")->patch.surface == carlin::Surface::deck);
  REQUIRE(find(craft.joints, "tank-hatch fastening"));
  CHECK(find(craft.joints, "tank-hatch fastening")->part == "tank-hatch");
}

TEST_CASE("Edits of a chain are applied in order", "[unit][description]")
{
  const carlin::ConfiguredCraft cut = carlin::configured(example(), "cut");
  REQUIRE(find(cut.members, "stringer rail"));
  REQUIRE(find(cut.members, "stringer rail")->cut_outs.size() == 1);
  CHECK(find(cut.members, "stringer rail")->cut_outs[0].sides == carlin::Sides::port);
  CHECK(find(cut.members, "stringer girder")->cut_outs.empty());
  CHECK(find(cut.plates, "side")->cut_outs.size() == 1);
  CHECK_FALSE(find(cut.equipment, "ballast"));
  CHECK_FALSE(find(cut.members, "carling"));

  const carlin::ConfiguredCraft converted = carlin::configured(example(), "converted");
  CHECK(converted.name == "converted");
  CHECK(find(converted.members, "stringer rail")->cut_outs.size() == 1); // from the chain
  CHECK(find(converted.members, "frame")->profile == "bar");             // replaced whole
  REQUIRE(find(converted.members, "carling"));
  REQUIRE(find(converted.equipment, "valve-panel"));
  REQUIRE(converted.tanks.size() == 1);

  const auto* piece = find(converted.plates, "deck (converted)");
  REQUIRE(piece);
  CHECK(piece->schedule == "web-5");
  CHECK(piece->family == "deck");
  CHECK(piece->patch.stations.from == "bulkhead-1");
  CHECK(piece->patch.stations.to == "bulkhead-2");
  CHECK(piece->cut_outs.size() == 2); // it keeps the openings of the whole
  CHECK(find(converted.plates, "deck")->cut_outs.size() == 3);
  CHECK(find(converted.plates, "deck")->schedule == "plate-5");
}

TEST_CASE("A part is taken out whole where an edit names no planes", "[unit][description]")
{
  carlin::Model model = example();
  carlin::Edit edit;
  edit.kind = carlin::Edit::Kind::cut;
  edit.part = "stringer"; // the entry: both stringers
  model.configurations[1].edits = {edit};
  const carlin::ConfiguredCraft craft = carlin::configured(model, "cut");
  CHECK_FALSE(find(craft.members, "stringer rail"));
  CHECK_FALSE(find(craft.members, "stringer girder"));
  CHECK(find(craft.members, "frame"));
}

TEST_CASE("A replaced piece is what part and region have in common", "[unit][description]")
{
  carlin::Model model = example();
  carlin::Edit edit;
  edit.kind = carlin::Edit::Kind::replace;
  edit.part = "tank-flat"; // from bulkhead-1 to bulkhead-2
  edit.with = "web-5";
  edit.region.stations = {"transom", "frame-1"};
  edit.region.sides = carlin::Sides::starboard;
  model.configurations[1].edits = {edit};
  const carlin::ConfiguredCraft craft = carlin::configured(model, "cut");
  const auto* piece = find(craft.plates, "tank-flat (cut)");
  REQUIRE(piece);
  CHECK(piece->patch.stations.from == "bulkhead-1");
  CHECK(piece->patch.stations.to == "frame-1");
  CHECK(piece->patch.sides == carlin::Sides::starboard);
  // the seam of the flat goes with its piece
  const auto seams =
      std::count_if(craft.joints.begin(), craft.joints.end(),
                    [](const carlin::Joint& j) { return j.part == "tank-flat (cut)"; });
  CHECK(seams == 1);

  edit.region.stations = {"transom", "bulkhead-1"}; // touches only
  model.configurations[1].edits = {edit};
  CHECK_FALSE(find(carlin::configured(model, "cut").plates, "tank-flat (cut)"));
}

TEST_CASE("Names of entries are written out as names of parts", "[unit][description]")
{
  carlin::Model model = example();
  model.equipment[0].footprints[0].parts = {"bulkhead", "deck"};
  const carlin::ConfiguredCraft craft = carlin::configured(model, "as built");
  CHECK(craft.equipment[0].footprints[0].parts ==
        std::vector<std::string>{"bulkhead transom", "bulkhead bulkhead-1", "bulkhead bulkhead-2",
                                 "bulkhead stem", "deck"});
}

TEST_CASE("A configuration that does not exist is refused with those that do",
          "[unit][description]")
{
  CHECK_THROWS_WITH(carlin::configured(example(), "convrted"),
                    Contains("configuration 'convrted' does not exist; there are as built, cut, "
                             "converted"));
}
