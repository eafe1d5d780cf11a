#include "factor.hpp"

#include "carlin/core/error.hpp"

#include <fmt/format.h>
#include <utility>

#ifdef CARLIN_WITH_CHOLMOD
#include <cholmod.h>
#else
#include <Eigen/SparseCholesky>
#endif

namespace carlin
{
#ifdef CARLIN_WITH_CHOLMOD
namespace
{
/// The cholmod workspace; must outlive the factor.
class Workspace
{
public:
  Workspace()
  {
    cholmod_start(&common_);
    common_.print = 0;
    common_.error_handler = nullptr;
    common_.supernodal = CHOLMOD_SUPERNODAL;
    common_.nmethods = 1; // nested dissection loses to minimum degree on hull-shaped graphs
    common_.method[0].ordering = CHOLMOD_AMD;
    common_.postorder = 1;
    common_.quick_return_if_not_posdef = 1;
  }
  ~Workspace() { cholmod_finish(&common_); }
  Workspace(const Workspace&) = delete;
  Workspace& operator=(const Workspace&) = delete;
  cholmod_common* get() { return &common_; }

private:
  cholmod_common common_{};
};

/// View of an Eigen matrix, of which cholmod reads the lower triangle. Copies nothing.
cholmod_sparse view_of(const SparseMatrix& matrix)
{
  cholmod_sparse view{};
  view.nrow = static_cast<std::size_t>(matrix.rows());
  view.ncol = static_cast<std::size_t>(matrix.cols());
  view.nzmax = static_cast<std::size_t>(matrix.nonZeros());
  view.p = const_cast<int*>(matrix.outerIndexPtr());
  view.i = const_cast<int*>(matrix.innerIndexPtr());
  view.x = const_cast<double*>(matrix.valuePtr());
  view.stype = -1;
  view.itype = CHOLMOD_INT;
  view.xtype = CHOLMOD_REAL;
  view.dtype = CHOLMOD_DOUBLE;
  view.sorted = 1;
  view.packed = 1;
  return view;
}
} // namespace

struct SparseFactor::Impl
{
  Workspace workspace;
  cholmod_factor* factor = nullptr;
  Index size = 0;

  Impl() = default;
  Impl(const Impl&) = delete;
  Impl& operator=(const Impl&) = delete;
  ~Impl() { cholmod_free_factor(&factor, workspace.get()); }
};

SparseFactor::SparseFactor(const SparseMatrix& matrix) : impl_(std::make_unique<Impl>())
{
  impl_->size = matrix.rows();
  SparseMatrix compressed; // empty unless needed
  if (!matrix.isCompressed())
  {
    compressed = matrix;
    compressed.makeCompressed();
  }
  cholmod_sparse view = view_of(matrix.isCompressed() ? matrix : compressed);
  cholmod_common* common = impl_->workspace.get();
  impl_->factor = cholmod_analyze(&view, common);
  if (impl_->factor == nullptr)
    throw SolveError("not enough memory to order the equations; ask for a larger mesh size");
  cholmod_factorize(&view, impl_->factor, common);
  if (common->status == CHOLMOD_OUT_OF_MEMORY || common->status == CHOLMOD_TOO_LARGE)
    throw SolveError("not enough memory to factor the equations; ask for a larger mesh size");
  if (impl_->factor->minor < impl_->factor->n)
    throw NotPositiveDefinite(static_cast<const int*>(impl_->factor->Perm)[impl_->factor->minor]);
}

VectorX SparseFactor::pivots() const
{
  VectorX pivots(impl_->size);
  const cholmod_factor& factor = *impl_->factor;
  const auto* order = static_cast<const int*>(factor.Perm);
  const auto* super = static_cast<const int*>(factor.super);
  const auto* row_start = static_cast<const int*>(factor.pi);
  const auto* value_start = static_cast<const int*>(factor.px);
  const auto* values = static_cast<const double*>(factor.x);
  for (std::size_t s = 0; s < factor.nsuper; ++s)
  {
    const int rows = row_start[s + 1] - row_start[s];
    for (int column = super[s]; column < super[s + 1]; ++column)
    {
      const int local = column - super[s];
      const double diagonal = values[value_start[s] + local * (rows + 1)];
      pivots[order[column]] = diagonal * diagonal;
    }
  }
  return pivots;
}

MatrixX SparseFactor::solve(const MatrixX& right_hand_sides) const
{
  cholmod_dense b{};
  b.nrow = static_cast<std::size_t>(right_hand_sides.rows());
  b.ncol = static_cast<std::size_t>(right_hand_sides.cols());
  b.nzmax = b.nrow * b.ncol;
  b.d = b.nrow;
  b.x = const_cast<double*>(right_hand_sides.data());
  b.xtype = CHOLMOD_REAL;
  b.dtype = CHOLMOD_DOUBLE;
  cholmod_common* common = impl_->workspace.get();
  cholmod_dense* x = cholmod_solve(CHOLMOD_A, impl_->factor, &b, common);
  if (x == nullptr)
    throw SolveError("not enough memory to solve the equations; ask for a larger mesh size");
  const MatrixX solution = Eigen::Map<const MatrixX>(
      static_cast<const double*>(x->x), right_hand_sides.rows(), right_hand_sides.cols());
  cholmod_free_dense(&x, common);
  return solution;
}
#else
struct SparseFactor::Impl
{
  Eigen::SimplicialLDLT<SparseMatrix, Eigen::Lower> factor;
};

SparseFactor::SparseFactor(const SparseMatrix& matrix) : impl_(std::make_unique<Impl>())
{
  impl_->factor.compute(matrix);
  const VectorX diagonal = impl_->factor.vectorD();
  for (Index i = 0; i < diagonal.size(); ++i)
    if (!(diagonal[i] > 0.0))
      throw NotPositiveDefinite(impl_->factor.permutationPinv().indices()[i]);
  if (impl_->factor.info() != Eigen::Success)
    throw SolveError("the equations cannot be factored");
}

VectorX SparseFactor::pivots() const
{
  return impl_->factor.permutationPinv() * VectorX(impl_->factor.vectorD());
}

MatrixX SparseFactor::solve(const MatrixX& right_hand_sides) const
{
  return impl_->factor.solve(right_hand_sides);
}
#endif

NotPositiveDefinite::NotPositiveDefinite(Index row_of_matrix)
    : SolveError(fmt::format("the stiffness is not positive definite at row {}: something is free "
                             "to move",
                             row_of_matrix)),
      row(row_of_matrix)
{
}

SparseFactor::~SparseFactor() = default;
SparseFactor::SparseFactor(SparseFactor&&) noexcept = default;
SparseFactor& SparseFactor::operator=(SparseFactor&&) noexcept = default;
} // namespace carlin
