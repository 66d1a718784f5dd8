// How figures of a sheet are spelled: kJ, decimals that suit the ±, signs. Every text of a figure is made
// here.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/balance/ledger.hpp"
#include "core/document/typed_species.hpp"
#include "core/uncertainty/quantity.hpp"

namespace heatledger::page {

/// [J] as kJ with the decimals given: "6 225", "−518"; signed_kj writes "+" too.
std::string kj(double joule, int decimals);
std::string signed_kj(double joule, int decimals);
/// "± 62" as the sheet shows it in a column of its own; empty when zero.
std::string half_width_kj(double joule, int decimals);
/// "−552.6 ± 3.0" from [J], decimals after the ±; "−552.6" when the ± is zero.
std::string figure_kj(const uncertainty::Figure& joule);

/// Numbers of a sum as they are printed: start + lines = end to the last digit shown. Start and end are
/// rounded as always; where rounding would leave a gap of a last digit, the line that rounding moved furthest
/// takes it.
/// @param decimals  0 to 6
/// @return  the lines, rounded
std::vector<double> rounded_to_add_up(double start, const std::vector<double>& lines, double end,
                                      int decimals);

/// Decimals of one figure in kJ: two digits of its ±, at most one; two where the ± would print as zero.
int decimals_kj(double u95_joule);
/// Decimals of a ledger's columns: none where every price is a whole number of kJ or the total is vaguer than
/// that.
int ledger_decimals(const balance::Ledger& ledger);

/// How a sum "start, corrections, end" is printed. Empty decimals: there is nothing to add up, each figure
/// keeps its own.
struct PrintedSum {
  std::optional<int> decimals;
  std::vector<double> lines;  ///< [kJ] rounded, one for each correction

  std::optional<double> line(std::size_t index) const {
    return index < lines.size() ? std::optional<double>(lines[index]) : std::nullopt;
  }
};
/// @param factor  all figures are shown times this
PrintedSum printed_sum(const std::optional<uncertainty::Quantity>& start,
                       const std::vector<balance::Correction>& corrections,
                       const std::optional<uncertainty::Quantity>& end, double factor);

/// A coefficient as typed: "3", "1/2", "0.25".
std::string coefficient_text(const molecule::Coefficient& coefficient);

/// "average bonds" for "average", and back; an unknown name stands for itself.
std::string route_words(const std::string& route);
std::string route_from_words(const std::string& words);

/// A published figure in the unit that its blank is typed in: "176.2 ± 1.0 kJ/mol", "110.6 ± 0.1 °C"; its ±
/// left out where it is zero. Empty for what has no unit.
/// @param value, u95  SI
std::string published_figure(double value, double u95, const document::FigureName& name);

/// The figure taken as the sheet prints it, with its unit: "−552.6 ± 3.0 kJ/mol nitrobenzene"; empty without
/// one.
std::string taken_text(const balance::Ledger& ledger);

}  // namespace heatledger::page
