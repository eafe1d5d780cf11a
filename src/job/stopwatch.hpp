#pragma once

#include "carlin/output/output.hpp"

#include <chrono>
#include <string>
#include <utility>
#include <vector>

namespace carlin
{
/// Adds a timing "<what>: <lap>" for each lap.
class Stopwatch
{
public:
  Stopwatch(std::string what, std::vector<Timing>& timings)
      : what_(std::move(what)), timings_(timings), last_(std::chrono::steady_clock::now())
  {
  }

  void lap(const std::string& name)
  {
    const auto now = std::chrono::steady_clock::now();
    timings_.push_back({what_ + ": " + name, std::chrono::duration<double>(now - last_).count()});
    last_ = now;
  }

private:
  std::string what_;
  std::vector<Timing>& timings_;
  std::chrono::steady_clock::time_point last_;
};
} // namespace carlin
