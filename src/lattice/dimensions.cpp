#include "carlin/lattice/dimensions.hpp"

#include "carlin/core/require.hpp"

#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
/// Half section: y and z of chine and deck edge, z of the keel.
struct HalfSection
{
  double keel_z = 0.0, chine_y = 0.0, chine_z = 0.0, edge_y = 0.0, edge_z = 0.0; // [m]
};

/// At fraction u of the length forward of the parallel body, 0 to 1.
HalfSection half_section(const HullDimensions& hull, double u)
{
  const double stem_y = 0.5 * hull.stem_face, u2 = u * u, u3 = u2 * u;
  HalfSection section;
  section.edge_y = 0.5 * hull.beam + (stem_y - 0.5 * hull.beam) * u3;              // full forward
  section.chine_y = 0.5 * hull.chine_beam + (stem_y - 0.5 * hull.chine_beam) * u2; // finer
  // Forefoot to a quarter, chine to six tenths of the depth: the chine then rises clear of the
  // keel.
  section.keel_z = 0.25 * hull.depth * u3;
  const double amidships = 0.5 * hull.chine_beam * std::tan(hull.deadrise);
  const double stem = section.keel_z + 0.25 * hull.stem_face;
  const double rise = std::max(0.0, 0.6 * hull.depth - amidships) * u2 * (1.0 - u);
  section.chine_z = section.keel_z + amidships * (1.0 - u2) + rise + (stem - section.keel_z) * u2;
  section.edge_z = hull.depth;
  return section;
}

void check(const HullDimensions& hull)
{
  std::vector<Problem> problems;
  const auto attempt = [&](auto&& checker)
  {
    try
    {
      checker();
    }
    catch (const ValueError& error)
    {
      problems.push_back({hull.where, fmt::format("hull.dimensions: {}", error.what())});
    }
  };
  attempt([&] { require_positive("length", hull.length, "m"); });
  attempt([&] { require_positive("beam", hull.beam, "m"); });
  attempt([&] { require_positive("chine_beam", hull.chine_beam, "m"); });
  attempt([&] { require_positive("depth", hull.depth, "m"); });
  attempt([&] { require_not_negative("deadrise", hull.deadrise, "rad"); });
  attempt([&] { require_between("parallel_body", hull.parallel_body, 0.0, 1.0 + 1e-12); });
  attempt([&] { require_between("stem_rake", hull.stem_rake, -1.3, 1.3); });
  if (hull.parallel_body < 1.0)
    attempt([&] { require_between("stem_face", hull.stem_face, 0.0, hull.chine_beam); });
  if (problems.empty() && 0.5 * hull.chine_beam * std::tan(hull.deadrise) >= hull.depth)
    problems.push_back({hull.where, "hull.dimensions: the deadrise puts the chine above the deck; "
                                    "lower deadrise or chine_beam, or raise depth"});
  if (!problems.empty())
    throw ModelError(std::move(problems));
}
} // namespace

HullOffsets offsets_from_dimensions(const HullDimensions& hull)
{
  check(hull);
  HullOffsets offsets;
  offsets.where = hull.where;
  const double slope = std::tan(hull.stem_rake), body = hull.parallel_body * hull.length;
  const auto add = [&](const HalfSection& section, double aft, double fan)
  {
    OffsetStation station;
    station.name = fmt::format("section-{}", offsets.stations.size() + 1);
    station.where = hull.where;
    // `fan` 1 puts the points on the plane of the stem, whose top is at x = length.
    const HalfSection stem = hull.parallel_body < 1.0 ? half_section(hull, 1.0) : section;
    const auto point = [&](const char* name, double y, double z, double stem_z)
    {
      const double end = hull.length + slope * (stem_z - hull.depth);
      station.points.push_back({name, {aft + fan * (end - aft), y, z}});
    };
    point("keel", 0.0, section.keel_z, stem.keel_z);
    point("chine", section.chine_y, section.chine_z, stem.chine_z);
    point("deck-edge", section.edge_y, section.edge_z, stem.edge_z);
    offsets.stations.push_back(std::move(station));
  };
  const HalfSection amidships = half_section(hull, 0.0);
  add(amidships, 0.0, 0.0);
  if (hull.parallel_body >= 1.0)
  {
    offsets.fairing = Fairing::straight;
    add(amidships, hull.length, 1.0);
    return offsets;
  }
  add(amidships, 0.5 * body, 0.0);
  for (const double u : {0.0, 0.15, 0.3, 0.45, 0.6, 0.75, 0.9, 1.0})
    add(half_section(hull, u), body, u);
  return offsets;
}
} // namespace carlin
