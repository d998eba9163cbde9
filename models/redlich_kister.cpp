#include "models/redlich_kister.hpp"

#include <algorithm>
#include <cmath>
#include <set>
#include <string>
#include <utility>

namespace stillshed {

RedlichKister::RedlichKister(int size, std::vector<RedlichKisterPair> pairs) : size_(size), pairs_(std::move(pairs)) {
  std::vector<Problem> problems;
  std::set<std::pair<int, int>> seen;
  for (std::size_t k = 0; k < pairs_.size(); ++k) {
    const RedlichKisterPair& pair = pairs_[k];
    const std::string where = "redlich-kister/pairs/" + std::to_string(k);
    if (pair.i < 0 || pair.j < 0 || pair.i >= size || pair.j >= size || pair.i == pair.j) {
      problems.push_back({where, "i = " + std::to_string(pair.i) + ", j = " + std::to_string(pair.j),
                          "two different indices from 0 to " + std::to_string(size - 1), ""});
      continue;
    }
    if (!seen.insert(std::minmax(pair.i, pair.j)).second) {
      problems.push_back({where, "a pair given twice", "each pair once", "add the coefficients up"});
    }
    if (pair.c.empty() || pair.c.size() > static_cast<std::size_t>(kMaxRedlichKister)) {
      problems.push_back({where + "/c", std::to_string(pair.c.size()) + " coefficients",
                          "1 to " + std::to_string(kMaxRedlichKister), ""});
    }
    for (const double c : pair.c) {
      if (!std::isfinite(c)) {
        problems.push_back({where + "/c", std::to_string(c), "finite numbers", ""});
      }
    }
  }
  if (!problems.empty()) {
    throw InputError(problems);
  }
}

RedlichKister RedlichKister::face(const Members& members) const {
  std::vector<RedlichKisterPair> kept;
  for (const RedlichKisterPair& pair : pairs_) {
    int i = -1;
    int j = -1;
    for (int k = 0; k < members.size(); ++k) {
      i = members[k] == pair.i ? k : i;
      j = members[k] == pair.j ? k : j;
    }
    if (i >= 0 && j >= 0) {
      kept.push_back({i, j, pair.c});
    }
  }
  return {members.size(), std::move(kept)};
}

}  // namespace stillshed
