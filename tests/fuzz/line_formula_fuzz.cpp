// A condensed formula that reads has complete valences and the atoms of its text.
#include <cstdint>
#include <string_view>
#include <vector>

#include "core/base/check.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/line_formula.hpp"

using namespace heatledger;
using namespace heatledger::molecule;

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const Result<Graph> graph = parse_line_formula(text);
  if (!graph) {
    CHECK(!graph.error().code.empty() && !graph.error().where.empty(), "a refusal tells what and where");
    return 0;
  }
  std::vector<int> bonds(graph->atoms.size(), 0);
  for (const Bond& bond : graph->bonds) {
    CHECK(bond.a < bonds.size() && bond.b < bonds.size() && bond.a != bond.b,
          "bonds join two atoms of the graph");
    bonds[bond.a] += static_cast<int>(bond.order);
    bonds[bond.b] += static_cast<int>(bond.order);
  }
  for (std::size_t i = 0; i < bonds.size(); ++i) {
    const Atom& atom = graph->atoms[i];
    const int total = bonds[i] + atom.hydrogens;
    switch (atom.element) {
      case 6:
      case 14:
        CHECK(total == 4, "carbon and silicon bind four times");
        break;
      case 7:
        CHECK(total == 3 + atom.charge, "nitrogen binds three times, in nitro four");
        break;
      case 8:
        CHECK(total == 2 + atom.charge, "oxygen binds twice, in nitro once");
        break;
      case 15:
        CHECK(total == 3 || total == 5, "phosphorus binds three or five times");
        break;
      case 16:
        CHECK(total == 2 || total == 4 || total == 6, "sulfur binds two, four or six times");
        break;
      default:
        CHECK(total == 1, "halogens bind once");
    }
  }
  if (const Result<Composition> plain = parse_formula(text)) {
    CHECK(hill_formula(*plain) == hill_formula(composition(*graph)), "the graph holds the atoms of the text");
  }
  return 0;
}
