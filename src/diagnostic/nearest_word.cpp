// The known word a misspelt one most likely meant; separate because it is an algorithm, not a
// layout.
#include <algorithm>
#include <cstddef>
#include <utility>

#include "ionledger/diagnostic.hpp"

namespace ionledger {
namespace {

char lower(char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; }

/// Insertions, deletions, substitutions and swaps of neighbours that turn `a` into `b`, no letter
/// being edited twice (the restricted form of the Damerau-Levenshtein distance). Bytes, ASCII case
/// ignored. Source: R. A. Wagner and M. J. Fischer, J. ACM 21 (1974) 168, with the swaps of
/// F. J. Damerau, Commun. ACM 7 (1964) 171.
std::size_t edit_distance(const std::string& a, const std::string& b) {
  std::vector<std::size_t> before(b.size() + 1);
  std::vector<std::size_t> above(b.size() + 1);
  std::vector<std::size_t> row(b.size() + 1);
  for (std::size_t j = 0; j <= b.size(); ++j) row[j] = j;
  for (std::size_t i = 1; i <= a.size(); ++i) {
    std::swap(before, above);
    std::swap(above, row);
    row[0] = i;
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const bool is_same = lower(a[i - 1]) == lower(b[j - 1]);
      row[j] = std::min({above[j] + 1, row[j - 1] + 1, above[j - 1] + (is_same ? 0 : 1)});
      const bool is_swap = i > 1 && j > 1 && lower(a[i - 1]) == lower(b[j - 2]) &&
                           lower(a[i - 2]) == lower(b[j - 1]);
      if (is_swap) row[j] = std::min(row[j], before[j - 2] + 1);
    }
  }
  return row[b.size()];
}

}  // namespace

std::string nearest_word(const std::string& word, const std::vector<std::string>& choices) {
  const std::size_t limit = std::max<std::size_t>(2, word.size() / 3);
  std::size_t best = limit + 1;
  std::string nearest;
  for (const std::string& choice : choices) {
    const auto [shorter, longer] = std::minmax({word.size(), choice.size()});
    if (longer - shorter >= best) continue;
    const std::size_t distance = edit_distance(word, choice);
    // A distance as long as the word means that no letter is left in its place.
    if (distance < best && distance < longer) {
      best = distance;
      nearest = choice;
    }
  }
  return nearest;
}

}  // namespace ionledger
