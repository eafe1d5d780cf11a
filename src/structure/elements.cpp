#include "build.hpp"
#include "sections.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <map>
#include <optional>

namespace carlin
{
namespace
{
/// Plating a profile can stand on is within 60 degrees of square to it; steeper is an edge.
constexpr double edge_on = 0.5;

const MeshPart& part_of(const Structure& structure, Index part)
{
  return structure.mesh->parts[static_cast<std::size_t>(part)];
}

void add_shells(Structure& structure, const Model& model, const Numbering& numbering)
{
  std::map<std::string, Index> section_by_schedule;
  const Mesh& mesh = *structure.mesh;
  for (std::size_t c = 0; c < mesh.cells.size(); ++c)
  {
    const MeshPart& part = part_of(structure, mesh.cells[c].part);
    const auto [found, is_new] = section_by_schedule.try_emplace(
        part.material_use, static_cast<Index>(structure.shell_sections.size()));
    if (is_new)
      structure.shell_sections.push_back(
          section_of(model, schedule_named(model, part.material_use, part.where)));
    structure.shells.push_back({.nodes = numbering.cell_nodes[c],
                                .part = mesh.cells[c].part,
                                .section = found->second,
                                .cell = static_cast<Index>(c)});
  }
}

/// Distance from the moulded line to the face that looks along `upright` [m].
double face_along(const ShellSection& section, double cosine)
{
  return (cosine > 0.0 ? section.offset : -section.offset) + 0.5 * section.thickness;
}

class PlatingFinder
{
public:
  PlatingFinder(const Structure& structure, const EdgeTable& edges)
      : structure_(structure), edges_(edges)
  {
  }

  /// Height of the plating's face over the line a-b along `upright`: of the thickest plate squarely
  /// under it; 0 on the edge of a plate (a flange on its web). Plates that share the member's own
  /// nodes come first; what a joint has split off counts only where there is nothing else.
  /// Nothing if no plate touches the line.
  std::optional<double> face(const std::array<Index, 2>& points, const std::array<Index, 2>& nodes,
                             const Vector3& upright) const
  {
    std::optional<double> own, foreign;
    for (const auto& [key, cell] : edges_.cells_at(points[0], points[1]))
    {
      const Shell& shell = structure_.shells[static_cast<std::size_t>(cell)];
      const Vector3 normal =
          cell_normal(*structure_.mesh, structure_.mesh->cells[static_cast<std::size_t>(cell)]);
      const double cosine = normal.dot(upright);
      const ShellSection& section =
          structure_.shell_sections[static_cast<std::size_t>(shell.section)];
      const double height = std::abs(cosine) < edge_on ? 0.0 : face_along(section, cosine);
      const bool is_own =
          std::find(shell.nodes.begin(), shell.nodes.end(), nodes[0]) != shell.nodes.end() &&
          std::find(shell.nodes.begin(), shell.nodes.end(), nodes[1]) != shell.nodes.end();
      std::optional<double>& best = is_own ? own : foreign;
      best = std::max(best.value_or(height), height);
    }
    return own ? own : foreign;
  }

private:
  const Structure& structure_;
  const EdgeTable& edges_;
};

class MemberSections
{
public:
  MemberSections(Structure& structure, const Model& model) : structure_(structure), model_(model) {}

  Index of(const MeshPart& part, ToeSide side)
  {
    const auto [found, is_new] = index_.try_emplace(
        {part.material_use, side}, static_cast<Index>(structure_.member_sections.size()));
    if (is_new)
      structure_.member_sections.push_back(
          section_of(model_, profile_named(model_, part.material_use, part.where), side));
    return found->second;
  }

private:
  Structure& structure_;
  const Model& model_;
  std::map<std::pair<std::string, ToeSide>, Index> index_;
};

/// Offsets at the ends of a segment of a frame member, in proportion to the length run.
std::array<Vector3, 2> given_offsets(const Mesh& mesh, const Run& run, std::size_t segment)
{
  std::vector<double> distance(run.points.size(), 0.0);
  for (std::size_t i = 1; i < run.points.size(); ++i)
    distance[i] = distance[i - 1] + (mesh.points[static_cast<std::size_t>(run.points[i])] -
                                     mesh.points[static_cast<std::size_t>(run.points[i - 1])])
                                        .norm();
  std::array<Vector3, 2> offsets;
  for (std::size_t end = 0; end < 2; ++end)
  {
    const double share = distance[segment + end] / distance.back();
    offsets[end] = (1.0 - share) * run.offset_from + share * run.offset_to;
  }
  return offsets;
}

void add_members(Structure& structure, const Model& model, const EdgeTable& edges,
                 const Numbering& numbering)
{
  const Mesh& mesh = *structure.mesh;
  const PlatingFinder plating(structure, edges);
  MemberSections sections(structure, model);
  for (std::size_t r = 0; r < mesh.runs.size(); ++r)
  {
    const Run& run = mesh.runs[r];
    const MeshPart& part = part_of(structure, run.part);
    for (std::size_t s = 0; s + 1 < run.points.size(); ++s)
    {
      Member member;
      member.nodes = {numbering.run_nodes[r][s], numbering.run_nodes[r][s + 1]};
      member.part = run.part;
      member.run = static_cast<Index>(r);
      member.segment = static_cast<Index>(s);
      member.upright = run.upright[s];
      const Vector3 start = structure.nodes[static_cast<std::size_t>(member.nodes[0])];
      const Vector3 line = structure.nodes[static_cast<std::size_t>(member.nodes[1])] - start;
      const ToeSide side =
          run.toe[s].dot(member.upright.cross(line)) < 0.0 ? ToeSide::mirrored : ToeSide::as_drawn;
      member.section = sections.of(part, side);
      if (run.stands_on_plating)
      {
        const std::optional<double> face =
            plating.face({run.points[s], run.points[s + 1]}, member.nodes, member.upright);
        if (!face)
          throw ModelError(part.where, fmt::format("member '{}' has no plating to stand on at {}",
                                                   part.name, mesh.place(start + 0.5 * line)));
        const ProfileConstants& profile =
            structure.member_sections[static_cast<std::size_t>(member.section)].profile;
        // The mirrored section has its centroid on the other side of local y: the same distance
        // towards the toe.
        member.offset_1 =
            member.upright * (*face + profile.centroid_z) +
            run.toe[s] * (side == ToeSide::mirrored ? -1.0 : 1.0) * profile.centroid_y;
        member.offset_2 = member.offset_1;
      }
      else
      {
        const std::array<Vector3, 2> offsets = given_offsets(mesh, run, s);
        member.offset_1 = offsets[0];
        member.offset_2 = offsets[1];
      }
      structure.members.push_back(member);
    }
  }
}
} // namespace

void add_elements(Structure& structure, const Model& model, const EdgeTable& edges,
                  const Numbering& numbering)
{
  add_shells(structure, model, numbering);
  add_members(structure, model, edges, numbering);
}

VectorX hull_node_areas(const Structure& structure)
{
  const Mesh& mesh = *structure.mesh;
  const auto is_hull = [&](const Shell& shell)
  {
    const MeshPart& part = part_of(structure, shell.part);
    return part.is_outer_shell || part.surface == Surface::deck;
  };
  const bool has_hull = std::any_of(structure.shells.begin(), structure.shells.end(), is_hull);
  VectorX areas = VectorX::Zero(static_cast<Index>(structure.nodes.size()));
  for (const Shell& shell : structure.shells)
  {
    if (has_hull && !is_hull(shell))
      continue;
    const std::size_t corners = corner_count(mesh.cells[static_cast<std::size_t>(shell.cell)]);
    const double share = shell_area(shell_points(structure, shell)) / static_cast<double>(corners);
    for (std::size_t i = 0; i < corners; ++i)
      areas[shell.nodes[i]] += share;
  }
  return areas;
}
} // namespace carlin
