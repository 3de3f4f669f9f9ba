#include "core/review/read_parts.h"

namespace rejoinder {
namespace {

// One figure for each variable, "" where not printed; nothing where the numbers do not fit the names.
std::vector<Printed> read_row(const Section& section, std::string_view key, const Interval& natural,
                              std::size_t p) {
  std::vector<Printed> row;
  const Node* list = section.list(key);
  if (!list) return row;
  if (list->items.size() != p) {
    section.problem(key, std::to_string(list->items.size()) + " figures for " + std::to_string(p) + " names",
                    "give one for each name; write \"\" for one that is not printed");
    return row;
  }
  for (const Node& item : list->items) row.push_back(section.printed(item, key, natural));
  return row;
}

}  // namespace

Source read_source(const Section& top, const Node& table, int number) {
  Source source;
  source.place = table.place;
  const Node* name = table.find("name");
  const bool named = name && name->kind == Node::Kind::Text && !name->text.empty();
  const Section section =
      top.inner(table, named ? "source \"" + name->text + "\"" : "source " + std::to_string(number));
  section.mention_near_misses({"name", "ss", "df", "ms", "f", "p", "observations", "note"});
  source.name = section.text("name");
  if (source.name.empty())
    section.problem("name", "this line of the analysis-of-variance table has no name",
                    "add name = \"...\", as printed");
  source.ss = section.printed("ss", kNotNegative);
  source.df = section.count("df");
  source.ms = section.printed("ms", kNotNegative);
  source.f = section.printed("f", kNotNegative);
  source.p = section.printed("p", kProbability);
  return source;
}

std::optional<Variables> read_variables(const Section& top, const Node& table) {
  const Section section = top.inner(table, "variables");
  section.mention_near_misses({"n", "names", "sd", "mean", "means", "correlation", "note", "page"});
  std::optional<PrintedMatrix> correlation = read_triangle(section, "names", "correlation", true);
  if (!correlation) return std::nullopt;
  Variables variables;
  variables.place = table.place;
  variables.n = section.count("n");
  variables.names = correlation->terms;
  variables.correlation = std::move(*correlation);
  variables.sd = read_row(section, "sd", kNotNegative, variables.names.size());
  variables.mean =
      read_row(section, table.find("mean") ? "mean" : "means", kAnyNumber, variables.names.size());
  return variables;
}

}  // namespace rejoinder
