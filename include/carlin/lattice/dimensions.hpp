#pragma once

#include "carlin/description/hull.hpp"

namespace carlin
{
/// Offsets of a hard-chine hull from a few dimensions, for a first look; points keel, chine and
/// deck-edge. The section is constant over `parallel_body` of the length from the upright transom;
/// forward of it the plan narrows, keel and chine rise and the deadrise grows up to a narrow face
/// on the raked stem, whose top is at x = length. With parallel_body 1 the hull is a prism (a box
/// when deadrise is 0 and chine_beam equals beam), its forward end on the plane of the stem's rake.
/// The shape forward is our own choice, no standard; deck edge level at `depth`.
/// @return Sections from aft; those forward fan from upright to the rake of the stem.
/// @throws ModelError naming the dimension for one that is out of range.
HullOffsets offsets_from_dimensions(const HullDimensions& dimensions);
} // namespace carlin
