// Any bytes as SMILES. A text that is refused names its place; one that is read must survive: canonical text,
// read again, gives the same canonical text and the same bonds.
#include <algorithm>
#include <cstddef>
#include <cstdint>
#include <cstdio>
#include <cstdlib>
#include <string>
#include <string_view>
#include <vector>

#include "core/molecule/aromaticity.hpp"
#include "core/molecule/bonds.hpp"
#include "core/molecule/rings.hpp"
#include "core/molecule/smiles.hpp"

namespace {

using namespace heatledger;
using namespace heatledger::molecule;

std::string words(const BondTally& tally) {
  std::string text;
  for (const BondCount& bond : tally) text += spelling(bond.type) + " " + std::to_string(bond.count) + ", ";
  return text;
}

void require(bool holds, const char* what, std::string_view text, const std::string& first,
             const std::string& second) {
  if (holds) return;
  std::fprintf(stderr, "%s\n  text:   %.*s\n  first:  %s\n  second: %s\n", what,
               static_cast<int>(text.size()), text.data(), first.c_str(), second.c_str());
  std::abort();
}

/// Two neighbouring atoms of nitrogen, oxygen or fluorine above their octet, one of them by two bonds
/// (C=O=OC): nobody means such a text, and which of its atoms hand back their bonds depends on the reading.
bool beyond_reading(const Graph& graph) {
  for (const Atom& atom : graph.atoms) {
    if (atom.charge < -2 || atom.charge > 2) return true;
  }
  std::vector<int> excess(graph.atoms.size());
  for (std::size_t i = 0; i < excess.size(); ++i) {
    const Atom& atom = graph.atoms[i];
    const int octet = atom.element >= 7 && atom.element <= 9 ? 10 - atom.element : 1000;
    excess[i] = atom.hydrogens - octet - atom.charge;
  }
  for (const Bond& bond : graph.bonds) {
    excess[bond.a] += static_cast<int>(bond.order);
    excess[bond.b] += static_cast<int>(bond.order);
  }
  return std::any_of(graph.bonds.begin(), graph.bonds.end(), [&](const Bond& bond) {
    const int a = excess[bond.a], b = excess[bond.b];
    return a > 0 && b > 0 && a + b > 2;
  });
}

/// More pairs of hetero atoms than choose_kekule_bonds weighs exhaustively: there a ring of them may be read
/// either way.
bool beyond_weighing(const Graph& graph) {
  return std::count_if(graph.bonds.begin(), graph.bonds.end(), [&](const Bond& bond) {
           return graph.atoms[bond.a].element != 6 && graph.atoms[bond.b].element != 6;
         }) > 12;
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  Result<Graph> graph = parse_smiles(text);
  if (!graph.ok()) {
    const Error& error = graph.error();
    require(
        error.code.rfind("smiles.", 0) == 0 && error.where.rfind("offset ", 0) == 0 && !error.hint.empty(),
        "an error has a code, a place and a hint", text, error.code, error.where);
    require(std::strtoull(error.where.c_str() + 7, nullptr, 10) <= size, "the place lies in the text", text,
            error.where, "");
    return 0;
  }
  const std::string tally = words(plain_tally(count_bonds(*graph)));
  require(words(plain_tally(count_bonds_with_rings(*graph))) == tally, "marking rings moves no bond", text,
          tally, "");
  if (beyond_reading(*graph) || beyond_weighing(*graph)) return 0;
  const std::string canonical = canonical_smiles(*graph);
  // More than 99 rings open at once cannot be written with two digits.
  if (canonical.find("%1") != std::string::npos && graph->bonds.size() > graph->atoms.size() + 90) return 0;
  const Result<Graph> again = parse_smiles(canonical);
  require(again.ok(), "canonical text is read", text, canonical, again.ok() ? "" : again.error().code);
  const std::string second = canonical_smiles(*again);
  require(second == canonical, "canonical text is its own canonical text", text, canonical, second);
  const std::string tally_again = words(plain_tally(count_bonds(*again)));
  require(tally_again == tally, "canonical text has the same bonds", text, tally, tally_again);
  perceive_aromaticity(*graph);
  return 0;
}
