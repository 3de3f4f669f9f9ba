#include "core/review/edit.h"

#include <gtest/gtest.h>

#include "core/review/review.h"

namespace rejoinder {
namespace {

Node read(std::string_view text) {
  Result<Node> document = read_document(text);
  EXPECT_TRUE(document.ok()) << (document.ok() ? "" : document.error().text());
  return std::move(document).value();
}

TEST(Edit, BuildsAReviewFromNothing) {
  Node d = Node::table(false);
  EXPECT_TRUE(set_value(d, {{"title"}}, "Ferry study"));
  EXPECT_EQ(add_column(d, "full"), 0);
  EXPECT_EQ(add_column(d, "full"), 1);
  EXPECT_EQ(add_term(d, 0, "fare"), 0);
  EXPECT_EQ(add_term(d, 0, "fuel price"), 1);
  EXPECT_EQ(add_term(d, 5, "x"), -1);
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"term", 0}, {"coef"}}, "-0.131**"));
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"n"}}, "418"));
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"clusters"}}, "1,204"));
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"weights"}}, "true"));
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"means"}, {"n"}}, "12"));
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"groups"}, {"size"}, {"north"}}, "16"));
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"covariance"}, {"lower", 0}}, "x"));
  EXPECT_EQ(add_claim(d, "prices"), 0);
  EXPECT_TRUE(set_value(d, {{"claim", 0}, {"df", 0}}, "2"));
  EXPECT_TRUE(set_value(d, {{"claim", 0}, {"df", 1}}, "inf"));
  EXPECT_TRUE(set_value(d, {{"claim", 0}, {"restricted_fit"}, {"r2"}}, "0.471"));
  EXPECT_EQ(write_document(d),
            "title = \"Ferry study\"\n"
            "\n[[column]]\nid = \"full\"\nn = 418\nclusters = \"1,204\"\nweights = true\n"
            "\n[[column.term]]\nname = \"fare\"\ncoef = \"-0.131**\"\n"
            "\n[[column.term]]\nname = \"fuel price\"\n"
            "\n[column.means]\nn = \"12\"\n"
            "\n[column.groups]\nsize = { north = 16 }\n"
            "\n[column.covariance]\nlower = [\"x\"]\n"
            "\n[[column]]\nid = \"full (2)\"\n"
            "\n[[claim]]\nid = \"prices\"\ndf = [2, \"inf\"]\nrestricted_fit = { r2 = \"0.471\" }\n");
  EXPECT_EQ(read(write_document(d)), d);
}

TEST(Edit, QuotesAllButCountsAndBooleans) {
  const struct {
    Path path;
    const char* text;
    bool literal;
  } rows[] = {
      {{{"column", 0}, {"n"}}, "418", true},
      {{{"column", 0}, {"n"}}, "1,418", false},
      {{{"column", 0}, {"n"}}, "0418", false},
      {{{"column", 0}, {"n"}}, "41.0", false},
      {{{"column", 0}, {"r2"}}, "1", false},
      {{{"column", 0}, {"intercept"}}, "false", true},
      {{{"column", 0}, {"intercept"}}, "no", false},
      {{{"column", 0}, {"label"}}, "true", false},
      {{{"claim", 0}, {"rejects"}}, "true", true},
      {{{"claim", 0}, {"df", 0}}, "3", true},
      {{{"claim", 0}, {"df", 0}}, "23.4", false},
      {{{"claim", 0}, {"f"}}, "4", false},
      {{{"level"}}, "0.05", false},
  };
  for (const auto& row : rows) {
    Node d = Node::table(false);
    ASSERT_TRUE(set_value(d, row.path, row.text));
    const Node* value = find_value(d, row.path);
    ASSERT_TRUE(value);
    EXPECT_EQ(value->text, row.text);
    EXPECT_EQ(value->kind == Node::Kind::Literal, row.literal) << row.text;
  }
}

TEST(Edit, EmptyTextTakesTheKeyAway) {
  Node d = read("[[column]]\nid = \"a\"\nn = 3\n");
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"n"}}, ""));
  EXPECT_EQ(write_document(d), "[[column]]\nid = \"a\"\n");
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"n"}}, ""));
}

TEST(Edit, RefusesPathsThatLeadNowhere) {
  const char* text = "a = \"1\"\n\n[[column]]\nid = \"x\"\n";
  Node d = read(text);
  EXPECT_FALSE(set_value(d, {}, "1"));
  EXPECT_FALSE(set_value(d, {{"a"}, {"b"}}, "1"));
  EXPECT_FALSE(set_value(d, {{"a", 0}}, "1"));
  EXPECT_FALSE(set_value(d, {{"column", 3}, {"n"}}, "1"));
  EXPECT_FALSE(set_value(d, {{"column"}, {"n"}}, "1"));
  EXPECT_FALSE(set_value(d, {{"column"}}, ""));
  EXPECT_FALSE(erase_value(d, {{"column", 1}}));
  EXPECT_FALSE(erase_value(d, {{"b"}}));
  EXPECT_FALSE(remove_claim(d, 0));
  EXPECT_FALSE(remove_column(d, -1));
  EXPECT_EQ(find_value(d, {{"column", 0}, {"n"}}), nullptr);
  EXPECT_EQ(write_document(d), text);
}

TEST(Edit, KeepsWhatItDoesNotTouch) {
  const std::string text =
      "zz = 1_000\nfuture = { a = 0x1F }\n\n[[column]]\nid = \"a\"\nodd = [1, "
      "[\"b\"]]\n\n[[column.term]]\nname = \"x\"\ncoef = \"0.50\"\n"
      "\n[[claim]]\nid = \"c\"\n";
  Node d = read(text);
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"term", 0}, {"coef"}}, "0.5"));
  EXPECT_TRUE(set_value(d, {{"column", 0}, {"term", 0}, {"coef"}}, "0.50"));
  EXPECT_EQ(write_document(d), text);
}

TEST(Edit, RemovesMovesAndDuplicatesClaims) {
  Node d = read("[[claim]]\nid = \"a\"\n[[claim]]\nid = \"b\"\n[[claim]]\nid = \"c\"\nf = \"2\"\n");
  const auto ids = [&] {
    std::string all;
    if (const Node* list = d.find("claim"))
      for (const Node& claim : list->items) all += claim.find("id")->text + " ";
    return all;
  };
  EXPECT_TRUE(move_claim(d, 0, 2));
  EXPECT_EQ(ids(), "b c a ");
  EXPECT_TRUE(move_claim(d, 2, 1));
  EXPECT_EQ(ids(), "b a c ");
  EXPECT_FALSE(move_claim(d, 0, 3));
  EXPECT_EQ(duplicate_claim(d, 2), 3);
  EXPECT_EQ(ids(), "b a c c (2) ");
  EXPECT_EQ(d.find("claim")->items[3].find("f")->text, "2");
  EXPECT_EQ(duplicate_claim(d, 9), -1);
  for (int i = 0; i < 4; ++i) EXPECT_TRUE(remove_claim(d, 0));
  EXPECT_EQ(d.find("claim"), nullptr);
}

TEST(Edit, RenamesATermWhereItIsMeant) {
  Node d = read(
      "[[column]]\nid = \"men\"\n[[column.term]]\nname = \"fare\"\n[[column.term]]\nname = \"fuel\"\n"
      "[column.covariance]\nterms = [\"fare\", \"fuel\"]\nlower = [[\"1\"], [\"0\", \"1\"]]\n"
      "[[column.fact]]\nof = \"fare - fuel\"\n[column.means]\nfare = \"3\"\n[column.groups]\nsize = { fare = "
      "3 }\n"
      "[[column]]\nid = \"women\"\n[[column.term]]\nname = \"fare\"\n"
      "[[claim]]\ncolumn = \"men\"\nrestrictions = \"0.5fare = farewell, \\\"fare\\\" = 0\"\nsays = \"fare "
      "matters\"\n"
      "[[claim]]\ncolumn = \"women\"\nrestrictions = \"fare = 0\"\n"
      "[[claim]]\ncolumns = [\"men\", \"women\"]\nrestrictions = \"men.fare = women.fare\"\n");
  EXPECT_FALSE(rename_term(d, 0, 0, "fuel"));
  EXPECT_FALSE(rename_term(d, 0, 0, ""));
  EXPECT_FALSE(rename_term(d, 0, 2, "x"));
  ASSERT_TRUE(rename_term(d, 0, 0, "fare (log)"));
  const auto text = [&](const Path& path) { return find_value(d, path)->text; };
  EXPECT_EQ(text({{"column", 0}, {"term", 0}, {"name"}}), "fare (log)");
  EXPECT_EQ(text({{"column", 0}, {"covariance"}, {"terms", 0}}), "fare (log)");
  EXPECT_EQ(text({{"column", 0}, {"fact", 0}, {"of"}}), "\"fare (log)\" - fuel");
  EXPECT_EQ(text({{"column", 0}, {"means"}, {"fare (log)"}}), "3");
  EXPECT_EQ(text({{"column", 0}, {"groups"}, {"size"}, {"fare (log)"}}), "3");
  EXPECT_EQ(text({{"column", 1}, {"term", 0}, {"name"}}), "fare");
  EXPECT_EQ(text({{"claim", 0}, {"restrictions"}}), "0.5*\"fare (log)\" = farewell, \"fare (log)\" = 0");
  EXPECT_EQ(text({{"claim", 0}, {"says"}}), "fare matters");
  EXPECT_EQ(text({{"claim", 1}, {"restrictions"}}), "fare = 0");
  EXPECT_EQ(text({{"claim", 2}, {"restrictions"}}), "men.\"fare (log)\" = women.fare");

  ASSERT_TRUE(rename_column(d, 0, "rural men"));
  EXPECT_FALSE(rename_column(d, 0, "women"));
  EXPECT_EQ(text({{"claim", 0}, {"column"}}), "rural men");
  EXPECT_EQ(text({{"claim", 2}, {"columns", 0}}), "rural men");
  EXPECT_EQ(text({{"claim", 2}, {"restrictions"}}), "\"rural men\".\"fare (log)\" = women.fare");
  for (const Problem& problem : read_review(d).problems) ADD_FAILURE() << problem.text();
}

TEST(Edit, RenamesWholeNamesOnly) {
  EXPECT_EQ(renamed_in_restrictions("a = 0, aa = 0, \"a b\" = a", "", "a", "x"),
            "x = 0, aa = 0, \"a b\" = x");
  EXPECT_EQ(renamed_in_restrictions("all, \"all\" = 0", "", "all", "every one"), "all, \"every one\" = 0");
  EXPECT_EQ(renamed_in_restrictions("a.a = b.a", "", "a", "x"), "a.a = b.a");
  EXPECT_EQ(renamed_in_restrictions("a.a = b.a", "a", "a", "x"), "a.x = b.a");
  EXPECT_EQ(renamed_in_restrictions("a = \"open", "", "a", "x"), "a = \"open");
  EXPECT_EQ(column_renamed_in_restrictions("a.a = b.a, a = 0", "a", "x"), "x.a = b.a, a = 0");
}

}  // namespace
}  // namespace rejoinder
