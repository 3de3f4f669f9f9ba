#include "web/model/document_view.h"

#include <algorithm>

namespace rejoinder {

const Node* rows_of(const Node& table, std::string_view key) {
  if (table.kind != Node::Kind::Table) return nullptr;
  const Node* list = table.find(key);
  return list && list->kind == Node::Kind::List ? list : nullptr;
}

const Node* row_of(const Node& table, std::string_view key, int index) {
  const Node* list = rows_of(table, key);
  if (!list || index < 0 || index >= static_cast<int>(list->items.size())) return nullptr;
  const Node* row = &list->items[static_cast<std::size_t>(index)];
  return row->kind == Node::Kind::Table ? row : nullptr;
}

Node* row_of(Node& table, std::string_view key, int index) {
  return const_cast<Node*>(row_of(static_cast<const Node&>(table), key, index));
}

int count_of(const Node& table, std::string_view key) {
  const Node* list = rows_of(table, key);
  return list ? static_cast<int>(list->items.size()) : 0;
}

std::string shown_text(const Node* value) {
  if (!value) return {};
  std::string text;
  switch (value->kind) {
    case Node::Kind::Text:
    case Node::Kind::Literal:
      return value->text;
    case Node::Kind::List:
      for (const Node& item : value->items) text += (text.empty() ? "" : ", ") + shown_text(&item);
      return text;
    case Node::Kind::Table:
      for (const Entry& entry : value->entries)
        text += (text.empty() ? "" : ", ") + entry.key + " = " + shown_text(&entry.value);
      return text;
  }
  return text;
}

std::string column_text(const Node& document, int column, std::string_view key) {
  const Node* row = row_of(document, "column", column);
  return row ? shown_text(row->find(key)) : std::string();
}

std::string cell_text(const Node& document, const TableCell& cell) {
  if (cell.term < 0) return column_text(document, cell.column, cell.key);
  const Node* column = row_of(document, "column", cell.column);
  const Node* term = column ? row_of(*column, "term", cell.term) : nullptr;
  return term ? shown_text(term->find(cell.key)) : std::string();
}

std::string claim_text(const Node& document, int claim, std::string_view key) {
  const Node* row = row_of(document, "claim", claim);
  if (!row) return {};
  const std::size_t dot = key.find('.');
  if (dot == std::string_view::npos) return shown_text(row->find(key));
  const Node* inner = row->find(key.substr(0, dot));
  return inner && inner->kind == Node::Kind::Table ? shown_text(inner->find(key.substr(dot + 1)))
                                                   : std::string();
}

std::string review_text(const Node& document, std::string_view key) {
  return document.kind == Node::Kind::Table ? shown_text(document.find(key)) : std::string();
}

std::vector<std::string> term_names(const Node& document, int column) {
  std::vector<std::string> names;
  const Node* row = row_of(document, "column", column);
  if (!row) return names;
  for (int i = 0; i < count_of(*row, "term"); ++i) {
    const Node* term = row_of(*row, "term", i);
    names.push_back(term ? shown_text(term->find("name")) : std::string());
  }
  return names;
}

std::vector<std::string> all_term_names(const Node& document) {
  std::vector<std::string> names;
  for (int c = 0; c < count_of(document, "column"); ++c)
    for (std::string& name : term_names(document, c))
      if (std::find(names.begin(), names.end(), name) == names.end()) names.push_back(std::move(name));
  return names;
}

int term_index(const Node& document, int column, std::string_view name) {
  const std::vector<std::string> names = term_names(document, column);
  const auto at = std::find(names.begin(), names.end(), name);
  return at == names.end() ? -1 : static_cast<int>(at - names.begin());
}

std::string second_key(const Node& document) {
  std::string best = "se";
  int most = 0;
  for (const char* key : {"se", "t", "p", "ci"}) {
    int count = 0;
    for (int c = 0; c < count_of(document, "column"); ++c) {
      const Node* column = row_of(document, "column", c);
      for (int i = 0; column && i < count_of(*column, "term"); ++i)
        if (const Node* term = row_of(*column, "term", i)) count += term->find(key) != nullptr;
    }
    if (count > most) {
      most = count;
      best = key;
    }
  }
  return best;
}

int column_of_claim(const Node& document, int claim) {
  const std::string id = claim_text(document, claim, "column");
  for (int c = 0; c < count_of(document, "column"); ++c)
    if (!id.empty() && column_text(document, c, "id") == id) return c;
  return count_of(document, "column") > 0 ? 0 : -1;
}

std::string fresh_id(const Node& document, std::string_view list, const std::string& stem) {
  std::set<std::string> used;
  for (int i = 0; i < count_of(document, list); ++i)
    if (const Node* row = row_of(document, list, i)) used.insert(shown_text(row->find("id")));
  for (int n = count_of(document, list) + 1;; ++n) {
    std::string id = stem + std::to_string(n);
    if (!used.contains(id)) return id;
  }
}

std::string clean_text(std::string_view text, bool lines) {
  std::string clean;
  for (std::size_t at = 0; at < text.size();) {
    const auto byte = static_cast<unsigned char>(text[at]);
    std::size_t length = byte < 0x80                    ? 1
                         : byte >= 0xF0 && byte <= 0xF4 ? 4
                         : byte >= 0xE0                 ? 3
                         : byte >= 0xC2                 ? 2
                                                        : 0;
    if (byte > 0xF4 || at + length > text.size()) length = 0;
    for (std::size_t i = 1; i < length; ++i)
      if ((static_cast<unsigned char>(text[at + i]) & 0xC0) != 0x80) length = 0;
    if (length == 3) {  // overlong forms and lone surrogates
      const auto next = static_cast<unsigned char>(text[at + 1]);
      if ((byte == 0xE0 && next < 0xA0) || (byte == 0xED && next >= 0xA0)) length = 0;
    } else if (length == 4) {
      const auto next = static_cast<unsigned char>(text[at + 1]);
      if ((byte == 0xF0 && next < 0x90) || (byte == 0xF4 && next >= 0x90)) length = 0;
    }
    if (length == 0) {
      clean += "\xEF\xBF\xBD";  // the mark for a character that could not be read
      ++at;
      continue;
    }
    if (byte == '\r') {
      if (at + 1 >= text.size() || text[at + 1] != '\n') clean += lines ? '\n' : ' ';
    } else if (byte == '\n' || byte == '\t') {
      clean += lines ? static_cast<char>(byte) : ' ';
    } else if (byte >= 0x20 && byte != 0x7F) {
      clean.append(text.substr(at, length));
    }
    at += length;
  }
  return clean;
}

}  // namespace rejoinder
