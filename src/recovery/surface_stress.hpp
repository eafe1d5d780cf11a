#pragma once

#include "carlin/recovery/stage.hpp"

namespace carlin
{
/// Stress of a homogeneous plate at one place as tensors in global axes [Pa]: the inner face has
/// membrane + bending, the outer face membrane - bending.
struct SurfaceStress
{
  Matrix3 membrane = Matrix3::Zero();
  Matrix3 bending = Matrix3::Zero();
};

/// At the centre of a shell.
SurfaceStress surface_stress(const Structure& structure, const Shell& shell,
                             const ShellStress& stress);

/// The stage's own where they have been worked out already.
std::vector<ShellStress> shell_stresses_of(const Structure& structure, const StageSolution& stage);

double von_mises(const Matrix3& stress);
/// Of plane stress (x, y, xy).
double plane_von_mises(const Vector3& stress);
} // namespace carlin
