#pragma once

#include "edges.hpp"

#include "carlin/structure/structure.hpp"

#include <array>
#include <vector>

namespace carlin
{
/// Nodes of a structure: which node each corner of each cell and each point of each run uses, and
/// the springs between the copies of a point that a joint has split.
struct Numbering
{
  std::vector<Vector3> nodes;                   ///< [m]
  std::vector<Index> node_point;                ///< mesh point of each node
  std::vector<std::array<Index, 4>> cell_nodes; ///< of a triangle the last repeats the third
  std::vector<std::vector<Index>> run_nodes;    ///< one a point of the run
  std::vector<JointSpring> joints;
};

/// One node a point, but where a fastened part shares an edge with other parts each group of parts
/// has its own: the fastened part with the members that stand on it alone, and the rest. A point
/// that the part shares with others without sharing an edge (the head of a pillar) stays one node.
/// @throws ModelError for a joint whose part is not in this configuration or meets no other part.
Numbering number_nodes(const Mesh& mesh, const EdgeTable& edges);
} // namespace carlin
