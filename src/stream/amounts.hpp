// One value of a laboratory report as moles, on the base it was written in. Separate from
// make_stream because this is where "as CaCO3", meq and degrees of hardness are settled.
#pragma once

#include <optional>

#include "ionledger/analysis.hpp"
#include "ionledger/chemistry.hpp"
#include "ionledger/diagnostic.hpp"

namespace ionledger {

/// What a value is per.
enum class Per { litre, kg_of_water, kg_of_solution };

/// Moles (equivalents for alkalinity and hardness) per `per`.
struct Amount {
  double value = 0;
  Per per = Per::litre;
};

/// `reported` as an amount of `constituent`; nullopt with a diagnostic when its unit does not fit.
[[nodiscard]] std::optional<Amount> amount_of(const ReportedValue& reported,
                                              const Constituent& constituent,
                                              Diagnostics& diagnostics);

}  // namespace ionledger
