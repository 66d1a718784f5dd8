#include "core/balance/rows.hpp"

#include <algorithm>

#include "core/balance/bond_words.hpp"
#include "core/balance/strains.hpp"
#include "core/base/number_text.hpp"
#include "core/facts/atoms.hpp"
#include "core/molecule/elements.hpp"

namespace heatledger::balance {
namespace {

using estimate::BondOrigin;
using estimate::BondSet;
using estimate::BondValue;
using facts::Species;
using molecule::BondCount;
using molecule::BondType;
using molecule::Order;
using molecule::Phase;
using molecule::Setting;
using uncertainty::Quantity;
using uncertainty::source_key;
using uncertainty::SourceKind;

constexpr double kJ = 1000.0;

/// Gas atoms of one mole [J/mol]; empty with the element that has no figure.
std::optional<Quantity> gas_atoms(const Species& species, std::string& lacking,
                                  std::vector<std::string>* working) {
  if (!species.composition) {
    lacking = "composition";
    return std::nullopt;
  }
  Quantity sum;
  for (const auto& atom : species.composition->atoms) {
    const int element = atom.first % 1000;
    const std::optional<facts::Datum> figure = facts::gas_atom_formation(element);
    if (!figure) {
      lacking = std::string(molecule::symbol(element));
      return std::nullopt;
    }
    sum.add(Quantity(figure->value, figure->u95,
                     source_key(SourceKind::Atom, static_cast<std::uint64_t>(element))),
            atom.second);
    if (working != nullptr) {
      working->push_back(std::string(molecule::symbol(element)) + "(g)  " + times_text(atom.second) + " × " +
                         display_number(figure->value / kJ, 2) + " = " +
                         display_number(figure->value * atom.second / kJ, 2) + " kJ/mol, " +
                         std::string(figure->source));
    }
  }
  return sum;
}

/// Sum over bonds, the error of a price being one error wherever it acts.
bool sum_bonds(const Species& species, const BondSet& set, PricedSpecies& priced) {
  Quantity sum;
  for (const BondCount& bond : species.bonds) {
    const BondValue* price = set.find(bond.type);
    if (price == nullptr) {
      priced.missing.push_back(bond.type);
      continue;
    }
    sum.add(Quantity(price->value, price->u95, source_key(SourceKind::BondValue, price->type.packed())),
            bond.count);
  }
  if (!priced.missing.empty()) return false;
  priced.per_mole = std::move(sum);
  return true;
}

bool has_charged_fragment(const molecule::Graph& graph) {
  std::vector<std::uint32_t> root(graph.atoms.size());
  for (std::uint32_t i = 0; i < root.size(); ++i) root[i] = i;
  const auto top = [&root](std::uint32_t i) {
    while (root[i] != i) i = root[i] = root[root[i]];
    return i;
  };
  for (const molecule::Bond& bond : graph.bonds) root[top(bond.a)] = top(bond.b);
  std::vector<int> charge(root.size(), 0);
  for (std::uint32_t i = 0; i < root.size(); ++i) charge[top(i)] += graph.atoms[i].charge;
  return std::any_of(charge.begin(), charge.end(), [](int c) { return c != 0; });
}

std::string price_remark(const BondValue& price, const BondSet& set, const BondType& type) {
  if (price.origin == BondOrigin::User) {
    std::string text = "typed value in use";
    if (const BondValue* published = set.published_value(type)) {
      text += "; the set has " + ledger_kj(published->value) + " kJ/mol";
    }
    return text;
  }
  return price.remark;
}

std::string price_text(const BondValue* price) {
  return price == nullptr ? "no value" : ledger_kj(price->value);
}

/// Joins bonds that one price serves, and the two bonds of a nitro group, into lines.
std::vector<BondLine> bond_lines(const Species& species, const BondSet& set) {
  std::vector<BondLine> lines;
  for (const BondCount& bond : species.bonds) {
    const BondValue* price = set.find(bond.type);
    if (bond.type.setting == Setting::Nitro && bond.type.order == Order::Double) {
      const auto single = std::find_if(lines.begin(), lines.end(), [&bond](const BondLine& line) {
        return line.type.setting == Setting::Nitro && line.count == bond.count && !line.second;
      });
      if (single != lines.end()) {
        single->second = BondLine::Half{bond.type, bond.count, price};
        continue;
      }
    }
    const bool kekule = bond.type.setting == Setting::AromaticRing && price != nullptr &&
                        price->type.setting == Setting::Plain;
    const auto same = std::find_if(lines.begin(), lines.end(), [&](const BondLine& line) {
      return price != nullptr && line.price == price && line.type.setting != Setting::Nitro &&
             bond.type.setting != Setting::Nitro;
    });
    if (same != lines.end()) {
      same->count += bond.count;
      if (kekule)
        same->remark =
            std::to_string(bond.count) + " of them in the aromatic ring, counted as Kekulé draws it";
      continue;
    }
    BondLine line;
    line.type = price != nullptr && bond.type.setting != Setting::Nitro ? price->type : bond.type;
    line.count = bond.count;
    line.price = price;
    if (price != nullptr) line.remark = price_remark(*price, set, bond.type);
    if (kekule && line.remark.empty()) line.remark = "in the aromatic ring, counted as Kekulé draws it";
    lines.push_back(std::move(line));
  }
  for (BondLine& line : lines) {
    line.label = bond_label(line.type);
    line.count_text = std::to_string(line.count);
    line.price_text = price_text(line.price);
    if (line.price != nullptr) {
      line.per_mole = line.count * line.price->value;
      line.source = line.price->source;
    }
    if (!line.second) continue;
    line.label = "N–O and N=O of nitro";
    line.count_text += " + " + std::to_string(line.second->count);
    line.price_text += ", " + price_text(line.second->price);
    if (line.second->price != nullptr) {
      line.per_mole += line.second->count * line.second->price->value;
      const std::string remark = price_remark(*line.second->price, set, line.second->type);
      if (line.second->price->origin == BondOrigin::User)
        line.remark += (line.remark.empty() ? "" : "; ") + ("N=O: " + remark);
    }
    if (line.remark.empty()) line.remark = "one of each by convention; in truth the two bonds are equal";
  }
  return lines;
}

void explain_missing(LedgerRow& row, const Species& species) {
  if (row.missing.empty()) {
    row.remark = "no structure and no formation enthalpy: no bond sum";
    return;
  }
  std::string text;
  for (const BondType& type : row.missing) {
    text += (text.empty() ? "" : "; ") + bond_label(type) + ": no value in this set";
    const std::vector<std::string> others = BondSet::sets_with(type);
    for (std::size_t i = 0; i < others.size(); ++i)
      text += (i == 0 ? " (sets that have it: " : ", ") + others[i];
    text += others.empty() ? " (nor in another; type one with its source)" : ")";
  }
  row.remark = species.name + ": " + text;
}

void add_bond_working(LedgerRow& row) {
  for (const BondLine& line : row.lines) {
    if (!line.priced()) {
      row.working.push_back(line.label + "  " + line.count_text + " × no value");
      continue;
    }
    std::string text = line.label + "  " + std::to_string(line.count) + " × " + ledger_kj(line.price->value);
    if (line.second)
      text += " + " + std::to_string(line.second->count) + " × " + ledger_kj(line.second->price->value);
    text += " = " + ledger_kj(line.per_mole);
    if (line.price->origin == BondOrigin::User) text += ", typed: " + line.price->source;
    row.working.push_back(std::move(text));
  }
}

/// Atoms minus formation enthalpy: the bond sum of what no bond set reaches.
void add_formation_working(LedgerRow& row, const Species& species,
                           const std::optional<molecule::Strength>& strength) {
  std::string lacking;
  gas_atoms(species, lacking, &row.working);
  const Result<thermo::Sourced> formation = thermo::tabulated_formation(species, row.phase, strength);
  if (!formation.ok()) return;
  row.working.insert(row.working.end(), formation->working.begin(), formation->working.end());
  row.remark = row.route == RowRoute::AtomsFromElement
                   ? "atoms from the element in its reference state (" +
                         std::string(thermo::phase_word(row.phase)) + ")"
                   : "by formation enthalpy as " + std::string(thermo::phase_word(row.phase)) +
                         ": no bond set reaches ions, salts and radicals";
}

void add_table(LedgerRow& row, const Species& species) {
  const Result<thermo::Sourced> formation = thermo::tabulated_formation(species, Phase::Gas);
  if (!formation.ok()) return;
  std::string lacking;
  std::optional<Quantity> atoms = gas_atoms(species, lacking, nullptr);
  if (!atoms) return;
  atoms->add(formation->value, -1);
  row.table = std::move(atoms);
  row.table_source = formation->source;
}

void add_sum(LedgerRow& row, const ReactionSpecies& entry, const PricedSpecies& priced) {
  row.route = priced.route;
  row.per_mole = priced.per_mole;
  row.missing = priced.missing;
  if (row.per_mole) row.in_equation = row.per_mole->scaled(entry.coefficient());
}

void add_sum_working(LedgerRow& row, const ReactionSpecies& entry) {
  if (!row.per_mole) return;
  row.working.push_back("sum " + ledger_kj(row.per_mole->value()) + " kJ/mol");
  row.working.push_back(times_text(entry.coefficient()) + " × " + ledger_kj(row.per_mole->value()) + " = " +
                        ledger_kj(row.in_equation->value()) + " kJ " + (entry.product ? "formed" : "broken"));
  if (!row.table) return;
  const double gap = row.per_mole->value() - row.table->value();
  row.working.push_back("the table implies " + ledger_kj(row.table->value()) +
                        " kJ/mol (gas atoms minus ΔfH of the gas, " + row.table_source +
                        "); bonds − table = " + ledger_kj(gap));
}

}  // namespace

bool reachable_by_bonds(const Species& species, Phase phase) {
  if (!species.graph || species.graph->atoms.empty()) return false;
  if (species.compound != nullptr && species.compound->structure == facts::Structure::Formal &&
      !(species.compound->reference_element && species.bonds.empty() && phase == Phase::Gas)) {
    return false;  // drawn as ions or bare atoms, which is no structure to count bonds in
  }
  if (species.compound != nullptr && species.compound->reference_element && phase == Phase::Solid &&
      species.compound->reference_phase == 's' && species.bonds.size() != 1) {
    return false;  // graphite, metals; iodine has its one bond and a sublimation enthalpy
  }
  const bool solid_sulfur_or_phosphorus = species.compound != nullptr &&
                                          species.compound->reference_element && phase == Phase::Solid &&
                                          species.graph->atoms.size() > 2;
  return !solid_sulfur_or_phosphorus && !has_charged_fragment(*species.graph);
}

PricedSpecies price_by_bonds(const Species& species, Phase phase, const BondSet& set) {
  PricedSpecies priced;
  priced.phase = phase;
  if (sum_bonds(species, set, priced)) priced.route = RowRoute::Bonds;
  return priced;
}

PricedSpecies price_species(const Species& species, const molecule::Term& written, const BondSet& set) {
  PricedSpecies priced;
  priced.phase = thermo::phase_taken(species, written.phase).phase;
  if (reachable_by_bonds(species, priced.phase)) return price_by_bonds(species, priced.phase, set);
  const Result<thermo::Sourced> formation =
      thermo::tabulated_formation(species, priced.phase, written.strength);
  std::string lacking;
  std::optional<Quantity> atoms = gas_atoms(species, lacking, nullptr);
  if (!formation.ok() || !atoms) return priced;
  atoms->add(formation->value, -1);
  priced.per_mole = std::move(atoms);
  const bool element =
      species.compound != nullptr && species.compound->reference_element &&
      molecule::phase_text(priced.phase) == std::string_view(&species.compound->reference_phase, 1);
  priced.route = element ? RowRoute::AtomsFromElement : RowRoute::Formation;
  return priced;
}

LedgerRow start_row(const ReactionSpecies& entry, std::size_t index, const PricedSpecies& priced,
                    bool by_bonds) {
  const Species& species = *entry.species;
  LedgerRow row;
  row.species = index;
  row.phase = priced.phase;
  if (by_bonds) {
    row.strains = strains_of(species);
    add_table(row, species);
    return row;
  }
  add_sum(row, entry, priced);
  add_formation_working(row, species, entry.term.strength);
  if (row.route == RowRoute::Missing) explain_missing(row, species);
  add_sum_working(row, entry);
  return row;
}

LedgerRow add_bonds(LedgerRow row, const ReactionSpecies& entry, const PricedSpecies& priced,
                    const BondSet& set) {
  const Species& species = *entry.species;
  add_sum(row, entry, priced);
  row.lines = bond_lines(species, set);
  add_bond_working(row);
  if (row.route == RowRoute::Bonds && row.lines.empty()) row.remark = "free atom: no bond";
  if (row.route == RowRoute::Missing) explain_missing(row, species);
  add_sum_working(row, entry);
  return row;
}

}  // namespace heatledger::balance
