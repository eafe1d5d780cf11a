#include "mapped_parts.hpp"

#include "carlin/core/error.hpp"

#include <cassert>
#include <cmath>
#include <fmt/format.h>
#include <map>
#include <set>

namespace carlin
{
namespace
{
/// A member in lattice numbers.
struct Line
{
  const MemberPart* member = nullptr;
  Direction surface = up; ///< direction of the planes of its surface
  Direction free = along; ///< direction in which it runs
  GridPlace start{};      ///< its place at number `from` of `free`
  Index from = 0, to = 0;
  bool port = true, starboard = true;
};

/// Point of the line at a number of its free direction; port numbers.
GridPlace place_at(const Line& line, Index number)
{
  GridPlace place = line.start;
  place[line.free] = number;
  return place;
}

Line line_of(const Grid& grid, const MemberPart& member)
{
  Line line;
  line.member = &member;
  line.surface = direction_of(member.surface);
  const Direction second = direction_of(member.plane_kind);
  if (second == line.surface)
    throw ModelError(member.where,
                     fmt::format("'{}': its surface and its plane are of the same kind; a member "
                                 "lies where two different planes cross",
                                 member.name));
  line.free = static_cast<Direction>(3 - line.surface - second);
  line.start[line.surface] = plane_index(grid, member.surface, member.surface_plane, member);
  line.start[second] = plane_index(grid, member.plane_kind, member.plane, member);
  std::array<PlaneRange, 3> ranges;
  ranges[line.free] = member.along;
  const Box box = make_box(grid, ranges[along], ranges[across], ranges[up], member.sides,
                           member.name, member.where);
  line.from = box.from[line.free];
  line.to = box.to[line.free];
  line.port = box.port;
  line.starboard = box.starboard;
  if (line.from == line.to)
    throw ModelError(member.where,
                     fmt::format("'{}': there is no edge between {} and itself; name two different "
                                 "planes",
                                 member.name, grid.plane_name(line.free, line.from)));
  return line;
}

/// Inward normal of the surface at the edge from `lowest`: mean of the faces beside it, port side.
Vector3 surface_normal(const Grid& grid, const Line& line, const GridPlace& lowest)
{
  const auto beside = static_cast<std::size_t>(3 - line.surface - line.free);
  Vector3 sum = Vector3::Zero();
  const auto add = [&](const GridPlace& face, bool starboard)
  {
    const std::array<Index, 4> corners = grid.face(line.surface, face, starboard);
    const auto at = [&](std::size_t i) -> const Vector3&
    { return grid.points[static_cast<std::size_t>(corners[i])]; };
    sum += (at(2) - at(0)).cross(at(3) - at(1)).normalized();
  };
  GridPlace face = lowest;
  if (lowest[beside] < grid.cells[beside])
    add(face, false);
  if (beside == across && lowest[across] == 0)
    add(face, true);
  else if (lowest[beside] > 0)
  {
    --face[beside];
    add(face, false);
  }
  return sum.normalized();
}

/// Unit vector of a direction in words, on the port side.
Vector3 named_direction(Stands stands)
{
  switch (stands)
  {
  case Stands::up:
    return Vector3::UnitZ();
  case Stands::down:
    return -Vector3::UnitZ();
  case Stands::forward:
    return Vector3::UnitX();
  case Stands::aft:
    return -Vector3::UnitX();
  case Stands::inboard:
    return -Vector3::UnitY();
  case Stands::outboard:
    return Vector3::UnitY();
  case Stands::inside:
  case Stands::outside:
    break;
  }
  assert(false);
  return Vector3::Zero();
}

bool is_hull_face(const Grid& grid, const Line& line)
{
  const Index plane = line.start[line.surface];
  return plane == grid.cells[line.surface] || (plane == 0 && line.surface != across);
}

/// Direction in which the profile stands off one edge, port side; square to the edge.
Vector3 upright_at(const Grid& grid, const Line& line, const GridPlace& lowest,
                   const Vector3& tangent)
{
  const MemberPart& member = *line.member;
  const bool by_surface = member.stands == Stands::inside || member.stands == Stands::outside;
  if (by_surface && !is_hull_face(grid, line))
    throw ModelError(member.where,
                     fmt::format("'{}': on an internal surface there is no inside; say which way "
                                 "the member stands: up, down, forward, aft, inboard or outboard",
                                 member.name));
  const bool sideways = member.stands == Stands::inboard || member.stands == Stands::outboard;
  if (sideways && line.free != across && line.start[across] == 0)
    throw ModelError(member.where, fmt::format("'{}': on the centreline there is no inboard or "
                                               "outboard; say up, down, forward or aft",
                                               member.name));
  const Vector3 wanted = by_surface ? Vector3((member.stands == Stands::inside ? 1.0 : -1.0) *
                                              surface_normal(grid, line, lowest))
                                    : named_direction(member.stands);
  const Vector3 square = wanted - wanted.dot(tangent) * tangent;
  if (square.norm() < 0.1) // within 6 degrees of the line itself
    throw ModelError(member.where, fmt::format("'{}': it runs in the very direction in which it is "
                                               "to stand off; choose another",
                                               member.name));
  return square.normalized();
}

Vector3 mirrored_vector(const Vector3& vector) { return {vector.x(), -vector.y(), vector.z()}; }

/// Makes the runs of one line: edges in order, a new run after each gap.
class RunMaker
{
public:
  RunMaker(const Grid& grid, const Line& line, CutOuts& cut_outs, Mesh& mesh)
      : grid_(grid), line_(line), cut_outs_(cut_outs), mesh_(mesh), part_(std::ssize(mesh.parts))
  {
    spread_[line.free] = true;
  }

  /// Edge from `number` to the next one on one side; `inward`: traversed towards lower numbers.
  void add_edge(Index number, bool starboard, bool inward)
  {
    const GridPlace lowest = place_at(line_, number);
    if (cut_outs_.takes(lowest, spread_, starboard))
    {
      is_open_ = false;
      return;
    }
    GridPlace from = lowest, to = place_at(line_, number + 1);
    const Vector3 tangent = (grid_.position(to) - grid_.position(from)).normalized();
    Vector3 upright = upright_at(grid_, line_, lowest, tangent);
    // Across the boat the toe is turned as the run goes: all one way, on both sides.
    Vector3 toe = toe_direction(upright, tangent);
    if (starboard)
    {
      upright = mirrored_vector(upright);
      toe = mirrored_vector(toe);
      from = mirrored(from);
      to = mirrored(to);
    }
    if (inward)
      std::swap(from, to);
    if (!is_open_)
      mesh_.runs.push_back({part_, {grid_.point(from)}, {}, {}});
    is_open_ = true;
    mesh_.runs.back().points.push_back(grid_.point(to));
    mesh_.runs.back().upright.push_back(upright);
    mesh_.runs.back().toe.push_back(toe);
  }

  void close() { is_open_ = false; }

private:
  const Grid& grid_;
  const Line& line_;
  CutOuts& cut_outs_;
  Mesh& mesh_;
  Index part_;
  std::array<bool, 3> spread_{};
  bool is_open_ = false;
};

void add_runs(const Grid& grid, const Line& line, CutOuts& cut_outs, Mesh& mesh)
{
  RunMaker maker(grid, line, cut_outs, mesh);
  if (line.free == across)
  {
    // From starboard to port; one run over the centreline if it reaches it.
    if (line.starboard)
      for (Index number = line.to - 1; number >= line.from; --number)
        maker.add_edge(number, true, true);
    if (line.from > 0)
      maker.close();
    if (line.port)
      for (Index number = line.from; number < line.to; ++number)
        maker.add_edge(number, false, false);
    return;
  }
  const bool on_centreline = line.start[across] == 0;
  for (const bool starboard : {false, true})
  {
    if (on_centreline ? starboard : !(starboard ? line.starboard : line.port))
      continue;
    maker.close();
    for (Index number = line.from; number < line.to; ++number)
      maker.add_edge(number, starboard, false);
  }
}
/// Two members on one edge are no mistake in general (bars on both sides of a plate); two of one
/// family are: a region replaced without its original cut out would count twice, unseen.
void check_families(const Mesh& mesh, std::vector<Problem>& problems)
{
  std::map<std::pair<Index, Index>, std::vector<Index>> parts_at;
  std::set<std::pair<Index, Index>> reported;
  for (const Run& run : mesh.runs)
    for (std::size_t i = 0; i + 1 < run.points.size(); ++i)
    {
      std::vector<Index>& parts = parts_at[std::minmax(run.points[i], run.points[i + 1])];
      const MeshPart& here = mesh.parts[static_cast<std::size_t>(run.part)];
      for (const Index other : parts)
      {
        const MeshPart& there = mesh.parts[static_cast<std::size_t>(other)];
        if (here.family == there.family && reported.insert({other, run.part}).second)
          problems.push_back(
              {here.where, fmt::format("members '{}' and '{}' of one family lie on the same edges; "
                                       "end one where the other begins",
                                       there.name, here.name)});
      }
      parts.push_back(run.part);
    }
}
} // namespace

Vector3 toe_direction(const Vector3& upright, const Vector3& tangent)
{
  return upright.cross(tangent).normalized();
}

void add_members(const Grid& grid, const std::vector<MemberPart>& members, CutOuts& cut_outs,
                 Mesh& mesh, std::vector<Problem>& problems)
{
  for (const MemberPart& member : members)
  {
    const std::size_t runs_before = mesh.runs.size();
    try
    {
      const Line line = line_of(grid, member);
      cut_outs.start(member, member.cut_outs);
      add_runs(grid, line, cut_outs, mesh);
      if (mesh.runs.size() == runs_before)
        continue; // all of it cut away in this configuration
      MeshPart part;
      part.name = member.name;
      part.family = member.family.empty() ? member.name : member.family;
      part.kind = MeshPart::Kind::member;
      part.surface = member.surface;
      part.material_use = member.profile;
      part.is_primary = member.is_primary;
      part.where = member.where;
      mesh.parts.push_back(std::move(part));
    }
    catch (const ModelError& error)
    {
      mesh.runs.resize(runs_before);
      problems.insert(problems.end(), error.problems().begin(), error.problems().end());
    }
  }
  check_families(mesh, problems);
}
} // namespace carlin
