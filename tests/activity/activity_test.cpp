// Activity models: closed forms, limits, who gets which parameters, and measured coefficients of
// salts that do not associate.
#include "ionledger/activity.hpp"

#include <doctest/doctest.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>
#include <string>
#include <vector>

#include "support/compare.hpp"

namespace ionledger::testing {
namespace {

ActivityParameters parameters(ActivityForm form, double size_angstrom, double linear) {
  ActivityParameters result;
  result.form = form;
  result.size_angstrom = size_angstrom;
  result.linear = linear;
  return result;
}

const std::vector<ActivityForm> all_forms = {ActivityForm::davies,
                                             ActivityForm::extended_debye_hueckel,
                                             ActivityForm::truesdell_jones,
                                             ActivityForm::neutral};

const ActivityParameters davies = parameters(ActivityForm::davies, 0, 0.3);

DebyeHueckelSlopes slopes_25() { return debye_hueckel_slopes(celsius(25)); }

double gamma(const ActivityParameters& p, int charge, double ionic_strength) {
  return std::exp(ln_activity_coefficient(activity_term(p, charge, slopes_25()), ionic_strength));
}

Species species(const std::string& name, int charge, bool is_pair) {
  Species result;
  result.name = name;
  result.charge_number = charge;
  result.is_pair = is_pair;
  return result;
}

/// Gives every rule a size of its own, to tell them apart.
ActivityModel distinct_rules() {
  ActivityModel model;
  model.ions = parameters(ActivityForm::extended_debye_hueckel, 1, 0);
  model.pairs = parameters(ActivityForm::extended_debye_hueckel, 2, 0);
  model.neutrals = parameters(ActivityForm::neutral, 0, 0.1);
  model.species["Ca+2"] = parameters(ActivityForm::truesdell_jones, 5, 0.165);
  model.species["CaCO3"] = parameters(ActivityForm::neutral, 0, 0.5);
  model.species["NaSO4-"] = parameters(ActivityForm::davies, 0, 0.2);
  return model;
}

}  // namespace

TEST_SUITE("activity/forms") {
  TEST_CASE("every form is exactly 1 at zero ionic strength") {
    for (const ActivityForm form : all_forms) {
      for (const int charge : {-3, -1, 0, 1, 2}) {
        CHECK(gamma(parameters(form, 4.5, 0.1), charge, 0.0) == 1.0);
      }
    }
  }

  TEST_CASE("Davies is its closed form") {
    const double a = slopes_25().a;
    for (const int charge : {-2, -1, 1, 3}) {
      for (const double i : {1e-6, 1e-3, 0.1, 0.5, 2.0}) {
        CAPTURE(charge);
        CAPTURE(i);
        const double limiting = a * charge * charge * std::numbers::ln10;
        const double screening = limiting * std::sqrt(i) / (1 + std::sqrt(i));
        const double linear = limiting * 0.3 * i;
        const double tolerance = ln_activity_coefficient_error * std::max(screening, linear);
        CHECK(ln_activity_coefficient(activity_term(davies, charge, slopes_25()), i) ==
              within(linear - screening, tolerance));
      }
    }
  }

  TEST_CASE("Davies leaves out the size, and the extended law the linear term") {
    const auto term = [](const ActivityParameters& p) { return activity_term(p, 2, slopes_25()); };
    CHECK(term(parameters(ActivityForm::davies, 7, 0.3)) == term(davies));
    CHECK(term(parameters(ActivityForm::extended_debye_hueckel, 7, 0.3)) ==
          term(parameters(ActivityForm::extended_debye_hueckel, 7, 0)));
  }

  TEST_CASE("every charged form approaches the limiting law") {
    // At I = 1e-10 the next term is size sqrt(I), below 5e-5 for 9 angstrom.
    const double i = 1e-10;
    for (const ActivityForm form : all_forms) {
      if (form == ActivityForm::neutral) continue;
      for (const int charge : {-2, 1, 3}) {
        const double ln_gamma = ln_activity_coefficient(
            activity_term(parameters(form, 9, 0.2), charge, slopes_25()), i);
        CHECK(ln_gamma / std::sqrt(i) ==
              rel(-std::numbers::ln10 * slopes_25().a * charge * charge, 5e-5));
      }
    }
  }

  TEST_CASE("Truesdell-Jones with no linear term is the extended law") {
    for (const int charge : {-2, 0, 1}) {
      CHECK(activity_term(parameters(ActivityForm::truesdell_jones, 5.4, 0), charge, slopes_25()) ==
            activity_term(
                parameters(ActivityForm::extended_debye_hueckel, 5.4, 0), charge, slopes_25()));
    }
  }

  TEST_CASE("Truesdell-Jones adds its linear term whatever the charge") {
    // log10 gamma grows by b I = 0.165 * 0.5.
    for (const int charge : {1, 2}) {
      const double ratio = gamma(parameters(ActivityForm::truesdell_jones, 5, 0.165), charge, 0.5) /
                           gamma(parameters(ActivityForm::truesdell_jones, 5, 0), charge, 0.5);
      CHECK(std::log10(ratio) == rel(0.0825, 1e-13));
    }
  }

  TEST_CASE("a neutral species is salted out in proportion to ionic strength") {
    CHECK(std::log10(gamma(parameters(ActivityForm::neutral, 0, 0.1), 0, 0.5)) == rel(0.05, 1e-13));
  }
}

TEST_SUITE("activity/models") {
  TEST_CASE("a species' own parameters come before any rule") {
    const ActivityModel model = distinct_rules();
    CHECK(&parameters_of(model, species("Ca+2", 2, false)) == &model.species.at("Ca+2"));
    CHECK(&parameters_of(model, species("CaCO3", 0, true)) == &model.species.at("CaCO3"));
    CHECK(&parameters_of(model, species("NaSO4-", -1, true)) == &model.species.at("NaSO4-"));
  }

  TEST_CASE("the rules are for neutrals, paired or not, for charged pairs and for other ions") {
    const ActivityModel model = distinct_rules();
    CHECK(&parameters_of(model, species("CO2", 0, false)) == &model.neutrals);
    CHECK(&parameters_of(model, species("MgCO3", 0, true)) == &model.neutrals);
    CHECK(&parameters_of(model, species("CaHCO3+", 1, true)) == &model.pairs);
    CHECK(&parameters_of(model, species("HCO3-", -1, false)) == &model.ions);
  }

  TEST_CASE("the terms stand in the order of the chemistry's species") {
    Chemistry chemistry;
    chemistry.species = {species("H+", 1, false),
                         species("Ca+2", 2, false),
                         species("CO2", 0, false),
                         species("CaHCO3+", 1, true)};
    const ActivityModel model = distinct_rules();
    const DebyeHueckelSlopes slopes = debye_hueckel_slopes(celsius(60));
    const std::vector<ActivityTerm> terms = activity_terms(model, chemistry, celsius(60));
    REQUIRE(terms.size() == 4);
    CHECK(terms[0] == activity_term(model.ions, 1, slopes));
    CHECK(terms[1] == activity_term(model.species.at("Ca+2"), 2, slopes));
    CHECK(terms[2] == activity_term(model.neutrals, 0, slopes));
    CHECK(terms[3] == activity_term(model.pairs, 1, slopes));
  }
}

}  // namespace ionledger::testing
