#include "core/review/document.h"

#include <gtest/gtest.h>

#include <random>

namespace rejoinder {
namespace {

Node read(std::string_view text) {
  Result<Node> result = read_document(text);
  EXPECT_TRUE(result.ok()) << text << "\n" << (result.ok() ? "" : result.error().text());
  return result.ok() ? std::move(result).value() : Node::table(false);
}

std::string keys(const Node& table) {
  std::string all;
  for (const Entry& entry : table.entries) all += (all.empty() ? "" : " ") + entry.key;
  return all;
}

// Same content, order and layout.
bool same_layout(const Node& a, const Node& b) {
  if (a.kind != b.kind || a.inline_form != b.inline_form || a.items.size() != b.items.size() ||
      a.entries.size() != b.entries.size())
    return false;
  for (std::size_t i = 0; i < a.items.size(); ++i)
    if (!same_layout(a.items[i], b.items[i])) return false;
  for (std::size_t i = 0; i < a.entries.size(); ++i)
    if (!same_layout(a.entries[i].value, b.entries[i].value)) return false;
  return true;
}

TEST(Document, KeepsTheOrderOfKeysAndTables) {
  const Node d = read(
      "zebra = 1\nape = 2\n\"m n\" = 3\n[[row]]\nz = 1\na = 2\n[[row]]\n[row.y]\nb=1\n[row.c]\n[apart]\n");
  EXPECT_EQ(keys(d), "zebra ape m n row apart");
  ASSERT_EQ(d.find("row")->items.size(), 2u);
  EXPECT_EQ(keys(d.find("row")->items[0]), "z a");
  EXPECT_EQ(keys(d.find("row")->items[1]), "y c");
}

TEST(Document, KeepsTheSpellingOfUnquotedValues) {
  const char* spellings[] = {"1_000",
                             "+7",
                             "0x1F",
                             "0o17",
                             "0b101",
                             "1.50",
                             "-0.0",
                             "6.02e+23",
                             "1E-07",
                             "inf",
                             "-inf",
                             "+nan",
                             "true",
                             "false",
                             "1979-05-27",
                             "07:32:00.500",
                             "1979-05-27T07:32:00Z",
                             "1979-05-27 07:32:00-08:00",
                             "1979-05-27t00:32:00.999999",
                             "0",
                             "-17",
                             "3.0"};
  for (const char* spelling : spellings) {
    SCOPED_TRACE(spelling);
    EXPECT_TRUE(is_literal(spelling));
    for (const std::string& text :
         {"a = " + std::string(spelling) + "\n", "\"\xC3\xA9\" = 1\na=" + std::string(spelling) + " # x",
          "b = [\"\xCE\xB2\", " + std::string(spelling) + "]\na = " + std::string(spelling)}) {
      const Node d = read(text);
      ASSERT_TRUE(d.find("a"));
      EXPECT_EQ(d.find("a")->kind, Node::Kind::Literal);
      EXPECT_EQ(d.find("a")->text, spelling);
      if (const Node* b = d.find("b")) {
        EXPECT_EQ(b->items[1].text, spelling);
      }
      EXPECT_EQ(read(write_document(d)), d);
    }
  }
  for (const char* text : {"", "x", "01", "1.", ".5", "1__0", "_1", "1e", "--1", "0x", "0xG", "1979-05",
                           "07:32", "true ", "1 2", "(0.5)", "0.5*", "1979-05-27T"})
    EXPECT_FALSE(is_literal(text)) << text;
}

TEST(Document, NotesLines) {
  const Node d = read("a = 1\n\n[[column]]\nid = \"x\"\n  [[column.term]]\n  name = \"fare\"\n");
  EXPECT_EQ(d.find("column")->items[0].place.line, 3);
  EXPECT_EQ(d.find("column")->items[0].find("id")->place.line, 4);
  const Node& term = d.find("column")->items[0].find("term")->items[0];
  EXPECT_EQ(term.place.line, 5);
  EXPECT_EQ(term.entries[0].place.line, 6);
  EXPECT_EQ(term.entries[0].place.column, 3);
}

TEST(Document, WritesHeadersAndInlineFormsAsTheyWere) {
  const char* text =
      "rejoinder = 1\n"
      "title = \"A \\\"study\\\"\"\n"
      "stars = [\"0.10\", \"0.05\"]\n"
      "\n"
      "[[column]]\n"
      "id = \"full\"\n"
      "\n"
      "[[column.term]]\n"
      "name = \"fuel price\"\n"
      "extra = { b = 1, a = [{ x = 2 }] }\n"
      "\n"
      "[column.covariance]\n"
      "terms = [\"a\", \"b\", \"c\"]\n"
      "lower = [\n  [\"1\"],\n  [\"2\", \"3\"],\n  [\"\", \"5\", \"6\"]\n]\n"
      "\n"
      "[column.means]\n"
      "\"fuel price\" = \"142.3\"\n"
      "\n"
      "[[claim]]\n"
      "restricted_fit = { r2 = \"0.471\" }\n";
  EXPECT_EQ(write_document(read(text)), text);
}

// Every text that the library accepts comes back with the same content after one writing, and the second
// writing is letter for letter the first.
TEST(Document, SurvivesWritingWhateverTheLayout) {
  const char* texts[] = {
      "",
      "# only a comment\n",
      "a.b = 1\nc = 2\na.d = 3\n",
      "a.x = 1\nc = 2\n[a.sub]\ny = 3\n[[a.list]]\nz = 1\n[[a.list]]\n",
      "[t]\na.b = 1\nc = 2\n",
      "[t]\nc = 2\na.b.c = 1\n",
      "[a.b.c]\nx = 1\n[a]\ny = 2\n",
      "[a]\n[b.c]\n[b]\n",
      "[[a]]\n[a.b]\nx = 1\n[[a]]\n[[a.c]]\ny = 1\n[[a.c]]\n[a.c.d]\nz = {}\n",
      "p = [[1, 2], [\"a\"], []]\nq = [{a = 1}, {b.c = 2}]\nr = {}\ns = []\n",
      "[[one]]\n",
      "\"\" = 1\n\"a.b\" = 2\n'c \"d\"'.e = 3\n\"\\u00e9\\n\" = 4\n",
      "m = \"\"\"\na\nb \\\n   c\"\"\"\nl = '''x\\y\n'''\nq = \"\"\"\"q\"\"\"\"\n",
      "\xEF\xBB\xBFx = 1.50\r\ny = \"\\u0001\\u007f\\t\"\r\n",
      "[a]\n[a.b]\n[a.b.c]\n[d]\ne.f = {g = 1}\n",
      "x = [\n 1,\n 2, # two\n]\n",
  };
  for (const char* text : texts) {
    SCOPED_TRACE(text);
    const Node d = read(text);
    const std::string written = write_document(d);
    const Node again = read(written);
    EXPECT_EQ(again, d) << written;
    EXPECT_EQ(write_document(again), written);
  }
}

Node random_value(std::mt19937& random, int depth, bool header_allowed);

Node random_table(std::mt19937& random, int depth, bool inline_form) {
  const char* names[] = {"a",        "b",    "id", "fuel price", "",    "x.y", "q\"r",
                         "\xC3\xA9", "term", "1",  "-",          "t\n", "\\"};
  Node table = Node::table(inline_form);
  const int count = static_cast<int>(random() % 5);
  for (int i = 0; i < count; ++i) {
    const char* name = names[random() % std::size(names)];
    // Straight into the entries, so that headers may stand before plain keys.
    if (!table.find(name)) table.entries.push_back({name, random_value(random, depth - 1, !inline_form), {}});
  }
  return table;
}

Node random_value(std::mt19937& random, int depth, bool header_allowed) {
  const char* texts[] = {"",         "0.50",  "\xE2\x88\x92.040", "a\"b\\c", "line\nbreak\r\n",
                         "\x01\x7F", "1_000", "\xF0\x9F\x8C\x8A", "'''",     "true"};
  const char* literals[] = {"1", "0.50", "true", "inf", "1e-07", "1979-05-27", "-0x0"};
  switch (random() % (depth > 0 ? 5 : 2)) {
    case 0:
      return Node::quoted(texts[random() % std::size(texts)]);
    case 1:
      return Node::literal(literals[random() % 6]);
    case 2:
      return random_table(random, depth, !header_allowed || random() % 3 == 0);
    case 3: {
      Node list = Node::list();
      const int count = static_cast<int>(random() % 4);
      for (int i = 0; i < count; ++i) list.items.push_back(random_value(random, depth - 1, false));
      return list;
    }
    default: {
      Node list = Node::list();
      list.inline_form = !header_allowed || random() % 3 == 0;
      const int count = static_cast<int>(random() % 3);
      for (int i = 0; i < count; ++i) list.items.push_back(random_table(random, depth - 1, list.inline_form));
      return list;
    }
  }
}

// Checked: reading undoes writing for trees of any order and layout.
TEST(Document, ReadingUndoesWriting) {
  std::mt19937 random(41);
  for (int round = 0; round < 5000; ++round) {
    const Node d = random_table(random, 4, false);
    const std::string text = write_document(d);
    const Result<Node> again = read_document(text);
    ASSERT_TRUE(again.ok()) << again.error().text() << "\n" << text;
    ASSERT_EQ(again.value(), d) << text;
    // What has been read keeps its layout too, from the first writing on.
    const std::string second = write_document(again.value());
    ASSERT_EQ(second, write_document(read(second)));
    ASSERT_TRUE(same_layout(read(second), read(write_document(read(second)))));
  }
}

TEST(Document, WritesOnlyWhatCanBeReadAgain) {
  Node d = Node::table(false);
  d.set("number", Node::literal("0,5"));
  d.set("bytes", Node::quoted("a\xFF\xED\xA0\x80"
                              "b\xC3"));
  const Node again = read(write_document(d));
  EXPECT_EQ(*again.find("number"), Node::quoted("0,5"));
  EXPECT_EQ(again.find("bytes")->text,
            "a\xEF\xBF\xBD\xEF\xBF\xBD\xEF\xBF\xBD\xEF\xBF\xBD"
            "b\xEF\xBF\xBD");
}

TEST(Node, SetPutsPlainKeysBeforeHeaders) {
  Node d = read("a = 1\n[[term]]\nx = 1\n[covariance]\n");
  d.set("b", Node::quoted("2"));
  d.set("a", Node::quoted("3"));
  Node fact = Node::list({Node::table(false)});
  fact.inline_form = false;
  d.set("fact", fact);
  EXPECT_EQ(keys(d), "a b term covariance fact");
  EXPECT_EQ(d.find("a")->text, "3");
  EXPECT_TRUE(d.erase("term"));
  EXPECT_FALSE(d.erase("term"));
  EXPECT_EQ(d.find("term"), nullptr);
}

TEST(Document, SaysWhereAndHowToMend) {
  const struct {
    const char* text;
    const char* message;
  } rows[] = {
      {"a = 1\nr2 = .482\n",
       "line 2, column 6: the number .482 cannot be read without quotes; write it as printed, in quotes: "
       "\".482\""},
      {"se = (0.052)\n",
       "line 1, column 6: the number (0.052) cannot be read without quotes; write it as printed, in quotes: "
       "\"(0.052)\""},
      {"p = <0.001\n",
       "line 1, column 5: the number <0.001 cannot be read without quotes; write it as printed, in quotes: "
       "\"<0.001\""},
      {"coef = 0.13**\n",
       "line 1, column 12: the number 0.13** cannot be read without quotes; write it as printed, in quotes: "
       "\"0.13**\""},
      {"n = 007\n",
       "line 1, column 8: the number 007 cannot be read without quotes; write it as printed, in quotes: "
       "\"007\""},
      {"title = Ferry study\n",
       "line 1, column 9: the text Ferry study stands without quotes; write it in double quotes: \"Ferry "
       "study\""},
      {"fuel price = \"1\"\n",
       "line 1, column 6: this line is no key with a value; write key = \"value\"; keys with blanks or signs "
       "stand in double quotes"},
      {"id = \"a\"\nn = 1\nid = \"b\"\n",
       "line 3, column 1: this key is there already; keep one of the two; a further column, term or claim "
       "begins with its own [[header]]"},
      {"[a]\n[b]\n[a]\n",
       "line 3, column 1: this table is there already; give each table one header; [[column]], in two "
       "brackets, lists several"},
      {"a = \"x\nb = 1\n",
       "line 1, column 5: the quote or bracket that opens here is not closed; close it where the value ends"},
      {"a = [1, 2\nb = 1\n",
       "line 2, column 1: a comma or a closing bracket is missing; put a comma between values and close each "
       "bracket"},
      {"x = 1\na = [1, 2",
       "line 2, column 5: the quote or bracket that opens here is not closed; close it where the value ends"},
      {"a = \"\"\"x\n\n",
       "line 1, column 5: the quote or bracket that opens here is not closed; close it where the value ends"},
      {"a = [1}\n",
       "line 1, column 7: this bracket closes one of the other kind; close [ with ] and { with }"},
      {"x = 1\ntitle = \xC3\x9C"
       "berfahrt\n",
       "line 2, column 9: the text \xC3\x9C"
       "berfahrt stands without quotes; write it in double quotes: \"\xC3\x9C"
       "berfahrt\""},
      {"coef = \xE2\x88\x92"
       "0.040\n",
       "line 1, column 8: the number \xE2\x88\x92"
       "0.040 cannot be read without quotes; write it as printed, in quotes: "
       "\"\xE2\x88\x92"
       "0.040\""},
      {"r\xC3\xA9"
       "coupe = 1\n",
       "line 1, column 2: this line is no key with a value; write key = \"value\"; keys with blanks or signs "
       "stand in double "
       "quotes"},
      {"x = 1\n[= 2\n",
       "line 2, column 1: this header cannot be read; write [table] or [[list]], names with blanks in double "
       "quotes, "
       "alone on its line"},
      {"a = \"\\d\"\n",
       "line 1, column 7: a backslash in a quoted text begins an unknown sign; write a backslash twice: "
       "\\\\"},
      {"a = \"\xFF\"\n", "line 1, column 6: a byte that is no character; save the file as UTF-8"},
      {"a =\n",
       "line 1, column 4: a value is missing or cannot be read; put text and printed numbers in double "
       "quotes: se = \"0.052\""},
      {"= 1\n",
       "line 1, column 1: this line is no key with a value; write key = \"value\"; keys with blanks or signs "
       "stand in double quotes"},
      {"just words\n",
       "line 1, column 6: this line is no key with a value; write key = \"value\"; keys with blanks or signs "
       "stand in double quotes"},
      {"[column\nid = 1\n",
       "line 1, column 8: this header cannot be read; write [table] or [[list]], names with blanks in double "
       "quotes, alone on its line"},
  };
  for (const auto& row : rows) {
    SCOPED_TRACE(row.text);
    const Result<Node> d = read_document(row.text);
    ASSERT_FALSE(d.ok());
    EXPECT_EQ(d.error().text(), row.message);
  }
}

TEST(Document, RefusesWhatIsTooDeepOrTooLarge) {
  const auto repeat = [](const std::string& piece, int times) {
    std::string all;
    for (int i = 0; i < times; ++i) all += piece;
    return all;
  };
  EXPECT_TRUE(read_document("a = " + repeat("[", 60) + repeat("]", 60)).ok());
  EXPECT_TRUE(read_document(repeat("a.", 60) + "a = 1").ok());
  for (const std::string& text : {"a = " + repeat("[", 70) + repeat("]", 70), repeat("a.", 70) + "a = 1",
                                  repeat("a.", 1000000) + "a = 1", "[" + repeat("a.", 1000000) + "a]\n",
                                  "a = " + repeat("{a.b.c = ", 40) + "1" + repeat("}", 40),
                                  "[" + repeat("a.", 40) + "a]\nx = " + repeat("[", 40) + repeat("]", 40)}) {
    const Result<Node> d = read_document(text);
    ASSERT_FALSE(d.ok()) << text.substr(0, 60);
    EXPECT_EQ(d.error().what, "tables, lists or dotted keys stand more than 64 deep");
  }
  EXPECT_FALSE(read_document(std::string(5 << 20, '\n')).ok());
  // Long lines and many keys are no trouble.
  std::string wide = "\"\xC3\xA9\" = [";
  for (int i = 0; i < 50000; ++i) wide += "0.5, ";
  const Node d = read(wide + "]");
  EXPECT_EQ(d.entries[0].value.items.size(), 50000u);
  EXPECT_EQ(d.entries[0].value.items[49999].text, "0.5");
}

}  // namespace
}  // namespace rejoinder
