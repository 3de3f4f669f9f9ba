// Properties of the tails: closed forms, symmetries, limits, and round trips through the critical values.
#include "core/statistics/tails.h"

#include <gtest/gtest.h>

#include <cmath>

namespace rejoinder {
namespace {

constexpr double kPi = 3.14159265358979324;
constexpr double kDenominators[] = {1, 1.5, 2, 5, 24, 120, 347, 1e4, 1e5, 1e6, 1e7, 1e9, 1e12, kInfinity};

void expect_relative(double computed, double value, double tolerance) {
  EXPECT_NEAR(computed / value, 1, tolerance) << computed << " against " << value;
}

// Second route: for an even numerator df q = 2m the upper tail of F is y^b times the first m terms of
// 1 + b x + b (b + 1) / 2 x^2 + ..., all positive, with b half the denominator df and y = 1 - x = d / (d + q
// f) (parts integration m - 1 times). For infinite d it is exp(-z) (1 + z + z^2 / 2 + ...), z = q f / 2.
double upper_tail_by_sum(double f, int numerator_df, double denominator_df) {
  const double b = denominator_df / 2, odds = numerator_df * f / denominator_df;
  const bool chi_square = std::isinf(denominator_df);
  double term = chi_square ? std::exp(-numerator_df * f / 2) : std::exp(-b * std::log1p(odds)), sum = 0;
  for (int i = 0; i < numerator_df / 2; ++i) {
    sum += term;
    term *= chi_square ? numerator_df * f / 2 / (i + 1) : (b + i) * odds / (1 + odds) / (i + 1);
  }
  return sum;
}

TEST(FUpperTail, MatchesTheFiniteSumOfEvenNumeratorDf) {
  for (const int q : {2, 4, 6, 10, 20, 60, 200})
    for (const double d : kDenominators)
      for (const double f :
           {0.01, 0.3, 0.9, 0.999, 1.0, 1.001, 1.1, 1.7, 2.4, 2.6, 4.0, 9.0, 30.0, 1e3, 1e6, 1e12}) {
        SCOPED_TRACE(::testing::Message() << "F(" << q << ", " << d << ") at " << f);
        const double sum = upper_tail_by_sum(f, q, d);
        if (sum < 1e-300) continue;
        // The sum's own exponent is rounded at its size, hundreds in far tails.
        expect_relative(f_upper_tail(f, q, d), sum, 1e-14 + 1e-15 * (q + std::fabs(std::log(sum)) * 2));
      }
}

// Derived: with two denominator df the lower tail is x^(q/2), x = q f / (q f + 2).
TEST(FLowerTail, IsAPowerForTwoDenominatorDf) {
  for (const double q : {0.5, 1.0, 3.0, 7.5, 40.0, 200.0})
    for (const double f : {1e-6, 0.02, 0.5, 1.0, 1.5, 20.0, 1e5}) {
      SCOPED_TRACE(::testing::Message() << "F(" << q << ", 2) at " << f);
      const double power = std::exp(-q / 2 * std::log1p(2 / (q * f)));
      if (power > 1e-300) expect_relative(f_lower_tail(f, q, 2), power, 1e-12);
    }
}

// Derived: one df is the Cauchy distribution; two df have 1/2 - t / (2 sqrt(2 + t^2)).
TEST(TUpperTail, MatchesClosedFormsOfOneAndTwoDf) {
  for (const double t : {1e-3, 0.2, 1.0, 3.0, 50.0, 1e4, 1e20, 1e99, 1e101, 1e200, 1e300}) {
    SCOPED_TRACE(t);
    expect_relative(t_upper_tail(t, 1), std::atan(1 / t) / kPi, 1e-12);
    // With r = sqrt(1 + 2 / t^2) the second is 1 / (t r)^2 / (1 + 1 / r), which keeps its digits.
    const double r = std::sqrt(1 + 2 / t / t), two = 1 / (t * r) / (t * r) / (1 + 1 / r);
    if (two > 1e-300) expect_relative(t_upper_tail(t, 2), two, 1e-12);
  }
}

// Source: the complementary error function of the C library.
TEST(TUpperTail, IsTheNormalAtInfiniteDf) {
  for (const double t : {0.0, 0.1, 0.7, 1.0, 1.96, 3.0, 8.0, 20.0, 37.0}) {
    SCOPED_TRACE(t);
    expect_relative(t_upper_tail(t, kInfinity), std::erfc(t / std::sqrt(2.0)) / 2, 1e-15 * (10 + 4 * t * t));
    expect_relative(t_upper_tail(-t, kInfinity), std::erfc(-t / std::sqrt(2.0)) / 2, 1e-14);
  }
}

TEST(TTails, AreSymmetric) {
  for (const double df : kDenominators)
    for (const double t : {0.0, 0.4, 1.96, 12.0}) {
      EXPECT_DOUBLE_EQ(t_upper_tail(t, df) + t_upper_tail(-t, df), 1);
      EXPECT_EQ(t_two_sided(t, df), t_two_sided(-t, df));
    }
}

TEST(FTails, SwapWhenNumeratorAndDenominatorDo) {
  for (const double q : {1.0, 3.0, 17.0, 200.0})
    for (const double d : {1.0, 2.5, 30.0, 4000.0, 1e8})
      for (const double f : {0.001, 0.4, 0.99, 1.0, 1.02, 3.0, 500.0}) {
        SCOPED_TRACE(::testing::Message() << "F(" << q << ", " << d << ") at " << f);
        const double upper = f_upper_tail(f, q, d), lower = f_lower_tail(1 / f, d, q);
        if (upper > 1e-290) expect_relative(upper, lower, 2e-13);
        EXPECT_NEAR(f_upper_tail(f, q, d) + f_lower_tail(f, q, d), 1, 1e-15);
      }
}

TEST(FUpperTail, FallsAsTheStatisticGrows) {
  for (const double q : {1.0, 2.0, 5.0, 60.0})
    for (const double d : kDenominators) {
      SCOPED_TRACE(::testing::Message() << "F(" << q << ", " << d << ")");
      double last = 1;
      for (double f = 0.01; f < 50; f *= 1.01) {
        const double tail = f_upper_tail(f, q, d);
        EXPECT_LE(tail, last) << "at " << f;
        EXPECT_GE(tail, 0) << "at " << f;
        last = tail;
      }
    }
}

// Checked: F(q, d) with growing d comes to the chi-square at the rate 1 / d.
TEST(FUpperTail, PassesSmoothlyToTheChiSquare) {
  for (const double q : {1.0, 3.0, 40.0})
    for (const double f : {0.5, 1.0, 2.5, 9.0}) {
      SCOPED_TRACE(::testing::Message() << "q = " << q << ", f = " << f);
      const double limit = f_upper_tail(f, q, kInfinity);
      const double at_8 = f_upper_tail(f, q, 1e8) / limit - 1, at_9 = f_upper_tail(f, q, 1e9) / limit - 1;
      EXPECT_NEAR(at_8 / at_9, 10, 0.01);
      expect_relative(f_upper_tail(f, q, 1e18), limit, 1e-13);
    }
}

TEST(Tails, TakeEndsOfTheRange) {
  for (const double d : kDenominators) {
    EXPECT_EQ(f_upper_tail(kInfinity, 3, d), 0);
    EXPECT_EQ(f_lower_tail(kInfinity, 3, d), 1);
    EXPECT_EQ(f_upper_tail(0, 3, d), 1);
    EXPECT_EQ(f_upper_tail(-2, 3, d), 1);
    EXPECT_EQ(f_lower_tail(-2, 3, d), 0);
    EXPECT_EQ(t_two_sided(kInfinity, d), 0);
    EXPECT_EQ(t_upper_tail(-kInfinity, d), 1);
    EXPECT_EQ(f_critical(0, 3, d), kInfinity);
    EXPECT_EQ(f_critical(1, 3, d), 0);
    EXPECT_EQ(t_critical(0.5, d), 0);
    EXPECT_EQ(t_critical(0, d), kInfinity);
    EXPECT_EQ(t_critical(1, d), -kInfinity);
  }
  EXPECT_EQ(chi_square_upper_tail(-1, 4), 1);
}

// Checked: the tail at the critical value is the probability asked for, to what the rounding of the critical
// value itself moves it.
TEST(FCritical, ComesBackToItsProbability) {
  for (const double q : {1.0, 2.0, 5.5, 30.0, 200.0})
    for (const double d : kDenominators)
      for (const double p : {1 - 1e-10, 0.999, 0.7, 0.5, 0.2, 0.05, 0.01, 1e-4, 1e-9, 1e-20, 1e-80, 1e-250}) {
        SCOPED_TRACE(::testing::Message() << "F(" << q << ", " << d << ") at p = " << p);
        const double f = f_critical(p, q, d);
        if (std::isinf(f)) {
          EXPECT_GT(f_upper_tail(1e308, q, d), p);
          continue;
        }
        const double slack = 4e-16 * f;  // twice the spacing of doubles at f
        EXPECT_LE(f_upper_tail(f + slack, q, d), p * (1 + 2e-12));
        EXPECT_GE(f_upper_tail(f - slack, q, d), p * (1 - 2e-12));
        if (p > 0.5) expect_relative(f_lower_tail(f, q, d), 1 - p, 1e-13 * (q + 1));
      }
}

TEST(TCritical, ComesBackToItsProbability) {
  for (const double df : kDenominators)
    for (const double p : {0.9, 0.6, 0.4999, 0.3, 0.025, 1e-6, 1e-30, 1e-200, 1e-299}) {
      SCOPED_TRACE(::testing::Message() << df << " df at p = " << p);
      expect_relative(t_upper_tail(t_critical(p, df), df), p, 1e-12);
    }
}

TEST(ChiSquareCritical, IsTheLimitOfF) {
  for (const double q : {1.0, 7.0, 90.0})
    for (const double p : {0.99, 0.05, 1e-40})
      expect_relative(chi_square_critical(p, q), q * f_critical(p, q, 1e16), 1e-12);
}

TEST(FUpperTail, SwapsTheEndsOfARange) {
  const Interval p = f_upper_tail(Interval{2, 3}, 2, 60);
  EXPECT_EQ(p.low, f_upper_tail(3.0, 2, 60));
  EXPECT_EQ(p.high, f_upper_tail(2.0, 2, 60));
  EXPECT_EQ(f_upper_tail(Interval{0, kInfinity}, 2, 60), (Interval{0, 1}));
}

}  // namespace
}  // namespace rejoinder
