#include "carlin/lattice/mesh.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
constexpr double on_plane = 1e-3; // a point this near a station is said to be at it [m]

/// Two decimals, never "-0.00".
std::string metres(double value)
{
  return fmt::format("{:.2f}", std::round(value * 100.0) / 100.0 + 0.0);
}

/// How far forward of a station plane [m].
double ahead(const NamedPlane& station, const Vector3& position)
{
  return position.x() - station.x_at_base - position.z() * std::tan(station.rake);
}

std::string between_stations(const std::vector<NamedPlane>& stations, const Vector3& position)
{
  const auto nearest = std::ranges::min_element(
      stations, {}, [&](const NamedPlane& station) { return std::abs(ahead(station, position)); });
  if (std::abs(ahead(*nearest, position)) <= on_plane)
    return "at " + nearest->name;
  const auto next = std::ranges::find_if(stations, [&](const NamedPlane& station)
                                         { return ahead(station, position) < 0.0; });
  if (next == stations.begin())
    return "aft of " + next->name;
  if (next == stations.end())
    return "forward of " + stations.back().name;
  return fmt::format("between {} and {}", (next - 1)->name, next->name);
}
} // namespace

Index Mesh::part_index(const std::string& name) const
{
  const auto found = std::ranges::find(parts, name, &MeshPart::name);
  return found == parts.end() ? -1 : found - parts.begin();
}

std::string Mesh::place(const Vector3& position) const
{
  std::string words = fmt::format("x {} m, y {} m, z {} m", metres(position.x()),
                                  metres(position.y()), metres(position.z()));
  if (!stations.empty())
    words += ", " + between_stations(stations, position);
  return words;
}
} // namespace carlin
