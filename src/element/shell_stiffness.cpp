#include "shell_strain.hpp"

namespace carlin
{
namespace
{
/// Block of corners i and j in the order u v w r_x r_y r_z.
Matrix6 corner_block(const ShellBlocks& blocks, Index i, Index j)
{
  Matrix6 block;
  block.topLeftCorner<2, 2>() = blocks.membrane.block<2, 2>(2 * i, 2 * j);
  block.block<2, 1>(0, 2).setZero();
  block.block<2, 2>(0, 3) = blocks.coupling.block<2, 2>(2 * i, 2 * j);
  block.block<2, 1>(0, 5) = blocks.spin_drilling.block<2, 1>(2 * i, j);
  block.block<1, 2>(2, 0).setZero();
  block.block<3, 3>(2, 2) = blocks.shear.block<3, 3>(3 * i, 3 * j);
  block(2, 5) = 0.0;
  block.block<2, 2>(3, 0) = blocks.coupling.block<2, 2>(2 * j, 2 * i).transpose();
  block.block<2, 2>(3, 3) += blocks.bending.block<2, 2>(2 * i, 2 * j);
  block.block<2, 1>(3, 5).setZero();
  block.block<1, 2>(5, 0) = blocks.spin_drilling.block<2, 1>(2 * j, i).transpose();
  block.block<1, 3>(5, 2).setZero();
  block(5, 5) = blocks.drilling(i, j);
  return block;
}
} // namespace

Matrix24 shell_stiffness(const QuadPoints& points, const ShellSection& section,
                         const Vector3& material_axis)
{
  const ShellPlane plane = shell_plane(points, material_axis);
  const ShellBlocks blocks = shell_blocks(plane, section);
  std::array<Matrix6, 4> motion;
  for (std::size_t i = 0; i < motion.size(); ++i)
    motion[i] = corner_motion(plane, i);

  Matrix24 stiffness;
  for (Index j = 0; j < 4; ++j)
    for (Index i = j; i < 4; ++i)
    {
      const Matrix6 half = corner_block(blocks, i, j) * motion[static_cast<std::size_t>(j)];
      stiffness.block<6, 6>(6 * i, 6 * j).noalias() =
          motion[static_cast<std::size_t>(i)].transpose() * half;
    }
  // Symmetric to the last bit, which rounding alone would not give.
  stiffness.triangularView<Eigen::StrictlyUpper>() = stiffness.transpose();
  return stiffness;
}
} // namespace carlin
