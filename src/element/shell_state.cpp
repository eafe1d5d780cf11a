#include "shell_strain.hpp"

namespace carlin
{
ShellStrainMatrix shell_strain_matrix(const QuadPoints& points, const ShellSection& section,
                                      const Vector3& material_axis, double xi, double eta)
{
  const ShellPlane plane = shell_plane(points, material_axis);
  const ShellBlocks blocks = shell_blocks(plane, section);
  const ShellStrain strain =
      shell_strain(plane, shell_shape(plane, 0.0, 0.0), side_shear(plane), xi, eta);
  const Matrix38 from_membrane = strain.membrane + strain.incompatible * blocks.modes.membrane;
  const Matrix38 from_bending = strain.incompatible * blocks.modes.bending;

  ShellStrainMatrix matrix;
  for (Index i = 0; i < 4; ++i)
  {
    Eigen::Matrix<double, 8, 6> local = Eigen::Matrix<double, 8, 6>::Zero();
    local.block<3, 2>(0, 0) = from_membrane.middleCols<2>(2 * i);
    local.block<3, 2>(0, 3) = from_bending.middleCols<2>(2 * i);
    local.block<3, 2>(3, 3) = strain.curvature.middleCols<2>(2 * i);
    local.block<2, 3>(6, 2) = strain.shear.middleCols<3>(3 * i);
    matrix.middleCols<6>(6 * i) = local * corner_motion(plane, static_cast<std::size_t>(i));
  }
  return matrix;
}

ShellState shell_state(const QuadPoints& points, const ShellSection& section,
                       const Vector3& material_axis, const Vector24& displacement, double xi,
                       double eta, double temperature_rise)
{
  const Eigen::Matrix<double, 8, 1> strain =
      shell_strain_matrix(points, section, material_axis, xi, eta) *
      (displacement - shell_arm_growth(points, section, material_axis, temperature_rise));
  ShellState state;
  state.membrane = strain.head<3>();
  state.curvature = strain.segment<3>(3);
  state.shear = strain.tail<2>();
  state.force = section.A * state.membrane + section.B * state.curvature -
                section.thermal_force * temperature_rise;
  state.moment = section.B.transpose() * state.membrane + section.D * state.curvature -
                 section.thermal_moment * temperature_rise;
  state.shear_force = element_shear(shell_plane(points, material_axis), section) * state.shear;
  return state;
}
} // namespace carlin
