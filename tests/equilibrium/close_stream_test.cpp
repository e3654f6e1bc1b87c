#include <doctest/doctest.h>

#include <cmath>

#include "equilibrium/system.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

/// A hard, bicarbonate water with pH 7.5; totals as make_stream leaves them.
Stream hard_water() {
  Stream stream;
  const Chemistry& chemistry = models().chemistry;
  stream.totals.assign(static_cast<std::size_t>(chemistry.n_basis), 0.0);
  stream.reported.assign(stream.totals.size(), false);
  const auto set = [&](const char* name, double total) {
    const auto i = static_cast<std::size_t>(chemistry.species_index(name));
    stream.totals[i] = total;
    stream.reported[i] = true;
  };
  set("Ca+2", 2.5e-3);
  set("Mg+2", 5e-4);
  set("Na+", 1e-3);
  set("Cl-", 1.1e-3);
  set("SO4-2", 6e-4);
  stream.carbon_component = chemistry.species_index("CO3-2");
  stream.alkalinity_eq_per_kg = 4.6e-3;
  stream.ph = MeasuredPH{7.5, std::nullopt, {}};
  stream.litre_per_kg_water = 1.003;
  return stream;
}

ClosedStream closed(const Stream& stream) {
  Diagnostics diagnostics;
  auto result = close_stream(stream, models().chemistry, default_activity_model(), diagnostics);
  REQUIRE_MESSAGE(result, render(diagnostics));
  return std::move(*result);
}

std::string refusal(const Stream& stream) {
  Diagnostics diagnostics;
  CHECK_FALSE(close_stream(stream, models().chemistry, default_activity_model(), diagnostics));
  return render(diagnostics);
}

}  // namespace

TEST_SUITE("equilibrium/close_stream") {
  TEST_CASE("a measured pH and alkalinity are both met, and the imbalance is what is left") {
    const Stream stream = hard_water();
    const ClosedStream result = closed(stream);
    REQUIRE(result.status == SolveStatus::converged);
    CHECK(result.solution.ph() == within(7.5, 1e-12));
    CHECK(alkalinity(models().chemistry, result.totals) == rel(4.6e-3, 1e-12));
    // Cations 7.0, anions 1.1 + 1.2 + 4.6 = 6.9 meq/kg; pairs and pH do not change a sum of
    // equivalents.
    CHECK(result.imbalance_eq_per_kg == within(0.1e-3, 1e-6));
  }

  TEST_CASE("a constituent that closes the balance takes exactly the imbalance") {
    Stream stream = hard_water();
    stream.closed_by = Closure::By::constituent;
    stream.closing_component = models().chemistry.species_index("Cl-");
    const ClosedStream result = closed(stream);
    REQUIRE(result.status == SolveStatus::converged);
    CHECK(net_charge(models().chemistry, result.totals) == within(0, 1e-15));
    CHECK(result.solution.ph() == within(7.5, 1e-10));
    CHECK(result.closing_change_mol_per_kg == rel(result.imbalance_eq_per_kg, 1e-6));
    CHECK(result.closed_by == "chloride");
  }

  TEST_CASE("a constituent that would have to be negative is no solution, said in words") {
    Stream stream = hard_water();
    stream.totals[static_cast<std::size_t>(models().chemistry.species_index("Ca+2"))] = 5e-3;
    stream.closed_by = Closure::By::constituent;
    stream.closing_component = models().chemistry.species_index("Na+");
    const ClosedStream result = closed(stream);
    CHECK(result.status == SolveStatus::infeasible);
    CHECK(result.reason.find("sodium would have to be") != std::string::npos);
  }

  TEST_CASE("a pH measured in the laboratory is kept as totals, and pH follows temperature") {
    Stream stream = hard_water();
    stream.temperature = celsius(60);
    stream.ph = MeasuredPH{7.5, celsius(25), {}};
    const ClosedStream hot = closed(stream);
    const ClosedStream cold = closed(hard_water());
    for (std::size_t i = 0; i < hot.totals.size(); ++i) {
      CAPTURE(i);
      CHECK(hot.totals[i] == rel(cold.totals[i], 1e-9));
    }
    CHECK(hot.at_ph_temperature.ph() == within(7.5, 1e-12));
    CHECK(hot.solution.ph() < 7.45);
  }

  TEST_CASE("alkalinity and inorganic carbon give back the pH they came from") {
    const ClosedStream measured = closed(hard_water());
    Stream stream = hard_water();
    stream.ph.reset();
    stream.totals = measured.totals;
    stream.inorganic_carbon_is_known = true;
    const ClosedStream result = closed(stream);
    CHECK(result.ph_from == ClosedStream::PHFrom::alkalinity_and_carbon);
    CHECK(result.solution.ph() == within(7.5, 1e-8));
  }

  TEST_CASE("what is not determined or contradicts itself is refused") {
    Stream no_ph = hard_water();
    no_ph.ph.reset();
    CHECK(refusal(no_ph).find("undetermined") != std::string::npos);

    Stream two_ph = hard_water();
    two_ph.closed_by = Closure::By::ph;
    CHECK(refusal(two_ph).find("cannot be measured and also close") != std::string::npos);

    Stream inconsistent = hard_water();
    inconsistent.inorganic_carbon_is_known = true;
    inconsistent.totals[static_cast<std::size_t>(inconsistent.carbon_component)] = 9e-3;
    CHECK(refusal(inconsistent).find("contradict each other") != std::string::npos);

    Stream caustic = hard_water();
    caustic.ph = MeasuredPH{12.5, std::nullopt, {}};
    CHECK(refusal(caustic).find("contradict each other") != std::string::npos);
  }
}

}  // namespace ionledger::testing
