#include "named_planes.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
/// One buttock made ready: the stations where it is straight, the hull line it follows.
struct ReadyButtock
{
  const Buttock* buttock = nullptr;
  std::size_t first = 0, last = 0; ///< straight range, station planes
  std::size_t line = 0;            ///< hull line followed; 0: none
};

ReadyButtock ready(const Buttock& buttock, const HullForm& form, const StationPlanes& stations)
{
  ReadyButtock result{&buttock, 0, 0, 0};
  std::tie(result.first, result.last) = station_range(stations, buttock, buttock.from, buttock.to);
  if (buttock.follows.empty())
  {
    if (buttock.plan.empty())
      throw ModelError(buttock.where,
                       fmt::format("buttock '{}' has neither an offset, a plan nor a knuckle to "
                                   "follow",
                                   buttock.name));
    return result;
  }
  for (std::size_t line = 1; line < form.chine(); ++line)
    if (form.names()[line] == buttock.follows)
      result.line = line;
  if (result.line == 0)
    throw ModelError(buttock.where,
                     fmt::format("buttock '{}' follows '{}', which is not a point of the offsets "
                                 "between '{}' and '{}'",
                                 buttock.name, buttock.follows, form.names().front(),
                                 form.names()[form.chine()]));
  return result;
}

/// y of a plan where it meets a curve z(y) of the section; on a raked station x depends on z.
template <typename Curve>
double plan_y(const Buttock& buttock, const Section& section, const Curve& z)
{
  double y = polyline_value(buttock.plan, section.position);
  for (int turn = 0; turn < 100; ++turn)
  {
    const double next = polyline_value(buttock.plan, section.x_at(z(y)));
    if (std::abs(next - y) <= 1e-15)
      break;
    y = next; // contracts by slope of plan x rake x slope of section, far below 1
  }
  return y;
}

/// y at bottom and deck within the straight range.
Vector2 straight_offsets(const ReadyButtock& ready, const Section& section)
{
  const Buttock& buttock = *ready.buttock;
  if (ready.line > 0)
  {
    const double y = section.points[ready.line].x();
    return {y, buttock.deck_offset.value_or(y)};
  }
  const double bottom = plan_y(buttock, section, [&](double y) { return section.bottom_z(y); });
  return {bottom, buttock.deck_offset
                      ? *buttock.deck_offset
                      : plan_y(buttock, section, [&](double y) { return section.deck_z(y); })};
}

Vector2 offsets(const ReadyButtock& ready, const StationPlanes& stations, std::size_t k)
{
  const std::size_t end = std::clamp(k, ready.first, ready.last);
  const Vector2 straight = straight_offsets(ready, stations.sections[end]);
  if (end == k)
    return straight;
  const Section &at_end = stations.sections[end], &here = stations.sections[k];
  return {straight.x() / at_end.chine_point().x() * here.chine_point().x(),
          straight.y() / at_end.deck_edge().x() * here.deck_edge().x()};
}

Column column(const Section& section, const Vector2& offsets)
{
  return {{offsets.x(), section.bottom_z(offsets.x())}, {offsets.y(), section.deck_z(offsets.y())}};
}

/// First place where a buttock is not between its inner neighbour and the side.
void check_order(const ColumnPlanes& planes, const std::vector<ReadyButtock>& buttocks,
                 const StationPlanes& stations, std::vector<Problem>& problems)
{
  for (std::size_t n = 1; n + 1 < planes.names.size(); ++n)
    for (std::size_t k = 0; k < planes.columns.size(); ++k)
    {
      const Column &inner = planes.columns[k][n - 1], &here = planes.columns[k][n],
                   &side = planes.columns[k].back();
      const auto report = [&](const std::string& message) {
        problems.push_back({buttocks[n - 1].buttock->where, message});
      };
      const std::string place = station_words(stations, k);
      for (const bool at_deck : {false, true})
      {
        const double y = at_deck ? here.deck.x() : here.bottom.x();
        const double y_inner = at_deck ? inner.deck.x() : inner.bottom.x();
        const double y_side = at_deck ? side.deck.x() : side.bottom.x();
        if (y > y_inner && y < y_side)
          continue;
        if (y <= y_inner)
          report(
              fmt::format("buttock '{}' (y {:.3f} m) is not outboard of '{}' (y {:.3f} m) at {}, "
                          "{}; list buttocks from the centreline outward, none crossing another",
                          planes.names[n], y, planes.names[n - 1], y_inner, place,
                          at_deck ? "deck" : "bottom"));
        else
          report(fmt::format("buttock '{}' (y {:.3f} m) leaves the hull at {}, {} (half breadth "
                             "{:.3f} m); end its straight range before with 'from' or 'to'",
                             planes.names[n], y, place, at_deck ? "deck" : "bottom", y_side));
        k = planes.columns.size(); // one report a buttock
        break;
      }
    }
}

/// Distance of two neighbours: the least where both are straight (narrowing is then the model's own
/// doing), the largest anywhere if they are not straight together or one follows a knuckle.
void check_spacing(const ColumnPlanes& planes, const std::vector<ReadyButtock>& buttocks,
                   const StationPlanes& stations, double mesh_size, std::vector<Problem>& problems)
{
  const auto straight = [&](std::size_t n, std::size_t k)
  {
    if (n == 0 || n + 1 == planes.names.size())
      return true;
    const ReadyButtock& buttock = buttocks[n - 1];
    return buttock.line == 0 && k >= buttock.first && k <= buttock.last;
  };
  for (std::size_t n = 0; n + 1 < planes.names.size(); ++n)
  {
    double least = 1e300, largest = 0.0;
    std::size_t at_least = 0, at_largest = 0;
    for (std::size_t k = 0; k < planes.columns.size(); ++k)
    {
      const Column &inner = planes.columns[k][n], &outer = planes.columns[k][n + 1];
      const double gap =
          std::min((outer.bottom - inner.bottom).norm(), (outer.deck - inner.deck).norm());
      // Centreline and chine alone: a bow may close to a face narrower than any mesh.
      if (planes.names.size() > 2 && straight(n, k) && straight(n + 1, k) && gap < least)
        std::tie(least, at_least) = std::tie(gap, k);
      if (gap > largest)
        std::tie(largest, at_largest) = std::tie(gap, k);
    }
    const double distance = std::min(least, largest);
    if (distance >= 0.25 * mesh_size)
      continue;
    const FileLocation& where = buttocks.empty()
                                    ? FileLocation{}
                                    : buttocks[std::min(n, buttocks.size() - 1)].buttock->where;
    problems.push_back(
        {where, fmt::format("buttocks '{}' and '{}' are {:.1f} mm apart at {}, nearer than a "
                            "quarter of the mesh size ({:.1f} mm); make them one, end a straight "
                            "range, or ask a finer mesh",
                            planes.names[n], planes.names[n + 1], 1e3 * distance,
                            station_words(stations, least < 1e300 ? at_least : at_largest),
                            250.0 * mesh_size)});
  }
}
} // namespace

ColumnPlanes column_planes(const Hull& hull, const HullForm& form, const StationPlanes& stations,
                           double mesh_size)
{
  std::vector<ReadyButtock> buttocks;
  for (const Buttock& buttock : hull.buttocks)
    buttocks.push_back(ready(buttock, form, stations));
  ColumnPlanes planes;
  planes.names.emplace_back("centreline");
  for (const Buttock& buttock : hull.buttocks)
    planes.names.push_back(buttock.name);
  planes.names.emplace_back("chine");
  for (std::size_t k = 0; k < stations.sections.size(); ++k)
  {
    const Section& section = stations.sections[k];
    std::vector<Column> columns{column(section, Vector2::Zero())};
    for (const ReadyButtock& buttock : buttocks)
      columns.push_back(column(section, offsets(buttock, stations, k)));
    columns.push_back({section.chine_point(), section.deck_edge()});
    planes.columns.push_back(std::move(columns));
  }
  std::vector<Problem> problems;
  check_order(planes, buttocks, stations, problems);
  if (problems.empty())
    check_spacing(planes, buttocks, stations, mesh_size, problems);
  if (!problems.empty())
    throw ModelError(std::move(problems));
  return planes;
}
} // namespace carlin
