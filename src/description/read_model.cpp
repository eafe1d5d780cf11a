#include "fields.hpp"
#include "readers.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <fstream>
#include <sstream>

namespace carlin
{
namespace reading
{
namespace
{
const Section model_section = {
    "the file",
    "",
    {
        plain(Form::count, "carlin", "version of this format: 1"),
        table(Form::section, "craft", "craft", "figures of the craft")
            .optional("a structure without a hull"),
        table(Form::section, "mesh", "mesh", "").optional("needed with a hull"),
        table(Form::sections, "materials", "materials", "").optional("none"),
        table(Form::sections, "schedules", "schedules", "").optional("none"),
        table(Form::sections, "profiles", "profiles", "").optional("none"),
        table(Form::section, "hull", "hull", "").optional("`frame` or `bed`"),
        table(Form::sections, "plating", "plating, bulkheads, webs, flats", "hull and deck")
            .optional("none"),
        table(Form::sections, "bulkheads", "plating, bulkheads, webs, flats", "").optional("none"),
        table(Form::sections, "webs", "plating, bulkheads, webs, flats",
              "of girders and deep frames")
            .optional("none"),
        table(Form::sections, "flats", "plating, bulkheads, webs, flats", "").optional("none"),
        table(Form::sections, "hatches", "hatches", "").optional("none"),
        table(Form::sections, "members", "members", "").optional("none"),
        table(Form::sections, "joints", "joints", "").optional("none"),
        table(Form::sections, "equipment", "equipment", "").optional("none"),
        table(Form::section, "frame", "frame", "a structure of points").optional("`hull`"),
        word("bed", "rigid", "feet stand on a rigid bed: neither hull nor frame")
            .optional("`hull` or `frame`"),
        table(Form::sections, "tanks", "tanks", "").optional("none"),
        table(Form::sections, "configurations", "configurations", "").optional("one, as modelled"),
        table(Form::sections, "cases", "cases", "").optional("none"),
        plain(Form::sections, "criteria", "limits by the name of the criterion")
            .optional("default limits"),
        table(Form::section, "stiffness", "stiffness", "where stiffness is read")
            .optional("bulkheads of the base"),
    }};

void read_base_parts(const Fields& fields, const Planes& planes, Model& model)
{
  Parts parts;
  read_plates(fields.node("plating"), PlateKind::plating, parts);
  read_plates(fields.node("bulkheads"), PlateKind::bulkhead, parts);
  read_plates(fields.node("webs"), PlateKind::web, parts);
  read_plates(fields.node("flats"), PlateKind::flat, parts);
  const std::vector<PlatePart> hosts = parts.plates;
  read_hatches(fields.node("hatches"), hosts, parts);
  read_members(fields.node("members"), planes, parts);
  read_joints(fields.node("joints"), parts);
  read_equipment(fields.node("equipment"), parts);
  for (const auto& [host, opening] : parts.openings)
    for (PlatePart& plate : parts.plates)
      if (plate.name == host || plate.family == host)
        plate.cut_outs.push_back(opening);
  model.plates = std::move(parts.plates);
  model.members = std::move(parts.members);
  model.joints = std::move(parts.joints);
  model.equipment = std::move(parts.equipment);
}

void check_version(const Fields& fields)
{
  const Node version = fields.node("carlin");
  if (fields.has("carlin") && version.text() != "1")
    version.complain(fmt::format("version '{}' of the format is not known; this program reads "
                                 "'carlin: 1'",
                                 version.text()));
}

/// What stands alone and what needs a hull.
void check_top_level(const Fields& fields)
{
  if (!fields.map().is_map())
    return;
  const bool has_hull = fields.has("hull");
  if (!has_hull && !fields.has("frame") && !fields.has("bed"))
    fields.map().complain("no structure is given; add 'hull:', 'frame:' or 'bed: rigid'");
  if (has_hull && !fields.has("mesh"))
    fields.map().complain("key 'mesh' is missing; add e.g. 'mesh: {size: 110 mm}'");
  if (fields.has("bed"))
    for (const char* key : {"hull", "frame"})
      if (fields.has(key))
        fields.node(key).complain_at_key("it stands beside 'bed: rigid', which takes its place; "
                                         "remove one of the two");
  if (!has_hull)
    for (const char* key :
         {"plating", "bulkheads", "webs", "flats", "hatches", "members", "equipment", "stiffness"})
      if (fields.has(key))
        fields.node(key).complain_at_key("it lies on the planes of a hull, which is not given; add "
                                         "'hull:' or remove it");
  if (fields.has("bed") && !fields.has("tanks"))
    fields.node("bed").complain_at_key("nothing stands on the bed; add 'tanks:'");
}

/// A material that says nothing of expansion would silently stay cold.
void check_expansions(const Node& materials, const Model& model)
{
  bool is_heated = false;
  for (const LoadCase& load_case : model.cases)
    for (const Stage& stage : load_case.stages)
      is_heated = is_heated || !stage.hull_temperatures.empty();
  if (!is_heated)
    return;
  for (const Entry& material : materials.entries())
  {
    const std::vector<Entry> keys = material.node.entries();
    if (std::none_of(keys.begin(), keys.end(),
                     [](const Entry& key) { return key.name == "thermal_expansion"; }))
      material.node.complain_at_key("key 'thermal_expansion' is missing, and a case sets a "
                                    "temperature of the hull; add 'thermal_expansion: 23.8e-6 "
                                    "1/K'");
  }
}

Model read_document(const Node& document, const std::filesystem::path& file)
{
  Model model;
  model.file = file;
  if (document.is_absent())
    return model;
  const Fields fields(document, model_section);
  check_version(fields);
  check_top_level(fields);
  model.craft = read_craft(fields.node("craft"));
  model.mesh_size = read_mesh_size(fields.node("mesh"));
  model.materials = read_materials(fields.node("materials"));
  model.schedules = read_schedules(fields.node("schedules"));
  model.profiles = read_profiles(fields.node("profiles"));
  model.hull = read_hull(fields.node("hull"));
  const Planes planes = planes_of(model.hull);
  read_base_parts(fields, planes, model);
  if (fields.has("frame"))
    model.frame = read_frame(fields.node("frame"));
  model.rigid_bed = fields.word_index("bed") == 0;
  model.tanks = read_tanks(fields.node("tanks"), fields.has("bed"));
  model.configurations = read_configurations(fields.node("configurations"), model, planes);
  model.cases = read_cases(fields.node("cases"));
  check_expansions(fields.node("materials"), model);
  model.criteria = read_criteria(fields.node("criteria"));
  read_stiffness(fields.node("stiffness"), model);
  return model;
}
} // namespace

Chapter model_chapter() { return {"The file", "", {&model_section}, "carlin: 1\n"}; }
} // namespace reading

Model read_model_text(const std::string& text, const std::filesystem::path& file)
{
  reading::Findings findings;
  const reading::Node document = reading::Node::document(text, file.generic_string(), findings);
  Model model = reading::read_document(document, file);
  if (!document.is_absent())
  {
    reading::check_references(model, findings);
    reading::check_model(model, findings);
  }
  if (!findings.problems.empty())
    throw ModelError(std::move(findings.problems));
  return model;
}

Model read_model(const std::filesystem::path& file)
{
  std::ifstream input(file);
  if (!input || std::filesystem::is_directory(file))
    throw ModelError({file.generic_string(), 0, 0},
                     "the model file cannot be opened; check its name and folder");
  std::ostringstream text;
  text << input.rdbuf();
  return read_model_text(text.str(), file);
}
} // namespace carlin
