#pragma once

#include <CLI/CLI.hpp>

namespace carlin::cli
{
/// Each adds its subcommand; the callback writes the exit status of the run into `status`.
void add_check_command(CLI::App& app, int& status);
void add_draw_command(CLI::App& app, int& status);
void add_reference_command(CLI::App& app, int& status);
} // namespace carlin::cli
