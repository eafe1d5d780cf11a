#include "named_planes.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
/// Distances along x between two sections, one a hull line.
std::vector<double> distances(const Section& aft, const Section& forward)
{
  std::vector<double> result;
  for (std::size_t line = 0; line < aft.points.size(); ++line)
    result.push_back(forward.x_at(forward.points[line].y()) - aft.x_at(aft.points[line].y()));
  return result;
}

std::vector<Section> named_sections(const Hull& hull, const HullForm& form)
{
  std::vector<Section> sections;
  std::vector<Problem> problems;
  for (const Station& station : hull.stations)
    try
    {
      sections.push_back(form.section(station.position, std::tan(station.rake)));
    }
    catch (const ValueError& error)
    {
      problems.push_back(
          {station.where, fmt::format("station '{}': {}", station.name, error.what())});
    }
  if (!problems.empty())
    throw ModelError(std::move(problems));
  return sections;
}

void check_spacing(const Hull& hull, const HullForm& form, const std::vector<Section>& sections,
                   double mesh_size)
{
  std::vector<Problem> problems;
  for (std::size_t n = 0; n + 1 < sections.size(); ++n)
  {
    const std::vector<double> gaps = distances(sections[n], sections[n + 1]);
    const auto least = std::ranges::min_element(gaps);
    if (*least >= 0.25 * mesh_size)
      continue;
    const Station &aft = hull.stations[n], &forward = hull.stations[n + 1];
    const std::string& line = form.names()[static_cast<std::size_t>(least - gaps.begin())];
    const std::string what =
        *least <= 0.0 ? fmt::format("station '{}' is not forward of station '{}' at '{}'",
                                    forward.name, aft.name, line)
                      : fmt::format("stations '{}' and '{}' are {:.1f} mm apart at '{}', nearer "
                                    "than a quarter of the mesh size ({:.1f} mm)",
                                    aft.name, forward.name, 1e3 * *least, line, 250.0 * mesh_size);
    problems.push_back(
        {forward.where, what + (*least <= 0.0 ? "; list stations from aft, none crossing another"
                                              : "; make them one or ask a finer mesh")});
  }
  if (!problems.empty())
    throw ModelError(std::move(problems));
}
} // namespace

Index divisions(double length, double mesh_size)
{
  // The margin keeps 1.2 m / 0.1 m at 12 whatever the last binary digit.
  return std::max<Index>(1, static_cast<Index>(std::ceil(length / mesh_size - 1e-6)));
}

StationPlanes station_planes(const Hull& hull, const HullForm& form, double mesh_size)
{
  if (hull.stations.size() < 2)
    throw ModelError(form.where(), "stations: there are fewer than two; the first and the last "
                                   "close the hull");
  const std::vector<Section> named = named_sections(hull, form);
  check_spacing(hull, form, named, mesh_size);
  StationPlanes planes;
  for (std::size_t n = 0; n + 1 < named.size(); ++n)
  {
    const Station& station = hull.stations[n];
    planes.named.push_back({station.name, std::ssize(planes.sections)});
    planes.sections.push_back(named[n]);
    const Section &aft = named[n], &forward = named[n + 1];
    const Index parts = divisions(std::ranges::max(distances(aft, forward)), mesh_size);
    for (Index part = 1; part < parts; ++part)
    {
      const double s = static_cast<double>(part) / static_cast<double>(parts);
      try
      {
        planes.sections.push_back(form.section(aft.position + s * (forward.position - aft.position),
                                               aft.slope + s * (forward.slope - aft.slope)));
      }
      catch (const ValueError& error)
      {
        throw ModelError(station.where,
                         fmt::format("between stations '{}' and '{}': {}", station.name,
                                     hull.stations[n + 1].name, error.what()));
      }
    }
  }
  planes.named.push_back({hull.stations.back().name, std::ssize(planes.sections)});
  planes.sections.push_back(named.back());
  return planes;
}

std::string station_words(const StationPlanes& stations, std::size_t station)
{
  const auto index = static_cast<Index>(station);
  const auto next = std::ranges::lower_bound(stations.named, index, {}, &GridPlane::index);
  if (next->index == index)
    return fmt::format("station '{}'", next->name);
  return fmt::format("a station between '{}' and '{}'", (next - 1)->name, next->name);
}

std::pair<std::size_t, std::size_t> station_range(const StationPlanes& stations, const Named& plane,
                                                  const std::string& from, const std::string& to)
{
  const auto find = [&](const std::string& name, const GridPlane& otherwise)
  {
    if (name.empty())
      return static_cast<std::size_t>(otherwise.index);
    const auto found = std::ranges::find(stations.named, name, &GridPlane::name);
    if (found == stations.named.end())
      throw ModelError(plane.where,
                       fmt::format("'{}': there is no station '{}'", plane.name, name));
    return static_cast<std::size_t>(found->index);
  };
  const std::size_t first = find(from, stations.named.front());
  const std::size_t last = find(to, stations.named.back());
  if (first > last)
    throw ModelError(plane.where, fmt::format("'{}': station '{}' is forward of '{}'; write the "
                                              "aft one first",
                                              plane.name, from, to));
  return {first, last};
}
} // namespace carlin
