// Small facts about the rows of R that several limits need.
#pragma once

#include <Eigen/Dense>

#include "core/convex/admissible_set.h"

namespace rejoinder {

// Whether the rows of R (q by p) are linearly independent: rank by pivoted QR with threshold 1e-10, after
// each column is multiplied by its standard error and each row brought to length one, so that units do not
// matter.
bool independent_rows(const AdmissibleSet& set, const Eigen::MatrixXd& R);

}  // namespace rejoinder
