#pragma once

#include "carlin/element/member.hpp"

namespace carlin
{
/// Flexibilities of a member's section; tensors, so that unsymmetric profiles need no turning to
/// principal axes.
struct SectionFlexibility
{
  double axial = 0.0;                ///< 1 / EA
  double torsion = 0.0;              ///< 1 / GJ
  Matrix2 bending = Matrix2::Zero(); ///< (r_y', r_z') from (M_y, M_z)
  Matrix2 shear = Matrix2::Zero();   ///< (gamma_y, gamma_z) from (V_y, V_z)
  Vector6 torque = Vector6::Zero();  ///< torque about the shear centre from (N V_y V_z M_x M_y M_z)
};
/// @throws ValueError for a stiffness that is not positive.
SectionFlexibility section_flexibility(const MemberSection& section);

/// Forces and moments of a section a distance s before the loaded end: moment (M_y, M_z) of
/// (V_y, V_z) at lever 1 [m].
Matrix2 lever_moment();

/// 12 x 12: local motion (u v w r_x r_y r_z) of the two centroid ends from global nodal motion.
Matrix12 end_motion(const MemberGeometry& geometry, const MemberFrame& frame);

/// 6 x 6: motion of end 2 of the cantilever held at end 1 under end forces, local axes.
Matrix6 end_flexibility(const SectionFlexibility& section, double length);

/// 6 x 6: forces at end 1 that balance, up to sign, forces at end 2.
Matrix6 transfer_to_first_end(double length);
} // namespace carlin
