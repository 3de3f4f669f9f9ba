#include "core/convex/one_correlation.h"

#include <gtest/gtest.h>

#include <cmath>

#include "core/convex/rejecting_share.h"

namespace rejoinder::testing {
namespace {

// Derived: the minimum over rho is max t² / 2, at the ratio of the smaller to the larger.
TEST(OneCorrelation, GivesFAndItsMinimum) {
  EXPECT_NEAR(f_at_correlation(2, 1.5, 0), (4 + 2.25) / 2, 1e-15);
  EXPECT_NEAR(f_at_correlation(2, 1.5, 0.75), 2, 1e-15);
  EXPECT_TRUE(std::isinf(f_at_correlation(2, 1.5, 1)));
  EXPECT_NEAR(f_at_correlation(1.96, 1.96, 1), 1.96 * 1.96 / 2, 1e-15);
  EXPECT_TRUE(std::isinf(f_at_correlation(1.96, 1.96, -1)));
}

TEST(OneCorrelation, InvertsF) {
  for (const double t1 : {2.0, -1.3, 0.4})
    for (const double t2 : {1.5, 0.0, -2.4}) {
      const double k = std::max(t1 * t1, t2 * t2) / 2 + 0.7;
      const auto below = correlations_below(t1, t2, k);
      ASSERT_TRUE(below);
      EXPECT_NEAR(f_at_correlation(t1, t2, below->low), k, 1e-11 * k);
      EXPECT_NEAR(f_at_correlation(t1, t2, below->high), k, 1e-11 * k);
    }
  EXPECT_FALSE(correlations_below(3, 0.2, 3.0));
}

// Second route: a grid of correlations and corners.
TEST(OneCorrelation, ExactSetOverABoxIsThatOfAGrid) {
  const Interval t1{1.9, 2.1}, t2{1.4, 1.6}, f{2.95, 3.05};
  const auto sets = correlations_with_f(t1, t2, f);
  for (int i = -999; i <= 999; ++i) {
    const double rho = i / 1000.0;
    double low = kInfinity, high = 0;
    for (int a = 0; a <= 40; ++a)
      for (int b = 0; b <= 40; ++b) {
        const double value =
            f_at_correlation(t1.low + t1.width() * a / 40, t2.low + t2.width() * b / 40, rho);
        low = std::min(low, value);
        high = std::max(high, value);
      }
    bool inside = false;
    for (const Interval& set : sets) inside = inside || set.contains(rho);
    // The grid is coarse: where it clearly meets the range the set must hold it, where the set leaves it out
    // the grid must too.
    if (low <= f.high && high >= f.low) {
      EXPECT_TRUE(inside) << rho;
    } else if (low > f.high * 1.02 || high < f.low * 0.98) {
      EXPECT_FALSE(inside) << rho;
    }
  }
}

// Derived: q = 2 is the length of the correlation interval; q = 1 an indicator.
TEST(RejectingShare, IsTheLengthOfTheIntervalForTwo) {
  const double w = 2 * 3.0872958927489287;
  const auto share = share_rejecting({Interval{2, 2}, Interval{1.5, 1.5}}, {}, w);
  const auto below = correlations_below(2, 1.5, w / 2);
  ASSERT_TRUE(share && below);
  EXPECT_NEAR(share->low, 1 - below->width() / 2, 1e-12);
  EXPECT_EQ(share->low, share->high);
  EXPECT_EQ(share_rejecting({Interval{2.5, 2.5}}, {}, 4)->low, 1);
  EXPECT_EQ(share_rejecting({Interval{1.5, 1.5}}, {}, 4)->high, 0);
}

TEST(RejectingShare, WidensWithRounding) {
  const auto exact = share_rejecting({Interval{1.2, 1.2}, Interval{0.8, 0.8}, Interval{1.5, 1.5}}, {}, 8);
  const auto rounded =
      share_rejecting({Interval{1.15, 1.25}, Interval{0.75, 0.85}, Interval{1.45, 1.55}}, {}, 8);
  EXPECT_LT(rounded->low, exact->low);
  EXPECT_GT(rounded->high, exact->high);
}

}  // namespace
}  // namespace rejoinder::testing
