#include "fields.hpp"
#include "readers.hpp"

#include <fmt/format.h>

namespace carlin::reading
{
namespace
{
const Section tank_section = {
    "tanks",
    "A tank is a beam along its axis with growth. Its own axes: along, from `axis_from` to "
    "`axis_to`; upright, square to it and nearest to z (of an upright tank nearest to x); across, "
    "square to both.",
    {
        of_form(Form::vector, "axis_from", Dimension::length, "one end of the tank"),
        of_form(Form::vector, "axis_to", Dimension::length, "the other end"),
        quantity("diameter", Dimension::length, Bound::positive, "outside"),
        quantity("mass", Dimension::mass, Bound::not_negative, "of the shell with fittings"),
        quantity("contents_mass", Dimension::mass, Bound::not_negative, "of what fills it")
            .optional("0 kg"),
        quantity("volume", Dimension::volume, Bound::positive, "inside").optional("not given"),
        quantity("axial_stiffness", Dimension::axial_stiffness, Bound::positive, "E A"),
        quantity("bending_stiffness", Dimension::bending_stiffness, Bound::positive, "E I"),
        quantity("torsional_stiffness", Dimension::bending_stiffness, Bound::positive, "G J")
            .optional("E I / 1.3, said in the output"),
        quantity("shear_stiffness", Dimension::axial_stiffness, Bound::positive, "G A")
            .optional("rigid in shear"),
        table(Form::section, "growth", "growth", "stated by the maker or measured")
            .optional("no growth from pressure"),
        quantity("axial_expansion", Dimension::thermal_expansion, Bound::any,
                 "from temperature, along")
            .optional("0 1/K"),
        quantity("radial_expansion", Dimension::thermal_expansion, Bound::any,
                 "from temperature, of the radius")
            .optional("0 1/K"),
        quantity("fibre_ultimate_strain", Dimension::none, Bound::positive,
                 "for the growth warning; carbon, from memory")
            .optional("2.1 %"),
        quantity("burst_ratio", Dimension::none, Bound::positive,
                 "for the growth warning; carbon, from memory")
            .optional("2.25"),
        table(Form::section, "limits", "limits", "what the maker allows")
            .optional("such checks are not judged"),
        table(Form::sections, "collars", "collars", "at least one"),
    }};

const Section growth_section = {
    "growth",
    "Changes from 0 to a pressure, linear in pressure.",
    {
        quantity("pressure", Dimension::pressure, Bound::positive, "gauge"),
        quantity("length_change", Dimension::length, Bound::any, "along, over `gauge_length`"),
        quantity("gauge_length", Dimension::length, Bound::positive, ""),
        quantity("diameter_change", Dimension::length, Bound::any, ""),
        quantity("diameter", Dimension::length, Bound::positive, "the one that changes"),
    }};

const Section limits_section = {
    "limits",
    "Largest values that the tank's maker allows. What is not given is not judged.",
    {
        quantity("axial_force", Dimension::force, Bound::positive, "either sense")
            .optional("not judged"),
        quantity("bending_moment", Dimension::moment, Bound::positive, "").optional("not judged"),
        quantity("torsion", Dimension::moment, Bound::positive, "").optional("not judged"),
        quantity("collar_force", Dimension::force, Bound::positive,
                 "resultant transverse force at one collar")
            .optional("not judged"),
        quantity("clamping_force", Dimension::force, Bound::positive,
                 "total pressing of ring on tank")
            .optional("not judged"),
        quantity("lining_pressure", Dimension::pressure, Bound::positive, "peak")
            .optional("not judged"),
    }};

const Section collar_section = {
    "collars",
    "A fixed collar holds by a key, or by a grip of stated force past which it slips. A sliding "
    "collar slides with friction.",
    {
        word("kind", "fixed|sliding", ""),
        quantity("position", Dimension::length, Bound::not_negative,
                 "along the tank, from axis_from"),
        table(Form::sections, "feet", "feet", "at least one"),
        table(Form::section, "pivot", "pivot", "which rotations the collar lets go")
            .optional("all free"),
        table(Form::section, "ring", "ring", "ring with a lining")
            .optional("rigid across, no clamping, no stiffness in tilt"),
        of_form(Form::range, "grip_force", Dimension::force,
                "fixed only: limit on axial and turning force together; one figure or [low, high]",
                Bound::not_negative)
            .optional("keyed: no limit"),
        word("slides_at", "lining|foot|neck",
             "sliding only: tank in ring (friction on the clamping force), feet on hull (on the "
             "foot's own load), neck in bush (on the transverse force)")
            .optional("lining"),
        of_form(Form::range, "friction", Dimension::none,
                "sliding only, needed: Coulomb coefficient; one figure or [low, high]",
                Bound::not_negative)
            .optional("needed if sliding"),
        quantity("foot_bolt_preload", Dimension::force, Bound::not_negative,
                 "sliding at the foot only: normal load of bolts on each foot")
            .optional("0 N"),
        quantity("stroke_aft", Dimension::length, Bound::not_negative,
                 "sliding only: travel of the tank towards axis_from before a stop")
            .optional("no stop"),
        quantity("stroke_forward", Dimension::length, Bound::not_negative,
                 "the same towards axis_to")
            .optional("no stop"),
        quantity("stop_stiffness", Dimension::force_per_length, Bound::positive, "")
            .optional("rigid stops"),
    }};

const Section pivot_section = {
    "pivot",
    "Each is `free`, `locked` or a rotational stiffness, in the tank's axes.",
    {
        of_form(Form::release, "about_along", Dimension::rotational_stiffness, "turning",
                Bound::not_negative)
            .optional("free"),
        of_form(Form::release, "about_across", Dimension::rotational_stiffness, "tilt",
                Bound::not_negative)
            .optional("free"),
        of_form(Form::release, "about_upright", Dimension::rotational_stiffness, "tilt",
                Bound::not_negative)
            .optional("free"),
    }};

const Section ring_section = {
    "ring",
    "The lining is an elastic bed all round.",
    {
        quantity("width", Dimension::length, Bound::positive, "along the tank"),
        quantity("bed_stiffness", Dimension::bed_stiffness, Bound::positive,
                 "pressure per compression of the lining"),
        quantity("radius", Dimension::length, Bound::positive, "of the tank's face at the lining")
            .optional("half the tank's diameter"),
        quantity("preload", Dimension::length, Bound::any,
                 "fitted interference; negative: clearance")
            .optional("0 mm"),
        word("tilt", "lining|rigid", "the tank tilts in the lining, or only by the pivot")
            .optional("lining"),
    }};

const Section foot_section = {
    "feet",
    "Where the seat stands on the hull and how stiff it is up to the ring.",
    {
        of_form(Form::vector, "centre", Dimension::length,
                "of the footprint; may be left out on a rigid bed only")
            .optional("needed but on a rigid bed"),
        quantity("length", Dimension::length, Bound::not_negative, "of the footprint along x")
            .optional("the nearest nodes only"),
        quantity("width", Dimension::length, Bound::not_negative,
                 "along y; along z on upright parts")
            .optional("the nearest nodes only"),
        names_of(Refers::part, "parts", "parts it sits on").optional("any"),
        table(Form::section, "stiffness", "stiffness", ""),
    }};

const Section stiffness_section = {
    "stiffness",
    "Of one foot with its share of the seat, in the tank's axes, from the foot's place up to the "
    "ring. "
    "`rigid` may be written for any; 0 carries nothing.",
    {
        of_form(Form::stiffness, "along", Dimension::force_per_length, "", Bound::not_negative),
        of_form(Form::stiffness, "across", Dimension::force_per_length, "", Bound::not_negative),
        of_form(Form::stiffness, "upright", Dimension::force_per_length, "", Bound::not_negative),
        of_form(Form::stiffness, "about_along", Dimension::rotational_stiffness, "",
                Bound::not_negative)
            .optional("rigid"),
        of_form(Form::stiffness, "about_across", Dimension::rotational_stiffness, "",
                Bound::not_negative)
            .optional("rigid"),
        of_form(Form::stiffness, "about_upright", Dimension::rotational_stiffness, "",
                Bound::not_negative)
            .optional("rigid"),
    }};

StatedGrowth read_growth(const Node& node)
{
  const Fields fields(node, growth_section);
  StatedGrowth growth;
  growth.where = node.from();
  growth.pressure = fields.quantity("pressure");
  growth.length_change = fields.quantity("length_change");
  growth.gauge_length = fields.quantity("gauge_length");
  growth.diameter_change = fields.quantity("diameter_change");
  growth.diameter = fields.quantity("diameter");
  return growth;
}

TankLimits read_limits(const Node& node)
{
  const Fields fields(node, limits_section);
  TankLimits limits;
  limits.axial_force = fields.maybe_quantity("axial_force");
  limits.bending_moment = fields.maybe_quantity("bending_moment");
  limits.torsion = fields.maybe_quantity("torsion");
  limits.collar_force = fields.maybe_quantity("collar_force");
  limits.clamping_force = fields.maybe_quantity("clamping_force");
  limits.lining_pressure = fields.maybe_quantity("lining_pressure");
  return limits;
}

LinedRing read_ring(const Node& node, const Tank& tank)
{
  const Fields fields(node, ring_section);
  LinedRing ring;
  ring.radius = fields.quantity("radius", 0.5 * tank.diameter);
  ring.width = fields.quantity("width");
  ring.bed_stiffness = fields.quantity("bed_stiffness");
  ring.preload = fields.quantity("preload");
  ring.is_tilt_rigid = fields.word_index("tilt") == 1;
  return ring;
}

Foot read_foot(const Entry& entry, const std::optional<Vector3>& centre_on_bed)
{
  const Fields fields(entry.node, foot_section);
  Foot foot;
  foot.name = entry.name;
  foot.where = entry.where;
  foot.footprint.centre = fields.vector("centre", centre_on_bed.value_or(Vector3::Zero()));
  foot.footprint.length = fields.quantity("length");
  foot.footprint.width = fields.quantity("width");
  foot.footprint.parts = fields.names("parts");
  if (entry.node.is_map() && !fields.has("centre") && !centre_on_bed)
    entry.node.complain_at_key("key 'centre' is missing; add 'centre: [3.7 m, 0.4 m, 0.3 m]', "
                               "where the foot stands on the hull");
  const Fields springs(fields.node("stiffness"), stiffness_section);
  for (std::size_t i = 0; i < foot.stiffness.size(); ++i)
    foot.stiffness[i] = springs.stiffness(stiffness_section.keys[i].name);
  return foot;
}

void refuse_keys(const Fields& fields, const std::vector<std::string_view>& keys,
                 std::string_view belongs_to)
{
  for (const std::string_view key : keys)
    if (fields.has(key))
      fields.node(key).complain_at_key(
          fmt::format("'{}' belongs to {}; remove it or change the collar", key, belongs_to));
}

void check_collar(const Fields& fields, const Collar& collar, const Tank& tank)
{
  const double length = (tank.axis_to - tank.axis_from).norm();
  if (length > 0.0 && collar.position > length)
    fields.complain("position", fmt::format("{:g} m is beyond the end of the tank, which is {:g} m "
                                            "long; measure from axis_from",
                                            collar.position, length));
  if (fields.has("feet") && collar.feet.empty())
    fields.complain("feet", "no foot is given; a collar stands on at least one");
  if (collar.kind == CollarKind::fixed)
  {
    refuse_keys(fields,
                {"slides_at", "friction", "foot_bolt_preload", "stroke_aft", "stroke_forward",
                 "stop_stiffness"},
                "a sliding collar");
    return;
  }
  refuse_keys(fields, {"grip_force"}, "a fixed collar");
  if (!fields.has("friction"))
    fields.map().complain_at_key("key 'friction' is missing; a sliding collar has a coefficient, "
                                 "e.g. 'friction: [0.08, 0.25]', or 'friction: 0'");
  // Without a ring nothing clamps: only a frictionless slide makes sense then.
  if (collar.slides_at == SlidesAt::lining && !collar.ring && collar.friction.high > 0.0)
    fields.map().complain_at_key(
        "it slides at the lining with friction but has no ring; add 'ring: {...}' or say "
        "'slides_at: foot' or 'slides_at: neck'");
  if (collar.slides_at != SlidesAt::foot)
    refuse_keys(fields, {"foot_bolt_preload"}, "a collar that slides at the foot");
  if (!collar.stroke_aft && !collar.stroke_forward)
    refuse_keys(fields, {"stop_stiffness"}, "a collar with a stroke");
}

Collar read_collar(const Entry& entry, const Tank& tank, bool has_rigid_bed)
{
  const Fields fields(entry.node, collar_section);
  Collar collar;
  collar.name = entry.name;
  collar.where = entry.where;
  const int kind = fields.word_index("kind");
  collar.kind = kind == 1 ? CollarKind::sliding : CollarKind::fixed;
  collar.position = fields.quantity("position");
  const Fields pivot(fields.node("pivot"), pivot_section);
  for (std::size_t i = 0; i < collar.pivot_stiffness.size(); ++i)
    collar.pivot_stiffness[i] = pivot.release(pivot_section.keys[i].name);
  if (fields.has("ring"))
    collar.ring = read_ring(fields.node("ring"), tank);
  if (fields.has("grip_force"))
    collar.grip_force = fields.range("grip_force");
  collar.slides_at = fields.word("slides_at", SlidesAt::lining);
  collar.friction = fields.range("friction");
  collar.foot_bolt_preload = fields.quantity("foot_bolt_preload");
  collar.stroke_aft = fields.maybe_quantity("stroke_aft");
  collar.stroke_forward = fields.maybe_quantity("stroke_forward");
  collar.stop_stiffness = fields.maybe_quantity("stop_stiffness");

  std::optional<Vector3> centre_on_bed;
  const Vector3 axis = tank.axis_to - tank.axis_from;
  if (has_rigid_bed && axis.norm() > 0.0)
    centre_on_bed = Vector3(tank.axis_from + collar.position * axis.normalized());
  for (const Entry& foot : named_entries(fields.node("feet")))
    collar.feet.push_back(read_foot(foot, centre_on_bed));
  if (kind >= 0)
    check_collar(fields, collar, tank);
  return collar;
}

Tank read_tank(const Entry& entry, bool has_rigid_bed)
{
  const Fields fields(entry.node, tank_section);
  Tank tank;
  tank.name = entry.name;
  tank.where = entry.where;
  const std::optional<Vector3> from = fields.maybe_vector("axis_from");
  const std::optional<Vector3> to = fields.maybe_vector("axis_to");
  tank.axis_from = from.value_or(Vector3::Zero());
  tank.axis_to = to.value_or(Vector3::Zero());
  tank.diameter = fields.quantity("diameter");
  tank.mass = fields.quantity("mass");
  tank.contents_mass = fields.quantity("contents_mass");
  tank.volume = fields.quantity("volume");
  tank.axial_stiffness = fields.quantity("axial_stiffness");
  tank.bending_stiffness = fields.quantity("bending_stiffness");
  tank.torsional_stiffness = fields.quantity("torsional_stiffness");
  tank.shear_stiffness = fields.quantity("shear_stiffness");
  if (fields.has("growth"))
    tank.growth = read_growth(fields.node("growth"));
  tank.axial_expansion = fields.quantity("axial_expansion");
  tank.radial_expansion = fields.quantity("radial_expansion");
  tank.fibre_ultimate_strain = fields.quantity("fibre_ultimate_strain", tank.fibre_ultimate_strain);
  tank.burst_ratio = fields.quantity("burst_ratio", tank.burst_ratio);
  tank.limits = read_limits(fields.node("limits"));
  if (from && to && *from == *to)
    fields.complain("axis_to", "it is the same point as axis_from; the tank has no length");
  for (const Entry& collar : named_entries(fields.node("collars")))
    tank.collars.push_back(read_collar(collar, tank, has_rigid_bed));
  if (fields.has("collars") && fields.node("collars").is_map() && tank.collars.empty())
    fields.complain("collars", "no collar is given; a tank is held by at least one");
  return tank;
}
} // namespace

std::vector<Tank> read_tanks(const Node& node, bool has_rigid_bed)
{
  std::vector<Tank> tanks;
  for (const Entry& entry : named_entries(node))
    tanks.push_back(read_tank(entry, has_rigid_bed));
  return tanks;
}

Chapter tank_chapter()
{
  return {"Tanks and collars",
          "",
          {&tank_section, &growth_section, &limits_section, &collar_section, &pivot_section,
           &ring_section, &foot_section, &stiffness_section},
          R"(tanks:
  tank-1:
    axis_from: [3.35 m, 0.35 m, 1 m]
    axis_to: [5.65 m, 0.35 m, 1 m]
    diameter: 500 mm
    mass: 115 kg
    contents_mass: 7.5 kg
    volume: 0.315 m3
    axial_stiffness: 2.2e9 N
    bending_stiffness: 6.6e7 N m2
    torsional_stiffness: 5e7 N m2
    shear_stiffness: 8e8 N
    growth:
      pressure: 350 bar
      length_change: 3.2 mm
      gauge_length: 1.5 m
      diameter_change: 1.9 mm
      diameter: 500 mm
    axial_expansion: 1e-6 1/K
    radial_expansion: 1e-6 1/K
    limits: {axial_force: 20 kN, bending_moment: 5 kN m}
    collars:
      aft:
        kind: fixed
        position: 0.4 m
        grip_force: [15 kN, 25 kN]
        pivot: {about_along: locked, about_across: free, about_upright: 2 kN m/rad}
        ring: {width: 80 mm, bed_stiffness: 1e9 N/m3, preload: 0.1 mm}
        feet:
          only:
            centre: [3.75 m, 0.35 m, 0.6 m]
            length: 300 mm
            width: 200 mm
            parts: [tank-flat]
            stiffness: {along: 20 kN/mm, across: 10 kN/mm, upright: rigid, about_along: 5 kN m/rad}
      forward:
        kind: sliding
        position: 1.9 m
        slides_at: foot
        friction: [0.08, 0.25]
        foot_bolt_preload: 2 kN
        stroke_aft: 12 mm
        stroke_forward: 12 mm
        stop_stiffness: 20 kN/mm
        feet:
          only:
            centre: [5.25 m, 0.35 m, 0.6 m]
            stiffness: {along: 5 kN/mm, across: 10 kN/mm, upright: 20 kN/mm}
)"};
}
} // namespace carlin::reading
