// Printing, and what the terminal can do.
#include "app/terminal.hpp"

#include <unistd.h>

#include <cerrno>
#include <cstdio>
#include <cstdlib>
#include <string>
#include <system_error>

#include "app/exit_status.hpp"

namespace ionledger::app {
namespace {

std::string_view environment(const char* name) {
  const char* value = std::getenv(name);
  return value == nullptr ? std::string_view() : std::string_view(value);
}

}  // namespace

bool wants_colour() {
  return isatty(STDOUT_FILENO) == 1 && environment("NO_COLOR").empty() &&
         environment("TERM") != "dumb";
}

int print(std::string_view text) {
  const bool is_written = std::fwrite(text.data(), 1, text.size(), stdout) == text.size();
  if (is_written && std::fflush(stdout) == 0) return done;
  if (errno == EPIPE) return done;
  complain("ionledger: cannot write the result: " + std::generic_category().message(errno));
  return wrong_input;
}

void complain(std::string_view message) {
  // Nowhere is left to report a failure of standard error.
  std::fprintf(stderr, "%.*s\n", static_cast<int>(message.size()), message.data());
}

void complain(const Diagnostics& diagnostics) {
  if (!diagnostics.empty()) std::fputs(render(diagnostics).c_str(), stderr);
}

}  // namespace ionledger::app
