#pragma once

#include "carlin/recovery/panels.hpp"
#include "carlin/structure/structure.hpp"

#include <vector>

namespace carlin
{
/// Shape shown: mean rigid motion removed, weighted by the structure's node areas (base hull; where
/// there are no shells every node counts alike). A supported structure is shown as it is.
VectorX shape_shown(const Structure& structure, const VectorX& displacement);

/// Deflection of the girder between two stations from their chord, at keel nodes (bottom plating,
/// nearest the centreline): largest by magnitude, signed, down -.
struct GirderDeflection
{
  double deflection = 0.0; ///< [m]
  double chord = 0.0;      ///< [m]
  double x = 0.0;          ///< [m]
};
/// @throws SolveError if no bottom plating reaches between the two stations.
GirderDeflection girder_deflection(const Structure& structure, const VectorX& displacement,
                                   double x_from, double x_to);

/// Deflection of a panel [m]: its middle (inner node nearest the centre) from the mean plane of its
/// boundary's displacement, along its inward normal. 0 for a panel without inner nodes: nothing can
/// be read there, cells_across says so.
double panel_deflection(const Structure& structure, const Panel& panel,
                        const VectorX& displacement);

/// Part of a run between two supports, with a node inside. Supports: ends of the run; plates that
/// cross it (other parts than the plating it runs on, upright to it); for members that are not
/// primary, primary members that cross it. Spans of primary members therefore reach from plate to
/// plate.
struct MemberSpan
{
  Index run = -1, part = -1;
  std::vector<Index> nodes;           ///< from support to support
  Vector3 upright = Vector3::UnitZ(); ///< mean of the profile's, not yet square to the chord
};
std::vector<MemberSpan> member_spans(const Structure& structure);

/// Deflection of a member from the chord of its supports. The mean turn of the ends about the chord
/// is taken off too, so that a rigid motion of a curved member is no deflection.
struct MemberDeflection
{
  Index run = -1, part = -1;
  double deflection = 0.0; ///< largest by magnitude, along the profile's upright [m]
  double span = 0.0;       ///< straight between supports [m]
  Vector3 place = Vector3::Zero();
};
std::vector<MemberDeflection> member_deflections(const Structure& structure,
                                                 const std::vector<MemberSpan>& spans,
                                                 const VectorX& displacement);
} // namespace carlin
