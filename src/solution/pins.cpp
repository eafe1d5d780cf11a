#include "pins.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>

namespace carlin
{
namespace
{
/// Node of the body for which `measure` is largest; the first of equals.
template <typename Measure>
Index farthest(const Structure& structure, const Bodies& bodies, const Measure& measure)
{
  Index best = -1;
  double largest = -1.0;
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
  {
    if (bodies.of_node[n] != bodies.largest)
      continue;
    const double value = measure(structure.nodes[n]);
    if (value > largest * (1.0 + 1e-12))
    {
      largest = value;
      best = static_cast<Index>(n);
    }
  }
  return best;
}

Index largest_component(const Vector3& vector)
{
  Index component = 0;
  vector.cwiseAbs().maxCoeff(&component);
  return component;
}
} // namespace

std::vector<Index> determinate_pins(const Structure& structure, const Bodies& bodies)
{
  const auto node = [&](Index n) { return structure.nodes[static_cast<std::size_t>(n)]; };
  const auto start = std::find(bodies.of_node.begin(), bodies.of_node.end(), bodies.largest);
  const Vector3 any = node(start - bodies.of_node.begin());
  const Index a = farthest(structure, bodies, [&](const Vector3& p) { return (p - any).norm(); });
  const Index b =
      farthest(structure, bodies, [&](const Vector3& p) { return (p - node(a)).norm(); });
  const double length = (node(b) - node(a)).norm();
  if (length <= 0.0)
    throw SolveError("the structure is a single point; it cannot be held");
  const Vector3 direction = (node(b) - node(a)) / length;
  const auto off_line = [&](const Vector3& p) -> Vector3 { return direction.cross(p - node(a)); };
  const Index c = farthest(structure, bodies, [&](const Vector3& p) { return off_line(p).norm(); });

  std::vector<Index> pins = {6 * a, 6 * a + 1, 6 * a + 2};
  const Index along = largest_component(direction);
  for (Index component = 0; component < 3; ++component)
    if (component != along)
      pins.push_back(6 * b + component);
  constexpr double straight = 1e-6;
  if (off_line(node(c)).norm() > straight * length)
    pins.push_back(6 * c + largest_component(off_line(node(c))));
  else
    pins.push_back(6 * a + 3 + along);
  std::sort(pins.begin(), pins.end());
  return pins;
}
} // namespace carlin
