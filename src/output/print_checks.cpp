#include "handy_unit.hpp"
#include "names.hpp"
#include "text_table.hpp"

#include "carlin/output/output.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <ostream>

namespace carlin
{
namespace
{
std::string found_and_limit(const Check& check)
{
  const double largest =
      std::max(std::abs(check.demand), check.limit ? std::abs(*check.limit) : 0.0);
  const HandyUnit unit = handy_unit(check.unit, largest);
  std::string text = figures(check.demand * unit.factor);
  if (check.limit)
    text += (check.limit_from_below ? " >= " : " <= ") + figures(*check.limit * unit.factor);
  return unit.name.empty() ? text : text + " " + unit.name;
}

TextTable table_of(const std::vector<Check>& checks)
{
  TextTable table;
  table.columns = {{"use", Align::right, 0},   {"verdict", Align::left, 0},
                   {"check", Align::left, 14}, {"found, limit", Align::left, 0},
                   {"where", Align::left, 20}, {"case, stage", Align::left, 12}};
  for (const Check& check : checks)
  {
    std::string when = check.load_case;
    if (!check.stage.empty())
      when += ", " + check.stage;
    table.rows.push_back({check.utilisation ? fmt::format("{:.2f}", *check.utilisation) : "-",
                          word_of(check.verdict), check.name, found_and_limit(check), check.subject,
                          when});
  }
  return table;
}

/// Not met and not judged always; met from this utilisation on, and only of judged configurations.
constexpr double shown_from = 0.5;

bool is_printed(const Check& check, Standing standing)
{
  if (check.verdict == Verdict::not_met)
    return true;
  return standing == Standing::judged &&
         (check.verdict == Verdict::not_judged || check.utilisation.value_or(0.0) >= shown_from);
}

/// What to ask for so that a check can be judged, once each.
void print_missing_limits(std::ostream& out, const std::vector<Check>& checks)
{
  std::vector<std::string> said;
  for (const Check& check : checks)
    if (check.verdict == Verdict::not_judged && !check.remark.empty() &&
        std::ranges::find(said, check.remark) == said.end())
    {
      said.push_back(check.remark);
      print_wrapped(out, fmt::format("- {}: {}", check.name, check.remark), 2);
    }
}

std::string counts(const std::vector<Check>& checks)
{
  const auto count = [&](Verdict verdict)
  { return std::ranges::count(checks, verdict, &Check::verdict); };
  return fmt::format("{} met, {} not met, {} not judged", count(Verdict::met),
                     count(Verdict::not_met), count(Verdict::not_judged));
}
} // namespace

void print_checks(std::ostream& out, const RunResult& result)
{
  std::vector<std::string> summary;
  for (const Standing standing : {Standing::judged, Standing::shown, Standing::base})
    for (const ConfigurationSolution& configuration : result.configurations)
    {
      if (configuration.craft.standing != standing)
        continue;
      std::vector<Check> checks;
      std::ranges::copy_if(result.checks, std::back_inserter(checks),
                           [&](const Check& check)
                           { return check.configuration == configuration.craft.name; });
      std::ranges::stable_sort(checks, is_worse);
      const std::string standing_text =
          standing == Standing::judged ? "judged" : "shown, not counted";
      summary.push_back(
          fmt::format("{} ({}, {})", counts(checks), configuration.craft.name, standing_text));
      std::vector<Check> printed;
      std::ranges::copy_if(checks, std::back_inserter(printed),
                           [&](const Check& check) { return is_printed(check, standing); });
      if (printed.empty())
        continue;
      out << fmt::format("checks, {} ({})\n", configuration.craft.name, standing_text);
      print_table(out, table_of(printed));
      if (standing == Standing::judged)
        print_missing_limits(out, printed);
      if (printed.size() < checks.size())
        out << fmt::format("{} more {}, in checks.csv\n", checks.size() - printed.size(),
                           standing == Standing::judged
                               ? fmt::format("met below {:.2f}", shown_from)
                               : "met or not judged");
      out << '\n';
    }
  if (summary.empty())
    summary.push_back("no checks: no configuration was solved");
  for (const std::string& line : summary)
    print_wrapped(out, line, 2);
}
} // namespace carlin
