#include "grid.hpp"
#include "mapped_parts.hpp"

#include "carlin/core/error.hpp"
#include "carlin/core/require.hpp"
#include "carlin/lattice/mesh.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
struct Lattice::Impl
{
  std::optional<Grid> grid;
  std::vector<NamedPlane> stations;
  std::optional<Frame> frame;
  double mesh_size = 0.0;
};

namespace
{
void check_without_hull(const ConfiguredCraft& craft, std::vector<Problem>& problems)
{
  const auto report = [&](const Named& part)
  {
    problems.push_back({part.where, fmt::format("'{}': the model has no hull to put it on; a "
                                                "structure without one is described under frame",
                                                part.name)});
  };
  for (const PlatePart& plate : craft.plates)
    report(plate);
  for (const MemberPart& member : craft.members)
    report(member);
}

/// Outline of a station plane from the starboard deck edge under the keel and back over the deck.
std::vector<Vector3> outline(const Grid& grid, Index k)
{
  std::vector<Vector3> line;
  const Index side = grid.cells[across], deck = grid.cells[up];
  for (Index j = deck; j > 0; --j)
    line.push_back(grid.position({-side, j, k}));
  for (Index i = -side; i <= side; ++i)
    line.push_back(grid.position({i, 0, k}));
  for (Index j = 1; j <= deck; ++j)
    line.push_back(grid.position({side, j, k}));
  for (Index i = side - 1; i >= -side; --i)
    line.push_back(grid.position({i, deck, k}));
  return line;
}

/// Port outline of a buttock: forward along the bottom, back along the deck.
std::vector<Vector3> buttock_outline(const Grid& grid, Index i)
{
  std::vector<Vector3> line;
  for (Index k = 0; k <= grid.cells[along]; ++k)
    line.push_back(grid.position({i, 0, k}));
  for (Index k = grid.cells[along]; k >= 0; --k)
    line.push_back(grid.position({i, grid.cells[up], k}));
  line.push_back(line.front());
  return line;
}

/// A height: forward along the port side, back along the starboard side.
std::vector<Vector3> height_outline(const Grid& grid, Index j)
{
  std::vector<Vector3> line;
  const Index side = grid.cells[across];
  for (Index k = 0; k <= grid.cells[along]; ++k)
    line.push_back(grid.position({side, j, k}));
  for (Index i = side - 1; i > -side; --i)
    line.push_back(grid.position({i, j, grid.cells[along]}));
  for (Index k = grid.cells[along]; k >= 0; --k)
    line.push_back(grid.position({-side, j, k}));
  for (Index i = 1 - side; i <= side; ++i)
    line.push_back(grid.position({i, j, 0}));
  return line;
}
} // namespace

Lattice::Lattice(const Model& model, double mesh_size)
{
  auto impl = std::make_shared<Impl>();
  impl->mesh_size = mesh_size;
  impl->frame = model.frame;
  if (model.hull)
  {
    require_positive("mesh_size", mesh_size, "m");
    impl->grid = make_grid(*model.hull, mesh_size);
    for (const Station& station : model.hull->stations)
      impl->stations.push_back({station.name, station.position, station.rake});
  }
  impl_ = std::move(impl);
}

Mesh Lattice::mesh(const ConfiguredCraft& craft) const
{
  Mesh mesh;
  std::vector<Problem> problems;
  mesh.mesh_size = impl_->mesh_size;
  mesh.stations = impl_->stations;
  mesh.joints = craft.joints;
  if (impl_->grid)
  {
    const Grid& grid = *impl_->grid;
    mesh.points = grid.points;
    CutOuts cut_outs(grid);
    add_plates(grid, craft.plates, cut_outs, mesh, problems);
    add_members(grid, craft.members, cut_outs, mesh, problems);
    if (problems.empty())
      problems = cut_outs.idle();
  }
  else
    check_without_hull(craft, problems);
  if (impl_->frame)
    add_frame(*impl_->frame, mesh, problems);
  if (!problems.empty())
    throw ModelError(std::move(problems));
  return mesh;
}

std::vector<Lattice::ResolvedPlane> Lattice::resolved_planes() const
{
  std::vector<ResolvedPlane> planes;
  if (!impl_->grid)
    return planes;
  const Grid& grid = *impl_->grid;
  for (const GridPlane& plane : grid.planes[along])
    planes.push_back({"station", plane.name, outline(grid, plane.index)});
  for (const GridPlane& plane : grid.planes[across])
    planes.push_back({"buttock", plane.name, buttock_outline(grid, plane.index)});
  for (const GridPlane& plane : grid.planes[up])
    planes.push_back({"height", plane.name, height_outline(grid, plane.index)});
  return planes;
}
} // namespace carlin
