#include "core/statistics/f_tails.h"

#include <cmath>
#include <limits>

#include "core/statistics/f_density.h"

namespace rejoinder {
namespace {

// The incomplete beta function over its density as a continued fraction,
//
//   I_x(a, b) = x^a y^b / B(a, b) / (beta_0 + alpha_1 / (beta_1 + alpha_2 / (beta_2 + ...))),
//   alpha_n = (a + n - 1) (a + b + n - 1) n (b - n) x^2 / (a + 2n - 1)^2,
//   beta_n = n + n (b - n) x / (a + 2n - 1) + (a + n) / (a + 2n + 1) (lambda + 1 + n (1 + y)),
//   lambda = a - (a + b) x,
//
// from DiDonato and Morris (1992), ACM Transactions on Mathematical Software 18, 360-373. It converges fast
// where lambda >= 0. Two things make it hold for every df: lambda comes from f itself, where it does not
// cancel, and each factor that grows with an infinite parameter is paired with the x or 1 / a that shrinks
// with it.
struct Fraction {
  double a = 0, b = 0;  // either may be infinite, not both
  double x = 0, y = 0;  // x + y = 1
  double scaled = 0;    // lim b x where b is infinite
  double lambda = 0;

  double alpha(double n) const {
    if (std::isinf(a)) return n * (b - n);
    const double step = a + 2 * n - 1;
    if (std::isinf(b)) return (a + (n - 1)) * n * (scaled / step) * (scaled / step);
    return ((a + (n - 1)) / step) * ((a + b + (n - 1)) * x) * (n * (b - n) * x / step);
  }
  double beta(double n) const {
    if (n == 0) return std::isinf(a) ? lambda + 1 : a / (a + 1) * (lambda + 1);
    const double inner = lambda + 1 + n * (1 + y);
    if (std::isinf(a)) return n + inner;
    const double middle = std::isinf(b) ? n * (scaled / (a + 2 * n - 1)) : n * (b - n) * x / (a + 2 * n - 1);
    return n + middle + (a + n) / (a + 2 * n + 1) * inner;
  }
};

// Evaluated from the front by the modified Lentz method, Thompson and Barnett (1986), Journal of
// Computational Physics 64, 490-509. The limit is far beyond what any df below 1e9 needs.
double value_of(const Fraction& fraction) {
  constexpr int kLimit = 1000000;
  constexpr double kTiny = 1e-290, kSettled = std::numeric_limits<double>::epsilon() / 2;
  double value = fraction.beta(0);
  if (value == 0) value = kTiny;
  double front = value, back = 0;
  for (int n = 1; n <= kLimit; ++n) {
    const double alpha = fraction.alpha(n), beta = fraction.beta(n);
    back = beta + alpha * back;
    if (back == 0) back = kTiny;
    back = 1 / back;
    front = beta + alpha / front;
    if (front == 0) front = kTiny;
    const double change = front * back;
    value *= change;
    if (std::fabs(change - 1) <= kSettled) break;
  }
  return value;
}

}  // namespace

FTails f_tails(double f, double numerator_df, double denominator_df) {
  if (f <= 0) return {1, 0, 0};
  if (std::isinf(f)) return {0, 1, 0};
  const double a = numerator_df / 2, b = denominator_df / 2;
  const bool chi_square = std::isinf(b);

  // x is the share of the numerator in numerator plus denominator. Written so that neither a f nor b / f
  // overflows.
  double x = 0, y = 1, lambda = a * (1 - f);
  if (!chi_square) {
    const double total = f > 1 ? a + b / f : a * f + b;
    x = f > 1 ? a / total : a * f / total;
    y = f > 1 ? b / f / total : b / total;
    lambda = a * (f > 1 ? (1 - f) / f * (b / total) : (1 - f) * (b / total));
  }
  FTails tails;
  tails.density = f_log_density(f, numerator_df, denominator_df);
  // Beyond the mean the upper tail is the smaller one and its fraction the faster one; with few numerator df
  // the lower one stays the faster until a f = 1.
  if (f > 1 && a * f > 1) {
    tails.upper = tails.density / value_of({b, a, y, x, 0, -lambda});
    tails.lower = 1 - tails.upper;
  } else {
    tails.lower = tails.density / value_of({a, b, x, y, a * f, lambda});
    tails.upper = 1 - tails.lower;
  }
  return tails;
}

}  // namespace rejoinder
