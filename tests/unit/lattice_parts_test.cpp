#include "lattice_models.hpp"

#include "carlin/core/error.hpp"

#include <catch2/catch.hpp>
#include <set>

using namespace lattice_models;
using carlin::Mesh;
using carlin::Run;
using carlin::Sides;
using carlin::Stands;
using carlin::Surface;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
constexpr double round_off = 1e-12; // of unit vectors and of areas of a few m^2

/// Box with a buttock at 0.5 m, a height at 0.4 m and no plating but what a test adds.
carlin::Model bare_box()
{
  carlin::Model model = prism();
  model.plates.clear();
  model.hull->buttocks = {buttock("girder", 0.5)};
  model.hull->heights = {height("flat", 0.4)};
  return model;
}

carlin::CutOut cut_out(carlin::PlaneRange stations, carlin::PlaneRange buttocks,
                       carlin::PlaneRange heights, Sides sides = Sides::both)
{
  carlin::CutOut region;
  region.stations = std::move(stations);
  region.buttocks = std::move(buttocks);
  region.heights = std::move(heights);
  region.sides = sides;
  return region;
}

double largest_difference(const std::vector<Vector3>& vectors, const Vector3& expected)
{
  double largest = 0.0;
  for (const Vector3& vector : vectors)
    largest = std::max(largest, (vector - expected).norm());
  return largest;
}
} // namespace

TEST_CASE("A patch is the rectangle between its planes, on its sides", "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.plates = {plate("flat", Surface::height, "flat"), plate("web", Surface::buttock, "girder"),
                  plate("wall", Surface::buttock, "centreline"),
                  plate("floor", Surface::station, "middle")};
  model.plates[0].patch.stations = {"middle", "bow"};
  model.plates[0].patch.sides = Sides::port;
  model.plates[1].patch.heights = {"bottom", "flat"};
  model.plates[3].patch.heights = {"", "flat"};
  model.plates[3].patch.buttocks = {"girder", ""};
  const Mesh mesh = mesh_of(model);
  CHECK_THAT(area(mesh, "flat"), WithinRel(2.0 * 1.0, round_off));
  CHECK_THAT(area(mesh, "web"), WithinRel(2.0 * 4.0 * 0.4, round_off));
  CHECK_THAT(area(mesh, "wall"), WithinRel(4.0, round_off)); // once, not once a side
  CHECK_THAT(area(mesh, "floor"), WithinRel(2.0 * 0.5 * 0.4, round_off));
  for (const carlin::Cell& cell : mesh.cells)
  {
    const Vector3 normal = area_vector(mesh, cell).normalized(), place = centre(mesh, cell);
    const std::string& name = part_name(mesh, cell);
    if (name == "flat")
      REQUIRE((place.y() > 0.0 && normal.z() == -1.0));
    if (name == "web") // inboard
      REQUIRE(normal.y() * place.y() < 0.0);
    if (name == "wall")
      REQUIRE(normal.y() == -1.0);
    if (name == "floor")
      REQUIRE(normal.x() == 1.0);
  }
  CHECK_FALSE(part(mesh, "floor").is_outer_shell);
  CHECK(part(mesh, "web").surface == Surface::buttock);
  CHECK(part(mesh, "web").material_use == "plate-5");
}

TEST_CASE("Openings are taken out of a plate, on one side or both", "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.plates = {plate("deck", Surface::deck), plate("bulkhead", Surface::station, "middle")};
  model.plates[0].cut_outs = {cut_out({"middle", "bow"}, {"", "girder"}, {}, Sides::port),
                              cut_out({"middle", "bow"}, {"girder", ""}, {}, Sides::starboard)};
  model.plates[1].cut_outs = {cut_out({}, {}, {"flat", "deck"})};
  const Mesh mesh = mesh_of(model);
  CHECK_THAT(area(mesh, "deck"), WithinRel(8.0 - 2.0 * 0.5 - 2.0 * 0.5, round_off));
  CHECK_THAT(area(mesh, "bulkhead"), WithinRel(2.0 * 0.4, round_off));
  for (const carlin::Cell& cell : mesh.cells)
  {
    const Vector3 place = centre(mesh, cell);
    if (part_name(mesh, cell) == "deck" && place.x() > 2.0)
      REQUIRE((place.y() > 0.5 || (place.y() < 0.0 && place.y() > -0.5)));
  }
}

TEST_CASE("A cut-out of a family touches only those of its parts that lie in it", "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.plates = {plate("a", Surface::station, "transom"), plate("b", Surface::station, "middle")};
  carlin::CutOut region = cut_out({"middle", "bow"}, {}, {});
  region.where = {"boat.yaml", 7, 3};
  model.plates[0].cut_outs = model.plates[1].cut_outs = {region};
  const Mesh mesh = mesh_of(model);
  CHECK_THAT(area(mesh, "a"), WithinRel(2.0, round_off));
  CHECK(mesh.part_index("b") == -1); // nothing of it is left
}

TEST_CASE("A stringer runs forward on both sides, toe and upright mirrored", "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.members = {member("stringer", Surface::bottom, Surface::buttock, "girder")};
  model.members[0].family = "stringers";
  model.members[0].is_primary = true;
  const Mesh mesh = mesh_of(model);
  const std::vector<Run> runs = runs_of(mesh, "stringer");
  REQUIRE(runs.size() == 2);
  for (std::size_t side = 0; side < 2; ++side)
  {
    const double sign = side == 0 ? 1.0 : -1.0;
    REQUIRE(runs[side].points.size() == 41);
    REQUIRE(runs[side].upright.size() == 40);
    CHECK(at(mesh, runs[side].points.front()) == Vector3(0.0, sign * 0.5, 0.0));
    CHECK(at(mesh, runs[side].points.back()) == Vector3(4.0, sign * 0.5, 0.0));
    CHECK(largest_difference(runs[side].upright, Vector3::UnitZ()) < round_off);
    CHECK(largest_difference(runs[side].toe, sign * Vector3::UnitY()) < round_off);
    CHECK(runs[side].stands_on_plating);
  }
  CHECK(part(mesh, "stringer").family == "stringers");
  CHECK(part(mesh, "stringer").kind == carlin::MeshPart::Kind::member);
  CHECK(part(mesh, "stringer").is_primary);
}

TEST_CASE("A member on the centreline is one run, not one a side", "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.members = {member("keel", Surface::bottom, Surface::buttock, "centreline"),
                   member("pillar", Surface::station, Surface::buttock, "centreline")};
  model.members[1].surface_plane = "middle";
  model.members[1].stands = Stands::aft;
  const Mesh mesh = mesh_of(model);
  CHECK(runs_of(mesh, "keel").size() == 1);
  REQUIRE(runs_of(mesh, "pillar").size() == 1);
  const Run pillar = runs_of(mesh, "pillar").front();
  CHECK(at(mesh, pillar.points.front()).z() == 0.0);
  CHECK(at(mesh, pillar.points.back()).z() == 1.0);
  CHECK(largest_difference(pillar.upright, -Vector3::UnitX()) < round_off);
}

TEST_CASE("A frame crosses the centreline in one run; a cut takes its middle out",
          "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.members = {member("floor", Surface::bottom, Surface::station, "middle"),
                   member("beam", Surface::deck, Surface::station, "middle"),
                   member("wing", Surface::bottom, Surface::station, "bow")};
  model.members[1].cut_outs = {cut_out({}, {"", "girder"}, {})};
  model.members[2].along = {"girder", "chine"};
  const Mesh mesh = mesh_of(model);
  const std::vector<Run> floor = runs_of(mesh, "floor");
  REQUIRE(floor.size() == 1);
  CHECK(floor[0].points.size() == 21);
  CHECK(at(mesh, floor[0].points.front()) == Vector3(2.0, -1.0, 0.0));
  CHECK(at(mesh, floor[0].points.back()) == Vector3(2.0, 1.0, 0.0));
  CHECK(largest_difference(floor[0].upright, Vector3::UnitZ()) < round_off);
  CHECK(largest_difference(floor[0].toe, -Vector3::UnitX()) < round_off); // aft on both sides
  const std::vector<Run> beam = runs_of(mesh, "beam");
  REQUIRE(beam.size() == 2);
  CHECK(at(mesh, beam[0].points.front()) == Vector3(2.0, -1.0, 1.0));
  CHECK(at(mesh, beam[0].points.back()) == Vector3(2.0, -0.5, 1.0));
  CHECK(at(mesh, beam[1].points.front()) == Vector3(2.0, 0.5, 1.0));
  CHECK(largest_difference(beam[1].upright, -Vector3::UnitZ()) < round_off);
  CHECK(runs_of(mesh, "wing").size() == 2);
}

TEST_CASE("Members stand square to the surface, or as the boat's directions say", "[unit][lattice]")
{
  carlin::Model model = prism(0.5, 1.0); // bottom rises 0.5 over 1.0
  model.plates.clear();
  model.hull->buttocks = {buttock("girder", 0.5)};
  model.members = {member("square", Surface::bottom, Surface::buttock, "girder"),
                   member("upright", Surface::bottom, Surface::buttock, "girder"),
                   member("keel", Surface::bottom, Surface::buttock, "centreline"),
                   member("bilge", Surface::side, Surface::bottom, "")};
  model.members[1].stands = Stands::up;
  const Mesh mesh = mesh_of(model);
  const Vector3 normal = Vector3(0.0, -0.5, 1.0).normalized();
  const std::vector<Run> square = runs_of(mesh, "square");
  CHECK(largest_difference(square[0].upright, normal) < round_off);
  CHECK(largest_difference(square[1].upright, {0.0, -normal.y(), normal.z()}) < round_off);
  CHECK(largest_difference(runs_of(mesh, "upright")[0].upright, Vector3::UnitZ()) < round_off);
  CHECK(largest_difference(runs_of(mesh, "keel")[0].upright, Vector3::UnitZ()) < round_off);
  CHECK(largest_difference(runs_of(mesh, "bilge")[0].upright, -Vector3::UnitY()) < round_off);
  CHECK(largest_difference(runs_of(mesh, "bilge")[0].toe, Vector3::UnitZ()) < round_off);
}

TEST_CASE("Members run along edges of the plating they stand on", "[unit][lattice]")
{
  carlin::Model model = launch();
  model.members = {member("outer", Surface::bottom, Surface::buttock, "outer"),
                   member("sole", Surface::side, Surface::height, "sole"),
                   member("middle", Surface::bottom, Surface::station, "middle")};
  const Mesh mesh = mesh_of(model);
  std::set<std::pair<Index, Index>> edges;
  for (const carlin::Cell& cell : mesh.cells)
    for (std::size_t i = 0; i < 4; ++i)
      edges.insert(std::minmax({cell.points[i], cell.points[(i + 1) % 4]}));
  REQUIRE(mesh.runs.size() == 5);
  for (const Run& run : mesh.runs)
    for (std::size_t i = 0; i + 1 < run.points.size(); ++i)
    {
      REQUIRE(edges.contains(std::minmax({run.points[i], run.points[i + 1]})));
      const Vector3 tangent = at(mesh, run.points[i + 1]) - at(mesh, run.points[i]);
      REQUIRE_THAT(run.upright[i].dot(tangent), WithinAbs(0.0, round_off));
      REQUIRE_THAT(run.toe[i].dot(tangent), WithinAbs(0.0, round_off));
      REQUIRE_THAT(run.toe[i].dot(run.upright[i]), WithinAbs(0.0, round_off));
      REQUIRE_THAT(run.toe[i].norm(), WithinRel(1.0, round_off));
    }
}

TEST_CASE("Parts that cannot be placed are all refused in one pass", "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.plates = {plate("bottom", Surface::bottom), plate("keel-strip", Surface::bottom),
                  plate("thin", Surface::deck), plate("lost", Surface::station, "frame-9")};
  model.plates[1].patch.buttocks = {"", "girder"};
  model.plates[1].where = {"boat.yaml", 12, 3};
  model.plates[2].patch.stations = {"middle", "middle"};
  model.members = {member("blind", Surface::height, Surface::buttock, "girder"),
                   member("turned", Surface::bottom, Surface::buttock, "girder"),
                   member("parallel", Surface::bottom, Surface::buttock, "girder"),
                   member("twice", Surface::bottom, Surface::height, "flat"),
                   member("unsided", Surface::deck, Surface::buttock, "centreline")};
  model.members[0].surface_plane = "flat";
  model.members[1].along = {"bow", "middle"};
  model.members[2].stands = Stands::forward;
  model.members[4].stands = Stands::inboard;
  const carlin::Lattice lattice(model, 0.1);
  CHECK_THROWS_WITH(
      lattice.mesh(base(model)),
      Contains("boat.yaml:12:3: error: plates 'bottom' and 'keel-strip' lie on the same faces") &&
          Contains("'thin': there is no face between 'middle' and itself") &&
          Contains("'lost': there is no station 'frame-9'; stations are transom, middle, bow") &&
          Contains("'blind': on an internal surface there is no inside") &&
          Contains("'turned': stations from 'bow' to 'middle' run the wrong way") &&
          Contains("'parallel': it runs in the very direction") &&
          Contains("'twice': its surface and its plane are of the same kind") &&
          Contains("'unsided': on the centreline there is no inboard"));
}

TEST_CASE("Two members of one family on the same edges are refused, bars on both sides are not",
          "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.members = {member("beam", Surface::deck, Surface::buttock, "girder"),
                   member("rail", Surface::deck, Surface::buttock, "girder")};
  model.members[1].stands = Stands::outside;
  CHECK_NOTHROW(mesh_of(model));
  model.members[0].family = model.members[1].family = "beams";
  model.members[1].along = {"middle", ""};
  CHECK_THROWS_WITH(mesh_of(model), Contains("members 'beam' and 'rail' of one family lie on the "
                                             "same edges"));
}

TEST_CASE("A cut-out that takes nothing away is refused", "[unit][lattice]")
{
  carlin::Model model = bare_box();
  model.plates = {plate("bulkhead", Surface::station, "middle")};
  model.plates[0].cut_outs = {cut_out({"transom", "transom"}, {}, {})};
  model.plates[0].cut_outs[0].where = {"boat.yaml", 20, 9};
  const carlin::Lattice lattice(model, 0.1);
  CHECK_THROWS_WITH(lattice.mesh(base(model)),
                    Contains("boat.yaml:20:9: error: 'bulkhead': the cut-out takes nothing away"));
}

TEST_CASE("Parts of a hull are refused in a model without one", "[unit][lattice]")
{
  carlin::Model model;
  model.plates = {plate("deck", Surface::deck)};
  CHECK_THROWS_WITH(carlin::Lattice(model, 0.1).mesh(base(model)),
                    Contains("'deck': the model has no hull to put it on"));
}
