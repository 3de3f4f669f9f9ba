#include "web/model/ticks.h"

#include <gtest/gtest.h>

namespace rejoinder {
namespace {

TEST(Ticks, AndTheTypedFormStayInStep) {
  const struct {
    const char *text, *form;
    std::vector<std::string> terms;
  } rows[] = {
      {"fare = 0, \"fuel price\" = 0", "zero", {"fare", "fuel price"}},
      {"fare = 0; rain = 0", "zero", {"fare", "rain"}},
      {"fare = \"fuel price\" = 0", "zero", {"fare", "fuel price"}},
      {"rain = wind = frost", "equal", {"rain", "wind", "frost"}},
      {"fare = \"fuel price\"", "equal", {"fare", "fuel price"}},
      {"fare + fuel = 1", "sum", {"fare", "fuel"}},
      {"fare + fuel = 2.5", "sum", {"fare", "fuel"}},
      {"fare = 1", "sum", {"fare"}},
      {"fare =", "equal", {"fare"}},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const Ticks ticks = read_ticks(row.text);
    EXPECT_EQ(ticks.form, row.form);
    EXPECT_EQ(ticks.terms, row.terms);
    // Written and read again, the ticks are the same.
    const Ticks again = read_ticks(write_ticks(ticks));
    EXPECT_EQ(again.form, ticks.form);
    EXPECT_EQ(again.terms, ticks.terms);
    EXPECT_EQ(again.value, ticks.value);
  }
}

TEST(Ticks, LeaveAloneWhatTheyCannotSay) {
  for (const char* text : {"", "fare - 2 fuel = 1", "fare + ", "all", "0.5 fare = fuel"}) {
    SCOPED_TRACE(text);
    EXPECT_EQ(read_ticks(text).form, "");
  }
}

TEST(Ticks, WriteNothingWithoutTerms) { EXPECT_EQ(write_ticks({"zero", {}, "1"}), ""); }

}  // namespace
}  // namespace rejoinder
