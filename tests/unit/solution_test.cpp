#include "box_mesh.hpp"

#include "carlin/core/error.hpp"
#include "carlin/solution/hull_solver.hpp"

#include <algorithm>
#include <catch2/catch.hpp>

using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using namespace carlin;
using test::MeshBuilder;

namespace
{
Structure built(const Model& model, const Mesh& mesh)
{
  return build_structure(model, ConfiguredCraft{}, mesh, Outfit{});
}

MeshBuilder box()
{
  MeshBuilder builder;
  test::add_box(builder, {.cells = {6, 4, 2}, .bulkheads = {3.0, 6.0}});
  return builder;
}

/// Nodal forces balanced by the structure's own inertia.
VectorX balanced(const Structure& structure, const VectorX& forces)
{
  const MassProperties& body = structure.mass_properties;
  const Vector6 sum = resultant(structure, forces, body.centre);
  return forces + inertia_forces(structure, rigid_acceleration(body, sum.head<3>(), sum.tail<3>()));
}
} // namespace

TEST_CASE("The factor solves many right-hand sides and refuses an indefinite matrix",
          "[unit][solution]")
{
  SparseMatrix matrix(3, 3);
  matrix.insert(0, 0) = 4.0;
  matrix.insert(1, 0) = -1.0;
  matrix.insert(1, 1) = 3.0;
  matrix.insert(2, 1) = 1.0; // the lower triangle is enough
  matrix.insert(2, 2) = 2.0;
  const MatrixX full = MatrixX(matrix).selfadjointView<Eigen::Lower>();
  MatrixX b(3, 2);
  b << 1, 0, 2, 1, 3, -1;
  const SparseFactor factor(matrix);
  CHECK((full * factor.solve(b) - b).norm() < 1e-14);
  CHECK_THAT(factor.pivots().prod(), WithinRel(full.determinant(), 1e-13));
  matrix.coeffRef(2, 2) = -2.0;
  CHECK_THROWS_AS(SparseFactor(matrix), SolveError);
}

TEST_CASE("Six pins of a floating hull carry nothing when its inertia balances the load",
          "[unit][solution]")
{
  const MeshBuilder builder = box();
  const Structure structure = built(test::small_model(), builder.mesh);
  const HullSolver solver(structure);
  CHECK(solver.is_floating());
  CHECK(solver.held_freedoms().size() == 6);

  VectorX load = VectorX::Zero(structure.stiffness.rows());
  load[6 * nearest_node(structure, Vector3(9, 1.3, 0)) + 2] = 60e3;
  load[6 * nearest_node(structure, Vector3(4.5, -1.3, 1.2)) + 1] = -9e3;
  load[6 * nearest_node(structure, Vector3(0, 0, 0)) + 0] = 5e3;
  const VectorX forces = balanced(structure, load);
  const MatrixX displacement = solver.solve(forces);
  CHECK(solver.reactions(displacement, forces).cwiseAbs().maxCoeff() < 1e-8 * 60e3);
  const VectorX residual = structure.stiffness * displacement.col(0) - forces;
  CHECK(residual.cwiseAbs().maxCoeff() < 1e-8 * 60e3);
}

TEST_CASE("A mirrored load gives the mirrored answer", "[unit][solution]")
{
  const MeshBuilder builder = box();
  const Structure structure = built(test::small_model(), builder.mesh);
  const HullSolver solver(structure);
  const auto shape = [&](double side)
  {
    VectorX load = VectorX::Zero(structure.stiffness.rows());
    load[6 * nearest_node(structure, Vector3(7.5, side * 1.3, 0)) + 2] = 60e3;
    VectorX u = solver.solve(balanced(structure, load));
    const MatrixX modes = rigid_modes(structure, structure.mass_properties.centre);
    const Matrix6 inertia = modes.transpose() * structure.mass * modes;
    u -= modes * inertia.ldlt().solve(modes.transpose() * (structure.mass * u));
    return u;
  };
  const VectorX port = shape(1.0), starboard = shape(-1.0);
  double difference = 0.0;
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
  {
    const Vector3& p = structure.nodes[n];
    const Index mirror = nearest_node(structure, Vector3(p.x(), -p.y(), p.z()));
    Vector6 reflected = starboard.segment<6>(6 * mirror);
    for (const Index component : {1, 3, 5})
      reflected[component] = -reflected[component];
    difference = std::max(
        difference, (port.segment<6>(static_cast<Index>(6 * n)) - reflected).cwiseAbs().maxCoeff());
  }
  CHECK(difference < 1e-9 * port.cwiseAbs().maxCoeff());
}

TEST_CASE("A part joined to nothing is named", "[unit][solution]")
{
  MeshBuilder builder = box();
  const double x = 4.6; // between two frames: shares no points
  const Index part = builder.plate_part("bulkhead-9", "plate", Surface::station);
  builder.grid(part, {Vector3(x, -1, 0.1), Vector3(x, 1, 0.1), Vector3(x, 1, 1), Vector3(x, -1, 1)},
               {2, 2});
  const Structure structure = built(test::small_model(), builder.mesh);
  CHECK_THROWS_WITH(HullSolver(structure), Contains("bulkhead-9 is not joined to anything (near"));
}

TEST_CASE("A part that can move without resistance is named", "[unit][solution]")
{
  SECTION("a bulkhead on a joint without stiffness across")
  {
    MeshBuilder builder = box();
    builder.mesh.joints.push_back({{"slip", {}}, "bulkhead-1", 1e9, 1e9, 0.0, 0.0, ""});
    const Structure structure = built(test::small_model(), builder.mesh);
    CHECK_THROWS_WITH(HullSolver(structure),
                      Contains("bulkhead-1 can move without resistance: it moves along x"));
  }
  SECTION("a post on a ball joint")
  {
    MeshBuilder builder;
    builder.beam("post", "bar", Vector3(0, 0, 0), Vector3(0, 0, 2), 4);
    builder.named_point("foot", Vector3(0, 0, 0));
    Model model = test::small_model();
    Support foot;
    foot.name = "foot";
    foot.points = {"foot"};
    foot.holds = {true, true, true, false, false, true};
    model.frame.emplace();
    model.frame->supports = {foot};
    const Structure structure = built(model, builder.mesh);
    CHECK_THROWS_WITH(HullSolver(structure), Contains("post can move without resistance"));
  }
}

TEST_CASE("Imposed motion and springs to ground give hand-calculated answers", "[unit][solution]")
{
  // Bar EA/L = 1e6 N/m between two points; the far end moved, or on a spring.
  Model model = test::small_model();
  test::add_given_profile(model, "rod", 1e9, 1000.0,
                          {.area = 1e-3,
                           .second_moment_y = 1e-6,
                           .second_moment_z = 1e-6,
                           .torsion_constant = 1e-6,
                           .shear_area_y = {},
                           .shear_area_z = {}});
  MeshBuilder builder;
  builder.beam("rod", "rod", Vector3(0, 0, 0), Vector3(1, 0, 0), 4);
  builder.named_point("a", Vector3(0, 0, 0));
  builder.named_point("b", Vector3(1, 0, 0));
  Support fixed;
  fixed.name = "fixed";
  fixed.points = {"a"};
  fixed.holds.fill(true);
  Support moved;
  moved.name = "moved";
  moved.points = {"b"};
  moved.motion[0] = 0.002;
  model.frame.emplace();

  SECTION("moved")
  {
    moved.holds[0] = true;
    model.frame->supports = {fixed, moved};
    const Structure structure = built(model, builder.mesh);
    const HullSolver solver(structure);
    const VectorX u = solver.imposed_displacement();
    CHECK_THAT(u[6 * nearest_node(structure, Vector3(0.5, 0, 0))], WithinRel(0.001, 1e-10));
    const MatrixX reactions = solver.reactions(u, VectorX::Zero(u.size()));
    CHECK_THAT(reactions(6, 0), WithinRel(2000.0, 1e-9)); // seventh held: u_x of b
    CHECK_FALSE(solver.is_floating());
  }
  SECTION("on a spring whose ground moves")
  {
    moved.springs[0] = 3e6; // in series with the rod: 3/4 of the motion
    model.frame->supports = {fixed, moved};
    const Structure structure = built(model, builder.mesh);
    const HullSolver solver(structure);
    const Index tip = 6 * node_at(structure, "b");
    CHECK_THAT(solver.imposed_displacement()[tip], WithinRel(0.0015, 1e-10));
    VectorX force = VectorX::Zero(structure.stiffness.rows());
    force[tip] = 1000.0;
    CHECK_THAT(solver.solve(force)(tip, 0), WithinRel(1000.0 / 4e6, 1e-10));
  }
}

TEST_CASE("Four masses accelerate as the full inertia tensor says", "[verification][solution]")
{
  // Verification book J5, computed; 1e-8.
  const std::array<double, 4> masses = {4000, 1500, 2500, 2000};
  const std::array<Vector3, 4> places = {Vector3(0, 0, 0), Vector3(12, 0, 0.5),
                                         Vector3(5, 1.5, 1.0), Vector3(6, -1.2, 0.4)};
  std::vector<MassProperties> bodies;
  for (std::size_t i = 0; i < 4; ++i)
    bodies.push_back({masses[i], places[i], Matrix3::Zero()});
  const MassProperties body = combined(bodies);
  CHECK((body.centre - Vector3(4.25, 0.135, 0.405)).norm() < 1e-12);
  Matrix3 inertia;
  inertia << 9877.5, 1387.5, -9087.5, 1387.5, 171429.75, -2243.25, -9087.5, -2243.25, 178197.75;
  CHECK((body.inertia - inertia).norm() < 1e-12 * inertia.norm());

  const Vector3 force(-5e3, 8e3, 120e3), at(9, 0.6, 0.1);
  const RigidAcceleration acceleration =
      rigid_acceleration(body, force, (at - body.centre).cross(force));
  CHECK((acceleration.linear - Vector3(-0.5, 0.8, 12.0)).norm() < 1e-12);
  const Vector3 angular(6.85994077, -3.36461894, 0.533772340);
  CHECK((acceleration.angular - angular).norm() < 1e-8);
  const std::array<Vector3, 4> expected = {
      Vector3(0.93472994, 1.30974356, -3.22572248), Vector3(-0.74757953, 4.28504127, 37.1497048),
      Vector3(-3.23054751, -2.88133550, 23.8872834), Vector3(0.22940917, 1.76840130, 8.73006221)};
  Vector3 sum = Vector3::Zero(), moment = Vector3::Zero();
  for (std::size_t i = 0; i < 4; ++i)
  {
    const Vector3 a = acceleration.at(places[i]);
    CHECK((a - expected[i]).norm() < 1e-7); // printed to 1e-8 a component, 1e-7 where large
    sum += masses[i] * a;
    moment += places[i].cross(masses[i] * a);
  }
  CHECK((sum - force).norm() < 1e-12 * force.norm());
  CHECK((moment - at.cross(force)).norm() < 1e-12 * at.cross(force).norm());
}

TEST_CASE("A craft without mass cannot be balanced", "[unit][solution]")
{
  CHECK_THROWS_WITH(rigid_acceleration({}, Vector3::UnitZ(), Vector3::Zero()), Contains("no mass"));
}
