#pragma once

#include "carlin/checks/checks.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// Result of all mounts in one stage at one end of the ranges of friction and grip.
struct MountsAt
{
  std::string range_end; ///< "low", "high"
  const MountStageResult* result = nullptr;
};

/// Both ends of a stage; empty where there are no tanks or the history has ended before.
std::vector<MountsAt> mounts_of(const StageSolution& stage);
} // namespace carlin
