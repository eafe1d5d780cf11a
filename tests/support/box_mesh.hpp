#pragma once

#include "carlin/description/model.hpp"
#include "carlin/lattice/mesh.hpp"

#include <array>
#include <cmath>
#include <map>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace carlin::test
{
/// Builds a Mesh by hand: plates as grids between four corners, members as divided lines. Points
/// that coincide are one, so that neighbouring grids of equal division join.
class MeshBuilder
{
public:
  Mesh mesh;

  Index point(const Vector3& position)
  {
    const auto key = [&](double value) { return std::lround(value * 1e6); };
    const std::array<long, 3> at{key(position.x()), key(position.y()), key(position.z())};
    const auto [found, is_new] = points_.try_emplace(at, static_cast<Index>(mesh.points.size()));
    if (is_new)
      mesh.points.push_back(position);
    return found->second;
  }

  Index named_point(const std::string& name, const Vector3& position)
  {
    mesh.named_points.emplace_back(name, point(position));
    return mesh.named_points.back().second;
  }

  Index part(const MeshPart& part)
  {
    mesh.parts.push_back(part);
    if (mesh.parts.back().family.empty())
      mesh.parts.back().family = part.name;
    return static_cast<Index>(mesh.parts.size()) - 1;
  }

  Index plate_part(const std::string& name, const std::string& schedule,
                   std::optional<Surface> surface)
  {
    MeshPart made;
    made.name = name;
    made.surface = surface;
    made.material_use = schedule;
    return part(made);
  }

  /// Part of the outer shell (wet outside) or, on the deck, of the deck.
  Index hull_part(const std::string& name, const std::string& schedule, Surface surface)
  {
    const Index made = plate_part(name, schedule, surface);
    mesh.parts.back().is_outer_shell = surface != Surface::deck;
    return made;
  }

  /// Grid of `across` x `along` cells: corner 1 -> 2 divided by divisions[0], 2 -> 3 by
  /// divisions[1]. The normal is (2 - 1) x (3 - 2).
  void grid(Index part, const std::array<Vector3, 4>& corners, std::array<int, 2> divisions)
  {
    const auto at = [&](int i, int j)
    {
      const double s = static_cast<double>(i) / divisions[0];
      const double t = static_cast<double>(j) / divisions[1];
      return point((1 - s) * (1 - t) * corners[0] + s * (1 - t) * corners[1] + s * t * corners[2] +
                   (1 - s) * t * corners[3]);
    };
    for (int j = 0; j < divisions[1]; ++j)
      for (int i = 0; i < divisions[0]; ++i)
        mesh.cells.push_back({{at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)}, part});
  }

  Index plate(const std::string& name, const std::string& schedule,
              const std::array<Vector3, 4>& corners, std::array<int, 2> divisions)
  {
    const Index index = plate_part(name, schedule, std::nullopt);
    grid(index, corners, divisions);
    return index;
  }

  /// Straight member. @param toe Zero: on the side of local y.
  Run& line(Index part, const Vector3& from, const Vector3& to, int divisions,
            const Vector3& upright)
  {
    Run run;
    run.part = part;
    const Vector3 direction = (to - from).normalized();
    for (int i = 0; i <= divisions; ++i)
      run.points.push_back(point(from + static_cast<double>(i) / divisions * (to - from)));
    run.upright.assign(static_cast<std::size_t>(divisions), upright);
    run.toe.assign(static_cast<std::size_t>(divisions), upright.cross(direction).normalized());
    mesh.runs.push_back(run);
    return mesh.runs.back();
  }

  Run& member(const std::string& name, const std::string& profile, const Vector3& from,
              const Vector3& to, int divisions, const Vector3& upright)
  {
    const Index index = plate_part(name, profile, std::nullopt);
    mesh.parts.back().kind = MeshPart::Kind::member;
    return line(index, from, to, divisions, upright);
  }

  /// Member of points alone: centred on its line.
  Run& beam(const std::string& name, const std::string& profile, const Vector3& from,
            const Vector3& to, int divisions)
  {
    const bool is_upright = std::abs((to - from).normalized().z()) > 0.9;
    Run& run = member(name, profile, from, to, divisions,
                      is_upright ? Vector3::UnitX() : Vector3::UnitZ());
    run.stands_on_plating = false;
    return run;
  }

private:
  std::map<std::array<long, 3>, Index> points_;
};

/// Box hull 0..length, -beam/2..beam/2, 0..depth with the named outer shell and deck, and
/// bulkheads at the given x (which must fall on the grid).
struct Box
{
  double length = 9.0, beam = 2.6, depth = 1.2; ///< [m]
  std::array<int, 3> cells{18, 6, 4};           ///< along, across, up
  std::string schedule = "plate";
  std::vector<double> bulkheads{}; ///< x [m]
};

inline void add_box(MeshBuilder& builder, const Box& box)
{
  const double L = box.length, b = 0.5 * box.beam, H = box.depth;
  const auto [nx, ny, nz] = box.cells;
  const auto outer = [&](const std::string& name, Surface surface)
  { return builder.hull_part(name, box.schedule, surface); };
  builder.grid(outer("bottom", Surface::bottom),
               {Vector3(0, -b, 0), Vector3(L, -b, 0), Vector3(L, b, 0), Vector3(0, b, 0)},
               {nx, ny});
  builder.grid(outer("side-port", Surface::side),
               {Vector3(0, b, 0), Vector3(L, b, 0), Vector3(L, b, H), Vector3(0, b, H)}, {nx, nz});
  builder.grid(outer("side-starboard", Surface::side),
               {Vector3(0, -b, 0), Vector3(0, -b, H), Vector3(L, -b, H), Vector3(L, -b, 0)},
               {nz, nx});
  builder.grid(outer("deck", Surface::deck),
               {Vector3(0, b, H), Vector3(L, b, H), Vector3(L, -b, H), Vector3(0, -b, H)},
               {nx, ny});
  builder.grid(outer("transom", Surface::station),
               {Vector3(0, -b, 0), Vector3(0, b, 0), Vector3(0, b, H), Vector3(0, -b, H)},
               {ny, nz});
  builder.grid(outer("stem", Surface::station),
               {Vector3(L, -b, 0), Vector3(L, -b, H), Vector3(L, b, H), Vector3(L, b, 0)},
               {nz, ny});
  for (std::size_t i = 0; i < box.bulkheads.size(); ++i)
  {
    const double x = box.bulkheads[i];
    const Index part =
        builder.plate_part("bulkhead-" + std::to_string(i + 1), box.schedule, Surface::station);
    builder.mesh.parts.back().plate_kind = PlateKind::bulkhead;
    builder.grid(part, {Vector3(x, -b, 0), Vector3(x, b, 0), Vector3(x, b, H), Vector3(x, -b, H)},
                 {ny, nz});
  }
  builder.mesh.mesh_size = L / nx;
}

/// Prismatic V hull with vertical sides, transom and bow, no deck: keel at z = 0.
struct VeeHull
{
  double length = 9.0, chine_beam = 2.6, depth = 1.6; ///< [m]
  double deadrise = 0.0;                              ///< [rad]
  std::array<int, 3> cells{18, 4, 4};                 ///< along, keel to chine, chine to top
};

inline void add_vee_hull(MeshBuilder& builder, const VeeHull& hull)
{
  const double L = hull.length, b = 0.5 * hull.chine_beam, H = hull.depth;
  const double c = b * std::tan(hull.deadrise);
  const auto [nx, ny, nz] = hull.cells;
  const auto outer = [&](const std::string& name, Surface surface)
  { return builder.hull_part(name, "plate", surface); };
  const Index bottom = outer("bottom", Surface::bottom);
  builder.grid(bottom, {Vector3(0, 0, 0), Vector3(L, 0, 0), Vector3(L, b, c), Vector3(0, b, c)},
               {nx, ny});
  builder.grid(bottom, {Vector3(0, -b, c), Vector3(L, -b, c), Vector3(L, 0, 0), Vector3(0, 0, 0)},
               {nx, ny});
  const Index side = outer("side", Surface::side);
  builder.grid(side, {Vector3(0, b, c), Vector3(L, b, c), Vector3(L, b, H), Vector3(0, b, H)},
               {nx, nz});
  builder.grid(side, {Vector3(0, -b, c), Vector3(0, -b, H), Vector3(L, -b, H), Vector3(L, -b, c)},
               {nz, nx});
  const Index ends = outer("ends", Surface::station);
  builder.grid(ends, {Vector3(0, 0, 0), Vector3(0, b, c), Vector3(0, b, H), Vector3(0, 0, H)},
               {ny, nz});
  builder.grid(ends, {Vector3(0, -b, c), Vector3(0, 0, 0), Vector3(0, 0, H), Vector3(0, -b, H)},
               {ny, nz});
  builder.grid(ends, {Vector3(L, b, c), Vector3(L, 0, 0), Vector3(L, 0, H), Vector3(L, b, H)},
               {ny, nz});
  builder.grid(ends, {Vector3(L, 0, 0), Vector3(L, -b, c), Vector3(L, -b, H), Vector3(L, 0, H)},
               {ny, nz});
  builder.mesh.mesh_size = L / nx;
}

/// Aluminium, one plate schedule "plate" 5 mm inside, one flat bar "bar" 70 x 7.
inline Model small_model()
{
  Model model;
  Material alloy;
  alloy.name = "alloy";
  alloy.youngs_modulus = 70e9;
  alloy.poissons_ratio = 0.33;
  alloy.density = 2660.0;
  alloy.thermal_expansion = 23.8e-6;
  model.materials.push_back(alloy);
  Schedule plate;
  plate.name = "plate";
  plate.material = "alloy";
  plate.thickness = 0.005;
  model.schedules.push_back(plate);
  Profile bar;
  bar.name = "bar";
  bar.material = "alloy";
  bar.shape = FlatBar{.height = 0.07, .thickness = 0.007};
  model.profiles.push_back(bar);
  return model;
}

/// Adds a material of its own and a profile of given constants.
inline void add_given_profile(Model& model, const std::string& name, double youngs_modulus,
                              double density, const GivenSection& section)
{
  Material material;
  material.name = name + "-material";
  material.youngs_modulus = youngs_modulus;
  material.poissons_ratio = 0.3;
  material.density = density;
  model.materials.push_back(material);
  Profile profile;
  profile.name = name;
  profile.material = material.name;
  profile.shape = section;
  model.profiles.push_back(profile);
}
} // namespace carlin::test
