#include "hull_form.hpp"

#include "carlin/core/error.hpp"
#include "carlin/lattice/dimensions.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
constexpr double keel_tolerance = 1e-6; // of a keel point off the centreline [m]

std::vector<std::string> line_names(const HullOffsets& offsets)
{
  if (offsets.stations.size() < 2)
    throw ModelError(offsets.where, "offsets: there are fewer than two stations; give at least the "
                                    "transom and the stem");
  std::vector<std::string> names;
  for (const OffsetPoint& point : offsets.stations.front().points)
    names.push_back(point.name);
  for (const OffsetStation& station : offsets.stations)
  {
    const bool same = std::ranges::equal(station.points, names, {}, &OffsetPoint::name);
    if (!same)
      throw ModelError(station.where,
                       fmt::format("offsets: station '{}' does not have the points of station '{}' "
                                   "in the same order; every station needs the same names",
                                   station.name, offsets.stations.front().name));
    if (std::abs(station.points.front().position.y()) > keel_tolerance)
      throw ModelError(station.where,
                       fmt::format("offsets: point '{}' of station '{}' has y {:g} m; the first "
                                   "point of a section lies on the centreline",
                                   names.front(), station.name,
                                   station.points.front().position.y()));
  }
  return names;
}
} // namespace

double Section::bottom_z(double y) const
{
  std::size_t i = 0;
  while (i + 1 < chine && y > points[i + 1].x())
    ++i;
  const Vector2 &inner = points[i], &outer = points[i + 1];
  if (y == outer.x())
    return outer.y();
  return inner.y() + (outer.y() - inner.y()) * ((y - inner.x()) / (outer.x() - inner.x()));
}

double Section::side_y(double z) const
{
  std::size_t i = chine;
  while (i + 2 < points.size() && z > points[i + 1].y())
    ++i;
  const Vector2 &lower = points[i], &upper = points[i + 1];
  if (z == upper.y())
    return upper.x();
  return lower.x() + (upper.x() - lower.x()) * ((z - lower.y()) / (upper.y() - lower.y()));
}

double Section::deck_z(double y) const
{
  const Vector2& edge = deck_edge();
  return edge.y() + deck_curvature * (edge.x() * edge.x() - y * y);
}

HullForm::HullForm(const Hull& hull)
{
  assert(hull.offsets.has_value() != hull.dimensions.has_value());
  const HullOffsets offsets =
      hull.offsets ? *hull.offsets : offsets_from_dimensions(*hull.dimensions);
  where_ = offsets.where;
  names_ = line_names(offsets);
  const auto chine = std::ranges::find(names_, offsets.chine);
  if (chine == names_.end() || chine == names_.begin() || chine + 1 == names_.end())
    throw ModelError(where_, fmt::format("offsets.chine: '{}' is not a point between the first and "
                                         "the last; points are {}",
                                         offsets.chine, fmt::join(names_, ", ")));
  chine_ = static_cast<std::size_t>(chine - names_.begin());
  double widest = 0.0, aft = 1e300, forward = -1e300;
  for (const OffsetStation& station : offsets.stations)
  {
    widest = std::max(widest, station.points.back().position.y());
    for (const OffsetPoint& point : station.points)
    {
      aft = std::min(aft, point.position.x());
      forward = std::max(forward, point.position.x());
    }
  }
  if (widest <= 0.0)
    throw ModelError(where_, fmt::format("offsets: point '{}' has no positive y at any station; "
                                         "points are those of the port side",
                                         names_.back()));
  length_ = forward - aft;
  deck_curvature_ = hull.deck_camber / (widest * widest);
  for (std::size_t line = 0; line < names_.size(); ++line)
    add_line(offsets, line);
}

void HullForm::add_line(const HullOffsets& offsets, std::size_t line)
{
  std::vector<double> x, y, z;
  for (const OffsetStation& station : offsets.stations)
  {
    const Vector3& position = station.points[line].position;
    if (!x.empty() && position.x() <= x.back())
      throw ModelError(
          station.where,
          fmt::format("offsets: point '{}' of station '{}' is at x {:g} m, not forward "
                      "of the station before it (x {:g} m); list stations from aft",
                      names_[line], station.name, position.x(), x.back()));
    x.push_back(position.x());
    y.push_back(line == 0 ? 0.0 : position.y());
    z.push_back(position.z());
  }
  x_.push_back(x);
  y_.emplace_back(x, std::move(y), offsets.fairing);
  z_.emplace_back(std::move(x), std::move(z), offsets.fairing);
}

double HullForm::crossing(std::size_t line, double position, double slope) const
{
  const double reach = 0.002 * length_;
  const auto ahead = [&](double x) { return x - position - slope * z_[line](x); };
  std::vector<double> x{x_[line].front() - reach};
  x.insert(x.end(), x_[line].begin(), x_[line].end());
  x.push_back(x_[line].back() + reach);
  double low = x.front();
  for (const double high : x)
  {
    const double value = ahead(high);
    if (std::abs(value) <= 1e-12 * length_)
      return high;
    if (value > 0.0 && high > x.front())
    {
      double a = low, b = high, middle = 0.5 * (a + b);
      while (a < middle && middle < b) // down to neighbouring numbers
      {
        (ahead(middle) < 0.0 ? a : b) = middle;
        middle = 0.5 * (a + b);
      }
      return middle;
    }
    if (value > 0.0)
      break;
    low = high;
  }
  throw ValueError(fmt::format("the plane misses the hull line '{}', which runs from x {:.3f} m to "
                               "x {:.3f} m; the plane is at x {:.3f} m there",
                               names_[line], x_[line].front(), x_[line].back(),
                               position + slope * z_[line](position)));
}

Section HullForm::section(double position, double slope) const
{
  Section section{position, slope, {}, chine_, deck_curvature_};
  for (std::size_t line = 0; line < names_.size(); ++line)
  {
    const double x = crossing(line, position, slope);
    section.points.emplace_back(y_[line](x), z_[line](x));
  }
  for (std::size_t line = 0; line + 1 < names_.size(); ++line)
  {
    const bool bottom = line < chine_;
    const Vector2 step = section.points[line + 1] - section.points[line];
    if ((bottom ? step.x() : step.y()) <= 0.0)
      throw ValueError(fmt::format("the {} does not go {} from '{}' to '{}' there (y {:.4f} to "
                                   "{:.4f} m, z {:.4f} to {:.4f} m)",
                                   bottom ? "bottom" : "side", bottom ? "outward" : "upward",
                                   names_[line], names_[line + 1], section.points[line].x(),
                                   section.points[line + 1].x(), section.points[line].y(),
                                   section.points[line + 1].y()));
  }
  return section;
}
} // namespace carlin
