// The answer to one claim: a state, its three parts, the limits and the reasons.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/evidence/evidence.h"
#include "core/review/review.h"

namespace rejoinder {

enum class State { Agrees, Conflicts, Undecided, NotComputable };
enum class FigurePart { WithinLimits, OutsideLimits, NotClaimed, NotComputable };
enum class DfPart { AsClaimed, Differs, NotStated };
enum class DecisionPart { Rejects, DoesNotReject, Open, NotComputable };
enum class Match { Fits, Strained, Conflicts, CannotTell };

// An ordinary mistake that would reproduce the printed figure. Mild, never a proof.
struct Slip {
  std::string kind;  // one of the words of the format page: "number of restrictions", "halved p", ...
  std::string says;  // with the recomputed figure
};

// Two tested estimates with one unknown correlation (design: the correlation lens). Lists of disjoint intervals.
struct CorrelationSets {
  std::vector<std::string> terms;         // the two
  std::vector<Interval> fits;             // where some value the print allows gives the reported figure
  std::vector<Interval> does_not_reject;  // where some value the print allows does not reject
};

struct Finding {
  std::string claim;  // id
  std::string says;   // the sentence, word for word
  std::string page;
  std::string column;        // id of the column it rests on, where there is one
  std::string restrictions;  // as written, or "(2) against (1)"
  int q = 0;                 // independent restrictions; 0 where not known
  Statistic statistic = Statistic::F;

  State state = State::NotComputable;
  FigurePart figure = FigurePart::NotComputable;
  DfPart df_claimed = DfPart::NotStated;
  DecisionPart decision = DecisionPart::NotComputable;

  // Absent where no test of this kind follows from the print. For a chi-square `wald` is the statistic itself.
  std::optional<Interval> f, wald, p;
  Sharpness low = Sharpness::Exact, high = Sharpness::Exact;
  std::optional<Interval> attained;          // scale of W
  std::optional<DegreesOfFreedom> df;
  double level = 0.05;
  std::optional<double> critical;            // on the scale of `statistic`
  std::optional<double> reported;            // the F or chi-square claimed, on the scale of `statistic`
  std::optional<Interval> reported_range;    // and its rounding
  std::optional<Interval> reported_p;

  std::string headline;  // "F lies between 2.90 and 3.11": the largest text of the page, one line
  std::string sentence;  // why the state is what it is, one or two sentences in the product's voice
  std::string figure_says, df_says, decision_says;  // the three parts in words, one line each
  std::string paragraph;  // words for the report: claimed, used, allows, asks

  std::vector<Evidence> evidence;
  std::vector<Ask> ask;
  std::vector<Slip> slips;
  int slips_tried = 0;
  std::vector<std::string> assumes, cautions, working;
  std::optional<CorrelationSets> correlation;
  std::optional<Interval> share_rejecting;
  std::vector<Cell> rests_on;  // printed cells the finding rests on
};

// Two printed figures set against each other.
struct AuditLine {
  std::string where;  // "full / fare / stars"
  Match match = Match::CannotTell;
  std::string says;
  std::vector<Cell> cells;
};

struct CheckedReview {
  std::string title;
  std::vector<Finding> findings;  // one a claim, in order
  std::vector<AuditLine> audit;
  std::vector<Problem> problems;

  bool any_conflict() const;  // a finding or an audit line does not match
};

// "Agrees with the print", "Does not match the print", "The print cannot say", "No such test from this print".
const char* words_for(State state);
// The contract's words: "agrees", "outside limits", ...
const char* contract_word(State state);
const char* contract_word(FigurePart part);
const char* contract_word(DfPart part);
const char* contract_word(DecisionPart part);
const char* contract_word(Match match);
const char* contract_word(Sharpness sharpness);
const char* contract_word(Route route);
const char* contract_word(Statistic statistic);

// The mark that goes with the state: = ≠ ? – (UTF-8).
const char* mark_for(State state);

// The check of a whole review: every claim gets one finding, whatever its neighbours' state.
CheckedReview check_review(const Review& review);

}  // namespace rejoinder
