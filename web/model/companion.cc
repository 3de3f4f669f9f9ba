#include "web/model/companion.h"

#include <algorithm>

#include "core/number/number_text.h"
#include "core/report/findings_text.h"
#include "web/model/document_view.h"
#include "web/model/findings_html.h"

namespace rejoinder {
namespace {

struct FootLine {
  const char* key;
  const char* label;
};
constexpr FootLine kFoot[] = {{"n", "n"},
                              {"k", "k (regressors)"},
                              {"df", "residual df"},
                              {"clusters", "clusters"},
                              {"fixed_effects", "fixed effects"},
                              {"r2", "R\xC2\xB2"},
                              {"adj_r2", "adjusted R\xC2\xB2"},
                              {"ssr", "residual sum of squares"},
                              {"tss", "total sum of squares"},
                              {"residual_sd", "residual s.d."},
                              {"outcome_sd", "s.d. of the outcome"},
                              {"loglik", "log-likelihood"},
                              {"null_loglik", "log-likelihood of the constant alone"},
                              {"overall_f", "overall F"},
                              {"overall_p", "p of the overall F"},
                              {"estimator", "estimator"},
                              {"errors", "errors"},
                              {"outcome", "outcome"},
                              {"weights", "weighted"},
                              {"intercept", "constant included"},
                              {"correlation_within", "correlations assumed within"}};

std::string heading_cell(const char* scope, std::string_view text) {
  return std::string("<th scope=\"") + scope + "\">" + escaped(text) + "</th>";
}

std::string column_name(const Node& document, int column) {
  const std::string label = column_text(document, column, "label");
  return label.empty() ? column_text(document, column, "id") : label;
}

// Coefficient first, what stands beneath it with its name: "-0.131 (s.e. 0.052)".
std::string term_cell(const Node& document, int column, int term) {
  const auto text = [&](const char* key) { return cell_text(document, {column, term, key}); };
  std::string out = text("coef");
  if (const std::string ratio = text("ratio"); !ratio.empty()) out += "ratio " + ratio;
  std::string beneath;
  const struct {
    const char *key, *name;
  } second[] = {{"se", "s.e."}, {"t", "t"}, {"p", "p"}, {"ci", "interval"}};
  for (const auto& figure : second)
    if (const std::string value = text(figure.key); !value.empty())
      beneath += (beneath.empty() ? "" : "; ") + std::string(figure.name) + " " + value;
  if (!beneath.empty()) out += (out.empty() ? "(" : " (") + beneath + ")";
  if (const std::string stars = text("stars"); !stars.empty())
    out += " " + stars + (stars == "1" ? " star" : " stars");
  return out.empty() ? "in the column, no figure" : out;
}

std::string table_html(const Node& document) {
  const int columns = count_of(document, "column");
  if (columns == 0) return element("p", "No table yet. Paste one, or type five figures.");
  std::string out = "<table>\n<caption>The table as printed: " + escaped(review_text(document, "title")) +
                    "</caption>\n<thead><tr>";
  out += heading_cell("col", "term");
  for (int c = 0; c < columns; ++c) out += heading_cell("col", column_name(document, c));
  out += "</tr></thead>\n<tbody>\n";
  for (const std::string& name : all_term_names(document)) {
    out += "<tr>" + heading_cell("row", name);
    for (int c = 0; c < columns; ++c) {
      const int term = term_index(document, c, name);
      out += "<td>" + (term < 0 ? std::string("not in the column") : escaped(term_cell(document, c, term))) +
             "</td>";
    }
    out += "</tr>\n";
  }
  for (const FootLine& line : kFoot) {
    std::string cells;
    bool any = false;
    for (int c = 0; c < columns; ++c) {
      const std::string text = column_text(document, c, line.key);
      any = any || !text.empty();
      cells += "<td>" + (text.empty() ? std::string("not given") : escaped(text)) + "</td>";
    }
    if (any) out += "<tr>" + heading_cell("row", line.label) + cells + "</tr>\n";
  }
  return out + "</tbody>\n</table>\n";
}

std::string triangle_html(const Node& matrix, const std::string& caption) {
  const Node* names = matrix.find("terms");
  const Node* rows = matrix.find("lower");
  if (!names || !rows || names->kind != Node::Kind::List || rows->kind != Node::Kind::List) return {};
  std::string out =
      "<table>\n<caption>" + escaped(caption) + "</caption>\n<thead><tr>" + heading_cell("col", "term");
  for (const Node& name : names->items) out += heading_cell("col", shown_text(&name));
  out += "</tr></thead>\n<tbody>\n";
  for (std::size_t i = 0; i < rows->items.size(); ++i) {
    out +=
        "<tr>" + heading_cell("row", i < names->items.size() ? shown_text(&names->items[i]) : std::string());
    for (const Node& cell : rows->items[i].items) out += "<td>" + escaped(shown_text(&cell)) + "</td>";
    out += "</tr>\n";
  }
  return out + "</tbody>\n</table>\n";
}

// Whatever else the columns and the review hold, in their own words.
std::string extras_html(const Node& document) {
  std::string out;
  for (int c = 0; c < count_of(document, "column"); ++c) {
    const Node* column = row_of(document, "column", c);
    if (!column) continue;
    const std::string name = column_name(document, c);
    if (const Node* matrix = column->find("covariance"); matrix && matrix->kind == Node::Kind::Table)
      out += triangle_html(*matrix, "Covariances of the estimates, " + name);
    if (const Node* matrix = column->find("correlation"); matrix && matrix->kind == Node::Kind::Table)
      out += triangle_html(*matrix, "Correlations of the estimates, " + name);
    std::vector<std::string> facts;
    for (int i = 0; i < count_of(*column, "fact"); ++i)
      if (const Node* fact = row_of(*column, "fact", i)) facts.push_back(shown_text(fact));
    for (const char* key : {"means", "groups"})
      if (const Node* value = column->find(key)) facts.push_back(std::string(key) + ": " + shown_text(value));
    if (!facts.empty()) out += element("h3", "Also printed for " + name) + bullets(facts);
  }
  std::vector<std::string> sources;
  for (int i = 0; i < count_of(document, "source"); ++i)
    if (const Node* source = row_of(document, "source", i)) sources.push_back(shown_text(source));
  if (!sources.empty()) out += element("h3", "Analysis of variance") + bullets(sources);
  if (const Node* variables = document.find("variables"))
    out += element("h3", "Table of variables") + element("p", shown_text(variables));
  if (const std::string note = review_text(document, "note"); !note.empty())
    out += element("h3", "Note") + element("p", note);
  return out;
}

std::string asks_html(const Finding& finding) {
  if (finding.ask.empty()) return element("p", "Nothing more is needed.");
  std::vector<std::string> items;
  for (const Ask& ask : finding.ask) {
    std::string item = ask.figure;
    if (ask.turns_at) item += "; the decision turns between " + range_text(*ask.turns_at);
    if (!ask.sentence.empty()) item += ". " + ask.sentence;
    items.push_back(item);
  }
  return bullets(items, "ol");
}

std::string label_of_column(const Node& document, const std::string& id) {
  for (int c = 0; c < count_of(document, "column"); ++c)
    if (column_text(document, c, "id") == id) return column_name(document, c);
  return id;
}

std::string claim_html(const AppState& state, int index) {
  const Finding& finding = state.checked.findings[static_cast<std::size_t>(index)];
  const bool chosen = index == state.claim;
  std::string out = chosen ? "<article aria-current=\"true\">\n" : "<article>\n";
  const std::string says = finding.says.empty() ? finding.restrictions : finding.says;
  out +=
      element("h3", std::to_string(index + 1) + ". " + (says.empty() ? "A claim without words yet" : says));
  out += element("p", state_words(finding.state) + (chosen ? " (the chosen claim)" : ""));
  out += element("p", finding.headline) + element("p", finding.sentence);
  if (!finding.restrictions.empty()) {
    std::string about = "Restrictions: " + finding.restrictions;
    if (!finding.column.empty()) about += ", in column " + label_of_column(state.document, finding.column);
    if (!finding.page.empty()) about += ", " + finding.page;
    out += element("p", about);
  }
  out += parts_html(finding);
  out += element("h4", "What would settle it") + asks_html(finding);
  if (!finding.evidence.empty()) out += element("h4", "Evidence") + evidence_html(finding);
  if (!finding.working.empty()) out += element("h4", "Working") + bullets(finding.working, "ol");
  if (!finding.slips.empty()) {
    std::vector<std::string> slips;
    for (const Slip& slip : finding.slips) slips.push_back(slip.kind + ": " + slip.says);
    out += element("h4", "What could explain it?") + bullets(slips);
  }
  if (!finding.assumes.empty()) out += element("h4", "Assumptions") + bullets(finding.assumes);
  if (!finding.cautions.empty()) out += element("h4", "Cautions") + bullets(finding.cautions);
  if (!finding.paragraph.empty())
    out += element("h4", "Words for the report") + element("p", finding.paragraph);
  return out + "</article>\n";
}

std::string audit_html(const CheckedReview& checked) {
  std::string out = element("h2", "Do the figures fit together?");
  if (checked.audit.empty())
    return out + element("p", "No two printed figures could be set against each other yet.");
  out += "<table>\n<caption>Printed figures set against each other</caption>\n<thead><tr>" +
         heading_cell("col", "where") + heading_cell("col", "match") + heading_cell("col", "what was found") +
         "</tr></thead>\n<tbody>\n";
  for (const AuditLine& line : checked.audit)
    out += "<tr>" + heading_cell("row", line.where) + "<td>" + escaped(contract_word(line.match)) +
           "</td><td>" + escaped(line.says) + "</td></tr>\n";
  return out + "</tbody>\n</table>\n";
}

std::string problems_html(const CheckedReview& checked) {
  if (checked.problems.empty()) return {};
  std::vector<std::string> items;
  for (const Problem& problem : checked.problems) items.push_back(problem.text());
  return element("h2", "What could not be read") + bullets(items);
}

}  // namespace

std::string companion_html(const AppState& state) {
  const std::string title = review_text(state.document, "title");
  std::string out = element("h1", title.empty() ? "Untitled review" : title);
  out += element("p", state.notice);
  out += element("h2", "From the paper") + table_html(state.document) + extras_html(state.document);
  out += element("h2", "Claims") + element("p", totals_text(state.checked));
  if (state.checked.findings.empty())
    out += element("p", "No claim yet. Paste the sentence that states one, or tick the terms it is about.");
  for (int i = 0; i < static_cast<int>(state.checked.findings.size()); ++i) out += claim_html(state, i);
  return out + audit_html(state.checked) + problems_html(state.checked);
}

}  // namespace rejoinder
