#include <cassert>
#include <cmath>
#include <limits>

#include "core/statistics/f_tails.h"
#include "core/statistics/tails.h"

namespace rejoinder {
namespace {

constexpr double kLargest = std::numeric_limits<double>::max();
constexpr double kSmallest = std::numeric_limits<double>::min();
constexpr int kSteps = 200;     // a handful is usual; bisection alone would need some seventy
constexpr double kNear = 1e-9;  // a Newton step this small, relative to f, leaves about its square behind

// log(reached / wanted) for positive numbers of any size.
double log_ratio(double reached, double wanted) {
  const double relative = (reached - wanted) / wanted;
  return std::fabs(relative) < 0.5 ? std::log1p(relative) : std::log(reached) - std::log(wanted);
}

// f after one Newton step. log(upper tail) is nearly linear, with a slope that tends to -1, against
// v = b log(1 + a f / b), which is a f itself for the chi-square; log(lower tail) against log f. Near the
// root both are the plain step in log f.
double newton_step(double f, double relative, bool upper, double a, double b) {
  if (std::fabs(relative) < 1e-4) return f + f * relative;
  if (!upper) return f * std::exp(relative);
  if (std::isinf(b)) return f + f * relative;
  const double odds = a * f / b;
  const double v_over_b = std::log1p(odds), rise = odds / (1 + odds);  // d(v / b) / d log f
  return std::expm1(v_over_b + relative * rise) * b / a;
}

// The middle of a bracket on the logarithmic scale, which halves many orders of magnitude as readily as one.
double between(double low, double high) { return std::sqrt(low) * std::sqrt(high); }

}  // namespace

double f_critical(double p, double numerator_df, double denominator_df) {
  assert(p >= 0 && p <= 1 && numerator_df >= 1e-3 && denominator_df > 0);
  if (p == 0) return kInfinity;
  if (p == 1) return 0;
  // The tail that is asked for, if it is the smaller one; else the other, whose probability 1 - p is exact.
  const bool upper = p <= 0.5;
  const double wanted = upper ? p : 1 - p, a = numerator_df / 2, b = denominator_df / 2;
  double low = kSmallest, high = kLargest, f = 1;
  for (int step = 0; step < kSteps; ++step) {
    const FTails tails = f_tails(f, numerator_df, denominator_df);
    const double reached = upper ? tails.upper : tails.lower;
    const bool root_above = upper ? reached > wanted : reached < wanted;
    if (f >= kLargest && root_above) return kInfinity;
    if (f <= kSmallest && !root_above) return 0;
    (root_above ? low : high) = f;

    double next = 0;
    if (reached > 0 && tails.density > 0) {
      const double relative = (upper ? 1 : -1) * log_ratio(reached, wanted) * (reached / tails.density);
      next = newton_step(f, relative, upper, a, b);
      if (std::fabs(relative) < kNear) return next;
      next = std::min(std::max(next, kSmallest), kLargest);
    }
    const bool inside = next > low && next < high;
    const bool at_edge = (next == kLargest && high == kLargest) || (next == kSmallest && low == kSmallest);
    f = inside || at_edge ? next : between(low, high);
  }
  return f;
}

}  // namespace rejoinder
