#include "core/evidence/likelihood.h"

#include <algorithm>

#include "core/number/number_text.h"

namespace rejoinder {

RouteAnswer likelihood_evidence(const JointTest& test) {
  RouteAnswer out;
  if (!test.column || test.column->estimator != Estimator::Ml) return out;
  const Column& column = *test.column;
  Printed shorter;
  std::string from;
  Cell short_cell;
  if (test.restricted && test.restricted->loglik) {
    shorter = test.restricted->loglik;
    from = column_name(*test.restricted);
    short_cell = {test.restricted->id, "", "loglik"};
  } else if (test.restricted_fit && test.restricted_fit->loglik) {
    shorter = test.restricted_fit->loglik;
    from = "the restricted fit";
    short_cell = {"", "", "restricted_fit"};
  } else if (test.all_slopes && column.null_loglik) {
    shorter = column.null_loglik;
    from = "the constant alone";
    short_cell = {column.id, "", "null_loglik"};
  }
  if (!shorter || !column.loglik) return out;
  if (column.weights || column.errors == Errors::Clustered) {
    out.cautions.push_back(std::string("The likelihood ratio is not used: with ") +
                           (column.weights ? "weights" : "clustered errors") +
                           " the printed figure is a pseudo-likelihood, whose ratio has no chi-square distribution.");
    return out;
  }
  const Interval raw = Interval::point(2) * (column.loglik->possible - shorter->possible);
  if (raw.high < 0) {
    Clash clash;
    clash.where = column.id + " / loglik";
    clash.says = "The longer fit has the lower log-likelihood (" + column.loglik->text + " against " + shorter->text +
                 "), which nested fits on one sample do not give.";
    clash.cells = {{column.id, "", "loglik"}, short_cell};
    out.clashes.push_back(std::move(clash));
    return out;
  }
  Evidence e;
  e.route = Route::Likelihood;
  e.df = test.df;
  e.wald = {std::max(0.0, raw.low), raw.high};
  e.attained = e.wald;
  e.low = e.high = Sharpness::Exact;
  e.p = p_of_wald(test, e.wald);
  e.assumes = {"both fits use the same observations", "a full likelihood (no weights, no clustering)"};
  if (column.errors == Errors::Robust)
    e.cautions.push_back(
        "The errors are robust, which suggests that the likelihood is not taken to be fully specified; the ratio then has no exact "
        "chi-square distribution.");
  e.working = {"LR = 2 × (log-likelihood of " + column_name(column) + " − that of " + from + ")",
               "   = 2 × (" + column.loglik->text + " − " + shorter->text + ")",
               "  lowest  " + number_text(e.wald.low, ShowRounding::Down),
               "  highest " + number_text(e.wald.high, ShowRounding::Up)};
  e.rests_on = {{column.id, "", "loglik"}, short_cell};
  out.evidence = std::move(e);
  return out;
}

}  // namespace rejoinder
