#include "mapped_parts.hpp"

#include "carlin/core/error.hpp"

#include <fmt/format.h>
#include <set>

namespace carlin
{
namespace
{
/// Which part has which lattice face, by direction and lowest corner.
class FaceOwners
{
public:
  explicit FaceOwners(const Grid& grid) : grid_(grid)
  {
    for (std::vector<Index>& owners : owners_)
      owners.assign(grid.points.size(), -1);
  }

  /// Part that has the face already, or -1 and the face is taken.
  Index take(Direction direction, GridPlace lowest, bool starboard, Index part)
  {
    if (starboard) // the corner of lowest y on starboard is the outer one
      lowest[across] = -lowest[across] - (direction == across ? 0 : 1);
    Index& owner = owners_[direction][static_cast<std::size_t>(grid_.point(lowest))];
    if (owner >= 0)
      return owner;
    owner = part;
    return -1;
  }

private:
  const Grid& grid_;
  std::array<std::vector<Index>, 3> owners_;
};

bool is_outer_shell(const Grid& grid, Surface surface, Index plane)
{
  return surface == Surface::bottom || surface == Surface::side ||
         (surface == Surface::station && (plane == 0 || plane == grid.cells[along]));
}

MeshPart part_of(const PlatePart& plate)
{
  MeshPart part;
  part.name = plate.name;
  part.family = plate.family.empty() ? plate.name : plate.family;
  part.kind = MeshPart::Kind::plate;
  part.plate_kind = plate.kind;
  part.surface = plate.patch.surface;
  part.material_use = plate.schedule;
  part.where = plate.where;
  return part;
}

/// Adds one plate; the parts whose faces it would take again are put into `doubled`.
void add_plate(const Grid& grid, const PlatePart& plate, CutOuts& cut_outs, FaceOwners& owners,
               Mesh& mesh, std::set<Index>& doubled)
{
  const Patch& patch = plate.patch;
  const Direction direction = direction_of(patch.surface);
  Box box = make_box(grid, patch.stations, patch.buttocks, patch.heights, patch.sides, plate.name,
                     plate.where);
  const Index plane = plane_index(grid, patch.surface, patch.plane, plate);
  box.from[direction] = box.to[direction] = plane;
  std::array<bool, 3> spread{true, true, true};
  spread[direction] = false;
  for (const Direction other : {across, up, along})
    if (spread[other] && box.from[other] == box.to[other])
      throw ModelError(plate.where,
                       fmt::format("'{}': there is no face between {} and itself; name two "
                                   "different planes",
                                   plate.name, grid.plane_name(other, box.from[other])));
  cut_outs.start(plate, plate.cut_outs);
  const bool on_centreline = direction == across && plane == 0;
  const Index part = std::ssize(mesh.parts);
  const std::size_t cells_before = mesh.cells.size();
  for (const bool starboard : {false, true})
  {
    if (on_centreline ? starboard : !(starboard ? box.starboard : box.port))
      continue;
    // Faces start at every plane of the ranges but the last.
    const auto last = [&](Direction d) { return box.to[d] - (spread[d] ? 1 : 0); };
    for (Index k = box.from[along]; k <= last(along); ++k)
      for (Index i = box.from[across]; i <= last(across); ++i)
        for (Index j = box.from[up]; j <= last(up); ++j)
        {
          const GridPlace lowest{i, j, k};
          if (cut_outs.takes(lowest, spread, starboard))
            continue;
          const Index owner = owners.take(direction, lowest, starboard, part);
          if (owner >= 0)
            doubled.insert(owner);
          else
            mesh.cells.push_back({grid.face(direction, lowest, starboard), part});
        }
  }
  if (mesh.cells.size() == cells_before)
    return; // all of it cut away in this configuration (or doubled, which is reported)
  mesh.parts.push_back(part_of(plate));
  mesh.parts.back().is_outer_shell = is_outer_shell(grid, patch.surface, plane);
}
} // namespace

void add_plates(const Grid& grid, const std::vector<PlatePart>& plates, CutOuts& cut_outs,
                Mesh& mesh, std::vector<Problem>& problems)
{
  FaceOwners owners(grid);
  for (const PlatePart& plate : plates)
    try
    {
      std::set<Index> doubled;
      add_plate(grid, plate, cut_outs, owners, mesh, doubled);
      for (const Index other : doubled)
        problems.push_back(
            {plate.where,
             fmt::format("plates '{}' and '{}' lie on the same faces; end one where the other "
                         "begins, or cut one out",
                         mesh.parts[static_cast<std::size_t>(other)].name, plate.name)});
    }
    catch (const ModelError& error)
    {
      problems.insert(problems.end(), error.problems().begin(), error.problems().end());
    }
}
} // namespace carlin
