#include "models/group_core.hpp"

#include <gtest/gtest.h>

#include "tests/models/sample_models.hpp"

namespace stillshed {
namespace {

// Subgroups of one main group share every psi: adding their areas up must give what separate sites give.
TEST(GroupCore, SitesWithEqualPsiCanBeMerged) {
  const Vec<double> r{2.0, 3.0};
  const Vec<double> q{1.9, 2.7};
  std::array<Vec<double>, kMaxSites> merged{};
  merged[0] = {1.9, 0.7};
  merged[1] = {0.0, 2.0};
  std::array<Vec<double>, kMaxSites> apart{};
  apart[0] = {1.2, 0.7};
  apart[1] = {0.7, 0.0};
  apart[2] = {0.0, 2.0};
  const GroupCore two(r, q, 0.75, 2, merged);
  const GroupCore three(r, q, 0.75, 3, apart);
  SitePsi<double> psi_two(2, false);
  SitePsi<double> psi_three(3, false);
  const double forward = 0.6;
  const double backward = 1.3;
  psi_two.psi(0, 0) = psi_two.psi(1, 1) = 1.0;
  psi_two.psi(0, 1) = forward;
  psi_two.psi(1, 0) = backward;
  for (int m = 0; m < 3; ++m) {
    for (int k = 0; k < 3; ++k) {
      psi_three.psi(m, k) = (m < 2) == (k < 2) ? 1.0 : (m < 2 ? forward : backward);
    }
  }
  const Composition x{0.35, 0.65};
  const auto a = two.residual(psi_two, x);
  const auto b = three.residual(psi_three, x);
  EXPECT_NEAR(a[0], b[0], 1e-15);
  EXPECT_NEAR(a[1], b[1], 1e-15);
}

TEST(GroupCore, NoResidualPartWithoutInteraction) {
  std::array<Vec<double>, kMaxSites> areas{};
  areas[0] = {1.9, 0.7};
  areas[1] = {0.0, 2.0};
  const GroupCore core({2.0, 3.0}, {1.9, 2.7}, 1.0, 2, areas);
  SitePsi<double> psi(2, false);
  for (int m = 0; m < 2; ++m) {
    for (int k = 0; k < 2; ++k) {
      psi.psi(m, k) = 1.0;
    }
  }
  for (const double value : core.residual(psi, Composition{0.2, 0.8})) {
    EXPECT_NEAR(value, 0.0, 1e-15);
  }
}

TEST(GroupCore, RefusesAComponentWithoutSurface) {
  std::array<Vec<double>, kMaxSites> areas{};
  areas[0] = {1.9, 0.0};
  EXPECT_THROW(GroupCore({2.0, 3.0}, {1.9, 2.7}, 1.0, 1, areas), LogicError);
}

}  // namespace
}  // namespace stillshed
