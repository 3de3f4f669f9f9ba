#include "web/model/ticks.h"

#include <algorithm>
#include <cmath>

namespace rejoinder {
namespace {

std::string quoted_where_needed(const std::string& name) {
  // Names taken from a claim over several columns come as column.term already.
  return TermName{"", name}.text();
}

std::string trimmed_text(std::string_view text) {
  const std::size_t first = text.find_first_not_of(" \t\n");
  if (first == std::string_view::npos) return {};
  return std::string(text.substr(first, text.find_last_not_of(" \t\n") - first + 1));
}

std::vector<std::string> names(const Restrictions& read) {
  std::vector<std::string> names;
  for (const TermName& term : read.terms) names.push_back(term.column.empty() ? term.term : term.text());
  return names;
}

// Every row sets the difference of two terms to zero, and q = p - 1: all of them are equal.
bool all_equal(const Restrictions& read) {
  if (read.p() < 2 || read.q() != read.p() - 1 || !read.values.isZero(0)) return false;
  for (int i = 0; i < read.q(); ++i) {
    const auto row = read.rows.row(i);
    if (std::fabs(row.sum()) > 1e-12 || std::fabs(row.cwiseAbs().sum() - 2) > 1e-12 ||
        row.cwiseAbs().maxCoeff() > 1 + 1e-12)
      return false;
  }
  return true;
}

std::string shortest(double x) {
  char text[40];
  for (int digits = 1; digits <= 17; ++digits) {
    std::snprintf(text, sizeof text, "%.*g", digits, x);
    if (std::strtod(text, nullptr) == x) break;
  }
  return text;
}

}  // namespace

Ticks read_ticks(std::string_view restrictions) {
  Ticks ticks;
  std::string text = trimmed_text(restrictions);
  if (text.empty()) return ticks;
  if (text.back() == '=') {
    // One term ticked "equal", or the first of a sum: reading it as a combination gives its name.
    const Result<Combination> one = read_combination(text.substr(0, text.size() - 1));
    if (one.ok() && one.value().terms.size() == 1 && one.value().weights[0] == 1 &&
        one.value().constant == 0) {
      const TermName& term = one.value().terms[0];
      ticks.form = "equal";
      ticks.terms = {term.column.empty() ? term.term : term.text()};
    }
    return ticks;
  }
  const Result<Restrictions> result = read_restrictions(text);
  if (!result.ok()) return ticks;
  const Restrictions& read = result.value();
  if (read.exclusion() && read.values.isZero(0)) {
    ticks.form = "zero";
    ticks.terms = names(read);
  } else if (all_equal(read)) {
    ticks.form = "equal";
    ticks.terms = names(read);
  } else if (read.q() == 1 && (read.rows.row(0).array() == 1).all()) {
    ticks.form = "sum";
    ticks.terms = names(read);
    ticks.value = shortest(read.values[0]);
  }
  return ticks;
}

std::string write_ticks(const Ticks& ticks) {
  if (ticks.terms.empty()) return {};
  std::string text;
  const auto joined = [&](const char* between) {
    for (const std::string& term : ticks.terms)
      text += (text.empty() ? "" : between) + quoted_where_needed(term);
  };
  if (ticks.form == "equal") {
    joined(" = ");
    if (ticks.terms.size() == 1) text += " =";
  } else if (ticks.form == "sum") {
    joined(" + ");
    text += " = " + ticks.value;
  } else {
    joined(" = 0, ");
    text += " = 0";
  }
  return text;
}

}  // namespace rejoinder
