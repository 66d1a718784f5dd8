#include "core/page/figures.hpp"

#include <array>
#include <cmath>
#include <utility>

#include "core/balance/bond_words.hpp"
#include "core/base/number_text.hpp"
#include "core/units/display.hpp"

namespace heatledger::page {
namespace {

constexpr std::array<std::pair<const char*, const char*>, 4> kRoutes{{{"average", "average bonds"},
                                                                      {"context", "bonds in context"},
                                                                      {"formation", "formation enthalpies"},
                                                                      {"measured", "measured"}}};

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

int decimals_kj(double u95_joule) {
  // One decimal is all that anyone reads off, but a ± must not print as zero.
  const bool vanishes = u95_joule > 0 && u95_joule < 50;
  return units::decimals_for(u95_joule / 1000, vanishes ? 2 : 1);
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

std::string taken_text(const balance::Ledger& ledger) {
  const balance::Route* route = balance::find_route(ledger, ledger.taken);
  if (route == nullptr || !route->as_written) return {};
  const uncertainty::Quantity figure = route->as_written->scaled(ledger.basis.factor);
  return figure_kj(figure.figure()) + " " + ledger.basis.unit;
}

}  // namespace heatledger::page
