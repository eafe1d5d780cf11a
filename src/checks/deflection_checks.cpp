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

void add_panel(const StageContext& context, const Panel& panel, Envelope& envelope)
{
  const MeshPart& part = part_of(context, panel.part);
  Check check = stage_check(context, "panel deflection", part.name);
  check.demand =
      panel_deflection(*context.configuration.structure, panel, context.stage.displacement);
  check.remark = coarse_remark(panel);
  limit_by_span(check, context,
                part.plate_kind == PlateKind::bulkhead ? "bulkhead_panel_deflection"
                                                       : "panel_deflection",
                panel.short_side);
  envelope.put(std::move(check), panel.centre);
}

std::string member_criterion(const MeshPart& part)
{
  const bool is_deck = part.surface == Surface::deck;
  if (part.is_primary)
    return is_deck ? "deck_primary_member_deflection" : "primary_member_deflection";
  return is_deck ? "deck_member_deflection" : "member_deflection";
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
  for (const Panel& panel : context.configuration.panels)
    add_panel(context, panel, envelope);
  for (const MemberDeflection& found :
       member_deflections(*context.configuration.structure, context.stage.displacement))
  {
    const MeshPart& part = part_of(context, found.part);
    Check check = stage_check(context, "member deflection", part.name);
    check.demand = found.deflection;
    limit_by_span(check, context, member_criterion(part), found.span);
    envelope.put(std::move(check), found.place);
  }
  add_girder(context, envelope);
}
} // namespace carlin
