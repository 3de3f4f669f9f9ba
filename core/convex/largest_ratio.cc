#include "core/convex/largest_ratio.h"

#include <algorithm>
#include <cmath>
#include <vector>

#include "core/convex/certificate.h"
#include "core/convex/linear_programme.h"

namespace rejoinder {
namespace {

// Columns and rows are added one at a time; the matrix is made at the end.
class Builder {
 public:
  int column(double cost = 0) {
    costs_.push_back(cost);
    return static_cast<int>(costs_.size()) - 1;
  }
  int row(double limit) {
    limits_.push_back(limit);
    return static_cast<int>(limits_.size()) - 1;
  }
  void put(int row, int column, double value) {
    if (value != 0) cells_.push_back({row, column, value});
  }
  void add_to_limit(int row, double value) { limits_[row] += value; }
  // Every row divided by its largest entry; `scale` remembers by what.
  LinearProgramme make(std::vector<double>& scale) const {
    LinearProgramme programme;
    const int m = static_cast<int>(limits_.size()), n = static_cast<int>(costs_.size());
    programme.cost = Eigen::Map<const Eigen::VectorXd>(costs_.data(), n);
    programme.limits = Eigen::Map<const Eigen::VectorXd>(limits_.data(), m);
    programme.rows = Eigen::MatrixXd::Zero(m, n);
    for (const Cell& cell : cells_) programme.rows(cell.row, cell.column) += cell.value;
    scale.assign(m, 1);
    for (int i = 0; i < m; ++i) {
      const double largest = n > 0 ? programme.rows.row(i).cwiseAbs().maxCoeff() : 0;
      if (largest == 0) continue;
      scale[i] = largest;
      programme.rows.row(i) /= largest;
      programme.limits(i) /= largest;
    }
    return programme;
  }

 private:
  struct Cell {
    int row, column;
    double value;
  };
  std::vector<double> costs_, limits_;
  std::vector<Cell> cells_;
};

// beta_j = start + sum of weight times column: how a coefficient is written in the columns of the programme.
struct Written {
  double start = 0;
  std::vector<std::pair<int, double>> parts;
};

double read(const Written& written, const Eigen::VectorXd& x) {
  double value = written.start;
  for (const auto& [column, weight] : written.parts) value += weight * x(column);
  return value;
}

}  // namespace

LargestRatio largest_ratio(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  const int p = set.size(), q = static_cast<int>(R.rows());
  const int facts = static_cast<int>(set.coefficient_facts.size());
  std::vector<bool> in_fact(p, false);
  for (const CoefficientFact& fact : set.coefficient_facts)
    for (int j = 0; j < p; ++j)
      if (fact.a(j) != 0) in_fact[j] = true;

  Builder builder;
  const int t = builder.column(1);
  std::vector<Written> beta(p), b(p);
  // An amount between -reach - t slope and reach + t slope, scaled so that its column is of order one:
  // u + v = 2 reach + 2 t slope with the amount u - reach - t slope.
  const auto bounded = [&](Written& written, double reach, double slope) {
    const double unit = slope > 0 ? slope : reach;
    if (unit == 0) return;
    const int u = builder.column(), v = builder.column(), row = builder.row(2 * reach / unit);
    builder.put(row, u, 1);
    builder.put(row, v, 1);
    builder.put(row, t, -2 * slope / unit);
    written.start -= reach;
    written.parts.push_back({u, unit});
    written.parts.push_back({t, -slope});
  };
  const auto unbounded = [&](Written& written, double unit) {
    written.parts.push_back({builder.column(), unit});
    written.parts.push_back({builder.column(), -unit});
  };
  for (int j = 0; j < p; ++j) {
    const double h = set.half_width(j), s = set.se_high(j);
    b[j].start = set.centre(j);
    if (in_fact[j]) {
      // b appears in a fact of its own, so it needs columns of its own; beta = b + what t allows.
      if (std::isinf(h))
        unbounded(b[j], 1);
      else
        bounded(b[j], h, 0);
      beta[j] = b[j];
      if (std::isinf(s))
        unbounded(beta[j], 1);
      else
        bounded(beta[j], 0, s);
    } else {
      beta[j] = b[j];
      if (std::isinf(h) || std::isinf(s))
        unbounded(beta[j], 1);
      else
        bounded(beta[j], h, s);
    }
  }
  const auto equate = [&](const Eigen::VectorXd& a, const std::vector<Written>& written, double limit) {
    const int row = builder.row(limit);
    for (int j = 0; j < p; ++j) {
      if (a(j) == 0) continue;
      builder.add_to_limit(row, -a(j) * written[j].start);
      for (const auto& [column, weight] : written[j].parts) builder.put(row, column, a(j) * weight);
    }
    return row;
  };
  std::vector<int> restriction_row(q);
  std::vector<std::pair<int, int>> fact_row(facts, {-1, -1});  // of the lower and of the upper end
  for (int i = 0; i < q; ++i) restriction_row[i] = equate(R.row(i), beta, r(i));
  for (int k = 0; k < facts; ++k) {
    const CoefficientFact& fact = set.coefficient_facts[k];
    const double unit = std::max(1e-300, fact.a.cwiseAbs().maxCoeff());
    if (std::isfinite(fact.value.low)) {
      fact_row[k].first = equate(fact.a, b, fact.value.low);
      if (!fact.value.is_point()) builder.put(fact_row[k].first, builder.column(), -unit);
    }
    if (std::isfinite(fact.value.high) && !fact.value.is_point()) {
      fact_row[k].second = equate(fact.a, b, fact.value.high);
      builder.put(fact_row[k].second, builder.column(), unit);
    }
  }

  std::vector<double> scale;
  const LinearProgramme programme = builder.make(scale);
  const LinearSolution solution = solve(programme);
  LargestRatio answer;
  answer.c = Eigen::VectorXd::Zero(q);
  answer.z = Eigen::VectorXd::Zero(facts);
  if (solution.prices.size() > 0) {
    for (int i = 0; i < q; ++i)
      answer.c(i) = -solution.prices(restriction_row[i]) / scale[restriction_row[i]];
    for (int k = 0; k < facts; ++k)
      for (const int row : {fact_row[k].first, fact_row[k].second})
        if (row >= 0) answer.z(k) += solution.prices(row) / scale[row];
  }
  switch (solution.settled) {
    case LinearSolution::Settled::Optimal: {
      answer.settled = LargestRatio::Settled::Yes;
      answer.t = solution.value;
      answer.beta.resize(p);
      answer.b.resize(p);
      for (int j = 0; j < p; ++j) {
        answer.beta(j) = read(beta[j], solution.x);
        const double h = set.half_width(j);
        if (in_fact[j])
          answer.b(j) = read(b[j], solution.x);
        else
          answer.b(j) = std::clamp(answer.beta(j), set.centre(j) - h, set.centre(j) + h);
      }
      break;
    }
    case LinearSolution::Settled::Infeasible:
      // With no multiplier on the restrictions the facts on b alone exclude each other.
      answer.settled = answer.c.cwiseAbs().maxCoeff() < 1e-12 ? LargestRatio::Settled::NoCoefficients
                                                              : LargestRatio::Settled::NoVariance;
      break;
    default:
      break;
  }
  return answer;
}

}  // namespace rejoinder
