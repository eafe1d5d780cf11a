#include "geometry.hpp"

#include "carlin/recovery/deflection.hpp"

#include <cmath>
#include <map>
#include <set>

namespace carlin
{
namespace
{
/// One run of member elements as a chain of nodes.
struct Chain
{
  Index run = -1, part = -1;
  std::vector<Index> nodes;
  std::vector<Vector3> uprights; ///< one an element
};

std::vector<Chain> chains(const Structure& structure)
{
  std::map<Index, std::vector<const Member*>> by_run;
  for (const Member& member : structure.members)
    by_run[member.run].push_back(&member);
  std::vector<Chain> result;
  for (auto& [run, members] : by_run)
  {
    std::ranges::sort(members, {}, [](const Member* member) { return member->segment; });
    Chain chain{.run = run, .part = members.front()->part, .nodes = {}, .uprights = {}};
    chain.nodes.push_back(members.front()->nodes[0]);
    for (const Member* member : members)
    {
      chain.nodes.push_back(member->nodes[1]);
      chain.uprights.push_back(member->upright);
    }
    result.push_back(std::move(chain));
  }
  return result;
}

/// What meets at mesh points.
struct PointTable
{
  std::map<Index, std::vector<Index>> shells;
  std::map<Index, std::set<Index>> primary_runs;
};

PointTable point_table(const Structure& structure)
{
  PointTable table;
  for (std::size_t s = 0; s < structure.shells.size(); ++s)
    for (int i = 0; i < corner_count(structure.shells[s]); ++i)
      table.shells[point_of(structure, structure.shells[s].nodes[static_cast<std::size_t>(i)])]
          .push_back(static_cast<Index>(s));
  for (const Member& member : structure.members)
    if (structure.mesh->parts[static_cast<std::size_t>(member.part)].is_primary)
      for (const Index node : member.nodes)
        table.primary_runs[point_of(structure, node)].insert(member.run);
  return table;
}

const std::vector<Index>& shells_at(const PointTable& table, Index point)
{
  static const std::vector<Index> none;
  const auto found = table.shells.find(point);
  return found == table.shells.end() ? none : found->second;
}

/// Parts that have a shell edge along the chain: what it runs on.
std::set<Index> carrying_parts(const Structure& structure, const PointTable& table,
                               const Chain& chain)
{
  std::set<Index> parts;
  for (std::size_t i = 0; i + 1 < chain.nodes.size(); ++i)
  {
    const Index from = point_of(structure, chain.nodes[i]);
    const PointEdge wanted = point_edge(from, point_of(structure, chain.nodes[i + 1]));
    for (const Index s : shells_at(table, from))
    {
      const Shell& shell = structure.shells[static_cast<std::size_t>(s)];
      for (int edge = 0; edge < corner_count(shell); ++edge)
        if (shell_edge(structure, shell, edge) == wanted)
          parts.insert(shell.part);
    }
  }
  return parts;
}

/// A plate supports a member where it stands so that its plane holds the member's upright.
bool is_support(const Structure& structure, const PointTable& table, const Chain& chain,
                const std::set<Index>& carriers, std::size_t i)
{
  const Index point = point_of(structure, chain.nodes[i]);
  constexpr double flat = 0.7; // cosine of 45 deg between plate normal and upright
  for (const Index s : shells_at(table, point))
  {
    const Shell& shell = structure.shells[static_cast<std::size_t>(s)];
    if (!carriers.contains(shell.part) &&
        std::abs(shell_normal(structure, shell).dot(chain.uprights[i])) < flat)
      return true;
  }
  if (structure.mesh->parts[static_cast<std::size_t>(chain.part)].is_primary)
    return false;
  const auto primary = table.primary_runs.find(point);
  return primary != table.primary_runs.end();
}

MemberSpan span_between(const Chain& chain, std::size_t first, std::size_t last)
{
  MemberSpan span{.run = chain.run, .part = chain.part, .nodes = {}, .upright = Vector3::Zero()};
  for (std::size_t i = first; i <= last; ++i)
    span.nodes.push_back(chain.nodes[i]);
  for (std::size_t i = first; i < last; ++i)
    span.upright += chain.uprights[i];
  return span;
}

MemberDeflection span_deflection(const Structure& structure, const MemberSpan& span,
                                 const VectorX& displacement)
{
  const Vector3 start = node_position(structure, span.nodes.front());
  const Vector3 chord = node_position(structure, span.nodes.back()) - start;
  const Vector3 along = chord.normalized();
  const Vector3 u_first = translation(displacement, span.nodes.front());
  const Vector3 u_last = translation(displacement, span.nodes.back());
  const double turn = 0.5 * along.dot(rotation(displacement, span.nodes.front()) +
                                      rotation(displacement, span.nodes.back()));
  const Vector3 upright = (span.upright - span.upright.dot(along) * along).normalized();

  MemberDeflection result{.run = span.run,
                          .part = span.part,
                          .deflection = 0.0,
                          .span = chord.norm(),
                          .place = start + 0.5 * chord};
  for (const Index node : span.nodes)
  {
    const Vector3 arm = node_position(structure, node) - start;
    const double part = arm.dot(along) / result.span;
    const Vector3 off_chord = arm - arm.dot(along) * along;
    const Vector3 moved = translation(displacement, node) - (1.0 - part) * u_first - part * u_last -
                          turn * along.cross(off_chord);
    if (std::abs(moved.dot(upright)) > std::abs(result.deflection))
    {
      result.deflection = moved.dot(upright);
      result.place = node_position(structure, node);
    }
  }
  return result;
}
} // namespace

std::vector<MemberSpan> member_spans(const Structure& structure)
{
  const PointTable table = point_table(structure);
  std::vector<MemberSpan> spans;
  for (const Chain& chain : chains(structure))
  {
    const std::set<Index> carriers = carrying_parts(structure, table, chain);
    std::size_t first = 0;
    for (std::size_t i = 1; i < chain.nodes.size(); ++i)
    {
      if (i + 1 < chain.nodes.size() && !is_support(structure, table, chain, carriers, i))
        continue;
      if (i - first >= 2)
        spans.push_back(span_between(chain, first, i));
      first = i;
    }
  }
  return spans;
}

std::vector<MemberDeflection> member_deflections(const Structure& structure,
                                                 const std::vector<MemberSpan>& spans,
                                                 const VectorX& displacement)
{
  std::vector<MemberDeflection> results;
  for (const MemberSpan& span : spans)
    results.push_back(span_deflection(structure, span, displacement));
  return results;
}
} // namespace carlin
