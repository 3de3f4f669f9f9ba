#include "shell/quick_review.h"

#include <algorithm>
#include <cstdlib>
#include <sstream>

#include "core/algebra/restrictions.h"

namespace rejoinder {
namespace {

void put(Node& table, const char* key, const std::string& text) {
  if (!text.empty()) table.set(key, Node::quoted(text));
}

Node start() {
  Node document = Node::table(false);
  document.set("rejoinder", Node::literal("1"));
  return document;
}

Node column_node(const std::string& id, const std::string& n, const std::string& k) {
  Node column = Node::table(false);
  put(column, "id", id);
  put(column, "n", n);
  put(column, "k", k);
  return column;
}

Node tables(std::vector<Node> items) {
  Node list = Node::list(std::move(items));
  list.inline_form = false;
  return list;
}

Node claim_node(const QuickClaim& claim, const std::string& column) {
  Node node = Node::table(false);
  node.set("id", Node::quoted("claim"));
  put(node, "column", column);
  put(node, "restrictions", claim.restrictions);
  put(node, "f", claim.f);
  put(node, "chi2", claim.chi2);
  put(node, "p", claim.p);
  put(node, "level", claim.level);
  if (!claim.df.empty()) {
    std::vector<Node> parts;
    std::stringstream text(claim.df);
    for (std::string part; std::getline(text, part, ',');) parts.push_back(Node::quoted(part));
    node.set("df", Node::list(std::move(parts)));
  }
  return node;
}

std::vector<std::vector<std::string>> csv_rows(const std::string& text) {
  std::vector<std::vector<std::string>> rows;
  std::stringstream lines(text);
  for (std::string line; std::getline(lines, line);) {
    std::vector<std::string> cells(1);
    bool quoted = false;
    for (const char c : line) {
      if (c == '"')
        quoted = !quoted;
      else if ((c == ',' || c == ';' || c == '\t') && !quoted)
        cells.emplace_back();
      else if (c != '\r')
        cells.back() += c;
    }
    for (std::string& cell : cells) {
      const auto first = cell.find_first_not_of(" "), last = cell.find_last_not_of(" ");
      cell = first == std::string::npos ? "" : cell.substr(first, last - first + 1);
    }
    if (std::any_of(cells.begin(), cells.end(), [](const std::string& c) { return !c.empty(); })) rows.push_back(std::move(cells));
  }
  return rows;
}

bool numeric(const std::string& cell) { return !cell.empty() && cell.find_first_of("0123456789") != std::string::npos && cell.find_first_of("abcdfghijklmnopqrstuvwxyzABCDFGHIJKLMNOPQRSTUVWXYZ_") == std::string::npos; }

}  // namespace

Node quick_fit(const QuickFit& flags) {
  Node document = start();
  Node longer = column_node("long", flags.n, flags.k), shorter = column_node("short", flags.n, "");
  longer.set("label", Node::quoted("the longer fit"));
  shorter.set("label", Node::quoted("the shorter fit"));
  put(longer, "r2", flags.r2);
  put(longer, "adj_r2", flags.adj_r2);
  put(longer, "ssr", flags.ssr);
  put(longer, "loglik", flags.loglik);
  put(shorter, "r2", flags.r2_short);
  put(shorter, "adj_r2", flags.adj_r2_short);
  put(shorter, "ssr", flags.ssr_short);
  put(shorter, "loglik", flags.loglik_short);
  const long k = std::strtol(flags.k.c_str(), nullptr, 10), q = std::strtol(flags.q.c_str(), nullptr, 10);
  put(shorter, "k", std::to_string(k - q));
  document.set("column", tables({longer, shorter}));
  Node claim = claim_node(flags.claim, "long");
  claim.set("restricted", Node::quoted("short"));
  document.set("claim", tables({claim}));
  return document;
}

Node quick_limits(const QuickLimits& flags) {
  Node document = start();
  Node column = column_node("column", flags.n, flags.k);
  if (!flags.correlation_low.empty())
    column.set("correlation_within", Node::list({Node::quoted(flags.correlation_low), Node::quoted(flags.correlation_high)}));
  std::vector<Node> terms;
  QuickClaim claim = flags.claim;
  for (const QuickTerm& term : flags.terms) {
    Node node = Node::table(false);
    put(node, "name", term.name);
    put(node, "coef", term.coef);
    put(node, flags.second_is_t ? "t" : "se", term.se);
    terms.push_back(std::move(node));
    if (flags.claim.restrictions.empty())
      claim.restrictions += (claim.restrictions.empty() ? "" : ", ") + TermName{"", term.name}.text() + " = 0";
  }
  column.set("term", tables(std::move(terms)));
  document.set("column", tables({column}));
  document.set("claim", tables({claim_node(claim, "column")}));
  return document;
}

Result<Node> quick_wald(const QuickWald& flags) {
  const auto coefficients = csv_rows(flags.coefficients);
  auto covariance = csv_rows(flags.covariance);
  Node document = start();
  Node column = column_node("column", flags.n, flags.k);
  put(column, "df", flags.df);
  std::vector<Node> terms, names;
  QuickClaim claim = flags.claim;
  for (std::size_t i = 0; i < coefficients.size(); ++i) {
    const auto& row = coefficients[i];
    if (row.size() < 2)
      return Error{"coefficients, line " + std::to_string(i + 1), "a name and a coefficient are needed, parted by a comma", "write a line like fare,-0.131"};
    if (i == 0 && !numeric(row[1])) continue;  // a line of headings
    Node node = Node::table(false);
    put(node, "name", row[0]);
    put(node, "coef", row[1]);
    terms.push_back(std::move(node));
    names.push_back(Node::quoted(row[0]));
    if (flags.claim.restrictions.empty())
      claim.restrictions += (claim.restrictions.empty() ? "" : ", ") + TermName{"", row[0]}.text() + " = 0";
  }
  if (terms.empty()) return Error{"coefficients", "no coefficient was found", "write one line a term, like fare,-0.131"};
  // A line and a column of names are taken off.
  if (!covariance.empty() && std::none_of(covariance[0].begin(), covariance[0].end(), numeric)) covariance.erase(covariance.begin());
  for (auto& row : covariance)
    if (!row.empty() && !numeric(row[0])) row.erase(row.begin());
  if (covariance.size() != terms.size())
    return Error{"covariance", "it has " + std::to_string(covariance.size()) + " lines for " + std::to_string(terms.size()) + " coefficients",
                 "give one line a coefficient, in the same order"};
  std::vector<Node> lower;
  for (std::size_t i = 0; i < covariance.size(); ++i) {
    if (covariance[i].size() <= i)
      return Error{"covariance, line " + std::to_string(i + 1), "at least " + std::to_string(i + 1) + " figures are needed",
                   "give the whole matrix or its lower triangle"};
    std::vector<Node> cells;
    for (std::size_t j = 0; j <= i; ++j) cells.push_back(Node::quoted(covariance[i][j]));
    lower.push_back(Node::list(std::move(cells)));
  }
  Node matrix = Node::table(false);
  matrix.set("terms", Node::list(std::move(names)));
  matrix.set("lower", Node::list(std::move(lower)));
  column.set("term", tables(std::move(terms)));
  column.set("covariance", std::move(matrix));
  document.set("column", tables({column}));
  document.set("claim", tables({claim_node(claim, "column")}));
  return document;
}

}  // namespace rejoinder
