#include "geometry.hpp"

#include "carlin/core/error.hpp"
#include "carlin/recovery/stiffness.hpp"

#include <cassert>
#include <cmath>
#include <fmt/format.h>
#include <map>

namespace carlin
{
namespace
{
/// One section on the nodes of one configuration. Axial motion u_x is fitted by (1, z, -y) about
/// the axial centre, so that the second coefficient is the turn about y and the third that about z;
/// motion in the plane by a turn about x round the centre of in-plane area.
struct LoadedSection
{
  std::vector<Index> nodes;
  std::vector<double> axial, in_plane;
  Vector3 axial_centre = Vector3::Zero(), area_centre = Vector3::Zero();
  Matrix3 axial_moments = Matrix3::Zero(); ///< sum of weight times basis times basis transposed
  double area = 0.0, polar = 0.0;          ///< sum of area weights, and times distance squared
};

Vector3 axial_basis(const Structure& structure, const LoadedSection& section, Index node)
{
  const Vector3 arm = node_position(structure, node) - section.axial_centre;
  return {1.0, arm.z(), -arm.y()};
}

/// Node of each mesh point; of the copies at a split joint the one with most plating.
std::map<Index, Index> nodes_by_point(const Structure& structure)
{
  std::map<Index, Index> result;
  for (std::size_t n = 0; n < structure.nodes.size(); ++n)
  {
    const auto node = static_cast<Index>(n);
    const auto [place, is_new] = result.emplace(structure.node_point[n], node);
    if (!is_new && structure.node_area[node] > structure.node_area[place->second])
      place->second = node;
  }
  return result;
}

LoadedSection loaded_section(const Structure& structure, const std::map<Index, Index>& node_of,
                             const EndSection& end)
{
  LoadedSection section;
  double axial = 0.0;
  for (std::size_t i = 0; i < end.points.size(); ++i)
  {
    const auto found = node_of.find(end.points[i]);
    if (found == node_of.end())
      continue;
    section.nodes.push_back(found->second);
    section.axial.push_back(end.weights[i]);
    section.in_plane.push_back(end.area_weights[i]);
    const Vector3& position = node_position(structure, found->second);
    axial += end.weights[i];
    section.axial_centre += end.weights[i] * position;
    section.area += end.area_weights[i];
    section.area_centre += end.area_weights[i] * position;
  }
  if (section.nodes.size() < 4)
    throw SolveError(
        fmt::format("stiffness: fewer than four points of station '{}' carry structure; "
                    "name other stations as bays",
                    end.name));
  section.axial_centre /= axial;
  section.area_centre /= section.area;
  for (std::size_t i = 0; i < section.nodes.size(); ++i)
  {
    const Vector3 basis = axial_basis(structure, section, section.nodes[i]);
    section.axial_moments += section.axial[i] * basis * basis.transpose();
    const Vector3 arm = node_position(structure, section.nodes[i]) - section.area_centre;
    section.polar += section.in_plane[i] * (arm.y() * arm.y() + arm.z() * arm.z());
  }
  return section;
}

/// Linear axial traction with force F_x and moments M_y, M_z about the axial centre.
void add_axial(const Structure& structure, const LoadedSection& section, const Vector3& resultant,
               Eigen::Ref<VectorX> forces)
{
  const Vector3 coefficients = section.axial_moments.ldlt().solve(resultant);
  for (std::size_t i = 0; i < section.nodes.size(); ++i)
    forces[6 * section.nodes[i]] +=
        section.axial[i] * coefficients.dot(axial_basis(structure, section, section.nodes[i]));
}

/// Torque about x by in-plane area. On a raked section its forces have moments about y and z as
/// well; axial traction takes them off, so that the couple is about x alone.
void add_torque(const Structure& structure, const LoadedSection& section, double torque,
                Eigen::Ref<VectorX> forces)
{
  Vector3 moment = Vector3::Zero();
  for (std::size_t i = 0; i < section.nodes.size(); ++i)
  {
    const Vector3 arm = node_position(structure, section.nodes[i]) - section.area_centre;
    const Vector3 force =
        torque * section.in_plane[i] / section.polar * Vector3(0.0, -arm.z(), arm.y());
    forces.segment<3>(6 * section.nodes[i]) += force;
    moment += arm.cross(force);
  }
  add_axial(structure, section, {0.0, -moment.y(), -moment.z()}, forces);
}

/// Force along z by in-plane area, acting at the centre of that area.
void add_shear(const LoadedSection& section, double force, Eigen::Ref<VectorX> forces)
{
  for (std::size_t i = 0; i < section.nodes.size(); ++i)
    forces[6 * section.nodes[i] + 2] += force * section.in_plane[i] / section.area;
}

double turn_about_y(const Structure& structure, const LoadedSection& section,
                    const Eigen::Ref<const VectorX>& displacement)
{
  Vector3 moment = Vector3::Zero();
  for (std::size_t i = 0; i < section.nodes.size(); ++i)
    moment += section.axial[i] * displacement[6 * section.nodes[i]] *
              axial_basis(structure, section, section.nodes[i]);
  return section.axial_moments.ldlt().solve(moment)[1];
}

double twist(const Structure& structure, const LoadedSection& section,
             const Eigen::Ref<const VectorX>& displacement)
{
  double moment = 0.0;
  for (std::size_t i = 0; i < section.nodes.size(); ++i)
  {
    const Vector3 arm = node_position(structure, section.nodes[i]) - section.area_centre;
    const Vector3 moved = displacement.segment<3>(6 * section.nodes[i]);
    moment += section.in_plane[i] * (arm.y() * moved.z() - arm.z() * moved.y());
  }
  return moment / section.polar;
}

double rise(const LoadedSection& section, const Eigen::Ref<const VectorX>& displacement)
{
  double sum = 0.0;
  for (std::size_t i = 0; i < section.nodes.size(); ++i)
    sum += section.in_plane[i] * displacement[6 * section.nodes[i] + 2];
  return sum / section.area;
}

enum UnitCase : Index
{
  bending_case,
  torsion_case,
  shear_case,
  unit_case_count
};

/// Self-balanced pairs of unit size on the first and last section. Sagging: about y, + aft, -
/// forward (deck pressed together). Torsion: port side up forward. Shear: up forward, down aft.
MatrixX unit_loads(const Structure& structure, const LoadedSection& aft,
                   const LoadedSection& forward)
{
  MatrixX loads = MatrixX::Zero(static_cast<Index>(6 * structure.nodes.size()), unit_case_count);
  add_axial(structure, aft, {0.0, 1.0, 0.0}, loads.col(bending_case));
  add_axial(structure, forward, {0.0, -1.0, 0.0}, loads.col(bending_case));
  add_torque(structure, aft, -1.0, loads.col(torsion_case));
  add_torque(structure, forward, 1.0, loads.col(torsion_case));

  add_shear(aft, -1.0, loads.col(shear_case));
  add_shear(forward, 1.0, loads.col(shear_case));
  const Vector6 left = resultant(structure, loads.col(shear_case), Vector3::Zero());
  // A force couple remains: half of it is taken up at either end; the twist that an oblique pair of
  // centres leaves is taken up forward.
  for (const LoadedSection* end : {&aft, &forward})
    add_axial(structure, *end, {0.0, -0.5 * left[4], -0.5 * left[5]}, loads.col(shear_case));
  add_torque(structure, forward, -left[3], loads.col(shear_case));
  return loads;
}

/// Unit shear V = 1: rise = shear part + integral of -turn; the turn over a bay is its ends' mean
/// and the parabola of a moment that grows by V, V L^3 / (12 EI).
double shear_stiffness(const std::vector<BayStiffness>& bays, const std::vector<double>& turns,
                       double total_rise, double length)
{
  double shear_part = total_rise;
  for (std::size_t i = 0; i < bays.size(); ++i)
  {
    const double l = bays[i].length;
    shear_part += 0.5 * l * (turns[i] + turns[i + 1]) - l * l * l / (12.0 * bays[i].bending);
  }
  return shear_part > 0.0 ? length / shear_part : 0.0;
}

BayStiffness bay_stiffness(const EndSection& from, const EndSection& to, double turn,
                           double twisted)
{
  const double length = to.x - from.x;
  return {.from = from.name,
          .to = to.name,
          .length = length,
          .bending = length / turn,
          .torsion = length / twisted,
          .torsion_per_angle = 1.0 / twisted,
          .near_loaded_section = false};
}
} // namespace

GirderStiffness girder_stiffness(const Structure& structure, const HullSolver& solver,
                                 const std::vector<EndSection>& sections)
{
  assert(sections.size() >= 2);
  const std::map<Index, Index> node_of = nodes_by_point(structure);
  std::vector<LoadedSection> loaded;
  for (const EndSection& section : sections)
    loaded.push_back(loaded_section(structure, node_of, section));
  const MatrixX moved = solver.solve(unit_loads(structure, loaded.front(), loaded.back()));

  std::vector<double> turns, twists, shear_turns;
  for (const LoadedSection& section : loaded)
  {
    turns.push_back(turn_about_y(structure, section, moved.col(bending_case)));
    twists.push_back(twist(structure, section, moved.col(torsion_case)));
    shear_turns.push_back(turn_about_y(structure, section, moved.col(shear_case)));
  }

  GirderStiffness result;
  const EndSection &first = sections.front(), &last = sections.back();
  for (std::size_t i = 0; i + 1 < sections.size(); ++i)
  {
    BayStiffness bay = bay_stiffness(sections[i], sections[i + 1], turns[i] - turns[i + 1],
                                     twists[i + 1] - twists[i]);
    bay.near_loaded_section =
        sections[i].x - first.x < first.depth || last.x - sections[i + 1].x < last.depth;
    result.bays.push_back(bay);
  }
  result.whole =
      bay_stiffness(first, last, turns.front() - turns.back(), twists.back() - twists.front());
  result.shear = shear_stiffness(result.bays, shear_turns,
                                 rise(loaded.back(), moved.col(shear_case)) -
                                     rise(loaded.front(), moved.col(shear_case)),
                                 result.whole.length);
  return result;
}
} // namespace carlin
