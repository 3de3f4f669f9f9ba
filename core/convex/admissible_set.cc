#include "core/convex/admissible_set.h"

#include <algorithm>
#include <cassert>
#include <cmath>

#include "core/convex/restriction_rows.h"

namespace rejoinder {

AdmissibleSet::AdmissibleSet(int p)
    : centre(Eigen::VectorXd::Zero(p)),
      half_width(Eigen::VectorXd::Constant(p, kInfinity)),
      se_low(Eigen::VectorXd::Zero(p)),
      se_high(Eigen::VectorXd::Constant(p, kInfinity)) {
  assert(p >= 1);
}

void AdmissibleSet::set_coefficient(int j, const Interval& b) {
  if (std::isinf(b.low) || std::isinf(b.high)) {
    centre(j) = 0;
    half_width(j) = kInfinity;
    return;
  }
  const double middle = b.middle();
  centre(j) = middle;
  half_width(j) = b.is_point() ? 0 : step_up(std::max(b.high - middle, middle - b.low));
}

void AdmissibleSet::set_se(int j, const Interval& se) {
  se_low(j) = std::max(0.0, se.low);
  se_high(j) = std::max(0.0, se.high);
}

void AdmissibleSet::set_variance(int j, const Interval& variance) {
  const double low = std::sqrt(std::max(0.0, variance.low)), high = std::sqrt(std::max(0.0, variance.high));
  se_low(j) = low > 0 ? step_down(low) : 0;
  se_high(j) = high > 0 ? step_up(high) : 0;
}

Interval AdmissibleSet::variance(int j) const {
  const double low = se_low(j) * se_low(j), high = se_high(j) * se_high(j);
  return {low > 0 ? step_down(low) : 0, high > 0 ? step_up(high) : 0};
}

bool AdmissibleSet::has_covariance_facts() const {
  return !covariances.empty() || !correlations.empty() || !combination_variances.empty() ||
         !matrix_facts.empty() || every_correlation.low > -1 || every_correlation.high < 1;
}

namespace {

double outside(double x, const Interval& allowed, double unit) {
  return std::max({0.0, allowed.low - x, x - allowed.high}) / (unit > 0 ? unit : 1);
}

}  // namespace

double distance_outside(const AdmissibleSet& set, const Eigen::VectorXd& b, const Eigen::MatrixXd& V) {
  const int p = set.size();
  double worst = 0;
  Eigen::VectorXd s(p);  // a natural size for each coefficient
  for (int j = 0; j < p; ++j) {
    s(j) = std::sqrt(std::max(0.0, V(j, j)));
    const double h = set.half_width(j);
    if (std::isfinite(h))
      worst = std::max(worst, outside(b(j), {set.centre(j) - h, set.centre(j) + h},
                                      std::max({h, s(j), 1e-12 * std::fabs(set.centre(j))})));
    worst = std::max(worst, outside(V(j, j), set.variance(j), V(j, j)));
  }
  for (const PairInterval& fact : set.covariances)
    worst = std::max(worst, outside(V(fact.i, fact.j), fact.value, s(fact.i) * s(fact.j)));
  for (int i = 0; i < p; ++i)
    for (int j = 0; j < i; ++j)
      if (s(i) > 0 && s(j) > 0)
        worst = std::max(worst, outside(V(i, j) / (s(i) * s(j)), set.every_correlation, 1));
  for (const PairInterval& fact : set.correlations)
    if (s(fact.i) > 0 && s(fact.j) > 0)
      worst = std::max(worst, outside(V(fact.i, fact.j) / (s(fact.i) * s(fact.j)), fact.value, 1));
  for (const CombinationVariance& fact : set.combination_variances) {
    const double size = fact.a.cwiseAbs().dot(s);
    worst = std::max(worst, outside(fact.a.dot(V * fact.a), fact.value, size * size));
  }
  for (const MatrixFact& fact : set.matrix_facts)
    worst = std::max(worst, outside(fact.A.cwiseProduct(V).sum(), fact.value, s.dot(fact.A.cwiseAbs() * s)));
  for (const CoefficientFact& fact : set.coefficient_facts)
    worst = std::max(worst, outside(fact.a.dot(b), fact.value,
                                    std::max(fact.a.cwiseAbs().dot(s), fact.a.cwiseProduct(b).norm())));
  Eigen::MatrixXd C(p, p);
  for (int i = 0; i < p; ++i)
    for (int j = 0; j < p; ++j) C(i, j) = s(i) > 0 && s(j) > 0 ? V(i, j) / (s(i) * s(j)) : 0;
  const double least =
      Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd>(C, Eigen::EigenvaluesOnly).eigenvalues()(0);
  return std::max(worst, -least / p);
}

double wald_at(const Eigen::MatrixXd& R, const Eigen::VectorXd& r, const Eigen::VectorXd& b,
               const Eigen::MatrixXd& V) {
  const int q = static_cast<int>(R.rows());
  const auto reduced = reduced_rows(V.diagonal().cwiseMax(0).cwiseSqrt(), R, r);
  const Eigen::MatrixXd& rows = reduced ? reduced->R : R;
  Eigen::VectorXd d = rows * b - (reduced ? reduced->r : r);
  Eigen::MatrixXd S = rows * V * rows.transpose();
  for (int i = 0; i < q; ++i) {
    // A row without variance: infinite, unless it is satisfied as it stands and so tells nothing.
    const double scale = std::sqrt(std::max(0.0, S(i, i)));
    if (scale == 0) {
      if (d(i) != 0) return kInfinity;
      S.row(i).setZero();
      S.col(i).setZero();
      S(i, i) = 1;
      continue;
    }
    d(i) /= scale;
    S.row(i) /= scale;
    S.col(i) /= scale;
  }
  const Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd> parts(S);
  const Eigen::VectorXd along = parts.eigenvectors().transpose() * d;
  double wald = 0;
  for (int i = 0; i < q; ++i) {
    const double eigenvalue = parts.eigenvalues()(i);
    if (eigenvalue > 1e-12 * q)
      wald += along(i) * along(i) / eigenvalue;
    else if (std::fabs(along(i)) > 1e-9 * d.norm())
      return kInfinity;
  }
  return wald;
}

std::vector<int> excluded_columns(const Eigen::MatrixXd& R) {
  std::vector<int> columns;
  for (int i = 0; i < R.rows(); ++i) {
    int column = -1;
    for (int j = 0; j < R.cols(); ++j) {
      if (R(i, j) == 0) continue;
      if (column >= 0) return {};
      column = j;
    }
    if (column < 0 || std::find(columns.begin(), columns.end(), column) != columns.end()) return {};
    columns.push_back(column);
  }
  return columns;
}

}  // namespace rejoinder
