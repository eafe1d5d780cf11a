#include "carlin/checks/checks.hpp"

#include <catch2/catch.hpp>
#include <limits>

using namespace carlin;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinRel;

namespace
{
constexpr double infinity = std::numeric_limits<double>::infinity();

const Check* find(const std::vector<Check>& checks, const std::string& name,
                  const std::string& subject)
{
  for (const Check& check : checks)
    if (check.name == name && check.subject == subject)
      return &check;
  return nullptr;
}

/// One tank on a rigid bed: a fixed collar that grips and a sliding one with stops.
struct RigidBed
{
  Model model;
  ConfigurationSolution configuration;

  RigidBed()
  {
    Tank tank;
    tank.name = "cylinder";
    tank.axis_from = {1.0, 0.0, 0.5};
    tank.axis_to = {3.0, 0.0, 0.5};
    tank.diameter = 0.5;
    Collar fixed;
    fixed.name = "aft";
    fixed.position = 0.4;
    fixed.grip_force = Range{8e3, 20e3};
    Collar sliding;
    sliding.name = "forward";
    sliding.position = 1.6;
    sliding.kind = CollarKind::sliding;
    sliding.ring = LinedRing{.radius = 0.25, .width = 0.08, .bed_stiffness = 1e9, .preload = 1e-4};
    sliding.stroke_aft = 0.012;
    sliding.stroke_forward = 0.010;
    tank.collars = {fixed, sliding};
    configuration.craft.name = "bed";
    configuration.craft.standing = Standing::judged;
    configuration.craft.tanks = {tank};
    configuration.cases = {{"stop", CaseClass::accidental, {StageSolution{}}}};
    stage().name = "stopped";
    stage().mounts_low = stage().mounts_high = mounts();
  }

  StageSolution& stage() { return configuration.cases[0].stages[0]; }

  static MountStageResult mounts()
  {
    TankResult tank;
    CollarResult fixed, sliding;
    fixed.hold = Hold::grips;
    fixed.friction_limit = 8e3;
    fixed.stroke_left_aft = fixed.stroke_left_forward = infinity;
    sliding.hold = Hold::slips;
    sliding.stroke_left_aft = 0.020;
    sliding.stroke_left_forward = 0.002;
    sliding.clamping_force = 12e3;
    tank.collars = {fixed, sliding};
    TankSection section;
    section.position = 1.0;
    tank.sections = {section};
    MountStageResult result;
    result.tanks = {tank};
    return result;
  }

  std::vector<Check> checks() const { return make_checks(model, configuration, configuration); }
};
} // namespace

TEST_CASE("A limit that the maker has not given is asked for and not judged", "[unit][checks]")
{
  RigidBed bed;
  bed.stage().mounts_high.tanks[0].largest_axial_force = 15e3;
  std::vector<Check> checks = bed.checks();
  const Check* force = find(checks, "tank axial force", "cylinder");
  REQUIRE(force);
  CHECK(force->verdict == Verdict::not_judged);
  CHECK_THAT(force->remark, Contains("ask the maker for the largest axial force") &&
                                Contains("at their high end"));
  CHECK(force->demand == 15e3); // the worse of the two ends
  CHECK_THAT(force->place, Contains("x 2.00 m"));

  bed.configuration.craft.tanks[0].limits.axial_force = 10e3;
  checks = bed.checks();
  CHECK(find(checks, "tank axial force", "cylinder")->verdict == Verdict::not_met);
  CHECK_THAT(find(checks, "tank axial force", "cylinder")->remark, !Contains("ask"));
  for (const std::string name : {"tank bending", "tank torsion"})
    CHECK(find(checks, name, "cylinder")->verdict == Verdict::not_judged);
  for (const std::string name : {"collar force", "clamping force", "lining pressure"})
    CHECK(find(checks, name, "cylinder, forward")->verdict == Verdict::not_judged);
  CHECK(!find(checks, "clamping force", "cylinder, aft")); // no ring, nothing clamps
}

TEST_CASE("Stroke left is judged from below on the side that is worse", "[unit][checks]")
{
  RigidBed bed;
  const std::vector<Check> checks = bed.checks();
  const Check* stroke = find(checks, "stroke left", "cylinder, forward");
  REQUIRE(stroke);
  CHECK(stroke->limit_from_below);
  CHECK_THAT(*stroke->limit, WithinRel(0.003, 1e-12)); // 30 % of 10 mm
  CHECK_THAT(*stroke->utilisation, WithinRel(1.5, 1e-12));
  CHECK(stroke->verdict == Verdict::not_met);
  CHECK_THAT(stroke->remark, Contains("towards axis_to"));
  CHECK(!find(checks, "stroke left", "cylinder, aft"));
}

TEST_CASE("Grip is judged at its low end, and a grip that slipped is not met", "[unit][checks]")
{
  RigidBed bed;
  CollarResult& low = bed.stage().mounts_low.tanks[0].collars[0];
  low.friction_force = 3e3;
  low.force[3] = 1e3;                                                // N m over 0.25 m: 4 kN
  bed.stage().mounts_high.tanks[0].collars[0].friction_force = 19e3; // fine there, not looked at
  std::vector<Check> checks = bed.checks();
  const Check* grip = find(checks, "grip of fixed collar", "cylinder, aft");
  REQUIRE(grip);
  CHECK_THAT(*grip->utilisation, WithinRel(5.0 / 8.0, 1e-12));
  CHECK(grip->verdict == Verdict::met);

  low.friction_force = 8e3;
  low.force[3] = 0.0;
  low.hold = Hold::grip_lost;
  low.slip = 0.0123;
  checks = bed.checks();
  grip = find(checks, "grip of fixed collar", "cylinder, aft");
  CHECK(grip->verdict == Verdict::not_met);
  CHECK_THAT(grip->remark, Contains("slipped 12.3 mm"));

  bed.configuration.craft.tanks[0].collars[0].grip_force.reset(); // keyed
  CHECK(!find(bed.checks(), "grip of fixed collar", "cylinder, aft"));
}

TEST_CASE("A tank that nothing holds is a check not met", "[unit][checks]")
{
  RigidBed bed;
  CHECK(find(bed.checks(), "tank held", "cylinder")->verdict == Verdict::met);
  bed.stage().mounts_low.tanks.clear();
  bed.stage().mounts_low.not_held = {"cylinder is not held along its axis: grip 8 kN of 20 kN"};
  const std::vector<Check> checks = bed.checks();
  const Check* held = find(checks, "tank held", "cylinder");
  CHECK(held->verdict == Verdict::not_met);
  CHECK_THAT(held->remark, Contains("not held along its axis") && Contains("low end"));
  CHECK(held->stage == "stopped");
  CHECK(checks.front().name == "tank held");
}
