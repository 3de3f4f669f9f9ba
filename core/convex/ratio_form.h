// An exclusion hypothesis with printed correlations, rewritten in t ratios and the correlation matrix.
//
// With intervals for standard errors a correlation range that leaves zero out is not convex in V. For "these
// coefficients have these values" the Wald statistic is t' C^-1 t with t_i = (b_i - r_i) / s_i, and both t (a
// box) and C (entry intervals) are convex. Nothing is lost as long as coefficients and standard errors are
// unrelated, that is, when the set holds no covariances, combinations or coefficient facts besides the
// correlations.
#pragma once

#include <Eigen/Dense>
#include <optional>

#include "core/convex/admissible_set.h"
#include "core/convex/wald_limits.h"

namespace rejoinder {

struct RatioForm {
  AdmissibleSet
      set;  // p; coefficients are the ratios, every standard error exactly 1, correlations as entries
  Eigen::MatrixXd R;  // q by p, one 1 a row
  Eigen::VectorXd r;  // q, zero
  // A standard error that may be 0 has no largest ratio. For the least W such ratios are cut at this size,
  // which only matters when W is above its square: the least is then min(limit, cut^2). Infinite where
  // nothing was cut.
  double cut = kInfinity;
};

// Nothing when the hypothesis is not an exclusion or the set holds other facts.
std::optional<RatioForm> ratio_form(const AdmissibleSet& set, const Eigen::MatrixXd& R,
                                    const Eigen::VectorXd& r);

// A witness of the ratio form in the units of the print: standard errors and coefficients of the boxes that
// make the ratios. `ratios` is p, `C` p by p with unit diagonal.
WaldWitness printed_witness(const AdmissibleSet& set, const Eigen::MatrixXd& R, const Eigen::VectorXd& r,
                            const Eigen::VectorXd& ratios, const Eigen::MatrixXd& C);

}  // namespace rejoinder
