#include "mass_changes.hpp"

#include <algorithm>

namespace carlin
{
namespace
{
void add(MassRow& row, std::size_t configuration, double mass, const Vector3& centre)
{
  double& sum = row.masses[configuration];
  Vector3& mean = row.centres[configuration];
  const double together = sum + mass;
  if (together > 0.0)
    mean = (sum * mean + mass * centre) / together;
  sum = together;
}

MassRow& row_of(std::vector<MassRow>& rows, const std::string& group, const std::string& name,
                std::size_t configurations)
{
  const auto found = std::ranges::find_if(rows, [&](const MassRow& row)
                                          { return row.group == group && row.name == name; });
  if (found != rows.end())
    return *found;
  rows.push_back({group, name, std::vector<double>(configurations, 0.0),
                  std::vector<Vector3>(configurations, Vector3::Zero())});
  return rows.back();
}

void add_row(MassRow& sum, const MassRow& row)
{
  for (std::size_t c = 0; c < row.masses.size(); ++c)
    add(sum, c, row.masses[c], row.centres[c]);
}
} // namespace

std::vector<MassRow> mass_rows(const std::vector<ConfigurationSolution>& configurations)
{
  std::vector<MassRow> rows;
  for (std::size_t c = 0; c < configurations.size(); ++c)
    for (const MassEntry& entry : configurations[c].mass_account)
      add(row_of(rows, entry.group, entry.name, configurations.size()), c, entry.mass,
          entry.centre);
  return rows;
}

std::vector<MassRow> by_group(const std::vector<MassRow>& rows)
{
  std::vector<MassRow> groups;
  for (const MassRow& row : rows)
    add_row(row_of(groups, row.group, "", row.masses.size()), row);
  return groups;
}

MassRow total_of(const std::vector<MassRow>& rows)
{
  const std::size_t configurations = rows.empty() ? 0 : rows.front().masses.size();
  MassRow total{"total", "total", std::vector<double>(configurations, 0.0),
                std::vector<Vector3>(configurations, Vector3::Zero())};
  for (const MassRow& row : rows)
    add_row(total, row);
  return total;
}
} // namespace carlin
