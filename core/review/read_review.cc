#include <algorithm>
#include <map>

#include "core/review/read_parts.h"

namespace rejoinder {
namespace {

constexpr int kFormatVersion = 1;

// Decimal mark and rounding come first, as they decide how everything else is read.
void read_conventions(const Section& top, Review& review, Reading& reading) {
  review.decimal = top.word<char>("decimal", {{".", '.'}, {",", ','}}).value_or('.');
  review.rounding = top.word<Rounding>("rounding", {{"nearest", Rounding::Nearest},
                                                    {"truncated", Rounding::Truncated},
                                                    {"unknown", Rounding::Unknown}})
                        .value_or(Rounding::Nearest);
  reading.how.decimal = review.decimal;
  reading.how.rounding = review.rounding;
  review.level = top.share("level").value_or(0.05);
  if (const Node* list = top.list("stars")) {
    std::vector<double> levels;
    bool sound = true;
    for (const Node& item : list->items) {
      const std::optional<double> level = top.share(item, "stars");
      sound = sound && level;
      if (level) levels.push_back(*level);
    }
    for (std::size_t i = 1; i < levels.size(); ++i)
      if (sound && levels[i] >= levels[i - 1]) {
        sound = false;
        top.problem("stars", "more stars stand for smaller levels",
                    "write the level of one star first: [\"0.10\", \"0.05\", \"0.01\"]");
      }
    if (sound) review.stars = levels;
  }
}

void check_version(const Section& top) {
  const Node* version = top.table().find("rejoinder");
  if (!version) return;
  const std::optional<long> number = top.count(*version, "rejoinder");
  if (number && *number > kFormatVersion)
    top.problem("rejoinder",
                "this review was written for version " + std::to_string(*number) +
                    " of the format; version 1 is read here",
                "what is new in it is kept in the file but not used");
}

// A second "full" becomes "full (2)", so that ids are unique in what has been read.
template <class Item>
void keep_ids_apart(const Section& top, const char* kind_text, std::vector<Item>& items) {
  const std::string kind = kind_text;
  std::map<std::string, int> uses;
  for (const Item& item : items) uses.emplace(item.id, 0);
  for (Item& item : items) {
    int& use = uses[item.id];
    if (++use == 1) continue;
    std::string id;
    do {
      id = item.id + " (" + std::to_string(use++) + ")";
    } while (uses.count(id));
    --use;
    uses.emplace(id, 1);
    top.problem(item.place.line, kind + " \"" + item.id + "\" / id",
                "this id is taken by another " + kind + "; here it is read as \"" + id + "\"",
                "give each " + kind + " its own id");
    item.id = id;
  }
}

}  // namespace

const Term* Column::term(std::string_view name) const {
  for (const Term& term : terms)
    if (term.name == name) return &term;
  return nullptr;
}

const Column* Review::column(std::string_view id) const {
  for (const Column& column : columns)
    if (column.id == id) return &column;
  return nullptr;
}

std::string Problem::text() const {
  std::string where = line > 0 ? "line " + std::to_string(line) : "";
  if (!key.empty()) where += (where.empty() ? "" : ", ") + key;
  return Error{where, what, mend}.text();
}

Review read_review(const Node& document) {
  Review review;
  Reading reading{{}, review.problems};
  const Section top(document, "", reading);
  if (document.kind != Node::Kind::Table) {
    top.problem("", "this is no table", "a review is a file of keys and [[column]] and [[claim]] tables");
    return review;
  }
  top.mention_near_misses({"rejoinder", "title", "note", "level", "stars", "decimal", "rounding", "column",
                           "source", "variables", "claim", "observations", "extract", "round"});
  check_version(top);
  read_conventions(top, review, reading);
  review.title = top.text("title");
  review.note = top.text("note");

  for (const Node* column : top.tables("column"))
    review.columns.push_back(read_column(top, *column, static_cast<int>(review.columns.size()) + 1));
  keep_ids_apart(top, "column", review.columns);
  review.observations = top.count("observations");
  for (const Node* source : top.tables("source")) {
    review.sources.push_back(read_source(top, *source, static_cast<int>(review.sources.size()) + 1));
    // Also accepted on a line of the table itself.
    if (!review.observations && source->find("observations"))
      review.observations = Section(*source, "source", reading).count("observations");
  }
  if (const Node* variables = top.inner_table("variables"))
    review.variables = read_variables(top, *variables);
  for (const Node* claim : top.tables("claim"))
    review.claims.push_back(read_claim(top, *claim, static_cast<int>(review.claims.size()) + 1));
  keep_ids_apart(top, "claim", review.claims);
  const KnownNames known(review);
  for (const Claim& claim : review.claims) check_names(top, known, claim);

  std::stable_sort(review.problems.begin(), review.problems.end(),
                   [](const Problem& a, const Problem& b) { return a.line < b.line; });
  return review;
}

}  // namespace rejoinder
