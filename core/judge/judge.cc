#include "core/judge/judge.h"

#include <algorithm>
#include <cmath>

#include "core/evidence/column_limits.h"
#include "core/evidence/fit.h"
#include "core/evidence/fuse.h"
#include "core/evidence/likelihood.h"
#include "core/evidence/overall_f.h"
#include "core/evidence/printed_test.h"
#include "core/evidence/samples.h"
#include "core/evidence/sums_of_squares.h"
#include "core/judge/correlation_lens.h"
#include "core/judge/reported.h"
#include "core/number/number_text.h"

namespace rejoinder {
namespace {

template <class T>
void append(std::vector<T>& to, const std::vector<T>& from) {
  for (const T& item : from)
    if constexpr (requires { item == item; }) {
      if (std::find(to.begin(), to.end(), item) == to.end()) to.push_back(item);
    } else {
      to.push_back(item);
    }
}

AuditLine audit_line(const Clash& clash) {
  return {clash.where, clash.mild ? Match::Strained : Match::Conflicts, clash.says, clash.cells};
}

struct Gathered {
  std::vector<Evidence> evidence;
  std::vector<std::string> cautions;
  std::vector<Clash> clashes;
  std::vector<Ask> asks;
};

void take(Gathered& all, RouteAnswer answer) {
  if (answer.evidence) all.evidence.push_back(std::move(*answer.evidence));
  append(all.cautions, answer.cautions);
  for (Clash& clash : answer.clashes)
    if (std::none_of(all.clashes.begin(), all.clashes.end(), [&](const Clash& c) { return c.where == clash.where; }))
      all.clashes.push_back(std::move(clash));
  all.asks.insert(all.asks.end(), answer.asks.begin(), answer.asks.end());
}

bool any_hard(const std::vector<Clash>& clashes) {
  return std::any_of(clashes.begin(), clashes.end(), [](const Clash& c) { return !c.mild; });
}

// Every route that may speak of what the claim rests on; the sentence against itself only where none bounds the statistic and no
// comparison is refused.
Gathered gather(const JointTest& test) {
  Gathered all;
  switch (test.basis) {
    case Basis::Column:
      take(all, fit_evidence(test));
      take(all, column_evidence(test));
      take(all, facts_evidence(test));
      take(all, nested_columns_evidence(test));
      take(all, overall_f_evidence(test));
      take(all, likelihood_evidence(test));
      break;
    case Basis::Samples:
      take(all, samples_evidence(test));
      break;
    case Basis::Variance:
    case Basis::Break:
      take(all, sums_of_squares_evidence(test));
      break;
    case Basis::Sentence:
      break;
  }
  if (all.evidence.empty() && test.refused_comparison.empty() && !any_hard(all.clashes)) take(all, printed_test_evidence(test));
  return all;
}

// Two routes that share no value. Where the kind of errors is not stated the conventional formula is the one that may not
// apply; otherwise the print contradicts itself.
bool drop_formula_of_unknown_errors(const JointTest& test, Gathered& all) {
  if (!test.column || test.column->errors != Errors::Unknown) return false;
  const auto fit = std::find_if(all.evidence.begin(), all.evidence.end(), [](const Evidence& e) { return e.route == Route::Fit; });
  if (fit == all.evidence.end()) return false;
  all.cautions.push_back(
      "The formula from R² or sums of squares gives F " + range_text(fit->f()) +
      ", which the standard errors of the table do not; they may be robust or clustered, so the formula was left out.");
  all.evidence.erase(fit);
  return true;
}

DecisionPart decision_of(const Interval& wald, double critical) {
  if (wald.low >= critical) return DecisionPart::Rejects;
  if (wald.high < critical) return DecisionPart::DoesNotReject;
  return DecisionPart::Open;
}

State state_of(FigurePart figure, const DfCheck& df, DecisionPart decision, const Reported& said) {
  const bool opposite = said.rejects && ((decision == DecisionPart::Rejects && !*said.rejects) ||
                                         (decision == DecisionPart::DoesNotReject && *said.rejects));
  if (figure == FigurePart::OutsideLimits || df.conflicts || opposite) return State::Conflicts;
  if (decision == DecisionPart::Open) return State::Undecided;
  // A figure whose own rounding lies on both sides claims no decision; one that is definite must be the one claimed.
  return State::Agrees;
}

void not_computable(Finding& finding) {
  finding.state = State::NotComputable;
  finding.figure = FigurePart::NotComputable;
  finding.decision = DecisionPart::NotComputable;
  finding.df_claimed = DfPart::NotStated;
}

// Figures of the claim itself for the picture, on the scale of the finding's statistic.
void keep_reported(Finding& finding, const JointTest& test, const Reported& said) {
  const double scale = finding.statistic == Statistic::F ? test.q : 1;
  if (said.wald && said.wald->high >= 0) {
    finding.reported_range = Interval{said.wald->low / scale, said.wald->high / scale};
    const Claim& claim = *test.claim;
    const double printed = claim.f ? claim.f->value * test.q : claim.chi2->value;
    finding.reported = printed / scale;
  }
  finding.reported_p = said.p;
}

}  // namespace

Judged judge(const Review& review, const Claim& claim) {
  Judged out;
  Finding& finding = out.finding;
  finding.claim = claim.id;
  finding.says = claim.says;
  finding.page = claim.page;
  finding.column = claim.column;
  finding.restrictions = claim.restrictions;
  finding.level = claim.level.value_or(review.level);
  for (const Problem& problem : review.problems)
    if (problem.claim == claim.id) finding.cautions.push_back("Part of this claim could not be read: " + problem.text());

  auto set_up = set_up_test(review, claim);
  if (const NoTest* none = std::get_if<NoTest>(&set_up)) {
    not_computable(finding);
    finding.q = none->q;
    if (finding.restrictions.empty()) finding.restrictions = none->in_words;
    finding.ask = none->asks;
    append(finding.cautions, none->cautions);
    put_in_words(finding, claim, nullptr, none->reason);
    return out;
  }
  const JointTest& test = std::get<JointTest>(set_up);
  if (finding.restrictions.empty()) finding.restrictions = test.in_words;
  finding.q = test.q;
  finding.statistic = test.statistic;
  finding.assumes = test.assumes;

  Gathered all = gather(test);
  append(finding.cautions, test.cautions);
  if (!test.refused_comparison.empty()) finding.cautions.push_back(test.refused_comparison);

  std::optional<Fused> fused;
  if (!all.evidence.empty()) fused = fuse(all.evidence);
  if (fused && fused->contradict && drop_formula_of_unknown_errors(test, all)) fused = fuse(all.evidence);
  append(finding.cautions, all.cautions);
  for (const Clash& clash : all.clashes) out.audit.push_back(audit_line(clash));

  const Reported said = reported(test);
  if (!fused || fused->contradict) {
    std::string reason = test.refused_comparison;
    if (fused) {
      const Evidence &a = all.evidence[static_cast<std::size_t>(fused->first)], &b = all.evidence[static_cast<std::size_t>(fused->second)];
      reason = std::string("Two routes from the same print share no value: ") + contract_word(a.route) + " gives F " +
               range_text(a.f()) + ", " + contract_word(b.route) + " gives F " + range_text(b.f()) + ".";
      AuditLine line{test.column->id + " / " + contract_word(a.route) + ", " + contract_word(b.route), Match::Conflicts, reason, a.rests_on};
      append(line.cells, b.rests_on);
      out.audit.push_back(std::move(line));
    } else if (any_hard(all.clashes)) {
      reason = std::find_if(all.clashes.begin(), all.clashes.end(), [](const Clash& c) { return !c.mild; })->says;
    } else if (reason.empty()) {
      reason = "Nothing printed bears on the tested terms: the claim needs coefficients with standard errors, two fits, or the test itself.";
    }
    not_computable(finding);
    const DfCheck df = check_df(test);
    finding.df_claimed = df.part;
    finding.df_says = df.says;
    finding.evidence = std::move(all.evidence);
    finding.ask = test.asks;
    finding.ask.insert(finding.ask.end(), all.asks.begin(), all.asks.end());
    if (finding.ask.empty()) finding.ask = asks_for(test, finding);
    keep_reported(finding, test, said);
    put_in_words(finding, claim, &test, reason);
    return out;
  }

  finding.wald = fused->wald;
  finding.f = Interval{fused->wald.low / test.q, fused->wald.high / test.q};
  finding.p = p_of_wald(test, fused->wald);
  finding.low = fused->low;
  finding.high = fused->high;
  finding.attained = fused->attained;
  finding.df = test.df;
  const double critical = critical_wald(test);
  finding.critical = finding.statistic == Statistic::F ? critical / test.q : critical;
  finding.decision = decision_of(fused->wald, critical);
  keep_reported(finding, test, said);
  finding.figure = !said.any ? FigurePart::NotClaimed
                   : within(said, fused->wald) ? FigurePart::WithinLimits
                                               : FigurePart::OutsideLimits;
  const DfCheck df = check_df(test);
  finding.df_claimed = df.part;
  finding.df_says = df.says;
  if (df.part == DfPart::Differs && !df.conflicts)
    finding.cautions.push_back("The stated df follow another common convention than the one used here; by itself that is no mismatch.");
  finding.state = state_of(finding.figure, df, finding.decision, said);

  finding.evidence = std::move(all.evidence);
  for (const Evidence& e : finding.evidence) {
    append(finding.assumes, e.assumes);
    append(finding.cautions, e.cautions);
    append(finding.rests_on, e.rests_on);
    if (finding.evidence.size() > 1)
      finding.working.push_back(std::string("by ") + contract_word(e.route) + (e.binds ? ", which sets a limit:" : ":"));
    finding.working.insert(finding.working.end(), e.working.begin(), e.working.end());
  }
  append(finding.rests_on, test.df_argument.cells);
  finding.working.push_back("denominator df: " + test.df_argument.words);
  finding.working.push_back("q = " + std::to_string(test.q) + ", " + level_text(finding.level) + " point " + number_text(*finding.critical));
  finding.working.push_back("p lies between " + p_text(finding.p->low, ShowRounding::Down, true) + " and " +
                            p_text(finding.p->high, ShowRounding::Up, true));
  add_correlation_lens(finding, test, said);
  if (finding.state == State::Undecided) finding.ask = asks_for(test, finding);
  if (finding.state == State::Undecided) finding.ask.insert(finding.ask.end(), all.asks.begin(), all.asks.end());
  if (finding.state != State::NotComputable && !test.df_argument.known)
    finding.ask.insert(finding.ask.end(), test.df_argument.asks.begin(), test.df_argument.asks.end());
  put_in_words(finding, claim, &test, "");
  return out;
}

}  // namespace rejoinder
