#include "envelope.hpp"

#include "carlin/checks/checks.hpp"

namespace carlin
{
std::vector<Check> make_checks(const Model& model, const ConfigurationSolution& configuration,
                               const ConfigurationSolution& base)
{
  Envelope envelope(configuration);
  add_stiffness_checks({model, configuration}, base, envelope);
  for (const CaseSolution& load_case : configuration.cases)
    for (const StageSolution& stage : load_case.stages)
    {
      const StageContext context{model, configuration, load_case, stage};
      if (configuration.structure) // tanks on a rigid bed have none
      {
        add_stress_checks(context, envelope);
        add_deflection_checks(context, envelope);
      }
      add_mount_checks(context, envelope);
    }
  return envelope.checks();
}
} // namespace carlin
