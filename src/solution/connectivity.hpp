#pragma once

#include "carlin/structure/structure.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// Bodies of a structure: sets of nodes joined by elements or by joint springs with any stiffness.
struct Bodies
{
  std::vector<Index> of_node; ///< body of each node
  Index count = 0;
  Index largest = -1; ///< with the most nodes
};
Bodies connected_bodies(const Structure& structure);

/// Parts that have elements at the nodes for which `is_chosen`, by name, each once.
std::vector<std::string> parts_at(const Structure& structure, const std::vector<bool>& is_chosen);

/// @throws SolveError naming the parts of a body that nothing holds: of a floating structure all
/// but the largest, of a supported one all without a support.
void require_joined(const Structure& structure, const Bodies& bodies);
} // namespace carlin
