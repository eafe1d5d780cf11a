// Parts K2 and K3 of the verification book: joints with stiffness per metre.
#include "box_mesh.hpp"

#include "carlin/loads/loads.hpp"
#include "carlin/solution/hull_solver.hpp"

#include <array>
#include <catch2/catch.hpp>

using Catch::Matchers::WithinRel;
using namespace carlin;
using test::MeshBuilder;

namespace
{
Joint seam(const std::string& part, double slip_stiffness)
{
  Joint joint;
  joint.name = "seam";
  joint.part = part;
  joint.stiffness_along = slip_stiffness;
  joint.stiffness_across = 1e11;
  joint.stiffness_normal = 1e11;
  joint.stiffness_rotation = 1e6;
  return joint;
}

GivenSection layer(double area, double second_moment)
{
  return {.area = area,
          .second_moment_y = second_moment,
          .second_moment_z = second_moment,
          .torsion_constant = second_moment,
          .shear_area_y = {},
          .shear_area_z = {}};
}

/// Middle deflection of the girder with a fastened top, L 3 m, 10 kN/m.
double fastened_top_deflection(double slip_stiffness)
{
  Model model = test::small_model();
  test::add_given_profile(model, "girder", 14e9, 0.0, layer(0.020, 2.0e-4));
  test::add_given_profile(model, "panel", 14e9, 0.0, layer(0.016, 1.0e-6));
  MeshBuilder builder;
  constexpr int divisions = 120;
  // Nodes on the interface: the layers' centroids 0.25 m apart.
  Run& girder = builder.beam("girder", "girder", Vector3::Zero(), Vector3(3, 0, 0), divisions);
  girder.offset_from = girder.offset_to = Vector3(0, 0, -0.2);
  Run& panel = builder.beam("panel", "panel", Vector3::Zero(), Vector3(3, 0, 0), divisions);
  panel.offset_from = panel.offset_to = Vector3(0, 0, 0.05);
  builder.mesh.joints.push_back(seam("panel", slip_stiffness));
  builder.named_point("a", Vector3(0, 0, 0));
  builder.named_point("b", Vector3(3, 0, 0));
  builder.named_point("middle", Vector3(1.5, 0, 0));
  Support pinned, rolling;
  pinned.name = "pinned";
  pinned.points = {"a"};
  pinned.holds = {true, true, true, true, false, true};
  rolling.name = "rolling";
  rolling.points = {"b"};
  rolling.holds = {false, true, true, true, false, false};
  model.frame.emplace();
  model.frame->supports = {pinned, rolling};
  const Structure structure = build_structure(model, ConfiguredCraft{}, builder.mesh, Outfit{});
  LineForce load;
  load.members = {"girder"};
  load.force_per_length = Vector3(0, 0, -10e3);
  const HullSolver solver(structure);
  const MatrixX u = solver.solve(line_force(structure, load).forces);
  return -u(6 * node_at(structure, "middle") + 2, 0);
}

/// Rotation about x of a section from its four corners: the mean of what its upright and its level
/// walls turn, on which a uniform flow round the section does its work. (Weighted by the arms, the
/// distortion of so thin a box, set up where the ends hinder the slip, would be read as twist.)
double section_twist(const Structure& structure, const VectorX& u, double x, double b, double d)
{
  double sum = 0.0;
  for (const double side : {-1.0, 1.0})
    for (const double height : {0.0, d})
    {
      const Index n = 6 * nearest_node(structure, Vector3(x, 0.5 * side * b, height));
      sum += 0.25 * side * u[n + 2] / b - 0.25 * (height > 0.0 ? 1.0 : -1.0) * u[n + 1] / d;
    }
  return sum;
}

/// Torque as the uniform flow of Bredt round an end section.
VectorX end_torque(const Structure& structure, double x, double torque, double b, double d)
{
  const double flow = torque / (2.0 * b * d);
  const std::array<Vector3, 4> corners = {Vector3(x, -0.5 * b, 0), Vector3(x, 0.5 * b, 0),
                                          Vector3(x, 0.5 * b, d), Vector3(x, -0.5 * b, d)};
  const std::array<int, 4> cells = {6, 4, 6, 4};
  VectorX forces = VectorX::Zero(structure.stiffness.rows());
  for (std::size_t side = 0; side < 4; ++side)
  {
    const Vector3 step = (corners[(side + 1) % 4] - corners[side]) / cells[side];
    for (int i = 0; i < cells[side]; ++i)
      for (const int end : {i, i + 1})
        forces.segment<3>(6 * nearest_node(structure, corners[side] + end * step)) +=
            0.5 * flow * step;
  }
  return forces;
}
} // namespace

TEST_CASE("A fastened top stiffens its girder as partial interaction says", "[verification][joint]")
{
  // K2, computed from Newmark, Siess & Viest 1951; chain 0.5 %.
  for (const auto& [stiffness, deflection] : {std::pair(1e6, 3.67387757e-3),
                                              {1e7, 3.15104226e-3},
                                              {1e8, 1.72290300e-3},
                                              {4e8, 1.22077894e-3},
                                              {1e9, 1.08997084e-3},
                                              {1e10, 1.00543820e-3}})
  {
    CAPTURE(stiffness);
    CHECK_THAT(fastened_top_deflection(stiffness), WithinRel(deflection, 5e-3));
  }
}

TEST_CASE("Slipping seams soften a closed box in torsion", "[verification][joint]")
{
  // K3: B 1.8, D 0.9 m, t 8 mm, G 3 GPa; J = 4 A^2/(sum ds/t + 2 G/K). 10 m box, diaphragms at the
  // ends, middle third; 1 %.
  Model model = test::small_model();
  model.materials[0].youngs_modulus = 7.8e9;
  model.materials[0].poissons_ratio = 0.3;
  model.schedules[0].thickness = 0.008;
  model.schedules[0].line = MouldedLine::centred;
  for (const auto& [stiffness, expected] :
       {std::pair(0.0, 0.015552), {2e8, 0.0148902128}, {2e7, 0.0107667692}})
  {
    CAPTURE(stiffness);
    MeshBuilder builder;
    test::add_box(builder, {.length = 10, .beam = 1.8, .depth = 0.9, .cells = {30, 6, 4}});
    if (stiffness > 0.0)
      builder.mesh.joints.push_back(seam("deck", stiffness));
    const Structure structure = build_structure(model, ConfiguredCraft{}, builder.mesh, Outfit{});
    const double torque = 20e3;
    const VectorX load = end_torque(structure, 10.0, torque, 1.8, 0.9) -
                         end_torque(structure, 0.0, torque, 1.8, 0.9);
    const VectorX u = HullSolver(structure).solve(load);
    const double from = 10.0 / 3.0, to = 20.0 / 3.0;
    const double twist =
        section_twist(structure, u, to, 1.8, 0.9) - section_twist(structure, u, from, 1.8, 0.9);
    CHECK_THAT(torque * (to - from) / (3e9 * twist), WithinRel(expected, 1e-2));
  }
}
