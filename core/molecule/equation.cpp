#include "core/molecule/equation.hpp"

#include "core/base/text_error.hpp"
#include "core/base/utf8.hpp"
#include "core/molecule/equation_term.hpp"

namespace heatledger::molecule {
namespace {

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}

enum class Joint : std::uint8_t { None, Plus, Arrow, ReversibleArrow, NotAnArrow };

struct Mark {
  Joint joint = Joint::None;
  std::size_t bytes = 0;
};

/// Cuts the text at its arrow and its separating plus signs in one pass.
class EquationReader {
 public:
  explicit EquationReader(std::string_view text) : text_(text) {}

  Result<EquationText> read() {
    if (const std::size_t bad = utf8::first_malformed(text_); bad < text_.size()) {
      return error_at("equation.not_utf8", "The equation holds bytes that are no text.", bad,
                      "Type the equation again here.");
    }
    if (utf8::skip_blanks(text_, 0) >= text_.size()) {
      return error_at("equation.empty", "There is no equation yet.", 0,
                      "Write one such as: ethene + H2 -> ethane");
    }
    std::size_t term = 0;  // where the present term begins
    std::size_t at = 0;
    while (at < text_.size()) {
      const char c = text_[at];
      if (c == '"' || starts(at, kOpenQuote)) {
        const std::size_t close = closing_quote(text_, at);
        if (close == std::string_view::npos) return unclosed_quote(at);
        at = close;
        continue;
      }
      if (c == '(' || c == '[' || c == '{') {
        open_.push_back(at++);
        continue;
      }
      if (c == ')' || c == ']' || c == '}') {
        const char opener = c == ')' ? '(' : c == ']' ? '[' : '{';
        if (open_.empty() || text_[open_.back()] != opener) {
          return error_at("equation.stray_bracket", "This bracket closes nothing that is open.", at,
                          "Remove it, or add the opening bracket.");
        }
        open_.pop_back();
        ++at;
        continue;
      }
      const Mark mark = open_.empty() ? joint_at(at) : Mark{};
      if (mark.joint == Joint::None) {
        ++at;
        continue;
      }
      if (mark.joint == Joint::NotAnArrow) {
        return error_at("equation.not_an_arrow", "This sign is not a reaction arrow here.", at,
                        "Write reactants -> products; <=> for a reaction that runs both ways.");
      }
      if (std::optional<Error> failed = add_term(term, at)) return *failed;
      if (mark.joint != Joint::Plus) {
        if (arrow_seen_) {
          return error_at("equation.two_arrows", "There is a second arrow here.", at,
                          "Write each step as a reaction of its own.");
        }
        if (sides_[0].empty()) return empty_side("left", at);
        arrow_seen_ = true;
        result_.reversible = mark.joint == Joint::ReversibleArrow;
      }
      pending_plus_ = mark.joint == Joint::Plus;
      at += mark.bytes;
      joint_end_ = at;
      term = at;
    }
    if (!open_.empty()) {
      return error_at("equation.unclosed_bracket", "This bracket is never closed.", open_.back(),
                      "Add the closing bracket.");
    }
    if (!arrow_seen_) return no_arrow();
    if (std::optional<Error> failed = add_term(term, text_.size())) return *failed;
    if (sides_[1].empty()) return empty_side("right", text_.size());
    result_.reactants = std::move(sides_[0]);
    result_.products = std::move(sides_[1]);
    return std::move(result_);
  }

 private:
  bool starts(std::size_t at, std::string_view word) const {
    return text_.compare(at, word.size(), word) == 0;
  }
  bool blank_or_end(std::size_t at) const { return at >= text_.size() || utf8::blank_at(text_, at) > 0; }
  bool blank_or_start(std::size_t at) const { return at == 0 || utf8::blank_before(text_, at) > 0; }

  Mark arrow_at(std::size_t at) const {
    switch (text_[at]) {
      case '<':
        if (starts(at, "<=>")) return {Joint::ReversibleArrow, 3};
        if (starts(at, "<->") || starts(at, "<-") || starts(at, "<=")) return {Joint::NotAnArrow, 2};
        return {};
      case '-': {
        if (starts(at, "->")) return {Joint::Arrow, 2};
        // A longer shaft counts only after a blank: in "OH-->H2O" the first sign is a charge.
        if (!blank_or_start(at)) return {};
        std::size_t end = at;
        while (end < text_.size() && text_[end] == '-') ++end;
        return end < text_.size() && text_[end] == '>' ? Mark{Joint::Arrow, end + 1 - at} : Mark{};
      }
      case '=': {
        std::size_t end = at;
        while (end < text_.size() && text_[end] == '=') ++end;
        if (end < text_.size() && text_[end] == '>') return {Joint::Arrow, end + 1 - at};
        // "A =-> B" holds two arrows; it is no species that ends in "=".
        const bool ends = blank_or_end(end) || text_[end] == '+' || arrow_at(end).joint != Joint::None;
        if (end - at == 1 && (at == joint_end_ || blank_or_start(at)) && ends) return {Joint::Arrow, 1};
        return {};
      }
      default:
        break;
    }
    if (static_cast<unsigned char>(text_[at]) != 0xE2) return {};
    if (starts(at, "\u2212>") || starts(at, "\u2013>")) return {Joint::Arrow, 4};
    if (starts(at, "\u2192") || starts(at, "\u27F6")) return {Joint::Arrow, 3};
    if (starts(at, "\u21CC") || starts(at, "\u21C4")) return {Joint::ReversibleArrow, 3};
    if (starts(at, "\u2190") || starts(at, "\u2194") || starts(at, "\u27F5") || starts(at, "\u27F7"))
      return {Joint::NotAnArrow, 3};
    return {};
  }

  Mark joint_at(std::size_t at) const {
    if (text_[at] != '+') return arrow_at(at);
    const bool attached_left = !blank_or_start(at) && at != joint_end_;
    return attached_left && plus_is_charge(at) ? Mark{} : Mark{Joint::Plus, 1};
  }

  /// A plus directly after text: charge or separator? Looks past one run of blanks or digits only.
  bool plus_is_charge(std::size_t at) const {
    std::size_t next = at + 1;
    if (next >= text_.size()) return true;
    if (text_[next] == '+') return true;
    if (text_[next] == '(') return phase_begins(next);
    if (starts(next, "\u00B7") || text_[next] == '.' || text_[next] == '*') return true;
    if (arrow_at(next).joint != Joint::None) return true;
    const std::size_t digits = next;
    while (next < text_.size() && is_digit(text_[next])) ++next;
    const bool has_digits = next > digits;
    const std::size_t past = utf8::skip_blanks(text_, next);
    if (past == next && past < text_.size() && !has_digits) return false;  // text on both sides
    return past >= text_.size() || text_[past] == '+' || phase_begins(past) ||
           arrow_at(past).joint != Joint::None;
  }

  /// A phase in parentheses begins at `at`; looks no further than the longest phase that makes sense.
  bool phase_begins(std::size_t at) const {
    if (at >= text_.size() || text_[at] != '(') return false;
    const std::string_view near = text_.substr(at, 64);
    const std::size_t close = near.find(')');
    return close != std::string_view::npos && is_phase(near.substr(0, close + 1));
  }

  std::optional<Error> add_term(std::size_t begin, std::size_t end) {
    std::vector<Term>& side = sides_[arrow_seen_ ? 1 : 0];
    std::size_t from = utf8::skip_blanks(text_.substr(0, end), begin);
    while (const std::size_t blank = end > from ? utf8::blank_before(text_.substr(0, end), end) : 0)
      end -= blank;
    if (from >= end) {
      const bool nothing_yet = side.empty() && !pending_plus_;
      if (nothing_yet && !(begin < text_.size() && from < text_.size() && text_[from] == '+'))
        return std::nullopt;
      return error_at("equation.empty_term", "A species is missing beside this plus sign.",
                      std::min(from, text_.size()), "Write a species on both sides of each plus sign.");
    }
    Result<Term> term = parse_term(text_.substr(from, end - from), from);
    if (!term) return term.error();
    side.push_back(std::move(*term));
    return std::nullopt;
  }

  Error empty_side(const char* side, std::size_t at) const {
    return error_at("equation.empty_side", std::string("Nothing stands on the ") + side + " of the arrow.",
                    at, "Write at least one species on each side.");
  }

  Error no_arrow() const {
    const bool has_equals = text_.find('=') != std::string_view::npos;
    return error_at("equation.no_arrow", "The equation has no arrow.", text_.size(),
                    has_equals ? "Put blanks around = to make it an arrow, or write ->."
                               : "Write -> between reactants and products.");
  }

  Error unclosed_quote(std::size_t at) const {
    return error_at("equation.unclosed_quote", "This quotation mark is never closed.", at,
                    "Close the SMILES with a second mark.");
  }

  std::string_view text_;
  std::vector<std::size_t> open_;
  std::vector<Term> sides_[2];
  EquationText result_;
  bool arrow_seen_ = false, pending_plus_ = false;
  std::size_t joint_end_ = static_cast<std::size_t>(-1);  ///< just past the last arrow or separating plus
};

}  // namespace

std::string_view phase_text(Phase phase) {
  switch (phase) {
    case Phase::Gas:
      return "g";
    case Phase::Liquid:
      return "l";
    case Phase::Solid:
      return "s";
    case Phase::Aqueous:
      return "aq";
    case Phase::Dissolved:
      return "diss";
    case Phase::Unstated:
      break;
  }
  return "";
}

Result<EquationText> parse_equation(std::string_view text) {
  return EquationReader(text).read();
}

}  // namespace heatledger::molecule
