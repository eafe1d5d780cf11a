#include "fields.hpp"
#include "readers.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace carlin::reading
{
namespace
{
Key stations_key() { return planes_from_to(Refers::station, "stations", "range of stations"); }
Key buttocks_key()
{
  return planes_from_to(Refers::buttock, "buttocks",
                        "range of buttocks from the centreline outward, on each of `sides`");
}
Key heights_key() { return planes_from_to(Refers::height, "heights", "range of heights"); }
Key sides_key() { return word("sides", "both|port|starboard", "").optional("both"); }
Key cut_outs_key()
{
  return table(Form::section_list, "cut_outs", "cut_outs", "rectangles taken out of the part")
      .optional("none");
}

const Section plate_section = {
    "plating, bulkheads, webs, flats",
    "Rectangles of plating. The four sections have the same keys; which one a part stands in says "
    "what it is called in the tables and, of bulkheads, where bays end. A list of planes in `on` "
    "makes one part of each, named `<entry> <plane>`; edits and footprints may name the part or "
    "the entry.",
    {
        plain(
            Form::surface, "on",
            "`bottom`, `side`, `deck`, or `{buttock: name}`, `{height: name}`, `{station: name}`, "
            "where a list of names may stand for the name"),
        name_of_a(Refers::schedule, "schedule", ""),
        stations_key(),
        buttocks_key(),
        heights_key(),
        sides_key(),
        cut_outs_key(),
    }};

const Section cut_out_section = {
    "cut_outs",
    "A rectangle by ranges of planes; a range that is left out is all of the part.",
    {stations_key(), buttocks_key(), heights_key(), sides_key()}};

const Section hatch_section = {
    "hatches",
    "A plate that closes an opening. It lies on the surface of the part `in`, which gets the "
    "opening.",
    {
        name_of_a(Refers::plate, "in", "the part that is opened, or all parts of an entry"),
        name_of_a(Refers::schedule, "schedule", ""),
        stations_key(),
        buttocks_key(),
        heights_key(),
        sides_key(),
        table(Form::section, "fastened", "fastened",
              "stiffness of its fastening; makes the joint `<hatch> fastening`")
            .optional("welded"),
    }};

std::vector<Key> joint_stiffness_keys()
{
  return {
      quantity("stiffness_along", Dimension::stiffness_per_length, Bound::not_negative,
               "slip along the line, per length of line"),
      quantity("stiffness_across", Dimension::stiffness_per_length, Bound::not_negative,
               "in the plane of the part, across the line"),
      quantity("stiffness_normal", Dimension::stiffness_per_length, Bound::not_negative,
               "out of the plane of the part"),
      quantity("stiffness_rotation", Dimension::rotational_stiffness_per_length,
               Bound::not_negative, "about the line"),
      plain(Form::text, "source", "where the figures come from").optional("no source"),
  };
}

const Section fastened_section = {"fastened", "", joint_stiffness_keys()};

const Section joint_section = {
    "joints",
    "A line where one part meets others and is fastened, not welded through: all edges where the "
    "part meets other parts.",
    []
    {
      std::vector<Key> keys = joint_stiffness_keys();
      keys.insert(keys.begin(), name_of_a(Refers::plate, "part", "the part that is fastened"));
      return keys;
    }()};

const Section footprint_section = {
    "footprints",
    "A rectangle over which something bears: the nodes within it share force and moment.",
    {
        of_form(Form::vector, "centre", Dimension::length, ""),
        quantity("length", Dimension::length, Bound::not_negative, "along x")
            .optional("the nearest nodes only"),
        quantity("width", Dimension::length, Bound::not_negative,
                 "along y; along z on upright parts")
            .optional("the nearest nodes only"),
        names_of(Refers::part, "parts", "parts it sits on").optional("any"),
    }};

const Section equipment_section = {
    "equipment",
    "A rigid mass spread by its footprints; it stiffens nothing.",
    {
        quantity("mass", Dimension::mass, Bound::positive, ""),
        of_form(Form::vector, "centre", Dimension::length, "centre of gravity"),
        table(Form::section_list, "footprints", "footprints", "at least one"),
    }};

void read_joint_stiffness(const Fields& fields, Joint& joint)
{
  joint.stiffness_along = fields.quantity("stiffness_along");
  joint.stiffness_across = fields.quantity("stiffness_across");
  joint.stiffness_normal = fields.quantity("stiffness_normal");
  joint.stiffness_rotation = fields.quantity("stiffness_rotation");
  joint.source = fields.text("source");
}

std::vector<CutOut> read_cut_outs(const Fields& fields)
{
  std::vector<CutOut> cut_outs;
  for (const Node& element : list_elements(fields.node("cut_outs")))
    cut_outs.push_back(read_region(Fields(element, cut_out_section)));
  return cut_outs;
}

/// The range along a surface's own plane would mean nothing.
void check_ranges_of(const Fields& fields, Surface surface, std::string_view on)
{
  const auto refuse = [&](const char* key)
  {
    if (fields.has(key))
      fields.node(key).complain_at_key(fmt::format(
          "'{}' are not used on {}, which lies on one of them; remove the key", key, on));
  };
  if (surface == Surface::station)
    refuse("stations");
  if (surface == Surface::buttock || surface == Surface::side)
    refuse("buttocks");
  if (surface == Surface::height || surface == Surface::bottom || surface == Surface::deck)
    refuse("heights");
}
} // namespace

CutOut read_region(const Fields& fields)
{
  CutOut region;
  region.where = fields.map().from();
  region.stations = fields.plane_range("stations");
  region.buttocks = fields.plane_range("buttocks");
  region.heights = fields.plane_range("heights");
  region.sides = fields.word("sides", Sides::both);
  return region;
}

SurfacePlanes read_surface(const Node& node)
{
  SurfacePlanes found;
  constexpr std::string_view hint =
      "write bottom, side, deck, or {buttock: name}, {height: name}, {station: name}";
  if (node.is_text())
  {
    const std::string text = node.text();
    if (text == "bottom" || text == "side" || text == "deck")
    {
      found.surface = text == "bottom" ? Surface::bottom
                      : text == "side" ? Surface::side
                                       : Surface::deck;
      found.planes = {""};
    }
    else
      node.complain(fmt::format("'{}' is no surface; {}", text, hint));
    return found;
  }
  const std::vector<Entry> entries = node.entries();
  if (entries.size() != 1)
  {
    node.complain(fmt::format("a surface is due here; {}", hint));
    return found;
  }
  const std::string& kind = entries[0].name;
  if (kind != "buttock" && kind != "height" && kind != "station")
  {
    entries[0].node.complain_at_key(fmt::format("'{}' is no kind of plane; {}", kind, hint));
    return found;
  }
  found.surface = kind == "buttock"  ? Surface::buttock
                  : kind == "height" ? Surface::height
                                     : Surface::station;
  found.is_list = entries[0].node.is_list();
  found.planes = read_names(entries[0].node, refers_to(found.surface));
  for (const auto& [plane, surface] :
       {std::pair{"chine", "side"}, std::pair{"bottom", "bottom"}, std::pair{"deck", "deck"}})
    if (std::find(found.planes.begin(), found.planes.end(), plane) != found.planes.end())
      entries[0].node.complain(
          fmt::format("'{}' is the plating of the hull itself; write 'on: {}'", plane, surface));
  return found;
}

void read_plates(const Node& node, PlateKind kind, Parts& parts)
{
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, plate_section);
    PlatePart plate;
    plate.where = entry.where;
    plate.kind = kind;
    plate.family = entry.name;
    const CutOut region = read_region(fields);
    plate.patch.stations = region.stations;
    plate.patch.buttocks = region.buttocks;
    plate.patch.heights = region.heights;
    plate.patch.sides = region.sides;
    plate.schedule = fields.name("schedule");
    plate.cut_outs = read_cut_outs(fields);
    const SurfacePlanes on = fields.has("on") ? read_surface(fields.node("on")) : SurfacePlanes{};
    if (on.planes.empty())
      continue;
    plate.patch.surface = on.surface;
    check_ranges_of(fields, on.surface, "this surface");
    for (const Node& element : fields.node("cut_outs").elements())
      check_ranges_of(Fields(element, cut_out_section), on.surface, "this surface");
    for (const std::string& plane : on.planes)
    {
      plate.patch.plane = plane;
      plate.name = on.is_list ? fmt::format("{} {}", entry.name, plane) : entry.name;
      parts.plates.push_back(plate);
    }
  }
}

void read_hatches(const Node& node, const std::vector<PlatePart>& known, Parts& parts)
{
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, hatch_section);
    const std::string in = fields.name("in");
    const CutOut opening = read_region(fields);
    PlatePart hatch;
    hatch.name = entry.name;
    hatch.family = entry.name;
    hatch.where = entry.where;
    hatch.kind = PlateKind::hatch;
    hatch.schedule = fields.name("schedule");
    hatch.patch = {Surface::deck,   "",           opening.stations, opening.buttocks,
                   opening.heights, opening.sides};
    const auto host = std::find_if(known.begin(), known.end(),
                                   [&](const PlatePart& plate)
                                   { return plate.name == in || plate.family == in; });
    if (host != known.end())
    {
      hatch.patch.surface = host->patch.surface;
      hatch.patch.plane = host->patch.plane;
      check_ranges_of(fields, host->patch.surface, "this surface");
      parts.openings.emplace_back(in, opening);
    }
    parts.plates.push_back(hatch);
    if (!fields.has("fastened"))
      continue;
    Joint joint;
    joint.name = entry.name + " fastening";
    joint.where = fields.node("fastened").from();
    joint.part = hatch.name;
    read_joint_stiffness(Fields(fields.node("fastened"), fastened_section), joint);
    parts.joints.push_back(joint);
  }
}

void read_joints(const Node& node, Parts& parts)
{
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, joint_section);
    Joint joint;
    joint.name = entry.name;
    joint.where = entry.where;
    joint.part = fields.name("part");
    read_joint_stiffness(fields, joint);
    parts.joints.push_back(joint);
  }
}

FootprintArea read_footprint(const Node& node)
{
  const Fields fields(node, footprint_section);
  FootprintArea area;
  area.centre = fields.vector("centre");
  area.length = fields.quantity("length");
  area.width = fields.quantity("width");
  area.parts = fields.names("parts");
  return area;
}

void read_equipment(const Node& node, Parts& parts)
{
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, equipment_section);
    Equipment item;
    item.name = entry.name;
    item.where = entry.where;
    item.mass = fields.quantity("mass");
    item.centre = fields.vector("centre");
    for (const Node& element : list_elements(fields.node("footprints")))
      item.footprints.push_back(read_footprint(element));
    if (fields.has("footprints") && item.footprints.empty())
      fields.complain("footprints", "no footprint is given; a mass bears on at least one");
    parts.equipment.push_back(item);
  }
}

Chapter part_chapter()
{
  return {"Plating, hatches, joints, equipment",
          "Names of parts are unique over all sections and configurations. A face of the hull "
          "carries one part: where a strip of the bottom is thicker, the rest is given the ranges "
          "beside it.",
          {&plate_section, &cut_out_section, &hatch_section, &fastened_section, &joint_section,
           &equipment_section, &footprint_section},
          R"(plating:
  keel-strip: {on: bottom, buttocks: {to: girder}, schedule: plate-5}
  bottom: {on: bottom, buttocks: {from: girder}, schedule: plate-5}
  side: {on: side, schedule: plate-5}
  deck:
    on: deck
    schedule: plate-5
    cut_outs:
      - {stations: {from: frame-1, to: bulkhead-2}, buttocks: {to: girder}, sides: port}

bulkheads:
  bulkhead: {on: {station: [transom, bulkhead-1, bulkhead-2, stem]}, schedule: plate-5}

webs:
  girder-web: {on: {buttock: girder}, heights: {to: flat}, schedule: web-5}

flats:
  tank-flat:
    on: {height: flat}
    stations: {from: bulkhead-1, to: bulkhead-2}
    buttocks: {to: rail}
    schedule: plate-5

hatches:
  tank-hatch:
    in: deck
    stations: {from: bulkhead-1, to: frame-1}
    buttocks: {to: rail}
    schedule: plate-5
    fastened:
      stiffness_along: 4e8 N/m2
      stiffness_across: 4e8 N/m2
      stiffness_normal: 4e8 N/m2
      stiffness_rotation: 0 N
      source: estimate for M10 bolts at 100 mm, no source

joints:
  flat-seam:
    part: tank-flat
    stiffness_along: 2e9 N/m2
    stiffness_across: 2e9 N/m2
    stiffness_normal: 2e9 N/m2
    stiffness_rotation: 1 kN m/rad/m

equipment:
  ballast:
    mass: 200 kg
    centre: [1.5 m, 0 m, 0.5 m]
    footprints:
      - {centre: [1.5 m, 0 m, 0 m], length: 600 mm, width: 400 mm, parts: [keel-strip]}
)"};
}
} // namespace carlin::reading
