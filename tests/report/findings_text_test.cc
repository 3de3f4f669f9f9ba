#include "core/report/findings_text.h"

#include <gtest/gtest.h>

#include "core/report/findings_json.h"
#include "core/report/json_writer.h"
#include "tests/support/json.h"

namespace rejoinder::testing {
namespace {

CheckedReview checked(const std::string& text) {
  const Result<Node> document = read_document(text);
  EXPECT_TRUE(document.ok());
  return check_review(read_review(document.value()));
}

constexpr const char* kFourStates =
    "rejoinder = 1\ntitle = \"Four\"\n"
    "[[column]]\nid = \"a\"\nerrors = \"classical\"\nn = 200\nk = 2\n"
    "[[column.term]]\nname = \"u\"\ncoef = \"0.50\"\nse = \"0.10\"\n[[column.term]]\nname = \"v\"\ncoef = \"0.30\"\nse = \"0.10\"\n"
    "[[claim]]\nid = \"one\"\ncolumn = \"a\"\nrestrictions = \"u = 0, v = 0\"\nrejects = true\n"
    "[[claim]]\nid = \"two\"\ncolumn = \"a\"\nrestrictions = \"u = 0, v = 0\"\nf = \"3.00\"\n"
    "[[claim]]\nid = \"three\"\ncolumn = \"a\"\nrestrictions = \"u = v\"\n"
    "[[claim]]\nid = \"four\"\ncolumn = \"b\"\nrestrictions = \"u = v\"\n";

TEST(FindingsText, CountsEveryStateAtTheTop) {
  const CheckedReview review = checked(kFourStates);
  EXPECT_EQ(totals_text(review), "4 claims looked at: 1 agrees, 1 does not match, 1 open, 1 without a test");
  const std::string text = findings_text(review);
  for (const char* words : {"= one: Agrees with the print", "≠ two: Does not match the print", "? three: The print cannot say",
                            "– four: No such test from this print"})
    EXPECT_NE(text.find(words), std::string::npos) << words << "\n" << text;
}

TEST(FindingsText, AsksForAFigureWheneverAClaimIsOpenOrHasNoTest) {
  for (const Finding& finding : checked(kFourStates).findings)
    if (finding.state == State::Undecided || finding.state == State::NotComputable) {
      EXPECT_FALSE(finding.ask.empty()) << finding.claim;
    }
}

// Common practice in this house: the product's own voice never accuses.
TEST(FindingsText, NeverAccuses) {
  std::string text = findings_text(checked(kFourStates), {true, 92});
  for (std::size_t at = 0; (at = text.find("standard error", at)) != std::string::npos;) text.erase(at, 14);
  for (const char* word : {"error", "wrong", "failed", "incorrect", "mistake", "fraud", "suspicious", "impossible", "violat"})
    EXPECT_EQ(text.find(word), std::string::npos) << word << " in\n" << text;
}

TEST(FindingsText, WordsEveryConflictAsAQuestionWithItsAssumptions) {
  for (const Finding& finding : checked(kFourStates).findings)
    if (finding.state == State::Conflicts) {
      EXPECT_EQ(finding.paragraph.back(), '?') << finding.paragraph;
      EXPECT_NE(finding.paragraph.find("Could the authors"), std::string::npos);
    }
}

TEST(FindingsText, WrapsAtTheWidthAsked) {
  TextChoices narrow;
  narrow.width = 60;
  const std::string text = findings_text(checked(kFourStates), narrow);
  std::size_t columns = 0;
  for (const char c : text) {
    if (c == '\n') columns = 0;
    else if ((static_cast<unsigned char>(c) & 0xC0) != 0x80) ++columns;
    EXPECT_LE(columns, 60u);
  }
}

TEST(FindingsJson, KeepsTheContract) {
  const Json json = read_json(findings_json(checked(kFourStates)));
  ASSERT_EQ(json.at("findings").items.size(), 4u);
  const Json& open = json.at("findings").items[0];
  EXPECT_EQ(open.at("f").items[1].text, "inf") << "infinity is a string";
  EXPECT_EQ(open.at("bounds").items.size(), 2u);
  const Json& none = json.at("findings").items[3];
  EXPECT_EQ(none.at("f").kind, Json::Kind::Null);
  EXPECT_EQ(none.at("state").text, "not computable");
}

TEST(JsonWriter, EscapesWhatItMustAndRepairsBrokenText) {
  JsonWriter json;
  json.begin_object();
  json.key("a");
  json.text("quote \" slash \\ tab \t newline \n bell \a é \xFF end");
  json.end_object();
  EXPECT_EQ(json.str(), "{\n  \"a\": \"quote \\\" slash \\\\ tab \\t newline \\n bell \\u0007 é \xEF\xBF\xBD end\"\n}");
}

TEST(JsonWriter, PrintsTheShortestNumberThatReadsBack) {
  for (const double x : {0.1, 1.0 / 3, 1e-300, 123456789.125, 3.0177})
    EXPECT_EQ(std::strtod(([&] { JsonWriter json; json.number(x); return json.str(); })().c_str(), nullptr), x);
  JsonWriter json;
  json.number(0.1);
  EXPECT_EQ(json.str(), "0.1");
}

}  // namespace
}  // namespace rejoinder::testing
