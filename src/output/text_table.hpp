#pragma once

#include <cstddef>
#include <iosfwd>
#include <string>
#include <vector>

namespace carlin
{
enum class Align
{
  left,
  right
};

struct TextColumn
{
  std::string heading;
  Align align = Align::left;
  std::size_t least_width = 0; ///< a column that may be shortened keeps at least this; 0: never
};

/// Plain text table no wider than `table_width`: columns as wide as their contents, two blanks
/// between; where that is too wide the columns that allow it are shortened, widest first, and cut
/// texts end in "..".
struct TextTable
{
  std::vector<TextColumn> columns;
  std::vector<std::vector<std::string>> rows; ///< one text a column
};

inline constexpr std::size_t table_width = 100;

/// @pre every row has one text a column (asserted).
void print_table(std::ostream& out, const TextTable& table);

/// Prints text broken at blanks so that no line is wider than the table; a word longer than that
/// stays whole. `indent` blanks before every line but the first.
void print_wrapped(std::ostream& out, const std::string& text, std::size_t indent);

/// Columns a text takes on a screen: its code points (UTF-8).
std::size_t display_width(const std::string& text);
} // namespace carlin
