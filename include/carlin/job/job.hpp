#pragma once

#include "carlin/output/output.hpp"

#include <functional>
#include <string>
#include <vector>

namespace carlin
{
struct JobOptions
{
  std::vector<std::string> configurations; ///< empty: all
  std::vector<std::string> cases;          ///< empty: all
  double mesh_scale = 1.0;                 ///< 0.5: half the mesh size asked in the model
};

/// One way through: configuration, lattice, structure, hull solution, mounts, recovery, checks.
/// @throws ModelError, SolveError.
RunResult run_job(const Model& model, const JobOptions& options);

/// Solves all cases of one configuration.
/// @param base_area_structure Base structure, whose shell areas weight the shape shown.
ConfigurationSolution solve_configuration(const Model& model, const Lattice& lattice,
                                          const ConfiguredCraft& craft, const Outfit& outfit,
                                          const std::vector<std::string>& cases, Audit& audit,
                                          std::vector<Timing>& timings);

/// 0 all judged checks met, 1 some not met.
int exit_status(const RunResult& result);
} // namespace carlin
