#pragma once

#include "carlin/core/types.hpp"
#include "carlin/description/parts.hpp"

#include <optional>
#include <string>
#include <utility>
#include <variant>
#include <vector>

namespace carlin
{
enum class CaseClass
{
  service,
  rare,
  accidental
};

// States persist until changed.

enum class WaterState
{
  none,   ///< nothing acts on the hull; gravity neither
  afloat, ///< gravity on everything, balanced by buoyancy on the bottom: level, still water
  gravity ///< gravity alone, carried by named supports (structures without a hull)
};

struct TankState
{
  std::vector<std::string> tanks;    ///< empty: all
  std::optional<double> pressure;    ///< gauge [Pa]
  std::optional<double> temperature; ///< [K]
  std::optional<bool> is_full;       ///< contents aboard
};

struct HullTemperature
{
  std::vector<std::string> parts; ///< empty: all
  double temperature = 0.0;       ///< [K]
};

// Events act in their own stage only.

enum class PatchPlace
{
  forward,
  amidships,
  aft
};

/// Landing on a patch of bottom whose pressure times area equals the craft's mass times g (1 + n).
/// Given: `acceleration` n [m/s^2] or `by_standard`, with or without `pressure`; or `pressure` and
/// `length`, whose acceleration is the result.
struct Landing
{
  FileLocation where;
  PatchPlace place = PatchPlace::amidships;
  Sides sides = Sides::both;
  std::optional<double> acceleration; ///< of the centre of gravity, upward, n times g [m/s^2]
  bool by_standard = false;           ///< n from ISO 12215-5:2008, dynamic load factor
  std::optional<double> pressure;     ///< on the patch [Pa]; absent: two thirds of the standard's
                                      ///< larger bottom base pressure, see loads
  std::optional<double>
      length; ///< of the patch along x [m], with `pressure` and without `acceleration`
};

/// Acceleration felt by tanks alone, in boat axes: the tank carries exactly mass x this; the
/// opposite force is balanced by the rest of the craft.
struct HoldingAcceleration
{
  FileLocation where;
  std::vector<std::string> tanks; ///< empty: all
  Vector3 felt = Vector3::Zero(); ///< force on the tank = mass x felt [m/s^2]
};

/// Force and moment at a named frame point, or spread over a footprint of the hull.
struct DirectForce
{
  FileLocation where;
  std::string point; ///< frame point, or empty
  std::optional<FootprintArea> footprint;
  Vector3 force = Vector3::Zero();  ///< [N]
  Vector3 moment = Vector3::Zero(); ///< [N m]
};

/// Line load on frame members, pressure on parts.
struct LineForce
{
  FileLocation where;
  std::vector<std::string> members;
  Vector3 force_per_length = Vector3::Zero(); ///< global axes [N/m]
};

struct PartPressure
{
  FileLocation where;
  std::vector<std::string> parts;
  double pressure = 0.0; ///< positive pushes along the part's inward normal [Pa]
  PlaneRange stations;
};

/// Force on tanks along or across their axis, at a distance from axis_from.
struct TankForce
{
  FileLocation where;
  std::string tank;
  double position = 0.0;           ///< [m]
  Vector3 force = Vector3::Zero(); ///< boat axes [N]
};

/// Motion imposed on the feet of a rigid bed, or on supports, in this stage (a state: persists).
struct FootMotion
{
  FileLocation where;
  std::string tank, collar;              ///< whose feet; collar empty: all of the tank
  Vector3 translation = Vector3::Zero(); ///< [m]
  Vector3 rotation = Vector3::Zero();    ///< [rad]
};

/// Extra free growth given as figures instead of pressure and temperature (verification cases).
struct GivenGrowth
{
  FileLocation where;
  std::string tank;
  double axial_strain = 0.0; ///< [-]
  double radial = 0.0;       ///< outward, at the lining [m]
};

using Event =
    std::variant<Landing, HoldingAcceleration, DirectForce, LineForce, PartPressure, TankForce>;

struct Stage : Named
{
  std::optional<WaterState> water;
  std::vector<TankState> tanks;
  std::vector<HullTemperature> hull_temperatures;
  std::vector<FootMotion> foot_motions;         ///< persist until changed
  std::vector<GivenGrowth> growths;             ///< persist until changed
  std::vector<std::pair<Event, double>> events; ///< with their factors
};

/// A history of stages. The first is the fitting.
struct LoadCase : Named
{
  CaseClass load_class = CaseClass::service;
  std::vector<Stage> stages;
};
} // namespace carlin
