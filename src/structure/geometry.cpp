#include "geometry.hpp"

#include <algorithm>

namespace carlin
{
double distance_to_line(const Vector3& point, const Vector3& from, const Vector3& to)
{
  const Vector3 line = to - from;
  const double squared = line.squaredNorm();
  const double share =
      squared > 0.0 ? std::clamp((point - from).dot(line) / squared, 0.0, 1.0) : 0.0;
  return (point - from - share * line).norm();
}

double distance_to_triangle(const Vector3& point, const Vector3& a, const Vector3& b,
                            const Vector3& c)
{
  const Vector3 normal = (b - a).cross(c - a);
  const double squared = normal.squaredNorm();
  if (squared > 0.0)
  {
    // Inside when the point sees all three sides turn the same way as the triangle.
    const bool is_over = (b - a).cross(point - a).dot(normal) >= 0.0 &&
                         (c - b).cross(point - b).dot(normal) >= 0.0 &&
                         (a - c).cross(point - c).dot(normal) >= 0.0;
    if (is_over)
      return std::abs((point - a).dot(normal)) / std::sqrt(squared);
  }
  return std::min({distance_to_line(point, a, b), distance_to_line(point, b, c),
                   distance_to_line(point, c, a)});
}

double distance_to_quad(const Vector3& point, const QuadPoints& quad)
{
  const Vector3 middle = 0.25 * (quad[0] + quad[1] + quad[2] + quad[3]);
  double nearest = (point - middle).norm();
  for (std::size_t i = 0; i < 4; ++i)
    nearest = std::min(nearest, distance_to_triangle(point, quad[i], quad[(i + 1) % 4], middle));
  return nearest;
}
} // namespace carlin
