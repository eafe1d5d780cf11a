#include "grid.hpp"

#include "named_planes.hpp"

#include "carlin/core/error.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <optional>

namespace carlin
{
namespace
{
std::string name_at(const std::vector<GridPlane>& planes, Index index)
{
  const auto next = std::ranges::lower_bound(planes, index, {}, &GridPlane::index);
  if (next->index == index)
    return fmt::format("'{}'", next->name);
  return fmt::format("between '{}' and '{}'", (next - 1)->name, next->name);
}

/// Divides the intervals between named planes; `lengths` one an interval.
std::vector<GridPlane> divided(const std::vector<std::string>& names,
                               const std::vector<double>& lengths, double mesh_size)
{
  std::vector<GridPlane> planes{{names.front(), 0}};
  for (std::size_t n = 0; n < lengths.size(); ++n)
    planes.push_back({names[n + 1], planes.back().index + divisions(lengths[n], mesh_size)});
  return planes;
}

/// Share of each station plane in a mean over the length: half the way to its neighbours.
std::vector<double> station_weights(const std::vector<Section>& sections)
{
  std::vector<double> weights(sections.size(), 0.0);
  const auto x = [&](std::size_t k) { return sections[k].x_at(sections[k].deck_edge().y()); };
  const double length = x(sections.size() - 1) - x(0);
  for (std::size_t k = 0; k + 1 < sections.size(); ++k)
    for (const std::size_t end : {k, k + 1})
      weights[end] += 0.5 * (x(k + 1) - x(k)) / length;
  return weights;
}

/// Mean breadths of the intervals between named buttocks, over the length; bottom or deck,
/// whichever is wider.
std::vector<double> mean_breadths(const ColumnPlanes& planes, const std::vector<double>& weights)
{
  std::vector<double> result;
  for (std::size_t n = 0; n + 1 < planes.names.size(); ++n)
  {
    double bottom = 0.0, deck = 0.0;
    for (std::size_t k = 0; k < weights.size(); ++k)
    {
      const Column &inner = planes.columns[k][n], &outer = planes.columns[k][n + 1];
      bottom += weights[k] * (outer.bottom - inner.bottom).norm();
      deck += weights[k] * (outer.deck - inner.deck).norm();
    }
    result.push_back(std::max(bottom, deck));
  }
  return result;
}

/// Mean heights of the intervals between named heights, over the length, on the column where the
/// interval is highest.
std::vector<double> mean_heights(const HeightPlanes& planes, const std::vector<double>& weights)
{
  std::vector<double> result;
  for (std::size_t h = 0; h + 1 < planes.names.size(); ++h)
  {
    double highest = 0.0;
    for (std::size_t n = 0; n < planes.z.front().size(); ++n)
    {
      double mean = 0.0;
      for (std::size_t k = 0; k < weights.size(); ++k)
        mean += weights[k] * (planes.z[k][n][h + 1] - planes.z[k][n][h]);
      highest = std::max(highest, mean);
    }
    result.push_back(highest);
  }
  return result;
}

/// z of all points of a column from those of the named heights.
std::vector<double> divided_heights(const std::vector<double>& named,
                                    const std::vector<GridPlane>& planes)
{
  std::vector<double> z;
  for (std::size_t h = 0; h + 1 < planes.size(); ++h)
  {
    const Index parts = planes[h + 1].index - planes[h].index;
    for (Index part = 0; part < parts; ++part)
      z.push_back(named[h] + (named[h + 1] - named[h]) *
                                 (static_cast<double>(part) / static_cast<double>(parts)));
  }
  z.push_back(named.back());
  return z;
}

/// One station plane being filled: (y, z) by column of the port half and height.
class StationFiller
{
public:
  StationFiller(Grid& grid, const Section& section, Index k)
      : grid_(grid), section_(section), k_(k), y_(static_cast<std::size_t>(grid.cells[across] + 1))
  {
  }

  void fill(const std::vector<Column>& columns, const std::vector<std::vector<double>>& named_z)
  {
    const std::vector<GridPlane>& planes = grid_.planes[across];
    for (std::size_t n = 0; n < columns.size(); ++n)
      fill_named(planes[n].index, columns[n], named_z[n], n + 1 == columns.size());
    for (std::size_t n = 0; n + 1 < columns.size(); ++n)
    {
      const Index parts = planes[n + 1].index - planes[n].index;
      for (Index part = 1; part < parts; ++part)
        fill_between(planes[n].index, planes[n + 1].index, part, named_z[n], named_z[n + 1]);
    }
  }

private:
  void fill_named(Index i, const Column& column, const std::vector<double>& named_z, bool is_side)
  {
    const std::vector<double> z = divided_heights(named_z, grid_.planes[up]);
    std::vector<double>& y = y_[static_cast<std::size_t>(i)];
    const double rise = column.deck.y() - column.bottom.y();
    for (const double height : z)
      y.push_back(is_side ? section_.side_y(height)
                          : column.bottom.x() + (column.deck.x() - column.bottom.x()) *
                                                    ((height - column.bottom.y()) / rise));
    y.front() = column.bottom.x();
    y.back() = column.deck.x();
    place(i, y, z);
  }

  /// Bottom and deck on their curves, heights straight between the named columns.
  void fill_between(Index inner, Index outer, Index part, const std::vector<double>& inner_z,
                    const std::vector<double>& outer_z)
  {
    const double s = static_cast<double>(part) / static_cast<double>(outer - inner);
    const std::vector<double>&y_inner = y_[static_cast<std::size_t>(inner)],
          &y_outer = y_[static_cast<std::size_t>(outer)];
    std::vector<double> y;
    for (std::size_t j = 0; j < y_inner.size(); ++j)
      y.push_back(y_inner[j] + s * (y_outer[j] - y_inner[j]));
    std::vector<double> named_z;
    for (std::size_t h = 0; h < inner_z.size(); ++h)
      named_z.push_back(inner_z[h] + s * (outer_z[h] - inner_z[h]));
    named_z.front() = section_.bottom_z(y.front());
    named_z.back() = section_.deck_z(y.back());
    place(inner + part, y, divided_heights(named_z, grid_.planes[up]));
  }

  void place(Index i, const std::vector<double>& y, const std::vector<double>& z)
  {
    for (std::size_t j = 0; j < y.size(); ++j)
    {
      const GridPlace port{i, static_cast<Index>(j), k_};
      const double x = section_.x_at(z[j]);
      grid_.points[static_cast<std::size_t>(grid_.point(mirrored(port)))] = {x, -y[j], z[j]};
      grid_.points[static_cast<std::size_t>(grid_.point(port))] = {x, y[j], z[j]};
    }
  }

  Grid& grid_;
  const Section& section_;
  Index k_;
  std::vector<std::vector<double>> y_; ///< by column; of named columns
};

/// Whether the cell block at `lowest` has a corner that is not right-handed.
bool is_folded(const Grid& grid, const GridPlace& lowest)
{
  for (const Index a : {0, 1})
    for (const Index b : {0, 1})
      for (const Index c : {0, 1})
      {
        const GridPlace corner{lowest[across] + a, lowest[up] + b, lowest[along] + c};
        const Vector3& p = grid.position(corner);
        const Vector3 i = grid.position({lowest[across] + 1 - a, corner[up], corner[along]}) - p;
        const Vector3 j = grid.position({corner[across], lowest[up] + 1 - b, corner[along]}) - p;
        const Vector3 k = grid.position({corner[across], corner[up], lowest[along] + 1 - c}) - p;
        // (across, up, along) = (y, z, x): right-handed in this order.
        const double sense = (a + b + c) % 2 == 0 ? 1.0 : -1.0;
        if (sense * i.cross(j).dot(k) <= 1e-9 * i.norm() * j.norm() * k.norm())
          return true;
      }
  return false;
}

/// One problem an interval of named stations, at its first folded cell.
void check_folds(const Grid& grid, const Hull& hull)
{
  std::vector<Problem> problems;
  for (std::size_t n = 0; n + 1 < grid.planes[along].size(); ++n)
  {
    const auto first = [&]() -> std::optional<GridPlace>
    {
      for (Index k = grid.planes[along][n].index; k < grid.planes[along][n + 1].index; ++k)
        for (Index i = 0; i < grid.cells[across]; ++i)
          for (Index j = 0; j < grid.cells[up]; ++j)
            if (is_folded(grid, {i, j, k}))
              return GridPlace{i, j, k};
      return std::nullopt;
    }();
    if (!first)
      continue;
    const Vector3& at = grid.position(*first);
    problems.push_back(
        {hull.stations[n].where,
         fmt::format("the lattice folds near x {:.3f} m, y {:.3f} m, z {:.3f} m: stations {}, "
                     "buttocks {}, heights {}; move or end the planes there so that no cell turns "
                     "over",
                     at.x(), at.y(), at.z(), grid.interval_name(along, (*first)[along]),
                     grid.interval_name(across, (*first)[across]),
                     grid.interval_name(up, (*first)[up]))});
  }
  if (!problems.empty())
    throw ModelError(std::move(problems));
}
} // namespace

std::array<Index, 4> Grid::face(Direction direction, const GridPlace& lowest, bool starboard) const
{
  const std::size_t first = direction == along ? across : along;
  const std::size_t second = direction == up ? across : up;
  GridPlace a = lowest, b = lowest, c = lowest, d = lowest;
  ++b[first];
  ++c[first];
  ++c[second];
  ++d[second];
  // Normals as built: heights up, buttocks towards starboard, stations forward.
  bool turned = starboard;
  if (direction == up && lowest[up] > 0)
    turned = !turned;
  if (direction == along && lowest[along] == cells[along])
    turned = !turned;
  if (turned)
    std::swap(b, d);
  std::array<Index, 4> result{};
  const std::array<GridPlace, 4> corners{a, b, c, d};
  for (std::size_t corner = 0; corner < 4; ++corner)
    result[corner] = point(starboard ? mirrored(corners[corner]) : corners[corner]);
  return result;
}

std::string Grid::plane_name(Direction direction, Index index) const
{
  return name_at(planes[direction], index);
}

std::string Grid::interval_name(Direction direction, Index index) const
{
  const std::vector<GridPlane>& named = planes[direction];
  const auto next = std::ranges::upper_bound(named, index, {}, &GridPlane::index);
  return fmt::format("'{}' to '{}'", (next - 1)->name, next->name);
}

Grid make_grid(const Hull& hull, double mesh_size)
{
  const HullForm form(hull);
  StationPlanes stations = station_planes(hull, form, mesh_size);
  const ColumnPlanes columns = column_planes(hull, form, stations, mesh_size);
  const HeightPlanes heights = height_planes(hull, form, stations, columns, mesh_size);
  const std::vector<double> weights = station_weights(stations.sections);
  Grid grid;
  grid.planes[across] = divided(columns.names, mean_breadths(columns, weights), mesh_size);
  grid.planes[up] = divided(heights.names, mean_heights(heights, weights), mesh_size);
  grid.planes[along] = std::move(stations.named);
  for (const Direction direction : {across, up, along})
    grid.cells[direction] = grid.planes[direction].back().index;
  grid.sections = std::move(stations.sections);
  grid.points.resize(static_cast<std::size_t>((2 * grid.cells[across] + 1) * (grid.cells[up] + 1) *
                                              (grid.cells[along] + 1)));
  for (std::size_t k = 0; k < grid.sections.size(); ++k)
    StationFiller(grid, grid.sections[k], static_cast<Index>(k))
        .fill(columns.columns[k], heights.z[k]);
  check_folds(grid, hull);
  return grid;
}
} // namespace carlin
