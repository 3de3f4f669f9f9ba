// Everything a printed column allows its estimates b and their covariance V to be: the set over which the
// Wald statistic of a joint test is made least and greatest.
//
// A paper prints coefficients and standard errors, sometimes a few covariances, correlations or standard
// errors of combinations, all rounded. Each printed figure becomes an interval here; whatever is not printed
// stays free, except that V is a covariance matrix (symmetric, no negative eigenvalue).
//
// Letters: p coefficients. Units are those of the print; nothing needs scaling by the caller. "Unknown" is an
// infinite end. Indices run from 0 to p - 1. Example, two coefficients with a printed covariance:
//
//   AdmissibleSet set(2);
//   set.set_coefficient(0, {0.515, 0.525});  set.set_se(0, {0.205, 0.215});
//   set.set_coefficient(1, {0.305, 0.315});  set.set_se(1, {0.165, 0.175});
//   set.covariances.push_back({0, 1, {0.0115, 0.0125}});
#pragma once

#include <Eigen/Dense>
#include <vector>

#include "core/number/interval.h"

namespace rejoinder {

// What is known of one pair i != j, in either order: its covariance or its correlation. An end may be
// infinite.
struct PairInterval {
  int i = 0, j = 0;
  Interval value;
};

// What is known of the variance a'Va of one combination a (p) of coefficients: the square of its standard
// error.
struct CombinationVariance {
  Eigen::VectorXd a;  // p
  Interval value;
};

// A linear fact on V: the sum over all i, j of A_ij V_ij lies in `value`. `A` is p by p and symmetric, any
// signs.
struct MatrixFact {
  Eigen::MatrixXd A;  // p by p
  Interval value;
};

// A linear fact on the coefficients: a'b lies in `value`, for example because the paper prints a sum.
struct CoefficientFact {
  Eigen::VectorXd a;  // p
  Interval value;
};

struct AdmissibleSet {
  // p >= 1 coefficients of which nothing is known.
  explicit AdmissibleSet(int p);

  Eigen::VectorXd centre,
      half_width;                   // p; b_j lies within half_width_j of centre_j; half_width may be infinite
  Eigen::VectorXd se_low, se_high;  // p; 0 <= low <= high; high infinite where the standard error is unknown
  std::vector<PairInterval> covariances;
  std::vector<PairInterval> correlations;
  Interval every_correlation{-1, 1};  // holds for all pairs; met with `correlations` where both speak
  std::vector<CombinationVariance> combination_variances;
  std::vector<MatrixFact> matrix_facts;
  std::vector<CoefficientFact> coefficient_facts;

  int size() const { return static_cast<int>(centre.size()); }

  // The interval as centre and half width, widened so that no value of it is lost.
  void set_coefficient(int j, const Interval& b);
  // A standard error cannot be negative: what lies below 0 is cut away.
  void set_se(int j, const Interval& se);
  void set_variance(int j, const Interval& variance);

  // Variance of coefficient j, ends rounded outward.
  Interval variance(int j) const;
  // Whether anything beyond standard errors and coefficients is known of V.
  bool has_covariance_facts() const;
};

// By how much (b, V) misses the set: 0 when it lies in it. Each fact counts in the units of its own natural
// size (half the box and standard errors for coefficients, products of standard errors for V, the trace for
// the least eigenvalue), so 1e-9 is a slack that rounding explains. `b` is p, `V` p by p and symmetric.
double distance_outside(const AdmissibleSet& set, const Eigen::VectorXd& b, const Eigen::MatrixXd& V);

// The Wald statistic (Rb - r)' (R V R')^-1 (Rb - r). `R` is q by p, `r` is q. Where R V R' is singular (least
// eigenvalue below 1e-12 of the trace after scaling to unit diagonal) the value is that of the limit V + tiny
// I: the pseudo-inverse when Rb - r lies in the range, infinity when it does not.
double wald_at(const Eigen::MatrixXd& R, const Eigen::VectorXd& r, const Eigen::VectorXd& b,
               const Eigen::MatrixXd& V);

// For a hypothesis whose rows each name one coefficient, each a different one ("all of these are zero"): the
// column of row i in place i. Empty for any other hypothesis.
std::vector<int> excluded_columns(const Eigen::MatrixXd& R);

}  // namespace rejoinder
