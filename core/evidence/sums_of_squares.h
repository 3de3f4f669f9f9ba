// The route of sums of squares: a line of an analysis-of-variance table, or a break between samples.
//
// Analysis of variance: F = (SS / q) / (SS_residual / df). Sums of squares and df add up to the total, so a missing line
// follows from the others; where the printed residual df does not, the total less the others counts (and the audit says so).
// Break in G samples (Chow 1960, Econometrica 28; from memory): F = [(SSR_pooled - sum SSR_g) / ((G - 1)(k + 1))] /
// [sum SSR_g / (n - G (k + 1))]. The constant counts in q; equal variances are assumed.
#pragma once

#include "core/evidence/joint_test.h"

namespace rejoinder {

// Contract: test.basis is Variance or Break.
RouteAnswer sums_of_squares_evidence(const JointTest& test);

}  // namespace rejoinder
