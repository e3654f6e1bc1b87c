// Unicode signs to their ASCII spellings, every byte keeping its place in the original.
#include "units/spelling.hpp"

#include <array>
#include <utility>

#include "diagnostic/printable.hpp"

namespace ionledger {
namespace {

struct Spelling {
  char32_t sign;
  const char* ascii;
};

constexpr std::array<Spelling, 12> signs = {{
    {0x00A0, " "},     // no-break space
    {0x2009, " "},     // thin space
    {0x202F, " "},     // narrow no-break space
    {0x00B5, "u"},     // micro sign
    {0x03BC, "u"},     // Greek small mu
    {0x00B0, "deg"},   // degree sign
    {0x00BA, "deg"},   // masculine ordinal, next to it on many keyboards
    {0x2103, "degC"},  // degree Celsius
    {0x00B7, "*"},     // middle dot
    {0x22C5, "*"},     // dot operator
    {0x00D7, "*"},     // multiplication sign
    {0x2212, "-"},     // minus sign
}};

constexpr std::array<Spelling, 11> superscripts = {{
    {0x2070, "0"},
    {0x00B9, "1"},
    {0x00B2, "2"},
    {0x00B3, "3"},
    {0x2074, "4"},
    {0x2075, "5"},
    {0x2076, "6"},
    {0x2077, "7"},
    {0x2078, "8"},
    {0x2079, "9"},
    {0x207B, "-"},
}};

template <std::size_t N>
const char* find(const std::array<Spelling, N>& table, char32_t sign) {
  for (const Spelling& entry : table) {
    if (entry.sign == sign) return entry.ascii;
  }
  return nullptr;
}

std::string ascii_of(const CodePoint& point, bool follows_superscript) {
  if (!point.is_valid) return {QuantityText::unreadable};
  if (point.value < 0x80) return {static_cast<char>(point.value)};
  if (const char* power = find(superscripts, point.value)) {
    return follows_superscript ? power : std::string("^") + power;
  }
  const char* spelling = find(signs, point.value);
  return spelling != nullptr ? spelling : std::string{QuantityText::unreadable};
}

}  // namespace

QuantityText::QuantityText(std::string_view original) : original_(original) {
  bool follows_superscript = false;
  for (std::size_t i = 0; i < original_.size();) {
    const CodePoint point = code_point_at(original_, i);
    const std::string spelling = ascii_of(point, follows_superscript);
    follows_superscript = point.is_valid && find(superscripts, point.value) != nullptr;
    ascii_ += spelling;
    offsets_.insert(offsets_.end(), spelling.size(), i);
    i += point.length;
  }
  offsets_.push_back(original_.size());
}

std::string QuantityText::written(std::size_t begin, std::size_t end) const {
  return original_.substr(offsets_[begin], offsets_[end] - offsets_[begin]);
}

std::size_t QuantityText::skip_spaces(std::size_t begin) const {
  while (is_space(at(begin))) ++begin;
  return begin;
}

UnitError QuantityText::error(std::size_t position,
                              std::string summary,
                              std::string expected,
                              std::string fix) const {
  return {offsets_[position],
          std::move(summary),
          quoted(original_),
          std::move(expected),
          std::move(fix)};
}

std::string quoted(std::string_view text) { return "\"" + std::string(text) + "\""; }

}  // namespace ionledger
