#include "commands.hpp"

#include "carlin/core/error.hpp"

#include <CLI/CLI.hpp>
#include <exception>
#include <iostream>
#include <vtkObject.h>

namespace
{
constexpr int wrong_input = 2;
constexpr int could_not_finish = 3;

int run(int argument_count, char** arguments)
{
  CLI::App app("Carlin: tanks in a hull. Stiffness before and after, stresses, collars, checks.",
               "carlin");
  app.require_subcommand(1);
  app.set_version_flag("--version", "carlin " CARLIN_VERSION);
  app.footer("Example: carlin check models/starter.yaml --into results/starter");
  int status = 0;
  carlin::cli::add_check_command(app, status);
  carlin::cli::add_draw_command(app, status);
  carlin::cli::add_reference_command(app, status);
  try
  {
    app.parse(argument_count, arguments);
  }
  catch (const CLI::ParseError& error)
  {
    return app.exit(error) == 0 ? 0 : wrong_input;
  }
  return status;
}
} // namespace

int main(int argument_count, char** arguments)
{
  vtkObject::GlobalWarningDisplayOff(); // its own lines; we read the error codes
  try
  {
    return run(argument_count, arguments);
  }
  catch (const carlin::ModelError& error)
  {
    std::cerr << error.what() << '\n';
    return wrong_input;
  }
  catch (const carlin::ValueError& error)
  {
    std::cerr << "error: " << error.what() << '\n';
    return wrong_input;
  }
  catch (const carlin::Error& error)
  {
    std::cerr << "error: " << error.what() << '\n';
    return could_not_finish;
  }
  catch (const std::exception& error)
  {
    std::cerr << "internal error: " << error.what() << "; please report it with the model file\n";
    return could_not_finish;
  }
}
