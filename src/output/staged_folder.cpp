#include "staged_folder.hpp"

#include "carlin/core/error.hpp"

#include <array>
#include <fmt/format.h>
#include <fstream>
#include <string>
#include <system_error>
#include <unistd.h>

namespace carlin
{
namespace
{
namespace fs = std::filesystem;

fs::path resolved(const fs::path& place)
{
  std::error_code error;
  fs::path path = fs::weakly_canonical(fs::absolute(place), error); // a link stays a link
  if (error)
    throw IoError(fmt::format("{}: cannot be reached ({})", place.string(), error.message()));
  return path.has_filename() ? path : path.parent_path();
}

bool is_ours(const fs::path& folder)
{
  constexpr std::array markers{"run.json", "draw.json"};
  for (const char* marker : markers)
    if (fs::exists(folder / marker))
      return true;
  return false;
}

void refuse_what_is_in_the_way(const fs::path& place)
{
  std::error_code error;
  const fs::file_status status = fs::status(place, error);
  if (!fs::exists(status))
    return;
  if (!fs::is_directory(status))
    throw IoError(
        fmt::format("{}: a file is in the way; name another folder for the results or remove it",
                    place.string()));
  const bool is_empty = fs::is_empty(place, error);
  if (error)
    throw IoError(fmt::format("{}: cannot be read ({})", place.string(), error.message()));
  if (!is_empty && !is_ours(place))
    throw IoError(fmt::format("{}: holds other files and no earlier results; a results folder is "
                              "replaced whole, so name another one",
                              place.string()));
}

fs::path beside(const fs::path& place, const char* purpose)
{
  return place.parent_path() /
         fmt::format(".{}.{}-{}", place.filename().string(), purpose, ::getpid());
}
} // namespace

StagedFolder::StagedFolder(const fs::path& final_place)
    : final_(resolved(final_place)), temporary_(beside(final_, "being-written"))
{
  refuse_what_is_in_the_way(final_);
  std::error_code error;
  fs::create_directories(final_.parent_path(), error);
  if (!error)
    fs::remove_all(temporary_, error); // of an earlier process of the same number, killed
  if (!error)
    fs::create_directory(temporary_, error);
  if (error)
    throw IoError(
        fmt::format("{}: no folder can be made there ({})", final_.string(), error.message()));
}

StagedFolder::~StagedFolder()
{
  std::error_code ignored; // a destructor has nobody to tell
  if (!temporary_.empty())
    fs::remove_all(temporary_, ignored);
}

void StagedFolder::move_in()
{
  std::error_code error;
  const fs::path earlier = beside(final_, "replaced");
  const bool replaces = fs::exists(final_);
  if (replaces)
  {
    fs::rename(final_, earlier, error);
    if (error)
      throw IoError(fmt::format("{}: the earlier results cannot be replaced ({})", final_.string(),
                                error.message()));
  }
  fs::rename(temporary_, final_, error);
  if (error)
  {
    std::error_code back;
    if (replaces)
      fs::rename(earlier, final_, back);
    throw IoError(fmt::format("{}: the results cannot be moved into place ({}){}", final_.string(),
                              error.message(),
                              back ? "; the earlier ones are in " + earlier.string() : ""));
  }
  temporary_.clear();
  if (replaces)
    fs::remove_all(earlier, error);
  if (error)
    throw IoError(fmt::format("{}: the new results are in place, but the earlier ones cannot be "
                              "removed from {} ({})",
                              final_.string(), earlier.string(), error.message()));
}

void write_text(const fs::path& file, const std::string& text)
{
  std::ofstream stream(file, std::ios::binary);
  stream << text;
  stream.close();
  if (!stream)
    throw IoError(fmt::format("{}: cannot be written; is the disk full?", file.string()));
}

void make_folder(const fs::path& folder)
{
  std::error_code error;
  fs::create_directories(folder, error);
  if (error)
    throw IoError(fmt::format("{}: cannot be made ({})", folder.string(), error.message()));
}
} // namespace carlin
