#include "json.hpp"

#include <cmath>
#include <fmt/format.h>

namespace carlin
{
std::string json_quoted(std::string_view text)
{
  std::string quoted = "\"";
  for (const char c : text)
  {
    if (c == '"' || c == '\\')
      quoted += {'\\', c};
    else if (static_cast<unsigned char>(c) < 0x20U)
      quoted += fmt::format("\\u{:04x}", static_cast<unsigned>(c));
    else
      quoted += c;
  }
  return quoted + '"';
}

std::string fnv1a_digest(std::string_view bytes)
{
  std::uint64_t hash = 14695981039346656037U;
  for (const char byte : bytes)
  {
    hash ^= static_cast<unsigned char>(byte);
    hash *= 1099511628211U;
  }
  return fmt::format("{:016x}", hash);
}

void JsonWriter::separate()
{
  if (follows_key_)
  {
    follows_key_ = false;
    return;
  }
  if (depth_ == 0)
    return;
  text_ += is_first_ ? "\n" : ",\n";
  text_.append(static_cast<std::size_t>(2 * depth_), ' ');
  is_first_ = false;
}

void JsonWriter::open_object()
{
  separate();
  text_ += '{';
  ++depth_;
  is_first_ = true;
}

void JsonWriter::open_array()
{
  separate();
  text_ += '[';
  ++depth_;
  is_first_ = true;
}

void JsonWriter::close_object()
{
  --depth_;
  if (!is_first_)
    text_ += '\n' + std::string(static_cast<std::size_t>(2 * depth_), ' ');
  text_ += '}';
  is_first_ = false;
}

void JsonWriter::close_array()
{
  --depth_;
  if (!is_first_)
    text_ += '\n' + std::string(static_cast<std::size_t>(2 * depth_), ' ');
  text_ += ']';
  is_first_ = false;
}

void JsonWriter::key(std::string_view name)
{
  separate();
  text_ += json_quoted(name) + ": ";
  follows_key_ = true;
}

void JsonWriter::value(std::string_view text)
{
  separate();
  text_ += json_quoted(text);
}

void JsonWriter::value(double number)
{
  separate();
  text_ += std::isfinite(number) ? fmt::format("{}", number) : "null";
}

void JsonWriter::value(std::int64_t number)
{
  separate();
  text_ += fmt::format("{}", number);
}

void JsonWriter::null()
{
  separate();
  text_ += "null";
}
} // namespace carlin
