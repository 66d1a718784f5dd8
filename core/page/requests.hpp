// JSON requests of the browser face and of tests: {"do": "...", ...} in, {"ok":true,"value":…} or
// {"ok":false,"error":{…}} out.
#pragma once

#include <string>
#include <string_view>

namespace heatledger::page {

/// do: "new" | "open" {text} | "save" | "page" | "edit" {cell, text} | "command" {name, arguments} | "margin" {cell} |
/// "suggest" {text, limit} | "report" | "csv" | "svg" {drawing} | "close"; each with "sheet": number, except "new" and
/// "open", which answer it. "edit" and "command" answer the new page.
std::string handle_request(std::string_view request);

}  // namespace heatledger::page
