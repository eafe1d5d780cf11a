#include "box_mesh.hpp"

#include "carlin/core/error.hpp"
#include "carlin/solution/hull_solver.hpp"
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
/// Level deck 3 x 1 m of three pieces, the middle one a hatch with a stiffener on it; a carling
/// along one edge of the hatch and a pillar under its middle.
MeshBuilder deck_with_hatch()
{
  MeshBuilder builder;
  const auto piece = [&](const std::string& name, double from, double to)
  {
    builder.plate(name, "plate",
                  {Vector3(from, 0, 0), Vector3(to, 0, 0), Vector3(to, 1, 0), Vector3(from, 1, 0)},
                  {2, 2});
  };
  piece("deck-aft", 0, 1);
  piece("hatch", 1, 2);
  piece("deck-forward", 2, 3);
  builder.member("hatch-stiffener", "bar", Vector3(1, 0.5, 0), Vector3(2, 0.5, 0), 2,
                 -Vector3::UnitZ());
  builder.member("carling", "bar", Vector3(1, 0, 0), Vector3(1, 1, 0), 2, -Vector3::UnitZ());
  return builder;
}

Joint fastened(const std::string& part, double stiffness)
{
  Joint joint;
  joint.name = "bolts";
  joint.part = part;
  joint.stiffness_along = stiffness;
  joint.stiffness_across = stiffness;
  joint.stiffness_normal = stiffness;
  joint.stiffness_rotation = stiffness * 1e-2;
  return joint;
}

Structure built(const Mesh& mesh)
{
  return build_structure(test::small_model(), ConfiguredCraft{}, mesh, Outfit{});
}

/// Deflection at the middle of the hatch's outer edge under unit force, deck clamped at both ends.
double hatch_deflection(MeshBuilder builder)
{
  Model model = test::small_model();
  builder.named_point("a", Vector3(0, 0, 0));
  builder.named_point("b", Vector3(0, 1, 0));
  builder.named_point("c", Vector3(3, 0, 0));
  builder.named_point("d", Vector3(3, 1, 0));
  builder.named_point("load", Vector3(1.5, 1, 0));
  Support ends;
  ends.name = "ends";
  ends.edges = {{"a", "b"}, {"c", "d"}};
  ends.holds.fill(true);
  model.frame.emplace();
  model.frame->supports = {ends};
  const Structure structure = build_structure(model, ConfiguredCraft{}, builder.mesh, Outfit{});
  const HullSolver solver(structure);
  VectorX force = VectorX::Zero(structure.stiffness.rows());
  const Index freedom = 6 * node_at(structure, "load") + 2;
  force[freedom] = 1.0;
  return solver.solve(force)(freedom, 0);
}
} // namespace

TEST_CASE("A fastened part is split along its edges with its own stiffeners", "[unit][joint]")
{
  MeshBuilder builder = deck_with_hatch();
  CHECK(built(builder.mesh).nodes.size() == 21);
  builder.mesh.joints.push_back(fastened("hatch", 1e8));
  const Structure structure = built(builder.mesh);
  CHECK(structure.nodes.size() == 27); // three points at each of two edges are doubled
  CHECK(structure.joints.size() == 6);

  // The stiffener's end shares the hatch's copy, the carling the deck's.
  const auto part_named = [&](const std::string& name)
  {
    for (std::size_t p = 0; p < builder.mesh.parts.size(); ++p)
      if (builder.mesh.parts[p].name == name)
        return static_cast<Index>(p);
    return Index{-1};
  };
  const auto uses = [&](Index node, const std::string& part)
  {
    for (const Shell& shell : structure.shells)
      if (shell.part == part_named(part) &&
          std::find(shell.nodes.begin(), shell.nodes.end(), node) != shell.nodes.end())
        return true;
    return false;
  };
  for (const Member& member : structure.members)
  {
    const bool is_stiffener = member.part == part_named("hatch-stiffener");
    for (const Index node : member.nodes)
    {
      CHECK(uses(node, "hatch") == is_stiffener);
      CHECK(uses(node, "deck-aft") == !is_stiffener);
    }
    if (is_stiffener) // both stop at the first segment's aft end
      break;
  }
  double length = 0.0;
  for (const JointSpring& spring : structure.joints)
  {
    CHECK(uses(spring.node_part, "hatch"));
    CHECK_FALSE(uses(spring.node_other, "hatch"));
    CHECK_THAT(std::abs(spring.axes(1, 0)), WithinAbs(1.0, 1e-15)); // along the edge
    CHECK_THAT(std::abs(spring.axes(2, 2)), WithinAbs(1.0, 1e-15)); // normal to the hatch
    const double y = structure.nodes[static_cast<std::size_t>(spring.node_part)].y();
    CHECK_THAT(spring.tributary_length, WithinRel(y > 0.1 && y < 0.9 ? 0.5 : 0.25, 1e-12));
    CHECK_THAT(spring.stiffness[0], WithinRel(1e8 * spring.tributary_length, 1e-12));
    length += spring.tributary_length;
  }
  CHECK_THAT(length, WithinRel(2.0, 1e-12));
}

TEST_CASE("Where parts meet in a point only, a joint does not part them", "[unit][joint]")
{
  MeshBuilder builder = deck_with_hatch();
  builder.beam("pillar", "bar", Vector3(1.5, 0.5, -1), Vector3(1.5, 0.5, 0), 1);
  builder.mesh.joints.push_back(fastened("hatch", 1e8));
  CHECK(built(builder.mesh).nodes.size() == 28); // one more than without: the pillar's foot
}

TEST_CASE("A stiff joint is as good as a weld and a soft one lets go", "[unit][joint]")
{
  MeshBuilder builder = deck_with_hatch();
  const double welded = hatch_deflection(builder);
  double last = welded;
  builder.mesh.joints.push_back({});
  for (const double stiffness : {1e12, 1e8, 1e6, 1e4, 1e2})
  {
    builder.mesh.joints[0] = fastened("hatch", stiffness);
    const double deflection = hatch_deflection(builder);
    CAPTURE(stiffness, welded, deflection);
    if (stiffness == 1e12)
      // The springs leave the two turns across the line free: little is lost, and nothing gained.
      CHECK_THAT(deflection, WithinRel(welded, 2e-3));
    CHECK(deflection >= last * (1.0 - 1e-9));
    last = deflection;
  }
  // In the limit the hatch rides on its springs: 2 m of joint, force at one edge. As a rigid body
  // on two lines along y it turns about x too: w = F/(2 k) (1 + 0.5^2 / (1/12 + ...)).
  CHECK(last > 1.0 / (1e2 * 2.0));
  builder.mesh.joints[0] = fastened("hatch", 0.0);
  CHECK_THROWS_WITH(hatch_deflection(builder),
                    Contains("hatch and hatch-stiffener are not joined to anything else"));
}

TEST_CASE("A joint that cannot be made is named", "[unit][joint]")
{
  MeshBuilder builder = deck_with_hatch();
  builder.mesh.joints.push_back(fastened("lid", 1e8));
  CHECK_THROWS_WITH(built(builder.mesh), Contains("joint 'bolts': part 'lid' is not in this"));

  MeshBuilder apart;
  apart.plate("hatch", "plate",
              {Vector3(0, 0, 0), Vector3(1, 0, 0), Vector3(1, 1, 0), Vector3(0, 1, 0)}, {2, 2});
  apart.mesh.joints.push_back(fastened("hatch", 1e8));
  CHECK_THROWS_WITH(built(apart.mesh), Contains("'hatch' meets no other part along an edge"));

  builder.mesh.joints = {fastened("hatch", 1e8), fastened("hatch", 1e7)};
  builder.mesh.joints[1].name = "bond";
  CHECK_THROWS_WITH(built(builder.mesh), Contains("'bond'") && Contains("'bolts' too"));
}
