#include "shell_geometry.hpp"

namespace carlin
{
Matrix24 shell_mass(const QuadPoints& points, const ShellSection& section)
{
  const ShellPlane plane = shell_plane(points);

  // Two by two points integrate the products of shape functions exactly, also on a general quad.
  Eigen::Matrix4d share = Eigen::Matrix4d::Zero(); // integral of N_i N_j [m^2]
  const ShellPoints places = shell_points(plane);
  for (std::size_t p = 0; p < places.count; ++p)
  {
    const ShellPoint& place = places.place[p];
    const ShellShape shape = shell_shape(plane, place.xi, place.eta);
    share += place.weight * shape.jacobian * shape.value.transpose() * shape.value;
  }

  // Motion at height z above the reference surface: u + z r_y, v - z r_x, w.
  Matrix6 per_area = Matrix6::Zero();
  per_area.diagonal() << section.mass_per_area, section.mass_per_area, section.mass_per_area,
      section.second_moment, section.second_moment, 0.0;
  per_area(0, 4) = per_area(4, 0) = section.first_moment;
  per_area(1, 3) = per_area(3, 1) = -section.first_moment;

  Matrix24 mass;
  for (Index j = 0; j < 4; ++j)
  {
    const Matrix6 half = per_area * corner_motion(plane, static_cast<std::size_t>(j));
    for (Index i = j; i < 4; ++i)
      mass.block<6, 6>(6 * i, 6 * j) =
          share(i, j) * (corner_motion(plane, static_cast<std::size_t>(i)).transpose() * half);
  }
  mass.triangularView<Eigen::StrictlyUpper>() = mass.transpose();
  return mass;
}
} // namespace carlin
