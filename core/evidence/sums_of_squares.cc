#include "core/evidence/sums_of_squares.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"

namespace rejoinder {
namespace {

bool is_residual(const Source& source) { return source.name == "Residual" || source.name == "Error" || source.name == "residual" || source.name == "error"; }
bool is_total(const Source& source) { return source.name == "Total" || source.name == "total"; }

struct Table {
  const Source *residual = nullptr, *total = nullptr;
  std::vector<const Source*> others;
};

Table table_of(const Review& review) {
  Table out;
  for (const Source& source : review.sources) {
    if (is_residual(source))
      out.residual = &source;
    else if (is_total(source))
      out.total = &source;
    else
      out.others.push_back(&source);
  }
  return out;
}

// Residual df: the total less the others where that can be had, else as printed.
std::optional<long> residual_df(const Review& review, const Table& table) {
  std::optional<long> total;
  if (table.total) total = table.total->df;
  if (!total && review.observations) total = *review.observations - 1;
  const bool all = std::all_of(table.others.begin(), table.others.end(), [](const Source* s) { return s->df.has_value(); });
  if (total && all) {
    long left = *total;
    for (const Source* source : table.others) left -= *source->df;
    if (left >= 1) return left;
  }
  if (table.residual && table.residual->df && *table.residual->df >= 1) return table.residual->df;
  return std::nullopt;
}

// A line's own sum of squares from ss, or from ms and df.
Interval own_sum(const Source& source) {
  Interval out{0, kInfinity};
  if (source.ss) out = source.ss->possible;
  if (source.ms && source.df) {
    const Interval by_ms = source.ms->possible * Interval::point(static_cast<double>(*source.df));
    out = meet(out, by_ms).value_or(out);
  }
  return out;
}

// Narrowed by the sum of all lines; absent where the lines do not add up.
struct Sums {
  Interval tested, residual;
  std::optional<Clash> clash;
};

Sums sums_of(const Table& table, const Source& tested) {
  Sums out{own_sum(tested), table.residual ? own_sum(*table.residual) : Interval{0, kInfinity}, std::nullopt};
  if (!table.total || !table.total->ss) return out;
  const Interval total = table.total->ss->possible;
  Interval rest = Interval::point(0);
  for (const Source* other : table.others)
    if (other != &tested) rest = rest + own_sum(*other);
  if (!std::isfinite(rest.high)) return out;
  const auto residual = meet(out.residual, total - rest - out.tested);
  const auto own = meet(out.tested, total - rest - out.residual);
  if (!residual || !own) {
    Clash clash;
    clash.where = "analysis of variance / ss";
    clash.says = "The printed sums of squares do not add up to the total, rounding allowed for.";
    out.clash = clash;
    return out;
  }
  out.residual = *residual;
  out.tested = *own;
  return out;
}

const Source* tested_source(const Review& review, const Claim& claim) {
  for (const Source& source : review.sources)
    if (source.name == claim.source) return &source;
  return nullptr;
}

RouteAnswer variance_evidence(const JointTest& test) {
  RouteAnswer out;
  const Table table = table_of(*test.review);
  const Source& tested = *tested_source(*test.review, *test.claim);
  const Sums sums = sums_of(table, tested);
  const std::optional<long> df = residual_df(*test.review, table);
  if (table.residual && table.residual->df && df && *table.residual->df != *df) {
    Clash clash;
    clash.where = "analysis of variance / " + table.residual->name + " / df";
    clash.says = "The residual df are printed as " + df_text(static_cast<double>(*table.residual->df)) + "; the total less the other lines leaves " +
                 df_text(static_cast<double>(*df)) + ". Could a line be left out, or have other df?";
    out.clashes.push_back(std::move(clash));
  }
  if (sums.clash) {
    out.clashes.push_back(*sums.clash);
    return out;
  }
  const double d = test.df.denominator;
  Interval wald{0, kInfinity};
  if (sums.tested.low > 0 || std::isfinite(sums.tested.high)) {
    if (sums.residual.low > 0 || std::isfinite(sums.residual.high)) wald = sums.tested / (sums.residual / Interval::point(d));
  }
  // The line's own printed F belongs to the same test, unless its df do not.
  if (tested.f && (!table.residual || !table.residual->df || *table.residual->df == *df)) {
    const Interval printed = Interval::point(test.q) * tested.f->possible;
    wald = meet(wald, printed).value_or(wald);
  }
  if (wald.low <= 0 && std::isinf(wald.high)) return out;
  Evidence e;
  e.route = Route::SumsOfSquares;
  e.df = test.df;
  e.wald = {std::max(0.0, wald.low), wald.high};
  e.attained = e.wald;
  e.low = e.high = Sharpness::Exact;
  e.p = p_of_wald(test, e.wald);
  e.assumes = {"the residual line is the one this source is tested against"};
  e.working = {"F = (SS / " + std::to_string(test.q) + ") / (residual SS / " + df_text(d) + ")",
               "SS of " + tested.name + " " + range_text(sums.tested) + ", residual SS " + range_text(sums.residual),
               "  lowest  " + number_text(e.wald.low / test.q, ShowRounding::Down), "  highest " + number_text(e.wald.high / test.q, ShowRounding::Up)};
  e.rests_on.push_back({"", tested.name, "ss"});
  if (table.residual) e.rests_on.push_back({"", table.residual->name, "ss"});
  out.evidence = std::move(e);
  return out;
}

RouteAnswer break_evidence(const JointTest& test) {
  RouteAnswer out;
  Interval parts = Interval::point(0);
  std::string written;
  Evidence e;
  const Column& pooled = *test.columns.front();
  if (!pooled.ssr) return out;
  for (std::size_t g = 1; g < test.columns.size(); ++g) {
    if (!test.columns[g]->ssr) return out;
    parts = parts + test.columns[g]->ssr->possible;
    written += (written.empty() ? "" : " + ") + test.columns[g]->ssr->text;
    e.rests_on.push_back({test.columns[g]->id, "", "ssr"});
  }
  e.rests_on.push_back({pooled.id, "", "ssr"});
  if (parts.high > 0 && pooled.ssr->possible.high < parts.low) {
    Clash clash;
    clash.where = pooled.id + " / ssr";
    clash.says = "The parts' residual sums of squares (" + written + ") add up to more than the pooled one (" + pooled.ssr->text +
                 "), which fits to the same observations do not give.";
    clash.cells = e.rests_on;
    out.clashes.push_back(std::move(clash));
    return out;
  }
  const double d = test.df.denominator;
  const Interval ratio = pooled.ssr->possible / parts - Interval::point(1);
  e.route = Route::SumsOfSquares;
  e.df = test.df;
  e.wald = {std::max(0.0, d * ratio.low), std::max(0.0, d * ratio.high)};
  e.attained = e.wald;
  e.low = e.high = Sharpness::Exact;
  e.p = p_of_wald(test, e.wald);
  e.assumes = {"the parts are separate observations that make up the pooled sample", "the same error variance in every part"};
  e.cautions = {"Without equal variances the sums of squares do not give this test; a Wald test with both covariance matrices would."};
  e.working = {"F = (" + pooled.ssr->text + " − (" + written + "))/" + std::to_string(test.q) + " ÷ (" + written + ")/" + df_text(d),
               "the constant counts: q = " + std::to_string(test.q), "  lowest  " + number_text(e.wald.low / test.q, ShowRounding::Down),
               "  highest " + number_text(e.wald.high / test.q, ShowRounding::Up)};
  out.evidence = std::move(e);
  return out;
}

NoTest no_test(std::string reason, std::string figure, std::string sentence) {
  NoTest none;
  none.reason = std::move(reason);
  Ask ask;
  ask.figure = std::move(figure);
  ask.sentence = std::move(sentence);
  none.asks.push_back(std::move(ask));
  return none;
}

}  // namespace

std::variant<JointTest, NoTest> set_up_variance(const Review& review, const Claim& claim) {
  JointTest test;
  test.basis = Basis::Variance;
  test.review = &review;
  test.claim = &claim;
  test.level = claim.level.value_or(review.level);
  test.in_words = "the source “" + claim.source + "”";
  const Source* tested = tested_source(review, claim);
  if (!tested)
    return no_test("The claim names the source “" + claim.source + "”, which the analysis-of-variance table does not list.", "the line of the table",
                   "Which line of the analysis-of-variance table does the sentence speak of?");
  const Table table = table_of(review);
  const std::optional<long> df = residual_df(review, table);
  const std::optional<long> q = tested->df ? tested->df : claim.df1;
  if (!q || *q < 1 || !df)
    return no_test("The df of “" + claim.source + "” and of the residual line are needed.", "the df of the table's lines",
                   "Could the authors report the degrees of freedom of every line of the analysis-of-variance table?");
  test.q = static_cast<int>(*q);
  test.statistic = Statistic::F;
  test.df = {test.q, static_cast<double>(*df)};
  test.df_argument.denominator = test.df.denominator;
  test.df_argument.words = "residual df = " + df_text(test.df.denominator);
  if (table.total && table.total->df) {
    test.df_argument.words = "total less the other lines: " + df_text(static_cast<double>(*table.total->df));
    for (const Source* other : table.others)
      if (other->df) test.df_argument.words += " − " + df_text(static_cast<double>(*other->df));
    test.df_argument.words += " = " + df_text(test.df.denominator);
  }
  return test;
}

std::variant<JointTest, NoTest> set_up_break(const Review& review, const Claim& claim) {
  JointTest test;
  test.basis = Basis::Break;
  test.review = &review;
  test.claim = &claim;
  test.level = claim.level.value_or(review.level);
  test.in_words = "all coefficients are the same in every part";
  std::vector<std::string> ids = {claim.pooled};
  ids.insert(ids.end(), claim.parts.begin(), claim.parts.end());
  for (const std::string& id : ids) {
    const Column* column = review.column(id);
    if (!column) return no_test("The claim names the column “" + id + "”, which the review does not hold.", "the columns of the break test",
                                "Which columns does the break test compare?");
    test.columns.push_back(column);
  }
  const int groups = static_cast<int>(claim.parts.size());
  test.column = test.columns.front();
  const std::optional<long> k = slopes(*test.column);
  long n = 0;
  bool counted = groups >= 2;
  for (std::size_t g = 1; g < test.columns.size(); ++g) {
    counted = counted && test.columns[g]->n;
    if (test.columns[g]->n) n += *test.columns[g]->n;
  }
  if (!counted && test.column->n) {
    n = *test.column->n;
    counted = groups >= 2;
  }
  if (!counted || !k)
    return no_test("A break test needs n of the parts (two or more) and the number of regressors k.", "n and k of the three columns",
                   "Could the authors state the number of observations of each part and the number of regressors?");
  for (const Column* column : test.columns)
    if (column->errors == Errors::Robust || column->errors == Errors::Clustered || column->estimator != Estimator::Ols)
      return no_test("Sums of squares give a break test only for least squares with conventional errors.", "the Wald test of the break",
                     "Could the authors report the Wald test of equal coefficients on the errors of the table?");
  const long each = *k + (test.column->intercept ? 1 : 0), df = n - groups * each;
  if (df < 1) return no_test("The parts leave no residual degrees of freedom.", "n and k of the columns", "Could the authors confirm n and k of each part?");
  if (test.column->n && *test.column->n != n)
    test.cautions.push_back("The parts have " + df_text(static_cast<double>(n)) + " observations together, the pooled column " +
                            df_text(static_cast<double>(*test.column->n)) + ".");
  test.q = static_cast<int>((groups - 1) * each);
  test.statistic = Statistic::F;
  test.df = {test.q, static_cast<double>(df)};
  test.df_argument.denominator = test.df.denominator;
  test.df_argument.words = "n − parts × (k + 1) = " + df_text(static_cast<double>(n)) + " − " + std::to_string(groups) + " × " +
                           df_text(static_cast<double>(each)) + " = " + df_text(test.df.denominator);
  for (const Column* column : test.columns) test.df_argument.cells.push_back({column->id, "", "n"});
  return test;
}

RouteAnswer sums_of_squares_evidence(const JointTest& test) {
  return test.basis == Basis::Variance ? variance_evidence(test) : break_evidence(test);
}

}  // namespace rejoinder
