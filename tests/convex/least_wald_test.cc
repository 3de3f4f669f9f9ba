#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <vector>

#include "core/convex/wald_limits.h"
#include "tests/support/bounds_cases.h"
#include "tests/support/random_sets.h"

namespace rejoinder {
namespace {

// Source: tests/reference/bounds_visible.json, items 1 and 2; at least two methods agree on each to 4e-11.
TEST(LeastWald, MatchesReferenceLimits) {
  for (const test::LimitCase& c : test::limit_cases()) {
    SCOPED_TRACE(c.id + " " + c.title);
    const LeastWald least = least_wald(c.set, c.R, c.r);
    ASSERT_EQ(least.status, LimitStatus::Found);
    EXPECT_NEAR(least.attained, *c.min_wald, 1e-8 * (1e-4 + *c.min_wald));
    EXPECT_LE(least.wald, *c.min_wald * (1 + 1e-13));
    EXPECT_GE(least.wald, *c.min_wald * (1 - 1e-8));
    EXPECT_LE(least.witness.outside, 1e-9);
    EXPECT_NEAR(least.witness.wald, least.attained, 1e-8 * (1e-4 + *c.min_wald));
  }
}

// Checked: no point of the set has less, the gap is closed, and the witness is a point of the set that has
// it.
TEST(LeastWald, IsNeverBeatenByAPointOfTheSet) {
  for (const double spread : {10.0, 1e8}) {
    test::RandomSets sets(21);
    for (int k = 0; k < 140; ++k) {
      const int p = 2 + sets.below(6), q = 1 + sets.below(std::min(p, 5));
      const test::Facts facts = static_cast<test::Facts>(k % 7);
      const test::RandomCase c = sets.draw(p, q, facts, 1 + k % 3, spread, sets.below(2) == 0);
      SCOPED_TRACE(testing::Message() << "case " << k << " spread " << spread);
      const LeastWald least = least_wald(c.set, c.R, c.r);
      if (least.status == LimitStatus::Dependent) continue;
      ASSERT_EQ(least.status, LimitStatus::Found);
      EXPECT_LE(least.wald, wald_at(c.R, c.r, c.b, c.V) * (1 + 1e-9));
      EXPECT_LE(least.wald, least.attained);
      EXPECT_LE(least.attained - least.wald, 1e-8 * std::max(least.attained, 1e-4));
      const bool outer = facts == test::Facts::Correlations && !least.exact;
      if (outer) continue;  // the set had to be widened: its optimum need not be a point of the set
      EXPECT_TRUE(least.exact);
      EXPECT_LE(least.witness.outside, 1e-8);
      EXPECT_NEAR(least.witness.wald, least.attained, 1e-6 * (least.attained + 1e-3));
      // Between two points of the set W is convex: no chord dips below the least.
      for (const double part : {0.1, 0.5, 0.9})
        EXPECT_GE(wald_at(c.R, c.r, part * c.b + (1 - part) * least.witness.b,
                          part * c.V + (1 - part) * least.witness.V) *
                      (1 + 1e-9),
                  least.wald);
    }
  }
}

// Checked: the certificate recomputed from the multipliers gives the reported value.
TEST(LeastWald, CanBeRecomputedFromItsMultipliers) {
  test::RandomSets sets(22);
  int checked = 0;
  for (int k = 0; k < 30; ++k) {
    const test::RandomCase c = sets.draw(4, 2, test::Facts::SomeCovariances);
    const LeastWald least = least_wald(c.set, c.R, c.r);
    if (least.status != LimitStatus::Found || least.method != "barrier method") continue;
    ++checked;
    EXPECT_NEAR(guaranteed_wald(c.set, c.R, c.r, least.weights, least.multipliers), least.wald,
                1e-8 * least.wald);
  }
  EXPECT_GE(checked, 20);
}

AdmissibleSet plain(const std::vector<double>& b, const std::vector<double>& s, double h = 0) {
  AdmissibleSet set(static_cast<int>(b.size()));
  for (int j = 0; j < set.size(); ++j) {
    set.set_coefficient(j, {b[j] - h, b[j] + h});
    set.set_se(j, {s[j], s[j]});
  }
  return set;
}

// Derived: equal ratios give t^2 at any cap 1 and t^2 * 2 / (1 + c) under a cap c, q = 2.
TEST(LeastWald, OfEqualRatiosFollowsTheCap) {
  AdmissibleSet set = plain({1, 1}, {0.5, 0.5});
  const Eigen::MatrixXd R = Eigen::MatrixXd::Identity(2, 2);
  EXPECT_NEAR(least_wald(set, R, Eigen::VectorXd::Zero(2)).attained, 4, 1e-12);
  set.every_correlation = {-0.25, 0.25};
  EXPECT_NEAR(least_wald(set, R, Eigen::VectorXd::Zero(2)).attained, 8 / 1.25, 1e-12);
  set.every_correlation = {0, 0};
  EXPECT_NEAR(least_wald(set, R, Eigen::VectorXd::Zero(2)).attained, 8, 1e-12);
}

TEST(LeastWald, IsZeroWhereTheHypothesisLiesInTheBox) {
  AdmissibleSet set = plain({0.001, 1}, {0.5, 0.5}, 0.005);
  Eigen::MatrixXd R(1, 2);
  R << 1, 0;
  EXPECT_EQ(least_wald(set, R, Eigen::VectorXd::Zero(1)).attained, 0);
  set.covariances.push_back({0, 1, {0.1, 0.2}});
  const LeastWald least = least_wald(set, R, Eigen::VectorXd::Zero(1));
  EXPECT_EQ(least.wald, 0);
  EXPECT_LT(least.attained, 1e-9);
}

// Derived: a standard error that may be zero leaves the least untouched; one that is zero makes W infinite
// unless the coefficient can equal its value.
TEST(LeastWald, TakesStandardErrorsOfZero) {
  AdmissibleSet set = plain({1, 1}, {0.5, 0.5});
  set.set_se(1, {0, 0.5});
  Eigen::MatrixXd R(1, 2);
  R << 1, 1;
  EXPECT_NEAR(least_wald(set, R, Eigen::VectorXd::Zero(1)).attained, 4, 1e-12);
  set.set_se(0, {0, 0});
  EXPECT_NEAR(least_wald(set, R, Eigen::VectorXd::Zero(1)).attained, 16, 1e-10);
  R << 1, 0;
  EXPECT_TRUE(std::isinf(least_wald(set, R, Eigen::VectorXd::Zero(1)).wald));
  EXPECT_EQ(least_wald(set, R, Eigen::VectorXd::Ones(1)).attained, 0);
}

// Derived: what nothing is known of can satisfy any restriction; the others keep their ratio.
TEST(LeastWald, LeavesUnknownCoefficientsFree) {
  AdmissibleSet set = plain({1, 2, 3}, {0.5, 0.5, 1});
  set.set_se(1, {0, kInfinity});
  set.half_width(2) = kInfinity;
  Eigen::MatrixXd R(3, 3);
  R << 1, 0, 0, 0, 1, 0, 1, 1, 1;
  LeastWald least = least_wald(set, R, Eigen::VectorXd::Zero(3));
  EXPECT_NEAR(least.attained, 4, 1e-12);
  EXPECT_NEAR(least.wald, 4, 1e-9);
  // The same through the barrier, with a fact that leaves it no other way.
  set.covariances.push_back({0, 2, {-0.1, 0.1}});
  least = least_wald(set, R, Eigen::VectorXd::Zero(3));
  EXPECT_NEAR(least.wald, 4, 1e-8);
}

// Derived: b1 + b2 is printed as 1 exactly, so of b1 = b2 = 0 one must be missed by at least a half: 0.5 / s
// at the least, where the boxes alone would allow both to be 0.
TEST(LeastWald, UsesPrintedSumsOfCoefficients) {
  AdmissibleSet set = plain({0.4, 0.4}, {0.25, 0.25}, 1);
  CoefficientFact sum{Eigen::VectorXd::Ones(2), {1, 1}};
  set.coefficient_facts.push_back(sum);
  const Eigen::MatrixXd R = Eigen::MatrixXd::Identity(2, 2);
  const LeastWald least = least_wald(set, R, Eigen::VectorXd::Zero(2));
  EXPECT_NEAR(least.attained, 4, 1e-10);
  EXPECT_NEAR(least.wald, 4, 1e-8);
  set.every_correlation = {-0.999999, 0.999999};
  const LeastWald capped = least_wald(set, R, Eigen::VectorXd::Zero(2));
  EXPECT_NEAR(capped.wald, 8 / 1.999999, 1e-7);
  set.coefficient_facts.push_back({Eigen::VectorXd::Ones(2), {1.2, 1.3}});
  EXPECT_EQ(least_wald(set, R, Eigen::VectorXd::Zero(2)).status, LimitStatus::NoCoefficients);
  EXPECT_EQ(greatest_wald(set, R, Eigen::VectorXd::Zero(2)).status, LimitStatus::NoCoefficients);
}

TEST(LeastWald, ProvesThatFactsExcludeEachOther) {
  const Eigen::MatrixXd R = Eigen::MatrixXd::Identity(3, 3);
  AdmissibleSet set = plain({1, 1, 1}, {1, 1, 1}, 0.05);
  for (int j = 0; j < 3; ++j) set.set_se(j, {0.95, 1.05});
  // Correlations .9, .9 and -.5: no such matrix.
  set.covariances = {{0, 1, {0.85, 0.95}}, {1, 2, {0.85, 0.95}}, {0, 2, {-0.5, -0.4}}};
  const LeastWald least = least_wald(set, R, Eigen::VectorXd::Zero(3));
  ASSERT_EQ(least.status, LimitStatus::NoCovariance);
  EXPECT_TRUE(proves_no_covariance(convex_facts(set), least.multipliers));
  EXPECT_EQ(greatest_wald(set, R, Eigen::VectorXd::Zero(3)).status, LimitStatus::NoCovariance);
  // Exact figures that exclude each other: the difference has variance 2 - 2 cov.
  set = plain({1, 1, 1}, {1, 1, 1});
  set.covariances = {{0, 1, {0.5, 0.5}}};
  Eigen::VectorXd a(3);
  a << 1, -1, 0;
  set.combination_variances = {{a, {2, 2}}};
  EXPECT_EQ(least_wald(set, R, Eigen::VectorXd::Zero(3)).status, LimitStatus::NoCovariance);
}

// Derived: correlation exactly 1 and equal standard errors leave b1 - b2 without variance; the pair is worth
// t^2 when the ratios agree. There is no interior, and the value is still guaranteed.
TEST(LeastWald, AllowsAPerfectCorrelation) {
  AdmissibleSet set = plain({1, 1}, {0.5, 0.5});
  set.covariances.push_back({0, 1, {0.25, 0.25}});
  Eigen::MatrixXd R(1, 2);
  R << 1, 1;
  const LeastWald sum = least_wald(set, R, Eigen::VectorXd::Zero(1));
  EXPECT_NEAR(sum.wald, 4, 1e-6);
  const LeastWald both = least_wald(set, Eigen::MatrixXd::Identity(2, 2), Eigen::VectorXd::Zero(2));
  EXPECT_LE(both.wald, 4 * (1 + 1e-12));
  EXPECT_GE(both.wald, 4 * (1 - 1e-4));
}

TEST(LeastWald, SaysWhenRowsRepeatOneAnother) {
  const AdmissibleSet set = plain({1, 1}, {0.5, 0.5});
  Eigen::MatrixXd R(2, 2);
  R << 1, 1, 2, 2;
  EXPECT_EQ(least_wald(set, R, Eigen::VectorXd::Zero(2)).status, LimitStatus::Dependent);
}

}  // namespace
}  // namespace rejoinder
