#include "lattice_models.hpp"

#include <catch2/catch.hpp>
#include <map>
#include <set>

using namespace lattice_models;
using carlin::Mesh;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
constexpr double round_off = 1e-12; // relative, of sums of a few thousand terms near 1

/// Cells at every edge of the outer shell and deck, by point numbers.
std::map<std::pair<Index, Index>, int> closed_edges(const Mesh& mesh)
{
  std::map<std::pair<Index, Index>, int> edges;
  for (const carlin::Cell& cell : mesh.cells)
  {
    const carlin::MeshPart& of = mesh.parts[static_cast<std::size_t>(cell.part)];
    if (!of.is_outer_shell && of.surface != carlin::Surface::deck)
      continue;
    for (std::size_t i = 0; i < 4; ++i)
      ++edges[std::minmax({cell.points[i], cell.points[(i + 1) % 4]})];
  }
  return edges;
}

std::set<std::array<double, 3>> used_points(const Mesh& mesh, double sign_of_y)
{
  std::set<std::array<double, 3>> points;
  for (const carlin::Cell& cell : mesh.cells)
    for (const Index point : cell.points)
    {
      const Vector3& p = at(mesh, point);
      points.insert({p.x(), sign_of_y * p.y() + 0.0, p.z()});
    }
  return points;
}
} // namespace

TEST_CASE("A rigid bed has an empty mesh", "[unit][lattice]")
{
  carlin::Model model;
  model.rigid_bed = true;
  const Mesh mesh = carlin::Lattice(model, 0.1).mesh(carlin::ConfiguredCraft{});
  CHECK(mesh.points.empty());
  CHECK(mesh.cells.empty());
}

TEST_CASE("A box has the cells and areas of a box", "[unit][lattice]")
{
  const Mesh mesh = mesh_of(prism());
  // 4.0 x 2.0 x 1.0 m in cells of 0.1 m: two halves, 40 along, 10 across, 10 up.
  CHECK(mesh.points.size() == 21u * 11u * 41u);
  CHECK(cell_count(mesh, "bottom") == 2 * 40 * 10);
  CHECK(cell_count(mesh, "side") == 2 * 40 * 10);
  CHECK(cell_count(mesh, "transom") == 2 * 10 * 10);
  CHECK_THAT(area(mesh, "bottom"), WithinRel(8.0, round_off));
  CHECK_THAT(area(mesh, "side"), WithinRel(8.0, round_off));
  CHECK_THAT(area(mesh, "deck"), WithinRel(8.0, round_off));
  CHECK_THAT(area(mesh, "bow"), WithinRel(2.0, round_off));
  CHECK_THAT(enclosed_volume(mesh), WithinRel(8.0, round_off));
  CHECK(part(mesh, "bottom").is_outer_shell);
  CHECK(part(mesh, "bow").is_outer_shell);
  CHECK_FALSE(part(mesh, "deck").is_outer_shell);
}

TEST_CASE("Normals point inward all round", "[unit][lattice]")
{
  const Mesh mesh = mesh_of(prism());
  const Vector3 middle(2.0, 0.0, 0.5);
  for (const carlin::Cell& cell : mesh.cells)
    REQUIRE(area_vector(mesh, cell).dot(middle - centre(mesh, cell)) > 0.0);
}

TEST_CASE("A prismatic V hull has the areas and the volume of its section", "[unit][lattice]")
{
  // Section: keel 0, chine (1.0, 0.35), deck edge (1.2, 1.0). Half area by trapezoids in z:
  // 0.5 * 1.0 * 0.35 + 0.5 * (1.0 + 1.2) * 0.65 = 0.175 + 0.715 = 0.89 m^2. Length 4 m.
  carlin::Model model = prism(0.35, 1.2);
  model.hull->buttocks = {buttock("girder", 0.45)};
  model.hull->heights = {height("sole", 0.6)};
  const Mesh mesh = mesh_of(model);
  CHECK_THAT(enclosed_volume(mesh), WithinRel(4.0 * 2.0 * 0.89, round_off));
  CHECK_THAT(area(mesh, "bottom"), WithinRel(8.0 * std::hypot(1.0, 0.35), round_off));
  CHECK_THAT(area(mesh, "side"), WithinRel(8.0 * std::hypot(0.2, 0.65), round_off));
  CHECK_THAT(area(mesh, "transom"), WithinRel(2.0 * 0.89, round_off));
}

TEST_CASE("The outer shell and the deck close without a gap or a T-joint", "[unit][lattice]")
{
  const Mesh mesh = mesh_of(launch());
  const auto edges = closed_edges(mesh);
  REQUIRE(edges.size() > 1000);
  for (const auto& [edge, cells] : edges)
    REQUIRE(cells == 2);
  // No two points in use coincide: neighbours share points, not places.
  std::set<Index> numbers;
  for (const carlin::Cell& cell : mesh.cells)
    numbers.insert(cell.points.begin(), cell.points.end());
  CHECK(numbers.size() == used_points(mesh, 1.0).size());
}

TEST_CASE("Bulkheads, flats and webs use the points of the shell where they meet it",
          "[unit][lattice]")
{
  const Mesh mesh = mesh_of(launch());
  std::map<std::string, std::set<Index>> points;
  for (const carlin::Cell& cell : mesh.cells)
    points[part_name(mesh, cell)].insert(cell.points.begin(), cell.points.end());
  std::map<std::pair<Index, Index>, int> edges;
  for (const carlin::Cell& cell : mesh.cells)
    if (part_name(mesh, cell) == "bulkhead")
      for (std::size_t i = 0; i < 4; ++i)
        ++edges[std::minmax({cell.points[i], cell.points[(i + 1) % 4]})];
  int outer = 0;
  for (const auto& [edge, cells] : edges)
    if (cells == 1)
    {
      ++outer;
      bool on_shell = false;
      for (const char* name : {"bottom", "side", "deck"})
        on_shell =
            on_shell || (points[name].contains(edge.first) && points[name].contains(edge.second));
      REQUIRE(on_shell);
    }
  CHECK(outer > 40);
}

TEST_CASE("Port and starboard are mirrored to the last bit", "[unit][lattice]")
{
  const Mesh mesh = mesh_of(launch());
  CHECK(used_points(mesh, 1.0) == used_points(mesh, -1.0));
  Vector3 sum = Vector3::Zero();
  for (const carlin::Cell& cell : mesh.cells)
    if (part_name(mesh, cell) == "side")
      sum += area_vector(mesh, cell);
  CHECK_THAT(sum.y(), WithinAbs(0.0, round_off));
}

TEST_CASE("All configurations have the same points", "[unit][lattice]")
{
  const carlin::Model model = launch();
  const carlin::Lattice lattice(model, model.mesh_size);
  carlin::ConfiguredCraft other = base(model);
  other.plates.resize(3);
  const Mesh whole = lattice.mesh(base(model)), part_of_it = lattice.mesh(other);
  CHECK(whole.points == part_of_it.points);
  CHECK(part_of_it.cells.size() < whole.cells.size());
}

TEST_CASE("Stations fan from upright to the rake of the stem", "[unit][lattice]")
{
  const carlin::Model model = launch();
  const Mesh mesh = mesh_of(model);
  const double slope = std::tan(0.4), position = 9.0 - 1.5 * slope;
  double top = 0.0;
  for (const carlin::Cell& cell : mesh.cells)
    for (const Index point : cell.points)
    {
      const Vector3& p = at(mesh, point);
      if (part_name(mesh, cell) == "stem")
        REQUIRE_THAT(p.x(), WithinAbs(position + slope * p.z(), 1e-12)); // round-off of 9 m
      if (part_name(mesh, cell) == "bulkhead")
        REQUIRE_THAT(p.x(), WithinAbs(4.5, round_off));
      top = std::max(top, p.x());
    }
  // The deck's camber at the stem face: 0.06 m at 3 m beam, by the square of the breadth.
  const double camber = 0.06 * std::pow(0.08 / 3.0, 2);
  CHECK_THAT(top, WithinAbs(9.0 + slope * camber, 1e-12));
}

TEST_CASE("A hull line is smooth between its stations and keeps a straight body straight",
          "[unit][lattice]")
{
  // Keel and chine straight, deck edge 1.0, 1.0, 1.0, 0.4 m: level where the data are level.
  carlin::Model model = prism();
  model.hull->offsets->stations.clear();
  for (const auto& [x, y] : {std::pair{0.0, 1.0}, {1.0, 1.0}, {2.0, 1.0}, {4.0, 0.4}})
    model.hull->offsets->stations.push_back(offset_station(
        {"keel", "chine", "deck-edge"}, {{x, 0.0, 0.0}, {x, 0.3, 0.1}, {x, y, 1.0}}));
  const auto edge_at = [&](double x)
  {
    const Mesh mesh = mesh_of(model);
    double y = -1.0;
    for (const Vector3& p : mesh.points)
      if (std::abs(p.x() - x) < 1e-9 && p.y() > y)
        y = p.y();
    return y;
  };
  CHECK(edge_at(1.5) == 1.0);
  // Cubic of the last interval by hand: slope 0 at x 2 (level before), at the end the one-sided
  // three-point slope d + (d - d_before) h / (h + h_before) = -0.3 - 0.3 * 2 / 3 = -0.5. At half:
  // 1.0 - 0.6 / 2 + h/4 (0 - slope) / 2 = 0.7 + 2 * 0.25 * 0.5 * 0.5 = 0.825.
  CHECK_THAT(edge_at(3.0), WithinAbs(0.825, round_off));
  model.hull->offsets->fairing = carlin::Fairing::straight;
  CHECK_THAT(edge_at(3.0), WithinAbs(0.7, round_off));
}

TEST_CASE("Buttocks are straight in their range and narrow with the hull beyond", "[unit][lattice]")
{
  const carlin::Model model = launch();
  const carlin::Lattice lattice(model, model.mesh_size);
  for (const carlin::Lattice::ResolvedPlane& plane : lattice.resolved_planes())
    if (plane.name == "girder")
    {
      const std::size_t half = (plane.line.size() - 1) / 2;
      for (std::size_t k = 0; k < half; ++k)
        if (plane.line[k].x() < 6.5 + 1e-9)
          REQUIRE(plane.line[k].y() == 0.7);
      const double stem_y = plane.line[half - 1].y();
      CHECK(stem_y > 0.0);
      CHECK(stem_y < 0.04); // half of the stem face
    }
}

TEST_CASE("A flat below the chine is level out to its buttock and ends there", "[unit][lattice]")
{
  const Mesh mesh = mesh_of(launch());
  for (const carlin::Cell& cell : mesh.cells)
    if (part_name(mesh, cell) == "flat")
    {
      REQUIRE_THAT(area_vector(mesh, cell).normalized().z(), WithinAbs(-1.0, round_off));
      for (const Index point : cell.points)
      {
        REQUIRE(at(mesh, point).z() == 0.35);
        REQUIRE(std::abs(at(mesh, point).y()) <= 0.7);
      }
    }
  CHECK_THAT(area(mesh, "flat"), WithinRel(2.0 * 0.7 * 2.5, round_off));
}

TEST_CASE("Planes follow knuckles of bottom and side", "[unit][lattice]")
{
  carlin::Model model = prism();
  model.hull->offsets->stations.clear();
  const std::vector<std::string> names{"keel", "spray-rail", "chine", "rubbing-strake",
                                       "deck-edge"};
  for (const double x : {0.0, 4.0})
    model.hull->offsets->stations.push_back(offset_station(names, {{x, 0.0, 0.0},
                                                                   {x, 0.5 - 0.05 * x, 0.1},
                                                                   {x, 1.0, 0.3},
                                                                   {x, 1.15, 0.6 + 0.02 * x},
                                                                   {x, 1.2, 1.0}}));
  model.hull->buttocks = {buttock("rail", 0.0)};
  model.hull->buttocks[0].plan.clear();
  model.hull->buttocks[0].follows = "spray-rail";
  model.hull->heights = {height("strake", 0.0)};
  model.hull->heights[0].profile.clear();
  model.hull->heights[0].follows = "rubbing-strake";
  model.members = {member("strake", carlin::Surface::side, carlin::Surface::height, "strake"),
                   member("rail", carlin::Surface::bottom, carlin::Surface::buttock, "rail")};
  const Mesh mesh = mesh_of(model);
  for (const carlin::Run& run : runs_of(mesh, "strake"))
    for (const Index point : run.points)
    {
      const Vector3& p = at(mesh, point);
      REQUIRE_THAT(std::abs(p.y()), WithinAbs(1.15, round_off));
      REQUIRE_THAT(p.z(), WithinAbs(0.6 + 0.02 * p.x(), round_off));
    }
  for (const carlin::Run& run : runs_of(mesh, "rail"))
    for (const Index point : run.points)
    {
      const Vector3& p = at(mesh, point);
      REQUIRE_THAT(std::abs(p.y()), WithinAbs(0.5 - 0.05 * p.x(), round_off));
      REQUIRE_THAT(p.z(), WithinAbs(0.1, round_off));
    }
}

TEST_CASE("Halving the mesh size keeps the named planes and converges in area and volume",
          "[unit][lattice]")
{
  carlin::Model model = launch();
  std::vector<double> areas, volumes;
  for (const double mesh_size : {0.3, 0.15, 0.075})
  {
    model.mesh_size = mesh_size;
    const Mesh mesh = mesh_of(model);
    CHECK_THAT(area(mesh, "flat"), WithinRel(2.0 * 0.7 * 2.5, round_off));
    areas.push_back(area(mesh, "bottom"));
    volumes.push_back(enclosed_volume(mesh));
  }
  // Chords of curves: error falls by 4 a halving; 3 leaves room for counts that do not double.
  CHECK(std::abs(areas[2] - areas[1]) < std::abs(areas[1] - areas[0]) / 3.0);
  CHECK(std::abs(volumes[2] - volumes[1]) < std::abs(volumes[1] - volumes[0]) / 3.0);
  CHECK_THAT(volumes[2], WithinRel(volumes[1], 1e-3));
}

TEST_CASE("Buttocks along a plan and heights along a profile are met on raked stations too",
          "[unit][lattice]")
{
  carlin::Model model = prism(0.35, 1.2);
  model.hull->stations = {station("transom", 0.2, -0.2), station("bow", 3.5, 0.4)};
  model.hull->buttocks = {buttock("girder", 0.0), buttock("hatch", 0.7)};
  model.hull->buttocks[0].plan = {{0.0, 0.5}, {2.0, 0.5}, {4.0, 0.3}};
  model.hull->buttocks[1].deck_offset = 0.9;
  model.hull->heights = {height("sole", 0.0)};
  model.hull->heights[0].profile = {{0.0, 0.6}, {4.0, 0.8}};
  const carlin::Lattice lattice(model, 0.1);
  int checked = 0;
  for (const carlin::Lattice::ResolvedPlane& plane : lattice.resolved_planes())
    for (const Vector3& p : plane.line)
    {
      ++checked;
      if (plane.name == "girder")
        REQUIRE_THAT(p.y(), WithinAbs(p.x() <= 2.0 ? 0.5 : 0.5 - 0.1 * (p.x() - 2.0), round_off));
      if (plane.name == "hatch") // leans from 0.7 at the bottom to 0.9 at the deck
        REQUIRE_THAT(p.y(), WithinAbs(p.z() < 0.5 ? 0.7 : 0.9, round_off));
      if (plane.name == "sole")
        REQUIRE_THAT(p.z(), WithinAbs(0.6 + 0.05 * p.x(), round_off));
      if (plane.name == "bow")
        REQUIRE_THAT(p.x(), WithinAbs(3.5 + std::tan(0.4) * p.z(), round_off));
    }
  CHECK(checked > 200);
}

TEST_CASE("A height keeps its fraction between its level neighbours beyond its range",
          "[unit][lattice]")
{
  // Box 1 m deep. 'flat' level at 0.4 out to the girder and back to the middle; 'sole' level at 0.8
  // all along: beyond, the flat stays at half of the height up to the sole, in a hull that gets
  // shallower: at the bow the sole is level at 0.8 above a bottom at 0.2, so the flat is at 0.5.
  carlin::Model model = prism();
  model.hull->offsets->fairing = carlin::Fairing::straight;
  model.hull->offsets->stations[1].points[0].position.z() = 0.2;
  model.hull->offsets->stations[1].points[1].position.z() = 0.2;
  model.hull->offsets->stations.insert(
      model.hull->offsets->stations.begin() + 1,
      offset_station({"keel", "chine", "deck-edge"}, {{2, 0, 0}, {2, 1, 0}, {2, 1, 1}}));
  model.hull->buttocks = {buttock("girder", 0.5)};
  model.hull->heights = {height("flat", 0.4), height("sole", 0.8)};
  model.hull->heights[0].out_to = "girder";
  model.hull->heights[0].to = "middle";
  const carlin::Lattice lattice(model, 0.1);
  for (const carlin::Lattice::ResolvedPlane& plane : lattice.resolved_planes())
    if (plane.name == "flat")
      for (const Vector3& p : plane.line)
      {
        const double bottom = std::max(0.0, 0.1 * (p.x() - 2.0));
        REQUIRE_THAT(p.z(), WithinAbs(bottom + 0.5 * (0.8 - bottom), round_off));
      }
}
