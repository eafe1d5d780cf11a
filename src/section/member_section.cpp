#include "carlin/section/member_section.hpp"

#include "carlin/core/require.hpp"

namespace carlin
{
MemberSection member_section(const ProfileConstants& profile, double youngs_modulus,
                             double poissons_ratio, double density, double thermal_expansion)
{
  const double E = require_positive("youngs_modulus", youngs_modulus, "Pa");
  const double nu = require_between("poissons_ratio", poissons_ratio, -1.0, 0.5);
  const double G = E / (2.0 * (1.0 + nu));
  const double rho = require_not_negative("density", density, "kg/m^3");

  MemberSection section;
  section.axial_stiffness = E * require_positive("area", profile.area, "m^2");
  section.bending_stiffness_y =
      E * require_positive("second_moment_y", profile.second_moment_y, "m^4");
  section.bending_stiffness_z =
      E * require_positive("second_moment_z", profile.second_moment_z, "m^4");
  section.bending_product = E * require_finite("product_moment", profile.product_moment, "m^4");
  section.torsional_stiffness =
      G * require_positive("torsion_constant", profile.torsion_constant, "m^4");
  section.shear_stiffness_y = G * profile.shear_area_y; // infinity is allowed: rigid in shear
  section.shear_stiffness_z = G * profile.shear_area_z;
  section.thermal_expansion = require_finite("thermal_expansion", thermal_expansion, "1/K");
  section.mass_per_length = rho * profile.area;
  section.polar_mass_moment = rho * (profile.second_moment_y + profile.second_moment_z);
  section.youngs_modulus = E;
  section.profile = profile;
  return section;
}
} // namespace carlin
