// Activity models reduced to three numbers a species, and who gets which parameters.
#include "ionledger/activity.hpp"

#include <cassert>
#include <cmath>
#include <numbers>

namespace ionledger {

ActivityTerm activity_term(const ActivityParameters& parameters,
                           int charge_number,
                           const DebyeHueckelSlopes& slopes) {
  const double limiting = std::numbers::ln10 * slopes.a * charge_number * charge_number;
  const double size = slopes.b * parameters.size_angstrom;
  switch (parameters.form) {
    case ActivityForm::davies:
      return {limiting, 1.0, limiting * parameters.linear};
    case ActivityForm::extended_debye_hueckel:
      return {limiting, size, 0.0};
    case ActivityForm::truesdell_jones:
      return {limiting, size, std::numbers::ln10 * parameters.linear};
    case ActivityForm::neutral:
      break;
  }
  return {0.0, 0.0, std::numbers::ln10 * parameters.linear};
}

const ActivityParameters& parameters_of(const ActivityModel& model, const Species& species) {
  const auto own = model.species.find(species.name);
  if (own != model.species.end()) return own->second;
  if (species.charge_number == 0) return model.neutrals;
  return species.is_pair ? model.pairs : model.ions;
}

std::vector<ActivityTerm> activity_terms(const ActivityModel& model,
                                         const Chemistry& chemistry,
                                         Temperature temperature) {
  const DebyeHueckelSlopes slopes = debye_hueckel_slopes(temperature);
  std::vector<ActivityTerm> terms;
  terms.reserve(chemistry.species.size());
  for (const Species& species : chemistry.species) {
    terms.push_back(activity_term(parameters_of(model, species), species.charge_number, slopes));
  }
  return terms;
}

double ln_activity_coefficient(const ActivityTerm& term, double ionic_strength_molal) noexcept {
  assert(ionic_strength_molal >= 0);
  const double root = std::sqrt(ionic_strength_molal);
  return -term.debye * root / (1 + term.size * root) + term.linear * ionic_strength_molal;
}

}  // namespace ionledger
