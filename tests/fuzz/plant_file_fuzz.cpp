// Feeds arbitrary bytes to the reader of plant files: it must give a plant file or a reason, and
// never crash. Build with -fsanitize=fuzzer,address,undefined.
#include <cstddef>
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "ionledger/readers.hpp"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  ionledger::Diagnostics diagnostics;
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const auto plant = ionledger::read_plant_file(text, "fuzz.toml", diagnostics);
  if (plant.has_value() == diagnostics.has_errors()) std::abort();
  if (!plant && ionledger::render(diagnostics).empty()) std::abort();
  return 0;
}
