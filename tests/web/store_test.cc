#include <gtest/gtest.h>

#include "web/model/document_view.h"
#include "web/model/update.h"
#include "web/model/worked_case.h"

namespace rejoinder {
namespace {

TEST(Store, OpensTheWorkedCaseWhereNothingIsKept) {
  const AppState state = first_state("");
  const Result<Node> worked = read_document(worked_case());
  ASSERT_TRUE(worked.ok());
  EXPECT_EQ(state.document, worked.value());
  EXPECT_GE(state.checked.findings.size(), 8u);
  EXPECT_TRUE(state.checked.problems.empty());
  EXPECT_TRUE(state.set_aside.empty());
}

TEST(Store, BringsBackTheReviewAndTheView) {
  AppState state = first_state("");
  update(state, EditReview{"title", "Quotes \" and \\ and \xE2\x88\x92 and\ttabs"});
  update(state, ChooseClaim{2});
  update(state, SetTheme{Theme::Dark});
  update(state, SetTextScale{1.3});
  update(state, SetShares{0.3f, 0.4f});
  update(state, ShowPane{Pane::Allows});
  update(state, ToggleDrawer{Drawer::Audit});
  update(state, ShowOverlay{Overlay::PasteBox});
  update(state, EditBox{"half a table"});
  const AppState again = first_state(stored_text(state));
  EXPECT_EQ(again.document, state.document);
  EXPECT_EQ(again.claim, 2);
  EXPECT_EQ(again.theme, Theme::Dark);
  EXPECT_DOUBLE_EQ(again.text_scale, 1.3);
  EXPECT_NEAR(again.left_share, 0.3, 1e-4);
  EXPECT_NEAR(again.right_share, 0.4, 1e-4);
  EXPECT_EQ(again.pane, Pane::Allows);
  EXPECT_EQ(again.open_drawers, state.open_drawers);
  EXPECT_EQ(again.drafts.at(Overlay::PasteBox), "half a table");
  EXPECT_TRUE(again.set_aside.empty());
  EXPECT_EQ(stored_text(first_state(stored_text(again))), stored_text(again));
}

TEST(Store, SetsAsideWhatCannotBeRead) {
  for (const std::string& text :
       {std::string("{\"state\": 1}"), std::string("rejoinder_page = 1\nreview = \"cut of"),
        std::string("\xFF\xFE rubbish"), std::string("a = 1\n")}) {
    SCOPED_TRACE(text);
    const AppState state = first_state(text);
    EXPECT_EQ(state.set_aside, text);
    EXPECT_FALSE(state.notice.empty());
    EXPECT_GE(state.checked.findings.size(), 8u);  // the worked case stands in
  }
}

TEST(Store, LaysOpenAKeptReviewThatCannotBeRead) {
  const std::string text =
      "rejoinder_page = 1\ntheme = \"dark\"\nreview = \"rejoinder = 1\\ntitle = oops\\n\"\n";
  const AppState state = first_state(text);
  EXPECT_EQ(state.set_aside, text);
  EXPECT_EQ(state.overlay, Overlay::ReviewText);
  EXPECT_EQ(state.box_text, "rejoinder = 1\ntitle = oops\n");
  EXPECT_FALSE(state.box_note.empty());
  EXPECT_EQ(state.theme, Theme::Dark);
}

TEST(Store, ToleratesChoicesItDoesNotKnow) {
  const AppState state = first_state(
      "rejoinder_page = 1\ntheme = \"sepia\"\ntext_scale = \"huge\"\nleft_share = nan\nclaim = \"x\"\nopen = "
      "[\"working\", \"magic\", 3]\n"
      "review = \"rejoinder = 1\\ntitle = \\\"kept\\\"\\n\"\n");
  EXPECT_EQ(review_text(state.document, "title"), "kept");
  EXPECT_EQ(state.theme, Theme::Light);
  EXPECT_EQ(state.text_scale, 1.0);
  EXPECT_EQ(state.open_drawers, (std::set<Drawer>{Drawer::Working}));
  EXPECT_TRUE(state.set_aside.empty());
}

TEST(Store, SetsACopyAsideOfWhatALaterVersionKept) {
  const std::string text =
      "rejoinder_page = 2\nreview = \"rejoinder = 1\\ntitle = \\\"later\\\"\\n\"\nnew_thing = 1\n";
  const AppState state = first_state(text);
  EXPECT_EQ(review_text(state.document, "title"), "later");
  EXPECT_EQ(state.set_aside, text);
}

TEST(Store, TakesAReviewKeptByItself) {
  const AppState state = first_state("rejoinder = 1\ntitle = \"plain\"\n");
  EXPECT_EQ(review_text(state.document, "title"), "plain");
  EXPECT_TRUE(state.set_aside.empty());
}

}  // namespace
}  // namespace rejoinder
