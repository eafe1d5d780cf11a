#include "edits.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <map>
#include <optional>

namespace carlin
{
namespace
{
/// Places of planes in the order in which the model lists them, built-in ones included.
struct PlaneOrder
{
  std::map<std::string, std::size_t> place;

  explicit PlaneOrder(const Model& model)
  {
    if (!model.hull)
      return;
    std::size_t next = 0;
    place["centreline"] = next++;
    place["bottom"] = next++;
    for (const Station& station : model.hull->stations)
      place[station.name] = next++;
    for (const Buttock& buttock : model.hull->buttocks)
      place[buttock.name] = next++;
    for (const Height& height : model.hull->heights)
      place[height.name] = next++;
    place["chine"] = next++;
    place["deck"] = next++;
  }

  std::size_t operator()(const std::string& name) const
  {
    const auto at = place.find(name);
    return at == place.end() ? 0 : at->second;
  }
};

/// Common part of two ranges; nothing if they only touch or lie apart.
std::optional<PlaneRange> common(const PlaneRange& a, const PlaneRange& b, const PlaneOrder& order)
{
  PlaneRange range = a;
  if (range.from.empty() || (!b.from.empty() && order(b.from) > order(range.from)))
    range.from = b.from;
  if (range.to.empty() || (!b.to.empty() && order(b.to) < order(range.to)))
    range.to = b.to;
  if (!range.from.empty() && !range.to.empty() && order(range.from) >= order(range.to))
    return std::nullopt;
  return range;
}

std::optional<Sides> common(Sides a, Sides b)
{
  if (a == b || b == Sides::both)
    return a;
  if (a == Sides::both)
    return b;
  return std::nullopt;
}

bool is_unbounded(const PlaneRange& range) { return range.from.empty() && range.to.empty(); }

bool is_whole(const CutOut& region, Sides sides)
{
  return is_unbounded(region.stations) && is_unbounded(region.buttocks) &&
         is_unbounded(region.heights) && (region.sides == Sides::both || region.sides == sides);
}

/// The piece of a plate inside a region, with the plate's own openings.
std::optional<PlatePart> piece_of(const PlatePart& plate, const CutOut& region,
                                  const PlaneOrder& order)
{
  const auto stations = common(plate.patch.stations, region.stations, order);
  const auto buttocks = common(plate.patch.buttocks, region.buttocks, order);
  const auto heights = common(plate.patch.heights, region.heights, order);
  const auto sides = common(plate.patch.sides, region.sides);
  if (!stations || !buttocks || !heights || !sides)
    return std::nullopt;
  PlatePart piece = plate;
  piece.patch.stations = *stations;
  piece.patch.buttocks = *buttocks;
  piece.patch.heights = *heights;
  piece.patch.sides = *sides;
  return piece;
}

/// Kind of planes that a member crosses on its run.
Surface run_kind(const MemberPart& member)
{
  const auto lies_on = [&](Surface kind)
  {
    const bool by_surface = member.surface == kind ||
                            (kind == Surface::height && (member.surface == Surface::bottom ||
                                                         member.surface == Surface::deck)) ||
                            (kind == Surface::buttock && member.surface == Surface::side);
    return by_surface || member.plane_kind == kind;
  };
  if (!lies_on(Surface::station))
    return Surface::station;
  return lies_on(Surface::buttock) ? Surface::height : Surface::buttock;
}

const PlaneRange& range_along(const CutOut& region, Surface kind)
{
  if (kind == Surface::station)
    return region.stations;
  return kind == Surface::buttock ? region.buttocks : region.heights;
}

std::optional<MemberPart> piece_of(const MemberPart& member, const CutOut& region,
                                   const PlaneOrder& order)
{
  const auto along = common(member.along, range_along(region, run_kind(member)), order);
  const auto sides = common(member.sides, region.sides);
  if (!along || !sides)
    return std::nullopt;
  MemberPart piece = member;
  piece.along = *along;
  piece.sides = *sides;
  return piece;
}

std::string& use_of(PlatePart& plate) { return plate.schedule; }
std::string& use_of(MemberPart& member) { return member.profile; }
Sides sides_of(const PlatePart& plate) { return plate.patch.sides; }
Sides sides_of(const MemberPart& member) { return member.sides; }

template <class Part> void take_out(const Edit& edit, std::vector<Part>& parts)
{
  std::erase_if(parts, [&](const Part& part)
                { return addresses(edit.part, part) && is_whole(edit.region, sides_of(part)); });
  for (Part& part : parts)
    if (addresses(edit.part, part))
      part.cut_outs.push_back(edit.region);
}

template <class Part>
std::string free_name(const std::string& wanted, const std::vector<Part>& parts)
{
  const auto is_taken = [&](const std::string& name)
  {
    return std::any_of(parts.begin(), parts.end(),
                       [&](const Part& part) { return part.name == name; });
  };
  std::string name = wanted;
  for (int i = 2; is_taken(name); ++i)
    name = fmt::format("{} {}", wanted, i);
  return name;
}

/// A fastening follows the pieces of the part that it fastens.
void fasten_piece(const std::string& whole, const std::string& piece, const std::string& by,
                  std::vector<Joint>& joints)
{
  const std::size_t count = joints.size();
  for (std::size_t i = 0; i < count; ++i)
    if (joints[i].part == whole)
    {
      Joint joint = joints[i];
      joint.name = fmt::format("{} ({})", joint.name, by);
      joint.part = piece;
      joints.push_back(joint);
    }
}

template <class Part>
void replace(const Edit& edit, const std::string& by, const PlaneOrder& order,
             std::vector<Part>& parts, std::vector<Joint>& joints)
{
  const std::size_t count = parts.size(); // pieces are put behind and not replaced again
  for (std::size_t i = 0; i < count; ++i)
  {
    if (!addresses(edit.part, parts[i]))
      continue;
    if (is_whole(edit.region, sides_of(parts[i])))
    {
      use_of(parts[i]) = edit.with;
      continue;
    }
    std::optional<Part> piece = piece_of(parts[i], edit.region, order);
    if (!piece)
      continue;
    piece->name = free_name(fmt::format("{} ({})", parts[i].name, by), parts);
    piece->where = edit.region.where;
    use_of(*piece) = edit.with;
    fasten_piece(parts[i].name, piece->name, by, joints);
    parts[i].cut_outs.push_back(edit.region);
    parts.push_back(*piece);
  }
}
} // namespace

ConfiguredCraft unedited(const Model& model)
{
  ConfiguredCraft craft;
  craft.plates = model.plates;
  craft.members = model.members;
  craft.joints = model.joints;
  craft.equipment = model.equipment;
  return craft;
}

void apply(const Model& model, const Edit& edit, const std::string& by, ConfiguredCraft& craft)
{
  switch (edit.kind)
  {
  case Edit::Kind::cut:
    take_out(edit, craft.members);
    return;
  case Edit::Kind::open:
    take_out(edit, craft.plates);
    return;
  case Edit::Kind::replace:
    const PlaneOrder order(model);
    replace(edit, by, order, craft.plates, craft.joints);
    replace(edit, by, order, craft.members, craft.joints);
    return;
  }
}

void add_parts(const Model& model, const Configuration& configuration, ConfiguredCraft& craft)
{
  const auto append = [](auto& to, const auto& from)
  { to.insert(to.end(), from.begin(), from.end()); };
  append(craft.plates, configuration.plates);
  append(craft.members, configuration.members);
  append(craft.joints, configuration.joints);
  append(craft.equipment, configuration.equipment);
  for (const std::string& name : configuration.removed_equipment)
    std::erase_if(craft.equipment, [&](const Equipment& item) { return item.name == name; });
  craft.tanks.clear();
  for (const Tank& tank : model.tanks)
    if (std::find(configuration.tanks.begin(), configuration.tanks.end(), tank.name) !=
        configuration.tanks.end())
      craft.tanks.push_back(tank);
  craft.name = configuration.name;
  craft.standing = configuration.standing;
}
} // namespace carlin
