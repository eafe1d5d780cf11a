#pragma once

#include "carlin/structure/structure.hpp"

#include <array>
#include <string>
#include <tuple>
#include <vector>

/// Structures put together by hand, for tests of recovery and checks that must not depend on the
/// lattice. Every node is a mesh point.
namespace carlin::testing
{
struct HandStructure
{
  Mesh mesh;
  Structure structure;

  Index add_plate_part(const std::string& name, PlateKind kind = PlateKind::plating);
  Index add_member_part(const std::string& name);
  /// Merges points that coincide.
  Index add_point(const Vector3& position);
  /// A copy of a point's node, as a joint makes it.
  Index add_copy(Index node);
  Index add_section(const ShellSection& section);
  Index add_section(const MemberSection& section);

  /// Grid of shells over a flat quadrilateral; corners in order round, n1 cells along 1-2.
  void add_plate(Index part, Index section, const std::array<Vector3, 4>& corners, Index n1,
                 Index n2);
  /// Run of member elements between two places; centroids `offset` from the nodes.
  void add_run(Index part, Index section, const Vector3& from, const Vector3& to, Index n,
               const Vector3& upright, const Vector3& offset = Vector3::Zero());
  void hold(Index node, std::initializer_list<Index> components);
  /// Stiffness and node areas; call last.
  void finish();

private:
  std::vector<std::tuple<long, long, long>> keys_;
};

/// Box hull without ends: bottom, deck and sides of one thickness with bulkheads at each of
/// `bulkheads`. Length along x from 0, y from -beam/2, z from 0. Parts bottom, deck, port,
/// starboard, "bulkhead <i>"; stations "station-<i>" at the bulkheads.
struct BoxHull
{
  double length = 0.0, beam = 0.0, depth = 0.0, cell = 0.0; // [m]
  std::vector<double> bulkheads;                            // x [m]
  ShellSection section;
};
HandStructure box_hull(const BoxHull& box);
} // namespace carlin::testing
