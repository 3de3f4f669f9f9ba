#include "core/convex/rejecting_share.h"

#include <algorithm>
#include <cmath>
#include <set>

#include "core/convex/wald_limits.h"

namespace rejoinder {
namespace {

// (1 - w)^power, 0 where w >= 1; power 0 is an indicator.
double left_over(double w, double power) {
  if (w > 1) return 0;
  if (power == 0) return 1;
  return std::pow(std::max(0.0, 1 - w), power);
}

// A point, or the two doubles around an exact decimal.
bool as_good_as_exact(const Interval& x) { return x.width() <= 1e-15 * std::max(1.0, x.magnitude()); }

// Limits of W_A for the block's t ratios and printed correlations.
std::optional<Interval> block_wald(const std::vector<Interval>& t, const std::vector<PairInterval>& known,
                                   const std::vector<int>& block) {
  const int k = static_cast<int>(block.size());
  AdmissibleSet set(k);
  for (int i = 0; i < k; ++i) {
    set.set_coefficient(i, t[static_cast<std::size_t>(block[static_cast<std::size_t>(i)])]);
    set.set_se(i, Interval::point(1));
  }
  const auto place = [&](int index) {
    return static_cast<int>(std::find(block.begin(), block.end(), index) - block.begin());
  };
  bool exact = true;
  for (const PairInterval& pair : known) {
    set.correlations.push_back({place(pair.i), place(pair.j), pair.value});
    exact = exact && as_good_as_exact(pair.value);
  }
  const Eigen::MatrixXd R = Eigen::MatrixXd::Identity(k, k);
  const Eigen::VectorXd r = Eigen::VectorXd::Zero(k);
  for (const int index : block) exact = exact && as_good_as_exact(t[static_cast<std::size_t>(index)]);
  if (exact) {
    Eigen::MatrixXd C = Eigen::MatrixXd::Identity(k, k);
    for (const PairInterval& pair : known)
      C(place(pair.i), place(pair.j)) = C(place(pair.j), place(pair.i)) = pair.value.middle();
    return Interval::point(wald_at(R, r, set.centre, C));
  }
  const LeastWald least = least_wald(set, R, r);
  const GreatestWald greatest = greatest_wald(set, R, r);
  if (least.status != LimitStatus::Found) return std::nullopt;
  return Interval{least.wald, std::max(least.wald, greatest.guaranteed)};
}

}  // namespace

std::optional<Interval> share_rejecting(const std::vector<Interval>& t,
                                        const std::vector<PairInterval>& known, double critical) {
  const int q = static_cast<int>(t.size());
  std::set<int> members;
  for (const PairInterval& pair : known) {
    members.insert(pair.i);
    members.insert(pair.j);
  }
  const std::size_t k = members.size();
  if (known.size() != k * (k - 1) / 2 || (k > 0 && static_cast<int>(k) == q)) return std::nullopt;
  const std::vector<int> block(members.begin(), members.end());
  Interval wald_of_block{0, 0};
  if (!block.empty()) {
    const auto limits = block_wald(t, known, block);
    if (!limits) return std::nullopt;
    wald_of_block = *limits;
  }
  // The share that does not reject falls in every |t| and in W_A, so the ends of the intervals give its
  // range.
  double most = 1, least = 1;
  for (int i = 0; i < q; ++i) {
    if (members.count(i)) continue;
    const double small = t[static_cast<std::size_t>(i)].mignitude(),
                 large = t[static_cast<std::size_t>(i)].magnitude();
    most *= left_over(small * small / critical, (q - 1) / 2.0);
    least *= left_over(large * large / critical, (q - 1) / 2.0);
  }
  if (!block.empty()) {
    const double power = static_cast<double>(q - static_cast<int>(k)) / 2;
    most *= left_over(wald_of_block.low / critical, power);
    least *= left_over(wald_of_block.high / critical, power);
  }
  return Interval{1 - most, 1 - least};
}

}  // namespace rejoinder
