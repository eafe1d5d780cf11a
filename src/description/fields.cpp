#include "fields.hpp"

#include <algorithm>
#include <cassert>
#include <fmt/format.h>
#include <limits>

namespace carlin::reading
{
namespace
{
std::vector<std::string> key_names(const Section& section)
{
  std::vector<std::string> names;
  for (const Key& key : section.keys)
    names.emplace_back(key.name);
  return names;
}

std::string example_of_form(const Key& key)
{
  switch (key.form)
  {
  case Form::quantity:
  case Form::stiffness:
  case Form::release:
  case Form::range:
  case Form::acceleration_or_standard:
    return fmt::format("{}: {}", key.name, example_of(key.dimension));
  case Form::word:
    return fmt::format("{}: {}", key.name, split_words(key.words).front());
  default:
    return fmt::format("{}: ...", key.name);
  }
}
} // namespace

std::vector<std::string> split_words(std::string_view words)
{
  std::vector<std::string> found;
  for (std::size_t start = 0; start <= words.size();)
  {
    const std::size_t end = std::min(words.find('|', start), words.size());
    found.emplace_back(words.substr(start, end - start));
    start = end + 1;
  }
  return found;
}

Fields::Fields(const Node& node, const Section& section)
    : node_(node), section_(&section), entries_(node.entries())
{
  if (node.is_absent())
    return;
  if (!node.is_map())
  {
    node.complain(
        fmt::format("a map of keys is due here; its keys are {}", listed(key_names(section))));
    return;
  }
  check_known();
  check_missing();
}

void Fields::check_known() const
{
  const std::vector<std::string> known = key_names(*section_);
  for (const Entry& entry : entries_)
  {
    if (std::find(known.begin(), known.end(), entry.name) != known.end())
      continue;
    const auto refused = std::find_if(section_->refused.begin(), section_->refused.end(),
                                      [&](const auto& pair) { return pair.first == entry.name; });
    if (refused != section_->refused.end())
    {
      entry.node.complain_at_key(std::string(refused->second));
      continue;
    }
    const std::string nearest = nearest_name(entry.name, known);
    const std::string what_to_do = nearest.empty() ? fmt::format("known keys are {}", listed(known))
                                                   : fmt::format("did you mean '{}'?", nearest);
    entry.node.complain_at_key(fmt::format("unknown key '{}'; {}", entry.name, what_to_do));
  }
}

void Fields::check_missing() const
{
  for (const Key& key : section_->keys)
    if (key.need == Need::required && !has(key.name))
      node_.complain_at_key(
          fmt::format("key '{}' is missing; add '{}'", key.name, example_of_form(key)));
}

const Key& Fields::key_of(std::string_view key) const
{
  const auto at = std::find_if(section_->keys.begin(), section_->keys.end(),
                               [&](const Key& candidate) { return candidate.name == key; });
  assert(at != section_->keys.end());
  return *at;
}

bool Fields::has(std::string_view key) const
{
  return std::any_of(entries_.begin(), entries_.end(),
                     [&](const Entry& entry) { return entry.name == key; });
}

Node Fields::node(std::string_view key) const
{
  assert(!key_of(key).name.empty());
  for (const Entry& entry : entries_)
    if (entry.name == key)
      return entry.node;
  return Node::absent(node_.from(), fmt::format("{}.{}", node_.path(), key), node_.findings());
}

void Fields::complain(std::string_view key, const std::string& message) const
{
  node(key).complain(message);
}

std::optional<double> Fields::maybe_quantity(std::string_view key) const
{
  if (!has(key))
    return std::nullopt;
  const Key& k = key_of(key);
  return read_quantity(node(key), k.dimension, k.bound);
}

double Fields::quantity(std::string_view key, double fallback) const
{
  return maybe_quantity(key).value_or(fallback);
}

std::optional<Vector3> Fields::maybe_vector(std::string_view key) const
{
  if (!has(key))
    return std::nullopt;
  return read_vector(node(key), key_of(key).dimension);
}

Vector3 Fields::vector(std::string_view key, const Vector3& fallback) const
{
  return maybe_vector(key).value_or(fallback);
}

std::vector<std::pair<double, double>> Fields::polyline(std::string_view key) const
{
  std::vector<std::pair<double, double>> points;
  if (!has(key))
    return points;
  const Key& k = key_of(key);
  for (const Node& element : list_elements(node(key)))
  {
    const std::vector<Node> pair = element.elements();
    if (pair.size() != 2)
    {
      element.complain("two quantities are due here; write e.g. '[0 m, 0.5 m]'");
      continue;
    }
    const auto first = read_quantity(pair[0], k.dimension, Bound::any);
    const auto second = read_quantity(pair[1], k.dimension, k.bound);
    if (!first || !second)
      continue;
    if (!points.empty() && *first <= points.back().first)
      element.complain("x does not increase from the point before; list the points from aft");
    points.emplace_back(*first, *second);
  }
  return points;
}

Range Fields::range(std::string_view key) const
{
  Range range;
  if (!has(key))
    return range;
  const Key& k = key_of(key);
  const Node value = node(key);
  if (!value.is_list())
  {
    const double both = read_quantity(value, k.dimension, k.bound).value_or(0.0);
    return {both, both};
  }
  const std::vector<Node> ends = value.elements();
  if (ends.size() != 2)
  {
    value.complain("one quantity or a list of two is due here, the low and the high end");
    return range;
  }
  range.low = read_quantity(ends[0], k.dimension, k.bound).value_or(0.0);
  range.high = read_quantity(ends[1], k.dimension, k.bound).value_or(range.low);
  if (range.low > range.high)
    value.complain("the low end is above the high end; exchange them");
  return range;
}

double Fields::stiffness(std::string_view key) const
{
  // A turning spring left out is rigid: the stated forces per travel are those of the whole seat.
  if (!has(key) || node(key).text() == "rigid")
    return std::numeric_limits<double>::infinity();
  return quantity(key);
}

std::optional<double> Fields::release(std::string_view key) const
{
  if (!has(key) || node(key).text() == "free")
    return 0.0;
  if (node(key).text() == "locked")
    return std::nullopt;
  return quantity(key);
}

Index Fields::count(std::string_view key, Index fallback) const
{
  return has(key) ? read_count(node(key)).value_or(fallback) : fallback;
}

bool Fields::flag(std::string_view key, bool fallback) const
{
  if (!has(key))
    return fallback;
  const std::string text = node(key).text();
  if (text == "true" || text == "false")
    return text == "true";
  complain(key, fmt::format("'{}' is neither 'true' nor 'false'; write one of them", text));
  return fallback;
}

std::string Fields::text(std::string_view key) const
{
  if (!has(key))
    return {};
  if (!node(key).is_text() || node(key).text().empty())
    complain(key, "text is due here; write it on the line of the key");
  return node(key).text();
}

std::string Fields::name(std::string_view key) const
{
  if (!has(key))
    return {};
  const Node value = node(key);
  if (!value.is_text() || value.text().empty())
  {
    value.complain(fmt::format("one name of a {} is due here", kind_name(key_of(key).refers)));
    return {};
  }
  return read_names(value, key_of(key).refers).front();
}

std::vector<std::string> Fields::names(std::string_view key) const
{
  return has(key) ? read_names(node(key), key_of(key).refers) : std::vector<std::string>{};
}

PlaneRange Fields::plane_range(std::string_view key) const
{
  static const Section from_to = {"range of planes",
                                  "",
                                  {plain(Form::text, "from", "").optional("first"),
                                   plain(Form::text, "to", "").optional("last")}};
  if (!has(key))
    return {};
  const Node value = node(key);
  if (!value.is_map())
  {
    value.complain(
        "a range of planes is due here; write e.g. '{from: bulkhead-1, to: bulkhead-2}'");
    return {};
  }
  const Fields fields(value, from_to);
  PlaneRange range{fields.text("from"), fields.text("to")};
  for (const char* end : {"from", "to"})
    if (fields.has(end) && !fields.node(end).text().empty())
      read_names(fields.node(end), key_of(key).refers);
  if (!range.from.empty() && range.from == range.to)
    value.complain(fmt::format("the range from '{}' to '{}' is empty; name two different planes",
                               range.from, range.to));
  return range;
}

int Fields::word_index(std::string_view key) const
{
  if (!has(key))
    return -1;
  const std::vector<std::string> words = split_words(key_of(key).words);
  const std::string text = node(key).text();
  const auto at = std::find(words.begin(), words.end(), text);
  if (at != words.end())
    return static_cast<int>(at - words.begin());
  complain(key, fmt::format("'{}' is not known here; write one of {}", text, listed(words)));
  return -1;
}
} // namespace carlin::reading
