#include "names.hpp"

#include <cassert>

namespace carlin
{
namespace
{
char lower(char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; }

std::string in_lower_case(std::string text)
{
  for (char& c : text)
    c = lower(c);
  return text;
}

bool is_kept(char c)
{
  const char l = lower(c);
  return (l >= 'a' && l <= 'z') || (c >= '0' && c <= '9') || c == '.' || c == '-' || c == '_' ||
         static_cast<unsigned char>(c) >= 0x80U;
}
} // namespace

std::string word_of(Verdict verdict)
{
  switch (verdict)
  {
  case Verdict::met:
    return "met";
  case Verdict::not_met:
    return "NOT MET";
  case Verdict::not_judged:
    break;
  }
  return "not judged";
}

std::string word_of(CaseClass load_class)
{
  switch (load_class)
  {
  case CaseClass::service:
    return "service";
  case CaseClass::rare:
    return "rare";
  case CaseClass::accidental:
    break;
  }
  return "accidental";
}

std::string word_of(Standing standing)
{
  switch (standing)
  {
  case Standing::base:
    return "base";
  case Standing::shown:
    return "shown";
  case Standing::judged:
    break;
  }
  return "judged";
}

std::string word_of(Hold hold)
{
  switch (hold)
  {
  case Hold::keyed:
    return "keyed";
  case Hold::grips:
    return "grips";
  case Hold::slips:
    return "slips";
  case Hold::at_stop:
    return "at stop";
  case Hold::grip_lost:
    return "grip lost";
  case Hold::open:
    break;
  }
  return "open";
}

std::string word_of(CollarKind kind) { return kind == CollarKind::fixed ? "fixed" : "sliding"; }

std::string word_of(SlidesAt place)
{
  switch (place)
  {
  case SlidesAt::lining:
    return "lining";
  case SlidesAt::foot:
    return "foot";
  case SlidesAt::neck:
    break;
  }
  return "neck";
}

FileNames::FileNames(const std::set<std::string>& taken)
{
  for (const std::string& name : taken)
    taken_.insert(in_lower_case(name));
}

std::string FileNames::make(const std::string& name)
{
  std::string safe = name;
  for (char& c : safe)
    if (!is_kept(c))
      c = '-';
  constexpr std::size_t longest = 120; // bytes; file systems allow 255 with ending and number
  safe.resize(std::min(safe.size(), longest));
  if (safe.empty())
    safe = "unnamed";
  if (safe.front() == '.')
    safe.front() = '-';
  std::string unique = safe;
  for (int number = 2; !taken_.insert(in_lower_case(unique)).second; ++number)
    unique = safe + "-" + std::to_string(number);
  return unique;
}
} // namespace carlin
