// A review: what one paper prints and what it claims, each number with the text as printed.
//
// The plain data that every route reads. Made by read_review from a Document; nothing here is computed,
// nothing is guessed: what the print does not give is absent.
#pragma once

#include <array>
#include <optional>
#include <string>
#include <vector>

#include "core/number/printed_number.h"
#include "core/review/document.h"

namespace rejoinder {

using Printed = std::optional<PrintedNumber>;
using PrintedPair = std::optional<std::array<PrintedNumber, 2>>;  // low, high, as printed

enum class Estimator { Ols, Iv, Ml, Other };
enum class Errors { Classical, Robust, Clustered, Unknown };
enum class Samples { Independent, Same };

// What stands beside a coefficient. All of it may be absent: a term with a name alone was in the column.
struct Uncertainty {
  Printed se, t, p;
  PrintedPair ci;
  double ci_level = 0.95;
};

struct Term : Uncertainty {
  std::string name;
  Printed coef;
  Printed ratio;  // odds, rate or hazard ratio, in place of coef; ci is then of the ratio too
  // By the key, or glued to a figure of the term; absent: not known (0 says that none was printed).
  std::optional<int> stars;
  bool intercept = false;
  Place place;
  // A name alone: nothing is known but that the term was there.
  bool named_only() const { return !coef && !ratio && !se && !t && !p && !ci && !stars; }
};

// A lower triangle, row i holding i + 1 cells; an empty cell is not known.
struct PrintedMatrix {
  std::vector<std::string> terms;           // p
  std::vector<std::vector<Printed>> lower;  // p rows
  Place place;
};

// Side information about a column: a combination with its own figures, or another joint test that is printed.
struct Fact : Uncertainty {
  std::string of;            // linear expression; empty for a joint test
  Printed value;             // of the combination
  std::string restrictions;  // joint test; empty for a combination
  Printed f, chi2;           // and p, for a joint test
  Place place;
};

struct NamedNumber {
  std::string name;
  PrintedNumber number;
};
struct NamedCount {
  std::string name;
  long count = 0;
};

struct Groups {
  std::optional<long> base;
  std::vector<NamedCount> size;
};

struct Column {
  std::string id, label, outcome;
  Estimator estimator = Estimator::Ols;
  Errors errors = Errors::Unknown;
  std::optional<long> clusters, n, k, df;
  bool intercept = true;
  long fixed_effects = 0;
  bool weights = false;
  Printed r2, adj_r2, ssr, tss, outcome_sd, residual_sd, loglik, null_loglik, overall_f, overall_p;
  std::optional<Interval> correlation_within;  // the user's assumption on unknown correlations of estimates
  std::vector<Term> terms;
  std::optional<PrintedMatrix> covariance, correlation;
  std::vector<Fact> facts;
  Printed mean_of_outcome;
  std::vector<NamedNumber> means;  // of regressors
  std::optional<Groups> groups;
  Place place;

  // The term of that name, or null.
  const Term* term(std::string_view name) const;
};

// One line of a printed analysis-of-variance table.
struct Source {
  std::string name;
  Printed ss, ms, f, p;
  std::optional<long> df;
  Place place;
};

// A published table of correlations of the variables themselves.
struct Variables {
  std::optional<long> n;
  std::vector<std::string> names;  // p
  std::vector<Printed> sd, mean;   // p or empty
  PrintedMatrix correlation;       // diagonal exact
  Place place;
};

// A fit printed without a column of its own: restricted_fit = { r2 = "0.471" }.
struct Fit {
  Printed r2, adj_r2, ssr, residual_sd, loglik;
  std::optional<long> n, k;
};

struct Claim {
  std::string id, says, page, note;
  std::string column;        // id; empty where the claim needs none
  std::string restrictions;  // empty where two columns are compared
  std::string restricted;    // id of the nested column
  std::optional<Fit> restricted_fit;
  std::vector<std::string> columns;  // ids, for claims over several columns
  Samples samples = Samples::Independent;
  std::string source;              // line of the analysis-of-variance table
  std::string pooled;              // break test: id of the pooled column
  std::vector<std::string> parts;  // and of its parts
  std::string outcome;             // claims on the table of correlations
  std::vector<std::string> regressors;
  // What is reported.
  Printed f, chi2, p;
  std::optional<long> df1;
  std::optional<double> df2;  // may be infinite
  std::optional<bool> rejects;
  std::optional<int> stars;
  std::optional<double> level;  // absent: the review's
  int sided = 2;
  Place place;
};

// Something in the file that could not be read. The rest is checked all the same.
struct Problem {
  int line = 0;
  std::string key;  // "claim \"prices\" / restrictions"
  std::string what, mend;
  std::string claim;  // id, where it concerns one claim only, so that its finding can say so
  std::string text() const;
};

struct Review {
  std::string title, note;
  double level = 0.05;
  std::vector<double> stars = {0.10, 0.05, 0.01};  // levels of one, two, three stars
  char decimal = '.';
  Rounding rounding = Rounding::Nearest;
  std::vector<Column> columns;
  std::vector<Source> sources;
  std::optional<long> observations;  // beside [[source]]
  std::optional<Variables> variables;
  std::vector<Claim> claims;
  std::vector<Problem> problems;

  const Column* column(std::string_view id) const;
};

// Reads what the tree says. Never refuses a whole review for one bad value: each value that cannot be read is
// left out and listed under problems with its line, key, what it is and how to mend it.
Review read_review(const Node& document);

}  // namespace rejoinder
