// Draws the laid-out sheet on its paper and finds cells by place: under the pointer, next in reading order,
// nearest in a direction.
#pragma once

#include <string>

#include "desktop/window/layout.hpp"

namespace heatledger::window {

enum class Direction : std::uint8_t { Left, Right, Up, Down };

struct SheetMarks {
  std::string selected, hovered, editing;
};

/// @param origin  where the top left of the sheet's content stands in the window [points]
void draw_sheet(Canvas& canvas, const Layout& layout, Point origin, const SheetMarks& marks);

/// The cell under a point of the content; cells that nobody can point at give none, but their row's fold mark
/// does.
const PlacedCell* cell_at(const Layout& layout, Point at);
bool can_select(const PlacedCell& placed);
/// Next or previous cell that takes an entry, in reading order, around the ends; from none to the first or
/// last.
const PlacedCell* next_entry(const Layout& layout, const std::string& from, bool backwards);
/// Nearest cell in a direction: on the same line for left and right, the best aligned line for up and down.
const PlacedCell* neighbour(const Layout& layout, const std::string& from, Direction direction);

}  // namespace heatledger::window
