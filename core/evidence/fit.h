// The route of two fits: R², adjusted R², sums of squares, s.e. of the regression, overall F, s.d. of the outcome,
// Gaussian log-likelihoods, in any mixture, each narrowing the others.
//
// For least squares F = ((SSR_short - SSR_long) / q) / (SSR_long / df). Every figure named bounds the difference of two
// logarithms among SSR_long, SSR_short and the total sum of squares, so the limits are exact (difference_graph.h). Not
// for robust or clustered errors: the conventional formula does not give their joint test (common practice).
#pragma once

#include "core/evidence/joint_test.h"

namespace rejoinder {

// Applies to least squares with classical or unknown errors, against the nested column, its fit alone, or nothing at all
// (all slopes zero). Figures that contradict one another give a clash and no evidence.
RouteAnswer fit_evidence(const JointTest& test);

}  // namespace rejoinder
