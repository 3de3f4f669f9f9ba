#include "core/review/fields.h"

#include <algorithm>
#include <cctype>

namespace rejoinder {
namespace {

using Kind = Node::Kind;

const char* kind_in_words(const Node& node) {
  switch (node.kind) {
    case Kind::Text:
      return "a text";
    case Kind::Literal:
      return "a single value";
    case Kind::List:
      return "a list";
    case Kind::Table:
      return "a table";
  }
  return "a value";
}

bool is_single(const Node& node) { return node.kind == Kind::Text || node.kind == Kind::Literal; }

bool is_blank(std::string_view text) { return text.find_first_not_of(" \t\r\n") == std::string_view::npos; }

// Letters to change, add, leave out or swap with a neighbour until the one word is the other.
int letters_apart(std::string_view a, std::string_view b) {
  std::vector<std::vector<int>> d(a.size() + 1, std::vector<int>(b.size() + 1));
  for (std::size_t i = 0; i <= a.size(); ++i) d[i][0] = static_cast<int>(i);
  for (std::size_t j = 0; j <= b.size(); ++j) d[0][j] = static_cast<int>(j);
  for (std::size_t i = 1; i <= a.size(); ++i)
    for (std::size_t j = 1; j <= b.size(); ++j) {
      d[i][j] = std::min({d[i - 1][j] + 1, d[i][j - 1] + 1, d[i - 1][j - 1] + (a[i - 1] != b[j - 1])});
      if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
        d[i][j] = std::min(d[i][j], d[i - 2][j - 2] + 1);
    }
  return d[a.size()][b.size()];
}

}  // namespace

Section::Section(const Node& table, std::string words, Reading& reading, std::string claim)
    : table_(table), words_(std::move(words)), reading_(reading), claim_(std::move(claim)) {}

Section Section::inner(const Node& table, const std::string& words) const {
  return Section(table, words_.empty() ? words : words_ + " / " + words, reading_, claim_);
}

// An empty text is a cell that nobody has filled yet.
const Node* Section::filled(std::string_view key) const {
  const Node* value = table_.find(key);
  return value && value->kind == Kind::Text && is_blank(value->text) ? nullptr : value;
}

void Section::problem(std::string_view key, std::string what, std::string mend) const {
  const Node* value = table_.find(key);
  problem(value && value->place.line > 0 ? value->place.line : table_.place.line, key, std::move(what),
          std::move(mend));
}

void Section::problem(int line, std::string_view key, std::string what, std::string mend) const {
  std::string place = words_;
  if (!key.empty()) place += (place.empty() ? "" : " / ") + std::string(key);
  reading_.problems.push_back({line, std::move(place), std::move(what), std::move(mend), claim_});
}

Printed Section::printed(std::string_view key, const Interval& natural) const {
  const Node* value = filled(key);
  return value ? printed(*value, key, natural) : std::nullopt;
}

Printed Section::printed(const Node& value, std::string_view key, const Interval& natural) const {
  if (value.kind == Kind::Literal) {
    Printed number = exact(value, key, natural);
    if (!number || std::isfinite(number->value)) return number;
    problem(value.place.line, key, "an infinite figure cannot be computed with",
            "leave it out where nothing is printed");
    return std::nullopt;
  }
  if (value.kind != Kind::Text) {
    problem(value.place.line, key,
            std::string(kind_in_words(value)) + " stands where one printed number is expected",
            "write it as printed, in quotes: \"0.131\"");
    return std::nullopt;
  }
  if (is_blank(value.text)) return std::nullopt;
  NumberReading how = reading_.how;
  how.natural = natural;
  Result<PrintedNumber> number = read_printed_number(value.text, how);
  if (number.ok()) return std::move(number).value();
  problem(value.place.line, key, number.error().what, number.error().mend);
  return std::nullopt;
}

Printed Section::exact(const Node& value, std::string_view key, const Interval& natural) const {
  if (!is_single(value)) {
    problem(value.place.line, key, std::string(kind_in_words(value)) + " stands where one number is expected",
            "write one number");
    return std::nullopt;
  }
  if (is_blank(value.text)) return std::nullopt;
  NumberReading how = reading_.how;
  how.natural = natural;
  Result<PrintedNumber> number = read_exact_number(value.text, how);
  if (number.ok()) return std::move(number).value();
  problem(value.place.line, key, number.error().what, number.error().mend);
  return std::nullopt;
}

std::optional<double> Section::share(std::string_view key) const {
  const Node* value = filled(key);
  return value ? share(*value, key) : std::nullopt;
}

std::optional<double> Section::share(const Node& value, std::string_view key) const {
  const Printed number = exact(value, key, kAnyNumber);
  if (!number) return std::nullopt;
  if (number->value > 0 && number->value < 1) return number->value;
  problem(value.place.line, key, value.text + " does not lie between 0 and 1",
          "write 5 percent as 0.05, 95 percent as 0.95");
  return std::nullopt;
}

std::optional<long> Section::count(std::string_view key) const {
  const Node* value = filled(key);
  return value ? count(*value, key) : std::nullopt;
}

std::optional<long> Section::count(const Node& value, std::string_view key) const {
  if (value.kind == Kind::Table && value.find("from")) {
    problem(value.place.line, key,
            "a count between two limits is kept in the file and not used by this version",
            "write the count where it is printed");
    return std::nullopt;
  }
  if (!is_single(value)) {
    problem(value.place.line, key, std::string(kind_in_words(value)) + " stands where one count is expected",
            "write one whole number");
    return std::nullopt;
  }
  if (is_blank(value.text)) return std::nullopt;
  NumberReading how = reading_.how;
  if (value.kind == Kind::Literal) how.decimal = '.';  // TOML's own, whatever the print uses
  const Result<long> number = read_count(value.text, how);
  if (number.ok()) return number.value();
  problem(value.place.line, key, number.error().what, number.error().mend);
  return std::nullopt;
}

std::optional<bool> Section::yes_or_no(std::string_view key) const {
  const Node* value = filled(key);
  if (!value) return std::nullopt;
  if (value->kind == Kind::Literal && (value->text == "true" || value->text == "false"))
    return value->text == "true";
  problem(key, "this is answered by true or false", "write " + std::string(key) + " = true, without quotes");
  return std::nullopt;
}

std::string Section::text(std::string_view key) const {
  const Node* value = table_.find(key);
  return value ? text(*value, key).value_or("") : "";
}

std::optional<std::string> Section::text(const Node& value, std::string_view key) const {
  if (is_single(value)) return value.text;
  problem(value.place.line, key, std::string(kind_in_words(value)) + " stands where one text is expected",
          "write one text in quotes");
  return std::nullopt;
}

std::vector<std::string> Section::texts(std::string_view key) const {
  std::vector<std::string> all;
  const Node* value = filled(key);
  if (!value) return all;
  if (is_single(*value)) return {value->text};
  if (value->kind == Kind::Table) {
    problem(key, "a table stands where a list of names is expected",
            "write them in brackets: [\"fare\", \"fuel price\"]");
    return all;
  }
  for (const Node& item : value->items)
    if (std::optional<std::string> one = text(item, key)) all.push_back(*one);
  return all;
}

const Node* Section::list(std::string_view key) const {
  const Node* value = filled(key);
  if (!value || value->kind == Kind::List) return value;
  problem(key, std::string(kind_in_words(*value)) + " stands where a list is expected",
          "write the values in brackets: [ , ]");
  return nullptr;
}

const Node* Section::inner_table(std::string_view key) const {
  const Node* value = filled(key);
  if (!value || value->kind == Kind::Table) return value;
  problem(key, std::string(kind_in_words(*value)) + " stands where a table is expected",
          "give it a header of its own, or write { key = \"value\" }");
  return nullptr;
}

std::vector<const Node*> Section::tables(std::string_view key) const {
  std::vector<const Node*> all;
  const Node* value = filled(key);
  if (!value) return all;
  if (value->kind != Kind::List) {
    problem(key, std::string(kind_in_words(*value)) + " stands where several tables may follow",
            "write the header in two brackets, [[...]], once for each");
    return all;
  }
  for (const Node& item : value->items) {
    if (item.kind == Kind::Table)
      all.push_back(&item);
    else
      problem(item.place.line, key, std::string(kind_in_words(item)) + " stands where a table is expected",
              "write { key = \"value\" }");
  }
  return all;
}

PrintedPair Section::pair(std::string_view key, const Interval& natural, bool exact_even_in_quotes) const {
  const Node* value = filled(key);
  if (!value) return std::nullopt;
  if (value->kind != Kind::List || value->items.size() != 2) {
    problem(key, "two limits are expected here, low and high",
            "write them in brackets: [\"-0.23\", \"-0.03\"]");
    return std::nullopt;
  }
  std::array<Printed, 2> ends;
  for (int i = 0; i < 2; ++i)
    ends[i] =
        exact_even_in_quotes ? exact(value->items[i], key, natural) : printed(value->items[i], key, natural);
  if (!ends[0] || !ends[1]) return std::nullopt;
  if (ends[0]->value > ends[1]->value) {
    problem(key, "the first limit is above the second", "write the lower limit first");
    return std::nullopt;
  }
  return std::array<PrintedNumber, 2>{*ends[0], *ends[1]};
}

std::optional<int> Section::stars(std::string_view key) const {
  const Node* value = filled(key);
  if (!value) return std::nullopt;
  if (value->kind == Kind::Text) {
    // Stars and daggers alone count as they do behind a number.
    const Result<PrintedNumber> behind = read_printed_number("1" + value->text);
    if (behind.ok() && behind.value().stars > 0 && behind.value().value == 1 &&
        behind.value().relation == Relation::Equal)
      return behind.value().stars;
  }
  if (is_single(*value)) {
    const Result<long> number = read_count(value->text);
    if (number.ok() && number.value() <= 9) return static_cast<int>(number.value());
  }
  problem(key, "this is no number of stars",
          "write stars = 2 or stars = \"**\"; 0 says that none was printed");
  return std::nullopt;
}

void Section::mention_near_misses(std::initializer_list<const char*> known) const {
  if (table_.entries.size() > 200) return;  // no table that a person wrote
  for (const Entry& entry : table_.entries) {
    const std::string_view key = entry.key;
    if (key.size() < 4 || key.size() > 40 || std::find(known.begin(), known.end(), key) != known.end())
      continue;
    for (const char* candidate : known) {
      const std::string_view name = candidate;
      if (name.size() < 4 || table_.find(name)) continue;
      if (letters_apart(key, name) > (name.size() >= 9 ? 2 : 1)) continue;
      problem(entry.place.line, key, "this key is kept in the file but has no meaning here",
              "perhaps " + std::string(name) + " is meant");
      break;
    }
  }
}

std::string Section::lower_case(std::string text) {
  for (char& c : text) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return text;
}

}  // namespace rejoinder
