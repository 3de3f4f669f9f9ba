#include <algorithm>
#include <cmath>

#include "core/evidence/column_limits.h"

namespace rejoinder {
namespace {

int index_of(const std::vector<std::string>& names, const std::string& name) {
  const auto at = std::find(names.begin(), names.end(), name);
  return at == names.end() ? -1 : static_cast<int>(at - names.begin());
}

struct UsableFact {
  const Fact* fact;
  Combination combination;
};

// Combinations that touch `names`, directly or through one another; their terms are added to `names`.
std::vector<UsableFact> facts_that_touch(const Column& column, std::vector<std::string>& names) {
  std::vector<UsableFact> candidates, used;
  for (const Fact& fact : column.facts) {
    if (fact.of.empty()) continue;
    Result<Combination> read = read_combination(fact.of);
    if (!read.ok()) continue;
    const auto& terms = read.value().terms;
    if (std::any_of(terms.begin(), terms.end(),
                    [&](const TermName& t) { return !t.column.empty() && t.column != column.id; }))
      continue;
    candidates.push_back({&fact, std::move(read).value()});
  }
  bool grew = true;
  while (grew) {
    grew = false;
    for (auto it = candidates.begin(); it != candidates.end();) {
      const bool touches = std::any_of(it->combination.terms.begin(), it->combination.terms.end(),
                                       [&](const TermName& t) { return index_of(names, t.term) >= 0; });
      if (!touches) {
        ++it;
        continue;
      }
      for (const TermName& t : it->combination.terms)
        if (index_of(names, t.term) < 0) names.push_back(t.term);
      used.push_back(std::move(*it));
      it = candidates.erase(it);
      grew = true;
    }
  }
  return used;
}

// Calls use(i, j, number) for each cell of `matrix` that speaks of two terms of `names`.
template <class Use>
void for_cells(const PrintedMatrix& matrix, const std::vector<std::string>& names, Use use) {
  for (std::size_t a = 0; a < matrix.lower.size() && a < matrix.terms.size(); ++a)
    for (std::size_t b = 0; b < matrix.lower[a].size() && b < matrix.terms.size(); ++b) {
      if (!matrix.lower[a][b]) continue;
      const int i = index_of(names, matrix.terms[a]), j = index_of(names, matrix.terms[b]);
      if (i >= 0 && j >= 0) use(i, j, *matrix.lower[a][b]);
    }
}

}  // namespace

ColumnSet column_set(const JointTest& test, const ColumnSetChoices& choices) {
  ColumnSet out;
  const Column& column = *test.column;
  const Restrictions& restrictions = *test.restrictions;
  for (const TermName& name : restrictions.terms) out.terms.push_back(name.term);
  const int tested = static_cast<int>(out.terms.size());
  std::vector<UsableFact> facts;
  if (choices.combinations) facts = facts_that_touch(column, out.terms);
  const int p = static_cast<int>(out.terms.size());

  out.R = Eigen::MatrixXd::Zero(restrictions.q(), p);
  out.R.leftCols(tested) = restrictions.rows;
  out.r = restrictions.values;
  out.set = AdmissibleSet(p);

  for (int j = 0; j < p; ++j) {
    const Term* term = column.term(out.terms[static_cast<std::size_t>(j)]);
    CoefficientLimits limits;
    if (term) limits = coefficient_limits(*test.review, column, *term, test.df.denominator);
    out.clashes.insert(out.clashes.end(), limits.clashes.begin(), limits.clashes.end());
    out.cells.insert(out.cells.end(), limits.cells.begin(), limits.cells.end());
    if (!limits.consistent) limits = CoefficientLimits{};
    if (j < tested) out.any_known = out.any_known || limits.known;
    out.limits.push_back(std::move(limits));
  }

  // Which pairs, and which variances, the column prints.
  std::vector<char> pair_known(static_cast<std::size_t>(p * p), 0), variance_known(static_cast<std::size_t>(p), 0);
  bool covariances_printed = false;
  if (column.covariance)
    for_cells(*column.covariance, out.terms, [&](int i, int j, const PrintedNumber&) {
      covariances_printed = true;
      if (i == j) variance_known[static_cast<std::size_t>(i)] = 1;
      pair_known[static_cast<std::size_t>(i * p + j)] = pair_known[static_cast<std::size_t>(j * p + i)] = 1;
    });
  if (column.correlation)
    for_cells(*column.correlation, out.terms, [&](int i, int j, const PrintedNumber&) {
      if (i != j) pair_known[static_cast<std::size_t>(i * p + j)] = pair_known[static_cast<std::size_t>(j * p + i)] = 1;
    });
  out.variances_by_matrix = std::all_of(variance_known.begin(), variance_known.begin() + tested, [](char k) { return k != 0; });
  for (int i = 0; i < tested; ++i)
    for (int j = 0; j < i; ++j) {
      ++out.pairs;
      out.pairs_known += pair_known[static_cast<std::size_t>(i * p + j)];
    }

  // t ratios where the hypothesis excludes single terms and V is known by s.e. and correlations alone.
  out.in_ratios = choices.ratios && restrictions.exclusion() && facts.empty() && !covariances_printed;
  for (int j = 0; j < p; ++j) {
    const CoefficientLimits& limits = out.limits[static_cast<std::size_t>(j)];
    if (out.in_ratios) {
      int row = 0;
      out.R.col(j).cwiseAbs().maxCoeff(&row);
      const double weight = out.R(row, j);
      const Interval t = limits.t_about(out.r(row) / weight);
      out.ratios.push_back(t);
      out.set.set_se(j, Interval::point(1));
      if (std::isfinite(t.low) == std::isfinite(t.high)) {
        out.set.set_coefficient(j, t);
      } else {
        // A half-line, as from stars: no centre and half width, but a linear fact.
        out.set.coefficient_facts.push_back({Eigen::VectorXd::Unit(p, j), t});
      }
    } else {
      out.set.set_coefficient(j, limits.b);
      out.set.set_se(j, limits.s);
    }
  }
  if (out.in_ratios) {
    // Signs and sizes of the weights drop out of an exclusion once it is put in t ratios.
    Eigen::MatrixXd plain = Eigen::MatrixXd::Zero(out.R.rows(), p);
    for (int j = 0; j < p; ++j) {
      int row = 0;
      out.R.col(j).cwiseAbs().maxCoeff(&row);
      plain(row, j) = 1;
    }
    out.R = plain;
    out.r.setZero();
  }

  if (column.covariance)
    for_cells(*column.covariance, out.terms, [&](int i, int j, const PrintedNumber& number) {
      if (i == j) {
        const Interval printed = sqrt(number.possible);
        const Interval known{out.set.se_low(i), out.set.se_high(i)};
        if (const auto both = meet(known, printed)) {
          out.set.set_se(i, *both);
        } else {
          // The matrix and the table disagree on a standard error: the matrix is what the test rests on.
          out.set.set_se(i, printed);
          Clash clash;
          clash.where = column.id + " / " + out.terms[static_cast<std::size_t>(i)] + " / se, covariance";
          clash.says = "The standard error printed for “" + out.terms[static_cast<std::size_t>(i)] +
                       "” and its variance in the covariance matrix do not go together, rounding allowed for.";
          clash.cells = {{column.id, out.terms[static_cast<std::size_t>(i)], "se"}, {column.id, "", "covariance"}};
          out.clashes.push_back(std::move(clash));
        }
      } else {
        out.set.covariances.push_back({i, j, number.possible});
      }
    });
  if (covariances_printed) out.cells.push_back({column.id, "", "covariance"});
  bool correlations_printed = false;
  if (column.correlation)
    for_cells(*column.correlation, out.terms, [&](int i, int j, const PrintedNumber& number) {
      if (i == j) return;
      correlations_printed = true;
      out.set.correlations.push_back({i, j, number.possible});
    });
  if (correlations_printed) out.cells.push_back({column.id, "", "correlation"});

  // The user's assumption speaks of unknown correlations only.
  if (column.correlation_within) {
    const bool any_unknown = std::count(pair_known.begin(), pair_known.end(), 0) > p;
    bool known_off_diagonal = false;
    for (int i = 0; i < p; ++i)
      for (int j = 0; j < i; ++j) {
        if (pair_known[static_cast<std::size_t>(i * p + j)]) {
          known_off_diagonal = true;
        }
      }
    out.assumed_correlations = any_unknown && p > 1;
    if (!known_off_diagonal) {
      out.set.every_correlation = *column.correlation_within;
    } else {
      for (int i = 0; i < p; ++i)
        for (int j = 0; j < i; ++j)
          if (!pair_known[static_cast<std::size_t>(i * p + j)])
            out.set.correlations.push_back({i, j, *column.correlation_within});
    }
  }

  for (const UsableFact& usable : facts) {
    const CoefficientLimits limits = combination_limits(*test.review, column, *usable.fact, test.df.denominator);
    out.clashes.insert(out.clashes.end(), limits.clashes.begin(), limits.clashes.end());
    if (!limits.known || !limits.consistent) continue;
    Eigen::VectorXd a = Eigen::VectorXd::Zero(p);
    for (std::size_t i = 0; i < usable.combination.terms.size(); ++i)
      a(index_of(out.terms, usable.combination.terms[i].term)) += usable.combination.weights(static_cast<int>(i));
    if (std::isfinite(limits.s.high) || limits.s.low > 0) out.set.combination_variances.push_back({a, square(limits.s)});
    if (std::isfinite(limits.b.low) || std::isfinite(limits.b.high))
      out.set.coefficient_facts.push_back({a, limits.b - Interval::point(usable.combination.constant)});
    ++out.facts;
    out.cells.push_back({column.id, usable.fact->of, "fact"});
  }
  return out;
}

}  // namespace rejoinder
