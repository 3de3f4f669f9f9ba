#include <algorithm>
#include <cmath>

#include "core/convex/closed_forms.h"
#include "core/convex/restriction_rows.h"
#include "core/convex/wald_limits.h"

namespace rejoinder {

LeastWald least_wald(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r) {
  LeastWald least;
  if (!independent_rows(set, R)) {
    least.status = LimitStatus::Dependent;
    least.method = "the restrictions repeat one another";
    return least;
  }
  if (const auto closed = least_wald_of_exclusion(set, R, r)) return *closed;
  return least_wald_of_errors(set, R, r);
}

}  // namespace rejoinder
