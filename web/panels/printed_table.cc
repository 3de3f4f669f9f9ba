#include "web/panels/printed_table.h"

#include <algorithm>
#include <set>

#include "web/model/document_view.h"

namespace rejoinder {
namespace {

struct Foot {
  FootRow row;
  bool always;
};
constexpr Foot kFoot[] = {
    {{"n", "n"}, true},
    {{"k", "k"}, true},
    {{"r2", "R²"}, true},
    {{"adj_r2", "adjusted R²"}, false},
    {{"ssr", "residual sum of squares"}, false},
    {{"residual_sd", "s.e. of the regression"}, false},
    {{"loglik", "log-likelihood"}, false},
    {{"overall_f", "overall F"}, false},
    {{"overall_p", "p of the overall F"}, false},
    {{"df", "residual df"}, false},
    {{"clusters", "clusters"}, false},
    {{"fixed_effects", "fixed effects taken out"}, false},
    {{"tss", "total sum of squares"}, false},
    {{"outcome_sd", "s.d. of the outcome"}, false},
    {{"null_loglik", "null log-likelihood"}, false},
};

const Printed* printed_in(const Column& column, std::string_view key) {
  if (key == "r2") return &column.r2;
  if (key == "adj_r2") return &column.adj_r2;
  if (key == "ssr") return &column.ssr;
  if (key == "tss") return &column.tss;
  if (key == "outcome_sd") return &column.outcome_sd;
  if (key == "residual_sd") return &column.residual_sd;
  if (key == "loglik") return &column.loglik;
  if (key == "null_loglik") return &column.null_loglik;
  if (key == "overall_f") return &column.overall_f;
  if (key == "overall_p") return &column.overall_p;
  return nullptr;
}

const Printed* printed_in(const Term& term, std::string_view key) {
  if (key == "coef") return &term.coef;
  if (key == "ratio") return &term.ratio;
  if (key == "se") return &term.se;
  if (key == "t") return &term.t;
  if (key == "p") return &term.p;
  return nullptr;
}

// Counts are plain numbers in the review; whether one was read tells whether its text could be.
bool counted(const Column& column, std::string_view key) {
  if (key == "n") return column.n.has_value();
  if (key == "k") return column.k.has_value();
  if (key == "df") return column.df.has_value();
  if (key == "clusters") return column.clusters.has_value();
  return true;
}

const Column* read_column(const AppState& state, int column) {
  return column >= 0 && column < static_cast<int>(state.review.columns.size())
             ? &state.review.columns[static_cast<size_t>(column)]
             : nullptr;
}

}  // namespace

PrintedTable printed_table(const AppState& state, bool all_figures) {
  PrintedTable table;
  table.columns = count_of(state.document, "column");
  for (int c = 0; c < table.columns; ++c) {
    const auto column = static_cast<size_t>(c);
    size_t after = 0;  // a term new to the table goes behind the one it follows in its own column
    int at = 0;
    for (const std::string& name : term_names(state.document, c)) {
      auto row = std::find_if(table.rows.begin(), table.rows.end(),
                              [&](const TermRow& r) { return r.name == name && r.term[column] < 0; });
      if (row == table.rows.end()) {
        row = table.rows.insert(table.rows.begin() + static_cast<long>(after),
                                {name, std::vector<int>(static_cast<size_t>(table.columns), -1), {}});
      }
      row->term[column] = at++;
      after = static_cast<size_t>(row - table.rows.begin()) + 1;
    }
  }
  std::set<std::string> stops = {""};
  for (TermRow& row : table.rows)
    row.stop = stops.insert(row.name).second ? row.name : "#" + std::to_string(&row - table.rows.data());
  for (const Foot& foot : kFoot) {
    bool shown = foot.always || all_figures;
    for (int c = 0; c < table.columns && !shown; ++c) {
      shown = !column_text(state.document, c, foot.row.key).empty() ||
              (std::string_view(foot.row.key) == "clusters" &&
               column_text(state.document, c, "errors") == "clustered");
    }
    if (shown) table.foot.push_back(foot.row);
  }
  return table;
}

TableFacts table_facts(const AppState& state, bool all_figures) {
  TableFacts facts{printed_table(state, all_figures), second_figure(state), {}, {}, {}};
  std::set<std::string> resting;  // "column term key" of the cells the chosen finding rests on
  const auto name_of = [](const Cell& cell) { return cell.column + '\x1f' + cell.term + '\x1f' + cell.key; };
  if (state.claim >= 0 && state.claim < static_cast<int>(state.checked.findings.size())) {
    for (const Cell& cell : state.checked.findings[static_cast<size_t>(state.claim)].rests_on)
      resting.insert(name_of(cell));
  }
  const auto fact = [&](const TableCell& cell, bool listed) {
    CellFacts made{cell, listed, {}, {}, false};
    if (!listed) return made;
    made.text = text_in(state, cell);
    made.trouble = trouble_in(state, cell);
    made.rests = !resting.empty() && resting.contains(name_of(named_cell(state, cell)));
    return made;
  };
  for (const TermRow& row : facts.table.rows) {
    for (int c = 0; c < facts.table.columns; ++c) {
      const int term = row.term[static_cast<size_t>(c)];
      const bool listed = term >= 0;
      facts.coefficients.push_back(
          fact({c, term, listed ? coefficient_key(state, c, term) : "coef"}, listed));
      facts.seconds.push_back(fact({c, term, facts.second}, listed));
    }
  }
  for (const FootRow& row : facts.table.foot) {
    for (int c = 0; c < facts.table.columns; ++c) facts.foot.push_back(fact({c, -1, row.key}, true));
  }
  return facts;
}

std::string text_in(const AppState& state, const TableCell& cell) { return cell_text(state.document, cell); }

std::string coefficient_key(const AppState& state, int column, int term) {
  const bool ratio = cell_text(state.document, {column, term, "coef"}).empty() &&
                     !cell_text(state.document, {column, term, "ratio"}).empty();
  return ratio ? "ratio" : "coef";
}

std::string column_number(int column) { return "(" + std::to_string(column + 1) + ")"; }

int column_at(const AppState& state, std::string_view id) {
  for (int c = 0; c < count_of(state.document, "column"); ++c) {
    if (!id.empty() && column_text(state.document, c, "id") == id) return c;
  }
  return -1;
}

std::string second_figure(const AppState& state) { return second_key(state.document); }

const char* second_figure_words(std::string_view key) {
  return key == "t" ? "t" : key == "p" ? "p" : key == "ci" ? "interval" : "standard error";
}

const PrintedNumber* number_in(const AppState& state, const TableCell& cell) {
  const Column* const column = read_column(state, cell.column);
  if (!column) return nullptr;
  const Printed* printed = nullptr;
  if (cell.term < 0) {
    printed = printed_in(*column, cell.key);
  } else if (const Term* term = column->term(text_in(state, {cell.column, cell.term, "name"}))) {
    printed = printed_in(*term, cell.key);
  }
  return printed && *printed ? &**printed : nullptr;
}

std::string trouble_in(const AppState& state, const TableCell& cell) {
  const std::string text = text_in(state, cell);
  if (text.empty() || cell.key == "ci" || cell.key == "name") return {};
  const Column* const column = read_column(state, cell.column);
  if (!column || number_in(state, cell)) return {};
  if (cell.term < 0 && !printed_in(*column, cell.key)) {
    if (counted(*column, cell.key)) return {};
    const Result<long> count = read_count(text);
    return count.ok() ? std::string() : count.error().text();
  }
  const NumberReading how{state.review.decimal, state.review.rounding, Interval::everything()};
  const Result<PrintedNumber> number = read_printed_number(text, how);
  if (!number.ok()) return number.error().text();
  // A number, but not one this cell can hold: the review's own message says why.
  const std::string term = cell.term < 0 ? std::string() : text_in(state, {cell.column, cell.term, "name"});
  for (const Problem& problem : state.review.problems) {
    const bool here =
        problem.key.find(column->id) != std::string::npos && problem.key.find(term) != std::string::npos &&
        problem.key.size() >= cell.key.size() &&
        problem.key.compare(problem.key.size() - cell.key.size(), cell.key.size(), cell.key) == 0;
    if (here) return problem.mend.empty() ? problem.what : problem.what + "; " + problem.mend;
  }
  return "this figure cannot stand here";
}

Cell named_cell(const AppState& state, const TableCell& cell) {
  return {column_text(state.document, cell.column, "id"),
          cell.term < 0 ? std::string() : text_in(state, {cell.column, cell.term, "name"}), cell.key};
}

bool rests_on(const AppState& state, const TableCell& cell) {
  if (state.claim < 0 || state.claim >= static_cast<int>(state.checked.findings.size())) return false;
  const std::vector<Cell>& cells = state.checked.findings[static_cast<size_t>(state.claim)].rests_on;
  return !cells.empty() && std::find(cells.begin(), cells.end(), named_cell(state, cell)) != cells.end();
}

std::vector<int> feeds(const AppState& state, const TableCell& cell) {
  const Cell named = named_cell(state, cell);
  std::vector<int> claims;
  for (size_t i = 0; i < state.checked.findings.size(); ++i) {
    const std::vector<Cell>& cells = state.checked.findings[i].rests_on;
    if (std::find(cells.begin(), cells.end(), named) != cells.end()) claims.push_back(static_cast<int>(i));
  }
  return claims;
}

std::string stands_for(const PrintedNumber& number) {
  if (number.exact) return number.text + " is taken as exact";
  // The ends of a rounding are short decimals; one place more than printed writes them out.
  const auto end = [&](double x) {
    if (std::isinf(x)) return std::string(x > 0 ? "∞" : "−∞");
    char digits[64];
    std::snprintf(digits, sizeof digits, "%.*f", std::clamp(number.decimal_places + 1, 0, 17),
                  x == 0 ? 0.0 : x);
    return digits[0] == '-' ? "−" + std::string(digits + 1) : std::string(digits);
  };
  return number.text + " stands for " + end(number.possible.low) + " to " + end(number.possible.high);
}

}  // namespace rejoinder
