#include "carlin/section/shell_section.hpp"

#include "carlin/core/require.hpp"

namespace carlin
{
ShellSection isotropic_shell_section(double youngs_modulus, double poissons_ratio, double density,
                                     double thermal_expansion, double thickness, double offset)
{
  const double E = require_positive("youngs_modulus", youngs_modulus, "Pa");
  const double nu = require_between("poissons_ratio", poissons_ratio, -1.0, 0.5);
  const double t = require_positive("thickness", thickness, "m");
  const double rho = require_not_negative("density", density, "kg/m^3");
  const double alpha = require_finite("thermal_expansion", thermal_expansion, "1/K");
  const double e = require_finite("offset", offset, "m");
  const double G = E / (2.0 * (1.0 + nu));

  Matrix3 plane_stress;
  plane_stress << 1.0, nu, 0.0, nu, 1.0, 0.0, 0.0, 0.0, 0.5 * (1.0 - nu);
  plane_stress *= E / (1.0 - nu * nu);

  ShellSection section;
  section.A = plane_stress * t;
  section.B = section.A * e;
  section.D = plane_stress * (t * t * t / 12.0 + t * e * e);
  section.shear = Matrix2::Identity() * (5.0 / 6.0 * G * t);
  section.thermal_force = section.A * Vector3(alpha, alpha, 0.0);
  section.thermal_moment = section.B * Vector3(alpha, alpha, 0.0);
  section.drilling_modulus = G * t;
  section.thickness = t;
  section.offset = e;
  section.mass_per_area = rho * t;
  section.first_moment = rho * t * e;
  section.second_moment = rho * (t * t * t / 12.0 + t * e * e);
  return section;
}
} // namespace carlin
