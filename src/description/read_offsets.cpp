#include "fields.hpp"
#include "readers.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <filesystem>
#include <fmt/format.h>
#include <fstream>
#include <sstream>

namespace carlin::reading
{
const Section& offsets_section()
{
  static const Section section = {
      "offsets",
      "Points of the port half of each section, from the keel (on the centreline) to the deck "
      "edge; "
      "the same names in the same order at every station, stations from aft. Either `unit` and "
      "`stations`, a map of stations, each a map `point: [x, y, z]` of bare numbers in that unit; "
      "or `file`, a CSV table beside the model with the header `station,point,x [mm],y [mm],z "
      "[mm]` "
      "(the units may be others) and one point a line. The points of a station may differ in x.",
      {
          plain(Form::text, "unit", "of the numbers of `stations`").optional("`file`"),
          plain(Form::sections, "stations", "station: {point: [x, y, z], ...}").optional("`file`"),
          plain(Form::text, "file", "name of the CSV table").optional("`unit` and `stations`"),
          plain(Form::text, "chine", "name of the point where bottom and side meet")
              .optional("chine"),
          word("fairing", "smooth|straight",
               "between stations: shape-preserving cubic along x, or straight lines")
              .optional("smooth"),
      }};
  return section;
}

namespace
{
/// The unit of a table: checked once, put behind every number.
struct TableUnit
{
  std::string unit;

  /// @throws ValueError if `number` is not a number alone.
  double operator()(const std::string& number) const
  {
    try
    {
      return quantity_in_si(fmt::format("{} {}", number, unit), Dimension::length);
    }
    catch (const ValueError&)
    {
      throw ValueError(fmt::format("'{}' is not a number; the table's unit is {}, write the number "
                                   "alone",
                                   number, unit));
    }
  }
};

std::vector<OffsetStation> read_inline_stations(const Fields& fields)
{
  const TableUnit in_unit{fields.text("unit")};
  std::vector<OffsetStation> stations;
  try
  {
    quantity_in_si("1 " + in_unit.unit, Dimension::length);
  }
  catch (const ValueError&)
  {
    fields.complain(
        "unit", fmt::format("'{}' is not a unit of length; write e.g. 'unit: mm'", in_unit.unit));
    return stations;
  }
  for (const Entry& entry : named_entries(fields.node("stations")))
  {
    OffsetStation station;
    station.name = entry.name;
    station.where = entry.where;
    for (const Entry& point : named_entries(entry.node))
    {
      const std::vector<Node> numbers = point.node.elements();
      if (numbers.size() != 3)
      {
        point.node.complain("three numbers x, y, z are due here; write e.g. '[0, 1400, 455]'");
        continue;
      }
      OffsetPoint offset{point.name, Vector3::Zero()};
      for (Index i = 0; i < 3; ++i)
      {
        const Node& number = numbers[static_cast<std::size_t>(i)];
        try
        {
          offset.position[i] = in_unit(number.text());
        }
        catch (const ValueError& error)
        {
          number.complain(error.what());
        }
      }
      station.points.push_back(offset);
    }
    stations.push_back(station);
  }
  return stations;
}

struct Cell
{
  std::string text;
  int column = 1; // of its first letter, from 1
};

std::vector<Cell> cells_of(const std::string& line)
{
  std::vector<Cell> cells;
  for (std::size_t start = 0; start <= line.size();)
  {
    const std::size_t end = std::min(line.find(',', start), line.size());
    const std::size_t first = std::min(line.find_first_not_of(" \t\r", start), end);
    std::size_t last = end;
    while (last > first && std::string_view(" \t\r").find(line[last - 1]) != std::string_view::npos)
      --last;
    cells.push_back({line.substr(first, last - first), static_cast<int>(first) + 1});
    start = end + 1;
  }
  return cells;
}

/// One pass over a CSV table of offsets.
class OffsetTable
{
public:
  OffsetTable(std::string file, Findings& findings) : file_(std::move(file)), findings_(&findings)
  {
  }

  std::vector<OffsetStation> read(std::istream& input)
  {
    std::string line;
    for (line_ = 1; std::getline(input, line); ++line_)
    {
      if (line_ == 1 && line.starts_with("\xEF\xBB\xBF")) // mark that some editors put first
        line.erase(0, 3);
      const std::size_t first = line.find_first_not_of(" \t\r");
      if (first == std::string::npos || line[first] == '#')
        continue;
      const std::vector<Cell> cells = cells_of(line);
      if (has_header_)
        read_point(cells);
      else if (!read_header(cells))
        return {};
    }
    if (!has_header_)
      complain(1, "the table is empty; its first line is 'station,point,x [mm],y [mm],z [mm]'");
    return stations_;
  }

private:
  void complain(int column, const std::string& message)
  {
    findings_->problems.push_back({{file_, line_, column}, message});
  }

  bool read_header(const std::vector<Cell>& cells)
  {
    constexpr std::array<std::string_view, 5> due = {"station", "point", "x", "y", "z"};
    bool is_right = cells.size() == due.size();
    for (std::size_t i = 0; is_right && i < due.size(); ++i)
    {
      const std::string& text = cells[i].text;
      if (i < 2)
      {
        is_right = text == due[i];
        continue;
      }
      is_right = text.starts_with(std::string(due[i]) + " [") && text.ends_with(']');
      if (!is_right)
        continue;
      units_[i - 2].unit = text.substr(3, text.size() - 4);
      try
      {
        units_[i - 2]("1");
      }
      catch (const ValueError&)
      {
        complain(cells[i].column, fmt::format("'{}' is not a unit of length; write e.g. 'x [mm]'",
                                              units_[i - 2].unit));
        return false;
      }
    }
    if (!is_right)
      complain(1, "the header is not 'station,point,x [mm],y [mm],z [mm]'; write it so, with the "
                  "units of the columns");
    has_header_ = is_right;
    return is_right;
  }

  void read_point(const std::vector<Cell>& cells)
  {
    if (cells.size() != 5)
    {
      complain(
          1, fmt::format("{} cells stand here; 5 are due: station, point, x, y, z", cells.size()));
      return;
    }
    for (std::size_t i = 0; i < 2; ++i)
      if (cells[i].text.empty())
      {
        complain(cells[i].column, "the name is empty; write the station and the point");
        return;
      }
    OffsetPoint point{cells[1].text, Vector3::Zero()};
    for (std::size_t i = 0; i < 3; ++i)
      try
      {
        point.position[static_cast<Index>(i)] = units_[i](cells[i + 2].text);
      }
      catch (const ValueError& error)
      {
        complain(cells[i + 2].column, error.what());
      }
    if (stations_.empty() || stations_.back().name != cells[0].text)
    {
      const bool is_known =
          std::any_of(stations_.begin(), stations_.end(),
                      [&](const OffsetStation& s) { return s.name == cells[0].text; });
      if (is_known)
        complain(1, fmt::format("station '{}' stands further up already; keep its lines together",
                                cells[0].text));
      OffsetStation station;
      station.name = cells[0].text;
      station.where = {file_, line_, 1};
      stations_.push_back(station);
    }
    stations_.back().points.push_back(point);
  }

  std::string file_;
  Findings* findings_;
  int line_ = 1;
  bool has_header_ = false;
  std::array<TableUnit, 3> units_;
  std::vector<OffsetStation> stations_;
};

std::string names_of_points(const OffsetStation& station)
{
  std::vector<std::string> names;
  for (const OffsetPoint& point : station.points)
    names.push_back(point.name);
  return listed(names);
}

/// Complains of what no hull can be lofted from.
void check_stations(const HullOffsets& offsets, const Node& node)
{
  const auto complain = [&](const OffsetStation& station, const std::string& message)
  {
    node.findings().problems.push_back(
        {station.where, fmt::format("offsets, station '{}': {}", station.name, message)});
  };
  if (offsets.stations.size() < 2)
    node.complain_at_key("fewer than two stations; a hull lies between two or more");
  for (std::size_t i = 0; i < offsets.stations.size(); ++i)
  {
    const OffsetStation& station = offsets.stations[i];
    const OffsetStation& first = offsets.stations.front();
    const bool has_same_names = std::equal(
        station.points.begin(), station.points.end(), first.points.begin(), first.points.end(),
        [](const OffsetPoint& a, const OffsetPoint& b) { return a.name == b.name; });
    if (!has_same_names)
    {
      complain(station, fmt::format("its points are {}, at '{}' they are {}; the same names in the "
                                    "same order are due",
                                    names_of_points(station), first.name, names_of_points(first)));
      continue;
    }
    for (std::size_t p = 0; p < station.points.size(); ++p)
    {
      const OffsetPoint& point = station.points[p];
      if (p == 0 && point.position.y() != 0.0)
        complain(station, fmt::format("its first point '{}' lies off the centreline; give it y = 0",
                                      point.name));
      if (point.position.y() < 0.0)
        complain(station, fmt::format("point '{}' has a negative y; give the port half, y to port",
                                      point.name));
      if (i > 0 && point.position.x() <= offsets.stations[i - 1].points[p].position.x())
        complain(station, fmt::format("point '{}' does not lie forward of the one at '{}'; list "
                                      "the stations from aft",
                                      point.name, offsets.stations[i - 1].name));
    }
  }
}

void check_chine(const HullOffsets& offsets, const Fields& fields)
{
  if (offsets.stations.empty())
    return;
  const std::vector<OffsetPoint>& points = offsets.stations.front().points;
  const auto at = std::find_if(points.begin(), points.end(),
                               [&](const OffsetPoint& p) { return p.name == offsets.chine; });
  if (at == points.end())
    fields.complain("chine", fmt::format("the chine point '{}' does not exist; points are {}",
                                         offsets.chine, names_of_points(offsets.stations.front())));
  else if (at == points.begin() || at + 1 == points.end())
    fields.complain("chine", fmt::format("the chine '{}' is an end of the section; it must lie "
                                         "between keel and deck edge",
                                         offsets.chine));
}
} // namespace

std::vector<OffsetStation> read_offset_file(const Node& node)
{
  const std::filesystem::path beside =
      std::filesystem::path(node.where().file).parent_path() / node.text();
  std::ifstream input(beside);
  if (!input || std::filesystem::is_directory(beside))
  {
    node.complain(fmt::format("table '{}' cannot be opened; put it beside the model, or give the "
                              "path from there",
                              beside.generic_string()));
    return {};
  }
  return OffsetTable(beside.generic_string(), node.findings()).read(input);
}

std::optional<HullOffsets> read_offsets(const Node& node)
{
  const Fields fields(node, offsets_section());
  HullOffsets offsets;
  offsets.where = node.from();
  if (fields.has("chine"))
    offsets.chine = fields.text("chine");
  offsets.fairing = fields.word("fairing", Fairing::smooth);
  const std::size_t before = node.findings().problems.size();
  const bool is_inline = fields.has("unit") && fields.has("stations");
  if (fields.has("file") == (fields.has("unit") || fields.has("stations")) ||
      (!fields.has("file") && !is_inline))
  {
    node.complain_at_key("either 'file' or 'unit' and 'stations' are due; give one of the two");
    return std::nullopt;
  }
  offsets.stations =
      is_inline ? read_inline_stations(fields) : read_offset_file(fields.node("file"));
  if (node.findings().problems.size() > before)
    return std::nullopt; // the table is incomplete: more would only repeat it
  check_stations(offsets, node);
  check_chine(offsets, fields);
  return offsets;
}
} // namespace carlin::reading
