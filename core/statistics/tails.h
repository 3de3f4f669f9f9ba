// Tail probabilities and their inverses: F, Student t, chi-square, normal.
//
// One method for all of them, f_tails.h: a density whose cancelling parts are taken out on paper, times a
// continued fraction that passes to the chi-square and the normal as the denominator df grow without limit. A
// general library of incomplete beta functions keeps ten digits at 1e6 denominator df and none in tails below
// 1e-100; this keeps 14. Degrees of freedom may be any positive number; a denominator df of infinity gives
// the chi-square or the normal. Relative accuracy with df of 1 and more: better than 1e-14 times the
// condition of the problem (at least 1) above p = 1e-16, and 1e-12 in tails down to p = 1e-300; below 1 df a
// few digits fewer. Both targets agree to 1e-14. A statistic of infinity has upper tail 0; a negative F or
// chi-square counts as 0. NaN never comes back for arguments in range; a numerator df below 1e-3 or a NaN
// argument is a broken contract (assert). A critical value beyond the doubles is infinity.
#pragma once

#include "core/number/interval.h"

namespace rejoinder {

double f_upper_tail(double f, double numerator_df, double denominator_df);
double f_lower_tail(double f, double numerator_df, double denominator_df);
// The F with upper tail probability p, 0 < p < 1; p = 0 gives infinity, p = 1 gives 0.
double f_critical(double p, double numerator_df, double denominator_df);

double chi_square_upper_tail(double x, double df);
double chi_square_lower_tail(double x, double df);
double chi_square_critical(double p, double df);

// One tail of Student's t: P(T > t). Infinite df is the normal.
double t_upper_tail(double t, double df);
// P(|T| > |t|).
double t_two_sided(double t, double df);
// The t with upper tail probability p.
double t_critical(double p, double df);

// p of a range of statistics, ends swapped as the tail falls; rounding of the tail itself is not added.
Interval f_upper_tail(const Interval& f, double numerator_df, double denominator_df);

}  // namespace rejoinder
