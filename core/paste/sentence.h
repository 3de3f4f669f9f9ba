// A sentence of a paper that reports a joint test, read into what it claims.
//
//   "Prices matter jointly (F(2, 410) = 4.21, p = .015)."  ->  f "4.21", df 2 and 410, p ".015", rejects
//
// Understood: F(2, 410) = 4.21, F[2, 410], F2,410 = 4.21, F change (3, 160) = 2.35, F = 4.21; chi2(3) = 8.1,
// χ²(3), chi-square(3, N = 64), LR chi-square(2); p = .015, p < .01, P > F = .03; p. 14, page 14. Each figure
// is kept as printed. Nothing is guessed beyond the words; the caller shows what was understood before it
// becomes a claim.
#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "core/review/document.h"

namespace rejoinder {

struct ClaimSentence {
  std::string says;      // the sentence, word for word, line ends made blanks
  std::string f, chi2;   // as printed; at most one of them
  std::string df1, df2;  // as printed, thousands marks dropped
  std::string p;         // "p = .015" gives ".015", "p < .01" gives "<.01"
  std::string page;      // "p. 14"
  std::optional<bool>
      rejects;  // by the words: "significant", "not rejected", ...; absent where they do not tell
};

// Nothing where the text states neither an F nor a chi-square nor words of a joint claim with a p. At most
// 4000 characters are looked at.
std::optional<ClaimSentence> read_claim_sentence(std::string_view text);

// A [[claim]] for the review's tree, without id and without restrictions: those are the reader's to say.
Node claim_from_sentence(const ClaimSentence& sentence);

}  // namespace rejoinder
