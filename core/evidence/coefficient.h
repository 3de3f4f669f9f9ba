// What everything printed about one coefficient allows its value b and standard error s to be, together.
//
// For each sign of b the pairs (b, s) that agree with every printed figure form a convex polygon: coef and se cut a
// box, t and p and stars cut wedges through the origin, a confidence interval cuts a strip. t ratios are
// linear-fractional, so their ends are at the polygon's corners (exact). Clipping by half-planes: Sutherland and
// Hodgman 1974, Communications of the ACM 17 (from memory).
#pragma once

#include <string>
#include <vector>

#include "core/evidence/evidence.h"
#include "core/review/review.h"

namespace rejoinder {

struct CoefficientPoint {
  double b = 0, s = 0;
};

struct CoefficientLimits {
  bool known = false;       // some figure bears on the coefficient
  bool consistent = true;   // false: no pair (b, s) agrees with every figure; the intervals are then not to be used
  bool without_stars = false;  // the stars do not go with the other figures and were left out
  Interval b = Interval::everything();
  Interval s{0, kInfinity};
  Interval t = Interval::everything();  // b / s, which needs neither b nor s by itself
  std::vector<std::vector<CoefficientPoint>> pieces;  // corners of the polygons; empty where b or s is unbounded
  std::vector<Cell> cells;
  std::vector<Clash> clashes;

  // Limits of (b - r) / s.
  Interval t_about(double r) const;
};

// `denominator_df` is that of the column's tests, infinite for the normal. For robust and clustered errors the paper may
// have used either, so p, stars and intervals are read with both. Terms printed as ratios give b on the log scale.
CoefficientLimits coefficient_limits(const Review& review, const Column& column, const Term& term, double denominator_df);

// The same for a combination with its own printed figures; `value` stands for the coefficient.
CoefficientLimits combination_limits(const Review& review, const Column& column, const Fact& fact, double denominator_df);

}  // namespace rejoinder
