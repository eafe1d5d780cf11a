#pragma once

#include "carlin/description/tanks.hpp"

#include <vector>
#include <vtkPolyData.h>
#include <vtkSmartPointer.h>

namespace carlin
{
/// Point of a tank's axis.
struct AxisPoint
{
  std::size_t tank = 0;
  std::size_t section = 0;
  double position = 0.0; ///< from axis_from [m]
};

/// Axes of tanks as lines, and tubes of their diameter round them as surfaces: first the points of
/// all axes, then those of all tubes. Cells: lines, then polygons.
struct TankShapes
{
  vtkSmartPointer<vtkPolyData> data;
  std::vector<AxisPoint> points; ///< one a point of `data`; of a tube: the axis point it is round
  std::vector<std::size_t> cell_tank; ///< tank of each cell
};

/// @param positions One list a tank: along its axis [m], in order; empty: the tank is left out.
TankShapes tank_shapes(const std::vector<Tank>& tanks,
                       const std::vector<std::vector<double>>& positions);

/// Point of a tank's axis [m].
Vector3 axis_point(const Tank& tank, double position);
} // namespace carlin
