#include "carlin/lattice/mesh.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <unordered_map>
#include <unordered_set>

namespace carlin
{
namespace
{
std::size_t corner_count(const Cell& cell) { return cell.is_triangle() ? 3 : 4; }

const Vector3& corner(const Mesh& mesh, const Cell& cell, std::size_t i)
{
  return mesh.points[static_cast<std::size_t>(cell.points[i])];
}

Vector3 centre(const Mesh& mesh, const Cell& cell)
{
  Vector3 sum = Vector3::Zero();
  for (std::size_t i = 0; i < corner_count(cell); ++i)
    sum += corner(mesh, cell, i);
  return sum / static_cast<double>(corner_count(cell));
}

/// Edge of two points whatever their order.
std::uint64_t edge_key(Index a, Index b)
{
  return (static_cast<std::uint64_t>(std::min(a, b)) << 32) |
         static_cast<std::uint64_t>(std::max(a, b));
}

struct CellShape
{
  double aspect = 0.0, skew = 0.0, warp = 0.0, side_sum = 0.0;
};

CellShape shape_of(const Mesh& mesh, const Cell& cell)
{
  const std::size_t n = corner_count(cell);
  CellShape shape;
  double shortest = 1e300, longest = 0.0;
  for (std::size_t i = 0; i < n; ++i)
  {
    const Vector3 forth = corner(mesh, cell, (i + 1) % n) - corner(mesh, cell, i);
    const Vector3 back = corner(mesh, cell, (i + n - 1) % n) - corner(mesh, cell, i);
    shape.side_sum += forth.norm();
    shortest = std::min(shortest, forth.norm());
    longest = std::max(longest, forth.norm());
    const double angle = std::atan2(forth.cross(back).norm(), forth.dot(back));
    const double right_angle = std::numbers::pi / (n == 4 ? 2.0 : 3.0);
    shape.skew = std::max(shape.skew, std::abs(angle - right_angle));
  }
  shape.aspect = longest / shortest;
  if (n == 4)
  {
    const Vector3 normal = (corner(mesh, cell, 2) - corner(mesh, cell, 0))
                               .cross(corner(mesh, cell, 3) - corner(mesh, cell, 1))
                               .normalized();
    const Vector3 out_of_plane = corner(mesh, cell, 0) - corner(mesh, cell, 1) +
                                 corner(mesh, cell, 2) - corner(mesh, cell, 3);
    shape.warp = std::abs(out_of_plane.dot(normal)) / 4.0 / (shape.side_sum / 4.0);
  }
  return shape;
}

void add_shapes(const Mesh& mesh, MeshQuality& quality)
{
  double side_sum = 0.0;
  Index sides = 0;
  const Cell *worst_aspect = nullptr, *worst_skew = nullptr, *worst_warp = nullptr;
  const auto raise = [](double& largest, double value, const Cell*& worst, const Cell& cell)
  {
    if (worst && value <= largest)
      return;
    largest = value;
    worst = &cell;
  };
  for (const Cell& cell : mesh.cells)
  {
    const CellShape shape = shape_of(mesh, cell);
    side_sum += shape.side_sum;
    sides += static_cast<Index>(corner_count(cell));
    raise(quality.largest_aspect, shape.aspect, worst_aspect, cell);
    raise(quality.largest_skew, shape.skew, worst_skew, cell);
    raise(quality.largest_warp, shape.warp, worst_warp, cell);
  }
  if (mesh.cells.empty())
    return;
  quality.mean_side = side_sum / static_cast<double>(sides);
  const auto words = [&](const Cell& cell)
  {
    return mesh.parts[static_cast<std::size_t>(cell.part)].name + ", " +
           mesh.place(centre(mesh, cell));
  };
  quality.largest_aspect_place = words(*worst_aspect);
  quality.largest_skew_place = words(*worst_skew);
  quality.largest_warp_place = words(*worst_warp);
}

Index points_used(const Mesh& mesh)
{
  std::vector<char> used(mesh.points.size(), 0);
  for (const Cell& cell : mesh.cells)
    for (std::size_t i = 0; i < corner_count(cell); ++i)
      used[static_cast<std::size_t>(cell.points[i])] = 1;
  for (const Run& run : mesh.runs)
    for (const Index point : run.points)
      used[static_cast<std::size_t>(point)] = 1;
  return std::ranges::count(used, 1);
}

/// What meets at an edge: up to two cells of one part may go on into each other.
struct Edge
{
  std::array<Index, 2> cells{-1, -1};
  int cell_count = 0;
  bool carries_member = false;
};
using Edges = std::unordered_map<std::uint64_t, Edge>;

Edges edges_of(const Mesh& mesh)
{
  Edges edges;
  edges.reserve(2 * mesh.cells.size());
  for (std::size_t c = 0; c < mesh.cells.size(); ++c)
  {
    const Cell& cell = mesh.cells[c];
    const std::size_t n = corner_count(cell);
    for (std::size_t i = 0; i < n; ++i)
    {
      Edge& edge = edges[edge_key(cell.points[i], cell.points[(i + 1) % n])];
      if (edge.cell_count < 2)
        edge.cells[static_cast<std::size_t>(edge.cell_count)] = static_cast<Index>(c);
      ++edge.cell_count;
    }
  }
  for (const Run& run : mesh.runs)
    for (std::size_t i = 0; i + 1 < run.points.size(); ++i)
      edges[edge_key(run.points[i], run.points[i + 1])].carries_member = true;
  return edges;
}

/// Rows of quadrilaterals of one panel, entered and left by opposite sides.
class PanelRows
{
public:
  PanelRows(const Mesh& mesh, const Edges& edges) : mesh_(mesh), edges_(edges)
  {
    for (std::vector<Row>& rows : rows_)
      rows.assign(mesh.cells.size(), {});
  }

  /// Fewest cells across the short side of any panel, and one of its cells; 0 without cells.
  std::pair<int, std::size_t> fewest()
  {
    std::pair<int, std::size_t> result{0, 0};
    for (std::size_t c = 0; c < mesh_.cells.size(); ++c)
    {
      if (mesh_.cells[c].is_triangle())
        continue;
      for (const std::size_t axis : {0, 1})
        if (rows_[axis][c].cells == 0)
          measure(c, axis);
      const Row &first = rows_[0][c], &second = rows_[1][c];
      const int across = first.length <= second.length ? first.cells : second.cells;
      if (result.first == 0 || across < result.first)
        result = {across, c};
    }
    return result;
  }

private:
  struct Row
  {
    int cells = 0;
    double length = 0.0;
  };
  struct Step
  {
    std::size_t cell = 0, side = 0; ///< side by which the row leaves the cell
  };

  std::uint64_t side_key(const Step& step) const
  {
    const auto& points = mesh_.cells[step.cell].points;
    return edge_key(points[step.side], points[(step.side + 1) % 4]);
  }

  /// Goes over the side of a step into the neighbour, or says that the panel ends.
  bool advance(Step& step) const
  {
    const std::uint64_t key = side_key(step);
    const Edge& edge = edges_.at(key);
    if (edge.cell_count != 2 || edge.carries_member)
      return false;
    const auto here = static_cast<Index>(step.cell);
    const auto next =
        static_cast<std::size_t>(edge.cells[0] == here ? edge.cells[1] : edge.cells[0]);
    if (mesh_.cells[next].part != mesh_.cells[step.cell].part || mesh_.cells[next].is_triangle())
      return false;
    for (std::size_t side = 0; side < 4; ++side)
      if (side_key({next, side}) == key)
      {
        step = {next, (side + 2) % 4};
        return true;
      }
    return false;
  }

  /// Distance between the middles of the sides through which a row passes.
  double length_along(const Step& step) const
  {
    const auto at = [&](std::size_t i) -> const Vector3&
    { return corner(mesh_, mesh_.cells[step.cell], (step.side + i) % 4); };
    return 0.5 * (at(0) + at(1) - at(2) - at(3)).norm();
  }

  void measure(std::size_t cell, std::size_t axis)
  {
    Step start{cell, axis + 2};
    while (advance(start) && start.cell != cell)
    {
    }
    // Turned round at the panel's end, or where a closed row came back to its beginning.
    const std::size_t first = start.cell;
    Step step{first, (start.side + 2) % 4};
    std::vector<Step> row;
    do
      row.push_back(step);
    while (advance(step) && step.cell != first);
    Row result;
    for (const Step& passed : row)
      result.length += length_along(passed);
    result.cells = static_cast<int>(row.size());
    for (const Step& passed : row)
      rows_[passed.side % 2][passed.cell] = result;
  }

  const Mesh& mesh_;
  const Edges& edges_;
  std::array<std::vector<Row>, 2> rows_; ///< by side number mod 2, by cell
};

/// Fewest segments of a member between points where it is held: its ends, a plate part that it
/// crosses and does not lie on, a primary member that it crosses.
class Spans
{
public:
  explicit Spans(const Mesh& mesh) : mesh_(mesh)
  {
    for (const Run& run : mesh.runs)
      for (const Index point : run.points)
        on_member_.insert(point);
    for (const Cell& cell : mesh.cells)
      for (std::size_t i = 0; i < corner_count(cell); ++i)
        if (on_member_.contains(cell.points[i]))
          add(plates_[cell.points[i]], cell.part);
    for (const Run& run : mesh.runs)
      if (part(run.part).is_primary)
        for (const Index point : run.points)
          add(primaries_[point], run.part);
  }

  /// Number of segments, the part and the point in the middle of the span.
  struct Fewest
  {
    int segments = 0;
    Index part = -1, middle = -1;
  };
  Fewest fewest() const
  {
    Fewest result;
    for (const Run& run : mesh_.runs)
    {
      int count = 0;
      for (std::size_t i = 1; i < run.points.size(); ++i)
      {
        ++count;
        if (i + 1 < run.points.size() && !is_held(run, i))
          continue;
        if (result.segments == 0 || count < result.segments)
          result = {count, run.part, run.points[i - static_cast<std::size_t>(count) / 2]};
        count = 0;
      }
    }
    return result;
  }

private:
  using Parts = std::vector<Index>;

  static void add(Parts& parts, Index part)
  {
    if (std::ranges::find(parts, part) == parts.end())
      parts.push_back(part);
  }
  const MeshPart& part(Index index) const { return mesh_.parts[static_cast<std::size_t>(index)]; }
  static const Parts* find(const std::unordered_map<Index, Parts>& map, Index point)
  {
    const auto found = map.find(point);
    return found == map.end() ? nullptr : &found->second;
  }
  /// Whether a part has the point before or after point i of the run too: it runs alongside.
  static bool is_alongside(const std::unordered_map<Index, Parts>& map, const Run& run,
                           std::size_t i, Index part)
  {
    for (const Index neighbour : {run.points[i - 1], run.points[i + 1]})
      if (const Parts* parts = find(map, neighbour))
        if (std::ranges::find(*parts, part) != parts->end())
          return true;
    return false;
  }

  bool is_held(const Run& run, std::size_t i) const
  {
    const Index here = run.points[i];
    if (const Parts* primaries = find(primaries_, here))
      for (const Index other : *primaries)
        if (other != run.part && !is_alongside(primaries_, run, i, other))
          return true;
    if (const Parts* plates = find(plates_, here))
      for (const Index plate : *plates)
      {
        const bool same_surface =
            part(plate).surface && part(plate).surface == part(run.part).surface;
        if (!same_surface && !is_alongside(plates_, run, i, plate))
          return true;
      }
    return false;
  }

  const Mesh& mesh_;
  std::unordered_set<Index> on_member_;
  std::unordered_map<Index, Parts> plates_, primaries_;
};
} // namespace

MeshQuality mesh_quality(const Mesh& mesh)
{
  MeshQuality quality;
  quality.cells = std::ssize(mesh.cells);
  quality.points_used = points_used(mesh);
  add_shapes(mesh, quality);
  const Edges edges = edges_of(mesh);
  const auto words = [&](Index part, const Vector3& position)
  { return mesh.parts[static_cast<std::size_t>(part)].name + ", " + mesh.place(position); };
  const auto [across, cell] = PanelRows(mesh, edges).fewest();
  quality.fewest_cells_per_panel = across;
  if (across > 0)
    quality.fewest_cells_per_panel_place =
        words(mesh.cells[cell].part, centre(mesh, mesh.cells[cell]));
  const Spans::Fewest span = Spans(mesh).fewest();
  quality.fewest_cells_per_span = span.segments;
  if (span.segments > 0)
    quality.fewest_cells_per_span_place =
        words(span.part, mesh.points[static_cast<std::size_t>(span.middle)]);
  return quality;
}
} // namespace carlin
