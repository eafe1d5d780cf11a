#include "envelope.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace carlin
{
namespace
{
struct Ratio
{
  std::string name, criterion, load_case;
  double found = 0.0;
};

void add_ratio(const CheckContext& context, const BayStiffness& bay, const std::string& subject,
               const Ratio& ratio, const std::string& weight_remark, Envelope& envelope)
{
  Check check;
  check.name = ratio.name;
  check.subject = subject;
  check.configuration = context.configuration.craft.name;
  check.load_case = ratio.load_case;
  check.demand = ratio.found;
  check.limit_from_below = true;
  check.unit = "-";
  cite(check, context.model, ratio.criterion);
  if (bay.near_loaded_section)
    check.remark = "within one depth of a loaded end section: shown, not judged";
  else
    check.limit = criterion_limit(context.model, ratio.criterion);
  check.remark = joined_remarks({check.remark, weight_remark});
  envelope.put(std::move(check), std::nullopt);
}

/// Says aloud that the main comparison could not be made.
void add_missing_bays(const CheckContext& context, Envelope& envelope)
{
  if (!context.model.hull)
    return;
  Check check;
  check.name = "bending stiffness";
  check.subject = "hull";
  check.configuration = context.configuration.craft.name;
  check.load_case = "unit bending";
  check.unit = "-";
  cite(check, context.model, "bending_stiffness_ratio");
  check.remark = "the base has fewer than two upright bulkheads; name the stations that bound the "
                 "bays, stiffness: {bays: [...]}";
  envelope.put(std::move(check), std::nullopt);
}

void add_bay(const CheckContext& context, const BayStiffness& bay, const BayStiffness& base,
             const std::string& subject, const std::string& weight_remark, Envelope& envelope)
{
  add_ratio(
      context, bay, subject,
      {"bending stiffness", "bending_stiffness_ratio", "unit bending", bay.bending / base.bending},
      weight_remark, envelope);
  add_ratio(context, bay, subject,
            {"torsional stiffness", "torsion_stiffness_ratio", "unit torsion",
             bay.torsion / base.torsion},
            weight_remark, envelope);
}
} // namespace

void add_stiffness_checks(const CheckContext& context, const ConfigurationSolution& base,
                          Envelope& envelope)
{
  const GirderStiffness& found = context.configuration.stiffness;
  if (&base == &context.configuration)
    return; // nothing to compare with
  if (found.bays.empty() || base.stiffness.bays.empty())
  {
    add_missing_bays(context, envelope);
    return;
  }
  std::string weight;
  if (base.mass_properties.mass > 0.0)
    weight = fmt::format("the craft weighs {:.3f} times the base",
                         context.configuration.mass_properties.mass / base.mass_properties.mass);
  for (const BayStiffness& bay : found.bays)
  {
    const auto same =
        std::ranges::find_if(base.stiffness.bays, [&](const BayStiffness& other)
                             { return other.from == bay.from && other.to == bay.to; });
    if (same != base.stiffness.bays.end())
      add_bay(context, bay, *same, fmt::format("{} to {}", bay.from, bay.to), weight, envelope);
  }
  add_bay(context, found.whole, base.stiffness.whole,
          fmt::format("whole, {} to {}", found.whole.from, found.whole.to), weight, envelope);
}
} // namespace carlin
