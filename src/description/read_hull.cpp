#include "fields.hpp"
#include "readers.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace carlin::reading
{
namespace
{
const Section hull_section = {
    "hull",
    "The shape, by offsets or from a few dimensions, and the named planes on which structure lies. "
    "Names of planes are unique over stations, buttocks and heights. Built in and not to be "
    "declared: buttocks `centreline` and `chine` (the side of the hull), heights `bottom` and "
    "`deck`.",
    {
        table(Form::section, "offsets", "offsets", "the drawn hull").optional("`from_dimensions`"),
        table(Form::section, "from_dimensions", "from_dimensions", "a hull for a first look")
            .optional("`offsets`"),
        quantity("deck_camber", Dimension::length, Bound::not_negative,
                 "rise of the deck at the centreline over its edge")
            .optional("0 mm"),
        table(Form::sections, "stations", "stations", "transverse planes, from aft; at least two"),
        table(Form::sections, "buttocks", "buttocks",
              "fore-and-aft planes, from the centreline outward, both sides alike")
            .optional("none"),
        table(Form::sections, "heights", "heights", "levels, from the bottom upward")
            .optional("none"),
    }};

const Section dimensions_section = {
    "from_dimensions",
    "Hard chine, straight raked stem that ends in a narrow face, upright transom.",
    {
        quantity("length", Dimension::length, Bound::positive, ""),
        quantity("beam", Dimension::length, Bound::positive, "at the deck edge"),
        quantity("chine_beam", Dimension::length, Bound::positive, ""),
        quantity("depth", Dimension::length, Bound::positive, "keel to deck edge amidships"),
        quantity("deadrise", Dimension::angle, Bound::not_negative, "amidships; 0: flat bottom"),
        quantity("parallel_body", Dimension::none, Bound::not_negative,
                 "part of the length, from the transom, with constant section; 1: a prismatic box")
            .optional("0.55"),
        quantity("stem_face", Dimension::length, Bound::positive, "breadth of the stem face")
            .optional("80 mm"),
        quantity("stem_rake", Dimension::angle, Bound::not_negative,
                 "from upright, leaning forward")
            .optional("0 deg"),
    }};

const Section station_section = {
    "stations",
    "",
    {
        quantity("at", Dimension::length, Bound::any, "x where the plane meets z = 0"),
        quantity("rake", Dimension::angle, Bound::any, "positive: the top leans forward")
            .optional("0 deg"),
    }};

const Section buttock_section = {
    "buttocks",
    "One of `at`, `plan` and `follows`. The plane is straight between stations `from` and `to`; "
    "beyond, it keeps its fraction of the chine's half breadth, so that it stays in the boat.",
    {
        quantity("at", Dimension::length, Bound::positive, "distance from the centreline")
            .optional("`plan` or `follows`"),
        of_form(Form::polyline, "plan", Dimension::length, "list of [x, y] from aft",
                Bound::positive)
            .optional("`at` or `follows`"),
        plain(Form::text, "follows", "name of a bottom point of the offsets: its knuckle")
            .optional("`at` or `plan`"),
        quantity("deck_offset", Dimension::length, Bound::positive,
                 "distance from the centreline at the deck, where the plane leans")
            .optional("upright"),
        name_of_a(Refers::station, "from", "station").optional("first"),
        name_of_a(Refers::station, "to", "station").optional("last"),
    }};

const Section height_section = {
    "heights",
    "One of `at`, `profile` and `follows`. The surface is level from the centreline out to buttock "
    "`out_to` and between stations `from` and `to`; beyond, it keeps its fraction of the height "
    "between bottom and deck.",
    {
        quantity("at", Dimension::length, Bound::any, "z").optional("`profile` or `follows`"),
        of_form(Form::polyline, "profile", Dimension::length, "list of [x, z] from aft")
            .optional("`at` or `follows`"),
        plain(Form::text, "follows", "name of a side point of the offsets: its knuckle")
            .optional("`at` or `profile`"),
        name_of_a(Refers::buttock, "out_to", "buttock").optional("`chine`, out to the side"),
        name_of_a(Refers::station, "from", "station").optional("first"),
        name_of_a(Refers::station, "to", "station").optional("last"),
    }};

HullDimensions read_dimensions(const Node& node)
{
  const Fields fields(node, dimensions_section);
  HullDimensions hull;
  hull.where = node.from();
  hull.length = fields.quantity("length");
  hull.beam = fields.quantity("beam");
  hull.chine_beam = fields.quantity("chine_beam");
  hull.depth = fields.quantity("depth");
  hull.deadrise = fields.quantity("deadrise");
  hull.parallel_body = fields.quantity("parallel_body", hull.parallel_body);
  hull.stem_face = fields.quantity("stem_face", hull.stem_face);
  hull.stem_rake = fields.quantity("stem_rake");
  if (hull.parallel_body > 1.0)
    fields.complain("parallel_body", "it is a part of the length; write 1 or less");
  constexpr double steepest = 1.2; // rad, 69 degrees: beyond, bottom and side are confused
  if (hull.deadrise > steepest)
    fields.complain("deadrise", "it is steeper than 68 deg; such a hull needs offsets");
  if (hull.stem_rake > steepest)
    fields.complain("stem_rake", "it is more than 68 deg; such a hull needs offsets");
  return hull;
}

std::vector<Station> read_stations(const Node& node)
{
  std::vector<Station> stations;
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, station_section);
    Station station;
    station.name = entry.name;
    station.where = entry.where;
    station.position = fields.quantity("at");
    station.rake = fields.quantity("rake");
    constexpr double flattest = 1.2; // rad
    if (std::abs(station.rake) > flattest)
      fields.complain("rake", "a transverse plane leans by less than 68 deg");
    if (!stations.empty() && fields.has("at") && station.position <= stations.back().position)
      fields.complain("at", fmt::format("it does not lie forward of '{}' at {:g} m; list the "
                                        "stations from aft",
                                        stations.back().name, stations.back().position));
    stations.push_back(station);
  }
  if (node.is_map() && stations.size() < 2)
    node.complain_at_key("fewer than two stations; the first and the last close the hull");
  return stations;
}

/// Complains unless one of the three ways to place a plane is used.
void check_one_way(const Fields& fields, const std::vector<std::string>& ways)
{
  const auto given = std::count_if(ways.begin(), ways.end(),
                                   [&](const std::string& way) { return fields.has(way); });
  if (fields.map().is_map() && given != 1)
    fields.map().complain_at_key(
        fmt::format("{} of {} are given; one is due", given, listed(ways)));
}

std::vector<Buttock> read_buttocks(const Node& node)
{
  std::vector<Buttock> buttocks;
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, buttock_section);
    check_one_way(fields, {"at", "plan", "follows"});
    Buttock buttock;
    buttock.name = entry.name;
    buttock.where = entry.where;
    buttock.plan = fields.polyline("plan");
    if (const auto y = fields.maybe_quantity("at"))
      buttock.plan = {{0.0, *y}};
    buttock.follows = fields.text("follows");
    buttock.deck_offset = fields.maybe_quantity("deck_offset");
    buttock.from = fields.name("from");
    buttock.to = fields.name("to");
    buttocks.push_back(buttock);
  }
  return buttocks;
}

std::vector<Height> read_heights(const Node& node)
{
  std::vector<Height> heights;
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, height_section);
    check_one_way(fields, {"at", "profile", "follows"});
    Height height;
    height.name = entry.name;
    height.where = entry.where;
    height.profile = fields.polyline("profile");
    if (const auto z = fields.maybe_quantity("at"))
      height.profile = {{0.0, *z}};
    height.follows = fields.text("follows");
    height.out_to = fields.name("out_to");
    height.from = fields.name("from");
    height.to = fields.name("to");
    heights.push_back(height);
  }
  return heights;
}

/// Points of the offsets from keel to chine, or from chine to deck edge, ends left out.
std::vector<std::string> knuckles(const Hull& hull, bool below_chine)
{
  std::vector<std::string> names;
  if (!hull.offsets || hull.offsets->stations.empty())
    return names;
  bool is_below = true;
  const std::vector<OffsetPoint>& points = hull.offsets->stations.front().points;
  for (std::size_t i = 0; i < points.size(); ++i)
  {
    const bool is_chine = points[i].name == hull.offsets->chine;
    const bool is_end = i == 0 || i + 1 == points.size();
    if (!is_chine && !is_end && is_below == below_chine)
      names.push_back(points[i].name);
    is_below = is_below && !is_chine;
  }
  return names;
}

template <class Plane>
void check_follows(const std::vector<Plane>& planes, const Node& node,
                   const std::vector<std::string>& known, std::string_view part_of_hull)
{
  for (const Entry& entry : node.entries())
    for (const Plane& plane : planes)
      if (plane.name == entry.name && !plane.follows.empty() &&
          std::find(known.begin(), known.end(), plane.follows) == known.end())
        entry.node.complain_at_key(
            fmt::format("point '{}' does not exist between the ends of the {} in the offsets; {}",
                        plane.follows, part_of_hull,
                        known.empty() ? "there are none" : "points there are " + listed(known)));
}

void check_plane_names(const Fields& fields)
{
  std::map<std::string, std::string> kind_of = {{"centreline", "built-in buttocks"},
                                                {"chine", "built-in buttocks"},
                                                {"bottom", "built-in heights"},
                                                {"deck", "built-in heights"}};
  for (const char* kind : {"stations", "buttocks", "heights"})
    for (const Entry& entry : fields.node(kind).entries())
    {
      const auto [at, is_new] = kind_of.emplace(entry.name, kind);
      if (!is_new)
        entry.node.complain_at_key(fmt::format(
            "'{}' is already among the {}; a name stands for one plane: rename this one",
            entry.name, at->second));
    }
}
} // namespace

Planes planes_of(const std::optional<Hull>& hull)
{
  Planes planes;
  if (!hull)
    return planes;
  planes = {{"centreline", Surface::buttock},
            {"chine", Surface::buttock},
            {"bottom", Surface::height},
            {"deck", Surface::height}};
  for (const Station& station : hull->stations)
    planes.emplace(station.name, Surface::station);
  for (const Buttock& buttock : hull->buttocks)
    planes.emplace(buttock.name, Surface::buttock);
  for (const Height& height : hull->heights)
    planes.emplace(height.name, Surface::height);
  return planes;
}

Refers refers_to(Surface plane_kind)
{
  switch (plane_kind)
  {
  case Surface::station:
    return Refers::station;
  case Surface::buttock:
  case Surface::side:
    return Refers::buttock;
  default:
    return Refers::height;
  }
}

std::optional<Hull> read_hull(const Node& node)
{
  if (node.is_absent())
    return std::nullopt;
  const Fields fields(node, hull_section);
  check_one_way(fields, {"offsets", "from_dimensions"});
  check_plane_names(fields);
  Hull hull;
  if (fields.has("offsets"))
    hull.offsets = read_offsets(fields.node("offsets"));
  if (fields.has("from_dimensions"))
    hull.dimensions = read_dimensions(fields.node("from_dimensions"));
  hull.deck_camber = fields.quantity("deck_camber");
  hull.stations = read_stations(fields.node("stations"));
  hull.buttocks = read_buttocks(fields.node("buttocks"));
  hull.heights = read_heights(fields.node("heights"));
  if (fields.has("offsets") && !hull.offsets)
    return hull; // their points are not known: no more can be said of them
  check_follows(hull.buttocks, fields.node("buttocks"), knuckles(hull, true), "bottom");
  check_follows(hull.heights, fields.node("heights"), knuckles(hull, false), "side");
  return hull;
}

Chapter hull_chapter()
{
  return {"Hull",
          "A list of planes never means a range: it stands for each plane named. A range of planes "
          "is `{from: a, to: b}`; an end left out is the first or the last plane there is.",
          {&hull_section, &dimensions_section, &offsets_section(), &station_section,
           &buttock_section, &height_section},
          R"(hull:
  offsets:
    unit: mm
    stations:
      aft:
        keel: [0, 0, 0]
        spray-rail: [0, 700, 220]
        chine: [0, 1400, 455]
        rubbing-strake: [0, 1580, 1100]
        deck-edge: [0, 1700, 1750]
      fore:
        keel: [9000, 0, 0]
        spray-rail: [9000, 700, 220]
        chine: [9000, 1400, 455]
        rubbing-strake: [9000, 1580, 1100]
        deck-edge: [9000, 1700, 1750]
  deck_camber: 30 mm
  stations:
    transom: {at: 0 m}
    bulkhead-1: {at: 3 m}
    frame-1: {at: 4.5 m}
    bulkhead-2: {at: 6 m}
    stem: {at: 9 m}
  buttocks:
    girder: {at: 0.4 m, from: bulkhead-1, to: bulkhead-2}
    rail: {follows: spray-rail}
    carling-line: {plan: [[0 m, 1 m], [6 m, 0.95 m]], deck_offset: 1.1 m}
  heights:
    flat: {at: 0.6 m, out_to: rail}
    strake: {follows: rubbing-strake}
)"};
}
} // namespace carlin::reading
