#pragma once

#include <string>

namespace carlin
{
/// Unit people read at a glance, and what a value in SI is multiplied by to get it.
struct HandyUnit
{
  std::string name;
  double factor = 1.0;
};

/// Handy unit of an SI unit: Pa -> MPa, N -> kN, m -> mm, N m -> kNm, rad -> deg; kg stays kg below
/// a tonne; an unknown unit stays as it is.
/// @param magnitude Largest value to be shown with it [SI]; chooses kg or t.
HandyUnit handy_unit(const std::string& si_unit, double magnitude);

/// Number with about three figures: "1423", "142", "14.2", "1.42", "0.0355", "1.20e-05".
std::string figures(double value);
} // namespace carlin
