#pragma once

#include "carlin/core/error.hpp"

#include <optional>
#include <string>
#include <variant>

namespace carlin
{
/// What every named entry of a model carries: its name and where it stands in the file.
struct Named
{
  std::string name;
  FileLocation where;
};

/// Isotropic linear elastic material.
struct Material : Named
{
  double youngs_modulus = 0.0;                 ///< [Pa]
  double poissons_ratio = 0.0;                 ///< [-]
  double density = 0.0;                        ///< [kg/m^3]
  double thermal_expansion = 0.0;              ///< [1/K]
  std::optional<double> yield_strength;        ///< 0.2 % proof, parent metal [Pa]
  std::optional<double> welded_yield_strength; ///< 0.2 % proof beside a weld [Pa]
  std::optional<double> ultimate_strength;     ///< [Pa]
  std::string source;                          ///< where the figures come from, printed beside them
};

/// Where the plate lies with respect to the moulded line that the hull points describe.
enum class MouldedLine
{
  inside, ///< plate thickness inward of the line
  centred,
  outside
};

/// Plate schedule: what a piece of plating is made of.
struct Schedule : Named
{
  std::string material;
  double thickness = 0.0; ///< [m]
  MouldedLine line = MouldedLine::inside;
};

// Shapes of member profiles. Heights are measured from the plating outward along `stands`.
struct FlatBar
{
  double height = 0.0, thickness = 0.0; ///< [m]
};
struct Tee
{
  double web_height = 0.0, web_thickness = 0.0, flange_width = 0.0, flange_thickness = 0.0; ///< [m]
};
/// Web on the plating, one flange at its far edge pointing to the toe.
struct AngleBar
{
  double web_height = 0.0, web_thickness = 0.0, flange_width = 0.0, flange_thickness = 0.0; ///< [m]
};
struct Tube
{
  double outside_diameter = 0.0, wall_thickness = 0.0; ///< [m]
};
struct BoxBar
{
  double height = 0.0, width = 0.0, wall_thickness = 0.0; ///< outside dimensions [m]
};
/// Section given by its constants, about the centroid; local z stands off the plating, local y is
/// the toe side.
struct GivenSection
{
  double area = 0.0;             ///< [m^2]
  double second_moment_y = 0.0;  ///< about local y, bends in the standing plane [m^4]
  double second_moment_z = 0.0;  ///< about local z [m^4]
  double torsion_constant = 0.0; ///< [m^4]
  std::optional<double> shear_area_y, shear_area_z; ///< [m^2]; absent: rigid in shear
  double centroid_height = 0.0; ///< from the foot of the profile to its centroid [m]
  double depth = 0.0;           ///< for stress at the far face; 0: not given [m]
};
using ProfileShape = std::variant<FlatBar, Tee, AngleBar, Tube, BoxBar, GivenSection>;

struct Profile : Named
{
  std::string material;
  ProfileShape shape;
};
} // namespace carlin
