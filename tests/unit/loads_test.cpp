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
constexpr double degree = std::numbers::pi / 180.0;
constexpr double knot = 1852.0 / 3600.0;

Structure built(const Mesh& mesh)
{
  return build_structure(test::small_model(), ConfiguredCraft{}, mesh, Outfit{});
}

MeshBuilder launch()
{
  MeshBuilder builder;
  test::add_vee_hull(builder, {.length = 10.0,
                               .chine_beam = 2.8,
                               .depth = 1.7,
                               .deadrise = 18.0 * degree,
                               .cells = {17, 4, 3}});
  return builder;
}

Craft launch_figures()
{
  Craft craft;
  craft.waterline_length = 10.0;
  craft.chine_beam = 2.8;
  craft.deadrise = 18.0 * degree;
  craft.speed = 25.0 * knot;
  craft.design_category = 'B';
  return craft;
}
} // namespace

TEST_CASE("The small-craft factors reproduce the worked example", "[verification][loads]")
{
  // Loads book 1.1 and 10.1: published calculation of a 4.5 m category D boat to ISO 12215-5:2008
  // (source S31 there), printed digits.
  const SmallCraftFactors factors =
      small_craft_factors(625.0, 4.0, 1.2, 17.0 * degree, 9.5 * knot, 'D');
  CHECK_THAT(factors.dynamic_load_factor, WithinAbs(0.9164, 0.5e-4));
  CHECK_THAT(factors.bottom_base_displacement, WithinAbs(40084.0, 0.5));
  CHECK_THAT(factors.bottom_base_planing, WithinAbs(20567.0, 0.5));
  CHECK_THAT(factors.side_minimum, WithinAbs(1440.0, 0.5));
  CHECK_THAT(factors.deck_base, WithinAbs(16000.0, 0.5));
  CHECK(factors.notes.size() == 2);
}

TEST_CASE("Values outside the standard's range are refused", "[unit][loads]")
{
  const auto factors = [](double mass, double deadrise, double speed, char category)
  { return small_craft_factors(mass, 10.0, 2.8, deadrise, speed, category); };
  CHECK_NOTHROW(factors(9500, 10.0 * degree, 25 * knot, 'B'));
  CHECK_THROWS_WITH(factors(0, 18 * degree, 12, 'B'), Contains("mass is 0 kg"));
  CHECK_THROWS_WITH(factors(9500, 0.0, 12, 'B'), Contains("deadrise is 0 deg"));
  CHECK_THROWS_WITH(factors(9500, 18 * degree, 60 * knot, 'B'), Contains("speed is 60 kn"));
  CHECK_THROWS_WITH(factors(9500, 18 * degree, 12, 'E'), Contains("design_category is 'E'"));
}

TEST_CASE("High load factors follow the lesser of two formulas within limits", "[unit][loads]")
{
  // Light and fast: formula 1 gives 0.32 (10/28 + 0.084) 32 x 2500 x 7.84/3000 = 29.5; formula 2
  // 0.5 x 50/3000^0.17 = 6.41: the lesser.
  const SmallCraftFactors factors =
      small_craft_factors(3000.0, 10.0, 2.8, 18 * degree, 50 * knot, 'A');
  CHECK_THAT(factors.dynamic_load_factor, WithinRel(25.0 / std::pow(3000.0, 0.17), 1e-12));
}

TEST_CASE("A landing patch lifts exactly mass times g (1 + n)", "[unit][loads]")
{
  const MeshBuilder builder = launch();
  const Structure structure = built(builder.mesh);
  const Craft craft = launch_figures();
  const double mass = 9500.0;
  for (const Sides sides : {Sides::both, Sides::port, Sides::starboard})
    for (const PatchPlace place : {PatchPlace::forward, PatchPlace::amidships, PatchPlace::aft})
    {
      Landing landing;
      landing.place = place;
      landing.sides = sides;
      landing.by_standard = true;
      const LandingLoad load = landing_load(structure, landing, craft, mass);
      const double n =
          small_craft_factors(mass, 10.0, 2.8, 18 * degree, 25 * knot, 'B').dynamic_load_factor;
      CHECK_THAT(load.acceleration, WithinRel(n * standard_gravity, 1e-9));
      const Vector6 sum = resultant(structure, load.load.forces, Vector3::Zero());
      CHECK_THAT(sum.z(), WithinRel(mass * standard_gravity * (1 + n), 1e-9));
      // A prism: the pressure acts on the developed area, upward on its projection.
      CHECK_THAT(load.pressure * load.area * std::cos(18 * degree), WithinRel(sum.z(), 1e-9));
      CHECK_THAT((load.x_to - load.x_from) * (sides == Sides::both ? 2.8 : 1.4),
                 WithinRel(load.area * std::cos(18 * degree), 1e-9));
      CHECK(load.area > 4.0); // loads book, section 1: 4 to 5 m2
      CHECK(load.area < 5.0);
      if (sides == Sides::both)
      {
        const double middle =
            place == PatchPlace::forward ? 7.5 : (place == PatchPlace::aft ? 2.5 : 5.0);
        CHECK_THAT(0.5 * (load.x_from + load.x_to), WithinAbs(middle, 1e-9));
        CHECK_THAT(sum[4], WithinRel(-middle * sum.z(), 2e-2)); // shared over whole cells
        CHECK_THAT(sum.y(), WithinAbs(0.0, 1e-6 * sum.z()));
      }
      else
        CHECK((sides == Sides::port) == (sum.y() < 0.0)); // pushed away from the wet side
    }
}

TEST_CASE("With pressure and length given, a landing's acceleration is the result", "[unit][loads]")
{
  const MeshBuilder builder = launch();
  const Structure structure = built(builder.mesh);
  Landing landing;
  landing.pressure = 80e3;
  landing.length = 1.3;
  const LandingLoad load = landing_load(structure, landing, launch_figures(), 9500.0);
  CHECK_THAT(load.acceleration, WithinRel(80e3 * 1.3 * 2.8 / 9500.0 - standard_gravity, 1e-12));
  CHECK_THAT(load.x_to - load.x_from, WithinRel(1.3, 1e-12));
}

TEST_CASE("A landing that cannot be made is refused", "[unit][loads]")
{
  const MeshBuilder builder = launch();
  const Structure structure = built(builder.mesh);
  Landing landing;
  landing.acceleration = 30.0;
  landing.pressure = 5e3;
  CHECK_THROWS_WITH(landing_load(structure, landing, launch_figures(), 9500.0),
                    Contains("over the whole bottom lifts") && Contains("give a higher pressure"));
  landing.acceleration.reset();
  CHECK_THROWS_WITH(landing_load(structure, landing, launch_figures(), 9500.0),
                    Contains("give an acceleration, or a pressure and the length"));
  MeshBuilder beam;
  beam.beam("beam", "bar", Vector3(0, 0, 0), Vector3(1, 0, 0), 1);
  landing.acceleration = 30.0;
  CHECK_THROWS_WITH(landing_load(built(beam.mesh), landing, launch_figures(), 9500.0),
                    Contains("no bottom plating"));
}

TEST_CASE("Gravity weighs the structure at its centre", "[unit][loads]")
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {6, 4, 2}, .bulkheads = {3.0}});
  const Structure structure = built(builder.mesh);
  const MassProperties& body = structure.mass_properties;
  const Vector6 sum = resultant(structure, gravity_forces(structure), body.centre);
  const double weight = body.mass * standard_gravity;
  CHECK_THAT(sum.z(), WithinRel(-weight, 1e-12));
  CHECK(sum.tail<3>().norm() < 1e-10 * weight);
}

TEST_CASE("Forces on points, footprints, members and parts add up", "[unit][loads]")
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {9, 4, 2}, .bulkheads = {3.0}});
  builder.mesh.stations = {{"aft", 0.0, 0.0}, {"frame-3", 3.0, 0.0}, {"frame-6", 6.0, 0.0}};
  builder.member("stringer", "bar", Vector3(0, 0, 0), Vector3(9, 0, 0), 9, Vector3::UnitZ());
  builder.named_point("corner", Vector3(9, 1.3, 1.2));
  const Structure structure = built(builder.mesh);

  DirectForce at_point;
  at_point.point = "corner";
  at_point.force = Vector3(1, 2, 3);
  at_point.moment = Vector3(4, 5, 6);
  Vector6 sum =
      resultant(structure, direct_force(structure, at_point).forces, Vector3(9, 1.3, 1.2));
  CHECK((sum - (Vector6() << 1, 2, 3, 4, 5, 6).finished()).norm() < 1e-13);

  DirectForce spread = at_point;
  spread.point.clear();
  spread.footprint = FootprintArea{Vector3(4.2, 0.3, 0), 2.2, 1.4, {"bottom"}};
  sum = resultant(structure, direct_force(structure, spread).forces, Vector3(4.2, 0.3, 0));
  CHECK((sum - (Vector6() << 1, 2, 3, 4, 5, 6).finished()).norm() < 1e-12);

  LineForce line;
  line.members = {"stringer"};
  line.force_per_length = Vector3(0, 10, -100);
  const HullLoad on_line = line_force(structure, line);
  sum = resultant(structure, on_line.forces, Vector3(4.5, 0, 0.04)); // on the centroid line
  CHECK((sum - (Vector6() << 0, 90, -900, 0, 0, 0).finished()).norm() < 1e-10);
  CHECK(on_line.member_loads.size() == 9);

  PartPressure pressure;
  pressure.parts = {"bottom"};
  pressure.pressure = 1000.0;
  pressure.stations = {"frame-3", "frame-6"};
  const HullLoad on_part = part_pressure(structure, pressure);
  sum = resultant(structure, on_part.forces, Vector3(4.5, 0, 0));
  CHECK((sum - (Vector6() << 0, 0, 7800, 0, 0, 0).finished()).norm() < 1e-9);
  CHECK(on_part.shell_pressures.size() == 12);

  line.members = {"strnger"};
  CHECK_THROWS_WITH(line_force(structure, line), Contains("part 'strnger'"));
  line.members = {"bottom"};
  CHECK_THROWS_WITH(line_force(structure, line), Contains("none of the named parts is a member"));
  pressure.stations.to = "frame-7";
  CHECK_THROWS_WITH(part_pressure(structure, pressure), Contains("station 'frame-7'"));
}

TEST_CASE("A free box warmed evenly grows without stress", "[unit][loads]")
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {6, 4, 2}});
  const Structure structure = built(builder.mesh);
  const VectorX forces =
      thermal_forces(structure, std::vector<double>(builder.mesh.parts.size(), 40.0));
  CHECK(resultant(structure, forces, Vector3::Zero()).cwiseAbs().maxCoeff() <
        1e-9 * forces.cwiseAbs().maxCoeff());
  const VectorX u = HullSolver(structure).solve(forces);
  const Index a = nearest_node(structure, Vector3(0, -1.3, 0));
  const Index b = nearest_node(structure, Vector3(9, 1.3, 1.2));
  const Vector3 span(9, 2.6, 1.2);
  const double stretch = (u.segment<3>(6 * b) - u.segment<3>(6 * a)).dot(span) / span.norm();
  CHECK_THAT(stretch, WithinRel(23.8e-6 * 40.0 * span.norm(), 1e-3)); // plates inside their line
}
