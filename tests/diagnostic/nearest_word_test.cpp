// Which known word a misspelt one is taken for.
#include <doctest/doctest.h>

#include "ionledger/diagnostic.hpp"

using namespace ionledger;

TEST_SUITE("diagnostic/nearest_word") {
  TEST_CASE("one letter missing, added, wrong or swapped is still recognised") {
    const std::vector<std::string> choices = {"magnesium", "calcium", "sodium"};
    CHECK(nearest_word("calium", choices) == "calcium");
    CHECK(nearest_word("calccium", choices) == "calcium");
    CHECK(nearest_word("calciun", choices) == "calcium");
    CHECK(nearest_word("clacium", choices) == "calcium");
  }

  TEST_CASE("two swaps are two edits, four substitutions are four") {
    CHECK(nearest_word("badc", {"abcd"}) == "abcd");
    CHECK(nearest_word("wxyz", {"abcd"}).empty());
  }

  TEST_CASE("letter case is ignored") {
    CHECK(nearest_word("CALCIUM", {"sodium", "calcium"}) == "calcium");
  }

  TEST_CASE("the limit is two edits for short words and a third of the length for long ones") {
    CHECK(nearest_word("sodxxm", {"sodium"}) == "sodium");
    CHECK(nearest_word("soxxxm", {"sodium"}).empty());
    CHECK(nearest_word("inorganic_xxxxxx", {"inorganic_carbon"}).empty());
    CHECK(nearest_word("inorganic_xxxxon", {"inorganic_carbon"}) == "inorganic_carbon");
  }

  TEST_CASE("the nearest wins, and among equals the first") {
    CHECK(nearest_word("sulfide", {"sulfate", "sulfite"}) == "sulfite");
    CHECK(nearest_word("aluminium", {"aluminun", "aluminum"}) == "aluminum");
    CHECK(nearest_word("mb", {"mg", "mm"}) == "mg");
  }

  TEST_CASE("a word that shares no letter in place is no suggestion") {
    CHECK(nearest_word("xy", {"mg", "L"}).empty());
    CHECK(nearest_word("", {"L"}).empty());
    CHECK(nearest_word("mg", {}).empty());
  }
}
