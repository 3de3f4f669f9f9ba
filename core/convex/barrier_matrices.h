// Small matrix functions shared by the parts of BarrierModel. The multipliers must use the same inverse as
// the Hessian: near the edge of the set two ways to invert differ in the sixth digit, and the dual equations
// would show it.
#pragma once

#include <Eigen/Dense>

namespace rejoinder::block {

// W with W'W = Z^-1: the inverse of the Cholesky factor.
inline Eigen::MatrixXd root_of_inverse(const Eigen::MatrixXd& Z) {
  const Eigen::LLT<Eigen::MatrixXd> llt(Z);
  return llt.matrixL().solve(Eigen::MatrixXd::Identity(Z.rows(), Z.rows()));
}

// As W'W: symmetric and without negative eigenvalue however near the matrix
// is to singular, so that the Hessian made of it stays positive.
inline Eigen::MatrixXd inverse(const Eigen::MatrixXd& Z) {
  const Eigen::MatrixXd W = root_of_inverse(Z);
  return W.transpose() * W;
}

// First and second derivative of -log det along entries (i, j) and (k, l) of the matrix whose inverse is P.
inline double slope(const Eigen::MatrixXd& P, int i, int j) { return i == j ? -P(i, i) : -2 * P(i, j); }
inline double curvature(const Eigen::MatrixXd& P, int i, int j, int k, int l) {
  const double weight = (i == j ? 1 : 2) * (k == l ? 1 : 2) / 2.0;
  return weight * (P(i, k) * P(j, l) + P(i, l) * P(j, k));
}

}  // namespace rejoinder::block
