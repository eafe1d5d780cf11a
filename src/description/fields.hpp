#pragma once

#include "keys.hpp"
#include "node.hpp"

#include "carlin/core/types.hpp"
#include "carlin/description/parts.hpp"
#include "carlin/description/tanks.hpp"

#include <functional>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace carlin::reading
{
/// The values of one map, read by the keys of its section. Making it complains of unknown, refused
/// and missing keys; each getter complains of a value that is not what its key says and then
/// returns the fallback, so that the pass goes on. A key that the section does not have is a bug.
class Fields
{
public:
  Fields(const Node& node, const Section& section);

  bool has(std::string_view key) const;
  /// The value of the key; an absent node if it is not given.
  Node node(std::string_view key) const;
  const Node& map() const { return node_; }

  double quantity(std::string_view key, double fallback = 0.0) const;
  std::optional<double> maybe_quantity(std::string_view key) const;
  Vector3 vector(std::string_view key, const Vector3& fallback = Vector3::Zero()) const;
  std::optional<Vector3> maybe_vector(std::string_view key) const;
  std::vector<std::pair<double, double>> polyline(std::string_view key) const;
  Range range(std::string_view key) const;
  double stiffness(std::string_view key) const;
  std::optional<double> release(std::string_view key) const; ///< absent: locked
  Index count(std::string_view key, Index fallback) const;
  bool flag(std::string_view key, bool fallback) const;
  std::string text(std::string_view key) const;
  std::string name(std::string_view key) const;
  std::vector<std::string> names(std::string_view key) const;
  PlaneRange plane_range(std::string_view key) const;

  /// The enumerator whose word is written; `words` of the key are in its order.
  template <class Enumeration> Enumeration word(std::string_view key, Enumeration fallback) const
  {
    const int index = word_index(key);
    return index < 0 ? fallback : static_cast<Enumeration>(index);
  }
  int word_index(std::string_view key) const; ///< -1: not given or not one of the words

  /// Complains at the value of the key.
  void complain(std::string_view key, const std::string& message) const;

private:
  const Key& key_of(std::string_view key) const;
  void check_known() const;
  void check_missing() const;

  Node node_;
  const Section* section_;
  std::vector<Entry> entries_;
};

/// A quantity written in `node`, within the bound; nothing if it is not.
std::optional<double> read_quantity(const Node& node, Dimension dimension, Bound bound);
/// A whole number from 1.
std::optional<Index> read_count(const Node& node);
std::optional<Vector3> read_vector(const Node& node, Dimension dimension);
/// One name or a list of names; each is put among the references to look up.
std::vector<std::string> read_names(const Node& node, Refers refers);
/// Words of "a|b|c".
std::vector<std::string> split_words(std::string_view words);

/// Entries of a map of named things; complains of names that cannot be used and of an empty map.
std::vector<Entry> named_entries(const Node& node);
/// Elements of a list; complains if it is no list.
std::vector<Node> list_elements(const Node& node);
} // namespace carlin::reading
