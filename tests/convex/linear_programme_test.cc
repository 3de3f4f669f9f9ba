#include "core/convex/linear_programme.h"

#include <gtest/gtest.h>

#include "tests/support/random_sets.h"

namespace rejoinder {
namespace {

using Settled = LinearSolution::Settled;

// Derived: minimise -x - 2y with x + y <= 4, y <= 3 has its vertex at (1, 3), value -7.
TEST(LinearProgramme, FindsTheVertex) {
  LinearProgramme programme;
  programme.cost.resize(4);
  programme.cost << -1, -2, 0, 0;
  programme.rows.resize(2, 4);
  programme.rows << 1, 1, 1, 0, 0, 1, 0, 1;
  programme.limits.resize(2);
  programme.limits << 4, 3;
  const LinearSolution solution = solve(programme);
  ASSERT_EQ(solution.settled, Settled::Optimal);
  EXPECT_DOUBLE_EQ(solution.value, -7);
  EXPECT_DOUBLE_EQ(solution.x(0), 1);
  EXPECT_DOUBLE_EQ(solution.x(1), 3);
}

// Beale's example (1955, Naval Research Logistics Quarterly 2; from memory), on which the plain rule goes
// round for ever. Derived: the optimum is -1/20.
TEST(LinearProgramme, EndsWhereThePlainRuleCycles) {
  LinearProgramme programme;
  programme.cost.resize(7);
  programme.cost << -0.75, 150, -0.02, 6, 0, 0, 0;
  programme.rows.resize(3, 7);
  programme.rows << 0.25, -60, -0.04, 9, 1, 0, 0, 0.5, -90, -0.02, 3, 0, 1, 0, 0, 0, 1, 0, 0, 0, 1;
  programme.limits.resize(3);
  programme.limits << 0, 0, 1;
  const LinearSolution solution = solve(programme);
  ASSERT_EQ(solution.settled, Settled::Optimal);
  EXPECT_NEAR(solution.value, -0.05, 1e-14);
}

TEST(LinearProgramme, ProvesThatNothingSatisfiesTheRows) {
  LinearProgramme programme;
  programme.cost = Eigen::VectorXd::Ones(2);
  programme.rows.resize(2, 2);
  programme.rows << 1, 1, 1, 1;
  programme.limits.resize(2);
  programme.limits << 1, 2;
  const LinearSolution solution = solve(programme);
  ASSERT_EQ(solution.settled, Settled::Infeasible);
  EXPECT_GT(solution.prices.dot(programme.limits), 0);
  EXPECT_LE((programme.rows.transpose() * solution.prices).maxCoeff(), 1e-12);
}

TEST(LinearProgramme, SaysWhenTheCostHasNoFloor) {
  LinearProgramme programme;
  programme.cost = Eigen::Vector2d(-1, 0);
  programme.rows.resize(1, 2);
  programme.rows << 1, -1;
  programme.limits = Eigen::VectorXd::Zero(1);
  EXPECT_EQ(solve(programme).settled, Settled::Unbounded);
}

// Checked: x satisfies the rows, prices satisfy the dual, and both have one value. Repeated rows and zero
// limits make the vertices degenerate.
TEST(LinearProgramme, SatisfiesBothSidesOfDuality) {
  test::RandomSets numbers(31);
  for (int k = 0; k < 200; ++k) {
    SCOPED_TRACE(k);
    const int m = 1 + numbers.below(20), n = m + 1 + numbers.below(30);
    LinearProgramme programme;
    programme.rows.resize(m, n);
    for (int i = 0; i < m; ++i)
      for (int j = 0; j < n; ++j) programme.rows(i, j) = numbers.below(5) - 2;
    if (m > 2) programme.rows.row(m - 1) = programme.rows.row(0);
    Eigen::VectorXd inside(n), prices(m);
    for (int j = 0; j < n; ++j) inside(j) = numbers.below(3) == 0 ? numbers.uniform(0, 2) : 0;
    for (int i = 0; i < m; ++i) prices(i) = numbers.normal();
    programme.limits = programme.rows * inside;
    programme.cost = programme.rows.transpose() * prices;
    for (int j = 0; j < n; ++j) programme.cost(j) += numbers.uniform(0, 1);
    const LinearSolution solution = solve(programme);
    ASSERT_EQ(solution.settled, Settled::Optimal);
    EXPECT_LE((programme.rows * solution.x - programme.limits).cwiseAbs().maxCoeff(), 1e-9);
    EXPECT_GE(solution.x.minCoeff(), 0);
    EXPECT_GE((programme.cost - programme.rows.transpose() * solution.prices).minCoeff(), -1e-9);
    EXPECT_NEAR(solution.value, solution.prices.dot(programme.limits),
                1e-8 * (1 + std::fabs(solution.value)));
  }
}

}  // namespace
}  // namespace rejoinder
