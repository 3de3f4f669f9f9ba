#include <algorithm>

#include "core/judge/judge.h"

namespace rejoinder {

CheckedReview check_review(const Review& review) {
  CheckedReview out;
  out.title = review.title;
  out.problems = review.problems;
  out.audit = audit_columns(review);
  for (const Claim& claim : review.claims) {
    Judged judged = judge(review, claim);
    out.findings.push_back(std::move(judged.finding));
    // Two claims on one column meet the same clash; it is told once.
    for (AuditLine& line : judged.audit)
      if (std::none_of(out.audit.begin(), out.audit.end(), [&](const AuditLine& a) { return a.where == line.where && a.says == line.says; }))
        out.audit.push_back(std::move(line));
  }
  return out;
}

}  // namespace rejoinder
