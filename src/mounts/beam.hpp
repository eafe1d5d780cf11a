#pragma once

#include "carlin/mounts/mounts.hpp"

#include <vector>

namespace carlin::mounts
{
/// A tank as a free beam in its own axes, s from axis_from. Motions are split into a rigid motion
/// of the middle section and the deformation of the two halves built in there: exact for forces in
/// balance, which the equilibrium rows see to. Wrenches are (force, moment), motions (shift,
/// rotation), both at a point of the axis.
struct Beam
{
  Matrix3 axes = Matrix3::Identity();
  Vector3 origin = Vector3::Zero();     ///< axis_from [m]
  double length = 0.0;                  ///< [m]
  double middle = 0.0;                  ///< where it is built in [m]
  Vector6 compliance = Vector6::Zero(); ///< of a section: 1/EA, 1/GA, 1/GA, 1/GJ, 1/EI, 1/EI
};

/// What acts along a beam, in its axes.
struct BeamLoad
{
  Vector3 start = Vector3::Zero();                ///< force per length at s = 0 [N/m]
  Vector3 slope = Vector3::Zero();                ///< its rate along s [N/m^2]
  std::vector<std::pair<double, Vector3>> forces; ///< (s [m], force [N])
  double axial_strain = 0.0;
};

Beam make_beam(const Tank& tank);
BeamLoad make_beam_load(const Beam& beam, const TankStageLoad& load);

/// Wrench at `to` of a unit wrench at `from`; its transpose carries motions the other way.
Matrix6 shift_wrench(double from, double to);

/// Motion at s of a wrench at `at`, the middle built in. Source: unit load theorem with the
/// section forces of both; quadratic integrand, exact with two Gauss points.
Matrix6 influence(const Beam& beam, double s, double at);

/// Motion at s of loads and growth, the middle built in.
Vector6 load_motion(const Beam& beam, const BeamLoad& load, double s);

/// Sum of all loads, a wrench at the middle.
Vector6 load_resultant(const Beam& beam, const BeamLoad& load);

enum class Side
{
  before, ///< leaves out what acts at s itself
  after
};

/// Sum of the loads on [0, s], a wrench at s.
Vector6 load_before(const BeamLoad& load, double s, Side side);
} // namespace carlin::mounts
