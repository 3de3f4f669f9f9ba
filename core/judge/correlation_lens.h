// The correlation lens: two tested estimates whose one unknown correlation decides.
#pragma once

#include "core/evidence/joint_test.h"
#include "core/judge/finding.h"
#include "core/judge/reported.h"

namespace rejoinder {

// Fills finding.correlation and finding.share_rejecting where they apply: exclusion of two terms, or one combination of two,
// with nothing printed of their covariance (correlation); exclusion of any number (share). Leaves them absent otherwise.
void add_correlation_lens(Finding& finding, const JointTest& test, const Reported& said);

// Where the decision turns for one combination of two terms: the correlation at which |t| reaches the critical value, as far
// as the rounding lets it lie. Absent where it does not turn within [-1, 1].
std::optional<Interval> turning_correlation(const JointTest& test);

}  // namespace rejoinder
