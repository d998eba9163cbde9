#include "models/pair_parameters.hpp"

#include <cmath>

namespace stillshed {
namespace {

std::string entry(const std::string& model, const char* name, int i, int j) {
  return model + "/" + name + "/" + std::to_string(i) + "/" + std::to_string(j);
}

}  // namespace

bool PairParameters::depends_on_temperature() const {
  for (int i = 0; i < size(); ++i) {
    for (int j = 0; j < size(); ++j) {
      if (b_K(i, j) != 0.0 || e(i, j) != 0.0 || f_per_K(i, j) != 0.0) {
        return true;
      }
    }
  }
  return false;
}

bool PairParameters::uses_ln_T() const {
  for (int i = 0; i < size(); ++i) {
    for (int j = 0; j < size(); ++j) {
      if (e(i, j) != 0.0) {
        return true;
      }
    }
  }
  return false;
}

PairParameters PairParameters::face(const Members& members) const {
  PairParameters result;
  result.a = a.face(members);
  result.b_K = b_K.face(members);
  result.e = e.face(members);
  result.f_per_K = f_per_K.face(members);
  return result;
}

std::vector<Problem> PairParameters::problems(const std::string& model) const {
  std::vector<Problem> found;
  const struct {
    const char* name;
    const Matrix<double>& matrix;
  } parts[] = {{"a", a}, {"b_K", b_K}, {"e", e}, {"f", f_per_K}};
  for (const auto& part : parts) {
    if (part.matrix.size() != size()) {
      found.push_back({model + "/" + part.name, std::to_string(part.matrix.size()) + " rows",
                       std::to_string(size()) + " rows, as many as components", "complete the matrix"});
      continue;
    }
    for (int i = 0; i < size(); ++i) {
      for (int j = 0; j < size(); ++j) {
        const double value = part.matrix(i, j);
        if (!std::isfinite(value)) {
          found.push_back({entry(model, part.name, i, j), std::to_string(value), "a finite number", ""});
        } else if (i == j && value != 0.0) {
          found.push_back({entry(model, part.name, i, j), std::to_string(value), "0 on the diagonal",
                           "check the order of rows and columns"});
        }
      }
    }
  }
  return found;
}

}  // namespace stillshed
