#include <gtest/gtest.h>

#include "core/convex/wald_limits.h"
#include "tests/support/bounds_cases.h"

namespace rejoinder {
namespace {

// Source: tests/reference/bounds_visible.json, items 1 and 2; at least two methods agree on each to 4e-11.
TEST(LeastWald, MatchesReferenceLimits) {
  for (const test::LimitCase& c : test::limit_cases()) {
    SCOPED_TRACE(c.id + " " + c.title);
    const LeastWald least = least_wald(c.set, c.R, c.r);
    ASSERT_EQ(least.status, LimitStatus::Found);
    EXPECT_NEAR(least.attained, *c.min_wald, 1e-8 * (1e-4 + *c.min_wald));
    EXPECT_LE(least.wald, *c.min_wald * (1 + 1e-13));
    EXPECT_GE(least.wald, *c.min_wald * (1 - 1e-8));
    EXPECT_LE(least.witness.outside, 1e-9);
    EXPECT_NEAR(least.witness.wald, least.attained, 1e-8 * (1e-4 + *c.min_wald));
  }
}

}  // namespace
}  // namespace rejoinder
