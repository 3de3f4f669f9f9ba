#include "web/pictures/scale.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"

namespace rejoinder {

StatisticScale statistic_scale(const Finding& finding) {
  StatisticScale scale;
  scale.chi_square = finding.statistic == Statistic::ChiSquare;
  const std::optional<Interval>& limits = scale.chi_square ? finding.wald : finding.f;
  if (!limits) return scale;
  scale.drawable = true;
  scale.low = std::max(limits->low, 0.0);
  scale.high = limits->high;
  scale.open = std::isinf(scale.high);

  // What must be seen whole: the critical value, what is reported, the low end. A high end not far beyond
  // them is shown too; else the picture ends earlier and the bar is cut.
  double seen = scale.low;
  if (finding.critical) seen = std::max(seen, *finding.critical);
  if (finding.reported && std::isfinite(*finding.reported)) seen = std::max(seen, *finding.reported);
  if (!scale.open && scale.high <= 2.2 * seen) seen = std::max(seen, scale.high);
  scale.cut = !scale.open && scale.high > seen;
  if (seen <= 0) {
    seen = scale.open ? 1 : std::max(scale.high, 1e-300);
    scale.cut = false;
  }
  scale.end = seen * (scale.open || scale.cut ? 1.7 : 1.15);
  return scale;
}

const char* statistic_letter(const Finding& finding) {
  return finding.statistic == Statistic::ChiSquare ? "χ²" : "F";
}

std::string low_text(const StatisticScale& scale) {
  return scale.low == 0 ? "0" : number_text(scale.low, ShowRounding::Down);
}

std::string high_text(const StatisticScale& scale) { return number_text(scale.high, ShowRounding::Up); }

std::string critical_text(const Finding& finding) {
  return finding.critical ? level_text(finding.level) + " point " + number_text(*finding.critical)
                          : std::string();
}

std::string reported_text(const Finding& finding, const std::string& as_printed) {
  if (!finding.reported) return {};
  return "reported " + (as_printed.empty() ? number_text(*finding.reported) : as_printed);
}

}  // namespace rejoinder
