// The exponents of a Boost.Units quantity, found and proved at compile time: what ties the texts
// read at run time to the types. Private to this room.
#pragma once

#include <boost/units/get_dimension.hpp>
#include <type_traits>

#include "ionledger/units.hpp"

namespace ionledger::units {

/// Exponent of `Base` in a list of Boost.Units dimensions.
template <class Dimension, class Base>
inline constexpr int exponent_in = 0;
template <class Base, bu::integer_type N, class Rest>
inline constexpr int exponent_in<bu::list<bu::dim<Base, bu::static_rational<N, 1>>, Rest>, Base> =
    static_cast<int>(N);
template <class Other, class Power, class Rest, class Base>
inline constexpr int exponent_in<bu::list<bu::dim<Other, Power>, Rest>, Base> =
    exponent_in<Rest, Base>;

/// The unit of a quantity; of an absolute temperature, that of its differences.
template <class Q>
struct RelativeUnit;
template <class U>
struct RelativeUnit<bu::quantity<U, double>> {
  using type = U;
};
template <class U>
struct RelativeUnit<bu::quantity<bu::absolute<U>, double>> {
  using type = U;
};

/// Exponents of the unit of a Boost.Units quantity.
template <class Q,
          class Dimension = typename bu::get_dimension<typename RelativeUnit<Q>::type>::type>
inline constexpr DimensionExponents dimension_of = {
    exponent_in<Dimension, bu::length_base_dimension>,
    exponent_in<Dimension, bu::mass_base_dimension>,
    exponent_in<Dimension, bu::time_base_dimension>,
    exponent_in<Dimension, bu::current_base_dimension>,
    exponent_in<Dimension, bu::temperature_base_dimension>,
    exponent_in<Dimension, bu::amount_base_dimension>,
    exponent_in<Dimension, EquivalentDimension>,
};
/// True when the exponents found lead back to exactly the type they were found for.
template <class Q, DimensionExponents E = dimension_of<Q>>
inline constexpr bool is_recovered =
    std::is_same_v<QuantityOf<E[0], E[1], E[2], E[3], E[4], E[5], E[6]>,
                   bu::quantity<typename RelativeUnit<Q>::type, double>>;

}  // namespace ionledger::units
