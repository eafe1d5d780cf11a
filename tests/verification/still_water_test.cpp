// Part J of the verification book: hydrostatics. All values computed; closed forms derived there.
#include "box_mesh.hpp"

#include "carlin/core/error.hpp"
#include "carlin/loads/loads.hpp"
#include "carlin/solution/hull_solver.hpp"

#include <catch2/catch.hpp>
#include <numbers>

using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using namespace carlin;
using test::MeshBuilder;

namespace
{
Structure built(const Mesh& mesh)
{
  return build_structure(test::small_model(), ConfiguredCraft{}, mesh, Outfit{});
}

MassProperties body(double mass, double x, double z)
{
  return {mass, Vector3(x, 0, z), Matrix3::Identity()};
}

/// What is left of force and moment with the weight taken along the normal of the water.
Vector6 left_over(const Structure& structure, const Flotation& flotation,
                  const MassProperties& craft)
{
  Vector6 sum = resultant(structure, flotation.load.forces, craft.centre);
  sum.head<3>() -= craft.mass * standard_gravity * flotation.up;
  return sum;
}
} // namespace

TEST_CASE("A box barge floats at the draught and trim of the closed form", "[verification][water]")
{
  // J1: L 12, B 3.2 m, m 30 t, G at x 5.6, z 0.9; the exact method, 1e-8: pressure is integrated
  // exactly on flat faces whatever the mesh, so a coarse one will do.
  MeshBuilder builder;
  test::add_box(builder, {.length = 12, .beam = 3.2, .depth = 1.7, .cells = {7, 3, 3}});
  const Structure structure = built(builder.mesh);
  const MassProperties craft = body(30000, 5.6, 0.9);
  const Flotation flotation = still_water(structure, craft);
  CHECK_THAT(flotation.trim, WithinRel(-0.0262630435, 1e-8));
  CHECK_THAT(flotation.draught, WithinRel(0.919773383, 1e-8));
  CHECK_THAT(flotation.draught + 12.0 * flotation.trim, WithinRel(0.604616861, 1e-8));
  CHECK_THAT(flotation.heel, WithinAbs(0.0, 1e-10));
  CHECK_THAT(flotation.displaced_mass, WithinRel(30000.0, 1e-10));
  const double weight = 30000 * standard_gravity;
  CHECK(left_over(structure, flotation, craft).cwiseAbs().maxCoeff() < 1e-9 * weight);

  // Level with its G amidships: T = m/(rho L B).
  const Flotation level = still_water(structure, body(30000, 6.0, 0.9));
  CHECK_THAT(level.draught, WithinRel(0.762195122, 1e-8));
  CHECK_THAT(level.trim, WithinAbs(0.0, 1e-10));

  // Heel by a weight off the centreline, wall-sided: with B and G on one normal the same closed
  // form as for trim holds across, B for L. Small heel: d/GM, GM = KB + BM - zG.
  MassProperties offset = body(30000, 6.0, 0.9);
  offset.centre.y() = 1e-5;
  const double metacentric_height = 0.381097561 + 1.11957333 - 0.9;
  CHECK_THAT(still_water(structure, offset).heel, WithinRel(1e-5 / metacentric_height, 1e-6));
}

TEST_CASE("A V hull floats at the draught and trim of the closed form", "[verification][water]")
{
  // J2: deadrise 20 deg, L 9.0, chine beam 2.6 m. The book prints the trims to 6 digits.
  MeshBuilder builder;
  test::add_vee_hull(builder, {.deadrise = 20.0 * std::numbers::pi / 180.0, .cells = {5, 3, 3}});
  const Structure structure = built(builder.mesh);

  const MassProperties dry = body(4000, 4.2, 0.75);
  const Flotation trimmed = still_water(structure, dry);
  CHECK_THAT(trimmed.trim, WithinAbs(-0.00897127, 0.5e-8));
  CHECK_THAT(trimmed.draught, WithinAbs(0.436950873, 1e-8));
  CHECK_THAT(trimmed.draught + 9.0 * trimmed.trim, WithinAbs(0.356209404, 1e-8));
  CHECK(left_over(structure, trimmed, dry).cwiseAbs().maxCoeff() < 1e-9 * 4000 * 9.80665);

  CHECK_THAT(still_water(structure, body(4000, 4.5, 0.75)).draught, WithinRel(0.397264486, 1e-8));
  CHECK_THAT(still_water(structure, body(9500, 4.5, 0.75)).draught, WithinRel(0.632661536, 1e-8));
  // c) the chine just wets
  CHECK_THAT(still_water(structure, body(5674.38694, 4.5, 0.75)).draught,
             WithinRel(0.473161305, 1e-8));
}

TEST_CASE("A hull that would be swamped is refused", "[unit][water]")
{
  MeshBuilder builder;
  test::add_box(builder, {.length = 12, .beam = 3.2, .depth = 0.7, .cells = {6, 2, 2}});
  const Structure structure = built(builder.mesh);
  CHECK_THROWS_WITH(still_water(structure, body(30000, 6, 0.5)),
                    Contains("cannot carry 30000 kg") && Contains("swamped"));
  CHECK_THROWS_WITH(still_water(structure, body(20000, 4.2, 0.5)), Contains("still water"));

  MeshBuilder beam;
  beam.beam("beam", "bar", Vector3(0, 0, 0), Vector3(1, 0, 0), 1);
  CHECK_THROWS_WITH(still_water(built(beam.mesh), body(10, 0, 0)), Contains("no outer shell"));
}

TEST_CASE("Afloat with gravity along the water's normal the pins carry nothing",
          "[verification][water]")
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {9, 4, 2}, .bulkheads = {3.0, 6.0}});
  const Structure structure = built(builder.mesh);
  const MassProperties& craft = structure.mass_properties;
  const Flotation flotation = still_water(structure, craft);
  const VectorX forces = flotation.load.forces + gravity_forces(structure, flotation.up);
  const HullSolver solver(structure);
  const double weight = craft.mass * standard_gravity;
  CHECK(solver.reactions(solver.solve(forces), forces).cwiseAbs().maxCoeff() < 1e-8 * weight);
}
