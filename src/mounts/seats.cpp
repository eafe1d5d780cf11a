#include "seats.hpp"

#include <cmath>

namespace carlin::mounts
{
namespace
{
/// A collar on several rigid feet shares its load as on equal feet of this compliance [m/N]; a
/// rigid bed would leave the share open. Its own effect on a force is 1e-17 of the system's
/// compliance, some 1e-9 or less.
constexpr double equal_share_compliance = 1e-17;

/// Unit of displacement against force, for conditioning only [m/N].
constexpr double compliance_scale = 1e-8;

struct SeatSystem
{
  MatrixX rotation;          ///< 6 feet x 6 feet: tank axes to global
  MatrixX arms;              ///< 6 feet x 6 collars
  std::vector<Index> active; ///< components that carry
  VectorX compliance;        ///< of all components
  std::vector<VectorX> idle;
};

Matrix6 arm_matrix(const Vector3& arm)
{
  Matrix6 result = Matrix6::Identity(); // shift at the foot = shift + rotation x arm
  result.topRightCorner<3, 3>() << 0.0, arm.z(), -arm.y(), -arm.z(), 0.0, arm.x(), arm.y(),
      -arm.x(), 0.0;
  return result;
}

void add_idle_motions(SeatSystem& system, Index collar, Index first_foot, Index foot_count)
{
  std::vector<Index> rows;
  for (const Index i : system.active)
    if (i >= 6 * first_foot && i < 6 * (first_foot + foot_count))
      rows.push_back(i);
  MatrixX held = MatrixX::Zero(std::max<Index>(6, static_cast<Index>(rows.size())), 6);
  for (std::size_t r = 0; r < rows.size(); ++r)
    held.row(static_cast<Index>(r)) = system.arms.block(rows[r], 6 * collar, 1, 6);
  const Eigen::JacobiSVD<MatrixX> svd(held, Eigen::ComputeFullV);
  for (Index k = 0; k < 6; ++k)
    if (svd.singularValues()(k) < 1e-9)
    {
      VectorX idle = VectorX::Zero(system.arms.cols());
      idle.segment<6>(6 * collar) = svd.matrixV().col(k);
      system.idle.push_back(idle);
    }
}

SeatSystem make_system(const std::vector<Tank>& tanks)
{
  const std::vector<FootRef> feet = feet_of(tanks);
  Index collar_count = 0;
  for (const Tank& tank : tanks)
    collar_count += static_cast<Index>(tank.collars.size());
  const Index n = 6 * static_cast<Index>(feet.size());

  SeatSystem system;
  system.rotation = MatrixX::Zero(n, n);
  system.arms = MatrixX::Zero(n, 6 * collar_count);
  system.compliance = VectorX::Zero(n);
  Index f = 0;
  Index c = 0;
  for (const Tank& tank : tanks)
  {
    const Matrix3 axes = tank_axes(tank);
    for (const Collar& collar : tank.collars)
    {
      const Index first = f;
      const Vector3 centre = tank.axis_from + collar.position * axes.col(0);
      const bool has_several = collar.feet.size() > 1;
      for (const Foot& foot : collar.feet)
      {
        system.rotation.block<3, 3>(6 * f, 6 * f) = axes;
        system.rotation.block<3, 3>(6 * f + 3, 6 * f + 3) = axes;
        system.arms.block<6, 6>(6 * f, 6 * c) =
            arm_matrix(axes.transpose() * (foot.footprint.centre - centre));
        for (Index i = 0; i < 6; ++i)
        {
          const double stiffness = foot.stiffness[static_cast<std::size_t>(i)];
          if (stiffness > 0.0)
            system.active.push_back(6 * f + i);
          system.compliance(6 * f + i) = (stiffness > 0.0 ? 1.0 / stiffness : 0.0) +
                                         (has_several ? equal_share_compliance : 0.0);
        }
        ++f;
      }
      add_idle_motions(system, c, first, f - first);
      ++c;
    }
  }
  return system;
}
} // namespace

Seats condense_seats(const std::vector<Tank>& tanks, const MatrixX& flexibility,
                     const std::vector<Index>& sliding_feet)
{
  const SeatSystem system = make_system(tanks);
  const Index nf = system.arms.rows();
  const Index nc = system.arms.cols();
  const Index np = static_cast<Index>(system.active.size());
  const Index ni = static_cast<Index>(system.idle.size());
  const Index nz = static_cast<Index>(sliding_feet.size());
  const MatrixX local_flexibility = system.rotation.transpose() * flexibility * system.rotation;

  // Unknowns: active foot forces, h / scale, reactions to idle motions (zero in the end).
  MatrixX matrix = MatrixX::Zero(np + nc + ni, np + nc + ni);
  MatrixX right = MatrixX::Zero(np + nc + ni, nc + nz + nf);
  for (Index i = 0; i < np; ++i)
  {
    const Index row = system.active[static_cast<std::size_t>(i)];
    for (Index j = 0; j < np; ++j)
      matrix(i, j) =
          local_flexibility(row, system.active[static_cast<std::size_t>(j)]) / compliance_scale;
    matrix(i, i) += system.compliance(row) / compliance_scale;
    matrix.block(i, np, 1, nc) = -system.arms.row(row);
    matrix.block(np, i, nc, 1) = system.arms.row(row).transpose();
    for (Index k = 0; k < nz; ++k)
      if (row == 6 * sliding_feet[static_cast<std::size_t>(k)])
        right(i, nc + k) = -1.0 / compliance_scale;
    right.block(i, nc + nz, 1, nf) = -system.rotation.col(row).transpose() / compliance_scale;
  }
  right.block(np, 0, nc, nc) = -MatrixX::Identity(nc, nc);
  Seats seats;
  seats.idle = MatrixX::Zero(nc, ni);
  for (Index k = 0; k < ni; ++k)
  {
    seats.idle.col(k) = system.idle[static_cast<std::size_t>(k)];
    matrix.block(np, np + nc + k, nc, 1) = seats.idle.col(k);
    matrix.block(np + nc + k, np, 1, nc) = seats.idle.col(k).transpose();
  }

  const MatrixX solution = matrix.fullPivLu().solve(right);
  MatrixX feet = MatrixX::Zero(nf, nc + nz + nf);
  for (Index i = 0; i < np; ++i)
    feet.row(system.active[static_cast<std::size_t>(i)]) = solution.row(i);
  const MatrixX rings = compliance_scale * solution.middleRows(np, nc);

  seats.collar_count = nc / 6;
  seats.foot_count = nf / 6;
  seats.ring_by_force = rings.leftCols(nc);
  seats.ring_by_slip = rings.middleCols(nc, nz);
  seats.ring_by_motion = rings.rightCols(nf);
  seats.foot_by_force = feet.leftCols(nc);
  seats.foot_by_slip = feet.middleCols(nc, nz);
  seats.foot_by_motion = feet.rightCols(nf);
  return seats;
}
} // namespace carlin::mounts
