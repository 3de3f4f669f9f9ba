// From a table that was read to a review's tree, and blocks of a spreadsheet.
#include <algorithm>
#include <set>

#include "core/paste/cells.h"
#include "core/paste/labels.h"
#include "core/paste/table_text.h"

namespace rejoinder {
namespace {

// A figure as the review keeps it: as pasted, without the brackets that only say where it stood, without the
// gap after its sign and without gaps between its stars.
std::string kept_figure(const std::string& pasted) {
  std::string text = trimmed(pasted);
  if (text.size() > 2 && (text[0] == '(' || text[0] == '[' || text[0] == '{')) {
    const std::size_t close = text.find_first_of(")]}");
    if (close != std::string::npos)
      text = trimmed(text.substr(1, close - 1)) + trimmed(text.substr(close + 1));
  }
  const PlainLine line = plain_lines(text).front();
  std::string kept;
  for (int i = 0; i < line.size(); ++i) {
    const char c = line.plain[static_cast<std::size_t>(i)];
    const bool after_sign = c == ' ' && i > 0 && line.plain[static_cast<std::size_t>(i - 1)] == '-';
    const bool between_stars =
        c == ' ' && i + 1 < line.size() && line.plain[static_cast<std::size_t>(i + 1)] == '*';
    if (!after_sign && !between_stars &&
        (i == 0 || line.from[static_cast<std::size_t>(i)] != line.from[static_cast<std::size_t>(i - 1)]))
      kept += line.original(i, i + 1);
  }
  return kept;
}

// "(1.18–2.31)" as the two ends, each as printed.
std::vector<Node> interval_ends(const std::string& pasted) {
  const std::string inner = kept_figure(pasted);
  const PlainLine line = plain_lines(inner).front();
  for (int i = 1; i < line.size(); ++i) {
    const std::string_view rest = std::string_view(line.plain).substr(static_cast<std::size_t>(i));
    const bool blank_before = line.plain[static_cast<std::size_t>(i - 1)] == ' ';
    const int mark = rest[0] == ';' || (rest[0] == ',' && (rest.size() < 2 || rest[1] == ' ')) ? 1
                     : blank_before && rest.substr(0, 3) == "to "                              ? 3
                     : rest[0] == '-' && line.plain[static_cast<std::size_t>(i - 1)] != 'e'    ? 1
                     : rest[0] == ','                                                          ? 1
                                                                                               : 0;
    if (mark == 0) continue;
    return {Node::quoted(trimmed(line.original(0, i))),
            Node::quoted(trimmed(line.original(i + mark, line.size())))};
  }
  return {Node::quoted(inner)};
}

// "(1)" gives "1", "Model A" gives "model a"; unique among `used`.
std::string column_id(const std::string& heading, std::size_t index, std::set<std::string>& used) {
  std::string id = plain_label(plain_lines(heading).front().plain);
  std::replace(id.begin(), id.end(), ' ', '-');
  if (id.size() > 24) id.resize(24);
  if (id.empty()) id = std::to_string(index + 1);
  std::string unique = id;
  for (int n = 2; !used.insert(unique).second; ++n) unique = id + "-" + std::to_string(n);
  return unique;
}

std::string whole_number(const std::string& text, char decimal) {
  std::string digits;
  const PlainLine line = plain_lines(text).front();
  for (const char c : line.plain) {
    if (c >= '0' && c <= '9')
      digits += c;
    else if (c == decimal)
      return {};
  }
  return digits.empty() || (digits.size() > 1 && digits[0] == '0') ? std::string() : digits;
}

bool is_count(const std::string& key) { return key == "n" || key == "k" || key == "clusters" || key == "df"; }

}  // namespace

Node review_from_table(const PastedTable& table) {
  Node review = Node::table(false);
  review.set("rejoinder", Node::literal("1"));
  review.set("title", Node::quoted(table.title.empty() ? "A pasted table" : table.title));
  if (table.decimal == ',') review.set("decimal", Node::quoted(","));
  if (!table.stars.empty()) {
    std::vector<Node> levels;
    for (const double level : table.stars) {
      char text[32];
      std::snprintf(text, sizeof text, "%.6g", level);
      levels.push_back(Node::quoted(text));
    }
    review.set("stars", Node::list(std::move(levels)));
  }
  if (table.variance_table()) {
    Node sources = Node::list();
    sources.inline_form = false;
    for (const PastedRow& row : table.rows) {
      Node source = Node::table(false);
      source.set("name", Node::quoted(row.label));
      for (std::size_t c = 0; c < row.cells.size(); ++c) {
        if (row.cells[c].empty()) continue;
        const std::string key = source_key(plain_lines(table.columns[c]).front().plain);
        const std::string digits = key == "df" ? whole_number(row.cells[c].text, table.decimal) : "";
        source.set(key,
                   digits.empty() ? Node::quoted(kept_figure(row.cells[c].text)) : Node::literal(digits));
      }
      sources.items.push_back(std::move(source));
    }
    review.set("source", std::move(sources));
    return review;
  }
  std::set<std::string> used;
  Node columns = Node::list();
  columns.inline_form = false;
  for (std::size_t c = 0; c < table.columns.size(); ++c) {
    const bool ratios = is_ratio_heading(table.columns[c]);
    Node column = Node::table(false);
    column.set("id", Node::quoted(column_id(table.columns[c], c, used)));
    column.set("label",
               Node::quoted(table.columns[c].empty() ? "(" + std::to_string(c + 1) + ")" : table.columns[c]));
    if (!table.errors.empty()) column.set("errors", Node::quoted(table.errors));
    Node terms = Node::list();
    terms.inline_form = false;
    for (const PastedRow& row : table.rows) {
      const PastedCell& cell = row.cells[c];
      if (cell.empty()) continue;
      if (row.kind == PastedRow::Kind::Foot) {
        if (row.key.empty()) continue;
        const std::string digits = is_count(row.key) ? whole_number(cell.text, table.decimal) : "";
        column.set(row.key, digits.empty() ? Node::quoted(kept_figure(cell.text)) : Node::literal(digits));
      } else if (row.kind == PastedRow::Kind::Term) {
        Node term = Node::table(false);
        term.set("name", Node::quoted(row.label));
        if (row.intercept) term.set("kind", Node::quoted("intercept"));
        term.set(ratios ? "ratio" : "coef", Node::quoted(kept_figure(cell.text)));
        for (std::size_t i = 0; i < row.more.size(); ++i) {
          if (row.more_column[i] != static_cast<int>(c) || row.more[i].key.empty()) continue;
          if (row.more[i].key == "ci")
            term.set("ci", Node::list(interval_ends(row.more[i].text)));
          else
            term.set(row.more[i].key, Node::quoted(kept_figure(row.more[i].text)));
        }
        terms.items.push_back(std::move(term));
      }
    }
    if (!terms.items.empty()) column.set("term", std::move(terms));
    columns.items.push_back(std::move(column));
  }
  if (!columns.items.empty()) review.set("column", std::move(columns));
  return review;
}

std::vector<std::vector<std::string>> read_block(std::string_view text) {
  std::vector<PlainLine> lines = plain_lines(text);
  while (!lines.empty() && trimmed(lines.back().plain).empty()) lines.pop_back();
  if (lines.empty()) return {};
  const Divider divider = divider_of(lines);
  char mark = divider == Divider::Tabs         ? '\t'
              : divider == Divider::Commas     ? ','
              : divider == Divider::Semicolons ? ';'
                                               : '\0';
  if (mark == '\0') {
    // One column of a sheet: a figure a line.
    if (lines.size() < 2) return {};
    std::vector<std::vector<std::string>> block;
    for (const PlainLine& line : lines) {
      const std::string cell = trimmed(line.plain);
      const auto figure = figure_at(cell, 0);
      if (!cell.empty() && (!figure || figure->end != static_cast<int>(cell.size()))) return {};
      block.push_back({trimmed(std::string(line.pasted))});
    }
    return block;
  }
  std::vector<std::vector<std::string>> block;
  for (const PlainLine& line : lines) {
    std::vector<std::string> row;
    bool quoted = false;
    int start = 0;
    for (int i = 0; i <= line.size(); ++i) {
      if (i < line.size() && line.plain[static_cast<std::size_t>(i)] == '"') quoted = !quoted;
      if (i < line.size() && (line.plain[static_cast<std::size_t>(i)] != mark || quoted)) continue;
      std::string cell = trimmed(line.original(start, i));
      if (cell.size() >= 2 && cell.front() == '"' && cell.back() == '"')
        cell = cell.substr(1, cell.size() - 2);
      row.push_back(std::move(cell));
      start = i + 1;
    }
    block.push_back(std::move(row));
  }
  return block;
}

}  // namespace rejoinder
