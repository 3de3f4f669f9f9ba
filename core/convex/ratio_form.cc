#include "core/convex/ratio_form.h"

#include <algorithm>
#include <cmath>

#include "core/convex/witness.h"

namespace rejoinder {
namespace {

double down(double x) { return std::isinf(x) || x == 0 ? x : step_down(step_down(x)); }
double up(double x) { return std::isinf(x) || x == 0 ? x : step_up(step_up(x)); }

// Range of x / s for x in [low, high] and s in [s_low, s_high], s > 0; the closure where s_low = 0.
Interval ratio_range(double low, double high, double s_low, double s_high) {
  const auto over = [](double x, double s) {
    if (x == 0) return 0.0;
    if (s == 0) return x > 0 ? kInfinity : -kInfinity;
    return std::isinf(s) ? 0.0 : x / s;
  };
  return {down(over(low, low >= 0 ? s_high : s_low)), up(over(high, high >= 0 ? s_low : s_high))};
}

}  // namespace

std::optional<RatioForm> ratio_form(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                    const Eigen::VectorXd& r) {
  const std::vector<int> columns = excluded_columns(R);
  if (columns.empty() || !set.covariances.empty() || !set.combination_variances.empty() ||
      !set.matrix_facts.empty() || !set.coefficient_facts.empty())
    return std::nullopt;
  const int p = set.size(), q = static_cast<int>(columns.size());
  RatioForm form{AdmissibleSet(p), Eigen::MatrixXd::Zero(q, p), Eigen::VectorXd::Zero(q), kInfinity};
  for (int j = 0; j < p; ++j) {
    form.set.set_coefficient(j, {0, 0});
    form.set.set_se(j, {1, 1});
  }
  form.set.correlations = set.correlations;
  form.set.every_correlation = set.every_correlation;
  std::vector<Interval> range(q);
  double largest = 1;
  for (int i = 0; i < q; ++i) {
    const int j = columns[i];
    form.R(i, j) = 1;
    const double h = set.half_width(j), target = r(i) / R(i, j), rounding = 2e-16 * std::fabs(target);
    const double low = std::isinf(h) ? -kInfinity : down(set.centre(j) - h - target) - rounding;
    const double high = std::isinf(h) ? kInfinity : up(set.centre(j) + h - target) + rounding;
    range[i] = ratio_range(low, high, set.se_low(j), set.se_high(j));
    largest = std::max(largest, range[i].mignitude());
  }
  for (int i = 0; i < q; ++i) {
    const double cut = 1e3 * largest;
    if (range[i].low < -cut || range[i].high > cut) {
      range[i] = {std::max(range[i].low, -cut), std::min(range[i].high, cut)};
      form.cut = cut;
    }
    form.set.set_coefficient(columns[i], range[i]);
  }
  return form;
}

WaldWitness printed_witness(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                            const Eigen::VectorXd& ratios, const Eigen::MatrixXd& C) {
  const std::vector<int> columns = excluded_columns(R);
  const int p = set.size();
  Eigen::VectorXd b = set.centre, s(p);
  for (int j = 0; j < p; ++j)
    s(j) = std::isfinite(set.se_high(j)) ? set.se_high(j) : std::max(1.0, set.se_low(j));
  for (int i = 0; i < static_cast<int>(columns.size()); ++i) {
    const int j = columns[i];
    const double t = ratios(j), target = r(i) / R(i, j), h = set.half_width(j);
    // Standard errors that bring target + t s into the box.
    double low = set.se_low(j), high = set.se_high(j);
    if (t != 0 && std::isfinite(h)) {
      const double one = (set.centre(j) - h - target) / t, other = (set.centre(j) + h - target) / t;
      low = std::max(low, std::min(one, other));
      high = std::min(high, std::max(one, other));
    }
    s(j) = std::isfinite(high) ? std::max(low, (low + high) / 2) : std::max({low, 1e-100, s(j)});
    b(j) = target + t * s(j);
    if (std::isfinite(h)) b(j) = std::clamp(b(j), set.centre(j) - h, set.centre(j) + h);
  }
  return make_witness(set, R, r, b, s.asDiagonal() * C * s.asDiagonal());
}

}  // namespace rejoinder
