#include "core/evidence/difference_graph.h"

#include <gtest/gtest.h>

#include <random>

namespace rejoinder::testing {
namespace {

TEST(DifferenceGraph, ChainsFacts) {
  DifferenceGraph graph(4);
  graph.add({0, 1, {1, 2}, "a", {}});
  graph.add({1, 2, {10, 20}, "b", {}});
  graph.solve();
  ASSERT_FALSE(graph.clash());
  EXPECT_EQ(graph.limits(0, 2), (Interval{11, 22}));
  EXPECT_EQ(graph.limits(2, 0), (Interval{-22, -11}));
  EXPECT_TRUE(std::isinf(graph.limits(0, 3).high));
}

TEST(DifferenceGraph, NamesTheSmallestClash) {
  DifferenceGraph graph(3);
  graph.add({0, 1, {1, 2}, "a", {}});
  graph.add({1, 2, {1, 2}, "b", {}});
  graph.add({0, 2, {5, 6}, "c", {}});
  graph.add({0, 2, {7, 8}, "d", {}});
  graph.solve();
  ASSERT_TRUE(graph.clash());
  EXPECT_EQ(graph.clash()->size(), 2u) << "c against d needs no third fact";
}

TEST(DifferenceGraph, NeverBlamesAnIdentity) {
  DifferenceGraph graph(2);
  graph.add({0, 1, {0, kInfinity}, "", {}});
  graph.add({0, 1, {-3, -2}, "printed", {}});
  graph.solve();
  ASSERT_TRUE(graph.clash());
  ASSERT_EQ(graph.clash()->size(), 1u);
  EXPECT_EQ(graph.clash()->front().says, "printed");
}

// Second route: random points that satisfy every fact lie inside the limits, and the limits are attained by some of them.
TEST(DifferenceGraph, IsExactOnRandomFacts) {
  std::mt19937_64 engine(5);
  for (int round = 0; round < 40; ++round) {
    double x[4];
    for (double& v : x) v = static_cast<double>(engine() % 1000) / 100;
    DifferenceGraph graph(4);
    struct Row {
      int from, to;
      double low, high;
    };
    std::vector<Row> rows;
    for (int m = 0; m < 5; ++m) {
      const int from = static_cast<int>(engine() % 4), to = static_cast<int>((from + 1 + engine() % 3) % 4);
      const double d = x[to] - x[from], a = static_cast<double>(engine() % 100) / 100, b = static_cast<double>(engine() % 100) / 100;
      rows.push_back({from, to, d - a, d + b});
      graph.add({from, to, {d - a, d + b}, "fact", {}});
    }
    graph.solve();
    ASSERT_FALSE(graph.clash());
    for (int i = 0; i < 4; ++i)
      for (int j = 0; j < 4; ++j) {
        const Interval limits = graph.limits(i, j);
        EXPECT_TRUE(limits.low - 1e-12 <= x[j] - x[i] && x[j] - x[i] <= limits.high + 1e-12);
        if (!std::isfinite(limits.high)) continue;
        // The shortest paths from i are themselves a point that satisfies every fact and attains the end.
        double y[4];
        bool finite = true;
        for (int v = 0; v < 4; ++v) {
          y[v] = graph.limits(i, v).high;
          finite = finite && std::isfinite(y[v]);
        }
        if (!finite) continue;
        for (const Row& row : rows) {
          EXPECT_LE(y[row.to] - y[row.from], row.high + 1e-9);
          EXPECT_GE(y[row.to] - y[row.from], row.low - 1e-9);
        }
      }
  }
}

}  // namespace
}  // namespace rejoinder::testing
