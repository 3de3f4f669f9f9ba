#include "core/paste/table_text.h"

#include <gtest/gtest.h>

namespace rejoinder {
namespace {

const PastedRow* row(const PastedTable& table, const std::string& label) {
  for (const PastedRow& row : table.rows)
    if (row.label == label) return &row;
  return nullptr;
}

// "coef|second" of one cell, "" for what is not there.
std::string cell(const PastedTable& table, const std::string& label, int column) {
  const PastedRow* found = row(table, label);
  if (!found) return "no such row";
  std::string text = found->cells.at(static_cast<std::size_t>(column)).text;
  for (std::size_t i = 0; i < found->more.size(); ++i)
    if (found->more_column[i] == column) text += "|" + found->more[i].key + " " + found->more[i].text;
  return text;
}

constexpr const char* kGaps =
    "Table 2. Beds booked at mountain huts\n"
    "                  (1)           (2)\n"
    "Ascent            −0.231***     −0.214***\n"
    "                  (0.060)       (0.061)\n"
    "Price             −0.090*\n"
    "                  (0.049)\n"
    "Cable car                       0.118*\n"
    "                                (0.066)\n"
    "Constant          yes           yes\n"
    "R²                0.312         0.341\n"
    "adj. R²           0.302         0.322\n"
    "Observations      1,212         1,212\n"
    "Standard errors in parentheses. * p<0.10, ** p<0.05, *** p<0.01\n";

TEST(PastedTable, ReadsColumnsPartedByGaps) {
  const PastedTable table = read_pasted_table(kGaps);
  EXPECT_EQ(table.title, "Table 2. Beds booked at mountain huts");
  EXPECT_EQ(table.columns, (std::vector<std::string>{"(1)", "(2)"}));
  EXPECT_EQ(cell(table, "Ascent", 0), "−0.231***|se (0.060)");
  EXPECT_EQ(cell(table, "Ascent", 1), "−0.214***|se (0.061)");
  EXPECT_EQ(cell(table, "Price", 0), "−0.090*|se (0.049)");
  EXPECT_EQ(cell(table, "Price", 1), "");
  EXPECT_EQ(cell(table, "Cable car", 0), "");
  EXPECT_EQ(cell(table, "Cable car", 1), "0.118*|se (0.066)");
  EXPECT_EQ(row(table, "R²")->key, "r2");
  EXPECT_EQ(row(table, "adj. R²")->key, "adj_r2");
  EXPECT_EQ(row(table, "Observations")->key, "n");
  EXPECT_EQ(row(table, "Constant")->kind, PastedRow::Kind::Mark);
  EXPECT_EQ(table.second, "se");
  EXPECT_TRUE(table.second_certain);
  EXPECT_EQ(table.stars, (std::vector<double>{0.10, 0.05, 0.01}));
  EXPECT_EQ(table.doubtful(), 0);
}

TEST(PastedTable, KeepsTheExtractAndThePlaceOfEveryFigure) {
  const PastedTable table = read_pasted_table(kGaps);
  EXPECT_EQ(table.extract, kGaps);
  const PastedRow* ascent = row(table, "Ascent");
  ASSERT_NE(ascent, nullptr);
  // Characters of the third line, from 1: the label takes 18, then "−0.231***".
  EXPECT_EQ(ascent->cells[0].place, (TextPlace{3, 19, 27}));
  EXPECT_EQ(ascent->more[0].place, (TextPlace{4, 19, 25}));
  EXPECT_EQ(ascent->place, (TextPlace{3, 1, 6}));
}

TEST(PastedTable, ReadsTabsCommasBarsAndLatexAlike) {
  const char* texts[] = {
      "\t(1)\t(2)\nAscent\t-0.231***\t-0.214***\n\t(0.060)\t(0.061)\nCable "
      "car\t\t0.118*\n\t\t(0.066)\nn\t212\t212\n",
      ",(1),(2)\nAscent,-0.231***,-0.214***\n,(0.060),(0.061)\n\"Cable car\",,0.118*\n,,(0.066)\nn,212,212\n",
      "| | (1) | (2) |\n|---|---|---|\n| Ascent | -0.231*** | -0.214*** |\n| | (0.060) | (0.061) |\n| Cable "
      "car | | 0.118* |\n| | | (0.066) |\n| n | 212 | 212 |\n",
      " & (1) & (2) \\\\\n\\hline\nAscent & $-0.231^{***}$ & $-0.214^{***}$ \\\\\n & (0.060) & (0.061) "
      "\\\\\nCable car & & $0.118^{*}$ \\\\\n & & (0.066) \\\\\nn & 212 & 212 \\\\\n",
  };
  for (const char* text : texts) {
    SCOPED_TRACE(text);
    const PastedTable table = read_pasted_table(text);
    ASSERT_EQ(table.columns.size(), 2u);
    EXPECT_EQ(cell(table, "Ascent", 0), "-0.231***|se (0.060)");
    EXPECT_EQ(cell(table, "Ascent", 1), "-0.214***|se (0.061)");
    EXPECT_EQ(cell(table, "Cable car", 0), "");
    EXPECT_EQ(cell(table, "Cable car", 1), "0.118*|se (0.066)");
    EXPECT_EQ(cell(table, "n", 1), "212");
  }
}

TEST(PastedTable, ReadsSecondFiguresOnTheSameLine) {
  const PastedTable table = read_pasted_table(
      "Soil loss (n = 180 fields)\n"
      "Slope              0.272*** (0.099)\n"
      "Clay              −0.274*** (0.103)\n"
      "Standard errors in brackets\n");
  EXPECT_EQ(cell(table, "Slope", 0), "0.272***|se (0.099)");
  EXPECT_EQ(cell(table, "Clay", 0), "−0.274***|se (0.103)");
  EXPECT_EQ(cell(table, "n", 0), "180");
}

TEST(PastedTable, ReadsHeadingsThatNameTheFigures) {
  const PastedTable table = read_pasted_table(
      "                Coefficient   Std. err.   t\n"
      "ln capital      0.4001        0.0734      5.45\n"
      "ln labour       0.5392        0.0900      5.99\n");
  ASSERT_EQ(table.columns.size(), 1u);
  EXPECT_EQ(cell(table, "ln capital", 0), "0.4001|se 0.0734|t 5.45");
}

TEST(PastedTable, ReadsIntervalsAndRatios) {
  const PastedTable table = read_pasted_table(
      "                     OR (95% CI)\n"
      "Night shift          1.65 (1.18–2.31)\n"
      "Rotating shift       1.31 (0.94–1.82)\n");
  EXPECT_EQ(cell(table, "Night shift", 0), "1.65|ci (1.18–2.31)");
  const Node review = review_from_table(table);
  const Node& term = review.find("column")->items[0].find("term")->items[0];
  EXPECT_EQ(term.find("ratio")->text, "1.65");
  ASSERT_EQ(term.find("ci")->items.size(), 2u);
  EXPECT_EQ(term.find("ci")->items[0].text, "1.18");
  EXPECT_EQ(term.find("ci")->items[1].text, "2.31");
}

// Checked: a t ratio has the sign of its coefficient, so a negative figure in brackets is no standard error.
TEST(PastedTable, TellsStandardErrorsFromTRatiosByTheFiguresThemselves) {
  const PastedTable negative =
      read_pasted_table("Hours   −0.524***\n        (−3.06)\nBeds    0.044\n        (1.53)\n");
  EXPECT_EQ(negative.second, "t");
  const PastedTable starred =
      read_pasted_table("Hours   0.524***\n        (0.171)\nBeds    0.044\n        (0.029)\n");
  EXPECT_EQ(starred.second, "se");
  EXPECT_TRUE(starred.second_certain) << starred.second_reason;
  const PastedTable ratios =
      read_pasted_table("Hours   0.524***\n        (3.06)\nBeds    0.044\n        (1.53)\n");
  EXPECT_EQ(ratios.second, "t");
}

TEST(PastedTable, SaysWhereItCannotTellWhatTheSecondFigureIs) {
  const PastedTable table =
      read_pasted_table("Hours   2.524\n        (1.06)\nBeds    1.044\n        (0.53)\n");
  EXPECT_EQ(table.second, "se");
  EXPECT_FALSE(table.second_certain);
  EXPECT_FALSE(table.second_reason.empty());
}

// The standard error of the second column slid under the first: stars and figure no longer go together.
TEST(PastedTable, DoubtsAFigureThatSlidUnderItsNeighbour) {
  const PastedTable table = read_pasted_table(
      "             (1)          (2)\n"
      "Ascent       0.870***     0.054\n"
      "             (0.997)      (0.105)\n"
      "Price        0.400**      0.300*\n"
      "             (0.180)      (0.170)\n"
      "Standard errors in parentheses. * p<0.10, ** p<0.05, *** p<0.01\n");
  const PastedRow* ascent = row(table, "Ascent");
  ASSERT_NE(ascent, nullptr);
  EXPECT_FALSE(ascent->more[0].doubt.empty());
  EXPECT_TRUE(ascent->more[1].doubt.empty()) << ascent->more[1].doubt;
  EXPECT_EQ(table.doubtful(), 1);
}

TEST(PastedTable, CanBeReadWithAnotherSecondFigure) {
  const PastedTable table =
      read_pasted_table("Hours   2.524\n        (1.06)\nBeds    1.044\n        (0.53)\n");
  const PastedTable again = with_second_figure(table, "t");
  EXPECT_EQ(again.second, "t");
  EXPECT_TRUE(again.second_certain);
  EXPECT_EQ(cell(again, "Beds", 0), "1.044|t (0.53)");
}

TEST(PastedTable, DecidesTheDecimalMarkOnceForAll) {
  const PastedTable commas = read_pasted_table("Ascent   0,131   0,52\nPrice    1,5     2,25\n");
  EXPECT_EQ(commas.decimal, ',');
  EXPECT_FALSE(commas.doubts.empty());
  const PastedTable points =
      read_pasted_table("Beds   2,406.0   2,350.1\n       (174.5)   (175.7)\nN      1,284     1,284\n");
  EXPECT_EQ(points.decimal, '.');
  EXPECT_EQ(review_from_table(points).find("column")->items[0].find("n")->text, "1284");
}

TEST(PastedTable, JoinsLabelsWrappedOverTwoLines) {
  const PastedTable table = read_pasted_table(
      "                       (1)       (2)\n"
      "Ascent                 0.5       0.4\n"
      "Walking time from\n"
      "  the last stop        0.3       0.2\n");
  EXPECT_EQ(cell(table, "Walking time from the last stop", 1), "0.2");
}

TEST(PastedTable, LeavesOutRunningHeadsAndNotes) {
  const PastedTable table = read_pasted_table(
      "            Without       With\n"
      "14  Huts and guests: final report\n"
      "R-squared      0.193                0.288\n"
      "Regressors     3                    6\n"
      "N              60                   60\n"
      "Comfort variables: shower, menu, and so on\n");
  ASSERT_EQ(table.rows.size(), 3u);
  EXPECT_EQ(row(table, "Regressors")->key, "k");
  EXPECT_EQ(cell(table, "N", 1), "60");
}

TEST(PastedTable, DoubtsFiguresWithoutAPlace) {
  const PastedTable table = read_pasted_table("Ascent 0.51 0.42\nPrice 0.31\nn 60 60\n");
  ASSERT_EQ(table.columns.size(), 2u);
  const PastedRow* price = row(table, "Price");
  ASSERT_NE(price, nullptr);
  EXPECT_FALSE(price->cells[0].doubt.empty());
}

TEST(PastedTable, BecomesAReviewWithItsFiguresAsPrinted) {
  const Node review = review_from_table(read_pasted_table(kGaps));
  const Result<Node> again = read_document(write_document(review));
  ASSERT_TRUE(again.ok()) << again.error().text();
  const Node& column = again.value().find("column")->items[0];
  EXPECT_EQ(column.find("id")->text, "1");
  EXPECT_EQ(column.find("r2")->text, "0.312");
  EXPECT_EQ(column.find("n")->text, "1212");
  EXPECT_EQ(column.find("k"), nullptr);  // never guessed
  const Node& ascent = column.find("term")->items[0];
  EXPECT_EQ(ascent.find("coef")->text, "−0.231***");
  EXPECT_EQ(ascent.find("se")->text, "0.060");
}

TEST(PastedTable, ReadsAnAnalysisOfVarianceTable) {
  const Node review =
      review_from_table(read_pasted_table("Source        SS       d.f.     MS       F\n"
                                          "Mulch        11.41      4     2.852    3.26*\n"
                                          "Residual     21.89     25     0.876\n"
                                          "Total        33.30     29\n"));
  const Node* sources = review.find("source");
  ASSERT_NE(sources, nullptr);
  ASSERT_EQ(sources->items.size(), 3u);
  EXPECT_EQ(sources->items[0].find("ss")->text, "11.41");
  EXPECT_EQ(sources->items[0].find("df")->text, "4");
  EXPECT_EQ(sources->items[0].find("f")->text, "3.26*");
  EXPECT_EQ(sources->items[2].find("f"), nullptr);
}

TEST(PastedTable, HoldsOutAgainstAnyBytes) {
  std::string text;
  for (int i = 0; i < 4096; ++i) text += static_cast<char>((i * 7919) % 256);
  (void)review_from_table(read_pasted_table(text));
  EXPECT_TRUE(read_pasted_table("").empty());
  EXPECT_TRUE(read_pasted_table("words alone, nothing to read").empty());
  (void)read_pasted_table(std::string(100000, '&'));
  (void)read_pasted_table(std::string(100000, '('));
}

TEST(Block, SplitsARangeOfASheet) {
  EXPECT_EQ(read_block("0.1\t0.2\n(0.3)\t(0.4)\n"),
            (std::vector<std::vector<std::string>>{{"0.1", "0.2"}, {"(0.3)", "(0.4)"}}));
  EXPECT_EQ(read_block("0.1\n0.2\n"), (std::vector<std::vector<std::string>>{{"0.1"}, {"0.2"}}));
  EXPECT_TRUE(read_block("0.1").empty());
  EXPECT_TRUE(read_block("Ascent 0.1\nPrice 0.2").empty());
}

}  // namespace
}  // namespace rejoinder
