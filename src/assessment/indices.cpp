// Gathers what each index needs from a solved water, and says what is missing where it is.
#include "ionledger/indices.hpp"

#include <cmath>
#include <limits>
#include <numbers>

#include "assessment/forms.hpp"
#include "equilibrium/system.hpp"

namespace ionledger {
namespace {

constexpr double phenolphthalein_ph = 8.3;  // end points of Standard Methods 2320 B
constexpr double methyl_orange_ph = 4.5;
constexpr double milli = 1000;

/// What is fixed about an index: everything but its numbers.
struct IndexTitle {
  const char* key;
  const char* title;
  const char* unit;
  const char* formula;
  const char* source;
};

/// One index while its inputs are gathered. An input that is not there leaves it without a value.
class IndexDraft {
 public:
  explicit IndexDraft(const IndexTitle& title) {
    line_.key = title.key;
    line_.title = title.title;
    line_.unit = title.unit;
    line_.formula = title.formula;
    line_.source = title.source;
  }

  double take(const char* name, std::optional<double> value, const char* unit = "") {
    if (!value) {
      line_.missing += (line_.missing.empty() ? "" : ", ") + std::string(name);
      return std::numeric_limits<double>::quiet_NaN();
    }
    line_.inputs.push_back({name, *value, unit});
    return *value;
  }
  /// The same for an input that is divided by or whose logarithm is taken: zero counts as missing.
  double take_positive(const char* name, std::optional<double> value, const char* unit = "") {
    return value.value_or(0) > 0 ? take(name, *value, unit) : take(name, std::nullopt, unit);
  }
  /// A number made of the inputs that a reader wants to see among them.
  double show(const char* name, double value) {
    if (line_.missing.empty()) line_.inputs.push_back({name, value, ""});
    return value;
  }
  IndexLine value(std::optional<double> value) {
    if (!line_.missing.empty()) {
      line_.inputs.clear();
    } else if (value) {
      line_.value = value;
    } else {
      line_.missing = "an equilibrium that could not be found";
    }
    return std::move(line_);
  }

 private:
  IndexLine line_;
};

class IndexBook {
 public:
  IndexBook(const IndexWater& water, const Chemistry& chemistry, const ActivityModel& model)
      : water_(water),
        solution_(water.solution),
        chemistry_(chemistry),
        model_(model),
        roles_(chemistry.roles),
        mg_caco3_per_eq_(milli * molar_mass_g_per_mol(*composition_of("CaCO3")) / 2) {}

  std::vector<IndexLine> all() {
    return {langelier(),
            langelier_practice(),
            ryznar(),
            ryznar_practice(),
            puckorius(),
            precipitation_potential(),
            larson_skold(),
            aggressive(),
            total_hardness(),
            carbonate_hardness(),
            p_alkalinity(),
            m_alkalinity(),
            buffer_intensity(),
            sodium_adsorption()};
  }

 private:
  // ---- what the water has, per litre; empty when unknown

  [[nodiscard]] std::optional<double> total_eq(const std::string& species) const {
    const int i = chemistry_.species_index(species);
    if (i < 0 || i >= chemistry_.n_basis || !water_.known[static_cast<std::size_t>(i)]) return {};
    const auto place = static_cast<std::size_t>(i);
    return std::abs(chemistry_.species[place].charge_number) * solution_.totals[place] /
           water_.litre_per_kg_water;
  }
  [[nodiscard]] std::optional<double> total_meq(const std::string& species) const {
    return scaled(total_eq(species), milli);
  }
  [[nodiscard]] std::optional<double> as_caco3(const std::optional<double>& eq_per_l) const {
    return scaled(eq_per_l, mg_caco3_per_eq_);
  }
  static std::optional<double> scaled(const std::optional<double>& value, double factor) {
    return value ? std::optional(*value * factor) : std::nullopt;
  }
  [[nodiscard]] std::optional<double> per_litre(const std::optional<double>& per_kg) const {
    return scaled(per_kg, 1 / water_.litre_per_kg_water);
  }

  [[nodiscard]] std::optional<double> alkalinity_eq() const {
    if (!total_eq(roles_.carbonate)) return {};
    return per_litre(alkalinity(chemistry_, solution_.totals));
  }
  /// Bicarbonate and carbonate with their pairs, in equivalents.
  [[nodiscard]] std::optional<double> carbonate_alkalinity_eq() const {
    const int bicarbonate = chemistry_.species_index(roles_.bicarbonate);
    const int carbonate = chemistry_.species_index(roles_.carbonate);
    if (bicarbonate < 0 || !total_eq(roles_.carbonate)) return {};
    const auto molality = [&](int form) {
      return molality_of_form(chemistry_, solution_.molality, form, carbonate);
    };
    return per_litre(molality(bicarbonate) + 2 * molality(carbonate));
  }
  [[nodiscard]] std::optional<double> hardness_eq() const {
    const auto calcium = total_eq(roles_.calcium);
    const auto magnesium = total_eq(roles_.magnesium);
    return calcium && magnesium ? std::optional(*calcium + *magnesium) : std::nullopt;
  }
  [[nodiscard]] std::optional<double> pk2() const {
    const int bicarbonate = chemistry_.species_index(roles_.bicarbonate);
    if (bicarbonate < 0) return {};
    return ln_formation(chemistry_, solution_.temperature)[static_cast<std::size_t>(bicarbonate)] /
           std::numbers::ln10;
  }
  [[nodiscard]] std::optional<double> pks() const {
    const int mineral = chemistry_.mineral_index(roles_.calcium_carbonate);
    if (mineral < 0) return {};
    return -ln_solubility(chemistry_, solution_.temperature)[static_cast<std::size_t>(mineral)] /
           std::numbers::ln10;
  }

  // ---- saturation

  /// Langelier's pHs, corrected for activity, with what it is computed from.
  double saturation_ph(IndexDraft& draft) const {
    SaturationPH water;
    water.ph = draft.take("pH", solution_.ph());
    water.calcium_mol_per_l =
        draft.take_positive("calcium", scaled(total_eq(roles_.calcium), 0.5), "mol/L");
    water.carbonate_alkalinity_eq_per_l =
        draft.take_positive("carbonate alkalinity", carbonate_alkalinity_eq(), "eq/L");
    water.ionic_strength_mol_per_l =
        draft.take("ionic strength", per_litre(solution_.ionic_strength_molal), "mol/L");
    water.pk2 = draft.take("pK2", pk2());
    water.pks = draft.take("pKs", pks());
    water.temperature = solution_.temperature;
    draft.take("temperature", in_celsius(solution_.temperature), "degC");
    return draft.show("pHs", langelier_saturation_ph(water));
  }

  double practice_ph(IndexDraft& draft) const {
    draft.take("pH", solution_.ph());
    const double solids = draft.take_positive("dissolved solids", water_.solids_mg_per_l, "mg/L");
    const double calcium = draft.take_positive(
        "calcium hardness", as_caco3(total_eq(roles_.calcium)), "mg/L as CaCO3");
    const double alkalinity =
        draft.take_positive("alkalinity", as_caco3(alkalinity_eq()), "mg/L as CaCO3");
    draft.take("temperature", in_celsius(solution_.temperature), "degC");
    return draft.show("pHs",
                      practice_saturation_ph(solids, calcium, alkalinity, solution_.temperature));
  }

  IndexLine langelier() const {
    IndexDraft draft({"langelier",
                      "Langelier saturation index, corrected for activity",
                      "",
                      "pH - pHs; pHs = pK2 - pKs + p[Ca] + p[HCO3] + 5 pfm",
                      "Langelier 1936; Standard Methods 2330 B"});
    return draft.value(solution_.ph() - saturation_ph(draft));
  }
  IndexLine langelier_practice() const {
    IndexDraft draft({"langelier_practice",
                      "Langelier saturation index, formula of practice",
                      "",
                      "pH - pHs; pHs = (9.3 + A + B) - (C + D)",
                      "Langelier 1936, in the form of water-treatment handbooks"});
    return draft.value(solution_.ph() - practice_ph(draft));
  }
  IndexLine ryznar() const {
    IndexDraft draft({"ryznar",
                      "Ryznar stability index, corrected for activity",
                      "",
                      "2 pHs - pH",
                      "Ryznar 1944"});
    return draft.value(ryznar_index(saturation_ph(draft), solution_.ph()));
  }
  IndexLine ryznar_practice() const {
    IndexDraft draft({"ryznar_practice",
                      "Ryznar stability index, formula of practice",
                      "",
                      "2 pHs - pH",
                      "Ryznar 1944"});
    return draft.value(ryznar_index(practice_ph(draft), solution_.ph()));
  }
  IndexLine puckorius() const {
    IndexDraft draft({"puckorius",
                      "Puckorius scaling index, formula of practice",
                      "",
                      "2 pHs - pHeq; pHeq = 1.465 log10(alkalinity) + 4.54",
                      "Puckorius and Brooke 1991"});
    const double ph_s = practice_ph(draft);
    const double alkalinity = as_caco3(alkalinity_eq()).value_or(0);
    return draft.value(2 * ph_s - draft.show("pHeq", puckorius_equilibrium_ph(alkalinity)));
  }
  IndexLine precipitation_potential() const {
    IndexDraft draft(
        {"ccpp_mg_per_L_as_CaCO3",
         "Calcium carbonate precipitation potential",
         "mg/L as CaCO3",
         "calcium carbonate that forms (+) or dissolves (-) until equilibrium, closed to the air",
         "Standard Methods 2330 C, by equilibrium"});
    draft.take("calcium", total_meq(roles_.calcium), "meq/L");
    draft.take("carbonate alkalinity", scaled(carbonate_alkalinity_eq(), milli), "meq/L");
    draft.take("temperature", in_celsius(solution_.temperature), "degC");
    const auto ks = pks();
    draft.take("pKs", ks);
    if (!ks) return draft.value({});
    const int mineral = chemistry_.mineral_index(roles_.calcium_carbonate);
    // Two equivalents in a mole.
    return draft.value(scaled(as_caco3(per_litre(precipitation_potential_mol_per_kg(
                                  solution_, mineral, chemistry_, model_))),
                              2));
  }

  // ---- corrosion

  IndexLine larson_skold() const {
    IndexDraft draft({"larson_skold",
                      "Larson-Skold index",
                      "",
                      "(chloride + sulfate) / (bicarbonate + carbonate), in equivalents",
                      "Larson and Skold 1958"});
    const double chloride = draft.take("chloride", total_meq(roles_.chloride), "meq/L");
    const double sulfate = draft.take("sulfate", total_meq(roles_.sulfate), "meq/L");
    const double carbonate = draft.take_positive(
        "bicarbonate and carbonate", scaled(carbonate_alkalinity_eq(), milli), "meq/L");
    return draft.value(larson_skold_index(chloride, sulfate, carbonate));
  }
  IndexLine aggressive() const {
    IndexDraft draft({"aggressive",
                      "Aggressive index",
                      "",
                      "pH + log10(alkalinity x calcium hardness)",
                      "AWWA Standard C400"});
    const double ph = draft.take("pH", solution_.ph());
    const double alkalinity =
        draft.take_positive("alkalinity", as_caco3(alkalinity_eq()), "mg/L as CaCO3");
    const double calcium = draft.take_positive(
        "calcium hardness", as_caco3(total_eq(roles_.calcium)), "mg/L as CaCO3");
    return draft.value(aggressive_index(ph, alkalinity, calcium));
  }

  // ---- what a laboratory titrates

  IndexLine total_hardness() const {
    IndexDraft draft({"total_hardness_mg_per_L_as_CaCO3",
                      "Total hardness",
                      "mg/L as CaCO3",
                      "calcium + magnesium",
                      "Standard Methods 2340 B"});
    const double calcium = draft.take("calcium", total_meq(roles_.calcium), "meq/L");
    const double magnesium = draft.take("magnesium", total_meq(roles_.magnesium), "meq/L");
    return draft.value(mg_caco3_per_eq_ * (calcium + magnesium) / milli);
  }
  IndexLine carbonate_hardness() const {
    IndexDraft draft({"carbonate_hardness_mg_per_L_as_CaCO3",
                      "Carbonate hardness",
                      "mg/L as CaCO3",
                      "the smaller of total hardness and alkalinity",
                      "Standard Methods 2340"});
    const double hardness = draft.take("total hardness", as_caco3(hardness_eq()), "mg/L as CaCO3");
    const double alkalinity = draft.take("alkalinity", as_caco3(alkalinity_eq()), "mg/L as CaCO3");
    return draft.value(std::max(0.0, std::min(hardness, alkalinity)));
  }
  IndexLine titrated(const IndexTitle& title, double end_ph) const {
    IndexDraft draft(title);
    draft.take("pH at the end point", end_ph);
    return draft.value(
        as_caco3(per_litre(titrated_alkalinity_eq_per_kg(solution_, end_ph, chemistry_, model_))));
  }
  IndexLine p_alkalinity() const {
    return titrated({"p_alkalinity_mg_per_L_as_CaCO3",
                     "p-alkalinity, as if titrated to pH 8.3",
                     "mg/L as CaCO3",
                     "strong acid to pH 8.3 at 25 degC, closed",
                     "Standard Methods 2320 B"},
                    phenolphthalein_ph);
  }
  IndexLine m_alkalinity() const {
    return titrated({"m_alkalinity_mg_per_L_as_CaCO3",
                     "m-alkalinity, as if titrated to pH 4.5",
                     "mg/L as CaCO3",
                     "strong acid to pH 4.5 at 25 degC, closed",
                     "Standard Methods 2320 B"},
                    methyl_orange_ph);
  }
  IndexLine buffer_intensity() const {
    IndexDraft draft({"buffer_intensity_meq_per_L",
                      "Buffer intensity",
                      "meq/L per pH unit",
                      "strong base per unit of pH at the pH of the water, closed to the air",
                      "Van Slyke 1922, by equilibrium"});
    draft.take("pH", solution_.ph());
    return draft.value(
        scaled(per_litre(buffer_intensity_eq_per_kg(solution_, chemistry_, model_)), milli));
  }
  IndexLine sodium_adsorption() const {
    IndexDraft draft({"sodium_adsorption_ratio",
                      "Sodium adsorption ratio",
                      "",
                      "sodium / sqrt((calcium + magnesium)/2), in meq/L",
                      "USDA Handbook 60, 1954"});
    const double sodium = draft.take("sodium", total_meq(roles_.sodium), "meq/L");
    const double calcium = draft.take("calcium", total_meq(roles_.calcium), "meq/L");
    const double magnesium = draft.take("magnesium", total_meq(roles_.magnesium), "meq/L");
    if (calcium + magnesium == 0) draft.take("calcium or magnesium", {});
    return draft.value(sodium_adsorption_ratio(sodium, calcium, magnesium));
  }

  const IndexWater& water_;
  const Solution& solution_;
  const Chemistry& chemistry_;
  const ActivityModel& model_;
  const IndexRoles& roles_;
  double mg_caco3_per_eq_;
};

}  // namespace

std::vector<IndexLine> indices_of(const IndexWater& water,
                                  const Chemistry& chemistry,
                                  const ActivityModel& model) {
  return IndexBook(water, chemistry, model).all();
}

}  // namespace ionledger
