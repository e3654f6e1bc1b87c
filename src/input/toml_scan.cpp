// Walks through a TOML text just closely enough to know what is inside quotation marks.
#include "input/toml_scan.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "diagnostic/printable.hpp"
#include "input/file_text.hpp"

namespace ionledger {
namespace {

constexpr int max_key_dots = 50;
constexpr std::string_view no_break_space = "\u00A0";

bool is_ascii(char c) { return static_cast<unsigned char>(c) < 0x80; }

class Scanner {
 public:
  explicit Scanner(std::string_view text) : text_(text) {}

  std::optional<ScanError> scan() {
    while (at_ < text_.size() && !error_) {
      const char c = text_[at_];
      if (c == '#') {
        at_ = std::min(text_.find('\n', at_), text_.size());
      } else if ((c == '"' || c == '\'') && may_open()) {
        skip_quoted(c);
      } else {
        bare(c);
      }
    }
    return error_;
  }

 private:
  void bare(char c) {
    constexpr std::string_view ends_of_key = ",=[]{}\n";
    if (!is_ascii(c)) {
      refuse_beyond_ascii();
    } else if (ends_of_key.find(c) != std::string_view::npos) {
      dots_ = 0;
    } else if (c == '.' && ++dots_ > max_key_dots) {
      error_ = {at_, "a key has too many levels", fmt::format("at most {} dots", max_key_dots), ""};
    }
    ++at_;
  }

  /// Whether a quotation mark here opens anything: only behind what may precede a key or a value.
  /// (The two marks of its own that a long text may end with stand behind a third, and open
  /// nothing.)
  [[nodiscard]] bool may_open() const {
    constexpr std::string_view openers = " \t\n=.,[{";
    return at_ == 0 || openers.find(text_[at_ - 1]) != std::string_view::npos;
  }

  [[nodiscard]] bool is_triple(char mark) const {
    return text_.substr(at_, 3) == std::string(3, mark);
  }

  void skip_quoted(char mark) {
    const bool is_long = is_triple(mark);
    at_ += is_long ? 3 : 1;
    while (at_ < text_.size() && !error_) {
      const char c = text_[at_];
      if (c == '\n' && !is_long) return;
      if (c == '\\' && mark == '"') {
        skip_escape(is_long);
      } else if (c == mark && (!is_long || is_triple(mark))) {
        at_ += is_long ? 3 : 1;
        return;
      } else {
        ++at_;
      }
    }
  }

  void skip_escape(bool is_long) {
    ++at_;
    if (at_ == text_.size()) return;
    const char c = text_[at_];
    if (is_long && (!is_ascii(c) || c == ' ' || c == '\t' || c == '\n' || c == '\r')) {
      error_ = {at_ - 1,
                "a backslash at the end of a line",
                "a text in one line, or in three quotation marks without backslashes",
                "delete the backslash"};
    } else if (c != '\n') {
      ++at_;
    }
  }

  void refuse_beyond_ascii() {
    const std::string_view sign = text_.substr(at_, code_point_at(text_, at_).length);
    error_ = {at_,
              fmt::format("{} stands outside quotation marks",
                          sign == no_break_space ? "a no-break space" : excerpt(sign)),
              "letters, digits, _ and - in a key; anything else in quotation marks",
              ""};
    for (const std::string_view mark : {"\u201C", "\u201D", "\u201E", "\u2018", "\u2019"}) {
      if (sign == mark) error_->fix = "use straight quotation marks: \"";
    }
    if (sign == no_break_space) error_->fix = "type the space anew";
  }

  std::string_view text_;
  std::size_t at_ = 0;
  int dots_ = 0;
  std::optional<ScanError> error_;
};

}  // namespace

std::optional<ScanError> scan_toml(std::string_view text) { return Scanner(text).scan(); }

}  // namespace ionledger
