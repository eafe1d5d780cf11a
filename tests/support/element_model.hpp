#pragma once

#include "carlin/element/member.hpp"
#include "carlin/element/shell.hpp"

#include <array>
#include <functional>
#include <map>
#include <string_view>
#include <vector>

/// A small assembler for verification tests of the elements alone: no lattice, no structure stage.
namespace carlin::testing
{
struct ModelShell
{
  std::array<Index, 4> nodes{};
  ShellSection section;
};

struct ModelMember
{
  std::array<Index, 2> nodes{};
  MemberSection section;
  Vector3 offset_1 = Vector3::Zero(), offset_2 = Vector3::Zero(), upright = Vector3::UnitZ();
};

class ElementModel
{
public:
  Index add_node(const Vector3& place);
  void add_shell(const std::array<Index, 4>& nodes, const ShellSection& section);
  void add_member(const ModelMember& member);

  /// Holds freedoms named by letters: u v w along x y z, a b c about x y z.
  void fix(Index node, std::string_view freedoms);
  void prescribe(Index node, Index component, double value);
  void add_force(Index node, Index component, double value);
  void add_forces(Index node, const Vector6& values);
  /// Work-equivalent loads of one element, kept for its section forces too.
  void add_member_load(Index member, const Vector12& forces);
  void add_shell_load(Index shell, const Vector24& forces);
  /// Force per area along a fixed direction over all shells [N/m^2].
  void add_surface_load(const Vector3& force_per_area);
  /// Force spread over the chord between two neighbouring nodes, half to each.
  void add_edge_force(Index node_1, Index node_2, const Vector3& force);

  /// Solves; freedoms that no element touches stay zero. @throws std::runtime_error for a
  /// mechanism.
  void solve();

  Vector6 motion(Index node) const { return displacement_.segment<6>(6 * node); }
  double motion(Index node, Index component) const { return displacement_(6 * node + component); }
  Vector6 reaction(Index node) const { return residual_.segment<6>(6 * node); }
  double work() const; ///< half of applied force times displacement [J]
  Vector24 shell_motion(Index shell) const;
  ShellState state(Index shell, double xi, double eta, double temperature_rise) const;
  MemberForces forces(Index member) const;

  QuadPoints points(Index shell) const;
  MemberGeometry geometry(Index member) const;
  const std::vector<Vector3>& nodes() const { return nodes_; }
  const std::vector<ModelShell>& shells() const { return shells_; }
  const std::vector<ModelMember>& members() const { return members_; }
  Vector3 material_axis = Vector3(1.0, 0.0, 0.0); ///< of all shells; must not be normal to any

  /// Stiffness of all freedoms, unsupported.
  SparseMatrix stiffness() const;

private:
  VectorX applied() const;

  std::vector<Vector3> nodes_;
  std::vector<ModelShell> shells_;
  std::vector<ModelMember> members_;
  std::map<Index, double> prescribed_;
  std::map<Index, double> loads_;
  std::map<Index, Vector12> member_loads_;
  VectorX displacement_, residual_;
};

/// Structured mesh: nodes (i, j) at s = i / n1, t = j / n2, numbered i (n2 + 1) + j from `first`.
struct Grid
{
  Index n1 = 0, n2 = 0, first = 0;
  Index node(Index i, Index j) const { return first + i * (n2 + 1) + j; }
  Index shell(Index i, Index j) const { return first_shell + i * n2 + j; }
  Index first_shell = 0;
};
Grid add_grid(ElementModel& model, Index n1, Index n2, const ShellSection& section,
              const std::function<Vector3(double, double)>& place);

/// Steel-like isotropic section with no mass, reference at mid-thickness.
ShellSection plate(double youngs_modulus, double poissons_ratio, double thickness);
} // namespace carlin::testing
