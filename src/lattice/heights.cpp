#include "named_planes.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
/// One height made ready: where it is level, the hull line it follows.
struct ReadyHeight
{
  const Height* height = nullptr;
  std::size_t first = 0, last = 0; ///< stations where it is level
  std::size_t out_to = 0;          ///< outermost named buttock where it is level
  std::size_t line = 0;            ///< hull line followed; 0: none

  bool is_level(std::size_t k, std::size_t n) const
  {
    return k >= first && k <= last && n <= out_to;
  }
};

ReadyHeight ready(const Height& height, const HullForm& form, const StationPlanes& stations,
                  const std::vector<std::string>& buttocks)
{
  ReadyHeight result{&height, 0, 0, buttocks.size() - 1, 0};
  std::tie(result.first, result.last) = station_range(stations, height, height.from, height.to);
  if (!height.out_to.empty())
  {
    const auto found = std::ranges::find(buttocks, height.out_to);
    if (found == buttocks.end())
      throw ModelError(height.where, fmt::format("height '{}': there is no buttock '{}'",
                                                 height.name, height.out_to));
    result.out_to = static_cast<std::size_t>(found - buttocks.begin());
  }
  if (height.follows.empty())
  {
    if (height.profile.empty())
      throw ModelError(height.where, fmt::format("height '{}' has neither a level, a profile nor a "
                                                 "knuckle to follow",
                                                 height.name));
    return result;
  }
  for (std::size_t line = form.chine() + 1; line + 1 < form.names().size(); ++line)
    if (form.names()[line] == height.follows)
      result.line = line;
  if (result.line == 0)
    throw ModelError(height.where,
                     fmt::format("height '{}' follows '{}', which is not a point of the offsets "
                                 "between '{}' and '{}'",
                                 height.name, height.follows, form.names()[form.chine()],
                                 form.names().back()));
  if (result.out_to + 1 != buttocks.size())
    throw ModelError(height.where, fmt::format("height '{}' follows a knuckle of the side and so "
                                               "runs out to 'chine'; leave 'out_to' away",
                                               height.name));
  return result;
}

double level_z(const ReadyHeight& ready, const Section& section)
{
  if (ready.line > 0)
    return section.points[ready.line].y();
  double z = polyline_value(ready.height->profile, section.position);
  for (int turn = 0; turn < 100; ++turn)
  {
    const double next = polyline_value(ready.height->profile, section.x_at(z));
    if (std::abs(next - z) <= 1e-15)
      break;
    z = next; // contracts by slope of profile x rake
  }
  return z;
}

/// Resolves heights, node by node of stations and named buttocks. Index 0 is the bottom, the last
/// the deck, those between are `heights`.
class Levels
{
public:
  Levels(const std::vector<ReadyHeight>& heights, const StationPlanes& stations,
         const ColumnPlanes& columns)
      : heights_(heights), columns_(columns)
  {
    for (const ReadyHeight& height : heights)
    {
      std::vector<double>& z = level_.emplace_back();
      for (const Section& section : stations.sections)
        z.push_back(level_z(height, section));
    }
  }

  std::vector<double> at(std::size_t k, std::size_t n) const
  {
    const std::size_t last = heights_.size() + 1;
    std::vector<double> z(last + 1);
    z.front() = columns_.columns[k][n].bottom.y();
    z.back() = columns_.columns[k][n].deck.y();
    std::size_t lower = 0;
    for (std::size_t h = 1; h <= last; ++h)
    {
      if (h < last && !heights_[h - 1].is_level(k, n))
        continue;
      if (h < last)
        z[h] = level_[h - 1][k];
      for (std::size_t between = lower + 1; between < h; ++between)
        z[between] = z[lower] + kept_fraction(between, lower, h, k, n) * (z[h] - z[lower]);
      lower = h;
    }
    return z;
  }

private:
  /// Fraction of height h between two others at the node where h was last level.
  double kept_fraction(std::size_t h, std::size_t lower, std::size_t upper, std::size_t k,
                       std::size_t n) const
  {
    const ReadyHeight& height = heights_[h - 1];
    const std::size_t k_end = std::clamp(k, height.first, height.last);
    const std::size_t n_end = std::min(n, height.out_to);
    const double below = fraction(lower, k_end, n_end), above = fraction(upper, k_end, n_end);
    return (fraction(h, k_end, n_end) - below) / (above - below);
  }

  /// Height as a fraction from bottom to deck; where not level, that of its own end.
  double fraction(std::size_t h, std::size_t k, std::size_t n) const
  {
    if (h == 0)
      return 0.0;
    if (h == heights_.size() + 1)
      return 1.0;
    const ReadyHeight& height = heights_[h - 1];
    k = std::clamp(k, height.first, height.last);
    n = std::min(n, height.out_to);
    const Column& column = columns_.columns[k][n];
    return (level_[h - 1][k] - column.bottom.y()) / (column.deck.y() - column.bottom.y());
  }

  const std::vector<ReadyHeight>& heights_;
  const ColumnPlanes& columns_;
  std::vector<std::vector<double>> level_; ///< [height][station]
};

std::string node_words(const StationPlanes& stations, const ColumnPlanes& columns, std::size_t k,
                       std::size_t n)
{
  return fmt::format("{}, buttock '{}'", station_words(stations, k), columns.names[n]);
}

/// First node where a height is not above its lower neighbour, for every height.
void check_order(const HeightPlanes& planes, const std::vector<ReadyHeight>& heights,
                 const StationPlanes& stations, const ColumnPlanes& columns,
                 std::vector<Problem>& problems)
{
  for (std::size_t h = 1; h < planes.names.size(); ++h)
  {
    const ReadyHeight& named = heights[std::min(h, heights.size()) - 1];
    bool reported = false;
    for (std::size_t k = 0; k < planes.z.size() && !reported; ++k)
      for (std::size_t n = 0; n < planes.z[k].size() && !reported; ++n)
      {
        const double lower = planes.z[k][n][h - 1], upper = planes.z[k][n][h];
        if (upper > lower)
          continue;
        reported = true;
        problems.push_back(
            {named.height->where,
             fmt::format("height '{}' (z {:.3f} m) is not above '{}' (z {:.3f} m) at {}; list "
                         "heights from the bottom upward, and end one that meets the bottom at an "
                         "inner buttock ('out_to') or station ('from', 'to')",
                         planes.names[h], upper, planes.names[h - 1], lower,
                         node_words(stations, columns, k, n))});
      }
  }
}

/// Distance along the column where both are level; see the same check of buttocks.
void check_spacing(const HeightPlanes& planes, const std::vector<ReadyHeight>& heights,
                   const StationPlanes& stations, const ColumnPlanes& columns, double mesh_size,
                   std::vector<Problem>& problems)
{
  const auto level = [&](std::size_t h, std::size_t k, std::size_t n)
  {
    if (h == 0 || h + 1 == planes.names.size())
      return true;
    return heights[h - 1].line == 0 && heights[h - 1].is_level(k, n);
  };
  for (std::size_t h = 0; h + 1 < planes.names.size() && !heights.empty(); ++h)
  {
    double least = 1e300, largest = 0.0;
    std::string place, place_of_largest;
    for (std::size_t k = 0; k < planes.z.size(); ++k)
      for (std::size_t n = 0; n < planes.z[k].size(); ++n)
      {
        const double gap = planes.z[k][n][h + 1] - planes.z[k][n][h];
        if (level(h, k, n) && level(h + 1, k, n) && gap < std::min(least, 0.25 * mesh_size))
          std::tie(least, place) = std::make_pair(gap, node_words(stations, columns, k, n));
        largest = std::max(largest, gap);
      }
    const double distance = std::min(least, largest);
    if (distance >= 0.25 * mesh_size)
      continue;
    const std::string at = place.empty() ? "most" : place;
    problems.push_back(
        {heights[std::min(h, heights.size() - 1)].height->where,
         fmt::format(
             "heights '{}' and '{}' are {:.1f} mm apart at {}, nearer than a quarter of the "
             "mesh size ({:.1f} mm); make them one, end a level range, or ask a finer mesh",
             planes.names[h], planes.names[h + 1], 1e3 * distance, at, 250.0 * mesh_size)});
  }
}
} // namespace

HeightPlanes height_planes(const Hull& hull, const HullForm& form, const StationPlanes& stations,
                           const ColumnPlanes& columns, double mesh_size)
{
  std::vector<ReadyHeight> heights;
  for (const Height& height : hull.heights)
    heights.push_back(ready(height, form, stations, columns.names));
  HeightPlanes planes;
  planes.names.emplace_back("bottom");
  for (const Height& height : hull.heights)
    planes.names.push_back(height.name);
  planes.names.emplace_back("deck");
  const Levels levels(heights, stations, columns);
  for (std::size_t k = 0; k < stations.sections.size(); ++k)
  {
    std::vector<std::vector<double>>& here = planes.z.emplace_back();
    for (std::size_t n = 0; n < columns.names.size(); ++n)
      here.push_back(levels.at(k, n));
  }
  std::vector<Problem> problems;
  if (!heights.empty()) // without any, section() has seen that the deck is above the chine
    check_order(planes, heights, stations, columns, problems);
  if (problems.empty())
    check_spacing(planes, heights, stations, columns, mesh_size, problems);
  if (!problems.empty())
    throw ModelError(std::move(problems));
  return planes;
}
} // namespace carlin
