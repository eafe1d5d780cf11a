#pragma once

#include "regime.hpp"

namespace carlin::mounts
{
/// What has been counted since the fitting.
struct Counters
{
  double work_lost = 0.0;
  int events = 0;
  std::vector<bool> has_slipped; ///< of each slide
};

MountStageResult make_result(const Model& model, const std::vector<Tank>& tanks,
                             const MountStage& stage, const Position& position,
                             const Counters& counters);
} // namespace carlin::mounts
