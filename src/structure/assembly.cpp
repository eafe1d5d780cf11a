#include "assembly.hpp"

#include <algorithm>
#include <cassert>

namespace carlin
{
BlockPattern::BlockPattern(Index node_count) : neighbours_(static_cast<std::size_t>(node_count)) {}

void BlockPattern::couple(std::span<const Index> nodes)
{
  for (const Index a : nodes)
  {
    std::vector<Index>& list = neighbours_[static_cast<std::size_t>(a)];
    for (const Index b : nodes)
      if (std::find(list.begin(), list.end(), b) == list.end())
        list.push_back(b);
  }
}

void BlockPattern::close()
{
  start_.assign(1, 0);
  for (std::vector<Index>& list : neighbours_)
  {
    std::sort(list.begin(), list.end());
    start_.push_back(start_.back() + list.size());
  }
}

SparseMatrix BlockPattern::zero() const
{
  const auto size = static_cast<Index>(6 * neighbours_.size());
  SparseMatrix matrix(size, size);
  matrix.resizeNonZeros(static_cast<Index>(36 * start_.back()));
  int* outer = matrix.outerIndexPtr();
  int* inner = matrix.innerIndexPtr();
  std::fill_n(matrix.valuePtr(), matrix.data().size(), 0.0);
  int entry = 0;
  for (std::size_t node = 0; node < neighbours_.size(); ++node)
    for (std::size_t column = 0; column < 6; ++column)
    {
      outer[6 * node + column] = entry;
      for (const Index neighbour : neighbours_[node])
        for (int row = 0; row < 6; ++row)
          inner[entry++] = static_cast<int>(6 * neighbour) + row;
    }
  outer[size] = entry;
  return matrix;
}

std::size_t BlockPattern::position(Index row_node, Index column_node) const
{
  const std::vector<Index>& list = neighbours_[static_cast<std::size_t>(column_node)];
  const auto found = std::lower_bound(list.begin(), list.end(), row_node);
  assert(found != list.end() && *found == row_node); // coupled before
  return static_cast<std::size_t>(found - list.begin());
}

void BlockPattern::add(SparseMatrix& matrix, const Eigen::Ref<const MatrixX>& element,
                       std::span<const Index> nodes) const
{
  assert(element.rows() == static_cast<Index>(6 * nodes.size()) &&
         element.cols() == element.rows());
  double* values = matrix.valuePtr();
  const auto stride = static_cast<std::size_t>(element.outerStride());
  for (std::size_t j = 0; j < nodes.size(); ++j)
  {
    const auto column_node = static_cast<std::size_t>(nodes[j]);
    const std::size_t column_length = 6 * neighbours_[column_node].size();
    for (std::size_t i = 0; i < nodes.size(); ++i)
    {
      double* block = values + 36 * start_[column_node] + 6 * position(nodes[i], nodes[j]);
      for (std::size_t c = 0; c < 6; ++c, block += column_length)
      {
        const double* source = element.data() + 6 * i + (6 * j + c) * stride;
        for (std::size_t r = 0; r < 6; ++r)
          block[r] += source[r];
      }
    }
  }
}
} // namespace carlin
