// The part of BarrierModel that evaluates: the barrier and its derivatives.
#include <algorithm>
#include <cmath>

#include "core/convex/barrier_matrices.h"
#include "core/convex/barrier_model.h"

namespace rejoinder {

using block::curvature;
using block::inverse;
using block::root_of_inverse;
using block::slope;
namespace {

double log_determinant(const Eigen::MatrixXd& Z) {
  const Eigen::LLT<Eigen::MatrixXd> llt(Z);
  if (llt.info() != Eigen::Success) return -kInfinity;
  double sum = 0;
  for (int i = 0; i < Z.rows(); ++i) {
    const double pivot = llt.matrixLLT()(i, i);
    if (!(pivot > 0)) return -kInfinity;
    sum += std::log(pivot);
  }
  return 2 * sum;
}

}  // namespace

double BarrierModel::complexity(bool with_border) const {
  return size_ + 2.0 * caps_.size() + slacks_.size() + (with_border ? rows_ + 1 : 0);
}

Eigen::MatrixXd BarrierModel::shifted(const Eigen::VectorXd& x, double tau) const {
  Eigen::MatrixXd V(size_, size_);
  for (int i = 0; i < size_; ++i)
    for (int j = 0; j <= i; ++j) V(i, j) = V(j, i) = x(index_(i, j)) + (i == j ? tau : 0);
  return V;
}

Eigen::MatrixXd BarrierModel::border(const Eigen::VectorXd& x, double tau,
                                     const Eigen::VectorXd& offset) const {
  Eigen::MatrixXd Z(rows_ + 1, rows_ + 1);
  Z.topLeftCorner(rows_, rows_) = R_ * shifted(x, tau) * R_.transpose();
  Eigen::VectorXd d = offset;
  for (int j = 0; j < size_; ++j)
    if (index_(size_, j) >= 0) d += R_.col(j) * x(index_(size_, j));
  Z.col(rows_).head(rows_) = d;
  Z.row(rows_).head(rows_) = d.transpose();
  Z(rows_, rows_) = x(border_unknown_);
  return Z;
}

Eigen::Matrix2d BarrierModel::cap_matrix(const CapBlock& cap, const Eigen::VectorXd& x, double tau) const {
  Eigen::Matrix2d Z;
  Z << cap.limit * x(cap.first) + tau, x(cap.off), x(cap.off), cap.limit * x(cap.second) + tau;
  return Z;
}

double BarrierModel::slack_value(const Slack& slack, const Eigen::VectorXd& x, double tau) const {
  double value = slack.constant + tau;
  for (const auto& [at, weight] : slack.cells) value += weight * x(at);
  return value;
}

double BarrierModel::least_tau(const Eigen::VectorXd& x) const {
  double tau = -kInfinity;
  if (size_ > 0)
    tau = -Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd>(shifted(x, 0), Eigen::EigenvaluesOnly)
               .eigenvalues()(0);
  for (const CapBlock& cap : caps_) {
    const Eigen::Matrix2d Z = cap_matrix(cap, x, 0);
    const double half = (Z(0, 0) - Z(1, 1)) / 2;
    tau = std::max(tau, std::hypot(half, Z(0, 1)) - (Z(0, 0) + Z(1, 1)) / 2);
  }
  for (const Slack& slack : slacks_) tau = std::max(tau, -slack_value(slack, x, 0));
  return tau;
}

double BarrierModel::scaled_wald(const Eigen::VectorXd& x, double tau) const {
  const Eigen::MatrixXd Z = border(x, tau, offset_);
  const Eigen::VectorXd d = Z.col(rows_).head(rows_);
  return d.dot(Eigen::LDLT<Eigen::MatrixXd>(Z.topLeftCorner(rows_, rows_)).solve(d));
}

double BarrierModel::barrier(const Eigen::VectorXd& x, double tau, bool with_border) const {
  double value = -log_determinant(shifted(x, tau));
  if (with_border) value -= log_determinant(border(x, tau, offset_));
  for (const CapBlock& cap : caps_) {
    const Eigen::Matrix2d Z = cap_matrix(cap, x, tau);
    const double determinant = Z(0, 0) * Z(1, 1) - Z(0, 1) * Z(0, 1);
    if (!(Z(0, 0) > 0) || !(determinant > 0)) return kInfinity;
    value -= std::log(determinant);
  }
  for (const Slack& slack : slacks_) {
    const double s = slack_value(slack, x, tau);
    if (!(s > 0)) return kInfinity;
    value -= std::log(s);
  }
  return std::isnan(value) ? kInfinity : value;
}

void BarrierModel::derivatives(const Eigen::VectorXd& x, double tau, bool with_border,
                               Eigen::VectorXd& gradient, Eigen::MatrixXd& hessian) const {
  const int n = unknowns();
  gradient = Eigen::VectorXd::Zero(n + 1);
  hessian = Eigen::MatrixXd::Zero(n + 1, n + 1);
  const Eigen::MatrixXd P = inverse(shifted(x, tau)), PP = P * P;
  // The bordered block pulled back to X: Q = [R 0; 0 1]' Z^-1 [R 0; 0 1].
  Eigen::MatrixXd Q;
  if (with_border) {
    Eigen::MatrixXd T = Eigen::MatrixXd::Zero(rows_ + 1, size_ + 1);
    T.topLeftCorner(rows_, size_) = R_;
    T(rows_, size_) = 1;
    Q = T.transpose() * inverse(border(x, tau, offset_)) * T;
  }
  Eigen::MatrixXd QQ;  // against tau: Q (I without the border) Q
  if (with_border) QQ = Q.leftCols(size_) * Q.topRows(size_);
  for (int u = 0; u < n; ++u) {
    const auto [i, j] = places_[u];
    if (i < 0) continue;
    const bool in_V = i < size_;
    if (in_V) {
      gradient(u) += slope(P, i, j);
      hessian(u, n) -= slope(PP, i, j);
    }
    if (with_border) {
      gradient(u) += slope(Q, i, j);
      hessian(u, n) -= slope(QQ, i, j);
    }
    for (int v = 0; v <= u; ++v) {
      const auto [k, l] = places_[v];
      if (k < 0) continue;
      double sum = 0;
      if (in_V && k < size_) sum += curvature(P, i, j, k, l);
      if (with_border) sum += curvature(Q, i, j, k, l);
      hessian(u, v) += sum;
    }
  }
  gradient(n) -= P.trace();
  hessian(n, n) += P.squaredNorm();
  if (with_border) {
    gradient(n) -= Q.topLeftCorner(size_, size_).trace();
    hessian(n, n) += Q.topLeftCorner(size_, size_).squaredNorm();
  }
  for (const CapBlock& cap : caps_) {
    // The same inverse as the multipliers use: near the edge two ways to invert differ in the sixth digit.
    const Eigen::Matrix2d Z = inverse(cap_matrix(cap, x, tau));
    Eigen::Matrix2d along[4];
    along[0] << cap.limit, 0, 0, 0;
    along[1] << 0, 0, 0, cap.limit;
    along[2] << 0, 1, 1, 0;
    along[3].setIdentity();
    const int at[4] = {cap.first, cap.second, cap.off, n};
    for (int a = 0; a < 4; ++a) {
      const Eigen::Matrix2d ZA = Z * along[a];
      gradient(at[a]) -= ZA.trace();
      for (int b = 0; b < 4; ++b) {
        // Only the half below the diagonal is kept, and the tau column.
        if (at[b] > at[a] && at[b] != n) continue;
        if (at[a] == n && at[b] != n) continue;
        hessian(at[a], at[b]) += (ZA * Z * along[b]).trace();
      }
    }
  }
  for (const Slack& slack : slacks_) {
    const double s = slack_value(slack, x, tau), one = 1 / s, two = one * one;
    for (const auto& [at, weight] : slack.cells) {
      gradient(at) -= weight * one;
      hessian(at, n) += weight * two;
      for (const auto& [other, other_weight] : slack.cells)
        if (other <= at) hessian(at, other) += weight * other_weight * two;
    }
    gradient(n) -= one;
    hessian(n, n) += two;
  }
  for (int u = 0; u < n; ++u) {
    for (int v = 0; v < u; ++v) hessian(v, u) = hessian(u, v);
    hessian(n, u) = hessian(u, n);
  }
}

Eigen::MatrixXd BarrierModel::hessian_root(const Eigen::VectorXd& x, double tau, bool with_border) const {
  const int n = unknowns();
  const auto packed = [](int order) { return order * (order + 1) / 2; };
  const int rows = packed(size_) + (with_border ? packed(rows_ + 1) : 0) +
                   3 * static_cast<int>(caps_.size()) + static_cast<int>(slacks_.size());
  Eigen::MatrixXd J = Eigen::MatrixXd::Zero(rows, n + 1);
  int at = 0;
  // A change B of a matrix with inverse W'W weighs |W B W'|^2: one row an entry, those off the diagonal sqrt
  // 2 fold.
  const auto put = [&](const Eigen::MatrixXd& change, int column) {
    int row = at;
    for (int i = 0; i < change.rows(); ++i)
      for (int j = 0; j <= i; ++j) J(row++, column) += i == j ? change(i, i) : std::sqrt(2.0) * change(i, j);
  };
  const auto along = [](const Eigen::MatrixXd& W, int i, int j) -> Eigen::MatrixXd {
    const Eigen::MatrixXd half = W.col(i) * W.col(j).transpose();
    if (i == j) return half;
    return half + half.transpose();
  };
  const Eigen::MatrixXd W = root_of_inverse(shifted(x, tau));
  for (int u = 0; u < n; ++u)
    if (places_[u].i >= 0 && places_[u].i < size_) put(along(W, places_[u].i, places_[u].j), u);
  put(W * W.transpose(), n);
  at += packed(size_);
  if (with_border) {
    Eigen::MatrixXd T = Eigen::MatrixXd::Zero(rows_ + 1, size_ + 1);
    T.topLeftCorner(rows_, size_) = R_;
    T(rows_, size_) = 1;
    const Eigen::MatrixXd WT = root_of_inverse(border(x, tau, offset_)) * T;
    for (int u = 0; u < n; ++u)
      if (places_[u].i >= 0) put(along(WT, places_[u].i, places_[u].j), u);
    put(WT.leftCols(size_) * WT.leftCols(size_).transpose(), n);
    at += packed(rows_ + 1);
  }
  for (const CapBlock& cap : caps_) {
    const Eigen::MatrixXd C = root_of_inverse(cap_matrix(cap, x, tau));
    put(cap.limit * along(C, 0, 0), cap.first);
    put(cap.limit * along(C, 1, 1), cap.second);
    put(along(C, 0, 1), cap.off);
    put(C * C.transpose(), n);
    at += 3;
  }
  for (const Slack& slack : slacks_) {
    const double s = slack_value(slack, x, tau);
    for (const auto& [unknown, weight] : slack.cells) J(at, unknown) += weight / s;
    J(at, n) += 1 / s;
    ++at;
  }
  return J;
}

}  // namespace rejoinder
