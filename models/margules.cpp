#include "models/margules.hpp"

#include <cmath>
#include <string>
#include <vector>

namespace stillshed {

Margules::Margules(const Matrix<double>& A) : A_(A) {
  std::vector<Problem> problems;
  for (int i = 0; i < A.size(); ++i) {
    for (int j = 0; j < A.size(); ++j) {
      const std::string where = "margules/A/" + std::to_string(i) + "/" + std::to_string(j);
      if (!std::isfinite(A(i, j))) {
        problems.push_back({where, std::to_string(A(i, j)), "a finite number", ""});
      } else if (i == j && A(i, j) != 0.0) {
        problems.push_back({where, std::to_string(A(i, j)), "0 on the diagonal", ""});
      } else if (j < i && A(i, j) != A(j, i)) {
        problems.push_back({where, std::to_string(A(i, j)), "the value of its mirror entry, " + std::to_string(A(j, i)),
                            "the matrix is symmetric; use redlich-kister for an asymmetric pair"});
      }
    }
  }
  if (!problems.empty()) {
    throw InputError(problems);
  }
}

}  // namespace stillshed
