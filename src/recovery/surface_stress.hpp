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

/// Source: classical plate theory; M is moved from the reference surface to the mid-thickness.
SurfaceStress surface_stress(const Structure& structure, const Shell& shell,
                             const Vector24& displacement, double xi, double eta,
                             double temperature_rise);

/// At all shell centres.
std::vector<SurfaceStress> centre_stresses(const Structure& structure, const StageSolution& stage);

/// Largest von Mises stress of both faces over the corners (Gauss points of a triangle) [Pa].
double peak_stress(const Structure& structure, const Shell& shell, const StageSolution& stage);

double von_mises(const Matrix3& stress);

double temperature_rise_of(const StageSolution& stage, const Shell& shell);
} // namespace carlin
