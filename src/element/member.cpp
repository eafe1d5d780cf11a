#include "carlin/element/member.hpp"

#include "member_flexibility.hpp"

#include "carlin/core/error.hpp"
#include "carlin/core/require.hpp"

#include <fmt/format.h>

namespace carlin
{
namespace
{
Matrix3 cross_matrix(const Vector3& vector)
{
  Matrix3 matrix;
  matrix << 0.0, -vector.z(), vector.y(), vector.z(), 0.0, -vector.x(), -vector.y(), vector.x(),
      0.0;
  return matrix;
}

/// 1 / stiffness; infinity means rigid. Zero and NaN are refused.
double shear_flexibility(const char* name, double stiffness)
{
  if (!(stiffness > 0.0))
    throw ValueError(
        fmt::format("{} is {:g} N; it must be greater than 0 (infinity: rigid)", name, stiffness));
  return 1.0 / stiffness;
}
} // namespace

MemberFrame member_frame(const MemberGeometry& geometry)
{
  const Vector3 along = geometry.node_2 + geometry.offset_2 - geometry.node_1 - geometry.offset_1;
  const double size = (geometry.node_2 - geometry.node_1).norm() + geometry.offset_1.norm() +
                      geometry.offset_2.norm();
  MemberFrame frame;
  frame.length = along.norm();
  if (!(frame.length > 1e-9 * size)) // less is round-off of the places
    throw ValueError(fmt::format("the centroids of a member's ends coincide at ({:g}, {:g}, {:g}) "
                                 "m; nodes and offsets must leave a length",
                                 geometry.node_1.x() + geometry.offset_1.x(),
                                 geometry.node_1.y() + geometry.offset_1.y(),
                                 geometry.node_1.z() + geometry.offset_1.z()));
  const Vector3 x = along / frame.length;
  const Vector3 y = geometry.upright.cross(x);
  if (!(y.norm() > 1e-8 * geometry.upright.norm()))
    throw ValueError(fmt::format("upright ({:g}, {:g}, {:g}) runs along the member; it must have a "
                                 "component square to it",
                                 geometry.upright.x(), geometry.upright.y(), geometry.upright.z()));
  frame.axes.col(0) = x;
  frame.axes.col(1) = y.normalized();
  frame.axes.col(2) = x.cross(frame.axes.col(1));
  return frame;
}

SectionFlexibility section_flexibility(const MemberSection& section)
{
  const double EI_y = require_positive("bending_stiffness_y", section.bending_stiffness_y, "N m^2");
  const double EI_z = require_positive("bending_stiffness_z", section.bending_stiffness_z, "N m^2");
  const double EI_yz = require_finite("bending_product", section.bending_product, "N m^2");
  const double determinant = EI_y * EI_z - EI_yz * EI_yz;
  if (!(determinant > 0.0))
    throw ValueError(fmt::format("bending_product is {:g} N m^2; its square must be less than the "
                                 "product of the bending stiffnesses {:g} and {:g} N m^2",
                                 EI_yz, EI_y, EI_z));
  SectionFlexibility flexibility;
  flexibility.axial = 1.0 / require_positive("axial_stiffness", section.axial_stiffness, "N");
  flexibility.torsion =
      1.0 / require_positive("torsional_stiffness", section.torsional_stiffness, "N m^2");
  // strain = z r_y' - y r_z': M_y = EI_y r_y' - EI_yz r_z', M_z = EI_z r_z' - EI_yz r_y'.
  flexibility.bending << EI_z, EI_yz, EI_yz, EI_y;
  flexibility.bending /= determinant;
  flexibility.shear(0, 0) = shear_flexibility("shear_stiffness_y", section.shear_stiffness_y);
  flexibility.shear(1, 1) = shear_flexibility("shear_stiffness_z", section.shear_stiffness_z);
  flexibility.torque << 0.0, section.profile.shear_centre_z, -section.profile.shear_centre_y, 1.0,
      0.0, 0.0;
  return flexibility;
}

Matrix2 lever_moment()
{
  Matrix2 moment;
  moment << 0.0, -1.0, 1.0, 0.0;
  return moment;
}

Matrix12 end_motion(const MemberGeometry& geometry, const MemberFrame& frame)
{
  Matrix3 turn = Matrix3::Zero(); // g++ 12 warns without cause under the sanitizers otherwise
  turn = frame.axes.transpose();
  Matrix12 motion = Matrix12::Zero();
  for (Index i = 0; i < 4; ++i)
    motion.block<3, 3>(3 * i, 3 * i) = turn;
  // u_centroid = u_node + r x offset.
  motion.block<3, 3>(0, 3) = -turn * cross_matrix(geometry.offset_1);
  motion.block<3, 3>(6, 9) = -turn * cross_matrix(geometry.offset_2);
  return motion;
}

Matrix6 end_flexibility(const SectionFlexibility& section, double length)
{
  const double L = length;
  const Matrix2 lever = lever_moment();
  const Matrix2 turned = lever.transpose() * section.bending;
  Matrix6 flexibility = Matrix6::Zero();
  flexibility(0, 0) = L * section.axial;
  flexibility.block<2, 2>(1, 1) = L * L * L / 3.0 * turned * lever + L * section.shear;
  flexibility.block<2, 2>(1, 4) = 0.5 * L * L * turned;
  flexibility.block<2, 2>(4, 1) = flexibility.block<2, 2>(1, 4).transpose();
  flexibility.block<2, 2>(4, 4) = L * section.bending;
  flexibility += L * section.torsion * section.torque * section.torque.transpose();
  return flexibility;
}

Matrix6 transfer_to_first_end(double length)
{
  Matrix6 transfer = Matrix6::Identity();
  transfer(4, 2) = -length; // M_y of V_z
  transfer(5, 1) = length;  // M_z of V_y
  return transfer;
}

Matrix12 member_stiffness(const MemberGeometry& geometry, const MemberSection& section)
{
  const MemberFrame frame = member_frame(geometry);
  const Matrix6 flexibility = end_flexibility(section_flexibility(section), frame.length);
  const Matrix6 end = flexibility.llt().solve(Matrix6::Identity());
  const Matrix6 transfer = transfer_to_first_end(frame.length);

  Matrix12 local;
  local.bottomRightCorner<6, 6>() = end;
  local.topRightCorner<6, 6>() = -transfer * end;
  local.bottomLeftCorner<6, 6>() = -end * transfer.transpose();
  local.topLeftCorner<6, 6>() = transfer * end * transfer.transpose();

  const Matrix12 motion = end_motion(geometry, frame);
  Matrix12 stiffness = motion.transpose() * local * motion;
  stiffness = (0.5 * (stiffness + stiffness.transpose())).eval();
  return stiffness;
}

MemberForces member_forces(const MemberGeometry& geometry, const MemberSection& section,
                           const Vector12& displacement, const Vector12& fixed_end)
{
  const Vector12 nodal = member_stiffness(geometry, section) * displacement - fixed_end;
  const MemberFrame frame = member_frame(geometry);
  Matrix3 turn = Matrix3::Zero(); // g++ 12 warns without cause under the sanitizers otherwise
  turn = frame.axes.transpose();
  MemberForces forces;
  // Moments about the centroid: the nodal force acts at the far end of the arm. The force on the
  // positive face of end 1 is the reaction of what acts on the member there.
  forces.end_1.head<3>() = -turn * nodal.segment<3>(0);
  forces.end_1.tail<3>() =
      -turn * (nodal.segment<3>(3) - geometry.offset_1.cross(nodal.segment<3>(0)));
  forces.end_2.head<3>() = turn * nodal.segment<3>(6);
  forces.end_2.tail<3>() =
      turn * (nodal.segment<3>(9) - geometry.offset_2.cross(nodal.segment<3>(6)));
  return forces;
}

double member_stress(const MemberSection& section, const Vector6& forces, const Vector2& point)
{
  const SectionFlexibility flexibility = section_flexibility(section);
  const Vector2 curvature = flexibility.bending * forces.tail<2>();
  const double strain =
      forces(0) * flexibility.axial + point.y() * curvature.x() - point.x() * curvature.y();
  return section.youngs_modulus * strain;
}
} // namespace carlin
