#pragma once

#include "model.hpp"

#include "carlin/mounts/ring.hpp"

namespace carlin::mounts
{
enum class Motion
{
  stick,
  slip,
  free ///< no friction: none given, or no contact
};
enum class Contact
{
  open,
  aft,
  forward
};

/// What one slide does now; between events it stays.
struct Status
{
  Motion motion = Motion::stick;
  Contact stop = Contact::open;
  Vector2 direction = Vector2::Zero();  ///< of slip (along, r times turn)
  Vector2 transverse = Vector2::Zero(); ///< of a transverse force that is just rising
};
using Regime = std::vector<Status>;

/// What friction or grip can carry, with its gradient and its rate at x held.
struct Limit
{
  double value = 0.0;
  VectorX gradient; ///< by x; empty: constant
  double rate = 0.0;
};

Limit slide_limit(const Model& model, Index slide, const Status& status, const LoadState& now,
                  const LoadState& rate, const VectorX& x);

/// State of a lined ring.
struct RingState
{
  Vector2 offset = Vector2::Zero(); ///< of the tank against the ring, axes 2 and 3 [m]
  double distance = 0.0;            ///< its length [m]
  RingResponse response;            ///< per r w k = 1
};
RingState ring_state(const Model& model, Index ring, const LoadState& now, const VectorX& x);

/// Contact of a slide in newtons; negative: a ring in its gap, a foot lifted, nothing to rub on.
/// Infinite where friction does not need contact.
double contact_margin(const Model& model, Index slide, const LoadState& now, const VectorX& x);

/// Friction of a slide and its slip: (along, turning).
Vector2 friction_of(const Slide& slide, const VectorX& x);
Vector2 slip_of(const Slide& slide, const VectorX& x);

/// Equations under a regime: residual and its derivatives by x and by the stage parameter.
struct Equations
{
  MatrixX jacobian;
  VectorX residual, rate, magnitude; ///< magnitude: sum of absolute terms, for round-off bounds
};

/// @param start x at the last event: slips count from it.
void assemble(const Model& model, const Regime& regime, const VectorX& start, const LoadState& now,
              const LoadState& rate, const VectorX& x, Equations& equations);
} // namespace carlin::mounts
