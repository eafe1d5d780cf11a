#pragma once

#include "verification_record.hpp"

#include "carlin/mounts/mounts.hpp"

#include <cmath>
#include <limits>
#include <string>

/// Tanks of part G of the verification book, for tests of the mounts without a hull model.
namespace carlin::testing
{
inline constexpr double rigid = std::numeric_limits<double>::infinity();

/// A foot at the ring's own centre: stiff along the tank as given, rigid otherwise.
inline Foot foot_at(const Vector3& point, double along = rigid, double upright = rigid)
{
  Foot foot;
  foot.name = "foot";
  foot.footprint.centre = point;
  foot.stiffness = {along, rigid, upright, rigid, rigid, rigid};
  return foot;
}

inline Collar collar_at(const Tank& tank, const std::string& name, double position,
                        double along = rigid, double upright = rigid)
{
  Collar collar;
  collar.name = name;
  collar.position = position;
  const Vector3 axis = (tank.axis_to - tank.axis_from).normalized();
  collar.feet = {foot_at(tank.axis_from + position * axis, along, upright)};
  return collar;
}

inline void make_slide(Collar& collar, SlidesAt where, double friction)
{
  collar.kind = CollarKind::sliding;
  collar.slides_at = where;
  collar.friction = {friction, friction};
}

inline Tank bare_tank(double length, double axial_stiffness, double bending_stiffness = 4e6)
{
  Tank tank;
  tank.name = "tank-1";
  tank.axis_to = Vector3(length, 0.0, 0.0);
  tank.diameter = 0.448;
  tank.axial_stiffness = axial_stiffness;
  tank.bending_stiffness = bending_stiffness;
  return tank;
}

inline Index foot_count(const std::vector<Tank>& tanks)
{
  return static_cast<Index>(feet_of(tanks).size());
}

inline MountStage quiet_stage(const std::vector<Tank>& tanks, const std::string& name = "fitting")
{
  MountStage stage;
  stage.name = name;
  stage.tanks.resize(tanks.size());
  stage.foot_motion = VectorX::Zero(6 * foot_count(tanks));
  return stage;
}

inline MatrixX rigid_bed(const std::vector<Tank>& tanks)
{
  return MatrixX::Zero(6 * foot_count(tanks), 6 * foot_count(tanks));
}

/// Relative error, written to the verification table as well.
inline double error_of(const std::string& subject, const std::string& quantity, double expected,
                       double found, ToleranceClass tolerance = ToleranceClass::printing)
{
  record({subject, "verification book, part G", quantity, expected, found, tolerance});
  return expected == 0.0 ? std::abs(found) : std::abs(found / expected - 1.0);
}
} // namespace carlin::testing
