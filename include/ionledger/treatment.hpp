// What is done to a water: steps as data, what stands in the store (reagents, resins, atmospheres),
// and the train that applies one step after the other. No files, no printing.
#pragma once

#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <variant>
#include <vector>

#include "ionledger/activity.hpp"
#include "ionledger/chemistry.hpp"
#include "ionledger/diagnostic.hpp"
#include "ionledger/equilibrium.hpp"
#include "ionledger/stream.hpp"
#include "ionledger/units.hpp"

namespace ionledger {

// ---- what stands in the store -------------------------------------------------------------------

/// A substance and what one mole of it books, in species of the chemistry and "H2O".
struct Ingredient {
  std::string formula;      ///< "H2SO4"
  double share = 0;         ///< kg per kg of product.
  std::vector<Term> books;  ///< H+ 2, SO4-2 1: neutral, and the atoms of the formula.
};

/// A reagent as it is delivered. The first ingredient is the active substance, the others are
/// impurities; the rest of the product is water, or inert and then left out of the books.
struct Reagent {
  std::string name;  ///< Trade name and strength: "sulfuric acid 96 %".
  std::vector<Ingredient> ingredients;
  bool rest_is_water = true;
  std::optional<double> density_kg_per_l;  ///< Of the product at 20 degC; none for a gas or solid.
  std::string family;                      ///< For Incompatible: "acid"; may be empty.
  std::string caution;                     ///< Handling, one or two sentences.
  std::string source;                      ///< Key into Chemistry::sources.
  Standing standing = Standing::from_memory;
  std::string note;

  // Filled by compile_supplies.
  double active_molar_mass_g = 0;
  std::vector<double> basis_mol_per_kg;  ///< n_basis, per kg of product.
  double water_kg_per_kg = 0;            ///< Of the component H2O; what is booked as H2O included.
};

/// An ion exchanger: what it takes from the water it gives back by equivalents.
struct Resin {
  struct Exchange {
    std::vector<std::string> takes;  ///< Basis species.
    std::string gives;               ///< A species of the opposite action: "Na+", "OH-".
  };
  std::string name;  ///< "softener"
  std::vector<Exchange> exchanges;
  bool up_to_alkalinity = false;  ///< A weakly acidic resin stops where the alkalinity is used up.
  std::string source;
  std::string remark;
};

/// A gas phase of constant composition.
struct Atmosphere {
  std::string name;                                           ///< "air"
  std::vector<std::pair<std::string, double>> pressures_bar;  ///< Gas name, partial pressure.
  std::string source;
  std::string note;
};

/// Two families of reagents that must not meet.
struct Incompatible {
  std::string first, second;  ///< Reagent::family; equal for two of the same family.
  std::string says;
};

/// Density of a mineral, kg/L, for the thickness of a deposit.
struct SolidDensity {
  double kg_per_l = 0;
  std::string source;
};

/// Everything a step may take from the store. Immutable after reading.
struct Supplies {
  std::vector<Reagent> reagents;
  std::vector<Resin> resins;
  std::vector<Atmosphere> atmospheres;
  std::vector<Incompatible> incompatible;
  std::map<std::string, SolidDensity> solid_densities;  ///< By mineral name.

  [[nodiscard]] const Reagent* reagent(std::string_view name) const;  ///< nullptr: there is none.
  [[nodiscard]] const Resin* resin(std::string_view name) const;
  [[nodiscard]] const Atmosphere* atmosphere(std::string_view name) const;
};

/// Fills what is derived and checks it: formulas readable, what an ingredient books neutral and of
/// the atoms of its formula, shares that add up to no more than one, every species, gas, mineral
/// and family known. Expects a compiled chemistry. Errors at `where["reagent:NAME"]`,
/// "resin:NAME", "atmosphere:NAME", "solid_density:NAME", "incompatible:FIRST/SECOND".
[[nodiscard]] bool compile_supplies(Supplies& supplies,
                                    const Chemistry& chemistry,
                                    const std::map<std::string, SourceSpan>& where,
                                    Diagnostics& diagnostics);

// ---- water --------------------------------------------------------------------------------------

/// Amounts of everything that is conserved, for every kg of water in the feed of the train.
///
/// The component H2O is booked too: carbonic acid that leaves as CO2 is CO3-2, 2 H+ and -H2O.
struct Amounts {
  std::vector<double> basis;   ///< n_basis, mol.
  double water_kg = 0;         ///< Of the component H2O.
  std::vector<double> solids;  ///< n_minerals, mol; suspended, not dissolved.

  /// this += factor * other
  void add(const Amounts& other, double factor = 1);
};

/// Mass, kg: water, basis species and solids by their molar masses.
[[nodiscard]] double mass_kg(const Amounts& amounts, const Chemistry& chemistry);

/// A water between two steps: always solved at its own temperature.
///
/// Totals are per kg of the component H2O. Bound in the species of natural waters is less than one
/// part in ten thousand of it, so the solver takes it for the mass of the solvent.
struct Water {
  std::vector<double> totals;  ///< n_basis, mol per kg of water, hydrogen included.
  std::vector<double> solids;  ///< n_minerals, mol per kg of water; only a settle step moves them.
  double water_kg = 1;         ///< For every kg of water in the feed of the train.
  Temperature temperature = celsius(25.0);
  Pressure pressure = 101325.0 * Pressure::unit_type();
  Solution solution;  ///< Of the totals; the solids take no part in it.
};

/// The water of a closed stream, 1 kg of it. `closed.status` must be converged (asserted).
[[nodiscard]] Water water_of(const Stream& stream,
                             const ClosedStream& closed,
                             const Chemistry& chemistry);

[[nodiscard]] Amounts amounts_of(const Water& water);

/// Volume of the water with what is dissolved in it, at its own temperature, L per kg of water.
[[nodiscard]] double litres_per_kg_water(const Water& water, const Chemistry& chemistry);

// ---- steps, as they were written ----------------------------------------------------------------

/// A quantity and where it stands.
struct Given {
  WrittenQuantity quantity;  ///< A bare number has an empty unit.
  std::string text;
  SourceSpan span;
};

/// A word that names something, and where it stands.
struct Word {
  std::string text;
  SourceSpan span;
};

/// `sodium = "97 %"`
struct NamedGiven {
  Word name;
  Given value;
};

/// Mixes another water in: by its share of the volume of the mixture, or by its flow, each volume
/// at the temperature of its water. The mixture has the mass-weighted temperature.
struct Blend {
  Word other;                  ///< As written: the other plant file.
  std::optional<Given> share;  ///< Ratio.
  std::optional<Given> flow;   ///< Volume flow.
  std::optional<Water> water;  ///< Of that file; set by whoever reads files.
};

/// Adds a reagent: so much product, or so much of its active substance, per volume or mass of the
/// water before the step, or per time. The temperature stays.
struct Dose {
  Word reagent;
  Given amount;
  bool is_of_active = false;
};

/// Sealed: nothing leaves.
struct ChangeTemperature {
  Given to;
  bool cools = false;  ///< Written as cool_to.
};

/// Water leaves and what is dissolved stays, or part of it leaves through a membrane.
struct Concentrate {
  enum class By { cycles, evaporated, recovery };
  By by = By::cycles;
  Given factor;                       ///< 4.2, or a ratio.
  std::vector<NamedGiven> rejection;  ///< Recovery only; what is not named is kept whole.
  std::optional<Given> polarisation;  ///< At the membrane over in the bulk, >= 1.
  bool keeps_permeate = false;        ///< The train goes on with the permeate.
};

/// Takes a share of what is dissolved as the gas itself; what is left finds its equilibrium then.
struct Strip {
  std::vector<NamedGiven> shares;
};

/// Gases at constant partial pressure; those not named stay in the water.
struct OpenTo {
  Word atmosphere;                    ///< Empty when pressures are given.
  std::vector<NamedGiven> pressures;  ///< Pressure.
};

/// A sealed gas space, which first holds `gas` and then every gas the water can give off.
struct Headspace {
  Given volume;  ///< Per volume of water.
  OpenTo gas;
};

/// The minerals named form or dissolve until their saturation index is reached; nothing else does.
struct Settle {
  struct Entry {
    Word mineral;
    std::optional<Given> index;  ///< Saturation index that stays; 0 when left out.
  };
  std::vector<Entry> minerals;
  bool keep_solids = false;   ///< Else everything solid leaves the water.
  std::optional<Given> area;  ///< Area the deposit grows on, m2.
};

/// Takes a share of what is suspended.
struct RemoveSolids {
  Given share;
};

/// Dissolves a mineral to saturation; a water that is past it is left as it is.
struct PassBed {
  Word mineral;
};

struct ExchangeIons {
  Word resin;
  std::optional<Given> leakage;  ///< Share of what the resin takes that passes; 0 when left out.
};

/// Doses as much of a reagent as gives the pH at the temperature of the water.
struct BringPH {
  Given ph;
  Word reagent;
};

/// Returns a share of the water to before an earlier step.
struct Recycle {
  Word to;  ///< Name of that step.
  Given share;
};

using Action = std::variant<Blend,
                            Dose,
                            ChangeTemperature,
                            Concentrate,
                            Strip,
                            OpenTo,
                            Headspace,
                            Settle,
                            RemoveSolids,
                            PassBed,
                            ExchangeIons,
                            BringPH,
                            Recycle>;

struct Step {
  std::string name;  ///< "step_2" where none was written.
  SourceSpan name_span;
  SourceSpan span;  ///< Of the action key.
  Action action;
};

using Train = std::vector<Step>;

/// "4.2 cycles", "75 % recovery", "30 % evaporated"; the unit of the quantity keeps the word.
struct ConcentrationFactor {
  Concentrate::By by = Concentrate::By::cycles;
  WrittenQuantity quantity;
};
[[nodiscard]] std::variant<ConcentrationFactor, UnitError> read_concentration_factor(
    std::string_view text);

/// The quantity at an address "step.key" or "step.key.name" ("acid.amount", "loop.concentrate",
/// "ro.rejection.sodium"); nullptr when there is none. Keys are those of the plant file.
[[nodiscard]] WrittenQuantity* quantity_at(Train& train, std::string_view address);
/// All such addresses, in order.
[[nodiscard]] std::vector<std::string> quantity_addresses(const Train& train);

// ---- running ------------------------------------------------------------------------------------

/// What every step may look at. Refers to its parts.
struct Plant {
  const Chemistry& chemistry;
  const ActivityModel& model;
  const Supplies& supplies;
  /// Water in the feed, kg/s, where the flow of the stream is known.
  std::optional<double> feed_water_kg_per_s;
};

[[nodiscard]] Plant plant_of(const Stream& stream,
                             const Water& feed,
                             const Chemistry& chemistry,
                             const ActivityModel& model,
                             const Supplies& supplies);

/// Finds every mistake of the train that can be found without solving anything: unknown names,
/// quantities of the wrong kind or out of range, per-time doses without a flow, names used twice.
/// Returns false when there was one.
[[nodiscard]] bool check_train(const Train& train,
                               const Chemistry& chemistry,
                               const Supplies& supplies,
                               bool has_flow,
                               Diagnostics& diagnostics);

/// Something that entered or left the water, or formed in it.
struct Portion {
  std::string what;  ///< "sulfuric acid 96 %", "carbon dioxide", "calcite", "permeate"
  Amounts amounts;
  double mol = 0;       ///< Of a gas, mineral or ion; 0 for a mixture. Per kg of water in the feed.
  double kg = 0;        ///< Per kg of water in the feed.
  double mg_per_l = 0;  ///< Per litre of the water that entered the step.
  std::optional<double> kg_per_h;
  std::optional<double> mm_per_month;  ///< Of a deposit on a known area.
};

/// What one step did.
struct StepRecord {
  std::vector<Portion> added;
  std::vector<Portion> removed;
  std::vector<Portion> deposited;  ///< Minerals; negative where they dissolved.
  bool solids_stay = false;        ///< What was deposited is still suspended in the water.
  std::vector<Caution> cautions;
  /// Waters beside the main one: "permeate", "concentrate", "membrane".
  std::vector<std::pair<std::string, Water>> beside;
};

/// added - removed, and - deposited unless it stays: out = in + net, exactly.
[[nodiscard]] Amounts net_of(const StepRecord& record, const Chemistry& chemistry);

struct StepOutcome {
  std::string name;
  Water water;
  StepRecord record;
};

/// The states in order, or where and why the train stopped.
struct TrainOutcome {
  std::vector<StepOutcome> steps;
  std::string failed_step;  ///< Empty: none.
  std::string reason;
  [[nodiscard]] bool is_complete() const { return failed_step.empty(); }
};

/// A recycle is at steady state when from one round to the next no amount of the water returned
/// changes by more than this share of itself, or of 1 umol per kg of water where it is smaller.
inline constexpr double recycle_tolerance = 1e-10;
/// Rounds after which a recycle is given up.
inline constexpr int max_recycle_rounds = 2000;
/// A pH is brought to its target within this.
inline constexpr double ph_tolerance = 1e-9;

/// Applies the steps in order. Expects that check_train was satisfied (asserted where it matters)
/// and every Blend has its water. Never throws; deterministic.
[[nodiscard]] TrainOutcome run_train(const Train& train, const Water& feed, const Plant& plant);

}  // namespace ionledger
