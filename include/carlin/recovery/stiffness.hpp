#pragma once

#include "carlin/solution/hull_solver.hpp"
#include "carlin/structure/structure.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// End section of a bay: mesh points at a station with weights for couples and readings. Mesh
/// points, not nodes, because they are the same in every configuration.
struct EndSection
{
  std::string name;
  double x = 0.0;                   ///< mean by weight [m]
  double depth = 0.0;               ///< height of the section [m]
  std::vector<Index> points;        ///< of Mesh::points
  std::vector<double> weights;      ///< axial stiffness of the base there [N]
  std::vector<double> area_weights; ///< in-plane area, for twist and shear [m^2]
};

/// Sections at the named stations from the base configuration's mesh (same points in all).
/// Axial stiffness of plating: E t times tributary width, along the boat; of members: EA. Plates
/// and members that lie in the section's own plane do not count.
/// @throws ModelError for a name that is no station; SolveError where nothing passes through it.
std::vector<EndSection> end_sections(const Structure& base,
                                     const std::vector<std::string>& stations);

/// Stiffness of one bay of a configuration. Definitions: design, section 6.
struct BayStiffness
{
  std::string from, to;
  double length = 0.0;
  double bending = 0.0; ///< EI = M L / turn [N m^2]
  double torsion =
      0.0; ///< GJ = T L / twist [N m^2]: a measure of this hull, not a section property
  double torsion_per_angle = 0.0;   ///< T / twist [N m/rad]
  bool near_loaded_section = false; ///< within one depth of it: labelled, not judged
};
struct GirderStiffness
{
  std::vector<BayStiffness> bays;
  BayStiffness whole; ///< between the loaded sections
  double shear = 0.0; ///< whole: shear stiffness GA from a unit-shear case [N]; 0: not found
};

/// Unit couples on the first and last section as linear traction; least-squares rotations read at
/// all. Loads and readings by the same weights; points that carry no structure in this
/// configuration drop out of both. The pair is in equilibrium, so pins carry nothing.
///
/// Shear: unit force on the first and last section by in-plane area, with the couples that balance
/// it; the bending part is taken off by each bay's own EI.
/// @pre at least two sections, in order from aft.
/// @throws SolveError if fewer than four points of a section carry structure.
GirderStiffness girder_stiffness(const Structure& structure, const HullSolver& solver,
                                 const std::vector<EndSection>& sections);
} // namespace carlin
