#include "core/statistics/f_density.h"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>

namespace rejoinder {
namespace {

constexpr double kInfinite = std::numeric_limits<double>::infinity();

// Second route: the plain difference, in a range where it loses at most three digits, and the first terms of
// x^2 / 2 - x^3 / 3 + x^4 / 4 where x is tiny.
TEST(Log1pShortfall, KeepsDigitsAtSmallArguments) {
  for (const double x : {-0.9, -0.5, -0.2, -0.05, 0.04, 0.3, 1.0, 1.5, 30.0})
    EXPECT_NEAR(log1p_shortfall(x) / (x - std::log1p(x)), 1, 3e-13) << x;
  for (const double x : {-1e-5, -1e-8, 1e-300, 1e-9, 1e-5})
    EXPECT_NEAR(log1p_shortfall(x), x * x * (0.5 - x * (1.0 / 3 - x / 4)), 4e-16 * x * x) << x;
  EXPECT_EQ(log1p_shortfall(0), 0);
}

// Derived: Gamma(1) = 1 gives 1 - log(2 pi) / 2, Gamma(1/2) = sqrt(pi) gives (1 - log 2) / 2, and
// Gamma(z + 1) = z Gamma(z) ties neighbours together on both sides of the switch at 16.
TEST(StirlingRemainder, MatchesKnownGammaFunctions) {
  EXPECT_NEAR(stirling_remainder(1), 0.0810614667953272582, 1e-15);
  EXPECT_NEAR(stirling_remainder(0.5), 0.153426409720027345, 1e-15);
  for (const double z : {0.3, 2.0, 14.9, 15.5, 16.0, 40.0, 3000.0})
    EXPECT_NEAR(stirling_remainder(z) - stirling_remainder(z + 1), (z + 0.5) * std::log1p(1 / z) - 1, 1e-15)
        << z;
  EXPECT_NEAR(stirling_remainder(1e9) * 12e9, 1, 1e-15);
  EXPECT_EQ(stirling_remainder(kInfinite), 0);
}

// Derived: the density of F(2, d) is (1 + 2 f / d)^-(1 + d / 2), that of chi-square over 2 df exp(-f).
TEST(FLogDensity, MatchesTwoNumeratorDf) {
  for (const double d : {1.0, 3.0, 40.0, 1e5, 1e10})
    for (const double f : {1e-5, 0.3, 0.9999, 1.0, 1.2, 3.0, 80.0}) {
      const double density = f * std::exp(-(1 + d / 2) * std::log1p(2 * f / d));
      EXPECT_NEAR(f_log_density(f, 2, d) / density, 1, 1e-13) << f << " at " << d;
    }
  EXPECT_NEAR(f_log_density(0.7, 2, kInfinite), 0.7 * std::exp(-0.7), 1e-15);
}

}  // namespace
}  // namespace rejoinder
