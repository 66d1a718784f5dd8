// Draws a page's drawing: roles to ink, points to place.
#pragma once

#include "core/page/page.hpp"
#include "desktop/window/canvas.hpp"

namespace heatledger::window {

/// @param scale  points of the window for a point of the drawing
void draw_drawing(Canvas& canvas, const page::Drawing& drawing, Rect area, float scale);

}  // namespace heatledger::window
