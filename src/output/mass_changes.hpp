#pragma once

#include "carlin/checks/checks.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// Row of the mass account over all configurations.
struct MassRow
{
  std::string group, name;
  std::vector<double> masses;   ///< one a configuration [kg]; 0 where it is not aboard
  std::vector<Vector3> centres; ///< of them [m]; zero where nothing is aboard
};

/// Rows by group and name, in the order of their first appearance (base first).
std::vector<MassRow> mass_rows(const std::vector<ConfigurationSolution>& configurations);
/// Rows of one group added up.
std::vector<MassRow> by_group(const std::vector<MassRow>& rows);
/// All rows added up, named "total".
MassRow total_of(const std::vector<MassRow>& rows);
} // namespace carlin
