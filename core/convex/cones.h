// Branch and bound for the greatest Wald statistic with few restrictions.
//
// W = max over combinations c of n(c)^2 / l(c), n the farthest distance and l the least variance. On the cone
// spanned by generators c^1..c^q put n_i = n(c^i) and L_ij = min a_i' V a_j over V. For any point of the cone
// n <= n' x and l >= x' L x with x >= 0, so the largest (n'x)^2 / x'Lx bounds W there; it is taken exactly
// over the faces of x >= 0. Cones are halved at their longest edge until the best bound meets the best value
// attained.
#pragma once

#include <Eigen/Dense>

#include "core/convex/least_variance.h"
#include "core/convex/wald_limits.h"

namespace rejoinder {

struct ConeSearch {
  double guaranteed = kInfinity;  // rounded up; infinity when some cone was never bounded
  WaldWitness best;               // the largest value met on the way
  int nodes = 0;
};

// q = R.rows() <= 4 is practical. Ends at the relative `agreement`, or after `node_limit` cones or `calls`
// uses of `variance`; `attained` is a value known beforehand.
ConeSearch search_cones(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                        LeastVariance& variance, double attained, double agreement, int node_limit,
                        int calls);

// The largest (n'x)^2 / x'Lx over x >= 0, n >= 0; infinity where L is not strictly copositive or cannot be
// shown to be. Exposed for tests. Size up to 4.
double greatest_ratio(const Eigen::VectorXd& n, const Eigen::MatrixXd& L);

}  // namespace rejoinder
