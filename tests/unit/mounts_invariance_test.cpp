// Properties: results follow the tank however it lies and however its stages are cut (verification
// book, G23), and random layouts settle in balance.

#include "mount_examples.hpp"

#include "carlin/core/error.hpp"

#include <catch2/catch.hpp>
#include <random>

using namespace carlin;
using namespace carlin::testing;
using Catch::Matchers::WithinAbs;

namespace
{
constexpr double length = 2.0;

struct Lie
{
  Vector3 direction = Vector3::UnitX();
  bool is_listed_backwards = false;
  bool is_swapped = false; ///< fixed collar at axis_to
  int steps = 1;
};

/// A tank of G4 c with stops and a side load, filled, pulled, emptied; loads given in its own axes.
std::vector<TankResult> run(const Lie& lie, double bed = 2e9)
{
  Tank tank = bare_tank(length, 4e8);
  tank.axis_from = Vector3(1.0, -2.0, 0.5);
  tank.axis_to = tank.axis_from + length * lie.direction.normalized();
  const double fixed_at = lie.is_swapped ? length : 0.0;
  const double slide_at = length - fixed_at;
  tank.collars = {collar_at(tank, "fixed", fixed_at, 4e7),
                  collar_at(tank, "sliding", slide_at, 1.5e7)};
  make_slide(tank.collars[1], SlidesAt::lining, 0.15);
  LinedRing ring;
  ring.radius = 0.224;
  ring.width = 0.08;
  ring.bed_stiffness = bed;
  ring.preload = bed > 1e9 ? 0.2e-3 : -0.3e-3;
  tank.collars[1].ring = ring;
  (lie.is_swapped ? tank.collars[1].stroke_aft : tank.collars[1].stroke_forward) = 0.5e-3;
  tank.collars[1].stop_stiffness = 6e7;
  if (lie.is_listed_backwards)
    std::swap(tank.collars[0], tank.collars[1]);
  const std::vector<Tank> tanks{tank};

  const Matrix3 axes = tank_axes(tank);
  const double sense = lie.is_swapped ? -1.0 : 1.0;
  const auto state = [&](double share, double pull)
  {
    MountStage stage = quiet_stage(tanks, "state");
    stage.tanks[0].axial_strain = share * 3.72e-3 / length;
    stage.tanks[0].radial_growth = share * 0.735e-3;
    stage.tanks[0].forces = {{slide_at, axes * Vector3(0.0, 0.0, -1500.0)},
                             {0.5 * length, axes * Vector3(sense * pull, 0.0, 0.0)}};
    return stage;
  };
  const std::vector<std::pair<double, double>> states{
      {0.0, 0.0}, {1.0, 0.0}, {1.0, 40e3}, {1.0, 0.0}, {0.0, 0.0}};
  std::vector<MountStage> stages{state(0.0, 0.0)};
  for (std::size_t i = 1; i < states.size(); ++i)
    for (int k = 1; k <= lie.steps; ++k)
    {
      const double t = static_cast<double>(k) / lie.steps;
      stages.push_back(state((1 - t) * states[i - 1].first + t * states[i].first,
                             (1 - t) * states[i - 1].second + t * states[i].second));
    }
  const auto results = run_history(tanks, rigid_bed(tanks), stages, RangeEnd::high);
  REQUIRE(results.size() == stages.size());
  std::vector<TankResult> ends;
  for (std::size_t i = 0; i < results.size(); i += static_cast<std::size_t>(lie.steps))
  {
    ends.push_back(results[i].tanks[0]);
    if (lie.is_listed_backwards)
      std::swap(ends.back().collars[0], ends.back().collars[1]);
  }
  return ends;
}

void check_same(const std::vector<TankResult>& a, const std::vector<TankResult>& b, double sense)
{
  REQUIRE(a.size() == b.size());
  for (std::size_t i = 0; i < a.size(); ++i)
    for (std::size_t c = 0; c < 2; ++c)
    {
      CAPTURE(i, c);
      const CollarResult& p = a[i].collars[c];
      const CollarResult& q = b[i].collars[c];
      CHECK_THAT(q.force(0), WithinAbs(sense * p.force(0), 1e-9 * 4e4));
      CHECK_THAT(q.force(2), WithinAbs(p.force(2), 1e-9 * 4e4));
      CHECK_THAT(q.slip, WithinAbs(sense * p.slip, 1e-9 * 4e-3));
      CHECK_THAT(q.offset, WithinAbs(p.offset, 1e-9 * 1e-3));
      CHECK_THAT(q.stop_force, WithinAbs(sense * p.stop_force, 1e-9 * 4e4));
    }
}
} // namespace

TEST_CASE("A tank's mounts do not know how it lies or is listed", "[unit][mounts]")
{
  for (const double bed : {2e9, 2e8})
  {
    const std::vector<TankResult> plain = run({}, bed);
    CHECK(plain[1].collars[1].slip > 0.1e-3); // it does slip
    check_same(plain, run({.direction = Vector3::UnitY()}, bed), 1.0);
    check_same(plain, run({.direction = Vector3::UnitZ()}, bed), 1.0);
    check_same(plain, run({.direction = Vector3(1, 2, 2)}, bed), 1.0);
    check_same(plain, run({.direction = -Vector3::UnitX()}, bed), 1.0);
    check_same(plain, run({.is_listed_backwards = true}, bed), 1.0);
    check_same(plain, run({.is_swapped = true}, bed), -1.0);
    for (const int steps : {2, 5, 50})
      check_same(plain, run({.steps = steps}, bed), 1.0);
  }
}

namespace
{
struct Dice
{
  std::mt19937 engine;
  double between(double low, double high)
  {
    return low + (high - low) * static_cast<double>(engine()) / 4294967296.0;
  }
  bool coin(double chance) { return between(0.0, 1.0) < chance; }
  Vector3 direction()
  {
    return Vector3(between(-1, 1), between(-1, 1), between(-1, 1)).normalized();
  }
};

Collar random_collar(Dice& dice, const Tank& tank, double position, int number)
{
  Collar collar = collar_at(tank, "collar-" + std::to_string(number), position,
                            dice.between(4e6, 5e7), dice.between(1e7, 3e7));
  const Matrix3 axes = tank_axes(tank);
  const bool has_two_feet = dice.coin(0.5);
  const Foot foot = collar.feet[0];
  collar.feet.clear();
  for (const double side : {-1.0, 1.0})
    if (side < 0.0 || has_two_feet)
    {
      collar.feet.push_back(foot);
      collar.feet.back().footprint.centre +=
          axes * Vector3(0.0, has_two_feet ? 0.15 * side : 0.0, -0.3);
    }
  if (dice.coin(0.6))
  {
    LinedRing ring;
    ring.radius = 0.25;
    ring.width = 0.08;
    ring.bed_stiffness = std::pow(10.0, dice.between(8.0, 9.5));
    ring.preload = dice.between(-0.3e-3, 0.3e-3);
    collar.ring = ring;
  }
  for (auto& pivot : collar.pivot_stiffness)
    if (dice.coin(0.3))
      pivot = dice.between(1e4, 1e6);
  if (number == 1 && dice.coin(0.3))
    collar.grip_force = Range{5e3, 1e4};
  if (number > 1)
  {
    make_slide(collar, static_cast<SlidesAt>(dice.engine() % 3), dice.between(0.0, 0.3));
    collar.foot_bolt_preload = dice.coin(0.5) ? 500.0 : 0.0;
    if (dice.coin(0.5))
      collar.stroke_aft = dice.between(0.5e-3, 5e-3);
    if (dice.coin(0.5))
      collar.stroke_forward = dice.between(0.5e-3, 5e-3);
    if (dice.coin(0.5))
      collar.stop_stiffness = 2e7;
  }
  return collar;
}

MountStage random_stage(Dice& dice, const std::vector<Tank>& tanks, bool is_fitting)
{
  MountStage stage = quiet_stage(tanks, is_fitting ? "fitting" : "stage");
  const double pressure = dice.between(0.0, 1.0);
  for (TankStageLoad& load : stage.tanks)
  {
    load.mass = 150.0;
    load.felt = Vector3(0, 0, -standard_gravity);
    if (!is_fitting && dice.coin(0.5))
      load.felt += dice.between(0.0, 30.0) * dice.direction();
    if (!is_fitting)
    {
      load.angular = dice.direction();
      load.axial_strain = pressure * dice.between(0.0, 2e-3);
      load.radial_growth = pressure * 0.7e-3;
    }
  }
  if (!is_fitting)
    for (Index i = 0; i < stage.foot_motion.size(); ++i)
      stage.foot_motion(i) = dice.between(-2e-4, 2e-4);
  return stage;
}
} // namespace

TEST_CASE("Random layouts settle in balance or say why not", "[unit][mounts]")
{
  int settled = 0;
  int not_held = 0;
  std::vector<std::string> unsettled;
  for (unsigned seed = 1; seed <= 300; ++seed)
  {
    Dice dice{std::mt19937(seed)};
    std::vector<Tank> tanks;
    const int tank_count = dice.coin(0.3) ? 2 : 1;
    for (int t = 0; t < tank_count; ++t)
    {
      Tank tank = bare_tank(length, dice.between(2e8, 2e9), dice.between(4e6, 6e7));
      tank.name = "tank-" + std::to_string(t + 1);
      tank.axis_to = length * dice.direction();
      const int collar_count = 2 + static_cast<int>(dice.engine() % 3);
      for (int c = 0; c < collar_count; ++c)
        tank.collars.push_back(
            random_collar(dice, tank, length * (0.1 + 0.8 * c / (collar_count - 1.0)), c + 1));
      tanks.push_back(tank);
    }
    const Index n = 6 * foot_count(tanks);
    MatrixX root(n, n);
    for (Index i = 0; i < n * n; ++i)
      root(i / n, i % n) = dice.between(-1e-4, 1e-4) / std::sqrt(static_cast<double>(n));
    std::vector<MountStage> stages{random_stage(dice, tanks, true)};
    for (int s = 0; s < 5; ++s)
      stages.push_back(random_stage(dice, tanks, false));
    CAPTURE(seed);
    try
    {
      const auto results = run_history(tanks, root * root.transpose(), stages,
                                       dice.coin(0.5) ? RangeEnd::low : RangeEnd::high);
      REQUIRE(!results.empty());
      const bool is_lost = !results.back().not_held.empty();
      CHECK((is_lost || results.size() == stages.size()));
      (is_lost ? not_held : settled) += 1;
      double work = 0.0;
      for (const MountStageResult& result : results)
      {
        if (&result != &results.back() || !is_lost)
          CHECK(result.equilibrium_residual < 1e-8);
        CHECK(result.work_lost >= work - 1e-9);
        work = result.work_lost;
        for (const TankResult& tank : result.tanks)
          for (const CollarResult& collar : tank.collars)
            CHECK(std::abs(collar.friction_force) <= collar.friction_limit * (1 + 1e-7) + 1e-3);
      }
    }
    catch (const SolveError& error)
    {
      CHECK_THAT(error.what(), Catch::Matchers::Contains("collar"));
      unsettled.push_back(std::to_string(seed) + ": " + error.what());
    }
  }
  for (const std::string& line : unsettled)
    UNSCOPED_INFO(line);
  CAPTURE(settled, not_held);
  CHECK(unsettled.size() <= 3); // said why, by name
  CHECK(settled > 200);
}
