// What the program's exit status means; a contract with scripts.
#pragma once

namespace ionledger::app {

enum ExitStatus : int {
  done = 0,
  wrong_input = 1,         ///< The messages name file, line and column.
  no_solution = 2,         ///< The message says why.
  some_cases_failed = 3,   ///< Of a screening; the others are complete.
  our_mistake = 4,         ///< A fault of the program.
  wrong_command_line = 64  ///< EX_USAGE of sysexits.
};

}  // namespace ionledger::app
