// SHA-256, so that a result can name exactly the data it was computed from. Separate because it is
// a published algorithm with published test vectors.
#pragma once

#include <string>
#include <string_view>

namespace ionledger {

/// SHA-256 of `bytes` as 64 lower-case hexadecimal digits.
/// Range    up to 2^61 bytes.
/// Source   FIPS PUB 180-4, Secure Hash Standard, NIST, August 2015, sections 4.1.2, 5 and 6.2.
[[nodiscard]] std::string sha256(std::string_view bytes);

}  // namespace ionledger
