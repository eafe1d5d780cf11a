#pragma once

#include "carlin/core/types.hpp"
#include "carlin/description/parts.hpp"

#include <array>
#include <optional>
#include <string>
#include <vector>

namespace carlin
{
/// A value with the ends of its range; a plain value has low = high.
struct Range
{
  double low = 0.0;
  double high = 0.0;
};

/// Growth as stated by the maker or measured: changes at a stated pressure, linear in pressure.
struct StatedGrowth
{
  FileLocation where;
  double pressure = 0.0;        ///< gauge [Pa]; the changes are those from 0 to this pressure
  double length_change = 0.0;   ///< along the axis over `gauge_length`; [m]
  double gauge_length = 0.0;    ///< [m]
  double diameter_change = 0.0; ///< [m]
  double diameter = 0.0;        ///< the diameter that changes [m]
};

/// What the tank's maker allows. Absent: the check is not judged.
struct TankLimits
{
  std::optional<double> axial_force;     ///< largest axial force in the tank, either sense [N]
  std::optional<double> bending_moment;  ///< [N m]
  std::optional<double> torsion;         ///< [N m]
  std::optional<double> collar_force;    ///< resultant transverse force at one collar [N]
  std::optional<double> clamping_force;  ///< total pressing of ring on tank [N]
  std::optional<double> lining_pressure; ///< peak [Pa]
};

/// Spring of a foot in the tank's axes: 1 along the tank, 2 across (axis 3 x axis 1), 3 upright,
/// i.e. square to the tank and as near to global z as can be (for an upright tank: as near to
/// global x). Order: three forces [N/m], three moments [N m/rad]. Infinity: rigid; 0: carries
/// nothing.
using FootStiffness = std::array<double, 6>;

/// One foot of a seat: where it stands on the hull and how stiff it is up to the ring.
struct Foot : Named
{
  FootprintArea footprint;
  FootStiffness stiffness{};
};

enum class CollarKind
{
  fixed,
  sliding
};

enum class SlidesAt
{
  lining, ///< tank slides in the ring: friction on the clamping force
  foot,   ///< ring grips the tank, the feet slide on the hull: friction on the foot's own load
  neck    ///< tank's neck slides in a bush: friction on the transverse force
};

/// Ring with a Winkler lining. Absent in a collar: rigid across, no clamping, no tilt stiffness.
struct LinedRing
{
  double radius = 0.0;        ///< of the tank's outer face at the lining [m]
  double width = 0.0;         ///< along the tank [m]
  double bed_stiffness = 0.0; ///< of the lining [Pa/m]
  double preload = 0.0;       ///< fitted interference; negative: clearance; [m]
  bool is_tilt_rigid = false; ///< stiffness pi k r w^3 / 12 in tilt, or none but the pivot's
};

/// A collar. Rotations about the tank's axes 1 (turning), 2, 3 (tilt).
struct Collar : Named
{
  CollarKind kind = CollarKind::fixed;
  double position = 0.0;  ///< along the axis from `axis_from` [m]
  std::vector<Foot> feet; ///< at least one
  std::array<std::optional<double>, 3> pivot_stiffness{
      0.0, 0.0, 0.0}; ///< [N m/rad]; 0 released, absent: locked
  std::optional<LinedRing> ring;
  // fixed: held by a key (unlimited) or by a grip
  std::optional<Range> grip_force; ///< limit on axial and turning force together [N]; absent: keyed
  // sliding
  SlidesAt slides_at = SlidesAt::lining;
  Range friction{};               ///< Coulomb coefficient [-]
  double foot_bolt_preload = 0.0; ///< normal load of bolts on each sliding foot [N]
  std::optional<double>
      stroke_aft; ///< travel of the tank towards axis_from before a stop [m]; absent: no stop
  std::optional<double> stroke_forward; ///< towards axis_to [m]
  std::optional<double> stop_stiffness; ///< [N/m]; absent: rigid stops
};

/// A tank: a beam along its axis with growth.
struct Tank : Named
{
  Vector3 axis_from = Vector3::Zero(); ///< ends of the tank [m]
  Vector3 axis_to = Vector3::Zero();
  double diameter = 0.0;            ///< outside [m]
  double mass = 0.0;                ///< of the shell with fittings [kg]
  double contents_mass = 0.0;       ///< of gas or liquid when full, present when `is_full` [kg]
  double volume = 0.0;              ///< [m^3]; 0: not given
  double axial_stiffness = 0.0;     ///< EA [N]
  double bending_stiffness = 0.0;   ///< EI [N m^2]
  double torsional_stiffness = 0.0; ///< GJ [N m^2]; 0: taken as EI / 1.3 and said so in the output
  double shear_stiffness = 0.0;     ///< GA [N]; 0: rigid in shear
  std::optional<StatedGrowth> growth;
  double axial_expansion = 0.0;         ///< thermal [1/K]
  double radial_expansion = 0.0;        ///< thermal [1/K]
  double fibre_ultimate_strain = 0.021; ///< for the growth warning [-]; from memory, carbon
  double burst_ratio = 2.25;            ///< for the growth warning [-]; from memory, carbon
  TankLimits limits;
  std::vector<Collar> collars; ///< at least one
};
} // namespace carlin
