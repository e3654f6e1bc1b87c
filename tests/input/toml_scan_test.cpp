#include "input/toml_scan.hpp"

#include <doctest/doctest.h>

#include <string>

namespace ionledger {
namespace {

constexpr std::size_t nowhere = std::string::npos;

/// Where the scan stops, or nowhere.
std::size_t stop(const std::string& text) {
  const auto error = scan_toml(text);
  return error ? error->offset : nowhere;
}

std::string dotted(int dots) {
  std::string key = "a";
  for (int i = 0; i < dots; ++i) key += ".a";
  return key;
}

}  // namespace

TEST_SUITE("input/toml_scan") {
  TEST_CASE("a character beyond ASCII may stand in every kind of text and in comments") {
    CHECK(stop("a = \"é\" # é\nb = 'é'\nc = \"\"\"é\né\"\"\"\nd = '''é\né'''\n") == nowhere);
    CHECK(stop("\"é\".'é' = [\"é\",\"é\"]\n[\"é\"]\ne={\"é\"='é'}\n") == nowhere);
  }

  TEST_CASE("a character beyond ASCII is found outside them") {
    CHECK(stop("é = 1") == 0);
    CHECK(stop("a = é") == 4);
    CHECK(stop("a = \"é\" é") == 9);
    CHECK(stop("a = \"é\né = 1") == 8);
    CHECK(stop("# é\né") == 5);
  }

  TEST_CASE("a quotation mark inside a word opens nothing") {
    CHECK(stop("a = 5'é'") == 6);
    CHECK(stop("a = x\"é\"") == 6);
  }

  TEST_CASE("escapes and marks within a text do not end it") {
    CHECK(stop("a = \"\\\"é\"") == nowhere);
    CHECK(stop("a = \"\\\\\" é") == 9);
    CHECK(stop("a = '\\' é") == 8);
    CHECK(stop("a = '''it's \"é\"''' # é") == nowhere);
    CHECK(stop("a = \"\"\"\"é\"\"\"") == nowhere);
  }

  TEST_CASE("a long text may end with two marks of its own") {
    CHECK(stop("a = \"\"\"x\"\"\"\"\" é") == 14);
    CHECK(stop("a = \"\"\"x\"\"\"\" é") == 13);
    CHECK(stop("a = '''x''''' é") == 14);
    CHECK(stop("a = \"\" é") == 7);
  }

  TEST_CASE("a backslash that ends a line is refused, other escapes are not") {
    CHECK(stop("a = \"\"\"x\\\n  é\"\"\"") == 8);
    CHECK(stop("a = \"\"\"x\\  \né\"\"\"") == 8);
    CHECK(stop("a = \"\"\"x\\é\"\"\"") == 8);
    CHECK(stop("a = \"\"\"x\\t\\\"é\"\"\"") == nowhere);
    CHECK(stop("a = '''x\\\n  é'''") == nowhere);
  }

  TEST_CASE("fifty dots make a key, one more does not, and dots elsewhere do not count") {
    CHECK(stop(dotted(50) + " = 1\n" + dotted(50) + " = 1") == nowhere);
    CHECK(stop(dotted(51) + " = 1") == 101);
    CHECK(stop("[" + dotted(51) + "]") == 102);
    CHECK(stop("a = \"" + std::string(100, '.') + "\" # " + std::string(100, '.')) == nowhere);
  }

  TEST_CASE("texts that end too soon end the scan") {
    for (const char* text :
         {"\"", "\"\\", "\"\"\"", "\"\"\"\\", "'''", "'", "a = \"\"\"\"", "#", ""}) {
      CHECK(stop(text) == nowhere);
    }
  }
}

}  // namespace ionledger
