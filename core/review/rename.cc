#include <optional>

#include "core/algebra/tokens.h"
#include "core/review/edit.h"

namespace rejoinder {
namespace {

using Kind = Token::Kind;

bool is_within(const Node* list, int index) {
  return list && list->kind == Node::Kind::List && index >= 0 && index < static_cast<int>(list->items.size());
}

std::string text_of(const Node& table, std::string_view key) {
  const Node* value = table.find(key);
  return value ? value->text : "";
}

bool lists(const Node& table, std::string_view key, std::string_view text) {
  const Node* list = table.find(key);
  if (!list) return false;
  for (const Node& item : list->items)
    if (item.text == text) return true;
  return false;
}

void replace_text(Node* value, std::string_view from, std::string_view to) {
  if (!value) return;
  if (value->text == from && (value->kind == Node::Kind::Text || value->kind == Node::Kind::Literal)) {
    const Place place = value->place;
    *value = Node::quoted(std::string(to));
    value->place = place;
  }
  for (Node& item : value->items) replace_text(&item, from, to);
}

void replace_key(Node* table, std::string_view from, std::string_view to) {
  if (!table || table->kind != Node::Kind::Table || table->find(to)) return;
  for (Entry& entry : table->entries)
    if (entry.key == from) entry.key = to;
}

// Copies the text, with the pieces that `replacement` answers for put in place of the tokens they stand for.
template <class Replacement>
std::string rewritten(std::string_view text, Replacement replacement) {
  const Result<std::vector<Token>> read = read_tokens(text);
  if (!read.ok()) return std::string(text);
  const std::vector<Token>& tokens = read.value();
  std::string result;
  std::size_t copied = 0;
  for (std::size_t i = 0; i < tokens.size(); ++i) {
    const std::optional<std::string> name = replacement(tokens, i);
    if (!name) continue;
    result += text.substr(copied, tokens[i].begin - copied);
    // "0.5a" must not become "0.5e1", nor a name run into the word before it.
    const bool glued = !result.empty() && tokens[i].begin > 0 && i > 0 &&
                       tokens[i - 1].kind == Kind::Number && !tokens[i].after_blank;
    result += (glued ? "*" : "") + *name;
    copied = tokens[i].end;
  }
  return result + std::string(text.substr(copied));
}

bool is_dot(const std::vector<Token>& tokens, std::size_t i) {
  return i < tokens.size() && tokens[i].kind == Kind::Dot;
}

}  // namespace

std::string renamed_in_restrictions(std::string_view restrictions, std::string_view column,
                                    std::string_view from, std::string_view to) {
  return rewritten(
      restrictions, [&](const std::vector<Token>& tokens, std::size_t i) -> std::optional<std::string> {
        const Token& token = tokens[i];
        if (token.kind != Kind::Name || token.text != from || is_dot(tokens, i + 1)) return std::nullopt;
        const bool with_column = i >= 2 && is_dot(tokens, i - 1) && tokens[i - 2].kind == Kind::Name;
        if (column.empty() ? with_column : !with_column || tokens[i - 2].text != column) return std::nullopt;
        if (!with_column && !token.quoted && token.text == "all")
          return std::nullopt;  // the word, not a name
        return written_name(to);
      });
}

std::string column_renamed_in_restrictions(std::string_view restrictions, std::string_view from,
                                           std::string_view to) {
  return rewritten(restrictions,
                   [&](const std::vector<Token>& tokens, std::size_t i) -> std::optional<std::string> {
                     if (tokens[i].kind != Kind::Name || tokens[i].text != from || !is_dot(tokens, i + 1))
                       return std::nullopt;
                     return written_name(to);
                   });
}

bool rename_term(Node& document, int column, int term, std::string_view new_name) {
  Node* columns = document.find("column");
  if (new_name.empty() || !is_within(columns, column)) return false;
  Node& own = columns->items[column];
  Node* terms = own.find("term");
  if (!is_within(terms, term)) return false;
  const std::string old_name = text_of(terms->items[term], "name");
  if (old_name == new_name) return true;
  for (const Node& other : terms->items)
    if (text_of(other, "name") == new_name) return false;
  terms->items[term].set("name", Node::quoted(std::string(new_name)));
  if (old_name.empty()) return true;

  for (const char* key : {"covariance", "correlation"})
    if (Node* table = own.find(key)) replace_text(table->find("terms"), old_name, new_name);
  replace_key(own.find("means"), old_name, new_name);
  if (Node* groups = own.find("groups")) replace_key(groups->find("size"), old_name, new_name);
  const auto rename_in = [&](Node* value, std::string_view in_column) {
    if (value && value->kind == Node::Kind::Text)
      value->text = renamed_in_restrictions(value->text, in_column, old_name, new_name);
  };
  if (Node* facts = own.find("fact"))
    for (Node& fact : facts->items)
      for (const char* key : {"of", "restrictions"}) rename_in(fact.find(key), "");
  const std::string id = text_of(own, "id");
  if (Node* claims = document.find("claim"))
    for (Node& claim : claims->items) {
      if (text_of(claim, "column") == id) rename_in(claim.find("restrictions"), "");
      if (!id.empty() && lists(claim, "columns", id)) rename_in(claim.find("restrictions"), id);
    }
  return true;
}

bool rename_column(Node& document, int column, std::string_view new_id) {
  Node* columns = document.find("column");
  if (new_id.empty() || !is_within(columns, column)) return false;
  const std::string old_id = text_of(columns->items[column], "id");
  if (old_id == new_id) return true;
  for (const Node& other : columns->items)
    if (text_of(other, "id") == new_id) return false;
  columns->items[column].set("id", Node::quoted(std::string(new_id)));
  if (old_id.empty()) return true;
  if (Node* claims = document.find("claim"))
    for (Node& claim : claims->items) {
      if (Node* text = claim.find("restrictions");
          text && text->kind == Node::Kind::Text && lists(claim, "columns", old_id))
        text->text = column_renamed_in_restrictions(text->text, old_id, new_id);
      for (const char* key : {"column", "restricted", "pooled", "columns", "parts"})
        replace_text(claim.find(key), old_id, new_id);
    }
  return true;
}

}  // namespace rejoinder
