// Making and measuring pairs (b, V) that show a limit of the Wald statistic to be reached.
#pragma once

#include "core/convex/wald_limits.h"

namespace rejoinder {

// The pair with its Wald statistic and its distance from the set filled in.
WaldWitness make_witness(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                         const Eigen::VectorXd& b, const Eigen::MatrixXd& V);

// A V of the standard errors alone under which the combination `a` (p) has no variance; empty when every V
// gives it some. The terms |a_j| s_j are the sides of a closed polygon drawn in the plane, so one exists
// exactly when no side need be longer than the others together.
Eigen::MatrixXd covariance_without(const AdmissibleSet& set, const Eigen::VectorXd& a);

// The longest side |a_j| s_j less the others together, at the standard errors that make it least; <= 0 when
// some polygon closes. The least standard error of the combination is the positive part of this.
double polygon_gap(const AdmissibleSet& set, const Eigen::VectorXd& a);

}  // namespace rejoinder
