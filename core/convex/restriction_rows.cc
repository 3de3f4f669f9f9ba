#include "core/convex/restriction_rows.h"

#include <algorithm>
#include <cmath>
#include <numeric>
#include <vector>

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

std::optional<ReducedRows> reduced_rows(const Eigen::VectorXd& scale, const Eigen::MatrixXd& R,
                                        const Eigen::VectorXd& r) {
  const int q = static_cast<int>(R.rows()), p = static_cast<int>(R.cols());
  constexpr double kLargest = 1.0995e12;  // 2^40: products of two such rows' entries still cancel exactly
  Eigen::VectorXd size = Eigen::VectorXd::Zero(p);
  double least = kInfinity, most = 0;
  for (int j = 0; j < p; ++j) {
    if (R.col(j).isZero(0)) continue;
    if (!(scale(j) > 0) || std::isinf(scale(j))) continue;
    size(j) = scale(j);
    least = std::min(least, scale(j));
    most = std::max(most, scale(j));
  }
  if (q < 2 || !(most > 1000 * least) || R != R.array().round().matrix()) return std::nullopt;
  ReducedRows out{R, r, Eigen::MatrixXd::Identity(q, q)};
  std::vector<bool> done(q, false);
  for (int step = 0; step < q; ++step) {
    int row = -1, column = -1;
    double largest = 0;
    for (int i = 0; i < q; ++i)
      for (int j = 0; j < p; ++j)
        if (!done[i] && std::fabs(out.R(i, j)) * size(j) > largest) {
          largest = std::fabs(out.R(i, j)) * size(j);
          row = i;
          column = j;
        }
    if (row < 0) return std::nullopt;
    done[row] = true;
    for (int i = 0; i < q; ++i) {
      if (i == row || out.R(i, column) == 0) continue;
      const double own = out.R(row, column), other = out.R(i, column);
      out.R.row(i) = own * out.R.row(i) - other * out.R.row(row);
      out.r(i) = own * out.r(i) - other * out.r(row);
      out.mix.row(i) = own * out.mix.row(i) - other * out.mix.row(row);
      // The common factor of the whole row, mix included, keeps the integers small.
      long long common = 0;
      for (const auto* part : {&out.R, &out.mix})
        for (int j = 0; j < part->cols(); ++j) {
          if (std::fabs((*part)(i, j)) > kLargest) return std::nullopt;
          common = std::gcd(common, static_cast<long long>((*part)(i, j)));
        }
      if (common > 1 && (common & (common - 1)) == 0) {  // a power of two divides r exactly as well
        out.R.row(i) /= static_cast<double>(common);
        out.r(i) /= static_cast<double>(common);
        out.mix.row(i) /= static_cast<double>(common);
      }
    }
  }
  return out;
}

}  // namespace rejoinder
