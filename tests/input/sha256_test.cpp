#include "input/sha256.hpp"

#include <doctest/doctest.h>

namespace ionledger {

// Vectors: FIPS 180-2, appendix B.1 to B.3 (the same algorithm as in FIPS 180-4); the empty message
// and the byte bd from NIST's validation set SHA256ShortMsg.
TEST_SUITE("input/sha256") {
  TEST_CASE("the digest of the empty message is the published one") {
    CHECK(sha256("") == "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855");
  }

  TEST_CASE("the digest of abc, one block, is the published one") {
    CHECK(sha256("abc") == "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
  }

  TEST_CASE("the digest of a message whose padding needs a second block is the published one") {
    CHECK(sha256("abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq") ==
          "248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1");
  }

  TEST_CASE("the digest of a million letters a is the published one") {
    CHECK(sha256(std::string(1000000, 'a')) ==
          "cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0");
  }

  TEST_CASE("bytes above 127 are not extended by their sign") {
    CHECK(sha256(std::string(1, '\xbd')) ==
          "68325720aabd7c82f30f554b313d0570c95accbb7dc4b5aae11204c08ffe732b");
  }
}

}  // namespace ionledger
