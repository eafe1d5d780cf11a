#include "envelope.hpp"

#include <algorithm>
#include <cassert>
#include <fmt/format.h>

namespace carlin
{
namespace
{
std::string place_of(const ConfigurationSolution& configuration, const Vector3& position)
{
  if (configuration.mesh)
    return configuration.mesh->place(position);
  return fmt::format("x {:.2f} m, y {:.2f} m, z {:.2f} m", position.x(), position.y(),
                     position.z());
}

template <typename Entry>
const Entry& named(const std::vector<Entry>& entries, const std::string& name)
{
  const auto found = std::ranges::find(entries, name, [](const Entry& e) { return e.name; });
  assert(found != entries.end()); // the reader has checked every name
  return *found;
}
} // namespace

void Envelope::put(Check check, const std::optional<Vector3>& position)
{
  put_judged(judged(std::move(check)), position);
}

void Envelope::put_judged(Check check, const std::optional<Vector3>& position)
{
  const std::pair key{check.name, check.subject};
  const auto found = worst_.find(key);
  if (found == worst_.end())
    worst_.emplace(key, std::pair{std::move(check), position});
  else if (is_worse(check, found->second.first))
    found->second = {std::move(check), position};
}

std::vector<Check> Envelope::checks() const
{
  std::vector<Check> result;
  for (const auto& [key, kept] : worst_)
  {
    result.push_back(kept.first);
    if (kept.second)
      result.back().place = place_of(configuration_, *kept.second);
  }
  std::ranges::stable_sort(result, is_worse);
  return result;
}

Check stage_check(const StageContext& context, std::string name, std::string subject)
{
  Check check;
  check.name = std::move(name);
  check.subject = std::move(subject);
  check.configuration = context.configuration.craft.name;
  check.load_case = context.load_case.name;
  check.stage = context.stage.name;
  check.load_class = context.load_case.load_class;
  return check;
}

std::string class_criterion(const std::string& name, CaseClass load_class)
{
  switch (load_class)
  {
  case CaseClass::service:
    return name + "_service";
  case CaseClass::rare:
    return name + "_rare";
  case CaseClass::accidental:
    return name + "_accidental";
  }
  assert(false);
  return name;
}

void cite(Check& check, const Model& model, const std::string& criterion)
{
  const auto known = std::ranges::find(known_criteria(), criterion, &Criterion::name);
  assert(known != known_criteria().end());
  check.formula = known->formula;
  check.source =
      model.criteria.limits.contains(criterion) ? "criteria of the model" : known->source;
}

PartStrength part_strength(const Model& model, const MeshPart& part)
{
  const std::string& name = part.kind == MeshPart::Kind::plate
                                ? named(model.schedules, part.material_use).material
                                : named(model.profiles, part.material_use).material;
  const Material& material = named(model.materials, name);
  PartStrength strength;
  strength.material = name;
  strength.is_welded = material.welded_yield_strength.has_value();
  strength.yield = strength.is_welded ? material.welded_yield_strength : material.yield_strength;
  strength.youngs_modulus = material.youngs_modulus;
  strength.poissons_ratio = material.poissons_ratio;
  return strength;
}

std::string coarse_remark(const Panel& panel)
{
  if (panel.cells_across >= fine_cells_across)
    return {};
  return fmt::format("mesh too coarse here: {} cell{} across", panel.cells_across,
                     panel.cells_across == 1 ? "" : "s");
}

std::string joined_remarks(const std::vector<std::string>& remarks)
{
  std::string text;
  for (const std::string& remark : remarks)
    if (!remark.empty())
      text += text.empty() ? remark : "; " + remark;
  return text;
}
} // namespace carlin
