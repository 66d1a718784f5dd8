// One term of an equation: coefficient, species, phase, strength. Cutting the equation into terms stands in
// equation.cpp.
#pragma once

#include <cstddef>
#include <string_view>

#include "core/base/result.hpp"
#include "core/molecule/equation.hpp"

namespace heatledger::molecule {

/// Typographic quotes stand for plain ones.
constexpr std::string_view kOpenQuote = "\u201C";
constexpr std::string_view kCloseQuote = "\u201D";

/// Offset just past the quotation mark that closes the one at `at`; npos when there is none.
std::size_t closing_quote(std::string_view text, std::size_t at);

/// "(g)", "(aq, 96 wt%)" and the like: the whole text, parentheses included, is a phase, well formed or not.
bool is_phase(std::string_view parentheses);

/// @param text    a term without blanks at its ends; brackets and quotes match
/// @param offset  where it begins in the equation text
/// @errors as parse_equation
Result<Term> parse_term(std::string_view text, std::size_t offset);

}  // namespace heatledger::molecule
