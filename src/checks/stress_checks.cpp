#include "envelope.hpp"

#include "carlin/checks/buckling.hpp"

#include <cmath>
#include <fmt/format.h>
#include <numbers>

namespace carlin
{
namespace
{
constexpr double megapascal = 1e6; // remarks are read by people

const MeshPart& part_of(const StageContext& context, Index part)
{
  return context.configuration.mesh->parts[static_cast<std::size_t>(part)];
}

/// Limit of a stress check: fraction times yield times `factor`, and what the line says about it.
void limit_by_yield(Check& check, const StageContext& context, const std::string& criterion,
                    const PartStrength& strength, double factor)
{
  const std::string name = class_criterion(criterion, context.load_case.load_class);
  cite(check, context.model, name);
  const std::optional<double> fraction = criterion_limit(context.model, name);
  if (!strength.yield)
  {
    check.remark = joined_remarks(
        {fmt::format("give the yield strength of {}, welded or parent", strength.material),
         check.remark});
    return;
  }
  check.limit = *fraction * factor * *strength.yield;
  check.formula =
      fmt::format("{}: {:g} x {} yield {:.4g} MPa", check.formula, *fraction,
                  strength.is_welded ? "welded" : "parent", *strength.yield / megapascal);
  if (!strength.is_welded)
    check.remark =
        joined_remarks({check.remark, fmt::format("no welded strength of {} given: parent yield",
                                                  strength.material)});
}

std::string stress_remark(const Panel& panel, const PanelStress& stress)
{
  std::string coarse = coarse_remark(panel);
  if (!coarse.empty() && stress.bending_closed_form > stress.bending_found)
    coarse +=
        fmt::format(", {:.3g} MPa found; clamped panel formula {:.3g} MPa stands in",
                    stress.bending_found / megapascal, stress.bending_closed_form / megapascal);
  return joined_remarks(
      {coarse, fmt::format("peak {:.3g} MPa as found, moves with the mesh, not judged",
                           stress.peak / megapascal)});
}

void add_plate(const StageContext& context, const Panel& panel, const PanelStress& stress,
               Envelope& envelope)
{
  const MeshPart& part = part_of(context, panel.part);
  const PartStrength strength = part_strength(context.model, part);
  Check check = stage_check(context, "plate stress", part.name);
  check.demand = stress.nominal;
  check.unit = "Pa";
  check.remark = stress_remark(panel, stress);
  limit_by_yield(check, context, "plate_stress", strength, 1.0);
  envelope.put(std::move(check), stress.place);

  if (part.surface != Surface::deck)
    return;
  const Shell& shell =
      context.configuration.structure->shells[static_cast<std::size_t>(panel.shells.front())];
  const ShellSection& section =
      context.configuration.structure->shell_sections[static_cast<std::size_t>(shell.section)];
  Check buckling = stage_check(context, "deck buckling", part.name);
  buckling.demand = buckling_usage({.youngs_modulus = strength.youngs_modulus,
                                    .poissons_ratio = strength.poissons_ratio,
                                    .thickness = section.thickness,
                                    .short_side = panel.short_side,
                                    .long_side = panel.long_side,
                                    .yield = strength.yield},
                                   stress.mean_membrane);
  buckling.limit = criterion_limit(context.model, "deck_buckling");
  buckling.unit = "-";
  cite(buckling, context.model, "deck_buckling");
  envelope.put(std::move(buckling), panel.centre);
}

void add_member(const StageContext& context, const Member& member, const MemberStress& stress,
                Envelope& envelope)
{
  const MeshPart& part = part_of(context, member.part);
  const PartStrength strength = part_strength(context.model, part);
  Check check = stage_check(context, "member stress", part.name);
  check.demand = stress.nominal;
  check.unit = "Pa";
  limit_by_yield(check, context, "member_stress", strength, 1.0);
  envelope.put(std::move(check), stress.place);

  Check shear = stage_check(context, "member shear", part.name);
  shear.demand = stress.shear;
  shear.unit = "Pa";
  limit_by_yield(shear, context, "member_shear", strength, 1.0 / std::numbers::sqrt3);
  envelope.put(std::move(shear), stress.place);
}

void add_joint(const StageContext& context, const JointLoad& load, Envelope& envelope)
{
  const Structure& structure = *context.configuration.structure;
  const Joint& joint = context.configuration.mesh->joints[static_cast<std::size_t>(load.joint)];
  const JointSpring& spring = structure.joints[static_cast<std::size_t>(load.spring)];
  Check check = stage_check(context, "joint load", joint.name);
  check.demand = Vector3(load.along, load.across, load.normal).norm();
  check.unit = "N/m";
  check.limit = criterion_limit(context.model, "joint_load");
  cite(check, context.model, "joint_load");
  check.remark =
      fmt::format("along {:.3g}, across {:.3g}, normal {:.3g} kN/m, slip {:.2g} mm",
                  load.along / 1e3, load.across / 1e3, load.normal / 1e3, load.slip * 1e3);
  if (!check.limit)
    check.remark += "; give joint_load, what bond, weld or bolts carry per metre";
  envelope.put(std::move(check), structure.nodes[static_cast<std::size_t>(spring.node_part)]);
}
} // namespace

void add_stress_checks(const StageContext& context, Envelope& envelope)
{
  const ConfigurationSolution& configuration = context.configuration;
  const Structure& structure = *configuration.structure;
  const std::vector<PanelStress> panels =
      panel_stresses(structure, configuration.panels, context.stage);
  for (std::size_t p = 0; p < panels.size(); ++p)
    add_plate(context, configuration.panels[p], panels[p], envelope);
  const std::vector<MemberStress> members = member_stresses(structure, context.stage);
  for (std::size_t m = 0; m < members.size(); ++m)
    add_member(context, structure.members[m], members[m], envelope);
  for (const JointLoad& load : joint_loads(structure, context.stage))
    add_joint(context, load, envelope);
}
} // namespace carlin
