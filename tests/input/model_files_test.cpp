#include <doctest/doctest.h>

#include <cmath>
#include <string>

#include "input/sha256.hpp"
#include "ionledger/readers.hpp"
#include "support/compare.hpp"

namespace ionledger::testing {
namespace {

/// A set with one of everything; its numbers are invented.
const std::string set_text = R"([set]
name = "small"
default_activity = "davies"

[[basis]]
species = "H+"
reference_protons = 0

[[basis]]
species = "Ca+2"
reference_protons = 0
molar_volume_cm3 = -17.9
source = "book"

[[basis]]
species = "CO3-2"
reference_protons = 2

[[source]]
key = "book"
citation = "A. Author, A Book, 1999"
)";

const std::string carbonate_text = R"([[species]]
species = "HCO3-"
reaction = "HCO3- = H+ + CO3-2"
log10_k = -10.33
of_temperature = { gives = "pk", constant = 10.33, theta = -0.01 }
valid_degc = [0, 90]
uncertainty = 0.01
source = "book"
standing = "secondary_table"
molar_volume_cm3 = 23
note = "an example"
alternatives = [ { log10_k = -10.3, source = "book", note = "a little less" } ]

[[pair]]
species = "CaCO3"
reaction = "Ca+2 + CO3-2 = CaCO3"
log10_k = 3.2
enthalpy_kj_per_mol = 15
heat_capacity_j_per_mol_k = 200
valid_degc = [0, 60]
uncertainty = 0.1
uncertainty_is_estimated = true
source = "book"
standing = "from_memory"

[[species]]
species = "OH-"
reaction = "H2O = H+ + OH-"
log10_k = -14
of_temperature = "water_ion_product"
step_at_25_is_known = "an example"
valid_degc = [0, 100]
uncertainty = 0.01
source = "book"
standing = "read_in_source"

[[species]]
species = "CO2"
reaction = "CO2 + H2O = HCO3- + H+"
log10_k = -6.35
valid_degc = [0, 90]
uncertainty = 0.01
source = "book"
standing = "estimated"

[[mineral]]
name = "calcite"
formula = "CaCO3"
reaction = "calcite = Ca+2 + CO3-2"
log10_k = -8.48
valid_degc = [0, 90]
uncertainty = 0.02
source = "book"
standing = "reproduces_a_check"
is_common_scale = false
remark = "An example."

[[gas]]
name = "carbon dioxide"
formula = "CO2"
reaction = "CO2(g) = CO2"
pressure_unit = "atm"
caution_above_bar = 0.005
caution = "It can hurt."
log10_k = -1.47
valid_degc = [0, 90]
uncertainty = 0.02
source = "book"
standing = "secondary_table"
)";

const std::string words_text = R"([[constituent]]
name = "calcium"
symbols = ["Ca", "Ca+2"]
species = "Ca+2"
mostly = "Ca+2"
equivalents = 2
is_major = true
plain = "Ca"
as = { Ca = 1, CaCO3 = 1 }

[[constituent]]
name = "alkalinity"
kind = "alkalinity"
parts = ["CO3-2"]
mostly = "HCO3-"
equivalents = 1
as = { CaCO3 = 2 }

[[ambiguous]]
word = "iron"
question = "this or that?"

[[activity_model]]
name = "davies"
title = "Davies"
max_ionic_strength_molal = 0.5
source = "book"
water_activity_slope = 0.018
ions = { form = "davies", linear = 0.3, source = "book" }
pairs = { form = "extended_debye_hueckel", size_angstrom = 4.0, source = "book" }
neutrals = { form = "neutral", linear = 0.1, source = "book" }

[activity_model.species]
"Ca+2" = { form = "truesdell_jones", size_angstrom = 5, linear = 0.165, source = "book" }
)";

std::vector<ModelFile> small_set() {
  return {{"words.toml", words_text}, {"set.toml", set_text}, {"carbonate.toml", carbonate_text}};
}

Models read(const std::vector<ModelFile>& files) {
  Diagnostics diagnostics;
  auto models = read_models(files, diagnostics);
  REQUIRE_MESSAGE(models, render(diagnostics));
  CHECK(diagnostics.empty());
  return std::move(*models);
}

/// What is said when the first `old_text` of the small set has become `new_text`.
std::string refusal(const std::string& old_text, const std::string& new_text) {
  std::vector<ModelFile> files = small_set();
  bool is_replaced = false;
  for (ModelFile& file : files) {
    const std::size_t at = file.text.find(old_text);
    if (is_replaced || at == std::string::npos) continue;
    file.text.replace(at, old_text.size(), new_text);
    is_replaced = true;
  }
  REQUIRE_MESSAGE(is_replaced, "no \"" << old_text << "\" to replace");
  Diagnostics diagnostics;
  CHECK_FALSE(read_models(files, diagnostics));
  return render(diagnostics);
}

}  // namespace

TEST_SUITE("input/model_files") {
  TEST_CASE("the basis comes first, whatever the order of the files") {
    const Chemistry chemistry = read(small_set()).chemistry;
    REQUIRE(chemistry.n_basis == 3);
    REQUIRE(chemistry.species.size() == 7);
    CHECK(chemistry.name == "small");
    CHECK(chemistry.species[0].name == "H+");
    CHECK(chemistry.species[1].charge_number == 2);
    CHECK(*chemistry.species[1].molar_volume_cm3 == -17.9);
    CHECK(chemistry.species[2].charge_number == -2);
    CHECK(chemistry.species[3].name == "HCO3-");
    CHECK(chemistry.reference_protons == std::vector<double>{0, 0, 2});
    CHECK(chemistry.sources.at("book") == "A. Author, A Book, 1999");
  }

  TEST_CASE("every key of a species arrives where it belongs") {
    const Chemistry chemistry = read(small_set()).chemistry;
    const Species& species = chemistry.species[3];
    CHECK(species.file == "carbonate.toml");
    CHECK(species.reaction_text == "HCO3- = H+ + CO3-2");
    CHECK(species.reaction.size() == 3);
    CHECK_FALSE(species.is_pair);
    CHECK(*species.molar_volume_cm3 == 23);
    const EquilibriumConstant& constant = species.constant;
    CHECK(constant.log10_k == -10.33);
    REQUIRE(constant.of_temperature);
    CHECK(constant.of_temperature->to_log10_k == -1);
    CHECK(constant.of_temperature->constant == 10.33);
    CHECK(constant.of_temperature->theta == -0.01);
    CHECK(constant.of_temperature->per_t == 0);
    CHECK(constant.valid.low_degc == 0);
    CHECK(constant.valid.high_degc == 90);
    CHECK(constant.uncertainty == 0.01);
    CHECK_FALSE(constant.uncertainty_is_estimated);
    CHECK(constant.source == "book");
    CHECK(constant.standing == Standing::secondary_table);
    CHECK(constant.note == "an example");
    REQUIRE(constant.alternatives.size() == 1);
    CHECK(constant.alternatives[0].log10_k == -10.3);
    CHECK(constant.alternatives[0].note == "a little less");
  }

  TEST_CASE("pairs, water and constants without a function are told apart") {
    const Chemistry chemistry = read(small_set()).chemistry;
    const Species& pair =
        chemistry.species[static_cast<std::size_t>(chemistry.species_index("CaCO3"))];
    CHECK(pair.is_pair);
    CHECK(pair.charge_number == 0);
    CHECK_FALSE(pair.constant.of_temperature);
    CHECK(*pair.constant.enthalpy_kj_per_mol == 15);
    CHECK(*pair.constant.heat_capacity_j_per_mol_k == 200);
    CHECK(pair.constant.uncertainty_is_estimated);
    CHECK(pair.constant.standing == Standing::from_memory);
    const Species& hydroxide =
        chemistry.species[static_cast<std::size_t>(chemistry.species_index("OH-"))];
    CHECK(hydroxide.constant.is_water_ion_product);
    CHECK(hydroxide.constant.step_at_25_is_known == "an example");
    CHECK(hydroxide.constant.standing == Standing::read_in_source);
  }

  TEST_CASE("every key of a mineral and a gas arrives where it belongs") {
    const Chemistry chemistry = read(small_set()).chemistry;
    const Mineral& mineral = chemistry.minerals.at(0);
    CHECK(mineral.name == "calcite");
    CHECK(mineral.formula == "CaCO3");
    CHECK_FALSE(mineral.is_common_scale);
    CHECK(mineral.remark == "An example.");
    CHECK(mineral.constant.standing == Standing::reproduces_a_check);
    CHECK(mineral.dissolution == std::vector<double>{0, 1, 1});
    const Gas& gas = chemistry.gases.at(0);
    CHECK(gas.name == "carbon dioxide");
    CHECK(gas.bar_per_unit == 1.01325);
    CHECK(gas.caution_above_bar == 0.005);
    CHECK(gas.caution == "It can hurt.");
  }

  TEST_CASE("every key of the words of a report arrives where it belongs") {
    const Chemistry chemistry = read(small_set()).chemistry;
    REQUIRE(chemistry.constituents.size() == 2);
    const Constituent& calcium = chemistry.constituents[0];
    CHECK(calcium.name == "calcium");
    CHECK(calcium.symbols == std::vector<std::string>{"Ca", "Ca+2"});
    CHECK(calcium.kind == Constituent::Kind::total);
    CHECK(calcium.basis_species == "Ca+2");
    CHECK(calcium.mostly == "Ca+2");
    CHECK(calcium.equivalents == 2);
    CHECK(calcium.is_major);
    CHECK(calcium.plain == "Ca");
    CHECK(calcium.as.at("CaCO3") == 1);
    const Constituent& alkalinity = chemistry.constituents[1];
    CHECK(alkalinity.kind == Constituent::Kind::alkalinity);
    CHECK(alkalinity.parts == std::vector<std::string>{"CO3-2"});
    CHECK_FALSE(alkalinity.is_major);
    CHECK(chemistry.ambiguous_words.at(0).question == "this or that?");
  }

  TEST_CASE("every key of an activity model arrives where it belongs") {
    const Models models = read(small_set());
    CHECK(models.default_activity_model == "davies");
    CHECK(models.activity_model("nothing of the kind") == nullptr);
    const ActivityModel* model = models.activity_model("davies");
    REQUIRE(model != nullptr);
    CHECK(model->title == "Davies");
    CHECK(model->max_ionic_strength_molal == 0.5);
    CHECK(model->water_activity_slope == 0.018);
    CHECK(model->ions.form == ActivityForm::davies);
    CHECK(model->ions.linear == 0.3);
    CHECK(model->pairs.form == ActivityForm::extended_debye_hueckel);
    CHECK(model->pairs.size_angstrom == 4);
    CHECK(model->neutrals.form == ActivityForm::neutral);
    CHECK(model->species.at("Ca+2").form == ActivityForm::truesdell_jones);
    CHECK(model->species.at("Ca+2").size_angstrom == 5);
    CHECK(model->species.at("Ca+2").linear == 0.165);
  }

  TEST_CASE("the digest covers names and texts in the order of the names") {
    std::vector<ModelFile> files = small_set();
    const std::string digest = read(files).chemistry.digest;
    const std::string zero(1, '\0');
    CHECK(digest ==
          "sha256:" + sha256("carbonate.toml" + zero + carbonate_text + zero + "set.toml" + zero +
                             set_text + zero + "words.toml" + zero + words_text + zero));
    files[0].text += "# a remark\n";
    CHECK(read(files).chemistry.digest != digest);
  }

  TEST_CASE("a reaction that does not balance is refused at its table") {
    CHECK(refusal("HCO3- = H+ + CO3-2", "HCO3- = 2 H+ + CO3-2") ==
          "carbonate.toml:1:1: error: the reaction of HCO3- does not balance\n"
          "  found:    \"HCO3- = 2 H+ + CO3-2\": right side minus left side is H +1, charge +1\n"
          "  expected: the same atoms and the same charge on both sides\n");
  }

  TEST_CASE("a constant without a source is refused") {
    CHECK(refusal("source = \"book\"\nstanding = \"secondary_table\"",
                  "standing = \"secondary_table\"") ==
          "carbonate.toml:1:1: error: species[1].source is missing\n"
          "  expected: the key of a [[source]]\n");
  }

  TEST_CASE("a source that nobody lists is refused with the nearest that is listed") {
    CHECK(refusal("source = \"book\"\nstanding = \"estimated\"",
                  "source = \"bok\"\nstanding = \"estimated\"") ==
          "carbonate.toml:43:10: error: there is no source \"bok\"\n"
          "  found:    \"bok\" for species[3].source\n"
          "  expected: a key of some [[source]]\n"
          "  fix:      did you mean \"book\"?\n");
  }

  TEST_CASE("a species defined twice is refused with the first place") {
    CHECK(refusal("species = \"CaCO3\"", "species = \"HCO3-\"") ==
          "carbonate.toml:14:1: error: \"HCO3-\" is defined twice\n"
          "  found:    a table for pair[1]\n"
          "  expected: one definition; the first is at carbonate.toml:1\n");
  }

  TEST_CASE("a word that two constituents claim is refused") {
    CHECK(refusal("word = \"iron\"", "word = \"Ca\"").find("\"Ca\" is defined twice") !=
          std::string::npos);
  }

  TEST_CASE("an unknown key is refused with the nearest that is known") {
    const std::string message = refusal("remark = ", "remarc = ");
    CHECK(message.find("carbonate.toml:56:1: error: unknown key \"remarc\"\n") == 0);
    CHECK(message.find("did you mean \"remark\"?") != std::string::npos);
    CHECK(refusal("[[ambiguous]]", "[[ambigous]]").find("did you mean \"ambiguous\"?") !=
          std::string::npos);
    CHECK(refusal("theta = ", "tetha = ").find("did you mean \"theta\"?") != std::string::npos);
  }

  TEST_CASE("nan and infinity are refused wherever a number is due") {
    CHECK(refusal("log10_k = -8.48", "log10_k = nan") ==
          "carbonate.toml:50:11: error: mineral[1].log10_k is not a finite number\n"
          "  found:    nan for mineral[1].log10_k\n"
          "  expected: the value at 25 degC, a number\n");
    CHECK(refusal("theta = -0.01", "theta = inf").find("is not a finite number") !=
          std::string::npos);
    CHECK(refusal("linear = 0.3", "linear = -inf").find("is not a finite number") !=
          std::string::npos);
    CHECK(refusal("CaCO3 = 1 }", "CaCO3 = nan }").find("is not a finite number") !=
          std::string::npos);
  }

  TEST_CASE("words outside their list are refused") {
    CHECK(refusal("\"reproduces_a_check\"", "\"checked\"").find("\"checked\" is not a standing") !=
          std::string::npos);
    CHECK(refusal("gives = \"pk\"", "gives = \"pK\"").find("\"pK\" is not a gives") !=
          std::string::npos);
    CHECK(refusal("\"atm\"", "\"psi\"").find("\"psi\" is not a pressure_unit") !=
          std::string::npos);
    CHECK(refusal("form = \"neutral\"", "form = \"none\"").find("is not a form of") !=
          std::string::npos);
    CHECK(refusal("kind = \"alkalinity\"", "kind = \"acidity\"").find("is not a kind of") !=
          std::string::npos);
    CHECK(refusal("\"water_ion_product\"", "\"water\"").find("is not a function of temperature") !=
          std::string::npos);
  }

  TEST_CASE("a parameter that its form does not have is refused") {
    CHECK(refusal("form = \"davies\", linear", "form = \"davies\", size_angstrom = 3, linear")
              .find("unknown key \"size_angstrom\"") != std::string::npos);
  }

  TEST_CASE("ranges and signs that make no sense are refused") {
    CHECK(refusal("[0, 60]", "[60, 0]").find("is not a range") != std::string::npos);
    CHECK(refusal("[0, 60]", "[0, 60, 90]").find("is not a range") != std::string::npos);
    CHECK(refusal("uncertainty = 0.1", "uncertainty = -0.1").find("is negative") !=
          std::string::npos);
    CHECK(refusal("size_angstrom = 5", "size_angstrom = -5").find("is negative") !=
          std::string::npos);
    CHECK(refusal("equivalents = 2", "equivalents = -2").find("are negative") != std::string::npos);
    CHECK(refusal("caution_above_bar = 0.005", "caution_above_bar = 0").find("not above zero") !=
          std::string::npos);
    CHECK(refusal("caution = \"It can hurt.\"\n", "").find("gas[1].caution is missing") !=
          std::string::npos);
  }

  TEST_CASE("a name that is no species and a reaction that is none are refused") {
    CHECK(
        refusal("species = \"HCO3-\"", "species = \"HCO3-12\"").find("does not end in a charge") !=
        std::string::npos);
    CHECK(refusal("H2O = H+ + OH-", "H2O -> H+ + OH-").find("this is not a reaction") !=
          std::string::npos);
    CHECK(refusal("\"Ca+2\" = { form", "\"Mg+2\" = { form").find("there is no species \"Mg+2\"") !=
          std::string::npos);
  }

  TEST_CASE("a set without its heading, its hydrogen or its default model is refused") {
    CHECK(refusal("[set]\nname = \"small\"\ndefault_activity = \"davies\"\n", "") ==
          "models: error: no model file has a [set]\n"
          "  expected: [set] with name and default_activity\n");
    CHECK(refusal("species = \"H+\"", "species = \"Na+\"").find("basis]] species is not H+") !=
          std::string::npos);
    CHECK(refusal("default_activity = \"davies\"", "default_activity = \"davis\"") ==
          "set.toml:3:20: error: there is no activity_model \"davis\"\n"
          "  found:    \"davis\" for set.default_activity\n"
          "  expected: the name of some [[activity_model]]\n"
          "  fix:      did you mean \"davies\"?\n");
    Diagnostics diagnostics;
    CHECK_FALSE(read_models({}, diagnostics));
    CHECK(diagnostics.has_errors());
  }

  TEST_CASE("a function that misses its value at 25 degC is refused") {
    CHECK(refusal("constant = 10.33", "constant = 10.36").find("misses its value at 25 degC") !=
          std::string::npos);
  }

  TEST_CASE("mistakes in several files are told together, in their order") {
    std::vector<ModelFile> files = small_set();
    files[1].text += "oops = 1\n";
    files[2].text += "oops = 1\n";
    files.push_back({"broken.toml", "a = \n"});
    Diagnostics diagnostics;
    CHECK_FALSE(read_models(files, diagnostics));
    const auto found = diagnostics.sorted();
    REQUIRE(found.size() == 3);
    CHECK(found[0].where.file == "broken.toml");
    CHECK(found[1].where.file == "carbonate.toml");
    CHECK(found[2].where.file == "set.toml");
  }

  TEST_CASE("the models built in are read without a word") {
    const Models models = read(built_in_models());
    CHECK(models.chemistry.minerals.size() > 10);
    CHECK(models.activity_model(models.default_activity_model) != nullptr);
  }
}

}  // namespace ionledger::testing
