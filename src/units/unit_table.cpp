// Every unit the program can read, with factors from their definitions, and words mistaken for one.
#include "units/unit_table.hpp"

#include <algorithm>
#include <iterator>

#include "ionledger/diagnostic.hpp"

namespace ionledger {
namespace {

// Exact by definition (NIST SP 811, 2008, appendix B; SI Brochure, 9th edition).
constexpr double inch = 0.0254;
constexpr double foot = 12 * inch;
constexpr double pound = 0.45359237;
constexpr double standard_gravity = 9.80665;
constexpr double gallon = 231 * inch * inch * inch;  // US liquid gallon
constexpr double psi = pound * standard_gravity / (inch * inch);
constexpr double atmosphere = 101325;
constexpr double zero_degc = 273.15;
constexpr double zero_degf = 459.67;

constexpr double litre = 1e-3;
constexpr double minute = 60;
constexpr double hour = 3600;
constexpr double day = 86400;

// Abridged standard atomic weights, g/mol: T. Prohaska et al., Pure Appl. Chem. 94 (2022) 573.
constexpr double calcium = 40.078;
constexpr double carbon = 12.011;
constexpr double oxygen = 15.999;
// Two equivalents per mole; mg/L of the compound to eq/m3, which is meq/L.
constexpr double equivalents_of_cao = 2 / (calcium + oxygen);
constexpr double equivalents_of_caco3 = 2 / (calcium + carbon + 3 * oxygen);

constexpr DimensionExponents none{};
constexpr DimensionExponents length{1, 0, 0, 0, 0, 0, 0};
constexpr DimensionExponents volume{3, 0, 0, 0, 0, 0, 0};
constexpr DimensionExponents mass{0, 1, 0, 0, 0, 0, 0};
constexpr DimensionExponents time{0, 0, 1, 0, 0, 0, 0};
constexpr DimensionExponents temperature{0, 0, 0, 0, 1, 0, 0};
constexpr DimensionExponents amount{0, 0, 0, 0, 0, 1, 0};
constexpr DimensionExponents equivalent{0, 0, 0, 0, 0, 0, 1};
constexpr DimensionExponents volume_flow{3, 0, -1, 0, 0, 0, 0};
constexpr DimensionExponents pressure{-1, 1, -2, 0, 0, 0, 0};
constexpr DimensionExponents conductance{-2, -1, 3, 2, 0, 0, 0};
constexpr DimensionExponents potential{2, 1, -3, -1, 0, 0, 0};
constexpr DimensionExponents hardness{-3, 0, 0, 0, 0, 0, 1};

constexpr auto absolute = Meaning::absolute_temperature;

// Prefixed units are rows of their own: a general rule would read "Mg/L", a slip of the shift key,
// as megagrams. In order of likelihood, because the first of equally near symbols is suggested.
// clang-format off
constexpr KnownUnit known[] = {
    {"mg", 1e-6, mass},        {"g", 1e-3, mass},         {"ug", 1e-9, mass},        {"ng", 1e-12, mass},
    {"kg", 1, mass},           {"t", 1000, mass},         {"lb", pound, mass},
    {"mmol", 1e-3, amount},    {"mol", 1, amount},        {"umol", 1e-6, amount},    {"nmol", 1e-9, amount},
    {"kmol", 1e3, amount},
    {"meq", 1e-3, equivalent}, {"eq", 1, equivalent},     {"ueq", 1e-6, equivalent},
    {"L", litre, volume},      {"mL", 1e-3 * litre, volume}, {"uL", 1e-6 * litre, volume},
    {"dL", 0.1 * litre, volume}, {"hL", 100 * litre, volume}, {"gal", gallon, volume},
    {"m", 1, length},          {"dm", 0.1, length},       {"cm", 0.01, length},      {"mm", 1e-3, length},
    {"ft", foot, length},
    {"h", hour, time},         {"min", minute, time},     {"s", 1, time},            {"d", day, time},
    {"gpm", gallon / minute, volume_flow},
    {"bar", 1e5, pressure},    {"mbar", 100, pressure},   {"Pa", 1, pressure},       {"hPa", 100, pressure},
    {"kPa", 1e3, pressure},    {"MPa", 1e6, pressure},    {"atm", atmosphere, pressure},
    {"psi", psi, pressure},
    {"S", 1, conductance},     {"mS", 1e-3, conductance}, {"uS", 1e-6, conductance},
    {"V", 1, potential},       {"mV", 1e-3, potential},
    {"degC", 1, temperature, zero_degc, true, absolute},
    {"degF", 5.0 / 9.0, temperature, zero_degf, true, absolute},
    {"K", 1, temperature, 0, false, absolute},
    {"degdH", 10 * equivalents_of_cao, hardness, 0, true},
    {"degfH", 10 * equivalents_of_caco3, hardness, 0, true},
    {"degeH", 14.254 * equivalents_of_caco3, hardness, 0, true},
    {"%", 0.01, none, 0, true, Meaning::ratio},
};
// clang-format on

struct Mistaken {
  const char* word;
  UnitAdvice advice;
};

const std::vector<Mistaken>& mistaken() {
  static const std::vector<Mistaken> words = {
      {"hr", {"h", ""}},
      {"hour", {"h", ""}},
      {"hours", {"h", ""}},
      {"sec", {"s", ""}},
      {"day", {"d", ""}},
      {"liter", {"L", ""}},
      {"litre", {"L", ""}},
      {"ltr", {"L", ""}},
      {"cc", {"mL", ""}},
      {"deg", {"", "write degC or degF, in one word"}},
      {"degree", {"", "write degC or degF"}},
      {"degrees", {"", "write degC or degF"}},
      {"Celsius", {"degC", ""}},
      {"Fahrenheit", {"degF", ""}},
      {"C", {"degC", ""}},
      {"F", {"degF", ""}},
      {"dH", {"degdH", ""}},
      {"fH", {"degfH", ""}},
      {"eH", {"degeH", ""}},
      {"mgl", {"mg/L", ""}},
      {"wt%", {"% by mass", ""}},
      {"umho", {"uS", ""}},
      {"umhos", {"uS", ""}},
      {"bara", {"bar", ""}},
      {"psia", {"psi", ""}},
      {"val", {"eq", ""}},
      {"mval", {"meq", ""}},
      {"degf", {"", "write degF for Fahrenheit, degfH for French degrees of hardness"}},
      {"degH", {"", "write degdH, degfH or degeH: German, French or English degrees of hardness"}},
      {"barg", {"", "write the absolute pressure in bar: add that of the air, about 1.013 bar"}},
      {"psig", {"", "write the absolute pressure in psi: add that of the air, about 14.7 psi"}},
      {"Mg", {"", "write mg for milligrams, t for tonnes"}},
      {"M", {"", "write mol/L"}},
      {"mM", {"", "write mmol/L"}},
      {"uM", {"", "write umol/L"}},
      {"N", {"", "write eq/L"}},
      {"ppm", {"", "write mg/L or mg/kg"}},
      {"ppb", {"", "write ug/L or ug/kg"}},
      {"ppt", {"", "write g/kg, or ng/L or ng/kg: it is read as a thousandth and as 1e-12"}},
  };
  return words;
}

std::vector<std::string> all_symbols() {
  std::vector<std::string> symbols;
  std::transform(
      std::begin(known), std::end(known), std::back_inserter(symbols), [](const auto& u) {
        return u.symbol;
      });
  return symbols;
}

}  // namespace

const KnownUnit* find_unit(std::string_view symbol) {
  const auto* const found = std::find_if(
      std::begin(known), std::end(known), [&](const auto& unit) { return symbol == unit.symbol; });
  if (found != std::end(known)) return found;
  if (symbol.empty() || symbol.back() != 'l') return nullptr;
  std::string with_capital(symbol);
  with_capital.back() = 'L';
  return find_unit(with_capital);
}

UnitAdvice advice_on(std::string_view word) {
  for (const Mistaken& entry : mistaken()) {
    if (word == entry.word) return entry.advice;
  }
  return {nearest_word(std::string(word), all_symbols()), ""};
}

}  // namespace ionledger
