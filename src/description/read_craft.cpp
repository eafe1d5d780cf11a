#include "fields.hpp"
#include "readers.hpp"

#include <fmt/format.h>

namespace carlin::reading
{
namespace
{
const Section craft_section = {
    "craft",
    "Figures of the craft as a whole. A structure without a hull may leave the section out.",
    {
        plain(Form::text, "name", "printed on every result"),
        quantity("displacement", Dimension::mass, Bound::positive,
                 "of the base configuration, everything aboard but tanks added later; what the "
                 "model lacks is spread over the hull as outfit mass")
            .optional("the modelled mass"),
        of_form(Form::vector, "centre_of_gravity", Dimension::length, "of that displacement")
            .optional("that of the modelled mass"),
        quantity("waterline_length", Dimension::length, Bound::positive,
                 "for the standard's load factors")
            .optional("not given"),
        quantity("chine_beam", Dimension::length, Bound::positive,
                 "at 0.4 of the waterline length from aft, for the standard's load factors")
            .optional("not given"),
        quantity("deadrise", Dimension::angle, Bound::not_negative, "there").optional("0 deg"),
        quantity("speed", Dimension::speed, Bound::positive, "largest, loaded")
            .optional("not given"),
        word("design_category", "A|B|C|D", "of ISO 12217").optional("C"),
        quantity("weld_allowance", Dimension::none, Bound::not_negative,
                 "welds and brackets, added to all modelled metalwork")
            .optional("0 %"),
        quantity("reference_temperature", Dimension::temperature, Bound::positive,
                 "of hull and tanks at the fitting")
            .optional("15 degC"),
    }};

const Section mesh_section = {
    "mesh",
    "",
    {quantity("size", Dimension::length, Bound::positive,
              "side of a cell that is asked for; each interval between named planes is divided "
              "into equal cells of about this size")}};

const Section stiffness_section = {
    "stiffness",
    "Where the stiffness of the hull is read.",
    {
        names_of(Refers::station, "girder",
                 "two stations: ends of the chord from which the girder's deflection is read")
            .optional("the first and last bulkhead of the base"),
        names_of(Refers::station, "bays", "stations that bound the bays, from aft")
            .optional("bulkheads of the base"),
    }};
} // namespace

Craft read_craft(const Node& node)
{
  Craft craft;
  if (node.is_absent())
    return craft;
  const Fields fields(node, craft_section);
  craft.where = node.from();
  craft.name = fields.text("name");
  craft.displacement = fields.maybe_quantity("displacement");
  craft.centre_of_gravity = fields.maybe_vector("centre_of_gravity");
  craft.waterline_length = fields.quantity("waterline_length");
  craft.chine_beam = fields.quantity("chine_beam");
  craft.deadrise = fields.quantity("deadrise");
  craft.speed = fields.quantity("speed");
  craft.weld_allowance = fields.quantity("weld_allowance");
  craft.reference_temperature =
      fields.quantity("reference_temperature", craft.reference_temperature);
  if (const int category = fields.word_index("design_category"); category >= 0)
    craft.design_category = "ABCD"[category];
  if (craft.centre_of_gravity && !fields.has("displacement"))
    fields.complain("centre_of_gravity", "it belongs to a displacement, which is not given; add "
                                         "'displacement: 9.5 t' or remove it");
  return craft;
}

double read_mesh_size(const Node& node) { return Fields(node, mesh_section).quantity("size"); }

Criteria read_criteria(const Node& node)
{
  Criteria criteria;
  for (const Entry& entry : named_entries(node))
  {
    try
    {
      criteria.limits[entry.name] = quantity_of_any_dimension(entry.node.text());
      criteria.written[entry.name] = entry.node.text();
      criteria.where[entry.name] = entry.where;
    }
    catch (const ValueError& error)
    {
      entry.node.complain(error.what());
    }
  }
  return criteria;
}

void read_stiffness(const Node& node, Model& model)
{
  const Fields fields(node, stiffness_section);
  model.girder_bulkheads = fields.names("girder");
  model.bays = fields.names("bays");
  if (fields.has("girder") && model.girder_bulkheads.size() != 2)
    fields.complain("girder", fmt::format("{} stations are named; the chord has two ends",
                                          model.girder_bulkheads.size()));
  if (fields.has("bays") && model.bays.size() < 2)
    fields.complain("bays", "a bay lies between two stations; name two or more");
}

Chapter craft_chapter()
{
  return {"Craft and mesh",
          "",
          {&craft_section, &mesh_section},
          R"(craft:
  name: example launch
  displacement: 9.5 t
  centre_of_gravity: [4.2 m, 0 m, 0.9 m]
  waterline_length: 10 m
  chine_beam: 2.8 m
  deadrise: 18 deg
  speed: 25 knot
  design_category: C
  weld_allowance: 6 %
  reference_temperature: 15 degC

mesh: {size: 110 mm}
)"};
}

Chapter criteria_chapter()
{
  return {
      "Criteria and stiffness",
      "`criteria` is a map of limits by the name of the criterion, each with the unit of what it "
      "limits. What is not given has the limit and the source that the table of checks prints.",
      {&stiffness_section},
      R"(criteria:
  bending stiffness ratio: 90 %

stiffness:
  girder: [bulkhead-1, bulkhead-2]
  bays: [transom, bulkhead-1, bulkhead-2, stem]
)"};
}
} // namespace carlin::reading
