#include "envelope.hpp"

#include "carlin/checks/checks.hpp"
#include "carlin/core/error.hpp"

#include <fmt/format.h>

namespace carlin
{
std::vector<Check> make_checks(const Model& model, const ConfigurationSolution& configuration,
                               const ConfigurationSolution& base)
{
  Envelope envelope(configuration);
  add_stiffness_checks({model, configuration}, base, envelope);
  std::vector<MemberSpan> spans;
  if (configuration.structure) // tanks on a rigid bed have none
    spans = member_spans(*configuration.structure);
  for (const CaseSolution& load_case : configuration.cases)
    for (const StageSolution& stage : load_case.stages)
    {
      const StageContext context{model, configuration, load_case, stage, spans};
      if (!stage.displacement.allFinite()) // a maximum over readings would pass it by
        throw SolveError(fmt::format("case '{}', stage '{}': displacements are not finite; please "
                                     "report it with the model file",
                                     load_case.name, stage.name));
      if (configuration.structure &&
          stage.displacement.size() > 0) // a tank not held ends the history
      {
        add_stress_checks(context, envelope);
        add_deflection_checks(context, envelope);
      }
      add_mount_checks(context, envelope);
    }
  return envelope.checks();
}
} // namespace carlin
