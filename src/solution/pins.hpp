#pragma once

#include "connectivity.hpp"

#include <vector>

namespace carlin
{
/// Six freedoms that hold the largest body of a floating structure statically determinately: three
/// at one node, two at a second far from it, one at a third far from their line. On a straight
/// structure the sixth is the rotation about the line.
/// @throws SolveError for a structure of a single node.
std::vector<Index> determinate_pins(const Structure& structure, const Bodies& bodies);
} // namespace carlin
