#pragma once

#include "carlin/core/types.hpp"

namespace carlin
{
/// Reaction of a lined ring on a Winkler bed, per r w k = 1: contact pressure
/// p = max(0, e + d cos(theta)). Closed form with full contact, partial separation and gap.
/// Source: derived for this project (verification book, G1), checked by quadrature.
struct RingResponse
{
  double reaction = 0.0;                 ///< R: transverse, against the offset
  double clamping = 0.0;                 ///< N: total pressing of ring on tank
  double reaction_by_offset = 0.0;       ///< dR/dd
  double reaction_by_interference = 0.0; ///< dR/de = dN/dd
  double clamping_by_interference = 0.0; ///< dN/de
  double half_contact = 0.0;             ///< angle t of contact either side of the offset [rad]
  double reaction_over_offset = 0.0;     ///< R/d, finite at d = 0
  double peak = 0.0;                     ///< e + d, or 0 in a gap
  double potential = 0.0;                ///< (d R + e N)/2
};
/// @param interference e [m], negative: clearance. @param offset d [m], >= 0.
RingResponse ring_response(double interference, double offset);
} // namespace carlin
