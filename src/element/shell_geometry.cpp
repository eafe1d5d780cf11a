#include "shell_geometry.hpp"

#include "carlin/core/error.hpp"

#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
bool repeats_third_corner(const QuadPoints& points) { return points[2] == points[3]; }

/// Twice the area times the unit normal.
Vector3 area_vector(const QuadPoints& points)
{
  return (points[2] - points[0]).cross(points[3] - points[1]);
}

std::string corners_text(const QuadPoints& points)
{
  std::string text;
  for (const Vector3& point : points)
    text += fmt::format("{}({:g}, {:g}, {:g})", text.empty() ? "" : " ", point.x(), point.y(),
                        point.z());
  return text;
}

Vector3 unit_normal(const QuadPoints& points)
{
  const Vector3 vector = area_vector(points);
  const double size = (points[2] - points[0]).squaredNorm() + (points[3] - points[1]).squaredNorm();
  const double norm = vector.norm();
  if (!(norm > 1e-10 * size))
    throw ValueError("shell corners " + corners_text(points) +
                     " m enclose no area; they must span a quadrilateral or a triangle");
  return vector / norm;
}
} // namespace

ShellPlane shell_plane(const QuadPoints& points, const Vector3& material_axis)
{
  const Vector3 normal = unit_normal(points);
  const Vector3 in_plane = material_axis - normal.dot(material_axis) * normal;
  if (!(in_plane.norm() > 1e-8 * material_axis.norm()))
    throw ValueError("the material axis is normal to the shell with corners " +
                     corners_text(points) + " m; it must have a component in its plane");

  ShellPlane plane;
  plane.axes.col(0) = in_plane.normalized();
  plane.axes.col(1) = normal.cross(plane.axes.col(0));
  plane.axes.col(2) = normal;
  plane.is_triangle = repeats_third_corner(points);
  const Vector3 mean = plane.is_triangle
                           ? Vector3((points[0] + points[1] + points[2]) / 3.0)
                           : Vector3(0.25 * (points[0] + points[1] + points[2] + points[3]));
  for (std::size_t i = 0; i < points.size(); ++i)
  {
    const Vector3 local = plane.axes.transpose() * (points[i] - mean);
    plane.corners.col(static_cast<Index>(i)) = local.head<2>();
    plane.height[i] = plane.is_triangle ? 0.0 : local.z();
  }
  return plane;
}

ShellPlane shell_plane(const QuadPoints& points)
{
  return shell_plane(points, points[2] - points[0]);
}

ShellShape shell_shape(const ShellPlane& plane, double xi, double eta)
{
  const Eigen::Matrix<double, 1, 4> sign_xi(-1.0, 1.0, 1.0, -1.0);
  const Eigen::Matrix<double, 1, 4> sign_eta(-1.0, -1.0, 1.0, 1.0);
  const Eigen::Matrix<double, 1, 4> part_xi = (1.0 + (xi * sign_xi).array()).matrix();
  const Eigen::Matrix<double, 1, 4> part_eta = (1.0 + (eta * sign_eta).array()).matrix();

  ShellShape shape;
  shape.value = 0.25 * part_xi.cwiseProduct(part_eta);
  if (plane.is_triangle)
  {
    shape.value(2) += shape.value(3);
    shape.value(3) = 0.0;
    const Vector2 a = plane.corners.col(1) - plane.corners.col(0);
    const Vector2 b = plane.corners.col(2) - plane.corners.col(0);
    const double twice_area = a.x() * b.y() - a.y() * b.x();
    shape.slope.col(1) = Vector2(b.y(), -b.x()) / twice_area;
    shape.slope.col(2) = Vector2(-a.y(), a.x()) / twice_area;
    shape.slope.col(0) = -shape.slope.col(1) - shape.slope.col(2);
    shape.jacobian = 0.5 * twice_area; // with weights that sum to one
    return shape;
  }
  PlaneCorners natural; // d/dxi, d/deta
  natural.row(0) = 0.25 * sign_xi.cwiseProduct(part_eta);
  natural.row(1) = 0.25 * sign_eta.cwiseProduct(part_xi);
  const Matrix2 jacobian = natural * plane.corners.transpose(); // rows d(x, y)/dxi, /deta
  shape.jacobian = jacobian.determinant();
  if (!(shape.jacobian > 0.0))
    throw ValueError(fmt::format(
        "a shell corner is re-entrant: corners in its plane ({:g}, {:g}) ({:g}, {:g}) ({:g}, {:g}) "
        "({:g}, {:g}) m; the quadrilateral must be convex",
        plane.corners(0, 0), plane.corners(1, 0), plane.corners(0, 1), plane.corners(1, 1),
        plane.corners(0, 2), plane.corners(1, 2), plane.corners(0, 3), plane.corners(1, 3)));
  shape.inverse_jacobian = jacobian.inverse();
  shape.slope = shape.inverse_jacobian * natural;
  return shape;
}

ShellPoints shell_points(const ShellPlane& plane)
{
  ShellPoints points;
  if (plane.is_triangle)
  {
    // Area coordinates (2/3, 1/6, 1/6) and its turns, as natural coordinates of the collapsed quad:
    // lambda_3 = (1 + eta) / 2, lambda_2 = (1 + xi)(1 - eta) / 4.
    points.count = 3;
    points.place[0] = {-0.6, -2.0 / 3.0, 1.0 / 3.0};
    points.place[1] = {0.6, -2.0 / 3.0, 1.0 / 3.0};
    points.place[2] = {0.0, 1.0 / 3.0, 1.0 / 3.0};
    return points;
  }
  const double g = std::sqrt(1.0 / 3.0);
  points.count = 4;
  points.place = {{{-g, -g, 1.0}, {g, -g, 1.0}, {g, g, 1.0}, {-g, g, 1.0}}};
  return points;
}

double plane_area(const ShellPlane& plane)
{
  const Vector2 first = plane.corners.col(2) - plane.corners.col(0);
  const Vector2 second = plane.corners.col(3) - plane.corners.col(1);
  return 0.5 * (first.x() * second.y() - first.y() * second.x());
}

Matrix6 corner_motion(const ShellPlane& plane, std::size_t corner)
{
  const Matrix3 turn = plane.axes.transpose();
  Matrix6 motion = Matrix6::Zero();
  motion.topLeftCorner<3, 3>() = turn;
  motion.bottomRightCorner<3, 3>() = turn;
  // u_corner = u_node + r x (-h e_z): u_x -= h r_y, u_y += h r_x.
  motion.block<1, 3>(0, 3) = -plane.height[corner] * turn.row(1);
  motion.block<1, 3>(1, 3) = plane.height[corner] * turn.row(0);
  return motion;
}

double shell_area(const QuadPoints& points) { return 0.5 * area_vector(points).norm(); }

Matrix3 shell_frame(const QuadPoints& points, const Vector3& material_axis)
{
  return shell_plane(points, material_axis).axes;
}
} // namespace carlin
