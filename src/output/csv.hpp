#pragma once

#include <string>
#include <string_view>
#include <variant>
#include <vector>

namespace carlin
{
/// A field of a CSV table: text, a number (nine figures, '.' decimal, "inf" and "nan" as such) or
/// nothing.
using CsvField = std::variant<std::monostate, std::string, double>;

/// CSV text by RFC 4180: comma, CR LF, quotes doubled; a field with comma, quote or line break is
/// quoted.
class CsvTable
{
public:
  /// @param headings With units: "clamping force [N]".
  explicit CsvTable(const std::vector<std::string>& headings);
  /// @pre one field a heading (asserted).
  void add(const std::vector<CsvField>& fields);
  const std::string& text() const { return text_; }

private:
  std::size_t columns_ = 0;
  std::string text_;
};

/// A field as it stands in a CSV file.
std::string csv_quoted(std::string_view text);
} // namespace carlin
