#include "core/convex/restriction_rows.h"

#include <cmath>

namespace rejoinder {

bool independent_rows(const AdmissibleSet& set, const Eigen::MatrixXd& R) {
  const int q = static_cast<int>(R.rows()), p = static_cast<int>(R.cols());
  if (q == 0 || q > p) return false;
  Eigen::MatrixXd scaled = R;
  for (int j = 0; j < p; ++j)
    if (std::isfinite(set.se_high(j)) && set.se_high(j) > 0) scaled.col(j) *= set.se_high(j);
  for (int i = 0; i < q; ++i) {
    const double size = scaled.row(i).norm();
    if (!(size > 0)) return false;
    scaled.row(i) /= size;
  }
  Eigen::ColPivHouseholderQR<Eigen::MatrixXd> qr(scaled.transpose());
  qr.setThreshold(1e-10);
  return qr.rank() == q;
}

}  // namespace rejoinder
