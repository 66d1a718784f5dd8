// Reads one question of `bulk` from one line of JSON, strictly and without building a document.
#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "core/base/result.hpp"

namespace heatledger::page {

/// A question as it stands on its line. The texts point into the line, or into `unescaped` where it used
/// escapes.
struct LineQuestion {
  std::string_view id;  ///< JSON text of the id, as it came; empty when the line has none
  std::optional<std::string_view> equation, species, smiles;
  bool estimate_only = false;
  std::string first_unknown;  ///< a key that means nothing here, for the message when there is no question

  std::string equation_text, species_text,
      smiles_text;  ///< memory of unescaped texts, reused from line to line

  void clear();
};

/// RFC 8259: whole line one object, valid UTF-8, paired surrogates, no key twice, values nested at most 64
/// deep. `question.id` is filled as soon as it is read, so that an error further on still carries it.
/// @errors bulk.not_json, bulk.not_an_object, bulk.duplicate_key, bulk.wrong_type, bulk.too_deep; `where` is
/// "offset N"
Status read_question(std::string_view line, LineQuestion& question);

}  // namespace heatledger::page
