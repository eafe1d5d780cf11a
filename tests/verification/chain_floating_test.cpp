// Group J of the verification book through the chain: free structures balanced by their own
// inertia.

#include "chain.hpp"

#include <catch2/catch.hpp>
#include <cmath>

using namespace carlin;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace
{
/// Deflection along z with the mean and mean rotation taken off, weighted by length (a uniform
/// beam).
double shown(const chain::Run& run, const std::string& point, const std::string& stage)
{
  const Structure& structure = *run.first().structure;
  const VectorX& u = run.stage(stage).displacement;
  // Exact integrals of the cubic element field over the beam: w and x w, from nodal values.
  double length = 0.0, mean = 0.0, first = 0.0, second = 0.0, centre = 0.5;
  for (const Member& member : structure.members)
  {
    const auto a = static_cast<std::size_t>(member.nodes[0]);
    const auto b = static_cast<std::size_t>(member.nodes[1]);
    const double xa = structure.nodes[a].x();
    const double xb = structure.nodes[b].x();
    const double h = xb - xa;
    const double wa = u[6 * member.nodes[0] + 2];
    const double wb = u[6 * member.nodes[1] + 2];
    const double sa = -u[6 * member.nodes[0] + 4]; // w,x = -r_y
    const double sb = -u[6 * member.nodes[1] + 4];
    const double area = h * (wa + wb) / 2.0 + h * h * (sa - sb) / 12.0;
    // integral of xi w over 0..h for the cubic
    const double moment =
        h * h * (3.0 * wa + 7.0 * wb) / 20.0 + h * h * h * (2.0 * sa - 3.0 * sb) / 60.0;
    length += h;
    mean += area;
    first += (xa - centre) * area + moment;
    second += (std::pow(xb - centre, 3) - std::pow(xa - centre, 3)) / 3.0;
  }
  const Index node = node_at(structure, point);
  const double x = structure.nodes[static_cast<std::size_t>(node)].x();
  return u[6 * node + 2] - mean / length - first / second * (x - centre);
}
} // namespace

// J3, source: closed form derived for the book; 20 elements with consistent mass: 1.9e-6 to 2.7e-5
// relative.
TEST_CASE("J3: a free beam under one force is balanced by its own inertia", "[verification][chain]")
{
  const chain::Run middle = chain::run("J3-middle");
  CHECK_THAT(shown(middle, "p2", "pushed"), WithinRel(1.0 / 320.0, 3e-5));
  CHECK_THAT(shown(middle, "p0", "pushed"), WithinRel(-3.0 / 640.0, 3e-5));
  CHECK_THAT(shown(middle, "p4", "pushed"), WithinRel(-3.0 / 640.0, 3e-5));
  const chain::Run end = chain::run("J3-end");
  CHECK_THAT(shown(end, "p0", "pushed"), WithinRel(1.0 / 105.0, 3e-5));
  CHECK_THAT(shown(end, "p4", "pushed"), WithinRel(1.0 / 140.0, 3e-5));
  CHECK_THAT(shown(end, "p2", "pushed"), WithinRel(-3.0 / 640.0, 3e-5));
  const chain::Run quarter = chain::run("J3-quarter");
  CHECK_THAT(shown(quarter, "p1", "pushed"), WithinRel(247.0 / 430080.0, 3e-5));
  CHECK_THAT(shown(quarter, "p0", "pushed"), WithinRel(-45.0 / 28672.0, 3e-5));
  CHECK_THAT(shown(quarter, "p4", "pushed"), WithinRel(-137.0 / 430080.0, 3e-5));
  // acceleration = force over mass; 4P/m at the loaded end, -2P/m at the far one
  const RigidAcceleration& a = end.stage("pushed").acceleration;
  CHECK_THAT(a.linear.z(), WithinRel(1.0, 1e-10));
  CHECK_THAT(a.at(Vector3(0.0, 0.0, 0.0)).z(), WithinRel(4.0, 1e-6));
  for (const chain::Run* run : {&middle, &end, &quarter})
    CHECK(run->result.audit.largest_pin_reaction < 1e-10);
}

// J12, source: closed form derived for the book (rigid-body figures are statically determinate).
TEST_CASE("J12: slam on a floating hull with a tank on two collars", "[verification][chain]")
{
  const chain::Run run = chain::run("J12-slam-with-tank");
  const RigidAcceleration& a = run.stage("slam").acceleration;
  CHECK_THAT(a.centre.x(), WithinRel(5.48076923, 1e-8));
  CHECK_THAT(a.linear.z(), WithinRel(7.21153846, 1e-8));
  CHECK_THAT(-a.angular.y(), WithinRel(2.98272209, 2e-5)); // section's rotary inertia
  CHECK_THAT(run.collar("aft", "slam").force[2], WithinRel(765.327481, 1e-3));
  CHECK_THAT(run.collar("forward", "slam").force[2], WithinRel(1083.48450, 1e-3));
  CHECK(run.result.audit.largest_pin_reaction < 1e-8);
}
