#pragma once

#include "carlin/structure/structure.hpp"

#include <utility>
#include <vector>

namespace carlin
{
/// One edge of a shell on the boundary of its panel, and how bending is read there: the sum of
/// weight times the value at the centre of a shell, over shells in line inward from the edge.
struct PanelEdge
{
  Vector3 middle = Vector3::Zero();
  Vector3 direction = Vector3::UnitX();          ///< unit, along the edge
  std::vector<std::pair<Index, double>> reading; ///< position in Panel::shells, weight
};

/// A panel: shells of one plate part bounded by members, other plates, free edges or a fold.
struct Panel
{
  Index part = -1;
  std::vector<Index> shells;
  Vector3 centre = Vector3::Zero();
  Matrix3 axes = Matrix3::Identity(); ///< columns: along the long side, the short side, normal
                                      ///< (inward)
  double area = 0.0;                  ///< [m^2]
  double short_side = 0.0, long_side = 0.0;       ///< of the panel's mean rectangle [m]
  int cells_across = 0;                           ///< over the short side
  std::vector<Index> boundary_nodes, inner_nodes; ///< of the structure
  std::vector<PanelEdge> edges;
};

/// Cells across the short side from which plate bending is trusted as found; below, it is coarse.
inline constexpr int fine_cells_across = 8;
/// Plating that turns by more than this along an edge is supported by its own fold [rad]: 20 deg,
/// common practice, no source. (Deadrise of a planing boat folds the bottom by 30 to 40 deg.)
inline constexpr double fold_angle = 0.3490658503988659;

/// Panels of a structure: connected shells of one part, not crossing an edge that carries a member
/// element, a shell of another part or a fold sharper than fold_angle. A member that ends inside a
/// panel does not divide it.
///
/// The mean rectangle has the panel's area and its ratio of radii of gyration. Bending at an edge
/// is found from shell centres in line, whose values are cell means: with at least 8 cells across
/// by a parabola through three means, below that by a straight line through two, because three
/// cells then reach past the point of contraflexure and the panel is called coarse anyway.
/// @note O(n log n) in shells. In order of the panels' first shells.
std::vector<Panel> find_panels(const Structure& structure);
} // namespace carlin
