#include "carlin/mounts/mounts.hpp"

#include <cassert>
#include <cmath>

namespace carlin
{
Matrix3 tank_axes(const Tank& tank)
{
  const Vector3 along = (tank.axis_to - tank.axis_from).normalized();
  // "Upright": the axis is vertical to round-off, so that z has no direction square to it.
  const bool is_upright = std::hypot(along.x(), along.y()) < 1e-9;
  const Vector3 near = is_upright ? Vector3::UnitX() : Vector3::UnitZ();
  const Vector3 upright = (near - along * along.dot(near)).normalized();
  Matrix3 axes;
  axes.col(0) = along;
  axes.col(1) = upright.cross(along);
  axes.col(2) = upright;
  return axes;
}

std::vector<FootRef> feet_of(const std::vector<Tank>& tanks)
{
  std::vector<FootRef> feet;
  for (std::size_t t = 0; t < tanks.size(); ++t)
    for (std::size_t c = 0; c < tanks[t].collars.size(); ++c)
      for (std::size_t f = 0; f < tanks[t].collars[c].feet.size(); ++f)
        feet.push_back({static_cast<Index>(t), static_cast<Index>(c), static_cast<Index>(f),
                        tanks[t].collars[c].feet[f].footprint.centre});
  return feet;
}
} // namespace carlin
