#include "core/number/interval.h"

#include <gtest/gtest.h>

#include <boost/multiprecision/cpp_int.hpp>
#include <cmath>
#include <cstdint>
#include <functional>
#include <random>

namespace rejoinder {
namespace {

using Exact = boost::multiprecision::cpp_rational;
using boost::multiprecision::cpp_int;

// Second route: every finite double is a fraction, and fractions are computed without rounding.
Exact exact(double x) {
  int exponent = 0;
  const double fraction = std::frexp(x, &exponent);
  const cpp_int whole(static_cast<std::int64_t>(std::ldexp(fraction, 53)));
  exponent -= 53;
  return exponent >= 0 ? Exact(whole << exponent) : Exact(whole, cpp_int(1) << -exponent);
}

// `interval` holds `value`, and no smaller interval of doubles does.
void expect_tight(const Interval& interval, const Exact& value) {
  EXPECT_LE(exact(interval.low), value);
  EXPECT_GE(exact(interval.high), value);
  if (interval.is_point()) return;
  EXPECT_EQ(std::nextafter(interval.low, kInfinity), interval.high);
  EXPECT_NE(exact(interval.low), value);
  EXPECT_NE(exact(interval.high), value);
}

double random_double(std::mt19937_64& random, int span) {
  const double size =
      std::ldexp(static_cast<double>(random() >> 11), -53 + static_cast<int>(random() % (2 * span)) - span);
  return random() % 2 ? size : -size;
}

TEST(Interval, HoldsTheExactResultAndNoMore) {
  std::mt19937_64 random(20240601);
  for (int i = 0; i < 1500; ++i) {
    const int span = i % 3 == 0 ? 2 : i % 3 == 1 ? 60 : 330;
    const double a = random_double(random, span), b = random_double(random, span);
    SCOPED_TRACE(::testing::Message() << a << " and " << b);
    const Interval x = Interval::point(a), y = Interval::point(b);
    expect_tight(x + y, exact(a) + exact(b));
    expect_tight(x - y, exact(a) - exact(b));
    expect_tight(x * y, exact(a) * exact(b));
    expect_tight(square(x), exact(a) * exact(a));
    if (b != 0) expect_tight(x / y, exact(a) / exact(b));
    const Interval root = sqrt(Interval::point(std::fabs(a)));
    EXPECT_LE(exact(root.low) * exact(root.low), exact(std::fabs(a)));
    EXPECT_GE(exact(root.high) * exact(root.high), exact(std::fabs(a)));
    EXPECT_LE(root.high, std::nextafter(root.low, kInfinity));
  }
}

TEST(Interval, LeavesExactResultsAlone) {
  EXPECT_EQ(Interval::point(2) * Interval::point(3), Interval::point(6));
  EXPECT_EQ(Interval::point(0.25) + Interval::point(0.5), Interval::point(0.75));
  EXPECT_EQ(Interval::point(6) / Interval::point(3), Interval::point(2));
  EXPECT_EQ(sqrt(Interval::point(9)), Interval::point(3));
  EXPECT_EQ(log(Interval::point(1)), Interval::point(0));
  EXPECT_EQ(exp(Interval::point(0)), Interval::point(1));
  EXPECT_EQ(Interval::point(0) * Interval::everything(), Interval::point(0));
}

TEST(Interval, TakesTheWidestOfAllCorners) {
  EXPECT_EQ((Interval{-2, 3} * Interval{-5, 4}), (Interval{-15, 12}));
  EXPECT_EQ(square(Interval{-2, 3}), (Interval{0, 9}));
  EXPECT_EQ(-2 * (Interval{1, 4}), (Interval{-8, -2}));
  EXPECT_EQ((Interval{-6, 4} / Interval{2, 8}), (Interval{-3, 2}));
  EXPECT_EQ((Interval{-6, 4} / Interval{-8, -2}), (Interval{-2, 3}));
}

TEST(Interval, DividesByRangesThatTouchOrHoldZero) {
  EXPECT_EQ((Interval{1, 2} / Interval{0, 4}), (Interval{0.25, kInfinity}));
  EXPECT_EQ((Interval{-2, -1} / Interval{0, 4}), (Interval{-kInfinity, -0.25}));
  EXPECT_EQ((Interval{1, 2} / Interval{-4, 0}), (Interval{-kInfinity, -0.25}));
  EXPECT_EQ((Interval{-1, 2} / Interval{0, 4}), Interval::everything());
  EXPECT_EQ((Interval{1, 2} / Interval{-1, 4}), Interval::everything());
  EXPECT_EQ((Interval{1, 2} / Interval{0, 0}), Interval::everything());
}

TEST(Interval, NeverComesToNaN) {
  const double ends[] = {-kInfinity, -1e308, -1, -5e-324, 0, 5e-324, 1, 1e308, kInfinity};
  const auto sound = [](const Interval& i) { return i.low <= i.high; };
  for (const double a : ends)
    for (const double b : ends)
      for (const double c : ends)
        for (const double d : ends) {
          if (a > b || c > d) continue;
          const Interval x{a, b}, y{c, d};
          EXPECT_TRUE(sound(x + y) && sound(x - y) && sound(x * y) && sound(x / y) && sound(sqrt(x)) &&
                      sound(log(x)) && sound(exp(x)) && sound(square(x)))
              << "[" << a << ", " << b << "] and [" << c << ", " << d << "]";
        }
}

TEST(Interval, KeepsItsSignWhenAResultUnderflows) {
  const Interval tiny = Interval::point(1e-200) * Interval::point(1e-200);
  EXPECT_EQ(tiny.low, 0);
  EXPECT_GT(tiny.high, 0);
  EXPECT_LE((Interval::point(-1e-200) * Interval::point(1e-200)).high, 0);
  EXPECT_GE(exp(Interval::point(-1000)).low, 0);
}

TEST(Interval, KeepsAFiniteEndWhenAResultOverflows) {
  const Interval huge = Interval::point(1e200) * Interval::point(1e200);
  EXPECT_EQ(huge.low, std::numeric_limits<double>::max());
  EXPECT_EQ(huge.high, kInfinity);
  EXPECT_EQ(exp(Interval::point(1000)).low, std::numeric_limits<double>::max());
}

TEST(Interval, CutsTheDomainsOfRootAndLogarithm) {
  EXPECT_EQ(sqrt(Interval{-1, 4}), (Interval{0, 2}));
  EXPECT_EQ(log(Interval{-1, 1}), (Interval{-kInfinity, 0}));
  EXPECT_EQ(exp(Interval{-kInfinity, 0}), (Interval{0, 1}));
}

TEST(Interval, EnclosesLogarithmAndExponential) {
  for (const double x : {1e-300, 0.1, 0.5, 2.0, 10.0, 1e300}) {
    const Interval back = exp(log(Interval::point(x)));
    EXPECT_TRUE(back.contains(x)) << x;
    EXPECT_LT(back.width() / x, 1e-12) << x;
  }
}

TEST(Meet, IsWhatBothHold) {
  EXPECT_EQ(meet({0, 2}, {1, 3}), (Interval{1, 2}));
  EXPECT_EQ(meet({0, 1}, {1, 3}), Interval::point(1));
  EXPECT_FALSE(meet({0, 1}, {2, 3}).has_value());
}

TEST(Join, HoldsBoth) { EXPECT_EQ(join({0, 1}, {2, 3}), (Interval{0, 3})); }

}  // namespace
}  // namespace rejoinder
