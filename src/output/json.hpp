#pragma once

#include <cstdint>
#include <string>
#include <string_view>

namespace carlin
{
/// Writes JSON (RFC 8259) in the order of the calls, two blanks an indent.
class JsonWriter
{
public:
  void open_object();
  void close_object();
  void open_array();
  void close_array();
  /// Name of the next value of an object.
  void key(std::string_view name);
  void value(std::string_view text);
  void value(const char* text) { value(std::string_view(text)); }
  void value(double number); ///< 17 figures at most; infinity and NaN, which JSON lacks, as null
  void value(std::int64_t number);
  void null();

  template <typename Value> void member(std::string_view name, const Value& content)
  {
    key(name);
    value(content);
  }
  /// The text so far; complete when everything opened is closed.
  const std::string& text() const { return text_; }

private:
  void separate();
  std::string text_;
  int depth_ = 0;
  bool is_first_ = true, follows_key_ = false;
};

/// Text as a JSON string, with its quotes; control characters escaped, UTF-8 kept.
std::string json_quoted(std::string_view text);

/// FNV-1a, 64 bits, as 16 hexadecimal digits: tells one model file from another, no seal against
/// forgery. Source: Fowler, Noll & Vo, The FNV Non-Cryptographic Hash Algorithm, IETF draft,
/// constants from memory, checked on its published test vector "a" -> af63dc4c8601ec8c.
std::string fnv1a_digest(std::string_view bytes);
} // namespace carlin
