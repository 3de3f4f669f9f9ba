// Small facts about the rows of R that several limits need.
#pragma once

#include <Eigen/Dense>
#include <optional>

#include "core/convex/admissible_set.h"

namespace rejoinder {

// Whether the rows of R (q by p) are linearly independent: rank by pivoted QR with threshold 1e-10, after
// each column is multiplied by its standard error and each row brought to length one, so that units do not
// matter.
bool independent_rows(const AdmissibleSet& set, const Eigen::MatrixXd& R);

// The same hypothesis in rows that do not resemble one another.
//
// When standard errors differ by many orders of size, "a + b = 0" and "a - b = 0" are almost the same row as
// far as doubles can see, because one coefficient dominates both. Elimination with integers, the largest
// standard error first, leaves each dominating coefficient in one row only and changes nothing in the
// hypothesis.
struct ReducedRows {
  Eigen::MatrixXd R;    // q by p
  Eigen::VectorXd r;    // q
  Eigen::MatrixXd mix;  // q by q, invertible; R = mix * (R as given), exactly
};
// `scale` is p, a standard error for each coefficient; infinite or zero counts as none. Nothing when the
// scales of the coefficients in R differ by less than 1000, when R is not made of integers, or when they
// would grow beyond 2^40.
std::optional<ReducedRows> reduced_rows(const Eigen::VectorXd& scale, const Eigen::MatrixXd& R,
                                        const Eigen::VectorXd& r);

}  // namespace rejoinder
