// The command line. The only file that includes CLI11; it decides nothing about water.
#include <CLI/CLI.hpp>
#include <algorithm>
#include <exception>
#include <functional>
#include <string>
#include <vector>

#include "app/commands.hpp"
#include "app/exit_status.hpp"
#include "app/terminal.hpp"
#include "ionledger/diagnostic.hpp"

namespace ionledger::app {
namespace {

constexpr const char* file_help = "Plant file; - reads standard input";
constexpr const char* models_help = "Folder of model files to use instead of the built-in ones";

/// What the command line asked for; a command fills in `run`.
struct Request {
  AssessOptions assess;
  CheckOptions check;
  ModelsOptions models;
  NewOptions fresh;
  std::function<int()> run;
};

void add_commands(CLI::App& program, Request& request) {
  CLI::App* assess = program.add_subcommand(
      "assess", "Solve the water: pH, charge ledger, what would form, cautions");
  assess->add_option("FILE", request.assess.file, file_help)->required()->type_name("");
  assess->add_flag("--json", request.assess.json, "Print JSON for a program to read");
  assess->add_flag("--all", request.assess.all, "Show every species, mineral and gas");
  assess->add_option("--report", request.assess.report, "Write a page (.html) to read and print")
      ->type_name("FILE");
  assess->add_option("--models", request.assess.models, models_help)->type_name("DIR");
  assess->group("Commands")->callback([&] {
    request.run = [&] { return assess_command(request.assess); };
  });

  CLI::App* check =
      program.add_subcommand("check", "Check a plant file and its ion balance; solve nothing");
  check->add_option("FILE", request.check.file, file_help)->required()->type_name("");
  check->add_flag("--json", request.check.json, "Print JSON for a program to read");
  check->add_option("--models", request.check.models, models_help)->type_name("DIR");
  check->group("Commands")->callback([&] {
    request.run = [&] { return check_command(request.check); };
  });

  CLI::App* models =
      program.add_subcommand("models", "List what the program knows, or explain one part of it");
  models
      ->add_option("TOPIC",
                   request.models.topic,
                   "A species, mineral, gas, constituent, activity model or source")
      ->type_name("");
  models->add_option("--models", request.models.models, models_help)->type_name("DIR");
  models->group("Commands")->callback([&] {
    request.run = [&] { return models_command(request.models); };
  });

  CLI::App* fresh = program.add_subcommand("new", "Write a plant file to start from");
  fresh->add_option("FILE", request.fresh.file, "Where to; standard output when left out")
      ->type_name("");
  fresh->group("Commands")->callback([&] {
    request.run = [&] { return new_command(request.fresh); };
  });
}

/// What is wrong with the command line: "there is no command "asess"; did you mean "assess"?" when
/// that is the mistake, else `message`.
std::string explained(const std::string& message, const std::vector<std::string>& arguments) {
  const std::vector<std::string> commands = {"assess", "check", "models", "new"};
  if (arguments.empty()) return "say what to do: assess, check, models or new";
  const bool names_a_command = arguments.front().rfind('-', 0) == 0 ||
                               std::count(commands.begin(), commands.end(), arguments.front()) > 0;
  if (names_a_command) return message;
  const std::string nearest = nearest_word(arguments.front(), commands);
  return "there is no command \"" + arguments.front() + "\"" +
         (nearest.empty() ? "" : "; did you mean \"" + nearest + "\"?");
}

int run(int argc, char** argv) {
  CLI::App program("Books every mole and every charge of a process stream, and says what follows.",
                   "ionledger");
  program.set_version_flag("--version", "ionledger " IONLEDGER_VERSION, "Print the version");
  program.set_help_flag("-h,--help", "Print this help");
  program.get_formatter()->label("SUBCOMMAND", "COMMAND");
  program.get_formatter()->label("REQUIRED", "");
  program.get_formatter()->column_width(20);
  program.require_subcommand(1);
  Request request;
  add_commands(program, request);
  program.footer(
      "Start with \"ionledger new water.toml\", then \"ionledger assess water.toml\".\n"
      "Exit status: 0 done, 1 the input is wrong, 2 no solution, 64 wrong command line.");
  try {
    program.parse(argc, argv);
  } catch (const CLI::ParseError& error) {
    if (error.get_exit_code() == 0) return program.exit(error);  // --help, --version
    complain("ionledger: " + explained(error.what(), {argv + 1, argv + argc}));
    complain("\"ionledger --help\" says what is possible.");
    return wrong_command_line;
  }
  return request.run();
}

}  // namespace
}  // namespace ionledger::app

int main(int argc, char** argv) {
  try {
    return ionledger::app::run(argc, argv);
  } catch (const std::exception& error) {
    ionledger::app::complain(std::string("ionledger: a fault of the program: ") + error.what());
    return ionledger::app::our_mistake;
  }
}
