#include "lattice_models.hpp"

#include "carlin/lattice/dimensions.hpp"

#include <catch2/catch.hpp>
#include <chrono>

using namespace lattice_models;
using carlin::Mesh;
using carlin::MeshQuality;
using carlin::Surface;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
constexpr double round_off = 1e-12;

/// Mesh of one quadrilateral.
Mesh one_cell(const std::array<Vector3, 4>& corners)
{
  Mesh mesh;
  mesh.points.assign(corners.begin(), corners.end());
  mesh.parts.emplace_back().name = "panel";
  mesh.cells.push_back({{0, 1, 2, 3}, 0});
  return mesh;
}
} // namespace

TEST_CASE("Aspect, skew and warp of a cell are those of their definitions", "[unit][lattice]")
{
  const MeshQuality rectangle =
      carlin::mesh_quality(one_cell({{{0, 0, 0}, {3, 0, 0}, {3, 1, 0}, {0, 1, 0}}}));
  CHECK_THAT(rectangle.largest_aspect, WithinRel(3.0, round_off));
  CHECK_THAT(rectangle.largest_skew, WithinAbs(0.0, round_off));
  CHECK(rectangle.largest_warp == 0.0);
  CHECK_THAT(rectangle.mean_side, WithinRel(2.0, round_off));
  CHECK_THAT(rectangle.largest_aspect_place, Contains("panel, x 1.50 m, y 0.50 m, z 0.00 m"));
  // Rhomb of 60 degrees: 30 degrees off square.
  const double h = std::sqrt(0.75);
  const MeshQuality rhomb =
      carlin::mesh_quality(one_cell({{{0, 0, 0}, {1, 0, 0}, {1.5, h, 0}, {0.5, h, 0}}}));
  CHECK_THAT(rhomb.largest_skew, WithinRel(M_PI / 6.0, round_off));
  // Unit square with corners +-a off its mean plane: sides sqrt(1 + 4 a^2).
  const double a = 0.1;
  const MeshQuality warped =
      carlin::mesh_quality(one_cell({{{0, 0, a}, {1, 0, -a}, {1, 1, a}, {0, 1, -a}}}));
  CHECK_THAT(warped.largest_warp, WithinRel(a / std::sqrt(1.0 + 4.0 * a * a), round_off));
}

TEST_CASE("Cells are counted across the short side of panels and along spans of members",
          "[unit][lattice]")
{
  carlin::Model model = prism(); // 40 x 10 cells a side, transom and bow 10 high
  model.hull->buttocks = {buttock("stringer", 0.4)};
  CHECK(carlin::mesh_quality(mesh_of(model)).fewest_cells_per_panel == 10);
  model.members = {member("stringer", Surface::bottom, Surface::buttock, "stringer")};
  // Stringers at +-0.4 m leave 8 cells between them and 6 outside.
  const MeshQuality with_stringers = carlin::mesh_quality(mesh_of(model));
  CHECK(with_stringers.fewest_cells_per_panel == 6);
  CHECK(with_stringers.fewest_cells_per_span == 40);
  model.plates.push_back(plate("bulkhead", Surface::station, "middle"));
  CHECK(carlin::mesh_quality(mesh_of(model)).fewest_cells_per_span == 20);
  // A frame that is not primary holds nothing up; a primary one does.
  model.hull->stations.insert(model.hull->stations.begin() + 1, station("frame", 0.5));
  model.members.push_back(member("frame", Surface::bottom, Surface::station, "frame"));
  CHECK(carlin::mesh_quality(mesh_of(model)).fewest_cells_per_span == 20);
  model.members.back().is_primary = true;
  const MeshQuality with_frame = carlin::mesh_quality(mesh_of(model));
  CHECK(with_frame.fewest_cells_per_span == 5);
  CHECK_THAT(with_frame.fewest_cells_per_span_place,
             Contains("stringer, x 0.") && Contains("between transom and frame"));
  CHECK_THAT(with_frame.fewest_cells_per_panel_place,
             Contains("bottom, x 0.") && Contains("between transom and frame"));
  CHECK(with_frame.fewest_cells_per_panel == 5);
  CHECK(with_frame.cells == 2 * (3 * 40 * 10 + 3 * 10 * 10));
}

TEST_CASE("A primary member alongside does not hold another up", "[unit][lattice]")
{
  carlin::Model model = prism();
  model.hull->buttocks = {buttock("stringer", 0.4)};
  model.members = {member("stringer", Surface::deck, Surface::buttock, "stringer"),
                   member("carling", Surface::deck, Surface::buttock, "stringer")};
  model.members[1].is_primary = true;
  model.members[1].along = {"middle", ""};
  CHECK(carlin::mesh_quality(mesh_of(model)).fewest_cells_per_span == 20); // the carling's own
}

TEST_CASE("The bottom's own seams do not hold a stringer up", "[unit][lattice]")
{
  carlin::Model model = prism();
  model.hull->buttocks = {buttock("stringer", 0.4)};
  model.plates[0].patch.stations.to = "middle";
  model.plates.push_back(plate("bottom forward", Surface::bottom));
  model.plates.back().patch.stations.from = "middle";
  model.members = {member("stringer", Surface::bottom, Surface::buttock, "stringer")};
  CHECK(carlin::mesh_quality(mesh_of(model)).fewest_cells_per_span == 40);
}

TEST_CASE("A place is told in words, also along a raked station", "[unit][lattice]")
{
  Mesh mesh;
  CHECK(mesh.place({1.0, -0.001, 0.5}) == "x 1.00 m, y 0.00 m, z 0.50 m");
  mesh.stations = {{"transom", 0.0, 0.0}, {"frame-5", 4.0, 0.0}, {"stem", 8.0, std::atan(0.5)}};
  CHECK(mesh.place({4.35, -0.42, 0.31}) ==
        "x 4.35 m, y -0.42 m, z 0.31 m, between frame-5 and stem");
  CHECK_THAT(mesh.place({4.0, 0.0, 1.0}), Contains(", at frame-5"));
  CHECK_THAT(mesh.place({8.3, 0.0, 1.0}), Contains(", between frame-5 and stem"));
  CHECK_THAT(mesh.place({8.5, 0.0, 1.0}), Contains(", at stem"));
  CHECK_THAT(mesh.place({8.7, 0.0, 1.0}), Contains(", forward of stem"));
  CHECK_THAT(mesh.place({-0.1, 0.0, 1.0}), Contains(", aft of transom"));
}

TEST_CASE("Dimensions make a box where they say so, and a launch else", "[unit][lattice]")
{
  carlin::Model model = prism();
  model.hull->offsets.reset();
  carlin::HullDimensions box;
  box.length = 4.0;
  box.beam = box.chine_beam = 2.0;
  box.depth = 1.0;
  box.parallel_body = 1.0;
  model.hull->dimensions = box;
  const Mesh mesh = mesh_of(model);
  CHECK(mesh.points == mesh_of(prism()).points);

  const carlin::Model boat = launch();
  const carlin::HullOffsets offsets = carlin::offsets_from_dimensions(*boat.hull->dimensions);
  const carlin::OffsetStation &aft = offsets.stations.front(), &stem = offsets.stations.back();
  CHECK(aft.points[0].position == Vector3(0.0, 0.0, 0.0));
  CHECK_THAT(aft.points[1].position.z(), WithinRel(1.25 * std::tan(M_PI / 10.0), round_off));
  CHECK(aft.points[2].position == Vector3(0.0, 1.5, 1.5));
  CHECK_THAT(stem.points[2].position.x(), WithinRel(9.0, round_off));
  CHECK_THAT(stem.points[2].position.y(), WithinRel(0.04, round_off));
  // Every bottom deadrise forward is at least that amidships, every section within the beam.
  for (const carlin::OffsetStation& section : offsets.stations)
  {
    const Vector3 rise = section.points[1].position - section.points[0].position;
    CHECK(rise.z() / rise.y() > std::tan(M_PI / 10.0) - 1e-12);
    CHECK(section.points[2].position.y() <= 1.5);
    CHECK(section.points[1].position.y() <= section.points[2].position.y() + 1e-12);
  }
}

// Hidden: wall time says nothing on a loaded or instrumented machine. Run with the tag [.bench].
TEST_CASE("Fifteen thousand cells are made in well under a second", "[.bench][lattice]")
{
  carlin::Model model = launch();
  model.mesh_size = 0.085;
  const auto start = std::chrono::steady_clock::now();
  const Mesh mesh = mesh_of(model);
  const std::chrono::duration<double> taken = std::chrono::steady_clock::now() - start;
  CHECK(mesh.cells.size() > 15000);
  CHECK(taken.count() < 0.3); // about 0.02 s on one core of the machine this was written on
}
