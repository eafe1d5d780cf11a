#pragma once

#include <stdexcept>
#include <string>
#include <vector>

namespace carlin
{
/// Place in a model file. Lines and columns count from 1, as editors do; line 0: no place known.
struct FileLocation
{
  std::string file;
  int line = 0;
  int column = 0;
};

/// Base of every error that a user can cause or act on.
/// `what()` is one complete message: what is wrong, where, and what to do.
class Error : public std::runtime_error
{
public:
  using std::runtime_error::runtime_error;
};

/// A quantity is outside its valid range. Knows nothing of files; the reader adds
/// the place and rethrows it as a problem of the model. Exit status 2.
class ValueError : public Error
{
public:
  using Error::Error;
};

/// One thing wrong with a model file.
struct Problem
{
  FileLocation where;
  std::string
      message; ///< "path: what is wrong, what was expected; what to do", one line, lower case
};

/// The model file is wrong: all problems found in one pass. Exit status 2.
/// `what()` has one line a problem, "file:line:column: error: message", in order of place.
class ModelError : public Error
{
public:
  explicit ModelError(std::vector<Problem> problems);
  ModelError(FileLocation where, std::string message);

  const std::vector<Problem>& problems() const { return problems_; }

private:
  std::vector<Problem> problems_;
};

/// The computation could not finish; names the part of the boat. Exit status 3.
class SolveError : public Error
{
public:
  using Error::Error;
};

/// A file could not be read or written. Exit status 3 (2 for the model file itself, by ModelError).
class IoError : public Error
{
public:
  using Error::Error;
};
} // namespace carlin
