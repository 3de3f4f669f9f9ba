#include <set>

#include "core/algebra/parse.h"
#include "core/review/read_parts.h"

namespace rejoinder {
namespace {

// The first figure of the term that has stars glued to it.
std::optional<int> glued_stars(const Term& term) {
  for (const Printed* figure : {&term.coef, &term.ratio, &term.t, &term.se, &term.p})
    if (*figure && (*figure)->stars > 0) return (*figure)->stars;
  return std::nullopt;
}

std::optional<Term> read_term(const Section& column, const Node& table, int number,
                              std::set<std::string>& taken) {
  Term term;
  term.place = table.place;
  const Node* name = table.find("name");
  const std::string own =
      name && name->kind != Node::Kind::List && name->kind != Node::Kind::Table ? name->text : "";
  const Section section =
      column.inner(table, own.empty() ? "term " + std::to_string(number) : "term \"" + own + "\"");
  section.mention_near_misses({"name", "coef", "ratio", "se", "t", "p", "ci", "ci_level", "stars", "kind",
                               "vif", "cell", "note", "label"});
  term.name = section.text("name");
  if (term.name.empty()) {
    section.problem("name", "this term has no name, so that no restriction can name it",
                    "add name = \"...\"");
    return std::nullopt;
  }
  if (!taken.insert(term.name).second) {
    section.problem("name", "a term of this name stands in the column already; this one is left out",
                    "give each term its own name, such as \"" + term.name + " (2)\"");
    return std::nullopt;
  }
  term.coef = section.printed("coef", kAnyNumber);
  term.ratio = section.printed("ratio", kNotNegative);
  if (term.ratio && term.ratio->possible.high == 0) {
    section.problem("ratio", "a ratio of exactly zero has no logarithm",
                    "write it in quotes as printed, \"0.00\", so that its rounding counts");
    term.ratio.reset();
  }
  if (term.coef && term.ratio) {
    section.problem("ratio", "this term has a coefficient and a ratio; the coefficient is used",
                    "keep one of coef and ratio");
    term.ratio.reset();
  }
  read_uncertainty(section, term.ratio.has_value(), term);
  term.stars = section.stars("stars");
  if (!term.stars) term.stars = glued_stars(term);
  term.intercept = section.word<bool>("kind", {{"intercept", true}, {"slope", false}}).value_or(false);
  return term;
}

bool can_be_parsed(const Section& section, std::string_view key, const std::string& text, bool combination) {
  const Result<ParsedRestrictions> parsed = combination ? parse_combination(text) : parse_restrictions(text);
  if (parsed.ok()) return true;
  section.problem(key, parsed.error().where + ": " + parsed.error().what, parsed.error().mend);
  return false;
}

std::optional<Fact> read_fact(const Section& column, const Node& table, int number) {
  const Section section = column.inner(table, "fact " + std::to_string(number));
  section.mention_near_misses({"of", "value", "se", "t", "p", "ci", "ci_level", "restrictions", "f", "chi2",
                               "cell", "note", "page", "df"});
  Fact fact;
  fact.place = table.place;
  fact.of = section.text("of");
  fact.restrictions = section.text("restrictions");
  if (fact.of.empty() == fact.restrictions.empty()) {
    section.problem("",
                    fact.of.empty() ? "this fact names neither a combination nor restrictions"
                                    : "this fact names a combination and restrictions",
                    "write of = \"fare - fuel\" for a combination, or restrictions = \"fare = 0, fuel = 0\" "
                    "for a joint test");
    return std::nullopt;
  }
  const bool combination = !fact.of.empty();
  if (!can_be_parsed(section, combination ? "of" : "restrictions", combination ? fact.of : fact.restrictions,
                     combination))
    return std::nullopt;
  fact.value = section.printed("value", kAnyNumber);
  read_uncertainty(section, false, fact);
  fact.f = section.printed("f", kNotNegative);
  fact.chi2 = section.printed("chi2", kNotNegative);
  return fact;
}

void read_means(const Section& section, Column& column) {
  for (const Entry& entry : section.table().entries) {
    const Printed mean = section.printed(entry.value, entry.key, kAnyNumber);
    if (!mean) continue;
    if (entry.key == "outcome")
      column.mean_of_outcome = mean;
    else
      column.means.push_back({entry.key, *mean});
  }
}

Groups read_groups(const Section& section) {
  section.mention_near_misses({"base", "size"});
  Groups groups;
  groups.base = section.count("base");
  if (const Node* sizes = section.inner_table("size")) {
    const Section inner = section.inner(*sizes, "size");
    for (const Entry& entry : sizes->entries)
      if (const std::optional<long> count = inner.count(entry.value, entry.key))
        groups.size.push_back({entry.key, *count});
  }
  return groups;
}

std::optional<PrintedMatrix> read_estimates_table(const Section& column_section, std::string_view key,
                                                  const std::set<std::string>& names) {
  const Node* table = column_section.inner_table(key);
  if (!table) return std::nullopt;
  const Section section = column_section.inner(*table, std::string(key));
  section.mention_near_misses({"terms", "lower"});
  std::optional<PrintedMatrix> matrix = read_triangle(section, "terms", "lower", key == "correlation");
  if (matrix)
    for (const std::string& name : matrix->terms)
      if (!names.count(name))
        section.problem("terms", "\"" + name + "\" is no term of this column",
                        "use the name that the term has under [[column.term]]");
  return matrix;
}

void read_counts_and_fit(const Section& section, Column& column) {
  column.clusters = section.count("clusters");
  column.n = section.count("n");
  column.k = section.count("k");
  column.df = section.count("df");
  column.intercept = section.yes_or_no("intercept").value_or(true);
  column.fixed_effects = section.count("fixed_effects").value_or(0);
  column.weights = section.yes_or_no("weights").value_or(false);
  column.r2 = section.printed("r2", kAtMostOne);
  column.adj_r2 = section.printed("adj_r2", kAtMostOne);
  column.ssr = section.printed("ssr", kNotNegative);
  column.tss = section.printed("tss", kNotNegative);
  column.outcome_sd = section.printed("outcome_sd", kNotNegative);
  column.residual_sd = section.printed("residual_sd", kNotNegative);
  column.loglik = section.printed("loglik", kAnyNumber);
  column.null_loglik = section.printed("null_loglik", kAnyNumber);
  column.overall_f = section.printed("overall_f", kNotNegative);
  column.overall_p = section.printed("overall_p", kProbability);
  if (const PrintedPair within = section.pair("correlation_within", kCorrelation, true))
    column.correlation_within = Interval{(*within)[0].possible.low, (*within)[1].possible.high};
}

}  // namespace

Column read_column(const Section& top, const Node& table, int number) {
  Column column;
  column.place = table.place;
  const std::string counted = "column " + std::to_string(number);
  const Node* id = table.find("id");
  const bool named =
      id && (id->kind == Node::Kind::Text || id->kind == Node::Kind::Literal) && !id->text.empty();
  const Section section = top.inner(table, named ? "column \"" + id->text + "\"" : counted);
  section.mention_near_misses({"id",
                               "label",
                               "outcome",
                               "estimator",
                               "errors",
                               "clusters",
                               "n",
                               "k",
                               "intercept",
                               "fixed_effects",
                               "weights",
                               "df",
                               "r2",
                               "adj_r2",
                               "ssr",
                               "tss",
                               "outcome_sd",
                               "residual_sd",
                               "loglik",
                               "null_loglik",
                               "overall_f",
                               "overall_p",
                               "correlation_within",
                               "term",
                               "covariance",
                               "correlation",
                               "fact",
                               "means",
                               "groups",
                               "page",
                               "note",
                               "aic",
                               "bic",
                               "deviance",
                               "null_deviance",
                               "pseudo_r2",
                               "pseudo_r2_kind",
                               "r2_kind",
                               "cell"});
  column.id = section.text("id");
  if (column.id.empty()) {
    column.id = counted;
    section.problem("id", "this column has no id, so that a claim can only call it \"" + counted + "\"",
                    "add id = \"...\", a short name");
  }
  column.label = section.text("label");
  column.outcome = section.text("outcome");
  column.estimator = section
                         .word<Estimator>("estimator", {{"ols", Estimator::Ols},
                                                        {"iv", Estimator::Iv},
                                                        {"ml", Estimator::Ml},
                                                        {"other", Estimator::Other}})
                         .value_or(Estimator::Ols);
  column.errors = section
                      .word<Errors>("errors", {{"classical", Errors::Classical},
                                               {"robust", Errors::Robust},
                                               {"clustered", Errors::Clustered},
                                               {"unknown", Errors::Unknown}})
                      .value_or(Errors::Unknown);
  read_counts_and_fit(section, column);
  std::set<std::string> names;
  int count = 0;
  for (const Node* term : section.tables("term"))
    if (std::optional<Term> read = read_term(section, *term, ++count, names))
      column.terms.push_back(std::move(*read));
  column.covariance = read_estimates_table(section, "covariance", names);
  column.correlation = read_estimates_table(section, "correlation", names);
  count = 0;
  for (const Node* fact : section.tables("fact"))
    if (std::optional<Fact> read = read_fact(section, *fact, ++count))
      column.facts.push_back(std::move(*read));
  if (const Node* means = section.inner_table("means")) read_means(section.inner(*means, "means"), column);
  if (const Node* groups = section.inner_table("groups"))
    column.groups = read_groups(section.inner(*groups, "groups"));
  return column;
}

}  // namespace rejoinder
