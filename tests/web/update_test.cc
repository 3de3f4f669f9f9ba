// The whole page without a page: intents in, state and effects out.
#include "web/model/update.h"

#include <gtest/gtest.h>

#include <algorithm>

#include "web/model/box.h"
#include "web/model/document_view.h"
#include "web/model/worked_case.h"

namespace rejoinder {
namespace {

constexpr const char* kReview = R"toml(rejoinder = 1
title = "Tram depots"

[[column]]
id = "short"
label = "(1)"
n = 120
k = 1
  [[column.term]]
  name = "staff"
  coef = "0.50"
  se = "0.20"

[[column]]
id = "full"
label = "(2)"
n = 120
k = 2
  [[column.term]]
  name = "staff"
  coef = "0.45"
  se = "0.21"
  [[column.term]]
  name = "snow days"
  coef = "1.20"
  se = "0.40"

[[claim]]
id = "weather"
says = "Staff and snow matter jointly."
column = "full"
restrictions = "staff = 0, \"snow days\" = 0"

[[claim]]
id = "alike"
says = "Both have the same effect."
column = "full"
restrictions = "staff = \"snow days\""
)toml";

AppState opened() {
  AppState state = first_state("");
  update(state, LoadText{"depots.toml", kReview});
  return state;
}

TEST(Update, OpensAReviewAndChecksEveryClaim) {
  const AppState state = opened();
  EXPECT_EQ(review_text(state.document, "title"), "Tram depots");
  ASSERT_EQ(state.checked.findings.size(), 2u);
  EXPECT_EQ(state.checked.findings[0].claim, "weather");
  EXPECT_EQ(state.claim, 0);
  EXPECT_NE(state.notice.find("depots.toml"), std::string::npos);
}

TEST(Update, UndoBringsTheReviewBackThatAnOpenedOneReplaced) {
  AppState state = first_state("");
  const Node before = state.document;
  update(state, LoadText{"depots.toml", kReview});
  EXPECT_FALSE(state.document == before);
  update(state, Undo{});
  EXPECT_EQ(state.document, before);
  update(state, Redo{});
  EXPECT_EQ(review_text(state.document, "title"), "Tram depots");
}

TEST(Update, LeavesEverythingAsItWasWhereAFileCannotBeRead) {
  AppState state = opened();
  const Node before = state.document;
  update(state, LoadText{"spoilt.toml", "rejoinder = 1\ntitle = \"no end\nn = = 3\n"});
  EXPECT_EQ(state.document, before);
  EXPECT_EQ(state.overlay, Overlay::ReviewText);
  EXPECT_EQ(state.box_text, "rejoinder = 1\ntitle = \"no end\nn = = 3\n");
  EXPECT_NE(state.box_note.find("line 2"), std::string::npos) << state.box_note;
  // Mended in the box, it is taken.
  update(state, EditBox{"rejoinder = 1\ntitle = \"an end\"\n"});
  EXPECT_EQ(state.box_note, "");
  update(state, AcceptBox{});
  EXPECT_EQ(review_text(state.document, "title"), "an end");
  EXPECT_EQ(state.overlay, Overlay::None);
}

TEST(Update, TypesIntoACellAndAnswersAtOnce) {
  AppState state = opened();
  const auto low_before = state.checked.findings[0].wald->low;
  update(state, EditCell{{1, 1, "coef"}, "2.40"});
  EXPECT_EQ(cell_text(state.document, {1, 1, "coef"}), "2.40");
  EXPECT_GT(state.checked.findings[0].wald->low, low_before);
}

TEST(Update, MakesTypingInOneCellOneStep) {
  AppState state = opened();
  const Node before = state.document;
  for (const char* text : {"2", "2.", "2.4", "2.40"}) update(state, EditCell{{1, 1, "coef"}, text});
  update(state, EditCell{{1, 1, "se"}, "0.5"});
  update(state, Undo{});
  EXPECT_EQ(cell_text(state.document, {1, 1, "coef"}), "2.40");
  EXPECT_EQ(cell_text(state.document, {1, 1, "se"}), "0.40");
  update(state, Undo{});
  EXPECT_EQ(state.document, before);
}

TEST(Update, TakesATermIntoAColumnThatDidNotListItWhenAFigureIsTyped) {
  AppState state = opened();
  update(state, ChooseCell{std::nullopt});
  const Node before = state.document;
  for (const char* text : {"1", "1.", "1.1"}) update(state, EditFigure{0, "snow days", "coef", text});
  EXPECT_EQ(term_names(state.document, 0), (std::vector<std::string>{"staff", "snow days"}));
  EXPECT_EQ(cell_text(state.document, {0, 1, "coef"}), "1.1");
  EXPECT_EQ(state.cell, (TableCell{0, 1, "coef"}));
  // As the grid goes on once the term is listed: still the same step.
  update(state, EditCell{{0, 1, "coef"}, "1.10"});
  update(state, Undo{});
  EXPECT_EQ(state.document, before);
  update(state, Redo{});
  EXPECT_EQ(cell_text(state.document, {0, 1, "coef"}), "1.10");
}

TEST(Update, PutsATakenTermWhereTheOtherColumnsHaveIt) {
  AppState state = opened();
  update(state, AddTerm{"slope"});
  update(state, RemoveTerm{"staff"});
  // "snow days" stands above "slope" in the second column, so it goes above it in the first.
  ASSERT_EQ(term_names(state.document, 0), (std::vector<std::string>{"slope"}));
  update(state, EditFigure{0, "snow days", "se", "0.3"});
  EXPECT_EQ(term_names(state.document, 0), (std::vector<std::string>{"snow days", "slope"}));
  EXPECT_EQ(cell_text(state.document, {0, 0, "se"}), "0.3");
}

TEST(Update, DropsANoticeWithTheNextChange) {
  AppState state = opened();
  EXPECT_FALSE(state.notice.empty());
  update(state, EditCell{{1, 1, "coef"}, "1.20"});  // as it was
  EXPECT_FALSE(state.notice.empty());
  update(state, EditCell{{1, 1, "coef"}, "1.21"});
  EXPECT_EQ(state.notice, "");
}

TEST(Update, LeavesAColumnAsItIsWhereNothingOrAnUnknownTermIsTyped) {
  AppState state = opened();
  const Node before = state.document;
  update(state, EditFigure{0, "snow days", "coef", ""});
  update(state, EditFigure{0, "snow days", "coef", "  "});
  update(state, EditFigure{0, "no such term", "coef", "1.0"});
  update(state, EditFigure{7, "snow days", "coef", "1.0"});
  EXPECT_EQ(state.document, before);
  EXPECT_EQ(state.history.past.size(), 1u);  // the review that was opened
}

TEST(Update, StartsANewStepAfterLookingElsewhere) {
  AppState state = opened();
  update(state, ChooseCell{TableCell{1, 1, "coef"}});
  update(state, EditCell{{1, 1, "coef"}, "2"});
  update(state, ChooseCell{TableCell{1, 0, "coef"}});
  update(state, ChooseCell{TableCell{1, 1, "coef"}});
  update(state, EditCell{{1, 1, "coef"}, "3"});
  update(state, Undo{});
  EXPECT_EQ(cell_text(state.document, {1, 1, "coef"}), "2");
}

TEST(Update, KeepsWhatCannotBeReadAndSaysSo) {
  AppState state = opened();
  update(state, EditCell{{1, 1, "se"}, "0.4O"});
  EXPECT_EQ(cell_text(state.document, {1, 1, "se"}), "0.4O");
  ASSERT_FALSE(state.checked.problems.empty());
  EXPECT_EQ(state.checked.findings.size(), 2u);
  update(state, EditCell{{1, 1, "se"}, "0.40"});
  EXPECT_TRUE(state.checked.problems.empty());
}

TEST(Update, TakesAFigureAwayWhenItsCellIsEmptied) {
  AppState state = opened();
  update(state, EditCell{{1, 1, "se"}, "  "});
  EXPECT_EQ(row_of(*row_of(state.document, "column", 1), "term", 1)->find("se"), nullptr);
}

TEST(Update, WritesCountsPlainlyAndFiguresAsPrinted) {
  AppState state = opened();
  update(state, EditCell{{0, -1, "n"}, "1284"});
  update(state, EditCell{{0, -1, "r2"}, "0.50"});
  update(state, EditCell{{0, 0, "ci"}, "0.10 to 0.90"});
  const std::string text = write_document(state.document);
  EXPECT_NE(text.find("n = 1284"), std::string::npos);
  EXPECT_NE(text.find("r2 = \"0.50\""), std::string::npos);
  const Node* ci = row_of(*row_of(state.document, "column", 0), "term", 0)->find("ci");
  ASSERT_NE(ci, nullptr);
  ASSERT_EQ(ci->items.size(), 2u);
  EXPECT_EQ(cell_text(state.document, {0, 0, "ci"}), "0.10, 0.90");
}

TEST(Update, RenamesATermEverywhere) {
  AppState state = opened();
  update(state, RenameTerm{0, 0, "drivers"});
  EXPECT_EQ(term_names(state.document, 0), (std::vector<std::string>{"drivers"}));
  EXPECT_EQ(term_names(state.document, 1)[0], "drivers");
  EXPECT_EQ(claim_text(state.document, 0, "restrictions"), "drivers = 0, \"snow days\" = 0");
  EXPECT_TRUE(state.checked.problems.empty());
}

TEST(Update, AddsAndTakesOutTermsAndColumns) {
  AppState state = opened();
  update(state, AddTerm{"ice"});
  EXPECT_EQ(term_names(state.document, 0), (std::vector<std::string>{"staff", "ice"}));
  EXPECT_EQ(term_names(state.document, 1).back(), "ice");
  update(state, AddTerm{"ice"});
  EXPECT_EQ(term_names(state.document, 1).size(), 3u);
  EXPECT_NE(state.notice.find("already"), std::string::npos);
  update(state, AddColumn{});
  EXPECT_EQ(count_of(state.document, "column"), 3);
  EXPECT_EQ(term_names(state.document, 2).size(), 3u);
  update(state, RemoveTerm{"ice"});
  EXPECT_EQ(term_names(state.document, 2).size(), 2u);
  update(state, RemoveColumn{2});
  EXPECT_EQ(count_of(state.document, "column"), 2);
}

TEST(Update, RenamesAColumnInTheClaimsToo) {
  AppState state = opened();
  update(state, EditColumn{1, "id", "all"});
  EXPECT_EQ(claim_text(state.document, 0, "column"), "all");
  update(state, EditColumn{1, "id", "short"});
  EXPECT_EQ(column_text(state.document, 1, "id"), "all");
  EXPECT_NE(state.notice.find("short"), std::string::npos);
}

TEST(Update, EditsAClaimField) {
  AppState state = opened();
  update(state, EditClaim{0, "f", "6.10"});
  update(state, EditClaim{0, "df", "2, 117"});
  update(state, EditClaim{0, "rejects", "true"});
  update(state, EditClaim{0, "restricted_fit.r2", "0.30"});
  const std::string text = write_document(state.document);
  EXPECT_NE(text.find("f = \"6.10\""), std::string::npos);
  EXPECT_NE(text.find("df = [2, 117]"), std::string::npos) << text;
  EXPECT_NE(text.find("rejects = true"), std::string::npos);
  EXPECT_EQ(claim_text(state.document, 0, "restricted_fit.r2"), "0.30");
  EXPECT_TRUE(state.checked.problems.empty());
  update(state, EditClaim{0, "restricted_fit.r2", ""});
  EXPECT_EQ(row_of(state.document, "claim", 0)->find("restricted_fit"), nullptr);
  update(state, EditClaim{0, "df", "2, many"});
  EXPECT_EQ(claim_text(state.document, 0, "df"), "2, many");
  EXPECT_FALSE(state.checked.problems.empty());
}

TEST(Update, TicksWriteTheRestriction) {
  AppState state = opened();
  update(state, TickTerms{1, "sum", {"staff", "snow days"}});
  EXPECT_EQ(claim_text(state.document, 1, "restrictions"), "staff + \"snow days\" = 1");
  update(state, TickTerms{1, "zero", {"snow days"}});
  EXPECT_EQ(claim_text(state.document, 1, "restrictions"), "\"snow days\" = 0");
  update(state, TickTerms{1, "zero", {}});
  EXPECT_EQ(claim_text(state.document, 1, "restrictions"), "");
  EXPECT_EQ(state.checked.findings.size(), 2u);
}

TEST(Update, AddsRepeatsMovesAndTakesOutClaims) {
  AppState state = opened();
  update(state, AddClaim{"staff = 0"});
  EXPECT_EQ(state.claim, 2);
  EXPECT_EQ(claim_text(state.document, 2, "column"), "full");
  update(state, DuplicateClaim{0});
  EXPECT_EQ(state.claim, 1);
  EXPECT_EQ(claim_text(state.document, 1, "says"), "Staff and snow matter jointly.");
  EXPECT_NE(claim_text(state.document, 1, "id"), "weather");
  update(state, MoveClaim{1, 1});
  EXPECT_EQ(state.claim, 2);
  EXPECT_EQ(claim_text(state.document, 1, "id"), "alike");
  update(state, MoveClaim{0, -1});
  EXPECT_EQ(claim_text(state.document, 0, "id"), "weather");
  for (int i = 0; i < 4; ++i) update(state, RemoveClaim{0});
  EXPECT_EQ(state.claim, -1);
  EXPECT_TRUE(state.checked.findings.empty());
}

TEST(Update, FiveFiguresGiveAFirstFinding) {
  AppState state = first_state("");
  update(state, FiveFigures{"1.90", "0.80", "0.70", "0.90", "64", false});
  ASSERT_EQ(state.checked.findings.size(), 1u);
  const Finding& finding = state.checked.findings[0];
  ASSERT_TRUE(finding.f.has_value());
  // Derived: the larger t at its least is 1.895 / 0.805, and F >= t^2 / 2 whatever the covariance.
  EXPECT_NEAR(finding.f->low, 1.895 * 1.895 / 0.805 / 0.805 / 2, 1e-9);
  EXPECT_EQ(finding.df->denominator, 61);
  EXPECT_EQ(finding.state, State::Undecided);
  update(state, FiveFigures{"1.90", "0.80", "0.70", "0.90", "64", true});
  EXPECT_EQ(claim_text(state.document, 0, "restrictions"), "first = second");
  EXPECT_EQ(state.checked.findings[0].q, 1);
}

TEST(Update, PastesAWholeReview) {
  AppState state = first_state("");
  update(state, PasteText{kReview});
  EXPECT_EQ(review_text(state.document, "title"), "Tram depots");
  EXPECT_EQ(state.overlay, Overlay::None);
}

TEST(Update, ShowsAPastedTableBeforeAnythingIsReplaced) {
  AppState state = opened();
  const Node before = state.document;
  update(state, PasteText{"         (1)       (2)\nstaff    0.61      0.55\n         (0.20)    (0.22)\nsnow  "
                          "   1.10      1.30\n         (0.41)    (0.39)\nn        120       120\n"});
  EXPECT_EQ(state.document, before);
  EXPECT_EQ(state.overlay, Overlay::PasteBox);
  ASSERT_EQ(state.reading.kind, BoxReading::Kind::Table);
  EXPECT_EQ(state.reading.table.columns.size(), 2u);
  EXPECT_TRUE(state.reading.keeps_claims);
  update(state, AcceptBox{});
  EXPECT_EQ(state.overlay, Overlay::None);
  // The same number of columns: their names stay, and so the claims rest on the new figures.
  EXPECT_EQ(column_text(state.document, 1, "id"), "full");
  EXPECT_EQ(cell_text(state.document, {1, 0, "coef"}), "0.55");
  EXPECT_EQ(count_of(state.document, "claim"), 2);
  update(state, Undo{});
  EXPECT_EQ(state.document, before);
}

TEST(Update, StartsAReviewFromATableOverTheWorkedCase) {
  AppState state = first_state("");
  update(state,
         PasteText{
             "         (1)\nstaff    0.61\n         (0.20)\nsnow     1.10\n         (0.41)\nn        120\n"});
  EXPECT_FALSE(state.reading.keeps_claims);
  update(state, AcceptBox{});
  EXPECT_EQ(count_of(state.document, "claim"), 0);
  EXPECT_EQ(count_of(state.document, "column"), 1);
  EXPECT_EQ(state.claim, -1);
}

TEST(Update, ReadsTheSecondFiguresOtherwiseBeforeAccepting) {
  AppState state = opened();
  update(state, ShowOverlay{Overlay::PasteBox});
  update(state,
         EditBox{
             "         (1)\nstaff    2.61\n         (1.20)\nsnow     3.10\n         (1.41)\nn        120\n"});
  ASSERT_EQ(state.reading.kind, BoxReading::Kind::Table);
  EXPECT_FALSE(state.reading.table.second_certain);
  update(state, SetSecondFigure{"t"});
  update(state, AcceptBox{});
  EXPECT_EQ(cell_text(state.document, {0, 0, "t"}), "1.20");
  update(state, SetSecondFigure{"se"});
  EXPECT_EQ(cell_text(state.document, {0, 0, "t"}), "");
  EXPECT_EQ(cell_text(state.document, {0, 0, "se"}), "1.20");
}

TEST(Update, PastesARectangleAtTheChosenCell) {
  AppState state = opened();
  update(state, ChooseCell{TableCell{0, 0, "coef"}});
  update(state, PasteText{"0.61\t0.55\n(0.25)\t(0.26)\n"});
  EXPECT_EQ(state.overlay, Overlay::None);
  EXPECT_EQ(cell_text(state.document, {0, 0, "coef"}), "0.61");
  EXPECT_EQ(cell_text(state.document, {1, 0, "coef"}), "0.55");
  EXPECT_EQ(cell_text(state.document, {0, 0, "se"}), "(0.25)");
  EXPECT_EQ(cell_text(state.document, {1, 0, "se"}), "(0.26)");
  EXPECT_TRUE(state.checked.problems.empty());
  update(state, Undo{});
  EXPECT_EQ(cell_text(state.document, {0, 0, "coef"}), "0.50");
}

TEST(Update, PastesASingleFigureIntoTheChosenCell) {
  AppState state = opened();
  update(state, ChooseCell{TableCell{1, 1, "se"}});
  update(state, PasteText{"0.39\n"});
  EXPECT_EQ(cell_text(state.document, {1, 1, "se"}), "0.39");
}

TEST(Update, ShowsARectangleThatDoesNotFitInsteadOfLosingIt) {
  AppState state = opened();
  const Node before = state.document;
  update(state, ChooseCell{TableCell{1, 0, "coef"}});
  update(state, PasteText{"0.61\t0.55\t0.44\n(0.25)\t(0.26)\t(0.20)\n"});
  EXPECT_EQ(state.document, before);
  EXPECT_EQ(state.overlay, Overlay::PasteBox);
  EXPECT_FALSE(state.box_text.empty());
}

TEST(Update, OffersAClaimForAPastedSentence) {
  AppState state = opened();
  update(state, PasteText{"Staff and snow days matter jointly, F(2, 117) = 6.10, p = .003 (p. 9)."});
  EXPECT_EQ(state.overlay, Overlay::PasteBox);
  ASSERT_EQ(state.reading.kind, BoxReading::Kind::Sentence);
  EXPECT_EQ(state.reading.sentence.f, "6.10");
  EXPECT_EQ(count_of(state.document, "claim"), 2);
  update(state, AcceptBox{});
  ASSERT_EQ(count_of(state.document, "claim"), 3);
  EXPECT_EQ(state.claim, 2);
  EXPECT_EQ(claim_text(state.document, 2, "f"), "6.10");
  EXPECT_EQ(claim_text(state.document, 2, "df"), "2, 117");
  EXPECT_EQ(claim_text(state.document, 2, "p"), ".003");
  EXPECT_EQ(claim_text(state.document, 2, "page"), "p. 9");
  EXPECT_EQ(claim_text(state.document, 2, "column"), "full");
}

TEST(Update, KeepsWhatStandsInAnOverlayThatIsShut) {
  AppState state = opened();
  update(state, ShowOverlay{Overlay::PasteBox});
  update(state, EditBox{"half a table"});
  update(state, ShowOverlay{Overlay::None});
  update(state, ShowOverlay{Overlay::ReviewText});
  EXPECT_EQ(state.box_text, write_document(state.document));
  update(state, ShowOverlay{Overlay::PasteBox});
  EXPECT_EQ(state.box_text, "half a table");
}

TEST(Update, EditsTheReviewAsText) {
  AppState state = opened();
  update(state, ShowOverlay{Overlay::ReviewText});
  std::string text = state.box_text;
  text.replace(text.find("Tram depots"), 11, "Bus depots");
  update(state, EditBox{text});
  EXPECT_EQ(state.reading.kind, BoxReading::Kind::Review);
  update(state, AcceptBox{});
  EXPECT_EQ(review_text(state.document, "title"), "Bus depots");
  EXPECT_EQ(state.overlay, Overlay::None);
}

TEST(Update, StartsAnEmptyReviewThatUndoTakesBack) {
  AppState state = opened();
  const Node before = state.document;
  update(state, NewReview{});
  EXPECT_TRUE(state.checked.findings.empty());
  EXPECT_EQ(state.claim, -1);
  EXPECT_EQ(count_of(state.document, "column"), 1);
  update(state, Undo{});
  EXPECT_EQ(state.document, before);
}

TEST(Update, HandsCopiesAndFilesToThePage) {
  AppState state = opened();
  const auto copied = update(state, CopyText{"four sentences", "the paragraph"});
  ASSERT_EQ(copied.size(), 1u);
  EXPECT_EQ(copied[0].kind, Effect::Kind::Copy);
  EXPECT_EQ(copied[0].text, "four sentences");
  EXPECT_EQ(state.notice, "the paragraph copied");
  const auto saved = update(state, SaveReview{});
  ASSERT_EQ(saved.size(), 1u);
  EXPECT_EQ(saved[0].kind, Effect::Kind::Download);
  EXPECT_EQ(saved[0].name, "tram-depots.toml");
  const Result<Node> again = read_document(saved[0].text);
  ASSERT_TRUE(again.ok());
  EXPECT_EQ(again.value(), state.document);
  EXPECT_EQ(update(state, SaveReport{})[0].name, "tram-depots-report.html");
  EXPECT_EQ(update(state, OpenReport{})[0].kind, Effect::Kind::OpenReport);
  EXPECT_EQ(update(state, OpenFile{})[0].kind, Effect::Kind::PickFile);
  EXPECT_EQ(update(state, PrintPage{})[0].kind, Effect::Kind::Print);
}

TEST(Update, AsksThePageToKeepEveryChange) {
  AppState state = opened();
  const auto keeps = [](const std::vector<Effect>& effects) {
    return std::any_of(effects.begin(), effects.end(),
                       [](const Effect& e) { return e.kind == Effect::Kind::KeepNow; });
  };
  EXPECT_TRUE(keeps(update(state, EditCell{{0, 0, "coef"}, "0.7"})));
  EXPECT_FALSE(keeps(update(state, EditCell{{0, 0, "coef"}, "0.7"})));  // nothing changed
  EXPECT_TRUE(keeps(update(state, SetTheme{Theme::Dark})));
  EXPECT_TRUE(keeps(update(state, Undo{})));
}

TEST(Update, KeepsChoicesWithinTheirBounds) {
  AppState state = opened();
  update(state, SetTextScale{5});
  EXPECT_EQ(state.text_scale, 2.0);
  update(state, SetTextScale{0});
  EXPECT_EQ(state.text_scale, 0.8);
  update(state, SetShares{0.9f, 0.9f});
  EXPECT_LE(state.left_share + state.right_share, 0.86f);
  update(state, ChooseClaim{99});
  EXPECT_EQ(state.claim, 1);
  update(state, FilterState{State::Agrees});
  EXPECT_EQ(state.only, State::Agrees);
  const bool open = state.open_drawers.contains(Drawer::Evidence);
  update(state, ToggleDrawer{Drawer::Evidence});
  EXPECT_NE(state.open_drawers.contains(Drawer::Evidence), open);
}

TEST(Update, IgnoresPlacesThatDoNotExist) {
  AppState state = opened();
  const Node before = state.document;
  update(state, EditCell{{9, 0, "coef"}, "1"});
  update(state, EditCell{{0, 9, "coef"}, "1"});
  update(state, EditClaim{9, "f", "1"});
  update(state, RemoveClaim{-1});
  update(state, RemoveColumn{9});
  update(state, MoveClaim{0, 9});
  update(state, TickTerms{9, "zero", {"staff"}});
  update(state, RenameTerm{0, 9, "x"});
  update(state, std::monostate{});
  EXPECT_EQ(state.document, before);
}

TEST(Update, MendsTextThatIsNoUtf8) {
  AppState state = opened();
  update(state, EditReview{"title", std::string("Tram\xFF \x01 depots\xE2\x88") + "\x92"});
  const Result<Node> again = read_document(write_document(state.document));
  ASSERT_TRUE(again.ok()) << again.error().text();
  EXPECT_EQ(again.value(), state.document);
}

}  // namespace
}  // namespace rejoinder
