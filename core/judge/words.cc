#include <algorithm>
#include <cmath>

#include "core/judge/judge.h"
#include "core/number/number_text.h"

namespace rejoinder {
namespace {

std::string name_of(const Finding& finding) { return finding.statistic == Statistic::F ? "F" : "χ²"; }

// The range on the scale of the statistic that is shown.
Interval shown(const Finding& finding) { return finding.statistic == Statistic::F ? *finding.f : *finding.wald; }

std::string between(const Interval& range, const std::string& name) {
  if (std::isinf(range.high) && range.low <= 0) return name + " may take any value";
  if (std::isinf(range.high)) return name + " is at least " + number_text(range.low, ShowRounding::Down);
  const std::string low = number_text(range.low, ShowRounding::Down), high = number_text(range.high, ShowRounding::Up);
  if (low == high) return name + " is " + low;
  return name + " lies between " + low + " and " + high;
}

std::string p_between(const Interval& p) {
  if (p.low <= 0 && p.high >= 1) return "p may take any value";
  if (p.high < 0.001) return "p is below .001";
  if (p.low < 0.001) return "p is at most " + p_text(p.high, ShowRounding::Up);
  const std::string low = p_text(p.low, ShowRounding::Down), high = p_text(p.high, ShowRounding::Up);
  return low == high ? "p is " + low : "p lies between " + low + " and " + high;
}

std::string test_name(const Finding& finding) {
  if (finding.statistic == Statistic::ChiSquare) return "χ²(" + std::to_string(finding.q) + ")";
  return "F(" + std::to_string(finding.q) + ", " + df_text(finding.df->denominator) + ")";
}

// "p = .03", "p < .001": the paper's own figure, with a blank after its sign.
std::string p_reported(const PrintedNumber& p) {
  std::string text = p.text;
  if (text.rfind("p", 0) == 0) return text;
  if (p.relation == Relation::Equal) return "p = " + text;
  for (const char* sign : {"<", ">", "≤", "≥"}) {
    const std::size_t length = std::string(sign).size();
    if (text.rfind(sign, 0) == 0 && text.size() > length && text[length] != ' ') text.insert(length, " ");
  }
  return "p " + text;
}

std::string reported_text(const Claim& claim) {
  std::string out;
  const auto add = [&](const std::string& piece) { out += (out.empty() ? "" : ", ") + piece; };
  if (claim.f) add("F = " + claim.f->text);
  if (claim.chi2) add("χ² = " + claim.chi2->text);
  if (claim.p) add(p_reported(*claim.p));
  if (claim.stars) add(std::to_string(*claim.stars) + (*claim.stars == 1 ? " star" : " stars"));
  return out;
}

std::string figure_words(const Finding& finding, const Claim& claim) {
  switch (finding.figure) {
    case FigurePart::NotClaimed:
      return "none reported";
    case FigurePart::NotComputable:
      return "nothing to set it against";
    case FigurePart::WithinLimits:
      return reported_text(claim) + " lies within what the print allows";
    case FigurePart::OutsideLimits:
      break;
  }
  if (claim.f || claim.chi2) {
    const Interval range = shown(finding);
    if (std::isinf(range.high)) return reported_text(claim) + " lies below " + number_text(range.low, ShowRounding::Down) + ", the least that the print allows";
    return reported_text(claim) + " lies outside " + range_text(range);
  }
  return reported_text(claim) + " lies outside p " + p_range_text(*finding.p);
}

std::string decision_words(const Finding& finding, const Claim& claim) {
  std::string out;
  switch (finding.decision) {
    case DecisionPart::Rejects:
      out = "these limits reject";
      break;
    case DecisionPart::DoesNotReject:
      out = "these limits do not reject";
      break;
    case DecisionPart::Open:
      return "the limits lie on both sides of " + number_text(*finding.critical);
    case DecisionPart::NotComputable:
      return "no decision follows";
  }
  const bool rejects = finding.decision == DecisionPart::Rejects;
  if (claim.rejects && *claim.rejects != rejects) out += "; the sentence reads otherwise";
  return out;
}

std::string headline_words(const Finding& finding) {
  if (!finding.f) return "No such test from this print";
  return between(shown(finding), name_of(finding));
}

std::string settle_words(const Finding& finding) {
  if (finding.ask.empty()) return "a further figure would settle it";
  std::string figure = finding.ask.front().figure;
  if (!figure.empty()) figure[0] = static_cast<char>(std::toupper(static_cast<unsigned char>(figure[0])));
  return figure + " would settle it";
}

std::string sentence_words(const Finding& finding, const Claim& claim, const std::string& reason) {
  switch (finding.state) {
    case State::NotComputable:
      return reason;
    case State::Agrees: {
      const bool itself = !finding.evidence.empty() && finding.evidence.front().route == Route::PrintedTest;
      if (itself) return "The reported figures fit one another. The table prints nothing that bears on the test.";
      return "The figures printed allow the claim, and nothing they allow contradicts it.";
    }
    case State::Undecided:
      return "Values on both sides are consistent with the print. " + settle_words(finding) + ".";
    case State::Conflicts:
      break;
  }
  std::vector<std::string> parts;
  if (finding.figure == FigurePart::OutsideLimits) parts.push_back("No values consistent with the print give " + reported_text(claim) + ".");
  if (finding.df_claimed == DfPart::Differs) parts.push_back("On the degrees of freedom: " + finding.df_says + ".");
  const bool rejects = finding.decision == DecisionPart::Rejects;
  if (claim.rejects && finding.decision != DecisionPart::Open && *claim.rejects != rejects)
    parts.push_back(std::string("Every value that the print allows ") + (rejects ? "rejects" : "does not reject") + " at the " +
                    level_text(finding.level) + " level; the sentence reads otherwise.");
  else if (claim.rejects && *claim.rejects == rejects && finding.decision != DecisionPart::Open)
    parts.push_back("The decision itself stands.");
  std::string out;
  for (const std::string& part : parts) out += (out.empty() ? "" : " ") + part;
  return out;
}

// What each route used, in the words of a report.
std::string used_words(const Finding& finding, const JointTest* test) {
  if (!test || finding.evidence.empty()) return "";
  std::string columns = test->column ? column_name(*test->column) : "the sentence";
  std::string out;
  for (const Evidence& e : finding.evidence) {
    if (finding.evidence.size() > 1 && !e.binds) continue;
    std::string piece;
    switch (e.route) {
      case Route::Fit:
        piece = "the fit of " + columns +
                (test->restricted ? " and of " + column_name(*test->restricted) : test->restricted_fit ? " and its restricted fit" : "");
        break;
      case Route::Covariance: piece = "the coefficients and covariance matrix of " + columns; break;
      case Route::Estimates: piece = "the coefficients and their uncertainty in " + columns + ", with no covariance printed"; break;
      case Route::Facts: piece = "the coefficients of " + columns + " and the printed combinations of them"; break;
      case Route::Likelihood: piece = "the log-likelihoods of " + columns + " and of the restricted fit"; break;
      case Route::PrintedTest: piece = "the reported figures alone"; break;
      case Route::NestedColumns: piece = "the coefficients of " + columns + " and their changes between columns"; break;
      case Route::Samples: {
        std::string names;
        for (const Column* column : test->columns) names += (names.empty() ? "" : " and ") + column_name(*column);
        piece = "the coefficients and standard errors of " + names;
        break;
      }
      case Route::SumsOfSquares: piece = test->basis == Basis::Break ? "the residual sums of squares of the pooled column and its parts"
                                                                     : std::string("the sums of squares of the analysis-of-variance table"); break;
      default: piece = std::string("the route ") + contract_word(e.route); break;
    }
    out += (out.empty() ? "" : " and ") + piece;
  }
  return out;
}

std::string end_stop(std::string text) {
  if (!text.empty() && text.back() != '.' && text.back() != '?' && text.back() != '!') text += '.';
  return text;
}

std::string claimed_words(const Finding& finding, const Claim& claim) {
  const std::string place = claim.page.empty() ? "" : " (" + claim.page + ")";
  if (!claim.says.empty()) return "The paper states" + place + ": “" + claim.says + "”";
  const std::string figures = reported_text(claim);
  return "The paper reports" + place + " for “" + finding.restrictions + "”" + (figures.empty() ? " a decision." : ": " + figures + ".");
}

std::string question(const Finding& finding, const Claim& claim) {
  switch (finding.state) {
    case State::Agrees:
      return "";
    case State::Undecided:
    case State::NotComputable:
      return finding.ask.empty() ? "" : end_stop(finding.ask.front().sentence);
    case State::Conflicts:
      break;
  }
  if (finding.figure == FigurePart::OutsideLimits)
    return "Could the authors confirm which statistic is reported, on which standard errors, sample and degrees of freedom?";
  if (finding.df_claimed == DfPart::Differs) return "Could the authors confirm the degrees of freedom of this test?";
  (void)claim;
  return "Could the authors confirm how the conclusion was drawn from these figures?";
}

// Four sentences in fixed order: claimed, used, allowed, asked.
std::string paragraph_words(const Finding& finding, const Claim& claim, const JointTest* test, const std::string& reason) {
  std::vector<std::string> parts = {claimed_words(finding, claim)};
  if (finding.f) {
    parts.push_back("I used " + used_words(finding, test) + ".");
    std::string allows = "From these, allowing for rounding, " + between(shown(finding), test_name(finding)) + ", so " + p_between(*finding.p) +
                         "; the " + level_text(finding.level) + " point is " + number_text(*finding.critical) + ".";
    parts.push_back(allows);
    if (finding.state == State::Agrees) parts.push_back("This agrees with the statement, as far as the printed figures can show.");
    if (finding.state == State::Undecided) parts.push_back("The printed figures can neither confirm the statement nor rule it out.");
    if (finding.state == State::Conflicts) {
      parts.push_back("The statement does not match this.");
      if (!finding.assumes.empty()) {
        std::string assumes;
        for (const std::string& a : finding.assumes) assumes += (assumes.empty() ? "" : "; ") + a;
        parts.push_back("I assume: " + assumes + ".");
      }
    }
  } else {
    parts.push_back(end_stop(reason));
  }
  parts.push_back(question(finding, claim));
  std::string out;
  for (const std::string& part : parts)
    if (!part.empty()) out += (out.empty() ? "" : " ") + part;
  return out;
}

}  // namespace

void put_in_words(Finding& finding, const Claim& claim, const JointTest* test, const std::string& reason) {
  finding.headline = headline_words(finding);
  finding.figure_says = figure_words(finding, claim);
  if (finding.df_says.empty()) finding.df_says = "not stated";
  finding.decision_says = decision_words(finding, claim);
  finding.sentence = sentence_words(finding, claim, reason);
  finding.paragraph = paragraph_words(finding, claim, test, reason);
}

}  // namespace rejoinder
