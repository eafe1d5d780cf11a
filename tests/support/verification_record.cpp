#include "verification_record.hpp"

#include <cmath>
#include <cstdlib>
#include <fstream>
#include <iomanip>
#include <sstream>
#include <stdexcept>
#include <string>

namespace carlin::testing
{
namespace
{
std::string quoted(std::string_view text)
{
  std::string out = "\"";
  for (const char c : text)
    out += c == '"' ? std::string("\"\"") : std::string(1, c);
  return out + "\"";
}

std::string_view name_of(ToleranceClass tolerance)
{
  switch (tolerance)
  {
  case ToleranceClass::round_off:
    return "round-off";
  case ToleranceClass::printing:
    return "printing";
  case ToleranceClass::discretisation:
    return "discretisation";
  }
  throw std::logic_error("unknown tolerance class");
}
} // namespace

double record(const VerificationRecord& line)
{
  const double error = (line.computed - line.published) / std::abs(line.published);
  const char* file = std::getenv("CARLIN_VERIFICATION_CSV");
  if (file == nullptr || *file == '\0')
    return error;
  // One write a line, so that tests running at the same time do not mix theirs.
  std::ostringstream row;
  row << quoted(line.subject) << ',' << quoted(line.source) << ',' << quoted(line.quantity) << ','
      << std::setprecision(10) << line.published << ',' << line.computed << ','
      << std::setprecision(3) << error << ',' << name_of(line.tolerance) << '\n';
  std::ofstream out(file, std::ios::app);
  out << row.str() << std::flush;
  if (!out)
    throw std::runtime_error(std::string(file) + ": cannot be written");
  return error;
}
} // namespace carlin::testing
