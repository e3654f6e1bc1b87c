#include <doctest/doctest.h>

#include <string>

#include "ionledger/readers.hpp"
#include "ionledger/stream.hpp"
#include "support/compare.hpp"
#include "support/water.hpp"

namespace ionledger::testing {
namespace {

std::string plant_file(const std::string& analysis, const std::string& rest = "") {
  return "[stream]\ntemperature = \"25 degC\"\npH = 7.5\n" + rest + "[analysis]\n" + analysis;
}

Stream stream_of(const std::string& analysis, const std::string& rest = "") {
  Diagnostics diagnostics;
  const auto file = read_plant_file(plant_file(analysis, rest), "test.toml", diagnostics);
  REQUIRE_MESSAGE(file, render(diagnostics));
  auto stream = make_stream(file->analysis, models().chemistry, diagnostics);
  REQUIRE_MESSAGE(stream, render(diagnostics));
  return std::move(*stream);
}

std::string refusal(const std::string& analysis) {
  Diagnostics diagnostics;
  const auto file = read_plant_file(plant_file(analysis), "test.toml", diagnostics);
  REQUIRE_MESSAGE(file, render(diagnostics));
  CHECK_FALSE(make_stream(file->analysis, models().chemistry, diagnostics));
  return render(diagnostics);
}

double total(const Stream& stream, const std::string& species) {
  return stream.totals[static_cast<std::size_t>(models().chemistry.species_index(species))];
}

}  // namespace

TEST_SUITE("stream/make_stream") {
  TEST_CASE("mg/L, mmol/L, meq/L and hardness degrees of the same calcium are the same stream") {
    // 40.078 g/mol; 1 degdH is 10 mg CaO/L, CaO 56.077 g/mol.
    const double reference = total(stream_of("calcium = \"2.5 mmol/L\""), "Ca+2");
    CHECK(total(stream_of("calcium = \"100.195 mg/L\""), "Ca+2") == rel(reference, 1e-12));
    CHECK(total(stream_of("Ca = \"100195 ug/L\""), "Ca+2") == rel(reference, 1e-12));
    CHECK(total(stream_of("calcium = \"5 meq/L\""), "Ca+2") == rel(reference, 1e-12));
    CHECK(total(stream_of("calcium = \"250.215 mg/L as CaCO3\""), "Ca+2") == rel(reference, 1e-10));
    CHECK(total(stream_of("calcium = \"14.01925 degdH\""), "Ca+2") == rel(reference, 1e-6));
  }

  TEST_CASE("a molality is taken as it stands") {
    CHECK(total(stream_of("sodium = \"0.025 mol/kg\""), "Na+") == rel(0.025, 1e-15));
  }

  TEST_CASE("alkalinity counts equivalents, whatever it is reported as") {
    const double reference = *stream_of("alkalinity = \"4 meq/L\"").alkalinity_eq_per_kg;
    CHECK(*stream_of("alkalinity = \"4 mmol/L\"").alkalinity_eq_per_kg == rel(reference, 1e-12));
    CHECK(*stream_of("alkalinity = \"200.172 mg/L as CaCO3\"").alkalinity_eq_per_kg ==
          rel(reference, 1e-10));
    CHECK(*stream_of("alkalinity = \"244.064 mg/L as HCO3\"").alkalinity_eq_per_kg ==
          rel(reference, 1e-5));
  }

  TEST_CASE("nitrogen, phosphorus and silica are converted by the element that was written") {
    CHECK(total(stream_of("nitrate = \"14.007 mg/L as N\""), "NO3-") ==
          rel(total(stream_of("nitrate = \"1 mmol/L\""), "NO3-"), 1e-10));
    CHECK(total(stream_of("silica = \"60.083 mg/L as SiO2\""), "H4SiO4") ==
          rel(total(stream_of("silica = \"28.085 mg/L as Si\""), "H4SiO4"), 1e-10));
    CHECK(total(stream_of("phosphate = \"94.970 mg/L as PO4\""), "PO4-3") ==
          rel(total(stream_of("phosphate = \"30.974 mg/L as P\""), "PO4-3"), 1e-10));
  }

  TEST_CASE("sodium chloride solutions have the density of Rogers and Pitzer") {
    // P. S. Z. Rogers and K. S. Pitzer, J. Phys. Chem. Ref. Data 11 (1982) 15: specific volume at
    // 25 degC 0.998834, 0.983185, 0.965038 cm3/g at 0.1, 0.5, 1.0 mol/kg. The laboratory litre
    // leaves out the electrostatic term of the volume: 0.1 % at 0.5, 0.2 % at 1 mol/kg.
    for (const auto& [molal, specific_volume, tolerance] :
         {std::tuple{0.1, .998834, 1e-3}, {0.5, .983185, 1.5e-3}, {1.0, .965038, 3e-3}}) {
      const std::string m = std::to_string(molal) + " mol/kg\"\n";
      const Stream stream = stream_of("sodium = \"" + m + "chloride = \"" + m);
      CHECK(stream.laboratory_density_kg_per_l == rel(1 / specific_volume, tolerance));
    }
  }

  TEST_CASE("one litre of brine by mg/L holds the molality that made it") {
    const Stream by_mass = stream_of("sodium = \"0.5 mol/kg\"\nchloride = \"0.5 mol/kg\"\n");
    const double mol_per_litre = 0.5 / by_mass.litre_per_kg_water;
    const std::string c = std::to_string(mol_per_litre) + " mol/L\"\n";
    const Stream by_volume = stream_of("sodium = \"" + c + "chloride = \"" + c);
    CHECK(total(by_volume, "Na+") == rel(0.5, 1e-5));
  }

  TEST_CASE("per cent by mass refers to the solution") {
    // 1 % NaCl by mass: 10 g in 990 g of water, 0.17284 mol/kg (58.44 g/mol).
    const Stream stream =
        stream_of("sodium = \"0.39339 % by mass\"\nchloride = \"0.60661 % by mass\"\n");
    CHECK(total(stream, "Na+") == rel(0.17284, 2e-4));
  }

  TEST_CASE("a measured density replaces the computed one") {
    const Stream stream =
        stream_of("sodium = \"2.3 g/L\"\nchloride = \"3.5 g/L\"\n", "density = \"1.010 kg/L\"\n");
    CHECK(stream.density_is_measured);
    CHECK(stream.laboratory_density_kg_per_l == rel(1.010, 1e-12));
    // Water in the litre: 1.010 - 0.0058 kg.
    CHECK(stream.litre_per_kg_water == rel(1 / (1.010 - 0.0058), 1e-6));
  }

  TEST_CASE("hardness gives the one of calcium and magnesium that is missing") {
    const Stream stream = stream_of("hardness = \"6 meq/L\"\ncalcium = \"2.4 mmol/L\"\n");
    CHECK(total(stream, "Mg+2") == rel(total(stream, "Ca+2") / 4, 1e-9));
    CHECK(stream.cautions.size() == 1);
  }

  TEST_CASE("hardness that disagrees with calcium and magnesium is a caution") {
    CHECK(stream_of("hardness = \"7 meq/L\"\nCa = \"2.4 mmol/L\"\nMg = \"0.6 mmol/L\"\n")
              .cautions.size() == 1);
    CHECK(stream_of("hardness = \"6.1 meq/L\"\nCa = \"2.4 mmol/L\"\nMg = \"0.6 mmol/L\"\n")
              .cautions.empty());
  }

  TEST_CASE("what could mean several things is refused with the choices") {
    CHECK(refusal("nitrate = \"12 mg/L\"").find("\"as N\"") != std::string::npos);
    CHECK(refusal("alkalinity = \"212 mg/L\"").find("\"as CaCO3\"") != std::string::npos);
    CHECK(refusal("iron = \"1 mg/L\"").find("ferrous_iron") != std::string::npos);
    CHECK(refusal("silica = \"1 meq/L\"").find("depend on pH") != std::string::npos);
    CHECK(refusal("silica = \"10 mg/L as SiO3\"").find("did you mean \"as SiO2\"?") !=
          std::string::npos);
  }

  TEST_CASE("a misspelt constituent gets its neighbour, a double one both places") {
    CHECK(refusal("calcuim = \"1 mg/L\"").find("did you mean \"calcium\"?") != std::string::npos);
    CHECK(refusal("calcium = \"1 mg/L\"\nCa = \"2 mg/L\"").find("calcium is given twice") !=
          std::string::npos);
  }

  TEST_CASE("solutes that outweigh the solution are refused") {
    CHECK(
        refusal("sodium = \"700 g/L\"\nchloride = \"1100 g/L\"").find("leave no room for water") !=
        std::string::npos);
    CHECK(refusal("sodium = \"60 % by mass\"\nchloride = \"50 % by mass\"").find("leave no room") !=
          std::string::npos);
  }
}

}  // namespace ionledger::testing
