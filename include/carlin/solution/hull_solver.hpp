#pragma once

#include "carlin/structure/structure.hpp"

#include <memory>
#include <vector>

namespace carlin
{
/// Sparse Cholesky factor of a symmetric positive definite matrix.
class SparseFactor
{
public:
  /// @param matrix Full symmetric matrix; only its lower triangle is read.
  /// @throws SolveError if it is not positive definite. Use HullSolver for named messages.
  explicit SparseFactor(const SparseMatrix& matrix);
  ~SparseFactor();
  SparseFactor(SparseFactor&&) noexcept;
  SparseFactor& operator=(SparseFactor&&) noexcept;
  /// Many right-hand sides in one block: (n) x (columns).
  MatrixX solve(const MatrixX& right_hand_sides) const;
  /// Squared diagonal of the factor, in the order of the matrix's rows: what elimination has left
  /// of each diagonal entry. A pivot that is nothing but round-off betrays a mechanism.
  VectorX pivots() const;

private:
  struct Impl; // CHOLMOD (AMD ordering) or Eigen's LDLT, chosen when built
  std::unique_ptr<Impl> impl_;
};

/// One factor per configuration. A floating hull is held by six statically determinate pins, whose
/// reactions are an audit figure; a supported structure by its supports.
class HullSolver
{
public:
  /// @throws SolveError naming a loose part or mechanism: "bulkhead-2 is not joined to anything".
  explicit HullSolver(const Structure& structure);

  /// Displacements (6 n) x (columns) under nodal forces, imposed motions of supports excluded.
  MatrixX solve(const MatrixX& forces) const;
  /// Displacement under the imposed motions of supports alone (6 n).
  VectorX imposed_displacement() const;
  /// Reactions at pins or supports for displacements u under forces f: K u - f at held freedoms.
  /// Rows as held_freedoms().
  MatrixX reactions(const MatrixX& displacements, const MatrixX& forces) const;
  const std::vector<Index>& held_freedoms() const { return held_; }
  bool is_floating() const { return is_floating_; }

private:
  void factor(const SparseMatrix& reduced);
  void find_imposed_displacement(const SparseMatrix& stiffness);

  const Structure* structure_;
  std::vector<Index> held_;
  std::vector<Index> free_to_reduced_; ///< row of the reduced matrix of each freedom, -1: held
  std::vector<Index> reduced_to_free_;
  VectorX imposed_;
  bool is_floating_ = true;
  std::unique_ptr<SparseFactor> factor_; ///< absent when nothing is free to move
  SparseMatrix held_rows_;               ///< of the stiffness: (held) x (6 n)
};

/// Rigid-body acceleration of a mass under a resultant: a(x) = linear + angular x (x - centre).
struct RigidAcceleration
{
  Vector3 centre = Vector3::Zero();  ///< [m]
  Vector3 linear = Vector3::Zero();  ///< of the centre [m/s^2]
  Vector3 angular = Vector3::Zero(); ///< [rad/s^2]
  Vector3 at(const Vector3& position) const { return linear + angular.cross(position - centre); }
};
/// From resultant force and moment about `centre` of `body`; full inertia tensor.
RigidAcceleration rigid_acceleration(const MassProperties& body, const Vector3& force,
                                     const Vector3& moment_about_centre);

/// Sum of mass properties (of hull and of tanks taken as given bodies).
MassProperties combined(const std::vector<MassProperties>& bodies);

/// Nodal inertia forces -M a of the structure under a rigid acceleration (6 n).
VectorX inertia_forces(const Structure& structure, const RigidAcceleration& acceleration);

/// Resultant of nodal forces: force, and moment about `point` (6).
Vector6 resultant(const Structure& structure, const Eigen::Ref<const VectorX>& forces,
                  const Vector3& point);
} // namespace carlin
