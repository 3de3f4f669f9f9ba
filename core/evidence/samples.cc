#include "core/evidence/samples.h"

#include <algorithm>
#include <cmath>

#include "core/evidence/column_limits.h"
#include "core/number/number_text.h"

namespace rejoinder {
namespace {

Ask ask_about(std::string figure, std::string sentence) {
  Ask ask;
  ask.figure = std::move(figure);
  ask.sentence = std::move(sentence);
  return ask;
}

// Which of the test's columns a name belongs to, or -1.
int column_of(const JointTest& test, const TermName& name) {
  for (std::size_t c = 0; c < test.columns.size(); ++c)
    if (test.columns[c]->id == name.column) return static_cast<int>(c);
  return -1;
}

// Both terms' covariance within one column, by its printed covariance or correlation matrix.
void add_within(const Column& column, const std::vector<TermName>& names, ColumnSet& set) {
  const auto index = [&](const std::string& term) {
    for (std::size_t i = 0; i < names.size(); ++i)
      if (names[i].column == column.id && names[i].term == term) return static_cast<int>(i);
    return -1;
  };
  const auto use = [&](const PrintedMatrix& matrix, bool correlations) {
    for (std::size_t a = 0; a < matrix.lower.size() && a < matrix.terms.size(); ++a)
      for (std::size_t b = 0; b < matrix.lower[a].size() && b < matrix.terms.size(); ++b) {
        if (!matrix.lower[a][b]) continue;
        const int i = index(matrix.terms[a]), j = index(matrix.terms[b]);
        if (i < 0 || j < 0) continue;
        const Interval value = matrix.lower[a][b]->possible;
        if (i != j) {
          (correlations ? set.set.correlations : set.set.covariances).push_back({i, j, value});
          ++set.pairs_known;
        } else if (!correlations) {
          const Interval known{set.set.se_low(i), set.set.se_high(i)};
          set.set.set_se(i, meet(known, sqrt(value)).value_or(sqrt(value)));
        }
      }
  };
  if (column.covariance) use(*column.covariance, false);
  if (column.correlation) use(*column.correlation, true);
  if (column.covariance || column.correlation) set.cells.push_back({column.id, "", column.covariance ? "covariance" : "correlation"});
}

}  // namespace

std::variant<JointTest, NoTest> set_up_samples(const Review& review, const Claim& claim) {
  JointTest test;
  test.basis = Basis::Samples;
  test.review = &review;
  test.claim = &claim;
  test.level = claim.level.value_or(review.level);
  NoTest none;
  none.in_words = test.in_words = claim.restrictions;
  for (const std::string& id : claim.columns) {
    const Column* column = review.column(id);
    if (!column) {
      none.reason = "The claim names the column “" + id + "”, which the review does not hold.";
      none.asks.push_back(ask_about("the columns the claim rests on", "Which columns of the paper does the sentence rest on?"));
      return none;
    }
    test.columns.push_back(column);
  }
  test.column = test.columns.front();
  Result<Restrictions> read = read_restrictions(claim.restrictions);
  if (!read.ok()) {
    none.reason = "The restrictions cannot be read: " + read.error().text() + ".";
    none.asks.push_back(ask_about("the restrictions in the review", read.error().mend));
    return none;
  }
  test.restrictions = std::move(read).value();
  test.q = test.restrictions->q();
  none.q = test.q;
  for (const TermName& name : test.restrictions->terms) {
    const int c = column_of(test, name);
    if (c >= 0 && test.columns[static_cast<std::size_t>(c)]->term(name.term)) continue;
    none.reason = "“" + name.text() + "” is not a term of the columns that the claim names.";
    none.asks.push_back(ask_about("the term's name in the review", "Write terms as column.term, with the names that the columns list."));
    return none;
  }
  for (const std::string& dropped : test.restrictions->dropped)
    test.cautions.push_back("“" + dropped + "” already follows from the other restrictions, so q is " + std::to_string(test.q) + ".");

  // Independent least-squares columns: the sum of their residual df; otherwise infinite.
  const bool ols = std::all_of(test.columns.begin(), test.columns.end(), [](const Column* c) { return c->estimator == Estimator::Ols; });
  test.statistic = ols ? Statistic::F : Statistic::ChiSquare;
  double sum = 0;
  std::string words;
  for (const Column* column : test.columns) {
    const std::optional<double> own = column->df ? std::optional<double>(static_cast<double>(*column->df)) : fit_df(*column);
    if (!own || column->errors == Errors::Clustered) sum = kInfinity;
    if (own) {
      sum += *own;
      words += (words.empty() ? "" : " + ") + df_text(*own);
    }
    test.df_argument.cells.push_back({column->id, "", "n"});
  }
  const bool independent = claim.samples == Samples::Independent;
  if (!independent || !ols) sum = kInfinity;
  test.df_argument.denominator = sum;
  test.df_argument.known = std::isfinite(sum) || !ols || !independent;
  test.df_argument.words = std::isfinite(sum) ? "residual df of the columns: " + words + " = " + df_text(sum) : "infinite, for several columns";
  if (std::isfinite(sum)) test.df_argument.other.push_back(kInfinity);
  test.df = {test.q, test.statistic == Statistic::F ? sum : kInfinity};
  test.sided = claim.sided == 1 && test.q == 1 ? 1 : 2;
  return test;
}

RouteAnswer samples_evidence(const JointTest& test) {
  const auto& names = test.restrictions->terms;
  const int p = static_cast<int>(names.size());
  ColumnSet set;
  set.set = AdmissibleSet(p);
  set.R = test.restrictions->rows;
  set.r = test.restrictions->values;
  for (int i = 0; i < p; ++i) {
    const TermName& name = names[static_cast<std::size_t>(i)];
    const Column& column = *test.columns[static_cast<std::size_t>(column_of(test, name))];
    CoefficientLimits limits = coefficient_limits(*test.review, column, *column.term(name.term), test_df(column).denominator);
    set.clashes.insert(set.clashes.end(), limits.clashes.begin(), limits.clashes.end());
    set.cells.insert(set.cells.end(), limits.cells.begin(), limits.cells.end());
    set.any_known = set.any_known || limits.known;
    if (!limits.consistent) limits = CoefficientLimits{};
    set.terms.push_back(name.text());
    set.set.set_coefficient(i, limits.b);
    set.set.set_se(i, limits.s);
    set.limits.push_back(std::move(limits));
  }
  const bool independent = test.claim->samples == Samples::Independent;
  for (int i = 0; i < p; ++i)
    for (int j = 0; j < i; ++j) {
      ++set.pairs;
      if (names[static_cast<std::size_t>(i)].column == names[static_cast<std::size_t>(j)].column || !independent) continue;
      set.set.covariances.push_back({i, j, {0, 0}});
      ++set.pairs_known;
    }
  for (const Column* column : test.columns) add_within(*column, names, set);
  RouteAnswer out;
  out.clashes = set.clashes;
  if (!set.any_known || !std::isfinite(set.set.se_high.minCoeff())) return out;
  out = evidence_of(test, set, Route::Samples);
  if (!out.evidence) return out;
  out.evidence->assumes.push_back(independent ? "the samples of the columns share no observations and are independent"
                                              : "nothing about how the estimates of the two columns vary together");
  if (independent) out.evidence->working.push_back("independent samples: the covariances between the columns are zero");
  return out;
}

}  // namespace rejoinder
