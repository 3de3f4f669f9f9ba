#include "core/paste/finish_table.h"

#include <algorithm>
#include <cctype>

#include "core/paste/labels.h"
#include "core/paste/second_figure.h"

namespace rejoinder {
namespace {

// Lines such as "Controls  yes  yes", or notes on further controls: k is then not the number of rows.
bool hides_regressors(const PastedTable& table) {
  for (const PastedRow& row : table.rows)
    if (row.kind == PastedRow::Kind::Mark && !row.intercept) return true;
  for (const std::string& note : table.notes) {
    const std::string words = lower_case(note);
    for (const char* phrase :
         {"control", "also included", "adjusted for", "fixed effect", "not shown", "dummies"})
      if (contains(words, phrase)) return true;
  }
  return false;
}

// One decimal mark for the whole table: a comma that cannot part thousands tells.
void decide_decimal(PastedTable& table) {
  int commas = 0, points = 0;
  const auto look = [&](const PastedCell& cell) {
    const std::size_t comma = cell.text.rfind(',');
    points += contains(cell.text, ".");
    if (comma == std::string::npos || cell.key == "ci") return;
    std::size_t digits = 0;
    while (comma + 1 + digits < cell.text.size() &&
           std::isdigit(static_cast<unsigned char>(cell.text[comma + 1 + digits])))
      ++digits;
    const bool leading_zero = comma > 0 && cell.text[comma - 1] == '0' &&
                              (comma == 1 || !std::isdigit(static_cast<unsigned char>(cell.text[comma - 2])));
    commas += digits != 3 || leading_zero;
  };
  for (const PastedRow& row : table.rows) {
    for (const PastedCell& cell : row.cells) look(cell);
    for (const PastedCell& cell : row.more) look(cell);
  }
  if (commas > 0 && points == 0) {
    table.decimal = ',';
    table.doubts.push_back("the comma is read as the decimal mark throughout");
  } else if (commas > 0) {
    table.doubts.push_back("both points and commas look like decimal marks; the point is read as one");
  }
}

// Figures that stand in words only: "(n = 180 fields)".
void add_stated_figures(PastedTable& table, const std::vector<TableLine>& lines) {
  const auto has = [&](const char* key) {
    return std::any_of(table.rows.begin(), table.rows.end(),
                       [&](const PastedRow& row) { return row.key == key; });
  };
  const auto add = [&](const char* key, std::initializer_list<const char*> names) {
    if (has(key) || table.columns.empty()) return;
    for (const TableLine& line : lines) {
      for (const char* name : names) {
        const std::string figure = figure_in(line.text->plain, name);
        if (figure.empty()) continue;
        PastedRow row;
        row.kind = PastedRow::Kind::Foot;
        row.key = key;
        row.label = name;
        row.place = place_of(line, 0, line.text->size());
        PastedCell cell{figure, key,
                        table.columns.size() > 1 ? "it is stated once, not column by column" : "", row.place};
        row.cells.assign(table.columns.size(), cell);
        table.rows.push_back(std::move(row));
        return;
      }
    }
  };
  add("n", {"n", "N"});
  if (table.columns.size() == 1) add("r2", {"R2"});
}

void tell_unusual_layout(PastedTable& table, Divider divider) {
  for (const PastedRow& row : table.rows)
    if (row.kind == PastedRow::Kind::Term && heading_key(row.label) == "coef")
      table.doubts.push_back("the terms seem to stand across the page; each column is read as one fit");
  if (table.variance_table())
    table.doubts.push_back("read as an analysis of variance table, one source a line");
  const bool k_printed =
      std::any_of(table.rows.begin(), table.rows.end(), [](const PastedRow& row) { return row.key == "k"; });
  if (!k_printed && hides_regressors(table))
    table.doubts.push_back(
        "regressors are named without figures, so k is more than the rows: type it in the foot");
  if (divider == Divider::Blanks && table.columns.size() > 1)
    table.doubts.push_back(
        "single blanks divide the columns, so empty cells leave no trace; look at each line");
}

}  // namespace

bool is_data(const TableLine& line) {
  if (line.figures() == 0) return false;
  return std::all_of(line.values.begin(), line.values.end(),
                     [](const Piece& p) { return p.kind != Piece::Kind::Words || is_mark_word(p.text); });
}

TextPlace place_of(const TableLine& line, int first, int last) {
  if (first >= last) return {line.number, 0, 0};
  return {line.number, line.text->column[static_cast<std::size_t>(first)] + 1,
          line.text->column[static_cast<std::size_t>(last - 1)] + 1};
}

void finish_table(PastedTable& table, const std::vector<TableLine>& lines, Divider divider) {
  decide_decimal(table);
  add_stated_figures(table, lines);
  for (const TableLine& line : lines) {
    if (is_data(line)) continue;
    const std::string words = line.text->plain;
    if (table.second.empty()) table.second = second_figure_in(words);
    if (table.stars.empty()) table.stars = star_levels_in(words);
    if (table.errors.empty()) table.errors = errors_in(words);
  }
  const bool stated = !table.second.empty();
  bool open = false;  // some second figure has no key of its own
  for (const PastedRow& row : table.rows)
    for (const PastedCell& cell : row.more) open = open || cell.key.empty();
  if (!open) {
    table.second = "";
    for (const PastedRow& row : table.rows)
      if (!row.more.empty()) table.second = row.more.front().key;
    table.second_reason = table.second.empty() ? "" : "the table says so";
  } else if (stated) {
    table.second_reason = "the note under the table says so";
  } else {
    infer_second_figure(table);
  }
  // Keys of figures in brackets follow the one reading.
  for (PastedRow& row : table.rows)
    for (PastedCell& cell : row.more)
      if (cell.key.empty()) cell.key = table.second;
  tell_misfits(table);
  tell_unusual_layout(table, divider);
}

}  // namespace rejoinder
