#include "web/model/history.h"

#include <gtest/gtest.h>

namespace rejoinder {
namespace {

Node titled(const std::string& title) {
  Node document = Node::table(false);
  document.set("title", Node::quoted(title));
  return document;
}

TEST(History, GoesBackAndOnStepByStep) {
  History history;
  remember(history, titled("one"), "");
  remember(history, titled("two"), "");
  Node now = titled("three");
  now = *step_back(history, now);
  EXPECT_EQ(now, titled("two"));
  now = *step_back(history, now);
  EXPECT_EQ(now, titled("one"));
  EXPECT_FALSE(step_back(history, now).has_value());
  now = *step_on(history, now);
  now = *step_on(history, now);
  EXPECT_EQ(now, titled("three"));
  EXPECT_FALSE(step_on(history, now).has_value());
}

TEST(History, KeepsTypingInOnePlaceAsOneStep) {
  History history;
  remember(history, titled("before"), "title");
  remember(history, titled("b"), "title");
  remember(history, titled("be"), "title");
  EXPECT_EQ(history.past.size(), 1u);
  end_step(history);
  remember(history, titled("bee"), "title");
  EXPECT_EQ(history.past.size(), 2u);
}

TEST(History, ForgetsTheFutureAfterAChange) {
  History history;
  remember(history, titled("one"), "");
  ASSERT_TRUE(step_back(history, titled("two")).has_value());
  remember(history, titled("one"), "");
  EXPECT_TRUE(history.future.empty());
}

TEST(History, DropsTheOldestFirstWhenItGrowsTooLarge) {
  History history;
  for (int i = 0; i < 100; ++i) remember(history, titled(std::string(100, 'x') + std::to_string(i)), "");
  trim(history, 5000);
  std::size_t held = 0;
  for (const std::string& text : history.past) held += text.size();
  EXPECT_LE(held, 5000u);
  EXPECT_GT(held, 4000u);
  EXPECT_EQ(*step_back(history, titled("now")), titled(std::string(100, 'x') + "99"));
}

}  // namespace
}  // namespace rejoinder
