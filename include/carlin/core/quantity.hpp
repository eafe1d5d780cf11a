#pragma once

#include <string>
#include <string_view>

namespace carlin
{
/// Kind of a quantity: what a unit in the model file must convert to.
enum class Dimension
{
  none,
  length,
  area,
  second_moment, // m^4
  volume,
  mass,
  density, // kg/m^3
  mass_per_area,
  mass_per_length,
  time,
  speed,
  acceleration, // "2.5 g" is standard gravity here, and only here
  angle,
  angular_acceleration,
  force,
  moment,
  pressure,             // also Young's modulus and stress
  force_per_length,     // also stiffness of a spring, N/m
  stiffness_per_length, // N/m per m of joint
  bed_stiffness,        // N/m^3
  rotational_stiffness, // N m/rad
  rotational_stiffness_per_length,
  axial_stiffness,    // EA [N]
  bending_stiffness,  // EI [N m^2]
  temperature,        // absolute: "15 degC" is 288.15 K
  temperature_change, // "40 K" or "40 delta_degC"
  thermal_expansion,  // 1/K
  frequency,
  moment_of_inertia, // kg m^2
};

/// SI unit of a dimension as printed in headings: "m", "N/m^3", "-".
std::string_view unit_of(Dimension dimension);

/// Name of a dimension in words, for messages: "a length", "a pressure".
std::string_view name_of(Dimension dimension);

/// What to write, for messages and the reference: "6 mm", "210 GPa".
std::string_view example_of(Dimension dimension);

/// Value in SI of a quantity written with its unit: "6 mm" -> 0.006, "210 GPa" -> 2.1e11.
/// Angles are returned in rad. A dimensionless quantity takes a bare number or a percentage ("8
/// %").
/// @throws ValueError with what was written and an example of what is expected: no number, a bare
///   number where a unit is due, an unknown unit, a unit of another dimension, NaN or infinity, and
///   the look-alikes `kn`/`Kn` (is it knot or kN?).
/// Source of unit definitions: the UDUNITS-2 database.
double quantity_in_si(std::string_view text, Dimension dimension);

/// Value in SI of a quantity of whatever dimension its unit says; for limits whose dimension
/// another stage knows. A bare number is dimensionless.
/// @throws ValueError as above; also for "3 g", which may be a mass or an acceleration.
double quantity_of_any_dimension(std::string_view text);
} // namespace carlin
