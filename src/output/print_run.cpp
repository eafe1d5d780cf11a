#include "handy_unit.hpp"
#include "mass_changes.hpp"
#include "text_table.hpp"

#include "carlin/output/output.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <numbers>
#include <ostream>

namespace carlin
{
namespace
{
constexpr double degree = std::numbers::pi / 180.0;

std::string ratio(double value, double of)
{
  return of > 0.0 && value > 0.0 ? fmt::format("{:.3f}", value / of) : "-";
}

std::vector<std::string> stiffness_row(const BayStiffness& bay, const BayStiffness* base,
                                       const std::string& what)
{
  return {what,
          fmt::format("{:.2f}", bay.length),
          figures(bay.bending * 1e-6),
          base != nullptr ? ratio(bay.bending, base->bending) : "-",
          figures(bay.torsion * 1e-6),
          figures(bay.torsion_per_angle * 1e-3 * degree),
          base != nullptr ? ratio(bay.torsion, base->torsion) : "-",
          bay.near_loaded_section ? "near the loaded end: not judged" : ""};
}

const BayStiffness* same_bay(const GirderStiffness& base, const BayStiffness& bay)
{
  const auto found = std::ranges::find_if(base.bays, [&](const BayStiffness& other)
                                          { return other.from == bay.from && other.to == bay.to; });
  return found == base.bays.end() ? nullptr : &*found;
}

void print_stiffness_of(std::ostream& out, const ConfigurationSolution& configuration,
                        const GirderStiffness& base)
{
  const GirderStiffness& girder = configuration.stiffness;
  out << fmt::format("stiffness, {}\n", configuration.craft.name);
  TextTable table;
  table.columns = {{"bay", Align::left, 16},      {"length m", Align::right, 0},
                   {"EI MN m2", Align::right, 0}, {"of base", Align::right, 0},
                   {"GJ MN m2", Align::right, 0}, {"kNm/deg", Align::right, 0},
                   {"of base", Align::right, 0},  {"", Align::left, 4}};
  for (const BayStiffness& bay : girder.bays)
    table.rows.push_back(stiffness_row(bay, same_bay(base, bay), bay.from + " to " + bay.to));
  if (girder.whole.length > 0.0)
    table.rows.push_back(stiffness_row(girder.whole, &base.whole, "whole"));
  print_table(out, table);
  if (girder.shear > 0.0)
    out << fmt::format("shear stiffness GA {} MN ({} of base)\n", figures(girder.shear * 1e-6),
                       ratio(girder.shear, base.shear));
  out << '\n';
}
} // namespace

void print_quality(std::ostream& out, const MeshQuality& quality)
{
  out << fmt::format("mesh: {} cells, {} points, mean side {:.0f} mm\n", quality.cells,
                     quality.points_used, quality.mean_side * 1e3);
  TextTable table;
  table.columns = {
      {"quality", Align::left, 0}, {"largest", Align::right, 0}, {"at", Align::left, 20}};
  table.rows = {{"aspect, longest over shortest side",
                 fmt::format("{:.1f}", quality.largest_aspect), quality.largest_aspect_place},
                {"skew of a corner from 90 deg",
                 fmt::format("{:.0f} deg", quality.largest_skew / degree),
                 quality.largest_skew_place},
                {"warp, over the mean side", fmt::format("{:.3f}", quality.largest_warp),
                 quality.largest_warp_place}};
  print_table(out, table);
  out << fmt::format("fewest cells: {} across a panel, {} along a span\n",
                     quality.fewest_cells_per_panel, quality.fewest_cells_per_span);
}

void print_masses(std::ostream& out, const RunResult& result)
{
  const std::vector<MassRow> rows = mass_rows(result.configurations);
  const MassRow total = total_of(rows);
  TextTable table;
  table.columns = {{"mass", Align::left, 12}};
  for (const ConfigurationSolution& configuration : result.configurations)
  {
    table.columns.push_back({configuration.craft.name + " kg", Align::right, 8});
    if (&configuration != &result.configurations.front())
      table.columns.push_back({"change kg", Align::right, 0});
  }
  const auto add = [&](const std::string& name, const MassRow& row)
  {
    std::vector<std::string> texts{name};
    for (std::size_t c = 0; c < row.masses.size(); ++c)
    {
      texts.push_back(fmt::format("{:.1f}", row.masses[c]));
      if (c > 0)
        texts.push_back(fmt::format("{:+.1f}", row.masses[c] - row.masses[0]));
    }
    table.rows.push_back(texts);
  };
  for (const MassRow& group : by_group(rows))
    add(group.group, group);
  add("total", total);
  if (result.configurations.empty() || rows.empty())
    return;
  for (const auto& [name, axis] :
       {std::pair{"centre x m", 0}, {"centre y m", 1}, {"centre z m", 2}})
  {
    std::vector<std::string> texts{name};
    for (std::size_t c = 0; c < total.masses.size(); ++c)
    {
      texts.push_back(fmt::format("{:.3f}", total.centres[c][axis]));
      if (c > 0)
        texts.push_back(fmt::format("{:+.3f}", total.centres[c][axis] - total.centres[0][axis]));
    }
    table.rows.push_back(texts);
  }
  print_table(out, table);
}

void print_stiffness(std::ostream& out, const RunResult& result)
{
  if (result.configurations.empty())
    return;
  bool is_any = false;
  for (const ConfigurationSolution& configuration : result.configurations)
    if (!configuration.stiffness.bays.empty() || configuration.stiffness.whole.length > 0.0)
    {
      print_stiffness_of(out, configuration, result.configurations.front().stiffness);
      is_any = true;
    }
  if (is_any)
    print_wrapped(out,
                  "The GJ of an open bay depends on its neighbours, which hold its warping: it is "
                  "a measure of this hull under the same loads before and after, not a section "
                  "property.",
                  0);
}

void print_audit(std::ostream& out, const RunResult& result)
{
  const Audit& audit = result.audit;
  TextTable table;
  table.columns = {{"audit", Align::left, 0}, {"largest", Align::right, 0}};
  table.rows = {
      {"pin reactions over the load", fmt::format("{:.1e}", audit.largest_pin_reaction)},
      {"solver residual |K u - f| / |f|", fmt::format("{:.1e}", audit.largest_solver_residual)},
      {"force out of balance over the load", fmt::format("{:.1e}", audit.largest_force_imbalance)},
      {"mounts out of equilibrium", fmt::format("{:.1e}", audit.largest_mount_residual)}};
  print_table(out, table);
  if (audit.displacement_stated > 0.0)
    out << fmt::format(
        "displacement of the base: modelled {:.0f} kg, stated {:.0f} kg ({:+.2f} %)\n",
        audit.displacement_modelled, audit.displacement_stated,
        100.0 * (audit.displacement_modelled / audit.displacement_stated - 1.0));
  else
    out << fmt::format("displacement of the base: modelled {:.0f} kg, none stated\n",
                       audit.displacement_modelled);
  if (const auto& stated = result.model.craft.centre_of_gravity;
      stated && audit.displacement_stated > 0.0 && !result.configurations.empty())
  {
    const Vector3 off = result.configurations.front().mass_properties.centre - *stated;
    out << fmt::format("centre of gravity of the base less the stated one: x {:+.3f}, y {:+.3f}, z "
                       "{:+.3f} m\n(the outfit is spread so that x agrees; y and z follow from the "
                       "hull's shape)\n",
                       off.x(), off.y(), off.z());
  }
  for (const Timing& timing : result.timings)
    out << fmt::format("{:8.2f} s  {}\n", timing.seconds, timing.stage);
}
} // namespace carlin
