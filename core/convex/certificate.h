// Guaranteed limits, recomputed from the data of the problem alone.
//
// A solver may stop early, lose digits or be plainly mistaken; none of that can reach a figure that comes
// from here. The functions take multipliers from anywhere, mend what rounding has bent, and return what weak
// duality makes of them, rounded towards the safe side. Bad multipliers give a weak limit, never a wrong one.
//
// The argument. Let a = R'c. For every b and V of the set, the Wald statistic is at least (c'(Rb - r))^2 /
// a'Va, and a'Va = <aa', V> <= sum_k y_k <A_k, V> - <sum B*(L), V> - <M, V> + ... <= sum_k (u_k y_k^+ - l_k
// y_k^-) whenever M = sum_k y_k A_k - sum B*(L) - aa' has no negative eigenvalue. If its least eigenvalue is
// -e once V is scaled to variances of at most 1, adding e to each variance multiplier mends it at a cost of
// at most p e (the idea of Jansson, Chaykin and Keil 2007, SIAM J. Numer. Anal. 46; from memory).
#pragma once

#include <Eigen/Dense>
#include <vector>

#include "core/convex/admissible_set.h"
#include "core/convex/convex_facts.h"

namespace rejoinder {

struct Multipliers {
  Eigen::VectorXd facts;              // one a fact of ConvexFacts; positive leans on its upper end
  std::vector<Eigen::Matrix2d> caps;  // one a cap; symmetric, no negative eigenvalue
  Eigen::VectorXd coefficient_facts;  // one a coefficient fact of the set; positive leans on its lower end
};

// An upper limit for <T, V> over all V of the facts; infinity when the multipliers prove none. T is p by p,
// symmetric.
double greatest_of(const ConvexFacts& facts, const Eigen::MatrixXd& T, const Multipliers& multipliers);

// A lower limit for c'(Rb - r) over all coefficients of the set. `c` is q, `z` one a coefficient fact.
double least_distance(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                      const Eigen::VectorXd& c, const Eigen::VectorXd& z);

// A lower limit for the Wald statistic over the set; 0 when the multipliers prove nothing.
double guaranteed_wald(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                       const Eigen::VectorXd& c, const Multipliers& multipliers);

// The same from standard errors and the correlation range common to all pairs, whose largest absolute value
// is k: a'Va <= (1 - k) sum a_j^2 s_j^2 + k (sum |a_j| s_j)^2. Infinity when the combination has no variance
// at all.
double guaranteed_wald_from_errors(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                   const Eigen::VectorXd& r, const Eigen::VectorXd& c,
                                   const Eigen::VectorXd& z);

// Whether the multipliers prove that no V satisfies the facts, or no b the coefficient facts.
bool proves_no_covariance(const ConvexFacts& facts, const Multipliers& multipliers);
bool proves_no_coefficients(const AdmissibleSet& set, const Eigen::VectorXd& z);

}  // namespace rejoinder
