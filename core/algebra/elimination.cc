#include "core/algebra/elimination.h"

#include <cmath>

namespace rejoinder {
namespace {

constexpr double kTolerance = 1e-10;

}  // namespace

Elimination eliminate(const Eigen::MatrixXd& rows, const Eigen::VectorXd& values) {
  const Eigen::Index m = rows.rows(), p = rows.cols();
  Eigen::VectorXd column_scale = Eigen::VectorXd::Ones(p);
  for (Eigen::Index j = 0; j < p; ++j)
    if (const double size = rows.col(j).cwiseAbs().maxCoeff(); size > 0) column_scale[j] = 1 / size;

  Elimination result;
  // basis holds orthonormal rows; makeup writes each of them as a combination of the kept, scaled rows.
  const Eigen::Index most = std::min(m, p);
  Eigen::MatrixXd basis(most, p), makeup = Eigen::MatrixXd::Zero(most, most);
  Eigen::VectorXd kept_values(most);
  Eigen::Index count = 0;
  for (Eigen::Index i = 0; i < m; ++i) {
    Eigen::RowVectorXd row = rows.row(i).cwiseProduct(column_scale.transpose());
    const double size = row.norm();
    if (size == 0) {
      if (values[i] == 0) {
        result.implied.push_back(static_cast<int>(i));
        continue;
      }
      result.clash = Clash{static_cast<int>(i), {}};
      return result;
    }
    row /= size;
    const double value = values[i] / size;
    Eigen::VectorXd shares = Eigen::VectorXd::Zero(count);
    for (int pass = 0; pass < 2; ++pass)
      for (Eigen::Index k = 0; k < count; ++k) {
        const double share = basis.row(k).dot(row);
        row -= share * basis.row(k);
        shares[k] += share;
      }
    const double left = row.norm();
    const Eigen::RowVectorXd combination = shares.transpose() * makeup.topLeftCorner(count, count);
    if (left > kTolerance) {
      basis.row(count) = row / left;
      makeup.row(count).head(count) = -combination / left;
      makeup(count, count) = 1 / left;
      kept_values[count++] = value;
      result.kept.push_back(static_cast<int>(i));
      continue;
    }
    // The row is a combination of kept rows, so its value must be the same combination of theirs. Kept rows
    // are independent: the combination is the only one, and the rows with a share in it are the fewest that
    // clash.
    const Eigen::VectorXd parts = combination.transpose().cwiseProduct(kept_values.head(count));
    if (std::fabs(value - parts.sum()) <= kTolerance * (std::fabs(value) + parts.cwiseAbs().sum())) {
      result.implied.push_back(static_cast<int>(i));
      continue;
    }
    Clash clash{static_cast<int>(i), {}};
    const double greatest = combination.cwiseAbs().maxCoeff();
    for (Eigen::Index k = 0; k < count; ++k)
      if (std::fabs(combination[k]) > 1e-9 * greatest) clash.with.push_back(result.kept[k]);
    result.clash = clash;
    return result;
  }
  return result;
}

}  // namespace rejoinder
