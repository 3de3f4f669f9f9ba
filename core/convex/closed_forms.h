// Limits of the Wald statistic that need no iteration.
//
// Each function answers for one shape of hypothesis and knowledge and says nothing (nullopt) for any other,
// so that a caller can try them in turn. Formulas are derived in the design: for an exclusion hypothesis with
// standard errors only, the least W is the largest squared t ratio; with one cap c on every correlation the
// extreme correlation matrix is (1 - c) I + c ss' below and (1 + c) I - c ss' above, s a vector of signs.
#pragma once

#include <optional>

#include "core/convex/wald_limits.h"

namespace rejoinder {

// Exclusion, standard errors only, or every correlation within [-c, c] as the only other knowledge.
std::optional<LeastWald> least_wald_of_exclusion(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                                 const Eigen::VectorXd& r);

// The same upwards. With standard errors only and q >= 2 the answer is Infinite for any R unless Rb - r is
// exactly 0; q = 1 has its own formula for any R.
std::optional<GreatestWald> greatest_wald_of_errors(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                                    const Eigen::VectorXd& r);
std::optional<GreatestWald> greatest_wald_of_capped_exclusion(const AdmissibleSet& set,
                                                              const Eigen::MatrixXd& R,
                                                              const Eigen::VectorXd& r);

// The least from standard errors alone for any R, by the linear programme; other facts of the set are not
// used.
LeastWald least_wald_of_errors(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r);

// c when the knowledge on V is: standard errors, and |correlation| <= c for every pair (1 when nothing is
// said).
std::optional<double> common_cap(const AdmissibleSet& set);

}  // namespace rejoinder
