// The tails against values computed in 40 to 390 digits by two methods each,
// tests/reference/dist_visible.json.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <functional>

#include "core/statistics/tails.h"
#include "tests/support/reference.h"

namespace rejoinder {
namespace {

using testing::ReferenceCase;

constexpr const char* kFile = "dist_visible.json";
const testing::CoversKinds covered(kFile, {"F_sf", "F_cdf", "F_quantile_upper", "t_sf", "t_quantile_upper",
                                           "chi2_sf", "chi2_cdf", "chi2_quantile_upper"});

// What tails.h promises: 1e-14 times the condition above p = 1e-16, 1e-12 at any condition beyond. `tail` is
// the probability concerned, the value of a tail or the argument of a quantile.
double promised(const ReferenceCase& reference, double tail) {
  const double condition = std::max(1.0, reference.condition);
  return tail > 1e-16 ? 1e-14 * condition : std::max(1e-12, 1e-15 * condition);
}

void compare(const char* kind, const std::function<double(const ReferenceCase&)>& computed, bool quantile) {
  for (const ReferenceCase& reference : testing::reference_cases(kFile, kind)) {
    SCOPED_TRACE(reference.trace());
    const double value = reference.expected_value();
    const double tail = quantile ? reference.input("p") : value;
    EXPECT_NEAR(computed(reference) / value, 1, promised(reference, tail));
  }
}

TEST(FTails, MatchReferenceValues) {
  compare(
      "F_sf", [](const auto& c) { return f_upper_tail(c.input("x"), c.input("df1"), c.input("df2")); },
      false);
  compare(
      "F_cdf", [](const auto& c) { return f_lower_tail(c.input("x"), c.input("df1"), c.input("df2")); },
      false);
}

TEST(FCritical, MatchesReferenceValues) {
  compare(
      "F_quantile_upper",
      [](const auto& c) { return f_critical(c.input("p"), c.input("df1"), c.input("df2")); }, true);
}

TEST(TTails, MatchReferenceValues) {
  compare(
      "t_sf", [](const auto& c) { return t_upper_tail(c.input("x"), c.input("df")); }, false);
  compare(
      "t_quantile_upper", [](const auto& c) { return t_critical(c.input("p"), c.input("df")); }, true);
}

TEST(ChiSquareTails, MatchReferenceValues) {
  compare(
      "chi2_sf", [](const auto& c) { return chi_square_upper_tail(c.input("x"), c.input("df")); }, false);
  compare(
      "chi2_cdf", [](const auto& c) { return chi_square_lower_tail(c.input("x"), c.input("df")); }, false);
  compare(
      "chi2_quantile_upper", [](const auto& c) { return chi_square_critical(c.input("p"), c.input("df")); },
      true);
}

}  // namespace
}  // namespace rejoinder
