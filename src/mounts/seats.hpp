#pragma once

#include "carlin/mounts/mounts.hpp"

namespace carlin::mounts
{
/// All seats of all tanks on the hull, condensed to the rings. Tank axes throughout.
///
/// A foot's spring stands at the foot's point; a rigid arm leads from it to the ring's centre. With
/// f the forces on the hull, v = v0 + Phi f the hull's motion at the feet, h the rings' motion, z
/// the slips of sliding feet: A h - v - z = C f and A^T f = -lambda. Solved once:
///   h = ring_by_force lambda + ring_by_slip z + idle eta + (part of v0), likewise f.
/// `idle` holds the ring motions that no foot resists; lambda must do no work on them.
struct Seats
{
  Index collar_count = 0, foot_count = 0;
  MatrixX ring_by_force, ring_by_slip; ///< 6 collars x (6 collars | slides)
  MatrixX foot_by_force, foot_by_slip; ///< 6 feet x (6 collars | slides); on the hull
  MatrixX idle;                        ///< 6 collars x idle motions, orthonormal
  MatrixX ring_by_motion;              ///< 6 collars x 6 feet: of v0
  MatrixX foot_by_motion;              ///< 6 feet x 6 feet: of v0
};

/// @param flexibility 6 nf x 6 nf, global axes. @param sliding_feet Indices of feet free along the
/// tank; each takes one column of the `_by_slip` blocks.
Seats condense_seats(const std::vector<Tank>& tanks, const MatrixX& flexibility,
                     const std::vector<Index>& sliding_feet);
} // namespace carlin::mounts
