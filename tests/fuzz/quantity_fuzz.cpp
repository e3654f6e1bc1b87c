// A libFuzzer target over everything that reads a quantity; separate as it is built on request:
//   clang++-14 -std=c++20 -g -O1 -fsanitize=fuzzer,address,undefined -fno-sanitize-recover=all
//     -DFMT_HEADER_ONLY -Iinclude -Isrc tests/fuzz/quantity_fuzz.cpp
//     src/units/*.cpp src/diagnostic/*.cpp -o build/quantity_fuzz
//   build/quantity_fuzz build/corpus tests/fuzz/corpus_quantity -max_len=260 -max_total_time=180
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

#include "ionledger/diagnostic.hpp"
#include "ionledger/units.hpp"

namespace {

using namespace ionledger;

void require(bool claim) {
  if (!claim) __builtin_trap();
}

/// A finding must say something, point into the text and render on a line of its own.
void check(const UnitError& error, std::string_view text) {
  require(error.offset <= text.size());
  require(!error.summary.empty() && !error.found.empty() && !error.expected.empty());
  Diagnostics diagnostics;
  diagnostics.error({"", 1, 1}, error.summary, error.found, error.expected, error.fix);
  const std::string rendered = render(diagnostics);
  std::size_t lines = error.fix.empty() ? 3 : 4;
  for (const char c : rendered) {
    if (c == '\n') --lines;
  }
  require(lines == 0);
}

template <class Q>
int try_as(const WrittenQuantity& written, std::string_view text) {
  const auto result = to<Q>(written);
  if (const auto* error = std::get_if<UnitError>(&result)) check(*error, text);
  return result.index() == 0 ? 1 : 0;
}

/// A quantity is finite, of at most one type (a kelvin alone: two), and reads the same again.
void check(const WrittenQuantity& written, std::string_view text) {
  require(std::isfinite(written.number) && std::isfinite(written.value_in_si));
  require(!written.unit.empty());
  const int n_types =
      try_as<Temperature>(written, text) + try_as<TemperatureDifference>(written, text) +
      try_as<Pressure>(written, text) + try_as<VolumeFlow>(written, text) +
      try_as<MassFlow>(written, text) + try_as<Density>(written, text) +
      try_as<AmountPerVolume>(written, text) + try_as<EquivalentPerVolume>(written, text) +
      try_as<AmountPerMass>(written, text) + try_as<EquivalentPerMass>(written, text) +
      try_as<Conductivity>(written, text) + try_as<ElectricPotential>(written, text) +
      try_as<MassFraction>(written, text) + try_as<Ratio>(written, text);
  require(n_types <= (written.unit == "K" ? 2 : 1));
  const std::string again = "1 " + written.unit;
  if (again.size() > max_quantity_text) return;
  const auto one = read_quantity(again, PpmMeaning::mg_per_kg);
  if (const auto* same = std::get_if<WrittenQuantity>(&one)) {
    require(same->unit == written.unit);
  } else {
    require(!std::isnormal(written.value_in_si));
  }
}

void read_and_check(std::string_view text, std::optional<PpmMeaning> ppm) {
  const auto result = read_quantity(text, ppm);
  if (const auto* error = std::get_if<UnitError>(&result)) {
    check(*error, text);
  } else {
    check(std::get<WrittenQuantity>(result), text);
  }
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const bool has_ppm = text.find("ppm") != std::string_view::npos;
  read_and_check(text, std::nullopt);
  if (has_ppm) read_and_check(text, PpmMeaning::mg_per_litre);
  if (has_ppm) read_and_check(text, PpmMeaning::mg_per_kg);
  return 0;
}
