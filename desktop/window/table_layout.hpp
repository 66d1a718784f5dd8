// Places the cells of one table by its look: ledger, form, boxes, list, banner.
#pragma once

#include "desktop/window/layout.hpp"

namespace heatledger::window {

/// Adds the table to the layout from the top of `place` on, as wide as `place`.
/// @return where it ends [points from the top]
float lay_out_table(const page::Table& table, const Fonts& fonts, Rect place, Layout& layout);

/// Width of a form with no text broken [points].
float natural_form_width(const page::Table& form, const Fonts& fonts);

}  // namespace heatledger::window
