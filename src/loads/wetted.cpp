#include "wetted.hpp"

namespace carlin
{
namespace
{
using Shares = Eigen::Vector4d; // of the four corners in a point of the shell

struct Vertex
{
  Vector3 position;
  Shares shares;
  double depth = 0.0; // below the plane +
};

Vertex between(const Vertex& a, const Vertex& b)
{
  const double t = a.depth / (a.depth - b.depth);
  return {a.position + t * (b.position - a.position), a.shares + t * (b.shares - a.shares), 0.0};
}

/// Adds the pressure on a triangle wholly under water. Integral of a product of two linear
/// functions over a triangle: area/12 (sum f sum g + sum f_i g_i).
void add_wet_triangle(WettedShell& wetted, const std::array<Vertex, 3>& triangle,
                      double weight_density, double& pressure_area)
{
  const Vector3 twice_area = (triangle[1].position - triangle[0].position)
                                 .cross(triangle[2].position - triangle[0].position);
  const double depth_sum = triangle[0].depth + triangle[1].depth + triangle[2].depth;
  for (Index corner = 0; corner < 4; ++corner)
  {
    double share_sum = 0.0, products = 0.0;
    for (const Vertex& vertex : triangle)
    {
      share_sum += vertex.shares[corner];
      products += vertex.shares[corner] * vertex.depth;
    }
    wetted.forces[static_cast<std::size_t>(corner)] +=
        weight_density / 24.0 * (depth_sum * share_sum + products) * twice_area;
  }
  pressure_area += weight_density * depth_sum / 6.0 * twice_area.norm();
}

void add_triangle(WettedShell& wetted, const std::array<Vertex, 3>& triangle, double weight_density,
                  double& pressure_area)
{
  std::array<Vertex, 4> below;
  std::size_t count = 0;
  for (std::size_t i = 0; i < 3; ++i)
  {
    const Vertex& from = triangle[i];
    const Vertex& to = triangle[(i + 1) % 3];
    if (from.depth >= 0.0)
      below[count++] = from;
    if ((from.depth > 0.0 && to.depth < 0.0) || (from.depth < 0.0 && to.depth > 0.0))
      below[count++] = between(from, to);
  }
  for (std::size_t i = 2; i < count; ++i)
    add_wet_triangle(wetted, {below[0], below[i - 1], below[i]}, weight_density, pressure_area);
}
} // namespace

WettedShell wetted_shell(const QuadPoints& points, std::size_t corners, const WaterPlane& plane,
                         double weight_density)
{
  WettedShell wetted;
  double pressure_area = 0.0, area = 0.0;
  std::array<Vertex, 4> vertices;
  for (std::size_t i = 0; i < corners; ++i)
    vertices[i] = {points[i], Shares::Unit(static_cast<Index>(i)), plane.depth(points[i])};
  if (corners == 3)
  {
    area = 0.5 * (points[1] - points[0]).cross(points[2] - points[0]).norm();
    add_triangle(wetted, {vertices[0], vertices[1], vertices[2]}, weight_density, pressure_area);
  }
  else
  {
    Vertex middle{Vector3::Zero(), Shares::Constant(0.25), 0.0};
    for (const Vector3& point : points)
      middle.position += 0.25 * point;
    middle.depth = plane.depth(middle.position);
    for (std::size_t i = 0; i < 4; ++i)
    {
      const std::size_t next = (i + 1) % 4;
      area += 0.5 * (points[i] - middle.position).cross(points[next] - middle.position).norm();
      add_triangle(wetted, {vertices[i], vertices[next], middle}, weight_density, pressure_area);
    }
  }
  wetted.mean_pressure = area > 0.0 ? pressure_area / area : 0.0;
  return wetted;
}
} // namespace carlin
