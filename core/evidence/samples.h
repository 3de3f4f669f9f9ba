// The route of several columns: "the effect is larger for men than for women".
//
// Independent samples: the estimates of different columns have covariance zero. Columns on one sample: their covariances are
// not known, and every value that leaves the whole a covariance matrix is admitted. Within a column what it prints counts.
#pragma once

#include "core/evidence/joint_test.h"

namespace rejoinder {

// Contract: test.basis is Samples.
RouteAnswer samples_evidence(const JointTest& test);

}  // namespace rejoinder
