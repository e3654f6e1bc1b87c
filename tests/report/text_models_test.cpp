// What is said about the models: a small invented set with one thing of each kind.
#include <string>

#include "ionledger/report.hpp"
#include "report/terminal_text.hpp"
#include "report/text_constant.hpp"
#include "support/compare.hpp"

using namespace ionledger;

namespace {

bool holds(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

EquilibriumConstant example_constant() {
  EquilibriumConstant constant;
  constant.log10_k = -8.48;
  TemperatureFunction function;
  function.constant = -171.9065;
  function.per_t = 2839.319;
  function.t_1 = -0.077993;
  constant.of_temperature = function;
  constant.valid = {0, 90};
  constant.uncertainty = 0.02;
  constant.source = "someone_1982";
  constant.standing = Standing::secondary_table;
  constant.note = "Why this value.";
  constant.alternatives = {{-8.3, "other_1990", "What it would change."}};
  return constant;
}

Models example_models() {
  Models models;
  Chemistry& chemistry = models.chemistry;
  chemistry.name = "an invented set";
  chemistry.digest = "sha256:" + std::string(64, 'b');
  Species hydrogen, carbonate, bicarbonate;
  hydrogen.name = "H+";
  hydrogen.charge_number = 1;
  carbonate.name = "CO3-2";
  carbonate.charge_number = -2;
  bicarbonate.name = "HCO3-";
  bicarbonate.charge_number = -1;
  bicarbonate.reaction_text = "HCO3- = H+ + CO3-2";
  bicarbonate.constant = example_constant();
  bicarbonate.formation = {1, 1};
  chemistry.species = {hydrogen, carbonate, bicarbonate};
  chemistry.n_basis = 2;
  Mineral calcite;
  calcite.name = "calcite";
  calcite.formula = "CaCO3";
  calcite.remark = "The usual hard scale.";
  calcite.reaction_text = "calcite = Ca+2 + CO3-2";
  calcite.dissolution = {0, 1};
  calcite.constant = example_constant();
  chemistry.minerals = {calcite};
  Gas gas;
  gas.name = "carbon dioxide";
  gas.formula = "CO2";
  gas.bar_per_unit = 1.01325;
  gas.reaction_text = "CO2(g) = CO2";
  gas.constant = example_constant();
  chemistry.gases = {gas};
  Constituent carbon;
  carbon.name = "inorganic_carbon";
  carbon.symbols = {"CO3-2"};
  carbon.basis_species = "CO3-2";
  carbon.as = {{"C", 1}, {"CO2", 1}};
  chemistry.constituents = {carbon};
  chemistry.sources = {{"someone_1982", "A. Someone, A Journal 1 (1982) 1-2"}};
  ActivityModel davies;
  davies.name = "davies";
  davies.title = "Davies (1962)";
  davies.max_ionic_strength_molal = 0.5;
  davies.source = "someone_1982";
  models.activity_models = {davies};
  models.default_activity_model = "davies";
  return models;
}

std::string page_on(const std::string& topic) { return text_models(example_models(), topic, {}); }

}  // namespace

TEST_SUITE("report/text_models") {
  TEST_CASE("The overview counts and lists what there is") {
    const std::string text = page_on("");
    CHECK(holds(text, "3 species (2 of them the basis, 0 pairs), 1 mineral, 1 gas"));
    CHECK(holds(text, "calcite  CaCO3      \u22128.48  ±0.04  0 to 90"));
    CHECK(holds(text, "HCO3- = H+ + CO3-2"));
    CHECK(holds(text, "Basis: H+, CO3-2."));
    CHECK(holds(text, "(default) Davies (1962)"));
  }

  TEST_CASE("A constant is printed with everything that is known of it") {
    const std::string text = page_on("calcite");
    for (const char* part : {"calcite = Ca+2 + CO3-2",
                             "\u22128.480",
                             "±0.039",  // 1.96 times 0.02
                             "log10 K = \u2212171.9065 + 2\u202F839.319/T \u2212 0.077993 T",
                             "0 to 90 °C",
                             "A. Someone, A Journal 1 (1982) 1-2 [someone_1982]",
                             "read in a handbook or review that quotes the source",
                             "Why this value.",
                             "\u22128.300: other_1990; What it would change.",
                             "The usual hard scale."}) {
      CAPTURE(part);
      CHECK(holds(text, part));
    }
  }

  TEST_CASE("A function names what it gives") {
    TemperatureFunction function;
    function.constant = 1.5;
    function.theta_2 = -2e-5;
    function.to_log10_k = -1;
    CHECK(function_text(function) == "pK = 1.5 \u2212 2 × 10⁻⁵ (T \u2212 298.15)²");
    function.to_log10_k = 0.4342944819032518;
    CHECK(holds(function_text(function), "ln K = 1.5"));
  }

  TEST_CASE("A name that means several things has several pages") {
    const std::string text = page_on("CO3-2");
    CHECK(holds(text, "dissolved species"));
    CHECK(holds(text, "word of a laboratory report"));
    CHECK(holds(text, "CO3-2, HCO3-"));  // dissolved as
    CHECK(holds(text, "C, CO2"));        // may be given as
  }

  TEST_CASE("Gases, activity models and sources have their pages, other names none") {
    CHECK(holds(page_on("carbon dioxide"), "atm, as the constant was published"));
    CHECK(holds(page_on("davies"), "0.5 mol/kg of ionic strength"));
    CHECK(holds(page_on("someone_1982"), "calcite"));
    CHECK(page_on("inkwell").empty());
  }

  TEST_CASE("No page is wider than asked for") {
    for (const char* topic : {"", "calcite", "HCO3-", "davies", "CO3-2", "someone_1982"}) {
      TextStyle style;
      style.width = 40;
      const std::string text = text_models(example_models(), topic, style);
      CAPTURE(topic);
      for (std::size_t start = 0; start < text.size();) {
        const std::size_t end = text.find('\n', start);
        CHECK(display_width(text.substr(start, end - start)) <= 40);
        start = end + 1;
      }
    }
  }
}
