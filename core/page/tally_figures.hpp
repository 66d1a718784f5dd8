// The figures of one equation as `tally` and `bulk` state them: one writer for both, so that they agree to
// the digit.
#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "core/balance/ledger.hpp"
#include "core/balance/quick_tally.hpp"
#include "core/page/json_text.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::page {

using MaybeFigure = std::optional<uncertainty::Figure>;

/// All in J for the written coefficients; what is empty is written as null.
struct TallyFigures {
  MaybeFigure broken, formed, gas_298, as_written;
  MaybeFigure average, context, formation, measured;  ///< as written, 25 °C, by each route
  MaybeFigure context_broken, context_formed;  ///< the two columns by bonds in context, of a short answer
  MaybeFigure context_gas_298;                 ///< gas, 25 °C, by bonds in context
  MaybeFigure taken;
  std::string_view taken_route;
};

/// @param ledger  must outlive the figures
TallyFigures tally_figures(const balance::Ledger& ledger);
TallyFigures tally_figures(const balance::QuickAnswer& answer);
/// A short answer with bonds in context in charge: the columns, gas_298 and as_written are that route's.
TallyFigures in_context(TallyFigures figures);

/// {"value","u95"} in kJ, or null.
void write_kilojoules(JsonText& json, const MaybeFigure& joules);
/// {"value","u95"} in kJ, or {"value":null,"u95":null,"reason"}.
void write_kilojoules(JsonText& json, const MaybeFigure& joules, std::string_view reason);
/// The keys broken, broken_u95, formed, formed_u95.
void write_columns(JsonText& json, const TallyFigures& figures);
/// The keys average, context, formation, measured (only where there is one), taken of an object that is open.
void write_routes(JsonText& json, const TallyFigures& figures);

}  // namespace heatledger::page
