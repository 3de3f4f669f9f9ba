#include <cstdio>

#include "core/review/document.h"
#include "core/review/utf8.h"

namespace rejoinder {
namespace {

using Kind = Node::Kind;

// Bytes that are no UTF-8 cannot stand in a TOML file; U+FFFD takes their place.
std::string in_quotes(std::string_view text) {
  std::string quoted = "\"";
  for (std::size_t i = 0; i < text.size();) {
    const std::size_t length = character_length(text, i);
    const unsigned char c = static_cast<unsigned char>(text[i]);
    if (length == 0)
      quoted += "\xEF\xBF\xBD";
    else if (length > 1)
      quoted += text.substr(i, length);
    else if (c == '"')
      quoted += "\\\"";
    else if (c == '\\')
      quoted += "\\\\";
    else if (c == '\n')
      quoted += "\\n";
    else if (c == '\t')
      quoted += "\\t";
    else if (c == '\r')
      quoted += "\\r";
    else if (c < 0x20 || c == 0x7F) {
      char escape[8];
      std::snprintf(escape, sizeof escape, "\\u%04X", c);
      quoted += escape;
    } else {
      quoted += static_cast<char>(c);
    }
    i += length == 0 ? 1 : length;
  }
  return quoted + '"';
}

std::string written_key(std::string_view key) {
  const bool bare = !key.empty() && key.find_first_not_of(
                                        "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789_-") ==
                                        std::string_view::npos;
  return bare ? std::string(key) : in_quotes(key);
}

void write_value(const Node& node, std::string& out) {
  switch (node.kind) {
    case Kind::Text:
      out += in_quotes(node.text);
      break;
    case Kind::Literal:
      out += is_literal(node.text) ? node.text : in_quotes(node.text);
      break;
    case Kind::List: {
      // The rows of a triangle stand below each other.
      bool rows = node.items.size() > 2;
      for (const Node& item : node.items) rows = rows && item.kind == Kind::List;
      out += '[';
      for (std::size_t i = 0; i < node.items.size(); ++i) {
        out += i > 0 ? (rows ? "," : ", ") : "";
        if (rows) out += "\n  ";
        write_value(node.items[i], out);
      }
      out += rows ? "\n]" : "]";
      break;
    }
    case Kind::Table: {
      if (node.entries.empty()) {
        out += "{}";
        break;
      }
      out += "{ ";
      for (std::size_t i = 0; i < node.entries.size(); ++i) {
        out += (i > 0 ? ", " : "") + written_key(node.entries[i].key) + " = ";
        write_value(node.entries[i].value, out);
      }
      out += " }";
      break;
    }
  }
}

// a.b = 1: for a table that plain keys of its parent follow.
void write_dotted(const std::string& key, const Node& node, std::string& out) {
  if (node.kind == Kind::Table && !node.inline_form && !node.entries.empty()) {
    for (const Entry& entry : node.entries)
      write_dotted(key + "." + written_key(entry.key), entry.value, out);
    return;
  }
  out += key + " = ";
  write_value(node, out);
  out += '\n';
}

void write_header(const char* open, const std::string& path, const char* close, std::string& out) {
  if (!out.empty()) out += '\n';
  out += open + path + close + '\n';
}

// The keys of a table, then what stands under headers of its own. `path` is empty at the top.
void write_table(const std::string& path, const Node& table, std::string& out) {
  std::size_t headers = table.entries.size();
  while (headers > 0 && takes_header(table.entries[headers - 1].value)) --headers;
  for (std::size_t i = 0; i < headers; ++i)
    write_dotted(written_key(table.entries[i].key), table.entries[i].value, out);
  for (std::size_t i = headers; i < table.entries.size(); ++i) {
    const Node& value = table.entries[i].value;
    const std::string inner = (path.empty() ? "" : path + ".") + written_key(table.entries[i].key);
    if (value.kind == Kind::List) {
      for (const Node& item : value.items) {
        write_header("[[", inner, "]]", out);
        write_table(inner, item, out);
      }
      continue;
    }
    // A table with nothing but tables in it is made by their headers.
    bool only_headers = !value.entries.empty();
    for (const Entry& entry : value.entries) only_headers = only_headers && takes_header(entry.value);
    if (!only_headers) write_header("[", inner, "]", out);
    write_table(inner, value, out);
  }
}

}  // namespace

std::string write_document(const Node& document) {
  std::string out;
  if (document.kind == Kind::Table) write_table("", document, out);
  return out;
}

}  // namespace rejoinder
