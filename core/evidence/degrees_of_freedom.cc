#include "core/evidence/degrees_of_freedom.h"

#include <algorithm>

#include "core/number/number_text.h"

namespace rejoinder {
namespace {

std::string number(long n) { return df_text(static_cast<double>(n)); }

// The residual df in words, with the column's own figures.
std::string residual_words(const Column& column, long k, double df) {
  const std::string tail = " = " + df_text(df);
  const std::string head = number(*column.n) + " − " + number(k);
  if (column.fixed_effects > 0)
    return "n − k − fixed effects = " + head + " − " + number(column.fixed_effects) + tail;
  if (!column.intercept) return "n − k = " + head + tail;
  return "n − k − 1 = " + head + " − 1" + tail;
}

Ask ask_for(const Column& column, const std::string& figure, const std::string& sentence) {
  Ask ask;
  ask.figure = figure;
  ask.column = column.id;
  ask.sentence = sentence;
  return ask;
}

}  // namespace

std::optional<long> slopes(const Column& column) {
  if (column.k) return column.k;
  const long listed = std::count_if(column.terms.begin(), column.terms.end(), [](const Term& t) { return !t.intercept; });
  if (listed == 0) return std::nullopt;
  return listed;
}

std::optional<double> fit_df(const Column& column) {
  const std::optional<long> k = slopes(column);
  if (!column.n || !k) return std::nullopt;
  const long taken = column.fixed_effects > 0 ? column.fixed_effects : column.intercept ? 1 : 0;
  const long df = *column.n - *k - taken;
  if (df < 1) return std::nullopt;
  return static_cast<double>(df);
}

std::optional<double> total_df(const Column& column) {
  if (!column.n) return std::nullopt;
  const long taken = column.fixed_effects > 0 ? column.fixed_effects : column.intercept ? 1 : 0;
  const long df = *column.n - taken;
  if (df < 1) return std::nullopt;
  return static_cast<double>(df);
}

DfArgument test_df(const Column& column) {
  DfArgument out;
  const std::optional<double> residual = fit_df(column);
  const auto cell = [&](const char* key) { out.cells.push_back({column.id, "", key}); };

  if (column.estimator == Estimator::Ml) {
    out.words = "maximum likelihood: the chi-square, which is an F with infinite denominator df";
    return out;
  }
  if (column.df) {
    out.denominator = static_cast<double>(*column.df);
    out.words = "as printed: " + number(*column.df);
    cell("df");
    if (column.errors == Errors::Clustered && column.clusters && *column.clusters - 1 != *column.df)
      out.other.push_back(static_cast<double>(*column.clusters - 1));
    if (residual && *residual != out.denominator) {
      if (column.errors == Errors::Clustered || column.errors == Errors::Robust)
        out.other.push_back(*residual);
      else
        out.cautions.push_back("The printed df are " + number(*column.df) + "; n and k give " + df_text(*residual) + ".");
    }
    return out;
  }
  if (column.errors == Errors::Clustered) {
    if (residual) out.other.push_back(*residual);
    if (column.clusters) {
      out.denominator = static_cast<double>(*column.clusters - 1);
      out.words = "clusters − 1 = " + number(*column.clusters) + " − 1 = " + df_text(out.denominator);
      out.other.push_back(kInfinity);
      cell("clusters");
      if (residual)
        out.cautions.push_back("With clustered errors the denominator df are taken as clusters − 1 = " +
                               df_text(out.denominator) + "; some programs use " + df_text(*residual) + " or the chi-square.");
    } else {
      out.known = false;
      out.words = "clustered errors without a printed number of clusters: infinite";
      out.cautions.push_back(
          "The number of clusters is not printed, so the denominator df are taken as infinite; with few clusters the test "
          "needs a larger F.");
      out.asks.push_back(ask_for(column, "the number of clusters",
                                 "Could the authors state the number of clusters behind the standard errors of " +
                                     (column.label.empty() ? column.id : column.label) + "?"));
    }
    return out;
  }
  if (residual) {
    const long k = *slopes(column);
    out.denominator = *residual;
    out.words = residual_words(column, k, *residual);
    cell("n");
    cell("k");
    if (!column.k) out.assumes.push_back("the terms listed are all of the column's regressors (k = " + number(k) + ")");
    if (column.errors == Errors::Robust) out.other.push_back(kInfinity);
    return out;
  }
  out.known = false;
  if (column.n && slopes(column))
    out.words = "n and k leave no residual degrees of freedom; infinity stands in";
  else
    out.words = std::string(column.n ? "k" : "n") + " is not given; infinity stands in for the denominator df";
  out.cautions.push_back("The denominator df cannot be worked out from what is given and are taken as infinite.");
  out.asks.push_back(ask_for(column, column.n ? "the number of regressors k" : "the number of observations n",
                             "Could the authors state the number of observations and of regressors in " +
                                 (column.label.empty() ? column.id : column.label) + "?"));
  return out;
}

}  // namespace rejoinder
