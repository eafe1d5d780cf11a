#pragma once

#include "carlin/core/types.hpp"

#include <vector>

namespace carlin
{
/// Constants of a profile about its centroid. Local x along the member, local z (upright) from the
/// foot of the profile away from the plating, local y = z x x (the toe side).
struct ProfileConstants
{
  double area = 0.0;             ///< [m^2]
  double second_moment_y = 0.0;  ///< integral of z^2: bends in x-z [m^4]
  double second_moment_z = 0.0;  ///< integral of y^2: bends in x-y [m^4]
  double product_moment = 0.0;   ///< integral of y z [m^4]
  double torsion_constant = 0.0; ///< [m^4]
  double shear_area_y = 0.0;     ///< [m^2]; infinity: rigid in shear
  double shear_area_z = 0.0;     ///< [m^2]
  double centroid_y = 0.0;       ///< of the centroid from the middle of the profile's foot [m]
  double centroid_z = 0.0;       ///< [m]
  double shear_centre_y = 0.0;   ///< from the centroid [m]
  double shear_centre_z = 0.0;   ///< from the centroid [m]
  double depth = 0.0;            ///< foot to far face [m]
  /// Points where stress is read, from the centroid (y, z) [m]: corners of the outline.
  std::vector<Vector2> stress_points;
};

/// Constants in closed form. Heights stand on the plating (z = 0 at the foot); the web of tee and
/// angle ends where the flange begins, so that the depth is web height plus flange thickness; the
/// angle's heel is flush with its web and its flange points to +y; diameter, height and width of
/// tube and box are outside ones. Area and second moments are those of the drawn outline. Torsion:
/// flat bar by the exact series, tube exactly, tee and angle as the sum of b t^3 / 3 of their
/// walls, box by Bredt. Shear areas from the energy of the shear flow along mid-lines (rectangle
/// 5/6; tube by Cowper 1966 at Poisson's ratio 0), shear centre from its moment.
/// @throws ValueError for a dimension out of range, by name.
ProfileConstants flat_bar_constants(double height, double thickness);
ProfileConstants tee_constants(double web_height, double web_thickness, double flange_width,
                               double flange_thickness);
ProfileConstants angle_constants(double web_height, double web_thickness, double flange_width,
                                 double flange_thickness);
ProfileConstants tube_constants(double outside_diameter, double wall_thickness);
ProfileConstants box_constants(double height, double width, double wall_thickness);

/// What the member element needs: constants times moduli.
struct MemberSection
{
  double axial_stiffness = 0.0;     ///< EA [N]
  double bending_stiffness_y = 0.0; ///< E times second_moment_y [N m^2]
  double bending_stiffness_z = 0.0; ///< [N m^2]
  double bending_product = 0.0;     ///< E times product_moment [N m^2]
  double torsional_stiffness = 0.0; ///< GJ [N m^2]
  double shear_stiffness_y = 0.0;   ///< kappa G A [N]; infinity: rigid in shear
  double shear_stiffness_z = 0.0;   ///< [N]
  double thermal_expansion = 0.0;   ///< [1/K]
  double mass_per_length = 0.0;     ///< [kg/m]
  double polar_mass_moment = 0.0;   ///< rho (I_y + I_z), rotary inertia about x [kg m]
  double youngs_modulus = 0.0;      ///< for stress recovery [Pa]
  ProfileConstants profile;
};

/// @throws ValueError for a constant or material value out of range, by name.
MemberSection member_section(const ProfileConstants& profile, double youngs_modulus,
                             double poissons_ratio, double density, double thermal_expansion);
} // namespace carlin
