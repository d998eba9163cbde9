#include "models/scalar.hpp"

#include <ceres/jet.h>
#include <gtest/gtest.h>

#include "models/jet_interval.hpp"

namespace stillshed {
namespace {

TEST(Vec, NewEntriesAreZero) {
  const Vec<double> zeros(5);
  for (const double value : zeros) {
    EXPECT_EQ(value, 0.0);
  }
  const Vec<ceres::Jet<Interval, 3>> jets(2);
  EXPECT_EQ(jets[1].v[2].upper(), 0.0);
}

TEST(Vec, CopiesOnlyWhatItHolds) {
  Vec<double> a{1.0, 2.0, 3.0};
  Vec<double> b = a;
  b[0] = 9.0;
  EXPECT_EQ(a[0], 1.0);
  a = Vec<double>{4.0};
  EXPECT_EQ(a.size(), 1);
  EXPECT_EQ(a, (Vec<double>{4.0}));
  EXPECT_NE(a, b);
  a.push_back(5.0);
  EXPECT_EQ(a.span().back(), 5.0);
}

TEST(Vec, RefusesMoreThanItsCapacity) {
  const int too_many = kMaxComponents + static_cast<int>(Vec<int>(1).size());
  EXPECT_THROW(static_cast<void>(Vec<double>(too_many)), LogicError);
  EXPECT_THROW(Vec<double>(-1), LogicError);
  Vec<int> full(kMaxComponents, 1);
  EXPECT_THROW(full.push_back(1), LogicError);
}

TEST(Matrix, FaceKeepsRowsAndColumns) {
  Matrix<double> m(3);
  for (int i = 0; i < 3; ++i) {
    for (int j = 0; j < 3; ++j) {
      m(i, j) = 10.0 * i + j;
    }
  }
  const Matrix<double> face = m.face({0, 2});
  EXPECT_EQ(face(0, 1), 2.0);
  EXPECT_EQ(face(1, 0), 20.0);
  EXPECT_EQ(m.row(1)[2], 12.0);
  EXPECT_THROW(Matrix<double>(-1), LogicError);
}

}  // namespace
}  // namespace stillshed
