// How far a combination of the coefficients alone can go: a'b over the box and the coefficient facts.
#pragma once

#include <Eigen/Dense>

#include "core/convex/admissible_set.h"

namespace rejoinder {

// The greatest a'b. Without coefficient facts a corner of the box; with them a linear programme.
struct GreatestCombination {
  Eigen::VectorXd b;  // p; where it is reached; empty when the coefficient facts exclude each other
  double guaranteed = kInfinity;  // no admissible b has more; rounded up
};
// `a` is p. A coefficient with infinite half width and a_j != 0 gives infinity, with b at the centre there.
GreatestCombination greatest_combination(const AdmissibleSet& set, const Eigen::VectorXd& a);

// The farthest that c'(Rb - r) can be from zero, on either side. `c` is q.
struct FarthestDistance {
  Eigen::VectorXd b;
  double guaranteed = kInfinity;  // n(c) in the design; >= 0
};
FarthestDistance farthest_distance(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                   const Eigen::VectorXd& r, const Eigen::VectorXd& c);

}  // namespace rejoinder
