#include "core/paste/columns.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace rejoinder {
namespace {

bool divided(Divider divider) { return divider != Divider::Gaps && divider != Divider::Blanks; }

bool only_stars(const std::string& text) {
  return !text.empty() && text.find_first_not_of("*+ ") == std::string::npos;
}

double first_column(const PlainLine& line, const Piece& piece) {
  return line.column[static_cast<std::size_t>(piece.first)];
}
double last_column(const PlainLine& line, const Piece& piece) {
  return line.column[static_cast<std::size_t>(piece.last - 1)] + 1;
}

// Words that read like a sentence, a title or a list of star levels rather than the label of a row.
bool like_a_note(const std::string& label) {
  const std::string words = lower_case(label);
  if (starts_with_word(words, "table") || starts_with_word(words, "note") || starts_with_word(words, "notes"))
    return true;
  return label.find_first_of("=*:") != std::string::npos || contains(label, ". ");
}

}  // namespace

int TableLine::figures() const {
  return static_cast<int>(std::count_if(values.begin(), values.end(),
                                        [](const Piece& p) { return p.kind == Piece::Kind::Figure; }));
}

TableLine table_line(const PlainLine& line, int number, Divider divider) {
  TableLine result;
  result.number = number;
  result.text = &line;
  result.indented = line.size() > 0 && line.plain[0] == ' ';
  for (Piece& piece : pieces_of(line, divider)) {
    const bool label_place =
        divided(divider) ? piece.field == 0 : result.values.empty() && result.label.empty();
    if (label_place && piece.kind == Piece::Kind::Words && !is_column_number(piece.text)) {
      result.label = piece.text;
      result.label_first = piece.first;
      result.label_last = piece.last;
    } else if (only_stars(piece.text) && !result.values.empty() &&
               result.values.back().kind == Piece::Kind::Figure) {
      // Stars set apart from their figure.
      result.values.back().last = piece.last;
      result.values.back().text =
          line.plain.substr(static_cast<std::size_t>(result.values.back().first),
                            static_cast<std::size_t>(piece.last - result.values.back().first));
    } else {
      result.values.push_back(std::move(piece));
    }
  }
  result.loose = !divided(divider) && !result.label.empty() && !result.values.empty() &&
                 result.values.front().first - result.label_last < 2;
  if (result.loose && like_a_note(result.label)) {
    result.label_last = result.values.back().last;
    result.label = line.plain.substr(static_cast<std::size_t>(result.label_first),
                                     static_cast<std::size_t>(result.label_last - result.label_first));
    result.values.clear();
  }
  return result;
}

std::vector<Piece> main_pieces(const std::vector<Piece>& values) {
  std::vector<Piece> mains, all;
  for (const Piece& piece : values) {
    if (piece.kind == Piece::Kind::Words) continue;
    all.push_back(piece);
    if (!piece.bracketed) mains.push_back(piece);
  }
  return mains.empty() ? all : mains;
}

ColumnPlaces::ColumnPlaces(const std::vector<const TableLine*>& lines, Divider divider) : divider_(divider) {
  if (divided(divider)) {
    int last = 0;
    for (const TableLine* line : lines)
      for (const Piece& piece : line->values) last = std::max(last, piece.field);
    spans_.resize(static_cast<std::size_t>(last));
    return;
  }
  std::size_t most = 0;
  for (const TableLine* line : lines) most = std::max(most, main_pieces(line->values).size());
  spans_.assign(most, Span{std::numeric_limits<double>::infinity(), 0});
  for (const TableLine* line : lines) {
    const std::vector<Piece> mains = main_pieces(line->values);
    if (mains.size() != most) continue;
    for (std::size_t i = 0; i < most; ++i) {
      spans_[i].first = std::min(spans_[i].first, first_column(*line->text, mains[i]));
      spans_[i].last = std::max(spans_[i].last, last_column(*line->text, mains[i]));
    }
  }
}

std::vector<ColumnPlaces::Placed> ColumnPlaces::place(const PlainLine& line, const std::vector<Piece>& pieces,
                                                      const std::vector<int>& taken) const {
  std::vector<Placed> placed(pieces.size());
  const int columns = count(), n = static_cast<int>(pieces.size());
  if (divided(divider_)) {
    for (int i = 0; i < n; ++i)
      placed[static_cast<std::size_t>(i)].column =
          std::clamp(pieces[static_cast<std::size_t>(i)].field - 1, 0, columns - 1);
    return placed;
  }
  if (n >= columns) {
    for (int i = 0; i < n; ++i) placed[static_cast<std::size_t>(i)].column = std::min(i, columns - 1);
    if (n > columns)
      for (Placed& p : placed) p.doubt = "the line holds more figures than the table has columns";
    return placed;
  }
  if (divider_ == Divider::Blanks) {
    // Single blanks keep no places: the figures go under the coefficients above, else to the first columns.
    const bool fits = static_cast<int>(taken.size()) == n;
    for (int i = 0; i < n; ++i) {
      Placed& p = placed[static_cast<std::size_t>(i)];
      p.column = fits ? taken[static_cast<std::size_t>(i)] : i;
      if (!fits) p.doubt = "fewer figures than columns, and the text keeps no places: is it this column?";
    }
    return placed;
  }
  // The increasing choice of columns with the least total distance.
  const auto distance = [&](int i, int column) {
    const Piece& piece = pieces[static_cast<std::size_t>(i)];
    const Span& span = spans_[static_cast<std::size_t>(column)];
    const double first = first_column(line, piece), last = last_column(line, piece);
    const double gap = std::max({0.0, span.first - last, first - span.last});
    return gap * 4 + std::fabs((first + last) / 2 - span.centre()) * 0.5;
  };
  constexpr double kFar = 1e9;
  std::vector<std::vector<double>> best(static_cast<std::size_t>(n + 1),
                                        std::vector<double>(static_cast<std::size_t>(columns + 1), kFar));
  for (int c = 0; c <= columns; ++c) best[0][static_cast<std::size_t>(c)] = 0;
  for (int i = 1; i <= n; ++i)
    for (int c = i; c <= columns; ++c)
      best[static_cast<std::size_t>(i)][static_cast<std::size_t>(c)] = std::min(
          best[static_cast<std::size_t>(i)][static_cast<std::size_t>(c - 1)],
          best[static_cast<std::size_t>(i - 1)][static_cast<std::size_t>(c - 1)] + distance(i - 1, c - 1));
  for (int i = n, c = columns; i > 0; --c) {
    if (c > i && best[static_cast<std::size_t>(i)][static_cast<std::size_t>(c)] ==
                     best[static_cast<std::size_t>(i)][static_cast<std::size_t>(c - 1)])
      continue;
    placed[static_cast<std::size_t>(i - 1)].column = c - 1;
    --i;
  }
  for (int i = 0; i < n; ++i) {
    Placed& p = placed[static_cast<std::size_t>(i)];
    const double own = distance(i, p.column);
    for (int c = 0; c < columns; ++c)
      if (c != p.column && distance(i, c) < own + 3)
        p.doubt = "it stands between two columns: is it this one?";
  }
  // Second figures belong under coefficients. Where the places say otherwise, both are told.
  if (!taken.empty()) {
    for (Placed& p : placed)
      if (std::find(taken.begin(), taken.end(), p.column) == taken.end() && p.doubt.empty())
        p.doubt = "no coefficient stands above it: did it slide from another column?";
  }
  return placed;
}

}  // namespace rejoinder
