#include "core/evidence/coefficient.h"

#include <gtest/gtest.h>

#include <cmath>
#include <string>

#include "core/statistics/tails.h"
#include "tests/support/simulated_table.h"

namespace rejoinder::testing {
namespace {

struct Read {
  Review review;
  CoefficientLimits limits;
};

Read limits_of(const std::string& term, const std::string& column = "errors = \"classical\"\ndf = 30\n") {
  const Result<Node> document = read_document("rejoinder = 1\n[[column]]\nid = \"a\"\n" + column + "[[column.term]]\nname = \"x\"\n" + term);
  EXPECT_TRUE(document.ok()) << document.error().text();
  Read out{read_review(document.value()), {}};
  EXPECT_TRUE(out.review.problems.empty());
  const Column& only = out.review.columns.front();
  out.limits = coefficient_limits(out.review, only, only.terms.front(), only.df ? static_cast<double>(*only.df) : kInfinity);
  return out;
}

// Derived: ends of (b - r) / s over the box of roundings.
TEST(CoefficientLimits, TakeTheCornersOfTheBox) {
  const CoefficientLimits limits = limits_of("coef = \"0.52\"\nse = \"0.21\"\n").limits;
  EXPECT_NEAR(limits.t.low, 0.515 / 0.215, 1e-14);
  EXPECT_NEAR(limits.t.high, 0.525 / 0.205, 1e-14);
  EXPECT_NEAR(limits.t_about(1).low, (0.515 - 1) / 0.205, 1e-13);
  EXPECT_NEAR(limits.t_about(1).high, (0.525 - 1) / 0.215, 1e-13);
  EXPECT_NEAR(limits_of("coef = \"0.00\"\nse = \"0.01\"\n").limits.t.low, -1, 1e-12);
}

TEST(CoefficientLimits, LeaveTheFarEndOpenWhereTheStandardErrorPrintsAsZero) {
  const CoefficientLimits limits = limits_of("coef = \"0.52\"\nse = \"0.00\"\n").limits;
  EXPECT_NEAR(limits.t.low, 0.515 / 0.005, 1e-11);
  EXPECT_TRUE(std::isinf(limits.t.high));
}

// Derived: p in [.0205, .0215] at 30 df bounds |t| by its quantiles, inside the box's own range.
TEST(CoefficientLimits, AreNarrowedByEveryFigure) {
  const CoefficientLimits by_p = limits_of("coef = \"0.52\"\nse = \"0.21\"\np = \"0.021\"\n").limits;
  EXPECT_NEAR(by_p.t.low, t_critical(0.0215 / 2, 30), 1e-12);
  EXPECT_NEAR(by_p.t.high, t_critical(0.0205 / 2, 30), 1e-12);
  const CoefficientLimits by_t = limits_of("coef = \"0.52\"\nse = \"0.21\"\nt = \"2.48\"\n").limits;
  EXPECT_NEAR(by_t.t.low, 2.475, 1e-13);
  EXPECT_NEAR(by_t.t.high, 2.485, 1e-13);
  const CoefficientLimits by_ci = limits_of("coef = \"0.52\"\nci = [\"0.09\", \"0.95\"]\n").limits;
  const double z = t_critical(0.025, 30);
  EXPECT_NEAR(by_ci.s.low, (0.945 - 0.095) / (2 * z), 1e-12);
  EXPECT_NEAR(by_ci.s.high, (0.955 - 0.085) / (2 * z), 1e-12);
}

// Derived: three stars say p <= .01, so t of a positive coefficient is at least the 1 % point.
TEST(CoefficientLimits, TakeStarsAlone) {
  const CoefficientLimits limits = limits_of("coef = \"0.35***\"\n").limits;
  EXPECT_NEAR(limits.t.low, t_critical(0.005, 30), 1e-12);
  EXPECT_TRUE(std::isinf(limits.t.high));
  const CoefficientLimits none = limits_of("coef = \"0.35\"\nstars = 0\n").limits;
  EXPECT_NEAR(none.t.high, t_critical(0.05, 30), 1e-12);
}

TEST(CoefficientLimits, PutRatiosOnTheLogScale) {
  const CoefficientLimits limits = limits_of("ratio = \"1.65\"\nci = [\"1.18\", \"2.31\"]\n", "estimator = \"ml\"\n").limits;
  EXPECT_LE(limits.b.low, std::log(1.65));
  EXPECT_GE(limits.b.high, std::log(1.65));
  const double z = 1.959963984540054;  // normal 2.5 % point, any table of the normal
  EXPECT_LE(limits.s.low, (std::log(2.31) - std::log(1.18)) / (2 * z));
  EXPECT_GE(limits.s.high, (std::log(2.31) - std::log(1.18)) / (2 * z));
}

TEST(CoefficientLimits, NameFiguresThatDoNotGoTogether) {
  const CoefficientLimits clash = limits_of("coef = \"0.52\"\nse = \"0.21\"\nt = \"5.00\"\n").limits;
  EXPECT_FALSE(clash.consistent);
  ASSERT_EQ(clash.clashes.size(), 1u);
  EXPECT_FALSE(clash.clashes[0].mild);
  EXPECT_EQ(clash.clashes[0].cells.size(), 3u);
  // Stars may follow another convention: they are set aside and the rest is kept.
  const CoefficientLimits stars = limits_of("coef = \"0.52\"\nse = \"0.21\"\nstars = 3\n").limits;
  EXPECT_TRUE(stars.consistent);
  EXPECT_TRUE(stars.without_stars);
  ASSERT_EQ(stars.clashes.size(), 1u);
  EXPECT_TRUE(stars.clashes[0].mild);
}

// A p by the normal beside a column that says 30 df: an innocent convention, no clash.
TEST(CoefficientLimits, TryTheNormalBeforeTheyCallItAClash) {
  const double t = 0.52 / 0.21;
  const CoefficientLimits limits = limits_of("coef = \"0.520\"\nse = \"0.210\"\np = \"" + printed(t_two_sided(t, kInfinity), 5) + "\"\n").limits;
  EXPECT_TRUE(limits.consistent);
  EXPECT_TRUE(limits.clashes.empty());
}

}  // namespace
}  // namespace rejoinder::testing
