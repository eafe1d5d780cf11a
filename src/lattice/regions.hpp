#pragma once

#include "grid.hpp"

#include "carlin/core/error.hpp"
#include "carlin/description/parts.hpp"

#include <map>
#include <optional>
#include <string>
#include <tuple>
#include <vector>

namespace carlin
{
/// Direction of the planes of a surface: station planes lie along the boat, and so on.
Direction direction_of(Surface surface);

/// Number of the plane a surface lies on: bottom 0, deck and side the last, else by name.
/// @throws ModelError naming `who` if there is no such plane.
Index plane_index(const Grid& grid, Surface surface, const std::string& plane, const Named& who);

/// Box of the lattice between named planes, ends included.
struct Box
{
  std::array<Index, 3> from{}, to{};
  bool port = true, starboard = true;
};
/// Empty names are the ends there are.
/// @throws ModelError for a name that does not exist or a range written from outside in.
Box make_box(const Grid& grid, const PlaneRange& stations, const PlaneRange& buttocks,
             const PlaneRange& heights, Sides sides, const std::string& who,
             const FileLocation& where);

/// What cut-outs take away, and whether each took anything at all: one cut-out of the file may
/// stand in several parts (a family) of which it need not touch all.
class CutOuts
{
public:
  explicit CutOuts(const Grid& grid) : grid_(grid) {}

  /// Makes the cut-outs of a part ready. @throws ModelError
  void start(const Named& part, const std::vector<CutOut>& cut_outs);

  /// Whether a face or edge of the current part is taken away: that from `lowest` (port numbers)
  /// spreading one interval in each of `spread`. On the centreline plane both sides are one.
  bool takes(const GridPlace& lowest, const std::array<bool, 3>& spread, bool starboard);

  /// Cut-outs that took nothing anywhere.
  std::vector<Problem> idle() const;

private:
  using Key = std::tuple<std::string, int, int, std::string>;
  struct Use
  {
    FileLocation where;
    std::string part;
    bool hit = false;
  };
  const Grid& grid_;
  std::vector<std::pair<Box, Key>> current_;
  std::map<Key, Use> uses_;
};
} // namespace carlin
