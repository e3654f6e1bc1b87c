// Reads formulas, charges and reactions; separate because models and laboratory units both speak in
// formulas.
#include "chemistry/formula.hpp"

#include <array>
#include <cctype>
#include <string>

namespace ionledger {
namespace {

struct Element {
  const char* symbol;
  double atomic_weight;
};

// Standard atomic weights, abridged to five figures; conventional values where an interval is
// given. Source: IUPAC Commission on Isotopic Abundances and Atomic Weights, Pure Appl. Chem. 94
// (2022) 573 (2021 table); digits from memory.
// clang-format off
constexpr std::array<Element, 24> elements = {{
    {"H", 1.008},    {"Li", 6.94},    {"B", 10.81},    {"C", 12.011},   {"N", 14.007},   {"O", 15.999},
    {"F", 18.998},   {"Na", 22.990},  {"Mg", 24.305},  {"Al", 26.982},  {"Si", 28.085},  {"P", 30.974},
    {"S", 32.06},    {"Cl", 35.45},   {"K", 39.098},   {"Ca", 40.078},  {"Mn", 54.938},  {"Fe", 55.845},
    {"Cu", 63.546},  {"Zn", 65.38},   {"Br", 79.904},  {"Sr", 87.62},   {"I", 126.90},   {"Ba", 137.33},
}};
// clang-format on

const Element* find_element(std::string_view symbol) {
  for (const Element& element : elements) {
    if (symbol == element.symbol) return &element;
  }
  return nullptr;
}

bool is_digit(char c) { return c >= '0' && c <= '9'; }
bool is_lower(char c) { return c >= 'a' && c <= 'z'; }

/// Recursive descent over "Al(OH)4"; the depth is bounded because each level consumes a
/// parenthesis.
class FormulaReader {
 public:
  explicit FormulaReader(std::string_view text) : text_(text) {}

  std::optional<Composition> read() {
    auto whole = group(0);
    if (!whole || whole->empty() || at_ != text_.size()) return std::nullopt;
    return whole;
  }

 private:
  static constexpr int max_depth = 4;

  std::optional<Composition> group(int depth) {
    if (depth > max_depth) return std::nullopt;
    Composition sum;
    while (at_ < text_.size() && text_[at_] != ')') {
      Composition part;
      if (text_[at_] == '(') {
        ++at_;
        auto inner = group(depth + 1);
        if (!inner || at_ == text_.size()) return std::nullopt;
        ++at_;
        part = *inner;
      } else {
        std::size_t end = at_ + 1;
        while (end < text_.size() && is_lower(text_[end])) ++end;
        const std::string_view symbol = text_.substr(at_, end - at_);
        if (find_element(symbol) == nullptr) return std::nullopt;
        part[std::string(symbol)] = 1;
        at_ = end;
      }
      const int count = number();
      for (const auto& [element, n] : part) sum[element] += n * count;
    }
    return sum;
  }

  int number() {
    int value = 0;
    bool any = false;
    while (at_ < text_.size() && is_digit(text_[at_]) && value < 1000) {
      value = 10 * value + (text_[at_++] - '0');
      any = true;
    }
    return any ? value : 1;
  }

  std::string_view text_;
  std::size_t at_ = 0;
};

std::string_view without_charge(std::string_view name) {
  const std::size_t sign = name.find_first_of("+-");
  return sign == std::string_view::npos ? name : name.substr(0, sign);
}

std::string_view trimmed(std::string_view text) {
  while (!text.empty() && text.front() == ' ') text.remove_prefix(1);
  while (!text.empty() && text.back() == ' ') text.remove_suffix(1);
  return text;
}

std::optional<Term> read_term(std::string_view text) {
  text = trimmed(text);
  double coefficient = 1;
  const std::size_t space = text.find(' ');
  if (space != std::string_view::npos && is_digit(text.front())) {
    int whole = 0;
    for (const char c : text.substr(0, space)) {
      if (!is_digit(c) || whole > 1000) return std::nullopt;
      whole = 10 * whole + (c - '0');
    }
    coefficient = whole;
    text = trimmed(text.substr(space));
  }
  const bool dangles = text.size() >= 2 && text.substr(text.size() - 2) == " +";
  if (text.empty() || coefficient <= 0 || dangles) return std::nullopt;
  return Term{std::string(text), coefficient};
}

bool read_side(std::string_view text, double sign, std::vector<Term>& terms) {
  constexpr std::string_view plus = " + ";
  while (true) {
    const std::size_t at = text.find(plus);
    const auto term = read_term(text.substr(0, at));
    if (!term) return false;
    terms.emplace_back(term->first, sign * term->second);
    if (at == std::string_view::npos) return true;
    text.remove_prefix(at + plus.size());
  }
}

}  // namespace

std::optional<Composition> composition_of(std::string_view formula) {
  return FormulaReader(without_charge(formula)).read();
}

double molar_mass_g_per_mol(const Composition& composition) {
  double mass = 0;
  for (const auto& [symbol, count] : composition) {
    mass += count * find_element(symbol)->atomic_weight;
  }
  return mass;
}

std::optional<int> charge_of(std::string_view name) {
  const std::size_t sign = name.find_first_of("+-");
  if (sign == std::string_view::npos) return 0;
  const std::string_view digits = name.substr(sign + 1);
  const int unit = name[sign] == '+' ? 1 : -1;
  if (digits.empty()) return unit;
  if (digits.size() != 1 || !is_digit(digits[0]) || digits[0] == '0') return std::nullopt;
  return unit * (digits[0] - '0');
}

std::optional<std::vector<Term>> read_reaction(std::string_view text) {
  constexpr std::string_view equals = " = ";
  const std::size_t at = text.find(equals);
  if (at == std::string_view::npos) return std::nullopt;
  const std::string_view right = text.substr(at + equals.size());
  if (right.find(equals) != std::string_view::npos) return std::nullopt;
  std::vector<Term> terms;
  if (!read_side(text.substr(0, at), -1, terms) || !read_side(right, 1, terms)) return std::nullopt;
  return terms;
}

}  // namespace ionledger
