// Group G of the verification book through the chain: model files on a rigid bed and on beam hulls.
// All values derived for the book in closed form; second routes are named there. Tolerance 1e-6
// (chain).

#include "chain.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <fmt/format.h>

using namespace carlin;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
constexpr double tolerance = 1e-6;

// Compression in the tank is what the fixed collar pushes along +x on the tank's aft end.
double compression(const chain::Run& run, const std::string& stage)
{
  return run.collar("fixed", stage).force[0];
}
double slip_mm(const chain::Run& run, const std::string& stage)
{
  return 1e3 * run.collar("sliding", stage).slip;
}

struct Path
{
  const char* stage;
  double force; // [N]
  double slip;  // [mm]
};

void check_path(const chain::Run& run, const std::vector<Path>& path)
{
  for (const Path& expected : path)
  {
    CAPTURE(expected.stage);
    // printed to four decimals of a newton and seven of a millimetre
    CHECK_THAT(compression(run, expected.stage),
               WithinRel(expected.force, tolerance) || WithinAbs(expected.force, 5e-5));
    CHECK_THAT(slip_mm(run, expected.stage),
               WithinRel(expected.slip, tolerance) || WithinAbs(expected.slip, 1e-7));
  }
}
} // namespace

TEST_CASE("G4: friction on the clamping force follows the fill path, case a",
          "[verification][chain]")
{
  const chain::Run run = chain::run("G4-a");
  check_path(run, {{"fill 0.01", 384.8276, 0.0},
                   {"fill 0.25", 1296.2463, 0.8046962},
                   {"fill 0.5", 1916.9244, 1.6746973},
                   {"fill 0.75", 2537.6026, 2.5446984},
                   {"fill 0.9", 2910.0095, 3.0666991},
                   {"fill 1", 3158.28079, 3.41469952},
                   {"empty 0.9", -689.9951, 3.4146995},
                   {"empty 0.75", -2537.6026, 3.0353016},
                   {"empty 0", -675.568084, 0.0653049148},
                   {"refill 0.01", -290.7405, 0.0653049},
                   {"refill 0.75", 2537.6026, 2.5446984},
                   {"refill 1", 3158.28079, 3.41469952}});
  CHECK_THAT(run.collar("sliding", "fill 1").clamping_force, WithinRel(21055.2053, tolerance));
  CHECK_THAT(run.collar("sliding", "empty 0").clamping_force, WithinRel(4503.78723, tolerance));
  // work of the closed cycle, formula of the book; events and trapezoid are exact here
  const double cycle =
      run.stage("emptied again").mounts_high.work_lost - run.stage("empty 0").mounts_high.work_lost;
  CHECK_THAT(run.stage("fill 1").mounts_high.work_lost, WithinRel(6.62526636, tolerance));
  CHECK_THAT(cycle, WithinRel(12.3560213, tolerance));
}

TEST_CASE("G4: soft low-friction lining slides early, case b", "[verification][chain]")
{
  const chain::Run run = chain::run("G4-b");
  check_path(run, {{"fill 1", 1052.76026, 3.61823317}, {"empty 0", -225.189361, 0.0217683049}});
  CHECK_THAT(run.stage("fill 1").mounts_high.work_lost, WithinRel(2.32091341, tolerance));
}

TEST_CASE("G4: a stiff lining holds the tank, case c", "[verification][chain]")
{
  const chain::Run run = chain::run("G4-c");
  check_path(run, {{"fill 0.25", 9620.6897, 0.0},
                   {"fill 0.5", 19169.2444, 0.0069730},
                   {"fill 0.75", 25376.0262, 0.3369841},
                   {"fill 1", 31582.8079, 0.666995233},
                   {"empty 0.9", 27734.5321, 0.6669952},
                   {"empty 0.5", 12341.4286, 0.6669952},
                   {"empty 0", -6755.68084, 0.653049148},
                   {"refill 0.5", 12485.6985, 0.6530491},
                   {"refill 1", 31582.8079, 0.666995233}});
  CHECK_THAT(run.stage("fill 1").mounts_high.work_lost, WithinRel(16.8819511, tolerance));
}

TEST_CASE("G4: the tank locks in its own collar, case d", "[verification][chain]")
{
  const chain::Run run = chain::run("G4-d");
  check_path(run, {{"fill 1", 38482.7586, 0.0}, {"empty 0", 0.0, 0.0}});
  CHECK(run.collar("sliding", "fill 1").hold == Hold::grips);
}

TEST_CASE("G5: the order of stages matters", "[verification][chain]")
{
  const chain::Run warm = chain::run("G5-warm-first");
  check_path(warm, {{"warm", 6755.68084, 0.546950852},
                    {"fill", 31582.8079, 1.86699523},
                    {"empty", -6755.68084, 1.85304915},
                    {"cool", -6755.68084, 0.653049148}});
  // work by integration in the book: 1e-3
  CHECK_THAT(warm.stage("warm").mounts_high.work_lost, WithinRel(3.69502539, 1e-3));
  CHECK_THAT(warm.stage("cool").mounts_high.work_lost, WithinRel(37.202, 1e-3));
  const chain::Run fill = chain::run("G5-fill-first");
  check_path(fill, {{"fill", 31582.8079, 0.666995233}, {"warm", 31582.8079, 1.86699523}});
  CHECK_THAT(fill.stage("warm").mounts_high.work_lost, WithinRel(54.782, 1e-3));
}

TEST_CASE("G7: two fixed collars restrain growth with k g, and let go of it whole",
          "[verification][chain]")
{
  const chain::Run run = chain::run("G7-both-fixed");
  CHECK_THAT(compression(run, "full"), WithinRel(67636.3636, tolerance));
  CHECK_THAT(run.tank("full").largest_axial_force, WithinRel(67636.3636, tolerance));
  CHECK_THAT(compression(run, "empty"), WithinAbs(0.0, 1e-5));
}

TEST_CASE("A slide without friction puts no force into the tank", "[verification][chain]")
{
  const chain::Run run = chain::run("frictionless");
  CHECK_THAT(compression(run, "full"), WithinAbs(0.0, 1e-6));
  CHECK_THAT(slip_mm(run, "full"), WithinRel(3.72, tolerance));
}

TEST_CASE("G9: the stop takes over where the stroke ends", "[verification][chain]")
{
  const chain::Run run = chain::run("G9-stop");
  check_path(run, {{"growth 0.05", 517.241379, 0.0},
                   {"growth 5", 900.0, 4.913},
                   {"growth 8.087", 900.0, 8.0},
                   {"growth 12", 35426.4706, 8.57544118},
                   {"growth 11.826", 33626.4706, 8.57544118},
                   {"growth 7.913", -900.0, 8.0},
                   {"growth 0", -900.0, 0.087}});
  CHECK_THAT(std::abs(run.collar("sliding", "growth 12").stop_force),
             WithinRel(34526.4706, tolerance));
}

TEST_CASE("G20: a pull along the tank after filling, and what is left", "[verification][chain]")
{
  const chain::Run run = chain::run("G20-pull");
  const auto c1 = [&](const char* stage) { return run.collar("fixed", stage).force[0]; };
  const auto c2 = [&](const char* stage) { return -run.collar("sliding", stage).force[0]; };
  CHECK_THAT(c1("full"), WithinRel(3158.28079, tolerance));
  CHECK_THAT(c1("2 g aft"), WithinRel(7649.05017, tolerance));
  CHECK_THAT(c2("2 g aft"), WithinRel(1372.79417, tolerance));
  CHECK_THAT(c1("off"), WithinRel(3158.28079, tolerance));
  CHECK_THAT(c1("2 g forward"), WithinRel(-3117.97521, tolerance));
  CHECK_THAT(c2("2 g forward"), WithinRel(3158.28079, tolerance));
  CHECK_THAT(c1("off again"), WithinRel(1372.79417, tolerance));
  CHECK_THAT(c2("off again"), WithinRel(1372.79417, tolerance));
  const chain::Run hard = chain::run("G20-hard-pull");
  CHECK_THAT(hard.collar("fixed", "10 g aft").force[0], WithinRel(28222.9992, tolerance));
  CHECK_THAT(-hard.collar("sliding", "10 g aft").force[0], WithinRel(-3158.28079, tolerance));
}

TEST_CASE("G12: a tank in three collars on a bowing hull", "[verification][chain]")
{
  struct Row
  {
    int curvature; // [1e-4 1/m]
    double rigid, springs;
  };
  for (const Row& row :
       {Row{-4, 5075.0, 3657.60870}, Row{-1, 2675.0, 2092.39130}, Row{0, 1875.0, 1570.65217},
        Row{1, 1075.0, 1048.91304}, Row{2, 275.0, 527.173913}, Row{4, -1325.0, -516.304348}})
  {
    CAPTURE(row.curvature);
    const chain::Run rigid = chain::run(fmt::format("G12-rigid-{:+d}", row.curvature));
    CHECK_THAT(rigid.collar("middle", "bowed").force[2], WithinRel(row.rigid, tolerance));
    const chain::Run springs = chain::run(fmt::format("G12-springs-{:+d}", row.curvature));
    CHECK_THAT(springs.collar("middle", "bowed").force[2], WithinRel(row.springs, tolerance));
  }
}

TEST_CASE("G11: a tank on two collars on a flexible hull", "[verification][chain]")
{
  // moments of hull on tank, anticlockwise seen with x right and w up: minus the moment about +y
  const auto moment = [](const chain::Run& run, const char* collar, const char* stage)
  { return -run.collar(collar, stage).force[4]; };

  const chain::Run spherical = chain::run("G11-weight-spherical");
  CHECK_THAT(spherical.displacement("foot-a", "weight")[2], WithinRel(-0.612375e-3, tolerance));
  CHECK_THAT(spherical.displacement("foot-b", "weight")[2], WithinRel(-0.726750e-3, tolerance));
  const chain::Run sprung = chain::run("G11-weight-sprung");
  CHECK_THAT(moment(sprung, "a", "weight"), WithinRel(67.0669765, tolerance));
  CHECK_THAT(moment(sprung, "b", "weight"), WithinRel(-66.7577408, tolerance));
  CHECK_THAT(sprung.collar("a", "weight").force[2], WithinRel(6000.12370, tolerance));
  const chain::Run clamped = chain::run("G11-weight-clamped");
  CHECK_THAT(moment(clamped, "a", "weight"), WithinRel(2194.73613, tolerance));
  CHECK_THAT(moment(clamped, "b", "weight"), WithinRel(-2165.13091, tolerance));
  CHECK_THAT(clamped.collar("a", "weight").force[2], WithinRel(6011.84209, tolerance));

  const chain::Run sagged = chain::run("G11-sagging-sprung");
  CHECK_THAT(std::abs(sagged.tank("sagged").largest_bending), WithinRel(80.7754443, tolerance));
  const chain::Run sagged_clamped = chain::run("G11-sagging-clamped");
  CHECK_THAT(sagged_clamped.tank("sagged").largest_bending, WithinRel(2631.57812, tolerance));
  const chain::Run slides = chain::run("G11-sagging-spherical");
  CHECK_THAT(std::abs(slides.collar("b", "sagged").slip), WithinRel(1.0e-3, tolerance));
  const chain::Run locked = chain::run("G11-slide-locked");
  CHECK_THAT(std::abs(locked.tank("sagged").largest_axial_force), WithinRel(50314.4654, tolerance));
  const chain::Run all = chain::run("G11-all-locked");
  CHECK_THAT(std::abs(all.tank("sagged").largest_axial_force), WithinRel(49751.2438, tolerance));
  CHECK_THAT(all.tank("sagged").largest_bending, WithinRel(2238.80597, tolerance));
}

TEST_CASE("G24: two tanks on one hull feel each other where they overlap", "[verification][chain]")
{
  const auto c = [](const chain::Run& run, Index tank)
  { return run.collar("fixed", "grown", tank).force[0]; };
  const chain::Run one = chain::run("G24-one-grows-locked");
  CHECK_THAT(c(one, 0), WithinRel(34632.6283, tolerance));
  CHECK_THAT(c(one, 1), WithinRel(-430.516097, tolerance));
  const chain::Run free = chain::run("G24-one-grows-free");
  CHECK_THAT(c(free, 0), WithinRel(34627.0379, tolerance));
  CHECK_THAT(c(free, 1), WithinAbs(0.0, 1e-4));
  CHECK_THAT(std::abs(free.collar("sliding", "grown", 1).slip),
             WithinRel(0.0519405569e-3, tolerance));
  const chain::Run both = chain::run("G24-both-grow");
  CHECK_THAT(c(both, 0), WithinRel(34309.7412, tolerance));
  CHECK_THAT(c(both, 1), WithinRel(24435.3761, tolerance));
  const chain::Run limit = chain::run("G24-both-grow-limit");
  CHECK_THAT(c(limit, 0), WithinRel(34601.0677, tolerance));
  CHECK_THAT(c(limit, 1), WithinRel(2000.0, tolerance));
}

// Statics: m a on the tank, felt.
TEST_CASE("A tank held at 20 g carries exactly 20 g", "[verification][chain]")
{
  const chain::Run run = chain::run("hold-20g");
  const double weight = (115.0 + 7.5) * standard_gravity;
  const auto sum = [&](const char* stage)
  {
    return Vector3(run.collar("fixed", stage).force.head<3>() +
                   run.collar("sliding", stage).force.head<3>());
  };
  CHECK((sum("along") - Vector3(-20.0 * weight, 0.0, 0.0)).norm() < 1e-9 * 20.0 * weight);
  CHECK((sum("across") - Vector3(0.0, -8.0 * weight, 0.0)).norm() < 1e-9 * 8.0 * weight);
  CHECK((sum("down") - Vector3(0.0, 0.0, 5.0 * weight)).norm() < 1e-9 * 5.0 * weight);
  CHECK((sum("full") - Vector3(0.0, 0.0, weight)).norm() < 1e-9 * weight);
}

// Coulomb on the foot's own load: half the weight and the bolts' preload.
TEST_CASE("Where the foot slides, friction is on the foot's load and not on the clamping",
          "[verification][chain]")
{
  const chain::Run run = chain::run("slides-at-foot");
  const double foot_load = 0.5 * (115.0 + 7.5) * standard_gravity + 2000.0;
  CHECK_THAT(compression(run, "full"), WithinRel(0.12 * foot_load, tolerance));
  CHECK(run.collar("sliding", "full").clamping_force > 20000.0); // which would have carried more
}
