// One step after the other; recycles by repeating the train until what returns no longer changes.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "treatment/workbench.hpp"

namespace ionledger {
namespace {

constexpr double least_amount = 1e-6;  // mol per kg of water; smaller ones are compared with it

const Word* reagent_of(const Action& action) {
  if (const auto* dose = std::get_if<Dose>(&action)) return &dose->reagent;
  if (const auto* bring = std::get_if<BringPH>(&action)) return &bring->reagent;
  return nullptr;
}

class TrainRunner {
 public:
  TrainRunner(const Train& train, const Water& feed, const Plant& plant)
      : train_(train), feed_(feed), bench_(plant), returning_(train.size()) {}

  TrainOutcome run() {
    const bool recycles = std::any_of(train_.begin(), train_.end(), [](const Step& step) {
      return std::holds_alternative<Recycle>(step.action);
    });
    TrainOutcome outcome = once();
    for (int round = 1; recycles && outcome.is_complete() && !is_steady_; ++round) {
      if (round == max_recycle_rounds) return unsteady();
      outcome = once();
    }
    return outcome;
  }

 private:
  TrainOutcome once() {
    TrainOutcome outcome;
    is_steady_ = true;
    Water water = feed_;
    for (std::size_t k = 0; k < train_.size(); ++k) {
      StepRecord record;
      Applied after = joined(k, water, record);
      if (after) after = applied(k, *after, record);
      if (!after) {
        outcome.failed_step = train_[k].name;
        outcome.reason = bench_.failure();
        return outcome;
      }
      warn_of_neighbours(k, record);
      water = *after;
      outcome.steps.push_back({train_[k].name, std::move(*after), std::move(record)});
    }
    return outcome;
  }

  /// The water before step k, with what returns to it.
  Applied joined(std::size_t k, const Water& water, StepRecord& record) {
    Applied result = water;
    for (std::size_t from = k; from < train_.size() && result; ++from) {
      const auto* recycle = std::get_if<Recycle>(&train_[from].action);
      if (recycle == nullptr || recycle->to.text != train_[k].name || !returning_[from]) continue;
      result =
          mixed(*result, *returning_[from], "returned from " + train_[from].name, bench_, record);
    }
    return result;
  }

  Applied applied(std::size_t k, const Water& water, StepRecord& record) {
    if (const auto* recycle = std::get_if<Recycle>(&train_[k].action)) {
      Water returned = water;
      returned.water_kg *= recycle->share.quantity.value_in_si;
      is_steady_ = is_steady_ && returning_[k] && is_same(*returning_[k], returned);
      returning_[k] = std::move(returned);
    }
    return std::visit([&](const auto& action) { return apply(action, water, bench_, record); },
                      train_[k].action);
  }

  static bool is_same(const Water& before, const Water& after) {
    const auto agrees = [](double a, double b, double least) {
      return std::abs(a - b) <= recycle_tolerance * std::max(std::abs(b), least);
    };
    const Amounts a = amounts_of(before);
    const Amounts b = amounts_of(after);
    bool same = agrees(a.water_kg, b.water_kg, 0) &&
                agrees(in_kelvin(before.temperature), in_kelvin(after.temperature), 0);
    for (std::size_t i = 0; i < a.basis.size(); ++i) {
      same = same && agrees(a.basis[i], b.basis[i], least_amount * b.water_kg);
    }
    for (std::size_t m = 0; m < a.solids.size(); ++m) {
      same = same && agrees(a.solids[m], b.solids[m], least_amount * b.water_kg);
    }
    return same;
  }

  [[nodiscard]] TrainOutcome unsteady() const {
    const auto last = std::find_if(train_.rbegin(), train_.rend(), [](const Step& step) {
      return std::holds_alternative<Recycle>(step.action);
    });
    TrainOutcome outcome;
    outcome.failed_step = last->name;
    outcome.reason = fmt::format(
        "the water returned is still changing after {} rounds: there is no steady state, or it is "
        "too far; give the loop a way out",
        max_recycle_rounds);
    return outcome;
  }

  /// Reagents of this train that must not meet the one dosed in step k.
  void warn_of_neighbours(std::size_t k, StepRecord& record) const {
    const Supplies& supplies = bench_.plant().supplies;
    const Word* here = reagent_of(train_[k].action);
    if (here == nullptr) return;
    const Reagent& reagent = *supplies.reagent(here->text);
    for (std::size_t earlier = 0; earlier < k; ++earlier) {
      const Word* there = reagent_of(train_[earlier].action);
      if (there == nullptr) continue;
      const Reagent& other = *supplies.reagent(there->text);
      for (const Incompatible& pair : supplies.incompatible) {
        const bool meets = (pair.first == reagent.family && pair.second == other.family) ||
                           (pair.second == reagent.family && pair.first == other.family);
        if (meets) record.cautions.push_back({other.name + " and " + reagent.name, pair.says});
      }
    }
  }

  const Train& train_;
  const Water& feed_;
  Workbench bench_;
  std::vector<std::optional<Water>> returning_;  // by the index of its recycle step
  bool is_steady_ = true;
};

}  // namespace

TrainOutcome run_train(const Train& train, const Water& feed, const Plant& plant) {
  return TrainRunner(train, feed, plant).run();
}

}  // namespace ionledger
