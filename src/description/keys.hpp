#pragma once

#include "node.hpp"

#include "carlin/core/quantity.hpp"

#include <string_view>
#include <utility>
#include <vector>

namespace carlin::reading
{
/// Form of the value of a key.
enum class Form
{
  quantity,
  vector,    ///< three quantities
  polyline,  ///< list of pairs of quantities
  range,     ///< one quantity, or [low, high]
  stiffness, ///< quantity or the word rigid
  release,   ///< quantity or the words free, locked
  acceleration_or_standard,
  count,  ///< whole number from 1
  counts, ///< list of two
  flag,   ///< true or false
  text,
  word,        ///< one of `words`
  word_list,   ///< a list of `words`, or the first alone
  name,        ///< of what `refers` says
  names,       ///< one name or a list
  name_pairs,  ///< list of pairs of names
  plane_range, ///< {from, to}
  surface,     ///< bottom, side, deck or {kind: plane or planes}
  section,     ///< a map with the keys of section `of`
  sections,    ///< a map of names, each with the keys of section `of`
  section_list ///< a list, each with the keys of section `of`
};

enum class Need
{
  required,
  optional
};

enum class Bound
{
  any,
  positive,
  not_negative
};

/// One key of the model file: what the reader accepts and what the reference prints.
struct Key
{
  std::string_view name;
  Form form = Form::text;
  std::string_view meaning;
  Need need = Need::required;
  std::string_view when_absent = {}; ///< for optional keys
  Dimension dimension = Dimension::none;
  Bound bound = Bound::any;
  Refers refers = Refers::nothing;
  std::string_view words = {}; ///< "inside|centred|outside", in the order of the enumeration
  std::string_view of = {};    ///< title of the section of its keys

  constexpr Key optional(std::string_view default_words) const
  {
    Key key = *this;
    key.need = Need::optional;
    key.when_absent = default_words;
    return key;
  }
};

constexpr Key quantity(std::string_view name, Dimension dimension, Bound bound,
                       std::string_view meaning)
{
  return {.name = name,
          .form = Form::quantity,
          .meaning = meaning,
          .dimension = dimension,
          .bound = bound};
}

constexpr Key of_form(Form form, std::string_view name, Dimension dimension,
                      std::string_view meaning, Bound bound = Bound::any)
{
  return {.name = name, .form = form, .meaning = meaning, .dimension = dimension, .bound = bound};
}

constexpr Key plain(Form form, std::string_view name, std::string_view meaning)
{
  return {.name = name, .form = form, .meaning = meaning};
}

constexpr Key word(std::string_view name, std::string_view words, std::string_view meaning)
{
  return {.name = name, .form = Form::word, .meaning = meaning, .words = words};
}

constexpr Key name_of_a(Refers refers, std::string_view name, std::string_view meaning)
{
  return {.name = name, .form = Form::name, .meaning = meaning, .refers = refers};
}

constexpr Key names_of(Refers refers, std::string_view name, std::string_view meaning)
{
  return {.name = name, .form = Form::names, .meaning = meaning, .refers = refers};
}

constexpr Key planes_from_to(Refers refers, std::string_view name, std::string_view meaning)
{
  return Key{.name = name, .form = Form::plane_range, .meaning = meaning, .refers = refers}
      .optional("all");
}

constexpr Key table(Form form, std::string_view name, std::string_view of, std::string_view meaning)
{
  return {.name = name, .form = form, .meaning = meaning, .of = of};
}

/// Keys of one kind of map.
struct Section
{
  std::string_view title;
  std::string_view introduction;
  std::vector<Key> keys;
  /// Keys that are no keys, but that somebody may try, with what to say.
  std::vector<std::pair<std::string_view, std::string_view>> refused = {};
};

/// Sections that belong together in the reference, with an example that the tests read.
struct Chapter
{
  std::string_view title;
  std::string_view introduction;
  std::vector<const Section*> sections;
  std::string_view example; ///< YAML
};

/// In the order of the reference.
std::vector<Chapter> chapters();

std::string_view kind_name(Refers refers); ///< "material", "station", ...
} // namespace carlin::reading
