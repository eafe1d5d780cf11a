#include "edits.hpp"
#include "node.hpp"

#include "carlin/description/model.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
const Configuration& configuration_named(const Model& model, const std::string& name)
{
  const auto at =
      std::find_if(model.configurations.begin(), model.configurations.end(),
                   [&](const Configuration& candidate) { return candidate.name == name; });
  if (at != model.configurations.end())
    return *at;
  std::vector<std::string> names;
  for (const Configuration& configuration : model.configurations)
    names.push_back(configuration.name);
  throw ModelError(
      {model.file.generic_string(), 0, 0},
      fmt::format("configuration '{}' does not exist; there are {}", name, reading::listed(names)));
}

ConfiguredCraft edited(const Model& model, const Configuration& configuration)
{
  ConfiguredCraft craft = configuration.based_on.empty()
                              ? unedited(model)
                              : edited(model, configuration_named(model, configuration.based_on));
  for (const Edit& edit : configuration.edits)
    apply(model, edit, configuration.name, craft);
  add_parts(model, configuration, craft);
  return craft;
}

/// Names of entries written out as the names of their parts in this configuration, so that nobody
/// further on needs to know of entries. A name of no part stays: its user says what is missing.
std::vector<std::string> written_out(const std::vector<std::string>& names,
                                     const ConfiguredCraft& craft)
{
  std::vector<std::string> parts;
  for (const std::string& name : names)
  {
    const std::size_t before = parts.size();
    for (const PlatePart& plate : craft.plates)
      if (addresses(name, plate))
        parts.push_back(plate.name);
    for (const MemberPart& member : craft.members)
      if (addresses(name, member))
        parts.push_back(member.name);
    if (parts.size() == before)
      parts.push_back(name);
  }
  return parts;
}

std::vector<Joint> written_out(const std::vector<Joint>& joints, const ConfiguredCraft& craft)
{
  std::vector<Joint> all;
  for (const Joint& joint : joints)
    for (const std::string& part : written_out(std::vector<std::string>{joint.part}, craft))
    {
      const bool has_own =
          part != joint.part && std::any_of(joints.begin(), joints.end(),
                                            [&](const Joint& other) { return other.part == part; });
      if (has_own) // a piece of the part, fastened already
        continue;
      all.push_back(joint);
      all.back().part = part;
    }
  return all;
}
} // namespace

ConfiguredCraft configured(const Model& model, const std::string& configuration)
{
  ConfiguredCraft craft = edited(model, configuration_named(model, configuration));
  craft.joints = written_out(craft.joints, craft);
  for (Equipment& item : craft.equipment)
    for (FootprintArea& footprint : item.footprints)
      footprint.parts = written_out(footprint.parts, craft);
  for (Tank& tank : craft.tanks)
    for (Collar& collar : tank.collars)
      for (Foot& foot : collar.feet)
        foot.footprint.parts = written_out(foot.footprint.parts, craft);
  return craft;
}

std::vector<std::string> warnings(const Model& model)
{
  std::vector<std::string> lines;
  for (const Tank& tank : model.tanks)
  {
    if (!tank.growth)
      continue;
    const double most = tank.fibre_ultimate_strain / tank.burst_ratio;
    const auto warn = [&](std::string_view what, double strain)
    {
      if (std::abs(strain) > most)
        lines.push_back(fmt::format(
            "{}: stated growth of {} is a strain of {:.2g} %, more than fibre ultimate over burst "
            "ratio {:.2g} %: an installation allowance, not a growth",
            tank.name, what, 100.0 * strain, 100.0 * most));
    };
    warn("length", tank.growth->length_change / tank.growth->gauge_length);
    warn("diameter", tank.growth->diameter_change / tank.growth->diameter);
  }
  return lines;
}
} // namespace carlin
