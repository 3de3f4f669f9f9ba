// From evidence to a finding: one claim at a time.
#pragma once

#include "core/evidence/joint_test.h"
#include "core/judge/finding.h"

namespace rejoinder {

struct Judged {
  Finding finding;
  std::vector<AuditLine> audit;  // figures that bear on this claim and do not go together
};

// Never refuses: a claim that cannot be tested gets the state "not computable" with its reason and what to ask.
Judged judge(const Review& review, const Claim& claim);

// Fills headline, sentence, the three parts in words and the paragraph, from the finding's own fields. `test` is null
// where none could be set up; `reason` then says why.
void put_in_words(Finding& finding, const Claim& claim, const JointTest* test, const std::string& reason);

// What would settle it: at least one figure for every finding that is undecided or not computable.
std::vector<Ask> asks_for(const JointTest& test, const Finding& finding);

// The mutual checks of each column's own figures.
std::vector<AuditLine> audit_columns(const Review& review);

}  // namespace rejoinder
