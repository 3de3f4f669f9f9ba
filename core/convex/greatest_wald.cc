#include "core/convex/closed_forms.h"
#include "core/convex/restriction_rows.h"
#include "core/convex/wald_limits.h"

namespace rejoinder {

GreatestWald greatest_wald(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                           const GreatestEffort&) {
  GreatestWald greatest;
  if (!independent_rows(set, R)) {
    greatest.status = LimitStatus::Dependent;
    greatest.method = "the restrictions repeat one another";
    return greatest;
  }
  if (const auto closed = greatest_wald_of_errors(set, R, r)) return *closed;
  if (const auto closed = greatest_wald_of_capped_exclusion(set, R, r)) return *closed;
  greatest.method = "not bounded by a closed form";
  return greatest;
}

}  // namespace rejoinder
