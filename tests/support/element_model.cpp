#include "element_model.hpp"

#include <Eigen/SparseCholesky>
#include <cassert>
#include <cmath>
#include <stdexcept>
#include <string>

namespace carlin::testing
{
namespace
{
template <std::size_t count>
void add_element(std::vector<Eigen::Triplet<double>>& entries, const Eigen::MatrixXd& stiffness,
                 const std::array<Index, count>& nodes)
{
  for (Index j = 0; j < stiffness.cols(); ++j)
    for (Index i = 0; i < stiffness.rows(); ++i)
      entries.emplace_back(6 * nodes[static_cast<std::size_t>(i / 6)] + i % 6,
                           6 * nodes[static_cast<std::size_t>(j / 6)] + j % 6, stiffness(i, j));
}
} // namespace

Index ElementModel::add_node(const Vector3& place)
{
  nodes_.push_back(place);
  return static_cast<Index>(nodes_.size()) - 1;
}

void ElementModel::add_shell(const std::array<Index, 4>& nodes, const ShellSection& section)
{
  shells_.push_back({nodes, section});
}

void ElementModel::add_member(const ModelMember& member) { members_.push_back(member); }

void ElementModel::fix(Index node, std::string_view freedoms)
{
  constexpr std::string_view letters = "uvwabc";
  for (const char letter : freedoms)
  {
    const std::size_t component = letters.find(letter);
    assert(component != std::string_view::npos);
    prescribe(node, static_cast<Index>(component), 0.0);
  }
}

void ElementModel::prescribe(Index node, Index component, double value)
{
  prescribed_[6 * node + component] = value;
}

void ElementModel::add_force(Index node, Index component, double value)
{
  loads_[6 * node + component] += value;
}

void ElementModel::add_forces(Index node, const Vector6& values)
{
  for (Index i = 0; i < 6; ++i)
    add_force(node, i, values(i));
}

void ElementModel::add_member_load(Index member, const Vector12& forces)
{
  const ModelMember& item = members_.at(static_cast<std::size_t>(member));
  member_loads_.try_emplace(member, Vector12::Zero()).first->second += forces;
  add_forces(item.nodes[0], forces.head<6>());
  add_forces(item.nodes[1], forces.tail<6>());
}

void ElementModel::add_shell_load(Index shell, const Vector24& forces)
{
  const ModelShell& item = shells_.at(static_cast<std::size_t>(shell));
  for (std::size_t i = 0; i < 4; ++i)
    add_forces(item.nodes[i], forces.segment<6>(6 * static_cast<Index>(i)));
}

void ElementModel::add_surface_load(const Vector3& force_per_area)
{
  for (Index s = 0; s < static_cast<Index>(shells_.size()); ++s)
  {
    // The share of each corner in a unit pressure, by size, is its share of the area.
    const Vector24 unit = shell_pressure(points(s), 1.0);
    for (std::size_t i = 0; i < 4; ++i)
    {
      const double area = unit.segment<3>(6 * static_cast<Index>(i)).norm();
      for (Index c = 0; c < 3; ++c)
        add_force(shells_[static_cast<std::size_t>(s)].nodes[i], c, area * force_per_area(c));
    }
  }
}

void ElementModel::add_edge_force(Index node_1, Index node_2, const Vector3& force)
{
  for (Index c = 0; c < 3; ++c)
  {
    add_force(node_1, c, 0.5 * force(c));
    add_force(node_2, c, 0.5 * force(c));
  }
}

SparseMatrix ElementModel::stiffness() const
{
  std::vector<Eigen::Triplet<double>> entries;
  entries.reserve(576 * shells_.size() + 144 * members_.size());
  for (std::size_t s = 0; s < shells_.size(); ++s)
    add_element(entries,
                shell_stiffness(points(static_cast<Index>(s)), shells_[s].section, material_axis),
                shells_[s].nodes);
  for (std::size_t m = 0; m < members_.size(); ++m)
    add_element(entries, member_stiffness(geometry(static_cast<Index>(m)), members_[m].section),
                members_[m].nodes);
  const Index size = 6 * static_cast<Index>(nodes_.size());
  SparseMatrix matrix(size, size);
  matrix.setFromTriplets(entries.begin(), entries.end());
  return matrix;
}

VectorX ElementModel::applied() const
{
  VectorX forces = VectorX::Zero(6 * static_cast<Index>(nodes_.size()));
  for (const auto& [freedom, value] : loads_)
    forces(freedom) = value;
  return forces;
}

void ElementModel::solve()
{
  const SparseMatrix whole = stiffness();
  const Index size = whole.rows();
  displacement_ = VectorX::Zero(size);
  std::vector<Index> number(static_cast<std::size_t>(size), -1);
  for (const auto& [freedom, value] : prescribed_)
    displacement_(freedom) = value;
  Index count = 0;
  for (Index i = 0; i < size; ++i)
    if (!prescribed_.contains(i) && whole.coeff(i, i) != 0.0)
      number[static_cast<std::size_t>(i)] = count++;

  const VectorX unbalanced = applied() - whole * displacement_;
  VectorX right(count);
  std::vector<Eigen::Triplet<double>> entries;
  for (Index j = 0; j < size; ++j)
  {
    const Index column = number[static_cast<std::size_t>(j)];
    if (column < 0)
      continue;
    right(column) = unbalanced(j);
    for (SparseMatrix::InnerIterator it(whole, j); it; ++it)
      if (const Index row = number[static_cast<std::size_t>(it.row())]; row >= 0)
        entries.emplace_back(row, column, it.value());
  }
  SparseMatrix reduced(count, count);
  reduced.setFromTriplets(entries.begin(), entries.end());
  const Eigen::SimplicialLDLT<SparseMatrix> factor(reduced);
  if (factor.info() != Eigen::Success || (factor.vectorD().array() <= 0.0).any())
    throw std::runtime_error("the test model is a mechanism");
  VectorX solution = factor.solve(right);
  solution += factor.solve(right - reduced * solution); // one step of refinement
  for (Index i = 0; i < size; ++i)
    if (number[static_cast<std::size_t>(i)] >= 0)
      displacement_(i) = solution(number[static_cast<std::size_t>(i)]);
  residual_ = whole * displacement_ - applied();
}

double ElementModel::work() const { return 0.5 * applied().dot(displacement_); }

QuadPoints ElementModel::points(Index shell) const
{
  const auto& corner = shells_.at(static_cast<std::size_t>(shell)).nodes;
  QuadPoints places;
  for (std::size_t i = 0; i < 4; ++i)
    places[i] = nodes_.at(static_cast<std::size_t>(corner[i]));
  return places;
}

MemberGeometry ElementModel::geometry(Index member) const
{
  const ModelMember& item = members_.at(static_cast<std::size_t>(member));
  return {nodes_.at(static_cast<std::size_t>(item.nodes[0])),
          nodes_.at(static_cast<std::size_t>(item.nodes[1])), item.offset_1, item.offset_2,
          item.upright};
}

Vector24 ElementModel::shell_motion(Index shell) const
{
  Vector24 moved;
  const auto& corner = shells_.at(static_cast<std::size_t>(shell)).nodes;
  for (std::size_t i = 0; i < 4; ++i)
    moved.segment<6>(6 * static_cast<Index>(i)) = motion(corner[i]);
  return moved;
}

ShellState ElementModel::state(Index shell, double xi, double eta, double temperature_rise) const
{
  return shell_state(points(shell), shells_.at(static_cast<std::size_t>(shell)).section,
                     material_axis, shell_motion(shell), xi, eta, temperature_rise);
}

MemberForces ElementModel::forces(Index member) const
{
  const ModelMember& item = members_.at(static_cast<std::size_t>(member));
  Vector12 moved;
  moved << motion(item.nodes[0]), motion(item.nodes[1]);
  const auto load = member_loads_.find(member);
  const Vector12 fixed_end =
      load == member_loads_.end() ? Vector12(Vector12::Zero()) : load->second;
  return member_forces(geometry(member), item.section, moved, fixed_end);
}

Grid add_grid(ElementModel& model, Index n1, Index n2, const ShellSection& section,
              const std::function<Vector3(double, double)>& place)
{
  Grid grid{n1, n2, static_cast<Index>(model.nodes().size()),
            static_cast<Index>(model.shells().size())};
  for (Index i = 0; i <= n1; ++i)
    for (Index j = 0; j <= n2; ++j)
      model.add_node(place(static_cast<double>(i) / static_cast<double>(n1),
                           static_cast<double>(j) / static_cast<double>(n2)));
  for (Index i = 0; i < n1; ++i)
    for (Index j = 0; j < n2; ++j)
      model.add_shell(
          {grid.node(i, j), grid.node(i + 1, j), grid.node(i + 1, j + 1), grid.node(i, j + 1)},
          section);
  return grid;
}

ShellSection plate(double youngs_modulus, double poissons_ratio, double thickness)
{
  return isotropic_shell_section(youngs_modulus, poissons_ratio, 0.0, 0.0, thickness, 0.0);
}
} // namespace carlin::testing
