// Degrees of freedom argued in words, so that a reader can follow and dispute them.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/evidence/evidence.h"
#include "core/review/review.h"

namespace rejoinder {

// The slopes of a column: k as given, else the slopes it lists. Absent where neither is there.
std::optional<long> slopes(const Column& column);

// Residual degrees of freedom of the least-squares fit itself, for the identities between R², sums of squares and s.e.
// of the regression: n - k - 1 (n - k without intercept, n - k - fixed_effects with them). Absent where n or k is; never
// below 1 (then absent too).
std::optional<double> fit_df(const Column& column);

// Total degrees of freedom that go with it: n - 1, n without intercept, n - fixed_effects with them.
std::optional<double> total_df(const Column& column);

struct DfArgument {
  double denominator = kInfinity;
  bool known = true;                 // false: n or k missing, infinity stands in
  std::string words;                 // "n − k − 1 = 96 − 5 − 1 = 90"
  std::vector<double> other;         // what other common conventions would give
  std::vector<std::string> assumes, cautions;
  std::vector<Ask> asks;
  std::vector<Cell> cells;
};

// Denominator df of a joint test in the column: the printed df where given; classical, robust or unknown errors
// n - k - 1 and its kin; clustered: clusters - 1; clustered without a count, ml: infinite.
DfArgument test_df(const Column& column);

}  // namespace rejoinder
