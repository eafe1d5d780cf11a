// Verification book, part G: stops, walking tanks. Values `computed` there in closed form and by
// incremental integration; chain tolerance 1e-6 or the printed digits.

#include "mount_examples.hpp"

#include <catch2/catch.hpp>
#include <numbers>

using namespace carlin;
using namespace carlin::testing;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
MountStage grown(const std::vector<Tank>& tanks, double growth, double spacing)
{
  MountStage stage = quiet_stage(tanks, "grown");
  stage.tanks[0].axial_strain = growth / spacing;
  return stage;
}

/// G9: as G4 but with constant friction 900 N: coefficient 0.1 in a ring with 9000 N of clamping.
std::vector<Tank> stopped_tank(std::optional<double> stop_stiffness)
{
  Tank tank = bare_tank(2.0, 4.0e8);
  tank.collars = {collar_at(tank, "fixed", 0.0, 4.0e7), collar_at(tank, "sliding", 2.0, 1.5e7)};
  Collar& slide = tank.collars[1];
  make_slide(slide, SlidesAt::lining, 0.1);
  LinedRing ring;
  ring.radius = 0.25;
  ring.width = 0.08;
  ring.bed_stiffness = 2e8;
  ring.preload = 9000.0 / (2.0 * std::numbers::pi * 0.25 * 0.08 * 2e8);
  slide.ring = ring;
  slide.stroke_forward = 8e-3;
  slide.stroke_aft = 8e-3;
  slide.stop_stiffness = stop_stiffness;
  return {tank};
}

/// G13: two grips of constant limit, an axial pull at collar 2.
std::vector<Tank> walking_tank(double limit_1, double limit_2)
{
  Tank tank = bare_tank(2.0, 8e7 * 2.0);
  tank.collars = {collar_at(tank, "one", 0.0, 2e7), collar_at(tank, "two", 2.0, 3e7)};
  tank.collars[0].grip_force = Range{limit_1, limit_1};
  tank.collars[1].grip_force = Range{limit_2, limit_2};
  return {tank};
}
} // namespace

TEST_CASE("A slide meets its stop and shares its friction with it", "[verification][collars]")
{
  const std::vector<Tank> tanks = stopped_tank(6e7);
  struct Row
  {
    double growth, force, slip, stop;
  };
  const std::vector<Row> rows{{0.05, 517.241379, 0.0, 0.0},
                              {5.0, 900.0, 4.913, 0.0},
                              {8.087, 900.0, 8.0, 0.0},
                              {12.0, 35426.4706, 8.57544118, 34526.4706},
                              {11.826, 33626.4706, 8.57544118, 34526.4706},
                              {7.913, -900.0, 8.0, 0.0},
                              {0.0, -900.0, 0.087, 0.0}};
  std::vector<MountStage> stages{quiet_stage(tanks)};
  for (const Row& row : rows)
    stages.push_back(grown(tanks, 1e-3 * row.growth, 2.0));
  const auto results = run_history(tanks, rigid_bed(tanks), stages, RangeEnd::high);
  REQUIRE(results.size() == stages.size());
  for (std::size_t i = 0; i < rows.size(); ++i)
  {
    CAPTURE(rows[i].growth);
    const CollarResult& slide = results[i + 1].tanks[0].collars[1];
    CHECK(error_of("G9", "force at growth [N]", rows[i].force, -slide.force(0)) < 1e-6);
    CHECK_THAT(1e3 * slide.slip, WithinAbs(rows[i].slip, 1e-8));
    CHECK_THAT(-slide.stop_force, WithinAbs(rows[i].stop, 1e-4));
    CHECK_THAT(1e3 * slide.stroke_left_forward, WithinAbs(8.0 - rows[i].slip, 1e-8));
  }
  CHECK(results[4].tanks[0].collars[1].hold == Hold::at_stop);
}

TEST_CASE("A rigid stop takes what growth is left", "[verification][collars]")
{
  const std::vector<Tank> tanks = stopped_tank(std::nullopt);
  const std::vector<MountStage> stages{quiet_stage(tanks), grown(tanks, 12e-3, 2.0),
                                       grown(tanks, 0.0, 2.0)};
  const auto results = run_history(tanks, rigid_bed(tanks), stages, RangeEnd::high);
  const CollarResult& slide = results[1].tanks[0].collars[1];
  CHECK(error_of("G9", "force on a rigid stop [N]", 41379.3103, -slide.force(0)) < 1e-8);
  CHECK_THAT(slide.friction_force, WithinRel(-900.0, 1e-8));
  CHECK_THAT(slide.slip, WithinAbs(8e-3, 1e-11));
  CHECK_THAT(results[2].tanks[0].collars[1].force(0), WithinRel(900.0, 1e-6));
}

TEST_CASE("A tank walks in two slides under a small pull", "[verification][collars]")
{
  struct Row
  {
    std::string name;
    double pull, limit_1, limit_2, growth;
    std::array<double, 3> hot, cold; // compression, slips in mm
    double drift;                    // of the next cycle
  };
  const std::vector<Row> rows{
      {"G13 a",
       261.467,
       300,
       400,
       1.5,
       {138.533, 0, 1.478008},
       {-300, 1.457974, 1.478008},
       1.45797392},
      {"G13 b", 60, 300, 400, 1.5, {300, -1.469250, 0}, {-300, -0.026750, 0}, 0},
      {"G13 c", 0, 300, 400, 1.5, {300, -1.471250, 0}, {-300, -0.028750, 0}, 0},
      {"G13 d", 261.467, 300, 1500, 1.5, {300, -1.462534, 0}, {-300, -0.020034, 0}, 0},
      {"G13 e", 261.467, 300, 400, 0.040, {138.533, 0, 0.018008}, {-278.858, 0, 0.018008}, 0}};
  for (const Row& row : rows)
  {
    CAPTURE(row.name);
    const std::vector<Tank> tanks = walking_tank(row.limit_1, row.limit_2);
    const auto pulled = [&](double growth)
    {
      MountStage stage = grown(tanks, 1e-3 * growth, 2.0);
      stage.tanks[0].forces = {{2.0, Vector3(row.pull, 0.0, 0.0)}};
      return stage;
    };
    const std::vector<MountStage> stages{quiet_stage(tanks), pulled(0.0),        pulled(row.growth),
                                         pulled(0.0),        pulled(row.growth), pulled(0.0)};
    const auto results = run_history(tanks, rigid_bed(tanks), stages, RangeEnd::low);
    REQUIRE(results.size() == 6);
    const auto state = [](const MountStageResult& r)
    {
      const auto& collars = r.tanks[0].collars;
      return std::array<double, 3>{collars[0].force(0), 1e3 * collars[0].slip,
                                   1e3 * collars[1].slip};
    };
    for (std::size_t i = 0; i < 3; ++i)
    {
      CHECK_THAT(state(results[2])[i], WithinAbs(row.hot[i], i == 0 ? 6e-4 : 6e-7));
      CHECK_THAT(state(results[3])[i], WithinAbs(row.cold[i], i == 0 ? 6e-4 : 6e-7));
    }
    const double drift = state(results[5])[2] - state(results[3])[2];
    error_of(row.name, "drift per cycle [mm]", row.drift, drift);
    CHECK_THAT(drift, WithinAbs(row.drift, 1e-7));
    if (row.drift > 0.0)
      CHECK(results[3].tanks[0].collars[0].hold == Hold::grip_lost);
  }
}

TEST_CASE("A tank walks by pressure alone where falling limits cross", "[verification][collars]")
{
  // G14: limits 300 -> 1800 and 500 -> 1500 N by linings of different stiffness under one radial
  // growth of 0.5 mm: mu 2 pi r w k times (preload + growth).
  Tank tank = bare_tank(2.0, 8e7 * 2.0);
  tank.collars = {collar_at(tank, "one", 0.0, 2e7), collar_at(tank, "two", 2.0, 3e7)};
  const std::array<double, 2> slope{3e6, 2e6};
  const std::array<double, 2> preload{1e-4, 2.5e-4};
  for (std::size_t i = 0; i < 2; ++i)
  {
    make_slide(tank.collars[i], SlidesAt::lining, 0.1);
    LinedRing ring;
    ring.radius = 0.224;
    ring.width = 0.08;
    ring.bed_stiffness = slope[i] / (0.1 * 2.0 * std::numbers::pi * ring.radius * ring.width);
    ring.preload = preload[i];
    tank.collars[i].ring = ring;
  }
  const std::vector<Tank> tanks{tank};
  const auto state = [&](double growth, double radial)
  {
    MountStage stage = grown(tanks, growth, 2.0);
    stage.tanks[0].radial_growth = radial;
    return stage;
  };
  std::vector<MountStage> stages{quiet_stage(tanks)};
  for (int cycle = 0; cycle < 2; ++cycle)
    for (const auto& [g, r] : std::vector<std::pair<double, double>>{
             {0.0, 0.5e-3}, {1.5e-3, 0.5e-3}, {1.5e-3, 0.0}, {0.0, 0.0}})
      stages.push_back(state(g, r));
  const std::vector<std::array<double, 3>> expected{{0, 0, 0},
                                                    {1500, 0, 1.35625},
                                                    {300, -0.0575, 1.41375},
                                                    {-300, 1.385, 1.41375},
                                                    {-300, 1.385, 1.41375},
                                                    {1500, 1.385, 2.74125},
                                                    {300, 1.3275, 2.79875},
                                                    {-300, 2.770, 2.79875}};
  const auto results = run_history(tanks, rigid_bed(tanks), stages, RangeEnd::high);
  REQUIRE(results.size() == 9);
  for (std::size_t i = 0; i < 8; ++i)
  {
    CAPTURE(i);
    const auto& collars = results[i + 1].tanks[0].collars;
    error_of("G14", "slip of collar two [mm]", expected[i][2], 1e3 * collars[1].slip);
    CHECK_THAT(collars[0].force(0), WithinAbs(expected[i][0], 1e-5));
    CHECK_THAT(1e3 * collars[0].slip, WithinAbs(expected[i][1], 1e-8));
    CHECK_THAT(1e3 * collars[1].slip, WithinAbs(expected[i][2], 1e-8));
  }
}

TEST_CASE("Two stops with unequal gaps share a deceleration", "[verification][collars]")
{
  // G18, friction 2500 N from a grip: stops 3e7 and 5e7 N/m, second gap 1.5 mm wider. The tank is
  // made rigid (EA 1e15 N), so the stops alone share; that costs 1.5e-8.
  Tank tank = bare_tank(2.0, 1e15);
  tank.mass = 320.0;
  tank.collars = {collar_at(tank, "grip", 1.0), collar_at(tank, "one", 0.0),
                  collar_at(tank, "two", 2.0)};
  tank.collars[0].grip_force = Range{2500.0, 2500.0};
  for (std::size_t i = 1; i < 3; ++i)
  {
    make_slide(tank.collars[i], SlidesAt::neck, 0.0);
    tank.collars[i].stroke_forward = i == 1 ? 0.0 : 1.5e-3;
    tank.collars[i].stop_stiffness = i == 1 ? 3e7 : 5e7;
  }
  const std::vector<Tank> tanks{tank};
  MountStage stopped = quiet_stage(tanks, "20 g");
  stopped.tanks[0].mass = 320.0;
  stopped.tanks[0].felt = Vector3(20.0 * standard_gravity, 0.0, 0.0);
  const auto results =
      run_history(tanks, rigid_bed(tanks), {quiet_stage(tanks), stopped}, RangeEnd::low);
  REQUIRE(results.size() == 2);
  const auto& collars = results[1].tanks[0].collars;
  CHECK(error_of("G18", "first stop [N]", 50723.46, -collars[1].stop_force) < 1e-7);
  CHECK(error_of("G18", "second stop [N]", 9539.10, -collars[2].stop_force) < 1e-6);
  for (const auto& [load, first, second] : std::vector<std::array<double, 3>>{
           {30e3, 30e3, 0.0}, {60e3, 50625.0, 9375.0}, {200e3, 103125.0, 96875.0}})
  {
    MountStage loaded = quiet_stage(tanks, "pulled");
    loaded.tanks[0].forces = {{1.0, Vector3(load + 2500.0, 0.0, 0.0)}};
    const auto found =
        run_history(tanks, rigid_bed(tanks), {quiet_stage(tanks), loaded}, RangeEnd::low);
    CHECK_THAT(-found[1].tanks[0].collars[1].stop_force, WithinRel(first, 1e-7));
    CHECK_THAT(-found[1].tanks[0].collars[2].stop_force, WithinAbs(second, 1e-3));
  }
}
