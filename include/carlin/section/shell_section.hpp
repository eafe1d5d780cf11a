#pragma once

#include "carlin/core/types.hpp"

namespace carlin
{
/// Section of a shell about its reference surface, in its material axes.
///
/// Order of components: membrane (eps_x, eps_y, gamma_xy), curvature (kappa_x, kappa_y, kappa_xy)
/// with eps(z) = eps0 + z kappa, z along the inward normal; shear (gamma_xz, gamma_yz).
/// (N; M) = [A B; B D] (eps; kappa), N in N/m, M in N.
struct ShellSection
{
  Matrix3 A = Matrix3::Zero();              ///< [N/m]
  Matrix3 B = Matrix3::Zero();              ///< [N]
  Matrix3 D = Matrix3::Zero();              ///< [N m]
  Matrix2 shear = Matrix2::Zero();          ///< transverse shear stiffness [N/m]
  Vector3 thermal_force = Vector3::Zero();  ///< N per kelvin of uniform rise when held [N/(m K)],
                                            ///< compression-free sign: N = A eps - thermal_force dT
  Vector3 thermal_moment = Vector3::Zero(); ///< M per kelvin of uniform rise when held [N/K]
  double drilling_modulus = 0.0;            ///< G t of the membrane, for the drilling tie [N/m]
  double thickness = 0.0;                   ///< [m]
  double offset =
      0.0; ///< of the mid-thickness from the reference surface, along the inward normal [m]
  double mass_per_area = 0.0; ///< [kg/m^2]
  double first_moment = 0.0;  ///< of mass about the reference surface [kg/m]
  double second_moment = 0.0; ///< of mass about the reference surface [kg]
};

/// Section of a homogeneous isotropic plate; shear correction 5/6 (Reissner 1945).
/// @param offset Of the plate's mid-thickness from the reference surface, along the inward normal
/// [m].
/// @throws ValueError for a thickness or material value out of range.
ShellSection isotropic_shell_section(double youngs_modulus, double poissons_ratio, double density,
                                     double thermal_expansion, double thickness, double offset);
} // namespace carlin
