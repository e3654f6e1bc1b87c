// Electrical conductivity of a solved water from its ions. What measured conductivity is compared
// with: the one check of an analysis that owes nothing to the analysis.
#pragma once

#include "ionledger/equilibrium.hpp"

namespace ionledger {

/// Up to here the method is tested against published conductivities, eq/L of cations or anions.
inline constexpr double conductivity_tested_eq_per_l = 0.1;
/// Largest relative error found there for salts of charges 1:1, 2:1 and 1:2.
inline constexpr double conductivity_max_error = 0.015;

/// Conductivity of `solution` at its own temperature.
///
/// Onsager's limiting law with finite ions (Robinson and Stokes), per ion, on the concentrations
/// that are left after ion pairing; per mole of charge, concentrations in mol/L of solution:
///
///     kappa    = sum c_i |z_i| lambda_i
///     lambda_i = l_i - (B1 l_i + B2 |z_i|) sqrt(I) / (1 + B a_i sqrt(I))
///     l_i      = l_i(25 degC) (eta(25 degC) / eta)^n_i
///     B1       = 2.801e6 z+ z- q / ((eps T)^1.5 (1 + sqrt(q)))
///     q        = z+ z- (l+ + l-) / ((z+ + z-) (z- l+ + z+ l-))
///     B2       = 41.25 / (eta sqrt(eps T))     eta of water in poise
///
/// In a mixture z+, z-, l+, l- are means over the cations and over the anions, each weighted with
/// its equivalents: a simplification of ours, exact for one salt.
///
/// Units   S/m. Limiting values, effective sizes a_i and exponents n_i: chemistry.conductivity.
/// Range   0 to 150 degC (NaN outside, as the water properties), tested from 0 to 50 degC and up to
///         conductivity_tested_eq_per_l. Above, the law is still evaluated; a value below zero,
///         which it can give an ion far outside its range, counts as zero.
/// Limits  No ions, or a chemistry without conductivity data: 0.
/// Source  R. A. Robinson and R. H. Stokes, J. Am. Chem. Soc. 76 (1954) 1991-1994; L. Onsager,
///         Phys. Z. 28 (1927) 277; the constants 2.801e6 and 41.25 from memory (they make 0.2300
///         and 60.6 of the law at 25 degC, as handbooks print it: 0.229 and 60.2).
[[nodiscard]] Conductivity conductivity(const Chemistry& chemistry, const Solution& solution);

/// Limiting conductivity of one ion at `temperature`, S cm2 per mole of charge: its own entry, else
/// the convention of its charge. 0 for a neutral species.
[[nodiscard]] double limiting_conductivity_s_cm2_per_eq(const Chemistry& chemistry,
                                                        int species,
                                                        Temperature temperature);

}  // namespace ionledger
