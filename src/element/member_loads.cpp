#include "member_flexibility.hpp"

#include <array>

namespace carlin
{
Vector12 member_line_load(const MemberGeometry& geometry, const MemberSection& section,
                          const Vector3& force_per_length)
{
  const MemberFrame frame = member_frame(geometry);
  const SectionFlexibility flexibility = section_flexibility(section);
  const Vector3 q = frame.axes.transpose() * force_per_length;
  const Vector2 across = q.tail<2>();
  const double L = frame.length;
  const Matrix2 lever = lever_moment();

  // Motion of end 2 of the cantilever held at end 1 under the load.
  const Vector2 bend = flexibility.bending * lever * across;
  Vector6 motion = Vector6::Zero();
  motion(0) = 0.5 * L * L * flexibility.axial * q.x();
  motion.segment<2>(1) =
      L * L * L * L / 8.0 * lever.transpose() * bend + 0.5 * L * L * flexibility.shear * across;
  motion.tail<2>() = L * L * L / 6.0 * bend;
  const double torque = flexibility.torque.segment<2>(1).dot(across); // per length
  motion += 0.5 * L * L * flexibility.torsion * torque * flexibility.torque;

  // Forces that hold both ends are minus the equivalent loads.
  const Vector6 second = end_flexibility(flexibility, L).llt().solve(motion);
  Vector6 whole;
  whole << L * q, 0.0, 0.5 * L * L * (lever * across);
  Vector12 local;
  local.tail<6>() = second;
  local.head<6>() = whole - transfer_to_first_end(L) * second;
  return end_motion(geometry, frame).transpose() * local;
}

Vector12 member_thermal(const MemberGeometry& geometry, const MemberSection& section,
                        double temperature_rise)
{
  // Arms grow with the member: a node moves by alpha dT times its place, nothing turns, and no
  // force arises. The loads are those that make this motion.
  Vector12 growth = Vector12::Zero();
  growth.segment<3>(6) =
      section.thermal_expansion * temperature_rise * (geometry.node_2 - geometry.node_1);
  return member_stiffness(geometry, section) * growth;
}

Matrix12 member_mass(const MemberGeometry& geometry, const MemberSection& section)
{
  const MemberFrame frame = member_frame(geometry);
  const double L = frame.length;
  const double bending = section.bending_stiffness_y + section.bending_stiffness_z;
  // Rotary inertia about y and z in the ratio of the second moments.
  const double rotary_y = section.polar_mass_moment * section.bending_stiffness_y / bending;
  const double rotary_z = section.polar_mass_moment * section.bending_stiffness_z / bending;

  // Cubic deflection, linear stretch and twist: contains every rigid motion. Gauss, four points.
  const std::array<double, 4> place = {-0.8611363115940526, -0.3399810435848563, 0.3399810435848563,
                                       0.8611363115940526};
  const std::array<double, 4> weight = {0.3478548451374538, 0.6521451548625461, 0.6521451548625461,
                                        0.3478548451374538};
  Matrix12 local = Matrix12::Zero();
  for (std::size_t p = 0; p < place.size(); ++p)
  {
    const double s = 0.5 * (1.0 + place[p]);
    const double share = 0.5 * L * weight[p];
    const std::array<double, 4> value = {1.0 - 3.0 * s * s + 2.0 * s * s * s,
                                         L * (s - 2.0 * s * s + s * s * s),
                                         3.0 * s * s - 2.0 * s * s * s, L * (s * s * s - s * s)};
    const std::array<double, 4> slope = {6.0 * (s * s - s) / L, 1.0 - 4.0 * s + 3.0 * s * s,
                                         6.0 * (s - s * s) / L, 3.0 * s * s - 2.0 * s};
    Eigen::Matrix<double, 6, 12> motion = Eigen::Matrix<double, 6, 12>::Zero();
    motion(0, 0) = motion(3, 3) = 1.0 - s;
    motion(0, 6) = motion(3, 9) = s;
    const std::array<Index, 4> in_y = {1, 5, 7, 11}; // v, r_z = dv/dx
    const std::array<Index, 4> in_z = {2, 4, 8, 10}; // w, r_y = -dw/dx
    for (std::size_t i = 0; i < 4; ++i)
    {
      const double sign = i % 2 == 0 ? 1.0 : -1.0;
      motion(1, in_y[i]) = value[i];
      motion(5, in_y[i]) = slope[i];
      motion(2, in_z[i]) = sign * value[i];
      motion(4, in_z[i]) = -sign * slope[i];
    }
    Vector6 inertia;
    inertia << section.mass_per_length, section.mass_per_length, section.mass_per_length,
        section.polar_mass_moment, rotary_y, rotary_z;
    local += share * motion.transpose() * inertia.asDiagonal() * motion;
  }
  const Matrix12 ends = end_motion(geometry, frame);
  const Matrix12 mass = ends.transpose() * local * ends;
  return 0.5 * (mass + mass.transpose());
}
} // namespace carlin
