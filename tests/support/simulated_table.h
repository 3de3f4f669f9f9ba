// Simulated least-squares regressions and their printed tables: the truth is known to full precision, the review sees only
// the rounded print.
#pragma once

#include <Eigen/Dense>
#include <cstdint>
#include <string>
#include <vector>

namespace rejoinder::testing {

struct SimulatedRegression {
  int n = 0, k = 0;             // k slopes beside an intercept
  Eigen::VectorXd coefficients; // k + 1, intercept first
  Eigen::MatrixXd covariance;   // k + 1 square, conventional
  double r2 = 0, ssr = 0, tss = 0;
  Eigen::VectorXd means;        // k, of the regressors
  double mean_of_outcome = 0;
  // The same regression without the slopes from `keep` on: terms x1 .. x<keep> stay.
  double short_r2(int keep) const { return short_r2_[static_cast<std::size_t>(keep)]; }
  double short_ssr(int keep) const { return (1 - short_r2(keep)) * tss; }
  // True W of "the slopes after `keep` are zero".
  double wald_of_tail(int keep) const;

  std::vector<double> short_r2_;  // by the number of slopes kept, 0 .. k
};

// Fits y on a constant and the columns of `regressors` (n x k).
SimulatedRegression fit_regression(const Eigen::MatrixXd& regressors, const Eigen::VectorXd& y);

// Regressors with correlation about `correlation` and effects of a size that makes the joint test interesting.
SimulatedRegression simulate_regression(std::uint64_t seed, int n, int k, double correlation);

// `x` as a table prints it, rounded to nearest.
std::string printed(double x, int decimals);

// A review of one column "full" with its coefficients, s.e. and where asked its covariance matrix, the column "short" with
// the first `keep` slopes, both with R², and one claim that the slopes after `keep` are zero.
struct PrintChoices {
  int keep = 1;
  int decimals = 3;
  bool r2 = true, standard_errors = true, covariance = false;
  std::string restrictions;  // in place of zero
};
std::string printed_review(const SimulatedRegression& regression, const PrintChoices& choices);

}  // namespace rejoinder::testing
