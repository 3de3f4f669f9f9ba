#include "core/algebra/restrictions.h"

#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <cstring>

#include "core/algebra/elimination.h"
#include "core/algebra/parse.h"
#include "core/algebra/tokens.h"

namespace rejoinder {
namespace {

// The shortest decimal that reads back the same double.
std::string shortest(double x) {
  char text[40];
  for (int digits = 1; digits <= 17; ++digits) {
    std::snprintf(text, sizeof text, "%.*g", digits, x);
    if (std::strtod(text, nullptr) == x) break;
  }
  // 100 rather than 1e+02.
  if (std::fabs(x) >= 1 && std::fabs(x) < 1e15 && std::strchr(text, 'e'))
    std::snprintf(text, sizeof text, "%.0f", x);
  return text;
}

// One equality, weights' b = value.
struct Row {
  Eigen::VectorXd weights;
  double value = 0;
  int character = 1;
  std::string written;  // as the text has it, for a row that names no term
};

std::string wording(const std::vector<TermName>& terms, const Row& row) {
  std::string text;
  for (Eigen::Index j = 0; j < row.weights.size(); ++j) {
    const double w = row.weights[j];
    if (w == 0) continue;
    text += text.empty() ? (w < 0 ? "-" : "") : (w < 0 ? " - " : " + ");
    if (std::fabs(w) != 1) text += shortest(std::fabs(w)) + "*";
    text += terms[j].text();
  }
  if (text.empty()) return row.written;
  return text + " = " + shortest(row.value);
}

Error all_without_slopes(int character) {
  return {at_character(character), "\"all\" stands for every slope, and this column lists none",
          "list the column's terms, or name those that are tested"};
}

// "all" or "all = 0". False with `error` where it is put equal to anything else.
bool check_all(const Part& part, const std::vector<std::string>& slopes, Error& error) {
  for (const Side& side : part.sides) {
    if (side.all) continue;
    const bool zero = side.expression.steps.size() == 1 &&
                      side.expression.steps[0].op == Expression::Op::Number &&
                      side.expression.steps[0].number == 0;
    if (zero) continue;
    error = {at_character(side.character), "\"all\" stands for every slope being zero",
             "name the terms to put them equal to anything else; a term named all stands in double quotes"};
    return false;
  }
  if (slopes.empty()) {
    error = all_without_slopes(part.character);
    return false;
  }
  return true;
}

bool has_all(const Part& part) {
  for (const Side& side : part.sides)
    if (side.all) return true;
  return false;
}

int index_of(std::vector<TermName>& terms, const TermName& name) {
  for (std::size_t j = 0; j < terms.size(); ++j)
    if (terms[j] == name) return static_cast<int>(j);
  terms.push_back(name);
  return static_cast<int>(terms.size()) - 1;
}

// Adds the terms that "all" brings, so that the number of terms is settled before rows are made.
bool add_slopes(ParsedRestrictions& parsed, const std::vector<std::string>& slopes, Error& error) {
  for (const Part& part : parsed.parts) {
    if (!has_all(part)) continue;
    if (!check_all(part, slopes, error)) return false;
    for (const std::string& slope : slopes) index_of(parsed.terms, {"", slope});
    if (parsed.terms.size() > kMostTerms) {
      error = {at_character(part.character), "more than 200 different terms", "name those that are tested"};
      return false;
    }
  }
  return true;
}

// The rows that one part lists. A chain with a number in it puts every other side equal to that number; a
// chain of terms is a row for each neighbouring pair.
bool add_rows(const Part& part, std::vector<TermName>& terms, const std::vector<std::string>& slopes,
              std::vector<Row>& rows, Error& error) {
  const int p = static_cast<int>(terms.size());
  if (has_all(part)) {
    for (const std::string& slope : slopes) {
      Row row{Eigen::VectorXd::Zero(p), 0, part.character, ""};
      row.weights[index_of(terms, {"", slope})] = 1;
      rows.push_back(std::move(row));
    }
    return true;
  }
  std::vector<LinearForm> forms;
  int number = -1;
  for (const Side& side : part.sides) {
    Result<LinearForm> form = linear_form(side.expression, p);
    if (!form.ok()) {
      error = form.error();
      return false;
    }
    forms.push_back(std::move(form).value());
    if (number < 0 && !has_terms(side.expression)) number = static_cast<int>(forms.size()) - 1;
  }
  const auto add = [&](int left, int right) {  // false: beyond the range of doubles
    Row row{forms[left].weights - forms[right].weights, forms[right].constant - forms[left].constant,
            part.sides[left].character,
            part.sides[std::min(left, right)].written + " = " + part.sides[std::max(left, right)].written};
    // What cancels between the sides up to rounding is zero, as within a side.
    for (int j = 0; j < p; ++j)
      if (std::fabs(row.weights[j]) <=
          1e-12 * (std::fabs(forms[left].weights[j]) + std::fabs(forms[right].weights[j])))
        row.weights[j] = 0;
    if (std::fabs(row.value) <= 1e-12 * (std::fabs(forms[left].constant) + std::fabs(forms[right].constant)))
      row.value = 0;
    if (!row.weights.allFinite() || !std::isfinite(row.value)) {
      error = {at_character(part.sides[left].character), "the numbers here grow too large to compute with",
               "write the restriction with smaller ones"};
      return false;
    }
    rows.push_back(std::move(row));
    return true;
  };
  const int sides = static_cast<int>(forms.size());
  for (int i = 0; i < sides; ++i) {
    if (number >= 0 && i != number && !add(i, number)) return false;
    if (number < 0 && i > 0 && !add(i - 1, i)) return false;
  }
  return true;
}

Error clash_error(const Clash& clash, const std::vector<Row>& rows, const std::vector<TermName>& terms) {
  const std::string where = at_character(rows[clash.row].character);
  const std::string last = wording(terms, rows[clash.row]);
  if (clash.with.empty())
    return {where, "no values satisfy " + last, "take this restriction away or change it"};
  std::string list;
  for (std::size_t i = 0; i < clash.with.size(); ++i)
    list += (i > 0 ? ", " : "") + wording(terms, rows[clash.with[i]]);
  return {where,
          "no values satisfy " + std::string(clash.with.size() == 1 ? "both " : "all of ") + list + " and " +
              last,
          "take one of them away or change it"};
}

}  // namespace

std::string TermName::text() const {
  return column.empty() ? written_name(term) : written_name(column) + "." + written_name(term);
}

bool Restrictions::exclusion() const {
  if (q() != p()) return false;
  for (Eigen::Index i = 0; i < rows.rows(); ++i)
    if ((rows.row(i).array() != 0).count() != 1) return false;
  return true;
}

Result<Restrictions> read_restrictions(std::string_view text, const std::vector<std::string>& slopes) {
  Result<ParsedRestrictions> read = parse_restrictions(text);
  if (!read.ok()) return read.error();
  ParsedRestrictions parsed = std::move(read).value();
  Error error;
  if (!add_slopes(parsed, slopes, error)) return error;
  std::vector<Row> rows;
  for (const Part& part : parsed.parts) {
    if (!add_rows(part, parsed.terms, slopes, rows, error)) return error;
    if (rows.size() > kMostRestrictions)
      return Error{at_character(part.character), "more than 200 restrictions",
                   "write those of one test only"};
  }
  if (rows.empty()) return Error{at_character(1), "no restriction is stated", "write one: fare = 0"};

  // Terms whose weights cancel everywhere take no part.
  std::vector<Eigen::Index> used;
  for (Eigen::Index j = 0; j < static_cast<Eigen::Index>(parsed.terms.size()); ++j)
    for (const Row& row : rows)
      if (row.weights[j] != 0) {
        used.push_back(j);
        break;
      }
  Eigen::MatrixXd matrix(rows.size(), used.size());
  Eigen::VectorXd values(rows.size());
  for (std::size_t i = 0; i < rows.size(); ++i) {
    for (std::size_t j = 0; j < used.size(); ++j) matrix(i, j) = rows[i].weights[used[j]];
    values[i] = rows[i].value;
  }
  const Elimination elimination = eliminate(matrix, values);
  if (elimination.clash) return clash_error(*elimination.clash, rows, parsed.terms);
  if (elimination.kept.empty())
    return Error{at_character(rows[0].character),
                 "the restriction says nothing about any term: " + wording(parsed.terms, rows[0]),
                 "name the terms that are tested: fare = 0"};

  Restrictions result;
  result.listed = static_cast<int>(rows.size());
  for (const Eigen::Index j : used) result.terms.push_back(parsed.terms[j]);
  result.rows.resize(elimination.kept.size(), used.size());
  result.values.resize(elimination.kept.size());
  for (std::size_t i = 0; i < elimination.kept.size(); ++i) {
    result.rows.row(i) = matrix.row(elimination.kept[i]);
    result.values[i] = values[elimination.kept[i]];
    result.wording.push_back(wording(parsed.terms, rows[elimination.kept[i]]));
  }
  for (const int i : elimination.implied) result.dropped.push_back(wording(parsed.terms, rows[i]));
  return result;
}

Result<Combination> read_combination(std::string_view text) {
  Result<ParsedRestrictions> read = parse_combination(text);
  if (!read.ok()) return read.error();
  ParsedRestrictions parsed = std::move(read).value();
  const int p = static_cast<int>(parsed.terms.size());
  const Side& side = parsed.parts[0].sides[0];
  const Result<LinearForm> form = linear_form(side.expression, p);
  if (!form.ok()) return form.error();
  std::vector<int> used;
  for (int j = 0; j < p; ++j)
    if (form.value().weights[j] != 0) used.push_back(j);
  if (used.empty())
    return Error{at_character(side.character), "no term is left in this expression",
                 "name the terms it combines: fare - fuel"};
  Combination result;
  result.weights.resize(used.size());
  for (std::size_t i = 0; i < used.size(); ++i) {
    result.terms.push_back(parsed.terms[used[i]]);
    result.weights[i] = form.value().weights[used[i]];
  }
  result.constant = form.value().constant;
  return result;
}

}  // namespace rejoinder
