// The route of two log-likelihoods: LR = 2 (ll_long - ll_short), chi-square with q degrees of freedom (Wilks 1938, Annals
// of Mathematical Statistics 9; from memory). Refused for pseudo-likelihoods: weights or clusters (common practice).
// Log-likelihoods of a least-squares column go by the fit route and give F.
#pragma once

#include "core/evidence/joint_test.h"

namespace rejoinder {

RouteAnswer likelihood_evidence(const JointTest& test);

}  // namespace rejoinder
