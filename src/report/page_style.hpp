// The style sheet of the page. Separate because it is a language of its own.
#pragma once

#include <string_view>

namespace ionledger {

/// Plain CSS without anything fetched: one sheet for laptop, phone and paper.
extern const std::string_view page_style;

}  // namespace ionledger
