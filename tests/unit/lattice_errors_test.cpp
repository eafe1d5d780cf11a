#include "lattice_models.hpp"

#include "carlin/core/error.hpp"

#include <catch2/catch.hpp>

using namespace lattice_models;
using Catch::Matchers::Contains;

namespace
{
void make(const carlin::Model& model) { const carlin::Lattice lattice(model, model.mesh_size); }
} // namespace

TEST_CASE("Stations nearer than a quarter of the mesh size are refused, both named",
          "[unit][lattice]")
{
  carlin::Model model = prism();
  model.hull->stations.insert(model.hull->stations.begin() + 2, station("hatch-end", 2.02));
  model.hull->stations[2].where = {"boat.yaml", 31, 5};
  CHECK_THROWS_WITH(make(model), Contains("boat.yaml:31:5: error: stations 'middle' and "
                                          "'hatch-end' are 20.0 mm apart") &&
                                     Contains("a quarter of the mesh size (25.0 mm)"));
  model.mesh_size = 0.08; // a quarter is 20 mm: allowed
  model.hull->stations[2].position = 2.0201;
  CHECK_NOTHROW(make(model));
}

TEST_CASE("Buttocks and heights too near are refused, both named", "[unit][lattice]")
{
  carlin::Model model = prism();
  model.hull->buttocks = {buttock("girder", 0.5), buttock("hatch-side", 0.51)};
  CHECK_THROWS_WITH(make(model), Contains("buttocks 'girder' and 'hatch-side' are 10.0 mm apart"));
  model.hull->buttocks = {buttock("outer", 0.99)};
  CHECK_THROWS_WITH(make(model), Contains("buttocks 'outer' and 'chine' are 10.0 mm apart"));
  model.hull->buttocks.clear();
  model.hull->heights = {height("flat", 0.4), height("sole", 0.42)};
  CHECK_THROWS_WITH(make(model), Contains("heights 'flat' and 'sole' are 20.0 mm apart"));
  model.hull->heights = {height("flat", 0.01)};
  CHECK_THROWS_WITH(make(model), Contains("heights 'bottom' and 'flat' are 10.0 mm apart"));
}

TEST_CASE("Planes out of order or outside the hull are refused with a way out", "[unit][lattice]")
{
  carlin::Model model = prism(0.35, 1.2);
  model.hull->stations[2].position = 4.5;
  CHECK_THROWS_WITH(make(model),
                    Contains("station 'bow': the plane misses the hull line 'keel', which runs "
                             "from x 0.000 m to x 4.000 m; the plane is at x 4.500 m there"));
  model = prism(0.35, 1.2);
  std::swap(model.hull->stations[0], model.hull->stations[1]);
  CHECK_THROWS_WITH(make(model), Contains("station 'transom' is not forward of station 'middle'"));
  model = prism(0.35, 1.2);
  model.hull->buttocks = {buttock("outside", 1.1)};
  CHECK_THROWS_WITH(make(model), Contains("buttock 'outside' (y 1.100 m) leaves the hull at "
                                          "station 'transom', bottom (half breadth 1.000 m)"));
  model.hull->buttocks = {buttock("outer", 0.6), buttock("inner", 0.3)};
  CHECK_THROWS_WITH(make(model),
                    Contains("buttock 'inner' (y 0.300 m) is not outboard of 'outer'"));
  model.hull->buttocks = {buttock("girder", 0.6)};
  model.hull->heights = {height("low", 0.2)};
  CHECK_THROWS_WITH(make(model), Contains("height 'low' (z 0.200 m) is not above 'bottom'") &&
                                     Contains("buttock 'girder'") && Contains("'out_to'"));
  model.hull->heights[0].out_to = "centreline";
  CHECK_NOTHROW(make(model));
  model.hull->heights = {height("high", 1.1)};
  CHECK_THROWS_WITH(make(model), Contains("height 'deck' (z 1.000 m) is not above 'high'"));
}

TEST_CASE("A folded cell is refused by station and buttock", "[unit][lattice]")
{
  // The bottom rises steeply in its outer half, where no column is named: a flat straight from the
  // inner buttock (above the bottom there) to its kept fraction at the chine cuts through it.
  carlin::Model model = prism();
  model.hull->offsets->stations.clear();
  for (const double x : {0.0, 4.0})
    model.hull->offsets->stations.push_back(
        offset_station({"keel", "bilge", "chine", "deck-edge"},
                       {{x, 0.0, 0.0}, {x, 0.5, 0.6}, {x, 1.0, 0.65}, {x, 1.0, 1.0}}));
  model.hull->heights = {height("flat", 0.2)};
  model.hull->heights[0].out_to = "centreline";
  model.hull->stations[0].where = {"boat.yaml", 9, 5};
  CHECK_THROWS_WITH(make(model), Contains("boat.yaml:9:5: error: the lattice folds near x 0.000") &&
                                     Contains("stations 'transom' to 'middle'") &&
                                     Contains("buttocks 'centreline' to 'chine'") &&
                                     Contains("heights 'bottom' to 'flat'"));
}

TEST_CASE("Names that planes refer to must exist", "[unit][lattice]")
{
  carlin::Model model = prism();
  model.hull->buttocks = {buttock("girder", 0.5)};
  model.hull->buttocks[0].to = "frame-9";
  CHECK_THROWS_WITH(make(model), Contains("'girder': there is no station 'frame-9'"));
  model.hull->buttocks[0].to.clear();
  model.hull->buttocks[0].follows = "spray-rail";
  CHECK_THROWS_WITH(make(model), Contains("buttock 'girder' follows 'spray-rail', which is not a "
                                          "point of the offsets between 'keel' and 'chine'"));
  model.hull->buttocks.clear();
  model.hull->heights = {height("sole", 0.5)};
  model.hull->heights[0].out_to = "girder";
  CHECK_THROWS_WITH(make(model), Contains("height 'sole': there is no buttock 'girder'"));
}

TEST_CASE("Offsets that cannot be lofted are refused", "[unit][lattice]")
{
  carlin::Model model = prism();
  model.hull->offsets->chine = "bilge";
  CHECK_THROWS_WITH(make(model), Contains("offsets.chine: 'bilge' is not a point between"));
  model = prism();
  model.hull->offsets->stations[1].points[1].name = "knuckle";
  CHECK_THROWS_WITH(make(model), Contains("does not have the points of station"));
  model = prism();
  std::swap(model.hull->offsets->stations[0], model.hull->offsets->stations[1]);
  CHECK_THROWS_WITH(make(model), Contains("not forward of the station before it"));
  model = prism();
  model.hull->offsets->stations[0].points[0].position.y() = 0.1;
  CHECK_THROWS_WITH(make(model), Contains("the first point of a section lies on the centreline"));
  model = prism();
  for (carlin::OffsetStation& section : model.hull->offsets->stations)
    section.points[2].position.z() = -0.5;
  CHECK_THROWS_WITH(make(model), Contains("the side does not go upward from 'chine'"));
}

TEST_CASE("Dimensions of a hull out of range are refused by name", "[unit][lattice]")
{
  carlin::Model model = launch();
  model.hull->dimensions->beam = -3.0;
  model.hull->dimensions->stem_face = 0.0;
  model.hull->dimensions->where = {"boat.yaml", 4, 3};
  CHECK_THROWS_WITH(make(model), Contains("boat.yaml:4:3: error: hull.dimensions: beam is -3 m") &&
                                     Contains("stem_face is 0"));
}
