// The reference limits in tests/reference/bounds_visible.json, turned into admissible sets.
//
// Each case was computed by at least two independent methods, named in its `methods` field, before this
// project's solvers existed; rel_diff is the largest relative difference between them.
#pragma once

#include <Eigen/Dense>
#include <optional>
#include <string>
#include <vector>

#include "core/convex/admissible_set.h"

namespace rejoinder::test {

// Every value that prints as `text`: half a unit of the last digit on both sides.
Interval printed(const std::string& text);

// Items 1 and 2: limits of W for printed coefficients. Missing outputs are empty; "inf" is infinity.
struct LimitCase {
  std::string id, title;
  AdmissibleSet set{1};
  Eigen::MatrixXd R;
  Eigen::VectorXd r;
  std::optional<double> min_wald, max_wald, max_attained, max_upper, cheap_upper;
};
std::vector<LimitCase> limit_cases();

// Item 3: two t values and a reported F.
struct CorrelationCase {
  std::string id;
  double t[2];
  Interval t_box[2], f_box;
  double f;
  std::vector<double> roots;
  std::vector<Interval> set;
  double least_f, at_least, critical;
  std::vector<double> not_rejecting;
};
std::vector<CorrelationCase> correlation_cases();

// Item 4: share of correlation matrices that reject. The critical value of F comes from the case's own data.
struct ShareCase {
  std::string id;
  Eigen::VectorXd t;
  std::vector<int> block;
  Eigen::MatrixXd block_correlation;
  double df, alpha, rejecting;
};
std::vector<ShareCase> share_cases();

}  // namespace rejoinder::test
