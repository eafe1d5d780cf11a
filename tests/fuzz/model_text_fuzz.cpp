#include "carlin/description/model.hpp"

#include <catch2/catch.hpp>
#include <fstream>
#include <random>
#include <sstream>

namespace
{
std::string content(const std::string& file)
{
  std::ifstream input(file);
  REQUIRE(input);
  std::ostringstream text;
  text << input.rdbuf();
  return text.str();
}

/// Pieces that have a meaning in the file, to reach further than letters at random do.
const std::vector<std::string> pieces = {
    "0",     "-1",   ".nan",  ".inf",   "1e999",  "~",        "null",    "{}",      "[]",
    "rigid", "6",    "3 g",   "{a: b}", "[1, 2]", "&a",       "*a",      "<<: *a",  "? x",
    "|\n",   ">\n",  "---\n", "...\n",  "\t",     "\xC3",     "\xFF",    "\n\n",    "# ",
    "stem",  "true", "on:",   "\"",     "'",      "!!binary", "%",       "@",       "`",
    ": ",    ",",    "- ",    "[[[[[[", "deck",   "base",     "transom", "1e308 km"};

std::string mutated(std::string text, std::mt19937& random)
{
  const auto below = [&](std::size_t count) { return random() % std::max<std::size_t>(count, 1); };
  const std::size_t changes = 1 + below(4);
  for (std::size_t i = 0; i < changes && !text.empty(); ++i)
  {
    const std::size_t at = below(text.size());
    const std::size_t length = std::min(below(30), text.size() - at);
    switch (below(6))
    {
    case 0:
      text.erase(at, length);
      break;
    case 1:
      text.insert(at, pieces[below(pieces.size())]);
      break;
    case 2:
      text.insert(at, text.substr(below(text.size()), below(60)));
      break;
    case 3:
      text[at] = static_cast<char>(below(256));
      break;
    case 4: // a value replaced: from a colon to the end of its line or entry
    {
      const std::size_t colon = text.find(": ", at);
      if (colon == std::string::npos)
        break;
      const std::size_t end = std::min(text.find_first_of(",}\n", colon + 2), text.size());
      text.replace(colon + 2, end - colon - 2, pieces[below(pieces.size())]);
      break;
    }
    default: // two lines exchanged
    {
      const std::size_t end = text.find('\n', at);
      if (end == std::string::npos)
        break;
      const std::string line = text.substr(at, end - at);
      text.erase(at, end - at);
      text.insert(below(text.size()), line);
    }
    }
  }
  return text;
}
} // namespace

TEST_CASE("Whatever the text is, it is a model or a problem of the model", "[fuzz][description]")
{
  const std::string starter = content(CARLIN_SOURCE_DIR "/models/starter.yaml");
  std::mt19937 random(20250611); // fixed: the same texts in every run
  int refused = 0;
  constexpr int rounds = 2000;
  for (int i = 0; i < rounds; ++i)
  {
    const std::string text = mutated(starter, random);
    try
    {
      const carlin::Model model = carlin::read_model_text(text, "mutated.yaml");
      for (const carlin::Configuration& configuration : model.configurations)
        carlin::configured(model, configuration.name);
    }
    catch (const carlin::ModelError& error)
    {
      ++refused;
      if (error.problems().empty() ||
          std::string(error.what()).find("error: ") == std::string::npos)
        FAIL("a problem without a message, round " << i);
    } // anything else fails the test
  }
  CAPTURE(refused);
  CHECK(refused > rounds / 4); // the changes reach the reader
  CHECK(refused < rounds);     // and some leave a model
}
