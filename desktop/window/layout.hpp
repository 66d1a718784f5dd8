// Where everything on the sheet stands: boxes and rules in points, measured from the top left of the paper's
// content. A page is laid out once for a width; drawing and hit testing read the result.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/page/page.hpp"
#include "desktop/window/canvas.hpp"

namespace heatledger::window {

/// A cell of the page in its place. `lines` point into the cell's text or hint, so a layout lives no longer
/// than its page.
struct PlacedCell {
  const page::Cell* cell = nullptr;
  const page::Row* row = nullptr;  ///< the row it stands in
  Rect area;                       ///< what a click hits and a selection marks
  Rect text;                       ///< where its lines stand
  Wrapped lines;
  Type type = Type::Body;
  Colour colour = ink::kText;
  page::Align align = page::Align::Left;
  bool hint = false;       ///< the text shown is the hint of an empty cell
  bool fold_mark = false;  ///< first cell of a row that unfolds: the mark stands left of the text
};

/// Text that is no cell: headings of columns and sections, notes.
struct PlacedText {
  Rect area;
  Wrapped lines;
  Type type = Type::Body;
  Colour colour = ink::kText;
  page::Align align = page::Align::Left;
  bool capitals = false;
};

/// A filled box: bands, rules, the spine, the bar beside a note.
struct PlacedFill {
  Rect area;
  Colour colour = ink::kFaint;
};

struct PlacedFrame {
  Rect area;
  Colour colour = ink::kEdge;
};

struct PlacedDrawing {
  const page::Drawing* drawing = nullptr;
  Rect area;
  float scale = 1;  ///< points of the sheet for a point of the drawing
};

struct Layout {
  float width = 0, height = 0;
  std::vector<PlacedFill> fills;
  std::vector<PlacedFrame> frames;
  std::vector<PlacedCell> cells;  ///< in reading order
  std::vector<PlacedText> texts;
  std::vector<PlacedDrawing> drawings;

  const PlacedCell* find(const std::string& id) const;
};

Layout lay_out(const page::Page& page, const Fonts& fonts, float width);

}  // namespace heatledger::window
