#include "core/review/document_scan.h"

#include <algorithm>

namespace rejoinder {
namespace {

// Whether a key, the end of the header, or after the first bracket a second one, follows the bracket at `at`.
bool begins_header(std::string_view text, std::size_t at, bool second) {
  const std::size_t next = text.find_first_not_of(" \t", at + 1);
  if (next == std::string_view::npos) return true;
  const char c = text[next];
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9') || c == '_' || c == '-' ||
         c == '"' || c == '\'' || c == ']' || (c == '[' && !second);
}

}  // namespace

DocumentScan scan_document(std::string_view text, int deepest) {
  struct Level {
    std::size_t at = 0;  // byte of its bracket
    int key_parts = 0;   // of the key whose value is being read
  };
  using Stop = DocumentScan::Stop;
  DocumentScan scan;
  const auto stop = [&](Stop why, std::size_t at) {
    scan.stop = why;
    scan.at = at;
    return scan;
  };
  std::vector<Level> levels(1);
  int depth = 0;  // of everything but the dots of the key being read
  int header_depth = 0;
  int dots = 0;  // since the last sign that ends a key
  bool header = false, line_begins = true;
  const auto end_key = [&](int key_parts) {
    depth += key_parts - levels.back().key_parts;
    levels.back().key_parts = key_parts;
    dots = 0;
  };
  for (std::size_t i = 0; i < text.size(); ++i) {
    const char c = text[i];
    if (c == '#') {
      while (i + 1 < text.size() && text[i + 1] != '\n') ++i;
      continue;
    }
    if (c == '"' || c == '\'') {
      const std::size_t begin = i;
      const bool block = text.substr(i, 3) == std::string(3, c);
      i += block ? 3 : 1;
      bool closed = false;
      for (; i < text.size(); ++i) {
        if (c == '"' && text[i] == '\\') {
          ++i;
          continue;
        }
        if (!block && text[i] == '\n') break;
        if (text[i] != c || (block && text.substr(i, 3) != std::string(3, c))) continue;
        closed = true;
        if (block) {
          // Up to two quotes may stand before the three that close.
          i += 2;
          while (i + 1 < text.size() && text[i + 1] == c) ++i;
        }
        break;
      }
      if (!closed) {
        scan.open = begin;
        return scan;
      }
      line_begins = false;
      continue;
    }
    switch (c) {
      case '.':
        ++dots;
        break;
      case '=':
        end_key(dots + 1);
        break;
      case ',':
        end_key(0);
        break;
      case '\n':
        if (levels.size() == 1) {
          end_key(0);
          header = false;
        }
        line_begins = true;
        break;
      case '[':
        if (levels.size() == 1 && (line_begins || header)) {
          if (!begins_header(text, i, header)) {
            return stop(Stop::NoKey, i);
          }
          header = true;
          depth -= header_depth;
          header_depth = 0;
          dots = 0;
          break;
        }
        [[fallthrough]];
      case '{':
        levels.push_back({i, 0});
        ++depth;
        dots = 0;
        break;
      case ']':
        if (header && levels.size() == 1) {
          if (header_depth == 0) depth += header_depth = dots + 1;
          dots = 0;
          break;
        }
        [[fallthrough]];
      case '}':
        if (levels.size() > 1) {
          if ((text[levels.back().at] == '[') != (c == ']')) return stop(Stop::Bracket, i);
          depth -= levels.back().key_parts + 1;
          levels.pop_back();
        }
        dots = 0;
        break;
      default:
        if (static_cast<unsigned char>(c) >= 0x80) return stop(Stop::NotAscii, i);
    }
    if (c != '\n' && c != ' ' && c != '\t' && c != '\r') line_begins = false;
    if (depth + dots > deepest) {
      return stop(Stop::TooDeep, i);
    }
  }
  if (levels.size() > 1) scan.open = levels.back().at;
  return scan;
}

Places::Places(std::string_view text) : text_(text) {
  const bool ascii =
      std::all_of(text.begin(), text.end(), [](char c) { return static_cast<unsigned char>(c) < 0x80; });
  if (!ascii) characters_.reserve(text.size());
  lines_.push_back(0);
  line_characters_.push_back(0);
  std::uint32_t characters = 0;
  for (std::size_t i = 0; i < text.size(); ++i) {
    if ((static_cast<unsigned char>(text[i]) & 0xC0) != 0x80) {
      if (!ascii) characters_.push_back(static_cast<std::uint32_t>(i));
      ++characters;
    }
    if (text[i] == '\n') {
      lines_.push_back(static_cast<std::uint32_t>(i + 1));
      line_characters_.push_back(characters);
    }
  }
}

std::size_t Places::byte_at(int line, int column) const {
  if (line < 1 || column < 1 || line > static_cast<int>(lines_.size())) return text_.size();
  const std::size_t character = line_characters_[line - 1] + static_cast<std::size_t>(column) - 1;
  if (characters_.empty()) return std::min(character, text_.size());
  return character < characters_.size() ? characters_[character] : text_.size();
}

Place Places::place_of(std::size_t byte) const {
  const auto next = std::upper_bound(lines_.begin(), lines_.end(), byte);
  const std::size_t line = static_cast<std::size_t>(next - lines_.begin());
  int column = 1;
  for (std::size_t i = lines_[line - 1]; i < byte && i < text_.size(); ++i)
    if ((static_cast<unsigned char>(text_[i]) & 0xC0) != 0x80) ++column;
  return {static_cast<int>(line), column};
}

std::string_view Places::line(int line) const {
  if (line < 1 || line > static_cast<int>(lines_.size())) return {};
  std::string_view rest = text_.substr(lines_[line - 1]);
  rest = rest.substr(0, rest.find('\n'));
  if (!rest.empty() && rest.back() == '\r') rest.remove_suffix(1);
  return rest;
}

}  // namespace rejoinder
