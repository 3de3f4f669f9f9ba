#include <algorithm>
#include <cmath>

#include "core/convex/closed_forms.h"
#include "core/convex/coefficient_range.h"
#include "core/convex/witness.h"

namespace rejoinder {
namespace {

constexpr double kEpsilon = std::numeric_limits<double>::epsilon();

// The size that c'(Rb - r) has when nothing cancels: what is small against this is zero up to rounding.
double natural_size(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                    const Eigen::VectorXd& c) {
  return c.cwiseAbs().dot(R.cwiseAbs() * set.centre.cwiseAbs() + r.cwiseAbs());
}

bool can_differ_from_zero(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                          const Eigen::VectorXd& c, Eigen::VectorXd& b) {
  const FarthestDistance far = farthest_distance(set, R, r, c);
  if (far.b.size() == 0) return false;
  b = far.b;
  for (int j = 0; j < set.size(); ++j)  // an unknown coefficient can be anything
    if (std::isinf(set.half_width(j)) && std::fabs((R.transpose() * c)(j)) > 0) {
      b(j) += 1 + std::fabs(b(j));
      return true;
    }
  return std::fabs(c.dot(R * b - r)) > 1e-13 * natural_size(set, R, r, c);
}

GreatestWald one_combination(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  GreatestWald greatest;
  greatest.status = LimitStatus::Found;
  greatest.method = "one combination: farthest distance over the least standard error";
  greatest.weights = Eigen::VectorXd::Ones(1);
  const Eigen::VectorXd a = R.row(0).transpose();
  const FarthestDistance far = farthest_distance(set, R, r, greatest.weights);
  const double gap = polygon_gap(set, a);
  // The rounded sum of the sides.
  const double size = a.cwiseAbs().dot(set.se_low);
  const double least_error = gap - 4 * (static_cast<double>(a.size()) + 2) * kEpsilon * size;
  if (far.b.size() == 0) return greatest;
  const double distance = std::fabs((R * far.b - r)(0));
  if (std::isinf(far.guaranteed)) {
    greatest.kind = GreatestWald::Infinite;
    greatest.method = "a tested coefficient is not known";
    greatest.attained = kInfinity;
    return greatest;
  }
  if (least_error > 0) {
    const double up = far.guaranteed / least_error;
    greatest.kind = GreatestWald::Exact;
    greatest.guaranteed = up * up * (1 + 4 * kEpsilon);
    greatest.attained = distance / gap * (distance / gap);
    // All the others at full length against the longest side.
    int longest = 0;
    for (int j = 0; j < a.size(); ++j) {
      double own = std::fabs(a(j)) * set.se_low(j);
      for (int i = 0; i < a.size(); ++i)
        if (i != j && a(i) != 0) own -= std::fabs(a(i)) * set.se_high(i);
      if (own == gap) longest = j;
    }
    Eigen::VectorXd v(a.size());
    Eigen::VectorXd rest = Eigen::VectorXd::Zero(a.size());
    for (int j = 0; j < a.size(); ++j) {
      const double s = j == longest ? set.se_low(j) : set.se_high(j);
      v(j) = a(j) == 0 ? 0 : (a(j) > 0) == (j == longest) ? s : -s;
      if (a(j) == 0) rest(j) = std::isfinite(s) ? s * s : std::max(1.0, set.se_low(j) * set.se_low(j));
    }
    Eigen::MatrixXd V = v * v.transpose();
    V.diagonal() += rest;
    greatest.witness = make_witness(set, R, r, far.b, V);
    return greatest;
  }
  Eigen::VectorXd b;
  if (!can_differ_from_zero(set, R, r, greatest.weights, b)) {
    if (distance == 0) {  // the combination equals its value exactly: no statistic but 0
      greatest.kind = GreatestWald::Exact;
      greatest.guaranteed = 0;
    }
    return greatest;
  }
  const Eigen::MatrixXd V = covariance_without(set, a);
  if (V.size() == 0) return greatest;
  greatest.kind = GreatestWald::Infinite;
  greatest.method = "the standard errors allow the combination no variance";
  greatest.attained = kInfinity;
  greatest.witness = make_witness(set, R, r, b, V);
  return greatest;
}

// The coefficient whose side is longer than all others together, or -1.
int dominant(const AdmissibleSet& set, const Eigen::VectorXd& a) {
  for (int j = 0; j < a.size(); ++j) {
    double own = std::fabs(a(j)) * set.se_low(j);
    const double whole = own;
    for (int i = 0; i < a.size(); ++i)
      if (i != j && a(i) != 0) own -= std::fabs(a(i)) * set.se_high(i);
    if (own > 4 * kEpsilon * whole) return j;
  }
  return -1;
}

}  // namespace

std::optional<GreatestWald> greatest_wald_of_errors(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                                    const Eigen::VectorXd& r) {
  if (set.has_covariance_facts()) return std::nullopt;
  const int q = static_cast<int>(R.rows());
  if (q == 1) return one_combination(set, R, r);
  // Turning c round the plane of two rows passes from one dominant side to another, so somewhere none
  // dominates; halving the angle finds such a place.
  for (int x = 0; x < q; ++x)
    for (int y = x + 1; y < q; ++y) {
      const auto at = [&](double angle) {
        Eigen::VectorXd c = Eigen::VectorXd::Zero(q);
        c(x) = std::cos(angle) / R.row(x).cwiseAbs().maxCoeff();
        c(y) = std::sin(angle) / R.row(y).cwiseAbs().maxCoeff();
        return c;
      };
      const int steps = 24;
      for (int k = 0; k < steps; ++k) {
        double low = M_PI * k / steps, high = M_PI * (k + 1) / steps;
        const int below = dominant(set, R.transpose() * at(low));
        int above = dominant(set, R.transpose() * at(high));
        if (below == above && below >= 0) continue;
        double angle = below < 0 ? low : high;
        if (below >= 0 && above >= 0)
          for (int halving = 0; halving < 60 && above >= 0; ++halving) {
            angle = (low + high) / 2;
            above = dominant(set, R.transpose() * at(angle));
            (above == below ? low : high) = angle;
          }
        const Eigen::VectorXd c = at(angle);
        Eigen::VectorXd b;
        if (!can_differ_from_zero(set, R, r, c, b)) continue;
        const Eigen::MatrixXd V = covariance_without(set, R.transpose() * c);
        if (V.size() == 0) continue;
        GreatestWald greatest;
        greatest.status = LimitStatus::Found;
        greatest.kind = GreatestWald::Infinite;
        greatest.method = "the standard errors allow a combination of the restrictions no variance";
        greatest.attained = kInfinity;
        greatest.weights = c;
        greatest.witness = make_witness(set, R, r, b, V);
        return greatest;
      }
    }
  return std::nullopt;
}

std::optional<GreatestWald> greatest_wald_of_capped_exclusion(const AdmissibleSet& set,
                                                              const Eigen::MatrixXd& R,
                                                              const Eigen::VectorXd& r) {
  const std::optional<double> cap = common_cap(set);
  const std::vector<int> columns = excluded_columns(R);
  if (!cap || columns.empty() || !set.coefficient_facts.empty()) return std::nullopt;
  const int q = static_cast<int>(columns.size()), p = set.size();
  const double c = *cap;
  if (c >= 1 && q > 1) return std::nullopt;
  Eigen::VectorXd t = Eigen::VectorXd::Zero(q), b = set.centre, pull = Eigen::VectorXd::Zero(p), s(p);
  bool infinite = false;
  double sum = 0, squares = 0;
  for (int j = 0; j < p; ++j) s(j) = set.se_low(j);
  for (int i = 0; i < q; ++i) {
    const int j = columns[i];
    const double way = set.centre(j) - r(i) / R(i, j), far = std::fabs(way) + set.half_width(j);
    pull(j) = way < 0 ? -1 : 1;
    if (std::isfinite(set.half_width(j))) b(j) += pull(j) * set.half_width(j);
    if (far > 0 && s(j) == 0) infinite = true;
    if (far > 0 && std::isinf(far)) infinite = true;
    t(i) = far > 0 && s(j) > 0 ? far / s(j) : 0;
    sum += t(i);
    squares += t(i) * t(i);
  }
  const double used = q > 1 ? std::min(c, 1.0 / (q - 1)) : 0;
  const double room = 1 - (q - 1) * c;
  infinite = infinite || (q > 1 && c * (q - 1) >= 1 && sum > 0);
  GreatestWald greatest;
  greatest.status = LimitStatus::Found;
  greatest.method = q > 1 ? "extreme correlations under one cap, signs of the t ratios" : "the t ratio";
  Eigen::MatrixXd V = Eigen::MatrixXd::Zero(p, p);
  for (int i = 0; i < p; ++i)
    for (int j = 0; j < p; ++j) V(i, j) = s(i) * s(j) * (i == j ? 1 : -used * pull(i) * pull(j));
  greatest.witness = make_witness(set, R, r, b, V);
  if (infinite) {
    greatest.kind = GreatestWald::Infinite;
    greatest.attained = kInfinity;
    greatest.weights = Eigen::VectorXd::Zero(q);
    for (int i = 0; i < q; ++i)
      greatest.weights(i) = pull(columns[i]) / (R(i, columns[i]) * (s(columns[i]) > 0 ? s(columns[i]) : 1));
    return greatest;
  }
  const double value = q > 1 ? (squares + c * sum * sum / room) / (1 + c) : squares;
  greatest.kind = GreatestWald::Exact;
  greatest.attained = value;
  greatest.guaranteed = value * (1 + (8 + q) * kEpsilon * (1 + (q > 1 ? 1 / room : 0)));
  return greatest;
}

}  // namespace rejoinder
