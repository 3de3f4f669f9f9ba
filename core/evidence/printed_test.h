// The route of the sentence against itself: a reported statistic, its degrees of freedom and its p.
//
// Weaker than agreement with the table, and used only where no other route bounds the statistic and the claim names no
// comparison that is refused (the caller sees to that). An F or chi-square gives the p that belongs to it; a p alone gives
// the statistic.
#pragma once

#include "core/evidence/joint_test.h"

namespace rejoinder {

RouteAnswer printed_test_evidence(const JointTest& test);

}  // namespace rejoinder
