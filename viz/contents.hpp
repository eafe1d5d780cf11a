#pragma once

#include <filesystem>
#include <stdexcept>
#include <string>
#include <vector>

namespace carlin::viz
{
/// What is asked cannot be shown: the message says what there is instead.
class ViewError : public std::runtime_error
{
public:
  using std::runtime_error::runtime_error;
};

/// One line of vtk/contents.csv of a results folder.
struct ResultFile
{
  std::string configuration, standing, load_case, stage, time_step, what;
  std::filesystem::path file;
};

/// @param results Folder written by `carlin check`. @throws ViewError if it is none.
std::vector<ResultFile> read_contents(const std::filesystem::path& results);

/// Rows of a CSV text by RFC 4180.
std::vector<std::vector<std::string>> csv_rows(const std::string& text);

/// Configurations in the order of the run, the base first.
std::vector<std::string> configurations(const std::vector<ResultFile>& contents);

/// A file of a stage. @param what "structure", "tanks", "collars". @return Empty if that stage has
/// no such file. @throws ViewError naming the cases or stages there are, if these names are not
/// among them.
std::filesystem::path stage_file(const std::vector<ResultFile>& contents,
                                 const std::string& configuration, const std::string& load_case,
                                 const std::string& stage, const std::string& what);
} // namespace carlin::viz
