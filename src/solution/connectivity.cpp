#include "connectivity.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <fmt/ranges.h>
#include <numeric>

namespace carlin
{
namespace
{
/// Sets that merge, with path halving.
class Sets
{
public:
  explicit Sets(std::size_t size) : parent_(size) { std::iota(parent_.begin(), parent_.end(), 0); }
  Index root(Index i)
  {
    while (parent_[static_cast<std::size_t>(i)] != i)
    {
      Index& parent = parent_[static_cast<std::size_t>(i)];
      parent = parent_[static_cast<std::size_t>(parent)];
      i = parent;
    }
    return i;
  }
  void merge(Index a, Index b) { parent_[static_cast<std::size_t>(root(a))] = root(b); }

private:
  std::vector<Index> parent_;
};
} // namespace

Bodies connected_bodies(const Structure& structure)
{
  Sets sets(structure.nodes.size());
  for (const Shell& shell : structure.shells)
    for (std::size_t i = 1; i < 4; ++i)
      sets.merge(shell.nodes[0], shell.nodes[i]);
  for (const Member& member : structure.members)
    sets.merge(member.nodes[0], member.nodes[1]);
  for (const JointSpring& spring : structure.joints)
    if (std::any_of(spring.stiffness.begin(), spring.stiffness.end(),
                    [](double k) { return k > 0.0; }))
      sets.merge(spring.node_part, spring.node_other);

  Bodies bodies;
  std::vector<Index> body_of_root(structure.nodes.size(), -1);
  std::vector<Index> size;
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
  {
    Index& body = body_of_root[static_cast<std::size_t>(sets.root(static_cast<Index>(n)))];
    if (body < 0)
    {
      body = bodies.count++;
      size.push_back(0);
    }
    ++size[static_cast<std::size_t>(body)];
    bodies.of_node.push_back(body);
  }
  if (!size.empty())
    bodies.largest = std::max_element(size.begin(), size.end()) - size.begin();
  return bodies;
}

std::vector<std::string> parts_at(const Structure& structure, const std::vector<bool>& is_chosen)
{
  std::vector<bool> is_named(structure.mesh->parts.size(), false);
  const auto visit = [&](const auto& element)
  {
    for (const Index node : element.nodes)
      if (is_chosen[static_cast<std::size_t>(node)])
        is_named[static_cast<std::size_t>(element.part)] = true;
  };
  for (const Shell& shell : structure.shells)
    visit(shell);
  for (const Member& member : structure.members)
    visit(member);
  std::vector<std::string> names;
  for (std::size_t p = 0; p < is_named.size(); ++p)
    if (is_named[p])
      names.push_back(structure.mesh->parts[p].name);
  return names;
}

void require_joined(const Structure& structure, const Bodies& bodies)
{
  std::vector<bool> is_held(static_cast<std::size_t>(bodies.count), false);
  if (structure.supported.empty() && bodies.largest >= 0)
    is_held[static_cast<std::size_t>(bodies.largest)] = true;
  for (const SupportedFreedom& freedom : structure.supported)
    is_held[static_cast<std::size_t>(
        bodies.of_node[static_cast<std::size_t>(freedom.freedom / freedoms_per_node)])] = true;
  const auto loose = std::find(is_held.begin(), is_held.end(), false);
  if (loose == is_held.end())
    return;

  std::vector<bool> is_chosen(structure.nodes.size(), false);
  Index place = -1;
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
    if (bodies.of_node[n] == loose - is_held.begin())
    {
      is_chosen[n] = true;
      place = static_cast<Index>(n);
    }
  const std::vector<std::string> parts = parts_at(structure, is_chosen);
  throw SolveError(fmt::format(
      "{} {} not joined to anything{} (near {}); let it share an edge with other "
      "structure, or give its joint a stiffness",
      fmt::join(parts, " and "), parts.size() == 1 ? "is" : "are", parts.size() == 1 ? "" : " else",
      structure.mesh->place(structure.nodes[static_cast<std::size_t>(place)])));
}
} // namespace carlin
