#include <algorithm>
#include <cmath>

#include "core/judge/correlation_lens.h"
#include "core/judge/judge.h"
#include "core/number/number_text.h"

namespace rejoinder {
namespace {

std::string listed(const std::vector<std::string>& terms) {
  std::string out;
  for (std::size_t i = 0; i < terms.size(); ++i)
    out += (i == 0 ? "" : i + 1 == terms.size() ? " and " : ", ") + ("“" + terms[i] + "”");
  return out;
}

bool used(const Finding& finding, Route route) {
  return std::any_of(finding.evidence.begin(), finding.evidence.end(), [&](const Evidence& e) { return e.route == route; });
}

std::string kind_of_errors(const Column& column) {
  if (column.errors == Errors::Robust) return "robust ";
  if (column.errors == Errors::Clustered) return "clustered ";
  return "";
}

// Two rounded fits leave the decision open: more digits of the same figures close it.
Ask more_digits(const JointTest& test) {
  Ask ask;
  ask.column = test.column->id;
  const bool by_r2 = test.column->r2 || test.column->adj_r2;
  ask.figure = by_r2 ? "both R² figures to more decimals (or the residual sums of squares)" : "both fits to more digits";
  ask.decides = true;
  ask.sentence = std::string("Could the authors report ") + (by_r2 ? "R²" : "the fit") + " of " + column_name(*test.column) +
                 (test.restricted ? " and of " + column_name(*test.restricted) : "") +
                 (by_r2 ? " to two more decimals, or the two residual sums of squares?" : " to two more digits?");
  return ask;
}

Ask covariance(const JointTest& test, const std::vector<std::string>& terms) {
  Ask ask;
  const Column& column = *test.column;
  ask.column = column.id;
  ask.terms = terms;
  ask.decides = true;
  if (terms.size() == 2) {
    ask.figure = "the correlation of the two estimates";
    ask.turns_at = turning_correlation(test);
    ask.sentence = "Could the authors report the correlation of the estimates of " + listed(terms) + " in " + column_name(column) +
                   (test.q == 1 ? ", or the standard error of the combination tested?" : ", or the joint test itself?");
    if (ask.turns_at)
      ask.figure += " (the decision turns at " +
                    (number_text(ask.turns_at->low) == number_text(ask.turns_at->high)
                         ? number_text(ask.turns_at->low)
                         : number_text(ask.turns_at->low) + " to " + number_text(ask.turns_at->high)) +
                    ")";
  } else {
    ask.figure = "the " + kind_of_errors(column) + "covariance matrix of the tested estimates";
    ask.sentence = "Could the authors report the " + kind_of_errors(column) + "covariance matrix of the estimates of " + listed(terms) + " in " +
                   column_name(column) + ", or the joint test itself?";
  }
  return ask;
}

Ask joint_test_itself(const JointTest& test) {
  Ask ask;
  if (test.column) ask.column = test.column->id;
  ask.figure = "the joint test itself, with its degrees of freedom";
  ask.decides = true;
  ask.sentence = "Could the authors report the joint test of “" + test.in_words + "” with its degrees of freedom and p value" +
                 (test.column ? ", on the standard errors of " + column_name(*test.column) : std::string()) + "?";
  return ask;
}

}  // namespace

std::vector<Ask> asks_for(const JointTest& test, const Finding& finding) {
  std::vector<Ask> out;
  if (test.basis != Basis::Column) {
    Ask ask = joint_test_itself(test);
    if (test.basis == Basis::Sentence) {
      ask.figure = "the reported statistic to one more digit";
      ask.sentence = "Could the authors report the statistic and its p value to one more digit?";
    }
    return {ask};
  }
  const Column& column = *test.column;
  std::vector<std::string> terms;
  if (test.restrictions)
    for (const TermName& name : test.restrictions->terms) terms.push_back(name.term);

  if (used(finding, Route::Fit)) out.push_back(more_digits(test));
  if (used(finding, Route::Covariance)) {
    Ask ask;
    ask.column = column.id;
    ask.terms = terms;
    ask.figure = "the coefficients and their covariance matrix to more digits";
    ask.decides = true;
    ask.sentence = "Could the authors report the coefficients of " + listed(terms) + " and their covariance matrix to two more digits?";
    out.push_back(ask);
  } else if ((used(finding, Route::Estimates) || used(finding, Route::Facts)) && terms.size() >= 2) {
    out.push_back(covariance(test, terms));
  } else if (used(finding, Route::Estimates) && terms.size() == 1) {
    Ask ask;
    ask.column = column.id;
    ask.terms = terms;
    ask.figure = "the coefficient and its standard error to one more digit";
    ask.decides = true;
    ask.sentence = "Could the authors report the coefficient of " + listed(terms) + " and its standard error to one more digit?";
    out.push_back(ask);
  }
  const bool classical = column.errors == Errors::Classical || column.errors == Errors::Unknown;
  if (column.estimator == Estimator::Ols && classical && !test.restricted && !used(finding, Route::Fit) && test.q >= 1 && (column.r2 || column.ssr)) {
    Ask ask;
    ask.column = column.id;
    ask.figure = "R² of the column re-estimated under the restriction, to four decimals";
    ask.decides = true;
    ask.sentence = "Could the authors report R² (or the residual sum of squares) of " + column_name(column) + " re-estimated under “" +
                   test.in_words + "” on the same sample?";
    out.push_back(ask);
  }
  if (column.estimator == Estimator::Ml && column.loglik && !used(finding, Route::Likelihood) && !column.weights &&
      column.errors != Errors::Clustered) {
    Ask ask;
    ask.column = column.id;
    ask.figure = "the log-likelihood of the fit under the restriction";
    ask.decides = true;
    ask.sentence = "Could the authors report the log-likelihood of " + column_name(column) + " re-estimated under “" + test.in_words + "”?";
    out.push_back(ask);
  }
  if (!used(finding, Route::PrintedTest)) out.push_back(joint_test_itself(test));
  if (out.empty()) {
    Ask ask = joint_test_itself(test);
    ask.figure = "the reported statistic to one more digit";
    ask.sentence = "Could the authors report the statistic and its p value to one more digit?";
    out.push_back(ask);
  }
  return out;
}

}  // namespace rejoinder
