// Columns, cutting and wrapping of UTF-8 text.
#include "report/terminal_text.hpp"

#include "support/compare.hpp"

using namespace ionledger;

TEST_SUITE("report/terminal_text") {
  TEST_CASE("Columns are counted, not bytes") {
    CHECK(display_width("calcite") == 7);
    CHECK(display_width("912 µS/cm at 25 °C") == 18);
    CHECK(display_width("3.20 × 10⁻³") == 11);
    CHECK(display_width("水") == 2);
    CHECK(display_width("e\u0301") == 1);
  }

  TEST_CASE("A cut is shown and never makes the text longer") {
    CHECK(clipped("gypsum", 6) == "gypsum");
    CHECK(clipped("gypsum", 5) == "gyps…");
    CHECK(clipped("gypsum", 0).empty());
    CHECK(clipped("水水水", 4) == "水…");
    for (int columns = 0; columns < 8; ++columns) {
      CHECK(display_width(clipped("水°µe\u0301水", columns)) <= columns);
    }
  }

  TEST_CASE("Padding counts columns") {
    CHECK(padded_right("µ", 3) == "µ  ");
    CHECK(padded_left("µ", 3) == "  µ");
    CHECK(padded_left("long", 3) == "long");
  }

  TEST_CASE("Wrapping keeps every word and no line is too long") {
    CHECK(wrapped("one two three", 7) == std::vector<std::string>{"one two", "three"});
    CHECK(wrapped("", 7) == std::vector<std::string>{""});
    CHECK(wrapped("abcdefgh ij", 3) == std::vector<std::string>{"abc", "def", "gh", "ij"});
    CHECK(wrapped("水水", 1).size() == 2);
  }
}
