#include "shell_strain.hpp"

#include <cmath>

namespace carlin
{
namespace
{
bool is_warped(const ShellPlane& plane)
{
  return std::abs(plane.height[0]) > 1e-12 * std::sqrt(plane_area(plane));
}
} // namespace

Vector24 shell_pressure(const QuadPoints& points, double pressure)
{
  Vector24 forces = Vector24::Zero();
  if (shell_plane(points).is_triangle)
  {
    const Vector3 area = 0.5 * (points[1] - points[0]).cross(points[2] - points[0]);
    for (Index i = 0; i < 3; ++i)
      forces.segment<3>(6 * i) = pressure / 3.0 * area;
    return forces;
  }
  // On the doubly ruled surface through the corners, not on the mean plane: forces and moments of a
  // uniform pressure on a closed hull then sum to zero exactly.
  const double g = std::sqrt(1.0 / 3.0);
  const std::array<double, 4> sign_xi = {-1.0, 1.0, 1.0, -1.0};
  const std::array<double, 4> sign_eta = {-1.0, -1.0, 1.0, 1.0};
  for (std::size_t p = 0; p < 4; ++p)
  {
    const double xi = g * sign_xi[p];
    const double eta = g * sign_eta[p];
    Vector3 along_xi = Vector3::Zero();
    Vector3 along_eta = Vector3::Zero();
    for (std::size_t i = 0; i < 4; ++i)
    {
      along_xi += 0.25 * sign_xi[i] * (1.0 + sign_eta[i] * eta) * points[i];
      along_eta += 0.25 * sign_eta[i] * (1.0 + sign_xi[i] * xi) * points[i];
    }
    const Vector3 force = pressure * along_xi.cross(along_eta);
    for (std::size_t i = 0; i < 4; ++i)
      forces.segment<3>(6 * static_cast<Index>(i)) +=
          0.25 * (1.0 + sign_xi[i] * xi) * (1.0 + sign_eta[i] * eta) * force;
  }
  return forces;
}

Vector24 shell_thermal(const QuadPoints& points, const ShellSection& section,
                       const Vector3& material_axis, double temperature_rise)
{
  const ShellPlane plane = shell_plane(points, material_axis);
  const ShellShape centre = shell_shape(plane, 0.0, 0.0);
  const SideShear sides = side_shear(plane);
  const Vector3 force = section.thermal_force * temperature_rise;
  const Vector3 moment = section.thermal_moment * temperature_rise;

  // The incompatible modes do no work on a constant force: nothing to condense.
  Eigen::Matrix<double, 8, 1> membrane = Eigen::Matrix<double, 8, 1>::Zero();
  Eigen::Matrix<double, 8, 1> bending = Eigen::Matrix<double, 8, 1>::Zero();
  const ShellPoints places = shell_points(plane);
  for (std::size_t p = 0; p < places.count; ++p)
  {
    const ShellPoint& place = places.place[p];
    const ShellStrain strain = shell_strain(plane, centre, sides, place.xi, place.eta);
    const double area = place.weight * strain.jacobian;
    membrane += area * strain.membrane.transpose() * force;
    bending += area * strain.curvature.transpose() * moment;
  }

  Vector24 forces;
  for (Index i = 0; i < 4; ++i)
  {
    Vector6 local = Vector6::Zero();
    local.head<2>() = membrane.segment<2>(2 * i);
    local.segment<2>(3) = bending.segment<2>(2 * i);
    forces.segment<6>(6 * i) =
        corner_motion(plane, static_cast<std::size_t>(i)).transpose() * local;
  }
  if (is_warped(plane))
    forces += shell_stiffness(points, section, material_axis) *
              shell_arm_growth(points, section, material_axis, temperature_rise);
  return forces;
}

Vector24 shell_arm_growth(const QuadPoints& points, const ShellSection& section,
                          const Vector3& material_axis, double temperature_rise)
{
  const ShellPlane plane = shell_plane(points, material_axis);
  const Vector3 free_strain = section.A.ldlt().solve(section.thermal_force) * temperature_rise;
  const double growth = 0.5 * (free_strain.x() + free_strain.y());
  Vector24 motion = Vector24::Zero();
  for (Index i = 0; i < 4; ++i)
    motion.segment<3>(6 * i) =
        growth * plane.height[static_cast<std::size_t>(i)] * plane.axes.col(2);
  return motion;
}
} // namespace carlin
