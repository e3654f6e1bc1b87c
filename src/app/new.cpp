// "ionledger new": a plant file to start from.
#include "app/commands.hpp"
#include "app/exit_status.hpp"
#include "app/files.hpp"
#include "app/terminal.hpp"
#include "ionledger/report.hpp"

namespace ionledger::app {

int new_command(const NewOptions& options) {
  if (options.file.empty() || options.file == "-") return print(starter_plant_file());
  Diagnostics diagnostics;
  if (!write_new_file(options.file, starter_plant_file(), diagnostics)) {
    complain(diagnostics);
    return wrong_input;
  }
  return print("Written: " + options.file + "\nNext:    ionledger check " + options.file + "\n");
}

}  // namespace ionledger::app
