#include "geometry.hpp"
#include "surface_stress.hpp"

#include "carlin/recovery/stress.hpp"

#include <cmath>

namespace carlin
{
namespace
{
Matrix3 global_tensor(const Matrix3& frame, const Vector3& components)
{
  Matrix2 flat;
  flat << components[0], components[2], components[2], components[1];
  return frame.leftCols<2>() * flat * frame.leftCols<2>().transpose();
}
} // namespace

double von_mises(const Matrix3& stress)
{
  const Matrix3 deviator = stress - stress.trace() / 3.0 * Matrix3::Identity();
  return std::sqrt(1.5 * deviator.squaredNorm());
}

double temperature_rise_of(const StageSolution& stage, const Shell& shell)
{
  return stage.temperature_rise.empty()
             ? 0.0
             : stage.temperature_rise[static_cast<std::size_t>(shell.part)];
}

SurfaceStress surface_stress(const Structure& structure, const Shell& shell,
                             const Vector24& displacement, double xi, double eta,
                             double temperature_rise)
{
  const ShellSection& section = structure.shell_sections[static_cast<std::size_t>(shell.section)];
  const QuadPoints points = shell_points(structure, shell);
  const Vector3 axis = material_axis(structure, shell);
  const ShellState state =
      shell_state(points, section, axis, displacement, xi, eta, temperature_rise);
  const Vector3 moment = state.moment - section.offset * state.force;
  const Matrix3 frame = shell_frame(points, axis);
  const double t = section.thickness;
  return {.membrane = global_tensor(frame, state.force / t),
          .bending = global_tensor(frame, 6.0 / (t * t) * moment)};
}

std::vector<SurfaceStress> centre_stresses(const Structure& structure, const StageSolution& stage)
{
  std::vector<SurfaceStress> result;
  result.reserve(structure.shells.size());
  for (const Shell& shell : structure.shells)
    result.push_back(surface_stress(structure, shell, shell_displacement(shell, stage.displacement),
                                    0.0, 0.0, temperature_rise_of(stage, shell)));
  return result;
}

double peak_stress(const Structure& structure, const Shell& shell, const StageSolution& stage)
{
  const Vector24 displacement = shell_displacement(shell, stage.displacement);
  // The corner where a triangle's sides collapse has no Jacobian.
  const double reach = corner_count(shell) == 3 ? 1.0 / std::sqrt(3.0) : 1.0;
  double peak = 0.0;
  for (const double xi : {-reach, reach})
    for (const double eta : {-reach, reach})
    {
      const SurfaceStress found = surface_stress(structure, shell, displacement, xi, eta,
                                                 temperature_rise_of(stage, shell));
      peak = std::max({peak, von_mises(found.membrane + found.bending),
                       von_mises(found.membrane - found.bending)});
    }
  return peak;
}

std::vector<PlateStress> plate_stresses(const Structure& structure, const StageSolution& stage)
{
  const std::vector<SurfaceStress> centres = centre_stresses(structure, stage);
  std::vector<PlateStress> result;
  result.reserve(centres.size());
  for (std::size_t s = 0; s < centres.size(); ++s)
    result.push_back({.mid = von_mises(centres[s].membrane),
                      .inner = von_mises(centres[s].membrane + centres[s].bending),
                      .outer = von_mises(centres[s].membrane - centres[s].bending),
                      .peak = peak_stress(structure, structure.shells[s], stage)});
  return result;
}
} // namespace carlin
