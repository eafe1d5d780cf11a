#pragma once

#include "carlin/core/error.hpp"
#include "carlin/solution/hull_solver.hpp"

namespace carlin
{
/// A factorization that met a pivot of zero or less.
class NotPositiveDefinite : public SolveError
{
public:
  explicit NotPositiveDefinite(Index row_of_matrix);
  Index row; ///< of the matrix, where it stopped
};
} // namespace carlin
