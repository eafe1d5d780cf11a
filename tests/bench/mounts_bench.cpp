// How many stages of a four-collar tank are run a second. Command:
// build/<preset>/tests/mounts_bench

#include "mount_examples.hpp"

#include <catch2/catch.hpp>
#include <chrono>

using namespace carlin;
using namespace carlin::testing;

TEST_CASE("Stages a second of a four-collar tank", "[bench][mounts]")
{
  Tank tank = bare_tank(3.0, 4e8);
  for (int i = 0; i < 4; ++i)
  {
    tank.collars.push_back(collar_at(tank, "collar-" + std::to_string(i), i, 1.5e7, 2e7));
    if (i == 0)
      continue;
    make_slide(tank.collars.back(), SlidesAt::lining, 0.15);
    LinedRing ring;
    ring.radius = 0.224;
    ring.width = 0.08;
    ring.bed_stiffness = 1e9;
    ring.preload = 0.2e-3;
    tank.collars.back().ring = ring;
  }
  const std::vector<Tank> tanks{tank};
  std::vector<MountStage> stages;
  for (int i = 0; i < 200; ++i)
  {
    stages.push_back(quiet_stage(tanks));
    TankStageLoad& load = stages.back().tanks[0];
    load.mass = 150.0;
    load.felt = Vector3(0.0, 0.0, -standard_gravity);
    load.axial_strain = i % 2 == 0 ? 0.0 : 2e-3;
    load.radial_growth = i % 2 == 0 ? 0.0 : 0.7e-3;
  }
  const auto start = std::chrono::steady_clock::now();
  const auto results = run_history(tanks, rigid_bed(tanks), stages, RangeEnd::high);
  const std::chrono::duration<double> taken = std::chrono::steady_clock::now() - start;
  REQUIRE(results.size() == stages.size());
  WARN(static_cast<double>(stages.size()) / taken.count() << " stages/s");
}
