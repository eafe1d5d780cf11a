#pragma once

#include "carlin/lattice/mesh.hpp"

#include <cmath>
#include <string>
#include <vector>

/// Hulls and parts for the tests of the lattice.
namespace lattice_models
{
using carlin::Index;
using carlin::Vector3;

inline carlin::OffsetStation offset_station(const std::vector<std::string>& names,
                                            const std::vector<Vector3>& points)
{
  carlin::OffsetStation station;
  station.name = "section at x " + std::to_string(points.front().x());
  for (std::size_t i = 0; i < names.size(); ++i)
    station.points.push_back({names[i], points[i]});
  return station;
}

inline carlin::Station station(const std::string& name, double position, double rake = 0.0)
{
  carlin::Station result;
  result.name = name;
  result.position = position;
  result.rake = rake;
  return result;
}

inline carlin::Buttock buttock(const std::string& name, double y)
{
  carlin::Buttock result;
  result.name = name;
  result.plan = {{0.0, y}};
  return result;
}

inline carlin::Height height(const std::string& name, double z)
{
  carlin::Height result;
  result.name = name;
  result.profile = {{0.0, z}};
  return result;
}

inline carlin::PlatePart plate(const std::string& name, carlin::Surface surface,
                               const std::string& plane = "")
{
  carlin::PlatePart part;
  part.name = name;
  part.patch.surface = surface;
  part.patch.plane = plane;
  part.schedule = "plate-5";
  return part;
}

inline carlin::MemberPart member(const std::string& name, carlin::Surface surface,
                                 carlin::Surface plane_kind, const std::string& plane)
{
  carlin::MemberPart part;
  part.name = name;
  part.surface = surface;
  part.plane_kind = plane_kind;
  part.plane = plane;
  part.profile = "bar";
  return part;
}

/// Prism of 4.0 x 2.0 x 1.0 m, closed all round: transom, bulkhead at 2.0 m, bow; keel at z 0,
/// chine at z `chine_z` and y 1, deck edge at y `deck_y`.
inline carlin::Model prism(double chine_z = 0.0, double deck_y = 1.0)
{
  carlin::Model model;
  carlin::Hull hull;
  carlin::HullOffsets offsets;
  for (const double x : {0.0, 4.0})
    offsets.stations.push_back(offset_station(
        {"keel", "chine", "deck-edge"}, {{x, 0.0, 0.0}, {x, 1.0, chine_z}, {x, deck_y, 1.0}}));
  hull.offsets = offsets;
  hull.stations = {station("transom", 0.0), station("middle", 2.0), station("bow", 4.0)};
  model.hull = hull;
  model.mesh_size = 0.1;
  using carlin::Surface;
  model.plates = {plate("bottom", Surface::bottom), plate("side", Surface::side),
                  plate("deck", Surface::deck), plate("transom", Surface::station, "transom"),
                  plate("bow", Surface::station, "bow")};
  return model;
}

/// Launch of 9 m with a raked stem from dimensions: girder and two stringers, flat and bulkheads.
inline carlin::Model launch()
{
  carlin::Model model;
  carlin::HullDimensions hull;
  hull.length = 9.0;
  hull.beam = 3.0;
  hull.chine_beam = 2.5;
  hull.depth = 1.5;
  hull.deadrise = 18.0 * M_PI / 180.0;
  hull.stem_rake = 0.4;
  model.hull.emplace();
  model.hull->dimensions = hull;
  model.hull->deck_camber = 0.06;
  model.hull->stations = {station("transom", 0.0), station("after", 2.0), station("middle", 4.5),
                          station("fore", 6.5), station("stem", 9.0 - 1.5 * std::tan(0.4), 0.4)};
  for (const auto& [name, y] : {std::pair{"inner", 0.4}, {"girder", 0.7}, {"outer", 1.0}})
  {
    model.hull->buttocks.push_back(buttock(name, y));
    model.hull->buttocks.back().to = "fore";
  }
  model.hull->buttocks[2].to = "middle"; // the chine comes near it forward
  model.hull->heights = {height("flat", 0.35), height("sole", 0.9)};
  model.hull->heights[0].out_to = "girder";
  model.hull->heights[0].to = "middle";
  model.hull->heights[1].to = "fore";
  model.mesh_size = 0.15;
  using carlin::Surface;
  model.plates = {plate("bottom", Surface::bottom),
                  plate("side", Surface::side),
                  plate("deck", Surface::deck),
                  plate("transom", Surface::station, "transom"),
                  plate("stem", Surface::station, "stem"),
                  plate("bulkhead", Surface::station, "middle"),
                  plate("flat", Surface::height, "flat"),
                  plate("web", Surface::buttock, "girder")};
  model.plates[6].patch.stations = {"after", "middle"};
  model.plates[6].patch.buttocks = {"", "girder"};
  model.plates[7].patch.stations = {"transom", "fore"};
  model.plates[7].patch.heights = {"bottom", "flat"};
  return model;
}

inline carlin::ConfiguredCraft base(const carlin::Model& model)
{
  carlin::ConfiguredCraft craft;
  craft.name = "base";
  craft.plates = model.plates;
  craft.members = model.members;
  craft.joints = model.joints;
  return craft;
}

inline carlin::Mesh mesh_of(const carlin::Model& model)
{
  return carlin::Lattice(model, model.mesh_size).mesh(base(model));
}

inline const Vector3& at(const carlin::Mesh& mesh, Index point)
{
  return mesh.points[static_cast<std::size_t>(point)];
}

/// Area times right-hand normal: half the product of the diagonals [m^2].
inline Vector3 area_vector(const carlin::Mesh& mesh, const carlin::Cell& cell)
{
  const auto& p = cell.points;
  return 0.5 * (at(mesh, p[2]) - at(mesh, p[0])).cross(at(mesh, p[3]) - at(mesh, p[1]));
}

inline Vector3 centre(const carlin::Mesh& mesh, const carlin::Cell& cell)
{
  const auto& p = cell.points;
  return 0.25 * (at(mesh, p[0]) + at(mesh, p[1]) + at(mesh, p[2]) + at(mesh, p[3]));
}

inline const std::string& part_name(const carlin::Mesh& mesh, const carlin::Cell& cell)
{
  return mesh.parts[static_cast<std::size_t>(cell.part)].name;
}

inline double area(const carlin::Mesh& mesh, const std::string& part)
{
  double sum = 0.0;
  for (const carlin::Cell& cell : mesh.cells)
    if (part_name(mesh, cell) == part)
      sum += area_vector(mesh, cell).norm();
  return sum;
}

inline Index cell_count(const carlin::Mesh& mesh, const std::string& part)
{
  Index count = 0;
  for (const carlin::Cell& cell : mesh.cells)
    count += part_name(mesh, cell) == part ? 1 : 0;
  return count;
}

/// Volume within the outer shell and the deck, whose normals point inward: divergence theorem, each
/// cell as the surface bilinear in its corners (exactly: two ways of splitting, averaged).
inline double enclosed_volume(const carlin::Mesh& mesh)
{
  double six_volumes = 0.0;
  for (const carlin::Cell& cell : mesh.cells)
  {
    const carlin::MeshPart& part = mesh.parts[static_cast<std::size_t>(cell.part)];
    if (!part.is_outer_shell && part.surface != carlin::Surface::deck)
      continue;
    const auto& p = cell.points;
    const auto tetrahedron = [&](std::size_t a, std::size_t b, std::size_t c)
    { return at(mesh, p[a]).dot(at(mesh, p[b]).cross(at(mesh, p[c]))); };
    six_volumes -= 0.5 * (tetrahedron(0, 1, 2) + tetrahedron(0, 2, 3) + tetrahedron(0, 1, 3) +
                          tetrahedron(1, 2, 3));
  }
  return six_volumes / 6.0;
}

inline const carlin::MeshPart& part(const carlin::Mesh& mesh, const std::string& name)
{
  return mesh.parts.at(static_cast<std::size_t>(mesh.part_index(name)));
}

inline std::vector<carlin::Run> runs_of(const carlin::Mesh& mesh, const std::string& name)
{
  std::vector<carlin::Run> runs;
  for (const carlin::Run& run : mesh.runs)
    if (run.part == mesh.part_index(name))
      runs.push_back(run);
  return runs;
}
} // namespace lattice_models
