#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <vector>

#include "core/convex/cones.h"
#include "core/convex/wald_limits.h"
#include "tests/support/bounds_cases.h"
#include "tests/support/random_sets.h"

namespace rejoinder {
namespace {

// Source: tests/reference/bounds_visible.json, items 1 and 2.
TEST(GreatestWald, MatchesReferenceLimits) {
  for (const test::LimitCase& c : test::limit_cases()) {
    SCOPED_TRACE(c.id + " " + c.title);
    const GreatestWald greatest = greatest_wald(c.set, c.R, c.r);
    ASSERT_EQ(greatest.status, LimitStatus::Found);
    if (c.max_wald && std::isinf(*c.max_wald)) {
      EXPECT_EQ(greatest.kind, GreatestWald::Infinite);
      // V is a point of the set at which the rows lose a direction.
      EXPECT_LE(greatest.witness.outside, 1e-9);
      EXPECT_GT(greatest.witness.wald, 1e9);
    } else if (c.max_wald) {
      EXPECT_EQ(greatest.kind, GreatestWald::Exact) << greatest.method;
      EXPECT_NEAR(greatest.attained, *c.max_wald, 1e-8 * *c.max_wald);
      EXPECT_GE(greatest.guaranteed, *c.max_wald * (1 - 1e-12));
      EXPECT_NEAR(greatest.witness.wald, greatest.attained, 1e-9 * greatest.attained);
      EXPECT_LE(greatest.witness.outside, 1e-9);
    } else {
      // The reference leaves a gap between a value attained and a bound; anything in between may be the
      // answer.
      EXPECT_LT(greatest.kind, GreatestWald::NotBounded);
      EXPECT_GE(greatest.attained, *c.max_attained * (1 - 1e-8));
      EXPECT_LE(greatest.guaranteed, *c.max_upper * (1 + 1e-8));
    }
  }
}

// Second route: every vertex of the box of b and V, 2^(p(p+1)/2 + p) of them. W is convex in (b, V), so its
// greatest value over a box of positive definite matrices is at a vertex.
double greatest_over_vertices(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  const int p = set.size();
  struct Entry {
    int i, j;
    Interval value;
  };
  std::vector<Entry> entries;
  for (int j = 0; j < p; ++j) entries.push_back({j, j, set.variance(j)});
  for (const PairInterval& fact : set.covariances) entries.push_back({fact.i, fact.j, fact.value});
  double greatest = 0;
  for (long v = 0; v < (1L << entries.size()); ++v) {
    Eigen::MatrixXd V = Eigen::MatrixXd::Zero(p, p);
    for (std::size_t k = 0; k < entries.size(); ++k)
      V(entries[k].i, entries[k].j) = V(entries[k].j, entries[k].i) =
          (v >> k) & 1 ? entries[k].value.high : entries[k].value.low;
    if (Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd>(V).eigenvalues()(0) <= 0) continue;
    for (int corner = 0; corner < (1 << p); ++corner) {
      Eigen::VectorXd b = set.centre;
      for (int j = 0; j < p; ++j) b(j) += (corner >> j) & 1 ? set.half_width(j) : -set.half_width(j);
      greatest = std::max(greatest, wald_at(R, r, b, V));
    }
  }
  return greatest;
}

TEST(GreatestWald, EqualsTheLargestVertexOfACovarianceBox) {
  test::RandomSets sets(11);
  int exact = 0;
  for (int k = 0; k < 40; ++k) {
    const int p = 2 + k % 2, q = 1 + sets.below(p);
    const test::RandomCase c = sets.draw(p, q, test::Facts::AllCovariances, 2);
    SCOPED_TRACE(k);
    const GreatestWald greatest = greatest_wald(c.set, c.R, c.r);
    if (greatest.status == LimitStatus::Dependent || greatest.kind == GreatestWald::Infinite) continue;
    const double vertex = greatest_over_vertices(c.set, c.R, c.r);
    EXPECT_GE(greatest.guaranteed, vertex * (1 - 1e-9));
    if (greatest.kind != GreatestWald::Exact) continue;
    ++exact;
    EXPECT_NEAR(greatest.attained, vertex, 1e-6 * vertex);
  }
  EXPECT_GE(exact, 25);
}

// Checked: no point of the set beats the guaranteed value, whatever is known of V; an infinite answer shows
// its point.
TEST(GreatestWald, IsNeverBeatenByAPointOfTheSet) {
  test::RandomSets sets(12);
  for (int k = 0; k < 42; ++k) {
    const int p = 2 + sets.below(3), q = 1 + sets.below(std::min(p, 3));
    const test::RandomCase c = sets.draw(p, q, static_cast<test::Facts>(k % 7), 2, 10, sets.below(2) == 0);
    SCOPED_TRACE(k);
    GreatestEffort effort;
    effort.starts = 5;
    const GreatestWald greatest = greatest_wald(c.set, c.R, c.r, effort);
    if (greatest.status == LimitStatus::Dependent) continue;
    ASSERT_EQ(greatest.status, LimitStatus::Found);
    const double hidden = wald_at(c.R, c.r, c.b, c.V);
    EXPECT_GE(greatest.guaranteed, hidden * (1 - 1e-9));
    if (greatest.kind == GreatestWald::Infinite) {
      EXPECT_GT(greatest.witness.wald, 1e7);
      EXPECT_LE(greatest.witness.outside, 1e-9);
      continue;
    }
    EXPECT_GE(greatest.attained, hidden * (1 - 1e-6));
    EXPECT_LE(greatest.attained, greatest.guaranteed);
    EXPECT_NEAR(greatest.witness.wald, greatest.attained, 1e-6 * greatest.attained);
    EXPECT_LE(greatest.witness.outside, 1e-9);
  }
}

AdmissibleSet two_terms(double s_low, double s_high) {
  AdmissibleSet set(2);
  for (int j = 0; j < 2; ++j) {
    set.set_coefficient(j, {0.95, 1.05});
    set.set_se(j, {s_low, s_high});
  }
  return set;
}

// Derived: 0.115 - 0.115 = 0 in decimals, so the corner of the box is exactly singular and W has no limit,
// however the doubles round.
TEST(GreatestWald, TakesACornerThatIsSingularInDecimalsAsSingular) {
  AdmissibleSet set(2);
  for (int j = 0; j < 2; ++j) {
    set.set_coefficient(j, {0.5, 0.6});
    set.set_variance(j, {0.115, 0.125});
  }
  set.covariances.push_back({0, 1, {0.105, 0.115}});
  const GreatestWald greatest = greatest_wald(set, Eigen::MatrixXd::Identity(2, 2), Eigen::VectorXd::Zero(2));
  EXPECT_NE(greatest.kind, GreatestWald::Exact);
  EXPECT_NE(greatest.kind, GreatestWald::Guaranteed);
  EXPECT_GT(greatest.attained, 1e6);
}

// Derived: with |correlation| <= c and q coefficients W is unbounded exactly from c = 1 / (q - 1) on.
TEST(GreatestWald, IsInfiniteFromTheCapThatLetsTheMatrixBeSingular) {
  AdmissibleSet set(3);
  for (int j = 0; j < 3; ++j) {
    set.set_coefficient(j, {0.95, 1.05});
    set.set_se(j, {0.45, 0.55});
  }
  const Eigen::MatrixXd R = Eigen::MatrixXd::Identity(3, 3);
  set.every_correlation = {-0.5, 0.5};
  EXPECT_EQ(greatest_wald(set, R, Eigen::VectorXd::Zero(3)).kind, GreatestWald::Infinite);
  set.every_correlation = {-0.499, 0.499};
  EXPECT_EQ(greatest_wald(set, R, Eigen::VectorXd::Zero(3)).kind, GreatestWald::Exact);
}

// Derived: t1 = t2 exactly, standard errors exact, nothing known of the correlation. Towards correlation 1 W
// stays finite, but towards -1 it does not.
TEST(GreatestWald, FindsTheOtherEndWhenRatiosAreExactlyEqual) {
  AdmissibleSet set(2);
  for (int j = 0; j < 2; ++j) {
    set.set_coefficient(j, {1, 1});
    set.set_se(j, {0.5, 0.5});
  }
  const GreatestWald greatest = greatest_wald(set, Eigen::MatrixXd::Identity(2, 2), Eigen::VectorXd::Zero(2));
  EXPECT_EQ(greatest.kind, GreatestWald::Infinite);
  EXPECT_LT(greatest.witness.V(0, 1), 0);
}

TEST(GreatestWald, IsInfiniteWhereAStandardErrorReachesZeroOrACoefficientIsUnknown) {
  const Eigen::MatrixXd R = Eigen::MatrixXd::Identity(2, 2);
  AdmissibleSet set = two_terms(0, 0.05);
  set.every_correlation = {-0.3, 0.3};
  EXPECT_EQ(greatest_wald(set, R, Eigen::VectorXd::Zero(2)).kind, GreatestWald::Infinite);
  set.every_correlation = {0.2, 0.3};
  EXPECT_EQ(greatest_wald(set, R, Eigen::VectorXd::Zero(2)).kind, GreatestWald::Infinite);
  set = two_terms(0.1, 0.2);
  set.half_width(1) = kInfinity;
  EXPECT_EQ(greatest_wald(set, R, Eigen::VectorXd::Zero(2)).kind, GreatestWald::Infinite);
}

// Derived: q = 1, |t| = (|d| + h) / (s of the longer side - s of the shorter).
TEST(GreatestWald, OfOneDifferenceIsTheClosedForm) {
  AdmissibleSet set(2);
  set.set_coefficient(0, {3, 3});
  set.set_coefficient(1, {1, 1});
  set.set_se(0, {2, 2});
  set.set_se(1, {0.5, 0.5});
  Eigen::MatrixXd R(1, 2);
  R << 1, -1;
  const GreatestWald greatest = greatest_wald(set, R, Eigen::VectorXd::Zero(1));
  EXPECT_EQ(greatest.kind, GreatestWald::Exact);
  EXPECT_NEAR(greatest.attained, 4.0 / 2.25, 1e-12);
  EXPECT_NEAR(greatest.witness.wald, 4.0 / 2.25, 1e-12);
}

// The ratio is largest inside the cone at n'L^-1 n or on an edge. Derived by hand for two cases of size 2.
TEST(GreatestRatio, IsTakenOverTheFaces) {
  Eigen::MatrixXd L(2, 2);
  L << 1, -0.5, -0.5, 1;
  EXPECT_NEAR(greatest_ratio(Eigen::Vector2d(1, 1), L), 4, 1e-9);  // (1 + 1)^2 / (2 - 1)
  L << 1, 0.9, 0.9, 1;
  EXPECT_NEAR(greatest_ratio(Eigen::Vector2d(2, 1), L), 4, 1e-9);  // at the first generator
  L << 1, -1.1, -1.1, 1;
  EXPECT_TRUE(std::isinf(greatest_ratio(Eigen::Vector2d(1, 1), L)));
}

}  // namespace
}  // namespace rejoinder
