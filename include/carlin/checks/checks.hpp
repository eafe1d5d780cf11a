#pragma once

#include "carlin/recovery/recovery.hpp"

#include <memory>
#include <optional>
#include <string>
#include <vector>

namespace carlin
{
enum class Verdict
{
  met,
  not_met,
  not_judged ///< limit not given
};

/// One check, one line.
struct Check
{
  std::string name;    ///< criterion: "plate stress", "stroke left"
  std::string subject; ///< part, member, tank and collar
  std::string place;   ///< words and coordinates
  std::string configuration, load_case, stage;
  CaseClass load_class = CaseClass::service;
  double demand = 0.0; ///< what was found
  std::optional<double> limit;
  bool limit_from_below =
      false;        ///< stiffness, clearance, stroke left: utilisation is limit over found
  std::string unit; ///< SI unit of demand and limit
  std::optional<double> utilisation;
  Verdict verdict = Verdict::not_judged;
  std::string formula, source; ///< of the limit
  std::string remark;          ///< "mesh too coarse here: 3 cells across", "ask the maker for ..."
};

/// Fills utilisation and verdict from demand, limit and sense.
Check judged(Check check);

/// A criterion with its default limit, overridable in the model by name.
struct Criterion
{
  std::string name; ///< key in the model file
  std::string text; ///< what it limits
  std::string dimension_unit;
  double default_limit = 0.0;
  std::string formula, source;
};
const std::vector<Criterion>& known_criteria();

/// All stages of one case on one configuration.
struct CaseSolution
{
  std::string name;
  CaseClass load_class = CaseClass::service;
  std::vector<StageSolution> stages;
};

/// Everything found for one configuration.
struct ConfigurationSolution
{
  ConfiguredCraft craft;
  std::shared_ptr<const Mesh> mesh;
  std::shared_ptr<const Structure> structure;
  MassProperties mass_properties;      ///< tanks as they are aboard, full
  std::vector<MassEntry> mass_account; ///< incl. tanks and contents
  std::vector<Panel> panels;
  GirderStiffness stiffness;
  std::vector<CaseSolution> cases;
  std::vector<FootRef> feet;
  std::vector<Footprint> footprints; ///< one a foot; empty on a rigid bed
};

/// Checks of one configuration, worst first. One line per criterion and part (and collar), the
/// governing case and stage named.
/// @param base For stiffness ratios; may be the same object.
std::vector<Check> make_checks(const Model& model, const ConfigurationSolution& configuration,
                               const ConfigurationSolution& base);
} // namespace carlin
