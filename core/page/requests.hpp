// JSON requests of the browser face and of tests: {"do": "...", ...} in, {"ok":true,"value":…} or
// {"ok":false,"error":{"code","message","where","hint"}} out. Any input at all gets one of the two.
#pragma once

#include <string>
#include <string_view>

namespace heatledger::page {

/// "sheet" is a number that "new" or "open" gave.
///
///   do        further members                     value
///   new                                           {"sheet": 1}
///   open      text                                {"sheet": 2}
///   save      sheet                               the file text; the sheet counts as saved
///   export    sheet                               the file text for recovery; leaves the saved mark alone
///   page      sheet, since?                       page, or the changes since that revision
///   edit      sheet, cell, text, since?           the same
///   command   sheet, name, arguments?, since?     the same
///   margin    sheet, cell                         margin
///   suggest   sheet, text, limit?                 [{"text", "name", "remark"}]
///   state     sheet                               {"changed": bool, "revision": n}
///   report    sheet                               HTML text
///   text      sheet, width?                       terminal text
///   csv       sheet                               CSV text
///   markdown  sheet                               Markdown text
///   compare   sheet, text                         HTML text: how this sheet differs from the file of that
///   text svg       sheet, drawing                      SVG text close     sheet true
///
/// Page: {"title","revision","blocks":[…],"commands":[…]}; members that hold their default are left out. With
/// "since":
/// {"title","since","revision","blocks":[changed ones],"commands":[…]} and, when blocks came, went or moved,
/// "order": the ids of all blocks in order; a block that is not in "order" is gone.
/// @errors request.not_understood, request.no_such_sheet, request.too_many_sheets and those of session.hpp
std::string handle_request(std::string_view request);

}  // namespace heatledger::page
