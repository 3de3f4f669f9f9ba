// The restriction language: "fare = 0, \"fuel price\" = 0" becomes R b = r.
//
// Plain arithmetic on term names: a = b, a = b = c (two restrictions), a + 2*b - c = 1, 0.5 a = b, a - 1/2 b
// = 0.25, 2*(a - b) = 1, comma or semicolon between restrictions, "all" for every slope of the column. Names
// are letters, digits and underscores (any letter of Unicode), not starting with a digit; anything else
// stands in double quotes
// ("fuel price", with \" and \\ inside). A name of another column is written column.term, each part quoted
// where it must be: men.fare, "rural men"."fare price". Numbers may carry exponents and a decimal point.
#pragma once

#include <Eigen/Dense>
#include <compare>
#include <string>
#include <string_view>
#include <vector>

#include "core/result.h"

namespace rejoinder {

struct TermName {
  std::string column;  // empty unless written column.term
  std::string term;
  bool operator==(const TermName&) const = default;
  // By column, then by term. Written out, as not every library at hand orders strings three ways.
  std::strong_ordering operator<=>(const TermName& other) const {
    const int order = column == other.column ? term.compare(other.term) : column.compare(other.column);
    return order <=> 0;
  }
  // As the language writes it, quoted where needed.
  std::string text() const;
};

// rows * b = values over the terms named, in the order of first appearance. Full row rank.
struct Restrictions {
  std::vector<TermName> terms;       // p
  Eigen::MatrixXd rows;              // q x p
  Eigen::VectorXd values;            // q
  std::vector<std::string> wording;  // q, each restriction written out, "fare - \"fuel price\" = 0"
  std::vector<std::string> dropped;  // those that the others already imply
  int listed = 0;                    // restrictions as the text lists them, before dropping

  int q() const { return static_cast<int>(rows.rows()); }
  int p() const { return static_cast<int>(rows.cols()); }
  // Every restriction sets one term to a number (then q == p).
  bool exclusion() const;
};

// `slopes` are the terms that "all" stands for. Errors: what cannot be read, with the character counted from
// 1 in `where` ("character 8"); two restrictions that no values satisfy, naming both; no restriction at all;
// an expression that is not linear (says so). At most 200 restrictions and 200 terms.
Result<Restrictions> read_restrictions(std::string_view text, const std::vector<std::string>& slopes = {});

// A linear combination without "=": "fare - \"fuel price\"". One row over its terms, plus its constant.
struct Combination {
  std::vector<TermName> terms;  // p
  Eigen::VectorXd weights;      // p
  double constant = 0;
};
Result<Combination> read_combination(std::string_view text);

}  // namespace rejoinder
