#include "core/balance/routes.hpp"

#include <cmath>

#include "core/balance/background.hpp"
#include "core/balance/bond_words.hpp"
#include "core/balance/measured.hpp"
#include "core/base/number_text.hpp"
#include "core/thermo/estimated.hpp"

namespace heatledger::balance {
namespace {

using uncertainty::Quantity;

Route average_route(const Ledger& ledger, const std::vector<Entry>& entries, const BondSums& sums) {
  Route route;
  route.name = kAverageRoute;
  route.gas_298 = sums.gas_298;
  route.as_written = sums.as_written;
  for (std::size_t i = 0; i < entries.size(); ++i) {
    if (entries[i].priced->per_mole || !route.why_not.empty()) continue;
    const LedgerRow& row = ledger.rows[i];
    route.why_not = ledger.in_context || row.remark.empty()
                        ? "no bond sum for " + display_species(ledger.reaction->species[i])
                        : row.remark;
  }
  for (const Correction& correction : ledger.corrections) {
    if (!correction.value && route.why_not.empty()) route.why_not = correction.why_not;
  }
  if (!route.gas_298) return route;
  route.working.push_back("broken − formed = " + ledger_kj(sums.broken->value()) + " − " +
                          ledger_kj(sums.formed->value()) + " = " + ledger_kj(sums.gas_298->value()) +
                          " kJ, all as gas at 25 °C");
  for (const Correction& correction : ledger.corrections) {
    if (correction.value)
      route.working.push_back(correction.what + "  " + fine_kj(correction.value->value()) + " kJ");
  }
  if (route.as_written) {
    route.working.push_back("as written, 25 °C: " + kj_with_u95(*route.as_written, "kJ"));
  }
  return route;
}

}  // namespace

Route formation_route(const Background& background) {
  Route route;
  route.name = kFormationRoute;
  route.gas_298 = background.sums.formation_gas_298;
  route.as_written = background.sums.formation_as_written;
  for (std::size_t i = 0; i < background.figures.size(); ++i) {
    const ReactionSpecies& entry = background.reaction->species[i];
    const SpeciesFigures& figures = background.figures[i];
    if (figures.formation_estimated) route.estimated.push_back(i);
    if (!figures.formation) {
      if (route.why_not.empty()) route.why_not = figures.formation_source;
      continue;
    }
    const double value = figures.formation->value(),
                 times = entry.product ? entry.coefficient() : -entry.coefficient();
    route.working.push_back(display_species(entry) + phase_suffix(entry.term) + "  " +
                            display_number(times, times == std::round(times) ? 0 : 4) + " × (" +
                            fine_kj(value) + ") = " + fine_kj(times * value) + " kJ; " +
                            figures.formation_source);
  }
  if (route.as_written) {
    route.working.push_back("sum: " + kj_with_u95(*route.as_written, "kJ"));
  } else if (route.why_not.empty()) {
    route.why_not = "a formation enthalpy is missing";
  }
  return route;
}

Route context_route(const Background& background) {
  Route route;
  route.name = kContextRoute;
  route.gas_298 = background.sums.context_gas_298;
  route.as_written = background.sums.context_as_written;
  for (std::size_t i = 0; i < background.figures.size(); ++i) {
    const ReactionSpecies& entry = background.reaction->species[i];
    if (!background.figures[i].context) {
      if (route.why_not.empty()) route.why_not = "no figure in context for " + display_species(entry);
      continue;
    }
    const double value = background.figures[i].context->value(),
                 times = entry.product ? entry.coefficient() : -entry.coefficient();
    route.working.push_back(display_species(entry) + phase_suffix(entry.term) + "  " +
                            display_number(times, times == std::round(times) ? 0 : 4) + " × (" +
                            fine_kj(value) + ") = " + fine_kj(times * value) + " kJ");
  }
  if (route.as_written)
    route.working.push_back("sum: " + kj_with_u95(*route.as_written, "kJ") +
                            ", what both sides share cancelled");
  return route;
}

std::string estimates_of(const Background& background) {
  const Route& formation = background.formation;
  if (!formation.as_written || formation.estimated.empty()) return {};
  std::string names;
  for (const std::size_t i : formation.estimated)
    names += (names.empty() ? "" : ", ") + display_species(background.reaction->species[i]);
  return "No table has " + names + ": estimated from bonds in context.";
}

const Route* find_route(const Ledger& ledger, std::string_view name) {
  for (const Route& route : ledger.routes) {
    if (route.name == name) return &route;
  }
  return nullptr;
}

Status add_routes(Ledger& ledger, const std::vector<Entry>& entries, const BondSums& sums,
                  const LedgerOptions& options) {
  const std::string_view pinned = options.pinned_route;
  const Background& background = *ledger.background;
  ledger.routes.push_back(average_route(ledger, entries, sums));
  if (background.by_context) ledger.routes.push_back(*background.by_context);
  ledger.routes.push_back(background.formation);
  if (options.measured) {
    if (const Status status = add_measured_routes(ledger, *options.measured); !status.ok())
      return status.error();
  }
  for (const std::string_view name :
       {pinned, kMeasuredRoute, kFormationRoute, kContextRoute, kAverageRoute}) {
    const Route* route = find_route(ledger, name);
    if (route != nullptr && route->as_written) {
      ledger.taken = name;
      break;
    }
  }
  if (!pinned.empty() && ledger.taken != pinned) {
    ledger.notes.push_back(
        "The pinned route (" + std::string(pinned) + ") has no figure for this reaction" +
        (ledger.taken.empty() ? std::string(".") : "; the figure by " + ledger.taken + " is taken instead."));
  } else if (!pinned.empty()) {
    ledger.notes.push_back("The figure taken is pinned to the route by " + ledger.taken + ".");
  }
  if (!background.estimated_note.empty()) ledger.notes.push_back(background.estimated_note);
  return success();
}

}  // namespace heatledger::balance
