#include "csv.hpp"

#include <cassert>
#include <fmt/format.h>
#include <iterator>

namespace carlin
{
std::string csv_quoted(std::string_view text)
{
  if (text.find_first_of(",\"\r\n") == std::string_view::npos)
    return std::string(text);
  std::string quoted = "\"";
  for (const char c : text)
  {
    if (c == '"')
      quoted += '"';
    quoted += c;
  }
  return quoted + '"';
}

CsvTable::CsvTable(const std::vector<std::string>& headings) : columns_(headings.size())
{
  for (const std::string& heading : headings)
    text_ += (&heading == &headings.front() ? "" : ",") + csv_quoted(heading);
  text_ += "\r\n";
}

void CsvTable::add(const std::vector<CsvField>& fields)
{
  assert(fields.size() == columns_);
  bool is_first = true;
  for (const CsvField& field : fields)
  {
    if (!is_first)
      text_ += ',';
    is_first = false;
    if (const auto* text = std::get_if<std::string>(&field))
      text_ += csv_quoted(*text);
    else if (const auto* number = std::get_if<double>(&field))
      fmt::format_to(std::back_inserter(text_), "{:.9g}", *number);
  }
  text_ += "\r\n";
}
} // namespace carlin
