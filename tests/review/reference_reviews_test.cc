// Every stored review is read without a problem, loses nothing in writing, and stays harmless when it is
// damaged.
#include <gtest/gtest.h>

#include <fstream>
#include <random>
#include <sstream>

#include "core/review/review.h"

namespace rejoinder {
namespace {

struct StoredReview {
  std::string name, text;
};

std::string text_of(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  EXPECT_TRUE(file.good()) << path;
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

// From a list, as walking through folders does not work in every build.
std::vector<StoredReview> stored_reviews() {
  const std::string folder = std::string(REJOINDER_TEST_DATA) + "/reviews/";
  std::vector<StoredReview> all;
  std::istringstream index(text_of(folder + "index.txt"));
  for (std::string name; std::getline(index, name);) all.push_back({name, text_of(folder + name)});
  return all;
}

TEST(StoredReviews, AreReadWithoutAProblem) {
  const std::vector<StoredReview> reviews = stored_reviews();
  EXPECT_GE(reviews.size(), 40u);
  for (const StoredReview& stored : reviews) {
    SCOPED_TRACE(stored.name);
    const Result<Node> document = read_document(stored.text);
    ASSERT_TRUE(document.ok()) << document.error().text();
    const Review review = read_review(document.value());
    EXPECT_FALSE(review.claims.empty());
    // The sample of the format names a column that it does not show.
    if (stored.name == "every_key.toml") {
      ASSERT_EQ(review.problems.size(), 1u);
      EXPECT_EQ(review.problems[0].what, "\"short\" is no column of this review");
      continue;
    }
    for (const Problem& problem : review.problems) ADD_FAILURE() << problem.text();
  }
}

void gather(const Node& node, std::vector<std::string>& values) {
  if (node.kind == Node::Kind::Text || node.kind == Node::Kind::Literal) values.push_back(node.text);
  for (const Node& item : node.items) gather(item, values);
  for (const Entry& entry : node.entries) {
    values.push_back(entry.key);
    gather(entry.value, values);
  }
}

TEST(StoredReviews, LoseNothingInWriting) {
  for (const StoredReview& stored : stored_reviews()) {
    SCOPED_TRACE(stored.name);
    const Node document = read_document(stored.text).value();
    const std::string written = write_document(document);
    const Result<Node> again = read_document(written);
    ASSERT_TRUE(again.ok()) << again.error().text();
    EXPECT_EQ(again.value(), document);
    EXPECT_EQ(write_document(again.value()), written);
    // Second route: every key and every value stands in the original text, in the same order.
    std::vector<std::string> values;
    gather(again.value(), values);
    for (const std::string& value : values)
      if (value.find_first_of("\\\"\n") == std::string::npos) {
        EXPECT_NE(stored.text.find(value), std::string::npos) << value;
      }
  }
}

// Checked: bytes changed, taken out, doubled or brought in from elsewhere give an answer with a place, and
// what still reads survives writing. The seed is fixed, so a fall can be repeated.
TEST(StoredReviews, SurviveDamage) {
  const std::vector<StoredReview> reviews = stored_reviews();
  const std::string pieces[] = {"\"",
                                "'",
                                "\"\"\"",
                                "[",
                                "]",
                                "[[",
                                "{",
                                "}",
                                "=",
                                ".",
                                ",",
                                "\n",
                                "#",
                                "\\",
                                "-",
                                "0",
                                "1e9999",
                                "inf",
                                "nan",
                                "[[column]]\n",
                                "[column]\n",
                                "[[column.term]]\n",
                                "se = 0\n",
                                "n = -1\n",
                                "\xFF",
                                "\xE2\x88\x92",
                                "\t",
                                std::string(1, '\0'),
                                "a.b.c = 1\n",
                                "lower = [[1]]\n",
                                "df = [1, \"inf\"]\n",
                                "id = {}\n",
                                "stars = \"**\"\n",
                                "0x"};
  std::mt19937 random(20240612);
  int read = 0;
  for (int round = 0; round < 6000; ++round) {
    std::string text = reviews[random() % reviews.size()].text;
    const int changes = 1 + static_cast<int>(random() % 4);
    for (int i = 0; i < changes && !text.empty(); ++i) {
      const std::size_t at = random() % text.size(), length = random() % 12;
      switch (random() % 5) {
        case 0:
          text.erase(at, length);
          break;
        case 1:
          text[at] = static_cast<char>(random());
          break;
        case 2:
          text.insert(at, pieces[random() % std::size(pieces)]);
          break;
        case 3:
          text.insert(random() % text.size(), text.substr(at, length * 4));
          break;
        default:
          text.replace(at, length, pieces[random() % std::size(pieces)]);
          break;
      }
    }
    const Result<Node> document = read_document(text);
    if (!document.ok()) {
      ASSERT_EQ(document.error().where.substr(0, 5), "line ") << text;
      continue;
    }
    ++read;
    for (const Problem& problem : read_review(document.value()).problems) {
      ASSERT_FALSE(problem.what.empty() || problem.mend.empty()) << text;
      ASSERT_GE(problem.line, 0);
    }
    const Result<Node> again = read_document(write_document(document.value()));
    ASSERT_TRUE(again.ok()) << again.error().text() << "\n" << text;
    ASSERT_EQ(again.value(), document.value()) << text;
  }
  EXPECT_GT(read, 500);
}

}  // namespace
}  // namespace rejoinder
