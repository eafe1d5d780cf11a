#include "hand_structure.hpp"

#include "carlin/recovery/recovery.hpp"

#include <catch2/catch.hpp>
#include <cmath>

using namespace carlin;
using carlin::testing::HandStructure;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
constexpr double E = 70e9, nu = 0.33;

ShellSection plate() { return isotropic_shell_section(E, nu, 2660.0, 0.0, 0.005, 0.0); }
MemberSection bar() { return member_section(flat_bar_constants(0.06, 0.006), E, nu, 2660.0, 0.0); }

void add_rigid(const Structure& structure, const Vector3& shift, const Vector3& turn,
               VectorX& displacement)
{
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
  {
    displacement.segment<3>(6 * static_cast<Index>(n)) += shift + turn.cross(structure.nodes[n]);
    displacement.segment<3>(6 * static_cast<Index>(n) + 3) += turn;
  }
}

carlin::testing::BoxHull small_box()
{
  return {.length = 6.0,
          .beam = 2.0,
          .depth = 1.0,
          .cell = 0.5,
          .bulkheads = {0.0, 3.0, 6.0},
          .section = plate()};
}
} // namespace

TEST_CASE("The shape shown has no rigid motion left and keeps what is not rigid",
          "[unit][recovery]")
{
  const HandStructure hull = carlin::testing::box_hull(small_box());
  const Structure& structure = hull.structure;
  VectorX bent = VectorX::Zero(structure.stiffness.rows());
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
    bent[6 * static_cast<Index>(n) + 2] = 1e-3 * std::cos(structure.nodes[n].x());
  VectorX moved = bent;
  add_rigid(structure, {0.1, -0.2, 0.3}, {0.01, 0.02, -0.03}, moved);
  const VectorX shown = shape_shown(structure, moved);
  CHECK((shown - shape_shown(structure, bent)).cwiseAbs().maxCoeff() < 1e-13); // R, metres
  CHECK((shape_shown(structure, shown) - shown).cwiseAbs().maxCoeff() < 1e-13);
  CHECK(shown.cwiseAbs().maxCoeff() > 5e-4);
}

TEST_CASE("The girder's deflection is that of the keel from its chord", "[unit][recovery]")
{
  const HandStructure hull = carlin::testing::box_hull(small_box());
  VectorX displacement = VectorX::Zero(hull.structure.stiffness.rows());
  for (std::size_t n = 0; n < hull.structure.nodes.size(); ++n)
  {
    const double x = hull.structure.nodes[n].x();
    displacement[6 * static_cast<Index>(n) + 2] = -1e-3 * x * (6.0 - x);
  }
  add_rigid(hull.structure, {0, 0, 0.5}, {0.0, 0.02, 0.0}, displacement);
  const GirderDeflection whole = girder_deflection(hull.structure, displacement, 0.0, 6.0);
  CHECK_THAT(whole.deflection, WithinRel(-9e-3, 1e-9)); // sagging: down
  CHECK_THAT(whole.x, WithinAbs(3.0, 1e-9));
  CHECK(whole.chord == 6.0);
  // Between x = 0 and 3: parabola of the same curvature, a quarter of the sag, read at x = 1.5.
  CHECK_THAT(girder_deflection(hull.structure, displacement, 0.0, 3.0).deflection,
             WithinRel(-9e-3 / 4.0, 1e-9));
  CHECK_THROWS_WITH(girder_deflection(hull.structure, displacement, 0.0, 8.0),
                    Contains("no bottom plating along the centreline"));
}

TEST_CASE("A member's spans end at plates and primary members that cross it", "[unit][recovery]")
{
  HandStructure hand;
  const Index section = hand.add_section(plate()), profile = hand.add_section(bar());
  const Index plating = hand.add_plate_part("plating");
  const Index bulkhead = hand.add_plate_part("bulkhead", PlateKind::bulkhead);
  const Index other_plating = hand.add_plate_part("doubler");
  hand.add_plate(plating, section, {{{0, 0, 0}, {4, 0, 0}, {4, 1, 0}, {0, 1, 0}}}, 40, 4);
  hand.add_plate(bulkhead, section, {{{2.4, 0, 0}, {2.4, 1, 0}, {2.4, 1, 0.5}, {2.4, 0, 0.5}}}, 4,
                 2);
  // Plating of another part that touches the run in one point of the same plane supports nothing.
  const std::array<Index, 4> diamond{hand.add_point({3.2, 0.5, 0}), hand.add_point({3.3, 0.75, 0}),
                                     hand.add_point({3.2, 1, 0}), hand.add_point({3.1, 0.75, 0})};
  hand.structure.shells.push_back(
      {diamond, other_plating, section, static_cast<Index>(hand.mesh.cells.size())});
  hand.mesh.cells.push_back({diamond, other_plating});
  const Index stringer = hand.add_member_part("stringer"), frame = hand.add_member_part("frame");
  hand.add_run(stringer, profile, {0, 0.5, 0}, {4, 0.5, 0}, 40, Vector3::UnitZ());
  hand.add_run(frame, profile, {1, 0, 0}, {1, 1, 0}, 4, Vector3::UnitZ());
  hand.finish();
  VectorX displacement = VectorX::Zero(hand.structure.stiffness.rows());
  for (std::size_t n = 0; n < hand.structure.nodes.size(); ++n)
    displacement[6 * static_cast<Index>(n) + 2] = -1e-3 * std::pow(hand.structure.nodes[n].x(), 2);
  add_rigid(hand.structure, {0, 0, 0.5}, {0.01, 0.02, 0.03}, displacement);

  const auto spans_of = [&](Index part)
  {
    std::vector<double> spans;
    for (const MemberDeflection& found :
         member_deflections(hand.structure, member_spans(hand.structure), displacement))
      if (found.part == part)
      {
        spans.push_back(found.span);
        // Parabola w = -c x^2 lies c L^2 / 4 above its chord at the middle.
        const double sag = part == stringer ? 1e-3 * found.span * found.span / 4.0 : 0.0;
        CHECK_THAT(found.deflection, WithinAbs(sag, 1e-12));
      }
    return spans;
  };
  SECTION("a secondary frame supports nothing")
  {
    const std::vector<double> spans = spans_of(stringer);
    REQUIRE(spans.size() == 2);
    CHECK_THAT(spans[0], WithinRel(2.4, 1e-9));
    CHECK_THAT(spans[1], WithinRel(1.6, 1e-9));
  }
  SECTION("a primary frame does")
  {
    hand.mesh.parts[static_cast<std::size_t>(frame)].is_primary = true;
    const std::vector<double> spans = spans_of(stringer);
    REQUIRE(spans.size() == 3);
    CHECK_THAT(spans[0], WithinRel(1.0, 1e-9));
    CHECK(spans_of(frame).size() == 1); // the stringer does not support it
  }
}

TEST_CASE("A rigid motion of a curved member is no deflection", "[unit][recovery]")
{
  HandStructure hand;
  const Index profile = hand.add_section(bar()), part = hand.add_member_part("stringer");
  hand.add_run(part, profile, {0, 0, 0}, {3, 0, 0}, 12, Vector3::UnitZ());
  for (std::vector<Vector3>* places : {&hand.structure.nodes, &hand.mesh.points})
    for (Vector3& at : *places)
      at.y() = 0.3 * std::sin(at.x()); // curved in plan
  hand.finish();
  VectorX displacement = VectorX::Zero(hand.structure.stiffness.rows());
  add_rigid(hand.structure, {0.1, 0.2, 0.3}, {0.05, 0.02, -0.04}, displacement);
  const std::vector<MemberDeflection> found =
      member_deflections(hand.structure, member_spans(hand.structure), displacement);
  REQUIRE(found.size() == 1);
  CHECK_THAT(found[0].deflection, WithinAbs(0.0, 1e-14));
}

// Cantilever of flat bar 60 x 6: M / W at the root, 6 F L / (t h^2); shear F / (5/6 A).
TEST_CASE("Member stress is the member formula at the outline", "[unit][recovery]")
{
  HandStructure hand;
  hand.add_run(hand.add_member_part("bar"), hand.add_section(bar()), {0, 0, 0}, {0.5, 0, 0}, 5,
               Vector3::UnitZ());
  hand.hold(0, {0, 1, 2, 3, 4, 5});
  hand.finish();
  constexpr double force = -200.0, pull = 1000.0;
  VectorX forces = VectorX::Zero(hand.structure.stiffness.rows());
  forces[6 * 5 + 2] = force;
  forces[6 * 5 + 0] = pull;
  StageSolution stage;
  stage.displacement = HullSolver(hand.structure).solve(forces);
  const std::vector<MemberStress> found = member_stresses(hand.structure, stage);
  const double area = 0.06 * 0.006, modulus = 0.006 * 0.06 * 0.06 / 6.0;
  CHECK_THAT(found[0].nominal,
             WithinRel(pull / area + 200.0 * 0.5 / modulus, 1e-8)); // top in tension
  CHECK_THAT(found[0].shear, WithinRel(200.0 / (area * 5.0 / 6.0), 1e-6));
  CHECK_THAT(found[0].place.x(), WithinAbs(0.0, 1e-12));
  // The end load of a fixed-end moment is taken off: held everywhere, a line load still bends.
  stage.displacement.setZero();
  stage.member_fixed_end.assign(hand.structure.members.size(), Vector12::Zero());
  const MemberGeometry geometry = member_geometry(hand.structure, hand.structure.members[0]);
  stage.member_fixed_end[0] =
      member_line_load(geometry, hand.structure.member_sections[0], {0.0, 0.0, -1000.0});
  CHECK_THAT(std::abs(member_stresses(hand.structure, stage)[0].nominal),
             WithinRel(1000.0 * 0.1 * 0.1 / 12.0 / modulus, 1e-8)); // q L^2 / 12
}

TEST_CASE("Joint loads are per metre in the joint's own axes", "[unit][recovery]")
{
  HandStructure hand;
  const Index other = hand.add_point({0, 0, 0}), part = hand.add_copy(other);
  JointSpring spring;
  spring.joint = 0;
  spring.node_part = part;
  spring.node_other = other;
  spring.axes << 0, 0, 1, 1, 0, 0, 0, 1, 0; // along y, across z, normal x
  spring.stiffness = {1e8, 2e8, 3e8, 4e4};
  spring.tributary_length = 0.25;
  hand.structure.joints.push_back(spring);
  StageSolution stage;
  stage.displacement = VectorX::Zero(12);
  stage.displacement.segment<3>(6 * part) = Vector3(3e-6, 1e-6, 2e-6);
  stage.displacement[6 * other + 1] = 0.5e-6;
  stage.displacement[6 * part + 4] = 1e-3;
  const JointLoad load = joint_loads(hand.structure, stage).front();
  CHECK_THAT(load.along, WithinRel(1e8 * 0.5e-6 / 0.25, 1e-12));
  CHECK_THAT(load.across, WithinRel(2e8 * 2e-6 / 0.25, 1e-12));
  CHECK_THAT(load.normal, WithinRel(3e8 * 3e-6 / 0.25, 1e-12));
  CHECK_THAT(load.rotation, WithinRel(4e4 * 1e-3 / 0.25, 1e-12));
  CHECK_THAT(load.slip, WithinRel(0.5e-6, 1e-12));
}
