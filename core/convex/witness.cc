#include "core/convex/witness.h"

#include <algorithm>
#include <cmath>
#include <numeric>

namespace rejoinder {

WaldWitness make_witness(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                         const Eigen::VectorXd& b, const Eigen::MatrixXd& V) {
  WaldWitness witness;
  witness.b = b;
  witness.V = (V + V.transpose()) / 2;
  witness.wald = wald_at(R, r, b, witness.V);
  witness.outside = distance_outside(set, b, witness.V);
  return witness;
}

double polygon_gap(const AdmissibleSet& set, const Eigen::VectorXd& a) {
  double gap = -kInfinity;
  for (int j = 0; j < a.size(); ++j) {
    double own = std::fabs(a(j)) * set.se_low(j);
    for (int i = 0; i < a.size(); ++i)
      if (i != j && a(i) != 0) own -= std::fabs(a(i)) * set.se_high(i);
    gap = std::max(gap, own);
  }
  return gap;
}

Eigen::MatrixXd covariance_without(const AdmissibleSet& set, const Eigen::VectorXd& a) {
  const int p = set.size();
  Eigen::VectorXd side(p), s(p);
  double known = 0;
  for (int j = 0; j < p; ++j)
    known = std::max(known, std::isfinite(set.se_high(j)) ? set.se_high(j) : set.se_low(j));
  for (int j = 0; j < p; ++j)
    s(j) = std::isfinite(set.se_high(j)) ? set.se_high(j) : std::max({set.se_low(j), known, 1e-100});
  side = a.cwiseAbs().cwiseProduct(s);
  std::vector<int> order(p);
  std::iota(order.begin(), order.end(), 0);
  std::sort(order.begin(), order.end(), [&](int i, int j) { return side(i) > side(j); });
  const int longest = order[0];
  if (side(longest) == 0) return {};
  // An unknown standard error can be as long as it takes; a known one as short as its interval lets it.
  double others = side.sum() - side(longest);
  if (side(longest) > others) {
    for (int j = 0; j < p && side(longest) > others; ++j) {
      if (j == longest || a(j) == 0 || std::isfinite(set.se_high(j))) continue;
      side(j) += side(longest) - others;
      others = side(longest);
      s(j) = side(j) / std::fabs(a(j));
    }
    if (side(longest) > others) {
      const double shortest = std::fabs(a(longest)) * set.se_low(longest);
      if (shortest > others * (1 + 1e-13)) return {};
      s(longest) = std::max(set.se_low(longest), others / std::fabs(a(longest)));
      side(longest) = others;
    }
  }
  // Three straight arms: the longest side, and the others shared out so that the two arms are nearly equal.
  std::vector<int> arm(p, 0);
  double length[3] = {side(longest), 0, 0};
  for (int place = 1; place < p; ++place) {
    const int j = order[place];
    arm[j] = length[1] <= length[2] ? 1 : 2;
    length[arm[j]] += side(j);
  }
  // Cosines between the arms from the triangle, each arm taken as a direction once round it.
  double cosine[3][3] = {{1, 0, 0}, {0, 1, 0}, {0, 0, 1}};
  for (int x = 0; x < 3; ++x)
    for (int y = 0; y < 3; ++y) {
      if (x == y) continue;
      const int z = 3 - x - y;
      const double product = 2 * length[x] * length[y];
      const double raw =
          product > 0 ? (length[z] * length[z] - length[x] * length[x] - length[y] * length[y]) / product : 0;
      cosine[x][y] = std::clamp(raw, -1.0, 1.0);
    }
  Eigen::MatrixXd V = Eigen::MatrixXd::Zero(p, p);
  for (int i = 0; i < p; ++i)
    for (int j = 0; j < p; ++j) {
      if (i == j)
        V(i, i) = s(i) * s(i);
      else if (a(i) != 0 && a(j) != 0)
        V(i, j) = (a(i) > 0) == (a(j) > 0) ? s(i) * s(j) * cosine[arm[i]][arm[j]]
                                           : -s(i) * s(j) * cosine[arm[i]][arm[j]];
    }
  return V;
}

}  // namespace rejoinder
