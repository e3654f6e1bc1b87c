// "ionledger check": is the plant file right, and does its analysis balance? Solves nothing.
#include "app/commands.hpp"
#include "app/exit_status.hpp"
#include "app/inputs.hpp"
#include "app/terminal.hpp"
#include "ionledger/assessment.hpp"
#include "ionledger/report.hpp"

namespace ionledger::app {

int check_command(const CheckOptions& options) {
  Diagnostics diagnostics;
  const std::optional<Inputs> inputs = load_inputs(options.file, options.models, diagnostics);
  complain(diagnostics);
  if (!inputs) return wrong_input;
  const ReportBalance balance = balance_of_report(inputs->stream, inputs->models.chemistry);
  const std::string& title = inputs->stream.name;
  if (options.json) return print(json_balance(balance, title));
  TextStyle style;
  style.colour = wants_colour();
  return print(text_balance(balance, title, style));
}

}  // namespace ionledger::app
