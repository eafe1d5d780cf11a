#include "fields.hpp"
#include "readers.hpp"

#include <algorithm>
#include <array>
#include <fmt/format.h>
#include <utility>

namespace carlin::reading
{
namespace
{
const Section configuration_section = {
    "configurations",
    "States of the structure, in the order of the file. The first is the base; each other is named "
    "edits of one before it. Edits are done first, in order, then parts are added. Without the "
    "section there is one configuration, `as modelled`, judged, with all tanks aboard.",
    {
        name_of_a(Refers::configuration, "based_on", "one further up; not for the first")
            .optional("needed but for the first"),
        word("standing", "base|shown|judged",
             "what is compared with; shown beside it; or its checks count in the exit status"),
        table(Form::section_list, "edits", "edits", "").optional("none"),
        table(Form::section, "add", "add", "").optional("nothing"),
        names_of(Refers::nothing, "remove_equipment", "equipment taken out").optional("none"),
        names_of(Refers::tank, "tanks", "tanks aboard")
            .optional("as in `based_on`; none in the first"),
    }};

const Section edit_section = {
    "edits",
    "Each has one of `cut`, `open` and `replace`, and ranges that say how much of the part; "
    "without "
    "ranges it is the whole part. A replaced region becomes the part `<part> (<configuration>)`.",
    {
        names_of(Refers::nothing, "cut", "members (or all of an entry) that are taken out")
            .optional("`open` or `replace`"),
        names_of(Refers::nothing, "open", "plates (or all of an entry) that are taken out")
            .optional("`cut` or `replace`"),
        names_of(Refers::nothing, "replace", "parts that get another schedule or profile")
            .optional("`cut` or `open`"),
        plain(Form::text, "with", "schedule or profile, with `replace`").optional("for `replace`"),
        planes_from_to(Refers::station, "stations", "range of stations"),
        planes_from_to(Refers::buttock, "buttocks", "range of buttocks"),
        planes_from_to(Refers::height, "heights", "range of heights"),
        word("sides", "both|port|starboard", "").optional("both"),
    }};

const Section add_section = {"add",
                             "The same sections as at the top level.",
                             {
                                 plain(Form::sections, "plating", "").optional("none"),
                                 plain(Form::sections, "bulkheads", "").optional("none"),
                                 plain(Form::sections, "webs", "").optional("none"),
                                 plain(Form::sections, "flats", "").optional("none"),
                                 plain(Form::sections, "hatches", "").optional("none"),
                                 plain(Form::sections, "members", "").optional("none"),
                                 plain(Form::sections, "joints", "").optional("none"),
                                 plain(Form::sections, "equipment", "").optional("none"),
                             }};

struct EditWord
{
  std::string_view key;
  Edit::Kind kind;
};
constexpr std::array<EditWord, 3> edit_words = {
    {{"cut", Edit::Kind::cut}, {"open", Edit::Kind::open}, {"replace", Edit::Kind::replace}}};

void read_edit(const Node& node, Configuration& configuration)
{
  const Fields fields(node, edit_section);
  const CutOut region = read_region(fields);
  int given = 0;
  for (const auto& [key, kind] : edit_words)
  {
    if (!fields.has(key))
      continue;
    ++given;
    const Node parts = fields.node(key);
    for (const std::string& part : fields.names(key))
    {
      Edit edit;
      edit.kind = kind;
      edit.part = part;
      edit.region = region;
      edit.region.where = parts.where();
      edit.with = fields.text("with");
      configuration.edits.push_back(edit);
    }
  }
  if (node.is_map() && given != 1)
    node.complain_at_key(fmt::format("{} of cut, open, replace are given; an edit has one", given));
  if (fields.has("replace") && !fields.has("with"))
    node.complain_at_key(
        "key 'with' is missing; name the schedule or profile that takes its place");
  if (!fields.has("replace") && fields.has("with"))
    fields.node("with").complain_at_key("'with' belongs to 'replace'; remove it");
}

/// All plates that a configuration has before its own are added, whole chain.
std::vector<PlatePart> plates_before(const Model& model,
                                     const std::vector<Configuration>& configurations,
                                     const std::string& based_on)
{
  std::vector<PlatePart> plates = model.plates;
  for (const Configuration& configuration : configurations)
    if (configuration.name == based_on)
    {
      plates = plates_before(model, configurations, configuration.based_on);
      plates.insert(plates.end(), configuration.plates.begin(), configuration.plates.end());
    }
  return plates;
}

void read_added(const Node& node, std::vector<PlatePart> before, const Planes& planes,
                Configuration& configuration)
{
  const Fields fields(node, add_section);
  Parts parts;
  read_plates(fields.node("plating"), PlateKind::plating, parts);
  read_plates(fields.node("bulkheads"), PlateKind::bulkhead, parts);
  read_plates(fields.node("webs"), PlateKind::web, parts);
  read_plates(fields.node("flats"), PlateKind::flat, parts);
  before.insert(before.end(), parts.plates.begin(), parts.plates.end());
  read_hatches(fields.node("hatches"), before, parts);
  read_members(fields.node("members"), planes, parts);
  read_joints(fields.node("joints"), parts);
  read_equipment(fields.node("equipment"), parts);
  for (const auto& [host, opening] : parts.openings)
  {
    bool is_new = false;
    for (PlatePart& plate : parts.plates)
      if (plate.name == host || plate.family == host)
      {
        plate.cut_outs.push_back(opening);
        is_new = true;
      }
    if (is_new)
      continue;
    Edit edit;
    edit.kind = Edit::Kind::open;
    edit.part = host;
    edit.region = opening;
    configuration.edits.push_back(edit);
  }
  configuration.plates = std::move(parts.plates);
  configuration.members = std::move(parts.members);
  configuration.joints = std::move(parts.joints);
  configuration.equipment = std::move(parts.equipment);
}

/// Leaves based_on empty unless it names one of `before`: chains of edits end at the base.
void check_based_on(const Fields& fields, const Entry& entry,
                    const std::vector<Configuration>& before, Configuration& configuration)
{
  if (before.empty())
  {
    if (fields.has("based_on"))
      fields.complain("based_on", "the first configuration is the base itself; remove the key");
    configuration.based_on.clear();
    return;
  }
  if (configuration.standing == Standing::base && fields.has("standing"))
    fields.complain("standing", fmt::format("the base is the first, '{}'; write shown or judged",
                                            before.front().name));
  if (!fields.has("based_on"))
  {
    entry.node.complain_at_key(fmt::format("key 'based_on' is missing; add 'based_on: {}', or "
                                           "another configuration further up",
                                           before.back().name));
    return;
  }
  const bool is_before =
      std::any_of(before.begin(), before.end(),
                  [&](const Configuration& c) { return c.name == configuration.based_on; });
  if (is_before || configuration.based_on.empty())
    return;
  std::vector<std::string> names;
  for (const Configuration& c : before)
    names.push_back(c.name);
  fields.complain("based_on",
                  fmt::format("configuration '{}' does not exist further up; there are {}",
                              configuration.based_on, listed(names)));
  configuration.based_on.clear();
}

Configuration all_as_modelled(const Model& model)
{
  Configuration configuration;
  configuration.name = "as modelled";
  configuration.where = {model.file.generic_string(), 1, 1};
  configuration.standing = Standing::judged;
  for (const Tank& tank : model.tanks)
    configuration.tanks.push_back(tank.name);
  return configuration;
}
} // namespace

std::vector<Configuration> read_configurations(const Node& node, const Model& model,
                                               const Planes& planes)
{
  std::vector<Configuration> configurations;
  if (node.is_absent())
    return {all_as_modelled(model)};
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, configuration_section);
    Configuration configuration;
    configuration.name = entry.name;
    configuration.where = entry.where;
    configuration.based_on = fields.text("based_on");
    configuration.standing = fields.word("standing", Standing::shown);
    check_based_on(fields, entry, configurations, configuration);
    for (const Node& element : list_elements(fields.node("edits")))
      read_edit(element, configuration);
    read_added(fields.node("add"), plates_before(model, configurations, configuration.based_on),
               planes, configuration);
    configuration.removed_equipment = fields.names("remove_equipment");
    configuration.tanks = fields.names("tanks");
    if (!fields.has("tanks"))
      for (const Configuration& before : configurations)
        if (before.name == configuration.based_on)
          configuration.tanks = before.tanks;
    configurations.push_back(configuration);
  }
  if (configurations.empty())
  {
    node.complain_at_key("no configuration is given; name one or remove the section");
    return {all_as_modelled(model)};
  }
  return configurations;
}

Chapter configuration_chapter()
{
  return {"Configurations",
          "",
          {&configuration_section, &edit_section, &add_section},
          R"(configurations:
  as built: {standing: base}
  cut:
    based_on: as built
    standing: shown
    edits:
      - {cut: stringer rail, stations: {from: bulkhead-1, to: bulkhead-2}, sides: port}
      - {open: side, stations: {from: frame-1, to: bulkhead-2}, heights: {from: strake}}
    remove_equipment: [ballast]
  converted:
    based_on: cut
    standing: judged
    edits:
      - {replace: frame, with: bar}
      - {replace: deck, with: web-5, stations: {from: bulkhead-1, to: bulkhead-2}}
    add:
      members:
        carling: {on: deck, at: carling-line, from: bulkhead-1, to: bulkhead-2, profile: bar}
      equipment:
        valve-panel:
          mass: 40 kg
          centre: [3.2 m, 0 m, 1 m]
          footprints: [{centre: [3 m, 0 m, 1 m]}]
    tanks: [tank-1]
)"};
}
} // namespace carlin::reading
