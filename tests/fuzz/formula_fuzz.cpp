// A formula that reads comes back the same from its Hill text and from its typeset text.
#include <cmath>
#include <cstdint>
#include <string_view>

#include "core/base/check.hpp"
#include "core/molecule/formula.hpp"

using namespace heatledger;
using namespace heatledger::molecule;

namespace {

bool close(const Composition& a, const Composition& b) {
  if (a.charge != b.charge || a.atoms.size() != b.atoms.size()) return false;
  for (const auto& [key, count] : a.atoms) {
    const auto other = b.atoms.find(key);
    // Fractions are binary numbers; Hill text writes them as whole numbers over a denominator up to 10,000.
    if (other == b.atoms.end() || std::fabs(other->second - count) > 1e-8 * std::fmax(1, count)) return false;
  }
  return true;
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const Result<Composition> first = parse_formula(text);
  const std::string set = typeset_formula(text);
  if (!first) {
    CHECK(!first.error().code.empty() && !first.error().message.empty() && !first.error().where.empty(),
          "a refusal tells what and where");
    return 0;
  }
  CHECK(std::isfinite(molar_mass(*first)) && molar_mass(*first) > 0, "a formula has a mass");
  const Result<Composition> again = parse_formula(set);
  CHECK(again.ok() && close(*first, *again), "typeset text reads back");
  const std::string hill = hill_formula(*first);
  if (hill.find('.') != std::string::npos) return 0;  // counts that are no fractions up to 1/10,000
  const Result<Composition> from_hill = parse_formula(hill);
  // A fraction in front of a large count multiplies it beyond what a formula may hold.
  if (!from_hill && from_hill.error().code == "formula.too_large") return 0;
  CHECK(from_hill.ok() && close(*first, *from_hill), "Hill text reads back");
  CHECK(hill_formula(*from_hill) == hill, "Hill text is a fixed point");
  return 0;
}
