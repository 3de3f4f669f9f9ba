#include "web/model/edit_review.h"

#include <algorithm>

#include "core/review/edit.h"
#include "web/model/document_view.h"
#include "web/model/ticks.h"

namespace rejoinder {
namespace {

// Fields that hold a list in the file and one line of text on the page.
enum class Field { Scalar, Names, Numbers, Pair };

Field field_of(std::string_view key) {
  for (const char* k : {"columns", "parts", "regressors"})
    if (key == k) return Field::Names;
  if (key == "ci" || key == "correlation_within") return Field::Pair;
  return Field::Scalar;
}

std::string trimmed_text(std::string_view text) {
  const std::size_t first = text.find_first_not_of(" \t\n");
  if (first == std::string_view::npos) return {};
  return std::string(text.substr(first, text.find_last_not_of(" \t\n") - first + 1));
}

// Items between commas or semicolons, brackets around the whole dropped.
std::vector<std::string> items_of(const std::string& text) {
  std::string inner = trimmed_text(text);
  if (inner.size() >= 2 && (inner.front() == '[' || inner.front() == '(') &&
      (inner.back() == ']' || inner.back() == ')'))
    inner = inner.substr(1, inner.size() - 2);
  std::vector<std::string> items;
  std::size_t start = 0;
  while (true) {
    const std::size_t end = inner.find_first_of(",;", start);
    items.push_back(trimmed_text(inner.substr(start, end == std::string::npos ? end : end - start)));
    if (end == std::string::npos) break;
    start = end + 1;
  }
  if (items.size() == 1) {
    // "0.94 to 1.82" and the dash of print.
    for (const std::string mark : {" to ", "\xE2\x80\x93"}) {
      const std::size_t at = items[0].find(mark, 1);
      if (at == std::string::npos) continue;
      items = {trimmed_text(items[0].substr(0, at)), trimmed_text(items[0].substr(at + mark.size()))};
      break;
    }
  }
  return items;
}

bool is_whole(const std::string& text) {
  return !text.empty() && text.find_first_not_of("0123456789") == std::string::npos &&
         (text.size() == 1 || text[0] != '0');
}

// The list that `text` stands for, or nothing where it is none: then it stays as typed, and reading the
// review says so.
std::optional<Node> list_value(Field field, const std::string& text) {
  std::vector<std::string> items = items_of(text);
  std::erase(items, "");
  if (items.empty() || (field == Field::Pair && items.size() != 2)) return std::nullopt;
  std::vector<Node> nodes;
  for (std::string& item : items) {
    const bool plain = field == Field::Numbers && is_whole(item);
    nodes.push_back(plain ? Node::literal(std::move(item)) : Node::quoted(std::move(item)));
  }
  return Node::list(std::move(nodes));
}

// Sets the value, or with blank text takes it away.
bool put(Node& document, const Path& path, Field field, const std::string& text) {
  const std::string plain = trimmed_text(text);
  if (plain.empty()) return erase_value(document, path);
  if (field != Field::Scalar)
    if (std::optional<Node> list = list_value(field, text)) return set_node(document, path, std::move(*list));
  const std::string& key = path.back().key;
  const bool flag = key == "intercept" || key == "weights" || key == "rejects";
  if (flag && (plain == "yes" || plain == "no"))
    return set_value(document, path, plain == "yes" ? "true" : "false");
  return set_value(document, path, text);
}

Path column_path(int column, const std::string& key) { return {{"column", column}, {key}}; }
Path claim_path(int claim, const std::string& key) { return {{"claim", claim}, {key}}; }

Node empty_review(const std::string& title) {
  Node review = Node::table(false);
  review.set("rejoinder", Node::literal("1"));
  review.set("title", Node::quoted(title));
  return review;
}

int new_column(Node& document) {
  const std::string id = fresh_id(document, "column", "");
  const int column = add_column(document, id);
  set_value(document, column_path(column, "label"), "(" + id + ")");
  return column;
}

// Where `name` belongs in a column that does not list it: behind the nearest term above it in a column that
// does, else before the nearest one below it, else at the end. -1 where no column lists it.
int place_in_other_columns(const Node& document, int column, const std::string& name) {
  int place = -1;
  for (int c = 0; c < count_of(document, "column"); ++c) {
    const std::vector<std::string> names = term_names(document, c);
    const int there = c == column ? -1 : term_index(document, c, name);
    if (there < 0) continue;
    for (int above = there - 1; above >= 0; --above) {
      const int here = term_index(document, column, names[static_cast<std::size_t>(above)]);
      if (here >= 0) return here + 1;
    }
    for (std::size_t below = static_cast<std::size_t>(there) + 1; below < names.size(); ++below) {
      const int here = term_index(document, column, names[below]);
      if (here >= 0) return here;
    }
    place = static_cast<int>(term_names(document, column).size());
  }
  return place;
}

std::string at(std::string_view what, int index, const std::string& key) {
  return std::string(what) + " " + std::to_string(index) + " / " + key;
}

}  // namespace

Change carry_out(Node& document, const EditCell& intent) {
  const TableCell& cell = intent.cell;
  const Node* column = row_of(document, "column", cell.column);
  if (!column || (cell.term >= 0 && !row_of(*column, "term", cell.term))) return {};
  Path path = {{"column", cell.column}};
  if (cell.term >= 0) path.push_back({"term", cell.term});
  path.push_back({cell.key});
  put(document, path, field_of(cell.key), clean_text(intent.text, false));
  return {at("column", cell.column, at("term", cell.term, cell.key)), "", std::nullopt};
}

Change carry_out(Node& document, const EditFigure& intent) {
  int term = term_index(document, intent.column, intent.term);
  if (term < 0) {
    term = place_in_other_columns(document, intent.column, intent.term);
    if (term < 0 || trimmed_text(intent.text).empty()) return {};
    const int added = add_term(document, intent.column, intent.term);
    if (added < 0) return {};
    move_item(document, {{"column", intent.column}, {"term"}}, added, term);
  }
  return carry_out(document, EditCell{{intent.column, term, intent.key}, intent.text});
}

Change carry_out(Node& document, const RenameTerm& intent) {
  const std::string from = cell_text(document, {intent.column, intent.term, "name"});
  const std::string to = clean_text(intent.name, false);
  const Node* column = row_of(document, "column", intent.column);
  if (from == to || trimmed_text(to).empty() || !column || !row_of(*column, "term", intent.term)) return {};
  const std::string edit = at("name", intent.column, std::to_string(intent.term));
  const std::vector<std::string> names = all_term_names(document);
  const bool taken = std::find(names.begin(), names.end(), to) != names.end();
  if (from.empty() || taken) {
    // A row without a name, or a name that another row has: this row alone takes it, so that two rows of the
    // paper that are one term can be brought together.
    const std::vector<std::string> here = term_names(document, intent.column);
    if (std::find(here.begin(), here.end(), to) != here.end())
      return {"", "the column has a term \"" + to + "\" already", std::nullopt};
    set_value(document, {{"column", intent.column}, {"term", intent.term}, {"name"}}, to);
    return {edit, "", std::nullopt};
  }
  for (int c = 0; c < count_of(document, "column"); ++c)
    if (const int term = term_index(document, c, from); term >= 0) rename_term(document, c, term, to);
  return {edit, "", std::nullopt};
}

Change carry_out(Node& document, const AddTerm& intent) {
  const std::string name = clean_text(intent.name, false);
  if (trimmed_text(name).empty()) return {"", "a term needs a name", std::nullopt};
  if (count_of(document, "column") == 0) new_column(document);
  const std::vector<std::string> names = all_term_names(document);
  if (std::find(names.begin(), names.end(), name) != names.end())
    return {"", "\"" + name + "\" is in the table already", std::nullopt};
  for (int c = 0; c < count_of(document, "column"); ++c) add_term(document, c, name);
  return {};
}

Change carry_out(Node& document, const RemoveTerm& intent) {
  for (int c = 0; c < count_of(document, "column"); ++c)
    if (const int term = term_index(document, c, intent.name); term >= 0) remove_term(document, c, term);
  return {"", "\"" + intent.name + "\" taken out of the table", std::nullopt};
}

Change carry_out(Node& document, const AddColumn&) {
  const int last = count_of(document, "column") - 1;
  const int column = new_column(document);
  // The same terms, in the same order, with nothing known of them but their names.
  for (const std::string& name : term_names(document, last)) add_term(document, column, name);
  return {};
}

Change carry_out(Node& document, const RemoveColumn& intent) {
  const std::string label = column_text(document, intent.column, "label");
  if (!remove_column(document, intent.column)) return {};
  return {"", "column " + label + " taken out", std::nullopt};
}

Change carry_out(Node& document, const EditColumn& intent) {
  if (!row_of(document, "column", intent.column)) return {};
  const std::string text = clean_text(intent.text, false);
  if (intent.key == "id") {
    if (trimmed_text(text).empty() || text == column_text(document, intent.column, "id")) return {};
    if (!rename_column(document, intent.column, text))
      return {"", "another column has the name \"" + text + "\"; choose one of its own", std::nullopt};
  } else {
    put(document, column_path(intent.column, intent.key), field_of(intent.key), text);
  }
  return {at("column", intent.column, intent.key), "", std::nullopt};
}

Change carry_out(Node& document, const EditReview& intent) {
  const std::string text = clean_text(intent.text, intent.key == "note");
  put(document, {{intent.key}}, intent.key == "stars" ? Field::Names : Field::Scalar, text);
  return {"review / " + intent.key, "", std::nullopt};
}

Change put_claim(Node& document, const Node& claim, const std::string& column) {
  const int index = add_claim(document, fresh_id(document, "claim", "claim-"));
  Node& row = *row_of(document, "claim", index);
  for (const Entry& entry : claim.entries)
    if (entry.key != "id") row.set(entry.key, entry.value);
  if (!row.find("column") && !column.empty()) row.set("column", Node::quoted(column));
  return {"", "", index};
}

Change carry_out(Node& document, const EditClaim& intent) {
  if (!row_of(document, "claim", intent.claim)) return {};
  const std::string text = clean_text(intent.text, intent.key == "says" || intent.key == "note");
  if (intent.key == "id") {
    for (int i = 0; i < count_of(document, "claim"); ++i)
      if (i != intent.claim && claim_text(document, i, "id") == text)
        return {"", "another claim has the name \"" + text + "\"; choose one of its own", std::nullopt};
  }
  Path path = {{"claim", intent.claim}};
  const std::size_t dot = intent.key.find('.');  // "restricted_fit.r2"
  if (dot != std::string::npos) path.push_back({intent.key.substr(0, dot)});
  path.push_back({dot == std::string::npos ? intent.key : intent.key.substr(dot + 1)});
  put(document, path, intent.key == "df" ? Field::Numbers : field_of(intent.key), text);
  if (dot != std::string::npos) {
    const Path outer(path.begin(), path.end() - 1);
    if (const Node* fit = find_value(document, outer);
        fit && fit->kind == Node::Kind::Table && fit->entries.empty())
      erase_value(document, outer);
  }
  return {at("claim", intent.claim, intent.key), "", std::nullopt};
}

Change carry_out(Node& document, const TickTerms& intent) {
  if (!row_of(document, "claim", intent.claim)) return {};
  Ticks ticks = read_ticks(claim_text(document, intent.claim, "restrictions"));
  if (intent.form != "sum" || ticks.form != "sum") ticks.value = "1";
  ticks.form = intent.form;
  ticks.terms = intent.terms;
  put(document, claim_path(intent.claim, "restrictions"), Field::Scalar, write_ticks(ticks));
  return {};
}

Change carry_out(Node& document, const RemoveClaim& intent) {
  if (!remove_claim(document, intent.claim)) return {};
  return {"", "claim taken out", std::max(0, std::min(intent.claim, count_of(document, "claim") - 1))};
}

Change carry_out(Node& document, const DuplicateClaim& intent) {
  const int copy = duplicate_claim(document, intent.claim);
  if (copy < 0) return {};
  return {"", "claim repeated below", copy};
}

Change carry_out(Node& document, const MoveClaim& intent) {
  const int to = intent.claim + intent.by;
  if (!move_claim(document, intent.claim, to)) return {};
  return {"", "", to};
}

Change carry_out(Node& document, const NewReview&) {
  document = empty_review("Untitled review");
  new_column(document);
  return {"", "an empty review; undo brings the other one back", -1};
}

Change carry_out(Node& document, const FiveFigures& intent) {
  document = empty_review("Five figures");
  const int column = new_column(document);
  put(document, column_path(column, "n"), Field::Scalar, clean_text(intent.n, false));
  const std::string figures[][3] = {{"first", intent.coef1, intent.se1},
                                    {"second", intent.coef2, intent.se2}};
  for (const auto& [name, coef, se] : figures) {
    const int term = add_term(document, column, name);
    put(document, {{"column", column}, {"term", term}, {"coef"}}, Field::Scalar, clean_text(coef, false));
    put(document, {{"column", column}, {"term", term}, {"se"}}, Field::Scalar, clean_text(se, false));
  }
  Node claim = Node::table(false);
  claim.set("says",
            Node::quoted(intent.equal ? "The two coefficients are equal." : "Both coefficients are zero."));
  claim.set("restrictions", Node::quoted(intent.equal ? "first = second" : "first = 0, second = 0"));
  put_claim(document, claim, column_text(document, column, "id"));
  return {"", "every further figure narrows the answer: R\xC2\xB2, another column, the sentence's own F", 0};
}

Change carry_out(Node& document, const SetSecondFigure& intent) {
  const std::string from = second_key(document);
  if (from == intent.key || (intent.key != "se" && intent.key != "t" && intent.key != "p")) return {};
  for (int c = 0; c < count_of(document, "column"); ++c) {
    Node* column = row_of(document, "column", c);
    for (int i = 0; column && i < count_of(*column, "term"); ++i) {
      Node* term = row_of(*column, "term", i);
      if (!term || term->find(intent.key)) continue;
      // The key changes in place, so that the order in the file stays.
      for (Entry& entry : term->entries)
        if (entry.key == from) entry.key = intent.key;
    }
  }
  return {"", "the second figures are read anew", std::nullopt};
}

std::optional<Change> put_block(Node& document, const TableCell& cell,
                                const std::vector<std::vector<std::string>>& block) {
  const Node* first = row_of(document, "column", cell.column);
  if (!first || block.empty()) return std::nullopt;
  // The rows below the cell as the page shows them: coefficient, second figure, coefficient, ...
  const std::string second = second_key(document);
  std::vector<std::pair<std::string, std::string>> places;  // term, key
  if (cell.term < 0) {
    places.push_back({"", cell.key});
  } else {
    const std::vector<std::string> names = term_names(document, cell.column);
    for (std::size_t t = static_cast<std::size_t>(cell.term); t < names.size(); ++t) {
      if (t > static_cast<std::size_t>(cell.term) || cell.key == "coef") places.push_back({names[t], "coef"});
      if (t > static_cast<std::size_t>(cell.term) || cell.key == "coef" || cell.key == second)
        places.push_back({names[t], second});
    }
  }
  if (block.size() > places.size()) return std::nullopt;
  for (const std::vector<std::string>& row : block)
    if (cell.column + static_cast<int>(row.size()) > count_of(document, "column")) return std::nullopt;
  Node next = document;
  for (std::size_t r = 0; r < block.size(); ++r) {
    for (std::size_t c = 0; c < block[r].size(); ++c) {
      const int column = cell.column + static_cast<int>(c);
      const auto& [term, key] = places[r];
      int index = -1;
      if (!term.empty() || cell.term >= 0) {
        index = term_index(next, column, term);
        if (index < 0) {
          if (block[r][c].empty()) continue;
          index = add_term(next, column, term);
        }
      }
      carry_out(next, EditCell{{column, index, key}, block[r][c]});
    }
  }
  document = std::move(next);
  return Change{"", "pasted " + std::to_string(block.size()) + (block.size() == 1 ? " row" : " rows"),
                std::nullopt};
}

}  // namespace rejoinder
