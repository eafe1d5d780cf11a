#pragma once

#include "assembly.hpp"
#include "edges.hpp"
#include "nodes.hpp"

#include "carlin/structure/structure.hpp"

#include <span>
#include <vector>

namespace carlin
{
/// Steps of build_structure, each adding to a structure that has what the steps before made.

/// Shells and members with their sections, plating offsets and the offsets of members that stand on
/// plating. @throws ModelError for a member with no plating to stand on where it should.
void add_elements(Structure& structure, const Model& model, const EdgeTable& edges,
                  const Numbering& numbering);

/// Share of each node in the area of the outer shell and deck (of all shells without a hull) [m^2].
VectorX hull_node_areas(const Structure& structure);

/// Sparsity of stiffness and mass: nodes that share an element or a joint spring.
BlockPattern element_pattern(const Structure& structure);

void assemble_stiffness(Structure& structure);

/// Mass of shells and members with weld allowance, equipment and point masses: matrix and account.
/// @throws SolveError for equipment with no structure under it.
void assemble_mass(Structure& structure, const Model& model, const ConfiguredCraft& craft);

void add_outfit(Structure& structure, const Outfit& outfit);

/// Mass properties read from the matrix itself, so that inertia forces balance to round-off.
MassProperties properties_of_mass(const Structure& structure);

/// Supports of the frame as single freedoms. @throws ModelError for a support that holds nothing.
std::vector<SupportedFreedom> supported_freedoms(const Structure& structure, const Model& model);

/// Footprint over several rectangles, as one.
Footprint footprint_over(const Structure& structure, std::span<const FootprintArea> areas,
                         const Vector3& point, const std::string& what);
} // namespace carlin
