// Covariances that a print gives away: on simulated regressions the true W lies inside, and the limits are narrower than
// without them.
#include <gtest/gtest.h>

#include <cmath>
#include <random>
#include <string>

#include "core/judge/finding.h"
#include "tests/support/simulated_table.h"

namespace rejoinder::testing {
namespace {

std::string quoted(const std::string& text) { return "\"" + text + "\""; }

std::string term(const std::string& name, double coef, double se, int decimals) {
  return "[[column.term]]\nname = " + quoted(name) + "\ncoef = " + quoted(printed(coef, decimals)) + "\nse = " + quoted(printed(se, decimals)) + "\n";
}

Finding finding_of(const std::string& text) {
  const Result<Node> document = read_document("rejoinder = 1\n" + text);
  EXPECT_TRUE(document.ok()) << document.error().text();
  const Review review = read_review(document.value());
  EXPECT_TRUE(review.problems.empty()) << review.problems.front().text();
  return check_review(review).findings.front();
}

double wald(const SimulatedRegression& regression, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  const Eigen::VectorXd d = R * regression.coefficients - r;
  return d.dot((R * regression.covariance * R.transpose()).ldlt().solve(d));
}

void expect_inside(const Finding& finding, double truth, const std::string& text) {
  ASSERT_TRUE(finding.wald) << finding.sentence << "\n" << text;
  EXPECT_LE(finding.wald->low, truth * (1 + 1e-9)) << text;
  EXPECT_GE(finding.wald->high, truth * (1 - 1e-9)) << text;
}

// Two columns that differ by x3; the claim is x1 = x3, whose covariance the change of x1 gives away.
TEST(HiddenCovariances, FollowFromNestedColumns) {
  int narrower = 0;
  for (std::uint64_t seed = 1; seed <= 20; ++seed) {
    const SimulatedRegression regression = simulate_regression(seed, 90, 3, 0.4);
    const Eigen::MatrixXd X = regression.covariance;  // the short column by partial regression: b_K - V_Kd b_d / V_dd
    const std::string head = "errors = \"classical\"\nn = 90\n";
    std::string text = "[[column]]\nid = \"long\"\n" + head + "k = 3\n", nested = "[[column]]\nid = \"short\"\n" + head + "k = 2\n";
    for (int j = 1; j <= 3; ++j) text += term("x" + std::to_string(j), regression.coefficients(j), std::sqrt(X(j, j)), 3);
    for (int j = 1; j <= 2; ++j) {
      const double b = regression.coefficients(j) - X(j, 3) / X(3, 3) * regression.coefficients(3);
      nested += "[[column.term]]\nname = \"x" + std::to_string(j) + "\"\ncoef = " + quoted(printed(b, 3)) + "\n";
    }
    const std::string claim = "[[claim]]\nid = \"c\"\ncolumn = \"long\"\nrestrictions = \"x1 = x3\"\n";
    Eigen::MatrixXd R = Eigen::MatrixXd::Zero(1, 4);
    R << 0, 1, 0, -1;
    const double truth = wald(regression, R, Eigen::VectorXd::Zero(1));
    const Finding alone = finding_of(text + claim), both = finding_of(text + nested + claim);
    expect_inside(alone, truth, text);
    expect_inside(both, truth, text + nested);
    if (both.wald->high < alone.wald->high * 0.9) ++narrower;
  }
  EXPECT_GT(narrower, 10);
}

// The printed mean of the only regressor settles "intercept = 0 and slope = 1".
TEST(HiddenCovariances, FollowFromMeans) {
  for (std::uint64_t seed = 1; seed <= 20; ++seed)
    for (const int k : {1, 2}) {
      std::mt19937_64 engine(seed);
      Eigen::MatrixXd X(60, k);
      Eigen::VectorXd y(60);
      for (int i = 0; i < 60; ++i) {
        y(i) = 0.3;
        for (int j = 0; j < k; ++j) {
          X(i, j) = 5 + static_cast<double>(engine() % 1000) / 250;
          y(i) += 0.95 * X(i, j) / k;
        }
        y(i) += static_cast<double>(engine() % 1000) / 500;
      }
      const SimulatedRegression regression = fit_regression(X, y);
      std::string text = "[[column]]\nid = \"a\"\nerrors = \"classical\"\nn = 60\nk = " + std::to_string(k) + "\n";
      text += "[[column.term]]\nname = \"constant\"\nkind = \"intercept\"\ncoef = " + quoted(printed(regression.coefficients(0), 5)) +
              "\nse = " + quoted(printed(std::sqrt(regression.covariance(0, 0)), 5)) + "\n";
      for (int j = 1; j <= k; ++j)
        text += term("x" + std::to_string(j), regression.coefficients(j), std::sqrt(regression.covariance(j, j)), 5);
      std::string means = "[column.means]\noutcome = " + quoted(printed(regression.mean_of_outcome, 4)) + "\n";
      for (int j = 1; j <= k; ++j) means += "x" + std::to_string(j) + " = " + quoted(printed(regression.means(j - 1), 4)) + "\n";
      const std::string claim = "[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"constant = 0, x1 = 1\"\n";
      Eigen::MatrixXd R = Eigen::MatrixXd::Zero(2, k + 1);
      R(0, 0) = R(1, 1) = 1;
      const double truth = wald(regression, R, Eigen::Vector2d(0, 1));
      const Finding alone = finding_of(text + claim), with_means = finding_of(text + means + claim);
      expect_inside(alone, truth, text);
      expect_inside(with_means, truth, text + means);
      EXPECT_GT(with_means.wald->low, alone.wald->low * (1 - 1e-9));
      if (k == 1) {
        EXPECT_TRUE(std::isfinite(with_means.wald->high)) << text + means;
      }
    }
}

TEST(HiddenCovariances, FollowFromGroupSizes) {
  for (std::uint64_t seed = 1; seed <= 20; ++seed) {
    std::mt19937_64 engine(seed);
    const int sizes[] = {18, 16, 21};
    Eigen::MatrixXd X = Eigen::MatrixXd::Zero(55, 2);
    Eigen::VectorXd y(55);
    for (int i = 0; i < 55; ++i) {
      const int group = i < 18 ? 0 : i < 34 ? 1 : 2;
      if (group > 0) X(i, group - 1) = 1;
      y(i) = 0.4 * group + static_cast<double>(engine() % 1000) / 400;
    }
    const SimulatedRegression regression = fit_regression(X, y);
    const std::string head = "[[column]]\nid = \"a\"\nerrors = \"classical\"\nn = 55\nk = 2\n";
    std::string terms;
    for (int j = 1; j <= 2; ++j) terms += term(j == 1 ? "north" : "east", regression.coefficients(j), std::sqrt(regression.covariance(j, j)), 3);
    const std::string groups = "[column.groups]\nbase = " + std::to_string(sizes[0]) + "\nsize = { north = 16, east = 21 }\n";
    for (const char* restrictions : {"north = 0, east = 0", "north = east"}) {
      const std::string claim = std::string("[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"") + restrictions + "\"\n";
      Eigen::MatrixXd R = Eigen::MatrixXd::Zero(2, 3);
      R(0, 1) = R(1, 2) = 1;
      if (std::string(restrictions) == "north = east") {
        R.resize(1, 3);
        R << 0, 1, -1;
      }
      const double truth = wald(regression, R, Eigen::VectorXd::Zero(R.rows()));
      const Finding finding = finding_of(head + terms + groups + claim);
      expect_inside(finding, truth, terms);
      EXPECT_TRUE(std::isfinite(finding.wald->high)) << terms;
    }
  }
}

// A part cannot beat the whole; with two slopes the whole leaves two ranges of their correlation.
TEST(HiddenCovariances, FollowFromTheOverallF) {
  for (std::uint64_t seed = 1; seed <= 20; ++seed)
    for (const int k : {2, 4}) {
      const SimulatedRegression regression = simulate_regression(seed, 100, k, 0.4);
      std::string text = "[[column]]\nid = \"a\"\nerrors = \"classical\"\nn = 100\nk = " + std::to_string(k) + "\nr2 = " + quoted(printed(regression.r2, 4)) + "\n";
      for (int j = 1; j <= k; ++j) text += term("x" + std::to_string(j), regression.coefficients(j), std::sqrt(regression.covariance(j, j)), 4);
      Eigen::MatrixXd R = Eigen::MatrixXd::Zero(1, k + 1);
      R(0, 1) = 1;
      R(0, 2) = -1;
      expect_inside(finding_of(text + "[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"x1 = x2\"\n"),
                    wald(regression, R, Eigen::VectorXd::Zero(1)), text);
      if (k > 2) {
        Eigen::MatrixXd Q = Eigen::MatrixXd::Zero(2, k + 1);
        Q(0, 1) = Q(1, 2) = 1;
        const Finding finding = finding_of(text + "[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"x1 = 0, x2 = 0\"\n");
        expect_inside(finding, wald(regression, Q, Eigen::VectorXd::Zero(2)), text);
        EXPECT_TRUE(std::isfinite(finding.wald->high)) << "capped by the whole";
      }
    }
}

TEST(HiddenCovariances, AreRefusedForRobustErrors) {
  const Finding finding = finding_of(
      "[[column]]\nid = \"a\"\nerrors = \"robust\"\nn = 55\nk = 2\n[[column.term]]\nname = \"north\"\ncoef = \"0.40\"\nse = \"0.10\"\n"
      "[[column.term]]\nname = \"east\"\ncoef = \"0.30\"\nse = \"0.10\"\n[column.groups]\nbase = 18\nsize = { north = 16, east = 21 }\n"
      "[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"north = 0, east = 0\"\n");
  EXPECT_TRUE(std::isinf(finding.wald->high));
  bool told = false;
  for (const std::string& caution : finding.cautions) told = told || caution.find("group sizes are not used") != std::string::npos;
  EXPECT_TRUE(told);
}

}  // namespace
}  // namespace rejoinder::testing
