// Members in frames, grillages and two-material strips by elements alone: A9, A11, A12 of the
// verification book (closed forms, computed).
#include "element_model.hpp"
#include "verification_record.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <numbers>
#include <string>

using namespace carlin;
using namespace carlin::testing;

namespace
{
constexpr double pi = std::numbers::pi;
constexpr double infinity = std::numeric_limits<double>::infinity();

/// Tip motion of the quarter ring by n chords under a force at the tip.
Vector6 quarter_ring(Index n, const Vector3& force)
{
  MemberSection section;
  const double E = 210e9, G = E / 2.6;
  const double area = pi * 0.05 * 0.05 / 4.0, I = pi * std::pow(0.05, 4) / 64.0;
  section.axial_stiffness = E * area;
  section.bending_stiffness_y = section.bending_stiffness_z = E * I;
  section.torsional_stiffness = G * 2.0 * I;
  section.shear_stiffness_y = section.shear_stiffness_z = 0.9 * G * area;
  ElementModel model;
  for (Index i = 0; i <= n; ++i)
  {
    const double angle = 0.5 * pi * static_cast<double>(i) / static_cast<double>(n);
    model.add_node(Vector3(std::cos(angle), std::sin(angle), 0.0));
  }
  for (Index i = 0; i < n; ++i)
    model.add_member({{i, i + 1}, section, Vector3::Zero(), Vector3::Zero(), Vector3::UnitZ()});
  model.fix(0, "uvwabc");
  for (Index c = 0; c < 3; ++c)
    model.add_force(n, c, force(c));
  model.solve();
  // Statics about the clamp, any n: (tip - clamp) x F = (-1, 1, 0) x (0, 0, -P) = (-P, -P, 0). (The
  // verification book prints M_y 0.)
  if (force.z() != 0.0)
  {
    CHECK(model.reaction(0)(2) == Approx(1000.0).epsilon(1e-8));
    CHECK(model.reaction(0)(3) == Approx(1000.0).epsilon(1e-8));
    CHECK(model.reaction(0)(4) == Approx(1000.0).epsilon(1e-8));
    CHECK(std::abs(model.reaction(0)(5)) < 1e-5);
  }
  return model.motion(n);
}

struct Grillage
{
  double deflection, reaction_x, reaction_y, slope_y, slope_x;
};

/// Two by two girders of A11; torsion constants of the x- and y-girders [m^4].
Grillage grillage(double shear_stiffness, double J_x, double J_y)
{
  const double E = 70e9, G = E / 2.66;
  MemberSection girder;
  girder.axial_stiffness = E * 6e-4;
  girder.bending_stiffness_z = E * 1e-7;
  girder.shear_stiffness_y = girder.shear_stiffness_z = shear_stiffness;
  ElementModel model;
  std::array<std::array<Index, 4>, 4> node{};
  for (std::size_t i = 0; i < 4; ++i)
    for (std::size_t j = 0; j < 4; ++j)
    {
      const bool is_corner = (i == 0 || i == 3) && (j == 0 || j == 3);
      if (is_corner)
        continue;
      node[i][j] =
          model.add_node(Vector3(0.6 * static_cast<double>(i), 0.4 * static_cast<double>(j), 0.0));
      model.fix(node[i][j], "c");
      if (i == 0 || i == 3 || j == 0 || j == 3)
        model.fix(node[i][j], i == 0 || i == 3 ? "uvwa" : "uvwb");
      else
        model.add_force(node[i][j], 2, -1000.0);
    }
  for (std::size_t line = 1; line <= 2; ++line)
    for (std::size_t bay = 0; bay < 3; ++bay)
    {
      girder.bending_stiffness_y = E * 2e-7;
      girder.torsional_stiffness = G * J_x;
      model.add_member({{node[bay][line], node[bay + 1][line]},
                        girder,
                        Vector3::Zero(),
                        Vector3::Zero(),
                        Vector3::UnitZ()});
      girder.bending_stiffness_y = E * 1e-7;
      girder.torsional_stiffness = G * J_y;
      model.add_member({{node[line][bay], node[line][bay + 1]},
                        girder,
                        Vector3::Zero(),
                        Vector3::Zero(),
                        Vector3::UnitZ()});
    }
  model.solve();
  const Vector6 crossing = model.motion(node[1][1]);
  return {-crossing(2), model.reaction(node[0][1])(2), model.reaction(node[1][0])(2), crossing(4),
          crossing(3)};
}
} // namespace

TEST_CASE("A ring of straight members is exact for its polygon and converges to the curve",
          "[verification][beam]")
{
  // A9. Polygon values tolerance 1e-8 (printed to 1e-12 of 0.02: 1e-9 relative).
  const std::array<double, 4> w = {-0.018889720314, -0.019261040427, -0.019356607068,
                                   -0.019380671311};
  const std::array<double, 4> v = {0.011812325522, 0.012100345094, 0.012173426608, 0.012191764819};
  const std::array<double, 4> u = {0.005590605074, 0.005548838070, 0.005539188588, 0.005536826254};
  std::array<double, 4> error{};
  for (std::size_t i = 0; i < 4; ++i)
  {
    const Index n = Index{4} << i;
    const double found = quarter_ring(n, Vector3(0.0, 0.0, -1000.0))(2);
    CHECK(found == Approx(w[i]).epsilon(1e-8));
    CHECK(quarter_ring(n, Vector3(0.0, 1000.0, 0.0))(1) == Approx(v[i]).epsilon(1e-8));
    CHECK(quarter_ring(n, Vector3(1000.0, 0.0, 0.0))(0) == Approx(u[i]).epsilon(1e-8));
    error[i] = std::abs(
        record({"A9 quarter ring, " + std::to_string(n) + " chords", "curved bar (computed)",
                "deflection [m]", -0.0193887081016826, found, ToleranceClass::discretisation}));
  }
  for (std::size_t i = 1; i < 4; ++i)
    CHECK(std::log2(error[i - 1] / error[i]) == Approx(2.0).margin(0.05));
}

TEST_CASE("A grillage shares its load between girders, with shear and torsion",
          "[verification][beam]")
{
  // A11. No torsion: a stiffness of 1e-9 of the smallest that matters stands for none.
  const Grillage plain = grillage(infinity, 1e-18, 1e-18);
  CHECK(record({"A11 grillage, no shear, no torsion", "closed form (computed)",
                "deflection of the crossings [m]", 4.78405315614618e-3, plain.deflection,
                ToleranceClass::round_off}) == Approx(0.0).margin(1e-8));
  CHECK(plain.reaction_x == Approx(372.093023255814).epsilon(1e-8));
  CHECK(plain.reaction_y == Approx(627.906976744186).epsilon(1e-8));
  CHECK(plain.slope_y == Approx(4.7840532e-3).epsilon(2e-8)); // printed to 1e-8 relative
  CHECK(plain.slope_x == Approx(-7.1760797e-3).epsilon(2e-8));
  const Grillage sheared = grillage(5.0 / 6.0 * 70e9 / 2.66 * 6e-4, 1e-18, 1e-18);
  CHECK(sheared.deflection == Approx(4.80235212602262e-3).epsilon(1e-8));
  CHECK(sheared.reaction_x == Approx(372.196220539579).epsilon(1e-8));
  CHECK(sheared.reaction_y == Approx(627.803779460421).epsilon(1e-8));
  const Grillage twisted = grillage(infinity, 3e-8, 2e-8);
  CHECK(twisted.deflection == Approx(4.68942941401502e-3).epsilon(1e-8));
  CHECK(twisted.reaction_x == Approx(370.834886952985).epsilon(1e-8));
  CHECK(twisted.reaction_y == Approx(629.165113047015).epsilon(1e-8));
  CHECK(twisted.slope_y == Approx(4.6371309e-3).epsilon(2e-8));
  CHECK(twisted.slope_x == Approx(-6.9299346e-3).epsilon(2e-8));
}

TEST_CASE("A strip of two metals curls by their difference in growth, as members and as a shell",
          "[verification][beam]")
{
  // A12 (Timoshenko 1925): lower aluminium 2 mm, upper steel 1 mm, width 20 mm, dT = 100.
  const double kappa = -0.547465437788018, tip = 0.0109493087557604;
  const auto layer = [](double thickness, double E, double alpha)
  { return member_section(flat_bar_constants(thickness, 0.02), E, 0.0, 0.0, alpha); };
  const MemberSection lower = layer(0.002, 70e9, 23e-6), upper = layer(0.001, 210e9, 12e-6);
  const Vector3 below(0.0, 0.0, -0.0005), above(0.0, 0.0, 0.001); // from mid-height
  ElementModel strip;
  strip.add_node(Vector3::Zero());
  strip.add_node(Vector3(0.2, 0.0, 0.0));
  strip.add_member({{0, 1}, lower, below, below, Vector3::UnitZ()});
  strip.add_member({{0, 1}, upper, above, above, Vector3::UnitZ()});
  for (Index m = 0; m < 2; ++m)
    strip.add_member_load(m, member_thermal(strip.geometry(m), m == 0 ? lower : upper, 100.0));
  strip.fix(0, "uvwabc");
  strip.solve();
  CHECK(record({"A12 strip of two metals, 1 member a layer", "Timoshenko 1925 (computed)",
                "deflection [m]", tip, strip.motion(1, 2), ToleranceClass::round_off}) ==
        Approx(0.0).margin(1e-10));
  CHECK(strip.motion(1, 4) == Approx(kappa * 0.2).epsilon(1e-10)); // r_y' = kappa
  CHECK(strip.motion(1, 0) == Approx(1.85898617511521e-3 * 0.2).epsilon(1e-10));
  const Vector6 in_lower = strip.forces(0).end_1;
  CHECK(member_stress(lower, in_lower, Vector2(0.0, -0.001)) ==
        Approx(26.6129032e6).epsilon(2e-9)); // printed to 2e-9
  CHECK(in_lower(0) + strip.forces(1).end_1(0) == Approx(0.0).margin(1e-6));

  // Layered shell, nu = 0.3 in both, free: the same curvature both ways. Reference at mid-height.
  ShellSection both;
  const ShellSection aluminium = isotropic_shell_section(70e9, 0.3, 0.0, 23e-6, 0.002, -0.0005);
  const ShellSection steel = isotropic_shell_section(210e9, 0.3, 0.0, 12e-6, 0.001, 0.001);
  both.A = aluminium.A + steel.A;
  both.B = aluminium.B + steel.B;
  both.D = aluminium.D + steel.D;
  both.shear = aluminium.shear + steel.shear;
  both.thermal_force = aluminium.thermal_force + steel.thermal_force;
  both.thermal_moment = aluminium.thermal_moment + steel.thermal_moment;
  both.drilling_modulus = aluminium.drilling_modulus + steel.drilling_modulus;
  ElementModel sheet;
  const Grid grid = add_grid(sheet, 3, 2, both,
                             [](double s, double t)
                             {
                               const double skew = s > 0.0 && s < 1.0 ? 0.01 * (t - 0.3) : 0.0;
                               return Vector3(0.2 * s + skew, 0.1 * t, 0.0);
                             });
  for (Index s = 0; s < 6; ++s)
    sheet.add_shell_load(s, shell_thermal(sheet.points(s), both, sheet.material_axis, 100.0));
  sheet.fix(grid.node(0, 0), "uvwabc");
  sheet.solve();
  for (Index s = 0; s < 6; ++s)
  {
    const ShellState state = sheet.state(s, 0.2, -0.6, 100.0);
    CHECK(state.curvature.x() == Approx(kappa).epsilon(1e-8));
    CHECK(state.curvature.y() == Approx(kappa).epsilon(1e-8));
    CHECK(state.moment.norm() < 1e-8 * 100.0 * both.thermal_moment.norm());
  }
}
