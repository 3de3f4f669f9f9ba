#include "core/judge/finding.h"

#include <algorithm>

namespace rejoinder {

const char* words_for(State state) {
  switch (state) {
    case State::Agrees: return "Agrees with the print";
    case State::Conflicts: return "Does not match the print";
    case State::Undecided: return "The print cannot say";
    case State::NotComputable: break;
  }
  return "No such test from this print";
}

const char* contract_word(State state) {
  switch (state) {
    case State::Agrees: return "agrees";
    case State::Conflicts: return "conflicts";
    case State::Undecided: return "undecided";
    case State::NotComputable: break;
  }
  return "not computable";
}

const char* contract_word(FigurePart part) {
  switch (part) {
    case FigurePart::WithinLimits: return "within limits";
    case FigurePart::OutsideLimits: return "outside limits";
    case FigurePart::NotClaimed: return "not claimed";
    case FigurePart::NotComputable: break;
  }
  return "not computable";
}

const char* contract_word(DfPart part) {
  switch (part) {
    case DfPart::AsClaimed: return "as claimed";
    case DfPart::Differs: return "differs";
    case DfPart::NotStated: break;
  }
  return "not stated";
}

const char* contract_word(DecisionPart part) {
  switch (part) {
    case DecisionPart::Rejects: return "rejects";
    case DecisionPart::DoesNotReject: return "does not reject";
    case DecisionPart::Open: return "open";
    case DecisionPart::NotComputable: break;
  }
  return "not computable";
}

const char* contract_word(Match match) {
  switch (match) {
    case Match::Fits: return "fits";
    case Match::Strained: return "strained";
    case Match::Conflicts: return "conflicts";
    case Match::CannotTell: break;
  }
  return "cannot tell";
}

const char* contract_word(Sharpness sharpness) {
  switch (sharpness) {
    case Sharpness::Exact: return "exact";
    case Sharpness::Guaranteed: return "guaranteed";
    case Sharpness::Estimated: return "estimated";
    case Sharpness::NotBounded: break;
  }
  return "not bounded";
}

const char* contract_word(Route route) {
  switch (route) {
    case Route::Covariance: return "covariance";
    case Route::Fit: return "fit";
    case Route::Estimates: return "estimates";
    case Route::Facts: return "facts";
    case Route::NestedColumns: return "nested columns";
    case Route::Variables: return "variables";
    case Route::Samples: return "samples";
    case Route::Likelihood: return "likelihood";
    case Route::SumsOfSquares: return "sums of squares";
    case Route::PrintedTest: break;
  }
  return "printed test";
}

const char* contract_word(Statistic statistic) { return statistic == Statistic::F ? "F" : "chi-square"; }

const char* mark_for(State state) {
  switch (state) {
    case State::Agrees: return "=";
    case State::Conflicts: return "≠";
    case State::Undecided: return "?";
    case State::NotComputable: break;
  }
  return "–";
}

bool CheckedReview::any_conflict() const {
  return std::any_of(findings.begin(), findings.end(), [](const Finding& f) { return f.state == State::Conflicts; }) ||
         std::any_of(audit.begin(), audit.end(), [](const AuditLine& a) { return a.match == Match::Conflicts; });
}

}  // namespace rejoinder
