/// Dense linear algebra for at most kMaxComponents + 1 unknowns, without heap: the inner loops of search and proof.
///
/// Gauss elimination with partial pivoting. Eigen's decompositions of run-time size took twice the time of the whole
/// Newton search of a ternary face; these loops do not show in its profile.
#pragma once

#include <array>
#include <cmath>
#include <cstddef>
#include <utility>

#include "models/scalar.hpp"

namespace stillshed {

inline constexpr std::size_t kMostUnknowns = static_cast<std::size_t>(kMaxComponents) + 1;

/// Square array of run-time size, row first.
struct SquareArray {
  std::array<std::array<double, kMostUnknowns>, kMostUnknowns> entry;
  std::array<double, kMostUnknowns>& operator[](std::size_t row) { return entry[row]; }
  const std::array<double, kMostUnknowns>& operator[](std::size_t row) const { return entry[row]; }
};

/// Solves a y = b in place (b becomes y, a is destroyed). False when `a` is singular to rounding or not finite.
[[nodiscard]] inline bool solve_in_place(SquareArray& a, std::array<double, kMostUnknowns>& b, std::size_t size) {
  for (std::size_t k = 0; k < size; ++k) {
    std::size_t best = k;
    for (std::size_t r = k + 1; r < size; ++r) {
      if (std::abs(a[r][k]) > std::abs(a[best][k])) {
        best = r;
      }
    }
    if (!(std::abs(a[best][k]) > 0.0) || !std::isfinite(a[best][k])) {
      return false;
    }
    std::swap(a[k], a[best]);
    std::swap(b[k], b[best]);
    for (std::size_t r = k + 1; r < size; ++r) {
      const double factor = a[r][k] / a[k][k];
      for (std::size_t c = k + 1; c < size; ++c) {
        a[r][c] -= factor * a[k][c];
      }
      b[r] -= factor * b[k];
    }
  }
  for (std::size_t k = size; k-- > 0;) {
    for (std::size_t c = k + 1; c < size; ++c) {
      b[k] -= a[k][c] * b[c];
    }
    b[k] /= a[k][k];
    if (!std::isfinite(b[k])) {
      return false;
    }
  }
  return true;
}

/// Inverse of `a` (destroyed). False when singular to rounding or not finite.
[[nodiscard]] inline bool invert(SquareArray& a, SquareArray& inverse, std::size_t size) {
  for (std::size_t r = 0; r < size; ++r) {
    for (std::size_t c = 0; c < size; ++c) {
      inverse[r][c] = r == c ? 1.0 : 0.0;
    }
  }
  for (std::size_t k = 0; k < size; ++k) {
    std::size_t best = k;
    for (std::size_t r = k + 1; r < size; ++r) {
      if (std::abs(a[r][k]) > std::abs(a[best][k])) {
        best = r;
      }
    }
    if (!(std::abs(a[best][k]) > 0.0) || !std::isfinite(a[best][k])) {
      return false;
    }
    std::swap(a[k], a[best]);
    std::swap(inverse[k], inverse[best]);
    const double scale = 1.0 / a[k][k];
    for (std::size_t c = 0; c < size; ++c) {
      a[k][c] *= scale;
      inverse[k][c] *= scale;
    }
    for (std::size_t r = 0; r < size; ++r) {
      if (r == k) {
        continue;
      }
      const double factor = a[r][k];
      for (std::size_t c = 0; c < size; ++c) {
        a[r][c] -= factor * a[k][c];
        inverse[r][c] -= factor * inverse[k][c];
      }
    }
  }
  for (std::size_t r = 0; r < size; ++r) {
    for (std::size_t c = 0; c < size; ++c) {
      if (!std::isfinite(inverse[r][c])) {
        return false;
      }
    }
  }
  return true;
}

}  // namespace stillshed
