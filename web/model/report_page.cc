// The report as a page of its own.
#include "core/number/number_text.h"
#include "core/report/findings_text.h"
#include "web/model/companion.h"
#include "web/model/document_view.h"
#include "web/model/findings_html.h"

namespace rejoinder {
namespace {

constexpr const char* kStyle =
    "body{font:16px/1.5 Georgia,'Times New "
    "Roman',serif;color:#1e2226;background:#fff;max-width:46em;margin:2em auto;padding:0 1em}"
    "h1{font-size:1.5em;margin:0 0 .2em}h2{font-size:1.15em;margin:2em 0 .3em;border-top:1px solid "
    "#8e8a80;padding-top:.8em}"
    "h3{font-size:1em;margin:1em 0 .2em}p{margin:.4em 0}.state{font-weight:bold}.quote{margin:.4em 1.5em}"
    "table{border-collapse:collapse;font-size:.88em;margin:.6em 0}caption{text-align:left;font-style:italic}"
    "th,td{text-align:left;padding:.15em .7em .15em 0;vertical-align:top}thead th{border-bottom:1px solid "
    "#8e8a80}"
    "dl{display:grid;grid-template-columns:max-content auto;gap:.1em 1em;font-size:.92em}dd{margin:0}"
    "ol,ul{margin:.3em 0;padding-left:1.6em;font-size:.92em}svg{max-width:100%;height:auto;display:block}"
    "svg text{font-family:inherit;fill:#1e2226}section{break-inside:avoid-page}"
    "@media print{body{margin:0;max-width:none}}";

std::string claim_section(const Finding& finding, int number) {
  std::string out = "<section>\n" + element("h2", std::to_string(number) + ". " +
                                                      (finding.claim.empty() ? "Claim" : finding.claim));
  if (!finding.says.empty())
    out += "<p class=\"quote\">\xE2\x80\x9C" + escaped(finding.says) + "\xE2\x80\x9D" +
           (finding.page.empty() ? "" : " (" + escaped(finding.page) + ")") + "</p>\n";
  out += "<p class=\"state\">" + escaped(state_words(finding.state)) + "</p>\n";
  out += element("p", finding.headline) + span_svg(finding) + parts_html(finding);
  if (!finding.paragraph.empty())
    out += element("h3", "Words for the report") + element("p", finding.paragraph);
  if (!finding.evidence.empty()) out += element("h3", "Evidence") + evidence_html(finding);
  if (!finding.working.empty()) out += element("h3", "Working") + bullets(finding.working, "ol");
  if (!finding.ask.empty()) {
    std::vector<std::string> asks;
    for (const Ask& ask : finding.ask) asks.push_back(ask.sentence.empty() ? ask.figure : ask.sentence);
    out += element("h3", "What would settle it") + bullets(asks, "ol");
  }
  if (!finding.slips.empty()) {
    std::vector<std::string> slips;
    for (const Slip& slip : finding.slips) slips.push_back(slip.kind + ": " + slip.says);
    out += element("h3", "What could explain it?") + bullets(slips);
  }
  if (!finding.assumes.empty()) out += element("h3", "Assumptions") + bullets(finding.assumes);
  if (!finding.cautions.empty()) out += element("h3", "Cautions") + bullets(finding.cautions);
  return out + "</section>\n";
}

}  // namespace

std::string report_page(const AppState& state) {
  const std::string title = review_text(state.document, "title");
  std::string out = "<!DOCTYPE html>\n<html lang=\"en\">\n<head>\n<meta charset=\"utf-8\">\n";
  out += "<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\">\n";
  out += element("title", (title.empty() ? "Review" : title) + ": what the print allows");
  out += std::string("<style>") + kStyle + "</style>\n</head>\n<body>\n<main>\n";
  out += element("h1", title.empty() ? "Untitled review" : title);
  out += element("p", totals_text(state.checked));
  out += element("p",
                 "Every limit below follows from the printed figures alone, each taken with its rounding. "
                 "The data may say otherwise; a figure that does "
                 "not match is a question to the authors.");
  int number = 0;
  for (const Finding& finding : state.checked.findings) out += claim_section(finding, ++number);
  if (!state.checked.audit.empty()) {
    std::vector<std::string> lines;
    for (const AuditLine& line : state.checked.audit)
      lines.push_back(line.where + ": " + contract_word(line.match) + ". " + line.says);
    out += "<section>\n" + element("h2", "Do the figures fit together?") + bullets(lines) + "</section>\n";
  }
  if (!state.checked.problems.empty()) {
    std::vector<std::string> lines;
    for (const Problem& problem : state.checked.problems) lines.push_back(problem.text());
    out += "<section>\n" + element("h2", "What could not be read") + bullets(lines) + "</section>\n";
  }
  out += "<section>\n" + element("h2", "The review as a file") +
         element("p", "Checked by Rejoinder " REJOINDER_VERSION
                      ". The same text opened again gives the same findings.");
  out += "<pre>" + escaped(write_document(state.document)) + "</pre>\n</section>\n";
  return out + "</main>\n</body>\n</html>\n";
}

}  // namespace rejoinder
