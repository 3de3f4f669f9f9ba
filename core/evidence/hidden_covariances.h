// Covariances that a column gives away without printing them: group sizes, means, another column that lacks one term.
//
// All hold for conventional least squares only, so each is refused for robust and clustered errors. Derived in the design
// (section on covariances that the print gives away); rounding is carried through.
#pragma once

#include "core/evidence/column_limits.h"

namespace rejoinder {

// What a source of covariance facts did to a set.
struct HiddenFacts {
  int used = 0;                        // facts added
  std::vector<std::string> assumes;
  std::vector<std::string> cautions;   // why it was not used where a reader might expect it
  std::vector<std::string> working;
  std::vector<Cell> cells;
};

// Adds to `set` the covariances of 0/1 terms of one factor with the sizes of their groups: V_jk = s² / n_0 and V_jj = s² (1/n_j +
// 1/n_0), so every correlation is known. Only where these terms are all of the column's regressors.
HiddenFacts add_group_sizes(const JointTest& test, ColumnSet& set);

// cov(intercept, b_j) = - sum over l of mean(x_l) cov(b_l, b_j), and intercept = mean(y) - sum of mean(x_l) b_l. Only where every
// slope's mean is printed; the terms involved join the set.
HiddenFacts add_means(const JointTest& test, ColumnSet& set);

// Columns on the same sample that differ by one term d: cov(b_j, b_d) = var(b_d) (b_j long - b_j short) / b_d for every term j that
// both print. Adds the fact for each tested term; d joins the set where it has to.
HiddenFacts add_nested_columns(const JointTest& test, ColumnSet& set);

// The index of `name` in the set; the term is added with what the column prints of it where it was not there.
int index_in(const JointTest& test, ColumnSet& set, const std::string& name);

}  // namespace rejoinder
