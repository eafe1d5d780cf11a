#pragma once

#include "carlin/checks/checks.hpp"

#include <filesystem>
#include <iosfwd>
#include <string>
#include <vector>

namespace carlin
{
/// Figures that say whether a run can be trusted, printed with every run.
struct Audit
{
  double largest_pin_reaction = 0.0;    ///< over the load [-]
  double largest_solver_residual = 0.0; ///< |K u - f| / |f| [-]
  double largest_force_imbalance = 0.0; ///< applied forces of a floating hull, over the load [-]
  double largest_mount_residual = 0.0;  ///< [-]
  double displacement_stated = 0.0;     ///< [kg]; 0: none stated
  double displacement_modelled = 0.0;   ///< of the base [kg]
};

struct Timing
{
  std::string stage;
  double seconds = 0.0;
};

/// Everything a run found.
struct RunResult
{
  Model model;
  std::vector<ConfigurationSolution> configurations; ///< base first
  std::vector<Check> checks;                         ///< of all configurations, worst first
  MeshQuality quality;
  Audit audit;
  std::vector<Timing> timings;
  std::string command_line;
};

/// Table of checks, at most 100 columns, worst first: not met and not judged, and met from half of
/// the limit on; of configurations only shown those not met. Counts met, not met, not judged. Only
/// checks of `judged` configurations count; those shown are marked.
void print_checks(std::ostream& out, const RunResult& result);
void print_quality(std::ostream& out, const MeshQuality& quality);
void print_masses(std::ostream& out, const RunResult& result);
void print_stiffness(std::ostream& out, const RunResult& result);
void print_audit(std::ostream& out, const RunResult& result);

/// Writes checks.csv, stiffness.csv, collars.csv, masses.csv, joints.csv, run.json and vtk/... into
/// a temporary folder beside `folder` and moves it into place whole. Arrays: see
/// examples/open-structure.md.
/// @throws IoError; nothing of an earlier good result is lost then.
void write_results(const std::filesystem::path& folder, const RunResult& result);

/// Lattice, named planes, parts and feet of every configuration, before solving (VTK).
void write_drawing(const std::filesystem::path& folder, const Model& model, const Lattice& lattice,
                   const std::vector<std::pair<ConfiguredCraft, Mesh>>& meshes);
} // namespace carlin
