#include "core/balance/sheet_model.hpp"

#include "core/balance/rows.hpp"

namespace heatledger::balance {
namespace {

constexpr double kJ = 1000.0;

/// Takes "row.", then a whole number, off the front of a cell suffix.
std::optional<std::size_t> take_index(std::string_view& text, std::string_view word) {
  if (text.substr(0, word.size()) != word) return std::nullopt;
  std::size_t at = word.size(), value = 0;
  while (at < text.size() && text[at] >= '0' && text[at] <= '9' && value < 100000)
    value = value * 10 + static_cast<std::size_t>(text[at++] - '0');
  if (at == word.size()) return std::nullopt;
  text.remove_prefix(at);
  return value;
}

}  // namespace

std::optional<SheetModel> SheetModel::of(const Ledger& ledger, const estimate::BondSet& prices) {
  SheetModel model;
  Node next = 0;
  for (const LedgerRow& from : ledger.rows) {
    const ReactionSpecies& entry = ledger.reaction->species[from.species];
    Row row{};
    row.product = entry.product;
    row.coefficient_value = entry.coefficient();
    if (from.route == RowRoute::Missing && from.lines.empty()) return std::nullopt;
    for (const BondLine& bond : from.lines) {
      const estimate::BondValue* price = prices.find(bond.type);
      const estimate::BondValue* price2 = bond.second ? prices.find(bond.second->type) : nullptr;
      if (price == nullptr || (bond.second && price2 == nullptr)) return std::nullopt;
      Line line{};
      line.count = next++;
      line.price = next++;
      line.count2 = next++;
      line.price2 = next++;
      line.sum = next++;
      line.count_value = bond.count;
      line.price_value = price->value / kJ;
      line.count2_value = bond.second ? bond.second->count : 0;
      line.price2_value = price2 != nullptr ? price2->value / kJ : 0;
      row.lines.push_back(line);
    }
    if (from.lines.empty()) {
      row.fixed = from.per_mole ? from.per_mole->value() / kJ : 0;
    } else {
      // A table with a value for aromatic rings prices bonds apart that share a line here: the row as a whole
      // is right.
      double lines = 0;
      for (const Line& line : row.lines)
        lines += line.count_value * line.price_value + line.count2_value * line.price2_value;
      const PricedSpecies priced = price_species(*entry.species, entry.term, prices);
      if (priced.per_mole) row.fixed = priced.per_mole->value() / kJ - lines;
      if (row.fixed > -1e-6 && row.fixed < 1e-6) row.fixed = 0;
    }
    row.coefficient = next++;
    row.per_mole = next++;
    row.in_equation = next++;
    model.rows.push_back(std::move(row));
  }
  model.broken = next++;
  model.formed = next++;
  model.gas = next++;
  for (const Correction& correction : ledger.corrections) {
    const ReactionSpecies& entry = ledger.reaction->species[correction.species];
    Phase phase{};
    phase.row = correction.species;
    phase.times = next++;
    phase.value = next++;
    phase.product = entry.product;
    phase.per_mole =
        correction.value ? correction.value->value() / kJ / ((entry.product ? 1 : -1) * correction.times) : 0;
    model.phases.push_back(phase);
  }
  model.as_written = next++;
  model.basis = next++;
  model.gas_on_basis = next++;
  model.as_written_on_basis = next++;
  model.basis_value = ledger.basis.factor;
  model.nodes = next;
  return model;
}

void SheetModel::evaluate(const std::vector<Change>& changes, std::vector<double>& out) const {
  out.resize(nodes);
  const auto set = [&changes, &out](Node node, double value) {
    for (const Change& change : changes) {
      if (change.node != node) continue;
      switch (change.op) {
        case Change::Op::Add:
          value += change.number;
          break;
        case Change::Op::Multiply:
          value *= change.number;
          break;
        case Change::Op::Replace:
          value = change.number;
          break;
      }
    }
    out[node] = value;
  };
  double broken_sum = 0, formed_sum = 0;
  for (const Row& row : rows) {
    double sum = row.fixed;
    for (const Line& line : row.lines) {
      set(line.count, line.count_value);
      set(line.price, line.price_value);
      set(line.count2, line.count2_value);
      set(line.price2, line.price2_value);
      set(line.sum, out[line.count] * out[line.price] + out[line.count2] * out[line.price2]);
      sum += out[line.sum];
    }
    set(row.coefficient, row.coefficient_value);
    set(row.per_mole, sum);
    set(row.in_equation, out[row.coefficient] * out[row.per_mole]);
    (row.product ? formed_sum : broken_sum) += out[row.in_equation];
  }
  set(broken, broken_sum);
  set(formed, formed_sum);
  set(gas, out[broken] - out[formed]);
  double written = out[gas];
  for (const Phase& phase : phases) {
    set(phase.times, rows[phase.row].coefficient_value);
    set(phase.value, (phase.product ? 1 : -1) * phase.per_mole * out[phase.times]);
    written += out[phase.value];
  }
  set(as_written, written);
  set(basis, basis_value);
  set(gas_on_basis, out[gas] * out[basis]);
  set(as_written_on_basis, out[as_written] * out[basis]);
}

std::optional<Node> SheetModel::node_of(const std::string& cell) const {
  if (cell == "broken") return broken;
  if (cell == "formed") return formed;
  if (cell == "gas_298") return gas;
  if (cell == "as_written") return as_written;
  if (cell == "gas_298.on_basis") return gas_on_basis;
  if (cell == "as_written.on_basis") return as_written_on_basis;
  std::string_view rest = cell;
  if (const std::optional<std::size_t> index = take_index(rest, "correction.")) {
    if (*index < phases.size() && rest.empty()) return phases[*index].value;
    return std::nullopt;
  }
  const std::optional<std::size_t> index = take_index(rest, "row.");
  if (!index || *index >= rows.size()) return std::nullopt;
  const Row& row = rows[*index];
  if (rest == ".per_mole") return row.per_mole;
  if (rest == ".in_equation") return row.in_equation;
  const std::optional<std::size_t> at = take_index(rest, ".line.");
  if (!at || *at >= row.lines.size()) return std::nullopt;
  const Line& line = row.lines[*at];
  if (rest == ".count") return line.count;
  if (rest == ".price") return line.price;
  if (rest == ".per_mole") return line.sum;
  return std::nullopt;
}

}  // namespace heatledger::balance
