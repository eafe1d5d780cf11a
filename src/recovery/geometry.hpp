#pragma once

#include "carlin/structure/structure.hpp"

#include <algorithm>
#include <utility>

namespace carlin
{
/// Unordered pair of mesh points: the same edge for shells and members, whatever nodes a joint has
/// split.
using PointEdge = std::pair<Index, Index>;

inline PointEdge point_edge(Index a, Index b) { return {std::min(a, b), std::max(a, b)}; }

inline int corner_count(const Shell& shell) { return shell.nodes[2] == shell.nodes[3] ? 3 : 4; }

inline const Vector3& node_position(const Structure& structure, Index node)
{
  return structure.nodes[static_cast<std::size_t>(node)];
}

inline Index point_of(const Structure& structure, Index node)
{
  return structure.node_point[static_cast<std::size_t>(node)];
}

/// Edge i of a shell: between corner i and the next.
inline PointEdge shell_edge(const Structure& structure, const Shell& shell, int i)
{
  const int next = (i + 1) % corner_count(shell);
  return point_edge(point_of(structure, shell.nodes[static_cast<std::size_t>(i)]),
                    point_of(structure, shell.nodes[static_cast<std::size_t>(next)]));
}

inline Vector3 shell_centre(const Structure& structure, const Shell& shell)
{
  Vector3 sum = Vector3::Zero();
  for (int i = 0; i < corner_count(shell); ++i)
    sum += node_position(structure, shell.nodes[static_cast<std::size_t>(i)]);
  return sum / corner_count(shell);
}

/// Unit normal by the diagonals (of a triangle: of its plane).
inline Vector3 shell_normal(const Structure& structure, const Shell& shell)
{
  const QuadPoints p = shell_points(structure, shell);
  return (p[2] - p[0])
      .cross(p[3] == p[2] ? Vector3(p[2] - p[1]) : Vector3(p[3] - p[1]))
      .normalized();
}

inline Vector3 translation(const VectorX& displacement, Index node)
{
  return displacement.segment<3>(freedoms_per_node * node);
}

inline Vector3 rotation(const VectorX& displacement, Index node)
{
  return displacement.segment<3>(freedoms_per_node * node + 3);
}
} // namespace carlin
