#include "edges.hpp"

#include <algorithm>

namespace carlin
{
std::uint64_t edge_key(Index a, Index b)
{
  const auto low = static_cast<std::uint64_t>(std::min(a, b));
  const auto high = static_cast<std::uint64_t>(std::max(a, b));
  return (low << 32U) | high;
}

std::size_t corner_count(const Cell& cell) { return cell.is_triangle() ? 3 : 4; }

Vector3 cell_normal(const Mesh& mesh, const Cell& cell)
{
  const Vector3& p0 = mesh.points[static_cast<std::size_t>(cell.points[0])];
  const Vector3& p1 = mesh.points[static_cast<std::size_t>(cell.points[1])];
  const Vector3& p2 = mesh.points[static_cast<std::size_t>(cell.points[2])];
  if (cell.is_triangle())
    return (p1 - p0).cross(p2 - p0).normalized();
  const Vector3& p3 = mesh.points[static_cast<std::size_t>(cell.points[3])];
  return (p2 - p0).cross(p3 - p1).normalized();
}

EdgeTable::EdgeTable(const Mesh& mesh)
{
  entries_.reserve(4 * mesh.cells.size());
  for (std::size_t c = 0; c < mesh.cells.size(); ++c)
  {
    const Cell& cell = mesh.cells[c];
    const std::size_t corners = corner_count(cell);
    for (std::size_t i = 0; i < corners; ++i)
      entries_.emplace_back(edge_key(cell.points[i], cell.points[(i + 1) % corners]),
                            static_cast<Index>(c));
  }
  std::sort(entries_.begin(), entries_.end());
}

std::span<const std::pair<std::uint64_t, Index>> EdgeTable::cells_at(Index a, Index b) const
{
  const std::uint64_t key = edge_key(a, b);
  const auto first =
      std::lower_bound(entries_.begin(), entries_.end(), std::pair<std::uint64_t, Index>(key, -1));
  auto last = first;
  while (last != entries_.end() && last->first == key)
    ++last;
  return {first, last};
}
} // namespace carlin
