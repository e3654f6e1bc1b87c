// solve_system FILE ID: solves one system of hard_systems.json and prints the answer as JSON.
#include <cmath>
#include <cstdio>
#include <fstream>
#include <iostream>
#include <numbers>

#include "reference/hard_system.hpp"

namespace {

using ionledger::reference::HardSystem;
using nlohmann::ordered_json;
namespace solver = ionledger::solver;

const char* name_of(solver::Feasibility feasibility) {
  switch (feasibility) {
    case solver::Feasibility::interior:
      return "interior";
    case solver::Feasibility::boundary:
      return "boundary";
    case solver::Feasibility::infeasible:
      break;
  }
  return "infeasible";
}

const char* name_of(solver::Status status) {
  switch (status) {
    case solver::Status::not_run:
      return "not_run";
    case solver::Status::converged:
      return "converged";
    case solver::Status::stalled:
      return "stalled";
    case solver::Status::iteration_limit:
      return "iteration_limit";
    case solver::Status::infeasible:
      return "infeasible";
    case solver::Status::non_finite:
      break;
  }
  return "non_finite";
}

ordered_json number_or_null(double value) {
  return std::isfinite(value) ? ordered_json(value) : ordered_json(nullptr);
}

ordered_json answer(const HardSystem& hard, const solver::Outcome& outcome) {
  ordered_json result;
  result["feasibility"] = name_of(outcome.feasibility);
  result["log10_components"] = ordered_json::object();
  result["phases_mol"] = ordered_json::object();
  const bool solved = outcome.status == solver::Status::converged;
  for (std::size_t i = 0; i < hard.components.size(); ++i) {
    result["log10_components"][hard.components[i]] =
        solved ? number_or_null(outcome.x[i] / std::numbers::ln10) : ordered_json(nullptr);
  }
  for (std::size_t m = 0; m < hard.phases.size(); ++m) {
    result["phases_mol"][hard.phases[m]] =
        solved ? number_or_null(outcome.phase_amount[m]) : ordered_json(nullptr);
  }
  // Without charges in the file there is none to report.
  result["ionic_strength"] =
      hard.species_charge.empty() ? ordered_json(nullptr) : number_or_null(outcome.ionic_strength);
  const solver::Certificate& c = outcome.certificate;
  ordered_json& certificate = result["certificate"];
  certificate["status"] = name_of(outcome.status);
  certificate["good"] = c.good;
  certificate["worst_balance_residual"] = number_or_null(c.worst_balance_residual);
  certificate["ionic_strength_residual"] = number_or_null(c.ionic_strength_residual);
  certificate["complementarity"] = number_or_null(c.complementarity);
  certificate["ionic_strength_slope"] = number_or_null(c.ionic_strength_slope);
  certificate["several_solutions"] = c.several_solutions;
  certificate["iterations"] = outcome.iterations;
  certificate["path"] = outcome.used_safe_path ? "safe" : "fast";
  if (!outcome.reason.empty()) certificate["reason"] = outcome.reason;
  for (std::size_t k = 0; k < outcome.conflict.size(); ++k) {
    const auto component = static_cast<std::size_t>(outcome.conflict[k]);
    certificate["conflict"][hard.components[component]] = outcome.conflict_weight[k];
  }
  return result;
}

}  // namespace

int main(int argc, char** argv) {
  if (argc != 3) {
    std::cerr << "usage: solve_system FILE ID\n";
    return 3;
  }
  std::ifstream in(argv[1]);
  const nlohmann::json file = nlohmann::json::parse(in, nullptr, false);
  if (file.is_discarded()) {
    std::cerr << "solve_system: error: cannot read " << argv[1] << " as JSON\n";
    return 1;
  }
  std::string problem;
  const auto hard = ionledger::reference::read_hard_system(file, argv[2], problem);
  if (!hard) {
    std::cerr << "solve_system: error: " << problem << "\n";
    return 1;
  }
  const solver::Outcome outcome = ionledger::reference::solve_hard_system(*hard);
  std::cout << answer(*hard, outcome).dump(2) << "\n";
  const bool settled =
      outcome.status == solver::Status::converged || outcome.status == solver::Status::infeasible;
  return settled ? 0 : 2;
}
