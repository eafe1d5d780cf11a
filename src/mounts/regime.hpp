#pragma once

#include "newton.hpp"

#include <string>

namespace carlin::mounts
{
/// Where the history stands: x and what every slide does.
struct Position
{
  VectorX x;
  Regime regime;
  VectorX rate;           ///< dx/dt of the stage, after choose_regime
  double jump_work = 0.0; ///< lost by friction while a tank ran to a stop in choose_regime [J]
};

/// Chooses what every slide at its limit and every stop at its gap does next, so that friction
/// opposes slip and no limit is passed: a linear complementarity problem in rates, solved by least
/// index pivoting (Murty 1974), by trying all combinations where that does not end. A tank pulled
/// beyond all friction runs to the first stop in its way, quasi-statically, loads held.
/// @param reached Slides that came to their limit by an event just now are taken as slipping first.
/// @return Empty, or why a tank is not held any more.
/// @throws SolveError naming tank and collar when there is no consistent choice.
enum class Arrival
{
  stage_start,
  event
};
std::string choose_regime(Stage& stage, Position& position, double t, Arrival arrival);

/// How far past its status each slide is at x, in newtons; positive: an event has passed. Three a
/// slide: motion, stop aft, stop forward. @param rate dx/dt at x, or empty when it is not needed.
VectorX event_excess(const Stage& stage, const Position& start, const VectorX& x, double t,
                     const VectorX& rate);
} // namespace carlin::mounts
