// Units at the edge: Boost.Units types, and text such as "212 mg/L as CaCO3" read into them.
// Inside the solver everything is a plain double in mol per kg of water, K and natural logarithms.
#pragma once

#include <array>
#include <boost/units/absolute.hpp>
#include <boost/units/base_dimension.hpp>
#include <boost/units/base_unit.hpp>
#include <boost/units/base_units/si/ampere.hpp>
#include <boost/units/base_units/si/kelvin.hpp>
#include <boost/units/base_units/si/kilogram.hpp>
#include <boost/units/base_units/si/meter.hpp>
#include <boost/units/base_units/si/mole.hpp>
#include <boost/units/base_units/si/second.hpp>
#include <boost/units/dimension.hpp>
#include <boost/units/make_system.hpp>
#include <boost/units/quantity.hpp>
#include <boost/units/unit.hpp>
#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <type_traits>
#include <variant>

namespace ionledger {

namespace units {

namespace bu = boost::units;

/// Equivalents of charge are a dimension of their own, so that meq and mmol never mix silently.
struct EquivalentDimension : bu::base_dimension<EquivalentDimension, 1> {};
struct EquivalentUnit : bu::base_unit<EquivalentUnit, EquivalentDimension::dimension_type, 1> {
  static const char* name() { return "equivalent"; }
  static const char* symbol() { return "eq"; }
};

using System = bu::make_system<bu::si::meter_base_unit,
                               bu::si::kilogram_base_unit,
                               bu::si::second_base_unit,
                               bu::si::ampere_base_unit,
                               bu::si::kelvin_base_unit,
                               bu::si::mole_base_unit,
                               EquivalentUnit>::type;

namespace detail {

/// A base dimension to a power. The power zero must vanish from the list of dimensions: Boost would
/// keep it, and then no product of two quantities would be of the type it ought to be.
template <class Base, int Exponent>
using Power = typename std::conditional_t<
    Exponent == 0,
    std::type_identity<bu::dimensionless_type>,
    bu::static_power<typename Base::dimension_type, bu::static_rational<Exponent>>>::type;

template <class... Factors>
struct Product {
  using type = bu::dimensionless_type;
};
template <class First, class... Rest>
struct Product<First, Rest...> {
  using type = typename boost::mpl::times<First, typename Product<Rest...>::type>::type;
};

}  // namespace detail

/// The coherent unit whose exponents are length, mass, time, current, temperature, amount,
/// equivalents.
template <int L, int M, int T, int I, int Theta, int N, int Eq>
using Unit = bu::unit<typename detail::Product<detail::Power<bu::length_base_dimension, L>,
                                               detail::Power<bu::mass_base_dimension, M>,
                                               detail::Power<bu::time_base_dimension, T>,
                                               detail::Power<bu::current_base_dimension, I>,
                                               detail::Power<bu::temperature_base_dimension, Theta>,
                                               detail::Power<bu::amount_base_dimension, N>,
                                               detail::Power<EquivalentDimension, Eq>>::type,
                      System>;

template <int L, int M, int T, int I, int Theta, int N, int Eq>
using QuantityOf = bu::quantity<Unit<L, M, T, I, Theta, N, Eq>, double>;

}  // namespace units

// clang-format off
using Temperature           = boost::units::quantity<boost::units::absolute<units::Unit<0,0,0,0,1,0,0>>, double>;
using TemperatureDifference = units::QuantityOf< 0, 0,  0, 0, 1, 0, 0>;  ///< K
using Pressure              = units::QuantityOf<-1, 1, -2, 0, 0, 0, 0>;  ///< Pa
using VolumeFlow            = units::QuantityOf< 3, 0, -1, 0, 0, 0, 0>;  ///< m3/s
using MassFlow              = units::QuantityOf< 0, 1, -1, 0, 0, 0, 0>;  ///< kg/s
using Density               = units::QuantityOf<-3, 1,  0, 0, 0, 0, 0>;  ///< kg/m3; also mass per volume of a solute
using AmountPerVolume       = units::QuantityOf<-3, 0,  0, 0, 0, 1, 0>;  ///< mol/m3
using EquivalentPerVolume   = units::QuantityOf<-3, 0,  0, 0, 0, 0, 1>;  ///< eq/m3
using AmountPerMass         = units::QuantityOf< 0,-1,  0, 0, 0, 1, 0>;  ///< mol/kg; per kg of water where it is a molality
using EquivalentPerMass     = units::QuantityOf< 0,-1,  0, 0, 0, 0, 1>;  ///< eq/kg of water
using Conductivity          = units::QuantityOf<-3,-1,  3, 2, 0, 0, 0>;  ///< S/m
using ElectricPotential     = units::QuantityOf< 2, 1, -3,-1, 0, 0, 0>;  ///< V
// clang-format on

/// Mass of solute per mass of solution: "3 % by mass", "120 mg/kg". Not a ratio of anything else.
struct MassFraction {
  double kg_per_kg;
};
/// A plain share or a relative uncertainty: "30 %".
struct Ratio {
  double value;
};

/// Absolute temperature from kelvin, and back.
[[nodiscard]] Temperature kelvin(double temperature_k);
[[nodiscard]] double in_kelvin(Temperature temperature);
/// Absolute temperature from degrees Celsius, and back. 0 degC is 273.15 K exactly.
[[nodiscard]] Temperature celsius(double temperature_degc);
[[nodiscard]] double in_celsius(Temperature temperature);

/// Exponents of length, mass, time, current, temperature, amount of substance, equivalents.
using DimensionExponents = std::array<int, 7>;

/// What the bare exponents cannot say. "3 % by mass", "30 %" and "120 mg/kg" have equal dimensions,
/// "18 degC" and "18 K" (a difference) too.
enum class Meaning {
  plain,
  absolute_temperature,  ///< "18 degC", "64 degF", "291 K"
  mass_fraction,         ///< "3 % by mass", "120 mg/kg"
  ratio,                 ///< "30 %"
};

/// A number with its unit as it was written, and the same in coherent SI (m, kg, s, A, K, mol, eq).
struct WrittenQuantity {
  double number = 0;               ///< As written: 96.
  std::string unit;                ///< As written: "mg/L".
  std::string basis;               ///< Formula after "as", or empty: "CaCO3".
  double value_in_si = 0;          ///< 0.096 for 96 mg/L; kelvin for an absolute temperature.
  DimensionExponents dimension{};  ///< Of value_in_si.
  Meaning meaning = Meaning::plain;
};

/// What `ppm` shall mean; without it ppm is refused, because both readings are in use.
enum class PpmMeaning { mg_per_litre, mg_per_kg };

/// Why a text is not a quantity. `offset` counts bytes from the start of the text.
struct UnitError {
  std::size_t offset = 0;
  std::string summary;
  std::string found;
  std::string expected;
  std::string fix;
};

/// Longest text read_quantity looks at, in bytes; longer ones are refused.
inline constexpr std::size_t max_quantity_text = 200;

/// Reads `number unit`, `number unit as Formula`, `number % by mass` or `number degdH`.
///
/// Accepts   decimal point only (a comma is refused with a hint); products and quotients of units
///           with `/`, `*`, `.`, powers as `m3`, `m^3`, `m³`, `h^-1`; both micro signs; `°C`,
///           `degC`.
/// Degrees   hardness degrees (degdH, degfH, degeH) are equivalents of calcium and magnesium:
///           1 degdH = 10 mg CaO, 1 degfH = 10 mg CaCO3, 1 degeH = 14.254 mg CaCO3 per litre, 2 eq
///           per mole.
/// Refuses   `ppm` unless `ppm` says what it means; ppb, numbers that are not finite, a missing
///           unit, an unknown unit (with the nearest known one), temperatures below 0 K, °C in a
///           product, "as Formula" behind what is neither a concentration nor a mass flow.
/// Source    SI Brochure (BIPM 2019) for the SI; US gallon 231 in^3, pound 0.45359237 kg, inch
///           0.0254 m exactly (NIST SP 811); psi follows from these with standard gravity
///           9.80665 m/s^2.
[[nodiscard]] std::variant<WrittenQuantity, UnitError> read_quantity(
    std::string_view text, std::optional<PpmMeaning> ppm = std::nullopt);

namespace detail {
template <class Q, class... Named>
inline constexpr bool is_one_of = (std::is_same_v<Q, Named> || ...);
}  // namespace detail

/// The quantity types of this header.
template <class Q>
concept NamedQuantity = detail::is_one_of<Q,
                                          Temperature,
                                          TemperatureDifference,
                                          Pressure,
                                          VolumeFlow,
                                          MassFlow,
                                          Density,
                                          AmountPerVolume,
                                          EquivalentPerVolume,
                                          AmountPerMass,
                                          EquivalentPerMass,
                                          Conductivity,
                                          ElectricPotential,
                                          MassFraction,
                                          Ratio>;

/// `written` as the quantity type Q, or why it is not one (the message says which units fit).
/// Defined for every quantity type named in this header, Temperature, MassFraction and Ratio; using
/// it with any other type does not compile. The basis is not looked at: chemistry settles it.
/// A kelvin alone is an absolute temperature ("291 K"); asked for a difference, it is one as well.
template <NamedQuantity Q>
[[nodiscard]] std::variant<Q, UnitError> to(const WrittenQuantity& written);

}  // namespace ionledger
