// The states of a train, each assessed like the water as received, with what its step moved.
#include "assessment/assessed_state.hpp"
#include "stream/volume.hpp"

namespace ionledger {
namespace {

constexpr double seconds_per_hour = 3600;
const Temperature laboratory_temperature = celsius(25.0);

class TrainAssessor {
 public:
  TrainAssessor(const Stream& stream, const Plant& plant) : stream_(stream), plant_(plant) {}

  [[nodiscard]] AssessedState state(const std::string& name, const Water& water) const {
    Stream stream;
    stream.name = stream_.name;
    stream.temperature = water.temperature;
    stream.pressure = water.pressure;
    stream.totals = water.totals;
    stream.reported = stream_.reported;
    for (std::size_t i = 0; i < water.totals.size(); ++i) {
      if (water.totals[i] > 0) stream.reported[i] = true;
    }
    stream.inorganic_carbon_is_known = true;
    // Milligrams per litre are those a laboratory would report, at its own temperature.
    stream.litre_per_kg_water = solution_volume_l(plant_.chemistry,
                                                  water.solution.molality,
                                                  water.solution.ionic_strength_molal,
                                                  laboratory_temperature);
    ClosedStream closed;
    closed.status = SolveStatus::converged;
    closed.totals = water.totals;
    closed.ph_from = ClosedStream::PHFrom::hydrogen_balance;
    closed.solution = water.solution;
    AssessedState state = assessed_state(stream, closed, plant_.chemistry, plant_.model);
    state.name = name;
    state.water_kg_per_kg_feed = water.water_kg;
    if (plant_.feed_water_kg_per_s) {
      state.flow_m3_per_h = *plant_.feed_water_kg_per_s * seconds_per_hour * water.water_kg *
                            litres_per_kg_water(water, plant_.chemistry) / 1000;
    }
    return state;
  }

  [[nodiscard]] AssessedState state(const StepOutcome& step) const {
    AssessedState state = this->state(step.name, step.water);
    state.added = step.record.added;
    state.removed = step.record.removed;
    state.deposited = step.record.deposited;
    state.solids_stay = step.record.solids_stay;
    for (const Portion& deposit : step.record.deposited) {
      for (MineralLine& line : state.minerals) {
        if (line.mineral == deposit.what)
          line.deposit_mol_per_kg = deposit.mol / step.water.water_kg;
      }
    }
    state.cautions.insert(
        state.cautions.begin(), step.record.cautions.begin(), step.record.cautions.end());
    return state;
  }

 private:
  const Stream& stream_;
  const Plant& plant_;
};

}  // namespace

void assess_train(const TrainOutcome& train,
                  const Stream& stream,
                  const Plant& plant,
                  Assessment& assessment) {
  const TrainAssessor assessor(stream, plant);
  if (!assessment.states.empty() && plant.feed_water_kg_per_s && stream.flow) {
    assessment.states.front().flow_m3_per_h = stream.flow->value() * seconds_per_hour;
  }
  for (const StepOutcome& step : train.steps) {
    assessment.states.push_back(assessor.state(step));
    for (const auto& [side, water] : step.record.beside) {
      assessment.states.push_back(assessor.state(step.name + "_" + side, water));
    }
  }
}

}  // namespace ionledger
