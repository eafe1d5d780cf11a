#include "regime.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin::mounts
{
namespace
{
constexpr double decided = 2e-10;       ///< of the force scale: at the limit, at the gap
constexpr double rate_decided = 5e-11;  ///< likewise of rates
constexpr double stiffness_scale = 1e8; ///< displacement in newtons [N/m]

struct Candidate
{
  std::size_t slide = 0;
  bool is_stop = false;
  Contact contact = Contact::open; ///< for a stop: which
};

class Choice
{
public:
  Choice(Stage& stage, Position& position, double t, Arrival arrival)
      : stage_(stage), position_(position), t_(t), arrival_(arrival),
        scale_(force_scale(stage.model, position.x))
  {
    find_candidates();
  }

  std::string run()
  {
    position_.jump_work = 0.0;
    for (std::size_t jump = 0; jump <= 2 * stage_.model.slides.size(); ++jump)
    {
      if (pivot() || try_all())
        return {};
      if (!run_to_stop())
        break;
    }
    return explain();
  }

private:
  void find_candidates();
  bool solve();
  bool is_violated(const Candidate& candidate) const;
  bool is_motion_violated(std::size_t i) const;
  void flip(const Candidate& candidate);
  void set(const Candidate& candidate, bool is_on);
  bool pivot();
  bool try_all();
  std::optional<VectorX> free_motion();
  bool run_to_stop();
  std::string explain();
  double rate_scale() const;
  Limit limit(std::size_t i) const;
  Vector2 sense_of_slip(std::size_t i) const;
  void set_rising_directions();

  Stage& stage_;
  Position& position_;
  double t_;
  Arrival arrival_;
  double scale_;
  std::vector<Candidate> candidates_;
};

Limit Choice::limit(std::size_t i) const
{
  return slide_limit(stage_.model, static_cast<Index>(i), position_.regime[i], stage_.at(t_),
                     stage_.rate, position_.x);
}

void Choice::find_candidates()
{
  for (std::size_t i = 0; i < stage_.model.slides.size(); ++i)
  {
    const Slide& slide = stage_.model.slides[i];
    Status& status = position_.regime[i];
    const double force = friction_of(slide, position_.x).norm();
    if (slide.is_frictionless() && slide.constant == 0.0)
      status.motion = Motion::free;
    else if (status.motion != Motion::stick && arrival_ == Arrival::event &&
             contact_margin(stage_.model, static_cast<Index>(i), stage_.at(t_), position_.x) <
                 -decided * scale_)
      status.motion = Motion::free;
    else if (force >= limit(i).value - decided * scale_)
    {
      if (status.motion == Motion::free)
        status.motion = Motion::stick;
      candidates_.push_back({i, false, Contact::open});
      if (status.motion == Motion::stick && arrival_ == Arrival::event)
        set(candidates_.back(), true);
    }
    else
      status.motion = Motion::stick;

    const double stop_force = position_.x(slide.first + 2);
    const double slip = position_.x(slide.first + 1);
    const double near = decided * scale_ / stiffness_scale;
    if (status.stop != Contact::open && std::abs(stop_force) > decided * scale_)
      continue;
    const Contact was = status.stop;
    status.stop = Contact::open;
    for (const Contact contact : {Contact::forward, Contact::aft})
    {
      const double gap = contact == Contact::forward ? slide.forward - slip : slide.aft + slip;
      if (gap > near && was != contact)
        continue;
      candidates_.push_back({i, true, contact});
      status.stop = was == Contact::open ? contact : was;
    }
  }
}

Vector2 Choice::sense_of_slip(std::size_t i) const
{
  const Slide& slide = stage_.model.slides[i];
  const Vector2 force = friction_of(slide, position_.x);
  if (force.norm() > decided * scale_)
    return -force.normalized();
  // Nothing yet: it slips the way it would have been pulled had it stuck.
  const Vector2 rising =
      position_.rate.size() > 0 ? friction_of(slide, position_.rate) : Vector2(Vector2::Zero());
  if (rising.norm() > 0.0)
    return -rising.normalized();
  return Vector2::UnitX();
}

void Choice::set(const Candidate& candidate, bool is_on)
{
  Status& status = position_.regime[candidate.slide];
  if (candidate.is_stop)
  {
    status.stop = is_on ? candidate.contact : Contact::open;
    return;
  }
  if (is_on && status.motion != Motion::slip)
    status.direction = sense_of_slip(candidate.slide);
  status.motion = is_on ? Motion::slip : Motion::stick;
}

void Choice::flip(const Candidate& candidate)
{
  const Status& status = position_.regime[candidate.slide];
  set(candidate,
      candidate.is_stop ? status.stop != candidate.contact : status.motion != Motion::slip);
}

/// A transverse or foot limit that rises from nothing rises the way its force is about to.
void Choice::set_rising_directions()
{
  const VectorX& rate = position_.rate;
  for (std::size_t i = 0; i < stage_.model.slides.size(); ++i)
  {
    const Slide& slide = stage_.model.slides[i];
    Status& status = position_.regime[i];
    if (slide.kind == LimitKind::transverse)
    {
      const Vector2 across = rate.segment<2>(6 * slide.collar + 1);
      status.transverse = across.norm() > 0.0 ? Vector2(across.normalized()) : Vector2::Zero();
    }
    else if (slide.kind == LimitKind::foot)
    {
      Index column = 0;
      double rising = stage_.rate.press(static_cast<Index>(i));
      const Index upright = 6 * slide.foot + 2;
      rising += slide.press_sign * stage_.model.seats.foot_by_force.row(upright).dot(
                                       rate.head(6 * stage_.model.collar_count));
      for (const Slide& moving : stage_.model.slides)
        if (moving.foot >= 0)
          rising += slide.press_sign * rate(moving.first + 1) *
                    stage_.model.seats.foot_by_slip(upright, column++);
      status.transverse = Vector2(rising > 0.0 ? 1.0 : -1.0, 0.0);
    }
  }
}

bool Choice::solve()
{
  std::optional<VectorX> rate = solve_rate(stage_, position_.regime, position_.x, t_);
  if (!rate)
    return false;
  position_.rate = std::move(*rate);
  set_rising_directions();
  return true;
}

double Choice::rate_scale() const
{
  return std::max(scale_, force_scale(stage_.model, position_.rate));
}

bool Choice::is_motion_violated(std::size_t i) const
{
  const Slide& slide = stage_.model.slides[i];
  const Status& status = position_.regime[i];
  const double small = rate_decided * rate_scale();
  if (status.motion == Motion::slip)
    return status.direction.dot(slip_of(slide, position_.rate)) * stiffness_scale < -small;
  const Vector2 force = friction_of(slide, position_.x);
  const Vector2 force_rate = friction_of(slide, position_.rate);
  const double size = force.norm();
  const double rising = size > decided * scale_ ? force.dot(force_rate) / size : force_rate.norm();
  const Limit now = limit(i);
  const double limit_rising =
      now.rate + (now.gradient.size() > 0 ? now.gradient.dot(position_.rate) : 0.0);
  return rising - limit_rising > small;
}

bool Choice::is_violated(const Candidate& candidate) const
{
  if (!candidate.is_stop)
    return is_motion_violated(candidate.slide);
  const Slide& slide = stage_.model.slides[candidate.slide];
  const Contact stop = position_.regime[candidate.slide].stop;
  if (stop != Contact::open && stop != candidate.contact)
    return false;
  const double small = rate_decided * rate_scale();
  const double sign = candidate.contact == Contact::forward ? 1.0 : -1.0;
  if (stop == Contact::open)
    return sign * position_.rate(slide.first + 1) * stiffness_scale > small;
  return sign * position_.rate(slide.first + 2) > small; // a stop that pulls
}

bool Choice::pivot()
{
  for (std::size_t count = 0; count < 8 * candidates_.size() + 1; ++count)
  {
    if (!solve())
      return false;
    const auto violated = std::find_if(candidates_.begin(), candidates_.end(),
                                       [this](const Candidate& c) { return is_violated(c); });
    if (violated == candidates_.end())
      return true;
    flip(*violated);
  }
  return false;
}

bool Choice::try_all()
{
  constexpr std::size_t most = 14;
  const std::size_t count = std::min(candidates_.size(), most);
  std::vector<unsigned> masks(std::size_t{1} << count);
  for (unsigned mask = 0; mask < masks.size(); ++mask)
    masks[mask] = mask;
  const auto ones = [](unsigned mask) { return __builtin_popcount(mask); };
  std::stable_sort(masks.begin(), masks.end(),
                   [&](unsigned a, unsigned b) { return ones(a) < ones(b); });
  for (const unsigned mask : masks)
  {
    for (std::size_t k = 0; k < candidates_.size(); ++k)
      if (!(candidates_[k].is_stop &&
            position_.regime[candidates_[k].slide].stop != Contact::open &&
            position_.regime[candidates_[k].slide].stop != candidates_[k].contact))
        set(candidates_[k], k < count && ((mask >> k) & 1U) != 0);
    if (solve() && std::none_of(candidates_.begin(), candidates_.end(),
                                [this](const Candidate& c) { return is_violated(c); }))
      return true;
  }
  return false;
}

/// With every slide at its limit slipping: the motion that nothing resists, scaled unknowns.
std::optional<VectorX> Choice::free_motion()
{
  const Model& model = stage_.model;
  for (const Candidate& candidate : candidates_)
    if (!candidate.is_stop)
      set(candidate, true);
  assemble(model, position_.regime, position_.x, stage_.at(t_), stage_.rate, position_.x,
           stage_.equations);
  const MatrixX scaled =
      model.row_scale.asDiagonal() * stage_.equations.jacobian * model.column_scale.asDiagonal();
  const Eigen::JacobiSVD<MatrixX> svd(scaled, Eigen::ComputeFullV);
  const VectorX values = svd.singularValues();
  if (!(values(model.size - 1) < 1e-12 * values(0)))
    return std::nullopt;
  return VectorX(svd.matrixV().col(model.size - 1));
}

/// Moves a tank that slides freely, against its friction, up to the first stop in its way.
bool Choice::run_to_stop()
{
  const Model& model = stage_.model;
  const std::optional<VectorX> scaled = free_motion();
  if (!scaled)
    return false;
  VectorX motion = model.column_scale.cwiseProduct(*scaled);
  double work = 0.0;
  for (const Slide& slide : model.slides)
    work += friction_of(slide, position_.x).dot(slip_of(slide, motion));
  if (std::abs(work) < 1e-12 * motion.norm() * scale_)
    return false; // no friction to say which way it is pulled
  if (work > 0.0)
    motion = -motion;
  double distance = std::numeric_limits<double>::infinity();
  for (const Slide& slide : model.slides)
  {
    const double slip = position_.x(slide.first + 1);
    const double moves = motion(slide.first + 1);
    if (std::abs(moves) < 1e-9 * motion.norm())
      continue;
    distance = std::min(distance,
                        (moves > 0.0 ? slide.forward - slip : slide.aft + slip) / std::abs(moves));
  }
  if (!std::isfinite(distance) || distance * motion.norm() < decided * scale_ / stiffness_scale)
    return false;
  position_.jump_work += std::abs(work) * distance;
  position_.x += distance * motion;
  candidates_.clear();
  find_candidates();
  return true;
}

/// With every slide at its limit slipping: does a whole tank move freely?
std::string Choice::explain()
{
  const Model& model = stage_.model;
  if (const std::optional<VectorX> motion = free_motion())
  {
    const VectorX& free = *motion;
    Index largest = 0;
    free.segment(model.rigid(0), 6 * model.tank_count).cwiseAbs().maxCoeff(&largest);
    const Index tank = largest / 6;
    constexpr std::array<const char*, 6> ways{"along its axis",  "across its axis",
                                              "upright",         "against turning about its axis",
                                              "against tilting", "against swinging sideways"};
    if (free.segment(model.idle(), model.idle_count).norm() < 0.9 * free.norm())
    {
      double carried = 0.0;
      for (const Slide& slide : model.slides)
        if (slide.tank == tank)
          carried += position_.x(slide.first);
      return fmt::format(
          "{} is not held {}: its slides have reached what friction can carry ({:.4g} N along "
          "together), and no key, grip or stop is in reach",
          model.tank_names[static_cast<std::size_t>(tank)],
          ways[static_cast<std::size_t>(largest % 6)], std::abs(carried));
    }
    Index seat = 0;
    for (Index c = 0; c < model.collar_count; ++c)
      if (std::abs(
              (model.seats.idle.middleRows(6 * c, 6) * free.segment(model.idle(), model.idle_count))
                  .norm()) > 1e-6 * free.norm())
        seat = c;
    const auto useat = static_cast<std::size_t>(seat);
    throw SolveError(fmt::format(
        "{}, collar {}: its seat is loose, no foot resists some motion of the ring; give its feet "
        "the stiffness that is missing, or a second foot",
        model.tank_names[static_cast<std::size_t>(model.tank_of_collar[useat])],
        model.collar_names[useat]));
  }
  const std::size_t slide = candidates_.empty() ? 0 : candidates_.front().slide;
  const std::string where =
      model.slides.empty()
          ? model.tank_names.front()
          : fmt::format("{}, collar {}",
                        model.tank_names[static_cast<std::size_t>(model.slides[slide].tank)],
                        model.collar_names[static_cast<std::size_t>(model.slides[slide].collar)]);
  throw SolveError(fmt::format(
      "{}: will not settle at {:.6g} of the stage: neither sticking nor slipping is consistent",
      where, t_));
}
} // namespace

std::string choose_regime(Stage& stage, Position& position, double t, Arrival arrival)
{
  return Choice(stage, position, t, arrival).run();
}

VectorX event_excess(const Stage& stage, const Position& start, const VectorX& x, double t,
                     const VectorX& rate)
{
  const Model& model = stage.model;
  const LoadState now = stage.at(t);
  // one entry at least, so that a model without slides has a largest
  VectorX excess =
      VectorX::Constant(std::max<Index>(1, 3 * static_cast<Index>(model.slides.size())),
                        -std::numeric_limits<double>::infinity());
  for (std::size_t i = 0; i < model.slides.size(); ++i)
  {
    const Slide& slide = model.slides[i];
    const Status& status = start.regime[i];
    const Index k = 3 * static_cast<Index>(i);
    if (status.motion == Motion::stick)
      excess(k) = friction_of(slide, x).norm() -
                  slide_limit(model, static_cast<Index>(i), status, now, stage.rate, x).value;
    else if (status.motion == Motion::slip)
    {
      const Vector2 force = friction_of(slide, x);
      const double size = force.norm();
      const Vector2 sense =
          slide.has_turn && size > 0.0 ? Vector2(-force / size) : status.direction;
      excess(k) = -stiffness_scale * sense.dot(slip_of(slide, x) - slip_of(slide, start.x));
      if (rate.size() > 0)
        excess(k) = std::max(excess(k), -stiffness_scale * sense.dot(slip_of(slide, rate)));
    }
    else if (!slide.is_frictionless())
      excess(k) = contact_margin(model, static_cast<Index>(i), now, x);
    const double slip = x(slide.first + 1);
    const double force = x(slide.first + 2);
    if (status.stop == Contact::open)
    {
      excess(k + 1) = stiffness_scale * (-slide.aft - slip);
      excess(k + 2) = stiffness_scale * (slip - slide.forward);
    }
    else
      excess(k + (status.stop == Contact::aft ? 1 : 2)) =
          status.stop == Contact::aft ? -force : force;
  }
  return excess;
}
} // namespace carlin::mounts
