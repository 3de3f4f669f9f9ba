#include "web/model/findings_html.h"

#include <algorithm>
#include <cmath>

#include "core/number/number_text.h"
#include "web/model/companion.h"

namespace rejoinder {
namespace {

std::string fixed(double x) {
  char text[32];
  std::snprintf(text, sizeof text, "%.1f", x);
  return text;
}

std::string words(Sharpness low, Sharpness high) {
  const std::string a = contract_word(low), b = contract_word(high);
  return a == b ? a : a + ", then " + b;
}

}  // namespace

std::string escaped(std::string_view text) {
  std::string out;
  out.reserve(text.size());
  for (const char c : text) {
    switch (c) {
      case '&':
        out += "&amp;";
        break;
      case '<':
        out += "&lt;";
        break;
      case '>':
        out += "&gt;";
        break;
      case '"':
        out += "&quot;";
        break;
      case '\'':
        out += "&#39;";
        break;
      default:
        out += c;
    }
  }
  return out;
}

std::string element(const std::string& tag, std::string_view text) {
  return text.empty() ? std::string() : "<" + tag + ">" + escaped(text) + "</" + tag + ">\n";
}

std::string bullets(const std::vector<std::string>& items, const char* tag) {
  if (items.empty()) return {};
  std::string out = std::string("<") + tag + ">\n";
  for (const std::string& item : items) out += element("li", item);
  return out + "</" + tag + ">\n";
}

std::string state_words(State state) { return std::string(mark_for(state)) + " " + words_for(state); }

std::string parts_html(const Finding& finding) {
  std::string out = "<dl>\n";
  const auto part = [&](const char* name, const char* word, const std::string& says) {
    out += element("dt", name) + element("dd", std::string(word) + (says.empty() ? "" : ": " + says));
  };
  part("Figure", contract_word(finding.figure), finding.figure_says);
  part("Degrees of freedom", contract_word(finding.df_claimed), finding.df_says);
  part(("Decision at the " + level_text(finding.level) + " level").c_str(), contract_word(finding.decision),
       finding.decision_says);
  return out + "</dl>\n";
}

std::string evidence_html(const Finding& finding) {
  if (finding.evidence.empty()) return {};
  const bool f = finding.statistic == Statistic::F;
  std::string out =
      "<table>\n<caption>What each kind of evidence allows</caption>\n<thead><tr><th "
      "scope=\"col\">evidence</th><th scope=\"col\">" +
      std::string(f ? "F" : "\xCF\x87\xC2\xB2") +
      "</th><th scope=\"col\">p</th><th scope=\"col\">limits are</th><th scope=\"col\">sets the "
      "answer</th><th scope=\"col\">assumes</th></tr></thead>\n<tbody>\n";
  for (const Evidence& evidence : finding.evidence) {
    std::string assumes;
    for (const std::string& item : evidence.assumes) assumes += (assumes.empty() ? "" : "; ") + item;
    const Interval range = f && evidence.df.numerator > 0 ? evidence.f() : evidence.wald;
    out += "<tr><th scope=\"row\">" + escaped(contract_word(evidence.route)) + "</th><td>" +
           escaped(range_text(range)) + "</td><td>" + escaped(p_range_text(evidence.p)) + "</td><td>" +
           escaped(words(evidence.low, evidence.high)) + "</td><td>" + (evidence.binds ? "yes" : "no") +
           "</td><td>" + escaped(assumes) + "</td></tr>\n";
  }
  return out + "</tbody>\n</table>\n";
}

std::string span_svg(const Finding& finding) {
  if (!finding.f || !finding.wald) return {};
  const Interval range = finding.statistic == Statistic::F ? *finding.f : *finding.wald;
  const std::string name = finding.statistic == Statistic::F ? "F" : "\xCF\x87\xC2\xB2";
  const bool open = std::isinf(range.high);

  // The picture reaches a little beyond what it must show; a finite end far beyond is cut by two strokes.
  double needed = std::max({range.low, finding.critical.value_or(0), finding.reported.value_or(0)});
  if (needed <= 0) needed = 1;
  const bool cut = !open && range.high > 4 * needed;
  const double reach = (open || cut ? needed * 1.6 : std::max(needed, range.high)) * 1.12;
  constexpr double kLeft = 10, kRight = 470, kBar = 44;
  const auto x = [&](double value) {
    return kLeft + (kRight - kLeft) * std::min(1.0, std::max(0.0, value / reach));
  };

  std::string says = name + " from " + number_text(range.low, ShowRounding::Down) + " to " +
                     (open ? "no upper limit" : number_text(range.high, ShowRounding::Up));
  if (finding.critical) says += "; " + level_text(finding.level) + " point " + number_text(*finding.critical);
  if (finding.reported) says += "; reported " + number_text(*finding.reported);

  std::string out =
      "<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 500 84\" width=\"500\" height=\"84\" "
      "role=\"img\" aria-label=\"" +
      escaped(says) + "\">\n";
  const auto line = [&](double x1, double y1, double x2, double y2, const char* style) {
    out += "<line x1=\"" + fixed(x1) + "\" y1=\"" + fixed(y1) + "\" x2=\"" + fixed(x2) + "\" y2=\"" +
           fixed(y2) + "\" " + style + "/>\n";
  };
  const auto label = [&](double at, double y, const std::string& text) {
    const char* anchor = at < kLeft + 60 ? "start" : at > kRight - 60 ? "end" : "middle";
    out += "<text x=\"" + fixed(at) + "\" y=\"" + fixed(y) + "\" text-anchor=\"" + anchor +
           "\" font-size=\"12\">" + escaped(text) + "</text>\n";
  };
  line(kLeft, kBar, kRight, kBar, "stroke=\"#8e8a80\" stroke-width=\"1\"");
  const double from = x(range.low), to = open || cut ? kRight : x(range.high);
  out += "<rect x=\"" + fixed(from) + "\" y=\"" + fixed(kBar - 5) + "\" width=\"" +
         fixed(std::max(2.0, to - from)) + "\" height=\"10\" fill=\"#43484d\"/>\n";
  if (open)
    out += "<path d=\"M" + fixed(kRight) + " " + fixed(kBar - 9) +
           " l10 9 l-10 9\" fill=\"none\" stroke=\"#43484d\" stroke-width=\"2\"/>\n";
  if (cut) {
    line(kRight - 22, kBar + 9, kRight - 14, kBar - 9, "stroke=\"#ffffff\" stroke-width=\"4\"");
    line(kRight - 14, kBar + 9, kRight - 6, kBar - 9, "stroke=\"#ffffff\" stroke-width=\"4\"");
  }
  // Labels under the bar keep clear of one another.
  const std::string low = number_text(range.low, ShowRounding::Down);
  const std::string high = open ? "no upper limit" : number_text(range.high, ShowRounding::Up);
  if (to - from < 60 && !open)
    label((from + to) / 2, kBar + 24, low == high ? low : low + " to " + high);
  else {
    label(from, kBar + 24, low);
    label(to, kBar + 24, high);
  }
  if (finding.critical) {
    const double at = x(*finding.critical);
    line(at, kBar - 14, at, kBar + 14, "stroke=\"#1e2226\" stroke-width=\"1.5\" stroke-dasharray=\"3 2\"");
    label(at, kBar + 38, level_text(finding.level) + " point " + number_text(*finding.critical));
  }
  if (finding.reported) {
    const double at = x(*finding.reported);
    line(at, 18, at, kBar - 6, "stroke=\"#1e2226\" stroke-width=\"2\"");
    if (finding.reported_range)
      line(x(finding.reported_range->low), kBar - 6, x(finding.reported_range->high), kBar - 6,
           "stroke=\"#1e2226\" stroke-width=\"4\"");
    label(at, 12, "reported " + number_text(*finding.reported));
  }
  return out + "</svg>\n";
}

}  // namespace rejoinder
