// Text of a user made fit for one line of a message: UTF-8 decoded, everything else escaped.
#include "diagnostic/printable.hpp"

#include <array>

namespace ionledger {
namespace {

constexpr char32_t first_surrogate = 0xD800;
constexpr char32_t last_surrogate = 0xDFFF;
constexpr char32_t last_code_point = 0x10FFFF;

/// Lead byte pattern, payload mask of the lead byte, and the smallest value its length may encode.
struct Form {
  unsigned char lead_mask;
  unsigned char lead;
  std::size_t length;
  char32_t smallest;
};
constexpr std::array<Form, 3> long_forms = {{
    {0xE0, 0xC0, 2, 0x80},
    {0xF0, 0xE0, 3, 0x800},
    {0xF8, 0xF0, 4, 0x10000},
}};

bool is_control(char32_t value) { return value < 0x20 || (value >= 0x7F && value < 0xA0); }

std::string escaped(unsigned char byte) {
  constexpr std::string_view digits = "0123456789ABCDEF";
  if (byte == '\n') return "\\n";
  if (byte == '\t') return "\\t";
  return {'\\', 'x', digits[byte >> 4U], digits[byte & 0xFU]};
}

}  // namespace

CodePoint code_point_at(std::string_view text, std::size_t offset) {
  const auto lead = static_cast<unsigned char>(text[offset]);
  if (lead < 0x80) return {lead, 1, true};
  for (const Form& form : long_forms) {
    if ((lead & form.lead_mask) != form.lead) continue;
    if (text.size() - offset < form.length) break;
    char32_t value = lead & static_cast<unsigned char>(~form.lead_mask);
    for (std::size_t i = 1; i < form.length; ++i) {
      const auto byte = static_cast<unsigned char>(text[offset + i]);
      if ((byte & 0xC0U) != 0x80U) return {lead, 1, false};
      value = (value << 6U) | (byte & 0x3FU);
    }
    const bool is_surrogate = value >= first_surrogate && value <= last_surrogate;
    if (value < form.smallest || value > last_code_point || is_surrogate) break;
    return {value, form.length, true};
  }
  return {lead, 1, false};
}

std::string printable(std::string_view text) {
  std::string result;
  result.reserve(text.size());
  for (std::size_t i = 0; i < text.size();) {
    const CodePoint point = code_point_at(text, i);
    const std::string_view bytes = text.substr(i, point.length);
    if (point.is_valid && !is_control(point.value)) {
      result += bytes;
    } else {
      for (const char byte : bytes) result += escaped(static_cast<unsigned char>(byte));
    }
    i += point.length;
  }
  return result;
}

}  // namespace ionledger
