#pragma once

#include "carlin/structure/structure.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// A coefficient or formula used, with its status, for the report.
struct LoadNote
{
  std::string text;   ///< "n_CG = 0.32 (LWL/(10 BC) + 0.084)(50 - deadrise) V^2 BC^2 / m = 2.31"
  std::string source; ///< "ISO 12215-5:2008, from memory: check the standard"
};

/// Water load on the hull, or another load on shells and members, as nodal forces.
struct HullLoad
{
  VectorX forces; ///< 6 n [N, N m]
  std::vector<std::pair<Index, double>>
      shell_pressures; ///< shell, pressure along the inward normal [Pa]
  std::vector<std::pair<Index, Vector12>> member_loads; ///< member, its equivalent nodal forces
  std::vector<LoadNote> notes;
};

/// Dynamic load factor n_CG of a planing monohull and bottom base pressures.
/// Source: ISO 12215-5:2008 (+A1:2014), from memory, check the standard; reproduced on one worked
/// example.
struct SmallCraftFactors
{
  double dynamic_load_factor = 0.0;      ///< n_CG [-] in g
  double bottom_base_displacement = 0.0; ///< [Pa]
  double bottom_base_planing = 0.0;      ///< [Pa]
  double side_minimum = 0.0;             ///< [Pa]
  double deck_base = 0.0;                ///< [Pa]
  std::vector<LoadNote> notes;
};
/// @param mass Loaded mass [kg]; waterline_length, chine_beam [m]; deadrise [rad]; speed [m/s];
/// @throws ValueError for values outside the formula's range.
SmallCraftFactors small_craft_factors(double mass, double waterline_length, double chine_beam,
                                      double deadrise, double speed, char design_category);

/// Landing patch: pressure p over a band of bottom, sized so that its upward force is
/// mass x g x (1 + n). Partly covered shells take their share of pressure, so the size is exact.
/// The band lies about 0.75 (forward), 0.5 or 0.25 (aft) of the bottom's length. Without a given
/// pressure it is two thirds of the standard's larger base bottom pressure: a patch of 4.7 m2 for
/// the launch of the loads book, section 1. Both are this project's choice; common practice, no
/// source.
/// @param craft_mass Of the whole craft, tanks included [kg].
struct LandingLoad
{
  HullLoad load;
  double acceleration = 0.0;       ///< n g, of the centre of gravity [m/s^2]
  double pressure = 0.0;           ///< [Pa]
  double area = 0.0;               ///< of bottom under the patch, developed [m^2]
  double x_from = 0.0, x_to = 0.0; ///< [m]
};
/// @throws ValueError when the bottom is too small for the force at that pressure.
LandingLoad landing_load(const Structure& structure, const Landing& landing, const Craft& craft,
                         double craft_mass);

/// Still water: hydrostatic pressure on the outer shells (bottom, side) below a level or trimmed
/// plane that balances weight and moments (heave, trim, heel by Newton); pressure integrated on cut
/// cells. Exact: weight and buoyancy on one normal of the plane, no residual moment.
struct Flotation
{
  double draught = 0.0;          ///< of the plane at x = 0, y = 0 above z = 0 [m]
  double trim = 0.0;             ///< slope dz/dx of the water plane [-], bow-down positive
  double heel = 0.0;             ///< slope dz/dy of the water plane [-]
  Vector3 up = Vector3::UnitZ(); ///< unit normal of the water plane
  double displaced_mass = 0.0;   ///< [kg]
  HullLoad load;
};
/// @throws SolveError when the hull cannot carry the weight (would be swamped), or its outer shell
/// is open below the water.
Flotation still_water(const Structure& structure, const MassProperties& craft);

/// Gravity on the structure's own mass: -g z (6 n).
VectorX gravity_forces(const Structure& structure);
/// The same against `up`, the unit normal of the water: of a trimmed boat the two differ by a
/// uniform acceleration, which inertia relief takes up; only with this one is it zero.
VectorX gravity_forces(const Structure& structure, const Vector3& up);

/// Thermal forces of temperature rises by part index [K] (size of mesh.parts).
VectorX thermal_forces(const Structure& structure, const std::vector<double>& rise_by_part);

HullLoad direct_force(const Structure& structure, const DirectForce& load);
HullLoad line_force(const Structure& structure, const LineForce& load);
HullLoad part_pressure(const Structure& structure, const PartPressure& load);
} // namespace carlin
