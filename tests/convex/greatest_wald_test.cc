#include <gtest/gtest.h>

#include <cmath>

#include "core/convex/wald_limits.h"
#include "tests/support/bounds_cases.h"

namespace rejoinder {
namespace {

// Source: tests/reference/bounds_visible.json, items 1 and 2.
TEST(GreatestWald, MatchesReferenceLimits) {
  for (const test::LimitCase& c : test::limit_cases()) {
    SCOPED_TRACE(c.id + " " + c.title);
    const GreatestWald greatest = greatest_wald(c.set, c.R, c.r);
    ASSERT_EQ(greatest.status, LimitStatus::Found);
    if (c.max_wald && std::isinf(*c.max_wald)) {
      EXPECT_EQ(greatest.kind, GreatestWald::Infinite);
      // V is a point of the set at which the rows lose a direction.
      EXPECT_LE(greatest.witness.outside, 1e-9);
      EXPECT_GT(greatest.witness.wald, 1e9);
    } else if (c.max_wald) {
      EXPECT_EQ(greatest.kind, GreatestWald::Exact) << greatest.method;
      EXPECT_NEAR(greatest.attained, *c.max_wald, 1e-8 * *c.max_wald);
      EXPECT_GE(greatest.guaranteed, *c.max_wald * (1 - 1e-12));
      EXPECT_NEAR(greatest.witness.wald, greatest.attained, 1e-9 * greatest.attained);
      EXPECT_LE(greatest.witness.outside, 1e-9);
    } else {
      EXPECT_EQ(greatest.kind, GreatestWald::Guaranteed);
      EXPECT_GE(greatest.attained, *c.max_attained * (1 - 1e-8));
      EXPECT_LE(greatest.guaranteed, *c.max_upper * (1 + 1e-8));
    }
  }
}

}  // namespace
}  // namespace rejoinder
