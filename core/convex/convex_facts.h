// The facts on V in one normal form that is convex: what the solver works with and the certificate checks
// against.
//
// Variances, covariances, variances of combinations and other linear facts are convex as they stand. A range
// of a correlation is convex on each side that holds zero, |V_ij| <= c sqrt(V_ii V_jj): a 2 by 2 block
// without negative eigenvalue. A range that leaves zero out is not convex unless both standard errors are
// exact; it is replaced by the smallest convex set around it, V_ij >= low * (largest plane below sqrt(V_ii
// V_jj) over the two variance intervals), and the answer says that the normal form is wider than the set. A
// guaranteed lower limit over the wider set holds for the set.
#pragma once

#include <Eigen/Dense>
#include <vector>

#include "core/convex/admissible_set.h"

namespace rejoinder {

// The sum of weight * V_ij over the terms lies in `value`. Each unordered pair appears once, with i >= j, and
// its weight counts V_ij and V_ji together.
struct LinearFact {
  struct Term {
    int i, j;
    double weight;
  };
  std::vector<Term> terms;
  Interval value;
};

// V_ij <= limit sqrt(V_ii V_jj) (Upper), >= -limit sqrt(...) (Lower), or both; 0 < limit < 1.
struct CorrelationCap {
  enum class Side { Both, Upper, Lower };
  int i = 0, j = 0;
  double limit = 1;
  Side side = Side::Both;
};

struct ConvexFacts {
  Eigen::VectorXd scale;  // p; V_jj <= scale_j^2 for every V of the set; infinite where nothing bounds it
  std::vector<LinearFact> facts;  // the first p are the variances V_jj, in order
  std::vector<CorrelationCap> caps;
  bool exact = true;   // the normal form is the set itself, not a wider one
  bool empty = false;  // two ranges of one correlation exclude each other

  int size() const { return static_cast<int>(scale.size()); }
};

// Unknown standard errors get the bound that printed variances of combinations imply, |a_j| s_j <= sqrt(upper
// end) + sum of |a_i| s_i over the others. A standard error of exactly zero is widened to a billionth of the
// coefficient's own size, because a set without interior has no barrier; `exact` is then false.
ConvexFacts convex_facts(const AdmissibleSet& set);

// What both `every_correlation` and the list say of the pair; low > high where they exclude each other, so
// the result is two doubles rather than an Interval.
struct CorrelationRange {
  double low = -1, high = 1;
};
CorrelationRange correlation_range(const AdmissibleSet& set, int i, int j);

}  // namespace rejoinder
