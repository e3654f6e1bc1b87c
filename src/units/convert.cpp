// What was written, as one of the quantity types: where the run-time dimension meets the type.
#include <fmt/format.h>

#include <string>

#include "ionledger/units.hpp"
#include "units/dimension_of.hpp"
#include "units/kind.hpp"
#include "units/spelling.hpp"

namespace ionledger {
namespace {

// The two that are no Boost quantities, and are therefore told apart by meaning alone.
template <class Q>
constexpr bool is_share = std::is_same_v<Q, MassFraction> || std::is_same_v<Q, Ratio>;

template <class Q>
constexpr DimensionExponents wanted_dimension() {
  if constexpr (is_share<Q>) {
    return {};
  } else {
    static_assert(units::is_recovered<Q>, "the exponents do not lead back to the type");
    return units::dimension_of<Q>;
  }
}

template <class Q>
constexpr Meaning wanted_meaning() {
  if constexpr (std::is_same_v<Q, Temperature>) return Meaning::absolute_temperature;
  if constexpr (std::is_same_v<Q, MassFraction>) return Meaning::mass_fraction;
  if constexpr (std::is_same_v<Q, Ratio>) return Meaning::ratio;
  return Meaning::plain;
}

template <class Q>
Q from_si(double value_in_si) {
  if constexpr (is_share<Q>) {
    return Q{value_in_si};
  } else {
    return Q::from_value(value_in_si);
  }
}

/// "5 K" is a temperature and a difference alike; "5 degC" and "5 degF" have a zero of their own.
bool is_kelvin(const WrittenQuantity& written) {
  return written.meaning == Meaning::absolute_temperature && written.unit == "K";
}

std::string echo(const WrittenQuantity& written) {
  const std::string number_and_unit = fmt::format("{} {}", written.number, written.unit);
  return quoted(written.basis.empty() ? number_and_unit : number_and_unit + " as " + written.basis);
}

/// Advice for the confusions that happen in practice.
std::string advice(const WrittenQuantity& written, const Kind& found, const Kind& wanted) {
  if (wanted.meaning == Meaning::mass_fraction && found.meaning == Meaning::ratio) {
    return fmt::format("write \"{} % by mass\"", written.number);
  }
  if (wanted.meaning == Meaning::ratio && found.meaning == Meaning::mass_fraction) {
    return fmt::format("write \"{} %\"", 100 * written.value_in_si);
  }
  if (found.meaning == Meaning::absolute_temperature && wanted.dimension == found.dimension) {
    return "write the difference in kelvin: 9 degF of difference are 5 K";
  }
  const int equivalents_found = found.dimension[6];
  const int equivalents_wanted = wanted.dimension[6];
  if (equivalents_found != equivalents_wanted) {
    return "equivalents and moles differ by the charge number; write the one asked for";
  }
  return "";
}

UnitError mismatch(const WrittenQuantity& written, const Kind& wanted) {
  const Kind& found = kind_of(written.dimension, written.meaning);
  return {0,
          fmt::format("{} is {}, not {}", echo(written), found.name, wanted.name),
          echo(written),
          fmt::format("{}, in units such as {}", wanted.name, wanted.units),
          advice(written, found, wanted)};
}

}  // namespace

template <NamedQuantity Q>
std::variant<Q, UnitError> to(const WrittenQuantity& written) {
  constexpr DimensionExponents dimension = wanted_dimension<Q>();
  constexpr Meaning meaning = wanted_meaning<Q>();
  const bool fits = written.meaning == meaning ||
                    (std::is_same_v<Q, TemperatureDifference> && is_kelvin(written));
  if (fits && written.dimension == dimension) return from_si<Q>(written.value_in_si);
  return mismatch(written, kind_of(dimension, meaning));
}

template std::variant<Temperature, UnitError> to(const WrittenQuantity&);
template std::variant<TemperatureDifference, UnitError> to(const WrittenQuantity&);
template std::variant<Pressure, UnitError> to(const WrittenQuantity&);
template std::variant<VolumeFlow, UnitError> to(const WrittenQuantity&);
template std::variant<MassFlow, UnitError> to(const WrittenQuantity&);
template std::variant<Density, UnitError> to(const WrittenQuantity&);
template std::variant<AmountPerVolume, UnitError> to(const WrittenQuantity&);
template std::variant<EquivalentPerVolume, UnitError> to(const WrittenQuantity&);
template std::variant<AmountPerMass, UnitError> to(const WrittenQuantity&);
template std::variant<EquivalentPerMass, UnitError> to(const WrittenQuantity&);
template std::variant<Conductivity, UnitError> to(const WrittenQuantity&);
template std::variant<ElectricPotential, UnitError> to(const WrittenQuantity&);
template std::variant<MassFraction, UnitError> to(const WrittenQuantity&);
template std::variant<Ratio, UnitError> to(const WrittenQuantity&);

}  // namespace ionledger
