#include "core/review/edit.h"

#include <algorithm>
#include <set>

namespace rejoinder {
namespace {

using Kind = Node::Kind;

// Lists whose items stand under [[headers]], and tables under [headers], when an edit makes them.
bool has_header(const Path& path) {
  const std::string& key = path.back().key;
  static const std::set<std::string, std::less<>> kListsAtTop = {"column", "source", "claim", "extract",
                                                                 "round"};
  static const std::set<std::string, std::less<>> kInColumn = {"term",        "fact",  "covariance",
                                                               "correlation", "means", "groups"};
  if (path.size() == 1) return kListsAtTop.count(key) || key == "variables";
  return path.size() == 2 && path[0].key == "column" && kInColumn.count(key);
}

bool is_whole_number(std::string_view text) {
  return !text.empty() && text.size() <= 9 &&
         text.find_first_not_of("0123456789") == std::string_view::npos &&
         (text.size() == 1 || text[0] != '0');
}

// How `text` is written at `path`.
Node value_for(const Path& path, std::string_view text) {
  static const std::set<std::string, std::less<>> kCounts = {"n",  "k",     "clusters", "fixed_effects",
                                                             "df", "sided", "base",     "observations"};
  static const std::set<std::string, std::less<>> kYesOrNo = {"intercept", "weights", "rejects"};
  const std::string& key = path.back().key;
  const bool means = path.size() >= 2 && path[path.size() - 2].key == "means";
  const bool in_size = path.size() >= 2 && path[path.size() - 2].key == "size";
  const bool count = !means && (kCounts.count(key) || in_size) && is_whole_number(text);
  const bool yes_or_no = !means && !in_size && kYesOrNo.count(key) && (text == "true" || text == "false");
  return count || yes_or_no ? Node::literal(std::string(text)) : Node::quoted(std::string(text));
}

// The list under the last step of `path`, made where it is missing and an item may follow.
Node* list_at(Node& table, const Path& path, bool make) {
  const std::string& key = path.back().key;
  Node* list = table.find(key);
  if (!list && make) {
    Node made = Node::list();
    made.inline_form = !has_header(path);
    if (!made.inline_form) made.items.push_back(Node::table(false));  // takes its place among the headers
    list = &table.set(key, std::move(made));
    list->items.clear();
  }
  return list && list->kind == Kind::List ? list : nullptr;
}

// Follows the path up to `steps` steps, making what is missing.
Node* reach(Node& document, const Path& path, std::size_t steps) {
  Node* here = &document;
  for (std::size_t i = 0; i < steps; ++i) {
    if (here->kind != Kind::Table) return nullptr;
    const Path so_far(path.begin(), path.begin() + static_cast<std::ptrdiff_t>(i) + 1);
    const Step& step = path[i];
    if (step.index >= 0) {
      Node* list = list_at(*here, so_far, true);
      if (!list || step.index > static_cast<int>(list->items.size())) return nullptr;
      if (step.index == static_cast<int>(list->items.size()))
        list->items.push_back(Node::table(list->inline_form));
      here = &list->items[step.index];
    } else {
      Node* inner = here->find(step.key);
      here = inner ? inner : &here->set(step.key, Node::table(!has_header(so_far)));
    }
  }
  return here->kind == Kind::Table ? here : nullptr;
}

bool is_within(const Node* list, int index) {
  return list && list->kind == Kind::List && index >= 0 && index < static_cast<int>(list->items.size());
}

std::string free_name(const Node& document, const char* list_key, const char* name_key,
                      std::string_view wanted) {
  std::set<std::string> taken;
  if (const Node* list = document.find(list_key))
    for (const Node& item : list->items)
      if (const Node* name = item.find(name_key)) taken.insert(name->text);
  std::string name(wanted);
  for (int i = 2; taken.count(name); ++i) name = std::string(wanted) + " (" + std::to_string(i) + ")";
  return name;
}

int add_item(Node& document, const Path& list_path, const char* name_key, std::string_view name) {
  Path path = list_path;
  Node* table = reach(document, path, path.size() - 1);
  if (!table) return -1;
  Node* list = list_at(*table, path, true);
  if (!list) return -1;
  Node item = Node::table(list->inline_form);
  if (name_key) item.set(name_key, Node::quoted(std::string(name)));
  list->items.push_back(std::move(item));
  return static_cast<int>(list->items.size()) - 1;
}

bool has_column(const Node& document, int column) { return is_within(document.find("column"), column); }

}  // namespace

Node* find_value(Node& document, const Path& path) {
  Node* here = &document;
  for (const Step& step : path) {
    here = here->find(step.key);
    if (!here) return nullptr;
    if (step.index < 0) continue;
    if (!is_within(here, step.index)) return nullptr;
    here = &here->items[step.index];
  }
  return here;
}

const Node* find_value(const Node& document, const Path& path) {
  return find_value(const_cast<Node&>(document), path);
}

bool set_node(Node& document, const Path& path, Node value) {
  if (path.empty()) return false;
  Node* table = reach(document, path, path.size() - 1);
  if (!table) return false;
  const Step& last = path.back();
  if (last.index < 0) {
    if (const Node* old = table->find(last.key)) value.place = old->place;
    table->set(last.key, std::move(value));
    return true;
  }
  Node* list = list_at(*table, path, true);
  if (!list || last.index > static_cast<int>(list->items.size())) return false;
  if (last.index == static_cast<int>(list->items.size()))
    list->items.push_back(std::move(value));
  else
    list->items[last.index] = std::move(value);
  return true;
}

bool set_value(Node& document, const Path& path, std::string_view text) {
  if (path.empty()) return false;
  if (text.empty() && path.back().index < 0) {
    const Node* old = find_value(document, path);
    if (old && old->kind != Kind::Text && old->kind != Kind::Literal) return false;
    erase_value(document, path);
    return true;
  }
  return set_node(document, path, value_for(path, text));
}

bool erase_value(Node& document, const Path& path) {
  if (path.empty()) return false;
  const Path parent(path.begin(), path.end() - 1);
  Node* table = find_value(document, parent);
  if (!table || table->kind != Kind::Table) return false;
  const Step& last = path.back();
  if (last.index < 0) return table->erase(last.key);
  Node* list = table->find(last.key);
  if (!is_within(list, last.index)) return false;
  list->items.erase(list->items.begin() + last.index);
  if (list->items.empty() && !list->inline_form) table->erase(last.key);
  return true;
}

int add_column(Node& document, std::string_view id) {
  return add_item(document, {{"column"}}, "id", free_name(document, "column", "id", id));
}

int add_term(Node& document, int column, std::string_view name) {
  if (!has_column(document, column)) return -1;
  const Node& own = document.find("column")->items[column];
  return add_item(document, {{"column", column}, {"term"}}, "name", free_name(own, "term", "name", name));
}

int add_fact(Node& document, int column) {
  return has_column(document, column) ? add_item(document, {{"column", column}, {"fact"}}, nullptr, "") : -1;
}

int add_source(Node& document, std::string_view name) {
  return add_item(document, {{"source"}}, "name", free_name(document, "source", "name", name));
}

int add_claim(Node& document, std::string_view id) {
  return add_item(document, {{"claim"}}, "id", free_name(document, "claim", "id", id));
}

bool remove_column(Node& document, int column) {
  return column >= 0 && erase_value(document, {{"column", column}});
}

bool remove_term(Node& document, int column, int term) {
  return column >= 0 && term >= 0 && erase_value(document, {{"column", column}, {"term", term}});
}

bool remove_claim(Node& document, int claim) {
  return claim >= 0 && erase_value(document, {{"claim", claim}});
}

bool move_item(Node& document, const Path& list_path, int from, int to) {
  Node* list = find_value(document, list_path);
  if (!is_within(list, from) || !is_within(list, to)) return false;
  const auto begin = list->items.begin();
  if (from < to) std::rotate(begin + from, begin + from + 1, begin + to + 1);
  if (to < from) std::rotate(begin + to, begin + from, begin + from + 1);
  return true;
}

bool move_claim(Node& document, int from, int to) { return move_item(document, {{"claim"}}, from, to); }

int duplicate_claim(Node& document, int claim) {
  Node* list = document.find("claim");
  if (!is_within(list, claim)) return -1;
  Node copy = list->items[claim];
  const Node* id = copy.find("id");
  if (id) copy.set("id", Node::quoted(free_name(document, "claim", "id", id->text)));
  list->items.insert(list->items.begin() + claim + 1, std::move(copy));
  return claim + 1;
}

}  // namespace rejoinder
