#include "desktop/window/sheet_view.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "desktop/window/drawing_view.hpp"

namespace heatledger::window {
namespace {

Rect moved(Rect area, Point by) {
  return {area.x + by.x, area.y + by.y, area.width, area.height};
}

void draw_cell(Canvas& canvas, const PlacedCell& placed, Point origin, const SheetMarks& marks) {
  const Rect area = moved(placed.area, origin);
  if (!canvas.visible(area)) return;
  const page::Cell& cell = *placed.cell;
  const bool named = !cell.id.empty();
  const bool selected = named && cell.id == marks.selected;
  const bool hovered = named && cell.id == marks.hovered;
  if (named && cell.id == marks.editing) return;
  const Rect text = moved(placed.text, origin);
  if (cell.kind == page::CellKind::Button && !cell.text.empty()) {
    const float width = placed.lines.width + 16;
    const Rect button{placed.align == page::Align::Right ? text.right() - width + 4 : text.x - 8, text.y - 1,
                      width, text.height + 2};
    canvas.fill(button, selected ? ink::kSelected : hovered ? ink::kHover : ink::kBox, 3);
    canvas.frame(button, selected ? ink::kSelectedEdge : ink::kEdge, 1, 3);
    canvas.lines_in({button.x + 8, text.y, placed.lines.width, text.height}, placed.type, placed.colour,
                    page::Align::Left, placed.lines);
    return;
  }
  if (selected) {
    canvas.fill(area, ink::kSelected);
    canvas.frame(area, ink::kSelectedEdge, 2);
  } else if (hovered) {
    canvas.fill(area, ink::kHover);
    if (cell.editable) canvas.frame(area, ink::kEdge);
  }
  if (placed.fold_mark) {
    canvas.text_in({text.x - 15, text.y, 14, text.height}, Type::Small, ink::kQuiet, page::Align::Left,
                   placed.row->open ? "▾" : "▸");
  }
  if (cell.kind == page::CellKind::Equation && !cell.text.empty() && placed.lines.lines.size() == 1) {
    canvas.equation({text.x, text.y + 2}, placed.type, placed.colour, placed.lines.lines.front());
    return;
  }
  canvas.lines_in(text, placed.type, placed.colour, placed.align, placed.lines);
  if (cell.kind == page::CellKind::Choice && placed.lines.lines.size() == 1) {
    canvas.text_in({text.x + placed.lines.width + 5, text.y, 10, text.height}, Type::Small, ink::kQuiet,
                   page::Align::Left, "▾");
  }
}

}  // namespace

void draw_sheet(Canvas& canvas, const Layout& layout, Point origin, const SheetMarks& marks) {
  for (const PlacedFill& fill : layout.fills) {
    // Bands and boxes lie under the cells, rules above: rules are thin, so the order does not show.
    const Rect area = moved(fill.area, origin);
    if (area.height > 2 && area.width > 3 && canvas.visible(area)) canvas.fill(area, fill.colour);
  }
  for (const PlacedCell& placed : layout.cells) draw_cell(canvas, placed, origin, marks);
  for (const PlacedFill& fill : layout.fills) {
    const Rect area = moved(fill.area, origin);
    if ((area.height <= 2 || area.width <= 3) && canvas.visible(area)) canvas.fill(area, fill.colour);
  }
  for (const PlacedFrame& frame : layout.frames) {
    const Rect area = moved(frame.area, origin);
    if (canvas.visible(area)) canvas.frame(area, frame.colour);
  }
  for (const PlacedText& text : layout.texts) {
    const Rect area = moved(text.area, origin);
    if (!canvas.visible(area)) continue;
    if (text.capitals) {
      canvas.spaced_capitals({area.x, area.y}, text.colour, text.lines.lines.front());
    } else {
      canvas.lines_in(area, text.type, text.colour, text.align, text.lines);
    }
  }
  for (const PlacedDrawing& placed : layout.drawings) {
    const Rect area = moved(placed.area, origin);
    if (canvas.visible(area)) draw_drawing(canvas, *placed.drawing, area, placed.scale);
  }
  // The selected cell's edge stands above the rules around it.
  if (const PlacedCell* selected = layout.find(marks.selected);
      selected != nullptr && selected->cell->kind != page::CellKind::Button &&
      marks.selected != marks.editing) {
    canvas.frame(moved(selected->area, origin), ink::kSelectedEdge, 2);
  }
}

bool can_select(const PlacedCell& placed) {
  return !placed.cell->id.empty();
}

const PlacedCell* cell_at(const Layout& layout, Point at) {
  for (const PlacedCell& placed : layout.cells) {
    if (placed.area.contains(at)) return &placed;
  }
  return nullptr;
}

const PlacedCell* next_entry(const Layout& layout, const std::string& from, bool backwards) {
  const auto count = static_cast<std::ptrdiff_t>(layout.cells.size());
  std::ptrdiff_t at = backwards ? count : -1;
  for (std::ptrdiff_t i = 0; i < count && !from.empty(); ++i) {
    if (layout.cells[static_cast<std::size_t>(i)].cell->id == from) at = i;
  }
  for (std::ptrdiff_t step = 1; step <= count; ++step) {
    const std::ptrdiff_t index = ((at + (backwards ? -step : step)) % count + count) % count;
    const PlacedCell& placed = layout.cells[static_cast<std::size_t>(index)];
    if (can_select(placed) && placed.cell->editable) return &placed;
  }
  return nullptr;
}

const PlacedCell* neighbour(const Layout& layout, const std::string& from, Direction direction) {
  const PlacedCell* start = layout.find(from);
  if (start == nullptr) {
    for (const PlacedCell& placed : layout.cells) {
      if (can_select(placed)) return &placed;
    }
    return nullptr;
  }
  const auto middle = [](const Rect& area) {
    return Point{area.x + area.width / 2, area.y + area.height / 2};
  };
  const Point here = middle(start->area);
  const PlacedCell* best = nullptr;
  float least = std::numeric_limits<float>::max();
  for (const PlacedCell& placed : layout.cells) {
    if (!can_select(placed) || &placed == start) continue;
    const Rect& area = placed.area;
    const Point there = middle(area);
    float cost = 0;
    if (direction == Direction::Left || direction == Direction::Right) {
      const bool beside = area.y < start->area.bottom() - 1 && area.bottom() > start->area.y + 1;
      const float distance = direction == Direction::Right ? there.x - here.x : here.x - there.x;
      if (!beside || distance <= 0) continue;
      cost = distance;
    } else {
      const float distance =
          direction == Direction::Down ? area.y - start->area.bottom() : start->area.y - area.bottom();
      if (distance < -2) continue;
      // A line further away costs more than standing aside on the next one.
      const float aside = std::max({0.0f, area.x - here.x, here.x - area.right()});
      cost = distance * 4 + aside + std::fabs(there.x - here.x) * 0.05f;
    }
    if (cost < least) {
      least = cost;
      best = &placed;
    }
  }
  return best;
}

}  // namespace heatledger::window
