// Pages on one thing in the models: what it is, its constant, and who says so.
#pragma once

#include <string>

#include "ionledger/readers.hpp"
#include "report/text_page.hpp"

namespace ionledger {

/// "0 to 90", degrees Celsius.
[[nodiscard]] std::string range_text(const TemperatureRange& range);

/// Each prints a page when `topic` names one of its kind and says whether it did.
bool print_species_topic(TextPage& page, const Models& models, const std::string& topic);
bool print_mineral_topic(TextPage& page, const Models& models, const std::string& topic);
bool print_gas_topic(TextPage& page, const Models& models, const std::string& topic);
bool print_constituent_topic(TextPage& page, const Models& models, const std::string& topic);
bool print_activity_topic(TextPage& page, const Models& models, const std::string& topic);
bool print_source_topic(TextPage& page, const Models& models, const std::string& topic);

}  // namespace ionledger
