#pragma once

#include "beam.hpp"
#include "seats.hpp"

#include <limits>

namespace carlin::mounts
{
/// What a slide's friction or grip depends on.
enum class LimitKind
{
  constant,   ///< a stated grip
  ring,       ///< coefficient times clamping force of the lined ring
  transverse, ///< coefficient times transverse collar force
  foot        ///< coefficient times (pressing of the foot + bolt preload)
};

/// A place where friction or a grip acts: between tank and ring, along the tank and about its axis,
/// or between one foot and the hull, along the tank. `first` is its first unknown and row:
/// friction along f1, slip s, stop force; then, with `has_turn`, turning friction f4 = M/r and r
/// times the turn. Forces on the tank's side, slip of the tank's side, both towards axis_to +.
struct Slide
{
  Index tank = 0, collar = 0; ///< collar counted over all tanks
  Index foot = -1;            ///< counted over all tanks; -1: at the ring
  LimitKind kind = LimitKind::constant;
  double coefficient = 0.0; ///< friction [-], or 1
  double constant = 0.0;    ///< grip, or bolt preload times coefficient [N]
  double press_sign = -1.0; ///< of the upright force on the hull that presses the foot
  bool has_turn = false;
  double radius = 1.0; ///< of turning friction [m]
  double aft = std::numeric_limits<double>::infinity();
  double forward = std::numeric_limits<double>::infinity();
  double stop_compliance = 0.0; ///< [m/N]
  Index first = 0;

  Index width() const { return has_turn ? 5 : 3; }
  bool is_frictionless() const { return kind != LimitKind::constant && coefficient == 0.0; }
};

struct RingLaw
{
  Index collar = 0;
  double stiffness = 0.0; ///< r w k [N/m]
  double preload = 0.0;   ///< [m]
  double bed = 0.0;       ///< k [Pa/m]
};

/// The linear part, built once a history. Unknowns x: collar forces (6 a collar, tank axes), rigid
/// motions of the tanks' middles (6 a tank), idle ring motions, slides. Rows in the same order:
/// collar laws, equilibrium, idle motions, slides.
struct Model
{
  std::vector<Beam> beams;
  std::vector<Index> tank_of_collar;
  std::vector<double> position_of_collar;
  std::vector<Index> ring_of_collar; ///< -1: none
  std::vector<std::string> tank_names, collar_names;
  Seats seats;
  std::vector<Slide> slides;
  std::vector<RingLaw> rings;
  Index collar_count = 0, tank_count = 0, idle_count = 0, size = 0;
  MatrixX linear;    ///< size x size: rows that never change; ring, friction and stop rows zero
  MatrixX magnitude; ///< its absolute values, for round-off bounds
  MatrixX relative;  ///< 6 collars x size: tank against ring, pivots included [m, rad]
  VectorX row_scale, column_scale; ///< motions against forces, for conditioning

  Index rigid(Index tank) const { return 6 * (collar_count + tank); }
  Index idle() const { return 6 * (collar_count + tank_count); }
};

/// @throws ValueError when the description cannot be modelled.
Model make_model(const std::vector<Tank>& tanks, const MatrixX& flexibility, RangeEnds ends);

/// All that depends linearly on how far a stage has gone.
struct LoadState
{
  VectorX rows;         ///< added to linear * x
  VectorX relative;     ///< added to relative * x, 6 collars
  VectorX press;        ///< of each slide's foot without collar forces
  VectorX interference; ///< of each ring
};

LoadState zero_loads(const Model& model);
LoadState make_loads(const Model& model, const MountStage& stage);
LoadState blend(const LoadState& from, const LoadState& to, double t);
LoadState difference(const LoadState& from, const LoadState& to);
} // namespace carlin::mounts
