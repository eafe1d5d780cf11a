// Verification book, G1 and G2. G1 printed to nine digits; here against the closed form's values.

#include "mount_examples.hpp"

#include "carlin/mounts/ring.hpp"

#include <catch2/catch.hpp>
#include <numbers>

using namespace carlin;
using namespace carlin::testing;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

TEST_CASE("A lined ring presses as its closed form says", "[unit][mounts]")
{
  struct Row
  {
    double e, d, degrees, R, N, R_d, R_e, N_e, W;
  };
  const std::vector<Row> rows{
      {1, 0.5, 180, 1.57079633, 6.28318531, 3.14159265, 0, 6.28318531, 3.53429174},
      {1, 1, 180, 3.14159265, 6.28318531, 3.14159265, 0, 6.28318531, 4.71238898},
      {1, 1.25, 143.130102, 3.72261443, 6.49618309, 2.01809154, 1.2, 4.99618309, 5.57472556},
      {1, 2, 120, 5.05481561, 7.65289182, 1.66138240, 1.73205081, 4.18879020, 8.88126152},
      {1, 5, 101.536959, 9.84056714, 13.3422675, 1.57619507, 1.95959179, 3.54430850, 31.2725516},
      {0, 1, 90, 1.57079633, 2, 1.57079633, 2, 3.14159265, 0.785398163},
      {-0.25, 1, 75.522488, 1.07605461, 1.27743364, 1.56017753, 1.93649167, 2.63623214,
       0.378348096},
      {-0.5, 1, 60, 0.614184849, 0.684853256, 1.48021025, 1.73205081, 2.09439510, 0.135879110},
      {-0.9, 1, 25.841933, 0.0587259110, 0.0599315300, 0.84332772, 0.87177979, 0.90205362,
       0.00239377},
      {-1, 1, 0, 0, 0, 0, 0, 0, 0},
      {-1, 1.001, 2.561278, 5.959e-5, 5.960e-5, 0.08934595, 0.08937570, 0.08940548, 2e-8},
      {-1, 2, 60, 1.22836970, 1.36970651, 1.48021025, 1.73205081, 2.09439510, 0.543516440}};
  for (const Row& row : rows)
  {
    CAPTURE(row.e, row.d);
    const RingResponse ring = ring_response(row.e, row.d);
    const double digits = 1e-8 * std::max(1.0, row.W); // printed
    CHECK_THAT(ring.half_contact * 180.0 / std::numbers::pi, WithinAbs(row.degrees, 6e-7));
    CHECK_THAT(ring.reaction, WithinAbs(row.R, digits));
    CHECK_THAT(ring.clamping, WithinAbs(row.N, digits));
    CHECK_THAT(ring.reaction_by_offset, WithinAbs(row.R_d, digits));
    CHECK_THAT(ring.reaction_by_interference, WithinAbs(row.R_e, digits));
    CHECK_THAT(ring.clamping_by_interference, WithinAbs(row.N_e, digits));
    CHECK_THAT(ring.potential, WithinAbs(row.W, 2.0 * digits));
  }
}

TEST_CASE("A ring is smooth at full contact and at lift-off", "[unit][mounts]")
{
  for (const double h : {1e-6, 1e-9, 1e-12})
  {
    // Near lift-off with t^2 = 2 h: R = N = 2 t^3 / 3 per d, to first order in h.
    const RingResponse lifting = ring_response(-1.0, 1.0 + h);
    const double t = std::sqrt(2.0 * h);
    CHECK_THAT(lifting.reaction, WithinRel(2.0 / 3.0 * t * t * t, 2e-4)); // digits of 1 + h
    const RingResponse inside = ring_response(1.0, 1.0 - h);
    const RingResponse outside = ring_response(1.0, 1.0 + h);
    CHECK_THAT(outside.reaction, WithinAbs(inside.reaction, 10.0 * h));
    CHECK_THAT(outside.reaction_by_offset,
               WithinAbs(inside.reaction_by_offset, 10.0 * std::sqrt(h)));
  }
  CHECK(ring_response(-1.0, 0.5).reaction == 0.0);
  CHECK(ring_response(0.0, 0.0).clamping == 0.0);
  CHECK_THAT(ring_response(1.0, 0.0).reaction_over_offset, WithinRel(std::numbers::pi, 1e-15));
}

namespace
{
std::vector<Tank> ringed_tank(double preload)
{
  Tank tank = bare_tank(2.0, 4e8);
  tank.collars = {collar_at(tank, "fixed", 0.0), collar_at(tank, "sliding", 2.0)};
  make_slide(tank.collars[1], SlidesAt::lining, 0.1);
  LinedRing ring;
  ring.radius = 0.25;
  ring.width = 0.08;
  ring.bed_stiffness = 2e8;
  ring.preload = preload;
  tank.collars[1].ring = ring;
  return {tank};
}
} // namespace

TEST_CASE("A side load finds its offset in the ring", "[unit][mounts]")
{
  struct Row // G2
  {
    double e, force, d, clamping, peak;
  };
  const std::vector<Row> rows{{1.0, 1500, 0.119366207, 25132.7412, 0.223873241},
                              {1.0, 15000, 1.26363160, 26050.7875, 0.452726320},
                              {0.2, 1500, 0.119366207, 5026.54825, 0.0638732415},
                              {0.2, 6000, 0.703752274, 8372.21368, 0.180750455},
                              {0.2, 15000, 2.13304985, 19652.7380, 0.466609970},
                              {0.0, 6000, 0.954929659, 7639.43727, 0.190985932},
                              {-0.3, 1500, 0.604380811, 1674.03560, 0.0608761623},
                              {-0.3, 6000, 1.33365529, 7170.42185, 0.206731057},
                              {-0.3, 15000, 2.76854717, 18508.6260, 0.493709435}};
  for (const Row& row : rows)
  {
    CAPTURE(row.e, row.force);
    const std::vector<Tank> tanks = ringed_tank(1e-3 * row.e);
    MountStage stage = quiet_stage(tanks);
    stage.tanks[0].forces = {{2.0, Vector3(0.0, 0.6 * row.force, -0.8 * row.force)}};
    const auto results = run_history(tanks, rigid_bed(tanks), {stage}, RangeEnd::low);
    const CollarResult& ring = results.at(0).tanks[0].collars[1];
    CHECK(error_of("G2", "offset [mm]", row.d, 1e3 * ring.offset) < 1e-8);
    CHECK(error_of("G2", "clamping force [N]", row.clamping, ring.clamping_force) < 1e-8);
    CHECK_THAT(1e-6 * ring.peak_lining_pressure, WithinRel(row.peak, 1e-8));
  }
  const std::vector<Tank> tanks = ringed_tank(0.2e-3); // two directions
  MountStage stage = quiet_stage(tanks);
  stage.tanks[0].forces = {{2.0, Vector3(0.0, 2818.70307, -3758.27077)}};
  const auto results = run_history(tanks, rigid_bed(tanks), {stage}, RangeEnd::low);
  const Vector3 offset = results.at(0).tanks[0].sections.back().displacement -
                         results[0].tanks[0].collars[1].displacement;
  CHECK_THAT(1e3 * offset.y(), WithinRel(0.3, 1e-8));
  CHECK_THAT(1e3 * offset.z(), WithinRel(-0.4, 1e-8));
  CHECK_THAT(results[0].tanks[0].collars[1].clamping_force, WithinRel(6837.76163, 1e-8));
}
