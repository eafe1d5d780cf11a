#pragma once

#include "carlin/core/error.hpp"

#include <memory>
#include <string>
#include <string_view>
#include <vector>

namespace carlin::reading
{
/// What a name in the model file stands for.
enum class Refers
{
  nothing,
  material,
  schedule,
  profile,
  station,
  buttock,
  height,
  plane, ///< any of the three
  part,  ///< plate or member of any configuration, or a family
  plate,
  member, ///< also frame members
  point,
  tank,
  configuration
};

/// A name used somewhere, looked up when the whole file is known.
struct Reference
{
  Refers refers = Refers::nothing;
  std::string name;
  FileLocation where;
  std::string path;
};

/// What one pass over a file collects.
struct Findings
{
  std::vector<Problem> problems;
  std::vector<Reference> references;
};

struct Entry;

/// The only class that touches yaml-cpp: a value of the model file with its place and path.
/// An absent node is none of map, list and text. Complaints go to the findings of the pass.
class Node
{
public:
  /// The document in `text`; `file` is named in complaints. YAML that cannot be read is a complaint
  /// and gives an absent node.
  static Node document(const std::string& text, const std::string& file, Findings& findings);

  /// An absent node standing at `where`: reads as nothing, complains as usual.
  static Node absent(const FileLocation& where, std::string path, Findings& findings);

  bool is_absent() const;
  bool is_map() const;
  bool is_list() const;
  bool is_text() const;

  /// As written; empty unless is_text().
  std::string text() const;

  /// Entries of a map in the order of the file. Keys given twice and keys that are not text are
  /// complained of and left out. Empty unless is_map().
  std::vector<Entry> entries() const;

  /// Elements of a list. Empty unless is_list().
  std::vector<Node> elements() const;

  const FileLocation& where() const { return where_; } ///< of the value
  const FileLocation& from() const { return from_; }   ///< of its key, or of the value in a list
  const std::string& path() const { return path_; }    ///< "materials.steel.density"
  Findings& findings() const { return *findings_; }

  /// Adds a problem at the value, or at the key for `at_key`.
  void complain(const std::string& message) const;
  void complain_at_key(const std::string& message) const;

private:
  struct Yaml;
  Node(std::shared_ptr<const Yaml> yaml, FileLocation from, std::string path, Findings& findings);

  std::shared_ptr<const Yaml> yaml_; // null: absent
  FileLocation where_, from_;
  std::string path_;
  Findings* findings_;
};

struct Entry
{
  std::string name;
  FileLocation where; ///< of the key
  Node node;
};

/// The one of `known` that `name` is probably meant to be, or empty. Compared by edit distance,
/// letters alone, so that "Youngs Modulus" finds "youngs_modulus".
std::string nearest_name(std::string_view name, const std::vector<std::string>& known);

/// "a, b, c", the long tail left out: "a, b, c and 31 more".
std::string listed(const std::vector<std::string>& names);
} // namespace carlin::reading
