// Page to text: terminal, HTML report, CSV, SVG, and the one JSON encoding of the page contract.
#pragma once

#include <string>
#include <utility>
#include <vector>

#include "core/page/page.hpp"

namespace heatledger::page {

/// Columns lined up for a terminal of `width` characters; display width, not bytes.
std::string write_text(const Page& page, int width = 100);
/// A report that prints on A4 and Letter as it stands: no script, no outside reference.
std::string write_html(const Page& page, const std::vector<Margin>& workings);
/// Every table, a blank line between; RFC 4180, plain ASCII minus and no thin spaces in number cells.
std::string write_csv(const Page& page);
/// The printed sheet without its drawings, tables as pipe tables.
std::string write_markdown(const Page& page);
std::string write_svg(const Drawing& drawing);
std::string write_json(const Page& page);
std::string write_json(const Margin& margin);

}  // namespace heatledger::page
