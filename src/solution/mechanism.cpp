#include "mechanism.hpp"

#include "connectivity.hpp"

#include "carlin/solution/hull_solver.hpp"

#include <array>
#include <cmath>
#include <fmt/format.h>
#include <fmt/ranges.h>

namespace carlin
{
namespace
{
constexpr std::array<const char*, 6> motion_names = {"moves along x",
                                                     "moves along y",
                                                     "moves along z",
                                                     "turns about an axis along x",
                                                     "turns about an axis along y",
                                                     "turns about an axis along z"};

/// Motion that costs least against the stiffness of its own freedoms (generalised inverse iteration
/// with the diagonal as the measure).
VectorX softest_motion(const SparseMatrix& reduced)
{
  constexpr double stiffening = 1e-8;
  const VectorX diagonal = reduced.diagonal();
  const double floor = 1e-12 * diagonal.maxCoeff(); // a freedom with no stiffness at all
  SparseMatrix stiffened = reduced;
  for (Index i = 0; i < diagonal.size(); ++i)
    stiffened.coeffRef(i, i) += stiffening * std::max(diagonal[i], floor);
  const SparseFactor factor(stiffened);
  VectorX motion(diagonal.size());
  for (Index i = 0; i < motion.size(); ++i)
    motion[i] = 1.0 + 0.5 * std::sin(12.9898 * static_cast<double>(i + 1)); // no symmetry
  for (int iteration = 0; iteration < 4; ++iteration)
  {
    const VectorX load = diagonal.cwiseMax(floor).cwiseProduct(motion);
    motion = factor.solve(load);
    motion /= motion.cwiseAbs().maxCoeff();
  }
  return motion;
}
} // namespace

std::string describe_mechanism(const Structure& structure, const SparseMatrix& reduced,
                               const std::vector<Index>& freedom)
{
  const VectorX motion = softest_motion(reduced);
  // Turns count by the travel they give at the arm of one metre, as translations do.
  Index row = 0;
  motion.cwiseAbs().maxCoeff(&row);
  const Index largest = freedom[static_cast<std::size_t>(row)];
  std::vector<bool> is_chosen(structure.nodes.size(), false);
  is_chosen[static_cast<std::size_t>(largest / freedoms_per_node)] = true;
  const std::vector<std::string> parts = parts_at(structure, is_chosen);
  return fmt::format(
      "{} can move without resistance: it {} at {}; hold it by a support, or join it in every "
      "direction to what carries it",
      fmt::join(parts, " and "), motion_names[static_cast<std::size_t>(largest % 6)],
      structure.mesh->place(
          structure.nodes[static_cast<std::size_t>(largest / freedoms_per_node)]));
}
} // namespace carlin
