/// The number types models are written over, and the small fixed-capacity containers they use.
///
///   double                    speed
///   ceres::Jet<double, N>     exact derivatives
///   Interval                  outward-rounded enclosures (proof)
///   ceres::Jet<Interval, N>   enclosures of value and gradient (proof)
///
/// Rules for model code: `S sum(0.0)` not `S sum = 0.0`; `2.0 * x` not `2 * x`; no `if`, `?:`,
/// `min`, `max` on an S; `using std::exp;` then unqualified `exp`.
#pragma once

#include <cstddef>
#include <initializer_list>
#include <memory>
#include <span>
#include <type_traits>

#include "params/errors.hpp"

namespace stillshed {

/// Largest number of components of one mixture.
inline constexpr int kMaxComponents = 12;

/// Asks for entries without a value.
struct ForOverwrite {};
inline constexpr ForOverwrite for_overwrite{};

/// Room for `Capacity` numbers of which only those in use are ever written: no heap, and no clearing of the rest
/// (twelve jets of intervals are kilobytes).
template <class S, int Capacity>
class FixedBuffer {
  static_assert(std::is_trivially_destructible_v<S>);

 public:
  FixedBuffer() {}  // NOLINT(modernize-use-equals-default): the union member stays unconstructed on purpose
  explicit FixedBuffer(int count) : count_(count) { std::uninitialized_value_construct_n(data_, count); }
  /// Entries are to be written before they are read.
  FixedBuffer(int count, ForOverwrite /*tag*/) : count_(count) {
    if constexpr (!std::is_trivially_copyable_v<S>) {
      std::uninitialized_default_construct_n(data_, count);
    }
  }
  FixedBuffer(int count, const S& value) : count_(count) { std::uninitialized_fill_n(data_, count, value); }
  FixedBuffer(const FixedBuffer& other) { copy(other); }
  FixedBuffer& operator=(const FixedBuffer& other) {
    if (this != &other) {
      copy(other);
    }
    return *this;
  }
  ~FixedBuffer() = default;

  [[nodiscard]] int count() const { return count_; }
  S* data() { return data_; }
  const S* data() const { return data_; }
  void append(const S& value) { std::construct_at(data_ + count_++, value); }

 private:
  void copy(const FixedBuffer& other) {
    count_ = other.count_;
    for (int i = 0; i < count_; ++i) {
      std::construct_at(data_ + i, other.data_[i]);
    }
  }
  union {
    S data_[static_cast<std::size_t>(Capacity)];
  };
  int count_ = 0;
};

/// Fixed-capacity vector of up to kMaxComponents numbers; new entries are zero.
template <class S>
class Vec {
 public:
  Vec() = default;
  explicit Vec(int size) : data_(checked(size)) {}
  Vec(int size, ForOverwrite tag) : data_(checked(size), tag) {}
  Vec(int size, const S& value) : data_(checked(size), value) {}
  Vec(std::initializer_list<S> values) {
    for (const S& value : values) {
      push_back(value);
    }
  }
  [[nodiscard]] int size() const { return data_.count(); }
  [[nodiscard]] bool empty() const { return size() == 0; }
  S& operator[](int i) { return data_.data()[i]; }
  const S& operator[](int i) const { return data_.data()[i]; }
  S* begin() { return data_.data(); }
  S* end() { return data_.data() + size(); }
  const S* begin() const { return data_.data(); }
  const S* end() const { return data_.data() + size(); }
  [[nodiscard]] std::span<const S> span() const { return {begin(), static_cast<std::size_t>(size())}; }
  void push_back(const S& value) {
    expects(size() < kMaxComponents, "Vec: full");
    data_.append(value);
  }
  friend bool operator==(const Vec& a, const Vec& b) {
    if (a.size() != b.size()) {
      return false;
    }
    for (int i = 0; i < a.size(); ++i) {
      if (!(a[i] == b[i])) {
        return false;
      }
    }
    return true;
  }

 private:
  static int checked(int size) {
    expects(size >= 0 && size <= kMaxComponents, "Vec: size out of range");
    return size;
  }
  FixedBuffer<S, kMaxComponents> data_;
};

/// Mole fractions in the order of the mixture's components.
using Composition = Vec<double>;

/// Indices of the components that make up a face of the composition simplex, ascending.
using Members = Vec<int>;

/// A model's guard against a composition of another size: LogicError.
template <class S>
void expect_size(const Vec<S>& x, int size) {
  expects(x.size() == size, "a composition whose size is not that of the model");
}

/// Square matrix of up to kMaxComponents rows, stored row by row; row i belongs to component i; new entries are zero.
template <class S>
class Matrix {
 public:
  Matrix() = default;
  explicit Matrix(int size) : data_(checked(size) * size), size_(size) {}
  Matrix(int size, ForOverwrite tag) : data_(checked(size) * size, tag), size_(size) {}
  Matrix(int size, const S& value) : data_(checked(size) * size, value), size_(size) {}
  [[nodiscard]] int size() const { return size_; }
  S& operator()(int i, int j) { return data_.data()[i * size_ + j]; }
  const S& operator()(int i, int j) const { return data_.data()[i * size_ + j]; }
  S* row(int i) { return data_.data() + i * size_; }
  const S* row(int i) const { return data_.data() + i * size_; }
  /// Rows and columns of some of the components.
  [[nodiscard]] Matrix face(const Members& members) const {
    Matrix result(members.size());
    for (int i = 0; i < members.size(); ++i) {
      for (int j = 0; j < members.size(); ++j) {
        result(i, j) = (*this)(members[i], members[j]);
      }
    }
    return result;
  }

 private:
  static int checked(int size) {
    expects(size >= 0 && size <= kMaxComponents, "Matrix: size out of range");
    return size;
  }
  FixedBuffer<S, kMaxComponents * kMaxComponents> data_;
  int size_ = 0;
};

}  // namespace stillshed
