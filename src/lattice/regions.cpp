#include "regions.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace carlin
{
namespace
{
constexpr std::array<const char*, 3> plane_words{"buttock", "height", "station"};

std::string known_names(const std::vector<GridPlane>& planes)
{
  std::string names;
  for (const GridPlane& plane : planes)
    names += (names.empty() ? "" : ", ") + plane.name;
  return names;
}

Index named_index(const Grid& grid, Direction direction, const std::string& name,
                  const std::string& who, const FileLocation& where)
{
  const std::vector<GridPlane>& planes = grid.planes[direction];
  const auto found = std::ranges::find(planes, name, &GridPlane::name);
  if (found == planes.end())
    throw ModelError(where, fmt::format("'{}': there is no {} '{}'; {}s are {}", who,
                                        plane_words[direction], name, plane_words[direction],
                                        known_names(planes)));
  return found->index;
}
} // namespace

Direction direction_of(Surface surface)
{
  switch (surface)
  {
  case Surface::bottom:
  case Surface::deck:
  case Surface::height:
    return up;
  case Surface::side:
  case Surface::buttock:
    return across;
  case Surface::station:
    break;
  }
  return along;
}

Index plane_index(const Grid& grid, Surface surface, const std::string& plane, const Named& who)
{
  const Direction direction = direction_of(surface);
  if (surface == Surface::bottom)
    return 0;
  if (surface == Surface::deck || surface == Surface::side)
    return grid.cells[direction];
  if (plane.empty())
    throw ModelError(who.where,
                     fmt::format("'{}': a {} must be named", who.name, plane_words[direction]));
  return named_index(grid, direction, plane, who.name, who.where);
}

Box make_box(const Grid& grid, const PlaneRange& stations, const PlaneRange& buttocks,
             const PlaneRange& heights, Sides sides, const std::string& who,
             const FileLocation& where)
{
  Box box;
  box.port = sides != Sides::starboard;
  box.starboard = sides != Sides::port;
  const std::array<const PlaneRange*, 3> ranges{&buttocks, &heights, &stations};
  for (const Direction direction : {across, up, along})
  {
    const PlaneRange& range = *ranges[direction];
    box.from[direction] =
        range.from.empty() ? 0 : named_index(grid, direction, range.from, who, where);
    box.to[direction] = range.to.empty() ? grid.cells[direction]
                                         : named_index(grid, direction, range.to, who, where);
    if (box.from[direction] > box.to[direction])
      throw ModelError(where,
                       fmt::format("'{}': {}s from '{}' to '{}' run the wrong way; write the aft, "
                                   "inner or lower one first",
                                   who, plane_words[direction], range.from, range.to));
  }
  return box;
}

void CutOuts::start(const Named& part, const std::vector<CutOut>& cut_outs)
{
  current_.clear();
  for (const CutOut& cut_out : cut_outs)
  {
    const FileLocation& where = cut_out.where.line > 0 ? cut_out.where : part.where;
    const bool placed = cut_out.where.line > 0;
    // Without a place in a file the part and the order tell cut-outs apart.
    Key key{where.file, where.line, where.column,
            placed ? std::string() : fmt::format("{} {}", part.name, current_.size())};
    current_.emplace_back(make_box(grid_, cut_out.stations, cut_out.buttocks, cut_out.heights,
                                   cut_out.sides, part.name, where),
                          key);
    uses_.try_emplace(std::move(key), Use{where, part.name, false});
  }
}

bool CutOuts::takes(const GridPlace& lowest, const std::array<bool, 3>& spread, bool starboard)
{
  bool taken = false;
  const bool on_centreline = lowest[across] == 0 && !spread[across];
  for (const auto& [box, key] : current_)
  {
    bool inside = on_centreline || (starboard ? box.starboard : box.port);
    for (const Direction direction : {across, up, along})
      inside = inside && lowest[direction] >= box.from[direction] &&
               lowest[direction] + (spread[direction] ? 1 : 0) <= box.to[direction];
    if (inside)
    {
      taken = true;
      uses_.at(key).hit = true;
    }
  }
  return taken;
}

std::vector<Problem> CutOuts::idle() const
{
  std::vector<Problem> problems;
  for (const auto& [key, use] : uses_)
    if (!use.hit)
      problems.push_back({use.where, fmt::format("'{}': the cut-out takes nothing away; its ranges "
                                                 "do not meet the part",
                                                 use.part)});
  return problems;
}
} // namespace carlin
