#pragma once

#include "carlin/output/output.hpp"

#include <filesystem>
#include <memory>
#include <string>
#include <utility>
#include <vector>

namespace carlin
{
// Files, arrays, axes and units: examples/open-structure.md.

/// vtk/: one folder a configuration, one a case in it, and contents.csv that lists them.
/// @throws IoError.
void write_vtk_results(const std::filesystem::path& folder, const RunResult& result);

/// structure.vtu and footprints.vtp of one configuration: what does not change from stage to stage.
void write_structure(const std::filesystem::path& file, const ConfigurationSolution& configuration);
void write_footprints(const std::filesystem::path& file,
                      const ConfigurationSolution& configuration);
/// tanks.vtp: tank beams; collars.vtp: collars as points.
void write_tanks(const std::filesystem::path& file, const std::vector<Tank>& tanks);
void write_collars(const std::filesystem::path& file, const std::vector<Tank>& tanks);

/// A rigid motion u(x) = translation + rotation x position.
struct RigidMotion
{
  Vector3 translation = Vector3::Zero(); ///< of the origin [m]
  Vector3 rotation = Vector3::Zero();    ///< [rad]
  Vector3 at(const Vector3& position) const { return translation + rotation.cross(position); }
};
/// Least-squares rigid motion of points. @param displacements One a point [m].
RigidMotion rigid_motion(const std::vector<Vector3>& points,
                         const std::vector<Vector3>& displacements);

/// Writes the stages of one configuration; keeps the geometry they share.
class StageWriter
{
public:
  explicit StageWriter(const ConfigurationSolution& configuration);
  ~StageWriter();
  StageWriter(const StageWriter&) = delete;
  StageWriter& operator=(const StageWriter&) = delete;

  /// Displaced structure with forces and stresses (.vtu).
  /// @return The rigid motion taken off the displacement as solved to get the shape shown.
  RigidMotion write(const std::filesystem::path& file, const StageSolution& stage) const;

private:
  struct Impl;
  std::unique_ptr<Impl> impl_;
};

/// How displacements become those of the shape shown.
struct ShownMotion
{
  std::vector<RigidMotion> at_fitting; ///< one a tank, added: mounts count motion from the fitting
  RigidMotion taken_off;               ///< of the hull as solved
};
/// Rigid motion of each tank's feet with the hull at the fitting, the first stage of a case.
std::vector<RigidMotion> motion_at_fitting(const ConfigurationSolution& configuration,
                                           const StageSolution& fitting);

/// Tanks as tubes and axes with their section forces (.vtp), and collars as points with their
/// force vectors (.vtp), of one stage at the high end of friction and grip.
/// @pre the stage has results of its mounts.
void write_stage_tanks(const std::filesystem::path& file,
                       const ConfigurationSolution& configuration, const StageSolution& stage,
                       const ShownMotion& motion);
void write_stage_collars(const std::filesystem::path& file,
                         const ConfigurationSolution& configuration, const StageSolution& stage,
                         const ShownMotion& motion);

/// A file with the text of its place in a time series or a block.
struct NamedFile
{
  std::string name; ///< of the block
  std::string file; ///< relative to the collection
};
/// .pvd: each entry is one time step of several files.
std::string pvd_text(const std::vector<std::vector<NamedFile>>& steps);
/// .vtm: files as blocks of one whole.
std::string vtm_text(const std::vector<NamedFile>& blocks);
} // namespace carlin
