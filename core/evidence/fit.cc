#include "core/evidence/fit.h"

#include <algorithm>
#include <cmath>

#include "core/evidence/difference_graph.h"
#include "core/number/number_text.h"

namespace rejoinder {
namespace {

// Nodes of the graph: logarithms of zero's stand-in (1), the total and the two residual sums of squares. The total that an
// adjusted R² speaks of stands apart where fixed effects leave open which R² is meant.
enum Node { kUnit, kTotal, kLong, kShort, kTotalOfAdjusted, kNodes };

constexpr double kPi = 3.14159265358979323846;

// One printed fit: a column, or the fit alone of the shorter model.
struct Model {
  int node = kLong;
  std::string name;   // "column (2)"
  std::string id;     // of the column the cells stand in
  Printed r2, adj_r2, ssr, tss, outcome_sd, residual_sd, loglik, overall_f;
  std::optional<double> k, df, total, n;
  bool total_apart = false;  // fixed effects: the adjusted R² has a total of its own
  bool intercept = true;
};

// Logs that stay finite: a residual sum of squares of zero is beyond any F that a double holds.
Interval finite_log(const Interval& x) {
  const auto one = [](double v, double direction) {
    if (v <= 0) return -700.0;
    if (std::isinf(v)) return direction * kInfinity;
    return std::log(v);
  };
  return {step_down(one(x.low, 1)), step_up(one(x.high, 1))};
}

Interval one_minus(const Interval& x) { return {std::max(0.0, step_down(1 - x.high)), std::max(0.0, step_up(1 - x.low))}; }

std::string equals(const Model& model, const std::string& figure, const PrintedNumber& number) {
  return figure + " of " + model.name + " = " + number.text;
}

class Facts {
 public:
  explicit Facts(DifferenceGraph& graph) : graph_(graph) {}

  void of(const Model& m) {
    const int adjusted_total = m.total_apart ? kTotalOfAdjusted : kTotal;
    if (m.r2 && m.node != kTotal) add(m, "r2", "R²", *m.r2, kTotal, m.node, finite_log(one_minus(m.r2->possible)));
    if (m.adj_r2 && m.df && m.total && m.node != kTotal) {
      const Interval ratio = one_minus(m.adj_r2->possible) * (Interval::point(*m.df) / Interval::point(*m.total));
      add(m, "adj_r2", "adjusted R²", *m.adj_r2, adjusted_total, m.node, finite_log(ratio));
    }
    if (m.overall_f && m.k && m.df && !m.total_apart && m.node != kTotal) {
      const Interval ratio = Interval::point(1) + m.overall_f->possible * (Interval::point(*m.k) / Interval::point(*m.df));
      add(m, "overall_f", "overall F", *m.overall_f, m.node, kTotal, finite_log(ratio));
    }
    if (m.ssr) add(m, "ssr", "residual sum of squares", *m.ssr, kUnit, m.node, log_in_units(m.ssr->possible));
    if (m.tss) add(m, "tss", "total sum of squares", *m.tss, kUnit, kTotal, log_in_units(m.tss->possible));
    if (m.residual_sd && m.df)
      add(m, "residual_sd", "s.e. of the regression", *m.residual_sd, kUnit, m.node,
          log_in_units(Interval::point(*m.df) * square(m.residual_sd->possible)));
    if (m.outcome_sd && m.n && m.intercept && !m.total_apart)
      add(m, "outcome_sd", "s.d. of the outcome", *m.outcome_sd, kUnit, kTotal,
          log_in_units(Interval::point(*m.n - 1) * square(m.outcome_sd->possible)));
    if (m.loglik && m.n) {
      // SSR = n exp(-2 ll / n - 1) / (2 pi).
      const Interval exponent = -(Interval::point(2) * m.loglik->possible / Interval::point(*m.n)) - Interval::point(1);
      if (unit_ == 0) unit_ = 1;
      const double shift = std::log(*m.n / (2 * kPi) / unit_);
      add(m, "loglik", "log-likelihood", *m.loglik, kUnit, m.node,
          exponent + Interval{step_down(shift), step_up(shift)});
    }
  }

  // The joint test itself, printed elsewhere in the column.
  void joint_test(const Column& column, const Fact& fact, int q, double df) {
    const Interval ratio = Interval::point(1) + fact.f->possible * Interval::point(q) / Interval::point(df);
    graph_.add({kLong, kShort, finite_log(ratio), "the joint test F = " + fact.f->text, {{column.id, "", "fact"}}});
    ++count_[kShort];
    ++count_[kLong];
  }

  bool speaks_of(int node) const { return count_[node] > 0; }

 private:
  // Logarithms count from a unit near the first sum of squares: those of large numbers would lose the digits that a small
  // difference of two of them needs. A power of two, so the division is exact.
  Interval log_in_units(const Interval& x) {
    if (unit_ == 0) unit_ = x.high > 0 && std::isfinite(x.high) ? std::exp2(std::floor(std::log2(x.high))) : 1;
    return finite_log({x.low / unit_, x.high / unit_});
  }

  void add(const Model& m, const char* key, const std::string& figure, const PrintedNumber& number, int from, int to,
           const Interval& range) {
    graph_.add({from, to, range, equals(m, figure, number), {{m.id, "", key}}});
    ++count_[m.node];
  }

  DifferenceGraph& graph_;
  int count_[kNodes] = {};
  double unit_ = 0;  // 0: none chosen yet
};

Model model_of(const Column& column, int node) {
  Model m;
  m.node = node;
  m.name = column_name(column);
  m.id = column.id;
  m.r2 = column.r2;
  m.adj_r2 = column.adj_r2;
  m.ssr = column.ssr;
  m.tss = column.tss;
  m.outcome_sd = column.outcome_sd;
  m.residual_sd = column.residual_sd;
  m.loglik = column.loglik;
  if (column.errors == Errors::Classical || column.errors == Errors::Unknown) m.overall_f = column.overall_f;
  if (const auto k = slopes(column)) m.k = static_cast<double>(*k);
  m.df = fit_df(column);
  m.total = total_df(column);
  if (column.n) m.n = static_cast<double>(*column.n);
  m.total_apart = column.fixed_effects > 0;
  m.intercept = column.intercept;
  return m;
}

Model model_of(const Fit& fit, const Column& longer, int q) {
  Column shape = longer;  // n, intercept and fixed effects go over from the longer column
  shape.terms.clear();
  shape.k = fit.k;
  if (!shape.k)
    if (const auto k = slopes(longer)) shape.k = *k - q;
  if (fit.n) shape.n = fit.n;
  shape.r2 = fit.r2;
  shape.adj_r2 = fit.adj_r2;
  shape.ssr = fit.ssr;
  shape.residual_sd = fit.residual_sd;
  shape.loglik = fit.loglik;
  shape.tss = shape.outcome_sd = shape.overall_f = std::nullopt;
  Model m = model_of(shape, kShort);
  m.name = "the restricted fit";
  m.id.clear();  // a figure of the claim, not of a column
  return m;
}

// Whether the fact is a printed joint test of the very restrictions of the claim.
bool same_test(const JointTest& test, const Fact& fact) {
  if (fact.restrictions.empty() || !fact.f || !test.restrictions) return false;
  const Result<Restrictions> read = read_restrictions(fact.restrictions);
  if (!read.ok() || read.value().q() != test.q) return false;
  // Together they would have more independent rows if they were not the same.
  const Result<Restrictions> both = read_restrictions(test.claim->restrictions + ", " + fact.restrictions);
  return both.ok() && both.value().q() == test.q;
}

Clash clash_of(const std::vector<DifferenceGraph::Fact>& facts) {
  Clash out;
  std::string names;
  for (const auto& fact : facts) {
    names += (names.empty() ? "" : ", ") + fact.says;
    out.cells.insert(out.cells.end(), fact.cells.begin(), fact.cells.end());
  }
  std::string where;
  for (const Cell& cell : out.cells) where += (where.empty() ? "" : ", ") + cell.column + " / " + cell.key;
  out.where = where;
  out.says = "No fit gives all of these together, rounding allowed for: " + names + ".";
  if (facts.size() == 1)
    out.says = "No pair of nested fits on one sample gives this, rounding allowed for: " + names + ".";
  return out;
}

// The working in the reader's own figures.
std::vector<std::string> working(const JointTest& test, const DifferenceGraph& graph, double df, const Interval& wald,
                                 bool against_nothing) {
  std::vector<std::string> lines;
  const Interval long_share = exp(graph.limits(kTotal, kLong)), short_share = exp(graph.limits(kTotal, kShort));
  const std::string q = std::to_string(test.q), d = df_text(df);
  const bool by_r2 = std::isfinite(long_share.high) && std::isfinite(short_share.high);
  for (const auto& fact : graph.facts())
    if (!fact.says.empty()) lines.push_back(fact.says);
  if (by_r2) {
    const std::string low2 = number_text(1 - long_share.high), high2 = number_text(1 - long_share.low);
    lines.push_back("so R² of the longer fit lies between " + low2 + " and " + high2);
    if (against_nothing) {
      lines.push_back("F = R²/" + q + " ÷ (1 − R²)/" + d);
    } else {
      lines.push_back("and R² of the shorter between " + number_text(std::max(0.0, 1 - short_share.high)) + " and " +
                      number_text(1 - short_share.low));
      lines.push_back("F = (R²long − R²short)/" + q + " ÷ (1 − R²long)/" + d);
    }
  } else {
    const Interval ratio = exp(graph.limits(kLong, kShort));
    lines.push_back("SSRshort / SSRlong lies between " + number_text(ratio.low) + " and " + number_text(ratio.high));
    lines.push_back("F = (SSRshort / SSRlong − 1) × " + d + "/" + q);
  }
  lines.push_back("  lowest  " + number_text(wald.low / test.q, ShowRounding::Down));
  lines.push_back("  highest " + number_text(wald.high / test.q, ShowRounding::Up));
  return lines;
}

}  // namespace

RouteAnswer fit_evidence(const JointTest& test) {
  RouteAnswer out;
  if (!test.column || test.statistic != Statistic::F || test.column->estimator != Estimator::Ols) return out;
  const Column& column = *test.column;
  const bool own_constant = column.intercept || column.fixed_effects > 0;
  const bool against_nothing = test.all_slopes || (test.restricted && slopes(*test.restricted) == 0 && own_constant);
  if (!test.restricted && !test.restricted_fit && !against_nothing &&
      std::none_of(column.facts.begin(), column.facts.end(), [&](const Fact& f) { return same_test(test, f); }))
    return out;

  const std::optional<double> arithmetic = fit_df(column);
  double df = column.df ? static_cast<double>(*column.df) : arithmetic.value_or(test.df.denominator);
  const bool printed_fit = column.r2 || column.adj_r2 || column.ssr || column.residual_sd || column.loglik || column.overall_f;
  if (column.errors == Errors::Robust || column.errors == Errors::Clustered) {
    if (printed_fit && (test.restricted || test.restricted_fit || against_nothing))
      out.cautions.push_back(std::string("The formula from R² or sums of squares is not used: it gives the conventional F, and the "
                                         "errors of this column are ") +
                             (column.errors == Errors::Robust ? "robust" : "clustered") + ", whose joint test can differ.");
    return out;
  }
  if (!std::isfinite(df)) {
    if (printed_fit && !test.df_argument.known) out.asks = test.df_argument.asks;
    return out;
  }

  DifferenceGraph graph(kNodes);
  Facts facts(graph);
  Model longer = model_of(column, kLong);
  if (column.df && column.errors != Errors::Robust) longer.df = df;
  facts.of(longer);
  if (against_nothing) {
    graph.add({kTotal, kShort, Interval::point(0), "", {}});
  }
  if (test.restricted) {
    facts.of(model_of(*test.restricted, kShort));
  } else if (test.restricted_fit) {
    facts.of(model_of(*test.restricted_fit, column, test.q));
  }
  for (const Fact& fact : column.facts)
    if (same_test(test, fact)) facts.joint_test(column, fact, test.q, df);
  graph.add({kLong, kShort, {0, kInfinity}, "", {}});
  graph.add({kShort, kTotal, {0, kInfinity}, "", {}});
  graph.add({kLong, kTotalOfAdjusted, {-kInfinity, kInfinity}, "", {}});
  if (!facts.speaks_of(kLong) || !(facts.speaks_of(kShort) || against_nothing)) return out;

  graph.solve();
  if (graph.clash()) {
    out.clashes.push_back(clash_of(*graph.clash()));
    return out;
  }
  const Interval ratio = graph.limits(kLong, kShort);
  const Interval wald{std::max(0.0, df * std::expm1(ratio.low)), df * std::expm1(ratio.high)};
  if (wald.low <= 0 && std::isinf(wald.high)) return out;

  Evidence e;
  e.route = Route::Fit;
  e.wald = wald;
  e.df = test.df;
  e.p = p_of_wald(test, wald);
  e.low = e.high = Sharpness::Exact;
  e.attained = wald;
  e.assumes.push_back("conventional (classical) standard errors");
  if (!against_nothing) e.assumes.push_back("both fits use the same observations and the same outcome");
  if (column.intercept && column.fixed_effects == 0) e.assumes.push_back("a constant in the regression");
  if (column.errors == Errors::Unknown)
    e.cautions.push_back("The kind of standard errors is not stated; with robust or clustered errors the joint test can differ from "
                         "this formula.");
  if (column.weights)
    e.cautions.push_back("The column is weighted: the formula holds only if both fits use the same weights and R² is the weighted one.");
  e.working = working(test, graph, df, wald, against_nothing);
  for (const auto& fact : graph.facts()) e.rests_on.insert(e.rests_on.end(), fact.cells.begin(), fact.cells.end());
  for (const char* key : {"n", "k"}) {
    e.rests_on.push_back({column.id, "", key});
    if (test.restricted) e.rests_on.push_back({test.restricted->id, "", key});
  }
  out.evidence = std::move(e);
  return out;
}

}  // namespace rejoinder
