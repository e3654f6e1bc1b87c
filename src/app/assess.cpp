// "ionledger assess": from a plant file to everything that follows from it.
#include "app/commands.hpp"
#include "app/exit_status.hpp"
#include "app/files.hpp"
#include "app/inputs.hpp"
#include "app/terminal.hpp"
#include "app/train.hpp"
#include "ionledger/assessment.hpp"
#include "ionledger/equilibrium.hpp"
#include "ionledger/report.hpp"

namespace ionledger::app {

int assess_command(const AssessOptions& options) {
  Diagnostics diagnostics;
  std::optional<Inputs> inputs = load_inputs(options.file, options.models, diagnostics);
  if (inputs && !prepare_train(options.file, *inputs, diagnostics)) inputs.reset();
  std::optional<ClosedStream> closed;
  if (inputs) {
    closed =
        close_stream(inputs->stream, inputs->models.chemistry, inputs->activity_model, diagnostics);
  }
  complain(diagnostics);
  if (!closed) return wrong_input;
  if (closed->status != SolveStatus::converged) {
    complain(shown_name(options.file) + ": no solution: " + closed->reason);
    return no_solution;
  }
  const Chemistry& chemistry = inputs->models.chemistry;
  const Water feed = water_of(inputs->stream, *closed, chemistry);
  const Plant plant =
      plant_of(inputs->stream, feed, chemistry, inputs->activity_model, inputs->models.supplies);
  const TrainOutcome outcome = run_train(inputs->train, feed, plant);
  if (!outcome.is_complete()) {
    complain(shown_name(options.file) + ": no solution: step " + outcome.failed_step + ": " +
             outcome.reason);
    return no_solution;
  }
  Assessment assessment = assess(inputs->stream, *closed, chemistry, inputs->activity_model);
  assess_train(outcome, inputs->stream, plant, assessment);
  if (!options.report.empty() &&
      !write_page(options.report, html_report(assessment), diagnostics)) {
    complain(diagnostics);
    return wrong_input;
  }
  if (options.json) return print(json_report(assessment));
  TextStyle style;
  style.colour = wants_colour();
  style.all = options.all;
  return print(text_report(assessment, style));
}

}  // namespace ionledger::app
