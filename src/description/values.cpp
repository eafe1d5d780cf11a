#include "fields.hpp"

#include <algorithm>
#include <cctype>
#include <charconv>
#include <fmt/format.h>

namespace carlin::reading
{
std::optional<double> read_quantity(const Node& node, Dimension dimension, Bound bound)
{
  if (!node.is_text())
  {
    node.complain(
        fmt::format("{} is due here; write e.g. '{}'", name_of(dimension), example_of(dimension)));
    return std::nullopt;
  }
  double value = 0.0;
  try
  {
    value = quantity_in_si(node.text(), dimension);
  }
  catch (const ValueError& error)
  {
    node.complain(error.what());
    return std::nullopt;
  }
  if (bound == Bound::positive && value <= 0.0)
  {
    node.complain(fmt::format("'{}' is too small; it must be greater than 0", node.text()));
    return std::nullopt;
  }
  if (bound == Bound::not_negative && value < 0.0)
  {
    node.complain(fmt::format("'{}' is negative; it must be 0 or more", node.text()));
    return std::nullopt;
  }
  return value;
}

std::optional<Index> read_count(const Node& node)
{
  const std::string text = node.text();
  int value = 0;
  const auto [end, status] = std::from_chars(text.data(), text.data() + text.size(), value);
  constexpr int most = 100000; // more divisions than any mesh that can be solved
  if (status == std::errc() && end == text.data() + text.size() && value >= 1 && value <= most)
    return value;
  node.complain(fmt::format("'{}' is not a whole number from 1 to {}", text, most));
  return std::nullopt;
}

std::optional<Vector3> read_vector(const Node& node, Dimension dimension)
{
  const std::vector<Node> components = node.elements();
  if (components.size() != 3)
  {
    const std::string_view like = dimension == Dimension::none ? "1" : example_of(dimension);
    node.complain(
        fmt::format("three components x, y, z are due here; write e.g. '[{0}, {0}, {0}]'", like));
    return std::nullopt;
  }
  Vector3 vector = Vector3::Zero();
  bool is_complete = true;
  for (Index i = 0; i < 3; ++i)
  {
    const auto component =
        read_quantity(components[static_cast<std::size_t>(i)], dimension, Bound::any);
    is_complete = is_complete && component.has_value();
    vector[i] = component.value_or(0.0);
  }
  return is_complete ? std::optional<Vector3>(vector) : std::nullopt;
}

std::vector<std::string> read_names(const Node& node, Refers refers)
{
  std::vector<std::string> names;
  const auto add = [&](const Node& one)
  {
    if (!one.is_text() || one.text().empty())
    {
      one.complain(fmt::format("the name of a {} is due here", kind_name(refers)));
      return;
    }
    if (std::find(names.begin(), names.end(), one.text()) != names.end())
    {
      one.complain(fmt::format("'{}' is listed twice; remove one", one.text()));
      return;
    }
    names.push_back(one.text());
    if (refers != Refers::nothing)
      one.findings().references.push_back({refers, one.text(), one.where(), one.path()});
  };
  if (!node.is_list())
    add(node);
  for (const Node& element : node.elements())
    add(element);
  if (node.is_list() && node.elements().empty() && refers != Refers::tank)
    node.complain("the list is empty; name at least one or leave the key out");
  return names;
}

std::string_view kind_name(Refers refers)
{
  switch (refers)
  {
  case Refers::nothing:
    return "thing";
  case Refers::material:
    return "material";
  case Refers::schedule:
    return "schedule";
  case Refers::profile:
    return "profile";
  case Refers::station:
    return "station";
  case Refers::buttock:
    return "buttock";
  case Refers::height:
    return "height";
  case Refers::plane:
    return "station, buttock or height";
  case Refers::part:
    return "part";
  case Refers::plate:
    return "plate part";
  case Refers::member:
    return "member";
  case Refers::point:
    return "frame point";
  case Refers::tank:
    return "tank";
  case Refers::configuration:
    return "configuration";
  }
  return "thing";
}

namespace
{
/// Names come back in tables, CSV files and file names.
bool is_usable_name(const std::string& name)
{
  constexpr std::size_t longest = 60;
  if (name.empty() || name.size() > longest || name.front() == ' ' || name.back() == ' ')
    return false;
  return std::all_of(name.begin(), name.end(),
                     [](unsigned char c)
                     {
                       return c >= 0x80 || std::isalnum(c) != 0 || c == ' ' || c == '-' ||
                              c == '_' || c == '.' || c == ',' || c == '+' || c == '(' || c == ')';
                     }) &&
         name.find_first_not_of('.') != std::string::npos;
}
} // namespace

std::vector<Entry> named_entries(const Node& node)
{
  std::vector<Entry> usable;
  if (node.is_absent())
    return usable;
  if (!node.is_map())
  {
    node.complain("a map of names is due here; write 'name: {...}' lines below the key");
    return usable;
  }
  for (const Entry& entry : node.entries())
  {
    if (!is_usable_name(entry.name))
      entry.node.complain_at_key(fmt::format(
          "'{}' cannot be a name; use letters, digits, spaces and - _ . , + ( ), at most "
          "60 of them",
          entry.name));
    usable.push_back(entry); // even so: what refers to it need not be complained of as well
  }
  return usable;
}

std::vector<Node> list_elements(const Node& node)
{
  if (!node.is_absent() && !node.is_list())
    node.complain("a list is due here; write '- ...' lines or '[..., ...]'");
  return node.elements();
}
} // namespace carlin::reading
