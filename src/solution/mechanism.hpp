#pragma once

#include "carlin/structure/structure.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// Message for a structure that can move without straining: finds the motion by inverse iteration
/// on the slightly stiffened matrix and names the part that moves most.
/// @param reduced Stiffness of the freedoms left free. @param freedom Freedom of each of its rows.
std::string describe_mechanism(const Structure& structure, const SparseMatrix& reduced,
                               const std::vector<Index>& freedom);
} // namespace carlin
