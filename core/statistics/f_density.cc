#include "core/statistics/f_density.h"

#include <cmath>
#include <utility>

namespace rejoinder {
namespace {

constexpr double kTwoPi = 6.283185307179586477;

// How far f lies from 1, as the exponent that the density has lost there:
//
//   deviance = n log(1 + x0 (f - 1)) - a log f,   a, b half the degrees of freedom, n = a + b, x0 = a / n.
//
// It is zero at f = 1 and grows to both sides. With s(u) = u - log(1 + u) the terms linear in f - 1 cancel on
// paper, n x0 = a, and leave a s(f - 1) - n s(x0 (f - 1)): no digits are lost near 1 while x0 <= 1/2. Larger
// x0 comes here as the mirror image, 1/f with a and b changed over, so the caller sees to x0 <= 1/2.
double deviance_from_mean(double f, double a, double b) {
  const double n = a + b, x0 = std::isinf(b) ? 0 : a / n, excess = f - 1;
  if (f > 0.4 && f < 2.5) {
    const double whole = a * log1p_shortfall(excess);
    return std::isinf(b) ? whole : whole - n * log1p_shortfall(x0 * excess);
  }
  if (std::isinf(b)) return a * (excess - std::log(f));
  return n * std::log1p(x0 * excess) - a * std::log(f);
}

}  // namespace

// With r = x / (2 + x), log(1 + x) = 2 (r + r^3/3 + r^5/5 + ...) and x - 2 r = x r, so
// x - log(1 + x) = r (x - 2 r^2 (1/3 + r^2/5 + ...)), whose two parts differ by a factor of six or more.
double log1p_shortfall(double x) {
  if (x < -0.5 || x > 1) return x - std::log1p(x);
  const double r = x / (2 + x), square = r * r;
  double term = square, sum = 0;
  for (int odd = 3;; odd += 2) {
    const double next = sum + term / odd;
    if (next == sum) break;
    sum = next;
    term *= square;
  }
  return r * (x - 2 * sum);
}

// Stirling's series from 16 on, where eight terms reach 1e-18; below, the recurrence Gamma(z + 1) = z
// Gamma(z) climbs there.
double stirling_remainder(double z) {
  if (std::isinf(z)) return 0;
  double climbed = 0;
  for (; z < 16; z += 1) climbed += (z + 0.5) * std::log1p(1 / z) - 1;
  // Bernoulli numbers B(2k) / (2k (2k - 1)), Abramowitz and Stegun (1964), 6.1.40.
  constexpr double kTerms[] = {1.0 / 12,   -1.0 / 360,      1.0 / 1260, -1.0 / 1680,
                               1.0 / 1188, -691.0 / 360360, 1.0 / 156,  -3617.0 / 122400};
  const double inverse = 1 / z, square = inverse * inverse;
  double sum = 0;
  for (int k = 7; k >= 0; --k) sum = sum * square + kTerms[k];
  return climbed + sum * inverse;
}

// f density = x^a y^b / B(a, b), x = a f / (a f + b), y = 1 - x. Gamma functions by Stirling's formula and
// its remainder d(z) make it sqrt(a b / (2 pi n)) exp(d(n) - d(a) - d(b) - deviance).
double f_log_density(double f, double numerator_df, double denominator_df) {
  double a = numerator_df / 2, b = denominator_df / 2;
  if (a > b) {
    std::swap(a, b);
    f = 1 / f;
  }
  const double n = a + b;
  const double spread = std::isinf(b) ? a : a / n * b;
  const double remainders = stirling_remainder(n) - stirling_remainder(b) - stirling_remainder(a);
  return std::sqrt(spread / kTwoPi) * std::exp(remainders - deviance_from_mean(f, a, b));
}

}  // namespace rejoinder
