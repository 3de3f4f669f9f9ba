#include "core/evidence/joint_test.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"
#include "core/statistics/tails.h"

namespace rejoinder {
namespace {

std::vector<std::string> slope_names(const Column& column) {
  std::vector<std::string> names;
  for (const Term& term : column.terms)
    if (!term.intercept) names.push_back(term.name);
  // "all" means every slope, those too that the column does not list: nothing is known about them.
  for (long i = static_cast<long>(names.size()); column.k && i < *column.k; ++i)
    names.push_back("slope " + std::to_string(i + 1) + ", not listed");
  return names;
}

bool says_all(const std::string& text) {
  std::string plain;
  for (const char c : text)
    if (c != ' ' && c != '\t') plain += c;
  return plain == "all" || plain == "all=0";
}

long listed_slopes(const Column& column) {
  return std::count_if(column.terms.begin(), column.terms.end(), [](const Term& t) { return !t.intercept; });
}

// A column lists all its terms when it lists k of them, or gives no k.
bool lists_all(const Column& column) {
  return listed_slopes(column) > 0 && (!column.k || listed_slopes(column) >= *column.k);
}

// The first slope of `shorter` that `longer` surely lacks.
std::optional<std::string> lacks(const Column& longer, const Column& shorter) {
  if (!lists_all(longer)) return std::nullopt;
  for (const Term& term : shorter.terms)
    if (!term.intercept && !longer.term(term.name)) return term.name;
  return std::nullopt;
}

Statistic statistic_of(const Column& column, const Claim& claim) {
  if (column.estimator == Estimator::Ols) return Statistic::F;
  if (column.estimator == Estimator::Ml) return Statistic::ChiSquare;
  const bool df_given = column.df || (claim.df2 && std::isfinite(*claim.df2));
  return df_given ? Statistic::F : Statistic::ChiSquare;
}

Ask ask(std::string figure, std::string column, std::string sentence) {
  Ask out;
  out.figure = std::move(figure);
  out.column = std::move(column);
  out.sentence = std::move(sentence);
  return out;
}

// Whether the two columns can be compared; fills refused_comparison and what to ask instead.
void compare_columns(JointTest& test, const Column& shorter) {
  const Column& longer = *test.column;
  const auto refuse = [&](std::string reason, Ask instead) {
    test.refused_comparison = std::move(reason);
    test.asks.push_back(std::move(instead));
  };
  if (longer.n && shorter.n && *longer.n != *shorter.n) {
    refuse("The two columns rest on different samples: " + df_text(static_cast<double>(*longer.n)) + " and " +
               df_text(static_cast<double>(*shorter.n)) + " observations, so their fits cannot be compared.",
           ask("the fit of " + column_name(shorter) + " on the sample of " + column_name(longer), longer.id,
               "Could the authors report R² or the residual sum of squares of " + column_name(shorter) +
                   " re-estimated on the " + df_text(static_cast<double>(*longer.n)) + " observations of " +
                   column_name(longer) + ", or the joint test itself?"));
    return;
  }
  if (!longer.outcome.empty() && !shorter.outcome.empty() && longer.outcome != shorter.outcome) {
    refuse("The two columns have different outcomes (“" + shorter.outcome + "” and “" + longer.outcome +
               "”), so their fits cannot be compared.",
           ask("a fit of the same outcome without the tested terms", longer.id,
               "Could the authors report the fit of " + column_name(longer) + " without the tested terms, for the same outcome?"));
    return;
  }
  if (const auto name = lacks(longer, shorter)) {
    refuse("The columns are not nested: “" + *name + "” is in " + column_name(shorter) + " and not in " +
               column_name(longer) + ", so no F test compares them.",
           ask("the fit of one column that holds the terms of both", longer.id,
               "Could the authors report the fit of one specification that contains the terms of both " +
                   column_name(shorter) + " and " + column_name(longer) + ", so that each can be tested against it?"));
    return;
  }
  if (longer.k && shorter.k && *longer.k <= *shorter.k) {
    refuse("The column compared against has as many regressors or more (" + df_text(static_cast<double>(*shorter.k)) + " against " +
               df_text(static_cast<double>(*longer.k)) + "), so it is not the shorter of two nested columns.",
           ask("the fit of the column without the tested terms", longer.id,
               "Could the authors report the fit of " + column_name(longer) + " without the tested terms?"));
    return;
  }
  if (longer.estimator != shorter.estimator) {
    refuse("The two columns use different estimators, so their fits cannot be compared.",
           ask("the fit of the column without the tested terms", longer.id,
               "Could the authors report the fit of " + column_name(longer) + " without the tested terms, by the same estimator?"));
    return;
  }
  test.restricted = &shorter;
  if (!longer.n || !shorter.n) test.assumes.push_back("both columns use the same observations");
}

// Names that the column cannot hold.
std::optional<std::string> stranger(const Column& column, const Restrictions& restrictions) {
  const bool spare = column.k && listed_slopes(column) < *column.k;
  for (const TermName& name : restrictions.terms) {
    if (!name.column.empty() && name.column != column.id) return name.text();
    if (!column.term(name.term) && !spare && !column.terms.empty()) return name.text();
  }
  return std::nullopt;
}

bool all_slopes_zero(const Column& column, const Restrictions& restrictions) {
  const std::optional<long> k = slopes(column);
  return k && restrictions.exclusion() && restrictions.q() == *k && restrictions.values.isZero(0) &&
         std::none_of(restrictions.terms.begin(), restrictions.terms.end(), [&](const TermName& name) {
           const Term* term = column.term(name.term);
           return term && term->intercept;
         });
}

std::variant<JointTest, NoTest> without_column(JointTest test, const Claim& claim) {
  test.basis = Basis::Sentence;
  NoTest none;
  if (!claim.df1) {
    none.reason = "The claim names no column and reports no degrees of freedom, so there is nothing to test it by.";
    none.asks.push_back(ask("the degrees of freedom of the test", "",
                            "Could the authors state the degrees of freedom of the test that the sentence reports?"));
    return none;
  }
  test.q = static_cast<int>(*claim.df1);
  test.df.numerator = test.q;
  test.statistic = claim.chi2 && !claim.f ? Statistic::ChiSquare : Statistic::F;
  test.df.denominator = test.statistic == Statistic::F && claim.df2 ? *claim.df2 : kInfinity;
  test.df_argument.denominator = test.df.denominator;
  test.df_argument.words = "as the sentence reports them";
  if (test.statistic == Statistic::F && !claim.df2)
    test.cautions.push_back("The denominator df are not reported and are taken as infinite.");
  test.in_words = "the sentence alone";
  return test;
}

}  // namespace

std::string column_name(const Column& column) {
  if (!column.label.empty()) return column.label;
  return "column " + column.id;
}

std::variant<JointTest, NoTest> set_up_test(const Review& review, const Claim& claim) {
  if (!claim.columns.empty()) return set_up_samples(review, claim);
  if (!claim.source.empty()) return set_up_variance(review, claim);
  if (!claim.pooled.empty() || !claim.parts.empty()) return set_up_break(review, claim);
  JointTest test;
  test.review = &review;
  test.claim = &claim;
  test.level = claim.level.value_or(review.level);
  if (claim.column.empty()) return without_column(std::move(test), claim);

  NoTest none;
  none.in_words = claim.restrictions;
  test.column = review.column(claim.column);
  if (!test.column) {
    none.reason = "The claim names the column “" + claim.column + "”, which the review does not hold.";
    none.asks.push_back(ask("the column the claim rests on", "", "Which column of the paper does the sentence rest on?"));
    return none;
  }
  const Column& column = *test.column;
  const Column* shorter = claim.restricted.empty() ? nullptr : review.column(claim.restricted);
  if (!claim.restricted.empty() && !shorter) {
    none.reason = "The claim compares with the column “" + claim.restricted + "”, which the review does not hold.";
    none.asks.push_back(ask("the fit of the column without the tested terms", column.id,
                            "Could the authors report the fit of " + column_name(column) + " without the tested terms?"));
    return none;
  }

  if (!claim.restrictions.empty()) {
    const std::vector<std::string> names = slope_names(column);
    Result<Restrictions> read = read_restrictions(claim.restrictions, names);
    if (!read.ok()) {
      none.reason = "The restrictions cannot be read: " + read.error().text() + ".";
      none.asks.push_back(ask("the restrictions in the review", column.id, read.error().mend));
      return none;
    }
    test.restrictions = std::move(read).value();
    test.in_words = claim.restrictions;
    test.q = test.restrictions->q();
    if (!says_all(claim.restrictions)) {
      if (const auto name = stranger(column, *test.restrictions)) {
        none.reason = "“" + *name + "” is not a term of " + column_name(column) + ".";
        none.asks.push_back(ask("the term's name in the review", column.id,
                                "Write the restriction with the terms that " + column_name(column) + " lists."));
        return none;
      }
    }
    test.all_slopes = all_slopes_zero(column, *test.restrictions);
    for (const std::string& dropped : test.restrictions->dropped)
      test.cautions.push_back("“" + dropped + "” already follows from the other restrictions, so q is " +
                              std::to_string(test.q) + ".");
  }
  if (shorter) compare_columns(test, *shorter);
  test.restricted_fit = claim.restricted_fit;

  if (!test.restrictions) {
    test.in_words = column_name(column) + " against " + (shorter ? column_name(*shorter) : "its restricted fit");
    std::optional<long> short_k;
    if (shorter) short_k = slopes(*shorter);
    if (claim.restricted_fit && claim.restricted_fit->k) short_k = claim.restricted_fit->k;
    const std::optional<long> long_k = slopes(column);
    if (!shorter && !claim.restricted_fit) {
      // Neither restrictions nor a column to compare with: the sentence can only be set against itself.
      if (!claim.df1) {
        none.reason = "The claim gives neither restrictions nor a column to compare with.";
        none.asks.push_back(ask("what the claim says in restrictions", column.id, "Which terms does the sentence speak of?"));
        return none;
      }
      test.q = static_cast<int>(*claim.df1);
      test.in_words = "the sentence alone";
    } else if (!test.refused_comparison.empty()) {
      none.reason = test.refused_comparison;
      none.asks = test.asks;
      none.in_words = test.in_words;
      return none;
    } else if (long_k && short_k && *long_k > *short_k) {
      test.q = static_cast<int>(*long_k - *short_k);
    } else if (claim.df1) {
      test.q = static_cast<int>(*claim.df1);
      test.cautions.push_back("The number of restrictions is taken from the sentence, as k is not given for both columns.");
    } else {
      none.reason = "The number of regressors k of both columns is needed to count the restrictions.";
      none.in_words = test.in_words;
      none.asks.push_back(ask("k of both columns", column.id,
                              "Could the authors state the number of regressors of the two columns compared?"));
      return none;
    }
  } else if (test.restricted) {
    const std::optional<long> long_k = column.k, short_k = test.restricted->k;
    if (long_k && short_k && *long_k - *short_k != test.q)
      test.cautions.push_back("The claim names " + std::to_string(test.q) + " restrictions, while the columns differ by " +
                              df_text(static_cast<double>(*long_k - *short_k)) + " regressors.");
  }

  test.statistic = statistic_of(column, claim);
  test.df_argument = test_df(column);
  // Where the column leaves the df open, those of the sentence are the best to be had (clusters are another matter: their
  // count cannot be argued from the sentence).
  if (test.statistic == Statistic::F && !test.df_argument.known && claim.df2 && column.errors != Errors::Clustered) {
    test.df_argument.denominator = *claim.df2;
    test.df_argument.words = "as the sentence reports them: " + df_text(*claim.df2);
    test.df_argument.cautions.clear();
    test.assumes.push_back("the denominator df that the sentence reports");
  }
  test.df = {test.q, test.statistic == Statistic::F ? test.df_argument.denominator : kInfinity};
  test.cautions.insert(test.cautions.end(), test.df_argument.cautions.begin(), test.df_argument.cautions.end());
  test.assumes.insert(test.assumes.end(), test.df_argument.assumes.begin(), test.df_argument.assumes.end());
  test.sided = claim.sided == 1 && test.q == 1 ? 1 : 2;
  if (claim.sided == 1 && test.q > 1)
    test.cautions.push_back("A joint test of several restrictions has no direction; the two-sided test is used.");

  if (column.errors == Errors::Clustered && column.clusters && test.q > *column.clusters - 1) {
    none.reason = std::to_string(test.q) + " restrictions cannot be tested jointly with " +
                  df_text(static_cast<double>(*column.clusters)) +
                  " clusters: their clustered covariance has rank at most clusters − 1 = " +
                  df_text(static_cast<double>(*column.clusters - 1)) + ".";
    none.q = test.q;
    none.in_words = test.in_words;
    none.asks.push_back(ask("how the joint test was computed", column.id,
                            "Could the authors explain how " + std::to_string(test.q) + " restrictions were tested with " +
                                df_text(static_cast<double>(*column.clusters)) +
                                " clusters, or report a test that does not rest on the clustered covariance?"));
    return none;
  }
  return test;
}

double p_of_wald(const JointTest& test, double wald) {
  double p = 0;
  if (test.statistic == Statistic::ChiSquare)
    p = chi_square_upper_tail(wald, test.q);
  else
    p = f_upper_tail(wald / test.q, test.q, test.df.denominator);
  return test.sided == 1 ? p / 2 : p;
}

Interval p_of_wald(const JointTest& test, const Interval& wald) {
  return {p_of_wald(test, wald.high), p_of_wald(test, wald.low)};
}

double critical_wald(const JointTest& test) {
  const double level = test.sided == 1 ? 2 * test.level : test.level;
  if (level >= 1) return 0;
  if (test.statistic == Statistic::ChiSquare) return chi_square_critical(level, test.q);
  return test.q * f_critical(level, test.q, test.df.denominator);
}

Interval wald_of_p(const JointTest& test, const Interval& p) {
  const auto wald = [&](double one) {
    const double two_sided = std::min(1.0, test.sided == 1 ? 2 * one : one);
    if (two_sided <= 0) return kInfinity;
    if (two_sided >= 1) return 0.0;
    if (test.statistic == Statistic::ChiSquare) return chi_square_critical(two_sided, test.q);
    return test.q * f_critical(two_sided, test.q, test.df.denominator);
  };
  return {wald(p.high), wald(p.low)};
}

}  // namespace rejoinder
