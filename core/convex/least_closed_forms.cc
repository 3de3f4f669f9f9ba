#include <algorithm>
#include <cmath>
#include <numeric>

#include "core/convex/closed_forms.h"
#include "core/convex/largest_ratio.h"
#include "core/convex/witness.h"

namespace rejoinder {
namespace {

constexpr double kAlmostOne =
    1 - 1e-10;  // keeps a witness off the singular edge, at a cost of 1e-10 relative

bool agree(double guaranteed, double attained) {
  if (std::isinf(guaranteed)) return std::isinf(attained);
  return attained - guaranteed <= 1e-8 * std::max(attained, 1e-8);
}

// A standard error to put into a witness: the largest, which makes W least; any that the set allows where
// unknown.
double witness_error(const AdmissibleSet& set, int j, double at_least) {
  if (std::isfinite(set.se_high(j))) return set.se_high(j);
  return std::max({set.se_low(j), std::fabs(at_least), 1.0});
}

}  // namespace

std::optional<double> common_cap(const AdmissibleSet& set) {
  if (!set.covariances.empty() || !set.correlations.empty() || !set.combination_variances.empty() ||
      !set.matrix_facts.empty())
    return std::nullopt;
  const double low = std::max(-1.0, set.every_correlation.low),
               high = std::min(1.0, set.every_correlation.high);
  if (low != -high || high < 0) return std::nullopt;
  return high;
}

std::optional<LeastWald> least_wald_of_exclusion(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                                 const Eigen::VectorXd& r) {
  const std::optional<double> cap = common_cap(set);
  const std::vector<int> columns = excluded_columns(R);
  if (!cap || columns.empty() || !set.coefficient_facts.empty()) return std::nullopt;
  const int q = static_cast<int>(columns.size()), p = set.size();

  // t_i: how far coefficient i must be from its value, in its largest standard errors; with the sign of the
  // way.
  Eigen::VectorXd t(q), sign(q), target(q);
  for (int i = 0; i < q; ++i) {
    const int j = columns[i];
    target(i) = r(i) / R(i, j);
    const double way = set.centre(j) - target(i);
    sign(i) = way < 0 ? -1 : 1;
    const double beyond = std::max(0.0, std::fabs(way) - set.half_width(j));
    t(i) = beyond == 0 || std::isinf(set.se_high(j)) ? 0 : beyond / set.se_high(j);
  }
  std::vector<int> order(q);
  std::iota(order.begin(), order.end(), 0);
  std::sort(order.begin(), order.end(), [&](int x, int y) { return t(x) > t(y); });

  // With a cap, the k largest take part: the last k at which t_k still exceeds c A_k.
  const double c = *cap;
  double sum = 0, squares = 0, level = 0, value = 0;
  for (int k = 1; k <= q; ++k) {
    const double next = t(order[k - 1]);
    const double A = (sum + next) / (1 - c + k * c);
    if (k > 1 && !(next > c * A)) break;
    sum += next;
    squares += next * next;
    level = A;
    value = c < 1 ? (squares - c * sum * sum / (1 - c + k * c)) / (1 - c) : next * next;
    if (c >= 1 || std::isinf(next)) break;
  }
  LeastWald least;
  least.status = LimitStatus::Found;
  least.method = c < 1 ? (q > 1 ? "sorted t ratios under one cap on every correlation" : "the t ratio")
                       : "largest t ratio of the tested coefficients";
  least.attained = value;
  least.weights = Eigen::VectorXd::Zero(q);
  for (int i = 0; i < q; ++i) {
    const double share = c < 1 && std::isfinite(level) ? t(i) - c * level : (i == order[0] ? 1 : 0);
    const double s = set.se_high(columns[i]);
    if (share > 0 && std::isfinite(s))
      least.weights(i) = sign(i) * share / (R(i, columns[i]) * (s > 0 ? s : 1));
  }
  least.wald = guaranteed_wald_from_errors(set, R, r, least.weights, Eigen::VectorXd(0));
  least.exact = agree(least.wald, least.attained);

  // V: correlations c s_i s_j, with s_i less than a full sign for the coefficients that do not take part.
  Eigen::VectorXd b = set.centre, pull = Eigen::VectorXd::Zero(p);
  Eigen::MatrixXd V = Eigen::MatrixXd::Zero(p, p);
  for (int i = 0; i < q; ++i) {
    const int j = columns[i];
    const double h = set.half_width(j);
    b(j) = std::isinf(h) ? target(i) : std::clamp(target(i), set.centre(j) - h, set.centre(j) + h);
    if (level > 0 && std::isfinite(level))
      pull(j) = sign(i) * (c > 0 ? std::min(1.0, t(i) / (c * level)) : 0.0);
  }
  for (int i = 0; i < p; ++i)
    for (int j = 0; j < p; ++j)
      V(i, j) = witness_error(set, i, 0) * witness_error(set, j, 0) *
                (i == j ? 1 : std::min(c, kAlmostOne) * pull(i) * pull(j));
  least.witness = make_witness(set, R, r, b, V);
  return least;
}

LeastWald least_wald_of_errors(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  const int p = set.size();
  const LargestRatio ratio = largest_ratio(set, R, r);
  LeastWald least;
  least.method = "linear programme on the standard errors";
  least.weights = ratio.c;
  least.multipliers.coefficient_facts = ratio.z;
  if (ratio.settled == LargestRatio::Settled::NoCoefficients) {
    least.status =
        proves_no_coefficients(set, ratio.z) ? LimitStatus::NoCoefficients : LimitStatus::NotSettled;
    return least;
  }
  least.wald = guaranteed_wald_from_errors(set, R, r, ratio.c, ratio.z);
  if (ratio.settled == LargestRatio::Settled::NoVariance) {
    least.status = std::isinf(least.wald) ? LimitStatus::Found : LimitStatus::NotSettled;
    least.exact = std::isinf(least.wald);
    return least;
  }
  if (ratio.settled != LargestRatio::Settled::Yes) return least;
  least.status = LimitStatus::Found;
  least.attained = ratio.t * ratio.t;
  least.shifted = ratio.beta;
  least.exact = !set.has_covariance_facts() && agree(least.wald, least.attained);

  // The errors that carry b to beta, all at once: V = vv' up to what the printed standard errors add on the
  // diagonal.
  Eigen::VectorXd v = Eigen::VectorXd::Zero(p);
  if (ratio.t > 0) v = (ratio.b - ratio.beta) / ratio.t;
  Eigen::MatrixXd V = kAlmostOne * v * v.transpose();
  for (int j = 0; j < p; ++j) {
    const double s = witness_error(set, j, v(j));
    V(j, j) = std::max(s * s, std::isfinite(set.se_high(j)) ? 0 : v(j) * v(j));
  }
  least.witness = make_witness(set, R, r, ratio.b, V);
  return least;
}

}  // namespace rejoinder
