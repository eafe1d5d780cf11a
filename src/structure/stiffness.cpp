#include "build.hpp"

#include <array>

namespace carlin
{
namespace
{
/// Stiffness of a joint spring between (node_part, node_other), global axes.
Matrix12 spring_stiffness(const JointSpring& spring)
{
  const Matrix3 translation =
      spring.axes *
      Vector3(spring.stiffness[0], spring.stiffness[1], spring.stiffness[2]).asDiagonal() *
      spring.axes.transpose();
  const Vector3 along = spring.axes.col(0);
  const Matrix3 rotation = spring.stiffness[3] * along * along.transpose();
  Matrix12 stiffness = Matrix12::Zero();
  for (const Index offset : {Index{0}, Index{3}})
  {
    const Matrix3& block = offset == 0 ? translation : rotation;
    stiffness.block<3, 3>(offset, offset) = block;
    stiffness.block<3, 3>(6 + offset, 6 + offset) = block;
    stiffness.block<3, 3>(offset, 6 + offset) = -block;
    stiffness.block<3, 3>(6 + offset, offset) = -block;
  }
  return stiffness;
}

} // namespace

BlockPattern element_pattern(const Structure& structure)
{
  BlockPattern pattern(static_cast<Index>(structure.nodes.size()));
  for (const Shell& shell : structure.shells)
    pattern.couple(shell.nodes);
  for (const Member& member : structure.members)
    pattern.couple(member.nodes);
  for (const JointSpring& spring : structure.joints)
    pattern.couple(std::array<Index, 2>{spring.node_part, spring.node_other});
  pattern.close();
  return pattern;
}

void assemble_stiffness(Structure& structure)
{
  const BlockPattern pattern = element_pattern(structure);
  structure.stiffness = pattern.zero();
  for (const Shell& shell : structure.shells)
    pattern.add(structure.stiffness,
                shell_stiffness(shell_points(structure, shell),
                                structure.shell_sections[static_cast<std::size_t>(shell.section)],
                                material_axis(structure, shell)),
                shell.nodes);
  for (const Member& member : structure.members)
    pattern.add(
        structure.stiffness,
        member_stiffness(member_geometry(structure, member),
                         structure.member_sections[static_cast<std::size_t>(member.section)]),
        member.nodes);
  for (const JointSpring& spring : structure.joints)
    pattern.add(structure.stiffness, spring_stiffness(spring),
                std::array<Index, 2>{spring.node_part, spring.node_other});
}

} // namespace carlin
