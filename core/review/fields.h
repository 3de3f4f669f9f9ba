// Readers of single fields of a review, shared by the parts of read_review.
//
// A Section is one table of the file with its name in words. Each reader answers what stands under a key, or
// nothing where the key is absent, empty, or not to be read; the last case is listed as a Problem with line,
// key and mend.
#pragma once

#include <initializer_list>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "core/review/review.h"

namespace rejoinder {

// Natural ranges.
inline constexpr Interval kAnyNumber{-kInfinity, kInfinity};
inline constexpr Interval kNotNegative{0, kInfinity};
inline constexpr Interval kProbability{0, 1};
inline constexpr Interval kAtMostOne{-kInfinity, 1};
inline constexpr Interval kCorrelation{-1, 1};

// What holds for the whole file.
struct Reading {
  NumberReading how;  // decimal mark and rounding; natural is set by each field
  std::vector<Problem>& problems;
};

class Section {
 public:
  // `words` names the table for a person: "column \"full\" / term \"fare\"". Empty for the top of the file.
  Section(const Node& table, std::string words, Reading& reading, std::string claim = "");

  const Node& table() const { return table_; }
  const std::string& words() const { return words_; }
  Reading& reading() const { return reading_; }
  // A table within this one.
  Section inner(const Node& table, const std::string& words) const;

  // Every reader of numbers: a quoted value is printed, an unquoted one exact.
  Printed printed(std::string_view key, const Interval& natural) const;
  Printed printed(const Node& value, std::string_view key, const Interval& natural) const;
  // Exact even in quotes.
  Printed exact(const Node& value, std::string_view key, const Interval& natural) const;
  // A level or a share, strictly between 0 and 1.
  std::optional<double> share(std::string_view key) const;
  std::optional<double> share(const Node& value, std::string_view key) const;
  std::optional<long> count(std::string_view key) const;
  std::optional<long> count(const Node& value, std::string_view key) const;
  std::optional<bool> yes_or_no(std::string_view key) const;
  // Text; an unquoted value gives its spelling, so that id = 1 is the text 1.
  std::string text(std::string_view key) const;
  std::optional<std::string> text(const Node& value, std::string_view key) const;
  // A list of texts; a single text is a list of one.
  std::vector<std::string> texts(std::string_view key) const;
  // A list of any values, or null.
  const Node* list(std::string_view key) const;
  const Node* inner_table(std::string_view key) const;
  // The tables under [[key]].
  std::vector<const Node*> tables(std::string_view key) const;
  // Two numbers, low then high.
  PrintedPair pair(std::string_view key, const Interval& natural, bool exact_even_in_quotes) const;
  // Stars given as a number or as they are printed.
  std::optional<int> stars(std::string_view key) const;

  // One of a few words.
  template <class Choice>
  std::optional<Choice> word(std::string_view key,
                             std::initializer_list<std::pair<const char*, Choice>> choices) const {
    const std::string given = lower_case(text(key));
    if (given.empty()) return std::nullopt;
    std::string all;
    std::size_t left = choices.size();
    for (const auto& [name, choice] : choices) {
      if (given == name) return choice;
      all += (all.empty() ? "" : left == 1 ? " or " : ", ") + ('"' + std::string(name) + '"');
      --left;
    }
    problem(key, '"' + text(key) + "\" is none of the words known here", "write " + all);
    return std::nullopt;
  }

  // Lists a problem with the value under `key`, or with the table itself where `key` is empty or absent.
  void problem(std::string_view key, std::string what, std::string mend) const;
  void problem(int line, std::string_view key, std::string what, std::string mend) const;
  // Lists keys that look like a slip of the pen for one of `known`.
  void mention_near_misses(std::initializer_list<const char*> known) const;

 private:
  static std::string lower_case(std::string text);
  const Node* filled(std::string_view key) const;

  const Node& table_;
  std::string words_;
  Reading& reading_;
  std::string claim_;
};

// s.e., t, p and interval with its level, of a term or a combination. `ratio`: the interval is of a ratio.
void read_uncertainty(const Section& section, bool ratio, Uncertainty& into);

// A lower triangle under `key`, whose names stand under `names_key`. Diagonal cells are at least 0; those of
// a `correlation` table are exactly 1, whether written or not. Absent where rows and names do not fit
// together.
std::optional<PrintedMatrix> read_triangle(const Section& section, std::string_view names_key,
                                           std::string_view key, bool correlation);

}  // namespace rejoinder
