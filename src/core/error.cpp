#include "carlin/core/error.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <tuple>
#include <utility>

namespace carlin
{
namespace
{
std::string text(const std::vector<Problem>& problems)
{
  std::string all;
  for (const Problem& problem : problems)
  {
    if (!all.empty())
      all += '\n';
    const FileLocation& at = problem.where;
    all += at.line > 0
               ? fmt::format("{}:{}:{}: error: {}", at.file, at.line, at.column, problem.message)
               : fmt::format("{}: error: {}", at.file, problem.message);
  }
  return all;
}

std::vector<Problem> in_order(std::vector<Problem> problems)
{
  std::ranges::stable_sort(problems,
                           [](const Problem& a, const Problem& b)
                           {
                             return std::tie(a.where.file, a.where.line, a.where.column) <
                                    std::tie(b.where.file, b.where.line, b.where.column);
                           });
  return problems;
}
} // namespace

ModelError::ModelError(std::vector<Problem> problems)
    : Error(text(in_order(problems))), problems_(in_order(std::move(problems)))
{
}

ModelError::ModelError(FileLocation where, std::string message)
    : ModelError(std::vector<Problem>{{std::move(where), std::move(message)}})
{
}
} // namespace carlin
