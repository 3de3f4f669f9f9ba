#include "core/statistics/tails.h"

#include <cassert>
#include <cmath>

#include "core/statistics/f_tails.h"

namespace rejoinder {
namespace {

void check_df([[maybe_unused]] double numerator_df, [[maybe_unused]] double denominator_df) {
  assert(numerator_df >= 1e-3 && std::isfinite(numerator_df) && denominator_df > 0);
}

// Beyond this t its square would soon leave the doubles. The tail is a pure power there, t^-df, to the last
// digit wherever it is not zero: what is neglected is df / t^2.
constexpr double kFarT = 1e100;

double two_sided_at(double t, double df) { return f_tails(t * t, 1, df).upper; }

}  // namespace

double f_upper_tail(double f, double numerator_df, double denominator_df) {
  assert(!std::isnan(f));
  check_df(numerator_df, denominator_df);
  return f_tails(f, numerator_df, denominator_df).upper;
}

double f_lower_tail(double f, double numerator_df, double denominator_df) {
  assert(!std::isnan(f));
  check_df(numerator_df, denominator_df);
  return f_tails(f, numerator_df, denominator_df).lower;
}

double chi_square_upper_tail(double x, double df) { return f_upper_tail(x / df, df, kInfinity); }

double chi_square_lower_tail(double x, double df) { return f_lower_tail(x / df, df, kInfinity); }

double chi_square_critical(double p, double df) { return f_critical(p, df, kInfinity) * df; }

double t_two_sided(double t, double df) {
  assert(!std::isnan(t) && df > 0);
  const double size = std::fabs(t);
  if (std::isinf(size)) return 0;
  if (size > kFarT) return std::isinf(df) ? 0 : two_sided_at(kFarT, df) * std::pow(kFarT / size, df);
  return two_sided_at(size, df);
}

double t_upper_tail(double t, double df) {
  const double beyond = t_two_sided(t, df) / 2;
  return t > 0 ? beyond : 1 - beyond;
}

double t_critical(double p, double df) {
  assert(p >= 0 && p <= 1 && df > 0);
  if (p > 0.5) return -t_critical(1 - p, df);
  if (p == 0) return kInfinity;
  const double both = 2 * p;
  const double far = std::isinf(df) ? 0 : two_sided_at(kFarT, df);
  if (both < far) return kFarT * std::pow(far / both, 1 / df);
  return std::sqrt(f_critical(both, 1, df));
}

Interval f_upper_tail(const Interval& f, double numerator_df, double denominator_df) {
  return {f_upper_tail(f.high, numerator_df, denominator_df),
          f_upper_tail(f.low, numerator_df, denominator_df)};
}

}  // namespace rejoinder
