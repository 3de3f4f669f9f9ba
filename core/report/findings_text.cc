#include "core/report/findings_text.h"

#include <algorithm>

#include "core/number/number_text.h"

namespace rejoinder {
namespace {

std::size_t columns_of(const std::string& word) {
  return static_cast<std::size_t>(std::count_if(word.begin(), word.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0) != 0x80; }));
}

class Page {
 public:
  explicit Page(const TextChoices& choices) : width_(static_cast<std::size_t>(std::max(40, choices.width))) {}

  // `text` wrapped, the first line after `head`, later ones under its end.
  void paragraph(const std::string& head, const std::string& text) {
    const std::size_t indent = columns_of(head);
    std::string line = head;
    std::size_t used = indent;
    bool first = true;
    std::string word;
    const auto put = [&] {
      if (word.empty()) return;
      const std::size_t length = columns_of(word);
      if (!first && used + 1 + length > width_) {
        out_ += line + "\n";
        line.assign(indent, ' ');
        used = indent;
        first = true;
      }
      if (!first) {
        line += ' ';
        ++used;
      }
      line += word;
      used += length;
      first = false;
      word.clear();
    };
    for (const char c : text) {
      if (c == ' ' || c == '\n')
        put();
      else
        word += c;
    }
    put();
    out_ += line + "\n";
  }
  void line(const std::string& text) { out_ += text + "\n"; }
  std::string take() { return std::move(out_); }

 private:
  std::size_t width_;
  std::string out_;
};

std::string bound_words(const Evidence& e) {
  if (e.high == Sharpness::NotBounded) return std::string(contract_word(e.low)) + " below, not bounded above by the method";
  if (e.low == e.high) return contract_word(e.low);
  return std::string(contract_word(e.low)) + " below, " + contract_word(e.high) + " above";
}

void write(Page& page, const Finding& f, const TextChoices& choices) {
  page.line("");
  page.line(std::string(mark_for(f.state)) + " " + f.claim + ": " + words_for(f.state));
  if (!f.says.empty()) page.paragraph("    ", "“" + f.says + "”" + (f.page.empty() ? "" : " (" + f.page + ")"));
  if (!f.restrictions.empty()) page.paragraph("    ", f.restrictions + (f.column.empty() ? "" : "   in " + f.column));
  if (f.f) {
    const std::string name = f.statistic == Statistic::F ? "F(" + std::to_string(f.q) + ", " + df_text(f.df->denominator) + ")"
                                                         : "χ²(" + std::to_string(f.q) + ")";
    page.paragraph("  ", f.headline + "; p " + p_range_text(*f.p) + "; " + name + ", " + level_text(f.level) + " point " + number_text(*f.critical));
    page.paragraph("  figure     ", f.figure_says);
    page.paragraph("  df         ", f.df_says);
    page.paragraph("  decision   ", f.decision_says);
  }
  page.paragraph("  ", f.sentence);
  for (const Evidence& e : f.evidence)
    page.paragraph("  evidence   ", std::string(contract_word(e.route)) + ": F " + range_text(e.f()) + " (" + bound_words(e) + ")" +
                                        (f.evidence.size() > 1 && e.binds ? ", sets a limit" : ""));
  for (const std::string& assumption : f.assumes) page.paragraph("  assumes    ", assumption);
  for (const std::string& caution : f.cautions) page.paragraph("  caution    ", caution);
  for (const Slip& slip : f.slips) page.paragraph("  might be   ", slip.kind + ": " + slip.says);
  for (const Ask& ask : f.ask) page.paragraph("  would settle it  ", ask.figure);
  if (f.state != State::Agrees && !f.paragraph.empty()) page.paragraph("  report     ", f.paragraph);
  if (choices.working)
    for (const std::string& step : f.working) page.paragraph("  | ", step);
}

}  // namespace

std::string totals_text(const CheckedReview& checked) {
  int counts[4] = {};
  for (const Finding& f : checked.findings) ++counts[static_cast<int>(f.state)];
  const std::size_t all = checked.findings.size();
  const auto part = [&](State state, const char* one, const char* many) {
    const int n = counts[static_cast<int>(state)];
    return std::to_string(n) + " " + (n == 1 ? one : many);
  };
  return std::to_string(all) + (all == 1 ? " claim" : " claims") + " looked at: " + part(State::Agrees, "agrees", "agree") + ", " +
         part(State::Conflicts, "does not match", "do not match") + ", " + part(State::Undecided, "open", "open") + ", " +
         part(State::NotComputable, "without a test", "without a test");
}

std::string findings_text(const CheckedReview& checked, const TextChoices& choices) {
  Page page(choices);
  page.paragraph("", checked.title.empty() ? "Review without a title" : checked.title);
  page.paragraph("", totals_text(checked));
  for (const Finding& f : checked.findings) write(page, f, choices);
  const bool any_doubt = std::any_of(checked.audit.begin(), checked.audit.end(), [](const AuditLine& a) { return a.match != Match::Fits; });
  if (any_doubt) {
    page.line("");
    page.line("Do the figures fit together?");
    for (const AuditLine& line : checked.audit)
      if (line.match != Match::Fits) page.paragraph("  ", line.where + ": " + contract_word(line.match) + ". " + line.says);
  }
  if (!checked.problems.empty()) {
    page.line("");
    page.line("Could not be read:");
    for (const Problem& problem : checked.problems) page.paragraph("  ", problem.text());
  }
  return page.take();
}

}  // namespace rejoinder
