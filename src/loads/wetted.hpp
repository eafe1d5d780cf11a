#pragma once

#include "carlin/structure/structure.hpp"

#include <array>
#include <functional>
#include <vector>

namespace carlin
{
/// Plane of still water z = draught + trim x + heel y, boat axes.
struct WaterPlane
{
  double draught = 0.0; ///< at x = 0, y = 0 [m]
  double trim = 0.0;    ///< dz/dx [-], bow down +
  double heel = 0.0;    ///< dz/dy [-], port down +
  Vector3 up() const { return Vector3(-trim, -heel, 1.0).normalized(); }
  /// Square to the plane, positive below it [m].
  double depth(const Vector3& position) const
  {
    return (draught + trim * position.x() + heel * position.y() - position.z()) * up().z();
  }
};

/// Water pressure on one shell: forces at its corners, and its mean.
struct WettedShell
{
  std::array<Vector3, 4> forces{Vector3::Zero(), Vector3::Zero(), Vector3::Zero(),
                                Vector3::Zero()}; ///< [N]
  double mean_pressure = 0.0;                     ///< over the whole shell [Pa]
};

/// Integrates hydrostatic pressure exactly over the part of a quadrilateral below the water, the
/// quadrilateral taken as the four triangles about its middle (flat ones: itself), with forces at
/// the corners by its own linear shape functions: resultant and moment are exact too.
/// @param corners 4, or 3 for a triangle. The right-hand normal points out of the water.
WettedShell wetted_shell(const QuadPoints& points, std::size_t corners, const WaterPlane& plane,
                         double weight_density);
} // namespace carlin
