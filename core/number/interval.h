// Closed intervals of doubles, always rounded outward.
//
// An Interval holds every value that something printed may stand for. Arithmetic on intervals moves each end
// outward to a neighbouring double, so the true result is never left out. WebAssembly cannot change the rounding
// mode, therefore std::nextafter is used and never fesetround. Either end may be infinite. low <= high always.
#pragma once

#include <algorithm>
#include <cmath>
#include <limits>
#include <optional>

namespace rejoinder {

inline constexpr double kInfinity = std::numeric_limits<double>::infinity();

// The neighbouring double below or above; infinities and exact zeros that need no step stay where they are.
inline double step_down(double x) { return std::isinf(x) ? x : std::nextafter(x, -kInfinity); }
inline double step_up(double x) { return std::isinf(x) ? x : std::nextafter(x, kInfinity); }

struct Interval {
  double low = 0;
  double high = 0;

  static Interval point(double x) { return {x, x}; }
  static Interval everything() { return {-kInfinity, kInfinity}; }

  bool contains(double x) const { return low <= x && x <= high; }
  bool contains(const Interval& other) const { return low <= other.low && other.high <= high; }
  bool overlaps(const Interval& other) const { return low <= other.high && other.low <= high; }
  bool is_point() const { return low == high; }
  double width() const { return high - low; }
  // Centre and half width; contract: both ends finite.
  double middle() const { return low + (high - low) / 2; }
  double half_width() const { return (high - low) / 2; }
  // Largest and smallest absolute value held.
  double magnitude() const { return std::max(std::fabs(low), std::fabs(high)); }
  double mignitude() const { return contains(0) ? 0 : std::min(std::fabs(low), std::fabs(high)); }

  bool operator==(const Interval&) const = default;
};

// What both hold, or nothing when they do not meet.
std::optional<Interval> meet(const Interval& a, const Interval& b);
// The smallest interval that holds both.
Interval join(const Interval& a, const Interval& b);

Interval operator-(const Interval& a);
Interval operator+(const Interval& a, const Interval& b);
Interval operator-(const Interval& a, const Interval& b);
Interval operator*(const Interval& a, const Interval& b);
// A divisor that touches zero from one side gives an infinite end; one that holds zero inside gives everything().
Interval operator/(const Interval& a, const Interval& b);
Interval operator*(double scale, const Interval& a);

// Monotone functions, each end one step outward. sqrt cuts below zero; log of a low end <= 0 is -infinity.
Interval sqrt(const Interval& a);
Interval log(const Interval& a);
Interval exp(const Interval& a);
Interval square(const Interval& a);

}  // namespace rejoinder
