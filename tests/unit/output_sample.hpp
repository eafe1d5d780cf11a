#pragma once

#include "carlin/output/output.hpp"

#include <filesystem>
#include <string>

namespace carlin
{
/// A small run built by hand: a base and a converted configuration of two quadrilaterals, a
/// triangle, a member, a joint spring; the base on supports; the converted one floats, has a tank
/// on two collars, each on one foot, and one case of two stages.
RunResult sample_result();

/// Displacement of the sample's second stage: a known turn and shift plus a bulge at node 4.
VectorX sample_displacement();

/// An empty folder of its own for one test, removed at the end.
class TestFolder
{
public:
  explicit TestFolder(const std::string& name);
  ~TestFolder();
  TestFolder(const TestFolder&) = delete;
  TestFolder& operator=(const TestFolder&) = delete;
  const std::filesystem::path& path() const { return path_; }

private:
  std::filesystem::path path_;
};

/// Whole content of a file. Fails the test if it cannot be read.
std::string content(const std::filesystem::path& file);
} // namespace carlin
