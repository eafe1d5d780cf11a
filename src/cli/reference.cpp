#include "commands.hpp"

#include "carlin/description/model.hpp"

#include <iostream>

namespace carlin::cli
{
void add_reference_command(CLI::App& app, int& status)
{
  CLI::App* command =
      app.add_subcommand("reference", "Print the reference of the model file (Markdown)");
  command->footer("Example: carlin reference > REFERENCE.md");
  command->callback(
      [&status]
      {
        std::cout << model_reference();
        status = 0;
      });
}
} // namespace carlin::cli
