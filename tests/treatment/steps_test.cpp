// What each step must do whatever the constants are: stoichiometry, inverses, targets met.
#include <doctest/doctest.h>

#include "equilibrium/system.hpp"
#include "support/compare.hpp"
#include "treatment/train_text.hpp"

namespace ionledger::testing {
namespace {

const std::string river = R"(
[stream]
temperature = "15 degC"
pH = "7.7"
flow = "50 m3/h"
[analysis]
calcium = "62 mg/L"
magnesium = "9 mg/L"
sodium = "20 mg/L"
chloride = "31 mg/L"
sulfate = "40 mg/L"
ammonia = "1 mg/L as N"
alkalinity = "160 mg/L as CaCO3"
[balance]
closed_by = "sodium"
)";

std::string step(const std::string& text) { return "[[step]]\n" + text + "\n"; }

double alkalinity_of(const Water& water) {
  return alkalinity(models().chemistry, amounts_of(water).basis);
}

void check_same(const Water& a, const Water& b, double tolerance, double ph_tolerance = 1e-9) {
  const Amounts first = amounts_of(a);
  const Amounts second = amounts_of(b);
  for (std::size_t i = 0; i < first.basis.size(); ++i) {
    CAPTURE(models().chemistry.species[i].name);
    CHECK(first.basis[i] == rel(second.basis[i], tolerance));
  }
  CHECK(a.water_kg == rel(b.water_kg, tolerance));
  CHECK(a.solution.ph() == within(b.solution.ph(), ph_tolerance));
}

/// mg of CaCO3 that one mg of the active substance takes from (or gives to) the alkalinity.
double calcium_carbonate_per_mg(const std::string& reagent, const std::string& settle) {
  const TrainRun run = run_text(river + step("dose = \"" + reagent + "\"\nactive = \"60 mg/L\"") +
                                (settle.empty() ? "" : step("settle = [\"" + settle + "\"]")));
  const double mol = run.step("step_1").record.added[0].mol;
  const double grams = models().supplies.reagent(reagent)->active_molar_mass_g * mol;
  const double equivalent_g = molar_mass_g_per_mol(*composition_of("CaCO3")) / 2;
  return (alkalinity_of(run.feed) - alkalinity_of(run.last())) * equivalent_g / grams;
}

}  // namespace

TEST_SUITE("treatment/steps") {
  TEST_CASE("two doses are one dose of both") {
    const std::string dose = "dose = \"sulfuric acid 96 %\"\nactive = ";
    // In moles per kg of water, which the little water of the first dose does not change.
    const TrainRun twice =
        run_text(river + step(dose + "\"0.2 mmol/kg\"") +
                 step("dose = \"sulfuric acid 96 %\"\nactive = \"0.3 mmol/kg\""));
    const TrainRun once = run_text(river + step(dose + "\"0.5 mmol/kg\""));
    const double first = twice.step("step_1").record.added[0].kg;
    const double second = twice.step("step_2").record.added[0].kg;
    TrainRun exact = prepared(river + step(dose + "\"0.5 mmol/kg\""), default_activity_model());
    const double kg_per_mol = once.step("step_1").record.added[0].kg / 5e-4;
    quantity_at(exact.train, "step_1.active")->value_in_si = (first + second) / kg_per_mol;
    run_checked(exact);
    check_same(twice.last(), exact.last(), 1e-12);
  }

  TEST_CASE("per time and per volume are the same dose where the flow is known") {
    const TrainRun per_litre =
        run_text(river + step("dose = \"hydrochloric acid 36 %\"\namount = \"60 mg/L\""));
    const TrainRun per_hour =
        run_text(river + step("dose = \"hydrochloric acid 36 %\"\namount = \"3 kg/h\""));
    const TrainRun by_volume = run_text(
        river + step("dose = \"hydrochloric acid 36 %\"\namount = \"50.89058524173028 mL/m3\""));
    check_same(per_hour.last(), per_litre.last(), 1e-12);
    check_same(by_volume.last(), per_litre.last(), 1e-12);
    CHECK(per_litre.step("step_1").record.added[0].kg_per_h.value() == rel(3, 1e-12));
    CHECK(per_litre.step("step_1").record.added[0].mg_per_l == rel(60, 1e-12));
  }

  TEST_CASE("a dose as an element is a dose of the substance that holds it") {
    const TrainRun as_al =
        run_text(river + step("dose = \"liquid alum 48.5 %\"\nactive = \"2 mg/L as Al\""));
    const TrainRun as_oxide =
        run_text(river + step("dose = \"liquid alum 48.5 %\"\nactive = \"3.7789 mg/L as Al2O3\""));
    check_same(as_oxide.last(), as_al.last(), 2e-5, 2e-5);  // the digits of the oxide's mass
    CHECK(total(as_al.last(), "Al+3") * 26.982 * 1000 == rel(2, 0.002));
  }

  TEST_CASE("mixing waters in another order makes the same mixture") {
    const Water hot =
        run_text(river + step("heat_to = \"60 degC\"") + step("concentrate = \"3 cycles\"")).last();
    // A mixture of A with 1/3 B, then half of the whole again B, against B twice as 4/9 ... :
    // shares of volumes shift with the contraction on mixing, so flows are used: they are exact.
    const TrainRun in_two = run_text(river + step("blend = \"b\"\nflow = \"10 m3/h\"") +
                                         step("blend = \"b\"\nflow = \"20 m3/h\""),
                                     &hot);
    const TrainRun in_one = run_text(river + step("blend = \"b\"\nflow = \"30 m3/h\""), &hot);
    check_same(in_two.last(), in_one.last(), 1e-12);
    CHECK(in_kelvin(in_two.last().temperature) == rel(in_kelvin(in_one.last().temperature), 1e-12));
  }

  TEST_CASE("a share of the mixture is a share of its volumes") {
    const TrainRun by_share = [] {
      const Water other = run_text(river + step("concentrate = \"2 cycles\"")).last();
      return run_text(river + step("blend = \"b\"\nshare = \"25 %\""), &other);
    }();
    const Water other = run_text(river + step("concentrate = \"2 cycles\"")).last();
    const TrainRun by_flow =
        run_text(river + step("blend = \"b\"\nflow = \"16.666666666666668 m3/h\""), &other);
    check_same(by_share.last(), by_flow.last(), 1e-12);
  }

  TEST_CASE("heated and cooled back, a sealed water is what it was") {
    const TrainRun run =
        run_text(river + step("heat_to = \"80 degC\"") + step("cool_to = \"15 degC\""));
    CHECK(run.last().solution.ph() == within(run.feed.solution.ph(), 1e-9));
    CHECK(run.step("step_1").water.solution.ph() < run.feed.solution.ph() - 0.1);
  }

  TEST_CASE("coagulants, acids and alkalis change the alkalinity by their equivalents") {
    // mg CaCO3 per mg, by stoichiometry (any water-treatment textbook prints the rounded ones).
    // Gibbsite, because the amorphous hydroxide leaves a few per cent of the aluminium dissolved.
    const std::string alum = "gibbsite";
    CHECK(calcium_carbonate_per_mg("alum 14-hydrate", alum) == rel(0.5052, 2e-3));
    CHECK(calcium_carbonate_per_mg("alum 18-hydrate", alum) == rel(0.4506, 2e-3));
    CHECK(calcium_carbonate_per_mg("ferric chloride 40 %", "ferrihydrite") == rel(0.9256, 2e-3));
    CHECK(calcium_carbonate_per_mg("ferric sulfate 42 %", "ferrihydrite") == rel(0.7509, 2e-3));
    CHECK(calcium_carbonate_per_mg("sulfuric acid 96 %", "") == rel(1.0205, 2e-4));
    CHECK(calcium_carbonate_per_mg("hydrochloric acid 31 %", "") == rel(1.3725, 2e-4));
    CHECK(calcium_carbonate_per_mg("nitric acid 65 %", "") == rel(0.7942, 2e-4));
    CHECK(calcium_carbonate_per_mg("sodium hydroxide 25 %", "") == rel(-1.2512, 2e-4));
    CHECK(calcium_carbonate_per_mg("hydrated lime 95 %", "") == rel(-1.3508, 2e-4));
    CHECK(calcium_carbonate_per_mg("quicklime 90 %", "") == rel(-1.7847, 2e-4));
    CHECK(calcium_carbonate_per_mg("soda ash 99 %", "") == rel(-0.9443, 2e-4));
    CHECK(calcium_carbonate_per_mg("sodium bicarbonate 99 %", "") == rel(-0.5957, 2e-4));
    CHECK(calcium_carbonate_per_mg("carbon dioxide", "") == within(0, 1e-9));
    CHECK(calcium_carbonate_per_mg("gypsum", "") == within(0, 1e-9));
  }

  TEST_CASE("acid for all of the alkalinity leaves carbonic acid alone") {
    // The definition of alkalinity: at its equivalence point protons balance carbonate protons.
    const TrainRun run =
        run_text(river + step("bring_pH_to = 4.5\nwith = \"hydrochloric acid 36 %\""));
    const double acid = run.step("step_1").record.added[0].mol;
    const double left = alkalinity_of(run.last());
    CHECK(acid == rel(alkalinity_of(run.feed) - left, 1e-9));
    CHECK(left == within(0, 1e-4));
  }

  TEST_CASE("a pH asked for is the pH that comes out") {
    for (const char* ph : {"4.5", "6.2", "7.0"}) {
      const TrainRun run = run_text(
          river + step(std::string("bring_pH_to = ") + ph + "\nwith = \"sulfuric acid 96 %\""));
      CHECK(run.last().solution.ph() == within(std::stod(ph), 2e-9));
    }
    for (const char* reagent : {"sodium hydroxide 50 %", "lime slurry 10 %", "ammonia 25 %"}) {
      const TrainRun run =
          run_text(river + step(std::string("bring_pH_to = 9\nwith = \"") + reagent + "\""));
      CHECK(run.last().solution.ph() == within(9, 2e-9));
    }
  }

  TEST_CASE("a pH that a reagent cannot bring is refused in words") {
    TrainRun wrong_way =
        prepared(river + step("name = \"up\"\nbring_pH_to = 9\nwith = \"sulfuric acid 96 %\""),
                 default_activity_model());
    run_checked(wrong_way);
    CHECK(wrong_way.outcome.failed_step == "up");
    CHECK(wrong_way.outcome.reason.find("away from 9") != std::string::npos);
    TrainRun too_weak =
        prepared(river + step("bring_pH_to = 11\nwith = \"sodium bicarbonate 99 %\""),
                 default_activity_model());
    run_checked(too_weak);
    CHECK(too_weak.outcome.reason.find("no further than") != std::string::npos);
  }

  TEST_CASE("in contact with a gas its pressure is the one given") {
    const TrainRun run = run_text(river + step("open_to = { carbon_dioxide = \"0.002 bar\" }"));
    CHECK(partial_pressure_bar(run.last().solution, "carbon dioxide") == rel(0.002, 1e-10));
    CHECK(alkalinity_of(run.last()) == rel(alkalinity_of(run.feed), 1e-12));
  }

  TEST_CASE("a water without carbon takes carbon dioxide up from air") {
    const TrainRun run = run_text(R"(
[stream]
temperature = "25 degC"
[analysis]
sodium = "1 mmol/kg"
chloride = "1 mmol/kg"
[[step]]
open_to = "air"
)");
    CHECK(partial_pressure_bar(run.last().solution, "carbon dioxide") == rel(0.00042, 1e-9));
    // Rain in equilibrium with air: near pH 5.6.
    CHECK(run.last().solution.ph() == within(5.61, 0.03));
  }

  TEST_CASE("stripping takes its share of the dissolved gas and no alkalinity") {
    const TrainRun run = run_text(river + step("strip = { carbon_dioxide = \"80 %\" }"));
    CHECK(run.step("step_1").record.removed[0].mol ==
          rel(0.8 * molality(run.feed.solution, "CO2"), 1e-12));
    CHECK(run.step("step_1").record.removed[0].kg ==
          rel(run.step("step_1").record.removed[0].mol * 0.044009, 1e-4));
    CHECK(alkalinity_of(run.last()) == rel(alkalinity_of(run.feed), 1e-12));
    CHECK(run.last().solution.ph() > run.feed.solution.ph() + 0.3);
  }

  TEST_CASE("a sealed gas space holds what the water gave off, at one pressure for both") {
    const TrainRun run = run_text(river + step("headspace = \"2 L/L\"\nof = \"air\""));
    const double bar = partial_pressure_bar(run.last().solution, "carbon dioxide");
    const double litres = 2 * litres_per_kg_water(run.feed, models().chemistry);
    double given_off = 0;
    for (const Portion& gas : run.step("step_1").record.removed) {
      if (gas.what == "carbon dioxide") given_off = gas.mol;
    }
    // n = (p - p0) V / (R T); the water that the gas leaves behind dilutes the rest by some 1e-6.
    CHECK(given_off == rel((bar - 0.00042) * litres / (0.08314462618 * 288.15), 1e-5));
  }

  TEST_CASE("a small gas space changes nothing, an endless one is open air") {
    const TrainRun small = run_text(river + step("headspace = \"1e-9 L/L\"\nof = \"air\""));
    CHECK(small.last().solution.ph() == within(small.feed.solution.ph(), 1e-6));
    const TrainRun endless =
        run_text(river + step("headspace = \"1e9 L/L\"\nof = { carbon_dioxide = \"0.001 bar\" }") +
                 step("name = \"rest\"\nopen_to = { carbon_dioxide = \"0.001 bar\" }"));
    CHECK(endless.step("step_1").water.solution.ph() ==
          within(endless.step("rest").water.solution.ph(), 1e-5));
  }

  TEST_CASE("what settles leaves the water saturated, or at the index that was given") {
    const std::string lime = step("dose = \"lime slurry 10 %\"\nactive = \"150 mg/L\"");
    const TrainRun full = run_text(river + lime + step("settle = [\"calcite\", \"brucite\"]"));
    CHECK(saturation_index(full.last().solution, "calcite") == within(0, 1e-9));
    CHECK(saturation_index(full.last().solution, "brucite") < 1e-9);
    const TrainRun part = run_text(river + lime + step("settle = { calcite = 0.4 }"));
    CHECK(saturation_index(part.last().solution, "calcite") == within(0.4, 1e-9));
    CHECK(part.step("step_2").record.deposited[0].mol <
          full.step("step_2").record.deposited[0].mol);
  }

  TEST_CASE("solids that stay can dissolve again, those that settled cannot") {
    const std::string lime = step("dose = \"lime slurry 10 %\"\nactive = \"150 mg/L\"");
    const std::string acid = step("dose = \"hydrochloric acid 36 %\"\nactive = \"8 mmol/kg\"");
    const std::string settle = "settle = [\"calcite\"]";
    const TrainRun kept =
        run_text(river + lime + step(settle + "\nkeep_solids = true") + acid + step(settle));
    const TrainRun never = run_text(river + lime + acid + step(settle));
    check_same(kept.last(), never.last(), 1e-9);
    const TrainRun gone = run_text(river + lime + step(settle) + acid + step(settle));
    CHECK(total(gone.last(), "Ca+2") < 0.9 * total(kept.last(), "Ca+2"));
    const TrainRun removed = run_text(river + lime + step(settle + "\nkeep_solids = true") +
                                      step("remove_solids = \"100 %\"") + acid + step(settle));
    check_same(removed.last(), gone.last(), 1e-9);
  }

  TEST_CASE("a bed dissolves to saturation, and not into a water that is past it") {
    const TrainRun run = run_text(river + step("dose = \"carbon dioxide\"\namount = \"40 mg/L\"") +
                                  step("pass_bed_of = \"calcite\""));
    CHECK(saturation_index(run.last().solution, "calcite") == within(0, 1e-9));
    CHECK(run.step("step_2").record.added[0].mol > 1e-4);
    const TrainRun past =
        run_text(river + step("dose = \"sodium hydroxide 50 %\"\nactive = \"2 mmol/L\"") +
                 step("pass_bed_of = \"calcite\""));
    CHECK(past.step("step_2").record.added.empty());
  }

  TEST_CASE("a softener trades hardness for sodium and leaves the alkalinity") {
    const TrainRun run = run_text(river + step("exchange = \"softener\"\nleakage = \"1 %\""));
    const double calcium = total(run.feed, "Ca+2");
    const double magnesium = total(run.feed, "Mg+2");
    CHECK(total(run.last(), "Ca+2") == rel(0.01 * calcium, 1e-12));
    CHECK(total(run.last(), "Na+") ==
          rel(total(run.feed, "Na+") + 2 * 0.99 * (calcium + magnesium), 1e-12));
    CHECK(alkalinity_of(run.last()) == rel(alkalinity_of(run.feed), 1e-12));
  }

  TEST_CASE("a weakly acidic resin stops where the alkalinity is used up") {
    const TrainRun run = run_text(river + step("exchange = \"weak acid cation\""));
    const double hardness = 2 * (total(run.feed, "Ca+2") + total(run.feed, "Mg+2"));
    const double left = 2 * (total(run.last(), "Ca+2") + total(run.last(), "Mg+2"));
    REQUIRE(hardness > alkalinity_of(run.feed));
    CHECK(alkalinity_of(run.last()) == within(0, 1e-15));
    CHECK(hardness - left == rel(alkalinity_of(run.feed), 1e-12));
  }

  TEST_CASE("a mixed bed leaves water") {
    const TrainRun run = run_text(river + step("exchange = \"mixed bed\""));
    for (std::size_t i = 1; i < run.last().totals.size(); ++i) {
      CHECK(run.last().totals[i] == within(0, 1e-15));
    }
    CHECK(run.last().solution.ph() == within(7.17, 0.02));  // pure water at 15 degC: pKw/2
  }

  TEST_CASE("ions are concentrated by (1 - y SP)/(1 - y), gases pass") {
    // The form of ASTM D3739: 200 mg/L, 75 % recovery, 2 % passage make 788.
    const TrainRun run =
        run_text(river + step("concentrate = \"75 % recovery\"\n"
                              "rejection = { calcium = \"98 %\", chloride = \"96 %\" }\n"
                              "polarisation = 1.15"));
    CHECK(total(run.last(), "Ca+2") / total(run.feed, "Ca+2") == rel(788.0 / 200, 1e-12));
    CHECK(total(run.last(), "Mg+2") / total(run.feed, "Mg+2") == rel(4, 1e-12));
    CHECK(total(run.last(), "Cl-") / total(run.feed, "Cl-") ==
          rel((1 - 0.75 * 0.04) / 0.25, 1e-12));
    const Water& permeate = run.beside("step_1", "permeate");
    CHECK(total(permeate, "Cl-") == rel(0.04 * total(run.feed, "Cl-"), 1e-12));
    CHECK(net_charge(models().chemistry, permeate.totals) == within(0, 1e-17));
    CHECK(permeate.solution.ph() <
          run.feed.solution.ph() - 1.5);  // carbonic acid in it, and no alkalinity
    const Water& wall = run.beside("step_1", "membrane");
    CHECK(total(wall, "SO4-2") == rel(1.15 * total(run.last(), "SO4-2"), 1e-12));
    const TrainRun other_side = run_text(river + step("concentrate = \"75 % recovery\"\n"
                                                      "rejection = { chloride = \"96 %\" }\n"
                                                      "keep = \"permeate\""));
    CHECK(total(other_side.last(), "Cl-") == rel(total(permeate, "Cl-"), 1e-12));
  }

  TEST_CASE("cycles and evaporation are two words for one thing") {
    const TrainRun cycles = run_text(river + step("concentrate = \"4 cycles\""));
    const TrainRun evaporated = run_text(river + step("concentrate = \"75 % evaporated\""));
    check_same(cycles.last(), evaporated.last(), 1e-12);
    CHECK(total(cycles.last(), "Cl-") == rel(4 * total(cycles.feed, "Cl-"), 1e-12));
  }

  TEST_CASE("a deposit on a known area has a thickness") {
    const TrainRun run = run_text(river + step("heat_to = \"70 degC\"") +
                                  step("settle = [\"calcite\"]\narea = \"120 m2\""));
    const Portion& deposit = run.step("step_2").record.deposited[0];
    // kg/h * 730.5 h / (2710 kg/m3 * 120 m2), in mm
    CHECK(deposit.mm_per_month.value() ==
          rel(deposit.kg_per_h.value() * 730.5 / (2710.0 * 120) * 1000, 1e-12));
  }

  TEST_CASE("a recycle without a way out is refused") {
    TrainRun run = prepared(river + step("name = \"in\"\nheat_to = \"20 degC\"") +
                                step("name = \"back\"\nrecycle_to = \"in\"\nshare = \"99.99 %\""),
                            default_activity_model());
    run_checked(run);
    CHECK(run.outcome.failed_step == "back");
    CHECK(run.outcome.reason.find("still changing") != std::string::npos);
  }

  TEST_CASE("reagents that must not meet are called out where the second is dosed") {
    const TrainRun run =
        run_text(river + step("dose = \"sodium hydroxide 50 %\"\namount = \"10 mg/L\"") +
                 step("dose = \"sulfuric acid 96 %\"\namount = \"10 mg/L\""));
    const auto& cautions = run.step("step_2").record.cautions;
    REQUIRE(cautions.size() == 2);
    CHECK(cautions[0].says.find("acid into water") != std::string::npos);
    CHECK(cautions[1].about == "sodium hydroxide 50 % and sulfuric acid 96 %");
  }

  TEST_CASE("every quantity of a train has an address") {
    TrainRun run = prepared(
        river + step("name = \"acid\"\ndose = \"sulfuric acid 96 %\"\namount = \"35 mg/L\"") +
            step("name = \"ro\"\nconcentrate = \"75 % recovery\"\nrejection = { sodium = \"97 %\" "
                 "}"),
        default_activity_model());
    REQUIRE(quantity_addresses(run.train) ==
            std::vector<std::string>{"acid.amount", "ro.concentrate", "ro.rejection.sodium"});
    for (const std::string& address : quantity_addresses(run.train)) {
      CHECK(quantity_at(run.train, address) != nullptr);
    }
    CHECK(quantity_at(run.train, "acid.active") == nullptr);
    run_checked(run);
    const double before = run.step("acid").record.added[0].kg;
    quantity_at(run.train, "acid.amount")->value_in_si *= 2;
    run_checked(run);
    CHECK(run.step("acid").record.added[0].kg == rel(2 * before, 1e-12));
  }
}

}  // namespace ionledger::testing
