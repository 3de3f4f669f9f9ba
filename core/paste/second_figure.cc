#include "core/paste/second_figure.h"

#include <cmath>

#include <optional>

#include "core/number/printed_number.h"

namespace rejoinder {
namespace {

using Printed = std::optional<PrintedNumber>;

// Coefficient, second figure and stars of one cell.
struct Pair {
  PrintedNumber coef, second;
  int stars = 0;
};

Printed number(const PastedTable& table, const std::string& text) {
  NumberReading how;
  how.decimal = table.decimal;
  const Result<PrintedNumber> read = read_printed_number(text, how);
  return read.ok() ? Printed(read.value()) : std::nullopt;
}

// Stars count where they stand: at the coefficient or, in some tables, at the second figure.
int stars_of(const PrintedNumber& coef, const PrintedNumber& second) {
  return std::max(coef.stars, second.stars);
}

template <class Visit>
void for_each_pair(PastedTable& table, Visit visit) {
  for (PastedRow& row : table.rows) {
    if (row.kind != PastedRow::Kind::Term) continue;
    for (std::size_t i = 0; i < row.more.size(); ++i) {
      PastedCell& coef = row.cells[static_cast<std::size_t>(row.more_column[i])];
      if (coef.empty() || row.more[i].empty()) continue;
      visit(row, coef, row.more[i]);
    }
  }
}

// Two-sided p of a normal ratio, good enough to tell one reading from another.
double normal_p(double t) { return std::erfc(std::fabs(t) / std::sqrt(2.0)); }

Interval p_under(const std::string& key, const Pair& pair) {
  if (key == "p") return pair.second.possible;
  Interval t = pair.second.possible;
  if (key == "se") {
    if (pair.second.possible.high <= 0) return {0, 1};
    const double high =
        pair.second.possible.low > 0 ? pair.coef.possible.magnitude() / pair.second.possible.low : kInfinity;
    t = {pair.coef.possible.mignitude() / pair.second.possible.high, high};
  } else {
    t = {t.mignitude(), t.magnitude()};
  }
  return {normal_p(t.high), normal_p(t.low)};
}

// Whether that many stars can belong to p. The band is widened: the t distribution has heavier tails than the
// normal, and papers differ in one-sided and two-sided stars.
bool stars_fit(const PastedTable& table, int stars, const Interval& p) {
  const std::vector<double> levels =
      table.stars.empty() ? std::vector<double>{0.10, 0.05, 0.01} : table.stars;
  if (stars > static_cast<int>(levels.size())) return true;
  const double most = stars == 0 ? 1 : levels[static_cast<std::size_t>(stars - 1)] * 1.3;
  const double least =
      stars == static_cast<int>(levels.size()) ? 0 : levels[static_cast<std::size_t>(stars)] * 0.35;
  return p.low <= most && p.high >= least;
}

std::string short_number(double x) {
  char text[32];
  std::snprintf(text, sizeof text, "%.2g", x);
  return text;
}

}  // namespace

void infer_second_figure(PastedTable& table) {
  int pairs = 0, negative = 0, above_one = 0, intervals = 0, starred = 0;
  int se_fits = 0, t_fits = 0, p_fits = 0;
  for_each_pair(table, [&](PastedRow&, PastedCell& coef, PastedCell& second) {
    if (second.key == "ci") {
      ++intervals;
      return;
    }
    const Printed b = number(table, coef.text), s = number(table, second.text);
    if (!b || !s) return;
    ++pairs;
    negative += s->possible.high < 0;
    above_one += s->possible.low > 1;
    const Pair pair{*b, *s, stars_of(*b, *s)};
    starred += pair.stars > 0;
    se_fits += stars_fit(table, pair.stars, p_under("se", pair));
    t_fits += stars_fit(table, pair.stars, p_under("t", pair));
    p_fits +=
        s->possible.low >= 0 && s->possible.low <= 1 && stars_fit(table, pair.stars, p_under("p", pair));
  });
  table.second_certain = true;
  if (intervals > 0) {
    table.second = "ci";
    table.second_reason = "two figures stand together in brackets";
    return;
  }
  if (pairs == 0) return;
  if (negative > 0) {
    table.second = "t";
    table.second_reason = "some of them are negative, and no standard error is";
    return;
  }
  if (starred > 0) {
    const bool se = se_fits == pairs, t = t_fits == pairs, p = p_fits == pairs && above_one == 0;
    if (se + t + p == 1) {
      table.second = se ? "se" : t ? "t" : "p";
      table.second_reason = "this reading alone goes with all the stars";
      return;
    }
    if (se + t + p == 0) {
      table.second = se_fits >= t_fits && se_fits >= p_fits ? "se" : t_fits >= p_fits ? "t" : "p";
      table.second_reason = "this reading goes with most of the stars, none with all";
      table.second_certain = false;
      return;
    }
    table.second = se ? "se" : "t";
    table.second_reason = "more than one reading goes with the stars";
    table.second_certain = false;
    return;
  }
  table.second = "se";
  table.second_reason = "nothing printed tells what stands in brackets; standard errors are the commonest";
  table.second_certain = false;
}

void tell_misfits(PastedTable& table) {
  const char* names[][2] = {{"se", "a standard error"}, {"t", "a t ratio"}, {"p", "a p value"}};
  int starred = 0;
  for_each_pair(table, [&](PastedRow&, PastedCell& coef, PastedCell& second) {
    for (const PastedCell* cell : {&coef, &second})
      if (const Printed read = number(table, cell->text)) starred += read->stars > 0;
  });
  for_each_pair(table, [&](PastedRow&, PastedCell& coef, PastedCell& second) {
    const Printed b = number(table, coef.text);
    if (!b) {
      coef.doubt = "not read as a number";
      return;
    }
    if (second.key == "ci") return;
    const Printed s = number(table, second.text);
    if (!s) {
      second.doubt = "not read as a number";
      return;
    }
    if (second.key == "se" && s->possible.high < 0) {
      second.doubt = "a standard error is not negative";
    } else if (second.key == "t" && b->value * s->value < 0) {
      second.doubt = "its sign is not that of the coefficient";
    } else if (second.key == "p" && s->possible.low > 1) {
      second.doubt = "a p value is not above one";
    } else if (const Pair pair{*b, *s, stars_of(*b, *s)};
               (starred > 0 || pair.stars > 0) && !stars_fit(table, pair.stars, p_under(second.key, pair))) {
      const char* name = "such a figure";
      for (const auto& entry : names)
        if (second.key == entry[0]) name = entry[1];
      const std::string stars = pair.stars == 0   ? "no star"
                                : pair.stars == 1 ? "one star"
                                : pair.stars == 2 ? "two stars"
                                                  : "three stars";
      const Interval p = p_under(second.key, pair);
      second.doubt = stars + " does not go with " + name + " of " + second.text + ": p would be near " +
                     short_number(std::sqrt(std::max(p.low, 1e-300) * std::max(p.high, 1e-300))) +
                     "; does it belong to this coefficient?";
    }
  });
}

}  // namespace rejoinder
