// A ledger as plain arithmetic that can be recomputed with something changed in the middle: what the checker
// holds typed figures against. Figures are kJ, as on paper.
#pragma once

#include <cstdint>
#include <string>
#include <vector>

#include "core/balance/ledger.hpp"

namespace heatledger::balance {

/// Every figure of the sheet is a node; a node is computed from nodes before it.
using Node = std::uint32_t;

/// What is done to a node right after it is computed, before anything is computed from it.
struct Change {
  enum class Op : std::uint8_t { Add, Multiply, Replace } op = Op::Add;
  Node node = 0;
  double number = 0;
};

class SheetModel {
 public:
  struct Line {
    Node count, price, count2, price2, sum;
    double count_value, price_value, count2_value, price2_value;
  };
  struct Row {
    std::vector<Line> lines;
    Node coefficient, per_mole, in_equation;
    double coefficient_value;
    double fixed;  ///< bond sum that stands on no line: rows without bonds, aromatic values of another table
    bool product;
  };
  struct Phase {
    std::size_t row;
    Node times, value;
    double per_mole;  ///< gas to the phase written [kJ/mol]
    bool product;
  };

  /// @param prices  the bond set to price with; the ledger's own, or another table
  /// @return empty when a row has no sum in that set
  static std::optional<SheetModel> of(const Ledger& ledger, const estimate::BondSet& prices);

  /// All nodes with the changes made, into `out` (memory reused).
  void evaluate(const std::vector<Change>& changes, std::vector<double>& out) const;
  /// The node of a cell suffix (checker.hpp); empty when this sheet has no such cell.
  std::optional<Node> node_of(const std::string& cell) const;

  std::vector<Row> rows;
  std::vector<Phase> phases;
  Node broken = 0, formed = 0, gas = 0, as_written = 0, basis = 0, gas_on_basis = 0, as_written_on_basis = 0;
  double basis_value = 1;
  std::size_t nodes = 0;
};

}  // namespace heatledger::balance
