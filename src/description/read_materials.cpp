#include "fields.hpp"
#include "readers.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace carlin::reading
{
namespace
{
const Section material_section = {
    "materials",
    "Isotropic and linear elastic. `materials` is a map of names.",
    {
        quantity("youngs_modulus", Dimension::pressure, Bound::positive, ""),
        quantity("poissons_ratio", Dimension::none, Bound::any, "between -1 and 0.5"),
        quantity("density", Dimension::density, Bound::not_negative, ""),
        quantity("thermal_expansion", Dimension::thermal_expansion, Bound::any,
                 "along any line; needed where a case sets a temperature of the hull")
            .optional("0 1/K"),
        quantity("yield_strength", Dimension::pressure, Bound::positive,
                 "0.2 % proof, parent metal")
            .optional("stress is not judged"),
        quantity("welded_yield_strength", Dimension::pressure, Bound::positive,
                 "0.2 % proof beside a weld")
            .optional("stress beside welds is not judged"),
        quantity("ultimate_strength", Dimension::pressure, Bound::positive, "")
            .optional("not given"),
        plain(Form::text, "source", "where the figures come from, printed beside them")
            .optional("no source"),
    }};

const Section schedule_section = {
    "schedules",
    "What a piece of plating is made of. `schedules` is a map of names.",
    {
        name_of_a(Refers::material, "material", ""),
        quantity("thickness", Dimension::length, Bound::positive, ""),
        word("line", "inside|centred|outside",
             "where the plate lies with respect to the moulded line that the hull points describe")
            .optional("inside"),
    }};

const Section profile_section = {
    "profiles",
    "Sections of members. `profiles` is a map of names; each has a material and one shape. Heights "
    "are measured from the plating outward, along the direction in which the member stands.",
    {
        name_of_a(Refers::material, "material", ""),
        table(Form::section, "flat_bar", "flat_bar", "").optional("one shape is due"),
        table(Form::section, "tee", "tee", "").optional("one shape is due"),
        table(Form::section, "angle", "angle",
              "web on the plating, one flange at its far edge pointing to the toe, which is "
              "mirrored to starboard")
            .optional("one shape is due"),
        table(Form::section, "tube", "tube", "").optional("one shape is due"),
        table(Form::section, "box", "box", "outside dimensions").optional("one shape is due"),
        table(Form::section, "given", "given", "a section by its constants")
            .optional("one shape is due"),
    }};

Key size(std::string_view name) { return quantity(name, Dimension::length, Bound::positive, ""); }

const Section flat_bar_section = {"flat_bar", "", {size("height"), size("thickness")}};
const Section tee_section = {
    "tee",
    "",
    {size("web_height"), size("web_thickness"), size("flange_width"), size("flange_thickness")}};
const Section angle_section = {
    "angle",
    "",
    {size("web_height"), size("web_thickness"), size("flange_width"), size("flange_thickness")}};
const Section tube_section = {"tube", "", {size("outside_diameter"), size("wall_thickness")}};
const Section box_section = {"box", "", {size("height"), size("width"), size("wall_thickness")}};
const Section given_section = {
    "given",
    "About the centroid; local z stands off the plating, local y is the toe side.",
    {
        quantity("area", Dimension::area, Bound::positive, ""),
        quantity("second_moment_y", Dimension::second_moment, Bound::positive,
                 "about local y: bends in the standing plane"),
        quantity("second_moment_z", Dimension::second_moment, Bound::positive, "about local z"),
        quantity("torsion_constant", Dimension::second_moment, Bound::positive, ""),
        quantity("shear_area_y", Dimension::area, Bound::positive, "").optional("rigid in shear"),
        quantity("shear_area_z", Dimension::area, Bound::positive, "").optional("rigid in shear"),
        quantity("centroid_height", Dimension::length, Bound::any,
                 "from the foot of the profile to its centroid")
            .optional("0 mm"),
        quantity("depth", Dimension::length, Bound::positive, "for stress at the far face")
            .optional("stress at the far face is not found"),
    }};

Material read_material(const Entry& entry)
{
  const Fields fields(entry.node, material_section);
  Material material;
  material.name = entry.name;
  material.where = entry.where;
  material.youngs_modulus = fields.quantity("youngs_modulus");
  material.poissons_ratio = fields.quantity("poissons_ratio");
  material.density = fields.quantity("density");
  material.thermal_expansion = fields.quantity("thermal_expansion");
  material.yield_strength = fields.maybe_quantity("yield_strength");
  material.welded_yield_strength = fields.maybe_quantity("welded_yield_strength");
  material.ultimate_strength = fields.maybe_quantity("ultimate_strength");
  material.source = fields.text("source");
  if (material.poissons_ratio <= -1.0 || material.poissons_ratio >= 0.5)
    fields.complain("poissons_ratio", fmt::format("{:g} is outside what an isotropic material can "
                                                  "have; it must lie between -1 and 0.5",
                                                  material.poissons_ratio));
  if (material.yield_strength &&
      material.welded_yield_strength.value_or(0.0) > *material.yield_strength)
    fields.complain("welded_yield_strength",
                    "it is above the yield strength of the parent metal; exchange the two");
  return material;
}

struct Shape
{
  std::string_view key;
  ProfileShape (*read)(const Node& node);
};

ProfileShape read_flat_bar(const Node& node)
{
  const Fields fields(node, flat_bar_section);
  return FlatBar{fields.quantity("height"), fields.quantity("thickness")};
}

ProfileShape read_tee(const Node& node)
{
  const Fields fields(node, tee_section);
  const Tee tee{fields.quantity("web_height"), fields.quantity("web_thickness"),
                fields.quantity("flange_width"), fields.quantity("flange_thickness")};
  if (tee.flange_width > 0.0 && tee.flange_width <= tee.web_thickness)
    fields.complain("flange_width", "the flange is no wider than the web; use a flat_bar");
  return tee;
}

ProfileShape read_angle(const Node& node)
{
  const Fields fields(node, angle_section);
  const AngleBar angle{fields.quantity("web_height"), fields.quantity("web_thickness"),
                       fields.quantity("flange_width"), fields.quantity("flange_thickness")};
  if (angle.flange_width > 0.0 && angle.flange_width <= angle.web_thickness)
    fields.complain("flange_width", "the flange is no wider than the web; use a flat_bar");
  return angle;
}

ProfileShape read_tube(const Node& node)
{
  const Fields fields(node, tube_section);
  const Tube tube{fields.quantity("outside_diameter"), fields.quantity("wall_thickness")};
  if (tube.outside_diameter > 0.0 && tube.wall_thickness > 0.5 * tube.outside_diameter)
    fields.complain("wall_thickness",
                    "the wall is thicker than half the diameter; it must be at most that");
  return tube;
}

ProfileShape read_box(const Node& node)
{
  const Fields fields(node, box_section);
  const BoxBar box{fields.quantity("height"), fields.quantity("width"),
                   fields.quantity("wall_thickness")};
  const double least = std::min(box.height, box.width);
  if (least > 0.0 && box.wall_thickness >= 0.5 * least)
    fields.complain("wall_thickness",
                    "the walls meet inside; it must be less than half the smaller side");
  return box;
}

ProfileShape read_given(const Node& node)
{
  const Fields fields(node, given_section);
  GivenSection given;
  given.area = fields.quantity("area");
  given.second_moment_y = fields.quantity("second_moment_y");
  given.second_moment_z = fields.quantity("second_moment_z");
  given.torsion_constant = fields.quantity("torsion_constant");
  given.shear_area_y = fields.maybe_quantity("shear_area_y");
  given.shear_area_z = fields.maybe_quantity("shear_area_z");
  given.centroid_height = fields.quantity("centroid_height");
  given.depth = fields.quantity("depth");
  return given;
}

Profile read_profile(const Entry& entry)
{
  static const std::vector<Shape> shapes = {{"flat_bar", read_flat_bar}, {"tee", read_tee},
                                            {"angle", read_angle},       {"tube", read_tube},
                                            {"box", read_box},           {"given", read_given}};
  const Fields fields(entry.node, profile_section);
  Profile profile;
  profile.name = entry.name;
  profile.where = entry.where;
  profile.material = fields.name("material");
  int given = 0;
  for (const Shape& shape : shapes)
    if (fields.has(shape.key))
    {
      profile.shape = shape.read(fields.node(shape.key));
      ++given;
    }
  if (entry.node.is_map() && given != 1)
    entry.node.complain_at_key(
        fmt::format("{} shapes are given; a profile has one of flat_bar, tee, angle, tube, box, "
                    "given",
                    given == 0 ? "no" : std::to_string(given)));
  return profile;
}
} // namespace

std::vector<Material> read_materials(const Node& node)
{
  std::vector<Material> materials;
  for (const Entry& entry : named_entries(node))
    materials.push_back(read_material(entry));
  return materials;
}

std::vector<Schedule> read_schedules(const Node& node)
{
  std::vector<Schedule> schedules;
  for (const Entry& entry : named_entries(node))
  {
    const Fields fields(entry.node, schedule_section);
    Schedule schedule;
    schedule.name = entry.name;
    schedule.where = entry.where;
    schedule.material = fields.name("material");
    schedule.thickness = fields.quantity("thickness");
    schedule.line = fields.word("line", MouldedLine::inside);
    schedules.push_back(schedule);
  }
  return schedules;
}

std::vector<Profile> read_profiles(const Node& node)
{
  std::vector<Profile> profiles;
  for (const Entry& entry : named_entries(node))
    profiles.push_back(read_profile(entry));
  return profiles;
}

Chapter material_chapter()
{
  return {"Materials, schedules, profiles",
          "",
          {&material_section, &schedule_section, &profile_section, &flat_bar_section, &tee_section,
           &angle_section, &tube_section, &box_section, &given_section},
          R"(materials:
  aluminium:
    youngs_modulus: 70 GPa
    poissons_ratio: 0.33
    density: 2660 kg/m3
    thermal_expansion: 23.8e-6 1/K
    yield_strength: 215 MPa
    welded_yield_strength: 125 MPa
    ultimate_strength: 305 MPa
    source: common practice for 5083-H116, no source

schedules:
  plate-5: {material: aluminium, thickness: 5 mm}
  web-5: {material: aluminium, thickness: 5 mm, line: centred}

profiles:
  bar: {material: aluminium, flat_bar: {height: 70 mm, thickness: 7 mm}}
  frame-tee:
    material: aluminium
    tee: {web_height: 150 mm, web_thickness: 6 mm, flange_width: 60 mm, flange_thickness: 8 mm}
  carling-angle:
    material: aluminium
    angle: {web_height: 100 mm, web_thickness: 6 mm, flange_width: 50 mm, flange_thickness: 6 mm}
  pillar-tube: {material: aluminium, tube: {outside_diameter: 60 mm, wall_thickness: 5 mm}}
  post-box: {material: aluminium, box: {height: 80 mm, width: 60 mm, wall_thickness: 5 mm}}
  top-hat:
    material: aluminium
    given:
      area: 1200 mm2
      second_moment_y: 2.5e6 mm4
      second_moment_z: 1.1e6 mm4
      torsion_constant: 0.8e6 mm4
      shear_area_z: 700 mm2
      centroid_height: 42 mm
      depth: 90 mm
)"};
}
} // namespace carlin::reading
