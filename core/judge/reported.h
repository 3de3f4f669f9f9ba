// What a sentence reports, as sets of the statistic W, so that it can be set against the limits.
#pragma once

#include <optional>

#include "core/evidence/joint_test.h"
#include "core/judge/finding.h"

namespace rejoinder {

struct Reported {
  bool any = false;                 // a figure is reported: f, chi2, p or stars
  std::optional<Interval> wald;     // W of the reported F or chi-square, its rounding included
  std::optional<Interval> p;        // the reported p
  std::optional<Interval> wald_of_p;  // W whose p is the reported one, at the df the print gives (or a convention's)
  std::optional<bool> rejects;      // the decision claimed: said outright, else what the figures say; absent where they straddle
};

Reported reported(const JointTest& test);

// Whether some W in `limits` gives every reported figure at once; ends may touch within 1e-9 relative.
bool within(const Reported& reported, const Interval& limits);

struct DfCheck {
  DfPart part = DfPart::NotStated;
  bool conflicts = false;  // differs, and no common convention explains it
  std::string says;
};
DfCheck check_df(const JointTest& test);

}  // namespace rejoinder
