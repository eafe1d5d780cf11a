#include "carlin/checks/checks.hpp"

#include <algorithm>
#include <cassert>

namespace carlin
{
namespace
{
// Sources, each with its status in the loads book.
const std::string stress_rule =
    "Lloyd's Register, Rules for Special Service Craft, aluminium, fractions of 0.2 % proof "
    "(confirmed; for aluminium, other metals common practice)";
const std::string deflection_rule =
    "Lloyd's Register, Rules for Special Service Craft 2022, Part 8 "
    "Chapter 7 section 2 (confirmed; stated for laminates, other "
    "materials common practice)";
const std::string practice = "common practice, no source";

std::vector<Criterion> stress_criteria()
{
  return {{"plate_stress_service", "plate stress in service cases", "-", 0.75,
           "nominal von Mises <= fraction x yield",
           stress_rule + ": plating outside the slamming zone"},
          {"plate_stress_rare", "plate stress in rare cases", "-", 0.85,
           "nominal von Mises <= fraction x yield", stress_rule + ": plating in the slamming zone"},
          {"plate_stress_accidental", "plate stress in accidental cases", "-", 1.0,
           "nominal von Mises <= fraction x yield", practice},
          {"member_stress_service", "member stress in service cases", "-", 0.65,
           "axial and bending stress <= fraction x yield",
           stress_rule + ": stiffeners outside the slamming zone and primary members"},
          {"member_stress_rare", "member stress in rare cases", "-", 0.75,
           "axial and bending stress <= fraction x yield",
           stress_rule + ": stiffeners in the slamming zone"},
          {"member_stress_accidental", "member stress in accidental cases", "-", 1.0,
           "axial and bending stress <= fraction x yield", practice},
          {"member_shear_service", "mean shear stress of members in service cases", "-", 0.65,
           "mean shear stress <= fraction x yield / sqrt(3)",
           stress_rule + ": stiffeners outside the slamming zone and primary members"},
          {"member_shear_rare", "mean shear stress of members in rare cases", "-", 0.75,
           "mean shear stress <= fraction x yield / sqrt(3)",
           stress_rule + ": stiffeners in the slamming zone"},
          {"member_shear_accidental", "mean shear stress of members in accidental cases", "-", 1.0,
           "mean shear stress <= fraction x yield / sqrt(3)", practice}};
}

std::vector<Criterion> deflection_criteria()
{
  return {{"panel_deflection", "short side of a panel over its deflection", "-", 100.0,
           "deflection <= short side / factor", deflection_rule + ": bottom, side and deck"},
          {"bulkhead_panel_deflection", "short side of a bulkhead panel over its deflection", "-",
           50.0, "deflection <= short side / factor", deflection_rule + ": watertight bulkheads"},
          {"member_deflection", "span of a secondary member over its deflection", "-", 150.0,
           "deflection <= span / factor",
           deflection_rule + ": bottom, side and bulkhead stiffeners"},
          {"primary_member_deflection", "span of a primary member over its deflection", "-", 200.0,
           "deflection <= span / factor", deflection_rule + ": bottom and side primary members"},
          {"deck_member_deflection", "span of a secondary deck member over its deflection", "-",
           200.0, "deflection <= span / factor", deflection_rule + ": strength deck, secondary"},
          {"deck_primary_member_deflection", "span of a primary deck member over its deflection",
           "-", 250.0, "deflection <= span / factor", deflection_rule + ": strength deck, primary"},
          {"girder_deflection", "chord of the girder over its deflection", "-", std::nullopt,
           "deflection <= chord / factor",
           "no published limit for small craft; the designer's own, from the model"}};
}

std::vector<Criterion> other_criteria()
{
  return {
      {"joint_load", "load of a joint per metre", "N/m", std::nullopt,
       "sqrt(along^2 + across^2 + normal^2) <= limit",
       "strength of bond, weld or bolts as the designer gives it in the model"},
      {"bending_stiffness_ratio", "bending stiffness over that of the base, per bay and whole", "-",
       1.0, "EI / EI of the base >= limit", practice},
      {"torsion_stiffness_ratio", "torsional stiffness over that of the base, per bay and whole",
       "-", 0.9, "GJ / GJ of the base >= limit", practice + " (0.9 to 1.0 in use)"},
      {"deck_buckling", "part of its buckling load that a deck panel carries", "-", 0.8,
       "sum of compression / critical + (shear / critical)^2 <= limit",
       "formula: Timoshenko & Gere, Theory of Elastic Stability (1961), exact; limit: " + practice},
      {"stroke_used", "part of a collar's stroke that may be used", "-", 0.7,
       "stroke left >= (1 - fraction) x stroke", practice},
      {"grip_used", "part of a fixed collar's grip that may be used", "-", 1.0,
       "axial and turning force together <= fraction x grip at its low end", practice}};
}

std::vector<Criterion> all_criteria()
{
  std::vector<Criterion> all = stress_criteria();
  for (const auto& more : {deflection_criteria(), other_criteria()})
    all.insert(all.end(), more.begin(), more.end());
  return all;
}
} // namespace

const std::vector<Criterion>& known_criteria()
{
  static const std::vector<Criterion> criteria = all_criteria();
  return criteria;
}

std::optional<double> criterion_limit(const Model& model, const std::string& name)
{
  const auto given = model.criteria.limits.find(name);
  if (given != model.criteria.limits.end())
    return given->second;
  const auto known = std::ranges::find(known_criteria(), name, &Criterion::name);
  assert(known != known_criteria().end());
  return known->default_limit;
}
} // namespace carlin
