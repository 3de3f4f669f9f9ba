// Published F, Wald, t and LR figures, each recomputed from the figures printed beside it.
//
// Source: the "source" field of each case in tests/reference/published_visible.json (traced with the check). A printed value is
// read as a printed number and must share a value with the limits; where the reference says that the printed value does not
// follow from the inputs, the value recomputed there (17 digits) must lie inside.
#include <gtest/gtest.h>

#include <cmath>
#include <cstdlib>
#include <string>

#include "core/judge/finding.h"
#include "core/number/printed_number.h"
#include "core/review/review.h"
#include "tests/support/reference.h"

namespace rejoinder::testing {
namespace {

const CoversKinds covered("published_visible.json", {"F_from_ssr", "F_from_r2", "F_from_data", "overall_F_certified", "anova_F_certified",
                                                     "LR_from_ll", "wald_from_cov", "wald_single_restriction", "t_linear_combination"});

Finding finding_of(const std::string& text) {
  const Result<Node> document = read_document("rejoinder = 1\n" + text);
  EXPECT_TRUE(document.ok()) << text;
  const Review review = read_review(document.value());
  EXPECT_TRUE(review.problems.empty()) << review.problems.front().text() << "\n" << text;
  const CheckedReview checked = check_review(review);
  EXPECT_EQ(checked.findings.size(), 1u);
  EXPECT_TRUE(checked.findings.front().f) << checked.findings.front().sentence;
  return checked.findings.front();
}

std::string line(const std::string& key, const std::string& value) { return key + " = \"" + value + "\"\n"; }

// "full" and "short" with n, k and one fit figure each.
std::string two_columns(const ReferenceCase& c, const char* key, const std::string& full, const std::string& restricted) {
  const int q = static_cast<int>(c.input("q")), df = static_cast<int>(c.input("df2"));
  const int n = c.inputs.has("n") ? static_cast<int>(c.input("n")) : df + q + 2;
  const int k = n - 1 - df;
  std::string text;
  for (const auto& [id, slopes, figure] : {std::tuple{"full", k, full}, {"short", k - q, restricted}})
    text += "[[column]]\n" + line("id", id) + "errors = \"classical\"\nn = " + std::to_string(n) + "\nk = " + std::to_string(slopes) + "\n" +
            line(key, figure);
  return text + "[[claim]]\nid = \"c\"\ncolumn = \"full\"\nrestricted = \"short\"\n";
}

void expect_printed(const ReferenceCase& c, const char* name, const Interval& limits) {
  if (!c.expected.has(name)) return;
  if (c.disagrees) {
    const double value = c.recomputed_value(name);
    EXPECT_LE(limits.low, value * (1 + 1e-12)) << name;
    EXPECT_GE(limits.high, value * (1 - 1e-12)) << name;
    return;
  }
  const Result<PrintedNumber> printed = read_printed_number(c.expected.at(name).text);
  ASSERT_TRUE(printed.ok());
  EXPECT_TRUE(printed.value().possible.overlaps(limits)) << name << " printed " << c.expected.at(name).text << ", limits " << limits.low << " to "
                                                         << limits.high;
}

TEST(PublishedTests, FollowFromSumsOfSquares) {
  for (const ReferenceCase& c : reference_cases("published_visible.json", "F_from_ssr")) {
    SCOPED_TRACE(c.trace());
    const Finding finding = finding_of(two_columns(c, "ssr", c.inputs.at("ssr_full").text, c.inputs.at("ssr_restricted").text));
    expect_printed(c, "F", *finding.f);
    if (!c.disagrees) expect_printed(c, "W", *finding.wald);
  }
}

TEST(PublishedTests, FollowFromRSquared) {
  for (const ReferenceCase& c : reference_cases("published_visible.json", "F_from_r2")) {
    SCOPED_TRACE(c.trace());
    const std::string& restricted = c.inputs.at("r2_restricted").text;
    const Finding finding = restricted == "0"
                                ? finding_of("[[column]]\nid = \"full\"\nerrors = \"classical\"\nn = " + c.inputs.at("n").text +
                                             "\nk = " + c.inputs.at("q").text + "\n" + line("r2", c.inputs.at("r2_full").text) +
                                             "[[claim]]\nid = \"c\"\ncolumn = \"full\"\nrestrictions = \"all\"\n")
                                : finding_of(two_columns(c, "r2", c.inputs.at("r2_full").text, restricted));
    expect_printed(c, "F", *finding.f);
    // The printed p may come from the unrounded F: it lies within the limits all the same.
    const Result<PrintedNumber> p = read_printed_number(c.expected.has("p") ? c.expected.at("p").text : "0.5");
    if (c.expected.has("p")) {
      EXPECT_TRUE(p.value().possible.overlaps(*finding.p));
    }
  }
}

TEST(PublishedTests, FollowFromFitsOfOpenData) {
  for (const ReferenceCase& c : reference_cases("published_visible.json", "F_from_data")) {
    SCOPED_TRACE(c.trace());
    const Json& from = c.inputs.has("ssr_full") ? c.inputs : c.expected;
    if (!from.has("ssr_full")) continue;  // robust errors: no sums of squares give that F
    const Finding finding = finding_of(two_columns(c, "ssr", from.at("ssr_full").text, from.at("ssr_restricted").text));
    const Result<PrintedNumber> printed = read_printed_number(c.expected.at("F").text);
    EXPECT_TRUE(printed.value().possible.overlaps(*finding.f)) << finding.f->low << " to " << finding.f->high;
  }
}

// All slopes zero, from exact sums of squares. F loses digits by the condition of the difference of the two sums, total over
// explained, so the tolerance is some units in the last place times that.
void expect_certified(const ReferenceCase& c, const std::string& n, int k, const std::string& residual, double total, bool intercept) {
  char exact_total[40];
  std::snprintf(exact_total, sizeof exact_total, "%.17g", total);
  const Finding finding = finding_of("[[column]]\nid = \"a\"\nerrors = \"classical\"\nn = " + n + "\nk = " + std::to_string(k) +
                                     "\nintercept = " + (intercept ? "true" : "false") + "\nssr = " + residual + "\ntss = " + exact_total +
                                     "\n[[claim]]\nid = \"c\"\ncolumn = \"a\"\nrestrictions = \"all\"\n");
  const double certified = c.expected_value("F");
  const double condition = total / (total - std::strtod(residual.c_str(), nullptr));
  EXPECT_NEAR(finding.f->low / certified, 1, 1e-14 + 1e-15 * condition);
  EXPECT_NEAR(finding.f->high / certified, 1, 1e-14 + 1e-15 * condition);
}

// TOML wants a digit before and after the point and no "E+03" oddities; the certified files use both.
std::string toml_number(const std::string& text) { return text.find('.') == 0 ? "0" + text : text; }

TEST(PublishedTests, ReproduceCertifiedRegressions) {
  for (const ReferenceCase& c : reference_cases("published_visible.json", "overall_F_certified")) {
    SCOPED_TRACE(c.trace());
    const bool intercept = c.inputs.at("intercept").kind == Json::Kind::True;
    const int k = static_cast<int>(c.input("coefficients")) - (intercept ? 1 : 0);
    if (c.input("ss_residual") == 0) continue;  // a perfect fit: F is infinite by definition
    expect_certified(c, c.inputs.at("n").text, k, toml_number(c.inputs.at("ss_residual").text), c.input("ss_regression") + c.input("ss_residual"),
                     intercept);
  }
}

TEST(PublishedTests, ReproduceCertifiedAnalysesOfVariance) {
  for (const ReferenceCase& c : reference_cases("published_visible.json", "anova_F_certified")) {
    SCOPED_TRACE(c.trace());
    expect_certified(c, c.inputs.at("n").text, static_cast<int>(c.input("df_between")), toml_number(c.inputs.at("ss_within").text),
                     c.input("ss_between") + c.input("ss_within"), true);
  }
}

TEST(PublishedTests, FollowFromLogLikelihoods) {
  for (const ReferenceCase& c : reference_cases("published_visible.json", "LR_from_ll")) {
    SCOPED_TRACE(c.trace());
    const int q = static_cast<int>(c.input("q"));
    std::string text;
    for (const auto& [id, k, figure] : {std::tuple{"full", q, c.inputs.at("ll_full").text}, {"short", 0, c.inputs.at("ll_restricted").text}})
      text += "[[column]]\n" + line("id", id) + "estimator = \"ml\"\nn = " + c.inputs.at("n").text + "\nk = " + std::to_string(k) + "\n" +
              line("loglik", figure);
    const Finding finding = finding_of(text + "[[claim]]\nid = \"c\"\ncolumn = \"full\"\nrestricted = \"short\"\n");
    EXPECT_EQ(finding.statistic, Statistic::ChiSquare);
    expect_printed(c, "LR", *finding.wald);
  }
}

// A column with coefficients and covariance from the case, and one restriction.
Finding covariance_finding(const ReferenceCase& c, const Json& b, const std::string& restriction) {
  std::string text = "[[column]]\nid = \"a\"\nerrors = \"classical\"\ndf = " + c.inputs.at("df2").text + "\n";
  std::string names, lower;
  const Json& cov = c.inputs.at("cov");
  for (std::size_t i = 0; i < b.items.size(); ++i) {
    const std::string name = "x" + std::to_string(i + 1);
    text += "[[column.term]]\n" + line("name", name) + line("coef", b.items[i].text);
    names += (i ? ", \"" : "\"") + name + "\"";
    lower += i ? ", [" : "[";
    for (std::size_t j = 0; j <= i; ++j) lower += (j ? ", \"" : "\"") + cov.items[i].items[j].text + "\"";
    lower += "]";
  }
  return finding_of(text + "[column.covariance]\nterms = [" + names + "]\nlower = [" + lower + "]\n[[claim]]\nid = \"c\"\ncolumn = \"a\"\n" +
                    line("restrictions", restriction));
}

TEST(PublishedTests, FollowFromPrintedCovariances) {
  for (const ReferenceCase& c : reference_cases("published_visible.json", "wald_from_cov")) {
    SCOPED_TRACE(c.trace());
    ASSERT_EQ(c.inputs.at("R").items.size(), 1u);
    std::string restriction;
    const auto& row = c.inputs.at("R").items[0].items;
    for (std::size_t i = 0; i < row.size(); ++i) restriction += (i ? " + " : "") + row[i].text + "*x" + std::to_string(i + 1);
    const Finding finding = covariance_finding(c, c.inputs.at("coef"), restriction + " = " + c.inputs.at("r").items[0].text);
    expect_printed(c, "F", *finding.f);
  }
  for (const ReferenceCase& c : reference_cases("published_visible.json", "t_linear_combination")) {
    SCOPED_TRACE(c.trace());
    std::string restriction;
    const auto& row = c.inputs.at("weights").items;
    for (std::size_t i = 0; i < row.size(); ++i) restriction += (i ? " + " : "") + row[i].text + "*x" + std::to_string(i + 1);
    const Finding finding = covariance_finding(c, c.inputs.at("b"), restriction + " = " + c.inputs.at("value").text);
    const Interval t2 = square(read_printed_number(c.expected.at("t").text).value().possible);
    EXPECT_TRUE(t2.overlaps(*finding.f));
  }
}

TEST(PublishedTests, FollowFromOneCoefficient) {
  for (const ReferenceCase& c : reference_cases("published_visible.json", "wald_single_restriction")) {
    SCOPED_TRACE(c.trace());
    const Finding finding = finding_of("[[column]]\nid = \"a\"\nerrors = \"classical\"\ndf = " + c.inputs.at("df2").text + "\n[[column.term]]\n" +
                                       line("name", "x") + line("coef", c.inputs.at("estimate").text) + line("se", c.inputs.at("se").text) +
                                       "[[claim]]\nid = \"c\"\ncolumn = \"a\"\n" + line("restrictions", "x = " + c.inputs.at("hypothesis").text));
    const Interval t2 = square(read_printed_number(c.expected.at("t").text).value().possible);
    EXPECT_TRUE(t2.overlaps(*finding.f));
  }
}

}  // namespace
}  // namespace rejoinder::testing
