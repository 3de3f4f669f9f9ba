// One combination of two estimates whose correlation is known only through their joint test.
//
// With t1 = b1 / s1, t2 = b2 / s2 and 2F = (t1² + t2² - 2 rho t1 t2) / (1 - rho²) printed as F, each (b1, b2, s1, s2, F) leaves at
// most two correlations, and W = (a1 b1 + a2 b2 - r)² / (a1² s1² + a2² s2² + 2 a1 a2 rho s1 s2). The limits over the box of
// roundings come from branch and bound on (b1, b2, s1, s2): on each part the correlations are enclosed exactly
// (core/convex/one_correlation.h) and W by interval arithmetic, so every limit is guaranteed at any time.
#pragma once

#include <array>
#include <optional>

#include "core/number/interval.h"

namespace rejoinder {

struct TwoSlopes {
  std::array<Interval, 2> b, s;  // finite; s above 0 at the high end
  Interval f;                    // of the joint test that both are zero
  std::array<double, 2> a;       // weights, not both 0
  double r = 0;
};

struct TwoSlopesLimits {
  Interval wald;      // guaranteed
  Interval attained;  // values met by some (b, s, F); inside `wald`
};

// Nothing where no correlation fits anywhere in the box. Stops at `agreement` relative between guaranteed and attained, or after
// `parts` parts for each end.
std::optional<TwoSlopesLimits> two_slopes_limits(const TwoSlopes& slopes, double agreement = 1e-4, int parts = 20000);

}  // namespace rejoinder
