// What one route says about one claim: the range it allows the statistic, and on what grounds.
//
// Routes speak on the scale of the Wald statistic W (for a test by F, W = q F), so that they can be compared and
// fused. Every end of a range carries a label: exact (attained by some table that prints so), guaranteed (no
// admissible table goes beyond, perhaps a touch wide), estimated (sampled), or not bounded by the method.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/number/interval.h"

namespace rejoinder {

enum class Route {
  Covariance,     // printed covariance or correlations of the estimates
  Fit,            // R², adjusted R², sums of squares, s.e. of the regression, overall F
  Estimates,      // coefficients with s.e., t, p or intervals, covariances unknown in part or whole
  Facts,          // a combination's s.e., a printed joint test, an overall F, means, group sizes
  NestedColumns,  // changes of coefficients between columns
  Variables,      // a table of correlations of the variables
  Samples,        // several columns
  Likelihood,     // log-likelihoods
  SumsOfSquares,  // an analysis-of-variance table, or a break test
  PrintedTest     // the sentence against itself
};

enum class Sharpness { Exact, Guaranteed, Estimated, NotBounded };

enum class Statistic { F, ChiSquare };

struct DegreesOfFreedom {
  int numerator = 0;                // q
  double denominator = kInfinity;   // infinity for a chi-square
};

// A printed figure, by the keys of the review: what a finding rests on, and what it asks for.
struct Cell {
  std::string column;  // id; empty for a figure of the claim itself or of a table outside columns
  std::string term;    // name; empty for a figure in the foot of the column
  std::string key;     // "coef", "se", "r2", "covariance", ...
  bool operator==(const Cell&) const = default;
};

// A figure that would settle the claim, or narrow it.
struct Ask {
  std::string figure;                // "the correlation of the two estimates"
  std::vector<std::string> terms;
  std::string column;
  bool decides = false;              // some value of it would leave one decision only
  std::optional<Interval> turns_at;  // values of the figure between which the rounding lets the decision turn
  std::string sentence;              // the polite request to the authors
};

struct Evidence {
  Route route = Route::Estimates;
  Interval wald{0, kInfinity};  // limits of W = q F
  Interval p{0, 1};             // at `df`, by the test's statistic
  DegreesOfFreedom df;
  Sharpness low = Sharpness::Guaranteed;
  Sharpness high = Sharpness::Guaranteed;
  std::optional<Interval> attained;  // the widest values a consistent table was found for, on the scale of W
  bool binds = false;                // set by fuse: this route gives one of the finding's ends
  std::vector<std::string> assumes;
  std::vector<std::string> cautions;
  std::vector<std::string> working;  // line by line, with the user's own figures
  std::vector<Ask> asks;
  std::vector<Cell> rests_on;

  // Limits on the scale of F; contract: df.numerator > 0.
  Interval f() const { return {wald.low / df.numerator, wald.high / df.numerator}; }
};

// Printed figures that no one table can show together, the smallest set found.
struct Clash {
  std::string where;  // "full / r2, adj_r2"
  std::string says;
  std::vector<Cell> cells;
  bool mild = false;  // a convention left unsaid (one-sided stars, say) would explain it; nothing rests on it
};

// What a route answers. No evidence where it does not apply; `cautions` then say why where a reader might expect it,
// and `refused` that the claim itself rests on a comparison that cannot be made.
struct RouteAnswer {
  std::optional<Evidence> evidence;
  std::vector<std::string> cautions;
  std::vector<Clash> clashes;
  std::vector<Ask> asks;
  std::string refused;
};

}  // namespace rejoinder
