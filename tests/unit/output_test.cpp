#include "csv.hpp"
#include "handy_unit.hpp"
#include "json.hpp"
#include "mass_changes.hpp"
#include "names.hpp"
#include "output_sample.hpp"
#include "text_table.hpp"
#include "write_tables.hpp"

#include <catch2/catch.hpp>
#include <sstream>

using namespace carlin;
using Catch::Matchers::Contains;

namespace
{
std::vector<std::string> lines_of(const std::string& text)
{
  std::vector<std::string> lines;
  std::istringstream stream(text);
  for (std::string line; std::getline(stream, line);)
    lines.push_back(line);
  return lines;
}

std::string printed(void (*print)(std::ostream&, const RunResult&), const RunResult& result)
{
  std::ostringstream out;
  print(out, result);
  return out.str();
}
} // namespace

TEST_CASE("Tables print the worst check first and count only by configuration", "[unit][output]")
{
  const std::string text = printed(print_checks, sample_result());
  const std::vector<std::string> lines = lines_of(text);
  REQUIRE(lines.size() > 6);
  CHECK(lines[0] == "checks, converted (judged)");
  CHECK_THAT(lines[3], Contains("1.14") && Contains("NOT MET") && Contains("142 <= 125 MPa"));
  CHECK_THAT(lines[4], Contains("not judged"));
  CHECK_THAT(lines[5], Contains("0.72") && Contains("met"));
  CHECK_THAT(lines[6], Contains("0.52"));
  CHECK_THAT(text, Contains("2 met, 1 not met, 1 not judged (converted, judged)"));
  CHECK_THAT(text, Contains("0 met, 1 not met, 0 not judged (as built, shown, not counted)"));
  CHECK_THAT(text, Contains("ask the tank's maker for this limit"));
}

TEST_CASE("No table is wider than 100 columns, whatever the names", "[unit][output]")
{
  RunResult result = sample_result();
  const std::string longest(150, 'x');
  for (Check& check : result.checks)
    check.subject = check.load_case = longest; // what a model names
  for (MassEntry& entry : result.configurations[0].mass_account)
    entry.group = longest;
  result.configurations[1].stiffness.bays[0].from = longest;
  result.quality.largest_warp_place = longest;
  std::ostringstream out;
  print_checks(out, result);
  print_masses(out, result);
  print_stiffness(out, result);
  print_audit(out, result);
  print_quality(out, result.quality);
  for (const std::string& line : lines_of(out.str()))
  {
    INFO(line);
    CHECK(display_width(line) <= table_width);
  }
  CHECK_THAT(out.str(), Contains("xxx.."));
}

TEST_CASE("A cut text keeps whole characters", "[unit][output]")
{
  TextTable table;
  table.columns = {{"name", Align::left, 8}, {"figure", Align::right, 0}};
  std::string umlauts;
  for (int i = 0; i < 120; ++i)
    umlauts += "\xc3\xbc"; // u with two dots, two bytes
  table.rows = {{umlauts, "1"}};
  std::ostringstream out;
  print_table(out, table);
  const std::string row = lines_of(out.str())[2];
  CHECK(display_width(row) == table_width);
  CHECK_THAT(row, Contains("\xc3\xbc.."));
}

TEST_CASE("Stiffness is printed with its ratio to the base", "[unit][output]")
{
  const std::string text = printed(print_stiffness, sample_result());
  CHECK_THAT(text, Contains("bulkhead-1 to bulkhead-2"));
  CHECK_THAT(text, Contains("EI MN m2"));
  CHECK_THAT(text, Contains("0.800")); // 2.0e8 over 2.5e8
  CHECK_THAT(text, Contains("582"));   // 1e8 / 3 N m/rad x pi / 180 = 582 kNm/deg
  CHECK_THAT(text, Contains("not a section property") || Contains("not a section\nproperty"));
}

TEST_CASE("Masses are added up by group with the change from the base", "[unit][output]")
{
  const RunResult result = sample_result();
  const MassRow total = total_of(mass_rows(result.configurations));
  CHECK(total.masses[0] == Approx(120.0).epsilon(1e-12)); // R: 100 + 20
  CHECK(total.masses[1] == Approx(215.0).epsilon(1e-12)); // R: 100 + 115
  CHECK(total.centres[1].z() == Approx(115.0 * 0.5 / 215.0).epsilon(1e-12));
  const std::string text = printed(print_masses, result);
  CHECK_THAT(text, Contains("+95.0") && Contains("-20.0") && Contains("converted kg"));
  const std::string csv = masses_csv(result);
  CHECK_THAT(csv, Contains("converted,members,girder-2,0,-20,,,\r\n"));
  CHECK_THAT(csv, Contains("converted,total,total,215,95,"));
}

TEST_CASE("Units of tables are those people read", "[unit][output]")
{
  CHECK(handy_unit("Pa", 1e6).name == "MPa");
  CHECK(handy_unit("kg", 999.0).name == "kg");
  CHECK(handy_unit("kg", 1000.0).name == "t");
  CHECK(handy_unit("Hz", 3.0).name == "Hz");
  CHECK(3.14159265358979 * handy_unit("rad", 3.0).factor == Approx(180.0).epsilon(1e-12));
  CHECK(figures(142.4) == "142");
  CHECK(figures(1.456) == "1.46");
  CHECK(figures(0.03553) == "0.0355");
  CHECK(figures(99.96) == "100");
  CHECK(figures(std::numeric_limits<double>::infinity()) == "no limit");
}

TEST_CASE("CSV fields are quoted by RFC 4180 and numbers keep nine figures", "[unit][output]")
{
  CHECK(csv_quoted("plain") == "plain");
  CHECK(csv_quoted("a,b") == "\"a,b\"");
  CHECK(csv_quoted("say \"no\"") == "\"say \"\"no\"\"\"");
  CHECK(csv_quoted("two\nlines") == "\"two\nlines\"");
  CsvTable table({"name", "force [N]", "limit [N]"});
  table.add({std::string("a,b"), 1234567.891234, {}});
  CHECK(table.text() == "name,force [N],limit [N]\r\n\"a,b\",1234567.89,\r\n");
  const std::string checks = checks_csv(sample_result());
  CHECK_THAT(checks, Contains("\"girder-2 web, between frame-5 and frame-6\""));
  CHECK_THAT(checks, Contains("converted,judged,NOT MET,1.1392,plate stress"));
}

TEST_CASE("collars.csv has a row for each stage, range end and collar", "[unit][output]")
{
  const std::vector<std::string> lines = lines_of(collars_csv(sample_result()));
  REQUIRE(lines.size() == 1 + 2 * 2 * 2); // heading; stages x ends x collars
  CHECK_THAT(lines[1], Contains(",fitting,low,tank-1,aft,slips,-900,10,600,"));
  CHECK_THAT(lines[1], Contains(",0.0141,inf,"));
  CHECK_THAT(lines[8], Contains(",high,tank-1,fore,keyed,900,"));
  CHECK(lines_of(feet_csv(sample_result())).size() == 1 + 2 * 2 * 2);
  CHECK(lines_of(tanks_csv(sample_result())).size() == 1 + 2 * 2);
}

TEST_CASE("JSON text is escaped and nests", "[unit][output]")
{
  CHECK(json_quoted("a\"b\\c\n") == "\"a\\\"b\\\\c\\u000a\"");
  JsonWriter json;
  json.open_object();
  json.member("name", "x");
  json.key("list");
  json.open_array();
  json.value(1.5);
  json.value(std::numeric_limits<double>::infinity());
  json.close_array();
  json.key("none");
  json.open_array();
  json.close_array();
  json.close_object();
  CHECK(json.text() ==
        "{\n  \"name\": \"x\",\n  \"list\": [\n    1.5,\n    null\n  ],\n  \"none\": []\n}");
  // Published test vectors of FNV-1a, 64 bits: "" and "a".
  CHECK(fnv1a_digest("") == "cbf29ce484222325");
  CHECK(fnv1a_digest("a") == "af63dc4c8601ec8c");
}

TEST_CASE("Names become file names that are safe and different", "[unit][output]")
{
  FileNames names({"structure.vtu"});
  CHECK(names.make("landing / hard") == "landing---hard");
  CHECK(names.make("landing : hard") == "landing---hard-2");
  CHECK(names.make("LANDING---HARD") == "LANDING---HARD-3");
  CHECK(names.make("..") == "-.");
  CHECK(names.make("") == "unnamed");
  CHECK(names.make("Structure.vtu") == "Structure.vtu-2");
  CHECK(names.make(std::string(400, 'n')).size() == 120);
}
