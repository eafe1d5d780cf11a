#pragma once

#include "carlin/core/types.hpp"
#include "carlin/description/tanks.hpp"

#include <string>
#include <vector>

namespace carlin
{
/// Right-handed axes of a tank as columns: 1 along, from axis_from to axis_to; 3 upright (square to
/// 1, nearest to global z, of an upright tank to global x); 2 = 3 x 1.
Matrix3 tank_axes(const Tank& tank);

/// A foot of a collar of a tank: rows 6 f .. 6 f + 5 of everything "at the feet", global axes.
struct FootRef
{
  Index tank = 0, collar = 0, foot = 0;
  Vector3 point = Vector3::Zero(); ///< where it stands [m]
};
/// All feet in order of tank, collar, foot.
std::vector<FootRef> feet_of(const std::vector<Tank>& tanks);

/// What acts on one tank at the end of a stage.
struct TankStageLoad
{
  double mass = 0.0; ///< shell and contents now [kg], spread evenly over the length
  Vector3 felt =
      Vector3::Zero(); ///< gravity less acceleration at `about`: force per mass [m/s^2], global
  Vector3 angular =
      Vector3::Zero(); ///< angular acceleration [rad/s^2]: felt(x) = felt - angular x (x - about)
  Vector3 about = Vector3::Zero(); ///< [m]
  double axial_strain = 0.0;       ///< free growth along the axis [-]
  double radial_growth = 0.0;      ///< free growth of the radius at the lining [m]
  std::vector<std::pair<double, Vector3>>
      forces; ///< (position along the axis [m], force [N], global)
};

/// End of a stage: loads and the motion of the feet that the hull would have if no collar force
/// acted, less its value at the fitting (6 a foot, global axes, [m] and [rad]).
struct MountStage
{
  std::string name;
  std::vector<TankStageLoad> tanks;
  VectorX foot_motion;
};

/// Which end of the ranges of friction (slides) and grip this history is run at.
enum class RangeEnd
{
  low,
  high
};

/// Ends at which a history is run: friction of slides, grips of fixed collars.
struct RangeEnds
{
  RangeEnd slides = RangeEnd::high;
  RangeEnd grips = RangeEnd::high;
};

enum class Hold
{
  keyed, ///< fixed, by a key
  grips, ///< fixed by grip, or sliding collar that sticks
  slips, ///< sliding
  at_stop,
  grip_lost, ///< a gripping fixed collar has slipped: a check not met
  open       ///< no contact
};

struct CollarResult
{
  Vector6 force = Vector6::Zero(); ///< hull on tank at the collar's centre, tank axes: along,
                                   ///< across, upright; moments
  double clamping_force = 0.0;     ///< N, pressing of ring on tank; 0 without a ring [N]
  double friction_limit = 0.0;     ///< what friction or grip can carry now [N]; infinite when keyed
  double friction_force = 0.0;  ///< along, part of `force` carried by friction or grip, signed [N]
  double stop_force = 0.0;      ///< along, carried by a stop, signed [N]
  double slip = 0.0;            ///< of the tank against ring or hull, towards axis_to + [m]
  double turn = 0.0;            ///< slip about the axis [rad]
  double stroke_left_aft = 0.0; ///< to the stop; infinite without one [m]
  double stroke_left_forward = 0.0;
  double interference = 0.0;              ///< e now [m]
  double offset = 0.0;                    ///< d now [m]
  double peak_lining_pressure = 0.0;      ///< [Pa]
  Vector3 displacement = Vector3::Zero(); ///< of the ring's centre, global [m]
  Hold hold = Hold::keyed;
  std::vector<Vector6>
      foot_forces;                ///< on the hull at each foot's point, global axes (force, moment)
  std::vector<double> foot_slips; ///< of each foot when it slides at the foot [m]
};

/// Section of a tank: position along the axis and what is there.
struct TankSection
{
  double position = 0.0;                  ///< [m]
  Vector3 displacement = Vector3::Zero(); ///< of the axis, global [m]
  double axial_force = 0.0;          ///< compression +, without the pressure's own end thrust [N]
  Vector2 shear = Vector2::Zero();   ///< axes 2, 3 [N]
  double torsion = 0.0;              ///< [N m]
  Vector2 bending = Vector2::Zero(); ///< about axes 2, 3 [N m]
};

struct TankResult
{
  std::vector<CollarResult> collars;
  std::vector<TankSection>
      sections; ///< from axis_from to axis_to; both sides of a collar where forces jump
  double largest_axial_force = 0.0; ///< by magnitude, signed, compression + [N]
  double largest_bending = 0.0;     ///< [N m]
  double largest_torsion = 0.0;     ///< [N m]
};

struct MountStageResult
{
  std::string name;
  std::vector<TankResult> tanks;
  VectorX foot_forces;               ///< on the hull, 6 a foot, global axes
  double work_lost = 0.0;            ///< by friction since the fitting [J]
  double equilibrium_residual = 0.0; ///< worst tank imbalance over its largest force [-]
  int events = 0, iterations = 0;
  std::vector<std::string>
      not_held; ///< "tank-1 is not held along its axis: ..." ; the history ends here
};

/// Runs a history of all tanks together on the hull's flexibility.
///
/// @param flexibility Motion of all feet under unit forces at all feet, 6 nf x 6 nf, global axes;
/// hull's
///   rigid motion may be in it in any determinate way. Zero: rigid bed.
/// @return One result a stage; fewer when a tank is not held any more: the last is then that of the
/// stage where it was lost, with `not_held`, no tanks and no foot forces. A tank pulled beyond
/// friction runs to a stop in its way.
/// @throws SolveError naming the collar that will not settle, and why; ValueError when sizes do not
///   match, or the first stage has growth or foot motion.
/// What the hull gives under the tank's weight at the fitting is no motion of the feet: the tank is
///   laid into the hull as it lies.
/// A foot's spring stands at the foot's point under a rigid arm from the ring: feet whose moments
///   carry nothing must hold the seat up as a group. Point forces act on the axis. A tank free to
///   turn about its axis in every collar is taken not to turn. Rigid stops give 1e-16 m/N.
/// Method: design, section 7: unknown collar forces on the condensed flexibility of tanks, seats
/// and hull;
///   friction rigid-plastic (no stick spring), semi-smooth Newton with projection on the friction
///   disc (Alart & Curnier 1991), stages cut at events.
std::vector<MountStageResult> run_history(const std::vector<Tank>& tanks,
                                          const MatrixX& flexibility,
                                          const std::vector<MountStage>& stages, RangeEnds ends);

/// The same with slides and grips at one end.
inline std::vector<MountStageResult> run_history(const std::vector<Tank>& tanks,
                                                 const MatrixX& flexibility,
                                                 const std::vector<MountStage>& stages,
                                                 RangeEnd end)
{
  return run_history(tanks, flexibility, stages, RangeEnds{end, end});
}

/// True if a fixed collar's grip has a range: then slides and grips are run at crossed ends too.
bool has_grip_range(const std::vector<Tank>& tanks);
} // namespace carlin
