// Finding things in a Chemistry by name.
#include "ionledger/chemistry.hpp"

#include <algorithm>
#include <cctype>

namespace ionledger {
namespace {

template <class Items>
int index_of(const Items& items, std::string_view name) {
  const auto found =
      std::find_if(items.begin(), items.end(), [&](const auto& item) { return item.name == name; });
  return found == items.end() ? -1 : static_cast<int>(found - items.begin());
}

std::string lower(std::string_view text) {
  std::string result(text);
  for (char& c : result) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return result;
}

}  // namespace

int Chemistry::species_index(std::string_view wanted) const { return index_of(species, wanted); }
int Chemistry::mineral_index(std::string_view wanted) const { return index_of(minerals, wanted); }
int Chemistry::gas_index(std::string_view wanted) const { return index_of(gases, wanted); }

int Chemistry::constituent_index(std::string_view name_or_symbol) const {
  const std::string wanted = lower(name_or_symbol);
  for (std::size_t i = 0; i < constituents.size(); ++i) {
    const Constituent& constituent = constituents[i];
    // Symbols keep their case: "Co" and "CO" are different things.
    const bool by_symbol =
        std::find(constituent.symbols.begin(), constituent.symbols.end(), name_or_symbol) !=
        constituent.symbols.end();
    if (by_symbol || lower(constituent.name) == wanted) return static_cast<int>(i);
  }
  return -1;
}

}  // namespace ionledger
