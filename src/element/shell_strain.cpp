#include "shell_strain.hpp"

#include <algorithm>

namespace carlin
{
namespace
{
// Shares of the drilling modulus: mean tie in one point, and what holds the corner differences.
constexpr double mean_tie = 0.1;
constexpr double difference_tie = 1e-3;

/// Assumed shear of the quad: constant along each pair of opposite sides' direction, linear
/// across (Dvorkin & Bathe 1984). Sides 1 and 3 run with xi, 2 and 4 with eta.
Matrix212 quad_shear(const ShellShape& shape, const SideShear& sides, double xi, double eta)
{
  Matrix212 natural; // half: the side spans two units of the natural coordinate
  natural.row(0) = 0.25 * ((1.0 - eta) * sides.row(0) - (1.0 + eta) * sides.row(2));
  natural.row(1) = 0.25 * ((1.0 + xi) * sides.row(1) - (1.0 - xi) * sides.row(3));
  return shape.inverse_jacobian * natural;
}

/// Assumed shear of the triangle, isotropic: linear field whose strain along each side is the
/// side's own (Lee & Bathe 2004, three nodes).
Matrix212 triangle_shear(const ShellPlane& plane, const ShellShape& shape, const SideShear& sides)
{
  const Vector2 a = plane.corners.col(1) - plane.corners.col(0);
  const Vector2 b = plane.corners.col(2) - plane.corners.col(0);
  // Sides: row 0 is 1 -> 2 (e_r), row 1 is 2 -> 3 (e_s - e_r), row 2 is 3 -> 1 (-e_s).
  const Eigen::Matrix<double, 1, 12> mismatch = -sides.row(2) - sides.row(0) - sides.row(1);
  Matrix212 natural;
  natural.row(0) = sides.row(0) + shape.value(2) * mismatch;
  natural.row(1) = -sides.row(2) - shape.value(1) * mismatch;
  Matrix2 jacobian; // rows d(x, y)/dr, d(x, y)/ds
  jacobian.row(0) = a.transpose();
  jacobian.row(1) = b.transpose();
  return jacobian.inverse() * natural;
}

/// Slopes of the modes 1 - xi^2 and 1 - eta^2, with the jacobian of the centre and scaled by the
/// ratio of jacobians: their integral over the element is then zero.
Matrix34 incompatible_strain(const ShellShape& shape, const ShellShape& centre, double xi,
                             double eta)
{
  const double ratio = centre.jacobian / shape.jacobian;
  const Vector2 first = -2.0 * xi * ratio * centre.inverse_jacobian.col(0);
  const Vector2 second = -2.0 * eta * ratio * centre.inverse_jacobian.col(1);
  Matrix34 strain;
  strain << first.x(), 0.0, second.x(), 0.0, //
      0.0, first.y(), 0.0, second.y(),       //
      first.y(), first.x(), second.y(), second.x();
  return strain;
}

void add_drilling(ShellBlocks& blocks, const Row8& spin, const Eigen::Matrix<double, 1, 4>& share,
                  double stiffness)
{
  const Eigen::Matrix<double, 8, 1> scaled = stiffness * spin.transpose();
  blocks.membrane.noalias() += scaled * spin;
  blocks.spin_drilling.noalias() -= scaled * share;
  blocks.drilling.noalias() += (stiffness * share.transpose()) * share;
}

/// Sums of the incompatible modes over the element.
struct ModeSums
{
  Eigen::Matrix4d own = Eigen::Matrix4d::Zero();
  Matrix48 membrane = Matrix48::Zero();
  Matrix48 bending = Matrix48::Zero();
};

/// Condenses the modes on the whole membrane and bending system: with a reference surface off the
/// mid-thickness, curvature stretches the membrane, and the modes must follow that too.
void condense(ShellBlocks& blocks, const ModeSums& sums)
{
  const Eigen::LDLT<Eigen::Matrix4d> factor(sums.own);
  blocks.modes.membrane = -factor.solve(sums.membrane);
  blocks.modes.bending = -factor.solve(sums.bending);
  blocks.membrane.noalias() += sums.membrane.transpose() * blocks.modes.membrane;
  blocks.coupling.noalias() += sums.membrane.transpose() * blocks.modes.bending;
  blocks.bending.noalias() += sums.bending.transpose() * blocks.modes.bending;
}
} // namespace

SideShear side_shear(const ShellPlane& plane)
{
  SideShear sides = SideShear::Zero();
  const Index count = plane.is_triangle ? 3 : 4;
  for (Index i = 0; i < count; ++i)
  {
    const Index j = (i + 1) % count;
    const Vector2 side = plane.corners.col(j) - plane.corners.col(i);
    // gamma_xz = w,x + r_y, gamma_yz = w,y - r_x; along the side, mean of its ends.
    sides(i, 3 * i) = -1.0;
    sides(i, 3 * j) = 1.0;
    for (const Index corner : {i, j})
    {
      sides(i, 3 * corner + 1) = -0.5 * side.y();
      sides(i, 3 * corner + 2) = 0.5 * side.x();
    }
  }
  return sides;
}

ShellStrain shell_strain(const ShellPlane& plane, const ShellShape& centre, const SideShear& sides,
                         double xi, double eta)
{
  const ShellShape shape = shell_shape(plane, xi, eta);
  ShellStrain strain;
  for (Index i = 0; i < 4; ++i)
  {
    const double x = shape.slope(0, i);
    const double y = shape.slope(1, i);
    strain.membrane.middleCols<2>(2 * i) << x, 0.0, 0.0, y, y, x;
    // kappa_x = r_y,x, kappa_y = -r_x,y, kappa_xy = r_y,y - r_x,x.
    strain.curvature.middleCols<2>(2 * i) << 0.0, x, -y, 0.0, -x, y;
    strain.spin.segment<2>(2 * i) << -0.5 * y, 0.5 * x;
  }
  strain.jacobian = shape.jacobian;
  strain.shape = shape.value;
  if (plane.is_triangle)
  {
    strain.shear = triangle_shear(plane, shape, sides);
    strain.incompatible.setZero();
  }
  else
  {
    strain.shear = quad_shear(shape, sides, xi, eta);
    strain.incompatible = incompatible_strain(shape, centre, xi, eta);
  }
  return strain;
}

Matrix2 element_shear(const ShellPlane& plane, const ShellSection& section)
{
  if (!plane.is_triangle)
    return section.shear;
  double longest = 0.0; // squared
  for (Index i = 0; i < 3; ++i)
    longest =
        std::max(longest, (plane.corners.col((i + 1) % 3) - plane.corners.col(i)).squaredNorm());
  // The bending stiffness about the neutral plane stands for the thickness, so that sandwich
  // panels fit in: D / (kappa G t) = t^2 / (6 (1 - nu) kappa), 3.5 at nu = 0.3.
  const Matrix3 bending = section.D - section.B.transpose() * section.A.ldlt().solve(section.B);
  const double thickness = 3.5 * (bending(0, 0) + bending(1, 1)) / section.shear.trace(); // squared
  return thickness / (thickness + 0.1 * longest) * section.shear;
}

ShellBlocks shell_blocks(const ShellPlane& plane, const ShellSection& section)
{
  ShellBlocks blocks;
  blocks.membrane.setZero();
  blocks.coupling.setZero();
  blocks.bending.setZero();
  blocks.shear.setZero();
  blocks.spin_drilling.setZero();
  blocks.drilling.setZero();
  blocks.modes.membrane.setZero();
  blocks.modes.bending.setZero();

  const bool is_coupled = !section.B.isZero(0.0);
  const ShellShape centre = shell_shape(plane, 0.0, 0.0);
  const SideShear sides = side_shear(plane);
  const Matrix2 shear = element_shear(plane, section);
  ModeSums sums;
  const ShellPoints points = shell_points(plane);
  for (std::size_t p = 0; p < points.count; ++p)
  {
    const ShellPoint& point = points.place[p];
    const ShellStrain strain = shell_strain(plane, centre, sides, point.xi, point.eta);
    const double area = point.weight * strain.jacobian;
    const Matrix38 force = (area * section.A) * strain.membrane;
    const Matrix38 moment = (area * section.D) * strain.curvature;
    blocks.membrane.noalias() += strain.membrane.transpose() * force;
    blocks.bending.noalias() += strain.curvature.transpose() * moment;
    const Matrix212 shear_force = (area * shear) * strain.shear;
    blocks.shear.noalias() += strain.shear.transpose() * shear_force;
    sums.own.noalias() +=
        strain.incompatible.transpose() * ((area * section.A) * strain.incompatible);
    sums.membrane.noalias() += strain.incompatible.transpose() * force;
    if (is_coupled)
    {
      const Matrix38 coupled = (area * section.B) * strain.curvature;
      blocks.coupling.noalias() += strain.membrane.transpose() * coupled;
      sums.bending.noalias() += strain.incompatible.transpose() * coupled;
    }
    add_drilling(blocks, strain.spin, strain.shape,
                 difference_tie * section.drilling_modulus * area);
  }
  if (!plane.is_triangle)
    condense(blocks, sums);

  Row8 spin;
  for (Index i = 0; i < 4; ++i)
    spin.segment<2>(2 * i) << -0.5 * centre.slope(1, i), 0.5 * centre.slope(0, i);
  Eigen::Matrix<double, 1, 4> mean = Eigen::Matrix<double, 1, 4>::Constant(0.25);
  if (plane.is_triangle)
    mean << 1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0, 0.0;
  add_drilling(blocks, spin, mean, mean_tie * section.drilling_modulus * plane_area(plane));
  return blocks;
}
} // namespace carlin
