// What every route must keep, whatever the figures: the truth lies inside, rewriting changes nothing, fewer digits widen.
#include <gtest/gtest.h>

#include <cmath>
#include <string>

#include "core/judge/finding.h"
#include "core/review/review.h"
#include "tests/support/simulated_table.h"

namespace rejoinder::testing {
namespace {

Finding finding_of(const std::string& text) {
  const Result<Node> document = read_document(text);
  EXPECT_TRUE(document.ok()) << text;
  const Review review = read_review(document.value());
  EXPECT_TRUE(review.problems.empty()) << review.problems.front().text();
  const CheckedReview checked = check_review(review);
  EXPECT_EQ(checked.findings.size(), 1u);
  return checked.findings.front();
}

bool holds(const Finding& finding, double wald) {
  return finding.wald && finding.wald->low <= wald * (1 + 1e-9) + 1e-12 && wald <= finding.wald->high * (1 + 1e-9);
}

// Second route: the regression itself, to full precision.
TEST(Routes, HoldTheUnroundedTruth) {
  for (std::uint64_t seed = 1; seed <= 60; ++seed) {
    const int n = 40 + static_cast<int>(seed * 7 % 150), k = 2 + static_cast<int>(seed % 4);
    const SimulatedRegression regression = simulate_regression(seed, n, k, (seed % 3) * 0.3);
    for (int keep = 0; keep < k; ++keep) {
      const double truth = regression.wald_of_tail(keep);
      for (const int decimals : {2, 3, 4}) {
        SCOPED_TRACE("seed " + std::to_string(seed) + ", keep " + std::to_string(keep) + ", decimals " + std::to_string(decimals));
        for (const auto& [r2, covariance] : {std::pair{true, false}, {false, false}, {false, true}}) {
          PrintChoices choices;
          choices.keep = keep;
          choices.decimals = decimals;
          choices.r2 = r2;
          choices.covariance = covariance;
          const Finding finding = finding_of(printed_review(regression, choices));
          ASSERT_TRUE(finding.wald) << finding.sentence;
          EXPECT_TRUE(holds(finding, truth)) << "W " << truth << " outside " << finding.wald->low << " to " << finding.wald->high << "\n"
                                             << printed_review(regression, choices);
        }
      }
    }
  }
}

// Derived: dropping a digit turns each figure's interval into one that holds it, or a neighbour that shares the truth; the
// limits of the truth's own print with fewer digits can only be wider where every interval grows around it.
TEST(Routes, WidenWhenADigitIsDropped) {
  for (std::uint64_t seed = 100; seed < 120; ++seed) {
    const SimulatedRegression regression = simulate_regression(seed, 120, 3, 0.3);
    PrintChoices choices;
    choices.keep = 1;
    choices.covariance = true;
    choices.r2 = false;
    double width = 0;
    for (const int decimals : {5, 4, 3, 2}) {
      choices.decimals = decimals;
      const Finding finding = finding_of(printed_review(regression, choices));
      ASSERT_TRUE(finding.wald);
      const double now = finding.wald->width();
      EXPECT_GT(now, width) << "decimals " << decimals;
      width = now;
    }
  }
}

// Derived: F of the R² form and F of the covariance form are one number (textbook identity).
TEST(Routes, FitAndCovarianceAgreeOnOneRegression) {
  for (std::uint64_t seed = 200; seed < 210; ++seed) {
    const SimulatedRegression regression = simulate_regression(seed, 80, 4, 0.5);
    PrintChoices fit;
    fit.keep = 2;
    fit.decimals = 13;
    fit.standard_errors = false;
    PrintChoices covariance = fit;
    covariance.r2 = false;
    covariance.covariance = true;
    const Finding a = finding_of(printed_review(regression, fit)), b = finding_of(printed_review(regression, covariance));
    ASSERT_TRUE(a.wald && b.wald);
    EXPECT_NEAR(a.wald->low / b.wald->low, 1, 1e-8);
    EXPECT_NEAR(a.wald->high / b.wald->high, 1, 1e-8);
    EXPECT_NEAR(a.wald->middle() / regression.wald_of_tail(2), 1, 1e-9);
  }
}

TEST(Routes, DoNotDependOnHowRestrictionsAreWritten) {
  const SimulatedRegression regression = simulate_regression(7, 90, 4, 0.3);
  PrintChoices choices;
  choices.r2 = false;
  choices.covariance = true;
  choices.restrictions = "x1 = x2 = x3";
  const Finding plain = finding_of(printed_review(regression, choices));
  for (const char* other : {"x1 - x2 = 0, x2 - x3 = 0", "x3 = x1; x2 = x1", "2*x1 = 2*x3, 0.5 x2 - 1/2 x3 = 0", "x1 + x2 - 2*x3 = 0, x1 = x2",
                            "x1 = x2, x2 = x3, x1 = x3"}) {
    choices.restrictions = other;
    const Finding rewritten = finding_of(printed_review(regression, choices));
    ASSERT_TRUE(rewritten.wald);
    EXPECT_EQ(rewritten.q, 2);
    EXPECT_NEAR(rewritten.wald->low / plain.wald->low, 1, 1e-7) << other;
    EXPECT_NEAR(rewritten.wald->high / plain.wald->high, 1, 1e-7) << other;
  }
}

// Scaling a regressor by 10 scales its coefficient and s.e. alike; printed with one digit less or more it is the same print.
TEST(Routes, DoNotDependOnUnits) {
  const std::string head = "rejoinder = 1\n[[column]]\nid = \"a\"\nerrors = \"classical\"\nn = 200\nk = 3\n";
  const std::string claim = "[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"u = 0, v = 0\"\n";
  const Finding one = finding_of(head + "[[column.term]]\nname = \"u\"\ncoef = \"0.131\"\nse = \"0.052\"\n[[column.term]]\nname = \"v\"\n"
                                        "coef = \"0.40\"\nse = \"0.21\"\n" + claim);
  const Finding ten = finding_of(head + "[[column.term]]\nname = \"u\"\ncoef = \"1.31\"\nse = \"0.52\"\n[[column.term]]\nname = \"v\"\n"
                                        "coef = \"0.40\"\nse = \"0.21\"\n" + claim);
  EXPECT_NEAR(one.wald->low, ten.wald->low, 1e-12);
  EXPECT_TRUE(std::isinf(one.wald->high) && std::isinf(ten.wald->high));
}

}  // namespace
}  // namespace rejoinder::testing
