#include "core/evidence/hidden_covariances.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"

namespace rejoinder {
namespace {

bool conventional(const Column& column) {
  return column.estimator == Estimator::Ols && !column.weights && column.errors == Errors::Classical;
}

std::string kind_of_errors(const Column& column) {
  if (column.estimator != Estimator::Ols) return "estimator";
  if (column.weights) return "weighting";
  if (column.errors == Errors::Unknown) return "errors of a kind that is not stated";
  return column.errors == Errors::Robust ? "robust errors" : "clustered errors";
}

const Term* intercept_of(const Column& column) {
  for (const Term& term : column.terms)
    if (term.intercept) return &term;
  return nullptr;
}

MatrixFact matrix_fact(int p, Interval value) { return {Eigen::MatrixXd::Zero(p, p), value}; }

// Adds `weight` V_ij to a fact, counting V_ij and V_ji together.
void count(MatrixFact& fact, int i, int j, double weight) {
  if (i == j) {
    fact.A(i, i) += weight;
  } else {
    fact.A(i, j) += weight / 2;
    fact.A(j, i) += weight / 2;
  }
}

// Enlarges every matrix of the set from p to p + 1.
void grow(ColumnSet& set) {
  const int p = set.set.size();
  AdmissibleSet larger(p + 1);
  larger.centre.head(p) = set.set.centre;
  larger.half_width.head(p) = set.set.half_width;
  larger.se_low.head(p) = set.set.se_low;
  larger.se_high.head(p) = set.set.se_high;
  larger.covariances = set.set.covariances;
  larger.correlations = set.set.correlations;
  larger.every_correlation = set.set.every_correlation;
  const auto longer = [&](const Eigen::VectorXd& a) {
    Eigen::VectorXd out = Eigen::VectorXd::Zero(p + 1);
    out.head(p) = a;
    return out;
  };
  for (const auto& fact : set.set.combination_variances) larger.combination_variances.push_back({longer(fact.a), fact.value});
  for (const auto& fact : set.set.coefficient_facts) larger.coefficient_facts.push_back({longer(fact.a), fact.value});
  for (const auto& fact : set.set.matrix_facts) {
    Eigen::MatrixXd A = Eigen::MatrixXd::Zero(p + 1, p + 1);
    A.topLeftCorner(p, p) = fact.A;
    larger.matrix_facts.push_back({A, fact.value});
  }
  set.set = std::move(larger);
  Eigen::MatrixXd R = Eigen::MatrixXd::Zero(set.R.rows(), p + 1);
  R.leftCols(p) = set.R;
  set.R = std::move(R);
}

// Whether `shorter` is `longer` without one term; its name.
std::optional<std::string> dropped_term(const Column& longer, const Column& shorter) {
  const auto k_long = slopes(longer), k_short = slopes(shorter);
  if (!k_long || !k_short || *k_long != *k_short + 1) return std::nullopt;
  if (longer.n && shorter.n && *longer.n != *shorter.n) return std::nullopt;
  if (!longer.outcome.empty() && !shorter.outcome.empty() && longer.outcome != shorter.outcome) return std::nullopt;
  if (longer.estimator != shorter.estimator || longer.intercept != shorter.intercept || longer.fixed_effects != shorter.fixed_effects)
    return std::nullopt;
  std::vector<std::string> only_long;
  long both = 0;
  for (const Term& term : longer.terms) {
    if (term.intercept) continue;
    if (shorter.term(term.name))
      ++both;
    else
      only_long.push_back(term.name);
  }
  const auto listed = std::count_if(shorter.terms.begin(), shorter.terms.end(), [](const Term& t) { return !t.intercept; });
  // Every regressor of the shorter column must be seen to be in the longer one.
  if (only_long.size() != 1 || both != *k_short || listed != *k_short) return std::nullopt;
  return only_long.front();
}

}  // namespace

int index_in(const JointTest& test, ColumnSet& set, const std::string& name) {
  const auto at = std::find(set.terms.begin(), set.terms.end(), name);
  if (at != set.terms.end()) return static_cast<int>(at - set.terms.begin());
  grow(set);
  const int j = set.set.size() - 1;
  set.terms.push_back(name);
  CoefficientLimits limits;
  if (const Term* term = test.column->term(name)) limits = coefficient_limits(*test.review, *test.column, *term, test.df.denominator);
  if (!limits.consistent) limits = CoefficientLimits{};
  set.set.set_coefficient(j, limits.b);
  set.set.set_se(j, limits.s);
  set.cells.insert(set.cells.end(), limits.cells.begin(), limits.cells.end());
  set.limits.push_back(std::move(limits));
  return j;
}

HiddenFacts add_group_sizes(const JointTest& test, ColumnSet& set) {
  HiddenFacts out;
  const Column& column = *test.column;
  if (!column.groups || !column.groups->base || *column.groups->base < 1) return out;
  if (!conventional(column)) {
    out.cautions.push_back("The group sizes are not used: with " + kind_of_errors(column) + " they do not give the covariances.");
    return out;
  }
  const auto k = slopes(column);
  if (!k || *k != static_cast<long>(column.groups->size.size()) || !column.intercept || column.fixed_effects > 0) {
    out.cautions.push_back("The group sizes are not used: the column has other regressors beside the groups.");
    return out;
  }
  std::vector<std::pair<int, double>> sizes;
  for (const NamedCount& group : column.groups->size) {
    const auto at = std::find(set.terms.begin(), set.terms.end(), group.name);
    if (at != set.terms.end() && group.count > 0) sizes.push_back({static_cast<int>(at - set.terms.begin()), static_cast<double>(group.count)});
  }
  if (sizes.empty()) return out;
  const double base = static_cast<double>(*column.groups->base);
  const auto shape = [&](std::size_t a, std::size_t b) { return 1 / base + (a == b ? 1 / sizes[a].second : 0.0); };
  // V is s² times a known matrix: one common s² for all printed standard errors.
  Interval common{0, kInfinity};
  for (std::size_t a = 0; a < sizes.size(); ++a) {
    const Interval own = set.set.variance(sizes[a].first) / Interval::point(shape(a, a));
    common = meet(common, {own.low * (1 - 1e-12), own.high * (1 + 1e-12)}).value_or(Interval{1, 0});
    if (common.low > common.high) break;
  }
  if (common.low > common.high) {
    out.cautions.push_back("The standard errors do not go with the group sizes, so these were not used.");
    return out;
  }
  for (std::size_t a = 0; a < sizes.size(); ++a) {
    set.set.set_se(sizes[a].first, sqrt(Interval::point(shape(a, a)) * common));
    for (std::size_t b = 0; b < a; ++b) {
      const double correlation = shape(a, b) / std::sqrt(shape(a, a) * shape(b, b));
      set.set.correlations.push_back({sizes[a].first, sizes[b].first, {step_down(correlation), step_up(correlation)}});
      MatrixFact tie = matrix_fact(set.set.size(), {0, 0});
      count(tie, sizes[a].first, sizes[b].first, 1);
      count(tie, sizes[a].first, sizes[a].first, -shape(a, b) / shape(a, a));
      set.set.matrix_facts.push_back(std::move(tie));
      out.working.push_back("correlation of " + set.terms[static_cast<std::size_t>(sizes[a].first)] + " and " +
                            set.terms[static_cast<std::size_t>(sizes[b].first)] + " from group sizes: " + number_text(correlation));
      ++out.used;
    }
  }
  if (sizes.size() == 1) return out;
  out.assumes.push_back("the groups are the only regressors, and the errors are conventional");
  out.cells.push_back({column.id, "", "groups"});
  return out;
}

HiddenFacts add_means(const JointTest& test, ColumnSet& set) {
  HiddenFacts out;
  const Column& column = *test.column;
  const Term* intercept = intercept_of(column);
  if (column.means.empty() || !intercept) return out;
  const bool tests_intercept = std::find(set.terms.begin(), set.terms.end(), intercept->name) != set.terms.end();
  if (!tests_intercept) return out;
  if (!conventional(column)) {
    out.cautions.push_back("The means are not used: with " + kind_of_errors(column) + " they do not give the covariances.");
    return out;
  }
  const auto k = slopes(column);
  if (!k || static_cast<long>(column.means.size()) != *k || column.fixed_effects > 0) {
    out.cautions.push_back("The means are not used: they are needed for every regressor of the column.");
    return out;
  }
  std::vector<std::pair<int, Interval>> means;
  for (const NamedNumber& mean : column.means) means.push_back({index_in(test, set, mean.name), mean.number.possible});
  const int a = index_in(test, set, intercept->name);
  const int p = set.set.size();
  for (const auto& [j, own] : means) {
    (void)own;
    if (means.size() == 1) {
      // V_aj + mean V_jj = 0 for some mean in its interval: two half-spaces, exact.
      MatrixFact above = matrix_fact(p, {0, kInfinity}), below = matrix_fact(p, {-kInfinity, 0});
      count(above, a, j, 1);
      count(above, j, j, own.high);
      count(below, a, j, 1);
      count(below, j, j, own.low);
      set.set.matrix_facts.push_back(std::move(above));
      set.set.matrix_facts.push_back(std::move(below));
    } else {
      // The means' rounding times what the covariances can be at most: a guaranteed, slightly wide slack.
      double slack = 0;
      MatrixFact fact = matrix_fact(p, {});
      count(fact, a, j, 1);
      for (const auto& [l, mean] : means) {
        count(fact, l, j, mean.middle());
        slack += mean.half_width() * set.set.se_high(l) * set.set.se_high(j);
      }
      if (!std::isfinite(slack)) continue;
      fact.value = {-slack * (1 + 1e-12), slack * (1 + 1e-12)};
      set.set.matrix_facts.push_back(std::move(fact));
    }
    ++out.used;
  }
  if (column.mean_of_outcome) {
    Eigen::VectorXd weights = Eigen::VectorXd::Zero(p);
    Interval value = column.mean_of_outcome->possible;
    weights(a) = 1;
    bool finite = true;
    for (const auto& [l, mean] : means) {
      weights(l) += mean.middle();
      const double most = std::fabs(set.set.centre(l)) + set.set.half_width(l);
      finite = finite && std::isfinite(most);
      value = value + Interval{-mean.half_width() * most, mean.half_width() * most};
    }
    if (finite) set.set.coefficient_facts.push_back({weights, value});
  }
  out.working.push_back("covariance of the intercept and a slope = − mean × variance of the slope, from the printed means");
  out.assumes.push_back("the means are of the same observations, and the errors are conventional");
  out.cells.push_back({column.id, "", "means"});
  return out;
}

HiddenFacts add_nested_columns(const JointTest& test, ColumnSet& set) {
  HiddenFacts out;
  const Column& column = *test.column;
  const std::vector<std::string> tested = set.terms;
  for (const Column& shorter : test.review->columns) {
    if (&shorter == &column) continue;
    const auto dropped = dropped_term(column, shorter);
    if (!dropped) continue;
    if (!conventional(column) || !conventional(shorter)) {
      out.cautions.push_back("The change of coefficients between " + column_name(shorter) + " and " + column_name(column) +
                             " is not used: with " + kind_of_errors(conventional(column) ? shorter : column) + " it does not give covariances.");
      continue;
    }
    for (const std::string& name : tested) {
      if (name == *dropped) continue;
      const Term *in_long = column.term(name), *in_short = shorter.term(name);
      const Term* d = column.term(*dropped);
      if (!in_long || !in_short || !d) continue;
      const CoefficientLimits long_b = coefficient_limits(*test.review, column, *in_long, test.df.denominator);
      const CoefficientLimits short_b = coefficient_limits(*test.review, shorter, *in_short, test.df.denominator);
      const CoefficientLimits d_b = coefficient_limits(*test.review, column, *d, test.df.denominator);
      if (!long_b.consistent || !short_b.consistent || !d_b.consistent) continue;
      if (!std::isfinite(long_b.b.low) || !std::isfinite(short_b.b.low) || !std::isfinite(d_b.b.low) || d_b.b.contains(0)) continue;
      const Interval ratio = (long_b.b - short_b.b) / d_b.b;
      const int j = index_in(test, set, name), drop = index_in(test, set, *dropped);
      const int p = set.set.size();
      MatrixFact above = matrix_fact(p, {0, kInfinity}), below = matrix_fact(p, {-kInfinity, 0});
      count(above, j, drop, 1);
      count(above, drop, drop, -ratio.low);
      count(below, j, drop, 1);
      count(below, drop, drop, -ratio.high);
      set.set.matrix_facts.push_back(std::move(above));
      set.set.matrix_facts.push_back(std::move(below));
      out.cells.push_back({shorter.id, name, "coef"});
      out.working.push_back("cov(" + name + ", " + *dropped + ") = var(" + *dropped + ") × (" + in_long->coef.value_or(PrintedNumber{}).text + " − " +
                            in_short->coef.value_or(PrintedNumber{}).text + ") / " + d->coef.value_or(PrintedNumber{}).text +
                            ": between " + number_text(ratio.low) + " and " + number_text(ratio.high) + " variances of " + *dropped);
      ++out.used;
    }
  }
  if (out.used) out.assumes.push_back("the nested columns use the same observations, with conventional errors");
  return out;
}

}  // namespace rejoinder
