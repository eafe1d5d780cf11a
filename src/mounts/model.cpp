#include "model.hpp"

#include <cmath>

namespace carlin::mounts
{
namespace
{
/// Unit of displacement against force, for conditioning only [m/N].
constexpr double compliance_scale = 1e-8;

/// Rigid stops give by this [m/N], so that the share of friction beside them has one answer.
constexpr double rigid_stop_compliance = 1e-16;

constexpr double pi = 3.14159265358979323846;

double at_end(const Range& range, RangeEnd end)
{
  return end == RangeEnd::low ? range.low : range.high;
}

void set_stops(Slide& slide, const Collar& collar, double share)
{
  if (collar.stroke_aft)
    slide.aft = *collar.stroke_aft;
  if (collar.stroke_forward)
    slide.forward = *collar.stroke_forward;
  slide.stop_compliance = rigid_stop_compliance;
  if (collar.stop_stiffness && std::isfinite(*collar.stop_stiffness))
    slide.stop_compliance = std::max(rigid_stop_compliance, 1.0 / *collar.stop_stiffness) * share;
}

struct CollarPlace
{
  Index tank = 0, collar = 0, first_foot = 0;
};

void add_ring_slide(Model& model, const Tank& tank, const Collar& collar, const CollarPlace& place,
                    RangeEnds ends)
{
  Slide slide;
  slide.tank = place.tank;
  slide.collar = place.collar;
  const auto& turning = collar.pivot_stiffness[0];
  slide.has_turn = !turning || *turning > 0.0;
  slide.radius = collar.ring ? collar.ring->radius : 0.5 * tank.diameter;
  if (slide.has_turn && !(slide.radius > 0.0))
    throw ValueError("tank " + tank.name + ": diameter is 0; turning friction at collar " +
                     collar.name + " needs it, write the tank's outside diameter");
  if (collar.kind == CollarKind::fixed)
    slide.constant = at_end(*collar.grip_force, ends.grips);
  else
  {
    const bool clamps = collar.ring && collar.slides_at == SlidesAt::lining;
    slide.kind = clamps ? LimitKind::ring : LimitKind::transverse;
    slide.coefficient = at_end(collar.friction, ends.slides);
    set_stops(slide, collar, 1.0);
  }
  model.slides.push_back(slide);
}

void add_foot_slides(Model& model, const Collar& collar, const CollarPlace& place, RangeEnds ends)
{
  double sliding_count = 0.0;
  for (const Foot& foot : collar.feet)
    sliding_count += foot.stiffness[0] > 0.0 ? 1.0 : 0.0;
  const Beam& beam = model.beams[static_cast<std::size_t>(place.tank)];
  const Vector3 centre = beam.origin + collar.position * beam.axes.col(0);
  for (std::size_t f = 0; f < collar.feet.size(); ++f)
  {
    const Foot& foot = collar.feet[f];
    if (!(foot.stiffness[0] > 0.0))
      continue; // carries nothing along: no friction either
    Slide slide;
    slide.tank = place.tank;
    slide.collar = place.collar;
    slide.foot = place.first_foot + static_cast<Index>(f);
    slide.kind = LimitKind::foot;
    slide.coefficient = at_end(collar.friction, ends.slides);
    slide.constant = slide.coefficient * collar.foot_bolt_preload;
    // A foot above the tank is pressed by an upward force on the hull.
    const double height = beam.axes.col(2).dot(foot.footprint.centre - centre);
    slide.press_sign = height > 0.0 ? 1.0 : -1.0;
    set_stops(slide, collar, sliding_count);
    model.slides.push_back(slide);
  }
}

void list_parts(Model& model, const std::vector<Tank>& tanks, RangeEnds ends)
{
  Index foot = 0;
  for (const Tank& tank : tanks)
  {
    model.beams.push_back(make_beam(tank));
    model.tank_names.push_back(tank.name);
    for (const Collar& collar : tank.collars)
    {
      const CollarPlace place{model.tank_count, model.collar_count, foot};
      model.tank_of_collar.push_back(model.tank_count);
      model.position_of_collar.push_back(std::min(collar.position, model.beams.back().length));
      model.collar_names.push_back(collar.name);
      model.ring_of_collar.push_back(collar.ring ? static_cast<Index>(model.rings.size()) : -1);
      if (collar.ring)
        model.rings.push_back(
            {place.collar, collar.ring->radius * collar.ring->width * collar.ring->bed_stiffness,
             collar.ring->preload, collar.ring->bed_stiffness});
      if (collar.kind == CollarKind::sliding && collar.slides_at == SlidesAt::foot)
        add_foot_slides(model, collar, place, ends);
      else if (collar.kind == CollarKind::sliding || collar.grip_force)
        add_ring_slide(model, tank, collar, place, ends);
      foot += static_cast<Index>(collar.feet.size());
      ++model.collar_count;
    }
    ++model.tank_count;
  }
}

void number_unknowns(Model& model)
{
  model.idle_count = model.seats.idle.cols();
  model.size = model.idle() + model.idle_count;
  for (Slide& slide : model.slides)
  {
    slide.first = model.size;
    model.size += slide.width();
  }
  model.column_scale = VectorX::Ones(model.size);
  model.row_scale = VectorX::Ones(model.size);
  const Index moving = 6 * model.tank_count + model.idle_count;
  model.column_scale.segment(model.rigid(0), moving).setConstant(compliance_scale);
  model.row_scale.head(6 * model.collar_count).setConstant(1.0 / compliance_scale);
  for (const Slide& slide : model.slides)
  {
    model.column_scale(slide.first + 1) = compliance_scale;
    if (slide.has_turn)
      model.column_scale(slide.first + 4) = compliance_scale;
  }
}

void fill_relative(Model& model)
{
  const Index nc = 6 * model.collar_count;
  model.relative = MatrixX::Zero(nc, model.size);
  model.relative.leftCols(nc) = -model.seats.ring_by_force;
  model.relative.middleCols(model.idle(), model.idle_count) = -model.seats.idle;
  Index column = 0;
  for (const Slide& slide : model.slides)
    if (slide.foot >= 0)
      model.relative.col(slide.first + 1) = -model.seats.ring_by_slip.col(column++);
  for (Index c = 0; c < model.collar_count; ++c)
  {
    const auto uc = static_cast<std::size_t>(c);
    const Index tank = model.tank_of_collar[uc];
    const Beam& beam = model.beams[static_cast<std::size_t>(tank)];
    const double s = model.position_of_collar[uc];
    model.relative.block<6, 6>(6 * c, model.rigid(tank)) = shift_wrench(s, beam.middle).transpose();
    for (Index d = 0; d < model.collar_count; ++d)
      if (model.tank_of_collar[static_cast<std::size_t>(d)] == tank)
        model.relative.block<6, 6>(6 * c, 6 * d) +=
            influence(beam, s, model.position_of_collar[static_cast<std::size_t>(d)]);
  }
}

/// Compliance of the pivot about axis i with the ring's tilt in series; negative: released.
double pivot_compliance(const Collar& collar, Index i)
{
  const auto& pivot = collar.pivot_stiffness[static_cast<std::size_t>(i)];
  if (pivot && *pivot <= 0.0)
    return -1.0;
  double compliance = pivot ? 1.0 / *pivot : 0.0;
  if (i > 0 && collar.ring && !collar.ring->is_tilt_rigid)
  {
    const LinedRing& ring = *collar.ring;
    compliance += 12.0 / (pi * ring.bed_stiffness * ring.radius * std::pow(ring.width, 3));
  }
  return compliance;
}

void fill_collar_rows(Model& model, const std::vector<Tank>& tanks)
{
  std::vector<bool> is_turn_held(tanks.size(), false);
  Index c = 0;
  for (std::size_t t = 0; t < tanks.size(); ++t)
    for (const Collar& collar : tanks[t].collars)
    {
      for (Index i = 0; i < 3; ++i)
      {
        const Index row = 6 * c + 3 + i;
        const double compliance = pivot_compliance(collar, i);
        if (compliance < 0.0)
        {
          model.linear(row, row) = compliance_scale; // no moment
          continue;
        }
        model.relative(row, row) += compliance;
        model.linear.row(row) = model.relative.row(row);
        is_turn_held[t] = is_turn_held[t] || i == 0;
      }
      model.linear.row(6 * c) = model.relative.row(6 * c);
      if (!collar.ring)
        model.linear.middleRows(6 * c + 1, 2) = model.relative.middleRows(6 * c + 1, 2);
      ++c;
    }
  for (Index k = 0; k < model.collar_count; ++k)
  {
    const Index tank = model.tank_of_collar[static_cast<std::size_t>(k)];
    const Beam& beam = model.beams[static_cast<std::size_t>(tank)];
    model.linear.block<6, 6>(model.rigid(tank), 6 * k) =
        shift_wrench(model.position_of_collar[static_cast<std::size_t>(k)], beam.middle);
  }
  // Free to turn in every collar, and no load turns a tank about its own axis: any turn is right,
  // so none is taken.
  for (Index t = 0; t < model.tank_count; ++t)
    if (!is_turn_held[static_cast<std::size_t>(t)])
    {
      model.linear.row(model.rigid(t) + 3).setZero();
      model.linear(model.rigid(t) + 3, model.rigid(t) + 3) = 1.0;
      model.row_scale(model.rigid(t) + 3) = 1.0 / compliance_scale;
    }
  model.linear.block(model.idle(), 0, model.idle_count, 6 * model.collar_count) =
      model.seats.idle.transpose();
}

void fill_slide_rows(Model& model)
{
  const Index nc = 6 * model.collar_count;
  for (const Slide& slide : model.slides)
  {
    const Index first = slide.first;
    model.linear(first, first) = -1.0;
    model.linear(first, first + 2) = -1.0;
    if (slide.foot >= 0)
    {
      const Index along = 6 * slide.foot;
      model.linear.row(first).head(nc) -= model.seats.foot_by_force.row(along);
      Index other = 0;
      for (const Slide& moving : model.slides)
        if (moving.foot >= 0)
          model.linear(first, moving.first + 1) -= model.seats.foot_by_slip(along, other++);
      continue;
    }
    model.linear(first, 6 * slide.collar) = 1.0;
    model.linear(6 * slide.collar, first + 1) -= 1.0;
    if (slide.has_turn)
    {
      model.linear(first + 3, 6 * slide.collar + 3) = 1.0 / slide.radius;
      model.linear(first + 3, first + 3) = -1.0;
      model.linear(6 * slide.collar + 3, first + 4) -= 1.0 / slide.radius;
    }
  }
}
} // namespace

Model make_model(const std::vector<Tank>& tanks, const MatrixX& flexibility, RangeEnds ends)
{
  Model model;
  list_parts(model, tanks, ends);
  std::vector<Index> sliding_feet;
  for (const Slide& slide : model.slides)
    if (slide.foot >= 0)
      sliding_feet.push_back(slide.foot);
  model.seats = condense_seats(tanks, flexibility, sliding_feet);
  number_unknowns(model);
  fill_relative(model);
  model.linear = MatrixX::Zero(model.size, model.size);
  fill_collar_rows(model, tanks);
  fill_slide_rows(model);
  model.magnitude = model.linear.cwiseAbs();
  return model;
}
} // namespace carlin::mounts
