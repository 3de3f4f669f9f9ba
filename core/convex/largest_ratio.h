// The least Wald statistic when only standard errors are known: a linear programme.
//
// Whatever the covariances, the Wald statistic is at least the square of the t ratio of every combination of
// the tested rows; and over all covariance matrices with the given standard errors it can be brought down to
// the largest such ratio, taken at the most unfavourable standard error of the combination, the sum of |a_j|
// s_j. Duality turns that into a picture: the square root of the least Wald statistic is
//
//   min { t >= 0 : some beta has R beta = r and |beta_j - b_j| <= t s_j for all j, with b in its box },
//
// the smallest largest |t| over all coefficient vectors that satisfy the hypothesis. Derived in the design
// (matrix fractional function: Boyd and Vandenberghe 2004, Convex Optimization, sec. 3.1.7; from memory).
//
// A vertex of the programme gives both beta and the multipliers c of the rows; the guaranteed value is
// recomputed from c alone (core/convex/certificate.h), so it does not rest on the simplex method having done
// its work.
#pragma once

#include <Eigen/Dense>

#include "core/convex/admissible_set.h"

namespace rejoinder {

struct LargestRatio {
  enum class Settled {
    Yes,
    NoCoefficients,  // the facts on the coefficients exclude each other
    NoVariance,      // no t at all: a row without variance (s = 0) cannot be satisfied; c shows which
    No               // the simplex method stopped early; c may still give a bound
  };
  Settled settled = Settled::No;
  double t = 0;       // value of the programme
  Eigen::VectorXd c;  // q; multipliers of the rows, any positive scale, sign such that the bound is positive
  Eigen::VectorXd z;  // multipliers of set.coefficient_facts, in the scale of c
  Eigen::VectorXd beta;  // p; satisfies R beta = r
  Eigen::VectorXd b;     // p; the point of the box nearest to beta in this sense
};

// `R` is q by p, `r` is q. Covariance facts of the set are not used, so the result bounds the Wald statistic
// from below for any set with these standard errors. Unknown standard errors and coefficients are allowed:
// such a coefficient follows beta freely.
LargestRatio largest_ratio(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r);

}  // namespace rejoinder
