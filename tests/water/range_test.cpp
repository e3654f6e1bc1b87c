// What every function of water does at and beyond the ends of its range, and where the pressure
// begins to rise: nothing may jump at the boiling point.
#include <doctest/doctest.h>

#include <cmath>
#include <limits>
#include <string>
#include <vector>

#include "ionledger/water.hpp"
#include "support/compare.hpp"

namespace ionledger::testing {
namespace {

struct Property {
  std::string name;
  double (*at)(double degc);
};

const std::vector<Property> properties = {
    {"density", [](double t) { return water_density(celsius(t)).value(); }},
    {"vapour pressure", [](double t) { return water_vapour_pressure(celsius(t)).value(); }},
    {"permittivity", [](double t) { return water_permittivity(celsius(t)); }},
    {"log10 ion product", [](double t) { return water_log10_ion_product(celsius(t)); }},
    {"viscosity", [](double t) { return water_viscosity_pa_s(celsius(t)); }},
    {"slope a", [](double t) { return debye_hueckel_slopes(celsius(t)).a; }},
    {"slope b", [](double t) { return debye_hueckel_slopes(celsius(t)).b; }},
};

}  // namespace

TEST_SUITE("water/range") {
  TEST_CASE("every property is a number at both ends and not a number beyond them") {
    for (const Property& property : properties) {
      CAPTURE(property.name);
      CHECK(std::isfinite(property.at(water_min_degc)));
      CHECK(std::isfinite(property.at(water_max_degc)));
      CHECK(std::isnan(property.at(water_min_degc - 1e-9)));
      CHECK(std::isnan(property.at(water_max_degc + 1e-9)));
      CHECK(std::isnan(property.at(std::numeric_limits<double>::quiet_NaN())));
    }
  }
  TEST_CASE("no property jumps around the boiling point") {
    // Of two steps of 0.25 K side by side, neither is 1 % longer: the vapour pressure, the most
    // curved of them, bends by 0.8 %; a jump of 3e-6 in density would show.
    const double h = 0.25;
    for (const Property& property : properties) {
      for (double t = 95; t <= 105; t += h) {
        CAPTURE(property.name);
        CAPTURE(t);
        const double before = property.at(t) - property.at(t - h);
        const double after = property.at(t + h) - property.at(t);
        CHECK(after == rel(before, 0.01));
      }
    }
  }
}

}  // namespace ionledger::testing
