// An equation that reads, written again term by term, reads the same.
#include <cstdint>
#include <string>
#include <string_view>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/molecule/equation.hpp"

using namespace heatledger;
using namespace heatledger::molecule;

namespace {

std::string written(const Term& term) {
  std::string text = term.coefficient.typed;
  if (!text.empty()) text += ' ';
  const bool typographic = term.species.find('"') != std::string::npos;
  if (term.quoted) {
    text += typographic ? "\u201C" + term.species + "\u201D" : "\"" + term.species + "\"";
  } else {
    text += term.species;
  }
  if (term.phase == Phase::Unstated) return text;
  text += "(" + std::string(phase_text(term.phase));
  if (term.strength) {
    const double value = term.strength->value;
    switch (term.strength->kind) {
      case Strength::Kind::MassFraction:
        text += ", " + machine_number(value * 100, 15) + " wt%";
        break;
      case Strength::Kind::WaterRatio:
        text += ", r=" + machine_number(value, 15);
        break;
      case Strength::Kind::Molality:
        text += ", " + machine_number(value, 15) + " mol/kg";
        break;
      case Strength::Kind::InfiniteDilution:
        break;
    }
  }
  return text + ")";
}

std::string written(const EquationText& equation) {
  std::string text;
  for (std::size_t i = 0; i < equation.reactants.size(); ++i)
    text += (i > 0 ? " + " : "") + written(equation.reactants[i]);
  text += equation.reversible ? " <=> " : " -> ";
  for (std::size_t i = 0; i < equation.products.size(); ++i)
    text += (i > 0 ? " + " : "") + written(equation.products[i]);
  return text;
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const Result<EquationText> first = parse_equation(text);
  if (!first) {
    CHECK(!first.error().code.empty() && !first.error().message.empty() && !first.error().where.empty(),
          "a refusal tells what and where");
    return 0;
  }
  for (const auto* side : {&first->reactants, &first->products}) {
    CHECK(!side->empty(), "both sides hold species");
    for (const Term& term : *side) {
      CHECK(!term.species.empty() && term.coefficient.numerator > 0 && term.coefficient.denominator > 0,
            "a term is complete");
      CHECK(term.offset + term.length <= text.size() && term.species_offset >= term.offset,
            "a term knows its place");
      CHECK(text.substr(term.species_offset, term.species.size()) == term.species,
            "a species knows its place");
    }
  }
  const std::string once = written(*first);
  const Result<EquationText> second = parse_equation(once);
  CHECK(second.ok(), "what is written again reads");
  CHECK(written(*second) == once, "what is written again is the same");
  return 0;
}
