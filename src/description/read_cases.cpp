#include "fields.hpp"
#include "readers.hpp"

#include <array>
#include <fmt/format.h>

namespace carlin::reading
{
namespace
{
const Section case_section = {
    "cases",
    "A load case is a history of stages, in the order of the file. The first stage is the fitting: "
    "growth and relative motion of the feet count from there, so that it has none of its own.",
    {
        word("class", "service|rare|accidental", "each class has its own limits"),
        table(Form::sections, "stages", "stages", "at least one"),
    }};

constexpr std::string_view no_local_pressure =
    "a standard's design pressure belongs to one panel or member, where it is judged by itself; a "
    "load of the whole boat is a landing: write '- landing: {place: forward, acceleration: 2.5 g}'";
constexpr std::string_view no_bare_acceleration =
    "an acceleration of the craft alone balances itself and loads nothing; name the load that "
    "makes "
    "it: '- landing: {place: forward, acceleration: 2.5 g}', or for tanks alone '- hold_tanks: "
    "{felt: [20 g, 0 g, 0 g]}'";
constexpr std::string_view is_an_event =
    "this acts in one stage only and stands among its events: write 'events:' and below it '- ...'";

const Section stage_section = {
    "stages",
    "States persist until a later stage changes them; events act in their own stage. Their removal "
    "is "
    "solved too: where tanks are aboard, a stage `after <name>` follows a stage with events, "
    "unless "
    "the next one says nothing new.",
    {
        word("water", "none|afloat|gravity",
             "nothing acts; gravity balanced by still water; gravity carried by supports")
            .optional("as before; at first none"),
        table(Form::section_list, "tanks", "tank states", "pressure, temperature, contents")
            .optional("as before; at first 0, reference temperature, empty"),
        table(Form::section_list, "hull_temperature", "hull_temperature", "")
            .optional("as before; at first the reference temperature"),
        table(Form::section_list, "foot_motion", "foot_motion",
              "imposed on the feet of a rigid bed")
            .optional("as before; at first none"),
        table(Form::section_list, "growth", "growth as figures", "beside that from pressure")
            .optional("as before; at first none"),
        table(Form::section_list, "events", "events", "").optional("none"),
    },
    {
        {"acceleration", no_bare_acceleration},
        {"craft_acceleration", no_bare_acceleration},
        {"design_pressure", no_local_pressure},
        {"local_pressure", no_local_pressure},
        {"slamming_pressure", no_local_pressure},
        {"landing", is_an_event},
        {"hold_tanks", is_an_event},
        {"force", is_an_event},
        {"pressure", is_an_event},
    }};

const Section tank_state_section = {
    "tank states",
    "In a stage's list `tanks`.",
    {
        names_of(Refers::tank, "of", "").optional("all tanks"),
        quantity("pressure", Dimension::pressure, Bound::not_negative, "gauge")
            .optional("as before"),
        quantity("temperature", Dimension::temperature, Bound::positive, "").optional("as before"),
        plain(Form::flag, "full", "contents aboard").optional("as before"),
    }};

const Section hull_temperature_section = {
    "hull_temperature",
    "",
    {
        names_of(Refers::part, "of", "").optional("all parts"),
        quantity("temperature", Dimension::temperature, Bound::positive, ""),
    }};

const Section foot_motion_section = {
    "foot_motion",
    "",
    {
        name_of_a(Refers::tank, "tank", ""),
        plain(Form::text, "collar", "").optional("all collars of the tank"),
        of_form(Form::vector, "translation", Dimension::length, "").optional("none"),
        of_form(Form::vector, "rotation", Dimension::angle, "").optional("none"),
    }};

const Section growth_section = {
    "growth as figures",
    "In a stage's list `growth`.",
    {
        name_of_a(Refers::tank, "tank", ""),
        quantity("axial_strain", Dimension::none, Bound::any, "").optional("0"),
        quantity("radial", Dimension::length, Bound::any, "outward, at the lining")
            .optional("0 mm"),
    }};

const Section event_section = {
    "events",
    "Each element of the list has one of these, and may have a factor (a landing not).",
    {
        table(Form::section, "landing", "landing", "").optional("one event is due"),
        table(Form::section, "hold_tanks", "hold_tanks", "").optional("one event is due"),
        table(Form::section, "force", "force", "").optional("one event is due"),
        table(Form::section, "line_force", "line_force", "").optional("one event is due"),
        table(Form::section, "pressure", "pressure", "").optional("one event is due"),
        table(Form::section, "tank_force", "tank_force", "").optional("one event is due"),
        quantity("factor", Dimension::none, Bound::any, "on the event").optional("1"),
    },
    {
        {"acceleration", no_bare_acceleration},
        {"craft_acceleration", no_bare_acceleration},
        {"design_pressure", no_local_pressure},
        {"local_pressure", no_local_pressure},
        {"slamming_pressure", no_local_pressure},
    }};

const Section landing_section = {
    "landing",
    "A patch of bottom whose pressure times area equals the craft's mass times g (1 + n). Either "
    "`acceleration`, with or without `pressure`; or `pressure` and `length`, and the acceleration "
    "is the result.",
    {
        word("place", "forward|amidships|aft", ""),
        word("sides", "both|port|starboard", "").optional("both"),
        of_form(Form::acceleration_or_standard, "acceleration", Dimension::acceleration,
                "of the centre of gravity, upward: n g; or `by standard`: from ISO 12215-5:2008",
                Bound::positive)
            .optional("`pressure` and `length`"),
        quantity("pressure", Dimension::pressure, Bound::positive, "on the patch")
            .optional("two thirds of the standard's larger bottom base pressure"),
        quantity("length", Dimension::length, Bound::positive, "of the patch along x")
            .optional("`acceleration`"),
    }};

const Section hold_section = {
    "hold_tanks",
    "Acceleration felt by tanks alone: each carries exactly mass times this; the opposite force is "
    "balanced by the rest of the craft.",
    {
        names_of(Refers::tank, "of", "").optional("all tanks"),
        of_form(Form::vector, "felt", Dimension::acceleration, "force on the tank over its mass"),
    }};

const Section force_section = {
    "force",
    "At a point of the frame, or over a footprint of the hull.",
    {
        name_of_a(Refers::point, "point", "").optional("`footprint`"),
        table(Form::section, "footprint", "footprints", "").optional("`point`"),
        of_form(Form::vector, "force", Dimension::force, "").optional("none"),
        of_form(Form::vector, "moment", Dimension::moment, "").optional("none"),
    }};

const Section line_force_section = {
    "line_force",
    "",
    {
        names_of(Refers::member, "members", ""),
        of_form(Form::vector, "force_per_length", Dimension::force_per_length, "global axes"),
    }};

const Section pressure_section = {
    "pressure",
    "",
    {
        names_of(Refers::plate, "parts", ""),
        quantity("pressure", Dimension::pressure, Bound::any,
                 "positive pushes along the part's inward normal"),
        planes_from_to(Refers::station, "stations", "range of stations"),
    }};

const Section tank_force_section = {
    "tank_force",
    "",
    {
        name_of_a(Refers::tank, "tank", ""),
        quantity("position", Dimension::length, Bound::not_negative, "from axis_from"),
        of_form(Form::vector, "force", Dimension::force, "axes of the boat"),
    }};

Landing read_landing(const Node& node)
{
  const Fields fields(node, landing_section);
  Landing landing;
  landing.where = node.from();
  landing.place = fields.word("place", PatchPlace::amidships);
  landing.sides = fields.word("sides", Sides::both);
  landing.by_standard = fields.node("acceleration").text() == "by standard";
  if (!landing.by_standard)
    landing.acceleration = fields.maybe_quantity("acceleration");
  landing.length = fields.maybe_quantity("length");
  if (fields.node("pressure").text() == "by standard")
    fields.complain("pressure", std::string(no_local_pressure));
  else
    landing.pressure = fields.maybe_quantity("pressure");
  if (!node.is_map())
    return landing;
  const bool has_acceleration = fields.has("acceleration");
  if (has_acceleration && fields.has("length"))
    fields.complain("length", "the length follows from the acceleration, which is given as well; "
                              "remove one of the two");
  if (!has_acceleration && !(fields.has("pressure") && fields.has("length")))
    node.complain_at_key(
        "either 'acceleration' or both 'pressure' and 'length' are due; write e.g. "
        "'acceleration: 2.5 g' or 'acceleration: by standard'");
  return landing;
}

HoldingAcceleration read_hold(const Node& node)
{
  const Fields fields(node, hold_section);
  return {node.from(), fields.names("of"), fields.vector("felt")};
}

DirectForce read_force(const Node& node)
{
  const Fields fields(node, force_section);
  DirectForce force;
  force.where = node.from();
  force.point = fields.name("point");
  if (fields.has("footprint"))
    force.footprint = read_footprint(fields.node("footprint"));
  force.force = fields.vector("force");
  force.moment = fields.vector("moment");
  if (node.is_map() && fields.has("point") == fields.has("footprint"))
    node.complain_at_key("a force acts at a 'point' or on a 'footprint'; give one of the two");
  if (node.is_map() && !fields.has("force") && !fields.has("moment"))
    node.complain_at_key("nothing acts; give 'force' or 'moment'");
  return force;
}

LineForce read_line_force(const Node& node)
{
  const Fields fields(node, line_force_section);
  return {node.from(), fields.names("members"), fields.vector("force_per_length")};
}

PartPressure read_pressure(const Node& node)
{
  const Fields fields(node, pressure_section);
  PartPressure pressure;
  pressure.where = node.from();
  pressure.parts = fields.names("parts");
  if (fields.node("pressure").text() == "by standard")
    fields.complain("pressure", std::string(no_local_pressure));
  else
    pressure.pressure = fields.quantity("pressure");
  pressure.stations = fields.plane_range("stations");
  return pressure;
}

TankForce read_tank_force(const Node& node)
{
  const Fields fields(node, tank_force_section);
  return {node.from(), fields.name("tank"), fields.quantity("position"), fields.vector("force")};
}

template <class Kind, Kind (*read)(const Node&)> Event as_event(const Node& node)
{
  return read(node);
}

struct EventKind
{
  std::string_view key;
  Event (*read)(const Node&);
};

constexpr std::array<EventKind, 6> event_kinds = {{
    {"landing", as_event<Landing, read_landing>},
    {"hold_tanks", as_event<HoldingAcceleration, read_hold>},
    {"force", as_event<DirectForce, read_force>},
    {"line_force", as_event<LineForce, read_line_force>},
    {"pressure", as_event<PartPressure, read_pressure>},
    {"tank_force", as_event<TankForce, read_tank_force>},
}};

void read_events(const Node& node, Stage& stage)
{
  for (const Node& element : list_elements(node))
  {
    const Fields fields(element, event_section);
    const double factor = fields.quantity("factor", 1.0);
    const std::size_t problems = element.findings().problems.size();
    int given = 0;
    for (const EventKind& kind : event_kinds)
      if (fields.has(kind.key))
      {
        stage.events.emplace_back(kind.read(fields.node(kind.key)), factor);
        ++given;
        if (std::holds_alternative<Landing>(stage.events.back().first) && fields.has("factor"))
          element.complain("a landing takes no factor, it is balanced by its own acceleration; "
                           "write the acceleration or the pressure wanted");
      }
    const bool has_only_refused =
        element.entries().size() > static_cast<std::size_t>(given) && given == 0;
    if (element.is_map() && given != 1 && !(has_only_refused && problems > 0))
      element.complain(fmt::format("{} events are given in one element; write each after a '- ' of "
                                   "its own: landing, hold_tanks, force, line_force, pressure or "
                                   "tank_force",
                                   given));
  }
}

void read_tank_states(const Fields& stage_fields, Stage& stage)
{
  for (const Node& element : list_elements(stage_fields.node("tanks")))
  {
    const Fields fields(element, tank_state_section);
    TankState state;
    state.tanks = fields.names("of");
    state.pressure = fields.maybe_quantity("pressure");
    state.temperature = fields.maybe_quantity("temperature");
    if (fields.has("full"))
      state.is_full = fields.flag("full", false);
    stage.tanks.push_back(state);
  }
}

void read_motions_and_growths(const Fields& stage_fields, Stage& stage)
{
  for (const Node& element : list_elements(stage_fields.node("hull_temperature")))
  {
    const Fields fields(element, hull_temperature_section);
    stage.hull_temperatures.push_back({fields.names("of"), fields.quantity("temperature")});
  }
  for (const Node& element : list_elements(stage_fields.node("foot_motion")))
  {
    const Fields fields(element, foot_motion_section);
    FootMotion motion;
    motion.where = element.from();
    motion.tank = fields.name("tank");
    motion.collar = fields.text("collar");
    motion.translation = fields.vector("translation");
    motion.rotation = fields.vector("rotation");
    stage.foot_motions.push_back(motion);
  }
  for (const Node& element : list_elements(stage_fields.node("growth")))
  {
    const Fields fields(element, growth_section);
    stage.growths.push_back({element.from(), fields.name("tank"), fields.quantity("axial_strain"),
                             fields.quantity("radial")});
  }
}

/// Growth and motion of the feet count from the fitting.
void check_fitting(const Fields& fields, const Stage& stage)
{
  constexpr std::string_view later = "the first stage is the fitting, from which growth and motion "
                                     "count; put this in a stage after it";
  for (const char* key : {"growth", "foot_motion", "hull_temperature"})
    if (fields.has(key))
      fields.node(key).complain_at_key(std::string(later));
  const std::vector<Node> states = fields.node("tanks").elements();
  for (std::size_t i = 0; i < stage.tanks.size(); ++i)
    if (stage.tanks[i].pressure.value_or(0.0) > 0.0 || stage.tanks[i].temperature)
      states[i].complain(fmt::format("pressure and temperature make growth; {}", later));
}

Stage read_stage(const Entry& entry, bool is_fitting)
{
  const Fields fields(entry.node, stage_section);
  Stage stage;
  stage.name = entry.name;
  stage.where = entry.where;
  if (const int water = fields.word_index("water"); water >= 0)
    stage.water = static_cast<WaterState>(water);
  read_tank_states(fields, stage);
  read_motions_and_growths(fields, stage);
  read_events(fields.node("events"), stage);
  if (is_fitting)
    check_fitting(fields, stage);
  return stage;
}
} // namespace

std::vector<LoadCase> read_cases(const Node& node)
{
  std::vector<LoadCase> cases;
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, case_section);
    LoadCase load_case;
    load_case.name = entry.name;
    load_case.where = entry.where;
    load_case.load_class = fields.word("class", CaseClass::service);
    for (const Entry& stage : named_entries(fields.node("stages")))
      load_case.stages.push_back(read_stage(stage, load_case.stages.empty()));
    if (fields.node("stages").is_map() && load_case.stages.empty())
      fields.complain("stages", "no stage is given; the first is the fitting, e.g. 'fitting: "
                                "{water: afloat}'");
    cases.push_back(load_case);
  }
  return cases;
}

Chapter case_chapter()
{
  return {
      "Load cases",
      "A pressure that a published standard gives for one panel or member is not accepted as a "
      "load of the whole boat, nor an acceleration of the craft without the load that makes it.",
      {&case_section, &stage_section, &tank_state_section, &hull_temperature_section,
       &foot_motion_section, &growth_section, &event_section, &landing_section, &hold_section,
       &force_section, &line_force_section, &pressure_section, &tank_force_section},
      R"(cases:
  landing forward:
    class: service
    stages:
      fitting: {water: afloat}
      filled:
        tanks: [{of: [tank-1], pressure: 350 bar, temperature: 40 degC, full: true}]
        hull_temperature: [{of: [deck], temperature: 50 degC}]
      landing:
        events:
          - landing: {place: forward, sides: both, acceleration: by standard}
      landing on one side:
        events:
          - landing: {place: amidships, sides: port, pressure: 60 kPa, length: 1.5 m}
  holding:
    class: accidental
    stages:
      fitting: {water: afloat}
      stopped:
        tanks: [{full: true}]
        events:
          - hold_tanks: {of: [tank-1], felt: [20 g, 0 g, 0 g]}
  loads by hand:
    class: rare
    stages:
      fitting: {water: afloat}
      loaded:
        growth: [{tank: tank-1, axial_strain: 0.1 %, radial: 0.5 mm}]
        events:
          - force: {footprint: {centre: [4 m, 0 m, 1.75 m], length: 1 m, width: 1 m}, force: [0 N, 0 N, -5 kN]}
          - line_force: {members: [frame], force_per_length: [0 N/m, 0 N/m, -200 N/m]}
          - pressure: {parts: [deck], pressure: 5 kPa, stations: {from: bulkhead-1, to: bulkhead-2}}
          - tank_force: {tank: tank-1, position: 1.1 m, force: [0 N, 2 kN, 0 N]}
)"};
}
} // namespace carlin::reading
