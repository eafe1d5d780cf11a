#include "fields.hpp"
#include "readers.hpp"

#include <algorithm>
#include <array>
#include <fmt/format.h>

namespace carlin::reading
{
namespace
{
const Section member_section = {
    "members",
    "Runs along the lines where two planes meet: stringers, girder flanges, frames, beams, "
    "carlings, "
    "pillars. A list in `on` or `at` makes one member of each plane, named `<entry> <plane>` (of "
    "each pair of planes, `<entry> <plane of on> <plane of at>`); edits and footprints may name "
    "the member or the entry.",
    {
        plain(
            Form::surface, "on",
            "what it stands on: `bottom`, `side`, `deck`, or `{buttock: name}`, `{height: name}`, "
            "`{station: name}`, where a list of names may stand for the name"),
        names_of(Refers::plane, "at",
                 "the second plane, of another kind than that of `on`: on the bottom, a buttock "
                 "gives a stringer and a station a frame"),
        plain(Form::text, "from", "first plane of the run, of the third kind").optional("first"),
        plain(Form::text, "to", "last plane of the run").optional("last"),
        word("sides", "both|port|starboard", "").optional("both"),
        name_of_a(Refers::profile, "profile", ""),
        word("stands", "inside|outside|up|down|forward|aft|inboard|outboard",
             "direction in which the profile stands off the line; must be given on buttocks, "
             "heights "
             "and stations")
            .optional("inside"),
        plain(Form::flag, "primary", "a girder or web frame: it has its own deflection limit")
            .optional("false"),
        table(Form::section_list, "cut_outs", "cut_outs", "pieces taken out of the run")
            .optional("none"),
    }};

const Section cut_out_section = {"cut_outs",
                                 "",
                                 {planes_from_to(Refers::station, "stations", ""),
                                  planes_from_to(Refers::buttock, "buttocks", ""),
                                  planes_from_to(Refers::height, "heights", ""),
                                  word("sides", "both|port|starboard", "").optional("both")}};

/// Family of planes that a surface belongs to: the bottom is the lowest height.
Surface kind_of(Surface surface)
{
  switch (surface)
  {
  case Surface::bottom:
  case Surface::deck:
    return Surface::height;
  case Surface::side:
    return Surface::buttock;
  default:
    return surface;
  }
}

/// The kind of planes that a run crosses which lies on planes of kinds `a` and `b`.
Surface third_kind(Surface a, Surface b)
{
  for (const Surface kind : {Surface::station, Surface::buttock, Surface::height})
    if (kind != a && kind != b)
      return kind;
  return Surface::station;
}

struct Crossing
{
  bool is_list = false;
  Surface kind = Surface::buttock;
  std::vector<std::string> planes;
};

/// Second planes of a member; all of one kind, other than that of the surface.
std::optional<Crossing> read_crossing(const Fields& fields, Surface surface, const Planes& planes)
{
  Crossing crossing;
  crossing.is_list = fields.node("at").is_list();
  std::optional<Surface> kind;
  for (const std::string& plane : fields.names("at"))
  {
    const auto found = planes.find(plane);
    if (found == planes.end())
      continue; // complained of with all names at the end
    if (kind && *kind != found->second)
    {
      fields.complain("at", fmt::format("'{}' is of another kind than the planes before it; give "
                                        "them in an entry of their own",
                                        plane));
      return std::nullopt;
    }
    kind = found->second;
    crossing.planes.push_back(plane);
  }
  if (!kind)
    return std::nullopt;
  crossing.kind = *kind;
  if (kind_of(surface) == *kind)
  {
    fields.complain("at", fmt::format("'{}' never crosses what the member is on, which is of the "
                                      "same kind; name a plane of another kind",
                                      crossing.planes.front()));
    return std::nullopt;
  }
  return crossing;
}

PlaneRange read_run(const Fields& fields, Surface along)
{
  for (const char* end : {"from", "to"})
    if (fields.has(end))
      read_names(fields.node(end), refers_to(along));
  PlaneRange run{fields.text("from"), fields.text("to")};
  if (!run.from.empty() && run.from == run.to)
    fields.complain("to", fmt::format("the run from '{}' to '{}' is empty; name two different "
                                      "planes",
                                      run.from, run.to));
  return run;
}

MemberPart read_common(const Entry& entry, const Fields& fields)
{
  MemberPart member;
  member.family = entry.name;
  member.where = entry.where;
  member.sides = fields.word("sides", Sides::both);
  member.profile = fields.name("profile");
  member.stands = fields.word("stands", Stands::inside);
  member.is_primary = fields.flag("primary", false);
  for (const Node& element : list_elements(fields.node("cut_outs")))
    member.cut_outs.push_back(read_region(Fields(element, cut_out_section)));
  return member;
}

void check_stands(const Fields& fields, Surface surface, Stands stands)
{
  const bool is_hull =
      surface == Surface::bottom || surface == Surface::side || surface == Surface::deck;
  if (is_hull)
    return;
  if (!fields.has("stands"))
    fields.map().complain_at_key("key 'stands' is missing; an inner plate has two faces, say "
                                 "which way the member stands: up, down, forward, aft, inboard "
                                 "or outboard");
  else if (stands == Stands::inside || stands == Stands::outside)
    fields.complain("stands", "an inner plate has no inside or outside; write up, down, forward, "
                              "aft, inboard or outboard");
}
} // namespace

void read_members(const Node& node, const Planes& planes, Parts& parts)
{
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, member_section);
    MemberPart member = read_common(entry, fields);
    const SurfacePlanes on = fields.has("on") ? read_surface(fields.node("on")) : SurfacePlanes{};
    if (on.planes.empty() || !fields.has("at"))
    {
      fields.names("at");
      continue;
    }
    member.surface = on.surface;
    check_stands(fields, on.surface, member.stands);
    const std::optional<Crossing> at = read_crossing(fields, on.surface, planes);
    if (!at)
      continue;
    member.plane_kind = at->kind;
    member.along = read_run(fields, third_kind(kind_of(on.surface), at->kind));
    for (const std::string& surface_plane : on.planes)
      for (const std::string& plane : at->planes)
      {
        member.surface_plane = surface_plane;
        member.plane = plane;
        member.name = entry.name;
        if (on.is_list)
          member.name += " " + surface_plane;
        if (at->is_list)
          member.name += " " + plane;
        parts.members.push_back(member);
      }
  }
}

Chapter member_chapter()
{
  return {"Members",
          "",
          {&member_section, &cut_out_section},
          R"(members:
  stringer: {on: bottom, at: [girder, rail], from: transom, to: bulkhead-2, profile: bar}
  frame: {on: bottom, at: frame-1, profile: frame-tee, primary: true}
  beam: {on: deck, at: frame-1, from: centreline, to: carling-line, profile: bar, sides: port}
  girder-flange:
    on: {buttock: girder}
    at: flat
    profile: bar
    stands: inboard
    cut_outs: [{stations: {from: bulkhead-1, to: frame-1}}]
  stiffener: {on: {station: [bulkhead-1, bulkhead-2]}, at: [girder, rail], profile: bar, stands: aft}
)"};
}
} // namespace carlin::reading
