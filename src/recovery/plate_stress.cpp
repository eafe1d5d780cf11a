#include "geometry.hpp"
#include "surface_stress.hpp"

#include "carlin/recovery/stress.hpp"

#include <array>
#include <cassert>
#include <cmath>

namespace carlin
{
namespace
{
using StressMatrix = Eigen::Matrix<double, 6, 24>; // rows: membrane, bending (x, y, xy)

/// Stress at one place of a shell: `per_displacement` times its displacements and `per_kelvin`
/// times its rise of temperature.
struct StressMap
{
  StressMatrix per_displacement;
  Vector6 per_kelvin;

  Vector6 operator()(const Vector24& displacement, double rise) const
  {
    return per_displacement * displacement + rise * per_kelvin;
  }
};

struct ShellPlace
{
  double xi, eta;
};

StressMap stress_map(const QuadPoints& points, const ShellSection& section, const Vector3& axis,
                     const Vector24& arm_growth, const ShellPlace& place)
{
  const StressMatrix strain =
      shell_strain_matrix(points, section, axis, place.xi, place.eta).topRows<6>();
  Matrix6 to_stress;
  to_stress << section.A, section.B, section.B.transpose(), section.D;
  Vector6 held;
  held << section.thermal_force, section.thermal_moment;
  // Moments to the mid-thickness, then resultants to stress.
  Matrix6 to_faces = Matrix6::Zero();
  const double t = section.thickness;
  to_faces.topLeftCorner<3, 3>() = Matrix3::Identity() / t;
  to_faces.bottomRightCorner<3, 3>() = 6.0 / (t * t) * Matrix3::Identity();
  to_faces.bottomLeftCorner<3, 3>() = -6.0 * section.offset / (t * t) * Matrix3::Identity();
  StressMap map;
  map.per_displacement = to_faces * to_stress * strain;
  map.per_kelvin = -map.per_displacement * arm_growth - to_faces * held;
  return map;
}

/// Centre first, then the corners (Gauss points of a triangle, whose collapsed corner has no
/// Jacobian).
std::array<StressMap, 5> stress_maps(const Structure& structure, const Shell& shell)
{
  const ShellSection& section = structure.shell_sections[static_cast<std::size_t>(shell.section)];
  const QuadPoints points = shell_points(structure, shell);
  const Vector3 axis = material_axis(structure, shell);
  const Vector24 growth = shell_arm_growth(points, section, axis, 1.0);
  const double reach = corner_count(shell) == 3 ? 1.0 / std::sqrt(3.0) : 1.0;
  const std::array<ShellPlace, 5> places{ShellPlace{0.0, 0.0}, ShellPlace{-reach, -reach},
                                         ShellPlace{reach, -reach}, ShellPlace{reach, reach},
                                         ShellPlace{-reach, reach}};
  std::array<StressMap, 5> maps;
  for (std::size_t i = 0; i < maps.size(); ++i)
    maps[i] = stress_map(points, section, axis, growth, places[i]);
  return maps;
}

double larger_face(const Vector6& stress)
{
  const Vector3 membrane = stress.head<3>(), bending = stress.tail<3>();
  return std::max(plane_von_mises(Vector3(membrane + bending)),
                  plane_von_mises(Vector3(membrane - bending)));
}

ShellStress shell_stress(const std::array<StressMap, 5>& maps, const Shell& shell,
                         const StageSolution& stage)
{
  const Vector24 displacement = shell_displacement(shell, stage.displacement);
  const double rise = stage.temperature_rise.empty()
                          ? 0.0
                          : stage.temperature_rise[static_cast<std::size_t>(shell.part)];
  const Vector6 centre = maps[0](displacement, rise);
  ShellStress result{.membrane = centre.head<3>(), .bending = centre.tail<3>(), .peak = 0.0};
  for (std::size_t i = 1; i < maps.size(); ++i)
    result.peak = std::max(result.peak, larger_face(maps[i](displacement, rise)));
  return result;
}

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

double plane_von_mises(const Vector3& stress)
{
  return std::sqrt(std::max(0.0, stress[0] * stress[0] + stress[1] * stress[1] -
                                     stress[0] * stress[1] + 3.0 * stress[2] * stress[2]));
}

void recover_shell_stresses(const Structure& structure, std::span<StageSolution* const> stages)
{
  for (StageSolution* stage : stages)
    stage->shell_stresses.resize(structure.shells.size());
  for (std::size_t s = 0; s < structure.shells.size(); ++s)
  {
    const std::array<StressMap, 5> maps = stress_maps(structure, structure.shells[s]);
    for (StageSolution* stage : stages)
      stage->shell_stresses[s] = shell_stress(maps, structure.shells[s], *stage);
  }
}

std::vector<ShellStress> shell_stresses_of(const Structure& structure, const StageSolution& stage)
{
  if (!stage.shell_stresses.empty())
  {
    assert(stage.shell_stresses.size() == structure.shells.size());
    return stage.shell_stresses;
  }
  std::vector<ShellStress> result;
  result.reserve(structure.shells.size());
  for (const Shell& shell : structure.shells)
    result.push_back(shell_stress(stress_maps(structure, shell), shell, stage));
  return result;
}

SurfaceStress surface_stress(const Structure& structure, const Shell& shell,
                             const ShellStress& stress)
{
  const Matrix3 frame =
      shell_frame(shell_points(structure, shell), material_axis(structure, shell));
  return {.membrane = global_tensor(frame, stress.membrane),
          .bending = global_tensor(frame, stress.bending)};
}

std::vector<PlateStress> plate_stresses(const Structure& structure, const StageSolution& stage)
{
  std::vector<PlateStress> result;
  result.reserve(structure.shells.size());
  for (const ShellStress& stress : shell_stresses_of(structure, stage))
    result.push_back({.mid = plane_von_mises(stress.membrane),
                      .inner = plane_von_mises(Vector3(stress.membrane + stress.bending)),
                      .outer = plane_von_mises(Vector3(stress.membrane - stress.bending)),
                      .peak = stress.peak});
  return result;
}
} // namespace carlin
