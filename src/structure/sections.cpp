#include "sections.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <limits>

namespace carlin
{
namespace
{
template <typename Entry>
const Entry& entry_named(const std::vector<Entry>& entries, const std::string& name,
                         const char* kind, const FileLocation& where)
{
  const auto found = std::find_if(entries.begin(), entries.end(),
                                  [&](const Entry& entry) { return entry.name == name; });
  if (found == entries.end())
    throw ModelError(where, fmt::format("{} '{}' does not exist", kind, name));
  return *found;
}

ProfileConstants constants_of(const FlatBar& shape)
{
  return flat_bar_constants(shape.height, shape.thickness);
}
ProfileConstants constants_of(const Tee& shape)
{
  return tee_constants(shape.web_height, shape.web_thickness, shape.flange_width,
                       shape.flange_thickness);
}
ProfileConstants constants_of(const AngleBar& shape)
{
  return angle_constants(shape.web_height, shape.web_thickness, shape.flange_width,
                         shape.flange_thickness);
}
ProfileConstants constants_of(const Tube& shape)
{
  return tube_constants(shape.outside_diameter, shape.wall_thickness);
}
ProfileConstants constants_of(const BoxBar& shape)
{
  return box_constants(shape.height, shape.width, shape.wall_thickness);
}
ProfileConstants constants_of(const GivenSection& shape)
{
  constexpr double rigid = std::numeric_limits<double>::infinity();
  ProfileConstants constants;
  constants.area = shape.area;
  constants.second_moment_y = shape.second_moment_y;
  constants.second_moment_z = shape.second_moment_z;
  constants.torsion_constant = shape.torsion_constant;
  constants.shear_area_y = shape.shear_area_y.value_or(rigid);
  constants.shear_area_z = shape.shear_area_z.value_or(rigid);
  constants.centroid_z = shape.centroid_height;
  constants.depth = shape.depth;
  if (shape.depth > 0.0)
    constants.stress_points = {Vector2(0.0, -shape.centroid_height),
                               Vector2(0.0, shape.depth - shape.centroid_height)};
  return constants;
}
} // namespace

const Schedule& schedule_named(const Model& model, const std::string& name,
                               const FileLocation& where)
{
  return entry_named(model.schedules, name, "plate schedule", where);
}

const Profile& profile_named(const Model& model, const std::string& name, const FileLocation& where)
{
  return entry_named(model.profiles, name, "profile", where);
}

const Material& material_named(const Model& model, const std::string& name,
                               const FileLocation& where)
{
  return entry_named(model.materials, name, "material", where);
}

double plate_offset(const Schedule& schedule)
{
  switch (schedule.line)
  {
  case MouldedLine::inside:
    return 0.5 * schedule.thickness;
  case MouldedLine::outside:
    return -0.5 * schedule.thickness;
  case MouldedLine::centred:
    break;
  }
  return 0.0;
}

ShellSection section_of(const Model& model, const Schedule& schedule)
{
  const Material& material = material_named(model, schedule.material, schedule.where);
  return isotropic_shell_section(material.youngs_modulus, material.poissons_ratio, material.density,
                                 material.thermal_expansion, schedule.thickness,
                                 plate_offset(schedule));
}

MemberSection section_of(const Model& model, const Profile& profile, ToeSide side)
{
  const Material& material = material_named(model, profile.material, profile.where);
  ProfileConstants constants =
      std::visit([](const auto& shape) { return constants_of(shape); }, profile.shape);
  if (side == ToeSide::mirrored)
  {
    constants.product_moment = -constants.product_moment;
    constants.centroid_y = -constants.centroid_y;
    constants.shear_centre_y = -constants.shear_centre_y;
    for (Vector2& point : constants.stress_points)
      point.x() = -point.x();
  }
  return member_section(constants, material.youngs_modulus, material.poissons_ratio,
                        material.density, material.thermal_expansion);
}
} // namespace carlin
