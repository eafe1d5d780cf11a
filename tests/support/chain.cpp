#include "chain.hpp"

#include <stdexcept>

namespace chain
{
using namespace carlin;

const StageSolution& Run::stage(const std::string& name, const std::string& load_case) const
{
  for (const CaseSolution& solved : first().cases)
    if (load_case.empty() || solved.name == load_case)
      for (const StageSolution& found : solved.stages)
        if (found.name == name)
          return found;
  throw std::runtime_error("no stage " + name);
}

Vector6 Run::displacement(const std::string& point, const std::string& stage_name) const
{
  const Index node = node_at(*first().structure, point);
  return stage(stage_name).displacement.segment<6>(6 * node);
}

Vector6 Run::reaction(const std::string& point, const std::string& stage_name) const
{
  const StageSolution& found = stage(stage_name);
  const Index node = node_at(*first().structure, point);
  const VectorX values = first().solver->reactions(found.displacement, found.applied);
  const std::vector<Index>& held = first().solver->held_freedoms();
  Vector6 at_point = Vector6::Zero();
  for (std::size_t h = 0; h < held.size(); ++h)
    if (held[h] / 6 == node)
      at_point[held[h] % 6] = values[static_cast<Index>(h)];
  return at_point;
}

const TankResult& Run::tank(const std::string& stage_name, Index tank) const
{
  return stage(stage_name).mounts_high.tanks.at(static_cast<std::size_t>(tank));
}

const CollarResult& Run::collar(const std::string& name, const std::string& stage_name,
                                Index tank_index) const
{
  const Tank& described = first().craft.tanks.at(static_cast<std::size_t>(tank_index));
  for (std::size_t c = 0; c < described.collars.size(); ++c)
    if (described.collars[c].name == name)
      return tank(stage_name, tank_index).collars.at(c);
  throw std::runtime_error("no collar " + name);
}

Run run(const std::string& name)
{
  const std::filesystem::path file =
      std::filesystem::path(CARLIN_SOURCE_DIR) / "tests/verification/models" / (name + ".yaml");
  return {run_job(read_model(file), {})};
}

Run run_text(const std::string& text) { return {run_job(read_model_text(text, "test.yaml"), {})}; }
} // namespace chain
