#include "core/algebra/parse.h"
#include "core/review/read_parts.h"

namespace rejoinder {
namespace {

// df = [2, 410], [3], [3, "inf"], or the number of restrictions alone.
void read_degrees_of_freedom(const Section& section, Claim& claim) {
  const Node* value = section.table().find("df");
  if (!value || (value->kind == Node::Kind::Text && value->text.empty())) return;
  const bool list = value->kind == Node::Kind::List;
  if (value->kind == Node::Kind::Table || (list && (value->items.empty() || value->items.size() > 2))) {
    section.problem("df", "one or two degrees of freedom are expected here",
                    "write df = [2, 410], or [2] where only one is stated");
    return;
  }
  const Node& first = list ? value->items[0] : *value;
  claim.df1 = section.count(first, "df");
  if (claim.df1 && *claim.df1 == 0) {
    section.problem("df", "a test of no restriction has no statistic",
                    "write how many restrictions the claim states");
    claim.df1.reset();
  }
  if (!list || value->items.size() < 2) return;
  const Node& second = value->items[1];
  if (second.text == "inf" || second.text == "\xE2\x88\x9E") {
    claim.df2 = kInfinity;
    return;
  }
  const Printed df2 = section.exact(second, "df", kAnyNumber);
  if (!df2) return;
  if (df2->value > 0)
    claim.df2 = df2->value;
  else
    section.problem("df", "the second degrees of freedom are not above zero",
                    "write those of the denominator, or \"inf\"");
}

Fit read_fit(const Section& section) {
  section.mention_near_misses({"r2", "adj_r2", "ssr", "residual_sd", "loglik", "n", "k"});
  Fit fit;
  fit.r2 = section.printed("r2", kAtMostOne);
  fit.adj_r2 = section.printed("adj_r2", kAtMostOne);
  fit.ssr = section.printed("ssr", kNotNegative);
  fit.residual_sd = section.printed("residual_sd", kNotNegative);
  fit.loglik = section.printed("loglik", kAnyNumber);
  fit.n = section.count("n");
  fit.k = section.count("k");
  return fit;
}

std::string name_of(const Claim& claim) { return "claim \"" + claim.id + "\""; }

}  // namespace

Claim read_claim(const Section& top, const Node& table, int number) {
  Claim claim;
  claim.place = table.place;
  const Node* id = table.find("id");
  if (id && (id->kind == Node::Kind::Text || id->kind == Node::Kind::Literal)) claim.id = id->text;
  if (claim.id.empty()) claim.id = "claim " + std::to_string(number);
  const Section section(table, name_of(claim), top.reading(), claim.id);
  section.mention_near_misses(
      {"id",      "says",    "page",   "note",    "column", "restrictions", "restricted", "restricted_fit",
       "columns", "samples", "source", "pooled",  "parts",  "outcome",      "regressors", "f",
       "chi2",    "p",       "df",     "rejects", "stars",  "level",        "sided",      "margin",
       "at",      "cell"});
  section.text("id");
  claim.says = section.text("says");
  claim.page = section.text("page");
  claim.note = section.text("note");
  claim.column = section.text("column");
  claim.restrictions = section.text("restrictions");
  claim.restricted = section.text("restricted");
  if (const Node* fit = section.inner_table("restricted_fit"))
    claim.restricted_fit = read_fit(section.inner(*fit, "restricted_fit"));
  claim.columns = section.texts("columns");
  claim.samples =
      section.word<Samples>("samples", {{"independent", Samples::Independent}, {"same", Samples::Same}})
          .value_or(Samples::Independent);
  claim.source = section.text("source");
  claim.pooled = section.text("pooled");
  claim.parts = section.texts("parts");
  claim.outcome = section.text("outcome");
  claim.regressors = section.texts("regressors");
  claim.f = section.printed("f", kNotNegative);
  claim.chi2 = section.printed("chi2", kNotNegative);
  claim.p = section.printed("p", kProbability);
  read_degrees_of_freedom(section, claim);
  claim.rejects = section.yes_or_no("rejects");
  claim.stars = section.stars("stars");
  for (const Printed* figure : {&claim.f, &claim.chi2, &claim.p})
    if (!claim.stars && *figure && (*figure)->stars > 0) claim.stars = (*figure)->stars;
  claim.level = section.share("level");
  if (const std::optional<long> sided = section.count("sided")) {
    if (*sided == 1 || *sided == 2)
      claim.sided = static_cast<int>(*sided);
    else
      section.problem("sided", "a test has one side or two", "write sided = 1 or sided = 2");
  }
  if (!claim.restrictions.empty())
    if (const Result<ParsedRestrictions> parsed = parse_restrictions(claim.restrictions); !parsed.ok())
      section.problem("restrictions", parsed.error().where + ": " + parsed.error().what, parsed.error().mend);
  return claim;
}

KnownNames::KnownNames(const Review& review) {
  for (const Column& column : review.columns) columns.insert(column.id);
  for (const Source& source : review.sources) sources.insert(source.name);
  if (review.variables) variables.insert(review.variables->names.begin(), review.variables->names.end());
}

void check_names(const Section& top, const KnownNames& known, const Claim& claim) {
  const auto check = [&](const std::set<std::string>& names, const char* key, const std::string& name,
                         const char* what, const char* mend) {
    if (name.empty() || names.count(name)) return;
    top.reading().problems.push_back(
        {claim.place.line, name_of(claim) + " / " + key, "\"" + name + "\" " + what, mend, claim.id});
  };
  const auto check_column = [&](const char* key, const std::string& id) {
    check(known.columns, key, id, "is no column of this review", "use the id of a [[column]]");
  };
  check_column("column", claim.column);
  check_column("restricted", claim.restricted);
  check_column("pooled", claim.pooled);
  for (const std::string& id : claim.columns) check_column("columns", id);
  for (const std::string& id : claim.parts) check_column("parts", id);
  check(known.sources, "source", claim.source, "is no line of the analysis-of-variance table",
        "use the name of a [[source]]");
  const auto check_variable = [&](const char* key, const std::string& name) {
    check(known.variables, key, name, "is no name of the table of variables",
          "use a name listed under [variables]");
  };
  if (claim.column.empty() && claim.columns.empty() && !claim.regressors.empty())
    check_variable("outcome", claim.outcome);
  for (const std::string& name : claim.regressors) check_variable("regressors", name);
}

}  // namespace rejoinder
