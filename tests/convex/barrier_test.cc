#include "core/convex/barrier.h"

#include <gtest/gtest.h>

#include <cmath>

#include "core/convex/closed_forms.h"
#include "core/convex/ratio_form.h"
#include "tests/support/random_sets.h"

namespace rejoinder {
namespace {

// Second route: the linear programme, and for one cap on an exclusion the sorted closed form.
TEST(Barrier, AgreesWithTheLinearProgrammeAndTheClosedForms) {
  test::RandomSets sets(51);
  for (int k = 0; k < 80; ++k) {
    SCOPED_TRACE(k);
    const int p = 2 + sets.below(5), q = 1 + sets.below(p);
    const bool cap = k % 2 == 0;
    const test::RandomCase c =
        sets.draw(p, q, cap ? test::Facts::Cap : test::Facts::Errors, 2, 10, cap || sets.below(2) == 0);
    const LeastWald other =
        cap ? *least_wald_of_exclusion(c.set, c.R, c.r) : least_wald_of_errors(c.set, c.R, c.r);
    Barrier barrier(c.set, c.R, c.r);
    barrier.run();
    if (c.R.fullPivLu().rank() < q) continue;
    ASSERT_EQ(barrier.state(), Barrier::State::Settled);
    EXPECT_NEAR(barrier.attained(), other.attained, 1e-8 * (other.attained + 1e-4));
    EXPECT_NEAR(barrier.guaranteed(), other.attained, 1e-8 * (other.attained + 1e-4));
  }
}

// Second route: with every correlation printed and an exclusion, t ratios and correlations against V itself
// where the standard errors are exact and both describe one set.
TEST(Barrier, GivesOneAnswerInBothForms) {
  test::RandomSets sets(52);
  for (int k = 0; k < 20; ++k) {
    SCOPED_TRACE(k);
    test::RandomCase c = sets.draw(4, 2, test::Facts::Correlations, 2, 10, true);
    c.set.se_low = c.set.se_high;
    const auto form = ratio_form(c.set, c.R, c.r);
    ASSERT_TRUE(form);
    Barrier ratios(form->set, form->R, form->r), entries(c.set, c.R, c.r);
    ratios.run();
    entries.run();
    EXPECT_TRUE(entries.facts().exact);
    EXPECT_NEAR(ratios.guaranteed(), entries.guaranteed(), 1e-8 * entries.guaranteed());
  }
}

TEST(Barrier, StopsAnywhereWithAValidValue) {
  test::RandomSets sets(53);
  const test::RandomCase c = sets.draw(5, 3, test::Facts::SomeCovariances);
  Barrier barrier(c.set, c.R, c.r);
  const double hidden = wald_at(c.R, c.r, c.b, c.V);
  double last = 0;
  int steps = 0;
  while (!barrier.done()) {
    barrier.step();
    ++steps;
    EXPECT_GE(barrier.guaranteed(), last);
    EXPECT_LE(barrier.guaranteed(), hidden * (1 + 1e-9));
    EXPECT_LE(barrier.guaranteed(), barrier.attained() * (1 + 1e-12));
    last = barrier.guaranteed();
  }
  EXPECT_LE(steps, 150);
  EXPECT_EQ(steps, barrier.steps());
  barrier.step();  // nothing more to do
  EXPECT_EQ(steps, barrier.steps());
}

// Checked: the least <T, V> over points of the set, and from below by the certificate.
TEST(Barrier, FindsTheLeastOfALinearFunctional) {
  test::RandomSets sets(54);
  for (int k = 0; k < 42; ++k) {
    SCOPED_TRACE(k);
    const test::RandomCase c = sets.draw(4, 2, static_cast<test::Facts>(k % 7));
    Barrier barrier(c.set);
    barrier.run();
    ASSERT_TRUE(barrier.has_interior());
    for (int round = 0; round < 3; ++round) {
      Eigen::VectorXd a(4), other(4);
      for (int j = 0; j < 4; ++j) a(j) = sets.normal(), other(j) = sets.normal();
      if (round == 0) other = a;
      const Eigen::MatrixXd T = (a * other.transpose() + other * a.transpose()) / 2;
      barrier.aim_at(T);
      barrier.run();
      const double size = T.cwiseAbs().cwiseProduct(c.V.cwiseAbs()).sum();
      EXPECT_LE(barrier.guaranteed(), T.cwiseProduct(c.V).sum() + 1e-9 * size);
      EXPECT_NEAR(barrier.guaranteed(), barrier.attained(), 1e-7 * size);
    }
  }
}

// Derived: three terms with exact variances 1 and all covariances exact: W = d' V^-1 d, V^-1 known.
TEST(Barrier, TakesAnExactCovarianceMatrix) {
  AdmissibleSet set(3);
  for (int j = 0; j < 3; ++j) {
    set.set_coefficient(j, {1, 1});
    set.set_variance(j, {1, 1});
    set.se_low(j) = set.se_high(j) = 1;
    for (int i = 0; i < j; ++i) set.covariances.push_back({i, j, {0.5, 0.5}});
  }
  Barrier barrier(set, Eigen::MatrixXd::Identity(3, 3), Eigen::VectorXd::Zero(3));
  barrier.run();
  EXPECT_NEAR(barrier.attained(), 1.5, 1e-9);  // 3 / (1 + 2 * 0.5)
  EXPECT_NEAR(barrier.guaranteed(), 1.5, 1e-9);
}

// Derived: exact facts about combinations only, no entry of its own. b1 + b2 and b1 - b2 have variances 3 and
// 1, and variances are 1, so the covariance is 1/2: W for both zero at b = (1, 1) is (1 + 1) / (1 + 1/2).
TEST(Barrier, TakesExactCombinations) {
  AdmissibleSet set(2);
  for (int j = 0; j < 2; ++j) {
    set.set_coefficient(j, {1, 1});
    set.se_low(j) = set.se_high(j) = 1;
  }
  Eigen::VectorXd sum(2), difference(2);
  sum << 1, 1;
  difference << 1, -1;
  set.combination_variances.push_back({sum, {3, 3}});
  set.combination_variances.push_back({difference, {1, 1}});
  Barrier barrier(set, Eigen::MatrixXd::Identity(2, 2), Eigen::VectorXd::Zero(2));
  barrier.run();
  EXPECT_NEAR(barrier.attained(), 4.0 / 3, 1e-9);
  EXPECT_NEAR(barrier.guaranteed(), 4.0 / 3, 1e-9);
}

// A general linear fact: <A, V> with A = [[0, 1/2], [1/2, 0]] is the covariance.
TEST(Barrier, ReadsAGeneralLinearFactAsTheSameEntry) {
  test::RandomSets sets(55);
  test::RandomCase c = sets.draw(3, 2, test::Facts::AllCovariances);
  Barrier entries(c.set, c.R, c.r);
  entries.run();
  for (const PairInterval& fact : c.set.covariances) {
    Eigen::MatrixXd A = Eigen::MatrixXd::Zero(3, 3);
    A(fact.i, fact.j) = A(fact.j, fact.i) = 0.5;
    c.set.matrix_facts.push_back({A, fact.value});
  }
  c.set.covariances.clear();
  Barrier facts(c.set, c.R, c.r);
  facts.run();
  EXPECT_NEAR(facts.guaranteed(), entries.guaranteed(), 1e-9 * entries.guaranteed());
}

}  // namespace
}  // namespace rejoinder
