#pragma once

#include "carlin/lattice/mesh.hpp"

#include <cstdint>
#include <span>
#include <utility>
#include <vector>

namespace carlin
{
/// Number of the line between two mesh points, the same from either end.
std::uint64_t edge_key(Index a, Index b);

/// Corner count of a cell: 4, or 3 for a triangle.
std::size_t corner_count(const Cell& cell);

/// Unit normal of a cell by the right hand, from its diagonals (sides of a triangle).
Vector3 cell_normal(const Mesh& mesh, const Cell& cell);

/// Cells by their edges. Sorted once; a look-up costs a binary search.
class EdgeTable
{
public:
  explicit EdgeTable(const Mesh& mesh);
  /// Entries (edge, cell) of the cells that have the edge a-b.
  std::span<const std::pair<std::uint64_t, Index>> cells_at(Index a, Index b) const;

private:
  std::vector<std::pair<std::uint64_t, Index>> entries_;
};
} // namespace carlin
