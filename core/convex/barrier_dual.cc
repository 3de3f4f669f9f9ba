// The part of BarrierModel that reads results off a point: multipliers, and b and V in the units of the
// print.
#include <algorithm>
#include <cmath>

#include "core/convex/barrier_matrices.h"
#include "core/convex/barrier_model.h"

namespace rejoinder {

using block::inverse;
using block::slope;

BarrierModel::Dual BarrierModel::dual(const Eigen::VectorXd& x, double tau, const Eigen::VectorXd& dx,
                                      double dtau, double kappa, bool with_border,
                                      const Eigen::VectorXd& objective) const {
  Dual dual;
  dual.multipliers.facts = Eigen::VectorXd::Zero(facts_.facts.size());
  dual.multipliers.caps.assign(facts_.caps.size(), Eigen::Matrix2d::Zero());
  dual.multipliers.coefficient_facts = Eigen::VectorXd::Zero(set_.coefficient_facts.size());
  // Gradient of the Lagrangian without the exact facts, to be made up by their multipliers.
  Eigen::VectorXd left = objective;
  const auto price = [kappa](const Eigen::MatrixXd& Z, const Eigen::MatrixXd& change) -> Eigen::MatrixXd {
    const Eigen::MatrixXd inverted = inverse(Z);
    return (inverted - inverted * change * inverted) / kappa;
  };
  const auto take = [&](const Eigen::MatrixXd& G, bool in_V_only) {
    for (int u = 0; u < unknowns(); ++u) {
      const auto [i, j] = places_[u];
      if (i < 0 || (in_V_only && i >= size_)) continue;
      left(u) += slope(G, i, j);
    }
  };
  const Eigen::MatrixXd G = price(shifted(x, tau), shifted(dx, dtau));
  take(G, true);
  double weight_of_w = 1;
  if (with_border) {
    const Eigen::MatrixXd Z = border(x, tau, offset_);
    const Eigen::MatrixXd L = price(Z, border(dx, dtau, Eigen::VectorXd::Zero(rows_)));
    weight_of_w = L(rows_, rows_) > 0 ? L(rows_, rows_) : 1;
    dual.c = row_mix_ * (-L.col(rows_).head(rows_) / weight_of_w);
    Eigen::MatrixXd T = Eigen::MatrixXd::Zero(rows_ + 1, size_ + 1);
    T.topLeftCorner(rows_, size_) = R_;
    T(rows_, size_) = 1;
    take(T.transpose() * L * T, false);
  } else {
    dual.c = Eigen::VectorXd::Zero(row_mix_.rows());
  }
  for (const CapBlock& cap : caps_) {
    const Eigen::Matrix2d L = price(cap_matrix(cap, x, tau), cap_matrix(cap, dx, dtau));
    left(cap.first) -= cap.limit * L(0, 0);
    left(cap.second) -= cap.limit * L(1, 1);
    left(cap.off) -= 2 * L(0, 1);
    const CorrelationCap& fact = facts_.caps[cap.index];
    // Back to the units of the print; the block lists the larger index first or second as the fact does.
    const auto found_i = std::find(taking_part_.begin(), taking_part_.end(), fact.i) - taking_part_.begin();
    const auto found_j = std::find(taking_part_.begin(), taking_part_.end(), fact.j) - taking_part_.begin();
    const double si = scale_(found_i), sj = scale_(found_j);
    Eigen::Matrix2d printed;
    printed << L(0, 0) / (si * si), L(0, 1) / (si * sj), L(0, 1) / (si * sj), L(1, 1) / (sj * sj);
    dual.multipliers.caps[cap.index] = printed / weight_of_w;
  }
  for (const Slack& slack : slacks_) {
    const double s = slack_value(slack, x, tau);
    double change = dtau;
    for (const auto& [at, weight] : slack.cells) change += weight * dx(at);
    const double lambda = std::max(0.0, (1 - change / s) / (s * kappa));
    for (const auto& [at, weight] : slack.cells) left(at) -= lambda * weight;
    const double y = slack.sign * lambda / slack.unit / weight_of_w;
    if (slack.origin == Origin::Fact) dual.multipliers.facts(slack.index) += y;
    // c'(Rb - r) counts once where the Lagrangian counts twice, and b is in distance units.
    if (slack.origin == Origin::CoefficientFact)
      dual.multipliers.coefficient_facts(slack.index) -= y * distance_unit_ / 2;
  }
  if (!equalities_.empty()) {
    Eigen::MatrixXd E = Eigen::MatrixXd::Zero(unknowns(), equalities_.size());
    Eigen::VectorXd size = Eigen::VectorXd::Zero(equalities_.size());
    for (int e = 0; e < static_cast<int>(equalities_.size()); ++e) {
      for (const auto& [at, weight] : equalities_[e].cells) size(e) = std::max(size(e), std::fabs(weight));
      for (const auto& [at, weight] : equalities_[e].cells) E(at, e) += weight / size(e);
    }
    const bool single = std::all_of(equalities_.begin(), equalities_.end(),
                                    [](const Equality& e) { return e.cells.size() == 1; });
    Eigen::VectorXd mu;
    if (single) {
      mu = Eigen::VectorXd::Zero(equalities_.size());
      std::vector<bool> used(unknowns(), false);
      for (int e = 0; e < mu.size(); ++e) {
        const int at = equalities_[e].cells[0].first;
        if (!used[at]) mu(e) = -left(at) / E(at, e);
        used[at] = true;
      }
    } else {
      mu = E.completeOrthogonalDecomposition().solve(-left);
    }
    for (int e = 0; e < mu.size(); ++e) {
      const double y = mu(e) / size(e) / weight_of_w;
      if (equalities_[e].origin == Origin::Fact) dual.multipliers.facts(equalities_[e].index) += y;
      if (equalities_[e].origin == Origin::CoefficientFact)
        dual.multipliers.coefficient_facts(equalities_[e].index) -= y * distance_unit_ / 2;
    }
  }
  return dual;
}

Multipliers BarrierModel::equality_proof() const {
  Multipliers proof;
  proof.facts = Eigen::VectorXd::Zero(facts_.facts.size());
  proof.coefficient_facts = Eigen::VectorXd::Zero(set_.coefficient_facts.size());
  // What the combined facts leave over is at right angles to every free unknown; on unknowns that an exact
  // fact of their own fixes, that fact makes up for it.
  const int count = static_cast<int>(equalities_.size());
  Eigen::VectorXd y = Eigen::VectorXd::Zero(count), weight_left = Eigen::VectorXd::Zero(unknowns());
  for (int e = 0; e < count; ++e) {
    if (equality_gap_(e) == 0) continue;
    double size = 0;
    for (const auto& [at, weight] : equalities_[e].cells) size = std::max(size, std::fabs(weight));
    y(e) = -equality_gap_(e) / size;
    for (const auto& [at, weight] : equalities_[e].cells) weight_left(at) += y(e) * weight;
  }
  for (int e = 0; e < count; ++e) {
    if (equality_gap_(e) == 0 && equalities_[e].cells.size() == 1) {
      const auto& [at, weight] = equalities_[e].cells[0];
      y(e) = -weight_left(at) / weight;
      weight_left(at) = 0;
    }
    if (equalities_[e].origin == Origin::Fact) proof.facts(equalities_[e].index) += y(e);
    if (equalities_[e].origin == Origin::CoefficientFact)
      proof.coefficient_facts(equalities_[e].index) -= y(e);
  }
  return proof;
}

Eigen::VectorXd BarrierModel::coefficients(const Eigen::VectorXd& x) const {
  Eigen::VectorXd b = set_.centre;
  for (int k = 0; k < size_; ++k)
    if (index_(size_, k) >= 0) b(taking_part_[k]) += x(index_(size_, k)) * scale_(k) * distance_unit_;
  return b;
}

Eigen::MatrixXd BarrierModel::covariance(const Eigen::VectorXd& x) const {
  const int p = set_.size();
  Eigen::MatrixXd V = Eigen::MatrixXd::Zero(p, p);
  for (int j = 0; j < p; ++j) {
    const double high = std::isfinite(set_.se_high(j)) ? set_.se_high(j) : std::max(1.0, set_.se_low(j));
    V(j, j) = high * high;
  }
  for (int i = 0; i < size_; ++i)
    for (int j = 0; j <= i; ++j)
      V(taking_part_[i], taking_part_[j]) = V(taking_part_[j], taking_part_[i]) =
          x(index_(i, j)) * scale_(i) * scale_(j);
  return V;
}

Eigen::VectorXd BarrierModel::functional(const Eigen::MatrixXd& T, double& unit) const {
  Eigen::VectorXd objective = Eigen::VectorXd::Zero(unknowns());
  unit = 0;
  for (int i = 0; i < size_; ++i)
    for (int j = 0; j <= i; ++j) {
      const double weight = T(taking_part_[i], taking_part_[j]) * scale_(i) * scale_(j);
      objective(index_(i, j)) = i == j ? weight : 2 * weight;
      unit += std::fabs(objective(index_(i, j)));
    }
  if (unit > 0) objective /= unit;
  return objective;
}

}  // namespace rejoinder
