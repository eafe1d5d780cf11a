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

/// Fills utilisation and verdict from demand, limit and sense: met up to a utilisation of 1.
/// Demands count by magnitude; of limits from below the sign counts, and nothing left is not met. A
/// limit of 0 allows nothing. Without a limit there is no utilisation and the check is not judged.
Check judged(Check check);

/// Order of tables: not met, not judged (said before what is met), met; each by utilisation, then
/// by demand.
bool is_worse(const Check& a, const Check& b);

/// A criterion with its default limit, overridable in the model by name.
struct Criterion
{
  std::string name;                    ///< key in the model file
  std::string text;                    ///< what it limits
  std::string dimension_unit;          ///< SI; "-" for a number
  std::optional<double> default_limit; ///< absent: not judged unless the model gives one
  std::string formula, source;
};
const std::vector<Criterion>& known_criteria();

/// Limit of a criterion: the model's, or the default. @pre `name` is one of known_criteria().
std::optional<double> criterion_limit(const Model& model, const std::string& name);

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
  std::shared_ptr<const HullSolver> solver; ///< empty on a rigid bed
  MassProperties mass_properties;           ///< tanks as they are aboard, full
  std::vector<MassEntry> mass_account;      ///< incl. tanks and contents
  std::vector<Panel> panels;
  GirderStiffness stiffness;
  std::vector<CaseSolution> cases;
  std::vector<FootRef> feet;
  std::vector<Footprint> footprints; ///< one a foot; empty on a rigid bed
};

/// Checks of one configuration, worst first. One line per criterion and part (and collar), the
/// governing case and stage named.
/// @param base For stiffness ratios; may be the same object.
/// @throws SolveError for a stage whose displacements are not finite.
std::vector<Check> make_checks(const Model& model, const ConfigurationSolution& configuration,
                               const ConfigurationSolution& base);
} // namespace carlin
