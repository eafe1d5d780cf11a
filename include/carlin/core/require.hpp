#pragma once

#include <string_view>

namespace carlin
{
/// Checkers that return the value they checked, so that the wrong variable cannot be checked.
/// NaN and infinity are refused. @throws ValueError "youngs_modulus is -2 Pa; it must be greater
/// than 0".
double require_positive(std::string_view quantity, double value, std::string_view unit);
double require_not_negative(std::string_view quantity, double value, std::string_view unit);
double require_finite(std::string_view quantity, double value, std::string_view unit);
/// @throws ValueError unless lowest < value < highest (both ends excluded).
double require_between(std::string_view quantity, double value, double lowest, double highest);
} // namespace carlin
