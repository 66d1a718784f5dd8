// The blocks of one reaction: equation, ledger, result, routes, profile, cautions. Built anew only when the
// reaction or its result changed; the parts stand in ledger_table.cpp, result_blocks.cpp and drawings.cpp.
#pragma once

#include <map>
#include <set>
#include <string>
#include <vector>

#include "core/balance/checker.hpp"
#include "core/document/computation.hpp"
#include "core/page/page.hpp"

namespace heatledger::page {

/// A text that could not be taken into the sheet, kept for the cell it was typed into.
struct RejectedText {
  std::string text;
  Error error;
  friend bool operator==(const RejectedText& a, const RejectedText& b) {
    return a.text == b.text && a.error == b.error;
  }
};

struct ReactionView {
  const document::ReactionSheet& sheet;
  const document::ReactionResult& result;
  std::size_t number = 1, count = 1;                    ///< place among the reactions of the sheet, from 1
  const std::set<std::string>& open_rows;               ///< fold ids that are open
  const std::map<std::string, RejectedText>& rejected;  ///< by cell id
};

std::vector<Block> reaction_blocks(const ReactionView& view);

/// "r1.row.0" in "r1.row.0.broken".
std::string row_id(const document::ReactionSheet& sheet, std::size_t row);

/// The ledger, or its rows without totals while the equation does not balance.
/// @param review  of the figures typed in the checker's column; null: the column is not shown
Table ledger_table(const ReactionView& view, const balance::Review* review);
/// Boxes with the figure taken and what it is per mole and per kilogram.
Table result_table(const ReactionView& view);
/// "As run, from 80 °C to 120 °C".
std::string run_words(const balance::Ledger& ledger);
/// From the figure taken, at 25 °C, through a line for each species to the figure as run; they add up.
Table run_table(const ReactionView& view);
/// Blanks for a measured heat of the reaction.
Table measured_table(const ReactionView& view);
/// Mixing and evaporation that the measured heat may hold; only where the ledger has such lines.
Table measured_lines_table(const ReactionView& view);
/// Each route with its figure and ±, or the reason why it has none.
Table routes_table(const ReactionView& view);

/// Routes as dots with their intervals on one axis; nothing to draw gives an empty drawing (no strokes).
Drawing routes_drawing(const std::string& id, const balance::Ledger& ledger);
/// From the reactants up to the free atoms and down to the products, to scale.
Drawing profile_drawing(const std::string& id, const balance::Ledger& ledger);

}  // namespace heatledger::page
