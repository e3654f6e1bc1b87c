// Numbers as people read them.
#include "report/number_text.hpp"

#include <limits>
#include <numeric>

#include "support/compare.hpp"

using namespace ionledger;
using ionledger::testing::within;

TEST_SUITE("report/number_text") {
  constexpr double nan = std::numeric_limits<double>::quiet_NaN();

  TEST_CASE("Fixed decimals have a true minus, grouped thousands and no negative zero") {
    CHECK(fixed_text(-0.744, 2) == "\u22120.74");
    CHECK(fixed_text(-0.004, 2) == "0.00");
    CHECK(fixed_text(12345.6, 1) == "12\u202F345.6");
    CHECK(fixed_text(999.0, 0) == "999");
    CHECK(fixed_text(nan, 2) == "–");
  }

  TEST_CASE("A signed number always has its sign") {
    CHECK(signed_text(0.954, 2) == "+0.95");
    CHECK(signed_text(-0.954, 2) == "\u22120.95");
    CHECK(signed_text(-0.001, 2) == "+0.00");
    CHECK(signed_text(nan, 2) == "–");
  }

  TEST_CASE("Powers of ten are written out") {
    CHECK(scientific_text(3.204e-3) == "3.20 × 10⁻³");
    CHECK(scientific_text(-1.5e12, 2) == "\u22121.5 × 10¹²");
    CHECK(scientific_text(0) == "0");
    CHECK(scientific_text(nan) == "–");
  }

  TEST_CASE("Significant digits survive rounding up to a power of ten") {
    CHECK(significant_text(9.996) == "10.0");
    CHECK(significant_text(0.019434) == "0.0194");
    CHECK(significant_text(912.4) == "912");
    CHECK(significant_text(2.5e-7) == "2.50 × 10⁻⁷");
  }

  TEST_CASE("A plain number has no zeros it does not need") {
    CHECK(plain_text(18.0) == "18");
    CHECK(plain_text(1.01325) == "1.01325");
    CHECK(plain_text(-0.03252849, 15) == "\u22120.03252849");
    CHECK(plain_text(2.5e-7) == "2.5 × 10⁻⁷");
  }

  TEST_CASE("Apportioned terms add up to the rounded sum, each within one step") {
    const std::vector<double> terms = {0.4, 0.4, 0.4, 2.3, 1e-9};
    const std::vector<long long> steps = apportioned(terms, 1.0);
    CHECK(std::accumulate(steps.begin(), steps.end(), 0LL) == 4);  // 3.5 and a trace
    for (std::size_t i = 0; i < terms.size(); ++i) {
      CHECK(double(steps[i]) == within(terms[i], 1.0));  // one step, by definition
    }
    CHECK(apportioned({}, 1.0).empty());
  }
}
