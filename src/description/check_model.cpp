#include "edits.hpp"
#include "readers.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <map>
#include <set>

namespace carlin::reading
{
namespace
{
void complain(const FileLocation& where, std::string message, Findings& findings)
{
  findings.problems.push_back({where, std::move(message)});
}

template <class Things> std::vector<std::string> names_of_all(const Things& things)
{
  std::vector<std::string> names;
  for (const auto& thing : things)
    names.push_back(thing.name);
  return names;
}

/// Names that must not be given to two things, with the place of the first.
class Taken
{
public:
  void add(const std::string& name, const FileLocation& where, Findings& findings)
  {
    const auto [at, is_new] = first_.emplace(name, where);
    const FileLocation& first = at->second;
    const bool is_same_entry = first.line == where.line && first.column == where.column;
    if (!is_new && !is_same_entry && complained_.insert({where.line, where.column}).second)
      complain(
          where,
          fmt::format("{}: the name is taken by the one in line {}; rename one", name, first.line),
          findings);
  }

private:
  std::map<std::string, FileLocation> first_;
  std::set<std::pair<int, int>> complained_;
};

struct TakenNames
{
  Taken parts, joints, equipment;
};

void take_names(const std::vector<PlatePart>& plates, const std::vector<MemberPart>& members,
                const std::vector<Joint>& joints, const std::vector<Equipment>& equipment,
                TakenNames& taken, Findings& findings)
{
  for (const PlatePart& plate : plates)
  {
    taken.parts.add(plate.family, plate.where, findings);
    taken.parts.add(plate.name, plate.where, findings);
  }
  for (const MemberPart& member : members)
  {
    taken.parts.add(member.family, member.where, findings);
    taken.parts.add(member.name, member.where, findings);
  }
  for (const Joint& joint : joints)
    taken.joints.add(joint.name, joint.where, findings);
  for (const Equipment& item : equipment)
    taken.equipment.add(item.name, item.where, findings);
}

/// Part names are unique in what any one configuration may hold; two configurations that are not
/// based on one another may use a name alike.
void check_unique_names(const Model& model, Findings& findings)
{
  TakenNames base;
  take_names(model.plates, model.members, model.joints, model.equipment, base, findings);
  if (model.frame)
  {
    for (const FrameMember& member : model.frame->members)
      base.parts.add(member.name, member.where, findings);
    for (const FramePlate& plate : model.frame->plates)
      base.parts.add(plate.name, plate.where, findings);
  }
  std::map<std::string, TakenNames> after;
  for (const Configuration& configuration : model.configurations)
  {
    TakenNames taken = configuration.based_on.empty() ? base : after[configuration.based_on];
    take_names(configuration.plates, configuration.members, configuration.joints,
               configuration.equipment, taken, findings);
    after[configuration.name] = taken;
  }
}

template <class Part> bool any_addressed(const std::string& name, const std::vector<Part>& parts)
{
  return std::any_of(parts.begin(), parts.end(),
                     [&](const Part& part) { return addresses(name, part); });
}

template <class Part>
void add_addresses(const std::vector<Part>& parts, std::vector<std::string>& names)
{
  for (const Part& part : parts)
    for (const std::string& name : {part.family, part.name})
      if (std::find(names.begin(), names.end(), name) == names.end())
        names.push_back(name);
}

void check_edit(const Model& model, const Configuration& configuration, const Edit& edit,
                const ConfiguredCraft& craft, Findings& findings)
{
  const bool is_plate = any_addressed(edit.part, craft.plates);
  const bool is_member = any_addressed(edit.part, craft.members);
  const auto say = [&](const std::string& message)
  {
    complain(edit.region.where,
             fmt::format("configurations.{}.edits: {}", configuration.name, message), findings);
  };
  if (!is_plate && !is_member)
  {
    std::vector<std::string> names;
    if (edit.kind != Edit::Kind::cut)
      add_addresses(craft.plates, names);
    if (edit.kind != Edit::Kind::open)
      add_addresses(craft.members, names);
    say(does_not_exist("part", edit.part, names));
  }
  else if (edit.kind == Edit::Kind::cut && !is_member)
    say(fmt::format("'{}' is a plate, and members are cut; write 'open: {}'", edit.part,
                    edit.part));
  else if (edit.kind == Edit::Kind::open && !is_plate)
    say(fmt::format("'{}' is a member, and plates are opened; write 'cut: {}'", edit.part,
                    edit.part));
  else if (edit.kind == Edit::Kind::replace && !edit.with.empty())
  {
    const std::vector<std::string> known =
        is_plate ? names_of_all(model.schedules) : names_of_all(model.profiles);
    if (std::find(known.begin(), known.end(), edit.with) == known.end())
      say(does_not_exist(is_plate ? "schedule" : "profile", edit.with, known));
  }
}

/// Follows every chain of edits as `configured` does.
void check_edits(const Model& model, Findings& findings)
{
  std::map<std::string, ConfiguredCraft> after;
  for (const Configuration& configuration : model.configurations)
  {
    ConfiguredCraft craft =
        configuration.based_on.empty() ? unedited(model) : after[configuration.based_on];
    for (const Edit& edit : configuration.edits)
    {
      check_edit(model, configuration, edit, craft, findings);
      apply(model, edit, configuration.name, craft);
    }
    const std::vector<std::string> aboard = names_of_all(craft.equipment);
    for (const std::string& name : configuration.removed_equipment)
      if (std::find(aboard.begin(), aboard.end(), name) == aboard.end())
        complain(configuration.where,
                 fmt::format("configurations.{}.remove_equipment: {}", configuration.name,
                             does_not_exist("equipment", name, aboard)),
                 findings);
    add_parts(model, configuration, craft);
    after[configuration.name] = craft;
  }
}

void check_tanks_aboard(const Model& model, Findings& findings)
{
  for (const Tank& tank : model.tanks)
  {
    const bool is_aboard =
        std::any_of(model.configurations.begin(), model.configurations.end(),
                    [&](const Configuration& c) {
                      return std::find(c.tanks.begin(), c.tanks.end(), tank.name) != c.tanks.end();
                    });
    if (!is_aboard)
      complain(tank.where,
               fmt::format("tanks.{}: it is aboard in no configuration; add 'tanks: [{}]' to one",
                           tank.name, tank.name),
               findings);
  }
}

/// Checks one stage; the place of an event is its own.
struct StageCheck
{
  const Model& model;
  std::string path;
  Findings& findings;

  void operator()(const Landing& landing) const
  {
    if (!model.hull)
    {
      say(landing.where, "there is no hull to land on; use 'force' or 'pressure'");
      return;
    }
    // The patch's pressure, if it is not stated, is the standard's, like the acceleration by it.
    if (!landing.by_standard && landing.pressure)
      return;
    std::vector<std::string> missing;
    if (model.craft.waterline_length <= 0.0)
      missing.emplace_back("waterline_length");
    if (model.craft.chine_beam <= 0.0)
      missing.emplace_back("chine_beam");
    if (model.craft.speed <= 0.0)
      missing.emplace_back("speed");
    if (!missing.empty())
      say(landing.where,
          fmt::format("the standard's formula needs {} of the craft; add to 'craft:', "
                      "or state acceleration and pressure",
                      listed(missing)));
  }
  void operator()(const HoldingAcceleration& hold) const
  {
    if (model.tanks.empty())
      say(hold.where, "there is no tank to hold; add 'tanks:'");
  }
  void operator()(const DirectForce& force) const
  {
    if (!model.hull && !model.frame)
      say(force.where, "a rigid bed carries no force; use 'tank_force'");
  }
  void operator()(const LineForce&) const {}
  void operator()(const PartPressure&) const {}
  void operator()(const TankForce& force) const
  {
    for (const Tank& tank : model.tanks)
      if (tank.name == force.tank && force.position > (tank.axis_to - tank.axis_from).norm())
        say(force.where,
            fmt::format("position {:g} m is beyond the end of '{}', which is {:g} m "
                        "long; measure from axis_from",
                        force.position, tank.name, (tank.axis_to - tank.axis_from).norm()));
  }

  void say(const FileLocation& where, const std::string& message) const
  {
    complain(where, fmt::format("{}: {}", path, message), findings);
  }
};

void check_motion(const Model& model, const FootMotion& motion, const StageCheck& check)
{
  if (model.hull)
    check.say(motion.where, "the feet stand on the hull, whose motion is found and not imposed; "
                            "remove it, or use 'bed: rigid'");
  for (const Tank& tank : model.tanks)
  {
    if (tank.name != motion.tank || motion.collar.empty())
      continue;
    const std::vector<std::string> collars = names_of_all(tank.collars);
    if (std::find(collars.begin(), collars.end(), motion.collar) == collars.end())
      check.say(motion.where, does_not_exist("collar", motion.collar, collars));
  }
}

void check_cases(const Model& model, Findings& findings)
{
  for (const LoadCase& load_case : model.cases)
    for (const Stage& stage : load_case.stages)
    {
      const StageCheck check{model, fmt::format("cases.{}.{}", load_case.name, stage.name),
                             findings};
      for (const auto& [event, factor] : stage.events)
        std::visit(check, event);
      for (const FootMotion& motion : stage.foot_motions)
        check_motion(model, motion, check);
      if (stage.water == WaterState::afloat && !model.hull)
        check.say(stage.where, "there is no hull to float on; write 'water: gravity' or remove it");
      if (stage.water == WaterState::gravity && model.hull && !model.frame)
        check.say(stage.where, "nothing supports the hull under gravity alone; write 'water: "
                               "afloat'");
      if (!stage.tanks.empty() && model.tanks.empty())
        check.say(stage.where, "it gives a state of tanks, and there is none; add 'tanks:'");
    }
}

void check_frame(const Model& model, Findings& findings)
{
  if (!model.frame)
    return;
  std::map<std::string, Vector3> position;
  for (const FramePoint& point : model.frame->points)
    position[point.name] = point.position;
  for (const FrameMember& member : model.frame->members)
  {
    const auto from = position.find(member.from);
    const auto to = position.find(member.to);
    if (from == position.end() || to == position.end() || member.from == member.to)
      continue;
    const Vector3 line = to->second - from->second;
    constexpr double least_angle = 1e-6; // rad: below, the direction of the height is lost
    if (line.isZero())
      complain(member.where,
               fmt::format("frame.members.{}: its ends '{}' and '{}' are at the same place; it has "
                           "no length",
                           member.name, member.from, member.to),
               findings);
    else if (line.normalized().cross(member.upright.normalized()).norm() < least_angle)
      complain(member.where,
               fmt::format("frame.members.{}: 'upright' is along the member; give the direction in "
                           "which the profile's height points",
                           member.name),
               findings);
  }
}
} // namespace

void check_model(const Model& model, Findings& findings)
{
  check_unique_names(model, findings);
  check_edits(model, findings);
  check_tanks_aboard(model, findings);
  check_cases(model, findings);
  check_frame(model, findings);
}
} // namespace carlin::reading
