#include "core/algebra/expression.h"

#include <gtest/gtest.h>

#include <cmath>

#include "core/algebra/equations.h"

namespace rejoinder {
namespace {

TEST(Equations, KeepProductsAndRatios) {
  const Result<Equations> e = read_equations("a / b = 2, a * b = c = 0, all", {"c", "d"});
  ASSERT_TRUE(e.ok());
  EXPECT_FALSE(e.value().linear);
  ASSERT_EQ(e.value().gaps.size(), 5u);
  EXPECT_EQ(e.value().wording[0], "a / b = 2");
  EXPECT_EQ(e.value().wording[1], "a * b = 0");
  EXPECT_EQ(e.value().wording[2], "c = 0");
  EXPECT_EQ(e.value().wording[4], "d = 0");
  EXPECT_TRUE(read_equations("a = b, 2 c = 1").value().linear);
  EXPECT_FALSE(read_equations("a b = 1").ok());
  EXPECT_FALSE(read_equations("all = a", {"a"}).ok());
  EXPECT_FALSE(read_equations("").ok());
}

// Derived: d(a/b) = (1/b, -a/b^2); d(a b) = (b, a); d(a^3) = 3 a^2, at a = 3, b = 4.
TEST(Evaluate, GivesValueAndGradient) {
  const Eigen::Vector2d at(3, 4);
  const struct {
    const char* text;
    double value, by_a, by_b;
  } rows[] = {
      {"a / b = 0", 0.75, 0.25, -3.0 / 16},          {"a * b = 0", 12, 4, 3}, {"a^3 - b = 0", 23, 27, -1},
      {"-(a + 2*b) / 2 = a - b", -5.5 + 1, -1.5, 0}, {"2 * a = b", 2, 2, -1},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const Equations e = read_equations(row.text).value();
    ASSERT_EQ(e.terms.size(), 2u);
    const Evaluation v = evaluate(e.gaps[0], at);
    EXPECT_DOUBLE_EQ(v.value, row.value);
    EXPECT_DOUBLE_EQ(v.gradient[0], row.by_a);
    EXPECT_DOUBLE_EQ(v.gradient[1], row.by_b);
  }
}

// Second route: central differences of the value.
TEST(Evaluate, GradientAgreesWithDifferences) {
  const Equations e = read_equations("(a*b - c/(a + 2))^2 / (b - 3*c) = a*a*c").value();
  const Eigen::Vector3d at(0.7, -1.3, 2.1);
  const Evaluation v = evaluate(e.gaps[0], at);
  for (int j = 0; j < 3; ++j) {
    const double h = 1e-5;
    Eigen::Vector3d up = at, down = at;
    up[j] += h;
    down[j] -= h;
    const double slope = (evaluate(e.gaps[0], up).value - evaluate(e.gaps[0], down).value) / (2 * h);
    EXPECT_NEAR(v.gradient[j], slope, 1e-7 * (1 + std::fabs(slope)));
  }
}

TEST(MeansAll, IsTrueForTheWordAlone) {
  for (const char* text : {"all", "all = 0", " 0 = all;"}) EXPECT_TRUE(means_all(text)) << text;
  for (const char* text : {"\"all\" = 0", "all = 1", "all, a = 0", "a = 0", "", "a b"})
    EXPECT_FALSE(means_all(text)) << text;
}

}  // namespace
}  // namespace rejoinder
