#pragma once

#include "carlin/checks/checks.hpp"

#include <map>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace carlin
{
/// What all checks of one configuration need to know.
struct CheckContext
{
  const Model& model;
  const ConfigurationSolution& configuration;
};

/// What all checks of one stage need to know.
struct StageContext
{
  const Model& model;
  const ConfigurationSolution& configuration;
  const CaseSolution& load_case;
  const StageSolution& stage;
  const std::vector<MemberSpan>& member_spans;
};

/// Of a list of readings the worst of each subject: position in the list by subject's index, so
/// that words are made once a subject and not once an element.
/// @param subject_of, demand_of Functions of a position.
template <typename SubjectOf, typename DemandOf>
std::map<Index, std::size_t> worst_of_each(std::size_t count, SubjectOf subject_of,
                                           DemandOf demand_of)
{
  std::map<Index, std::size_t> worst;
  for (std::size_t i = 0; i < count; ++i)
  {
    const auto [place, is_new] = worst.emplace(subject_of(i), i);
    // Not "greater": a demand that is no number must be kept, to be judged not met. And the first
    // of equals, whatever the round-off between port and starboard.
    if (!is_new && !(demand_of(i) <= demand_of(place->second) * (1.0 + 1e-9)))
      place->second = i;
  }
  return worst;
}

/// Keeps the worst of all checks of the same criterion and subject.
class Envelope
{
public:
  explicit Envelope(const ConfigurationSolution& configuration) : configuration_(configuration) {}

  /// Judges a check and keeps it if it is the worst of its name and subject so far.
  /// @param position Where; put into words only for what is kept in the end. None: no place.
  void put(Check check, const std::optional<Vector3>& position);
  /// The same for one whose verdict is already filled in.
  void put_judged(Check check, const std::optional<Vector3>& position);

  /// All that were kept, worst first.
  std::vector<Check> checks() const;

private:
  const ConfigurationSolution& configuration_;
  std::map<std::pair<std::string, std::string>, std::pair<Check, std::optional<Vector3>>> worst_;
};

/// A check with what the stage says about it: configuration, case, stage and class.
Check stage_check(const StageContext& context, std::string name, std::string subject);

/// Name of the criterion with limits of its own for each class: "plate_stress" -> "..._rare".
std::string class_criterion(const std::string& name, CaseClass load_class);

/// The criterion's formula and source; the model where the limit was given there.
void cite(Check& check, const Model& model, const std::string& criterion);

void add_stress_checks(const StageContext& context, Envelope& envelope);
void add_deflection_checks(const StageContext& context, Envelope& envelope);
void add_mount_checks(const StageContext& context, Envelope& envelope);
void add_stiffness_checks(const CheckContext& context, const ConfigurationSolution& base,
                          Envelope& envelope);

/// Yield of the material of a part, welded where it is known.
struct PartStrength
{
  std::string material;
  std::optional<double> yield; ///< [Pa]
  bool is_welded = false;
  double youngs_modulus = 0.0, poissons_ratio = 0.0;
};
PartStrength part_strength(const Model& model, const MeshPart& part);

/// "mesh too coarse here: 3 cells across" below the count from which bending is trusted; else
/// empty.
std::string coarse_remark(const Panel& panel);
/// Parts of a remark that are not empty, with "; " between them.
std::string joined_remarks(const std::vector<std::string>& remarks);
} // namespace carlin
