#include "core/evidence/two_slopes.h"

#include <gtest/gtest.h>

#include <cmath>
#include <random>

#include "core/convex/one_correlation.h"

namespace rejoinder::testing {
namespace {

// Second route: draws from the box; the correlation by the quadratic's roots, W by its formula.
TEST(TwoSlopes, HoldEveryDraw) {
  TwoSlopes slopes;
  slopes.b = {Interval{0.9425, 0.9435}, Interval{0.4315, 0.4325}};
  slopes.s = {Interval{0.1315, 0.1325}, Interval{0.1475, 0.1485}};
  slopes.f = {50.445, 50.455};
  slopes.a = {1, -1};
  const auto limits = two_slopes_limits(slopes);
  ASSERT_TRUE(limits);
  std::mt19937_64 engine(3);
  const auto draw = [&](const Interval& x) { return x.low + x.width() * static_cast<double>(engine() >> 11) / 9007199254740992.0; };
  double least = 1e300, most = 0;
  int met = 0;
  for (int i = 0; i < 20000; ++i) {
    const double b1 = draw(slopes.b[0]), b2 = draw(slopes.b[1]), s1 = draw(slopes.s[0]), s2 = draw(slopes.s[1]);
    const double t1 = b1 / s1, t2 = b2 / s2, k = 2 * draw(slopes.f);
    const double root = (t1 * t2) * (t1 * t2) - k * (t1 * t1 + t2 * t2 - k);
    if (root < 0) continue;
    for (const double sign : {-1.0, 1.0}) {
      const double rho = (t1 * t2 + sign * std::sqrt(root)) / k;
      if (std::fabs(rho) >= 1) continue;
      const double wald = (b1 - b2) * (b1 - b2) / (s1 * s1 + s2 * s2 - 2 * rho * s1 * s2);
      least = std::min(least, wald);
      most = std::max(most, wald);
      ++met;
    }
  }
  ASSERT_GT(met, 1000);
  EXPECT_LE(limits->wald.low, least);
  EXPECT_GE(limits->wald.high, most);
  // Not much wider than what is attained, and the draws come near it.
  EXPECT_NEAR(limits->wald.low / limits->attained.low, 1, 2e-4);
  EXPECT_NEAR(limits->wald.high / limits->attained.high, 1, 2e-4);
  EXPECT_NEAR(least / limits->wald.low, 1, 0.05);
}

TEST(TwoSlopes, HaveNoLimitsWhereNoCorrelationFits) {
  TwoSlopes slopes;
  slopes.b = {Interval{3, 3}, Interval{1, 1}};
  slopes.s = {Interval{1, 1}, Interval{1, 1}};
  slopes.f = {1, 2};  // below max t² / 2
  slopes.a = {1, -1};
  EXPECT_FALSE(two_slopes_limits(slopes));
}

}  // namespace
}  // namespace rejoinder::testing
