// Parts J3, J4, J12 of the verification book: bodies balanced by their own inertia.
#include "box_mesh.hpp"

#include "carlin/solution/hull_solver.hpp"

#include <catch2/catch.hpp>
#include <memory>

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using namespace carlin;
using test::MeshBuilder;

namespace
{
/// Section of area A, equal second moments I, rigid in shear.
GivenSection rod(double area, double second_moment)
{
  return {.area = area,
          .second_moment_y = second_moment,
          .second_moment_z = second_moment,
          .torsion_constant = second_moment,
          .shear_area_y = {},
          .shear_area_z = {}};
}

struct FreeBeam
{
  MeshBuilder builder;
  Structure structure;
};

/// Beam on the x axis from 0 to `length`; kept in place because a structure points to its mesh.
std::unique_ptr<FreeBeam> free_beam(Model model, double length, int divisions)
{
  auto beam = std::make_unique<FreeBeam>();
  beam->builder.beam("hull", "hull", Vector3(0, 0, 0), Vector3(length, 0, 0), divisions);
  if (model.frame)
  {
    beam->builder.named_point("aft", Vector3(0, 0, 0));
    beam->builder.named_point("forward", Vector3(length, 0, 0));
  }
  beam->structure = build_structure(model, ConfiguredCraft{}, beam->builder.mesh, Outfit{});
  return beam;
}

struct Answer
{
  VectorX displacement; ///< mean rigid motion removed, weighted by mass
  VectorX field;        ///< nodal accelerations
  double pin_force = 0.0;
};

Answer relieved(const Structure& structure, const VectorX& load, const MassProperties& craft)
{
  const Vector6 sum = resultant(structure, load, craft.centre);
  return [&]
  {
    Answer answer;
    const RigidAcceleration acceleration = rigid_acceleration(craft, sum.head<3>(), sum.tail<3>());
    answer.field = VectorX::Zero(load.size());
    for (std::size_t n = 0; n < structure.nodes.size(); ++n)
    {
      answer.field.segment<3>(static_cast<Index>(6 * n)) = acceleration.at(structure.nodes[n]);
      answer.field.segment<3>(static_cast<Index>(6 * n) + 3) = acceleration.angular;
    }
    const VectorX forces = load + inertia_forces(structure, acceleration);
    const HullSolver solver(structure);
    answer.displacement = solver.solve(forces);
    answer.pin_force = solver.reactions(answer.displacement, forces).cwiseAbs().maxCoeff();
    const MatrixX modes = rigid_modes(structure, structure.mass_properties.centre);
    const Matrix6 inertia = modes.transpose() * structure.mass * modes;
    const Vector6 momentum = modes.transpose() * (structure.mass * answer.displacement);
    answer.displacement -= modes * inertia.completeOrthogonalDecomposition().solve(momentum);
    return answer;
  }();
}

/// Forces at both ends of a member, its own inertia load taken off.
MemberForces forces_of(const Structure& structure, std::size_t m, const Answer& answer)
{
  const Member& member = structure.members[m];
  const MemberGeometry geometry = member_geometry(structure, member);
  const MemberSection& section =
      structure.member_sections[static_cast<std::size_t>(member.section)];
  const Vector12 own = -member_mass(geometry, section) * member_displacement(member, answer.field);
  return member_forces(geometry, section, member_displacement(member, answer.displacement), own);
}

/// Bending moment at a node from the member before it, sagging + (M_y is positive with the top in
/// tension).
double sagging(const Structure& structure, std::size_t node, const Answer& answer)
{
  return node == 0 ? -forces_of(structure, 0, answer).end_1[4]
                   : -forces_of(structure, node - 1, answer).end_2[4];
}
} // namespace

TEST_CASE("A free beam under one force bends as its inertia says", "[verification][floating]")
{
  // J3, EI = P = L = m = 1, 20 elements: consistent mass gives 1.9e-6 to 2.7e-5; ask 3e-5.
  Model model = test::small_model();
  test::add_given_profile(model, "hull", 1e6, 1.0, rod(1.0, 1e-6));
  const auto beam = free_beam(model, 1.0, 20);
  const Structure& structure = beam->structure;
  struct Case
  {
    Index node;                  // loaded
    double w_load, w_aft, w_fwd; // deflections
    double moment;               // M at node `moment_node`
    std::size_t moment_node;
  };
  for (const Case& expected :
       {Case{10, 1.0 / 320, -3.0 / 640, -3.0 / 640, -1.0 / 8, 10},
        Case{0, 1.0 / 105, 1.0 / 105, 1.0 / 140, 4.0 / 27, 7},
        Case{5, 247.0 / 430080, -45.0 / 28672, -137.0 / 430080, -9.0 / 128, 5}})
  {
    CAPTURE(expected.node);
    VectorX load = VectorX::Zero(structure.stiffness.rows());
    load[6 * expected.node + 2] = 1.0;
    const Answer answer = relieved(structure, load, structure.mass_properties);
    CHECK(answer.pin_force < 1e-8);
    const auto w = [&](Index node) { return answer.displacement[6 * node + 2]; };
    CHECK_THAT(w(expected.node), WithinRel(expected.w_load, 3e-5));
    CHECK_THAT(w(0), WithinRel(expected.w_aft, 3e-5));
    CHECK_THAT(w(20), WithinRel(expected.w_fwd, 3e-5));
    // The end-loaded beam has its extreme at L/3, between nodes 6 and 7: M = x (1 - x)^2 there.
    const double x = 0.05 * static_cast<double>(expected.moment_node);
    const double moment = expected.node == 0 ? x * (1 - x) * (1 - x) : expected.moment;
    CHECK_THAT(sagging(structure, expected.moment_node, answer), WithinRel(moment, 1e-3));
  }
}

TEST_CASE("The centre of percussion leaves the far end still", "[verification][floating]")
{
  // J3: a = L/3.
  MassProperties body{1.0, Vector3(0.5, 0, 0), Matrix3::Zero()};
  body.inertia.diagonal() << 0.0, 1.0 / 12, 1.0 / 12;
  const Vector3 force(0, 0, 1), arm(1.0 / 3.0 - 0.5, 0, 0);
  const RigidAcceleration acceleration = rigid_acceleration(body, force, arm.cross(force));
  CHECK_THAT(acceleration.at(Vector3(1, 0, 0)).z(), WithinAbs(0.0, 1e-14));
  CHECK_THAT(acceleration.at(Vector3(0, 0, 0)).z(), WithinRel(2.0, 1e-13));
}

TEST_CASE("A light bar carries the share of the mass it pulls", "[verification][floating]")
{
  // J4: 3000 and 320 kg, F 60 kN on the first: bar force F m2/(m1 + m2).
  Model model = test::small_model();
  test::add_given_profile(model, "hull", 70e9, 1e-6, rod(1e-3, 1e-7));
  model.frame.emplace();
  model.frame->masses = {{{"boat", {}}, "aft", 3000.0}, {{"tank", {}}, "forward", 320.0}};
  const auto beam = free_beam(model, 2.0, 4);
  const Structure& structure = beam->structure;
  VectorX load = VectorX::Zero(structure.stiffness.rows());
  load[0] = -60e3; // pulls the first mass aft, the bar pulls the second after it
  const Answer answer = relieved(structure, load, structure.mass_properties);
  CHECK_THAT(forces_of(structure, 2, answer).end_1[0], WithinRel(5783.13253, 1e-8));
  CHECK_THAT(answer.field[6], WithinRel(-18.0722892, 1e-8));
}

TEST_CASE("A free bar pulled at one end stretches by half of P L / EA", "[verification][floating]")
{
  // J4: N(x) = P (1 - x/L) from the pulled end.
  Model model = test::small_model();
  test::add_given_profile(model, "hull", 70e9, 2700.0, rod(1e-3, 1e-7));
  const auto beam = free_beam(model, 2.0, 10);
  const Structure& structure = beam->structure;
  VectorX load = VectorX::Zero(structure.stiffness.rows());
  load[0] = -1000.0;
  const Answer answer = relieved(structure, load, structure.mass_properties);
  for (std::size_t m = 0; m < 10; ++m)
  {
    const double middle = 0.1 * (static_cast<double>(m) + 0.5);
    const MemberForces forces = forces_of(structure, m, answer);
    CHECK_THAT(0.5 * (forces.end_1[0] + forces.end_2[0]), WithinRel(1000.0 * (1 - middle), 1e-9));
  }
  const double stretch = answer.displacement[60] - answer.displacement[0];
  CHECK_THAT(stretch, WithinRel(1000.0 * 2.0 / (2.0 * 70e9 * 1e-3), 1e-9));
}

TEST_CASE("A slam on a hull with a tank bends the hull as statics says", "[verification][floating]")
{
  // J12: hull 8000 kg over 11 m, uniform; tank 320 kg, a 2 m rod on collars at x 4 and 6; P 60 kN
  // at x 9.5. The tank reaches the hull through its collars alone. 44 elements, 1e-3.
  Model model = test::small_model();
  test::add_given_profile(model, "hull", 1e14, 8000.0 / 11.0, rod(1.0, 1e-7));
  const auto beam = free_beam(model, 11.0, 44);
  const Structure& structure = beam->structure;
  MassProperties tank{320.0, Vector3(5, 0, 0), Matrix3::Zero()};
  tank.inertia.diagonal() << 0.0, 320.0 * 4.0 / 12.0, 320.0 * 4.0 / 12.0;
  const MassProperties craft = combined({structure.mass_properties, tank});
  // The book's beam is thin: no rotary inertia of its sections to speak of.
  CHECK_THAT(craft.centre.x(), WithinRel(5.48076923, 1e-8));
  CHECK_THAT(craft.inertia(1, 1), WithinRel(80850.2564, 1e-6));

  const RigidAcceleration acceleration = rigid_acceleration(
      craft, Vector3(0, 0, 60e3), (Vector3(9.5, 0, 0) - craft.centre).cross(Vector3(0, 0, 60e3)));
  CHECK_THAT(acceleration.linear.z(), WithinRel(7.21153846, 1e-8));
  CHECK_THAT(-acceleration.angular.y(), WithinRel(2.98272209, 1e-6));
  CHECK_THAT(acceleration.at(Vector3(11, 0, 0)).z(), WithinRel(23.6738700, 1e-6));
  CHECK_THAT(acceleration.at(Vector3(5, 0, 0)).z(), WithinRel(5.77753745, 1e-6));

  // Collar forces from the tank's own equilibrium, two unknowns.
  const double sum = 320.0 * acceleration.at(tank.centre).z();
  const double couple = tank.inertia(1, 1) * -acceleration.angular.y(); // bow up, arms +-1 m
  const double aft = 0.5 * (sum - couple), forward = 0.5 * (sum + couple);
  CHECK_THAT(aft, WithinRel(765.327481, 1e-6));
  CHECK_THAT(forward, WithinRel(1083.48450, 1e-6));

  VectorX load = VectorX::Zero(structure.stiffness.rows());
  load[6 * 38 + 2] = 60e3;
  load[6 * 16 + 2] = -aft;
  load[6 * 24 + 2] = -forward;
  const Answer answer = relieved(structure, load, structure.mass_properties);
  CHECK(answer.pin_force < 1e-8 * 60e3);
  for (const auto& [x, moment] : {std::pair(3.0, 20138.2394),
                                  {4.0, 30016.6413},
                                  {5.0, 37097.1228},
                                  {6.0, 39975.7588},
                                  {8.0, 22283.5159},
                                  {9.5, -18149.3255}})
  {
    CAPTURE(x);
    CHECK_THAT(sagging(structure, static_cast<std::size_t>(std::lround(4 * x)), answer),
               WithinRel(moment, 1e-3));
  }
}
