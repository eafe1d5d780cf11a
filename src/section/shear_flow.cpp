#include "shear_flow.hpp"

#include <array>
#include <cassert>
#include <cmath>

namespace carlin
{
namespace
{
struct MidLine
{
  double area = 0.0;
  Vector2 centroid = Vector2::Zero();
  double I_y = 0.0, I_z = 0.0, I_yz = 0.0; // about the centroid [m^4]
};

MidLine mid_line(const std::vector<OpenWall>& walls)
{
  MidLine line;
  for (const OpenWall& wall : walls)
  {
    const double area = (wall.junction - wall.free_end).norm() * wall.thickness;
    line.area += area;
    line.centroid += 0.5 * area * (wall.junction + wall.free_end);
  }
  line.centroid /= line.area;
  for (const OpenWall& wall : walls)
  {
    const Vector2 along = wall.junction - wall.free_end;
    const Vector2 middle = 0.5 * (wall.junction + wall.free_end) - line.centroid;
    const double area = along.norm() * wall.thickness;
    line.I_y += area * (middle.y() * middle.y() + along.y() * along.y() / 12.0);
    line.I_z += area * (middle.x() * middle.x() + along.x() * along.x() / 12.0);
    line.I_yz += area * (middle.x() * middle.y() + along.x() * along.y() / 12.0);
  }
  return line;
}
} // namespace

ShearFlowResult open_section_shear_flow(const std::vector<OpenWall>& walls)
{
  const MidLine line = mid_line(walls);
  const double determinant = line.I_y * line.I_z - line.I_yz * line.I_yz;
  assert(determinant > 0.0); // walls on one straight line have no shear flow across it

  // Gauss, three points: the square of the flow is of fourth degree along a wall.
  const std::array<double, 3> place = {0.5 - 0.5 * std::sqrt(0.6), 0.5, 0.5 + 0.5 * std::sqrt(0.6)};
  const std::array<double, 3> weight = {5.0 / 18.0, 8.0 / 18.0, 5.0 / 18.0};

  Vector2 energy = Vector2::Zero(); // of unit V_y, unit V_z
  Vector2 moment = Vector2::Zero(); // of the flow about the centroid, +x
  for (const OpenWall& wall : walls)
  {
    const Vector2 along = wall.junction - wall.free_end;
    const double length = along.norm();
    const Vector2 start = wall.free_end - line.centroid;
    const double lever = (start.x() * along.y() - start.y() * along.x()) / length;
    for (std::size_t i = 0; i < place.size(); ++i)
    {
      // First moments of the wall from its free end to this place.
      const Vector2 first =
          wall.thickness * length * place[i] * (start + 0.5 * place[i] * along); // (Q_z, Q_y)
      const Vector2 flow = -Vector2(line.I_y * first.x() - line.I_yz * first.y(),
                                    line.I_z * first.y() - line.I_yz * first.x()) /
                           determinant;
      energy += weight[i] * length / wall.thickness * flow.cwiseAbs2();
      moment += weight[i] * length * lever * flow;
    }
  }
  ShearFlowResult result;
  result.shear_area_y = 1.0 / energy.x();
  result.shear_area_z = 1.0 / energy.y();
  // M_x = y V_z - z V_y of a force through (y, z).
  result.shear_centre = line.centroid + Vector2(moment.y(), -moment.x());
  return result;
}
} // namespace carlin
