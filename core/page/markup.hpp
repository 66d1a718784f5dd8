// Text and numbers inside HTML and SVG.
#pragma once

#include <string>
#include <string_view>

#include "core/page/page.hpp"

namespace heatledger::page {

/// `text` with everything that HTML or XML would read as markup escaped; control characters are left out.
std::string escaped(std::string_view text);
/// "ink-broken": class of an ink, for the style sheet of the report and of a drawing.
std::string ink_class(Ink ink);
/// A coordinate with at most two decimals.
std::string coordinate(double value);
/// The drawing as an svg element that takes its inks from classes.
std::string svg_element(const Drawing& drawing);
/// Style rules for the inks of drawings.
std::string_view ink_style();

}  // namespace heatledger::page
