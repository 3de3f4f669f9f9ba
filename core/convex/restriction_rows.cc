#include "core/convex/restriction_rows.h"

#include <cmath>

namespace rejoinder {

namespace {

bool full_rank(Eigen::MatrixXd rows) {
  for (int i = 0; i < rows.rows(); ++i) {
    const double size = rows.row(i).norm();
    if (!(size > 0)) return false;
    rows.row(i) /= size;
  }
  Eigen::ColPivHouseholderQR<Eigen::MatrixXd> qr(rows.transpose());
  qr.setThreshold(1e-10);
  return qr.rank() == rows.rows();
}

}  // namespace

bool independent_rows(const AdmissibleSet& set, const Eigen::MatrixXd& R) {
  if (R.rows() == 0 || R.rows() > R.cols()) return false;
  if (full_rank(R)) return true;
  Eigen::MatrixXd scaled = R;
  for (int j = 0; j < R.cols(); ++j)
    if (std::isfinite(set.se_high(j)) && set.se_high(j) > 0) scaled.col(j) *= set.se_high(j);
  return full_rank(scaled);
}

}  // namespace rejoinder
