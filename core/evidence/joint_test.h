// A claim resolved against the review: which columns, which restrictions, which statistic, which degrees of freedom.
//
// Routes read this and nothing else of the claim, except for what it reports, which is the judge's business.
#pragma once

#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "core/algebra/restrictions.h"
#include "core/evidence/degrees_of_freedom.h"
#include "core/evidence/evidence.h"
#include "core/review/review.h"

namespace rejoinder {

// What the claim rests on, which says which routes may speak.
enum class Basis {
  Column,      // one column, perhaps against another
  Samples,     // terms of several columns
  Variance,    // a line of an analysis-of-variance table
  Break,       // a pooled column against its parts
  Sentence     // the sentence alone
};

struct JointTest {
  Basis basis = Basis::Column;
  const Review* review = nullptr;
  const Claim* claim = nullptr;
  const Column* column = nullptr;      // the column tested (of several: the first); null where the claim rests on none
  std::vector<const Column*> columns;  // Samples: those the claim names; Break: the pooled column, then its parts
  const Column* restricted = nullptr;  // the nested column, where the claim compares two and the comparison can be made
  std::optional<Fit> restricted_fit;   // or its fit alone
  bool all_slopes = false;             // the restrictions set every slope of the column to zero
  std::optional<Restrictions> restrictions;  // absent where two columns are compared without naming terms

  int q = 0;
  Statistic statistic = Statistic::F;
  DegreesOfFreedom df;  // denominator infinite for a chi-square
  DfArgument df_argument;
  double level = 0.05;
  int sided = 2;  // 1 only for q = 1

  std::string in_words;           // the restrictions, or "(2) against (1)"
  std::string refused_comparison; // why the compared column cannot be used, where it cannot
  std::vector<Ask> asks;          // that go with the refusal
  std::vector<std::string> assumes, cautions;
};

// Why there is no test to speak of.
struct NoTest {
  std::string reason;  // a sentence
  std::vector<Ask> asks;
  std::vector<std::string> cautions;
  int q = 0;
  std::string in_words;
};

// `claim` belongs to `review`; both must outlive the answer.
std::variant<JointTest, NoTest> set_up_test(const Review& review, const Claim& claim);

// The set-ups of the other bases, for set_up_test. Contract: the claim is of that kind.
std::variant<JointTest, NoTest> set_up_samples(const Review& review, const Claim& claim);
std::variant<JointTest, NoTest> set_up_variance(const Review& review, const Claim& claim);
std::variant<JointTest, NoTest> set_up_break(const Review& review, const Claim& claim);

// p of the statistic W at the test's df; one-sided p where the claim is one-sided.
double p_of_wald(const JointTest& test, double wald);
Interval p_of_wald(const JointTest& test, const Interval& wald);
// The W at which the test rejects at its level.
double critical_wald(const JointTest& test);
// Every W whose p lies in `p`.
Interval wald_of_p(const JointTest& test, const Interval& p);

// "column (2)" or the column's label, for sentences.
std::string column_name(const Column& column);

}  // namespace rejoinder
