// The layout and order of findings, which editors and scripts rely on.
#include "ionledger/diagnostic.hpp"

#include <doctest/doctest.h>

#include <string>

using namespace ionledger;

TEST_SUITE("diagnostic/diagnostic") {
  TEST_CASE("a finding is rendered as a block that begins with file, line and column") {
    Diagnostics findings;
    findings.error({"tower.toml", 14, 23},
                   "unknown unit \"mg/l as CaC03\"",
                   "\"mg/l as CaC03\" for analysis.calcium",
                   "a concentration unit such as \"mg/L\"",
                   "did you mean \"mg/L as CaCO3\"?");
    CHECK(render(findings) ==
          "tower.toml:14:23: error: unknown unit \"mg/l as CaC03\"\n"
          "  found:    \"mg/l as CaC03\" for analysis.calcium\n"
          "  expected: a concentration unit such as \"mg/L\"\n"
          "  fix:      did you mean \"mg/L as CaCO3\"?\n");
  }

  TEST_CASE("empty lines of a block are left out and warnings say so") {
    Diagnostics findings;
    findings.warning({"tower.toml", 3, 1}, "no charge closes the balance", {}, {}, "name one");
    CHECK(render(findings) ==
          "tower.toml:3:1: warning: no charge closes the balance\n"
          "  fix:      name one\n");
  }

  TEST_CASE("line 0 means the file, and no file means the text alone") {
    Diagnostics findings;
    findings.error({"tower.toml", 0, 0}, "cannot be read");
    CHECK(render(findings) == "tower.toml: error: cannot be read\n");
    Diagnostics without_file;
    without_file.error({}, "no stream");
    CHECK(render(without_file) == "error: no stream\n");
  }

  TEST_CASE("findings are ordered by file, line and column, equal places by discovery") {
    Diagnostics findings;
    findings.error({"b.toml", 1, 1}, "sixth");
    findings.error({"a.toml", 10, 1}, "fifth");
    findings.error({"a.toml", 9, 2}, "third");
    findings.error({"a.toml", 9, 2}, "fourth");
    findings.error({"a.toml", 9, 1}, "second");
    findings.error({"a.toml", 0, 0}, "first");
    std::string order;
    for (const Diagnostic& finding : findings.sorted()) order += finding.summary + " ";
    CHECK(order == "first second third fourth fifth sixth ");
  }

  TEST_CASE("exactly twenty findings are all rendered, and of more the rest is counted") {
    Diagnostics findings;
    for (int line = 1; line <= 20; ++line) findings.error({"a.toml", line, 1}, "wrong");
    CHECK(render(findings).find("more") == std::string::npos);
    CHECK(render(findings).find("a.toml:20:1:") != std::string::npos);
    for (int line = 21; line <= 23; ++line) findings.error({"a.toml", line, 1}, "wrong");
    const std::string text = render(findings);
    CHECK(text.find("a.toml:20:1:") != std::string::npos);
    CHECK(text.find("a.toml:21:1:") == std::string::npos);
    CHECK(text.substr(text.size() - 15) == "... and 3 more\n");
  }

  TEST_CASE("warnings are not errors") {
    Diagnostics findings;
    CHECK(findings.empty());
    CHECK_FALSE(findings.has_errors());
    findings.warning({"a.toml", 1, 1}, "odd");
    CHECK_FALSE(findings.empty());
    CHECK_FALSE(findings.has_errors());
    findings.error({"a.toml", 2, 1}, "wrong");
    CHECK(findings.has_errors());
  }

  TEST_CASE("what a user wrote can neither break a line nor command a terminal") {
    Diagnostics findings;
    findings.error({"a.toml", 1, 1}, "line\nbreak, \x1B[31mred, \xB5g, µg, \xED\xA0\x80");
    CHECK(render(findings) ==
          "a.toml:1:1: error: line\\nbreak, \\x1B[31mred, \\xB5g, µg, \\xED\\xA0\\x80\n");
  }
}
