#pragma once

#include "carlin/core/types.hpp"

#include <cstdint>
#include <span>
#include <vector>

namespace carlin
{
/// Sparsity of a matrix of 6 x 6 blocks, known before any value is: elements are then added in
/// place, with no list of triplets and no sorting.
class BlockPattern
{
public:
  explicit BlockPattern(Index node_count);

  /// Declares that all these nodes (repeats allowed) meet in one element. Before `close`.
  void couple(std::span<const Index> nodes);
  void close();

  /// Matrix of the pattern filled with zeros, (6 n) x (6 n).
  SparseMatrix zero() const;
  /// Adds an element matrix, 6 k x 6 k, at k nodes. A repeated node sums its rows and columns.
  void add(SparseMatrix& matrix, const Eigen::Ref<const MatrixX>& element,
           std::span<const Index> nodes) const;

private:
  std::size_t position(Index row_node, Index column_node) const;

  std::vector<std::vector<Index>> neighbours_; // of each node, itself included, in order
  std::vector<std::size_t> start_;             // sum of neighbour counts before each node
};
} // namespace carlin
