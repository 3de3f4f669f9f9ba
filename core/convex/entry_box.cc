#include "core/convex/entry_box.h"

#include <algorithm>
#include <cassert>
#include <cmath>

#include "core/convex/convex_facts.h"

namespace rejoinder {
namespace {

constexpr double kOutward = 4e-16;

void narrow(Interval& entry, double low, double high) {
  entry.low = std::max(entry.low, low - kOutward * std::fabs(low));
  entry.high = std::min(entry.high, high + kOutward * std::fabs(high));
}

// d'S^-1 d for S scaled to unit diagonal; false when S is not positive definite.
bool definite_wald(Eigen::MatrixXd S, Eigen::MatrixXd& d, double& wald) {
  const int q = static_cast<int>(S.rows());
  for (int i = 0; i < q; ++i) {
    if (!(S(i, i) > 0)) return false;
    const double unit = 1 / std::sqrt(S(i, i));
    S.row(i) *= unit;
    S.col(i) *= unit;
    d.row(i) *= unit;
  }
  // A cheap test first: pivots well above the threshold need no eigenvalues.
  const Eigen::LLT<Eigen::MatrixXd> llt(S);
  if (llt.info() != Eigen::Success) return false;
  double least = 1;
  for (int i = 0; i < q; ++i) least = std::min(least, llt.matrixLLT()(i, i));
  if (least < 1e-4) {
    const Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd> parts(S, Eigen::EigenvaluesOnly);
    if (parts.eigenvalues()(0) <= 1e-12 * q) return false;
  }
  wald = 0;
  for (int k = 0; k < d.cols(); ++k) wald = std::max(wald, llt.matrixL().solve(d.col(k)).squaredNorm());
  return true;
}

}  // namespace

EntryBox entry_box(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  EntryBox box;
  for (int j = 0; j < set.size(); ++j)
    if (!R.col(j).isZero(0)) box.columns.push_back(j);
  const int m = static_cast<int>(box.columns.size());
  box.r = r;
  box.R.resize(R.rows(), m);
  box.middle.resize(m, m);
  box.half.resize(m, m);
  box.b_middle.resize(m);
  box.b_half.resize(m);
  const Eigen::VectorXd scale = convex_facts(set).scale;
  for (int x = 0; x < m; ++x) {
    const int i = box.columns[x];
    box.R.col(x) = R.col(i);
    box.b_middle(x) = set.centre(i);
    box.b_half(x) = set.half_width(i);
    Interval own = set.variance(i);
    own.high = std::min(own.high, step_up(scale(i) * scale(i)));
    box.known = box.known && std::isfinite(own.high) && std::isfinite(box.b_half(x));
    box.middle(x, x) = own.middle();
    box.half(x, x) = own.half_width();
    for (int y = 0; y < x; ++y) {
      const int j = box.columns[y];
      Interval entry{-kInfinity, kInfinity};
      for (const PairInterval& fact : set.covariances)
        if ((fact.i == i && fact.j == j) || (fact.i == j && fact.j == i))
          narrow(entry, fact.value.low, fact.value.high);
      const CorrelationRange range = correlation_range(set, i, j);
      const double most = scale(i) * scale(j), least = set.se_low(i) * set.se_low(j);
      if (std::isfinite(most))
        narrow(entry, range.low * (range.low < 0 ? most : least),
               range.high * (range.high > 0 ? most : least));
      for (const CombinationVariance& fact : set.combination_variances) {
        int others = 0;
        for (int k = 0; k < set.size(); ++k) others += k != i && k != j && fact.a(k) != 0;
        const double twice = 2 * fact.a(i) * fact.a(j);
        if (others > 0 || twice == 0 || std::isinf(most)) continue;
        const double xx = fact.a(i) * fact.a(i), yy = fact.a(j) * fact.a(j);
        const Interval vi = set.variance(i), vj = set.variance(j);
        const double low =
            std::max(0.0, fact.value.low) - xx * scale(i) * scale(i) - yy * scale(j) * scale(j);
        const double high = fact.value.high - xx * vi.low - yy * vj.low;
        const double room =
            4 * kOutward * (xx * scale(i) * scale(i) + yy * scale(j) * scale(j)) / std::fabs(twice);
        narrow(entry, std::min(low / twice, high / twice) - room, std::max(low / twice, high / twice) + room);
      }
      if (!(std::isfinite(entry.low) && std::isfinite(entry.high))) {
        box.known = false;
        entry = {0, 0};
      }
      if (entry.low > entry.high)
        std::swap(entry.low, entry.high);  // empty: whoever looks for a point finds none
      box.middle(x, y) = box.middle(y, x) = entry.middle();
      box.half(x, y) = box.half(y, x) = entry.half_width();
    }
  }
  return box;
}

Corners sign_corners(const EntryBox& box) {
  const int m = static_cast<int>(box.columns.size());
  assert(m >= 1 && m <= 24);
  Corners corners;
  corners.all_definite = true;
  const Eigen::VectorXd d0 = box.R * box.b_middle - box.r;
  Eigen::VectorXd s = Eigen::VectorXd::Ones(m);
  Eigen::MatrixXd d(box.r.size(), 2);
  // V_s is the same for s and -s, so half the patterns do, each with both b.
  for (long pattern = 0; pattern < (1L << (m - 1)); ++pattern) {
    for (int j = 0; j < m - 1; ++j) s(j) = (pattern >> j) & 1 ? -1 : 1;
    const Eigen::MatrixXd V = box.middle - s.asDiagonal() * box.half * s.asDiagonal();
    const Eigen::VectorXd move = box.R * box.b_half.cwiseProduct(s);
    d.col(0) = d0 + move;
    d.col(1) = d0 - move;
    const Eigen::MatrixXd ends = d;
    double wald = 0;
    if (!definite_wald(box.R * V * box.R.transpose(), d, wald)) {
      corners.all_definite = false;
      corners.signs = s;
      corners.V = V;
      return corners;
    }
    if (wald <= corners.greatest && corners.signs.size() > 0) continue;
    corners.greatest = wald;
    const Eigen::MatrixXd S = box.R * V * box.R.transpose();
    const auto value = [&](int k) { return ends.col(k).dot(S.ldlt().solve(ends.col(k))); };
    corners.signs = value(0) >= value(1) ? s : Eigen::VectorXd(-s);
    corners.V = V;
  }
  return corners;
}

double cheap_greatest(const EntryBox& box) {
  if (!box.known) return kInfinity;
  const int m = static_cast<int>(box.columns.size());
  Eigen::VectorXd unit = box.middle.diagonal().cwiseMax(1e-300).cwiseSqrt();
  Eigen::MatrixXd E = box.half;
  for (int i = 0; i < m; ++i)
    for (int j = 0; j < m; ++j) E(i, j) /= unit(i) * unit(j);
  // A few rounds of the power method: any positive vector gives a valid bound.
  Eigen::VectorXd w = Eigen::VectorXd::Ones(m);
  for (int round = 0; round < 50; ++round) {
    w = (E * w + 1e-6 * E.maxCoeff() * w).eval();
    const double largest = w.maxCoeff();
    if (!(largest > 0)) w = Eigen::VectorXd::Ones(m);
    w /= w.maxCoeff();
    w = w.cwiseMax(1e-6);
  }
  Eigen::MatrixXd low = box.middle;
  const Eigen::VectorXd Ew = E * w;
  for (int i = 0; i < m; ++i) low(i, i) -= Ew(i) / w(i) * unit(i) * unit(i) * (1 + 1e-14);
  Eigen::MatrixXd S = box.R * low * box.R.transpose();
  Eigen::VectorXd d = box.R * box.b_middle - box.r;
  Eigen::MatrixXd steps = box.R * box.b_half.asDiagonal();
  for (int i = 0; i < S.rows(); ++i) {
    if (!(S(i, i) > 0)) return kInfinity;
    const double scale = 1 / std::sqrt(S(i, i));
    S.row(i) *= scale;
    S.col(i) *= scale;
    d(i) *= scale;
    steps.row(i) *= scale;
  }
  const Eigen::LLT<Eigen::MatrixXd> llt(S);
  const Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd> parts(S, Eigen::EigenvaluesOnly);
  if (llt.info() != Eigen::Success || parts.eigenvalues()(0) <= 1e-12 * S.rows()) return kInfinity;
  double length = llt.matrixL().solve(d).norm();
  for (int j = 0; j < m; ++j) length += llt.matrixL().solve(steps.col(j)).norm();
  return length * length * (1 + 1e-12 / parts.eigenvalues()(0));
}

}  // namespace rejoinder
