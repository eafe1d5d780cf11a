#include "results.hpp"

#include <algorithm>
#include <cmath>

namespace carlin::mounts
{
namespace
{
constexpr double infinite = std::numeric_limits<double>::infinity();

struct Found
{
  const Model& model;
  const Position& position;
  const Counters& counters;
  LoadState now;
  VectorX feet;  ///< forces on the hull, 6 a foot, tank axes
  VectorX rings; ///< motion of the rings, 6 a collar, tank axes
};

Found find(const Model& model, const MountStage& stage, const Position& position,
           const Counters& counters)
{
  const VectorX& x = position.x;
  const Index nc = 6 * model.collar_count;
  VectorX slips = VectorX::Zero(model.seats.ring_by_slip.cols());
  Index column = 0;
  for (const Slide& slide : model.slides)
    if (slide.foot >= 0)
      slips(column++) = x(slide.first + 1);
  Found found{model, position, counters, make_loads(model, stage), {}, {}};
  const Seats& seats = model.seats;
  found.feet = seats.foot_by_force * x.head(nc) + seats.foot_by_slip * slips +
               seats.foot_by_motion * stage.foot_motion;
  found.rings = seats.ring_by_force * x.head(nc) + seats.ring_by_slip * slips +
                seats.ring_by_motion * stage.foot_motion +
                seats.idle * x.segment(model.idle(), model.idle_count);
  return found;
}

void add_ring(const Found& found, Index ring, CollarResult& result)
{
  const RingLaw& law = found.model.rings[static_cast<std::size_t>(ring)];
  const RingState state = ring_state(found.model, ring, found.now, found.position.x);
  result.clamping_force = law.stiffness * state.response.clamping;
  result.interference = found.now.interference(ring);
  result.offset = state.distance;
  result.peak_lining_pressure = law.bed * state.response.peak;
}

/// Sums over the slides of one collar; the slip of sliding feet is their mean.
void add_slides(const Found& found, Index collar, const Collar& described, CollarResult& result)
{
  const Model& model = found.model;
  const VectorX& x = found.position.x;
  double count = 0.0;
  bool slips = false;
  bool is_at_stop = false;
  bool has_slipped = false;
  result.friction_limit = 0.0;
  for (std::size_t i = 0; i < model.slides.size(); ++i)
  {
    const Slide& slide = model.slides[i];
    if (slide.collar != collar)
      continue;
    const Status& status = found.position.regime[i];
    count += 1.0;
    result.friction_limit +=
        slide_limit(model, static_cast<Index>(i), status, found.now, found.now, x).value;
    result.friction_force += x(slide.first);
    result.stop_force += x(slide.first + 2);
    const double slip = x(slide.first + 1);
    result.slip += slip;
    result.turn += slide.has_turn ? x(slide.first + 4) / slide.radius : 0.0;
    result.stroke_left_aft = std::min(result.stroke_left_aft, slide.aft + slip);
    result.stroke_left_forward = std::min(result.stroke_left_forward, slide.forward - slip);
    if (slide.foot >= 0)
      result.foot_slips.push_back(slip);
    slips = slips || status.motion != Motion::stick;
    is_at_stop = is_at_stop || status.stop != Contact::open;
    has_slipped = has_slipped || found.counters.has_slipped[i];
  }
  if (count == 0.0)
    return;
  result.slip /= count;
  result.turn /= count;
  if (described.kind == CollarKind::fixed)
    result.hold = has_slipped ? Hold::grip_lost : Hold::grips;
  else
    result.hold = is_at_stop ? Hold::at_stop : slips ? Hold::slips : Hold::grips;
}

CollarResult make_collar(const Found& found, Index collar, const Collar& described,
                         Index first_foot)
{
  const Model& model = found.model;
  const auto uc = static_cast<std::size_t>(collar);
  const Beam& beam = model.beams[static_cast<std::size_t>(model.tank_of_collar[uc])];
  CollarResult result;
  result.force = found.position.x.segment<6>(6 * collar);
  result.friction_limit = infinite;
  result.stroke_left_aft = infinite;
  result.stroke_left_forward = infinite;
  result.displacement = beam.axes * found.rings.segment<3>(6 * collar);
  result.hold = described.kind == CollarKind::fixed ? Hold::keyed : Hold::open;
  add_slides(found, collar, described, result);
  if (model.ring_of_collar[uc] >= 0)
  {
    add_ring(found, model.ring_of_collar[uc], result);
    if (result.clamping_force <= 0.0 && result.hold != Hold::at_stop && result.hold != Hold::keyed)
      result.hold = result.hold == Hold::grip_lost ? Hold::grip_lost : Hold::open;
  }
  for (std::size_t f = 0; f < described.feet.size(); ++f)
  {
    const Vector6 local = found.feet.segment<6>(6 * (first_foot + static_cast<Index>(f)));
    Vector6 global;
    global << beam.axes * local.head<3>(), beam.axes * local.tail<3>();
    result.foot_forces.push_back(global);
  }
  return result;
}

/// Forces inside the tank and its motion at s; what acts at s itself is left out or taken in.
TankSection make_section(const Found& found, Index tank, const BeamLoad& load, double s, Side side)
{
  const Model& model = found.model;
  const VectorX& x = found.position.x;
  const Beam& beam = model.beams[static_cast<std::size_t>(tank)];
  Vector6 wrench = load_before(load, s, side);
  Vector6 motion = load_motion(beam, load, s) +
                   shift_wrench(s, beam.middle).transpose() * x.segment<6>(model.rigid(tank));
  for (Index c = 0; c < model.collar_count; ++c)
  {
    const auto uc = static_cast<std::size_t>(c);
    if (model.tank_of_collar[uc] != tank)
      continue;
    const double at = model.position_of_collar[uc];
    motion += influence(beam, s, at) * x.segment<6>(6 * c);
    if (at < s || (side == Side::after && at <= s))
      wrench += shift_wrench(at, s) * x.segment<6>(6 * c);
  }
  TankSection section;
  section.position = s;
  section.displacement = beam.axes * motion.head<3>();
  section.axial_force = wrench(0);
  section.shear = wrench.segment<2>(1);
  section.torsion = wrench(3);
  section.bending = wrench.segment<2>(4);
  return section;
}

struct Cut
{
  double position = 0.0;
  Side side = Side::after;
};

/// Ends, both sides of every collar and point force, and 20 places between.
std::vector<Cut> cuts_of(const Beam& beam, const Tank& tank, const BeamLoad& load)
{
  constexpr int between = 39; // the middle among them: a parabola is missed by 1/1600 of itself
  std::vector<Cut> cuts{{0.0, Side::before}, {0.0, Side::after}};
  std::vector<double> jumps;
  for (const Collar& collar : tank.collars)
    jumps.push_back(collar.position);
  for (const auto& [position, force] : load.forces)
    jumps.push_back(position);
  for (const double jump : jumps)
    if (jump > 0.0 && jump < beam.length)
    {
      cuts.push_back({jump, Side::before});
      cuts.push_back({jump, Side::after});
    }
  for (int i = 1; i <= between; ++i)
    cuts.push_back({beam.length * i / (between + 1.0), Side::after});
  cuts.push_back({beam.length, Side::before});
  cuts.push_back({beam.length, Side::after});
  std::stable_sort(cuts.begin(), cuts.end(),
                   [](const Cut& a, const Cut& b) { return a.position < b.position; });
  return cuts;
}

void add_sections(const Found& found, const Tank& tank, Index index,
                  const TankStageLoad& stage_load, TankResult& result)
{
  const Beam& beam = found.model.beams[static_cast<std::size_t>(index)];
  const BeamLoad load = make_beam_load(beam, stage_load);
  for (const Cut& cut : cuts_of(beam, tank, load))
  {
    const TankSection section = make_section(found, index, load, cut.position, cut.side);
    if (std::abs(section.axial_force) > std::abs(result.largest_axial_force))
      result.largest_axial_force = section.axial_force;
    result.largest_bending = std::max(result.largest_bending, section.bending.norm());
    result.largest_torsion = std::max(result.largest_torsion, std::abs(section.torsion));
    result.sections.push_back(section);
  }
}

/// Imbalance of a tank over its largest collar force or load.
double imbalance(const Found& found, Index tank)
{
  const Model& model = found.model;
  const Beam& beam = model.beams[static_cast<std::size_t>(tank)];
  Vector6 sum = found.now.rows.segment<6>(model.rigid(tank));
  double largest = std::max(1e-6, sum.head<3>().norm());
  for (Index c = 0; c < model.collar_count; ++c)
  {
    const auto uc = static_cast<std::size_t>(c);
    if (model.tank_of_collar[uc] != tank)
      continue;
    const Vector6 force = found.position.x.segment<6>(6 * c);
    sum += shift_wrench(model.position_of_collar[uc], beam.middle) * force;
    largest = std::max(largest, force.head<3>().norm());
  }
  return std::max(sum.head<3>().norm(), sum.tail<3>().norm() / beam.length) / largest;
}
} // namespace

MountStageResult make_result(const Model& model, const std::vector<Tank>& tanks,
                             const MountStage& stage, const Position& position,
                             const Counters& counters)
{
  const Found found = find(model, stage, position, counters);
  MountStageResult result;
  result.name = stage.name;
  result.work_lost = counters.work_lost;
  result.events = counters.events;
  Index collar = 0;
  Index foot = 0;
  for (std::size_t t = 0; t < tanks.size(); ++t)
  {
    TankResult tank;
    for (const Collar& described : tanks[t].collars)
    {
      tank.collars.push_back(make_collar(found, collar++, described, foot));
      foot += static_cast<Index>(described.feet.size());
    }
    add_sections(found, tanks[t], static_cast<Index>(t), stage.tanks[t], tank);
    result.equilibrium_residual =
        std::max(result.equilibrium_residual, imbalance(found, static_cast<Index>(t)));
    result.tanks.push_back(std::move(tank));
  }
  result.foot_forces = VectorX::Zero(6 * foot);
  Index row = 0;
  for (const TankResult& tank : result.tanks)
    for (const CollarResult& found_collar : tank.collars)
      for (const Vector6& force : found_collar.foot_forces)
      {
        result.foot_forces.segment<6>(row) = force;
        row += 6;
      }
  return result;
}
} // namespace carlin::mounts
