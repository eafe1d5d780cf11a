#include "fields.hpp"
#include "readers.hpp"

#include <fmt/format.h>

namespace carlin
{
namespace reading
{
std::vector<Chapter> chapters()
{
  return {model_chapter(), craft_chapter(),    material_chapter(), hull_chapter(),
          part_chapter(),  member_chapter(),   tank_chapter(),     configuration_chapter(),
          case_chapter(),  criteria_chapter(), frame_chapter(),    bed_chapter()};
}

Chapter bed_chapter()
{
  return {"Tanks on a rigid bed",
          "To look at the mounts alone. With `bed: rigid` there is neither hull nor frame, and a "
          "foot may leave out its centre; it then stands below the axis of the tank.",
          {},
          R"(carlin: 1

bed: rigid

tanks:
  bottle:
    axis_from: [0 m, 0 m, 0 m]
    axis_to: [2 m, 0 m, 0 m]
    diameter: 400 mm
    mass: 80 kg
    axial_stiffness: 1e9 N
    bending_stiffness: 2e7 N m2
    collars:
      near:
        kind: fixed
        position: 0.25 m
        feet: {foot: {stiffness: {along: rigid, across: rigid, upright: rigid}}}
      far:
        kind: sliding
        position: 1.75 m
        slides_at: neck
        friction: 0
        feet: {foot: {stiffness: {along: 10 kN/mm, across: 10 kN/mm, upright: 10 kN/mm}}}

cases:
  moved:
    class: service
    stages:
      fitting: {water: none}
      moved:
        foot_motion: [{tank: bottle, collar: far, translation: [1 mm, 0 mm, 0 mm], rotation: [0 deg, 0.1 deg, 0 deg]}]
)"};
}

namespace
{
std::string quantity_value(const Key& key)
{
  if (key.dimension == Dimension::none)
    return "a number or a percentage";
  return fmt::format("{}, `{}`", name_of(key.dimension), example_of(key.dimension));
}

std::string words_value(const Key& key)
{
  std::string text;
  for (const std::string& word : split_words(key.words))
    text += fmt::format("{}`{}`", text.empty() ? "" : ", ", word);
  return text;
}

std::string section_value(std::string_view form, const Key& key)
{
  return key.of.empty() ? std::string(form) : fmt::format("{}: see *{}*", form, key.of);
}

/// What may stand behind a key, in words.
std::string value_of(const Key& key)
{
  switch (key.form)
  {
  case Form::quantity:
    return quantity_value(key);
  case Form::vector:
    return key.dimension == Dimension::none
               ? "`[x, y, z]`, a direction"
               : fmt::format("`[x, y, z]`, each {}", quantity_value(key));
  case Form::polyline:
    return fmt::format("list of pairs, each {}", quantity_value(key));
  case Form::range:
    return fmt::format("{}, or `[low, high]`", quantity_value(key));
  case Form::stiffness:
    return fmt::format("{}, or `rigid`", quantity_value(key));
  case Form::release:
    return fmt::format("`free`, `locked`, or {}", quantity_value(key));
  case Form::acceleration_or_standard:
    return fmt::format("{}, or `by standard`", quantity_value(key));
  case Form::count:
    return "a whole number from 1";
  case Form::counts:
    return "two whole numbers from 1";
  case Form::flag:
    return "`true`, `false`";
  case Form::text:
    return "text";
  case Form::word:
    return words_value(key);
  case Form::word_list:
    return fmt::format("list of {}", words_value(key));
  case Form::name:
    return fmt::format("name of a {}", kind_name(key.refers));
  case Form::names:
    return fmt::format("name of a {}, or a list of them", kind_name(key.refers));
  case Form::name_pairs:
    return "list of pairs of names";
  case Form::plane_range:
    return fmt::format("`{{from: {0}, to: {0}}}`", kind_name(key.refers));
  case Form::surface:
    return "a surface";
  case Form::section:
    return section_value("map", key);
  case Form::sections:
    return section_value("map of names", key);
  case Form::section_list:
    return section_value("list", key);
  }
  return "";
}

std::string bounded(const Key& key)
{
  if (key.bound == Bound::positive)
    return ", > 0";
  return key.bound == Bound::not_negative ? ", 0 or more" : "";
}

/// A bar would end the cell of the table.
std::string cell(std::string text)
{
  for (std::size_t at = text.find('|'); at != std::string::npos; at = text.find('|', at + 2))
    text.replace(at, 1, "\\|");
  return text;
}

std::string section_table(const Section& section)
{
  std::string text = fmt::format("### {}\n\n", section.title);
  if (!section.introduction.empty())
    text += fmt::format("{}\n\n", section.introduction);
  text += "| key | value | if left out | meaning |\n| --- | --- | --- | --- |\n";
  for (const Key& key : section.keys)
    text +=
        fmt::format("| `{}` | {}{} | {} | {} |\n", key.name, cell(value_of(key)), bounded(key),
                    key.need == Need::required ? "**needed**" : cell(std::string(key.when_absent)),
                    cell(std::string(key.meaning)));
  return text + "\n";
}
} // namespace
} // namespace reading

std::string model_reference()
{
  std::string text =
      "# The model file\n\n"
      "This page is made from the reader's own keys by `model_reference()`; a test compares the "
      "two "
      "and reads every example. `models/starter.yaml` is the file to copy.\n\n"
      "A model is one YAML file. Axes of the boat: x forward from the transom, y to port, z up.\n\n"
      "- Every quantity carries its unit: `6 mm`, `210 GPa`, `25 knot`, `15 degC`. Any unit of the "
      "UDUNITS-2 database will do that has the dimension. `g` is the acceleration of gravity where "
      "an "
      "acceleration is due, and gram where a mass is due. `kn` is refused: write `knot` or `kN`.\n"
      "- Named things are maps `name: {...}`; their order in the file is kept. Names have letters, "
      "digits, spaces and `- _ . , + ( )`.\n"
      "- Problems are listed all at once as `file:line:column: error: path: what is wrong; what to "
      "do`; elements of lists are counted from 1 in the path.\n\n"
      "The examples of the chapters from *Craft and mesh* to *Criteria and stiffness* make one "
      "model "
      "together; those that begin with `carlin: 1` stand alone.\n\n";
  for (const reading::Chapter& chapter : reading::chapters())
  {
    text += fmt::format("## {}\n\n", chapter.title);
    if (!chapter.introduction.empty())
      text += fmt::format("{}\n\n", chapter.introduction);
    for (const reading::Section* section : chapter.sections)
      text += reading::section_table(*section);
    text += fmt::format("```yaml\n{}```\n\n", chapter.example);
  }
  text.pop_back();
  return text;
}
} // namespace carlin
