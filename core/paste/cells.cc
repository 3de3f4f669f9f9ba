#include "core/paste/cells.h"

#include <algorithm>

namespace rejoinder {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

// Digits with marks between them: "1,204.5", "1 204", ".131", "0,131", "1.2e-3". Blanks count as thousands
// marks where exactly three digits follow. -1 where no number stands.
int number_end(std::string_view s, int at) {
  const int size = static_cast<int>(s.size());
  const auto digit = [&](int i) { return i < size && is_digit(s[i]); };
  int end = at;
  bool any = false;
  while (end < size) {
    if (digit(end)) {
      any = true;
      ++end;
    } else if ((s[end] == '.' || s[end] == ',' || s[end] == '\'') && digit(end + 1)) {
      ++end;
    } else if (s[end] == ' ' && any && end - at <= 3 && digit(end + 1) && digit(end + 2) && digit(end + 3) &&
               !digit(end + 4) && s.substr(at, end - at).find('.') == std::string_view::npos &&
               !(at > 0 && s[end + 1] == '0' && end - at == 1 && s[at] == '0')) {
      end += 4;
    } else {
      break;
    }
  }
  if (!any) return -1;
  if (end < size && (s[end] == 'e' || s[end] == 'E')) {
    int exponent = end + 1;
    if (exponent < size && (s[exponent] == '-' || s[exponent] == '+')) ++exponent;
    if (digit(exponent)) {
      while (digit(exponent)) ++exponent;
      end = exponent;
    }
  }
  if (end < size && s[end] == '%') ++end;
  return end;
}

int past_blanks(std::string_view s, int at) {
  while (at < static_cast<int>(s.size()) && s[at] == ' ') ++at;
  return at;
}

// Stars and daggers from `at`, single blanks between them allowed: "* *".
int stars_end(std::string_view s, int at) {
  int end = at;
  while (true) {
    int next = end;
    if (next < static_cast<int>(s.size()) && s[next] == ' ') ++next;
    if (next < static_cast<int>(s.size()) && (s[next] == '*' || s[next] == '+'))
      end = next + 1;
    else
      return end;
  }
}

int signed_number_end(std::string_view s, int at) {
  int from = past_blanks(s, at);
  if (from < static_cast<int>(s.size()) && (s[from] == '<' || s[from] == '>'))
    from = past_blanks(s, from + 1);
  if (from < static_cast<int>(s.size()) && (s[from] == '-' || s[from] == '+'))
    from = past_blanks(s, from + 1);
  return number_end(s, from);
}

// Past the mark between the two ends of an interval, or -1: ", " "; " " to " and a dash between two numbers.
int interval_mark_end(std::string_view s, int at) {
  int next = past_blanks(s, at);
  if (next >= static_cast<int>(s.size())) return -1;
  if (s[next] == ',' || s[next] == ';') return next + 1;
  if (s.substr(next, 3) == "to ") return next + 3;
  if (s[next] == '-') return next + 1;
  return -1;
}

bool ends_a_figure(std::string_view s, int at) {
  if (at >= static_cast<int>(s.size())) return true;
  const char c = s[at];
  if (c == ' ' || c == '\t' || c == '|' || c == '&' || c == ';' || c == '\\') return true;
  // A footnote's letter, glued to the figure.
  return c >= 'a' && c <= 'f' &&
         (at + 1 == static_cast<int>(s.size()) || s[at + 1] == ' ' || s[at + 1] == '\t');
}

char closing(char open) { return open == '(' ? ')' : open == '[' ? ']' : '}'; }

// The fields of a divided line as [first, last) ranges of the plain text.
std::vector<std::pair<int, int>> fields_of(const std::string& plain, char mark) {
  std::vector<std::pair<int, int>> fields;
  bool quoted = false;
  int start = 0;
  for (int i = 0; i <= static_cast<int>(plain.size()); ++i) {
    if (i < static_cast<int>(plain.size()) && plain[i] == '"' && mark != '&') quoted = !quoted;
    if (i == static_cast<int>(plain.size()) || (plain[i] == mark && !quoted)) {
      fields.push_back({start, i});
      start = i + 1;
    }
  }
  return fields;
}

Piece piece_of(const std::string& plain, int first, int last, int field) {
  const auto blank = [&](int i) {
    return plain[i] == ' ' || plain[i] == '\t' || plain[i] == '"' || plain[i] == '$';
  };
  while (first < last && blank(first)) ++first;
  while (last > first && blank(last - 1)) --last;
  Piece piece;
  piece.first = first;
  piece.last = last;
  piece.field = field;
  piece.text = plain.substr(first, last - first);
  if (piece.text == "-" || piece.text == "." || piece.text == "..." || piece.text == "\xE2\x80\xA6") {
    piece.kind = Piece::Kind::Nothing;
  } else if (const auto figure = figure_at(piece.text, 0);
             figure && figure->end == static_cast<int>(piece.text.size())) {
    piece.kind = Piece::Kind::Figure;
    piece.bracketed = figure->bracketed;
    piece.interval = figure->interval;
  }
  return piece;
}

// A piece that holds several figures, "0.870*** (0.205)", becomes several; words before figures are split off
// where `from_words` allows it.
void add_split(const std::string& plain, int first, int last, int field, bool from_words,
               std::vector<Piece>& out) {
  const Piece whole = piece_of(plain, first, last, field);
  if (whole.kind != Piece::Kind::Words || whole.text.empty()) {
    if (!whole.text.empty()) out.push_back(whole);
    return;
  }
  for (int start = whole.first; start < whole.last; ++start) {
    if (start != whole.first && (!from_words || plain[start - 1] != ' ')) continue;
    std::vector<Piece> figures;
    int at = start;
    while (at < whole.last) {
      const auto figure = figure_at(std::string_view(plain).substr(0, whole.last), at);
      const bool nothing =
          !figure && (plain[at] == '-' || plain[at] == '.') && (at + 1 == whole.last || plain[at + 1] == ' ');
      if (!figure && !nothing) break;
      const int end = figure ? figure->end : at + 1;
      figures.push_back(piece_of(plain, at, end, field));
      at = past_blanks(plain, end);
    }
    if (at < whole.last || figures.empty()) continue;
    if (start > whole.first) out.push_back(piece_of(plain, whole.first, start, field));
    out.insert(out.end(), figures.begin(), figures.end());
    return;
  }
  out.push_back(whole);
}

}  // namespace

std::optional<Figure> figure_at(std::string_view s, int at) {
  Figure figure;
  const int size = static_cast<int>(s.size());
  if (at >= size) return std::nullopt;
  const char open = s[at];
  if (open == '(' || open == '[' || open == '{') {
    int end = signed_number_end(s, at + 1);
    if (end < 0) return std::nullopt;
    end = stars_end(s, end);
    if (const int mark = interval_mark_end(s, end); mark >= 0) {
      const int second = signed_number_end(s, mark);
      if (second < 0) return std::nullopt;
      figure.interval = true;
      end = second;
    }
    end = past_blanks(s, end);
    if (end >= size || s[end] != closing(open)) return std::nullopt;
    figure.bracketed = true;
    figure.end = stars_end(s, end + 1);
  } else {
    const int end = signed_number_end(s, at);
    if (end < 0 || s[at] == ' ') return std::nullopt;
    figure.end = stars_end(s, end);
  }
  if (!ends_a_figure(s, figure.end)) return std::nullopt;
  if (figure.end < size && s[figure.end] >= 'a' && s[figure.end] <= 'f') ++figure.end;
  return figure;
}

Divider divider_of(const std::vector<PlainLine>& lines) {
  int used = 0, tabs = 0, bars = 0, ampersands = 0, gaps = 0;
  int commas = 0, semicolons = 0;
  for (const PlainLine& line : lines) {
    const std::string text = trimmed(line.plain);
    if (text.empty()) continue;
    ++used;
    const auto fields = [&](char mark) { return static_cast<int>(fields_of(line.plain, mark).size()); };
    tabs += contains(text, "\t");
    bars += fields('|') >= 3;
    ampersands += fields('&') >= 2;
    gaps += contains(text, "  ");
    // A comma divides only where it is not followed by a blank: "F(2, 410)" and "1,204.5" are no CSV by
    // themselves.
    const auto divided = fields_of(line.plain, ',');
    int glued = 0;
    for (std::size_t i = 1; i < divided.size(); ++i)
      glued += divided[i].first < line.size() && line.plain[divided[i].first] != ' ';
    commas += glued >= 1 && glued == static_cast<int>(divided.size()) - 1;
    semicolons += fields(';') >= 2;
  }
  if (used == 0) return Divider::Gaps;
  if (2 * ampersands >= used) return Divider::Ampersands;
  if (2 * bars >= used) return Divider::Bars;
  if (3 * tabs >= used) return Divider::Tabs;
  if (gaps == 0 && 3 * semicolons >= 2 * used) return Divider::Semicolons;
  if (gaps == 0 && 3 * commas >= 2 * used && used >= 2) return Divider::Commas;
  if (gaps > 0) return Divider::Gaps;
  return Divider::Blanks;
}

std::vector<Piece> pieces_of(const PlainLine& line, Divider divider) {
  std::vector<Piece> pieces;
  const std::string& plain = line.plain;
  const int size = line.size();
  if (divider == Divider::Gaps || divider == Divider::Blanks) {
    int start = past_blanks(plain, 0);
    bool split_words = divider == Divider::Blanks;
    if (divider == Divider::Gaps) {
      // Where the line has no wide gap, its label may stand one blank before its figures.
      const std::string inside = trimmed(plain);
      split_words = !contains(inside, "  ");
    }
    while (start < size) {
      std::size_t gap = divider == Divider::Blanks ? std::string::npos : plain.find("  ", start);
      if (const std::size_t tab = plain.find('\t', start); tab < gap) gap = tab;
      const int end = gap == std::string::npos ? size : static_cast<int>(gap);
      add_split(plain, start, end, -1, split_words, pieces);
      start = end;
      while (start < size && (plain[start] == ' ' || plain[start] == '\t')) ++start;
    }
    // "( 0.84)" and "− 219.0" hold their blanks; a sign or a bracket cut off by a wide gap is put back.
    for (std::size_t i = 0; i + 1 < pieces.size(); ++i) {
      const std::string& text = pieces[i].text;
      if (text != "(" && text != "[" && text != "-") continue;
      const Piece joined = piece_of(plain, pieces[i].first, pieces[i + 1].last, -1);
      if (joined.kind != Piece::Kind::Figure || pieces[i + 1].first - pieces[i].last > 3) continue;
      if (text == "-" && pieces[i + 1].first - pieces[i].last > 1) continue;
      pieces[i] = joined;
      pieces.erase(pieces.begin() + static_cast<long>(i) + 1);
    }
    return pieces;
  }
  const char mark = divider == Divider::Tabs         ? '\t'
                    : divider == Divider::Commas     ? ','
                    : divider == Divider::Bars       ? '|'
                    : divider == Divider::Semicolons ? ';'
                                                     : '&';
  auto fields = fields_of(plain, mark);
  if (divider == Divider::Bars && !fields.empty() && trimmed(plain.substr(0, fields[0].second)).empty())
    fields.erase(fields.begin());
  for (std::size_t i = 0; i < fields.size(); ++i)
    add_split(plain, fields[i].first, fields[i].second, static_cast<int>(i), false, pieces);
  return pieces;
}

bool is_mark_word(std::string_view plain) {
  const std::string word = lower_case(plain);
  for (const char* known : {"yes", "no", "y", "n", "x", "included", "incl.", "\xE2\x9C\x93", "\xE2\x9C\x94",
                            "\xC3\x97", "\xE2\x9C\x97"})
    if (word == known) return true;
  return false;
}

bool is_column_number(std::string_view plain) {
  std::string inner(plain);
  if (inner.size() >= 3 && (inner.front() == '(' || inner.front() == '[') &&
      (inner.back() == ')' || inner.back() == ']')) {
    inner = inner.substr(1, inner.size() - 2);
    const bool digits = inner.size() <= 2 && std::all_of(inner.begin(), inner.end(), is_digit);
    const bool letter = inner.size() == 1 && inner[0] >= 'a' && inner[0] <= 'z';
    if (digits || letter) return true;
  }
  return !inner.empty() && inner.size() <= 4 && inner.find_first_not_of("IVX") == std::string::npos;
}

}  // namespace rejoinder
