#include "mount_examples.hpp"

#include "carlin/core/error.hpp"

#include <catch2/catch.hpp>

using namespace carlin;
using namespace carlin::testing;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
constexpr double length = 2.0;

std::vector<Tank> two_collar_tank(SlidesAt where, double friction)
{
  Tank tank = bare_tank(length, 4e8);
  tank.collars = {collar_at(tank, "fixed", 0.0, 4e7), collar_at(tank, "sliding", length, 1.5e7)};
  make_slide(tank.collars[1], where, friction);
  return {tank};
}

MountStage weighed(const std::vector<Tank>& tanks, double weight, double growth = 0.0)
{
  MountStage stage = quiet_stage(tanks, growth == 0.0 ? "fitting" : "grown");
  stage.tanks[0].mass = weight / standard_gravity;
  stage.tanks[0].felt = Vector3(0.0, 0.0, -standard_gravity);
  stage.tanks[0].axial_strain = growth / length;
  return stage;
}
} // namespace

TEST_CASE("A frictionless slide lets a tank grow without force", "[unit][mounts]")
{
  const std::vector<Tank> tanks = two_collar_tank(SlidesAt::lining, 0.0);
  const auto results =
      run_history(tanks, rigid_bed(tanks),
                  {weighed(tanks, 3000.0), weighed(tanks, 3000.0, 3.72e-3)}, RangeEnd::high);
  CHECK_THAT(results.at(1).tanks[0].largest_axial_force, WithinAbs(0.0, 1e-6));
  CHECK_THAT(results[1].tanks[0].collars[1].slip, WithinRel(3.72e-3, 1e-10));
}

TEST_CASE("Friction at a foot is its coefficient times the foot's own load", "[unit][mounts]")
{
  std::vector<Tank> tanks = two_collar_tank(SlidesAt::foot, 0.1);
  Collar& slide = tanks[0].collars[1];
  slide.feet = {foot_at(Vector3(length, 0.15, -0.3), 1e7, 2e7),
                foot_at(Vector3(length, -0.15, -0.3), 1e7, 2e7)};
  for (Foot& foot : slide.feet)
    foot.stiffness[3] = 0.0; // the pair of feet carries what would lean the seat over
  slide.foot_bolt_preload = 200.0;
  MountStage sideways = weighed(tanks, 3000.0, 3e-3);
  sideways.tanks[0].forces = {{length, Vector3(0.0, 100.0, 0.0)}};
  const auto results =
      run_history(tanks, rigid_bed(tanks),
                  {weighed(tanks, 3000.0), weighed(tanks, 3000.0, 3e-3), sideways}, RangeEnd::high);
  REQUIRE(results.size() == 3);
  const CollarResult& found = results[1].tanks[0].collars[1];
  CHECK_THAT(found.force(0), WithinRel(-0.1 * (1500.0 + 2.0 * 200.0), 1e-9));
  REQUIRE(found.foot_slips.size() == 2);
  CHECK_THAT(found.foot_slips[0], WithinRel(found.foot_slips[1], 1e-9));
  for (const Vector6& force : found.foot_forces)
  {
    CHECK_THAT(force(2), WithinRel(-750.0, 1e-9));
    CHECK_THAT(force(0), WithinRel(95.0, 1e-9));
  }
  // A side force at axis height loads one foot and frees the other: the sum of friction stays.
  const CollarResult& leaning = results[2].tanks[0].collars[1];
  CHECK(leaning.foot_forces[0](2) != Approx(leaning.foot_forces[1](2)));
  CHECK_THAT(leaning.foot_forces[0](2) + leaning.foot_forces[1](2), WithinRel(-1500.0, 1e-9));
  for (const Vector6& force : leaning.foot_forces)
    CHECK(std::abs(force(0)) <= 0.1 * (200.0 - force(2)) * (1.0 + 1e-9));
}

TEST_CASE("Friction at a neck is its coefficient times the transverse force", "[unit][mounts]")
{
  const std::vector<Tank> tanks = two_collar_tank(SlidesAt::neck, 0.2);
  const auto results =
      run_history(tanks, rigid_bed(tanks), {weighed(tanks, 3000.0), weighed(tanks, 3000.0, 3e-3)},
                  RangeEnd::high);
  CHECK_THAT(results.at(1).tanks[0].collars[1].force(0), WithinRel(-0.2 * 1500.0, 1e-9));
  CHECK(results[1].tanks[0].collars[1].hold == Hold::slips);
  CHECK(results[1].tanks[0].collars[0].hold == Hold::keyed);
}

TEST_CASE("A tank held at 20 g carries exactly 20 g", "[unit][mounts]")
{
  const std::vector<Tank> tanks = two_collar_tank(SlidesAt::neck, 0.1);
  for (const Vector3& way :
       {Vector3(1, 0, 0), Vector3(0, 1, 0), Vector3(0, 0, 1), Vector3(1, 2, 2)})
  {
    MountStage held = weighed(tanks, 3000.0);
    held.tanks[0].felt = 20.0 * standard_gravity * way.normalized();
    const auto results =
        run_history(tanks, rigid_bed(tanks), {weighed(tanks, 3000.0), held}, RangeEnd::low);
    REQUIRE(results.size() == 2);
    Vector3 sum = Vector3::Zero();
    for (const CollarResult& collar : results[1].tanks[0].collars)
      sum += tank_axes(tanks[0]) * collar.force.head<3>();
    CHECK((sum + 60000.0 * way.normalized()).norm() < 1e-9 * 60000.0);
    CHECK(results[1].equilibrium_residual < 1e-10);
  }
}

TEST_CASE("A pull beyond all friction with no stop in reach is not held", "[unit][mounts]")
{
  std::vector<Tank> tanks = two_collar_tank(SlidesAt::neck, 0.1);
  make_slide(tanks[0].collars[0], SlidesAt::neck, 0.1);
  MountStage pulled = weighed(tanks, 3000.0);
  pulled.name = "pulled";
  pulled.tanks[0].forces = {{length, Vector3(301.0, 0.0, 0.0)}};
  const auto lost =
      run_history(tanks, rigid_bed(tanks), {weighed(tanks, 3000.0), pulled, weighed(tanks, 3000.0)},
                  RangeEnd::low);
  REQUIRE(lost.size() == 2);
  CHECK(lost[0].not_held.empty());
  CHECK(lost[1].name == "pulled");
  CHECK(lost[1].tanks.empty());
  REQUIRE(lost[1].not_held.size() == 1);
  CHECK_THAT(lost[1].not_held[0], Contains("tank-1 is not held along its axis"));

  pulled.tanks[0].forces = {{length, Vector3(299.0, 0.0, 0.0)}};
  CHECK(run_history(tanks, rigid_bed(tanks), {weighed(tanks, 3000.0), pulled}, RangeEnd::low)
            .back()
            .not_held.empty());

  // The same pull with a stop in reach is held by it.
  tanks[0].collars[1].stroke_forward = 5e-3;
  pulled.tanks[0].forces = {{length, Vector3(1000.0, 0.0, 0.0)}};
  const auto stopped =
      run_history(tanks, rigid_bed(tanks), {weighed(tanks, 3000.0), pulled}, RangeEnd::low);
  REQUIRE(stopped.size() == 2);
  CHECK(stopped[1].tanks[0].collars[1].hold == Hold::at_stop);
  CHECK_THAT(stopped[1].tanks[0].collars[1].stop_force, WithinRel(-700.0, 1e-6));
}

TEST_CASE("A grip past its limit slips, and remembers", "[unit][mounts]")
{
  std::vector<Tank> tanks = two_collar_tank(SlidesAt::neck, 0.0);
  tanks[0].collars[0].grip_force = Range{400.0, 600.0};
  tanks[0].collars[1].stroke_forward = 5e-3;
  MountStage pulled = weighed(tanks, 3000.0);
  pulled.tanks[0].forces = {{length, Vector3(500.0, 0.0, 0.0)}};
  const std::vector<MountStage> stages{weighed(tanks, 3000.0), pulled, weighed(tanks, 3000.0)};
  const auto low = run_history(tanks, rigid_bed(tanks), stages, RangeEnd::low);
  CHECK(low.at(0).tanks[0].collars[0].hold == Hold::grips);
  CHECK(low.at(2).tanks[0].collars[0].hold == Hold::grip_lost);
  const auto high = run_history(tanks, rigid_bed(tanks), stages, RangeEnd::high);
  CHECK(high.at(2).tanks[0].collars[0].hold == Hold::grips);
  CHECK_THAT(high[2].tanks[0].collars[0].slip, WithinAbs(0.0, 1e-15));
}

TEST_CASE("Mounts refuse what they cannot run, by name", "[unit][mounts]")
{
  std::vector<Tank> tanks = two_collar_tank(SlidesAt::neck, 0.1);
  const std::vector<MountStage> good{weighed(tanks, 3000.0)};
  CHECK_THROWS_WITH(
      run_history(tanks, rigid_bed(tanks), {weighed(tanks, 3000.0, 1e-3)}, RangeEnd::low),
      Contains("the fitting, and must be 0 there"));
  CHECK_THROWS_WITH(run_history(tanks, MatrixX::Zero(6, 6), good, RangeEnd::low),
                    Contains("flexibility is 6 x 6; 2 feet need 12 x 12"));
  std::vector<Tank> loose = tanks;
  loose[0].collars[1].position = 2.5;
  CHECK_THROWS_WITH(run_history(loose, rigid_bed(loose), good, RangeEnd::low),
                    Contains("collar sliding: position is 2.5 m; the tank is 2 m long"));
}
