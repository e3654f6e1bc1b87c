#include <doctest/doctest.h>

#include <cmath>
#include <string>

#include "ionledger/readers.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

/// What the reader says of the built-in models with `from` replaced by `to` in one file.
std::string findings_with(const std::string& file, const std::string& from, const std::string& to) {
  std::vector<ModelFile> files = built_in_models();
  bool is_changed = false;
  for (ModelFile& model : files) {
    const std::size_t at = model.name == file ? model.text.find(from) : std::string::npos;
    if (at == std::string::npos) continue;
    model.text.replace(at, from.size(), to);
    is_changed = true;
  }
  REQUIRE_MESSAGE(is_changed, file << " has no " << from);
  Diagnostics diagnostics;
  CHECK(!read_models(files, diagnostics));
  return render(diagnostics);
}

bool says(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

}  // namespace

TEST_SUITE("input/model trade") {
  TEST_CASE("limiting conductivities keep value, exponent, source and standing") {
    const ConductivityModel& model = models().chemistry.conductivity;
    REQUIRE(model.ions.count("Ca+2") == 1);
    const IonConductivity& calcium = model.ions.at("Ca+2");
    CHECK(calcium.limiting_s_cm2_per_eq == 59.47);
    CHECK(calcium.viscosity_exponent == 0.941);
    CHECK(calcium.source == "crc_ionic_conductivity");
    CHECK(calcium.standing == Standing::secondary_table);
    CHECK(model.ions.at("HCO3-").viscosity_exponent == model.unlisted_viscosity_exponent);
  }

  TEST_CASE("the exponents are those between the 0 and 25 degC values of Lange's table") {
    // lambda(25)/lambda(0) against the viscosity ratio 1.7918/0.8900 (IAPWS 2008).
    struct Row {
      const char* ion;
      double at_0, at_25;
    };
    for (const Row& row : {Row{"H+", 224.1, 350.1},
                           Row{"Na+", 25.85, 50.11},
                           Row{"K+", 40.3, 73.5},
                           Row{"Ca+2", 30.8, 59.5},
                           Row{"Mg+2", 28.5, 53.06}}) {
      CAPTURE(row.ion);
      const double exponent = std::log(row.at_25 / row.at_0) / std::log(1.7918 / 0.8900);
      CHECK(models().chemistry.conductivity.ions.at(row.ion).viscosity_exponent ==
            within(exponent, 0.001));
    }
  }

  TEST_CASE("a conductivity for an unknown species is refused") {
    const std::string text = findings_with("conductivity.toml", "\"Sr+2\"", "\"Zz+2\"");
    CHECK(says(text, "conductivity.toml:"));
    CHECK(says(text, "there is no species \"Zz+2\""));
  }

  TEST_CASE("an exponent without its source and an unknown source are refused") {
    CHECK(says(findings_with("conductivity.toml", "exponent_source = \"lange_1999\", ", ""),
               "exponent_source is missing"));
    CHECK(says(findings_with("conductivity.toml",
                             "exponent_source = \"lange_1999\"",
                             "exponent_source = \"lunge_1999\""),
               "there is no source \"lunge_1999\""));
  }

  TEST_CASE("sizes must be positive and known by charge") {
    CHECK(says(findings_with("conductivity.toml", "[4.25, 6.5, 9.0]", "[4.25, 0.0, 9.0]"),
               "is not positive"));
    CHECK(says(findings_with("conductivity.toml", "[4.25, 6.5, 9.0]", "[]"), "is empty"));
  }

  TEST_CASE("roles must name a basis species, a species and a mineral") {
    CHECK(says(findings_with("indices.toml", "calcium = \"Ca+2\"", "calcium = \"CaCO3\""),
               "\"CaCO3\" is not a basis species"));
    CHECK(says(findings_with("indices.toml", "\"HCO3-\"", "\"HCO4-\""),
               "there is no species \"HCO4-\""));
    CHECK(says(findings_with("indices.toml", "\"calcite\"", "\"kalcite\""),
               "did you mean \"calcite\""));
    CHECK(says(findings_with("indices.toml", "sodium =", "sodum ="), "unknown key \"sodum\""));
  }

  TEST_CASE("dissolved solids count basis species as formulas") {
    CHECK(says(findings_with("indices.toml", "\"H4SiO4\"", "\"H3SiO4-\""),
               "\"H3SiO4-\" is not a basis species"));
    CHECK(says(findings_with("indices.toml", "\"SiO2\"", "\"Sillica\""),
               "\"Sillica\" is not a chemical formula"));
  }

  TEST_CASE("a second table of conductivity is refused") {
    CHECK(says(findings_with("indices.toml", "[index_roles]", "[conductivity]\n\n[index_roles]"),
               "is defined twice"));
  }
}

}  // namespace ionledger::testing
