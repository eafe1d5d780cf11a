#pragma once

#include "carlin/checks/checks.hpp"
#include "carlin/mounts/mounts.hpp"

#include <set>
#include <string>

namespace carlin
{
// Words of the vocabulary, the same in tables, CSV and pictures.
std::string word_of(Verdict verdict);
std::string word_of(CaseClass load_class);
std::string word_of(Standing standing);
std::string word_of(Hold hold);
std::string word_of(CollarKind kind);
std::string word_of(SlidesAt place);

/// Names made safe for files and folders: letters, digits, '.', '-', '_' and whatever is beyond
/// ASCII stay, everything else becomes '-'; never empty, hidden, '.' or '..'; two names of one
/// folder that become equal (also if only in case) get "-2", "-3", ...
class FileNames
{
public:
  FileNames() = default;
  /// @param taken Names the folder uses already.
  explicit FileNames(const std::set<std::string>& taken);
  /// Each call makes a new name of this folder.
  std::string make(const std::string& name);

private:
  std::set<std::string> taken_; // in lower case
};
} // namespace carlin
