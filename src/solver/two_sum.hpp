// A sum in twice the working precision, for differences of totals that nearly cancel. Needs
// strict evaluation: no contraction, no -ffast-math.
#pragma once

#include <cmath>

namespace ionledger::solver {

class TwoSum {
 public:
  void add(double term) {
    // D. E. Knuth, The Art of Computer Programming 2, section 4.2.2: exact error of one addition.
    const double sum = high_ + term;
    const double part = sum - high_;
    low_ += (high_ - (sum - part)) + (term - part);
    high_ = sum;
  }
  void add_product(double a, double b) {
    // T. J. Dekker, Numer. Math. 18 (1971) 224: exact error of one product.
    const double product = a * b;
    const double a_high = upper_half(a);
    const double a_low = a - a_high;
    const double b_high = upper_half(b);
    const double b_low = b - b_high;
    add(product);
    low_ += ((a_high * b_high - product) + a_high * b_low + a_low * b_high) + a_low * b_low;
  }
  [[nodiscard]] double value() const { return high_ + low_; }

 private:
  static double upper_half(double a) {
    const double shifted = 134217729.0 * a;  // 2^27 + 1
    return shifted - (shifted - a);
  }
  double high_ = 0, low_ = 0;
};

}  // namespace ionledger::solver
