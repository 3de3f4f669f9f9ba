#include "core/convex/certificate.h"

#include <algorithm>
#include <cassert>
#include <cmath>

#include "core/convex/rounding.h"

namespace rejoinder {
namespace {

constexpr double kEpsilon = std::numeric_limits<double>::epsilon();

// A multiplier may not lean on an end that is not there.
double usable(double y, const Interval& value) {
  if (!std::isfinite(y)) return 0;
  if (y > 0 && std::isinf(value.high)) return 0;
  if (y < 0 && std::isinf(value.low)) return 0;
  return y;
}

// The block brought back to one without negative eigenvalue and with the sign its side asks for.
Eigen::Matrix2d usable(Eigen::Matrix2d L, CorrelationCap::Side side) {
  if (!L.allFinite()) return Eigen::Matrix2d::Zero();
  const double x = std::max(0.0, L(0, 0)), y = std::max(0.0, L(1, 1));
  double off = L(0, 1);
  if (side == CorrelationCap::Side::Upper) off = std::min(0.0, off);
  if (side == CorrelationCap::Side::Lower) off = std::max(0.0, off);
  const double most = std::sqrt(x) * std::sqrt(y) * (1 - 4 * kEpsilon);
  off = std::clamp(off, -most, most);
  L << x, off, off, y;
  return L;
}

// The matrix M, scaled, with what rounding may have done to each entry.
class ScaledSum {
 public:
  explicit ScaledSum(const Eigen::VectorXd& scale)
      : scale_(scale), sum_(Eigen::MatrixXd::Zero(scale.size(), scale.size())), size_(sum_) {}
  // Adds `value` to the entries (i, j) and (j, i), once when i == j.
  void add(int i, int j, double value) {
    const double scaled = value * scale_(i) * scale_(j);
    sum_(i, j) += scaled;
    size_(i, j) += std::fabs(scaled);
    if (i == j) return;
    sum_(j, i) += scaled;
    size_(j, i) += std::fabs(scaled);
  }
  void count_terms(int terms) { terms_ += terms; }
  // How far the least eigenvalue may lie below zero; 0 when it does not.
  double shortfall() const {
    const Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd> parts(sum_, Eigen::EigenvaluesOnly);
    if (parts.info() != Eigen::Success) return kInfinity;
    const int p = static_cast<int>(sum_.rows());
    const double summing = (terms_ + 6) * kEpsilon * size_.rowwise().sum().maxCoeff();
    const double solving = 8 * p * kEpsilon * sum_.norm();
    return std::max(0.0, -parts.eigenvalues()(0) + summing + solving);
  }

 private:
  const Eigen::VectorXd& scale_;
  Eigen::MatrixXd sum_, size_;
  int terms_ = 0;
};

}  // namespace

double greatest_of(const ConvexFacts& facts, const Eigen::MatrixXd& T, const Multipliers& multipliers) {
  const int p = facts.size();
  const int count = static_cast<int>(facts.facts.size()), caps = static_cast<int>(facts.caps.size());
  assert(T.rows() == p && T.cols() == p);
  // A coefficient whose variance nothing bounds can only be left out of everything.
  Eigen::VectorXd scale = facts.scale;
  std::vector<bool> unbounded(p, false);
  for (int j = 0; j < p; ++j) {
    if (std::isfinite(scale(j))) continue;
    unbounded[j] = true;
    scale(j) = 0;
    if (T.row(j).cwiseAbs().maxCoeff() != 0) return kInfinity;
  }
  TrackedSum bound;
  ScaledSum M(scale);
  int summed = 1;
  for (int k = 0; k < count && k < multipliers.facts.size(); ++k) {
    const LinearFact& fact = facts.facts[k];
    double y = usable(multipliers.facts(k), fact.value);
    for (const LinearFact::Term& term : fact.terms)
      if (unbounded[term.i] || unbounded[term.j]) y = 0;
    if (y == 0) continue;
    ++summed;
    bound.add(y * (y > 0 ? fact.value.high : fact.value.low));
    for (const LinearFact::Term& term : fact.terms)
      M.add(term.i, term.j, term.i == term.j ? y * term.weight : y * term.weight / 2);
  }
  for (int k = 0; k < caps && k < static_cast<int>(multipliers.caps.size()); ++k) {
    const CorrelationCap& cap = facts.caps[k];
    if (unbounded[cap.i] || unbounded[cap.j]) continue;
    const Eigen::Matrix2d L = usable(multipliers.caps[k], cap.side);
    M.add(cap.i, cap.i, -cap.limit * L(0, 0));
    M.add(cap.j, cap.j, -cap.limit * L(1, 1));
    M.add(cap.i, cap.j, -L(0, 1));
    ++summed;
  }
  for (int i = 0; i < p; ++i)
    for (int j = 0; j <= i; ++j) M.add(i, j, -(T(i, j) + T(j, i)) / 2);
  M.count_terms(summed);
  bound.add(p * M.shortfall() * (1 + 1e-12));
  return bound.upper();
}

double least_distance(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                      const Eigen::VectorXd& c, const Eigen::VectorXd& z) {
  const int p = set.size(), q = static_cast<int>(R.rows());
  const int count = std::min(static_cast<int>(set.coefficient_facts.size()), static_cast<int>(z.size()));
  std::vector<double> multiplier(count);
  TrackedSum least;
  for (int k = 0; k < count; ++k) {
    // Positive z leans on the lower end, so the roles of the ends are exchanged.
    multiplier[k] = -usable(-z(k), set.coefficient_facts[k].value);
    const Interval& value = set.coefficient_facts[k].value;
    if (multiplier[k] != 0) least.add(multiplier[k] * (multiplier[k] > 0 ? value.low : value.high));
  }
  for (int i = 0; i < q; ++i) least.add(-c(i) * r(i));
  for (int j = 0; j < p; ++j) {
    TrackedSum weight;
    for (int i = 0; i < q; ++i) weight.add(c(i) * R(i, j));
    for (int k = 0; k < count; ++k) weight.add(-multiplier[k] * set.coefficient_facts[k].a(j));
    if (std::isinf(set.half_width(j))) {
      if (std::fabs(weight.value()) > 1e-13 * weight.error() / kEpsilon) return -kInfinity;
      continue;
    }
    // Worst over the box; the error of the weight itself counts over centre and width.
    least.add_uncertain(weight.value() * set.centre(j), weight.error() * std::fabs(set.centre(j)));
    least.add(-(std::fabs(weight.value()) + weight.error()) * set.half_width(j), 4);
  }
  return least.lower();
}

namespace {

// a = R'c, and how far rounding may have moved each entry. A coefficient whose variance nothing bounds must
// not take part at all: there an entry that is zero up to rounding is made so.
struct Combination {
  Eigen::VectorXd a, error;  // p
};

Combination combination(const Eigen::MatrixXd& R, const Eigen::VectorXd& c, const Eigen::VectorXd& scale) {
  const Eigen::VectorXd size = R.cwiseAbs().transpose() * c.cwiseAbs();
  Combination made{R.transpose() * c, (static_cast<double>(R.rows()) + 2) * kEpsilon * size};
  for (int j = 0; j < size.size(); ++j)
    if (std::isinf(scale(j)) && std::fabs(made.a(j)) <= 1e-13 * size(j)) made.a(j) = 0;
  return made;
}

double squared_ratio_down(double distance, double variance) {
  if (!(distance > 0) || !(variance >= 0) || std::isinf(variance)) return 0;
  if (variance == 0) return kInfinity;
  const double wald = distance / variance * distance;
  return std::max(0.0, wald * (1 - 4 * kEpsilon));
}

// c in a size at which neither squares nor products leave the range of doubles.
Eigen::VectorXd of_unit_size(const Eigen::VectorXd& c) {
  const double size = c.size() > 0 ? c.cwiseAbs().maxCoeff() : 0;
  return size > 0 && std::isfinite(size) ? Eigen::VectorXd(c / size) : Eigen::VectorXd::Zero(c.size());
}

}  // namespace

double guaranteed_wald(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                       const Eigen::VectorXd& c, const Multipliers& multipliers) {
  if (!c.allFinite()) return 0;
  const double distance = least_distance(set, R, r, c, multipliers.coefficient_facts);
  const ConvexFacts facts = convex_facts(set);
  const Combination made = combination(R, c, facts.scale);
  double variance = greatest_of(facts, made.a * made.a.transpose(), multipliers);
  // The true a differs from the one used by at most `error`, and the standard error of the difference is at
  // most the sum of error_j s_j.
  TrackedSum deviation;
  deviation.add(std::sqrt(std::max(0.0, variance)));
  for (int j = 0; j < set.size(); ++j)
    if (std::isfinite(facts.scale(j))) deviation.add(made.error(j) * facts.scale(j));
  if (std::isfinite(variance)) variance = deviation.upper() * deviation.upper();
  return squared_ratio_down(distance, variance);
}

double guaranteed_wald_from_errors(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                   const Eigen::VectorXd& r, const Eigen::VectorXd& given,
                                   const Eigen::VectorXd& z) {
  if (!given.allFinite()) return 0;
  const double size = given.size() > 0 ? given.cwiseAbs().maxCoeff() : 0;
  const Eigen::VectorXd c = of_unit_size(given);
  const double distance = least_distance(set, R, r, c, size > 0 ? Eigen::VectorXd(z / size) : z);
  const Combination made = combination(R, c, set.se_high);
  const double k = std::min(1.0, set.every_correlation.magnitude());
  TrackedSum sum, squares;
  for (int j = 0; j < set.size(); ++j) {
    if (made.a(j) == 0) continue;
    if (std::isinf(set.se_high(j))) return 0;
    const double part = (std::fabs(made.a(j)) + made.error(j)) * set.se_high(j);
    sum.add(part);
    squares.add(part * part, 4);
  }
  const double variance = (k < 1 ? (1 - k) * squares.upper() : 0) + k * sum.upper() * sum.upper();
  return squared_ratio_down(distance, sum.value() == 0 ? 0 : variance * (1 + 8 * kEpsilon));
}

bool proves_no_covariance(const ConvexFacts& facts, const Multipliers& multipliers) {
  return greatest_of(facts, Eigen::MatrixXd::Zero(facts.size(), facts.size()), multipliers) < 0;
}

bool proves_no_coefficients(const AdmissibleSet& set, const Eigen::VectorXd& z) {
  const Eigen::MatrixXd none = Eigen::MatrixXd::Zero(0, set.size());
  return least_distance(set, none, Eigen::VectorXd(0), Eigen::VectorXd(0), z) > 0;
}

}  // namespace rejoinder
