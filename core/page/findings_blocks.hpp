// Figures and curves that a kind of step hands on (core/step/findings.hpp), set in type: one table a group,
// one drawing a chart, one margin a figure. Nothing here knows a kind of step.
#pragma once

#include "core/page/page.hpp"
#include "core/step/findings.hpp"

namespace heatledger::page {

/// @param id  of the step; cells are ID.find.FINDING
std::vector<Block> findings_groups(const std::string& id, const step::Findings& findings);
/// Heading and drawing of every chart. A chart with fewer than two points of every curve is left out.
std::vector<Block> findings_charts(const std::string& id, const step::Findings& findings);
/// Working and sources of one figure; empty when the cell is none of these.
std::optional<Margin> findings_margin(const std::string& id, const step::Findings& findings,
                                      const std::string& cell);
/// "maximum temperature of the synthesis reaction 143 ± 12 °C", for lists and saved figures.
std::string finding_sentence(const step::Finding& finding);

}  // namespace heatledger::page
