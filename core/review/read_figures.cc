#include <algorithm>

#include "core/review/fields.h"

namespace rejoinder {

void read_uncertainty(const Section& section, bool ratio, Uncertainty& into) {
  into.se = section.printed("se", kNotNegative);
  if (into.se && into.se->exact && into.se->possible.high == 0) {
    section.problem("se", "a standard error of exactly zero leaves no t ratio",
                    "write it in quotes as printed, \"0.000\", so that its rounding counts");
    into.se.reset();
  }
  into.t = section.printed("t", kAnyNumber);
  into.p = section.printed("p", kProbability);
  into.ci = section.pair("ci", ratio ? kNotNegative : kAnyNumber, false);
  if (const std::optional<double> level = section.share("ci_level")) into.ci_level = *level;
}

std::optional<PrintedMatrix> read_triangle(const Section& section, std::string_view names_key,
                                           std::string_view key, bool correlation) {
  const Node* rows = section.list(key);
  PrintedMatrix matrix;
  matrix.terms = section.texts(names_key);
  matrix.place = section.table().place;
  const std::size_t p = matrix.terms.size();
  if (!rows) {
    if (!section.table().find(key))
      section.problem("", "the rows of this table are missing",
                      "write " + std::string(key) + " = [[\"...\"], [\"...\", \"...\"]]");
    return std::nullopt;
  }
  std::vector<std::string> sorted = matrix.terms;
  std::sort(sorted.begin(), sorted.end());
  if (const auto twin = std::adjacent_find(sorted.begin(), sorted.end()); twin != sorted.end()) {
    section.problem(names_key, "the name " + *twin + " stands here twice", "give each row its own name");
    return std::nullopt;
  }
  // A triangle without its diagonal has a row less, or a first row with nothing in it.
  const bool no_diagonal =
      correlation && p > 0 &&
      (rows->items.size() + 1 == p ||
       (rows->items.size() == p && rows->items[0].kind == Node::Kind::List && rows->items[0].items.empty()));
  const std::size_t skipped = no_diagonal && rows->items.size() + 1 == p ? 1 : 0;
  if (p == 0 || rows->items.size() + skipped != p) {
    section.problem(key, std::to_string(rows->items.size()) + " rows for " + std::to_string(p) + " names",
                    "give one row of the lower triangle for each name under " + std::string(names_key));
    return std::nullopt;
  }
  for (std::size_t i = 0; i < p; ++i) {
    const Node none = Node::list();
    const Node& row = i < skipped ? none : rows->items[i - skipped];
    const std::size_t expected = no_diagonal ? i : i + 1;
    if (row.kind != Node::Kind::List || (row.items.size() != expected && row.items.size() != p)) {
      section.problem(
          row.place.line, key,
          "row " + std::to_string(i + 1) + " does not have " + std::to_string(expected) + " cells",
          "row i of a lower triangle has i cells; write \"\" for one that is not printed");
      return std::nullopt;
    }
    matrix.lower.emplace_back();
    for (std::size_t j = 0; j <= i; ++j) {
      const Interval natural = correlation ? kCorrelation : i == j ? kNotNegative : kAnyNumber;
      Printed cell;
      if (j < row.items.size())
        cell = correlation && i == j ? section.exact(row.items[j], key, kAnyNumber)
                                     : section.printed(row.items[j], key, natural);
      if (correlation && i == j) {
        // Some tables print reliabilities here; whatever stands there, a variable's correlation with itself
        // is one.
        if (cell && cell->value != 1)
          section.problem(row.place.line, key,
                          "the diagonal cell of " + matrix.terms[i] + " is not 1 and is read as 1",
                          "write 1 on the diagonal of correlations");
        cell = read_exact_number("1").value();
      }
      matrix.lower.back().push_back(std::move(cell));
    }
  }
  return matrix;
}

}  // namespace rejoinder
