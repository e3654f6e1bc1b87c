// Standard output and standard error.
#pragma once

#include <string_view>

#include "ionledger/diagnostic.hpp"

namespace ionledger::app {

/// True when standard output is a terminal that shows colour and nobody asked for none (NO_COLOR
/// not empty, or TERM=dumb).
[[nodiscard]] bool wants_colour();

/// Writes to standard output; `done`, or `wrong_input` with a message when that fails. A reader
/// that went away ("| head") is no failure.
[[nodiscard]] int print(std::string_view text);

/// Writes a message to standard error, a line break added.
void complain(std::string_view message);

/// Writes the findings to standard error, if there are any.
void complain(const Diagnostics& diagnostics);

}  // namespace ionledger::app
