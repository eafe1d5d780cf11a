#include "carlin/solution/hull_solver.hpp"

#include "connectivity.hpp"
#include "factor.hpp"
#include "mechanism.hpp"
#include "pins.hpp"

#include <algorithm>

namespace carlin
{
namespace
{
/// A pivot that has lost all but this part of its diagonal is round-off: nothing resists there.
constexpr double lost_pivot = 1e-13;

/// Rows and columns of the free freedoms, in order.
SparseMatrix reduced_matrix(const SparseMatrix& matrix, const std::vector<Index>& reduced_index,
                            const std::vector<Index>& free)
{
  SparseMatrix reduced(static_cast<Index>(free.size()), static_cast<Index>(free.size()));
  reduced.resizeNonZeros(matrix.nonZeros());
  Index entry = 0;
  for (std::size_t column = 0; column < free.size(); ++column)
  {
    reduced.outerIndexPtr()[column] = static_cast<int>(entry);
    for (SparseMatrix::InnerIterator it(matrix, free[column]); it; ++it)
    {
      const Index row = reduced_index[static_cast<std::size_t>(it.row())];
      if (row < static_cast<Index>(column)) // held, or above the diagonal
        continue;
      reduced.innerIndexPtr()[entry] = static_cast<int>(row);
      reduced.valuePtr()[entry++] = it.value();
    }
  }
  reduced.outerIndexPtr()[free.size()] = static_cast<int>(entry);
  reduced.resizeNonZeros(entry);
  return reduced;
}

SparseMatrix full_symmetric(const SparseMatrix& lower)
{
  return lower.selfadjointView<Eigen::Lower>();
}

/// Rows of a symmetric matrix.
SparseMatrix rows_of(const SparseMatrix& symmetric, const std::vector<Index>& rows)
{
  std::vector<Eigen::Triplet<double>> entries;
  for (std::size_t r = 0; r < rows.size(); ++r)
    for (SparseMatrix::InnerIterator it(symmetric, rows[r]); it; ++it)
      entries.emplace_back(static_cast<int>(r), static_cast<int>(it.row()), it.value());
  SparseMatrix chosen(static_cast<Index>(rows.size()), symmetric.cols());
  chosen.setFromTriplets(entries.begin(), entries.end());
  return chosen;
}

SparseMatrix with_ground_springs(const Structure& structure)
{
  SparseMatrix stiffness = structure.stiffness;
  for (const SupportedFreedom& support : structure.supported)
    if (support.stiffness > 0.0)
      stiffness.coeffRef(support.freedom, support.freedom) += support.stiffness;
  return stiffness;
}
} // namespace

HullSolver::HullSolver(const Structure& structure)
    : structure_(&structure), is_floating_(structure.supported.empty())
{
  const Index size = structure.stiffness.rows();
  imposed_ = VectorX::Zero(size);
  if (size == 0)
    return; // a rigid bed: nothing deforms
  const Bodies bodies = connected_bodies(structure);
  require_joined(structure, bodies);
  if (is_floating_)
    held_ = determinate_pins(structure, bodies);
  for (const SupportedFreedom& support : structure.supported)
    if (support.stiffness <= 0.0)
      held_.push_back(support.freedom);

  free_to_reduced_.assign(static_cast<std::size_t>(size), 0);
  for (const Index freedom : held_)
    free_to_reduced_[static_cast<std::size_t>(freedom)] = -1;
  for (Index freedom = 0; freedom < size; ++freedom)
    if (Index& reduced = free_to_reduced_[static_cast<std::size_t>(freedom)]; reduced >= 0)
    {
      reduced = static_cast<Index>(reduced_to_free_.size());
      reduced_to_free_.push_back(freedom);
    }

  const bool has_springs =
      std::any_of(structure.supported.begin(), structure.supported.end(),
                  [](const SupportedFreedom& support) { return support.stiffness > 0.0; });
  const SparseMatrix sprung = has_springs ? with_ground_springs(structure) : SparseMatrix();
  const SparseMatrix& stiffness = has_springs ? sprung : structure.stiffness;
  factor(reduced_matrix(stiffness, free_to_reduced_, reduced_to_free_));
  find_imposed_displacement(stiffness);
  held_rows_ = rows_of(structure.stiffness, held_);
}

void HullSolver::factor(const SparseMatrix& reduced)
{
  if (reduced.rows() == 0)
    return;
  try
  {
    factor_ = std::make_unique<SparseFactor>(reduced);
  }
  catch (const NotPositiveDefinite&)
  {
    throw SolveError(describe_mechanism(*structure_, full_symmetric(reduced), reduced_to_free_));
  }
  const VectorX left = factor_->pivots().cwiseQuotient(reduced.diagonal());
  if (left.minCoeff() < lost_pivot)
    throw SolveError(describe_mechanism(*structure_, full_symmetric(reduced), reduced_to_free_));
}

void HullSolver::find_imposed_displacement(const SparseMatrix& stiffness)
{
  bool is_moved = false;
  VectorX spring_forces = VectorX::Zero(stiffness.rows());
  for (const SupportedFreedom& support : structure_->supported)
  {
    is_moved = is_moved || support.motion != 0.0;
    if (support.stiffness > 0.0)
      spring_forces[support.freedom] += support.stiffness * support.motion;
    else
      imposed_[support.freedom] = support.motion;
  }
  if (is_moved)
    imposed_ += VectorX(solve(spring_forces - stiffness * imposed_));
}

MatrixX HullSolver::solve(const MatrixX& forces) const
{
  MatrixX displacements = MatrixX::Zero(forces.rows(), forces.cols());
  if (!factor_)
    return displacements;
  const MatrixX solution = factor_->solve(forces(reduced_to_free_, Eigen::all));
  displacements(reduced_to_free_, Eigen::all) = solution;
  return displacements;
}

VectorX HullSolver::imposed_displacement() const { return imposed_; }

MatrixX HullSolver::reactions(const MatrixX& displacements, const MatrixX& forces) const
{
  return held_rows_ * displacements - MatrixX(forces(held_, Eigen::all));
}
} // namespace carlin
