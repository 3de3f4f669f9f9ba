#include "core/convex/barrier.h"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numeric>
#include <vector>

namespace rejoinder {
namespace {

constexpr int kStepLimit = 300;    // a phase
constexpr double kCentred = 1e-2;  // squared Newton decrement
constexpr double kGrowth = 12;
constexpr double kGap = 1e-10;      // relative
constexpr double kTinyGap = 1e-14;  // in the scaled units, where values are of order one

// Newton direction: Cholesky after rows and columns are brought to unit diagonal. False when rounding has
// left the matrix not positive.
bool newton(const Eigen::MatrixXd& hessian, const Eigen::VectorXd& gradient, Eigen::VectorXd& step) {
  const Eigen::VectorXd scale = hessian.diagonal().cwiseAbs().cwiseMax(1e-300).cwiseSqrt().cwiseInverse();
  const Eigen::MatrixXd H = scale.asDiagonal() * hessian * scale.asDiagonal();
  const Eigen::VectorXd g = scale.cwiseProduct(gradient);
  const Eigen::LLT<Eigen::MatrixXd> llt(H);
  if (llt.info() != Eigen::Success) return false;
  step = llt.solve(-g);
  step += llt.solve(-g - H * step);
  step = scale.cwiseProduct(step);
  return step.allFinite();
}

// The same from J with J'J the Hessian, by QR: half as many digits are lost. Large rows come first, which
// keeps the small ones accurate (Cox and Higham 1998, BIT 38; from memory).
bool newton_by_root(const Eigen::MatrixXd& J, const Eigen::VectorXd& gradient, Eigen::VectorXd& step) {
  const Eigen::VectorXd scale = J.colwise().norm().transpose().cwiseMax(1e-300).cwiseInverse();
  Eigen::MatrixXd sorted(J.rows(), J.cols());
  std::vector<int> order(J.rows());
  std::iota(order.begin(), order.end(), 0);
  const Eigen::VectorXd size = (J * scale.asDiagonal()).rowwise().norm();
  std::sort(order.begin(), order.end(), [&](int i, int j) { return size(i) > size(j); });
  for (int i = 0; i < J.rows(); ++i) sorted.row(i) = J.row(order[i]) * scale.asDiagonal();
  const Eigen::ColPivHouseholderQR<Eigen::MatrixXd> qr(sorted);
  const int n = static_cast<int>(J.cols());
  if (J.rows() < n) return false;
  const Eigen::MatrixXd R = qr.matrixR().topLeftCorner(n, n).triangularView<Eigen::Upper>();
  if (!(R.diagonal().cwiseAbs().minCoeff() > 0)) return false;
  const auto solve = [&](const Eigen::VectorXd& right) -> Eigen::VectorXd {
    Eigen::VectorXd y = qr.colsPermutation().transpose() * right;
    R.transpose().triangularView<Eigen::Lower>().solveInPlace(y);
    R.triangularView<Eigen::Upper>().solveInPlace(y);
    return qr.colsPermutation() * y;
  };
  const Eigen::VectorXd g = scale.cwiseProduct(gradient);
  step = solve(-g);
  step += solve(-g - sorted.transpose() * (sorted * step));
  step = scale.cwiseProduct(step);
  return step.allFinite();
}

}  // namespace

Barrier::Barrier(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r)
    : set_(set), facts_(convex_facts(set)), R_(R), r_(r), wald_(true) {
  begin();
}

Barrier::Barrier(const AdmissibleSet& set)
    : set_(set), facts_(convex_facts(set)), R_(0, set.size()), r_(0), guaranteed_(-kInfinity) {
  begin();
}

Barrier::~Barrier() = default;

void Barrier::begin() {
  model_ = std::make_unique<BarrierModel>(set_, facts_, R_, r_);
  weights_ = Eigen::VectorXd::Zero(R_.rows());
  if (facts_.empty) {  // two ranges of one correlation: nothing to prove by multipliers, the ranges show it
    state_ = State::NoCovariance;
    return;
  }
  if (wald_ && !model_->bordered()) {  // every combination of the rows involves something unknown
    x_ = model_->start();
    state_ = State::Settled;
    return;
  }
  x_ = model_->start();
  objective_ = Eigen::VectorXd::Zero(model_->unknowns());
  if (model_->equality_residual() > 1e-8) {
    multipliers_ = model_->equality_proof();
    state_ = proves_no_covariance(facts_, multipliers_)                     ? State::NoCovariance
             : proves_no_coefficients(set_, multipliers_.coefficient_facts) ? State::NoCoefficients
                                                                            : State::Stopped;
    return;
  }
  const double needed = model_->least_tau(x_);
  if (needed < -0.02) {
    leave_first_phase();
  } else {
    tau_ = needed + 0.5;
    kappa_ = 1;
  }
}

void Barrier::leave_first_phase() {
  steps_here_ = 0;
  stalled_ = 0;
  tau_ = std::max(0.0, tau_);
  interior_ = x_;
  has_interior_ = true;
  if (!wald_) {
    state_ = State::Settled;
    return;
  }
  const double w = model_->scaled_wald(x_, tau_);
  x_(model_->border_unknown()) = 1.1 * w + 1;
  objective_(model_->border_unknown()) = 1;
  unit_ = model_->wald_unit();
  kappa_ = std::min(10.0, model_->complexity(true) / (w + 1));
  state_ = State::Descending;
}

void Barrier::aim_at(const Eigen::MatrixXd& T) {
  assert(!wald_ && has_interior_);
  T_ = T;
  x_ = interior_;
  objective_ = model_->functional(T, unit_);
  guaranteed_ = -kInfinity;
  steps_here_ = 0;
  stalled_ = 0;
  kappa_ = 1;
  state_ = State::Descending;
  if (unit_ == 0) {
    guaranteed_ = 0;
    state_ = State::Settled;
  }
}

double Barrier::objective_value() const { return objective_.dot(x_); }

double Barrier::attained() const {
  if (!wald_) return objective_value() * unit_;
  if (!model_->bordered()) return 0;
  if (!has_interior_) return kInfinity;
  return std::max(0.0, model_->scaled_wald(x_, tau_)) * model_->wald_unit();
}

Eigen::VectorXd Barrier::coefficients() const { return model_->coefficients(x_); }
Eigen::MatrixXd Barrier::covariance() const { return model_->covariance(x_); }

void Barrier::run() {
  while (!done()) step();
}

void Barrier::step() {
  if (done()) return;
  const bool first = state_ == State::FindingInterior;
  const int n = model_->unknowns();
  ++steps_;
  if (++steps_here_ > kStepLimit) {
    if (first)
      leave_first_phase();
    else
      state_ = State::Stopped;
    return;
  }
  Eigen::VectorXd gradient;
  Eigen::MatrixXd hessian;
  model_->derivatives(x_, tau_, with_border(), gradient, hessian);
  gradient.head(n) += kappa_ * (first ? Eigen::VectorXd::Zero(n) : objective_);
  if (first) gradient(n) += kappa_;

  // The directions in use: those that keep the exact facts, then w or tau.
  const Eigen::MatrixXd& directions = model_->directions();
  const int free = static_cast<int>(directions.cols());
  const bool extra = first || with_border();
  const int last = first ? n : model_->border_unknown();
  const int size = free + (extra ? 1 : 0);
  Eigen::VectorXd g(size), step_taken;
  Eigen::MatrixXd H(size, size);
  if (model_->directions_are_units()) {
    std::vector<int> at = model_->direction_units();
    if (extra) at.push_back(last);
    for (int i = 0; i < size; ++i) {
      g(i) = gradient(at[i]);
      for (int j = 0; j < size; ++j) H(i, j) = hessian(at[i], at[j]);
    }
  } else {
    Eigen::MatrixXd N = Eigen::MatrixXd::Zero(n + 1, size);
    N.topLeftCorner(n, free) = directions;
    if (extra) N(last, free) = 1;
    g = N.transpose() * gradient;
    H = N.transpose() * hessian * N;
  }
  if (!newton(H, g, step_taken)) {
    Eigen::MatrixXd used(n + 1, size);
    used.setZero();
    used.topLeftCorner(n, free) = directions;
    if (extra) used(last, free) = 1;
    if (!newton_by_root(model_->hessian_root(x_, tau_, with_border()) * used, g, step_taken))
      step_taken = Eigen::VectorXd::Zero(size);
  }
  const double decrement = -g.dot(step_taken);
  Eigen::VectorXd dx = directions * step_taken.head(free);
  double dtau = 0;
  if (extra) (first ? dtau : dx(last)) += step_taken(free);

  const double before =
      model_->barrier(x_, tau_, with_border()) + kappa_ * (first ? tau_ : objective_value());
  double length = 1;
  if (!(decrement < kCentred)) {
    // Backtrack until inside and lower; the first length comes from the self-concordant bound.
    for (int halving = 0;; ++halving) {
      const Eigen::VectorXd x = x_ + length * dx;
      const double tau = tau_ + length * dtau;
      const double after =
          model_->barrier(x, tau, with_border()) + kappa_ * (first ? tau : objective_.dot(x));
      if (after <= before - 0.1 * length * decrement + 1e-13 * std::fabs(before)) break;
      length /= 2;
      if (halving > 40) {
        length = 0;
        break;
      }
    }
    if (length == 0 && ++stalled_ < 2) {
      centred(dx, dtau);  // rounding has the upper hand here; take what the multipliers give and go on
      kappa_ *= kGrowth;
      return;
    }
    if (length == 0) {
      if (first)
        leave_first_phase();
      else
        state_ = State::Settled;
      return;
    }
    x_ += length * dx;
    tau_ += length * dtau;
    if (first && tau_ < -0.02) leave_first_phase();
    return;
  }

  centred(dx, dtau);
  if (done()) return;
  const Eigen::VectorXd x = x_ + dx;
  if (std::isfinite(model_->barrier(x, tau_ + dtau, with_border()))) {
    x_ = x;
    tau_ += dtau;
  }
  const double gap = model_->complexity(with_border()) / kappa_;
  if (first) {
    if (tau_ < -0.02 || (tau_ < 0 && gap < 2 * std::fabs(tau_))) {
      leave_first_phase();
    } else if (gap < 1e-11) {
      // Neither room nor proof: the set touches the edge. A little is added to make room.
      tau_ = std::max(0.0, tau_) + 1e-10;
      leave_first_phase();
    } else {
      kappa_ *= kGrowth;
    }
    return;
  }
  if (gap <= std::max(kGap * std::fabs(objective_value()) / 2, kTinyGap)) {
    state_ = State::Settled;
    return;
  }
  kappa_ *= kGrowth;
}

void Barrier::centred(const Eigen::VectorXd& dx, double dtau) {
  const BarrierModel::Dual dual =
      model_->dual(x_, tau_, dx, dtau, kappa_, with_border(),
                   state_ == State::Descending ? objective_ : Eigen::VectorXd::Zero(x_.size()));
  if (state_ == State::FindingInterior) {
    if (tau_ <= 0) return;
    if (proves_no_covariance(facts_, dual.multipliers)) {
      state_ = State::NoCovariance;
      multipliers_ = dual.multipliers;
    } else if (!set_.coefficient_facts.empty() &&
               proves_no_coefficients(set_, dual.multipliers.coefficient_facts)) {
      state_ = State::NoCoefficients;
      multipliers_ = dual.multipliers;
    }
    return;
  }
  if (wald_) {
    const double limit = guaranteed_wald(set_, R_, r_, dual.c, dual.multipliers);
    if (limit > guaranteed_ || multipliers_.facts.size() == 0) {
      guaranteed_ = std::max(guaranteed_, limit);
      weights_ = dual.c;
      multipliers_ = dual.multipliers;
    }
    return;
  }
  Multipliers scaled = dual.multipliers;
  scaled.facts *= unit_;
  for (Eigen::Matrix2d& L : scaled.caps) L *= unit_;
  const double limit = -greatest_of(facts_, -T_, scaled);
  if (limit > guaranteed_) {
    guaranteed_ = limit;
    multipliers_ = scaled;
  }
}

}  // namespace rejoinder
