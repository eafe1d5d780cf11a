#pragma once

#include "carlin/job/job.hpp"

#include <string>

/// Runs a model file of tests/verification/models through the program's own path, and reads results
/// by name.
namespace chain
{
struct Run
{
  carlin::RunResult result;

  const carlin::ConfigurationSolution& first() const { return result.configurations.front(); }
  /// Stage by name of the first case (or of the named one).
  const carlin::StageSolution& stage(const std::string& name,
                                     const std::string& load_case = "") const;
  /// Displacement (3 translations, 3 rotations) of a frame point.
  carlin::Vector6 displacement(const std::string& point, const std::string& stage_name) const;
  /// Reaction of supports at a frame point: forces and moments of the support on the structure.
  carlin::Vector6 reaction(const std::string& point, const std::string& stage_name) const;
  /// Mounts of the first tank (slides and grips at the high end).
  const carlin::CollarResult& collar(const std::string& name, const std::string& stage_name,
                                     carlin::Index tank = 0) const;
  const carlin::TankResult& tank(const std::string& stage_name, carlin::Index tank = 0) const;
};

/// @param name File name under tests/verification/models, without ".yaml".
Run run(const std::string& name);
/// @param text Model text.
Run run_text(const std::string& text);
} // namespace chain
