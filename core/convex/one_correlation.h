// Two tested coefficients with one unknown correlation: F as a function of it, and back.
//
// With t ratios t1, t2 and correlation rho of the two estimates, 2 F(rho) = (t1² + t2² - 2 rho t1 t2) / (1 -
// rho²). Its minimum over rho is max(t1², t2²) / 2, at rho = smaller / larger t (signed); towards rho = -1
// and 1 it runs to infinity, except at the one end whose sign is that of t1 t2 when |t1| = |t2| exactly. F <=
// k exactly for rho between cos(A + B) and cos(A - B), A = arccos(t1 / sqrt(2k)), B = arccos(t2 / sqrt(2k));
// nowhere when 2k < max(t1², t2²). Derived in the design; the roots are taken in the product form of the
// discriminant, which cancels nothing.
#pragma once

#include <optional>
#include <vector>

#include "core/number/interval.h"

namespace rejoinder {

// F at one correlation, -1 < rho < 1; at the ends the limit (infinite, or t² / 2 in the exceptional case).
double f_at_correlation(double t1, double t2, double rho);

// The correlations with F <= k; nothing where there are none. k >= 0.
std::optional<Interval> correlations_below(double t1, double t2, double k);

// The correlations at which some t1, t2 in their intervals give some F in `f`: disjoint, in order. f.high may
// be infinite, and a set that F admits up to an end of [-1, 1] includes that end. Intervals of t must be
// finite.
std::vector<Interval> correlations_with_f(const Interval& t1, const Interval& t2, const Interval& f);

}  // namespace rejoinder
