#include "params/errors.hpp"

#include <utility>

namespace stillshed {
namespace {

std::string join(const std::vector<Problem>& problems) {
  std::string text;
  for (const Problem& problem : problems) {
    if (!text.empty()) {
      text += '\n';
    }
    text += problem.text();
  }
  return text;
}

}  // namespace

std::string Problem::text() const {
  std::string line = where;
  if (!found.empty()) {
    line += ": found " + found;
  }
  if (!allowed.empty()) {
    line += (found.empty() ? ": allowed " : ", allowed ") + allowed;
  }
  if (!remedy.empty()) {
    line += "; " + remedy;
  }
  return line;
}

InputError::InputError(std::vector<Problem> problems)
    : std::runtime_error(join(problems)), problems_(std::move(problems)) {}

InputError::InputError(Problem problem) : InputError(std::vector<Problem>{std::move(problem)}) {}

}  // namespace stillshed
