#pragma once

#include <filesystem>

namespace carlin
{
/// A folder written beside its final place and moved there whole. Whoever does not reach `move_in`
/// leaves nothing behind, and an earlier good result stays.
class StagedFolder
{
public:
  /// @throws IoError when the final place is a file or a folder that is not ours (not empty, and
  ///   none of our marker files in it), or nothing can be written beside it.
  explicit StagedFolder(const std::filesystem::path& final_place);
  ~StagedFolder();
  StagedFolder(const StagedFolder&) = delete;
  StagedFolder& operator=(const StagedFolder&) = delete;

  /// Where to write meanwhile.
  const std::filesystem::path& path() const { return temporary_; }

  /// Replaces the earlier folder. @throws IoError; the earlier folder is back in its place then.
  void move_in();

private:
  std::filesystem::path final_, temporary_;
};

/// Writes a text file whole. @throws IoError.
void write_text(const std::filesystem::path& file, const std::string& text);
/// @throws IoError.
void make_folder(const std::filesystem::path& folder);
} // namespace carlin
