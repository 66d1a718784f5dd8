// A species that resolves has consistent figures, and its canonical structure and its library name lead back
// to it.
#include <cmath>
#include <cstdint>
#include <string_view>

#include "core/base/check.hpp"
#include "core/facts/resolve.hpp"

using namespace heatledger;
using namespace heatledger::facts;

namespace {

void check_refusal(const Error& error) {
  CHECK(!error.code.empty() && !error.message.empty(), "a refusal says what is wrong");
}

void check_species(const Species& species) {
  CHECK(!species.name.empty(), "a species has a name");
  CHECK(species.composition.has_value(), "what can be read has a composition");
  const bool only_ends = species.composition->atoms.empty();  // "**": two ends and nothing between
  CHECK(std::isfinite(species.molar_mass) && (species.molar_mass > 0 || only_ends),
        "a composition has a mass");
  CHECK(species.graph.has_value() == !species.canonical.empty(), "a structure has its canonical text");
  if (species.graph) {
    const molecule::Composition drawn = molecule::composition(*species.graph);
    CHECK(molecule::hill_formula(drawn) == molecule::hill_formula(*species.composition),
          "structure and composition agree");
    const auto again = resolve_species(species.canonical, true);
    CHECK(again.ok(), "canonical text reads back");
    CHECK((*again)->canonical == species.canonical, "canonical text is a fixed point");
  }
  if (species.compound != nullptr) {
    const Compound* by_name = Library::embedded().find_name(species.compound->name);
    CHECK(by_name == species.compound, "the library's name leads back to the compound");
  }
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  for (const bool quoted : {false, true}) {
    const auto species = resolve_species(text, quoted);
    if (species.ok()) {
      check_species(**species);
    } else {
      check_refusal(species.error());
    }
  }
  for (const Library::Completion& completion : Library::embedded().complete(text, 5)) {
    CHECK(completion.compound != nullptr && !completion.matched.empty(), "a completion names its compound");
  }
  return 0;
}
