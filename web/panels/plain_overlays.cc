// Overlays that are only read: the keys, and what the page is made of.
#include "web/panels/overlay.h"
#include "web/platform/services.h"

namespace rejoinder {
namespace {

struct Key {
  const char* keys;
  const char* does;
};

void write_keys(Pen& pen, const char* title, std::initializer_list<Key> keys) {
  const Palette& colours = palette();
  pen.write(Type::NoteStrong, colours.soft, title);
  pen.skip(4);
  const float left = px(210);
  for (const Key& key : keys) {
    draw_line(Type::Note, pen.at(), colours.ink, key.keys);
    Pen text{pen.x + left, pen.y, pen.width - left};
    text.write(Type::Note, colours.soft, key.does);
    pen.y = text.y + px(2);
  }
  pen.skip(12);
}

void write_part(Pen& pen, const char* title, std::initializer_list<const char*> paragraphs) {
  const Palette& colours = palette();
  pen.write(Type::Strong, colours.ink, title);
  pen.skip(3);
  for (const char* paragraph : paragraphs) {
    pen.write(Type::Note, colours.soft, paragraph);
    pen.skip(6);
  }
  pen.skip(8);
}

}  // namespace

void show_keys(Pen& pen) {
  write_keys(pen, "Everywhere",
             {{"Tab, Shift Tab", "to the next thing, to the one before"},
              {"F4, Shift F4", "to the next pane, to the one before"},
              {"Enter or Space", "presses what has the frame around it"},
              {"Page Up, Page Down", "through the pane"},
              {"Ctrl Z, Ctrl Y", "undo, redo"},
              {"Ctrl S, Ctrl O", "save the review as a file, open one"},
              {"Ctrl V", "a table, a sentence or a whole review, wherever you are"},
              {"Escape", "leaves what is open; then Tab leaves the drawing for the findings as text"},
              {"F1", "these keys"}});
  write_keys(pen, "In the table",
             {{"Arrows", "to the cell beside"},
              {"any character", "replaces what the cell holds"},
              {"Enter or F2", "changes what the cell holds; Enter again goes down"},
              {"Delete", "takes the figure away"},
              {"Escape", "brings back what was there"}});
  write_keys(pen, "On the claims",
             {{"Up, Down", "to the claim above, below"},
              {"F2", "changes the claim"},
              {"Ctrl Up, Ctrl Down", "moves the claim"},
              {"Delete", "takes the claim out"}});
  write_keys(pen, "In a text being typed",
             {{"Ctrl A, C, X, V", "choose all, copy, cut, paste"},
              {"Ctrl Enter", "takes the text where there is a button Take it"}});
}

void show_about(Pen& pen) {
  const Palette& colours = palette();
  pen.write(Type::Body, colours.soft,
            "Rejoinder checks reported joint tests against the table a paper prints: which values of the "
            "statistic are consistent with "
            "every printed digit, and whether the claim is among them.");
  pen.skip(4);
  pen.write(Type::Note, colours.quiet,
            "Version " REJOINDER_VERSION ". The page makes no request: what is typed stays on this machine.");
  pen.skip(14);
  write_part(pen, "What the print cannot show",
             {"A finding speaks of the printed figures. The data may say otherwise, and a conflict is a "
              "question to the authors.",
              "Limits hold under the assumptions named beside them: the same sample and the same errors in "
              "both fits, a constant where "
              "none is denied, large-sample normal estimates where the test is a Wald test.",
              "No R² formula is used where errors are robust or clustered. Where a figure is missing, the "
              "page says which one would settle "
              "the claim instead of supposing a value for it.",
              "Not rejected is not equal, and jointly significant is not important."});
  write_part(pen, "Methods",
             {"Wald test of linear restrictions on an estimate with covariance matrix V; F = W / q with q "
              "independent restrictions, or a "
              "chi-square where degrees of freedom are infinite. Any textbook of econometrics.",
              "F from two nested least-squares fits, by their sums of squares or R². The printed facts of "
              "both fits form a system of "
              "difference constraints, whose shortest paths give the exact range: Bellman 1958; Floyd 1962 "
              "(from memory).",
              "Least W over all covariances that leave the printed standard errors as they are: a linear "
              "programme whose dual says by how "
              "many standard errors every coefficient must move before the claim holds. Its value is "
              "guaranteed by weak duality: Boyd and "
              "Vandenberghe 2004, Convex Optimization (from memory).",
              "Every printed figure stands for all values that round to it; ranges are rounded outward at "
              "each step.",
              "The colours of the states are relatives of a palette safe for colour-vision deficiencies: "
              "Okabe and Ito (from memory)."});
  pen.write(Type::Strong, colours.ink, "Licences of everything inside");
  pen.skip(3);
  pen.write(Type::Note, colours.soft, "Rejoinder itself: MIT licence.");
  pen.skip(8);
  pen.write(Type::Small, colours.quiet, licences());
}

}  // namespace rejoinder
