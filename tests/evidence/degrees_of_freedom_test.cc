#include "core/evidence/degrees_of_freedom.h"

#include <gtest/gtest.h>

namespace rejoinder::testing {
namespace {

Column column(Errors errors, long n, long k) {
  Column out;
  out.id = "a";
  out.errors = errors;
  out.n = n;
  out.k = k;
  return out;
}

// Common practice: residual df of least squares.
TEST(DegreesOfFreedom, FollowTheColumn) {
  EXPECT_EQ(test_df(column(Errors::Classical, 96, 5)).denominator, 90);
  EXPECT_NE(test_df(column(Errors::Classical, 96, 5)).words.find("96 − 5 − 1 = 90"), std::string::npos);
  Column no_intercept = column(Errors::Classical, 96, 5);
  no_intercept.intercept = false;
  EXPECT_EQ(test_df(no_intercept).denominator, 91);
  Column effects = column(Errors::Robust, 96, 5);
  effects.fixed_effects = 12;
  EXPECT_EQ(test_df(effects).denominator, 79);
}

TEST(DegreesOfFreedom, CountClustersAndNameTheOtherConvention) {
  Column clustered = column(Errors::Clustered, 476, 4);
  clustered.clusters = 14;
  const DfArgument df = test_df(clustered);
  EXPECT_EQ(df.denominator, 13);
  EXPECT_NE(std::find(df.other.begin(), df.other.end(), 471.0), df.other.end());
  EXPECT_FALSE(df.cautions.empty());
  clustered.clusters.reset();
  EXPECT_TRUE(std::isinf(test_df(clustered).denominator));
  EXPECT_FALSE(test_df(clustered).asks.empty()) << "the number of clusters is the first thing to ask for";
}

TEST(DegreesOfFreedom, TakeThePrintedOnes) {
  Column printed = column(Errors::Classical, 96, 5);
  printed.df = 85;
  EXPECT_EQ(test_df(printed).denominator, 85);
  EXPECT_FALSE(test_df(printed).cautions.empty()) << "n and k give 90";
}

TEST(DegreesOfFreedom, AreInfiniteForMaximumLikelihoodAndWhereNothingIsGiven) {
  Column ml = column(Errors::Classical, 900, 3);
  ml.estimator = Estimator::Ml;
  EXPECT_TRUE(std::isinf(test_df(ml).denominator));
  Column bare;
  EXPECT_TRUE(std::isinf(test_df(bare).denominator));
  EXPECT_FALSE(test_df(bare).known);
  EXPECT_FALSE(test_df(bare).asks.empty());
}

// Five figures: k is then the number of terms listed, said as an assumption.
TEST(DegreesOfFreedom, CountTheTermsWhereKIsMissing) {
  Column five = column(Errors::Unknown, 100, 0);
  five.k.reset();
  five.terms.resize(2);
  EXPECT_EQ(test_df(five).denominator, 97);
  EXPECT_FALSE(test_df(five).assumes.empty());
}

TEST(DegreesOfFreedom, NeverGoBelowOne) {
  EXPECT_FALSE(fit_df(column(Errors::Classical, 5, 5)).has_value());
  EXPECT_FALSE(test_df(column(Errors::Classical, 5, 5)).known);
}

}  // namespace
}  // namespace rejoinder::testing
