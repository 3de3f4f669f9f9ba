#include "core/paste/table_text.h"

#include <algorithm>
#include <cctype>

#include "core/paste/columns.h"
#include "core/paste/finish_table.h"
#include "core/paste/labels.h"
#include "core/paste/second_figure.h"

namespace rejoinder {
namespace {

// LaTeX marks that surround figures and labels carry nothing; commands at the start of a line carry no row.
void strip_markup(PlainLine& line) {
  PlainLine stripped;
  stripped.pasted = line.pasted;
  for (int i = 0; i < line.size(); ++i) {
    const char c = line.plain[static_cast<std::size_t>(i)];
    if (c == '$' || c == '{' || c == '}' || c == '^') continue;
    if (c == '\\') {
      int end = i + 1;
      while (end < line.size() &&
             std::isalpha(static_cast<unsigned char>(line.plain[static_cast<std::size_t>(end)])))
        ++end;
      i = std::max(i, end == i + 1
                          ? i + (end < line.size() && line.plain[static_cast<std::size_t>(end)] == '\\')
                          : end - 1);
      continue;
    }
    stripped.plain += c;
    stripped.from.push_back(line.from[static_cast<std::size_t>(i)]);
    stripped.to.push_back(line.to[static_cast<std::size_t>(i)]);
    stripped.column.push_back(line.column[static_cast<std::size_t>(i)]);
  }
  line = std::move(stripped);
}

class TableReader {
 public:
  explicit TableReader(std::string_view text) : extract_(text), lines_(plain_lines(extract_)) {
    if (lines_.size() > 400) lines_.resize(400);
    divider_ = divider_of(lines_);
    if (divider_ == Divider::Ampersands)
      for (PlainLine& line : lines_) strip_markup(line);
    for (std::size_t i = 0; i < lines_.size(); ++i)
      split_.push_back(table_line(lines_[i], static_cast<int>(i) + 1, divider_));
    table_.extract = std::string(text);
  }

  PastedTable read() {
    find_columns();
    for (const TableLine& line : split_) take(line);
    if (!waiting_.label.empty()) note(waiting_);
    finish_table(table_, split_, divider_);
    return std::move(table_);
  }

 private:
  static bool is_numbers_heading(const TableLine& line) {
    return !line.values.empty() && std::all_of(line.values.begin(), line.values.end(),
                                               [](const Piece& p) { return is_column_number(p.text); });
  }
  // A running head, "14  Lighting and safety", or a line of text is no heading.
  static bool is_heading(const Piece& piece) {
    if (is_column_number(piece.text)) return true;
    return piece.kind == Piece::Kind::Words && !std::isdigit(static_cast<unsigned char>(piece.text[0]));
  }
  static bool is_mark_line(const TableLine& line) {
    if (line.label.empty() || line.values.empty() || line.figures() > 0) return false;
    return std::any_of(line.values.begin(), line.values.end(),
                       [](const Piece& p) { return is_mark_word(p.text); });
  }

  // Headings stand before the first line of figures; the columns are laid out by the lines of figures.
  void find_columns() {
    std::vector<const TableLine*> data;
    for (const TableLine& line : split_) {
      if (is_numbers_heading(line) && data.empty()) continue;
      if (is_data(line)) data.push_back(&line);
    }
    if (data.empty()) return;
    first_data_ = data.front()->number;
    places_.emplace_back(data, divider_);
    raw_headings_.assign(static_cast<std::size_t>(places_.front().count()), "");
    for (const TableLine& line : split_) {
      if (line.number >= first_data_ || is_mark_line(line)) break;
      std::vector<Piece> heads = line.values;
      // Where blanks divide, the first heading may have been taken for a label.
      const bool label_is_heading = divider_ == Divider::Gaps && !line.label.empty() && line.indented &&
                                    static_cast<int>(heads.size()) + 1 == places_.front().count();
      if (label_is_heading) {
        Piece piece;
        piece.first = line.label_first;
        piece.last = line.label_last;
        piece.text = line.label;
        heads.insert(heads.begin(), piece);
      }
      if (heads.empty() || static_cast<int>(heads.size()) > places_.front().count()) continue;
      if (starts_with_word(lower_case(line.label), "table") ||
          !std::all_of(heads.begin(), heads.end(), is_heading))
        continue;
      const auto placed = places_.front().place(*line.text, heads, {});
      for (std::size_t i = 0; i < heads.size(); ++i) {
        std::string& heading = raw_headings_[static_cast<std::size_t>(placed[i].column)];
        heading += (heading.empty() ? "" : " ") + trimmed(line.text->original(heads[i].first, heads[i].last));
      }
      heading_lines_.push_back(line.number);
    }
    settle_roles();
  }

  // Headings such as "b  SE  t" make several figures of one column; otherwise every place is a column.
  void settle_roles() {
    int roles = 0;
    for (const std::string& heading : raw_headings_) roles += !heading_key(plain_heading(heading)).empty();
    const bool by_roles = roles >= 2;
    int column = -1;
    for (const std::string& heading : raw_headings_) {
      const std::string key = by_roles ? heading_key(plain_heading(heading)) : "coef";
      if (!by_roles || key == "coef" || key.empty() || column < 0) {
        ++column;
        table_.columns.push_back(by_roles ? "" : heading);
      }
      roles_.push_back({column, by_roles && !key.empty() ? key : "coef"});
    }
    by_roles_ = by_roles;
  }
  static std::string plain_heading(const std::string& heading) { return plain_lines(heading).front().plain; }

  PastedCell cell_of(const TableLine& line, const Piece& piece, const std::string& key,
                     const std::string& doubt) const {
    PastedCell cell;
    if (piece.kind == Piece::Kind::Nothing) return cell;
    cell.text =
        divider_ == Divider::Ampersands ? piece.text : trimmed(line.text->original(piece.first, piece.last));
    cell.key = piece.interval ? "ci" : key;
    cell.doubt = doubt;
    cell.place = place_of(line, piece.first, piece.last);
    return cell;
  }

  void note(const TableLine& line) { table_.notes.push_back(trimmed(std::string(line.text->pasted))); }

  void take(const TableLine& line) {
    if (line.blank()) return;
    if (std::find(heading_lines_.begin(), heading_lines_.end(), line.number) != heading_lines_.end()) return;
    if (places_.empty() || line.number < first_data_) {
      if (is_mark_line(line)) return add_mark(line);
      if (table_.title.empty() && table_.rows.empty() && line.words_only()) {
        table_.title = trimmed(std::string(line.text->pasted));
      } else if (line.words_only()) {
        if (!waiting_.label.empty()) note(waiting_);
        waiting_ = line;
      } else {
        note(line);
      }
      return;
    }
    if (is_data(line)) return add_figures(line);
    if (is_mark_line(line)) return add_mark(line);
    if (!waiting_.label.empty()) note(waiting_);
    waiting_ = {};
    if (line.words_only())
      waiting_ = line;  // the first half of a wrapped label, a section heading or a note: the next line tells
    else
      note(line);
  }

  // A label wrapped over two lines goes on in small letters, after an indent, or the first half ends open.
  std::string label_with_waiting(const TableLine& line) {
    std::string label = trimmed(line.text->original(line.label_first, line.label_last));
    if (divider_ == Divider::Ampersands) label = line.label;
    if (waiting_.label.empty()) return label;
    const std::string first = trimmed(waiting_.text->original(waiting_.label_first, waiting_.label_last));
    const bool open = first.back() == ',' || first.back() == '-';
    const bool goes_on = !line.label.empty() && (open || (line.indented && !waiting_.indented) ||
                                                 std::islower(static_cast<unsigned char>(line.label[0])));
    const bool near = waiting_.number + 1 == line.number;
    if (goes_on && near) {
      const bool hyphen =
          first.back() == '-' && !label.empty() && std::islower(static_cast<unsigned char>(label[0]));
      label = hyphen ? first.substr(0, first.size() - 1) + label : first + " " + label;
    } else {
      note(waiting_);
    }
    waiting_ = {};
    return label;
  }

  void add_mark(const TableLine& line) {
    PastedRow row;
    row.kind = PastedRow::Kind::Mark;
    row.label = label_with_waiting(line);
    row.intercept = is_intercept_label(row.label);
    row.place = place_of(line, line.label_first, line.label_last);
    row.cells.resize(table_.columns.size());
    if (!places_.empty()) {
      const auto placed = places_.front().place(*line.text, line.values, {});
      for (std::size_t i = 0; i < line.values.size(); ++i) {
        const auto column =
            static_cast<std::size_t>(roles_[static_cast<std::size_t>(placed[i].column)].column);
        row.cells[column] = cell_of(line, line.values[i], "", "");
      }
    }
    table_.rows.push_back(std::move(row));
  }

  void add_figures(const TableLine& line) {
    const bool all_bracketed = std::all_of(line.values.begin(), line.values.end(), [](const Piece& p) {
      return p.bracketed || p.kind != Piece::Kind::Figure;
    });
    PastedRow* above = table_.rows.empty() ? nullptr : &table_.rows.back();
    const bool under_term = above && above->kind == PastedRow::Kind::Term;
    const std::string label_key = heading_key(line.label);
    if (under_term && (line.label.empty() || (all_bracketed && !label_key.empty())))
      return add_second_line(line, *above, label_key);

    PastedRow row;
    row.label = label_with_waiting(line);
    row.place = place_of(line, line.label_first, line.label_last);
    row.cells.resize(table_.columns.size());
    row.key = foot_key(plain_lines(row.label).front().plain);
    row.intercept = is_intercept_label(row.label);
    const bool unknown_foot = row.key.empty() && foot_begun_ && !row.intercept && !bracket_follows(line) &&
                              main_pieces(line.values).size() == line.values.size() && !by_roles_;
    if (!row.key.empty() || unknown_foot) {
      row.kind = PastedRow::Kind::Foot;
      foot_begun_ = true;
    }
    std::vector<Piece> mains, seconds;
    std::vector<int> second_after;  // index into mains
    for (const Piece& piece : line.values) {
      if (piece.kind == Piece::Kind::Words) continue;
      if (piece.bracketed && !all_bracketed && !mains.empty()) {
        seconds.push_back(piece);
        second_after.push_back(static_cast<int>(mains.size()) - 1);
      } else {
        mains.push_back(piece);
      }
    }
    const auto placed = places_.front().place(*line.text, mains, {});
    std::vector<int> column_of_main;
    for (std::size_t i = 0; i < mains.size(); ++i) {
      const Role role = roles_[static_cast<std::size_t>(placed[i].column)];
      column_of_main.push_back(role.column);
      const std::string key = row.kind == PastedRow::Kind::Foot ? row.key : role.key;
      PastedCell cell = cell_of(line, mains[i], key, placed[i].doubt);
      if (unknown_foot && !cell.empty()) cell.doubt = "it is not known what this line is";
      if (key == "coef" || row.kind == PastedRow::Kind::Foot) {
        row.cells[static_cast<std::size_t>(role.column)] = cell;
      } else if (!cell.empty()) {
        row.more.push_back(cell);
        row.more_column.push_back(role.column);
      }
    }
    for (std::size_t i = 0; i < seconds.size(); ++i) {
      row.more.push_back(cell_of(line, seconds[i], "", ""));
      row.more_column.push_back(column_of_main[static_cast<std::size_t>(second_after[i])]);
    }
    table_.rows.push_back(std::move(row));
  }

  bool bracket_follows(const TableLine& line) const {
    const auto next = static_cast<std::size_t>(line.number);  // the line after, as numbers start from 1
    if (next >= split_.size()) return false;
    const TableLine& after = split_[next];
    return after.label.empty() && after.figures() > 0 && after.values.front().bracketed;
  }

  void add_second_line(const TableLine& line, PastedRow& above, const std::string& key) {
    std::vector<int> taken;
    for (std::size_t c = 0; c < above.cells.size(); ++c)
      if (!above.cells[c].empty()) taken.push_back(static_cast<int>(c));
    std::vector<Piece> pieces;
    for (const Piece& piece : line.values)
      if (piece.kind == Piece::Kind::Figure) pieces.push_back(piece);
    const auto placed = places_.front().place(*line.text, pieces, by_roles_ ? std::vector<int>{} : taken);
    for (std::size_t i = 0; i < pieces.size(); ++i) {
      above.more.push_back(cell_of(line, pieces[i], key, placed[i].doubt));
      above.more_column.push_back(roles_[static_cast<std::size_t>(placed[i].column)].column);
    }
  }

  struct Role {
    int column = 0;
    std::string key;
  };

  std::string extract_;
  std::vector<PlainLine> lines_;
  Divider divider_ = Divider::Gaps;
  std::vector<TableLine> split_;
  std::vector<ColumnPlaces> places_;  // one, once the table is known to have figures
  int first_data_ = 0;
  std::vector<int> heading_lines_;
  std::vector<std::string> raw_headings_;
  std::vector<Role> roles_;
  bool by_roles_ = false, foot_begun_ = false;
  TableLine waiting_;
  PastedTable table_;
};

}  // namespace

int PastedTable::figures() const {
  int count = 0;
  for (const PastedRow& row : rows) {
    if (row.kind == PastedRow::Kind::Mark) continue;
    for (const PastedCell& cell : row.cells) count += !cell.empty();
    count += static_cast<int>(row.more.size());
  }
  return count;
}

int PastedTable::doubtful() const {
  int count = 0;
  for (const PastedRow& row : rows) {
    for (const PastedCell& cell : row.cells) count += !cell.doubt.empty();
    for (const PastedCell& cell : row.more) count += !cell.doubt.empty();
  }
  return count;
}

bool PastedTable::variance_table() const {
  int known = 0;
  for (const std::string& heading : columns) known += !source_key(plain_lines(heading).front().plain).empty();
  return known >= 3 && known == static_cast<int>(columns.size());
}

PastedTable read_pasted_table(std::string_view text) { return TableReader(text).read(); }

PastedTable with_second_figure(PastedTable table, const std::string& key) {
  for (PastedRow& row : table.rows) {
    for (PastedCell& cell : row.cells)
      if (cell.doubt == "not read as a number") cell.doubt.clear();
    for (PastedCell& cell : row.more) {
      if (cell.key != table.second || cell.key == "ci") continue;
      cell.key = key;
      // Doubts about the place of a figure stay; those about its fit are told anew.
      if (contains(cell.doubt, "does not go with") || contains(cell.doubt, "is not")) cell.doubt.clear();
    }
  }
  table.second = key;
  table.second_reason = "chosen by the reader";
  table.second_certain = true;
  tell_misfits(table);
  return table;
}

}  // namespace rejoinder
