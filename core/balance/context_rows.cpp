#include "core/balance/context_rows.hpp"

#include "core/balance/bond_words.hpp"
#include "core/balance/strains.hpp"
#include "core/base/number_text.hpp"
#include "core/estimate/context_settings.hpp"
#include "core/facts/atoms.hpp"
#include "core/molecule/elements.hpp"
#include "core/thermo/estimated.hpp"

namespace heatledger::balance {
namespace {

using estimate::ContextLine;
using estimate::LineKind;
using facts::Species;
using molecule::Phase;

constexpr double kJ = 1000.0;

std::string one_decimal(double joules) {
  return display_number(joules / kJ, 1);
}

/// An element has no estimate: its one bond is worth what its atoms are.
std::shared_ptr<const estimate::Explanation> element_line(const Species& species, double sum) {
  if (species.bonds.size() != 1) return nullptr;
  auto explanation = std::make_shared<estimate::Explanation>();
  ContextLine line;
  line.bond = bond_label(species.bonds.front().type);
  line.text = "element in its reference state: what its atoms are worth";
  line.count = species.bonds.front().count;
  line.base = sum / line.count;
  line.total = sum;
  explanation->sum = explanation->gas_atoms = sum;
  explanation->lines.push_back(std::move(line));
  return explanation;
}

void add_context_working(LedgerRow& row, const estimate::Explanation& explanation) {
  for (const ContextLine& line : explanation.lines) {
    std::string text;
    if (line.kind == LineKind::Bond) {
      text = line.bond + (line.text.empty() ? "" : " " + line.text) + "  " + times_text(line.count) + " × ";
      text += line.surroundings == 0
                  ? one_decimal(line.base)
                  : "(" + one_decimal(line.base) + " " + (line.surroundings < 0 ? "−" : "+") + " " +
                        one_decimal(line.surroundings < 0 ? -line.surroundings : line.surroundings) + ")";
      text += " = " + one_decimal(line.total);
    } else {
      text = line.text + "  " + display_signed(line.total / kJ, 1);
    }
    if (line.unseen > 0) text += "; surroundings that no compound of the table has";
    row.working.push_back(std::move(text));
  }
}

}  // namespace

std::optional<double> gas_atoms_in_context(const Species& species) {
  if (!species.composition) return std::nullopt;
  double sum = 0;
  for (const auto& atom : species.composition->atoms) {
    const int element = atom.first % 1000;
    std::optional<double> one = estimate::model_gas_atom_of(element);
    if (!one) {
      const std::optional<facts::Datum> figure = facts::gas_atom_formation(element);
      if (!figure) return std::nullopt;
      one = figure->value;
    }
    sum += *one * atom.second;
  }
  return sum;
}

Result<estimate::Explanation> explain_in_context(const Species& species,
                                                 const estimate::Observations* observations) {
  if (!species.graph) {
    return Error{"thermo.no_estimate", "No estimate for " + species.name + ": it has no structure here.",
                 species.text, "Write its structure as SMILES in double quotes."};
  }
  estimate::ContextOptions options;
  options.observations = observations;
  return estimate::explain(estimate::Property::GasFormation, *species.graph, options);
}

LedgerRow describe_context_row(const ReactionSpecies& entry, std::size_t index, const SpeciesFigures& figures,
                               const estimate::Observations* observations) {
  const Species& species = *entry.species;
  LedgerRow row;
  row.species = index;
  row.phase = figures.phase;
  row.per_mole = figures.context_sum;
  if (row.per_mole) row.in_equation = row.per_mole->scaled(entry.coefficient());
  const bool element = species.compound != nullptr && species.compound->reference_element;
  if (!row.per_mole) {
    row.route = RowRoute::Missing;
    const Result<estimate::Explanation> why = explain_in_context(species, observations);
    row.remark = species.name + ": no estimate and no formation enthalpy, so no sum" +
                 (why.ok() ? std::string(".") : " (" + why.error().message + ")");
    return row;
  }
  if (figures.in_context) {
    Result<estimate::Explanation> explained = explain_in_context(species, observations);
    if (explained.ok())
      row.context = std::make_shared<const estimate::Explanation>(std::move(explained).value());
    row.route = RowRoute::Bonds;
    row.strains = strains_of(species);
    const Result<thermo::Sourced> table = thermo::tabulated_formation(species, Phase::Gas);
    if (const std::optional<double> atoms = gas_atoms_in_context(species); table.ok() && atoms) {
      row.table.emplace(*atoms);
      row.table->add(table->value, -1);
      row.table_source = table->source;
    }
  } else if (element) {
    row.context = element_line(species, row.per_mole->value());
    row.route = row.context != nullptr ? RowRoute::Bonds : RowRoute::AtomsFromElement;
    if (row.context == nullptr)
      row.remark = "atoms from the element in its reference state (" +
                   std::string(thermo::phase_word(row.phase)) + ")";
  } else {
    row.route = RowRoute::Formation;
    const Result<estimate::Explanation> why = explain_in_context(species, observations);
    row.remark = "by its formation enthalpy: " +
                 (why.ok() ? std::string("as ") + std::string(thermo::phase_word(row.phase)) +
                                 " it has no bonds of its own to count"
                           : "bonds in context do not reach it (" + why.error().message + ")");
    row.working.push_back("gas atoms minus formation enthalpy = " + one_decimal(row.per_mole->value()) +
                          " kJ/mol");
  }
  if (row.context != nullptr) add_context_working(row, *row.context);
  row.working.push_back("sum " + one_decimal(row.per_mole->value()) + " kJ/mol");
  if (row.context != nullptr && figures.in_context) {
    row.working.push_back("formation enthalpy of the gas: atoms " + one_decimal(row.context->gas_atoms) +
                          " − " + one_decimal(row.context->sum) + " = " +
                          display_signed(row.context->prediction.value / kJ, 1) + " ± " +
                          one_decimal(row.context->prediction.u95) + " kJ/mol");
  }
  row.working.push_back(times_text(entry.coefficient()) + " × " + one_decimal(row.per_mole->value()) + " = " +
                        one_decimal(row.in_equation->value()) + " kJ " +
                        (entry.product ? "formed" : "broken"));
  if (row.table) {
    row.working.push_back(
        "the table implies " + one_decimal(row.table->value()) + " kJ/mol (gas atoms minus ΔfH of the gas, " +
        row.table_source +
        "); bonds − table = " + display_signed((row.per_mole->value() - row.table->value()) / kJ, 1));
  }
  return row;
}

std::string element_pair(const ContextLine& line) {
  if (line.kind != LineKind::Bond || line.bond.empty()) return {};
  // "C=O", "C⋯C": letters, a sign that is no letter, letters.
  const auto letter = [](char c) { return (c >= 'A' && c <= 'Z') || (c >= 'a' && c <= 'z'); };
  std::size_t left = 0, right = line.bond.size();
  while (left < line.bond.size() && letter(line.bond[left])) ++left;
  while (right > left && letter(line.bond[right - 1])) --right;
  std::string a = line.bond.substr(0, left), b = line.bond.substr(right);
  if (b < a) std::swap(a, b);
  return a + "–" + b;
}

std::string element_pair(const molecule::BondType& type) {
  std::string a(molecule::symbol(type.first)), b(molecule::symbol(type.second));
  if (b < a) std::swap(a, b);
  return a + "–" + b;
}

}  // namespace heatledger::balance
