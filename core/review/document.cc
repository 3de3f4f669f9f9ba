#include "core/review/document.h"

#include <algorithm>

#include "core/review/document_message.h"
#include "core/review/document_scan.h"
#include "core/review/utf8.h"

// The library states what it takes for granted by assertions, a few of which damaged text breaks; what
// follows in its code then answers properly. So they do nothing here: with NDEBUG they would be promises to
// the compiler instead.
#undef NDEBUG
#define TOML_ASSERT(expression) static_cast<void>(0)
#define TOML_HEADER_ONLY 1
#define TOML_EXCEPTIONS 0
#define TOML_ENABLE_FORMATTERS 0
#define TOML_UNRELEASED_FEATURES 0
#include <toml++/toml.h>

namespace rejoinder {
namespace {

constexpr std::size_t kMostBytes = 4 << 20;
constexpr int kDeepest = 64;

std::string where_of(const Place& place) {
  return "line " + std::to_string(place.line) + ", column " + std::to_string(place.column);
}

Place place_of(const toml::source_region& source) {
  return {static_cast<int>(source.begin.line), static_cast<int>(source.begin.column)};
}

Error scan_message(const DocumentScan& scan, const Places& places) {
  const Place place = places.place_of(scan.at);
  const auto message = [&](std::string_view complaint) {
    Error error = document_message(complaint, places.line(place.line), place.column);
    error.where = where_of(place);
    return error;
  };
  switch (scan.stop) {
    case DocumentScan::Stop::TooDeep:
      return {where_of(place), "tables, lists or dotted keys stand more than 64 deep",
              "write the value at a lower depth"};
    case DocumentScan::Stop::NoKey:
      return message("table header");
    case DocumentScan::Stop::Bracket:
      return {where_of(place), "this bracket closes one of the other kind", "close [ with ] and { with }"};
    case DocumentScan::Stop::NotAscii:
      return message("value or key");
    case DocumentScan::Stop::None:
      break;
  }
  return {};
}

// Builds the tree. The library keeps tables sorted by key and numbers by value; the place it notes for each
// key and each value leads back to the order and the spelling in the text.
class Builder {
 public:
  Builder(std::string_view text, const Places& places) : text_(text), places_(places) {}

  // Within { } and [ ] everything has the inline layout.
  Node build(const toml::node& source, bool within_value) const {
    Node node;
    if (const toml::table* table = source.as_table()) {
      node = Node::table(within_value || table->is_inline());
      for (const auto& [key, value] : *table)
        node.entries.push_back(
            {std::string(key.str()), build(value, node.inline_form), place_of(key.source())});
      std::stable_sort(node.entries.begin(), node.entries.end(), [](const Entry& a, const Entry& b) {
        return a.place.line != b.place.line ? a.place.line < b.place.line : a.place.column < b.place.column;
      });
    } else if (const toml::array* array = source.as_array()) {
      node.kind = Node::Kind::List;
      const toml::table* first = array->empty() ? nullptr : array->front().as_table();
      node.inline_form = within_value || !first || first->is_inline();
      for (const toml::node& item : *array) node.items.push_back(build(item, node.inline_form));
    } else if (const toml::value<std::string>* text = source.as_string()) {
      node = Node::quoted(text->get());
    } else {
      node = Node::literal(spelling(source));
    }
    node.place = place_of(source.source());
    return node;
  }

 private:
  // A number, boolean or date as the text spells it: all that such a value may hold, from where it begins.
  std::string spelling(const toml::node& source) const {
    const Place place = place_of(source.source());
    const std::size_t begin = places_.byte_at(place.line, place.column);
    const auto belongs = [&](std::size_t i) {
      const unsigned char c = static_cast<unsigned char>(text_[i]);
      return std::isalnum(c) || c == '+' || c == '-' || c == '_' || c == '.' || c == ':';
    };
    std::size_t end = begin;
    while (end < text_.size() && belongs(end)) ++end;
    // The one blank that may stand between a date and a time.
    if (source.is_date_time() && end == begin + 10 && end + 1 < text_.size() && text_[end] == ' ') {
      ++end;
      while (end < text_.size() && belongs(end)) ++end;
    }
    return std::string(text_.substr(begin, end - begin));
  }

  std::string_view text_;
  const Places& places_;
};

}  // namespace

Result<Node> read_document(std::string_view text) {
  if (text.size() > kMostBytes)
    return Error{"", "this file is larger than 4 MB", "keep one paper in one review"};
  if (text.substr(0, 3) == "\xEF\xBB\xBF") text.remove_prefix(3);
  const Places places(text);
  if (const std::size_t bad = first_bad_byte(text); bad != std::string_view::npos)
    return Error{where_of(places.place_of(bad)), "a byte that is no character", "save the file as UTF-8"};
  const DocumentScan scan = scan_document(text, kDeepest);
  if (scan.stop != DocumentScan::Stop::None) return scan_message(scan, places);
  const toml::parse_result parsed = toml::parse(text);
  if (!parsed) {
    const toml::parse_error& complaint = parsed.error();
    Place place = place_of(complaint.source());
    const auto says = [&](std::string_view part) {
      return complaint.description().find(part) != std::string_view::npos;
    };
    // A missing quote or bracket shows only later, at the end of the line or of the file.
    if (scan.open) {
      const Place open = places.place_of(*scan.open);
      if (says("end-of-file") || (says("control characters") && open.line == place.line))
        return Error{where_of(open), "the quote or bracket that opens here is not closed",
                     "close it where the value ends"};
    }
    const std::string_view line = places.line(place.line);
    Error error = document_message(complaint.description(), line, place.column);
    if (says("redefine"))  // of the key or header, not of what follows it
      place.column = static_cast<int>(std::min(line.find_first_not_of(" \t"), line.size())) + 1;
    error.where = where_of(place);
    return error;
  }
  return Builder(text, places).build(parsed.table(), false);
}

}  // namespace rejoinder
