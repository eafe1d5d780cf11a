#include "envelope.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace carlin
{
namespace
{
const MeshPart& part_of(const StageContext& context, Index part)
{
  return context.configuration.mesh->parts[static_cast<std::size_t>(part)];
}

/// Limit: length over the criterion's factor.
void limit_by_span(Check& check, const StageContext& context, const std::string& criterion,
                   double span)
{
  cite(check, context.model, criterion);
  check.unit = std::string("m"); // assigning the literal trips a wrong warning of g++ 12
  const std::optional<double> factor = criterion_limit(context.model, criterion);
  if (!factor)
    return;
  check.limit = span / *factor;
  check.formula = fmt::format("{}: {:.0f} mm / {:g}", check.formula, span * 1e3, *factor);
}

void add_panels(const StageContext& context, Envelope& envelope)
{
  const std::vector<Panel>& panels = context.configuration.panels;
  std::vector<double> found;
  for (const Panel& panel : panels)
    found.push_back(
        panel_deflection(*context.configuration.structure, panel, context.stage.displacement));
  for (const auto& [part_index, p] : worst_of_each(
           panels.size(), [&](std::size_t at) { return panels[at].part; },
           [&](std::size_t at) { return std::abs(found[at]) / panels[at].short_side; }))
  {
    const MeshPart& part = part_of(context, part_index);
    Check check = stage_check(context, "panel deflection", part.name);
    check.demand = found[p];
    check.remark = coarse_remark(panels[p]);
    limit_by_span(check, context,
                  part.plate_kind == PlateKind::bulkhead ? "bulkhead_panel_deflection"
                                                         : "panel_deflection",
                  panels[p].short_side);
    if (panels[p].inner_nodes.empty()) // one cell across has no middle to read
      check.limit.reset();
    envelope.put(std::move(check), panels[p].centre);
  }
}

std::string member_criterion(const MeshPart& part)
{
  const bool is_deck = part.surface == Surface::deck;
  if (part.is_primary)
    return is_deck ? "deck_primary_member_deflection" : "primary_member_deflection";
  return is_deck ? "deck_member_deflection" : "member_deflection";
}

void add_members(const StageContext& context, Envelope& envelope)
{
  const std::vector<MemberDeflection> found = member_deflections(
      *context.configuration.structure, context.member_spans, context.stage.displacement);
  for (const auto& [part_index, i] : worst_of_each(
           found.size(), [&](std::size_t at) { return found[at].part; },
           [&](std::size_t at) { return std::abs(found[at].deflection) / found[at].span; }))
  {
    const MeshPart& part = part_of(context, part_index);
    Check check = stage_check(context, "member deflection", part.name);
    check.demand = found[i].deflection;
    limit_by_span(check, context, member_criterion(part), found[i].span);
    envelope.put(std::move(check), found[i].place);
  }
}

void add_girder(const StageContext& context, Envelope& envelope)
{
  const std::vector<std::string>& ends = context.model.girder_bulkheads;
  if (ends.size() != 2)
    return;
  const std::vector<NamedPlane>& stations = context.configuration.mesh->stations;
  const auto from = std::ranges::find(stations, ends[0], &NamedPlane::name);
  const auto to = std::ranges::find(stations, ends[1], &NamedPlane::name);
  if (from == stations.end() || to == stations.end())
    return; // no such stations without a hull; the reader checks the names of one
  const GirderDeflection girder = girder_deflection(
      *context.configuration.structure, context.stage.displacement,
      std::min(from->x_at_base, to->x_at_base), std::max(from->x_at_base, to->x_at_base));
  Check check =
      stage_check(context, "girder deflection", fmt::format("{} to {}", ends[0], ends[1]));
  check.demand = girder.deflection;
  limit_by_span(check, context, "girder_deflection", girder.chord);
  if (!check.limit)
    check.remark = fmt::format("chord / {:.0f}; no published limit for small craft: give "
                               "girder_deflection, chord over deflection",
                               girder.chord / std::max(std::abs(girder.deflection), 1e-12));
  envelope.put(std::move(check), Vector3(girder.x, 0.0, 0.0));
}
} // namespace

void add_deflection_checks(const StageContext& context, Envelope& envelope)
{
  if (context.load_case.load_class == CaseClass::accidental)
    return; // nothing need keep its shape in an accident
  add_panels(context, envelope);
  add_members(context, envelope);
  add_girder(context, envelope);
}
} // namespace carlin
