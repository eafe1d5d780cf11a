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
MeshBuilder box_with_stringer()
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {6, 4, 2}, .bulkheads = {3.0, 6.0}});
  builder.member("stringer", "bar", Vector3(0, 0, 0), Vector3(9, 0, 0), 6, Vector3::UnitZ());
  return builder;
}

const MassEntry& entry(const Structure& structure, const std::string& name)
{
  const auto found = std::find_if(structure.mass_account.begin(), structure.mass_account.end(),
                                  [&](const MassEntry& row) { return row.name == name; });
  REQUIRE(found != structure.mass_account.end());
  return *found;
}

Equipment engine()
{
  Equipment engine;
  engine.name = "engine";
  engine.mass = 600.0;
  engine.centre = Vector3(2.0, 0.1, 0.55);
  engine.footprints = {
      {.centre = Vector3(2.0, 0.0, 0.0), .length = 2.0, .width = 1.4, .parts = {}}};
  return engine;
}
} // namespace

TEST_CASE("The mass account equals the sum by hand", "[unit][mass]")
{
  Model model = test::small_model();
  model.craft.weld_allowance = 0.06;
  ConfiguredCraft craft;
  craft.equipment = {engine()};
  const MeshBuilder builder = box_with_stringer();
  const Structure structure = build_structure(model, craft, builder.mesh, Outfit{});

  const double rho_t = 2660.0 * 0.005; // [kg/m^2]
  CHECK_THAT(entry(structure, "bottom").mass, WithinRel(9.0 * 2.6 * rho_t, 1e-12));
  CHECK_THAT(entry(structure, "bottom").centre.z(), WithinAbs(0.0025, 1e-12)); // inside the line
  CHECK_THAT(entry(structure, "side-port").mass, WithinRel(9.0 * 1.2 * rho_t, 1e-12));
  CHECK_THAT(entry(structure, "side-port").centre.y(), WithinAbs(1.3 - 0.0025, 1e-12));
  CHECK_THAT(entry(structure, "bulkhead-2").mass, WithinRel(2.6 * 1.2 * rho_t, 1e-12));
  CHECK_THAT(entry(structure, "bulkhead-2").centre.x(), WithinAbs(6.0025, 1e-12));
  CHECK_THAT(entry(structure, "stringer").mass, WithinRel(9.0 * 0.07 * 0.007 * 2660.0, 1e-12));
  CHECK_THAT(entry(structure, "stringer").centre.z(), WithinAbs(0.005 + 0.035, 1e-12));
  CHECK(entry(structure, "stringer").group == "members");
  const double metal =
      (2 * 9.0 * 2.6 + 2 * 9.0 * 1.2 + 4 * 2.6 * 1.2) * rho_t + 9.0 * 0.07 * 0.007 * 2660.0;
  CHECK_THAT(entry(structure, "weld allowance").mass, WithinRel(0.06 * metal, 1e-12));
  CHECK(entry(structure, "engine").mass == 600.0);

  // The matrix weighs what the account says, and has its centre there.
  double mass = 0.0;
  Vector3 moment = Vector3::Zero();
  for (const MassEntry& row : structure.mass_account)
  {
    mass += row.mass;
    moment += row.mass * row.centre;
  }
  CHECK_THAT(mass, WithinRel(1.06 * metal + 600.0, 1e-12));
  CHECK_THAT(structure.mass_properties.mass, WithinRel(mass, 1e-12));
  CHECK((structure.mass_properties.centre - moment / mass).norm() < 1e-11);
}

TEST_CASE("Parts of one family are one row of the mass account", "[unit][mass]")
{
  MeshBuilder builder = box_with_stringer();
  for (MeshPart& part : builder.mesh.parts)
    if (part.name.starts_with("bulkhead"))
      part.family = "bulkheads";
  const Structure structure =
      build_structure(test::small_model(), ConfiguredCraft{}, builder.mesh, Outfit{});
  CHECK_THAT(entry(structure, "bulkheads").mass, WithinRel(2 * 2.6 * 1.2 * 2660.0 * 0.005, 1e-12));
}

TEST_CASE("Equipment pulls at its own centre of gravity and stiffens nothing", "[unit][mass]")
{
  const Model model = test::small_model();
  const MeshBuilder builder = box_with_stringer();
  const Structure bare = build_structure(model, ConfiguredCraft{}, builder.mesh, Outfit{});
  ConfiguredCraft craft;
  craft.equipment = {engine()};
  const Structure laden = build_structure(model, craft, builder.mesh, Outfit{});
  CHECK((laden.stiffness - bare.stiffness).norm() == 0.0);

  // The difference is a point mass: 600 kg at its centre, inertia by the parallel axes alone.
  const double m = 600.0, M = bare.mass_properties.mass;
  const Vector3 d = craft.equipment[0].centre - bare.mass_properties.centre;
  const Matrix3 expected =
      bare.mass_properties.inertia +
      m * M / (m + M) * (d.squaredNorm() * Matrix3::Identity() - d * d.transpose());
  CHECK((laden.mass_properties.inertia - expected).norm() < 1e-11 * expected.norm());
}

TEST_CASE("The outfit brings mass and length of the centre of gravity to what is stated",
          "[unit][mass]")
{
  Model model = test::small_model();
  model.craft.displacement = 4000.0;
  model.craft.centre_of_gravity = Vector3(3.6, 0.0, 0.7);
  ConfiguredCraft base;
  base.equipment = {engine()};
  Tank tank;
  tank.axis_from = Vector3(5, 0, 0.5);
  tank.axis_to = Vector3(7, 0, 0.5);
  tank.mass = 100.0;
  tank.contents_mass = 8.0;
  base.tanks = {tank};
  const MeshBuilder builder = box_with_stringer();
  const Outfit outfit = base_outfit(model, base, builder.mesh);
  const Structure structure = build_structure(model, base, builder.mesh, outfit);

  CHECK(outfit.decay < 0.0); // more of it aft
  CHECK_THAT(structure.mass_properties.mass + 108.0, WithinRel(4000.0, 1e-12));
  const Vector3 centre = (structure.mass_properties.mass * structure.mass_properties.centre +
                          108.0 * Vector3(6, 0, 0.5)) /
                         4000.0;
  CHECK_THAT(centre.x(), WithinAbs(3.6, 1e-9));
  CHECK((centre - *model.craft.centre_of_gravity - outfit.centre_mismatch).norm() < 1e-9);
  for (const auto& [point, mass] : outfit.point_masses)
    CHECK(mass > 0.0);
  CHECK_THAT(entry(structure, "outfit").mass, WithinRel(outfit.mass, 1e-12));

  SECTION("and stays where it was when the deck is opened")
  {
    Mesh opened = builder.mesh;
    const Index deck = 3;
    REQUIRE(opened.parts[deck].name == "deck");
    std::erase_if(opened.cells, [](const Cell& cell) { return cell.part == deck; });
    const Structure open = build_structure(model, base, opened, outfit);
    CHECK_THAT(entry(open, "outfit").mass, WithinRel(outfit.mass, 1e-12));
  }
}

TEST_CASE("A displacement that cannot be met is refused", "[unit][mass]")
{
  Model model = test::small_model();
  const MeshBuilder builder = box_with_stringer();
  model.craft.displacement = 500.0;
  CHECK_THROWS_WITH(base_outfit(model, ConfiguredCraft{}, builder.mesh),
                    Contains("craft.displacement: 500 kg is less than the"));
  model.craft.displacement = 2000.0;
  model.craft.centre_of_gravity = Vector3(9.5, 0, 0);
  CHECK_THROWS_WITH(base_outfit(model, ConfiguredCraft{}, builder.mesh),
                    Contains("craft.centre_of_gravity") && Contains("outside the hull"));
}
