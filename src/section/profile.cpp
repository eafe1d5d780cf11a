#include "shear_flow.hpp"

#include "carlin/core/error.hpp"
#include "carlin/core/require.hpp"
#include "carlin/section/member_section.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <numbers>

namespace carlin
{
namespace
{
struct Rectangle
{
  double y = 0.0, z = 0.0;          // centre, from the middle of the foot [m]
  double width = 0.0, height = 0.0; // along y, along z [m]
};

/// Area, centroid and second moments of rectangles that do not overlap.
ProfileConstants composite(const std::vector<Rectangle>& parts)
{
  ProfileConstants profile;
  for (const Rectangle& part : parts)
  {
    const double area = part.width * part.height;
    profile.area += area;
    profile.centroid_y += area * part.y;
    profile.centroid_z += area * part.z;
  }
  profile.centroid_y /= profile.area;
  profile.centroid_z /= profile.area;
  for (const Rectangle& part : parts)
  {
    const double area = part.width * part.height;
    const double y = part.y - profile.centroid_y;
    const double z = part.z - profile.centroid_z;
    profile.second_moment_y += area * (z * z + part.height * part.height / 12.0);
    profile.second_moment_z += area * (y * y + part.width * part.width / 12.0);
    profile.product_moment += area * y * z;
  }
  return profile;
}

void add_corners(ProfileConstants& profile, const Rectangle& part)
{
  for (const double side_z : {-0.5, 0.5})
    for (const double side_y : {-0.5, 0.5})
      profile.stress_points.emplace_back(part.y + side_y * part.width - profile.centroid_y,
                                         part.z + side_z * part.height - profile.centroid_z);
}

/// Saint-Venant torsion constant of a solid rectangle. The series in tanh converges like 1/n^5.
/// Source: Timoshenko & Goodier, Theory of Elasticity, 3rd ed. (1970), art. 109 (from memory).
double rectangle_torsion(double side_1, double side_2)
{
  const double b = std::max(side_1, side_2);
  const double t = std::min(side_1, side_2);
  double sum = 0.0;
  for (int n = 1; n < 200; n += 2)
    sum += std::tanh(n * std::numbers::pi * b / (2.0 * t)) / std::pow(n, 5);
  // The terms left out, with tanh = 1: the sum over all odd n is 31/32 zeta(5).
  double whole = 0.0;
  for (int n = 1; n < 200; n += 2)
    whole += 1.0 / std::pow(n, 5);
  constexpr double sum_of_odd_fifths = 31.0 / 32.0 * 1.0369277551433699;
  sum += sum_of_odd_fifths - whole;
  return b * t * t * t * (1.0 / 3.0 - 64.0 / std::pow(std::numbers::pi, 5) * t / b * sum);
}

/// Shear area along the height H (mid-lines) of a box of one wall thickness.
double box_shear_area(double H, double B, double t)
{
  const double I = 2.0 * (B * t * H * H / 4.0 + t * H * H * H / 12.0);
  const double s = 0.5 * H;
  const double first = 0.25 * H * B * t; // first moment at a corner
  // A quarter: half a level wall, first moment growing linearly from the line of symmetry, and
  // half an upright wall, first + t (H s / 2 - s^2 / 2).
  const double level = std::pow(0.5 * H * t, 2) * std::pow(0.5 * B, 3) / 3.0;
  const double upright =
      first * first * s + 2.0 * first * t * (0.25 * H * s * s - s * s * s / 6.0) +
      t * t * (H * H / 12.0 * s * s * s - H / 8.0 * std::pow(s, 4) + std::pow(s, 5) / 20.0);
  return I * I * t / (4.0 * (level + upright));
}

void take_shear_flow(ProfileConstants& profile, const std::vector<OpenWall>& walls)
{
  const ShearFlowResult flow = open_section_shear_flow(walls);
  profile.shear_area_y = flow.shear_area_y;
  profile.shear_area_z = flow.shear_area_z;
  profile.shear_centre_y = flow.shear_centre.x() - profile.centroid_y;
  profile.shear_centre_z = flow.shear_centre.y() - profile.centroid_z;
}

void require_wider(const char* wide, double width, const char* narrow, double thickness)
{
  if (width <= thickness)
    throw ValueError(fmt::format("{} is {:g} m; it must be greater than {} of {:g} m", wide, width,
                                 narrow, thickness));
}
} // namespace

ProfileConstants flat_bar_constants(double height, double thickness)
{
  const Rectangle bar = {0.0, 0.5 * require_positive("height", height, "m"),
                         require_positive("thickness", thickness, "m"), height};
  ProfileConstants profile = composite({bar});
  profile.torsion_constant = rectangle_torsion(height, thickness);
  profile.shear_area_y = profile.shear_area_z = 5.0 / 6.0 * profile.area;
  profile.depth = height;
  add_corners(profile, bar);
  return profile;
}

ProfileConstants tee_constants(double web_height, double web_thickness, double flange_width,
                               double flange_thickness)
{
  const double h = require_positive("web_height", web_height, "m");
  const double t = require_positive("web_thickness", web_thickness, "m");
  const double b = require_positive("flange_width", flange_width, "m");
  const double f = require_positive("flange_thickness", flange_thickness, "m");
  require_wider("flange_width", b, "web_thickness", t);

  const Rectangle web = {0.0, 0.5 * h, t, h};
  const Rectangle flange = {0.0, h + 0.5 * f, b, f};
  ProfileConstants profile = composite({web, flange});
  profile.torsion_constant = (h * t * t * t + b * f * f * f) / 3.0;
  profile.depth = h + f;
  const Vector2 junction(0.0, h + 0.5 * f);
  take_shear_flow(profile, {{Vector2(0.0, 0.0), junction, t},
                            {Vector2(-0.5 * b, junction.y()), junction, f},
                            {Vector2(0.5 * b, junction.y()), junction, f}});
  add_corners(profile, web);
  add_corners(profile, flange);
  return profile;
}

ProfileConstants angle_constants(double web_height, double web_thickness, double flange_width,
                                 double flange_thickness)
{
  const double h = require_positive("web_height", web_height, "m");
  const double t = require_positive("web_thickness", web_thickness, "m");
  const double b = require_positive("flange_width", flange_width, "m");
  const double f = require_positive("flange_thickness", flange_thickness, "m");
  require_wider("flange_width", b, "web_thickness", t);

  const Rectangle web = {0.0, 0.5 * h, t, h};
  const Rectangle flange = {0.5 * (b - t), h + 0.5 * f, b, f}; // heel flush with the web
  ProfileConstants profile = composite({web, flange});
  profile.torsion_constant = (h * t * t * t + b * f * f * f) / 3.0;
  profile.depth = h + f;
  const Vector2 junction(0.0, h + 0.5 * f);
  take_shear_flow(profile, {{Vector2(0.0, 0.0), junction, t},
                            {Vector2(b - 0.5 * t, junction.y()), junction, f}});
  add_corners(profile, web);
  add_corners(profile, flange);
  return profile;
}

ProfileConstants tube_constants(double outside_diameter, double wall_thickness)
{
  const double D = require_positive("outside_diameter", outside_diameter, "m");
  const double t = require_positive("wall_thickness", wall_thickness, "m");
  if (t > 0.5 * D)
    throw ValueError(fmt::format(
        "wall_thickness is {:g} m; it must not be greater than half of outside_diameter, {:g} m", t,
        0.5 * D));
  const double d = D - 2.0 * t;
  const double m = d / D;

  ProfileConstants profile;
  profile.area = 0.25 * std::numbers::pi * (D * D - d * d);
  profile.second_moment_y = profile.second_moment_z =
      std::numbers::pi / 64.0 * (std::pow(D, 4) - std::pow(d, 4));
  profile.torsion_constant = 2.0 * profile.second_moment_y;
  // Cowper (1966) for the hollow circle at Poisson's ratio 0: 1/2 for a thin wall, as the energy of
  // the shear flow gives, 6/7 for a solid bar.
  const double s = (1.0 + m * m) * (1.0 + m * m);
  profile.shear_area_y = profile.shear_area_z = profile.area * 6.0 * s / (7.0 * s + 20.0 * m * m);
  profile.centroid_z = 0.5 * D;
  profile.depth = D;
  for (int i = 0; i < 8; ++i)
  {
    const double angle = 0.25 * std::numbers::pi * i;
    profile.stress_points.emplace_back(0.5 * D * std::cos(angle), 0.5 * D * std::sin(angle));
  }
  return profile;
}

ProfileConstants box_constants(double height, double width, double wall_thickness)
{
  const double h = require_positive("height", height, "m");
  const double b = require_positive("width", width, "m");
  const double t = require_positive("wall_thickness", wall_thickness, "m");
  if (2.0 * t >= std::min(h, b))
    throw ValueError(fmt::format(
        "wall_thickness is {:g} m; twice it must be less than height and width, {:g} m and {:g} m",
        t, h, b));
  const double H = h - t; // mid-lines
  const double B = b - t;
  const double hole_h = h - 2.0 * t;
  const double hole_b = b - 2.0 * t;

  ProfileConstants profile;
  profile.area = h * b - hole_h * hole_b;
  profile.second_moment_y = (b * h * h * h - hole_b * hole_h * hole_h * hole_h) / 12.0;
  profile.second_moment_z = (h * b * b * b - hole_h * hole_b * hole_b * hole_b) / 12.0;
  profile.torsion_constant = 2.0 * H * H * B * B * t / (H + B); // Bredt: 4 A^2 / (perimeter / t)
  profile.shear_area_z = box_shear_area(H, B, t);
  profile.shear_area_y = box_shear_area(B, H, t);
  profile.centroid_z = 0.5 * h;
  profile.depth = h;
  add_corners(profile, {0.0, 0.5 * h, b, h});
  return profile;
}
} // namespace carlin
