// Upper limits of the Wald statistic from an interval for every entry of V: sign corners, and a cheap bound.
//
// For each pattern s of signs take V_s = V0 - E o ss' and b_s = b0 + h o s. If R V_s R' is positive definite
// for every s, no (b, V) of the box has a larger W than the largest W(b_s, V_s): for a combination c with
// signs s of a = R'c the distance is greatest and the variance least at that corner. Equality holds when the
// maximising V_s is a covariance matrix. (Positive definiteness of interval matrices by the same corners:
// Rohn 1994, SIAM J. Matrix Anal. Appl. 15:175-184.) When some corner is not positive definite the box
// reaches out of the covariance matrices and the corners decide nothing.
#pragma once

#include <Eigen/Dense>
#include <vector>

#include "core/convex/admissible_set.h"

namespace rejoinder {

// The box over the m coefficients that R mentions.
struct EntryBox {
  std::vector<int> columns;          // m: columns of the set
  Eigen::MatrixXd middle, half;      // m by m: every V of the set lies within half of middle, entry by entry
  Eigen::VectorXd b_middle, b_half;  // m
  Eigen::MatrixXd R;                 // q by m
  Eigen::VectorXd r;                 // q
  bool known = true;                 // every entry is bounded
};
// Entries come from covariances, from correlation ranges times standard errors, and from variances of
// combinations of two coefficients; a pair of which nothing is known has the interval that its standard
// errors imply.
EntryBox entry_box(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r);

struct Corners {
  bool all_definite = false;  // R V_s R' > 0 at every corner, so `greatest` holds
  double greatest = 0;        // max W(b_s, V_s) over the definite corners
  Eigen::VectorXd signs;      // m; of the greatest, or of a corner that is not definite when there is one
  Eigen::MatrixXd V;          // m by m, that corner
};
// 2^m corners; m must not exceed 24. A corner counts as definite when the least eigenvalue of R V_s R',
// scaled to unit diagonal, exceeds 1e-12 q, so that 0.115 - 0.115 is singular however it is rounded.
Corners sign_corners(const EntryBox& box);

// A guaranteed upper limit without enumeration: V >= V0 - D with D diagonal, from the Perron vector of E.
// Infinity when R (V0 - D) R' is not positive definite.
double cheap_greatest(const EntryBox& box);

}  // namespace rejoinder
