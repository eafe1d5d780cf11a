#pragma once

#include "carlin/output/output.hpp"

namespace carlin
{
// Each: the text of one file of the results folder. Columns: examples/open-structure.md.
std::string checks_csv(const RunResult& result);
std::string stiffness_csv(const RunResult& result);
std::string collars_csv(const RunResult& result);
std::string feet_csv(const RunResult& result);
std::string tanks_csv(const RunResult& result);
std::string masses_csv(const RunResult& result);
std::string joints_csv(const RunResult& result);
std::string run_json(const RunResult& result);
} // namespace carlin
