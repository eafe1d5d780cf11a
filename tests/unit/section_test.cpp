#include "carlin/core/error.hpp"
#include "carlin/section/member_section.hpp"
#include "carlin/section/shell_section.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <numbers>
#include <vector>

using namespace carlin;
using Catch::Matchers::Contains;

namespace
{
constexpr double pi = std::numbers::pi;
} // namespace

TEST_CASE("An isotropic plate has plane-stress stiffness about its reference surface",
          "[unit][section]")
{
  const double E = 210e9, nu = 0.3, t = 0.006, e = 0.004;
  const ShellSection section = isotropic_shell_section(E, nu, 7850.0, 12e-6, t, e);
  const double membrane = E * t / (1.0 - nu * nu);
  CHECK(section.A(0, 0) == Approx(membrane).epsilon(1e-14));
  CHECK(section.A(0, 1) == Approx(nu * membrane).epsilon(1e-14));
  CHECK(section.A(2, 2) == Approx(E * t / 2.6).epsilon(1e-14));
  CHECK(section.B.isApprox(section.A * e, 1e-14));
  CHECK(section.D.isApprox(section.A * (t * t / 12.0 + e * e), 1e-14));
  CHECK(section.shear(0, 0) == Approx(5.0 / 6.0 * E * t / 2.6).epsilon(1e-14));
  CHECK(section.mass_per_area == Approx(47.1));
  CHECK(section.first_moment == Approx(47.1 * e));
  CHECK(section.second_moment == Approx(47.1 * (t * t / 12.0 + e * e)));
  // Held while warmed by 1 K: a pressure of E alpha / (1 - nu) at the mid-thickness.
  CHECK(section.thermal_force.x() == Approx(E * 12e-6 * t / (1.0 - nu)).epsilon(1e-14));
  CHECK(section.thermal_force.z() == 0.0);
  CHECK(section.thermal_moment.isApprox(section.thermal_force * e, 1e-14));
}

TEST_CASE("Plate values out of range are refused and named", "[unit][section]")
{
  CHECK_THROWS_WITH(isotropic_shell_section(-1.0, 0.3, 1.0, 0.0, 0.01, 0.0),
                    Contains("youngs_modulus is -1 Pa"));
  CHECK_THROWS_WITH(isotropic_shell_section(1.0, 0.5, 1.0, 0.0, 0.01, 0.0),
                    Contains("poissons_ratio"));
  CHECK_THROWS_WITH(isotropic_shell_section(1.0, 0.3, 1.0, 0.0, 0.0, 0.0),
                    Contains("thickness is 0 m"));
  CHECK_THROWS_WITH(
      isotropic_shell_section(1.0, 0.3, 1.0, 0.0, std::numeric_limits<double>::quiet_NaN(), 0.0),
      Contains("thickness"));
}

TEST_CASE("A flat bar has the constants of a rectangle", "[unit][section]")
{
  const ProfileConstants bar = flat_bar_constants(0.2, 0.1);
  CHECK(bar.area == Approx(0.02));
  CHECK(bar.second_moment_y == Approx(0.1 * 0.008 / 12.0));
  CHECK(bar.second_moment_z == Approx(0.2 * 0.001 / 12.0));
  CHECK(bar.product_moment == 0.0);
  // Coefficient 0.2286817 of a b^3 at 2 : 1 (C2.1 of the verification book, all printed digits).
  CHECK(bar.torsion_constant == Approx(4.573634e-5 * (0.1 * 0.1 * 0.1 * 0.2) / 2e-4).epsilon(1e-6));
  // Square 0.1405770 a^4 (Timoshenko & Goodier, art. 109; printing 4e-7); same either way round.
  CHECK(flat_bar_constants(1.0, 1.0).torsion_constant == Approx(0.1405770).epsilon(4e-7));
  CHECK(flat_bar_constants(0.01, 0.3).torsion_constant ==
        Approx(flat_bar_constants(0.3, 0.01).torsion_constant).epsilon(1e-14));
  // Thin: b t^3 / 3 (1 - 0.630 t / b).
  CHECK(flat_bar_constants(1.0, 0.001).torsion_constant ==
        Approx(1e-9 / 3.0 * (1.0 - 0.630249e-3)).epsilon(1e-8));
  CHECK(bar.shear_area_z == Approx(5.0 / 6.0 * 0.02));
  CHECK(bar.centroid_z == Approx(0.1));
  CHECK(bar.depth == 0.2);
  REQUIRE(bar.stress_points.size() == 4);
  for (const Vector2& point : bar.stress_points)
  {
    CHECK(std::abs(point.x()) == Approx(0.05));
    CHECK(std::abs(point.y()) == Approx(0.1));
  }
}

TEST_CASE("A tee is two rectangles with the shear centre at the flange", "[unit][section]")
{
  const ProfileConstants tee = tee_constants(0.09, 0.006, 0.06, 0.01);
  const double web = 0.09 * 0.006, flange = 0.06 * 0.01;
  const double centroid = (web * 0.045 + flange * 0.095) / (web + flange);
  CHECK(tee.area == Approx(web + flange));
  CHECK(tee.centroid_z == Approx(centroid));
  CHECK(tee.centroid_y == 0.0);
  CHECK(tee.depth == Approx(0.1));
  CHECK(tee.second_moment_y == Approx(web * (0.0081 / 12.0 + std::pow(0.045 - centroid, 2)) +
                                      flange * (1e-4 / 12.0 + std::pow(0.095 - centroid, 2))));
  CHECK(tee.second_moment_z == Approx((0.01 * 2.16e-4 + 0.09 * 2.16e-7) / 12.0));
  CHECK(tee.torsion_constant == Approx((0.09 * 2.16e-7 + 0.06 * 1e-6) / 3.0));
  // All walls meet where the mid-lines cross: no flow has a moment about that point.
  CHECK(std::abs(tee.shear_centre_y) < 1e-15);
  CHECK(tee.shear_centre_z == Approx(0.095 - centroid).epsilon(1e-12));
  // A level force is carried by the flange alone, the flow of a rectangle: 5/6.
  CHECK(tee.shear_area_y == Approx(5.0 / 6.0 * flange).epsilon(1e-12));
  CHECK(tee.shear_area_z < web + flange);
  CHECK(tee.shear_area_z > 0.5 * web);
}

TEST_CASE("An angle has a product moment and its shear centre at the heel", "[unit][section]")
{
  const ProfileConstants angle = angle_constants(0.09, 0.006, 0.05, 0.01);
  CHECK(angle.product_moment > 0.0); // flange high and to +y
  CHECK(angle.centroid_y > 0.0);
  CHECK(angle.shear_centre_y == Approx(-angle.centroid_y).epsilon(1e-12));
  CHECK(angle.shear_centre_z == Approx(0.095 - angle.centroid_z).epsilon(1e-12));
  double widest = 0.0;
  for (const Vector2& point : angle.stress_points)
    widest = std::max(widest, point.x() + angle.centroid_y);
  CHECK(widest == Approx(0.047)); // heel flush with the web at -0.003
  // Equal legs bend alike about both axes.
  const ProfileConstants equal = angle_constants(0.095, 0.01, 0.105, 0.01);
  CHECK(equal.second_moment_y == Approx(equal.second_moment_z).epsilon(1e-12));
  CHECK(equal.shear_area_y == Approx(equal.shear_area_z).epsilon(1e-12));
}

TEST_CASE("Tube and box have their closed forms", "[unit][section]")
{
  const ProfileConstants tube = tube_constants(0.102, 0.002);
  CHECK(tube.area == Approx(2.0 * pi * 0.05 * 0.002));
  CHECK(tube.torsion_constant == Approx(1.57142465e-6).epsilon(1e-8)); // H4: exact annulus
  CHECK(tube.second_moment_y == Approx(0.5 * tube.torsion_constant));
  CHECK(tube.shear_area_z / tube.area == Approx(0.5).epsilon(1e-3)); // thin round tube: 1/2
  // A16, inner / outer 0.8 at Poisson's ratio 0; solid 6/7.
  const ProfileConstants thick = tube_constants(0.1, 0.01);
  CHECK(thick.shear_area_z / thick.area == Approx(0.510244346).epsilon(1e-8));
  const ProfileConstants solid = tube_constants(0.1, 0.05);
  CHECK(solid.shear_area_z / solid.area == Approx(6.0 / 7.0).epsilon(1e-12));

  // H8: thin square tube 5/12 of the area (mid-lines; the corners are second order in t).
  const double t = 1e-6;
  const ProfileConstants square = box_constants(0.1 + t, 0.1 + t, t);
  CHECK(square.shear_area_z / square.area == Approx(5.0 / 12.0).epsilon(1e-8));
  const ProfileConstants box = box_constants(0.104, 0.204, 0.004);
  CHECK(box.torsion_constant == Approx(4.0 * 4e-4 * 0.004 / 0.6).epsilon(1e-12)); // Bredt
  CHECK(box.second_moment_y ==
        Approx((0.204 * std::pow(0.104, 3) - 0.196 * std::pow(0.096, 3)) / 12.0));
  CHECK(box.shear_area_z < 0.8 * 2.0 * 0.1 * 0.004 * 1.0 + 1e-12);
}

TEST_CASE("The shear area of a box is that of the flow round it", "[unit][section]")
{
  // Energy of q^2 / t by plain summation along the mid-lines, box 0.2 x 0.1, t = 4 mm, V upright.
  const double H = 0.1, B = 0.2, t = 0.004;
  const double I = t * (B * H * H / 2.0 + H * H * H / 6.0);
  const int steps = 20000;
  double energy = 0.0;
  for (int i = 0; i < steps; ++i)
  {
    const double s = (i + 0.5) / steps * 0.5 * B;
    energy += 4.0 * std::pow(0.5 * H * t * s / I, 2) / t * 0.5 * B / steps;
    const double r = (i + 0.5) / steps * 0.5 * H;
    const double first = 0.25 * H * B * t + t * 0.5 * (H * r - r * r);
    energy += 4.0 * std::pow(first / I, 2) / t * 0.5 * H / steps;
  }
  CHECK(box_constants(H + t, B + t, t).shear_area_z == Approx(1.0 / energy).epsilon(1e-8));
}

TEST_CASE("Profile dimensions out of range are refused and named", "[unit][section]")
{
  CHECK_THROWS_WITH(flat_bar_constants(0.0, 0.01), Contains("height is 0 m"));
  CHECK_THROWS_WITH(flat_bar_constants(0.1, -0.01), Contains("thickness is -0.01 m"));
  CHECK_THROWS_WITH(tee_constants(0.1, 0.006, 0.005, 0.006),
                    Contains("flange_width is 0.005 m") && Contains("web_thickness of 0.006 m"));
  CHECK_THROWS_WITH(angle_constants(0.1, 0.006, 0.05, 0.0), Contains("flange_thickness is 0 m"));
  CHECK_THROWS_WITH(tube_constants(0.05, 0.03), Contains("wall_thickness is 0.03 m"));
  CHECK_THROWS_WITH(box_constants(0.05, 0.1, 0.025), Contains("wall_thickness is 0.025 m"));
}

TEST_CASE("A member section is constants times moduli; shear may be rigid", "[unit][section]")
{
  ProfileConstants bar = flat_bar_constants(0.06, 0.04);
  const MemberSection section = member_section(bar, 70e9, 0.33, 2700.0, 23e-6);
  CHECK(section.axial_stiffness == Approx(1.68e8)); // section S1 of the verification book
  CHECK(section.bending_stiffness_y == Approx(50400.0));
  CHECK(section.bending_stiffness_z == Approx(22400.0));
  CHECK(section.shear_stiffness_z == Approx(5.263157894736841e7).epsilon(1e-14));
  CHECK(section.mass_per_length == Approx(2700.0 * 2.4e-3));
  CHECK(section.polar_mass_moment == Approx(2700.0 * 1.04e-6));
  bar.shear_area_y = std::numeric_limits<double>::infinity();
  CHECK(std::isinf(member_section(bar, 70e9, 0.33, 2700.0, 0.0).shear_stiffness_y));
  bar.torsion_constant = 0.0;
  CHECK_THROWS_WITH(member_section(bar, 70e9, 0.33, 2700.0, 0.0), Contains("torsion_constant"));
}
