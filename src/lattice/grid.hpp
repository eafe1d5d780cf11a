#pragma once

#include "hull_form.hpp"

#include "carlin/core/types.hpp"
#include "carlin/description/parts.hpp"

#include <array>
#include <string>
#include <vector>

namespace carlin
{
/// The three counts of the lattice: buttocks across, heights up, stations along.
enum Direction : std::size_t
{
  across = 0,
  up = 1,
  along = 2
};

/// Named plane of the lattice and the number of its plane among all of that direction.
struct GridPlane
{
  std::string name;
  Index index = 0;
};

/// Place in the lattice: (across, up, along); across is negative to starboard.
using GridPlace = std::array<Index, 3>;

/// Points of the mapped hull, both halves, and its named planes. Topology and geometry only.
struct Grid
{
  std::array<Index, 3> cells{};                 ///< of the port half: across, up, along
  std::array<std::vector<GridPlane>, 3> planes; ///< by direction, in order; built-in ones included
  std::vector<Section> sections;                ///< one a station plane, named or not
  std::vector<Vector3> points; ///< (2 cells[0] + 1) x (cells[1] + 1) x (cells[2] + 1)

  Index point(const GridPlace& place) const
  {
    return (place[along] * (2 * cells[across] + 1) + place[across] + cells[across]) *
               (cells[up] + 1) +
           place[up];
  }
  const Vector3& position(const GridPlace& place) const
  {
    return points[static_cast<std::size_t>(point(place))];
  }

  /// Face of constant `direction` whose lowest corner is `lowest` on the port half; right-hand
  /// normal inward: bottom up, every other height down; side and buttocks (the centreline too)
  /// towards starboard; stations forward, but the foremost aft.
  std::array<Index, 4> face(Direction direction, const GridPlace& lowest, bool starboard) const;

  /// Name of the plane `index` of a direction, or "between 'a' and 'b'".
  std::string plane_name(Direction direction, Index index) const;
  /// The same for the interval from `index` to the next plane.
  std::string interval_name(Direction direction, Index index) const;
};

/// Number of the mirrored place on the other half.
inline GridPlace mirrored(const GridPlace& place)
{
  return {-place[across], place[up], place[along]};
}

/// Divides the intervals between named planes and places all points.
/// @throws ModelError with all problems found: planes too near, outside the hull or out of order,
///   folded cells.
Grid make_grid(const Hull& hull, double mesh_size);
} // namespace carlin
