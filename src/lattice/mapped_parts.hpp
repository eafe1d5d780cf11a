#pragma once

#include "grid.hpp"
#include "regions.hpp"

#include "carlin/lattice/mesh.hpp"

#include <vector>

namespace carlin
{
/// Adds the cells of plate parts to the mesh; problems are collected.
void add_plates(const Grid& grid, const std::vector<PlatePart>& plates, CutOuts& cut_outs,
                Mesh& mesh, std::vector<Problem>& problems);

/// Adds the runs of member parts to the mesh; problems are collected.
void add_members(const Grid& grid, const std::vector<MemberPart>& members, CutOuts& cut_outs,
                 Mesh& mesh, std::vector<Problem>& problems);

/// Adds points, members and plates of a frame to the mesh; problems are collected. Points that
/// coincide within 1e-9 of the structure's size, with each other or with the lattice, are one.
void add_frame(const Frame& frame, Mesh& mesh, std::vector<Problem>& problems);

/// Local y of a profile: square to the line and to its upright, right-handed on the port side and
/// on the centreline, mirrored on starboard.
Vector3 toe_direction(const Vector3& upright, const Vector3& tangent);
} // namespace carlin
