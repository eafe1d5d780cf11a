#include "box_mesh.hpp"

#include "carlin/core/error.hpp"
#include "carlin/structure/structure.hpp"

#include <algorithm>
#include <catch2/catch.hpp>

using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using namespace carlin;
using test::MeshBuilder;

namespace
{
/// Departure of the resultants of the six unit components from unit, about `point`.
double resultant_error(const Structure& structure, const Footprint& footprint)
{
  const MatrixX resultants =
      rigid_modes(structure, footprint.point).transpose() * MatrixX(footprint.weights);
  return (resultants - MatrixX::Identity(6, 6)).cwiseAbs().maxCoeff();
}

Structure built(const Mesh& mesh)
{
  return build_structure(test::small_model(), ConfiguredCraft{}, mesh, Outfit{});
}

double largest_moment(const Footprint& footprint)
{
  double largest = 0.0;
  for (Index c = 0; c < 6; ++c)
    for (SparseMatrix::InnerIterator it(footprint.weights, c); it; ++it)
      if (it.row() % 6 >= 3)
        largest = std::max(largest, std::abs(it.value()));
  return largest;
}
} // namespace

TEST_CASE("Weights of a five-node footprint are those of the book", "[verification][footprint]")
{
  // Verification book G21, computed: forces linear over the footprint. Printed to 1e-8 or better.
  const std::vector<Vector3> nodes = {Vector3(0, 0, 0), Vector3(0.12, 0, 0), Vector3(0.12, 0.08, 0),
                                      Vector3(0, 0.08, 0), Vector3(0.05, 0.03, 0)};
  const std::vector<double> areas(5, 1.0);
  const Vector3 point(0.06, 0.04, 0);
  const MatrixX weights = spreading_weights(nodes, areas, point);
  const std::array<double, 5> normal = {0.180422917, 0.196794, 0.22135061, 0.20497954, 0.19645293};
  // Sum f (x - 0.06) = 1 is a moment of -1 about y.
  const std::array<double, 5> couple = {-3.973397, 4.31446112, 4.24624829, -4.04160982,
                                        -0.54570259};
  for (std::size_t i = 0; i < 5; ++i)
  {
    CAPTURE(i);
    CHECK_THAT(weights(static_cast<Index>(6 * i) + 2, 2), WithinAbs(normal[i], 1e-7));
    CHECK_THAT(weights(static_cast<Index>(6 * i) + 2, 4), WithinAbs(-couple[i], 1e-6));
  }
}

TEST_CASE("Spread forces have the exact resultant", "[unit][footprint]")
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {18, 8, 4}, .bulkheads = {3.0}});
  const Structure structure = built(builder.mesh);
  const Vector3 point(4.1, 0.23, 0.6);
  for (const FootprintArea& area :
       {FootprintArea{Vector3(4.1, 0.2, 0.0), 1.3, 0.9, {}},             // on the bottom
        FootprintArea{Vector3(4.1, 0.2, 1.2), 1.3, 0.9, {"deck"}},       // on the deck
        FootprintArea{Vector3(4.1, 1.3, 0.6), 1.1, 0.7, {"side-port"}},  // upright, fore and aft
        FootprintArea{Vector3(3.0, 0.1, 0.5), 1.0, 0.8, {"bulkhead-1"}}, // upright, across
        FootprintArea{Vector3(4.13, 0.21, 0.0), 0.05, 0.05, {}},         // smaller than a cell
        FootprintArea{Vector3(4.25, 0.0, 0.0), 0.0, 0.0, {}}})           // the nearest only
  {
    CAPTURE(area.centre, area.length);
    const Footprint spread = footprint(structure, area, point, "foot");
    CHECK(resultant_error(structure, spread) < 1e-12 * 10.0); // arms of a metre over 0.3 m spread
    CHECK(largest_moment(spread) == 0.0);                     // forces alone
    for (const Index node : spread.nodes)
    {
      const Vector3 d = structure.nodes[static_cast<std::size_t>(node)] - area.centre;
      CHECK(d.norm() < 0.5 * std::hypot(area.length, area.width) + 0.6);
    }
  }
}

TEST_CASE("A footprint covers one surface only", "[unit][footprint]")
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {18, 8, 4}});
  const Structure structure = built(builder.mesh);
  const Footprint spread =
      footprint(structure, {Vector3(4.5, 0, 0.02), 1.0, 0.65, {}}, Vector3(4.5, 0, 0.5), "foot");
  CHECK(spread.nodes.size() == 9); // 3 along x 3 across, none of the deck above
  for (const Index node : spread.nodes)
    CHECK(structure.nodes[static_cast<std::size_t>(node)].z() == 0.0);
}

TEST_CASE("Nodes in line take moments about their line", "[unit][footprint]")
{
  MeshBuilder builder;
  builder.beam("beam", "bar", Vector3(0, 0, 0), Vector3(2, 0, 0), 8);
  builder.mesh.mesh_size = 0.25;
  const Structure structure = built(builder.mesh);
  const Vector3 point(1.0, 0.1, 0.3);
  const Footprint line = footprint(structure, {Vector3(1, 0, 0), 0.6, 0.1, {}}, point, "foot");
  CHECK(line.nodes.size() == 3);
  CHECK(resultant_error(structure, line) < 1e-12);
  const Footprint single = footprint(structure, {Vector3(1, 0, 0), 0.0, 0.0, {}}, point, "foot");
  CHECK(single.nodes.size() == 1);
  CHECK(resultant_error(structure, single) < 1e-12);
  CHECK(resultant_error(structure, point_footprint(structure, 3)) < 1e-12);
}

TEST_CASE("A footprint over nothing is named", "[unit][footprint]")
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {9, 4, 2}});
  const Structure structure = built(builder.mesh);
  CHECK_THROWS_WITH(footprint(structure, {Vector3(4, 0, 5), 0.2, 0.2, {}}, Vector3::Zero(),
                              "tank-1, collar-a, foot-1"),
                    Contains("tank-1, collar-a, foot-1: no structure under its footprint at x 4"));
  CHECK_THROWS_WITH(
      footprint(structure, {Vector3(4, 0, 0), 0.2, 0.2, {"girder"}}, Vector3::Zero(), "foot-1"),
      Contains("foot-1") && Contains("part 'girder'"));
}
