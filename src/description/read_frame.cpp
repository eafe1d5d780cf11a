#include "fields.hpp"
#include "readers.hpp"

#include <algorithm>
#include <array>
#include <fmt/format.h>

namespace carlin::reading
{
namespace
{
const Section frame_section = {
    "frame",
    "A structure described by points, without a hull or beside one.",
    {
        plain(Form::sections, "points", "map `name: [x, y, z]` of positions"),
        table(Form::sections, "members", "frame members", "").optional("none"),
        table(Form::sections, "plates", "frame plates", "").optional("none"),
        table(Form::sections, "supports", "supports", "").optional("none"),
        table(Form::sections, "masses", "masses", "").optional("none"),
    }};

const Section member_section = {
    "frame members",
    "Straight members between two points.",
    {
        name_of_a(Refers::point, "from", ""),
        name_of_a(Refers::point, "to", ""),
        plain(Form::count, "divisions", "elements along it").optional("1"),
        name_of_a(Refers::profile, "profile", ""),
        of_form(Form::vector, "upright", Dimension::none,
                "direction of the profile's height; made square to the line")
            .optional("[0, 0, 1]"),
        of_form(Form::vector, "offset_from", Dimension::length, "from the point to the centroid")
            .optional("on the point"),
        of_form(Form::vector, "offset_to", Dimension::length, "the same at the other end")
            .optional("on the point"),
    }};

const Section plate_section = {
    "frame plates",
    "Flat plates between four points.",
    {
        names_of(Refers::point, "corners", "four points, in order round"),
        plain(Form::counts, "divisions", "cells along the first and the second edge")
            .optional("[1, 1]"),
        name_of_a(Refers::schedule, "schedule", ""),
    }};

const Section support_section = {
    "supports",
    "What holds the structure, in global axes: x, y, z are displacements, rx, ry, rz rotations.",
    {
        names_of(Refers::point, "points", "points held").optional("`edges`"),
        plain(Form::name_pairs, "edges",
              "list of pairs of points: all nodes on the line between them")
            .optional("`points`"),
        Key{.name = "hold",
            .form = Form::word_list,
            .meaning = "list of freedoms held, or `all`",
            .words = "x|y|z|rx|ry|rz"}
            .optional("none"),
        table(Form::section, "motion", "motion", "imposed, of freedoms held").optional("none"),
        table(Form::section, "springs", "springs", "instead of holding").optional("none"),
    }};

const Section motion_section = {"motion",
                                "",
                                {
                                    quantity("x", Dimension::length, Bound::any, "").optional("0"),
                                    quantity("y", Dimension::length, Bound::any, "").optional("0"),
                                    quantity("z", Dimension::length, Bound::any, "").optional("0"),
                                    quantity("rx", Dimension::angle, Bound::any, "").optional("0"),
                                    quantity("ry", Dimension::angle, Bound::any, "").optional("0"),
                                    quantity("rz", Dimension::angle, Bound::any, "").optional("0"),
                                }};

const Section spring_section = {
    "springs",
    "",
    {
        quantity("x", Dimension::force_per_length, Bound::not_negative, "").optional("none"),
        quantity("y", Dimension::force_per_length, Bound::not_negative, "").optional("none"),
        quantity("z", Dimension::force_per_length, Bound::not_negative, "").optional("none"),
        quantity("rx", Dimension::rotational_stiffness, Bound::not_negative, "").optional("none"),
        quantity("ry", Dimension::rotational_stiffness, Bound::not_negative, "").optional("none"),
        quantity("rz", Dimension::rotational_stiffness, Bound::not_negative, "").optional("none"),
    }};

const Section mass_section = {"masses",
                              "Point masses.",
                              {name_of_a(Refers::point, "point", ""),
                               quantity("mass", Dimension::mass, Bound::positive, "")}};

constexpr std::array<std::string_view, 6> freedoms = {"x", "y", "z", "rx", "ry", "rz"};

FrameMember read_frame_member(const Entry& entry)
{
  const Fields fields(entry.node, member_section);
  FrameMember member;
  member.name = entry.name;
  member.where = entry.where;
  member.from = fields.name("from");
  member.to = fields.name("to");
  member.divisions = fields.count("divisions", 1);
  member.profile = fields.name("profile");
  member.upright = fields.vector("upright", member.upright);
  member.offset_from = fields.vector("offset_from");
  member.offset_to = fields.vector("offset_to");
  if (!member.from.empty() && member.from == member.to)
    fields.complain(
        "to", fmt::format("the member ends where it starts, at '{}'; name two points", member.to));
  if (member.upright.isZero())
    fields.complain("upright", "it has no direction; write e.g. '[0, 0, 1]'");
  return member;
}

FramePlate read_frame_plate(const Entry& entry)
{
  const Fields fields(entry.node, plate_section);
  FramePlate plate;
  plate.name = entry.name;
  plate.where = entry.where;
  plate.corners = fields.names("corners");
  plate.schedule = fields.name("schedule");
  if (fields.has("corners") && plate.corners.size() != 4)
    fields.complain("corners", fmt::format("{} points are named; a plate has four corners, in "
                                           "order round",
                                           plate.corners.size()));
  if (!fields.has("divisions"))
    return plate;
  plate.divisions.clear();
  for (const Node& element : fields.node("divisions").elements())
    plate.divisions.push_back(read_count(element).value_or(1));
  if (plate.divisions.size() != 2)
  {
    fields.complain("divisions", "two whole numbers are due here; write e.g. '[8, 8]'");
    plate.divisions = {1, 1};
  }
  return plate;
}

void read_edges(const Node& node, Support& support)
{
  for (const Node& element : list_elements(node))
  {
    const std::vector<std::string> ends = read_names(element, Refers::point);
    if (ends.size() == 2)
      support.edges.emplace_back(ends[0], ends[1]);
    else
      element.complain("two points are due here, the ends of the edge; write e.g. '[a, b]'");
  }
}

void read_held(const Node& node, Support& support)
{
  if (node.text() == "all")
  {
    support.holds.fill(true);
    return;
  }
  for (const std::string& name :
       node.is_absent() ? std::vector<std::string>{} : read_names(node, Refers::nothing))
  {
    const auto at = std::find(freedoms.begin(), freedoms.end(), name);
    if (at == freedoms.end())
      node.complain(
          fmt::format("'{}' is no freedom; write 'all' or a list of x, y, z, rx, ry, rz", name));
    else
      support.holds[static_cast<std::size_t>(at - freedoms.begin())] = true;
  }
}

Support read_support(const Entry& entry)
{
  const Fields fields(entry.node, support_section);
  Support support;
  support.name = entry.name;
  support.where = entry.where;
  support.points = fields.names("points");
  read_edges(fields.node("edges"), support);
  read_held(fields.node("hold"), support);
  const Fields motion(fields.node("motion"), motion_section);
  const Fields springs(fields.node("springs"), spring_section);
  for (std::size_t i = 0; i < freedoms.size(); ++i)
  {
    support.motion[static_cast<Index>(i)] = motion.quantity(freedoms[i]);
    support.springs[i] = springs.maybe_quantity(freedoms[i]);
    if (motion.has(freedoms[i]) && !support.holds[i])
      motion.complain(freedoms[i], "it is imposed on a freedom that is not held; add it to 'hold'");
    if (springs.has(freedoms[i]) && support.holds[i])
      springs.complain(freedoms[i], "the freedom is held as well; remove it here or from 'hold'");
  }
  if (entry.node.is_map() && !fields.has("points") && !fields.has("edges"))
    entry.node.complain_at_key("nothing is held; name 'points' or 'edges'");
  if (entry.node.is_map() && !fields.has("hold") && !fields.has("springs"))
    entry.node.complain_at_key("it holds nothing; give 'hold' or 'springs'");
  return support;
}
} // namespace

Frame read_frame(const Node& node)
{
  const Fields fields(node, frame_section);
  Frame frame;
  for (const Entry& entry : named_entries(fields.node("points")))
  {
    FramePoint point;
    point.name = entry.name;
    point.where = entry.where;
    point.position = read_vector(entry.node, Dimension::length).value_or(Vector3::Zero());
    frame.points.push_back(point);
  }
  for (const Entry& entry : named_entries(fields.node("members")))
    frame.members.push_back(read_frame_member(entry));
  for (const Entry& entry : named_entries(fields.node("plates")))
    frame.plates.push_back(read_frame_plate(entry));
  for (const Entry& entry : named_entries(fields.node("supports")))
    frame.supports.push_back(read_support(entry));
  for (const Entry& entry : named_entries(fields.node("masses")))
  {
    const Fields mass_fields(entry.node, mass_section);
    PointMass mass;
    mass.name = entry.name;
    mass.where = entry.where;
    mass.point = mass_fields.name("point");
    mass.mass = mass_fields.quantity("mass");
    frame.masses.push_back(mass);
  }
  return frame;
}

Chapter frame_chapter()
{
  return {"Structure of points",
          "",
          {&frame_section, &member_section, &plate_section, &support_section, &motion_section,
           &spring_section, &mass_section},
          R"(carlin: 1

mesh: {size: 100 mm}

materials:
  steel:
    youngs_modulus: 210 GPa
    poissons_ratio: 0.3
    density: 7850 kg/m3
    thermal_expansion: 12e-6 1/K

schedules:
  plate: {material: steel, thickness: 8 mm, line: centred}

profiles:
  bar: {material: steel, flat_bar: {height: 100 mm, thickness: 10 mm}}

frame:
  points:
    a: [0 m, 0 m, 0 m]
    b: [2 m, 0 m, 0 m]
    c: [2 m, 1 m, 0 m]
    d: [0 m, 1 m, 0 m]
  members:
    beam:
      from: a
      to: b
      divisions: 8
      profile: bar
      upright: [0, 0, 1]
      offset_from: [0 mm, 0 mm, 54 mm]
      offset_to: [0 mm, 0 mm, 54 mm]
  plates:
    table: {corners: [a, b, c, d], divisions: [8, 4], schedule: plate}
  supports:
    clamp: {edges: [[a, d]], hold: all, motion: {z: 1 mm}}
    cushion: {points: [c], hold: [x, y], springs: {z: 2 kN/mm}}
  masses:
    weight: {point: b, mass: 40 kg}

cases:
  weight:
    class: service
    stages:
      at rest: {water: none}
      loaded:
        water: gravity
        events:
          - force: {point: b, force: [0 N, 0 N, -1 kN], moment: [0 N m, 0 N m, 5 N m]}
            factor: 1.2
          - line_force: {members: [beam], force_per_length: [0 N/m, 0 N/m, -200 N/m]}
)"};
}
} // namespace carlin::reading
