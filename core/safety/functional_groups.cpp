#include "core/safety/functional_groups.hpp"

#include <algorithm>

#include "core/molecule/normalise.hpp"

namespace heatledger::safety {
namespace {

using molecule::Adjacency;
using molecule::Graph;
using molecule::Order;

constexpr std::uint8_t kCarbon = 6, kNitrogen = 7, kOxygen = 8, kSulfur = 16, kChlorine = 17;

enum Group : std::size_t {
  Nitro,
  NNitro,
  Nitrate,
  Nitroso,
  Peroxide,
  Azide,
  Diazo,
  Hydrazine,
  Oxime,
  NOxide,
  Isocyanate,
  Epoxide,
  Alkyne,
  Alkene,
  Sulfoxide,
  SulfonylChloride,
  kGroups
};

/// [kJ/mol of group], exothermic.
constexpr GroupFound kTable[kGroups] = {
    {"nitro group", 0, 310, 360},
    {"N-nitro group", 0, 400, 430},
    {"nitrate of an alcohol or acid", 0, 410, 480},
    {"nitroso group", 0, 150, 290},
    {"peroxide", 0, 230, 360},
    {"azide", 0, 200, 240},
    {"azo, diazo or diazonium group", 0, 100, 180},
    {"nitrogen-nitrogen single bond", 0, 70, 90},
    {"oxime", 0, 110, 140},
    {"N-oxide", 0, 100, 130},
    {"isocyanate", 0, 50, 75},
    {"epoxide", 0, 70, 100},
    {"triple bond of carbon", 0, 120, 170},
    {"double bond of carbon", 0, 50, 90},
    {"sulfoxide", 0, 40, 70},
    {"sulfonyl chloride", 0, 50, 70},
};

/// One structure in its octet spelling (nitro [N+](=O)[O-], azide N=[N+]=[N-]), with the aromatic bonds of
/// the original.
class Search {
 public:
  explicit Search(const Graph& graph) : original_(graph), graph_(graph) {
    molecule::take_octet_form(graph_);
    molecule::build_adjacency(graph_, near_);
  }

  std::vector<GroupFound> all() {
    for (std::uint32_t i = 0; i < graph_.atoms.size(); ++i) {
      if (element(i) == kNitrogen) nitrogen(i);
      if (element(i) == kSulfur) sulfur(i);
      if (element(i) == kOxygen) ring_oxygen(i);
      if (element(i) == kCarbon) isocyanate(i);
    }
    for (std::size_t b = 0; b < graph_.bonds.size(); ++b) bond(b);
    std::vector<GroupFound> found;
    for (std::size_t g = 0; g < kGroups; ++g) {
      if (counts_[g] == 0) continue;
      GroupFound group = kTable[g];
      group.count = counts_[g];
      group.low *= 1000;
      group.high *= 1000;
      found.push_back(group);
    }
    return found;
  }

 private:
  struct Near {
    const Adjacency::Entry *first, *last;
    const Adjacency::Entry* begin() const { return first; }
    const Adjacency::Entry* end() const { return last; }
  };
  Near near(std::uint32_t atom) const {
    return {near_.entries.data() + near_.first[atom], near_.entries.data() + near_.first[atom + 1]};
  }
  std::uint8_t element(std::uint32_t atom) const { return graph_.atoms[atom].element; }
  Order order(std::uint32_t bond) const { return graph_.bonds[bond].order; }
  bool aromatic(std::size_t bond) const { return original_.bonds[bond].aromatic; }
  std::size_t degree(std::uint32_t atom) const { return near_.first[atom + 1] - near_.first[atom]; }
  bool terminal_oxygen(std::uint32_t atom) const {
    return element(atom) == kOxygen && degree(atom) == 1 && graph_.atoms[atom].hydrogens == 0;
  }
  int terminal_oxygens(std::uint32_t atom) const {
    int count = 0;
    for (const Adjacency::Entry& next : near(atom)) count += terminal_oxygen(next.atom) ? 1 : 0;
    return count;
  }
  bool bonded(std::uint32_t a, std::uint32_t b) const {
    return std::any_of(near(a).begin(), near(a).end(),
                       [&](const Adjacency::Entry& next) { return next.atom == b; });
  }
  /// A neighbour by a multiple bond, of one element.
  bool multiple_to(std::uint32_t atom, std::uint8_t to, Order least = Order::Double) const {
    for (const Adjacency::Entry& next : near(atom)) {
      if (element(next.atom) == to && order(next.bond) >= least) return true;
    }
    return false;
  }

  void nitrogen(std::uint32_t n) {
    const int oxygens = terminal_oxygens(n);
    if (oxygens >= 2) {
      if (degree(n) != 3) return;  // nitrogen dioxide and the nitrate ion are no groups of a structure
      for (const Adjacency::Entry& next : near(n)) {
        if (element(next.atom) == kCarbon) ++counts_[Nitro];
        if (element(next.atom) == kNitrogen) ++counts_[NNitro];
        if (element(next.atom) == kOxygen && !terminal_oxygen(next.atom) && degree(next.atom) == 2)
          ++counts_[Nitrate];
      }
      return;
    }
    if (oxygens == 1 && degree(n) >= 2) {
      bool to_oxygen = false, doubled = false;
      for (const Adjacency::Entry& next : near(n)) {
        if (!terminal_oxygen(next.atom)) {
          to_oxygen = to_oxygen || element(next.atom) == kOxygen;
        } else {
          doubled = order(next.bond) == Order::Double;
        }
      }
      if (doubled && degree(n) == 2 && !to_oxygen) ++counts_[Nitroso];
      if (!doubled && graph_.atoms[n].charge > 0 && !multiple_to(n, kNitrogen)) ++counts_[NOxide];
      return;
    }
    chain(n);
    if (degree(n) == 2 && graph_.atoms[n].charge == 0 && multiple_to(n, kCarbon)) {
      for (const Adjacency::Entry& next : near(n)) {
        if (element(next.atom) == kOxygen && order(next.bond) == Order::Single && !aromatic(next.bond))
          ++counts_[Oxime];
      }
    }
  }

  /// Azide and diazo have a nitrogen in the middle, with a nitrogen at its end that holds nothing else.
  void chain(std::uint32_t middle) {
    if (degree(middle) != 2) return;
    const Adjacency::Entry *first = near(middle).first, *second = first + 1;
    if (element(first->atom) != kNitrogen || degree(first->atom) != 1) std::swap(first, second);
    if (element(first->atom) != kNitrogen || degree(first->atom) != 1 || order(first->bond) < Order::Double)
      return;
    if (element(second->atom) == kNitrogen) ++counts_[Azide];
    if (element(second->atom) == kCarbon) ++counts_[Diazo];
  }

  void sulfur(std::uint32_t s) {
    int carbons = 0, chlorines = 0;
    for (const Adjacency::Entry& next : near(s)) {
      carbons += element(next.atom) == kCarbon ? 1 : 0;
      chlorines += element(next.atom) == kChlorine ? 1 : 0;
    }
    const int oxygens = terminal_oxygens(s);
    if (oxygens == 1 && carbons == 2 && degree(s) == 3) ++counts_[Sulfoxide];
    if (oxygens == 2 && carbons == 1 && chlorines == 1) ++counts_[SulfonylChloride];
  }

  void ring_oxygen(std::uint32_t o) {
    if (degree(o) != 2) return;
    const std::uint32_t a = near(o).first[0].atom, b = near(o).first[1].atom;
    if (element(a) == kCarbon && element(b) == kCarbon && bonded(a, b)) ++counts_[Epoxide];
  }

  void isocyanate(std::uint32_t c) {
    if (degree(c) == 2 && multiple_to(c, kNitrogen) && multiple_to(c, kOxygen)) ++counts_[Isocyanate];
  }

  void bond(std::size_t index) {
    const molecule::Bond& of = graph_.bonds[index];
    if (aromatic(index)) return;
    const std::uint8_t a = element(of.a), b = element(of.b);
    if (a == kOxygen && b == kOxygen && of.order == Order::Single && graph_.atoms[of.a].charge <= 0 &&
        graph_.atoms[of.b].charge <= 0)
      ++counts_[Peroxide];
    if (a == kCarbon && b == kCarbon) {
      if (of.order == Order::Double) ++counts_[Alkene];
      if (of.order == Order::Triple) ++counts_[Alkyne];
    }
    if (a != kNitrogen || b != kNitrogen) return;
    const bool plain = plain_nitrogen(of.a) && plain_nitrogen(of.b);
    if (of.order == Order::Single && plain) ++counts_[Hydrazine];
    if (of.order == Order::Double && azo_end(of.a) && azo_end(of.b)) ++counts_[Diazo];
  }

  /// Holds nothing by a multiple bond to oxygen or nitrogen: no part of nitro, nitroso, azo or azide.
  bool plain_nitrogen(std::uint32_t n) const {
    return terminal_oxygens(n) == 0 && !multiple_to(n, kNitrogen) && !multiple_to(n, kOxygen);
  }
  bool azo_end(std::uint32_t n) const {
    return degree(n) + graph_.atoms[n].hydrogens == 2 && graph_.atoms[n].charge == 0 &&
           std::none_of(near(n).begin(), near(n).end(), [&](const Adjacency::Entry& next) {
             return graph_.atoms[next.atom].charge != 0 && element(next.atom) == kNitrogen;
           });
  }

  const Graph& original_;
  Graph graph_;
  Adjacency near_;
  int counts_[kGroups] = {};
};

}  // namespace

std::vector<GroupFound> functional_groups(const molecule::Graph& graph) {
  return Search(graph).all();
}

const char* functional_groups_source() {
  return "ranges per mole of group as printed by J. Barton and R. Rogers, Chemical Reaction Hazards, 2nd "
         "ed., "
         "IChemE (1997); from memory";
}

}  // namespace heatledger::safety
