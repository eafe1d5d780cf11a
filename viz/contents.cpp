#include "contents.hpp"

#include <algorithm>
#include <fstream>
#include <iterator>

namespace carlin::viz
{
namespace
{
void add_once(std::vector<std::string>& names, const std::string& name)
{
  if (!name.empty() && std::ranges::find(names, name) == names.end())
    names.push_back(name);
}

std::string listed(const std::vector<std::string>& names)
{
  std::string text;
  for (const std::string& name : names)
    text += (text.empty() ? "" : ", ") + name;
  return text.empty() ? "none" : text;
}
} // namespace

std::vector<std::vector<std::string>> csv_rows(const std::string& text)
{
  std::vector<std::vector<std::string>> rows;
  std::vector<std::string> row{""};
  bool is_quoted = false;
  for (std::size_t i = 0; i < text.size(); ++i)
  {
    const char c = text[i];
    if (is_quoted && c == '"' && i + 1 < text.size() && text[i + 1] == '"')
      row.back() += text[i++];
    else if (c == '"')
      is_quoted = !is_quoted;
    else if (is_quoted)
      row.back() += c;
    else if (c == ',')
      row.emplace_back();
    else if (c == '\n')
    {
      rows.push_back(row);
      row = {""};
    }
    else if (c != '\r')
      row.back() += c;
  }
  if (row.size() > 1 || !row.front().empty())
    rows.push_back(row);
  return rows;
}

std::vector<ResultFile> read_contents(const std::filesystem::path& results)
{
  const std::filesystem::path list = results / "vtk" / "contents.csv";
  std::ifstream stream(list, std::ios::binary);
  if (!stream)
    throw ViewError(results.string() +
                    ": is no results folder (vtk/contents.csv is not there); name the folder given "
                    "to carlin check --into");
  const std::string text{std::istreambuf_iterator<char>(stream), {}};
  std::vector<ResultFile> files;
  const auto rows = csv_rows(text);
  for (std::size_t r = 1; r < rows.size(); ++r)
  {
    if (rows[r].size() != 7)
      throw ViewError(list.string() + ":" + std::to_string(r + 1) + ": has not seven fields");
    const auto& row = rows[r];
    files.push_back({row[0], row[1], row[2], row[3], row[4], row[5], results / "vtk" / row[6]});
  }
  return files;
}

std::vector<std::string> configurations(const std::vector<ResultFile>& contents)
{
  std::vector<std::string> names;
  for (const ResultFile& file : contents)
    add_once(names, file.configuration);
  return names;
}

std::filesystem::path stage_file(const std::vector<ResultFile>& contents,
                                 const std::string& configuration, const std::string& load_case,
                                 const std::string& stage, const std::string& what)
{
  std::vector<std::string> cases, stages;
  std::filesystem::path found;
  for (const ResultFile& file : contents)
  {
    if (file.configuration != configuration)
      continue;
    add_once(cases, file.load_case);
    if (file.load_case != load_case)
      continue;
    add_once(stages, file.stage);
    if (file.stage == stage && file.what == what)
      found = file.file;
  }
  const auto has = [](const std::vector<std::string>& names, const std::string& name)
  { return std::ranges::find(names, name) != names.end(); };
  if (cases.empty())
    throw ViewError("configuration '" + configuration + "' has no cases here; configurations are " +
                    listed(configurations(contents)));
  if (!has(cases, load_case))
    throw ViewError("case '" + load_case + "' is not in configuration '" + configuration +
                    "'; its cases are " + listed(cases));
  if (!has(stages, stage))
    throw ViewError("stage '" + stage + "' is not in case '" + load_case + "' of configuration '" +
                    configuration + "'; its stages are " + listed(stages));
  return found;
}
} // namespace carlin::viz
