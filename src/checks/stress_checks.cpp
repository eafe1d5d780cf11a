#include "envelope.hpp"

#include "carlin/checks/buckling.hpp"

#include <cmath>
#include <fmt/format.h>
#include <numbers>

namespace carlin
{
namespace
{
/// To a whole number of steps, without a minus before nothing.
double at_step(double value, double step) { return std::round(value / step) * step + 0.0; }

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

double deck_usage(const StageContext& context, const Panel& panel, const PanelStress& stress)
{
  const Structure& structure = *context.configuration.structure;
  const Shell& shell = structure.shells[static_cast<std::size_t>(panel.shells.front())];
  const PartStrength strength = part_strength(context.model, part_of(context, panel.part));
  return buckling_usage(
      {.youngs_modulus = strength.youngs_modulus,
       .poissons_ratio = strength.poissons_ratio,
       .thickness = structure.shell_sections[static_cast<std::size_t>(shell.section)].thickness,
       .short_side = panel.short_side,
       .long_side = panel.long_side,
       .yield = strength.yield},
      stress.mean_membrane);
}

void add_plates(const StageContext& context, Envelope& envelope)
{
  const std::vector<Panel>& panels = context.configuration.panels;
  const std::vector<PanelStress> stresses =
      panel_stresses(*context.configuration.structure, panels, context.stage);
  const auto part_at = [&](std::size_t p) { return panels[p].part; };
  for (const auto& [part, p] :
       worst_of_each(panels.size(), part_at, [&](std::size_t at) { return stresses[at].nominal; }))
  {
    Check check = stage_check(context, "plate stress", part_of(context, part).name);
    check.demand = stresses[p].nominal;
    check.unit = "Pa";
    check.remark = stress_remark(panels[p], stresses[p]);
    limit_by_yield(check, context, "plate_stress",
                   part_strength(context.model, part_of(context, part)), 1.0);
    envelope.put(std::move(check), stresses[p].place);
  }
  std::vector<double> usage(panels.size(), 0.0);
  for (std::size_t p = 0; p < panels.size(); ++p)
    if (part_of(context, panels[p].part).surface == Surface::deck)
      usage[p] = deck_usage(context, panels[p], stresses[p]);
  for (const auto& [part, p] :
       worst_of_each(panels.size(), part_at, [&](std::size_t at) { return usage[at]; }))
  {
    if (part_of(context, part).surface != Surface::deck)
      continue;
    Check check = stage_check(context, "deck buckling", part_of(context, part).name);
    check.demand = usage[p];
    check.limit = criterion_limit(context.model, "deck_buckling");
    check.unit = "-";
    cite(check, context.model, "deck_buckling");
    envelope.put(std::move(check), panels[p].centre);
  }
}

void add_members(const StageContext& context, Envelope& envelope)
{
  const Structure& structure = *context.configuration.structure;
  const std::vector<MemberStress> stresses = member_stresses(structure, context.stage);
  const auto part_at = [&](std::size_t m) { return structure.members[m].part; };
  const auto nominal = [&](std::size_t m) { return std::abs(stresses[m].nominal); };
  for (const auto& [part, m] : worst_of_each(stresses.size(), part_at, nominal))
  {
    Check check = stage_check(context, "member stress", part_of(context, part).name);
    check.demand = stresses[m].nominal;
    check.unit = "Pa";
    limit_by_yield(check, context, "member_stress",
                   part_strength(context.model, part_of(context, part)), 1.0);
    envelope.put(std::move(check), stresses[m].place);
  }
  const auto shear = [&](std::size_t m) { return stresses[m].shear; };
  for (const auto& [part, m] : worst_of_each(stresses.size(), part_at, shear))
  {
    Check check = stage_check(context, "member shear", part_of(context, part).name);
    check.demand = stresses[m].shear;
    check.unit = "Pa";
    limit_by_yield(check, context, "member_shear",
                   part_strength(context.model, part_of(context, part)), 1.0 / std::numbers::sqrt3);
    envelope.put(std::move(check), stresses[m].place);
  }
}

double resultant_of(const JointLoad& load)
{
  return Vector3(load.along, load.across, load.normal).norm();
}

void add_joints(const StageContext& context, Envelope& envelope)
{
  const Structure& structure = *context.configuration.structure;
  const std::vector<JointLoad> loads = joint_loads(structure, context.stage);
  const auto joint_at = [&](std::size_t i) { return loads[i].joint; };
  const auto demand = [&](std::size_t i) { return resultant_of(loads[i]); };
  for (const auto& [joint, i] : worst_of_each(loads.size(), joint_at, demand))
  {
    const JointLoad& load = loads[i];
    Check check =
        stage_check(context, "joint load",
                    context.configuration.mesh->joints[static_cast<std::size_t>(joint)].name);
    check.demand = resultant_of(load);
    check.unit = "N/m";
    check.limit = criterion_limit(context.model, "joint_load");
    cite(check, context.model, "joint_load");
    check.remark = fmt::format("along {:.2f}, across {:.2f}, normal {:.2f} kN/m, slip {:.3f} mm",
                               at_step(load.along / 1e3, 0.01), at_step(load.across / 1e3, 0.01),
                               at_step(load.normal / 1e3, 0.01), at_step(load.slip * 1e3, 0.001));
    if (!check.limit)
      check.remark += "; give joint_load, what bond, weld or bolts carry per metre";
    const JointSpring& spring = structure.joints[static_cast<std::size_t>(load.spring)];
    envelope.put(std::move(check), structure.nodes[static_cast<std::size_t>(spring.node_part)]);
  }
}
} // namespace

void add_stress_checks(const StageContext& context, Envelope& envelope)
{
  add_plates(context, envelope);
  add_members(context, envelope);
  add_joints(context, envelope);
}
} // namespace carlin
