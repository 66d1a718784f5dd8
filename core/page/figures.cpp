#include "core/page/figures.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <string_view>
#include <utility>

#include "core/balance/bond_words.hpp"
#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/units/display.hpp"
#include "core/units/unit.hpp"

namespace heatledger::page {
namespace {

constexpr std::array<std::pair<const char*, const char*>, 5> kRoutes{
    {{"average", "average bonds"},
     {"context", "bonds in context"},
     {"formation", "formation enthalpies"},
     {"measured", "the measured heat"},
     {"measured_other", "the other reading"}}};

/// The number that the printed text of a value says.
double as_printed(double value, int decimals) {
  constexpr std::string_view kThinSpace = "\u2009";
  std::string text = display_number(value, decimals);
  for (std::size_t at; (at = text.find(kThinSpace)) != std::string::npos;) text.erase(at, kThinSpace.size());
  const std::optional<double> number = parse_number(text);
  CHECK(number.has_value(), "a printed number reads back");
  return *number;
}

bool is_whole_kj(double joule) {
  // A twentieth of a kJ is below what one decimal shows.
  return std::fabs(joule / 1000 - std::round(joule / 1000)) < 0.05;
}

}  // namespace

std::string kj(double joule, int decimals) {
  return display_number(joule / 1000, decimals);
}
std::string signed_kj(double joule, int decimals) {
  return display_signed(joule / 1000, decimals);
}

std::string half_width_kj(double joule, int decimals) {
  if (joule <= 0) return {};
  return display_number(joule / 1000, decimals);
}

std::string figure_kj(const uncertainty::Figure& joule) {
  const int decimals = decimals_kj(joule.u95);
  std::string text = kj(joule.value, decimals);
  if (joule.u95 > 0) text += " \u00b1 " + kj(joule.u95, decimals);
  return text;
}

std::vector<double> rounded_to_add_up(double start, const std::vector<double>& lines, double end,
                                      int decimals) {
  constexpr std::array<double, 7> kSteps{1, 10, 100, 1000, 10000, 100000, 1000000};
  const double step = kSteps[static_cast<std::size_t>(decimals)];
  // Whole last digits, as the printed text has them: rounding here must not differ from rounding there.
  const auto digits = [&](double value) { return std::round(as_printed(value, decimals) * step); };
  std::vector<double> whole(lines.size());
  double gap = digits(end) - digits(start);
  for (std::size_t i = 0; i < lines.size(); ++i) {
    whole[i] = digits(lines[i]);
    gap -= whole[i];
  }
  // Each line is off by half a digit at most, so the gap is no more than the lines can take.
  while (gap != 0 && !lines.empty()) {
    const double by = gap > 0 ? 1 : -1;
    std::size_t most = 0;
    for (std::size_t i = 1; i < lines.size(); ++i) {
      if (by * (lines[i] * step - whole[i]) > by * (lines[most] * step - whole[most])) most = i;
    }
    whole[most] += by;
    gap -= by;
  }
  for (double& line : whole) line /= step;
  return whole;
}

int decimals_kj(double u95_joule) {
  // One decimal is all that anyone reads off, but a ± must not print as zero.
  const bool vanishes = u95_joule > 0 && u95_joule < 50;
  return units::decimals_for(u95_joule / 1000, vanishes ? 2 : 1);
}

PrintedSum printed_sum(const std::optional<uncertainty::Quantity>& start,
                       const std::vector<balance::Correction>& corrections,
                       const std::optional<uncertainty::Quantity>& end, double factor) {
  PrintedSum sum;
  if (corrections.empty() || !start || !end) return sum;
  const int of_ends = std::max(decimals_kj(factor * start->u95()), decimals_kj(factor * end->u95()));
  int decimals = of_ends;
  std::vector<double> lines;
  for (const balance::Correction& correction : corrections) {
    if (!correction.value) return sum;
    // A correction known to 0.01 kJ does not make the whole sum look as if it were.
    decimals = std::max(decimals, std::min(1, decimals_kj(factor * correction.value->u95())));
    lines.push_back(factor * correction.value->value() / 1000);
  }
  sum.lines =
      rounded_to_add_up(factor * start->value() / 1000, lines, factor * end->value() / 1000, decimals);
  sum.decimals = decimals;
  return sum;
}

int ledger_decimals(const balance::Ledger& ledger) {
  if (ledger.gas_298 && ledger.gas_298->u95() >= 9950) return 0;
  for (const balance::LedgerRow& row : ledger.rows) {
    if (row.in_equation && !is_whole_kj(row.in_equation->value())) return 1;
    if (row.per_mole && !is_whole_kj(row.per_mole->value())) return 1;
  }
  return 0;
}

std::string coefficient_text(const molecule::Coefficient& coefficient) {
  if (!coefficient.typed.empty()) return coefficient.typed;
  return balance::times_text(coefficient.value());
}

std::string route_words(const std::string& route) {
  for (const auto& known : kRoutes) {
    if (route == known.first) return known.second;
  }
  return route;
}

std::string route_from_words(const std::string& words) {
  for (const auto& known : kRoutes) {
    if (words == known.second) return known.first;
  }
  return words;
}

std::string published_figure(double value, double u95, const document::FigureName& name) {
  const Result<units::Unit> unit = units::parse_unit(name.unit);
  if (!name.kind || !unit.ok()) return {};
  const double half = u95 / unit->factor;
  if (!(half > 0)) return machine_number(unit->from_si(value), 6) + " " + unit->display;
  const int decimals = units::decimals_for(half, 2);
  return display_number(unit->from_si(value), decimals) + " \u00b1 " + display_number(half, decimals) + " " +
         unit->display;
}

std::string taken_text(const balance::Ledger& ledger) {
  const balance::Route* route = balance::find_route(ledger, ledger.taken);
  if (route == nullptr || !route->as_written) return {};
  const uncertainty::Quantity figure = route->as_written->scaled(ledger.basis.factor);
  return figure_kj(figure.figure()) + " " + ledger.basis.unit;
}

}  // namespace heatledger::page
