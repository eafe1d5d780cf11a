// Compares two CSV tables cell by cell: numbers to a tolerance relative to the largest magnitude of
// the table in their unit (moments: also of the forces, with an arm of a metre), everything else to
// the letter. A force that symmetry makes zero is round-off of the forces beside it. Exit status 0
// alike, 1 not.
//   compare_tables first.csv second.csv 1e-9

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <fstream>
#include <iostream>
#include <optional>
#include <string>
#include <vector>

namespace
{
using Row = std::vector<std::string>;

std::vector<Row> read(const char* path)
{
  std::ifstream file(path);
  std::vector<Row> rows;
  for (std::string line; std::getline(file, line);)
  {
    Row row(1);
    bool is_quoted = false;
    for (const char c : line)
    {
      if (c == '"')
        is_quoted = !is_quoted;
      else if (c == ',' && !is_quoted)
        row.emplace_back();
      else if (c != '\r')
        row.back() += c;
    }
    rows.push_back(row);
  }
  return rows;
}

std::optional<double> number(const std::string& text)
{
  char* end = nullptr;
  const double value = std::strtod(text.c_str(), &end);
  if (text.empty() || *end != '\0')
    return std::nullopt;
  return value;
}

std::string unit(const std::string& heading)
{
  const auto from = heading.rfind('[');
  return from == std::string::npos ? heading : heading.substr(from);
}

double largest(const std::vector<Row>& rows, std::size_t column)
{
  const std::string own = unit(rows[0][column]);
  double size = 0.0;
  for (const Row& row : rows)
    for (std::size_t c = 0; c < std::min(row.size(), rows[0].size()); ++c)
    {
      const std::string other = unit(rows[0][c]);
      if (other != own && !(own == "[N m]" && other == "[N]"))
        continue;
      if (const auto value = number(row[c]); value && std::isfinite(*value))
        size = std::max(size, std::abs(*value));
    }
  return size;
}
} // namespace

int main(int argument_count, char** arguments)
{
  if (argument_count != 4)
    return 2;
  const std::vector<Row> first = read(arguments[1]);
  const std::vector<Row> second = read(arguments[2]);
  const double tolerance = std::atof(arguments[3]);
  if (first.empty() || first.size() != second.size())
  {
    std::cerr << "different number of rows\n";
    return 1;
  }
  std::vector<double> scale;
  for (std::size_t c = 0; c < first[0].size(); ++c)
    scale.push_back(largest(first, c));
  for (std::size_t r = 0; r < first.size(); ++r)
    for (std::size_t c = 0; c < std::max(first[r].size(), second[r].size()); ++c)
    {
      if (first[r].size() != second[r].size() || c >= scale.size())
        return 1;
      const auto a = number(first[r][c]);
      const auto b = number(second[r][c]);
      const bool is_alike = a && b ? (*a == *b || std::abs(*a - *b) <= tolerance * scale.at(c))
                                   : first[r][c] == second[r][c];
      if (!is_alike)
      {
        std::cerr << "row " << r + 1 << ", column " << first[0][c] << ": " << first[r][c] << " and "
                  << second[r][c] << '\n';
        return 1;
      }
    }
  return 0;
}
