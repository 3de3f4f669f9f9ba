// Tail probabilities and their inverses: F, Student t, chi-square, normal.
//
// Boost.Math with one policy for both targets (no promotion to long double, no exceptions), and our own expansion
// about the chi-square where Boost loses digits (denominator df from about 1e6). Degrees of freedom may be any
// positive number; a denominator df of infinity gives the chi-square or the normal. Relative accuracy 1e-13 times
// the condition of the problem in the body, 1e-10 in tails down to p = 1e-300.
// A statistic of infinity has upper tail 0; a negative F or chi-square counts as 0. NaN never comes back for
// arguments in range; a numerator df below 1e-3 or a NaN argument is a broken contract (assert).
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
