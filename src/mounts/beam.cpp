#include "beam.hpp"

#include <algorithm>
#include <array>
#include <cmath>

namespace carlin::mounts
{
namespace
{
/// Distributed load between s and s + reach (reach may be negative), a wrench at s.
Vector6 distributed_wrench(const BeamLoad& load, double s, double reach)
{
  const Vector3 here = load.start + s * load.slope;
  const Vector3 force = here * reach + load.slope * (reach * reach / 2.0);
  const Vector3 moment_arm =
      here * (reach * reach / 2.0) + load.slope * (reach * reach * reach / 3.0);
  Vector6 wrench;
  wrench << force, 0.0, -moment_arm.z(), moment_arm.y(); // e1 x q
  return reach < 0.0 ? Vector6(-wrench) : wrench;
}
} // namespace

Beam make_beam(const Tank& tank)
{
  Beam beam;
  beam.axes = tank_axes(tank);
  beam.origin = tank.axis_from;
  beam.length = (tank.axis_to - tank.axis_from).norm();
  beam.middle = 0.5 * beam.length;
  const double shear = tank.shear_stiffness > 0.0 ? 1.0 / tank.shear_stiffness : 0.0;
  const double torsion = tank.torsional_stiffness > 0.0 ? 1.0 / tank.torsional_stiffness
                                                        : 1.3 / tank.bending_stiffness;
  const double bending = 1.0 / tank.bending_stiffness;
  beam.compliance << 1.0 / tank.axial_stiffness, shear, shear, torsion, bending, bending;
  return beam;
}

BeamLoad make_beam_load(const Beam& beam, const TankStageLoad& load)
{
  const Matrix3 to_local = beam.axes.transpose();
  const double mass_per_length = load.mass / beam.length;
  BeamLoad result;
  const Vector3 at_origin = load.felt - load.angular.cross(beam.origin - load.about);
  const Vector3 rate = -load.angular.cross(Vector3(beam.axes.col(0)));
  result.start = mass_per_length * (to_local * at_origin);
  result.slope = mass_per_length * (to_local * rate);
  for (const auto& [position, force] : load.forces)
    result.forces.emplace_back(std::clamp(position, 0.0, beam.length), to_local * force);
  result.axial_strain = load.axial_strain;
  return result;
}

Matrix6 shift_wrench(double from, double to)
{
  const double arm = from - to;
  Matrix6 shift = Matrix6::Identity();
  shift(4, 2) = -arm; // e1 x f = (0, -f3, f2)
  shift(5, 1) = arm;
  return shift;
}

Matrix6 influence(const Beam& beam, double s, double at)
{
  Matrix6 result = Matrix6::Zero();
  const double a = s - beam.middle;
  const double b = at - beam.middle;
  if (a * b <= 0.0)
    return result;
  const double reach = std::abs(a) < std::abs(b) ? a : b;
  for (const double sign : {-1.0, 1.0})
  {
    const double point = beam.middle + 0.5 * reach * (1.0 + sign / std::sqrt(3.0));
    const Matrix6 weighted = beam.compliance.asDiagonal() * shift_wrench(at, point);
    result += 0.5 * std::abs(reach) * shift_wrench(s, point).transpose() * weighted;
  }
  return result;
}

Vector6 load_motion(const Beam& beam, const BeamLoad& load, double s)
{
  Vector6 motion = Vector6::Zero();
  const double reach = s - beam.middle;
  motion(0) = load.axial_strain * reach;
  constexpr std::array<double, 3> weights{5.0 / 18.0, 8.0 / 18.0, 5.0 / 18.0};
  const std::array<double, 3> places{0.5 - std::sqrt(0.15), 0.5, 0.5 + std::sqrt(0.15)};
  for (std::size_t g = 0; g < 3; ++g) // fourth-degree integrand, exact
  {
    const double point = beam.middle + reach * places[g];
    const double outboard = reach > 0.0 ? beam.length - point : -point;
    const Vector6 section = distributed_wrench(load, point, outboard);
    const Vector6 strain = beam.compliance.cwiseProduct(section);
    motion += weights[g] * std::abs(reach) * shift_wrench(s, point).transpose() * strain;
  }
  for (const auto& [position, force] : load.forces)
    motion += influence(beam, s, position).leftCols<3>() * force;
  return motion;
}

Vector6 load_before(const BeamLoad& load, double s, Side side)
{
  Vector6 wrench = distributed_wrench(load, s, -s);
  for (const auto& [position, force] : load.forces)
    if (position < s || (side == Side::after && position <= s))
      wrench += shift_wrench(position, s).leftCols<3>() * force;
  return wrench;
}

Vector6 load_resultant(const Beam& beam, const BeamLoad& load)
{
  return shift_wrench(beam.length, beam.middle) * load_before(load, beam.length, Side::after);
}
} // namespace carlin::mounts
