#include "core/convex/certificate.h"

#include <gtest/gtest.h>

#include <cmath>

#include "tests/support/random_sets.h"

namespace rejoinder {
namespace {

// Checked: whatever multipliers a solver might hand over, the value never exceeds W at a point of the set.
TEST(Certificate, IsNeverAboveAPointOfTheSet) {
  test::RandomSets sets(41);
  int positive = 0;
  for (int k = 0; k < 2000; ++k) {
    const int p = 2 + sets.below(4), q = 1 + sets.below(p);
    const test::RandomCase c = sets.draw(p, q, static_cast<test::Facts>(k % 7), 1 + k % 2);
    const ConvexFacts facts = convex_facts(c.set);
    // Half of the time near something sensible: the combination of the hidden point, variances fully charged.
    Eigen::VectorXd weights(q);
    for (int i = 0; i < q; ++i) weights(i) = sets.normal();
    if (k % 2 == 0) weights = (c.R * c.V * c.R.transpose()).ldlt().solve(c.R * c.b - c.r);
    Multipliers multipliers;
    multipliers.facts = Eigen::VectorXd::Zero(facts.facts.size());
    const Eigen::VectorXd a = c.R.transpose() * weights;
    for (int j = 0; j < p; ++j) multipliers.facts(j) = a(j) * a(j) * sets.uniform(0, 2);
    for (int f = p; f < multipliers.facts.size(); ++f) multipliers.facts(f) = sets.normal() * a.squaredNorm();
    for (std::size_t f = 0; f < facts.caps.size(); ++f) {
      Eigen::Matrix2d L;
      L << sets.uniform(0, 1), sets.normal(), 0, sets.uniform(0, 1);
      L(1, 0) = L(0, 1);
      multipliers.caps.push_back(L * a.squaredNorm());
    }
    const double limit = guaranteed_wald(c.set, c.R, c.r, weights, multipliers);
    EXPECT_LE(limit, wald_at(c.R, c.r, c.b, c.V) * (1 + 1e-9)) << k;
    EXPECT_LE(guaranteed_wald_from_errors(c.set, c.R, c.r, weights, Eigen::VectorXd(0)),
              wald_at(c.R, c.r, c.b, c.V) * (1 + 1e-9))
        << k;
    EXPECT_FALSE(proves_no_covariance(facts, multipliers)) << k;
    // The least of a functional, upside down.
    EXPECT_GE(greatest_of(facts, a * a.transpose(), multipliers), a.dot(c.V * a) * (1 - 1e-9)) << k;
    positive += limit > 0;
  }
  EXPECT_GE(positive, 400);
}

TEST(Certificate, MakesNothingOfMultipliersThatAreNotNumbers) {
  test::RandomSets sets(42);
  const test::RandomCase c = sets.draw(3, 2, test::Facts::Combinations);
  Multipliers multipliers;
  multipliers.facts = Eigen::VectorXd::Constant(convex_facts(c.set).facts.size(), std::nan(""));
  multipliers.coefficient_facts = Eigen::VectorXd::Constant(4, kInfinity);
  const Eigen::VectorXd one = Eigen::VectorXd::Ones(2);
  EXPECT_LE(guaranteed_wald(c.set, c.R, c.r, one, multipliers), wald_at(c.R, c.r, c.b, c.V));
  EXPECT_EQ(guaranteed_wald(c.set, c.R, c.r, one * kInfinity, {}), 0);
  EXPECT_EQ(guaranteed_wald(c.set, c.R, c.r, one * 0, {}), 0);
}

// Derived: one coefficient, 1 +- 0.1 with standard error at most 0.5: t >= 0.9 / 0.5, W >= 3.24. Rounded
// down.
TEST(Certificate, IsTheSquaredRatioForOneCoefficient) {
  AdmissibleSet set(1);
  set.set_coefficient(0, {0.9, 1.1});
  set.set_se(0, {0.4, 0.5});
  Multipliers multipliers;
  multipliers.facts = Eigen::VectorXd::Ones(1);
  const Eigen::MatrixXd R = Eigen::MatrixXd::Ones(1, 1);
  const double limit =
      guaranteed_wald(set, R, Eigen::VectorXd::Zero(1), Eigen::VectorXd::Ones(1), multipliers);
  EXPECT_LE(limit, 3.24);
  EXPECT_GT(limit, 3.24 * (1 - 1e-13));
}

// Second route: the planes lie under sqrt(xy) all over the two variance intervals and touch it at the
// corners.
TEST(ConvexFacts, ReplaceARangeAwayFromZeroByPlanesBelowIt) {
  AdmissibleSet set(2);
  set.set_se(0, {0.2, 0.7});
  set.set_se(1, {1.5, 2.5});
  set.correlations.push_back({0, 1, {0.4, 0.6}});
  const ConvexFacts facts = convex_facts(set);
  EXPECT_FALSE(facts.exact);
  ASSERT_EQ(facts.facts.size(), 4u);
  double closest = kInfinity;
  for (int i = 0; i <= 50; ++i)
    for (int j = 0; j <= 50; ++j) {
      const double x = std::pow(0.2 + 0.5 * i / 50, 2), y = std::pow(1.5 + 1.0 * j / 50, 2);
      const double least = 0.4 * std::sqrt(x * y);  // the smallest covariance that the range allows
      double floor = -kInfinity;
      for (std::size_t f = 2; f < 4; ++f) {
        double rest = facts.facts[f].value.low;
        for (const auto& term : facts.facts[f].terms) {
          if (term.i == term.j) rest -= term.weight * (term.i == 0 ? x : y);
        }
        floor = std::max(floor, rest);
      }
      EXPECT_LE(floor, least);
      closest = std::min(closest, least - floor);
    }
  EXPECT_LT(closest, 1e-12);
}

// Derived: s of the sum 2 at most and s1 = 1 leave s2 at most 3.
TEST(ConvexFacts, BoundUnknownErrorsByPrintedCombinations) {
  AdmissibleSet set(3);
  set.set_se(0, {1, 1});
  Eigen::VectorXd a(3);
  a << 1, 1, 0;
  set.combination_variances.push_back({a, {1, 4}});
  const ConvexFacts facts = convex_facts(set);
  EXPECT_NEAR(facts.scale(1), 3, 1e-12);
  EXPECT_TRUE(std::isinf(facts.scale(2)));
}

}  // namespace
}  // namespace rejoinder
