/// The number types models are written over, and the small fixed-capacity vector they use.
///
///   double                    speed
///   ceres::Jet<double, N>     exact derivatives
///   Interval                  outward-rounded enclosures (proof)
///   ceres::Jet<Interval, N>   enclosures of value and gradient (proof)
///
/// Rules for model code: `S sum(0.0)` not `S sum = 0.0`; `2.0 * x` not `2 * x`; no `if`, `?:`,
/// `min`, `max` on an S; `using std::exp;` then unqualified `exp`.
#pragma once

#include <array>
#include <initializer_list>
#include <span>

#include "params/errors.hpp"

namespace stillshed {

/// Largest number of components of one mixture.
inline constexpr int kMaxComponents = 12;

/// Fixed-capacity vector of up to kMaxComponents numbers: no heap in a model call.
template <class S>
class Vec {
 public:
  Vec() = default;
  explicit Vec(int size) : size_(size) { expects(size >= 0 && size <= kMaxComponents, "Vec: size out of range"); }
  Vec(int size, const S& value) : Vec(size) {
    for (int i = 0; i < size_; ++i) {
      data_[static_cast<std::size_t>(i)] = value;
    }
  }
  Vec(std::initializer_list<S> values) : Vec(static_cast<int>(values.size())) {
    int i = 0;
    for (const S& value : values) {
      data_[static_cast<std::size_t>(i++)] = value;
    }
  }
  [[nodiscard]] int size() const { return size_; }
  [[nodiscard]] bool empty() const { return size_ == 0; }
  S& operator[](int i) { return data_[static_cast<std::size_t>(i)]; }
  const S& operator[](int i) const { return data_[static_cast<std::size_t>(i)]; }
  S* begin() { return data_.data(); }
  S* end() { return data_.data() + size_; }
  const S* begin() const { return data_.data(); }
  const S* end() const { return data_.data() + size_; }
  [[nodiscard]] std::span<const S> span() const { return {data_.data(), static_cast<std::size_t>(size_)}; }
  void push_back(const S& value) {
    expects(size_ < kMaxComponents, "Vec: full");
    data_[static_cast<std::size_t>(size_++)] = value;
  }
  friend bool operator==(const Vec& a, const Vec& b) {
    if (a.size_ != b.size_) {
      return false;
    }
    for (int i = 0; i < a.size_; ++i) {
      if (!(a[i] == b[i])) {
        return false;
      }
    }
    return true;
  }

 private:
  std::array<S, kMaxComponents> data_;  // not cleared: a model call fills what it uses
  int size_ = 0;
};

/// Square matrix of up to kMaxComponents rows; row i belongs to component i.
template <class S>
class Matrix {
 public:
  Matrix() = default;
  explicit Matrix(int size) : size_(size) { expects(size >= 0 && size <= kMaxComponents, "Matrix: size out of range"); }
  Matrix(int size, const S& value) : Matrix(size) {
    for (int i = 0; i < size; ++i) {
      for (int j = 0; j < size; ++j) {
        (*this)(i, j) = value;
      }
    }
  }
  [[nodiscard]] int size() const { return size_; }
  S& operator()(int i, int j) { return data_[static_cast<std::size_t>(i * kMaxComponents + j)]; }
  const S& operator()(int i, int j) const { return data_[static_cast<std::size_t>(i * kMaxComponents + j)]; }
  /// Rows and columns of some of the components.
  template <class Indices>
  [[nodiscard]] Matrix face(const Indices& members) const {
    Matrix result(members.size());
    for (int i = 0; i < members.size(); ++i) {
      for (int j = 0; j < members.size(); ++j) {
        result(i, j) = (*this)(members[i], members[j]);
      }
    }
    return result;
  }

 private:
  std::array<S, static_cast<std::size_t>(kMaxComponents) * kMaxComponents> data_;
  int size_ = 0;
};

/// Mole fractions in the order of the mixture's components.
using Composition = Vec<double>;

/// Indices of the components that make up a face of the composition simplex, ascending.
using Members = Vec<int>;

}  // namespace stillshed
