#include "lattice_models.hpp"

#include "carlin/core/error.hpp"

#include <catch2/catch.hpp>

using namespace lattice_models;
using carlin::Mesh;
using Catch::Matchers::Contains;

namespace
{
carlin::FramePoint frame_point(const std::string& name, const Vector3& position)
{
  carlin::FramePoint point;
  point.name = name;
  point.position = position;
  return point;
}

carlin::FrameMember frame_member(const std::string& name, const std::string& from,
                                 const std::string& to, Index divisions)
{
  carlin::FrameMember member;
  member.name = name;
  member.from = from;
  member.to = to;
  member.divisions = divisions;
  member.profile = "tube";
  return member;
}

carlin::FramePlate frame_plate(const std::string& name, const std::vector<std::string>& corners,
                               const std::vector<Index>& divisions)
{
  carlin::FramePlate plate;
  plate.name = name;
  plate.corners = corners;
  plate.divisions = divisions;
  plate.schedule = "plate-5";
  return plate;
}

/// Two plates of 1.1 x 0.7 m that share edge b-c, at odd coordinates so that round-off shows.
carlin::Model two_plates()
{
  carlin::Model model;
  const Vector3 origin(0.1, 0.3, 0.7), along(1.1, 0.2, 0.05), up(0.03, -0.1, 0.7);
  carlin::Frame frame;
  frame.points = {frame_point("a", origin),
                  frame_point("b", origin + along),
                  frame_point("c", origin + along + up),
                  frame_point("d", origin + up),
                  frame_point("e", origin + 2.0 * along),
                  frame_point("f", origin + 2.0 * along + up)};
  frame.plates = {frame_plate("left", {"a", "b", "c", "d"}, {6, 7}),
                  frame_plate("right", {"c", "b", "e", "f"}, {7, 3})};
  model.frame = frame;
  return model;
}
} // namespace

TEST_CASE("Frame plates that meet along an edge share its points, whatever their order",
          "[unit][lattice]")
{
  const Mesh mesh = mesh_of(two_plates());
  CHECK(mesh.cells.size() == 42 + 21);
  CHECK(mesh.points.size() == 7 * 8 + 8 * 4 - 8);
  CHECK(mesh.named_points.size() == 6);
  CHECK_FALSE(part(mesh, "left").surface.has_value());
  CHECK(part(mesh, "left").kind == carlin::MeshPart::Kind::plate);
}

TEST_CASE("A frame member along a plate's edge or lattice line shares its points",
          "[unit][lattice]")
{
  carlin::Model model = two_plates();
  const std::vector<carlin::FramePoint>& p = model.frame->points;
  model.frame->points.push_back(frame_point("g", (p[0].position + p[1].position) / 2.0));
  model.frame->points.push_back(frame_point("h", (p[3].position + p[2].position) / 2.0));
  model.frame->members = {frame_member("edge", "c", "b", 7), frame_member("across", "g", "h", 7),
                          frame_member("mast", "f", "e", 2)};
  model.frame->members[0].upright = Vector3::UnitX();
  model.frame->members[0].offset_from = Vector3(0.0, 0.0, 0.02);
  model.frame->members[1].upright = Vector3::UnitX();
  model.frame->members[2].upright = Vector3::UnitY();
  const Mesh mesh = mesh_of(model);
  // Only the mast's middle is new: it has two divisions where the plate has seven.
  CHECK(mesh.points.size() == 7 * 8 + 8 * 4 - 8 + 1);
  const carlin::Run run = runs_of(mesh, "edge").front();
  CHECK(run.points.size() == 8);
  CHECK_FALSE(run.stands_on_plating);
  CHECK(run.offset_from == Vector3(0.0, 0.0, 0.02));
  const Vector3 line = (at(mesh, run.points.back()) - at(mesh, run.points.front())).normalized();
  for (std::size_t i = 0; i < 7; ++i)
  {
    REQUIRE(std::abs(run.upright[i].dot(line)) < 1e-14);
    REQUIRE((run.toe[i] - run.upright[i].cross(line)).norm() < 1e-14);
    REQUIRE(run.upright[i].x() > 0.9);
  }
}

TEST_CASE("A frame beside a hull joins it where points coincide", "[unit][lattice]")
{
  carlin::Model model = prism();
  model.frame.emplace();
  model.frame->points = {frame_point("foot", {2.0, 0.0, 1.0}), frame_point("top", {2.0, 0.0, 2.0})};
  model.frame->members = {frame_member("mast", "foot", "top", 4)};
  model.frame->members[0].upright = Vector3::UnitX();
  const Mesh mesh = mesh_of(model);
  CHECK(mesh.points.size() == 21u * 11u * 41u + 4u);
  const Index foot = runs_of(mesh, "mast").front().points.front();
  bool on_deck = false;
  for (const carlin::Cell& cell : mesh.cells)
    if (part_name(mesh, cell) == "deck")
      for (const Index point : cell.points)
        on_deck = on_deck || point == foot;
  CHECK(on_deck);
}

TEST_CASE("Frame parts that make no sense are all refused in one pass", "[unit][lattice]")
{
  carlin::Model model = two_plates();
  model.frame->points.push_back(frame_point("also-a", model.frame->points[0].position));
  model.frame->points.push_back(
      frame_point("over-a", model.frame->points[0].position + Vector3::UnitZ()));
  model.frame->members = {
      frame_member("lost", "a", "z", 1), frame_member("nothing", "a", "also-a", 1),
      frame_member("turned", "a", "over-a", 1), frame_member("undivided", "a", "b", 0)};
  model.frame->plates.push_back(frame_plate("three", {"a", "b", "c"}, {1, 1}));
  CHECK_THROWS_WITH(mesh_of(model), Contains("'lost': there is no frame point 'z'") &&
                                        Contains("'nothing': points 'a' and 'also-a' lie on") &&
                                        Contains("'turned': its upright is along the member") &&
                                        Contains("'undivided': divisions is 0") &&
                                        Contains("'three': a plate has four corners"));
}
