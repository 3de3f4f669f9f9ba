#include <gtest/gtest.h>

#include "core/review/review.h"

namespace rejoinder {
namespace {

Review read(const std::string& text) {
  const Result<Node> document = read_document(text);
  EXPECT_TRUE(document.ok()) << text << "\n" << (document.ok() ? "" : document.error().text());
  return document.ok() ? read_review(document.value()) : Review{};
}

std::string problems(const Review& review) {
  std::string all;
  for (const Problem& problem : review.problems) all += problem.text() + "\n";
  return all;
}

const char* kTwoTerms =
    "[[column]]\nid = \"full\"\nestimator = \"ols\"\nerrors = \"clustered\"\nclusters = 41\nn = \"1,418\"\nk "
    "= 7\n"
    "r2 = \"0.482\"\nlabel = \"Table 2, column 3\"\noutcome = \"log passengers\"\nweights = "
    "false\nfixed_effects = 3\n"
    "correlation_within = [\"-0.9\", 0.9]\noverall_p = \"<0.001\"\n"
    "[[column.term]]\nname = \"fare\"\ncoef = \"-0.131**\"\nse = \"(0.052)\"\n"
    "[[column.term]]\nname = \"fuel price\"\nratio = \"1.65\"\nci = [\"1.20\", \"2.27\"]\nci_level = "
    "\"0.90\"\nstars = 0\n"
    "[[column.term]]\nname = \"const\"\nkind = \"intercept\"\n"
    "[column.covariance]\nterms = [\"fare\", \"fuel price\"]\nlower = [[\"0.0027\"], [\"\", 0.005]]\n"
    "[[column.fact]]\nof = \"fare - \\\"fuel price\\\"\"\nvalue = \"-0.091\"\nse = \"0.10\"\n"
    "[[column.fact]]\nrestrictions = \"fare = \\\"fuel price\\\" = 0\"\nf = \"4.2\"\n"
    "[column.means]\noutcome = \"140.0\"\n\"fuel price\" = \"142.3\"\n"
    "[column.groups]\nbase = 18\nsize = { north = 16, east = \"21\" }\n";

TEST(ReadReview, ReadsAColumn) {
  const Review review = read(kTwoTerms);
  EXPECT_EQ(problems(review), "");
  ASSERT_EQ(review.columns.size(), 1u);
  const Column& c = review.columns[0];
  EXPECT_EQ(review.column("full"), &c);
  EXPECT_EQ(review.column("short"), nullptr);
  EXPECT_EQ(c.estimator, Estimator::Ols);
  EXPECT_EQ(c.errors, Errors::Clustered);
  EXPECT_EQ(c.clusters, 41);
  EXPECT_EQ(c.n, 1418);
  EXPECT_EQ(c.k, 7);
  EXPECT_EQ(c.df, std::nullopt);
  EXPECT_EQ(c.fixed_effects, 3);
  EXPECT_TRUE(c.intercept);
  EXPECT_FALSE(c.weights);
  EXPECT_EQ(c.label, "Table 2, column 3");
  EXPECT_TRUE(c.r2->possible.contains(0.482));
  EXPECT_NEAR(c.r2->possible.width(), 0.001, 1e-9);
  EXPECT_FALSE(c.adj_r2);
  EXPECT_EQ(c.overall_p->possible.low, 0);
  EXPECT_EQ(c.overall_p->possible.high, 0.001);
  EXPECT_TRUE(c.correlation_within->contains(-0.9));
  EXPECT_LT(c.correlation_within->width(), 1.8 + 1e-12);

  ASSERT_EQ(c.terms.size(), 3u);
  EXPECT_EQ(c.terms[0].coef->text, "-0.131**");
  EXPECT_EQ(c.terms[0].stars, 2);
  EXPECT_FALSE(c.terms[0].coef->exact);
  EXPECT_EQ(c.terms[0].place.line, 15);
  EXPECT_EQ(c.terms[1].stars, 0);
  EXPECT_EQ((*c.terms[1].ci)[1].text, "2.27");
  EXPECT_EQ(c.terms[1].ci_level, 0.90);
  EXPECT_TRUE(c.terms[2].intercept);
  EXPECT_TRUE(c.terms[2].named_only());
  EXPECT_EQ(c.term("fuel price"), &c.terms[1]);

  ASSERT_TRUE(c.covariance);
  EXPECT_EQ(c.covariance->lower[1].size(), 2u);
  EXPECT_FALSE(c.covariance->lower[1][0]);
  EXPECT_TRUE(c.covariance->lower[1][1]->exact);
  ASSERT_EQ(c.facts.size(), 2u);
  EXPECT_EQ(c.facts[0].value->text, "-0.091");
  EXPECT_EQ(c.facts[1].f->text, "4.2");
  EXPECT_EQ(c.mean_of_outcome->text, "140.0");
  ASSERT_EQ(c.means.size(), 1u);
  EXPECT_EQ(c.means[0].name, "fuel price");
  EXPECT_EQ(c.groups->base, 18);
  EXPECT_EQ(c.groups->size[0].name, "north");
  EXPECT_EQ(c.groups->size[1].count, 21);
}

TEST(ReadReview, ReadsClaims) {
  const Review review = read(
      std::string("level = \"0.10\"\nstars = [\"0.05\", \"0.01\"]\n") + kTwoTerms +
      "[[claim]]\nsays = \"jointly (F = 4.21)\"\ncolumn = \"full\"\nrestrictions = \"all\"\nrestricted_fit = "
      "{ r2 = \"0.471\", k = 5 }\n"
      "f = \"4.21\"\np = \".015\"\ndf = [2, 410]\nrejects = true\nlevel = \"0.05\"\nsided = 1\npage = \"p. "
      "14\"\n"
      "[[claim]]\nid = \"second\"\nchi2 = \"8.3**\"\ndf = [3, \"inf\"]\nrejects = false\nsamples = \"same\"\n"
      "[[claim]]\ndf = 3\nstars = \"***\"\n[[claim]]\ndf = [1, inf]\n[[claim]]\ndf = [\"4\"]\n[[claim]]\ndf "
      "= [2, \"23.4\"]\n");
  EXPECT_EQ(problems(review), "");
  EXPECT_EQ(review.level, 0.10);
  EXPECT_EQ(review.stars, (std::vector<double>{0.05, 0.01}));
  ASSERT_EQ(review.claims.size(), 6u);
  const Claim& first = review.claims[0];
  EXPECT_EQ(first.id, "claim 1");
  EXPECT_EQ(first.restricted_fit->r2->text, "0.471");
  EXPECT_EQ(first.restricted_fit->k, 5);
  EXPECT_EQ(first.df1, 2);
  EXPECT_EQ(first.df2, 410);
  EXPECT_EQ(first.rejects, true);
  EXPECT_EQ(first.level, 0.05);
  EXPECT_EQ(first.sided, 1);
  const Claim& second = review.claims[1];
  EXPECT_EQ(second.id, "second");
  EXPECT_EQ(second.stars, 2);
  EXPECT_EQ(second.rejects, false);
  EXPECT_EQ(second.df2, kInfinity);
  EXPECT_EQ(second.samples, Samples::Same);
  EXPECT_EQ(second.level, std::nullopt);
  EXPECT_EQ(review.claims[2].df1, 3);
  EXPECT_EQ(review.claims[2].df2, std::nullopt);
  EXPECT_EQ(review.claims[2].stars, 3);
  EXPECT_EQ(review.claims[3].df2, kInfinity);
  EXPECT_EQ(review.claims[4].df1, 4);
  EXPECT_EQ(review.claims[5].df2, 23.4);
}

TEST(ReadReview, ReadsSourcesAndVariables) {
  const Review review = read(
      "observations = \"1.024\"\ndecimal = \",\"\n"
      "[[source]]\nname = \"mulch\"\nss = \"11,41\"\ndf = 4\n[[source]]\nname = \"Residual\"\nms = \"0,52\"\n"
      "[variables]\nn = 418\nnames = [\"y\", \"a\", \"b\"]\nsd = [\"1,21\", \"\", \"0,17\"]\n"
      "correlation = [[\"1\"], [\"-,31\", 1], [\"-,22\", \",40\", \"1,00\"]]\n"
      "[[claim]]\noutcome = \"y\"\nregressors = [\"a\", \"b\"]\nrestrictions = \"a = 0\"\n[[claim]]\nsource "
      "= \"mulch\"\n");
  EXPECT_EQ(problems(review), "");
  EXPECT_EQ(review.observations, 1024);
  ASSERT_EQ(review.sources.size(), 2u);
  EXPECT_TRUE(review.sources[0].ss->possible.contains(11.41));
  EXPECT_EQ(review.sources[0].df, 4);
  const Variables& v = *review.variables;
  EXPECT_EQ(v.n, 418);
  ASSERT_EQ(v.sd.size(), 3u);
  EXPECT_FALSE(v.sd[1]);
  EXPECT_TRUE(v.mean.empty());
  EXPECT_TRUE(v.correlation.lower[1][0]->possible.contains(-0.31));
  for (int i = 0; i < 3; ++i) EXPECT_EQ(v.correlation.lower[i][i]->possible, Interval::point(1));
}

TEST(ReadReview, ReadsTrianglesInTheFormsPapersPrint) {
  const char* forms[] = {
      "[[\"1\"], [\".3\", \"1\"], [\".2\", \".4\", \"1\"]]",
      "[[], [\".3\"], [\".2\", \".4\"]]",
      "[[\".3\"], [\".2\", \".4\"]]",
      "[[\"\"], [\".3\", \"\"], [\".2\", \".4\", \"\"]]",
      "[[\"1\", \".3\", \".2\"], [\".3\", \"1\", \".4\"], [\".2\", \".4\", \"1\"]]",
  };
  for (const char* form : forms) {
    SCOPED_TRACE(form);
    const Review review =
        read("[variables]\nnames = [\"y\", \"a\", \"b\"]\ncorrelation = " + std::string(form) + "\n");
    EXPECT_EQ(problems(review), "");
    ASSERT_TRUE(review.variables);
    const auto& lower = review.variables->correlation.lower;
    EXPECT_EQ(lower[1][0]->text, ".3");
    EXPECT_EQ(lower[2][0]->text, ".2");
    EXPECT_EQ(lower[2][1]->text, ".4");
    EXPECT_EQ(lower[2][2]->value, 1);
  }
}

TEST(ReadReview, LeavesOutWhatIsNotPrinted) {
  const Review review = read(
      "[[column]]\nid = \"a\"\nr2 = \"\"\nn = \"\"\nestimator = \"\"\n[[column.term]]\nname = \"x\"\ncoef = "
      "\"\"\nci = \"\"\nstars = \"\"\n");
  EXPECT_EQ(problems(review), "");
  EXPECT_FALSE(review.columns[0].r2);
  EXPECT_TRUE(review.columns[0].terms[0].named_only());
  const Review empty = read("");
  EXPECT_EQ(problems(empty), "");
  EXPECT_EQ(empty.level, 0.05);
  EXPECT_EQ(empty.rounding, Rounding::Nearest);
}

TEST(ReadReview, TakesUnquotedNumbersAsExact) {
  const Review review = read(
      "[[column]]\nid = \"a\"\nr2 = 0.482\nssr = 1_000\nn = 1_418\n[[column.term]]\nname = \"x\"\nse = "
      "\"0.000\"\nt = 2\n");
  EXPECT_EQ(problems(review), "");
  const Column& c = review.columns[0];
  EXPECT_TRUE(c.r2->exact);
  EXPECT_LE(c.r2->possible.width(), 1e-15);
  EXPECT_EQ(c.ssr->possible, Interval::point(1000));
  EXPECT_EQ(c.n, 1418);
  EXPECT_TRUE(c.terms[0].t->exact);
  EXPECT_EQ(c.terms[0].se->possible.low, 0);
  EXPECT_TRUE(c.terms[0].se->possible.contains(0.0005));
}

TEST(ReadReview, ListsWhatCannotBeReadAndReadsTheRest) {
  const struct {
    const char* text;
    const char* message;
  } rows[] = {
      {"rejoinder = 2\n",
       "line 1, rejoinder: this review was written for version 2 of the format; version 1 is read here; what "
       "is new in it is kept in the "
       "file but not used\n"},
      {"level = 5\n",
       "line 1, level: 5 does not lie between 0 and 1; write 5 percent as 0.05, 95 percent as 0.95\n"},
      {"stars = [\"0.01\", \"0.05\"]\n",
       "line 1, stars: more stars stand for smaller levels; write the level of one star first: [\"0.10\", "
       "\"0.05\", \"0.01\"]\n"},
      {"decimal = \"point\"\n",
       "line 1, decimal: \"point\" is none of the words known here; write \".\" or \",\"\n"},
      {"[column]\nid = \"a\"\n",
       "line 1, column: a table stands where several tables may follow; write the header in two brackets, "
       "[[...]], once for each\n"},
      {"[[column]]\nn = 3\n",
       "line 1, column 1 / id: this column has no id, so that a claim can only call it \"column 1\"; add id "
       "= \"...\", a short name\n"},
      {"[[column]]\nid = \"a\"\n[[column]]\nid = \"a\"\n",
       "line 3, column \"a\" / id: this id is taken by another column; here it is read as \"a (2)\"; give "
       "each column its own id\n"},
      {"[[column]]\nid = \"a\"\nestimator = \"logit\"\n",
       "line 3, column \"a\" / estimator: \"logit\" is none of the words known here; write \"ols\", "
       "\"iv\", \"ml\" or \"other\"\n"},
      {"[[column]]\nid = \"a\"\nn = [3]\n",
       "line 3, column \"a\" / n: a list stands where one count is expected; write one whole number\n"},
      {"[[column]]\nid = \"a\"\nn = { from = 4, to = 30 }\n",
       "line 3, column \"a\" / n: a count between two limits is kept in the file and not used by this "
       "version; write the count where it "
       "is printed\n"},
      {"[[column]]\nid = \"a\"\nweights = \"no\"\n",
       "line 3, column \"a\" / weights: this is answered by true or false; write weights = true, without "
       "quotes\n"},
      {"[[column]]\nid = \"a\"\nr2 = [\"0.4\"]\n",
       "line 3, column \"a\" / r2: a list stands where one printed number is expected; write it as printed, "
       "in quotes: \"0.131\"\n"},
      {"[[column]]\nid = \"a\"\nssr = inf\n",
       "line 3, column \"a\" / ssr: an infinite figure cannot be computed with; leave it out where nothing "
       "is printed\n"},
      {"[[column]]\nid = \"a\"\n[[column.term]]\nname = \"fare\"\nse = 0\n",
       "line 5, column \"a\" / term \"fare\" / se: a standard error of exactly zero leaves no t ratio; write "
       "it in quotes as printed, "
       "\"0.000\", so that its rounding counts\n"},
      {"[[column]]\nid = \"a\"\n[[column.term]]\ncoef = \"1\"\n",
       "line 3, column \"a\" / term 1 / name: this term has no name, so that no restriction can name it; add "
       "name = \"...\"\n"},
      {"[[column]]\nid = \"a\"\n[[column.term]]\nname = \"x\"\n[[column.term]]\nname = \"x\"\n",
       "line 6, column \"a\" / term \"x\" / name: a term of this name stands in the column already; this one "
       "is left out; give each term "
       "its own name, such as \"x (2)\"\n"},
      {"[[column]]\nid = \"a\"\n[[column.term]]\nname = \"x\"\nci = [\"2\", \"1\"]\n",
       "line 5, column \"a\" / term \"x\" / ci: the first limit is above the second; write the lower limit "
       "first\n"},
      {"[[column]]\nid = \"a\"\n[[column.term]]\nname = \"x\"\nci = \"1 to 2\"\n",
       "line 5, column \"a\" / term \"x\" / ci: two limits are expected here, low and high; write them in "
       "brackets: [\"-0.23\", "
       "\"-0.03\"]\n"},
      {"[[column]]\nid = \"a\"\n[[column.term]]\nname = \"x\"\nci_level = 95\n",
       "line 5, column \"a\" / term \"x\" / ci_level: 95 does not lie between 0 and 1; write 5 percent as "
       "0.05, 95 percent as 0.95\n"},
      {"[[column]]\nid = \"a\"\n[[column.term]]\nname = \"x\"\nstars = \"ns\"\n",
       "line 5, column \"a\" / term \"x\" / stars: this is no number of stars; write stars = 2 or stars = "
       "\"**\"; 0 says that none was "
       "printed\n"},
      {"[[column]]\nid = \"a\"\n[column.covariance]\nterms = [\"x\"]\nlower = [[\"1\"], [\"2\"]]\n",
       "line 5, column \"a\" / covariance / lower: 2 rows for 1 names; give one row of the lower triangle "
       "for each name under terms\n"},
      {"[[column]]\nid = \"a\"\n[[column.term]]\nname = \"x\"\n[[column.term]]\nname = "
       "\"y\"\n[column.covariance]\nterms = [\"x\", \"y\"]\nlower = [[\"1\"], [\"2\"]]\n",
       "line 9, column \"a\" / covariance / lower: row 2 does not have 2 cells; row i of a lower triangle "
       "has i cells; write \"\" for one "
       "that is not printed\n"},
      {"[[column]]\nid = \"a\"\n[column.covariance]\nterms = [\"x\"]\nlower = [[\"1\"]]\n",
       "line 4, column \"a\" / covariance / terms: \"x\" is no term of this column; use the name that the "
       "term has under "
       "[[column.term]]\n"},
      {"[[column]]\nid = \"a\"\n[[column.fact]]\nof = \"fare = 0\"\nse = \"1\"\n",
       "line 4, column \"a\" / fact 1 / of: character 6: a combination of terms has no sign of equality; "
       "write the terms alone: fare - "
       "fuel\n"},
      {"[[column]]\nid = \"a\"\n[[column.fact]]\nse = \"1\"\n",
       "line 3, column \"a\" / fact 1: this fact names neither a combination nor restrictions; write of = "
       "\"fare - fuel\" for a "
       "combination, or restrictions = \"fare = 0, fuel = 0\" for a joint test\n"},
      {"[variables]\nnames = [\"a\", \"b\"]\ncorrelation = [[\".85\"], [\".3\", \"1\"]]\n",
       "line 3, variables / correlation: the diagonal cell of a is not 1 and is read as 1; write 1 on the "
       "diagonal of correlations\n"},
      {"[[claim]]\nid = \"prices\"\nrestrictions = \"fuel price = 0\"\n",
       "line 3, claim \"prices\" / restrictions: character 1: several words stand side by side: fuel price; "
       "names with blanks stand in "
       "double quotes: \"fuel price\"\n"},
      {"[[claim]]\nid = \"c\"\ncolumn = \"full\"\n",
       "line 1, claim \"c\" / column: \"full\" is no column of this review; use the id of a [[column]]\n"},
      {"[[claim]]\nid = \"c\"\nsource = \"mulch\"\n",
       "line 1, claim \"c\" / source: \"mulch\" is no line of the analysis-of-variance table; use the name "
       "of a [[source]]\n"},
      {"[[claim]]\nid = \"c\"\nsided = 3\n",
       "line 3, claim \"c\" / sided: a test has one side or two; write sided = 1 or sided = 2\n"},
      {"[[claim]]\nid = \"c\"\ndf = [1, 2, 3]\n",
       "line 3, claim \"c\" / df: one or two degrees of freedom are expected here; write df = [2, 410], or "
       "[2] where only one is "
       "stated\n"},
      {"[[claim]]\nid = \"c\"\ndf = [2, 0]\n",
       "line 3, claim \"c\" / df: the second degrees of freedom are not above zero; write those of the "
       "denominator, or \"inf\"\n"},
      {"[[claim]]\nid = \"c\"\nrestrictons = \"a = 0\"\n",
       "line 3, claim \"c\" / restrictons: this key is kept in the file but has no meaning here; perhaps "
       "restrictions is meant\n"},
      {"[[claim]]\nid = \"c\"\nrestrictions = [\"a = 0\"]\n",
       "line 3, claim \"c\" / restrictions: a list stands where one text is expected; write one text in "
       "quotes\n"},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    EXPECT_EQ(problems(read(row.text)), row.message);
  }
}

// The words for what lies outside a figure's own range come from the reader of numbers; here the place
// counts.
TEST(ReadReview, HoldsFiguresToTheirNaturalRange) {
  const char* lines[] = {"r2 = \"1.2\"",
                         "adj_r2 = 1.5",
                         "ssr = \"-3\"",
                         "residual_sd = \"-0.1\"",
                         "overall_f = \"-2\"",
                         "overall_p = \"1.4\"",
                         "correlation_within = [\"-2\", \"1\"]",
                         "n = \"-4\"",
                         "k = 2.5"};
  for (const char* line : lines) {
    SCOPED_TRACE(line);
    const Review review = read("[[column]]\nid = \"a\"\nlabel = \"kept\"\n" + std::string(line) + "\n");
    ASSERT_EQ(review.problems.size(), 1u);
    EXPECT_EQ(review.problems[0].line, 4);
    EXPECT_FALSE(review.problems[0].what.empty());
    EXPECT_FALSE(review.problems[0].mend.empty());
    EXPECT_EQ(review.columns[0].label, "kept");
  }
  const Review fits = read("[[column]]\nid = \"a\"\nadj_r2 = \"-0.03\"\nr2 = \"1.000\"\nloglik = \"12.5\"\n");
  EXPECT_EQ(problems(fits), "");
}

TEST(ReadReview, NamesTheClaimThatAProblemConcerns) {
  const Review review = read(
      "[[column]]\nid = \"a\"\nr2 = \"x\"\n[[claim]]\nid = \"prices\"\ncolumn = \"b\"\nf = "
      "\"y\"\nrestricted_fit = { r2 = \"z\" }\n");
  ASSERT_EQ(review.problems.size(), 4u);
  EXPECT_EQ(review.problems[0].claim, "");
  for (int i = 1; i < 4; ++i) EXPECT_EQ(review.problems[i].claim, "prices");
  EXPECT_EQ(review.problems[3].key, "claim \"prices\" / restricted_fit / r2");
}

TEST(ReadReview, IgnoresKeysOfLaterVersionsAndOfOthers) {
  const Review review = read(
      "colour = \"blue\"\n[house]\nx = 1\n[[extract]]\nid = \"e\"\n[[column]]\nid = \"a\"\naic = "
      "\"3\"\nowner = \"me\"\n[[column.term]]\nname = \"x\"\nvif = \"1.2\"\ncell = [\"e\", 1, 2, 3]\n");
  EXPECT_EQ(problems(review), "");
}

}  // namespace
}  // namespace rejoinder
