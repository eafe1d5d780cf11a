#pragma once

#include "carlin/element/shell.hpp"

#include <array>

namespace carlin
{
using PlaneCorners = Eigen::Matrix<double, 2, 4>;

/// A quad or triangle laid on its mean plane. The mean plane is parallel to both diagonals and
/// passes through the mean of the corners, so that the corners lie alternately the same height
/// above and below it.
struct ShellPlane
{
  Matrix3 axes = Matrix3::Identity();          ///< columns: local x, y, z; z the normal
  PlaneCorners corners = PlaneCorners::Zero(); ///< in-plane places from the mean [m]
  std::array<double, 4> height{};              ///< of the nodes above the plane [m]
  bool is_triangle = false;                    ///< corner 4 repeats corner 3
};

/// @throws ValueError if the corners enclose no area, or `material_axis` is normal to the plane.
ShellPlane shell_plane(const QuadPoints& points, const Vector3& material_axis);

/// The same with local x along the first diagonal, for what does not depend on the material.
ShellPlane shell_plane(const QuadPoints& points);

/// Shape functions and their derivatives in the plane at one place. Those of a triangle are its
/// area coordinates; the fourth is then zero.
struct ShellShape
{
  Eigen::Matrix<double, 1, 4> value = Eigen::Matrix<double, 1, 4>::Zero();
  PlaneCorners slope = PlaneCorners::Zero();  ///< d/dx, d/dy [1/m]
  Matrix2 inverse_jacobian = Matrix2::Zero(); ///< d(xi, eta)/d(x, y): rows x, y; quads only
  double jacobian = 0.0;                      ///< area per unit xi-eta area [m^2]
};

/// Shape functions at natural coordinates of the quad, -1..1; of a triangle at the place to which
/// the collapsed quad maps them.
/// @throws ValueError if the quad is folded or concave there.
ShellShape shell_shape(const ShellPlane& plane, double xi, double eta);

/// Integration place with its share of the area [m^2].
struct ShellPoint
{
  double xi = 0.0, eta = 0.0;
  double weight = 1.0; ///< of the jacobian
};

/// Gauss 2 x 2 on a quad. On a triangle three places, exact for second degree.
/// Source: Hughes, The Finite Element Method (1987), table 3.I.1 (from memory).
struct ShellPoints
{
  std::array<ShellPoint, 4> place{};
  std::size_t count = 0;
};
ShellPoints shell_points(const ShellPlane& plane);

double plane_area(const ShellPlane& plane); ///< [m^2]

/// Motion of the mean plane's corner (local u v w r_x r_y r_z) from that of its node (global):
/// 6 x 6. The node sits on a rigid arm along the normal.
Matrix6 corner_motion(const ShellPlane& plane, std::size_t corner);
} // namespace carlin
