#include "web/model/companion.h"

#include <gtest/gtest.h>

#include "web/model/document_view.h"
#include "web/model/findings_html.h"
#include "web/model/update.h"

namespace rejoinder {
namespace {

// Checked: every element that is opened is closed, in order.
void expect_well_formed(const std::string& html) {
  std::vector<std::string> open;
  for (std::size_t at = html.find('<'); at != std::string::npos; at = html.find('<', at + 1)) {
    const std::size_t end = html.find('>', at);
    ASSERT_NE(end, std::string::npos);
    std::string tag = html.substr(at + 1, end - at - 1);
    if (tag.starts_with("!") || tag.starts_with("meta") || tag.ends_with("/")) continue;
    if (tag.starts_with("/")) {
      ASSERT_FALSE(open.empty()) << tag;
      EXPECT_EQ(open.back(), tag.substr(1));
      open.pop_back();
    } else {
      open.push_back(tag.substr(0, tag.find(' ')));
    }
  }
  EXPECT_TRUE(open.empty()) << (open.empty() ? "" : open.back());
}

TEST(Companion, HoldsTheWholeReview) {
  const AppState state = first_state("");
  const std::string html = companion_html(state);
  expect_well_formed(html);
  for (const Finding& finding : state.checked.findings) {
    EXPECT_NE(html.find(escaped(finding.says)), std::string::npos) << finding.claim;
    EXPECT_NE(html.find(escaped(finding.headline)), std::string::npos) << finding.claim;
    EXPECT_NE(html.find(escaped(finding.paragraph)), std::string::npos) << finding.claim;
  }
  for (const char* state_shown : {"= Agrees with the print", "\xE2\x89\xA0 Does not match the print",
                                  "? The print cannot say", "\xE2\x80\x93 No such test from this print"})
    EXPECT_NE(html.find(state_shown), std::string::npos) << state_shown;
  for (const std::string& name : all_term_names(state.document))
    EXPECT_NE(html.find("<th scope=\"row\">" + escaped(name)), std::string::npos);
  EXPECT_NE(html.find("<th scope=\"col\">(2)</th>"), std::string::npos);
  EXPECT_NE(html.find("s.e. 0.401"), std::string::npos);
  EXPECT_NE(html.find("Covariances of the estimates"), std::string::npos);
}

TEST(Companion, KeepsHeadingsInOrderAndCellsInStep) {
  const std::string html = companion_html(first_state(""));
  int last = 0;
  for (std::size_t at = html.find("<h"); at != std::string::npos; at = html.find("<h", at + 1)) {
    const int level = html[at + 2] - '0';
    if (level < 1 || level > 6) continue;
    EXPECT_LE(level, last + 1) << html.substr(at, 60);
    last = level;
  }
  EXPECT_EQ(html.find("style="), std::string::npos);
  EXPECT_EQ(html.find("<script"), std::string::npos);
  EXPECT_EQ(html.find("href"), std::string::npos);
}

TEST(Companion, EscapesWhatTheUserTyped) {
  AppState state = first_state("");
  update(state, EditReview{"title", "<script>alert(\"x\")</script> & 'more'"});
  update(state, EditClaim{0, "says", "</p><img src=x onerror=alert(1)>"});
  update(state, EditColumn{0, "label", "\"><b>"});
  update(state, EditCell{{0, 0, "coef"}, "<i>0.5</i>"});
  for (const std::string& html : {companion_html(state), report_page(state)}) {
    expect_well_formed(html);
    EXPECT_EQ(html.find("<script>alert"), std::string::npos);
    EXPECT_EQ(html.find("<img"), std::string::npos);
    EXPECT_EQ(html.find("<b>"), std::string::npos);
    EXPECT_EQ(html.find("<i>"), std::string::npos);
    EXPECT_NE(html.find("&lt;script&gt;"), std::string::npos);
  }
}

TEST(Companion, SaysWhatIsMissingInAnEmptyReview) {
  AppState state = first_state("");
  update(state, NewReview{});
  update(state, RemoveColumn{0});
  const std::string html = companion_html(state);
  expect_well_formed(html);
  EXPECT_NE(html.find("No table yet"), std::string::npos);
  EXPECT_NE(html.find("No claim yet"), std::string::npos);
}

TEST(Companion, ListsWhatCouldNotBeRead) {
  AppState state = first_state("");
  update(state, EditCell{{1, 0, "se"}, "0.4O1"});
  EXPECT_NE(companion_html(state).find("What could not be read"), std::string::npos);
}

TEST(Companion, IsTheSameForTheSameState) {
  EXPECT_EQ(companion_html(first_state("")), companion_html(first_state("")));
}

TEST(ReportPage, StandsAlone) {
  const AppState state = first_state("");
  const std::string html = report_page(state);
  expect_well_formed(html);
  EXPECT_TRUE(html.starts_with("<!DOCTYPE html>"));
  for (const char* needs : {"http://", "https://", "<link", "<script", "@import", "url("}) {
    std::string without = html;
    for (std::size_t at = without.find("http://www.w3.org/2000/svg"); at != std::string::npos;
         at = without.find("http://www.w3.org/2000/svg"))
      without.erase(at, 26);
    EXPECT_EQ(without.find(needs), std::string::npos) << needs;
  }
  // The file is in the report: whoever has it can check everything again.
  EXPECT_NE(html.find(escaped(write_document(state.document))), std::string::npos);
}

TEST(Span, DrawsLimitsCriticalValueAndReportedFigure) {
  const AppState state = first_state("");
  AppState five = first_state("");
  update(five, FiveFigures{"1.90", "0.80", "0.70", "0.90", "64", false});
  const Finding* conflict = nullptr;
  const Finding* none = nullptr;
  for (const Finding& finding : state.checked.findings) {
    if (finding.claim == "remoteness") conflict = &finding;
    if (finding.claim == "winter") none = &finding;
  }
  ASSERT_TRUE(conflict && none);
  expect_well_formed(span_svg(five.checked.findings[0]));
  EXPECT_NE(span_svg(five.checked.findings[0]).find("no upper limit"), std::string::npos);
  EXPECT_NE(span_svg(*conflict).find("reported"), std::string::npos);
  EXPECT_NE(span_svg(*conflict).find("5 % point"), std::string::npos);
  EXPECT_EQ(span_svg(*none), "");
}

}  // namespace
}  // namespace rejoinder
