/// Random and planted mixtures: no azeotrope missed, none invented. Quick: 300 mixtures, at least 85 of them with two
/// or more azeotropes on one face; STILLSHED_FULL=1: 2,000.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <map>
#include <string>

#include "engine/stability.hpp"
#include "engine/survey.hpp"
#include "tests/support/independent_search.hpp"
#include "tests/support/random_mixtures.hpp"

namespace stillshed {
namespace {

using testing::kAtmosphere_Pa;
using testing::KnownCase;
using testing::KnownRoot;
using testing::Random;

bool full() {
  return std::getenv("STILLSHED_FULL") != nullptr;
}

/// `quick` cases out of 300, scaled up in the full run.
int cases(int quick) {
  return full() ? quick * 20 / 3 : quick;
}

double distance(const Composition& a, const Composition& b) {
  double largest = 0.0;
  for (int i = 0; i < a.size(); ++i) {
    largest = std::max(largest, std::abs(a[i] - b[i]));
  }
  return largest;
}

/// Every root of the single-liquid equations that a survey reports, stable or not.
std::vector<KnownRoot> reported(const Survey& survey) {
  std::vector<KnownRoot> roots;
  for (const Azeotrope& azeotrope : survey.azeotropes) {
    roots.push_back({azeotrope.point.members, azeotrope.point.x, azeotrope.point.temperature_K});
  }
  for (const RejectedRoot& root : survey.rejected) {
    roots.push_back({root.members, root.x, root.temperature_K});
  }
  return roots;
}

bool contains(const std::vector<KnownRoot>& roots, const KnownRoot& wanted, double tolerance) {
  return std::any_of(roots.begin(), roots.end(), [&](const KnownRoot& root) {
    return root.members == wanted.members && distance(root.x, wanted.x) <= tolerance &&
           std::abs(root.temperature_K - wanted.temperature_K) <= 1e3 * tolerance;
  });
}

/// True when some face holds two or more roots.
bool several_on_a_face(const std::vector<KnownRoot>& roots) {
  std::map<std::vector<int>, int> count;
  for (const KnownRoot& root : roots) {
    if (++count[{root.members.begin(), root.members.end()}] >= 2) {
      return true;
    }
  }
  return false;
}

/// An accepted liquid must not lie above any other on its tangent plane: sampled over its face.
void expect_no_split_nearby(const Mixture& mixture, const Azeotrope& azeotrope) {
  if (azeotrope.stability.outcome != Stability::stable) {
    return;
  }
  Random random(1);
  const FixedPoint& point = azeotrope.point;
  for (int k = 0; k < 40; ++k) {
    const Composition part = random.composition(point.members.size());
    Composition w(mixture.size(), 0.0);
    for (int i = 0; i < part.size(); ++i) {
      w[point.members[i]] = part[i];
    }
    EXPECT_GT(tangent_plane_distance(mixture, point.temperature_K, point.x, w), -1e-9);
  }
}

/// The properties of one survey. `known.all`: the known roots are all there are. True when some face has several roots.
bool check(const KnownCase& known, const std::string& what) {
  SCOPED_TRACE(what);
  const Survey result = survey(known.mixture, kAtmosphere_Pa);
  EXPECT_TRUE(std::none_of(result.faces.begin(), result.faces.end(), [](const FaceProof& face) {
    return face.status != Status::complete;
  })) << "a face is not proved";
  const std::vector<KnownRoot> roots = reported(result);
  for (const KnownRoot& root : known.roots) {
    EXPECT_TRUE(contains(roots, root, 1e-7))
        << "missed: " << root.x[0] << " " << root.x[1] << " at " << root.temperature_K;
  }
  for (std::size_t k = 0; k < roots.size(); ++k) {
    EXPECT_LT(testing::residual(known.mixture, roots[k], kAtmosphere_Pa), 1e-10) << "invented";
    if (known.all) {
      EXPECT_TRUE(contains(known.roots, roots[k], 1e-7)) << "invented: " << roots[k].x[0] << " " << roots[k].x[1];
    }
    for (std::size_t j = 0; j < k; ++j) {
      EXPECT_FALSE(roots[j].members == roots[k].members && distance(roots[j].x, roots[k].x) < 1e-9) << "twice";
    }
  }
  for (const Azeotrope& azeotrope : result.azeotropes) {
    expect_no_split_nearby(known.mixture, azeotrope);
    EXPECT_TRUE(azeotrope.proved);
    EXPECT_FALSE(azeotrope.cluster);
    for (int i = 0; i < azeotrope.point.x.size(); ++i) {
      EXPECT_TRUE(azeotrope.box.lower[i] <= azeotrope.point.x[i] && azeotrope.point.x[i] <= azeotrope.box.upper[i]);
    }
  }
  for (const RejectedRoot& root : result.rejected) {
    EXPECT_LT(tangent_plane_distance(known.mixture, root.temperature_K, root.x, root.stability.incipient), 0.0);
  }
  for (const FaceProof& face : result.faces) {
    EXPECT_NE(face.index_holds, std::optional<bool>(false)) << "index rule of a face with " << face.members.size();
  }
  return several_on_a_face(roots);
}

/// Adds what an independent search finds to a case whose list is not complete.
void search_every_face(KnownCase& known, int starts, Random& random) {
  const int n = known.mixture.size();
  for (unsigned mask = 3; mask < (1U << static_cast<unsigned>(n)); ++mask) {
    Members members;
    for (int i = 0; i < n; ++i) {
      if ((mask >> static_cast<unsigned>(i) & 1U) != 0U) {
        members.push_back(i);
      }
    }
    if (members.size() < 2) {
      continue;
    }
    for (const KnownRoot& root :
         testing::search_independently(known.mixture, members, kAtmosphere_Pa, starts, random)) {
      known.roots.push_back(root);
    }
  }
}

std::string name(const char* family, int k) {
  return std::string(family) + " seed " + std::to_string(k);
}

TEST(SurveyProperty, closed_form_margules) {
  for (int k = 0; k < cases(50); ++k) {
    Random random(static_cast<std::uint64_t>(10'000 + k));
    check(testing::random_margules(random, k % 20 == 0 ? 5 : 3 + k % 2), name("margules", k));
  }
}

TEST(SurveyProperty, unstable_liquids_are_marked_not_counted) {
  int rejected = 0;
  for (int k = 0; k < cases(20); ++k) {
    Random random(static_cast<std::uint64_t>(15'000 + k));
    const KnownCase known = testing::random_margules(random, 2 + k % 2, 3.5);
    check(known, name("margules that may split", k));
    for (const KnownRoot& root : known.roots) {
      if (root.members.size() == 2) {
        // A binary root inside the spinodal (1 - 2 A x_1 x_2 < 0) is certainly unstable.
        const double A = std::get<Margules>(known.mixture.activity()).A()(root.members[0], root.members[1]);
        rejected += 1.0 - 2.0 * A * root.x[root.members[0]] * root.x[root.members[1]] < 0.0 ? 1 : 0;
      }
    }
    const Survey result = survey(known.mixture, kAtmosphere_Pa);
    for (const Azeotrope& azeotrope : result.azeotropes) {
      if (azeotrope.point.members.size() == 2) {
        const Members& pair = azeotrope.point.members;
        const double A = std::get<Margules>(known.mixture.activity()).A()(pair[0], pair[1]);
        EXPECT_GT(1.0 - 2.0 * A * azeotrope.point.x[pair[0]] * azeotrope.point.x[pair[1]], 0.0);
      }
    }
  }
  EXPECT_GT(rejected, 3);
}

TEST(SurveyProperty, search_alone_finds_what_the_proof_finds) {
  for (int k = 0; k < cases(16); ++k) {
    Random random(static_cast<std::uint64_t>(25'000 + k));
    const Mixture mixture = testing::random_nrtl(random, 4);
    SurveyOptions located_only;
    located_only.prove_up_to = 1;
    EXPECT_EQ(reported(survey(mixture, kAtmosphere_Pa, located_only)).size(),
              reported(survey(mixture, kAtmosphere_Pa)).size())
        << k;
  }
}

TEST(SurveyProperty, random_nrtl_against_independent_search) {
  for (int k = 0; k < cases(40); ++k) {
    Random random(static_cast<std::uint64_t>(20'000 + k));
    KnownCase known;
    known.mixture = testing::random_nrtl(random, k % 20 == 0 ? 5 : 3 + k % 2);
    search_every_face(known, 12, random);
    check(known, name("nrtl", k));
  }
}

TEST(SurveyProperty, several_azeotropes_in_one_nrtl_binary) {
  int several = 0;
  for (int k = 0; k < cases(40); ++k) {
    Random random(static_cast<std::uint64_t>(30'000 + k));
    several += check(testing::planted_nrtl_binary(random), name("nrtl binary", k)) ? 1 : 0;
  }
  EXPECT_GE(several, cases(40));
}

TEST(SurveyProperty, planted_nrtl_ternary) {
  for (int k = 0; k < cases(40); ++k) {
    Random random(static_cast<std::uint64_t>(40'000 + k));
    KnownCase known = testing::planted_nrtl_ternary(random);
    search_every_face(known, 20, random);
    check(known, name("nrtl ternary", k));
  }
}

TEST(SurveyProperty, planted_redlich_kister_binary) {
  int several = 0;
  for (int k = 0; k < cases(30); ++k) {
    Random random(static_cast<std::uint64_t>(50'000 + k));
    several +=
        check(testing::planted_redlich_kister_binary(random, 1 + k % 3), name("redlich-kister binary", k)) ? 1 : 0;
  }
  EXPECT_GE(several, cases(30) * 2 / 3);
}

TEST(SurveyProperty, planted_redlich_kister_ternary) {
  int several = 0;
  for (int k = 0; k < cases(40); ++k) {
    Random random(static_cast<std::uint64_t>(60'000 + k));
    KnownCase known = testing::planted_redlich_kister_ternary(random, 1 + k % 3);
    search_every_face(known, 20, random);
    several += check(known, name("redlich-kister ternary", k)) ? 1 : 0;
  }
  EXPECT_GE(several, cases(40) * 2 / 3 - 1);
}

TEST(SurveyProperty, near_corners_on_both_sides) {
  for (int k = 0; k < cases(24); ++k) {
    Random random(static_cast<std::uint64_t>(70'000 + k));
    const double trace = std::pow(10.0, random.uniform(-6.0, -3.0));
    KnownCase known = testing::near_corner(random, k % 2 == 0 ? trace : -trace);
    check(known, name("near corner", k));
    if (k % 2 == 0) {
      ASSERT_EQ(known.roots.size(), 1U);
    } else {
      ASSERT_TRUE(known.roots.empty());
    }
  }
}

TEST(SurveyProperty, near_edges_on_both_sides) {
  for (int k = 0; k < cases(16); ++k) {
    Random random(static_cast<std::uint64_t>(80'000 + k));
    const double trace = std::pow(10.0, random.uniform(-6.0, -3.0));
    check(testing::near_edge(random, k % 2 == 0 ? trace : -trace), name("near edge", k));
  }
}

}  // namespace
}  // namespace stillshed
