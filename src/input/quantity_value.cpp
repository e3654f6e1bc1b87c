// Reads a quantity from a TOML value and places its errors.
#include "input/quantity_value.hpp"

#include <fmt/format.h>

#include "input/file_text.hpp"

namespace ionledger {

std::string described(const QuantityExample& example) {
  return fmt::format("{} such as \"{} {}\"", example.what, example.number, example.unit);
}

void refuse_quantity(const TomlCursor& value, const UnitError& unit_error, std::size_t offset) {
  value.error_at(offset + unit_error.offset,
                 unit_error.summary,
                 unit_error.found,
                 unit_error.expected,
                 unit_error.fix);
}

std::optional<WrittenQuantity> read_written(const TomlCursor& value,
                                            std::optional<PpmMeaning> ppm,
                                            const QuantityExample& example) {
  if (value.is(TomlNode::Kind::number)) {
    if (!value.number(described(example))) return std::nullopt;
    value.error(fmt::format("{} has no unit", value.path()),
                described(example),
                fmt::format("put number and unit in quotation marks, such as {} = \"{} {}\"",
                            value.key(),
                            value.written(),
                            example.unit));
    return std::nullopt;
  }
  const auto text = value.text(described(example));
  if (!text) return std::nullopt;
  const auto result = read_quantity(*text, ppm);
  if (const auto* unit_error = std::get_if<UnitError>(&result)) {
    refuse_quantity(value, *unit_error);
    return std::nullopt;
  }
  return std::get<WrittenQuantity>(result);
}

}  // namespace ionledger
