// Where the figures of a finding lie on a line that begins at zero.
//
// One scale serves the span and the curve, so that the same finding looks the same in both.
#pragma once

#include <string>

#include "core/judge/finding.h"

namespace rejoinder {

struct StatisticScale {
  bool drawable = false;  // false where the finding has no limits
  double low = 0, high = 0;
  double end = 1;     // the value at the right end of the picture
  bool open = false;  // no upper limit
  bool cut = false;   // a finite upper limit beyond the picture
  bool chi_square = false;

  // Of the picture's width, 0 to 1.
  double share(double value) const { return value <= 0 ? 0 : value >= end ? 1 : value / end; }
};

StatisticScale statistic_scale(const Finding& finding);

// "F" or "χ²"
const char* statistic_letter(const Finding& finding);
// The limits on the scale of the finding's statistic, each end rounded outward as shown.
std::string low_text(const StatisticScale& scale);
std::string high_text(const StatisticScale& scale);
// "5 % point 2.65"; empty where there is none.
std::string critical_text(const Finding& finding);
// "reported 1.00", with the digits as printed in `as_printed` where that is not empty.
std::string reported_text(const Finding& finding, const std::string& as_printed);

}  // namespace rejoinder
