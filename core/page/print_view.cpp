#include "core/page/print_view.hpp"

#include <algorithm>

namespace heatledger::page {
namespace {

/// A row says something if any cell but its quiet labels has text; hints are for the screen.
bool prints(const Row& row, TableLook look) {
  if (row.screen_only) return false;
  return std::any_of(row.cells.begin(), row.cells.end(), [&](const Cell& cell) {
    const bool name_of_field = look == TableLook::Form && !cell.editable;
    return cell.kind != CellKind::Button && !name_of_field && !cell.text.empty();
  });
}

void blank_buttons(Row& row) {
  for (Cell& cell : row.cells) {
    if (cell.kind != CellKind::Button) continue;
    cell.text.clear();
    cell.id.clear();
  }
}

}  // namespace

Page print_view(const Page& page, bool drawings) {
  Page out;
  out.title = page.title;
  out.revision = page.revision;
  for (const Block& block : page.blocks) {
    if (!drawings && std::get_if<Drawing>(&block) != nullptr) {
      // The heading of a chart goes with it.
      const Heading* above = out.blocks.empty() ? nullptr : std::get_if<Heading>(&out.blocks.back());
      if (above != nullptr && above->level == 3) out.blocks.pop_back();
      continue;
    }
    if (const Table* table = std::get_if<Table>(&block)) {
      Table kept = *table;
      kept.rows.clear();
      for (const Row& row : table->rows) {
        if (!prints(row, table->look)) continue;
        kept.rows.push_back(row);
        blank_buttons(kept.rows.back());
      }
      if (kept.rows.empty()) continue;
      out.blocks.push_back(std::move(kept));
      continue;
    }
    // A heading over nothing gives way to the next one.
    if (std::get_if<Heading>(&block) != nullptr && !out.blocks.empty() &&
        std::get_if<Heading>(&out.blocks.back()) != nullptr) {
      out.blocks.pop_back();
    }
    out.blocks.push_back(block);
  }
  if (!out.blocks.empty() && std::get_if<Heading>(&out.blocks.back()) != nullptr) out.blocks.pop_back();
  out.changed.assign(out.blocks.size(), page.revision);
  return out;
}

}  // namespace heatledger::page
