// Whatever a step does, nothing is lost: every basis species, charge, water and solids.
#include <doctest/doctest.h>

#include <cstdlib>
#include <random>

#include "equilibrium/system.hpp"
#include "support/compare.hpp"
#include "treatment/train_text.hpp"

namespace ionledger::testing {
namespace {

constexpr double conserved = 1e-12;

const std::string well = R"(
[stream]
temperature = "12 degC"
pH = "7.18"
flow = "40 m3/h"
[analysis]
calcium = "104 mg/L"
magnesium = "14.6 mg/L"
sodium = "21.5 mg/L"
potassium = "2.8 mg/L"
ammonia = "0.4 mg/L as N"
barium = "62 ug/L"
chloride = "38 mg/L"
sulfate = "61 mg/L"
nitrate = "2.1 mg/L as N"
fluoride = "0.22 mg/L"
silica = "14.5 mg/L as SiO2"
phosphate = "0.5 mg/L as P"
alkalinity = "4.943 meq/L"
)";

/// One step of every kind, and some in several forms.
const std::vector<std::string> steps = {
    "blend = \"other\"\nshare = \"30 %\"",
    "blend = \"other\"\nflow = \"12 m3/h\"",
    "dose = \"sulfuric acid 96 %\"\namount = \"60 mg/L\"",
    "dose = \"sodium hydroxide 50 %\"\nactive = \"0.7 mmol/L\"",
    "dose = \"ferric chloride 40 %\"\namount = \"20 mL/m3\"",
    "dose = \"alum 14-hydrate\"\namount = \"1.2 kg/h\"",
    "dose = \"quicklime 90 %\"\nactive = \"40 mg/L\"",
    "dose = \"carbon dioxide\"\namount = \"30 mg/L\"",
    "dose = \"barium hydroxide octahydrate\"\namount = \"20 mg/kg\"",
    "heat_to = \"46 degC\"",
    "cool_to = \"5 degC\"",
    "concentrate = \"3.1 cycles\"",
    "concentrate = \"30 % evaporated\"",
    "concentrate = \"70 % recovery\"\nrejection = { sodium = \"96 %\", chloride = \"95 %\", "
    "nitrate = \"88 %\", inorganic_carbon = \"97 %\" }\npolarisation = 1.1",
    "concentrate = \"50 % recovery\"\nrejection = { sodium = \"90 %\" }\nkeep = \"permeate\"",
    "strip = { carbon_dioxide = \"80 %\", ammonia = \"10 %\" }",
    "open_to = \"air\"",
    "open_to = { carbon_dioxide = \"0.01 bar\" }",
    "headspace = \"0.5 L/L\"\nof = \"air\"",
    "settle = [\"calcite\", \"brucite\", \"barite\", \"ferrihydrite\"]",
    "settle = { calcite = 0.3, gypsum = 0 }\nkeep_solids = true",
    "remove_solids = \"90 %\"",
    "pass_bed_of = \"calcite\"",
    "exchange = \"softener\"\nleakage = \"2 %\"",
    "exchange = \"weak acid cation\"",
    "exchange = \"chloride dealkaliser\"",
    "exchange = \"mixed bed\"\nleakage = \"0.1 %\"",
};

std::string as_step(const std::string& text) { return "[[step]]\n" + text + "\n"; }

/// out = in + net of every amount, to rounding of what moved.
void check_conserved(const Water& before, const StepOutcome& step) {
  const Chemistry& chemistry = models().chemistry;
  const Amounts in = amounts_of(before);
  const Amounts out = amounts_of(step.water);
  const Amounts net = net_of(step.record, chemistry);
  const auto same = [](double a, double b, double c) {
    return std::abs(a + b - c) <= conserved * (std::abs(a) + std::abs(b) + std::abs(c));
  };
  for (std::size_t i = 0; i < in.basis.size(); ++i) {
    CAPTURE(chemistry.species[i].name);
    CHECK(same(in.basis[i], net.basis[i], out.basis[i]));
  }
  for (std::size_t m = 0; m < in.solids.size(); ++m) CHECK(out.solids[m] >= 0);
  CHECK(same(in.water_kg, net.water_kg, out.water_kg));
  const double charge = net_charge(chemistry, out.basis);
  double gross = 0;
  for (std::size_t i = 0; i < out.basis.size(); ++i) {
    const int z = chemistry.species[i].charge_number;
    gross += std::abs(z * out.basis[i]) + std::abs(z * in.basis[i]);
  }
  const double expected = net_charge(chemistry, in.basis) + net_charge(chemistry, net.basis);
  CHECK(std::abs(charge - expected) <= 1e-13 * gross);
}

/// Minerals cross from dissolved to solid, so they are counted as what they dissolve to.
StepOutcome with_solids_dissolved(StepOutcome step) {
  const Chemistry& chemistry = models().chemistry;
  const auto dissolve = [&](Amounts& amounts) {
    for (std::size_t m = 0; m < amounts.solids.size(); ++m) {
      for (std::size_t i = 0; i < amounts.basis.size(); ++i) {
        amounts.basis[i] += amounts.solids[m] * chemistry.minerals[m].dissolution[i];
      }
      amounts.water_kg += amounts.solids[m] * chemistry.minerals[m].water_exponent *
                          molar_mass_g_per_mol({{"H", 2}, {"O", 1}}) / 1000;
      amounts.solids[m] = 0;
    }
  };
  for (auto* list : {&step.record.added, &step.record.removed, &step.record.deposited}) {
    for (Portion& portion : *list) dissolve(portion.amounts);
  }
  return step;
}

Water dissolved(const Water& water) {
  const Chemistry& chemistry = models().chemistry;
  Water result = water;
  double water_gain = 0;
  for (std::size_t m = 0; m < water.solids.size(); ++m) {
    for (std::size_t i = 0; i < result.totals.size(); ++i) {
      result.totals[i] += water.solids[m] * chemistry.minerals[m].dissolution[i];
    }
    water_gain += water.solids[m] * chemistry.minerals[m].water_exponent *
                  molar_mass_g_per_mol({{"H", 2}, {"O", 1}}) / 1000;
    result.solids[m] = 0;
  }
  for (double& total : result.totals) total /= 1 + water_gain;
  result.water_kg *= 1 + water_gain;
  return result;
}

/// A portion weighs what its amounts weigh; only the inert rest of a product is not booked.
void check_mass(const Portion& portion) {
  const Reagent* reagent = models().supplies.reagent(portion.what);
  if (reagent != nullptr && !reagent->rest_is_water) return;
  CAPTURE(portion.what);
  CHECK(mass_kg(portion.amounts, models().chemistry) == rel(portion.kg, conserved));
}

void check_train_conserved(const TrainRun& run) {
  Water before = run.feed;
  for (const StepOutcome& step : run.outcome.steps) {
    CAPTURE(step.name);
    for (const Portion& portion : step.record.added) check_mass(portion);
    for (const Portion& portion : step.record.removed) check_mass(portion);
    StepOutcome whole = with_solids_dissolved(step);
    whole.water = dissolved(step.water);
    check_conserved(dissolved(before), whole);
    before = step.water;
  }
}

}  // namespace

TEST_SUITE("treatment/conservation") {
  TEST_CASE("every step conserves every constituent, charge and water") {
    const Water other = run_text(well + as_step("heat_to = \"30 degC\"")).last();
    for (const std::string& step : steps) {
      CAPTURE(step);
      check_train_conserved(run_text(well + as_step(step), &other));
    }
  }

  TEST_CASE("random trains conserve everything") {
    const int rounds = std::getenv("IONLEDGER_DEEP") != nullptr ? 1000 : 25;
    int complete = 0;
    std::mt19937 random(20260202);
    const Water other = run_text(well + as_step("heat_to = \"30 degC\"")).last();
    for (int round = 0; round < rounds; ++round) {
      std::string text = well;
      for (int k = 0; k < 6; ++k) text += as_step(steps[random() % steps.size()]);
      CAPTURE(text);
      TrainRun run = prepared(text, default_activity_model());
      run_checked(run, &other);
      // A train may ask for what has no solution; then it says so, and what came before stands.
      if (!run.outcome.is_complete()) CHECK(!run.outcome.reason.empty());
      complete += run.outcome.is_complete() ? 1 : 0;
      check_train_conserved(run);
    }
    CHECK(complete >= 0.9 * rounds);
  }

  TEST_CASE("a reagent's mass is what its books weigh") {
    for (const Reagent& reagent : models().supplies.reagents) {
      CAPTURE(reagent.name);
      Amounts kg{reagent.basis_mol_per_kg, reagent.water_kg_per_kg, {}};
      double booked = 0;
      for (const Ingredient& ingredient : reagent.ingredients) booked += ingredient.share;
      CHECK(mass_kg(kg, models().chemistry) == rel(reagent.rest_is_water ? 1 : booked, 1e-12));
      CHECK(std::abs(net_charge(models().chemistry, kg.basis)) < 1e-12);
    }
  }

  TEST_CASE("a recycle at steady state conserves what flows through the whole train") {
    const TrainRun run = run_text(well +
                                  as_step("name = \"acid\"\ndose = \"sulfuric acid 96 %\"\n"
                                          "amount = \"60 mg/L\"") +
                                  as_step("name = \"loop\"\nconcentrate = \"20 % evaporated\"") +
                                  as_step("recycle_to = \"acid\"\nshare = \"60 %\""));
    // What goes on is the feed, the acid and the evaporation; the loop keeps nothing.
    const StepOutcome& acid = run.step("acid");
    const double dosed = acid.record.added.back().mol;
    CHECK(acid.record.added.back().what == "sulfuric acid 96 %");
    CHECK(amounts_of(run.last())
              .basis[static_cast<std::size_t>(models().chemistry.species_index("SO4-2"))] ==
          rel(total(run.feed, "SO4-2") + dosed, 1e-9));
    CHECK(total(run.last(), "Cl-") * run.last().water_kg == rel(total(run.feed, "Cl-"), 1e-9));
    // w = 1 + 0.6 * 0.8 w for the water before the evaporation, but for the little the acid brings.
    CHECK(run.last().water_kg == rel(0.4 * 0.8 / (1 - 0.6 * 0.8), 1e-4));
  }
}

}  // namespace ionledger::testing
