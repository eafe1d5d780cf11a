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
/// One level plate 1.2 x 0.6 m, inward normal up, with a bar along its middle.
MeshBuilder plate_with_bar(const Vector3& upright)
{
  MeshBuilder builder;
  builder.plate("floor", "plate",
                {Vector3(0, 0, 0), Vector3(1.2, 0, 0), Vector3(1.2, 0.6, 0), Vector3(0, 0.6, 0)},
                {4, 2});
  builder.member("bar-1", "bar", Vector3(0, 0.3, 0), Vector3(1.2, 0.3, 0), 4, upright);
  return builder;
}

Structure built(const Model& model, const Mesh& mesh)
{
  return build_structure(model, ConfiguredCraft{}, mesh, Outfit{});
}
} // namespace

TEST_CASE("Rigid motion of a box hull costs nothing", "[unit][structure]")
{
  const Model model = test::small_model();
  MeshBuilder builder;
  test::add_box(builder, {.cells = {6, 3, 2}, .bulkheads = {3.0}});
  builder.member("stringer", "bar", Vector3(0, -2.6 / 6.0, 0), Vector3(9, -2.6 / 6.0, 0), 6,
                 Vector3::UnitZ());
  builder.mesh.joints.push_back({{"tabbing", {}}, "bulkhead-1", 1e9, 1e9, 1e9, 1e4, ""});
  const Structure structure = built(model, builder.mesh);

  const MatrixX modes = rigid_modes(structure, Vector3(4, 0, 0.5));
  const MatrixX forces = structure.stiffness * modes;
  const double scale = structure.stiffness.diagonal().maxCoeff() * modes.cwiseAbs().maxCoeff();
  CHECK(forces.cwiseAbs().maxCoeff() < 1e-11 * scale); // round-off
  const SparseMatrix skew = structure.stiffness - SparseMatrix(structure.stiffness.transpose());
  CHECK(skew.norm() < 1e-14 * structure.stiffness.norm());
}

TEST_CASE("Points that nothing uses carry no node", "[unit][structure]")
{
  const Model model = test::small_model();
  MeshBuilder builder = plate_with_bar(Vector3::UnitZ());
  builder.point(Vector3(7, 7, 7));
  const Structure structure = built(model, builder.mesh);
  CHECK(structure.nodes.size() == 15);
  CHECK(structure.stiffness.rows() == 90);
}

TEST_CASE("A member stands on the face of its plating", "[unit][structure]")
{
  // Flat bar 70 high: its centroid is 35 mm above its foot. Plate 5 mm.
  struct Line
  {
    MouldedLine line;
    double above, below; // face over the moulded line, along and against the normal [m]
  };
  for (const Line& place :
       {Line{MouldedLine::inside, 0.005, 0.0}, Line{MouldedLine::centred, 0.0025, 0.0025},
        Line{MouldedLine::outside, 0.0, 0.005}})
  {
    Model model = test::small_model();
    model.schedules.front().line = place.line;
    CAPTURE(place.above);
    const MeshBuilder above = plate_with_bar(Vector3::UnitZ());
    const Structure up = built(model, above.mesh);
    CHECK_THAT(up.members[1].offset_1.z(), WithinAbs(place.above + 0.035, 1e-15));
    CHECK_THAT(up.members[1].offset_2.z(), WithinAbs(place.above + 0.035, 1e-15));
    CHECK_THAT(up.shell_sections[0].offset, WithinAbs(0.5 * (place.above - place.below), 1e-15));
    const MeshBuilder below = plate_with_bar(-Vector3::UnitZ());
    const Structure down = built(model, below.mesh);
    CHECK_THAT(down.members[1].offset_1.z(), WithinAbs(-place.below - 0.035, 1e-15));
  }
}

TEST_CASE("A flange stands on the edge of its web", "[unit][structure]")
{
  const Model model = test::small_model();
  MeshBuilder builder;
  builder.plate("web", "plate",
                {Vector3(0, 0, 0), Vector3(1, 0, 0), Vector3(1, 0, 0.4), Vector3(0, 0, 0.4)},
                {2, 1});
  builder.member("flange", "bar", Vector3(0, 0, 0.4), Vector3(1, 0, 0.4), 2, Vector3::UnitZ());
  const Structure structure = built(model, builder.mesh);
  CHECK_THAT(structure.members[0].offset_1.z(), WithinAbs(0.035, 1e-15));
}

TEST_CASE("The toe of a profile is mirrored to starboard", "[unit][structure]")
{
  Model model = test::small_model();
  model.profiles.front().shape = AngleBar{0.08, 0.006, 0.05, 0.008};
  MeshBuilder builder = plate_with_bar(Vector3::UnitZ()); // along x, upright z: local y is port
  const Structure port = built(model, builder.mesh);
  for (Vector3& toe : builder.mesh.runs[0].toe)
    toe = -toe;
  const Structure starboard = built(model, builder.mesh);
  const Member& a = port.members[0];
  const Member& b = starboard.members[0];
  CHECK(a.offset_1.y() > 1e-3); // towards the flange
  CHECK_THAT(b.offset_1.y(), WithinRel(-a.offset_1.y(), 1e-15));
  CHECK_THAT(b.offset_1.z(), WithinRel(a.offset_1.z(), 1e-15));
  const MemberSection& section_a = port.member_sections[static_cast<std::size_t>(a.section)];
  const MemberSection& section_b = starboard.member_sections[static_cast<std::size_t>(b.section)];
  CHECK(section_a.bending_product != 0.0);
  CHECK(section_b.bending_product == -section_a.bending_product);
  CHECK(section_b.profile.shear_centre_y == -section_a.profile.shear_centre_y);
}

TEST_CASE("Offsets of a member between points change in proportion to its length",
          "[unit][structure]")
{
  const Model model = test::small_model();
  MeshBuilder builder;
  Run& run = builder.beam("post", "bar", Vector3(0, 0, 0), Vector3(4, 0, 0), 4);
  run.offset_from = Vector3(0, 0, 0.1);
  run.offset_to = Vector3(0, 0.4, 0.3);
  const Structure structure = built(model, builder.mesh);
  CHECK((structure.members[1].offset_1 - Vector3(0, 0.1, 0.15)).norm() < 1e-15);
  CHECK((structure.members[1].offset_2 - Vector3(0, 0.2, 0.2)).norm() < 1e-15);
}

TEST_CASE("A member with no plating to stand on is named", "[unit][structure]")
{
  const Model model = test::small_model();
  MeshBuilder builder = plate_with_bar(Vector3::UnitZ());
  builder.member("stray", "bar", Vector3(0, 0, 1), Vector3(1, 0, 1), 1, Vector3::UnitZ());
  CHECK_THROWS_WITH(built(model, builder.mesh),
                    Contains("member 'stray' has no plating to stand on"));
}

TEST_CASE("Supports hold what they say, once", "[unit][structure]")
{
  Model model = test::small_model();
  MeshBuilder builder = plate_with_bar(Vector3::UnitZ());
  builder.named_point("a", Vector3(0, 0, 0));
  builder.named_point("b", Vector3(0, 0.6, 0));
  builder.named_point("c", Vector3(1.2, 0.6, 0));
  builder.named_point("void", Vector3(9, 9, 9));
  model.frame.emplace();
  Support edge;
  edge.name = "aft edge";
  edge.edges = {{"a", "b"}, {"b", "c"}};
  edge.holds = {true, false, true, false, false, false};
  Support spring;
  spring.name = "block";
  spring.points = {"c"};
  spring.springs[1] = 2e7;
  model.frame->supports = {edge, spring};

  const Structure structure = built(model, builder.mesh);
  CHECK(structure.supported.size() == 2 * 7 + 1); // 3 nodes aft and 5 along, the corner once
  const Index c = 6 * node_at(structure, "c") + 1;
  const auto sprung =
      std::find_if(structure.supported.begin(), structure.supported.end(),
                   [&](const SupportedFreedom& freedom) { return freedom.freedom == c; });
  REQUIRE(sprung != structure.supported.end());
  CHECK(sprung->stiffness == 2e7);
  CHECK(sprung->support == 1);

  model.frame->supports[1].springs[1].reset();
  model.frame->supports[1].holds[0] = true;
  model.frame->supports[1].motion[0] = 0.01;
  CHECK_THROWS_WITH(built(model, builder.mesh), Contains("'aft edge'") && Contains("'block'") &&
                                                    Contains("u_x") && Contains("differently"));
  CHECK_THROWS_WITH(node_at(structure, "void"), Contains("point 'void' has no structure"));
  CHECK_THROWS_WITH(node_at(structure, "nowhere"), Contains("does not exist"));
}

TEST_CASE("Transverse plating has its material axis across the boat", "[unit][structure]")
{
  const Model model = test::small_model();
  MeshBuilder builder;
  test::add_box(builder, {.cells = {3, 2, 1}, .bulkheads = {3.0}});
  const Structure structure = built(model, builder.mesh);
  for (const Shell& shell : structure.shells)
  {
    const std::string& name = builder.mesh.parts[static_cast<std::size_t>(shell.part)].name;
    const bool is_transverse = name == "bulkhead-1" || name == "transom" || name == "stem";
    CHECK(material_axis(structure, shell) == (is_transverse ? Vector3::Unit(1) : Vector3::Unit(0)));
  }
}
