// The margin of the sheet: the working of the selected cell, its sources, what to know about it.
#pragma once

#include "core/page/page.hpp"
#include "desktop/window/canvas.hpp"

namespace heatledger::window {

/// Draws from the top of `area` on, moved up by `scroll`. @return height of all of it [points]
float draw_margin(Canvas& canvas, const page::Margin& margin, Rect area, float scroll);

}  // namespace heatledger::window
