#include "carlin/core/quantity.hpp"

#include "carlin/core/error.hpp"
#include "carlin/core/types.hpp"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <fmt/format.h>
#include <memory>
#include <string>
#include <udunits2.h>
#include <vector>

namespace carlin
{
namespace
{
struct DimensionFacts
{
  std::string_view unit;       // as printed
  std::string_view udunit;     // as UDUNITS-2 reads it
  std::string_view in_words;   // "a length"
  std::string_view an_example; // what to write
};

constexpr std::array<DimensionFacts, 29> facts = {{
    {"-", "1", "a number without unit", "0.3"},
    {"m", "m", "a length", "6 mm"},
    {"m^2", "m2", "an area", "1200 mm2"},
    {"m^4", "m4", "a second moment of area", "2.5e6 mm4"},
    {"m^3", "m3", "a volume", "0.315 m3"},
    {"kg", "kg", "a mass", "650 kg"},
    {"kg/m^3", "kg/m3", "a density", "2660 kg/m3"},
    {"kg/m^2", "kg/m2", "a mass per area", "12 kg/m2"},
    {"kg/m", "kg/m", "a mass per length", "4 kg/m"},
    {"s", "s", "a time", "2 s"},
    {"m/s", "m/s", "a speed", "25 knot"},
    {"m/s^2", "m/s2", "an acceleration", "2.5 g"},
    {"rad", "rad", "an angle", "18 deg"},
    {"rad/s^2", "rad/s2", "an angular acceleration", "0.5 rad/s2"},
    {"N", "N", "a force", "20 kN"},
    {"N m", "N m", "a moment", "5 kN m"},
    {"Pa", "Pa", "a pressure or modulus", "210 GPa"},
    {"N/m", "N/m", "a force per length", "30 kN/mm"},
    {"N/m^2", "N/m2", "a stiffness per length", "4e8 N/m2"},
    {"N/m^3", "N/m3", "a bed stiffness", "1e9 N/m3"},
    {"N m/rad", "N m", "a rotational stiffness", "2 kN m/rad"},
    {"N m/rad/m", "N", "a rotational stiffness per length", "2 kN m/rad/m"},
    {"N", "N", "an axial stiffness EA", "2.2e9 N"},
    {"N m^2", "N m2", "a bending stiffness EI", "6.6e7 N m2"},
    {"K", "K", "a temperature", "15 degC"},
    {"K", "K", "a temperature change", "40 K"},
    {"1/K", "1/K", "a thermal expansion", "23.8e-6 1/K"},
    {"Hz", "Hz", "a frequency", "12 Hz"},
    {"kg m^2", "kg m2", "a moment of inertia", "150 kg m2"},
}};
static_assert(static_cast<std::size_t>(Dimension::moment_of_inertia) + 1 == facts.size());

const DimensionFacts& facts_of(Dimension dimension)
{
  return facts[static_cast<std::size_t>(dimension)];
}

struct FreeUnit
{
  void operator()(ut_unit* unit) const { ut_free(unit); }
};
using Unit = std::unique_ptr<ut_unit, FreeUnit>;

struct FreeConverter
{
  void operator()(cv_converter* converter) const { cv_free(converter); }
};
using Converter = std::unique_ptr<cv_converter, FreeConverter>;

/// The unit database, read once. UDUNITS-2 prints to stderr unless told not to.
class UnitSystem
{
public:
  UnitSystem()
  {
    ut_set_error_message_handler(ut_ignore);
    system_ = ut_read_xml(nullptr);
    if (system_ == nullptr)
      throw IoError("the unit database of UDUNITS-2 cannot be read; install libudunits2-data or "
                    "set UDUNITS2_XML_PATH to its file");
  }
  ~UnitSystem() { ut_free_system(system_); }
  UnitSystem(const UnitSystem&) = delete;
  UnitSystem& operator=(const UnitSystem&) = delete;

  /// Empty for text that is no unit.
  Unit parse(const std::string& text) const
  {
    return Unit(ut_parse(system_, text.c_str(), UT_ASCII));
  }

private:
  ut_system* system_ = nullptr;
};

const UnitSystem& units()
{
  static const UnitSystem system;
  return system;
}

std::string_view trimmed(std::string_view text)
{
  const std::size_t first = text.find_first_not_of(" \t");
  if (first == std::string_view::npos)
    return {};
  return text.substr(first, text.find_last_not_of(" \t") - first + 1);
}

bool is_letter(char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '_'; }
bool is_digit(char c) { return c >= '0' && c <= '9'; }

void replace_all(std::string& text, std::string_view what, std::string_view with)
{
  for (std::size_t at = text.find(what); at != std::string::npos;
       at = text.find(what, at + with.size()))
    text.replace(at, what.size(), with);
}

void replace_word(std::string& text, std::string_view what, std::string_view with)
{
  for (std::size_t at = text.find(what); at != std::string::npos; at = text.find(what, at + 1))
  {
    const std::size_t end = at + what.size();
    const bool starts = at == 0 || !is_letter(text[at - 1]);
    const bool ends = end == text.size() || !is_letter(text[end]);
    if (starts && ends)
    {
      text.replace(at, what.size(), with);
      at += with.size();
    }
  }
}

/// Typographic forms written in plain letters, so that nothing but ASCII reaches the parser.
std::string plain(std::string_view unit)
{
  std::string text(unit);
  replace_all(text, "\u00b0C", "degC");
  replace_all(text, "\u00b0", "deg");
  replace_all(text, "\u00b7", ".");
  replace_all(text, "\u00b2", "2");
  replace_all(text, "\u00b3", "3");
  replace_all(text, "\u00b5", "u");
  replace_all(text, "\u03bc", "u");
  if (text.starts_with('/'))
    text.insert(text.begin(), '1');
  return text;
}

/// UDUNITS-2 multiplies numbers into units ("6 7 mm" would be 42 mm) and knows offsets and
/// logarithms. Here a digit is an exponent and nothing else, but for the 1 of "1/K".
bool has_unit_form(const std::string& unit)
{
  for (std::size_t i = 0; i < unit.size(); ++i)
  {
    const char c = unit[i];
    const char before = i == 0 ? ' ' : unit[i - 1];
    const char after = i + 1 < unit.size() ? unit[i + 1] : ' ';
    const bool starts_reciprocal = i == 0 && c == '1' && (after == '/' || after == ' ');
    if (is_letter(c) || starts_reciprocal || c == ' ' || c == '/' || c == '*' || c == '(' ||
        c == ')' || (c == '%' && unit.size() == 1))
      continue;
    if (is_digit(c) &&
        (is_letter(before) || before == '^' || before == '-' || (is_digit(before) && i > 1)))
      continue;
    if (c == '-' && (is_letter(before) || before == '^') && is_digit(after))
      continue;
    if (c == '^' && (is_letter(before) || before == ')') && (is_digit(after) || after == '-'))
      continue;
    if (c == '.' && is_letter(before) && is_letter(after))
      continue;
    return false;
  }
  return !unit.empty();
}

std::vector<std::string> words_of(const std::string& unit)
{
  std::vector<std::string> words(1);
  for (const char c : unit)
  {
    if (is_letter(c))
      words.back() += c;
    else if (!words.back().empty())
      words.emplace_back();
  }
  if (words.back().empty())
    words.pop_back();
  return words;
}

bool is_angle_word(const std::string& word)
{
  static const std::vector<std::string> known = {"deg",  "degree",  "degrees", "rad",     "radian",
                                                 "mrad", "radians", "arcmin",  "arc_min", "arcsec"};
  return std::find(known.begin(), known.end(), word) != known.end();
}

bool has_angle(const std::vector<std::string>& words)
{
  return std::any_of(words.begin(), words.end(), is_angle_word);
}

struct Written
{
  double number = 0.0;
  std::string unit; // plain letters; may be empty
};

/// What every complaint starts with: "'6' is not a length".
std::string not_a(std::string_view text, Dimension dimension)
{
  return fmt::format("'{}' is not {}", text, name_of(dimension));
}

std::string write_like(Dimension dimension)
{
  return fmt::format("write e.g. '{}'", facts_of(dimension).an_example);
}

Written split(std::string_view text, Dimension dimension)
{
  std::string_view rest = trimmed(text);
  if (rest.starts_with('+'))
    rest.remove_prefix(1);
  Written written;
  const auto [end, status] =
      std::from_chars(rest.data(), rest.data() + rest.size(), written.number);
  if (status == std::errc::invalid_argument)
    throw ValueError(fmt::format("{}: it does not start with a number; {}", not_a(text, dimension),
                                 write_like(dimension)));
  if (status == std::errc::result_out_of_range || !std::isfinite(written.number))
    throw ValueError(fmt::format("{}: the number is not finite; {}", not_a(text, dimension),
                                 write_like(dimension)));
  rest.remove_prefix(static_cast<std::size_t>(end - rest.data()));
  if (rest.starts_with(','))
    throw ValueError(fmt::format("{}: a number takes a point, never a comma; {}",
                                 not_a(text, dimension), write_like(dimension)));
  written.unit = plain(trimmed(rest));
  return written;
}

/// The units that one may take for another.
void refuse_look_alikes(std::string_view text, const std::vector<std::string>& words)
{
  for (const std::string& word : words)
  {
    if (word == "kn" || word == "Kn" || word == "KN" || word == "kts" || word == "kt")
      throw ValueError(fmt::format("'{}': unit '{}' may be read as knot or as kilonewton; write "
                                   "'knot' for a speed, 'kN' for a force",
                                   text, word));
  }
}

double dimensionless(std::string_view text, const Written& written)
{
  if (written.unit.empty() || written.unit == "1")
    return written.number;
  if (written.unit == "%")
    return written.number / 100.0;
  throw ValueError(fmt::format("{}: unit '{}' is not taken here; {}", not_a(text, Dimension::none),
                               written.unit, write_like(Dimension::none)));
}

double converted(std::string_view text, const Written& written, Dimension dimension)
{
  const auto wrong_dimension = [&]
  {
    return ValueError(fmt::format("{}: '{}' is a unit of something else; {}",
                                  not_a(text, dimension), written.unit, write_like(dimension)));
  };
  std::string unit = written.unit;
  replace_word(unit, "deg", "arc_degree"); // UDUNITS-2 does not know "deg"
  const Unit from = has_unit_form(unit) ? units().parse(unit) : nullptr;
  if (!from)
    throw ValueError(fmt::format("{}: unit '{}' is not known; {}", not_a(text, dimension),
                                 written.unit, write_like(dimension)));
  const Unit to = units().parse(std::string(facts_of(dimension).udunit));
  if (!to || ut_are_convertible(from.get(), to.get()) == 0)
    throw wrong_dimension();
  const Converter converter(ut_get_converter(from.get(), to.get()));
  if (!converter)
    throw wrong_dimension();
  // Convertible includes reciprocals ("s" to "Hz") and scales with an offset ("degC" to "K").
  const double at_zero = cv_convert_double(converter.get(), 0.0);
  const double at_one = cv_convert_double(converter.get(), 1.0);
  const double at_two = cv_convert_double(converter.get(), 2.0);
  if (!std::isfinite(at_zero) ||
      std::abs(at_two - 2.0 * at_one + at_zero) > 1e-9 * std::abs(at_two))
    throw wrong_dimension();
  if (at_zero != 0.0 && dimension != Dimension::temperature)
    throw ValueError(fmt::format("{}: '{}' is a temperature on a scale, not a difference; {}",
                                 not_a(text, dimension), written.unit, write_like(dimension)));
  return cv_convert_double(converter.get(), written.number);
}
} // namespace

std::string_view unit_of(Dimension dimension) { return facts_of(dimension).unit; }
std::string_view name_of(Dimension dimension) { return facts_of(dimension).in_words; }
std::string_view example_of(Dimension dimension) { return facts_of(dimension).an_example; }

double quantity_in_si(std::string_view text, Dimension dimension)
{
  Written written = split(text, dimension);
  if (dimension == Dimension::none)
    return dimensionless(text, written);
  if (written.unit.empty())
    throw ValueError(
        fmt::format("{}: it has no unit; {}", not_a(text, dimension), write_like(dimension)));
  replace_all(written.unit, "delta_degC", "K");
  const std::vector<std::string> words = words_of(written.unit);
  refuse_look_alikes(text, words);

  if (dimension == Dimension::acceleration && written.unit == "g")
    return written.number * standard_gravity;
  // UDUNITS-2 takes angles for plain numbers: "5 N m deg" would be a moment, "8 %" an angle.
  const bool wants_angle =
      dimension == Dimension::angle || dimension == Dimension::angular_acceleration;
  const bool may_have_angle = wants_angle || dimension == Dimension::rotational_stiffness ||
                              dimension == Dimension::rotational_stiffness_per_length;
  if ((wants_angle && !has_angle(words)) || (!may_have_angle && has_angle(words)))
    throw ValueError(fmt::format("{}: '{}' is a unit of something else; {}", not_a(text, dimension),
                                 written.unit, write_like(dimension)));

  const double value = converted(text, written, dimension);
  if (!std::isfinite(value))
    throw ValueError(fmt::format("{}: the number is not finite; {}", not_a(text, dimension),
                                 write_like(dimension)));
  if (dimension == Dimension::temperature && value < 0.0)
    throw ValueError(fmt::format("'{}' is below absolute zero; {}", text, write_like(dimension)));
  return value;
}

double quantity_of_any_dimension(std::string_view text)
{
  const Written written = split(text, Dimension::none);
  if (written.unit == "g")
    throw ValueError(fmt::format("'{}' may be gram or the acceleration of gravity; write kg or "
                                 "m/s2",
                                 text));
  refuse_look_alikes(text, words_of(written.unit));
  for (std::size_t i = 0; i < facts.size(); ++i)
  {
    try
    {
      return quantity_in_si(text, static_cast<Dimension>(i));
    }
    catch (const ValueError&)
    {
      continue; // not this dimension
    }
  }
  throw ValueError(fmt::format("'{}' is no quantity that is known here; write a number and a unit, "
                               "e.g. '120 MPa', or a number alone",
                               text));
}
} // namespace carlin
