// Reviews made from command line flags, so that a quick calculation goes the same way as a review file.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/result.h"
#include "core/review/document.h"

namespace rejoinder {

// What is reported, as printed; empty where not.
struct QuickClaim {
  std::string restrictions, f, chi2, p, df, level;
};

// Two fits: R², adjusted R² or residual sums of squares of the longer and the shorter regression.
struct QuickFit {
  std::string n, k, q;
  std::string r2, r2_short, adj_r2, adj_r2_short, ssr, ssr_short, loglik, loglik_short;
  QuickClaim claim;
};
Node quick_fit(const QuickFit& flags);

// Coefficients with their standard errors (or t ratios), no covariance.
struct QuickTerm {
  std::string name, coef, se;
};
struct QuickLimits {
  std::vector<QuickTerm> terms;
  bool second_is_t = false;
  std::string n, k, correlation_low, correlation_high;
  QuickClaim claim;
};
Node quick_limits(const QuickLimits& flags);

// Coefficients and their covariance matrix from CSV text: coefficients as lines "name,coefficient", the covariance as a
// square or lower triangular table with or without a line and a column of names. The Error says which line.
struct QuickWald {
  std::string coefficients, covariance;  // CSV text
  std::string n, k, df;
  QuickClaim claim;
};
Result<Node> quick_wald(const QuickWald& flags);

}  // namespace rejoinder
