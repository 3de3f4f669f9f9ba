#include "core/convex/barrier_model.h"

#include <algorithm>
#include <cmath>

namespace rejoinder {
namespace {

constexpr double kExact =
    1e-11;  // an interval narrower than this against its natural size is taken as one value

// Rows without weight on coefficients of which nothing bounds variance or value: an orthonormal basis of the
// combinations of rows that leave all those out. Whole rows are kept as they are where that is enough.
Eigen::MatrixXd rows_without(const Eigen::MatrixXd& R, const std::vector<bool>& left_out) {
  const int q = static_cast<int>(R.rows());
  std::vector<int> columns;
  for (int j = 0; j < R.cols(); ++j)
    if (left_out[j] && !R.col(j).isZero(0)) columns.push_back(j);
  if (columns.empty()) return Eigen::MatrixXd::Identity(q, q);
  Eigen::MatrixXd weights(columns.size(), q);
  for (int k = 0; k < static_cast<int>(columns.size()); ++k) {
    weights.row(k) = R.col(columns[k]).transpose();
    weights.row(k) /= weights.row(k).cwiseAbs().maxCoeff();
  }
  const Eigen::FullPivLU<Eigen::MatrixXd> lu(weights);
  if (lu.dimensionOfKernel() == 0) return Eigen::MatrixXd(q, 0);
  return lu.kernel();
}

}  // namespace

BarrierModel::BarrierModel(const AdmissibleSet& set, const ConvexFacts& facts, const Eigen::MatrixXd& R,
                           const Eigen::VectorXd& r)
    : set_(set), facts_(facts) {
  const int p = set.size();
  std::vector<bool> unknown_size(p);
  for (int j = 0; j < p; ++j) unknown_size[j] = std::isinf(facts.scale(j));
  std::vector<bool> left_out = unknown_size;
  for (int j = 0; j < p; ++j) left_out[j] = left_out[j] || std::isinf(set.half_width(j));
  row_mix_ = R.rows() > 0 ? rows_without(R, left_out) : Eigen::MatrixXd(0, 0);
  Eigen::MatrixXd used = row_mix_.transpose() * R;
  rows_ = static_cast<int>(used.rows());

  // A coefficient takes part when the rows or, step by step, a fact shared with one that does, mention it.
  std::vector<bool> part(p, R.rows() == 0);
  for (int j = 0; j < p; ++j)
    if (rows_ > 0 && !left_out[j] && !used.col(j).isZero(0)) part[j] = true;
  for (bool grew = true; grew;) {
    grew = false;
    const auto connect = [&](const std::vector<int>& members) {
      bool any = false, all = true;
      for (const int j : members) {
        if (unknown_size[j]) return;
        any = any || part[j];
        all = all && part[j];
      }
      if (!any || all) return;
      for (const int j : members) part[j] = true;
      grew = true;
    };
    for (const LinearFact& fact : facts.facts) {
      std::vector<int> members;
      for (const auto& term : fact.terms) members.insert(members.end(), {term.i, term.j});
      connect(members);
    }
    for (const CorrelationCap& cap : facts.caps) connect({cap.i, cap.j});
    if (rows_ > 0)
      for (const CoefficientFact& fact : set.coefficient_facts) {
        std::vector<int> members;
        for (int j = 0; j < p; ++j)
          if (fact.a(j) != 0) members.push_back(j);
        connect(members);
      }
  }
  for (int j = 0; j < p; ++j)
    if (part[j] && !unknown_size[j]) taking_part_.push_back(j);
  size_ = static_cast<int>(taking_part_.size());
  scale_.resize(size_);
  for (int k = 0; k < size_; ++k) scale_(k) = facts.scale(taking_part_[k]);

  R_.resize(rows_, size_);
  offset_ = row_mix_.transpose() * (R * set.centre - r);
  for (int i = 0; i < rows_; ++i) {
    for (int k = 0; k < size_; ++k)
      R_(i, k) = left_out[taking_part_[k]] ? 0 : used(i, taking_part_[k]) * scale_(k);
    const double length = R_.row(i).norm();
    R_.row(i) /= length;
    offset_(i) /= length;
    row_mix_.col(i) /= length;
  }
  // Orthonormal rows for the same hypothesis: rows that resemble one another cost the solver digits.
  if (rows_ > 1) {
    const Eigen::MatrixXd upper = R_.transpose().householderQr().matrixQR().topRows(rows_);
    const auto lower = upper.triangularView<Eigen::Upper>().transpose();  // R_ = lower * orthonormal rows
    if (upper.diagonal().cwiseAbs().minCoeff() > 1e-10) {
      lower.solveInPlace(R_);
      lower.solveInPlace(offset_);
      Eigen::MatrixXd mix = row_mix_.transpose();
      lower.solveInPlace(mix);
      row_mix_ = mix.transpose();
    }
  }
  if (rows_ > 0) distance_unit_ = std::max(1e-3, offset_.cwiseAbs().maxCoeff());
  offset_ /= distance_unit_;

  place_unknowns();
  add_facts();
  add_caps();
  if (rows_ > 0) add_coefficients();
  find_directions();
}

void BarrierModel::place_unknowns() {
  index_ = Eigen::MatrixXi::Constant(size_ + 1, size_ + 1, -1);
  const auto place = [&](int i, int j) {
    index_(i, j) = static_cast<int>(places_.size());
    places_.push_back({i, j});
  };
  for (int i = 0; i < size_; ++i)
    for (int j = 0; j <= i; ++j) place(i, j);
  if (rows_ == 0) return;
  for (int j = 0; j < size_; ++j)
    if (std::isfinite(set_.half_width(taking_part_[j]))) place(size_, j);
  place(size_, size_);
  border_unknown_ = index_(size_, size_);
}

void BarrierModel::add_range(const std::vector<std::pair<int, double>>& cells, const Interval& value,
                             double natural, Origin origin, int index) {
  if (value.width() <= kExact * natural) {
    equalities_.push_back({cells, value.middle(), origin, index, 1});
    return;
  }
  const bool both = std::isfinite(value.low) && std::isfinite(value.high);
  const double unit = both ? value.width() : natural;
  for (const double sign : {-1.0, 1.0}) {
    const double end = sign > 0 ? value.high : value.low;
    if (std::isinf(end)) continue;
    Slack slack{cells, sign * end / unit, origin, index, sign, unit};
    for (auto& cell : slack.cells) cell.second *= -sign / unit;
    slacks_.push_back(slack);
  }
}

void BarrierModel::add_facts() {
  std::vector<int> position(set_.size(), -1);
  for (int k = 0; k < size_; ++k) position[taking_part_[k]] = k;
  for (int f = 0; f < static_cast<int>(facts_.facts.size()); ++f) {
    const LinearFact& fact = facts_.facts[f];
    std::vector<std::pair<int, double>> cells;
    double natural = 0;
    bool mine = true;
    for (const LinearFact::Term& term : fact.terms) {
      const int i = position[term.i], j = position[term.j];
      if (i < 0 || j < 0) {
        mine = false;
        break;
      }
      const double weight = term.weight * scale_(i) * scale_(j);
      cells.push_back({unknown(i, j), weight});
      natural += std::fabs(weight);
    }
    if (mine && natural > 0) add_range(cells, fact.value, natural, Origin::Fact, f);
  }
}

void BarrierModel::add_caps() {
  std::vector<int> position(set_.size(), -1);
  for (int k = 0; k < size_; ++k) position[taking_part_[k]] = k;
  for (int f = 0; f < static_cast<int>(facts_.caps.size()); ++f) {
    const CorrelationCap& cap = facts_.caps[f];
    const int i = position[cap.i], j = position[cap.j];
    if (i < 0 || j < 0) continue;
    CapBlock block{unknown(i, i), unknown(j, j), unknown(i, j), cap.limit, f};
    if (cap.side != CorrelationCap::Side::Both) {
      // V_ij <= u with |u| under the cap (Upper), or V_ij >= u (Lower).
      block.off = static_cast<int>(places_.size());
      places_.push_back({-1, -1});
      const double sign = cap.side == CorrelationCap::Side::Upper ? 1 : -1;
      slacks_.push_back({{{block.off, sign}, {unknown(i, j), -sign}}, 0, Origin::Cap, f, sign, 1});
    }
    caps_.push_back(block);
  }
}

void BarrierModel::add_coefficients() {
  for (int k = 0; k < size_; ++k) {
    const int at = index_(size_, k);
    if (at < 0) continue;
    const double h = set_.half_width(taking_part_[k]) / scale_(k) / distance_unit_;
    if (h <= 1e-13)
      fixed_coefficients_.push_back(at);
    else
      add_range({{at, 1}}, {-h, h}, 1e-300, Origin::Box, k);
  }
  for (int f = 0; f < static_cast<int>(set_.coefficient_facts.size()); ++f) {
    const CoefficientFact& fact = set_.coefficient_facts[f];
    std::vector<std::pair<int, double>> cells;
    double at_centre = 0, natural = 0;
    bool mine = true;
    for (int j = 0; j < set_.size(); ++j) {
      if (fact.a(j) == 0) continue;
      const auto found = std::find(taking_part_.begin(), taking_part_.end(), j);
      const int k = static_cast<int>(found - taking_part_.begin());
      if (found == taking_part_.end() || index_(size_, k) < 0) {
        mine = false;
        break;
      }
      cells.push_back({index_(size_, k), fact.a(j) * scale_(k) * distance_unit_});
      at_centre += fact.a(j) * set_.centre(j);
      natural += std::fabs(fact.a(j)) * set_.half_width(j);
    }
    if (!mine || cells.empty() || natural == 0) continue;
    add_range(cells, {fact.value.low - at_centre, fact.value.high - at_centre}, natural,
              Origin::CoefficientFact, f);
  }
}

void BarrierModel::find_directions() {
  const int n = unknowns();
  start_ = Eigen::VectorXd::Zero(n);
  for (int k = 0; k < size_; ++k) start_(unknown(k, k)) = 1;
  // The middle of every fact about one unknown, and of helpers what they help.
  for (const Slack& slack : slacks_)
    if (slack.cells.size() == 1 && slack.origin == Origin::Fact) {
      const Interval& value = facts_.facts[slack.index].value;
      const double weight = -slack.sign * slack.cells[0].second * slack.unit;
      if (std::isfinite(value.low) && std::isfinite(value.high))
        start_(slack.cells[0].first) = value.middle() / weight;
    }
  // Exact facts about one unknown fix it; the others restrict directions.
  std::vector<bool> fixed(n, false);
  if (border_unknown_ >= 0) fixed[border_unknown_] = true;
  for (const int at : fixed_coefficients_) fixed[at] = true;
  std::vector<int> combined;
  for (int e = 0; e < static_cast<int>(equalities_.size()); ++e) {
    const Equality& equality = equalities_[e];
    if (equality.cells.size() == 1 && !fixed[equality.cells[0].first]) {
      fixed[equality.cells[0].first] = true;
      start_(equality.cells[0].first) = equality.value / equality.cells[0].second;
    } else {
      combined.push_back(e);
    }
  }
  for (int k = 0; k < n; ++k)
    if (!fixed[k]) direction_units_.push_back(k);
  const int free = static_cast<int>(direction_units_.size());
  equality_gap_ = Eigen::VectorXd::Zero(equalities_.size());
  if (!combined.empty()) {
    const int rows = static_cast<int>(combined.size());
    Eigen::MatrixXd E = Eigen::MatrixXd::Zero(rows, free);
    Eigen::VectorXd gap(rows);
    for (int e = 0; e < rows; ++e) {
      const Equality& equality = equalities_[combined[e]];
      double size = 0, now = 0;
      for (const auto& [at, weight] : equality.cells) size = std::max(size, std::fabs(weight));
      for (const auto& [at, weight] : equality.cells) {
        now += weight * start_(at) / size;
        const auto found = std::lower_bound(direction_units_.begin(), direction_units_.end(), at);
        if (found != direction_units_.end() && *found == at)
          E(e, found - direction_units_.begin()) += weight / size;
      }
      gap(e) = equality.value / size - now;
    }
    if (free > 0) {
      Eigen::CompleteOrthogonalDecomposition<Eigen::MatrixXd> solver(E);
      const Eigen::VectorXd move = solver.solve(gap);
      for (int k = 0; k < free; ++k) start_(direction_units_[k]) += move(k);
      gap -= E * move;
      Eigen::ColPivHouseholderQR<Eigen::MatrixXd> qr(E.transpose());
      qr.setThreshold(1e-12);
      const Eigen::MatrixXd Q = qr.householderQ();
      const int rank = static_cast<int>(qr.rank());
      directions_ = Eigen::MatrixXd::Zero(n, free - rank);
      for (int k = 0; k < free; ++k) directions_.row(direction_units_[k]) = Q.row(k).tail(free - rank);
    } else {
      directions_ = Eigen::MatrixXd::Zero(n, 0);
    }
    equality_residual_ = gap.cwiseAbs().maxCoeff();
    direction_units_.clear();
    for (int e = 0; e < rows; ++e) equality_gap_(combined[e]) = gap(e);
  } else {
    directions_ = Eigen::MatrixXd::Zero(n, free);
    for (int k = 0; k < free; ++k) directions_(direction_units_[k], k) = 1;
  }
  for (const CapBlock& cap : caps_)
    if (places_[cap.off].i < 0) {
      const CorrelationCap& fact = facts_.caps[cap.index];
      const auto at = [&](int j) {
        return static_cast<int>(std::find(taking_part_.begin(), taking_part_.end(), j) -
                                taking_part_.begin());
      };
      const double sign = fact.side == CorrelationCap::Side::Upper ? 1 : -1;
      const double most = cap.limit * std::sqrt(std::max(0.0, start_(cap.first) * start_(cap.second)));
      const double now = start_(unknown(at(fact.i), at(fact.j)));
      start_(cap.off) = sign * std::min(most, (sign * now + most) / 2);
    }
}

}  // namespace rejoinder
