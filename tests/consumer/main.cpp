#include <carlin/job/job.hpp>
#include <iostream>

// Prints the fewest facts that prove the whole chain is linked: one configuration, one case solved.
int main(int argument_count, char** arguments)
{
  if (argument_count != 2)
    return 2;
  const carlin::Model model = carlin::read_model(arguments[1]);
  carlin::JobOptions options;
  options.cases = {model.cases.front().name};
  const carlin::RunResult result = carlin::run_job(model, options);
  std::cout << result.checks.size() << " checks of " << model.craft.name << '\n';
  return result.checks.empty() ? 1 : 0;
}
