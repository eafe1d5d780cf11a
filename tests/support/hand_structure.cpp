#include "hand_structure.hpp"

#include <algorithm>
#include <cmath>
#include <span>

namespace carlin::testing
{
Index HandStructure::add_plate_part(const std::string& name, PlateKind kind)
{
  MeshPart part;
  part.name = part.family = name;
  part.plate_kind = kind;
  mesh.parts.push_back(part);
  return static_cast<Index>(mesh.parts.size()) - 1;
}

Index HandStructure::add_member_part(const std::string& name)
{
  const Index part = add_plate_part(name);
  mesh.parts.back().kind = MeshPart::Kind::member;
  return part;
}

Index HandStructure::add_point(const Vector3& position)
{
  const auto key = std::tuple{std::lround(1e7 * position.x()), std::lround(1e7 * position.y()),
                              std::lround(1e7 * position.z())};
  const auto found = std::ranges::find(keys_, key);
  if (found != keys_.end())
    return found - keys_.begin();
  keys_.push_back(key);
  mesh.points.push_back(position);
  structure.nodes.push_back(position);
  structure.node_point.push_back(static_cast<Index>(keys_.size()) - 1);
  return static_cast<Index>(keys_.size()) - 1;
}

Index HandStructure::add_copy(Index node)
{
  structure.nodes.push_back(structure.nodes[static_cast<std::size_t>(node)]);
  structure.node_point.push_back(structure.node_point[static_cast<std::size_t>(node)]);
  return static_cast<Index>(structure.nodes.size()) - 1;
}

Index HandStructure::add_section(const ShellSection& section)
{
  structure.shell_sections.push_back(section);
  return static_cast<Index>(structure.shell_sections.size()) - 1;
}

Index HandStructure::add_section(const MemberSection& section)
{
  structure.member_sections.push_back(section);
  return static_cast<Index>(structure.member_sections.size()) - 1;
}

void HandStructure::add_plate(Index part, Index section, const std::array<Vector3, 4>& corners,
                              Index n1, Index n2)
{
  const auto at = [&](Index i, Index j)
  {
    const double s = static_cast<double>(i) / static_cast<double>(n1);
    const double t = static_cast<double>(j) / static_cast<double>(n2);
    return add_point((1 - s) * ((1 - t) * corners[0] + t * corners[3]) +
                     s * ((1 - t) * corners[1] + t * corners[2]));
  };
  for (Index i = 0; i < n1; ++i)
    for (Index j = 0; j < n2; ++j)
    {
      const std::array<Index, 4> nodes{at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)};
      structure.shells.push_back({nodes, part, section, static_cast<Index>(mesh.cells.size())});
      mesh.cells.push_back({nodes, part});
    }
}

void HandStructure::add_run(Index part, Index section, const Vector3& from, const Vector3& to,
                            Index n, const Vector3& upright, const Vector3& offset)
{
  Run run;
  run.part = part;
  for (Index i = 0; i <= n; ++i)
    run.points.push_back(
        add_point(from + static_cast<double>(i) / static_cast<double>(n) * (to - from)));
  for (Index i = 0; i < n; ++i)
  {
    const auto at = static_cast<std::size_t>(i);
    run.upright.push_back(upright);
    Member member;
    member.nodes = {run.points[at], run.points[at + 1]};
    member.part = part;
    member.section = section;
    member.run = static_cast<Index>(mesh.runs.size());
    member.segment = i;
    member.offset_1 = member.offset_2 = offset;
    member.upright = upright;
    structure.members.push_back(member);
  }
  mesh.runs.push_back(run);
}

void HandStructure::hold(Index node, std::initializer_list<Index> components)
{
  for (const Index component : components)
    structure.supported.push_back({.freedom = 6 * node + component});
}

void HandStructure::finish()
{
  structure.mesh = &mesh;
  const auto size = static_cast<Index>(6 * structure.nodes.size());
  std::vector<Eigen::Triplet<double>> entries;
  const auto add = [&](const MatrixX& element, std::span<const Index> nodes)
  {
    for (Index column = 0; column < element.cols(); ++column)
      for (Index row = 0; row < element.rows(); ++row)
        entries.emplace_back(
            static_cast<int>(6 * nodes[static_cast<std::size_t>(row / 6)] + row % 6),
            static_cast<int>(6 * nodes[static_cast<std::size_t>(column / 6)] + column % 6),
            element(row, column));
  };
  structure.node_area = VectorX::Zero(size / 6);
  for (const Shell& shell : structure.shells)
  {
    const QuadPoints points = shell_points(structure, shell);
    add(shell_stiffness(points, structure.shell_sections[static_cast<std::size_t>(shell.section)],
                        material_axis(structure, shell)),
        shell.nodes);
    for (const Index node : shell.nodes)
      structure.node_area[node] += 0.25 * shell_area(points);
  }
  for (const Member& member : structure.members)
    add(member_stiffness(member_geometry(structure, member),
                         structure.member_sections[static_cast<std::size_t>(member.section)]),
        member.nodes);
  structure.stiffness.resize(size, size);
  structure.stiffness.setFromTriplets(entries.begin(), entries.end());
  structure.mass.resize(size, size);
}

HandStructure box_hull(const BoxHull& box)
{
  HandStructure hull;
  const Index section = hull.add_section(box.section);
  const double y = 0.5 * box.beam, z = box.depth, x = box.length;
  const auto cells = [&](double side)
  { return std::max<Index>(1, static_cast<Index>(std::lround(side / box.cell))); };
  const Index nx = cells(x), ny = cells(box.beam), nz = cells(z);
  // Corners so that the right-hand normal points inward.
  const Index bottom = hull.add_plate_part("bottom");
  hull.mesh.parts.back().surface = Surface::bottom;
  const Index deck = hull.add_plate_part("deck");
  hull.mesh.parts.back().surface = Surface::deck;
  const Index port = hull.add_plate_part("port"), starboard = hull.add_plate_part("starboard");
  hull.add_plate(bottom, section, {{{0, -y, 0}, {x, -y, 0}, {x, y, 0}, {0, y, 0}}}, nx, ny);
  hull.add_plate(deck, section, {{{0, y, z}, {x, y, z}, {x, -y, z}, {0, -y, z}}}, nx, ny);
  hull.add_plate(port, section, {{{0, y, 0}, {x, y, 0}, {x, y, z}, {0, y, z}}}, nx, nz);
  hull.add_plate(starboard, section, {{{0, -y, z}, {x, -y, z}, {x, -y, 0}, {0, -y, 0}}}, nx, nz);
  for (std::size_t i = 0; i < box.bulkheads.size(); ++i)
  {
    const double at = box.bulkheads[i];
    const Index part = hull.add_plate_part("bulkhead " + std::to_string(i), PlateKind::bulkhead);
    hull.mesh.parts.back().surface = Surface::station;
    hull.add_plate(part, section, {{{at, -y, 0}, {at, y, 0}, {at, y, z}, {at, -y, z}}}, ny, nz);
    hull.mesh.stations.push_back({"station-" + std::to_string(i), at, 0.0});
  }
  hull.finish();
  return hull;
}
} // namespace carlin::testing
