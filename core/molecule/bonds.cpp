#include "core/molecule/bonds.hpp"

#include <algorithm>
#include <array>

#include "core/base/check.hpp"
#include "core/molecule/aromaticity.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/normalise.hpp"

namespace heatledger::molecule {
namespace {

// Place of each element in the alphabet of symbols, so that a bond's ends are put in order without text.
std::array<std::uint8_t, 119> make_ranks() {
  std::array<std::uint8_t, 119> order{}, ranks{};
  for (std::size_t z = 0; z < order.size(); ++z) order[z] = static_cast<std::uint8_t>(z);
  std::sort(order.begin(), order.end(), [](std::uint8_t a, std::uint8_t b) { return symbol(a) < symbol(b); });
  for (std::size_t place = 0; place < order.size(); ++place)
    ranks[order[place]] = static_cast<std::uint8_t>(place);
  return ranks;
}

const std::array<std::uint8_t, 119>& ranks() {
  static const std::array<std::uint8_t, 119> table = make_ranks();
  return table;
}

struct SettingWord {
  Setting setting;
  std::string_view word;
};
constexpr SettingWord setting_words[] = {
    {Setting::Nitro, "nitro"},
    {Setting::CarbonDioxide, "CO2"},
    {Setting::CarbonMonoxide, "CO"},
    {Setting::NitricOxide, "NO"},
    {Setting::NitrogenDioxide, "NO2"},
    {Setting::Ozone, "O3"},
    {Setting::AromaticRing, "aromatic ring"},
};

constexpr char order_signs[] = {'.', '-', '=', '#', '$'};

class Counter {
 public:
  explicit Counter(BondTally& out) : ranks_(ranks()), out_(out) { out_.clear(); }

  void add(int a, int b, Order order, int count, Setting setting = Setting::Plain) {
    BondType type;
    const bool swapped = ranks_[static_cast<std::size_t>(b)] < ranks_[static_cast<std::size_t>(a)];
    type.first = static_cast<std::uint8_t>(swapped ? b : a);
    type.second = static_cast<std::uint8_t>(swapped ? a : b);
    type.order = order;
    type.setting = setting;
    // A molecule has a handful of types: looking along them beats any table.
    for (BondCount& entry : out_) {
      if (entry.type == type) {
        entry.count += count;
        return;
      }
    }
    out_.push_back({type, count});
  }

  void finish() {
    for (std::size_t i = 1; i < out_.size(); ++i) {
      const BondCount entry = out_[i];
      std::size_t at = i;
      for (; at > 0 && entry.type < out_[at - 1].type; --at) out_[at] = out_[at - 1];
      out_[at] = entry;
    }
  }

 private:
  const std::array<std::uint8_t, 119>& ranks_;
  BondTally& out_;
};

// Reads the settings of bonds in a graph that is in octet form.
class Settings {
 public:
  explicit Settings(const Graph& graph) : graph_(graph) { build_adjacency(graph, adjacency_); }

  Setting of(const Bond& bond) const {
    const int a = graph_.atoms[bond.a].element;
    const int b = graph_.atoms[bond.b].element;
    if (a == 8 && b == 8) return ozone(bond) ? Setting::Ozone : Setting::Plain;
    if (b == 8) return with_oxygen(bond.a, bond.b, bond.order);
    if (a == 8) return with_oxygen(bond.b, bond.a, bond.order);
    return Setting::Plain;
  }

 private:
  std::uint32_t degree(std::uint32_t atom) const {
    return adjacency_.first[atom + 1] - adjacency_.first[atom];
  }
  bool bare(std::uint32_t atom, std::uint32_t bonds) const {
    return degree(atom) == bonds && graph_.atoms[atom].hydrogens == 0;
  }
  // Oxygens with no other neighbour and no hydrogen.
  std::uint32_t bare_oxygens(std::uint32_t atom) const {
    std::uint32_t found = 0;
    for (std::uint32_t e = adjacency_.first[atom]; e < adjacency_.first[atom + 1]; ++e) {
      const std::uint32_t other = adjacency_.entries[e].atom;
      if (graph_.atoms[other].element == 8 && bare(other, 1)) ++found;
    }
    return found;
  }
  int charge_around(std::uint32_t atom) const {
    int sum = graph_.atoms[atom].charge;
    for (std::uint32_t e = adjacency_.first[atom]; e < adjacency_.first[atom + 1]; ++e) {
      sum += graph_.atoms[adjacency_.entries[e].atom].charge;
    }
    return sum;
  }

  bool ozone(const Bond& bond) const {
    for (const std::uint32_t centre : {bond.a, bond.b}) {
      if (bare(centre, 2) && bare_oxygens(centre) == 2 && charge_around(centre) == 0) return true;
    }
    return false;
  }

  Setting with_oxygen(std::uint32_t centre, std::uint32_t oxygen, Order order) const {
    if (!bare(oxygen, 1)) return Setting::Plain;
    const std::uint32_t oxygens = bare_oxygens(centre);
    if (graph_.atoms[centre].element == 6) {
      if (bare(centre, 1) && charge_around(centre) == 0) return Setting::CarbonMonoxide;
      if (bare(centre, 2) && oxygens == 2 && charge_around(centre) == 0) return Setting::CarbonDioxide;
      return Setting::Plain;
    }
    if (graph_.atoms[centre].element != 7) return Setting::Plain;
    if (bare(centre, 1) && charge_around(centre) == 0) return Setting::NitricOxide;
    if (bare(centre, 2) && oxygens == 2 && charge_around(centre) == 0) return Setting::NitrogenDioxide;
    const bool three_bonds = degree(centre) + graph_.atoms[centre].hydrogens == 3;
    if (!three_bonds || oxygens < 2) return Setting::Plain;
    return order == Order::Single && !first_single(centre, oxygen) ? Setting::Plain : Setting::Nitro;
  }

  // Of the two charged oxygens of a nitrate ion one is the nitro group's, the other its ligand.
  bool first_single(std::uint32_t centre, std::uint32_t oxygen) const {
    for (std::uint32_t e = adjacency_.first[centre]; e < adjacency_.first[centre + 1]; ++e) {
      const Adjacency::Entry& entry = adjacency_.entries[e];
      if (entry.atom == oxygen) return true;
      const bool single = graph_.bonds[entry.bond].order == Order::Single;
      if (single && graph_.atoms[entry.atom].element == 8 && bare(entry.atom, 1)) return false;
    }
    return true;
  }

  const Graph& graph_;
  Adjacency adjacency_;
};

bool ring_setting_applies(const Atom& a, const Atom& b) {
  return (a.element == 6 && (b.element == 6 || b.element == 7)) || (a.element == 7 && b.element == 6);
}

// Any structure: a copy is brought to octet form and each bond looked at with its neighbours.
void count_carefully(const Graph& graph, bool mark_rings, BondTally& out) {
  Graph form = graph;
  std::vector<std::uint8_t> aromatic;
  if (mark_rings) {
    perceive_aromaticity(form);
    aromatic.reserve(form.bonds.size());
    for (const Bond& bond : form.bonds) aromatic.push_back(bond.aromatic ? 1 : 0);
  }
  take_octet_form(form);
  const Settings settings(form);
  Counter counter(out);
  for (std::size_t i = 0; i < form.bonds.size(); ++i) {
    const Bond& bond = form.bonds[i];
    const Atom& a = form.atoms[bond.a];
    const Atom& b = form.atoms[bond.b];
    Setting setting = settings.of(bond);
    Order order = bond.order;
    if (setting == Setting::CarbonMonoxide) order = Order::Triple;
    if (setting == Setting::NitricOxide) order = Order::Double;
    if (mark_rings && aromatic[i] && ring_setting_applies(a, b)) setting = Setting::AromaticRing;
    if (order != Order::Zero) counter.add(a.element, b.element, order, 1, setting);
  }
  for (const Atom& atom : form.atoms) {
    if (atom.hydrogens > 0) counter.add(atom.element, 1, Order::Single, atom.hydrogens);
  }
  counter.finish();
}

constexpr std::size_t most_quick_atoms = 128;

// One pass without the heap for a graph that is in octet form as it stands; false when it may not be.
bool count_quickly(const Graph& graph, BondTally& out) {
  if (graph.atoms.size() > most_quick_atoms) return false;
  // Sum of bond orders in the low byte, number of C=O bonds above it.
  std::array<std::uint16_t, most_quick_atoms> sums;
  std::fill_n(sums.begin(), graph.atoms.size(), std::uint16_t{0});
  Counter counter(out);
  for (const Bond& bond : graph.bonds) {
    const int a = graph.atoms[bond.a].element;
    const int b = graph.atoms[bond.b].element;
    auto add = static_cast<std::uint16_t>(bond.order);
    if (bond.order == Order::Double) {
      if (a + b == 14 && (a == 6 || b == 6)) add = 2 + 256;
      // Two hetero atoms of a ring may have to pass the double bond on (pyridazine); a neutral oxygen with
      // one stands outside any ring.
      const auto passes_on = [](const Atom& atom) {
        return atom.element != 6 && (atom.element != 8 || atom.charge != 0);
      };
      if (passes_on(graph.atoms[bond.a]) && passes_on(graph.atoms[bond.b])) return false;
    }
    if (bond.order == Order::Zero || graph.atoms[bond.a].charge * graph.atoms[bond.b].charge < 0)
      return false;
    sums[bond.a] = static_cast<std::uint16_t>(sums[bond.a] + add);
    sums[bond.b] = static_cast<std::uint16_t>(sums[bond.b] + add);
    counter.add(a, b, bond.order, 1);
  }
  for (std::size_t i = 0; i < graph.atoms.size(); ++i) {
    const Atom& atom = graph.atoms[i];
    if (atom.element >= 6 && atom.element <= 8) {
      if (atom.unpaired != 0) return false;                       // NO, NO2, CO written as radicals
      if (atom.element == 6 && sums[i] >= 2 * 256) return false;  // CO2
      const int octet = 10 - atom.element + atom.charge;
      if (atom.element != 6 && (sums[i] & 255) + atom.hydrogens > octet) return false;
    }
    if (atom.hydrogens > 0) counter.add(atom.element, 1, Order::Single, atom.hydrogens);
  }
  counter.finish();
  return true;
}

}  // namespace

void count_bonds(const Graph& graph, BondTally& out) {
  if (!count_quickly(graph, out)) count_carefully(graph, false, out);
}

BondTally count_bonds(const Graph& graph) {
  BondTally tally;
  count_bonds(graph, tally);
  return tally;
}

BondTally count_bonds_with_rings(const Graph& graph) {
  BondTally tally;
  count_carefully(graph, true, tally);
  return tally;
}

BondType make_bond_type(int element_a, int element_b, Order order, Setting setting) {
  CHECK(element_a >= 0 && element_a <= 118 && element_b >= 0 && element_b <= 118,
        "atomic numbers from 0 to 118");
  BondType type;
  const bool swapped =
      ranks()[static_cast<std::size_t>(element_b)] < ranks()[static_cast<std::size_t>(element_a)];
  type.first = static_cast<std::uint8_t>(swapped ? element_b : element_a);
  type.second = static_cast<std::uint8_t>(swapped ? element_a : element_b);
  type.order = order;
  type.setting = setting;
  return type;
}

std::string plain_spelling(const BondType& type) {
  std::string text(symbol(type.first));
  text += order_signs[static_cast<std::size_t>(type.order)];
  text += symbol(type.second);
  return text;
}

std::string spelling(const BondType& type) {
  std::string text = plain_spelling(type);
  for (const SettingWord& entry : setting_words) {
    if (entry.setting == type.setting) text.append(" (").append(entry.word).append(")");
  }
  return text;
}

Result<BondType> parse_bond_type(std::string_view text) {
  const auto unknown = [&]() {
    return Error{"bond.unknown_spelling", "This is not the spelling of a bond.", "",
                 "Write two element symbols joined by - = # or $, for example C-H, C=O or C=O (CO2)."};
  };
  std::string_view bond = text;
  Setting setting = Setting::Plain;
  if (const std::size_t open = text.find(" ("); open != std::string_view::npos) {
    if (text.back() != ')') return unknown();
    const std::string_view word = text.substr(open + 2, text.size() - open - 3);
    for (const SettingWord& entry : setting_words) {
      if (entry.word == word) setting = entry.setting;
    }
    if (setting == Setting::Plain) return unknown();
    bond = text.substr(0, open);
  }
  const std::size_t sign = bond.find_first_of("-=#$");
  if (sign == std::string_view::npos) return unknown();
  const std::optional<int> first = atomic_number(bond.substr(0, sign));
  const std::optional<int> second = atomic_number(bond.substr(sign + 1));
  if (!first || !second) return unknown();
  Order order = Order::Single;
  if (bond[sign] == '=') order = Order::Double;
  if (bond[sign] == '#') order = Order::Triple;
  if (bond[sign] == '$') order = Order::Quadruple;
  return make_bond_type(*first, *second, order, setting);
}

BondTally plain_tally(const BondTally& tally) {
  BondTally plain;
  for (BondCount entry : tally) {
    entry.type.setting = Setting::Plain;
    if (!plain.empty() && plain.back().type == entry.type) {
      plain.back().count += entry.count;
    } else {
      plain.push_back(entry);
    }
  }
  return plain;
}

}  // namespace heatledger::molecule
