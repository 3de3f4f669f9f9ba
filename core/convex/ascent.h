// Attained values from below for the greatest Wald statistic, and singular V.
#pragma once

#include <Eigen/Dense>
#include <optional>

#include "core/convex/least_variance.h"
#include "core/convex/wald_limits.h"

namespace rejoinder {

// Alternates c = S^-1 d, the farthest b for c, and the V of least variance for c: W never falls. Starts from
// random combinations with a fixed seed. The best pair found within the number of calls allowed.
WaldWitness ascend(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                   LeastVariance& variance, int starts, int calls);

// A combination c of the rows, a V of the set with c'R V R'c = 0, and a b with c'(Rb - r) not 0: proof that W
// has no upper limit. V lies in the set to within 1e-10 as distance_outside() measures. Nothing when none was
// found, which proves nothing.
struct SingularPoint {
  Eigen::VectorXd c;  // q
  Eigen::VectorXd b;  // p
  Eigen::MatrixXd V;  // p by p
};
std::optional<SingularPoint> singular_point(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                            const Eigen::VectorXd& r, LeastVariance& variance, int starts,
                                            int calls);

}  // namespace rejoinder
