#include "results.hpp"

#include "carlin/core/require.hpp"

#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace mounts
{
namespace
{
constexpr double event_decided = 1e-10; ///< of the force scale: an event has passed

std::string slide_name(const Model& model, std::size_t i)
{
  const Slide& slide = model.slides[i];
  return fmt::format("{}, collar {}", model.tank_names[static_cast<std::size_t>(slide.tank)],
                     model.collar_names[static_cast<std::size_t>(slide.collar)]);
}

/// Friction whose sense turns while it slips: its steps depend on their own length.
bool is_turning(const Slide& slide, const Status& status, const VectorX& x)
{
  return slide.has_turn && status.motion == Motion::slip &&
         std::abs(x(slide.first + 3)) > 1e-9 * std::abs(x(slide.first));
}

/// Whether the response is not linear in the stage parameter near x: a ring in partial contact, a
/// limit on the size of a two-way force, friction that turns.
bool is_curved(const Stage& stage, const Regime& regime, const VectorX& x, double t)
{
  const Model& model = stage.model;
  const LoadState now = stage.at(t);
  for (std::size_t r = 0; r < model.rings.size(); ++r)
    if (ring_state(model, static_cast<Index>(r), now, x).distance >
        now.interference(static_cast<Index>(r)))
      return true;
  for (std::size_t i = 0; i < model.slides.size(); ++i)
  {
    const Slide& slide = model.slides[i];
    if (slide.kind == LimitKind::transverse && regime[i].motion != Motion::free)
      return true;
    if (is_turning(slide, regime[i], x))
      return true;
  }
  return false;
}

class StageRun
{
public:
  StageRun(Stage& stage, Position& position, Counters& counters)
      : stage_(stage), position_(position), counters_(counters)
  {
  }

  /// Goes from t = 0 to 1. @return why a tank is not held any more, or empty.
  std::string run();

private:
  struct Reached
  {
    double t = 0.0;
    VectorX x;
    bool is_event = false;
  };

  Reached advance();
  Reached locate(Reached passed);
  VectorX excess(const VectorX& x, double t);
  bool turns_too_far(const VectorX& x) const;
  double work_between(const VectorX& from, double t_from, const VectorX& to, double t_to,
                      int depth);
  double trapezoid(const VectorX& from, const VectorX& to) const;
  void note_slips(const VectorX& from, const VectorX& to);
  void commit(const Reached& reached);
  [[noreturn]] void give_up(const std::string& why) const;

  Stage& stage_;
  Position& position_;
  Counters& counters_;
  double t_ = 0.0;
  double tolerance_ = 0.0;
  VectorX excess_at_start_;
  bool is_curved_ = false;
};

void StageRun::give_up(const std::string& why) const
{
  std::string where =
      stage_.model.slides.empty() ? stage_.model.tank_names.front() : slide_name(stage_.model, 0);
  for (std::size_t i = 0; i < stage_.model.slides.size(); ++i)
    if (position_.regime[i].motion == Motion::slip)
      where = slide_name(stage_.model, i);
  throw SolveError(fmt::format("{}: will not settle at {:.6g} of the stage: {}", where, t_, why));
}

VectorX StageRun::excess(const VectorX& x, double t)
{
  VectorX rate;
  if (is_curved_)
  {
    // Inside a curved step slip may turn back although it gained on the whole.
    const std::optional<VectorX> found = solve_rate(stage_, position_.regime, x, t);
    if (found)
      rate = *found * (t - t_);
  }
  VectorX result = event_excess(stage_, position_, x, t, rate);
  if (excess_at_start_.size() > 0)
    result -= excess_at_start_.cwiseMax(0.0);
  return result;
}

/// The projection takes the sense of slip at the end of a step; where it turns, steps are kept
/// short.
bool StageRun::turns_too_far(const VectorX& x) const
{
  for (std::size_t i = 0; i < stage_.model.slides.size(); ++i)
  {
    const Slide& slide = stage_.model.slides[i];
    if (!slide.has_turn || position_.regime[i].motion != Motion::slip)
      continue;
    const Vector2 from = friction_of(slide, position_.x);
    const Vector2 to = friction_of(slide, x);
    const double cross = from.x() * to.y() - from.y() * to.x();
    if (std::abs(cross) > 0.02 * from.norm() * to.norm())
      return true;
  }
  return false;
}

StageRun::Reached StageRun::advance()
{
  constexpr double curved_step = 0.125;
  constexpr double shortest_turning_step = 1.0 / 256.0;
  constexpr double shortest_step = 1e-9;
  double step = 1.0 - t_;
  is_curved_ = is_curved(stage_, position_.regime, position_.x, t_);
  if (is_curved_)
    step = std::min(step, curved_step);
  while (step > shortest_step || step == 1.0 - t_)
  {
    const double t = step == 1.0 - t_ ? 1.0 : t_ + step;
    const std::optional<VectorX> x =
        solve_at(stage_, position_.regime, position_.x, t, position_.x + step * position_.rate);
    const bool becomes_curved =
        x && !is_curved_ && step > curved_step && is_curved(stage_, position_.regime, *x, t);
    if (becomes_curved)
    {
      is_curved_ = true;
      step = curved_step;
      continue;
    }
    if (x && (step <= shortest_turning_step || !turns_too_far(*x)))
      return {t, *x, false};
    step *= 0.5;
  }
  give_up("Newton's method finds no balance however short the step");
}

/// First event between the position and `passed`, by false position on the event functions.
StageRun::Reached StageRun::locate(Reached passed)
{
  constexpr double shortest = 1e-13;
  constexpr double jump = 1e-7;
  constexpr int iteration_limit = 100;
  double low = t_;
  VectorX excess_low = excess_at_start_ - excess_at_start_.cwiseMax(0.0);
  VectorX x_low = position_.x;
  VectorX excess_high = excess(passed.x, passed.t);
  for (int i = 0; i < iteration_limit && passed.t - low > shortest; ++i)
  {
    double share = 1.0;
    for (Index k = 0; k < excess_high.size(); ++k)
      if (excess_high(k) > tolerance_)
        share = std::min(share, excess_low(k) < -tolerance_
                                    ? -excess_low(k) / (excess_high(k) - excess_low(k))
                                    : 0.5);
    // One-sided false position creeps on curved functions; halving now and then ends that.
    if (i % 3 == 2)
      share = 0.5;
    double t = 0.0;
    std::optional<VectorX> x;
    for (int halving = 0; halving < 20 && !x; ++halving, share *= x ? 1.0 : 0.5)
    {
      t = low + share * (passed.t - low);
      x = solve_at(stage_, position_.regime, position_.x, t, x_low + share * (passed.x - x_low));
      for (const VectorX& guess : {passed.x, x_low})
        if (!x)
          x = solve_at(stage_, position_.regime, position_.x, t, guess);
    }
    // Across a gap the tank jumps in no time and has no place between: the far side is the event.
    if (!x && passed.t - low < jump)
      break;
    if (!x)
      give_up("Newton's method finds no balance while an event is located");
    const VectorX here = excess(*x, t);
    bool is_at_event = false;
    for (Index k = 0; k < here.size(); ++k)
      is_at_event = is_at_event || (excess_high(k) > tolerance_ && here(k) >= -tolerance_);
    if (here.maxCoeff() > tolerance_)
    {
      passed = {t, *x, true};
      excess_high = here;
    }
    else if (is_at_event)
      return {t, *x, true};
    else
    {
      low = t;
      x_low = *x;
      excess_low = here;
    }
  }
  passed.is_event = true;
  return passed;
}

double StageRun::trapezoid(const VectorX& from, const VectorX& to) const
{
  double work = 0.0;
  for (const Slide& slide : stage_.model.slides)
    work -= 0.5 * (friction_of(slide, from) + friction_of(slide, to))
                      .dot(slip_of(slide, to) - slip_of(slide, from));
  return work;
}

/// Work lost on the way; halved until it is known to 1e-9 where the response is curved. Turning
/// friction follows its own short steps instead: a middle would not lie on their path.
double StageRun::work_between(const VectorX& from, double t_from, const VectorX& to, double t_to,
                              int depth)
{
  constexpr int deepest = 8;
  const double whole = trapezoid(from, to);
  bool turns = false;
  for (std::size_t i = 0; i < stage_.model.slides.size(); ++i)
    turns = turns || is_turning(stage_.model.slides[i], position_.regime[i], to);
  if (!is_curved_ || turns || depth == deepest || whole == 0.0)
    return whole;
  const double t = 0.5 * (t_from + t_to);
  std::optional<VectorX> middle;
  for (const VectorX& guess : {VectorX(0.5 * (from + to)), to, from})
    if (!middle)
      middle = solve_at(stage_, position_.regime, position_.x, t, guess);
  if (!middle)
    give_up("Newton's method finds no balance while the work lost is integrated");
  const double halves = trapezoid(from, *middle) + trapezoid(*middle, to);
  if (std::abs(halves - whole) <= 1e-9 * (std::abs(halves) + counters_.work_lost))
    return halves + (halves - whole) / 3.0;
  return work_between(from, t_from, *middle, t, depth + 1) +
         work_between(*middle, t, to, t_to, depth + 1);
}

void StageRun::note_slips(const VectorX& from, const VectorX& to)
{
  const double noise = 1e-9 * tolerance_ / event_decided / 1e8;
  for (std::size_t i = 0; i < stage_.model.slides.size(); ++i)
  {
    const Slide& slide = stage_.model.slides[i];
    const double moved = (slip_of(slide, to) - slip_of(slide, from)).norm();
    if (position_.regime[i].motion == Motion::slip && moved > noise)
      counters_.has_slipped[i] = true;
  }
}

void StageRun::commit(const Reached& reached)
{
  counters_.work_lost += work_between(position_.x, t_, reached.x, reached.t, 0);
  note_slips(position_.x, reached.x);
  counters_.events += reached.is_event ? 1 : 0;
  position_.x = reached.x;
  t_ = reached.t;
}

std::string StageRun::run()
{
  constexpr int standstill_limit = 60;
  constexpr int step_limit = 200;
  int steps = 0;
  Arrival arrival = Arrival::stage_start;
  int standstill = 0;
  while (t_ < 1.0)
  {
    const VectorX x_before = position_.x;
    std::string not_held = choose_regime(stage_, position_, t_, arrival);
    counters_.work_lost += position_.jump_work;
    if (position_.jump_work > 0.0)
      note_slips(x_before, position_.x);
    if (!not_held.empty())
      return not_held;
    excess_at_start_ = {};
    tolerance_ = event_decided * force_scale(stage_.model, position_.x);
    excess_at_start_ = event_excess(stage_, position_, position_.x, t_, {});
    const double before = t_;
    Reached reached = advance();
    tolerance_ = event_decided * std::max(force_scale(stage_.model, position_.x),
                                          force_scale(stage_.model, reached.x));
    if (excess(reached.x, reached.t).maxCoeff() > tolerance_)
      reached = locate(reached);
    commit(reached);
    arrival = reached.is_event ? Arrival::event : Arrival::stage_start;
    standstill = t_ - before < 1e-12 ? standstill + 1 : 0;
    if (standstill > standstill_limit || ++steps > step_limit)
      give_up("sticking and slipping take turns without end");
  }
  return {};
}

void require_stages(const std::vector<Tank>& tanks, const MatrixX& flexibility,
                    const std::vector<MountStage>& stages)
{
  const Index n = 6 * static_cast<Index>(feet_of(tanks).size());
  if (flexibility.rows() != n || flexibility.cols() != n)
    throw ValueError(fmt::format("flexibility is {} x {}; {} feet need {} x {}", flexibility.rows(),
                                 flexibility.cols(), n / 6, n, n));
  for (const MountStage& stage : stages)
    if (stage.tanks.size() != tanks.size() || stage.foot_motion.size() != n)
      throw ValueError(fmt::format(
          "stage {}: loads of {} tanks and {} foot motions are given; {} and {} are needed",
          stage.name, stage.tanks.size(), stage.foot_motion.size(), tanks.size(), n));
  if (stages.empty())
    return;
  const MountStage& fitting = stages.front();
  bool is_at_rest = fitting.foot_motion.isZero(0.0);
  for (const TankStageLoad& load : fitting.tanks)
    is_at_rest = is_at_rest && load.axial_strain == 0.0 && load.radial_growth == 0.0;
  if (!is_at_rest)
    throw ValueError(fmt::format("stage {}: growth and motion of the feet count from the first "
                                 "stage, the fitting, and must be 0 there",
                                 fitting.name));
}

void require_tank(const Tank& tank)
{
  const std::string of = "tank " + tank.name + ": ";
  const double length =
      require_positive(of + "length", (tank.axis_to - tank.axis_from).norm(), "m");
  require_positive(of + "axial_stiffness", tank.axial_stiffness, "N");
  require_positive(of + "bending_stiffness", tank.bending_stiffness, "N m^2");
  if (tank.collars.empty())
    throw ValueError(of + "it has no collar; give it at least one");
  for (const Collar& collar : tank.collars)
  {
    const std::string at = of + "collar " + collar.name + ": ";
    // ends included, to the round-off of their distance
    if (!(collar.position >= 0.0 && collar.position <= length * (1.0 + 1e-12)))
      throw ValueError(fmt::format("{}position is {:g} m; the tank is {:g} m long", at,
                                   collar.position, length));
    if (collar.feet.empty())
      throw ValueError(at + "it has no foot; give it at least one");
    for (const Foot& foot : collar.feet)
      for (const double stiffness : foot.stiffness)
        if (!(stiffness >= 0.0))
          throw ValueError(
              fmt::format("{}foot stiffness is {:g}; it must not be negative", at, stiffness));
    if (collar.ring)
    {
      require_positive(at + "ring radius", collar.ring->radius, "m");
      require_positive(at + "ring width", collar.ring->width, "m");
      require_positive(at + "bed_stiffness", collar.ring->bed_stiffness, "N/m^3");
    }
  }
}
} // namespace
} // namespace mounts

namespace
{
// A tank is laid into the hull as it lies at the fitting: how far the hull gives under the tank's
// own weight there is part of its shape, not a motion of the feet.
VectorX give_at_fitting(const std::vector<Tank>& tanks, const MatrixX& flexibility,
                        const MountStage& fitting, RangeEnds ends)
{
  if (flexibility.isZero(0.0))
    return VectorX::Zero(flexibility.rows());
  // (a tank lost in the fitting itself has no foot forces; the history then ends there)
  const MatrixX stiff = MatrixX::Zero(flexibility.rows(), flexibility.cols());
  return flexibility * run_history(tanks, stiff, {fitting}, ends).front().foot_forces;
}
} // namespace

std::vector<MountStageResult> run_history(const std::vector<Tank>& tanks,
                                          const MatrixX& flexibility,
                                          const std::vector<MountStage>& stages, RangeEnds ends)
{
  using namespace mounts;
  for (const Tank& tank : tanks)
    require_tank(tank);
  require_stages(tanks, flexibility, stages);
  std::vector<MountStageResult> results;
  if (tanks.empty())
  {
    for (const MountStage& stage : stages)
    {
      results.emplace_back();
      results.back().name = stage.name;
      results.back().foot_forces = VectorX::Zero(0);
    }
    return results;
  }
  const Model model = make_model(tanks, flexibility, ends);
  Position position{VectorX::Zero(model.size), Regime(model.slides.size()), {}};
  Counters counters;
  counters.has_slipped.assign(model.slides.size(), false);
  LoadState from = zero_loads(model);
  const VectorX give = give_at_fitting(tanks, flexibility, stages.front(), ends);
  for (MountStage described : stages)
  {
    described.foot_motion -= give;
    const LoadState to = make_loads(model, described);
    Stage stage{model, from, to, difference(from, to)};
    counters.events = 0;
    const std::string not_held = StageRun(stage, position, counters).run();
    if (!not_held.empty())
    {
      MountStageResult lost;
      lost.name = described.name;
      lost.foot_forces = VectorX::Zero(flexibility.rows());
      lost.work_lost = results.empty() ? 0.0 : results.back().work_lost;
      lost.not_held.push_back(not_held);
      results.push_back(std::move(lost));
      return results;
    }
    results.push_back(make_result(model, tanks, described, position, counters));
    results.back().iterations = stage.iterations;
    from = to;
  }
  return results;
}

bool has_grip_range(const std::vector<Tank>& tanks)
{
  for (const Tank& tank : tanks)
    for (const Collar& collar : tank.collars)
      if (collar.kind == CollarKind::fixed && collar.grip_force &&
          collar.grip_force->low < collar.grip_force->high)
        return true;
  return false;
}
} // namespace carlin
