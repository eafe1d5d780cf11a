#include "text_table.hpp"

#include <algorithm>
#include <cassert>
#include <numeric>
#include <ostream>
#include <sstream>

namespace carlin
{
namespace
{
constexpr std::size_t gap = 2;

bool continues_character(char byte) { return (static_cast<unsigned char>(byte) & 0xC0U) == 0x80U; }

std::string shortened(const std::string& text, std::size_t width)
{
  if (display_width(text) <= width)
    return text;
  std::size_t end = 0;
  for (std::size_t shown = 0; end < text.size(); ++end)
    if (!continues_character(text[end]) && shown++ == width - 2)
      break;
  return text.substr(0, end) + "..";
}

std::string padded(const std::string& text, std::size_t width, Align align)
{
  const std::string blanks(width - std::min(width, display_width(text)), ' ');
  return align == Align::left ? text + blanks : blanks + text;
}

std::vector<std::size_t> column_widths(const TextTable& table)
{
  std::vector<std::size_t> widths;
  for (std::size_t c = 0; c < table.columns.size(); ++c)
  {
    std::size_t width = display_width(table.columns[c].heading);
    for (const std::vector<std::string>& row : table.rows)
      width = std::max(width, display_width(row[c]));
    widths.push_back(width);
  }
  const auto total = [&]
  {
    return std::accumulate(widths.begin(), widths.end(), std::size_t{0}) +
           gap * (widths.size() - 1);
  };
  while (total() > table_width)
  {
    std::size_t widest = widths.size();
    for (std::size_t c = 0; c < widths.size(); ++c)
      if (table.columns[c].least_width > 0 && widths[c] > table.columns[c].least_width &&
          (widest == widths.size() || widths[c] > widths[widest]))
        widest = c;
    if (widest == widths.size())
      break; // nothing may be shortened any more: whole figures matter more than the width
    --widths[widest];
  }
  return widths;
}

void print_line(std::ostream& out, const std::vector<std::string>& texts,
                const std::vector<std::size_t>& widths, const std::vector<TextColumn>& columns)
{
  std::string line;
  for (std::size_t c = 0; c < columns.size(); ++c)
  {
    if (c > 0)
      line.append(gap, ' ');
    line += padded(shortened(texts[c], widths[c]), widths[c], columns[c].align);
  }
  line.erase(line.find_last_not_of(' ') + 1);
  out << line << '\n';
}
} // namespace

std::size_t display_width(const std::string& text)
{
  return static_cast<std::size_t>(
      std::ranges::count_if(text, [](char byte) { return !continues_character(byte); }));
}

void print_table(std::ostream& out, const TextTable& table)
{
  assert(std::ranges::all_of(table.rows, [&](const std::vector<std::string>& row)
                             { return row.size() == table.columns.size(); }));
  const std::vector<std::size_t> widths = column_widths(table);
  std::vector<std::string> headings, rules;
  for (std::size_t c = 0; c < widths.size(); ++c)
  {
    headings.push_back(table.columns[c].heading);
    rules.emplace_back(widths[c], '-');
  }
  print_line(out, headings, widths, table.columns);
  print_line(out, rules, widths, table.columns);
  for (const std::vector<std::string>& row : table.rows)
    print_line(out, row, widths, table.columns);
}

void print_wrapped(std::ostream& out, const std::string& text, std::size_t indent)
{
  std::istringstream words(text);
  std::string word, line;
  while (words >> word)
  {
    if (!line.empty() && display_width(line) + 1 + display_width(word) > table_width)
    {
      out << line << '\n';
      line.assign(indent, ' ');
      line += word;
      continue;
    }
    line += line.empty() ? word : ' ' + word;
  }
  out << line << '\n';
}
} // namespace carlin
