#include "node.hpp"

#include <algorithm>
#include <cctype>
#include <fmt/format.h>
#include <map>
#include <numeric>
#include <sstream>
#include <yaml-cpp/yaml.h>

namespace carlin::reading
{
struct Node::Yaml
{
  YAML::Node node;
};

namespace
{
/// yaml-cpp counts from 0; it knows no place of an empty value.
FileLocation location(const std::string& file, const YAML::Mark& mark)
{
  if (mark.is_null())
    return {file, 0, 0};
  return {file, mark.line + 1, mark.column + 1};
}

std::string one_line(std::string text)
{
  std::replace_if(
      text.begin(), text.end(), [](unsigned char c) { return std::iscntrl(c) != 0; }, ' ');
  return text;
}

/// Words of yaml-cpp for what it found, in words that help.
std::string explained(const std::string& message)
{
  return fmt::format("the file is not YAML here: {}; check indentation, quotes and brackets",
                     one_line(message));
}
/// Line at which a second document starts or the first one ends: '---' after content, or '...'; 0:
/// none.
int second_document(const std::string& text)
{
  std::istringstream lines(text);
  bool has_content = false;
  int number = 0;
  for (std::string line; std::getline(lines, line);)
  {
    ++number;
    const bool is_marked = line.rfind("---", 0) == 0 || line.rfind("...", 0) == 0;
    if (is_marked && (line.size() == 3 || std::isspace(static_cast<unsigned char>(line[3])) != 0) &&
        (has_content || line[0] == '.'))
      return number;
    const std::size_t first = line.find_first_not_of(" \t\r");
    has_content = has_content || (first != std::string::npos && line[first] != '#' && !is_marked);
  }
  return 0;
}
} // namespace

Node::Node(std::shared_ptr<const Yaml> yaml, FileLocation from, std::string path,
           Findings& findings)
    : yaml_(std::move(yaml)), where_(from), from_(std::move(from)), path_(std::move(path)),
      findings_(&findings)
{
  if (!yaml_)
    return;
  const FileLocation own = location(from_.file, yaml_->node.Mark());
  if (own.line > 0 && !yaml_->node.IsNull())
    where_ = own;
}

Node Node::document(const std::string& text, const std::string& file, Findings& findings)
{
  const FileLocation start{file, 1, 1};
  try
  {
    // Not LoadAll: yaml-cpp 0.7 reads for ever where a document starts with a comma.
    const YAML::Node document = YAML::Load(text);
    if (const int line = second_document(text); line > 0)
    {
      const FileLocation second{file, line, 1};
      findings.problems.push_back({second,
                                   "a second YAML document starts here; a model is one document: "
                                   "remove the lines '---' and '...'"});
    }
    else if (document.IsMap())
      return Node(std::make_shared<const Yaml>(Yaml{document}), start, "", findings);
    else
      findings.problems.push_back(
          {start,
           "the file holds no map of keys; start with 'carlin: 1', see models/starter.yaml"});
  }
  catch (const YAML::Exception& exception)
  {
    FileLocation where = location(file, exception.mark);
    findings.problems.push_back({where.line > 0 ? where : start, explained(exception.msg)});
  }
  return absent(start, "", findings);
}

Node Node::absent(const FileLocation& where, std::string path, Findings& findings)
{
  return Node(nullptr, where, std::move(path), findings);
}

bool Node::is_absent() const { return !yaml_ || !yaml_->node.IsDefined(); }
bool Node::is_map() const { return yaml_ && yaml_->node.IsMap(); }
bool Node::is_list() const { return yaml_ && yaml_->node.IsSequence(); }
bool Node::is_text() const { return yaml_ && yaml_->node.IsScalar(); }

std::string Node::text() const { return is_text() ? one_line(yaml_->node.Scalar()) : ""; }

std::vector<Entry> Node::entries() const
{
  std::vector<Entry> found;
  if (!is_map())
    return found;
  std::map<std::string, int> first_line;
  for (const auto& pair : yaml_->node)
  {
    const FileLocation where = location(from_.file, pair.first.Mark());
    if (!pair.first.IsScalar())
    {
      findings_->problems.push_back(
          {where, fmt::format("{}: a key must be one word or text; put quotes round it", path_)});
      continue;
    }
    const std::string key = one_line(pair.first.Scalar());
    const auto [at, is_new] = first_line.emplace(key, where.line);
    if (!is_new) // yaml-cpp keeps the first and says nothing
    {
      findings_->problems.push_back(
          {where, fmt::format("{}'{}' is given twice, first in line {}; remove or rename one",
                              path_.empty() ? "" : path_ + ": ", key, at->second)});
      continue;
    }
    std::string path = path_.empty() ? key : fmt::format("{}.{}", path_, key);
    found.push_back({key, where,
                     Node(std::make_shared<const Yaml>(Yaml{pair.second}), where, std::move(path),
                          *findings_)});
  }
  return found;
}

std::vector<Node> Node::elements() const
{
  std::vector<Node> found;
  if (!is_list())
    return found;
  for (std::size_t i = 0; i < yaml_->node.size(); ++i)
    found.push_back(Node(std::make_shared<const Yaml>(Yaml{yaml_->node[i]}), where_,
                         fmt::format("{}[{}]", path_, i + 1), *findings_));
  return found;
}

void Node::complain(const std::string& message) const
{
  findings_->problems.push_back({where_, path_.empty() ? message : path_ + ": " + message});
}

void Node::complain_at_key(const std::string& message) const
{
  findings_->problems.push_back({from_, path_.empty() ? message : path_ + ": " + message});
}

namespace
{
std::string letters(std::string_view name)
{
  std::string text;
  for (const unsigned char c : name)
    if (std::isalnum(c) != 0)
      text += static_cast<char>(std::tolower(c));
  return text;
}

/// Levenshtein distance: insertions, deletions and replacements of one letter.
std::size_t edit_distance(const std::string& a, const std::string& b)
{
  std::vector<std::size_t> row(b.size() + 1);
  std::iota(row.begin(), row.end(), std::size_t{0});
  for (std::size_t i = 0; i < a.size(); ++i)
  {
    std::size_t diagonal = row[0];
    row[0] = i + 1;
    for (std::size_t j = 0; j < b.size(); ++j)
    {
      const std::size_t replaced = diagonal + (a[i] == b[j] ? 0 : 1);
      diagonal = row[j + 1];
      row[j + 1] = std::min({replaced, row[j] + 1, row[j + 1] + 1});
    }
  }
  return row[b.size()];
}
} // namespace

std::string nearest_name(std::string_view name, const std::vector<std::string>& known)
{
  constexpr std::size_t longest_compared = 80; // cost grows with the square
  const std::string wanted = letters(name.substr(0, longest_compared));
  std::string best;
  // A third of the letters may differ; of one or two letters none.
  std::size_t best_distance =
      wanted.size() < 3 ? 1 : std::max<std::size_t>(1, wanted.size() / 3) + 1;
  for (const std::string& candidate : known)
  {
    const std::size_t distance =
        edit_distance(wanted, letters(std::string_view(candidate).substr(0, longest_compared)));
    if (distance < best_distance)
    {
      best = candidate;
      best_distance = distance;
    }
  }
  return best;
}

std::string listed(const std::vector<std::string>& names)
{
  constexpr std::size_t most = 24; // one line on a screen or two
  const std::size_t shown = names.size() > most + 1 ? most : names.size();
  std::string text;
  for (std::size_t i = 0; i < shown; ++i)
  {
    const bool has_comma = names[i].find(',') != std::string::npos;
    text += fmt::format("{0}{1}{2}{1}", i == 0 ? "" : ", ", has_comma ? "'" : "", names[i]);
  }
  if (shown < names.size())
    text += fmt::format(" and {} more", names.size() - shown);
  return text;
}
} // namespace carlin::reading
