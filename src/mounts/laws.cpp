#include "laws.hpp"

#include <cmath>

namespace carlin::mounts
{
namespace
{
constexpr double pi = 3.14159265358979323846;

/// In a gap the lining centres the tank with this part of its stiffness, so that a tank that floats
/// in its clearance has one place; 1e-10 of a force on it.
constexpr double gap_stiffness = 1e-10;

/// Weight of slip against friction in the projection on the friction disc [N/m]; any value gives
/// the same solution.
constexpr double projection_weight = 1e8;

Matrix2 ring_tangent(const RingState& ring)
{
  const RingResponse& response = ring.response;
  Matrix2 tangent = response.reaction_over_offset * Matrix2::Identity();
  if (ring.distance > 0.0)
  {
    const Vector2 n = ring.offset / ring.distance;
    tangent += (response.reaction_by_offset - response.reaction_over_offset) * n * n.transpose();
  }
  return tangent + gap_stiffness * Matrix2::Identity();
}

void add_ring_rows(const Model& model, Index r, const LoadState& now, const LoadState& rate,
                   const VectorX& x, Equations& equations)
{
  const RingLaw& law = model.rings[static_cast<std::size_t>(r)];
  const Index row = 6 * law.collar + 1;
  const RingState ring = ring_state(model, r, now, x);
  const double compliance = 1.0 / (pi * law.stiffness); // rows in metres
  const Matrix2 tangent = ring_tangent(ring) / pi;
  equations.jacobian.middleRows(row, 2) = tangent * model.relative.middleRows(row, 2);
  equations.jacobian(row, row) += compliance;
  equations.jacobian(row + 1, row + 1) += compliance;
  const Vector2 push = (ring.response.reaction_over_offset + gap_stiffness) / pi * ring.offset;
  equations.residual.segment<2>(row) = compliance * x.segment<2>(row) + push;
  equations.magnitude.segment<2>(row) =
      (model.relative.middleRows(row, 2).cwiseAbs() * x.cwiseAbs()) +
      compliance * x.segment<2>(row).cwiseAbs();
  Vector2 by_time = tangent * rate.relative.segment<2>(row);
  if (ring.distance > 0.0)
    by_time += ring.response.reaction_by_interference * rate.interference(r) /
               (pi * ring.distance) * ring.offset;
  equations.rate.segment<2>(row) = by_time;
}

void add_stop_row(const Slide& slide, const Status& status, const VectorX& start, const VectorX& x,
                  Equations& equations)
{
  const Contact stop = status.stop;
  const Index row = slide.first + 2;
  const Index slip = slide.first + 1;
  equations.rate(row) = 0.0;
  if (stop == Contact::open)
  {
    equations.jacobian(row, row) = 1.0;
    equations.residual(row) = x(row);
    equations.magnitude(row) = std::abs(x(row));
    return;
  }
  if (status.motion == Motion::stick) // no slip, so the stop keeps what it has
  {
    equations.jacobian(row, row) = 1.0;
    equations.residual(row) = x(row) - start(row);
    equations.magnitude(row) = std::abs(start(row));
    return;
  }
  // In newtons, by the weight of slip: s - gap + c (stop force) = 0
  const double gap = stop == Contact::forward ? slide.forward : -slide.aft;
  equations.jacobian(row, slip) = projection_weight;
  equations.jacobian(row, row) = projection_weight * slide.stop_compliance;
  equations.residual(row) = projection_weight * (x(slip) - gap + slide.stop_compliance * x(row));
  equations.magnitude(row) = projection_weight * (std::abs(x(slip)) + std::abs(gap));
}

void add_stick_rows(const Slide& slide, const VectorX& start, const VectorX& x,
                    Equations& equations)
{
  for (const Index i : {slide.first + 1, slide.first + 4})
  {
    if (i == slide.first + 4 && !slide.has_turn)
      continue;
    equations.jacobian(i, i) = projection_weight;
    equations.residual(i) = projection_weight * (x(i) - start(i));
    equations.magnitude(i) = projection_weight * std::abs(start(i));
  }
}

/// f = S (f - rho dz)/|f - rho dz| along and about the axis, or f = -S n along alone.
void add_slip_rows(const Slide& slide, const Status& status, const Limit& limit,
                   const VectorX& start, const VectorX& x, Equations& equations)
{
  const Vector2 force = friction_of(slide, x);
  const Vector2 moved = slip_of(slide, x) - slip_of(slide, start);
  Vector2 sense = -status.direction;
  Matrix2 turn = Matrix2::Zero();
  if (slide.has_turn)
  {
    const Vector2 trial = force - projection_weight * moved;
    const double length = trial.norm();
    if (length > 0.0)
    {
      sense = trial / length;
      turn = limit.value / length * (Matrix2::Identity() - sense * sense.transpose());
    }
  }
  const std::array<Index, 2> rows{slide.first + 1, slide.first + 4};
  const std::array<Index, 2> forces{slide.first, slide.first + 3};
  const Index count = slide.has_turn ? 2 : 1;
  for (Index i = 0; i < count; ++i)
  {
    const Index row = rows[static_cast<std::size_t>(i)];
    if (limit.gradient.size() > 0)
      equations.jacobian.row(row) = -sense(i) * limit.gradient.transpose();
    for (Index j = 0; j < count; ++j)
    {
      const auto uj = static_cast<std::size_t>(j);
      equations.jacobian(row, forces[uj]) += (i == j ? 1.0 : 0.0) - turn(i, j);
      equations.jacobian(row, rows[uj]) += projection_weight * turn(i, j);
    }
    equations.residual(row) = force(i) - limit.value * sense(i);
    equations.magnitude(row) = std::abs(force(i)) + limit.value;
    equations.rate(row) = -sense(i) * limit.rate;
  }
}

/// Pressing of a foot by x.
VectorX press_gradient(const Model& model, const Slide& slide)
{
  const Index upright = 6 * slide.foot + 2;
  VectorX press = VectorX::Zero(model.size);
  press.head(6 * model.collar_count) =
      slide.press_sign * model.seats.foot_by_force.row(upright).transpose();
  Index column = 0;
  for (const Slide& moving : model.slides)
    if (moving.foot >= 0)
      press(moving.first + 1) = slide.press_sign * model.seats.foot_by_slip(upright, column++);
  return press;
}

void add_free_rows(const Slide& slide, const VectorX& x, Equations& equations)
{
  for (const Index i : {slide.first, slide.first + 3})
  {
    if (i == slide.first + 3 && !slide.has_turn)
      continue;
    equations.jacobian(i + 1, i) = 1.0;
    equations.residual(i + 1) = x(i);
    equations.magnitude(i + 1) = std::abs(x(i));
  }
}
} // namespace

RingState ring_state(const Model& model, Index ring, const LoadState& now, const VectorX& x)
{
  const Index row = 6 * model.rings[static_cast<std::size_t>(ring)].collar + 1;
  RingState state;
  state.offset = model.relative.middleRows(row, 2) * x + now.relative.segment<2>(row);
  state.distance = state.offset.norm();
  state.response = ring_response(now.interference(ring), state.distance);
  return state;
}

Vector2 friction_of(const Slide& slide, const VectorX& x)
{
  return {x(slide.first), slide.has_turn ? x(slide.first + 3) : 0.0};
}

Vector2 slip_of(const Slide& slide, const VectorX& x)
{
  return {x(slide.first + 1), slide.has_turn ? x(slide.first + 4) : 0.0};
}

namespace
{
/// Normal load that the bolts of a sliding foot put on its plate [N].
double bolt_preload(const Slide& slide)
{
  return slide.coefficient > 0.0 ? slide.constant / slide.coefficient : 0.0;
}
} // namespace

Limit slide_limit(const Model& model, Index index, const Status& status, const LoadState& now,
                  const LoadState& rate, const VectorX& x)
{
  const Slide& slide = model.slides[static_cast<std::size_t>(index)];
  Limit limit;
  limit.value = slide.constant;
  if (slide.kind == LimitKind::constant || slide.coefficient == 0.0)
    return limit;
  limit.gradient = VectorX::Zero(model.size);
  const Index across = 6 * slide.collar + 1;
  if (slide.kind == LimitKind::ring)
  {
    const Index r = model.ring_of_collar[static_cast<std::size_t>(slide.collar)];
    const double stiffness = slide.coefficient * model.rings[static_cast<std::size_t>(r)].stiffness;
    const RingState ring = ring_state(model, r, now, x);
    limit.value = stiffness * ring.response.clamping;
    limit.rate = stiffness * ring.response.clamping_by_interference * rate.interference(r);
    if (ring.distance > 0.0)
    {
      const Vector2 pull =
          stiffness * ring.response.reaction_by_interference / ring.distance * ring.offset;
      limit.gradient = model.relative.middleRows(across, 2).transpose() * pull;
      limit.rate += pull.dot(rate.relative.segment<2>(across));
    }
    return limit;
  }
  if (slide.kind == LimitKind::transverse)
  {
    const Vector2 force = x.segment<2>(across);
    const double size = force.norm();
    limit.value = slide.coefficient * size;
    const Vector2 direction = size > 0.0 ? Vector2(force / size) : status.transverse;
    limit.gradient.segment<2>(across) = slide.coefficient * direction;
    return limit;
  }
  // Uplift takes the bolts' preload off the plate before the foot lifts.
  const VectorX press = press_gradient(model, slide);
  const double value = bolt_preload(slide) + press.dot(x) + now.press(index);
  const double press_rate = rate.press(index);
  const bool is_pressed = value > 0.0 || (value == 0.0 && status.transverse.x() > 0.0);
  limit.value = 0.0;
  if (is_pressed)
  {
    limit.value = slide.coefficient * value;
    limit.gradient = slide.coefficient * press;
    limit.rate = slide.coefficient * press_rate;
  }
  return limit;
}

double contact_margin(const Model& model, Index index, const LoadState& now, const VectorX& x)
{
  const Slide& slide = model.slides[static_cast<std::size_t>(index)];
  if (slide.kind == LimitKind::ring)
  {
    const Index r = model.ring_of_collar[static_cast<std::size_t>(slide.collar)];
    return model.rings[static_cast<std::size_t>(r)].stiffness *
           (now.interference(r) + ring_state(model, r, now, x).distance);
  }
  if (slide.kind == LimitKind::foot)
    return bolt_preload(slide) + press_gradient(model, slide).dot(x) + now.press(index);
  return std::numeric_limits<double>::infinity();
}

void assemble(const Model& model, const Regime& regime, const VectorX& start, const LoadState& now,
              const LoadState& rate, const VectorX& x, Equations& equations)
{
  equations.jacobian = model.linear;
  equations.residual = model.linear * x + now.rows;
  equations.magnitude = model.magnitude * x.cwiseAbs() + now.rows.cwiseAbs();
  equations.rate = rate.rows;
  for (std::size_t r = 0; r < model.rings.size(); ++r)
    add_ring_rows(model, static_cast<Index>(r), now, rate, x, equations);
  for (std::size_t i = 0; i < model.slides.size(); ++i)
  {
    const Slide& slide = model.slides[i];
    add_stop_row(slide, regime[i], start, x, equations);
    if (regime[i].motion == Motion::stick)
      add_stick_rows(slide, start, x, equations);
    else if (regime[i].motion == Motion::free)
      add_free_rows(slide, x, equations);
    else
    {
      const Limit limit = slide_limit(model, static_cast<Index>(i), regime[i], now, rate, x);
      add_slip_rows(slide, regime[i], limit, start, x, equations);
    }
  }
}
} // namespace carlin::mounts
