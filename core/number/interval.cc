#include "core/number/interval.h"

namespace rejoinder {
namespace {

constexpr double kLargest = std::numeric_limits<double>::max();
constexpr double kSmallest = std::numeric_limits<double>::denorm_min();
// Below this size the remainder of a product or quotient may itself fall under the smallest double, so its
// sign says nothing and both neighbours are taken.
constexpr double kRemainderHolds = 1e-280;

// A value rounded to nearest and the sign of (true value - rounded value). `known` is false where that sign
// could not be had; then both neighbours are taken.
struct Rounded {
  double value = 0;
  double remainder = 0;
  bool known = true;
  int sign = 0;  // of the true value, for results that round to zero
};

// The largest double that is not above the true value, and the smallest not below it. A result that
// overflowed came from finite operands, one that fell to zero from operands that were not zero; both keep the
// true side.
double floor_of(const Rounded& r) {
  if (r.known) return r.remainder < 0 ? step_down(r.value) : r.value;
  if (r.value == kInfinity) return kLargest;
  if (r.value == 0) return r.sign > 0 ? 0.0 : -kSmallest;
  return step_down(r.value);
}
double ceiling_of(const Rounded& r) {
  if (r.known) return r.remainder > 0 ? step_up(r.value) : r.value;
  if (r.value == -kInfinity) return -kLargest;
  if (r.value == 0) return r.sign < 0 ? 0.0 : kSmallest;
  return step_up(r.value);
}

// The rounding of a sum of two doubles is itself a double, found without branches (Knuth, The Art of Computer
// Programming, volume 2, section 4.2.2). Infinite operands give infinite or undefined sums; the caller has
// chosen what an undefined one means.
Rounded sum(double a, double b, double where_undefined) {
  if (std::isinf(a) || std::isinf(b)) {
    const double s = a + b;
    return {std::isnan(s) ? where_undefined : s, 0, true, 0};
  }
  const double s = a + b;
  if (std::isinf(s)) return {s, 0, false, s > 0 ? 1 : -1};
  const double b_part = s - a;
  return {s, (a - (s - b_part)) + (b - b_part), true, 0};
}

int sign_of(double x) { return (x > 0) - (x < 0); }

// Zero times anything is zero, infinity included: an infinite end stands for "as large as you like", never
// for a value that is reached.
Rounded product(double a, double b) {
  if (a == 0 || b == 0) return {};
  const double p = a * b;
  if (std::isinf(a) || std::isinf(b)) return {p, 0, true, 0};
  const int sign = sign_of(a) * sign_of(b);
  if (std::isinf(p) || std::fabs(p) < kRemainderHolds) return {p, 0, false, sign};
  return {p, std::fma(a, b, -p), true, sign};
}

// Contract: b > 0. Infinity over infinity is left to the caller as in `sum`.
Rounded quotient(double a, double b, double where_undefined) {
  if (a == 0) return {};
  if (std::isinf(a) || std::isinf(b)) {
    const double q = a / b;
    return {std::isnan(q) ? where_undefined : q, 0, true, 0};
  }
  const double q = a / b;
  if (std::isinf(q) || std::fabs(q) < kRemainderHolds || std::fabs(a) < kRemainderHolds)
    return {q, 0, false, sign_of(a)};
  return {q, -std::fma(q, b, -a), true, sign_of(a)};
}

// Contract: b.low >= 0 and b.high > 0.
Interval divide_by_positive(const Interval& a, const Interval& b) {
  Interval result;
  const double low_divisor = a.low >= 0 ? b.high : b.low, high_divisor = a.high >= 0 ? b.low : b.high;
  // A zero divisor is approached from above, and the end it belongs to has no limit.
  if (low_divisor == 0)
    result.low = -kInfinity;
  else
    result.low = floor_of(quotient(a.low, low_divisor, a.low >= 0 ? 0 : -kInfinity));
  if (high_divisor == 0)
    result.high = kInfinity;
  else
    result.high = ceiling_of(quotient(a.high, high_divisor, a.high >= 0 ? kInfinity : 0));
  return result;
}

}  // namespace

std::optional<Interval> meet(const Interval& a, const Interval& b) {
  const Interval both{std::max(a.low, b.low), std::min(a.high, b.high)};
  if (both.low > both.high) return std::nullopt;
  return both;
}

Interval join(const Interval& a, const Interval& b) {
  return {std::min(a.low, b.low), std::max(a.high, b.high)};
}

Interval operator-(const Interval& a) { return {-a.high, -a.low}; }

Interval operator+(const Interval& a, const Interval& b) {
  return {floor_of(sum(a.low, b.low, -kInfinity)), ceiling_of(sum(a.high, b.high, kInfinity))};
}

Interval operator-(const Interval& a, const Interval& b) { return a + (-b); }

Interval operator*(const Interval& a, const Interval& b) {
  const Rounded ends[] = {product(a.low, b.low), product(a.low, b.high), product(a.high, b.low),
                          product(a.high, b.high)};
  Interval result{floor_of(ends[0]), ceiling_of(ends[0])};
  for (const Rounded& end : ends) {
    result.low = std::min(result.low, floor_of(end));
    result.high = std::max(result.high, ceiling_of(end));
  }
  return result;
}

Interval operator/(const Interval& a, const Interval& b) {
  if (b.low >= 0 && b.high > 0) return divide_by_positive(a, b);
  if (b.high <= 0 && b.low < 0) return divide_by_positive(-a, -b);
  return Interval::everything();
}

Interval operator*(double scale, const Interval& a) { return Interval::point(scale) * a; }

Interval sqrt(const Interval& a) {
  const auto root = [](double x) -> Rounded {
    if (x <= 0) return {};
    const double s = std::sqrt(x);
    if (std::isinf(x)) return {s, 0, true, 1};
    if (x < kRemainderHolds) return {s, 0, false, 1};
    return {s, -std::fma(s, s, -x), true, 1};
  };
  return {floor_of(root(a.low)), ceiling_of(root(a.high))};
}

// The libraries' exp and log are within one unit in the last place on both targets, so one step outward
// holds; log(1) = 0 and exp(0) = 1 are exact there.
Interval log(const Interval& a) {
  const auto end = [](double x, bool up) {
    if (x <= 0) return -kInfinity;
    if (x == 1) return 0.0;
    return up ? step_up(std::log(x)) : step_down(std::log(x));
  };
  return {end(a.low, false), end(a.high, true)};
}

Interval exp(const Interval& a) {
  Interval result{std::exp(a.low), std::exp(a.high)};
  if (a.low != 0 && result.low > 0)
    result.low = std::isinf(result.low) && !std::isinf(a.low) ? kLargest : step_down(result.low);
  if (a.high != 0 && a.high != -kInfinity) result.high = step_up(result.high);
  return result;
}

Interval square(const Interval& a) {
  const double least = a.mignitude(), most = a.magnitude();
  return {floor_of(product(least, least)), ceiling_of(product(most, most))};
}

}  // namespace rejoinder
