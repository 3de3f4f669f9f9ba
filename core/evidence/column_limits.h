// The routes that read one column's coefficients: with their covariance, with standard errors alone, and with what else
// the column gives away about their covariance.
#pragma once

#include "core/convex/wald_limits.h"
#include "core/evidence/coefficient.h"
#include "core/evidence/joint_test.h"

namespace rejoinder {

// What the column allows the tested coefficients, ready for core/convex.
//
// Exclusion hypotheses of which only standard errors and correlations are known are put as t ratios (`in_ratios`): the
// coefficients are then t_i = (b_i - r_i) / s_i with unit variances, which loses nothing (method: (t, C) form).
struct ColumnSet {
  AdmissibleSet set{1};
  Eigen::MatrixXd R;  // q x p
  Eigen::VectorXd r;  // q
  bool in_ratios = false;
  std::vector<Interval> ratios;           // p, the t ratios about the restriction's values; empty unless in_ratios
  std::vector<std::string> terms;         // p
  std::vector<CoefficientLimits> limits;  // p
  bool any_known = false;                 // some figure on some tested term
  int pairs_known = 0, pairs = 0;         // of the tested terms
  bool variances_by_matrix = false;       // the printed covariance gives every variance
  bool assumed_correlations = false;      // the user's correlation_within is in play
  int facts = 0;                          // combinations used
  std::vector<Cell> cells;
  std::vector<Clash> clashes;             // a term's figures that do not go together; its interval was not used
  std::vector<std::string> cautions;
};

struct ColumnSetChoices {
  bool combinations = false;  // printed combinations that touch the tested terms, or share a term with one that does, are
                              // used too, and their terms join the set
  bool ratios = true;         // exclusions may be put as t ratios
};

// Contract: the test has restrictions.
ColumnSet column_set(const JointTest& test, const ColumnSetChoices& choices = {});

// Route `covariance` where every variance and covariance of the tested estimates is printed, else `estimates`.
RouteAnswer column_evidence(const JointTest& test);

// Route `facts`: the same with what the column gives away: printed combinations, group sizes, means. No evidence where it prints
// none that bears on the claim.
RouteAnswer facts_evidence(const JointTest& test);

// Route `nested columns`: with the changes of coefficients between columns too.
RouteAnswer nested_columns_evidence(const JointTest& test);

// Limits over the set as evidence; what both routes above and overall_f.h share.
RouteAnswer evidence_of(const JointTest& test, const ColumnSet& set, Route route);

}  // namespace rejoinder
