#include "tank_shapes.hpp"

#include "carlin/mounts/mounts.hpp"

#include <cmath>
#include <numbers>
#include <vtkCellArray.h>
#include <vtkPoints.h>

namespace carlin
{
namespace
{
constexpr int sides = 24;

struct Builder
{
  TankShapes& shapes;
  vtkPoints& points;
  vtkCellArray& lines;
  vtkCellArray& polygons;
  std::vector<std::size_t> line_tank, polygon_tank;

  void add_axis(std::size_t t, const Tank& tank, const std::vector<double>& positions)
  {
    lines.InsertNextCell(static_cast<int>(positions.size()));
    for (std::size_t s = 0; s < positions.size(); ++s)
    {
      shapes.points.push_back({t, s, positions[s]});
      lines.InsertCellPoint(points.InsertNextPoint(axis_point(tank, positions[s]).data()));
    }
    line_tank.push_back(t);
  }

  void add_tube(std::size_t t, const Tank& tank, const std::vector<double>& positions)
  {
    const Matrix3 axes = tank_axes(tank);
    const vtkIdType first = points.GetNumberOfPoints();
    for (std::size_t s = 0; s < positions.size(); ++s)
      for (int side = 0; side < sides; ++side)
      {
        const double angle = 2.0 * std::numbers::pi * side / sides;
        const Vector3 point =
            axis_point(tank, positions[s]) +
            0.5 * tank.diameter * (std::cos(angle) * axes.col(1) + std::sin(angle) * axes.col(2));
        points.InsertNextPoint(point.data());
        shapes.points.push_back({t, s, positions[s]});
      }
    for (std::size_t s = 0; s + 1 < positions.size(); ++s)
    {
      if (positions[s + 1] <= positions[s]) // both sides of a collar: no surface between them
        continue;
      const vtkIdType aft = first + static_cast<vtkIdType>(s) * sides;
      for (int side = 0; side < sides; ++side)
      {
        const vtkIdType next = (side + 1) % sides;
        add_polygon(t, {aft + side, aft + next, aft + sides + next, aft + sides + side});
      }
    }
    const vtkIdType last = first + static_cast<vtkIdType>(positions.size() - 1) * sides;
    std::vector<vtkIdType> aft_end, forward_end;
    for (int side = 0; side < sides; ++side)
    {
      aft_end.push_back(first + sides - 1 - side);
      forward_end.push_back(last + side);
    }
    add_polygon(t, aft_end);
    add_polygon(t, forward_end);
  }

  void add_polygon(std::size_t t, const std::vector<vtkIdType>& corners)
  {
    polygons.InsertNextCell(static_cast<vtkIdType>(corners.size()), corners.data());
    polygon_tank.push_back(t);
  }
};
} // namespace

Vector3 axis_point(const Tank& tank, double position)
{
  return tank.axis_from + position * (tank.axis_to - tank.axis_from).normalized();
}

TankShapes tank_shapes(const std::vector<Tank>& tanks,
                       const std::vector<std::vector<double>>& positions)
{
  TankShapes shapes;
  const auto points = vtkSmartPointer<vtkPoints>::New();
  const auto lines = vtkSmartPointer<vtkCellArray>::New();
  const auto polygons = vtkSmartPointer<vtkCellArray>::New();
  lines->Use32BitStorage();
  polygons->Use32BitStorage();
  Builder builder{shapes, *points, *lines, *polygons, {}, {}};
  for (std::size_t t = 0; t < tanks.size(); ++t)
    if (!positions[t].empty())
      builder.add_axis(t, tanks[t], positions[t]);
  for (std::size_t t = 0; t < tanks.size(); ++t)
    if (!positions[t].empty())
      builder.add_tube(t, tanks[t], positions[t]);
  shapes.data = vtkSmartPointer<vtkPolyData>::New();
  shapes.data->SetPoints(points);
  shapes.data->SetLines(lines);
  shapes.data->SetPolys(polygons);
  shapes.cell_tank = builder.line_tank;
  shapes.cell_tank.insert(shapes.cell_tank.end(), builder.polygon_tank.begin(),
                          builder.polygon_tank.end());
  return shapes;
}
} // namespace carlin
