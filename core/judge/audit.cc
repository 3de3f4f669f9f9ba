#include "core/evidence/coefficient.h"
#include "core/evidence/degrees_of_freedom.h"
#include "core/judge/judge.h"
#include "core/number/number_text.h"

namespace rejoinder {
namespace {

// R² and adjusted R² together say what the residual df are: (1 - adjusted) / (1 - R²) = total df / residual df.
void df_against_fit(const Column& column, std::vector<AuditLine>& out) {
  if (!column.r2 || !column.adj_r2 || column.fixed_effects > 0) return;
  const std::optional<double> total = total_df(column), df = fit_df(column);
  if (!total || !df) return;
  const Interval ratio = (Interval::point(1) - column.r2->possible) / (Interval::point(1) - column.adj_r2->possible);
  const Interval allowed = Interval::point(*total) * ratio;
  AuditLine line;
  line.where = column.id + " / r2, adj_r2, n, k";
  line.cells = {{column.id, "", "r2"}, {column.id, "", "adj_r2"}, {column.id, "", "n"}, {column.id, "", "k"}};
  const std::string words = "R² and adjusted R² of " + column_name(column) + " allow residual df of " + range_text(allowed) + "; n and k give " +
                            df_text(*df) + ".";
  if (allowed.contains(*df)) {
    line.match = Match::Fits;
    line.says = words;
  } else if (allowed.low <= *df + 1e-9 * *df && *df - 1e-9 * *df <= allowed.high) {
    line.match = Match::Strained;
    line.says = words;
  } else {
    line.match = Match::Conflicts;
    line.says = words + " Could fixed effects, another sample or another count of regressors explain it?";
  }
  out.push_back(std::move(line));
}

// Each term's own figures: coefficient, s.e., t, p, interval and stars against one another.
void term_figures(const Review& review, const Column& column, std::vector<AuditLine>& out) {
  const double df = test_df(column).denominator;
  for (const Term& term : column.terms) {
    const CoefficientLimits limits = coefficient_limits(review, column, term, df);
    for (const Clash& clash : limits.clashes)
      out.push_back({clash.where, clash.mild ? Match::Strained : Match::Conflicts, clash.says, clash.cells});
    if (!limits.clashes.empty() || limits.cells.size() < 3) continue;
    std::string keys;
    for (const Cell& cell : limits.cells) keys += (keys.empty() ? "" : ", ") + cell.key;
    out.push_back({column.id + " / " + term.name + " / " + keys, Match::Fits,
                   "The figures of “" + term.name + "” fit together: t lies between " + number_text(limits.t.low, ShowRounding::Down) + " and " +
                       number_text(limits.t.high, ShowRounding::Up) + ".",
                   limits.cells});
  }
}

}  // namespace

std::vector<AuditLine> audit_columns(const Review& review) {
  std::vector<AuditLine> out;
  for (const Column& column : review.columns) {
    term_figures(review, column, out);
    df_against_fit(column, out);
  }
  return out;
}

}  // namespace rejoinder
