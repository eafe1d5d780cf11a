#include "envelope.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>
#include <limits>

namespace carlin
{
namespace
{
/// One of the two histories of a stage.
struct MountEnd
{
  const MountStageResult& result;
  std::string words;
};

/// Limit that only the tank's maker can give.
struct MakersLimit
{
  std::string name, unit;
  double demand = 0.0;
  std::optional<double> limit;
  std::string ask; ///< "the largest axial force the tank may carry"
};

void put_makers(const StageContext& context, const MakersLimit& item, const std::string& subject,
                const Vector3& place, const std::string& end_words, Envelope& envelope)
{
  Check check = stage_check(context, item.name, subject);
  check.demand = item.demand;
  check.unit = item.unit;
  check.limit = item.limit;
  check.formula = "found <= the maker's limit";
  check.source = "the tank's maker, as given in the model";
  check.remark = item.limit
                     ? end_words
                     : joined_remarks({fmt::format("ask the maker for {}", item.ask), end_words});
  envelope.put(std::move(check), place);
}

constexpr double noise = 1e-9; // round-off of a hull solution, relative to what produced it

/// Position of the first section where a figure is largest, to round-off.
template <typename Figure> double where_largest(const TankResult& tank, Figure figure)
{
  double largest = 0.0;
  double position = tank.sections.empty() ? 0.0 : tank.sections.front().position;
  for (const TankSection& section : tank.sections)
    if (figure(section) > largest * (1.0 + noise))
    {
      largest = figure(section);
      position = section.position;
    }
  return position;
}

/// Nothing, where a figure is round-off of the forces at the tank's collars.
double less_noise(double figure, double scale)
{
  return std::abs(figure) < noise * scale ? 0.0 : figure;
}

/// Sum of the forces at a tank's collars [N].
double collar_forces(const TankResult& tank)
{
  double sum = 0.0;
  for (const CollarResult& collar : tank.collars)
    sum += collar.force.head<3>().norm() + collar.clamping_force;
  return sum;
}

void add_tank(const StageContext& context, const Tank& tank, const TankResult& found,
              const std::string& words, Envelope& envelope)
{
  const Vector3 along = tank_axes(tank).col(0);
  const auto at = [&](double position) -> Vector3 { return tank.axis_from + position * along; };
  const double forces = collar_forces(found);
  const double moments = forces * (tank.axis_to - tank.axis_from).norm();
  put_makers(context,
             {"tank axial force", "N", less_noise(found.largest_axial_force, forces),
              tank.limits.axial_force,
              "the largest axial force that its supports may put into the tank"},
             tank.name,
             at(where_largest(found, [](const TankSection& s) { return std::abs(s.axial_force); })),
             words, envelope);
  put_makers(context,
             {"tank bending", "N m", less_noise(found.largest_bending, moments),
              tank.limits.bending_moment,
              "the largest bending moment that its supports may put into the tank"},
             tank.name,
             at(where_largest(found, [](const TankSection& s) { return s.bending.norm(); })), words,
             envelope);
  put_makers(
      context,
      {"tank torsion", "N m", less_noise(found.largest_torsion, moments), tank.limits.torsion,
       "the largest torsion that its supports may put into the tank"},
      tank.name,
      at(found.largest_torsion < noise * moments
             ? 0.0
             : where_largest(found, [](const TankSection& s) { return std::abs(s.torsion); })),
      words, envelope);
}

void add_collar(const StageContext& context, const Tank& tank, const Collar& collar,
                const CollarResult& found, const std::string& words, Envelope& envelope)
{
  const std::string subject = tank.name + ", " + collar.name;
  const Vector3 place = tank.axis_from + collar.position * tank_axes(tank).col(0);
  put_makers(context,
             {"collar force", "N", std::hypot(found.force[1], found.force[2]),
              tank.limits.collar_force, "the largest force across the tank at one collar"},
             subject, place, words, envelope);
  if (!collar.ring)
    return; // nothing clamps and nothing bears on a lining
  put_makers(context,
             {"clamping force", "N", found.clamping_force, tank.limits.clamping_force,
              "the largest total pressing of a ring on the tank"},
             subject, place, words, envelope);
  put_makers(context,
             {"lining pressure", "Pa", found.peak_lining_pressure, tank.limits.lining_pressure,
              "the largest pressure of a lining on the tank"},
             subject, place, words, envelope);
}

void add_stroke(const StageContext& context, const Tank& tank, const Collar& collar,
                const CollarResult& found, const std::string& words, Envelope& envelope)
{
  if (collar.kind != CollarKind::sliding)
    return;
  struct Side
  {
    std::optional<double> stroke;
    double left;
    std::string name;
  };
  const std::array<Side, 2> sides{
      Side{collar.stroke_aft, found.stroke_left_aft, "towards axis_from"},
      Side{collar.stroke_forward, found.stroke_left_forward, "towards axis_to"}};
  const double fraction = *criterion_limit(context.model, "stroke_used");
  for (const Side& side : sides)
  {
    if (!side.stroke)
      continue; // no stop, no end to the travel
    Check check = stage_check(context, "stroke left", tank.name + ", " + collar.name);
    check.demand = side.left;
    check.limit = (1.0 - fraction) * *side.stroke;
    check.limit_from_below = true;
    check.unit = "m";
    cite(check, context.model, "stroke_used");
    check.formula =
        fmt::format("{}: {:g} of {:.1f} mm", check.formula, 1.0 - fraction, *side.stroke * 1e3);
    check.remark = joined_remarks(
        {found.hold == Hold::at_stop ? side.name + ", at a stop" : side.name, words});
    envelope.put(std::move(check), tank.axis_from + collar.position * tank_axes(tank).col(0));
  }
}

/// Grip of a fixed collar, judged where grip is at its low end.
void add_grip(const StageContext& context, const Tank& tank, const Collar& collar,
              const CollarResult& found, Envelope& envelope)
{
  if (collar.kind != CollarKind::fixed || !collar.grip_force)
    return; // keyed: nothing to lose
  const double radius = collar.ring ? collar.ring->radius : 0.5 * tank.diameter;
  Check check = stage_check(context, "grip of fixed collar", tank.name + ", " + collar.name);
  check.demand = std::hypot(found.friction_force, found.force[3] / radius);
  const double fraction = *criterion_limit(context.model, "grip_used");
  check.limit = fraction * collar.grip_force->low;
  check.unit = "N";
  cite(check, context.model, "grip_used");
  check.formula =
      fmt::format("{}: {:g} x {:.1f} kN", check.formula, fraction, collar.grip_force->low / 1e3);
  const bool is_lost = found.hold == Hold::grip_lost;
  check.remark = is_lost ? fmt::format("the grip is lost: the tank has slipped {:.1f} mm in it",
                                       found.slip * 1e3)
                         : "grip at its low end";
  check = judged(std::move(check));
  if (is_lost) // a grip that slips carries its limit and no more
    check.verdict = Verdict::not_met;
  envelope.put_judged(std::move(check), tank.axis_from + collar.position * tank_axes(tank).col(0));
}

/// One line a tank: how many of its motions nothing holds.
void add_held(const StageContext& context, const std::vector<MountEnd>& ends, Envelope& envelope)
{
  for (const Tank& tank : context.configuration.craft.tanks)
    for (const MountEnd& end : ends)
    {
      if (end.result.tanks.empty() && end.result.not_held.empty())
        continue; // the history had ended before this stage
      Check check = stage_check(context, "tank held", tank.name);
      for (const std::string& message : end.result.not_held)
        if (message.starts_with(tank.name + " is not held"))
        {
          check.demand += 1.0;
          check.remark = joined_remarks({check.remark, message});
        }
      if (check.demand > 0.0)
        check.remark = joined_remarks({check.remark, end.words});
      check.limit = 0.0;
      check.unit = "-";
      check.formula = "motions of the tank that nothing holds: none";
      check.source = "equilibrium";
      envelope.put(std::move(check), 0.5 * (tank.axis_from + tank.axis_to));
    }
}
} // namespace

void add_mount_checks(const StageContext& context, Envelope& envelope)
{
  const std::vector<Tank>& tanks = context.configuration.craft.tanks;
  const std::vector<MountEnd> ends{
      {context.stage.mounts_low, "friction and grip at their low end"},
      {context.stage.mounts_high, "friction and grip at their high end"},
      {context.stage.mounts_crossed, "friction at its high end, grip at its low"}};
  for (const MountEnd& end : ends)
    for (std::size_t t = 0; t < end.result.tanks.size(); ++t)
    {
      const TankResult& found = end.result.tanks[t];
      add_tank(context, tanks[t], found, end.words, envelope);
      for (std::size_t c = 0; c < found.collars.size(); ++c)
      {
        const Collar& collar = tanks[t].collars[c];
        add_collar(context, tanks[t], collar, found.collars[c], end.words, envelope);
        add_stroke(context, tanks[t], collar, found.collars[c], end.words, envelope);
        if (&end != &ends[1]) // holding is judged where grip is least, whatever the friction
          add_grip(context, tanks[t], collar, found.collars[c], envelope);
      }
    }
  add_held(context, ends, envelope);
}
} // namespace carlin
