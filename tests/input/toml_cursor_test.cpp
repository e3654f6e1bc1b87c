#include "input/toml_cursor.hpp"

#include <doctest/doctest.h>

#include <string>

#include "input/file_text.hpp"

namespace ionledger {
namespace {

/// A parsed document and what is found wrong with it.
struct Document {
  explicit Document(const std::string& text) {
    auto parsed = parse_toml(text, findings);
    REQUIRE_MESSAGE(parsed, render(diagnostics));
    root = std::move(*parsed);
  }
  TomlCursor cursor() { return {root, "", findings}; }

  Diagnostics diagnostics;
  TomlFindings findings{"f.toml", diagnostics};
  TomlNode root;
};

std::string place(const SourceSpan& span) {
  return span.file + ":" + std::to_string(span.line) + ":" + std::to_string(span.column);
}

}  // namespace

TEST_SUITE("input/toml_cursor") {
  TEST_CASE("entries come in the order of the file, not of the alphabet") {
    Document document("z = 1\nb = 2\na = 3\n");
    std::string order;
    for (const TomlCursor& entry : document.cursor().entries()) order += entry.key();
    CHECK(order == "zba");
  }

  TEST_CASE("keys and values have their places, counted in characters") {
    Document document("\"ä\" = \"é\"\n[t]\n  k = { \"über\" = 12, v = 3 }\n");
    auto root = document.cursor();
    CHECK(place(root.find("ä")->key_span()) == "f.toml:1:1");
    CHECK(place(root.find("ä")->span()) == "f.toml:1:7");
    auto t = root.find("t");
    REQUIRE(t);
    CHECK(place(t->key_span()) == "f.toml:2:2");
    auto k = t->find("k");
    REQUIRE(k);
    CHECK(place(k->find("v")->span()) == "f.toml:3:26");
  }

  TEST_CASE("paths quote what is no bare key and count from one") {
    Document document("[\"Ca+2\"]\na = [1, [2]]\n");
    auto table = document.cursor().find("Ca+2");
    REQUIRE(table);
    const auto array = table->find("a");
    REQUIRE(array);
    CHECK(array->path() == "\"Ca+2\".a");
    CHECK(array->items("")[1].path() == "\"Ca+2\".a[2]");
  }

  TEST_CASE("whole numbers are numbers, text is not") {
    Document document("a = 120\nb = 1.5\nc = \"1.5\"\n");
    auto root = document.cursor();
    CHECK(root.number_at("a", "") == 120);
    CHECK(root.number_at("b", "") == 1.5);
    CHECK_FALSE(document.findings.any());
    CHECK(root.number_at("c", "a number") == 0);
    CHECK(render(document.diagnostics) ==
          "f.toml:3:5: error: c must be a number\n"
          "  found:    \"1.5\" for c\n"
          "  expected: a number\n");
  }

  TEST_CASE("nan and infinity are numbers to TOML but not here") {
    for (const char* value : {"nan", "inf", "-inf", "+nan"}) {
      Document document(std::string("a = ") + value);
      CHECK_FALSE(document.cursor().find("a")->number(""));
      CHECK(document.findings.any());
    }
  }

  TEST_CASE("a value keeps the way it was written for messages") {
    Document document("a = 1_000.50\nb = 0x1F\nc = 1979-05-27\nd = true\ne = [1]\nf = {}\n");
    auto root = document.cursor();
    CHECK(root.find("a")->found() == "1_000.50 for a");
    CHECK(root.find("b")->found() == "0x1F for b");
    CHECK(root.find("c")->found() == "1979-05-27 for c");
    CHECK(root.find("d")->found() == "true for d");
    CHECK(root.find("e")->found() == "an array for e");
    CHECK(root.find("f")->found() == "a table for f");
  }

  TEST_CASE("keys nobody asked for are refused with the nearest that was asked for") {
    Document document("[t]\nflow = 1\nflwo = 2\n");
    auto table = document.cursor().find("t");
    REQUIRE(table);
    static_cast<void>(table->find("flow"));
    static_cast<void>(table->find("flow"));
    static_cast<void>(table->find("pressure"));
    table->refuse_unknown_keys();
    CHECK(render(document.diagnostics) ==
          "f.toml:3:1: error: unknown key \"flwo\"\n"
          "  found:    \"flwo\" in t\n"
          "  expected: one of flow, pressure\n"
          "  fix:      did you mean \"flow\"?\n");
  }

  TEST_CASE("a place inside a text counts characters behind its quotation mark") {
    Document document("a = \"é µg\"\nb = '''é µg'''\nc = \"\\u00e9 µg\"\n");
    auto root = document.cursor();
    const std::string text = root.text_at("a", "");
    const std::size_t at = text.find('g');
    root.find("a")->error_at(at, "here", "\"g\"", "", "");
    root.find("b")->error_at(at, "here", "\"g\"", "", "");
    root.find("c")->error_at(at, "here", "\"g\"", "", "");
    const auto found = document.diagnostics.sorted();
    REQUIRE(found.size() == 3);
    CHECK(place(found[0].where) == "f.toml:1:9");
    CHECK(place(found[1].where) == "f.toml:2:5");
    CHECK(place(found[2].where) == "f.toml:3:5");
  }

  TEST_CASE("a missing or blank text is said to be so") {
    Document document("a = \"\"\n");
    auto root = document.cursor();
    CHECK(root.text_at("a", "a name").empty());
    CHECK(root.text_at("b", "a name").empty());
    const auto found = document.diagnostics.sorted();
    REQUIRE(found.size() == 2);
    CHECK(found[0].summary == "b is missing");
    CHECK(found[1].summary == "a is blank");
  }

  TEST_CASE("a long quotation is shortened and still whole characters") {
    std::string text;
    for (int i = 0; i < 100; ++i) text += "µ";
    CHECK(code_points(excerpt(text)) == 80 + 3 + 2);
    CHECK(excerpt("short") == "\"short\"");
  }

  TEST_CASE("every malformed sequence of bytes is refused at its character") {
    // Overlong forms, surrogates, beyond U+10FFFF, stray and missing continuation bytes.
    for (const char* bytes : {"\xC0\xAF",
                              "\xE0\x80\xAF",
                              "\xF0\x80\x80\xAF",
                              "\xED\xA0\x80",
                              "\xF4\x90\x80\x80",
                              "\x80",
                              "\xC3",
                              "\xE2\x82",
                              "\xFE"}) {
      Diagnostics diagnostics;
      CHECK_FALSE(readable_text(std::string("a = 1\nä") + bytes, "f.toml", diagnostics));
      const auto found = diagnostics.sorted();
      REQUIRE(found.size() == 1);
      CHECK(place(found[0].where) == "f.toml:2:2");
    }
  }
}

}  // namespace ionledger
