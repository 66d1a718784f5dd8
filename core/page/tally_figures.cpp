#include "core/page/tally_figures.hpp"

namespace heatledger::page {
namespace {

MaybeFigure figure_of(const std::optional<uncertainty::Quantity>& quantity) {
  if (!quantity) return std::nullopt;
  return quantity->figure();
}

void write_value_and_interval(JsonText& json, const uncertainty::Figure& joules) {
  json.key("value").number(joules.value / 1000).key("u95").number(joules.u95 / 1000);
}

void write_column(JsonText& json, std::string_view name, std::string_view interval,
                  const MaybeFigure& joules) {
  if (joules) {
    json.key(name).number(joules->value / 1000).key(interval).number(joules->u95 / 1000);
  } else {
    json.key(name).null().key(interval).null();
  }
}

}  // namespace

TallyFigures tally_figures(const balance::Ledger& ledger) {
  TallyFigures figures;
  figures.broken = figure_of(ledger.broken);
  figures.formed = figure_of(ledger.formed);
  figures.gas_298 = figure_of(ledger.gas_298);
  figures.as_written = figure_of(ledger.as_written);
  for (const balance::Route& route : ledger.routes) {
    const MaybeFigure figure = figure_of(route.as_written);
    if (route.name == "average") figures.average = figure;
    if (route.name == balance::kContextRoute) {
      figures.context = figure;
      figures.context_gas_298 = figure_of(route.gas_298);
    }
    if (route.name == "formation") figures.formation = figure;
    if (route.name == "measured") figures.measured = figure;
    if (route.name == ledger.taken) figures.taken = figure;
  }
  figures.taken_route = ledger.taken;
  return figures;
}

TallyFigures tally_figures(const balance::QuickAnswer& answer) {
  TallyFigures figures;
  figures.broken = answer.broken;
  figures.formed = answer.formed;
  figures.gas_298 = answer.gas_298;
  figures.as_written = figures.average = answer.as_written;
  figures.formation = answer.formation;
  figures.context = answer.context;
  figures.context_broken = answer.context_broken;
  figures.context_formed = answer.context_formed;
  figures.context_gas_298 = answer.context_gas_298;
  figures.taken_route = answer.taken;
  figures.taken = answer.taken == balance::kFormationRoute ? answer.formation
                  : answer.taken == balance::kContextRoute ? answer.context
                                                           : answer.as_written;
  return figures;
}

TallyFigures in_context(TallyFigures figures) {
  figures.broken = figures.context_broken;
  figures.formed = figures.context_formed;
  figures.gas_298 = figures.context_gas_298;
  figures.as_written = figures.context;
  return figures;
}

void write_kilojoules(JsonText& json, const MaybeFigure& joules) {
  if (!joules) {
    json.null();
    return;
  }
  json.open_object();
  write_value_and_interval(json, *joules);
  json.close_object();
}

void write_kilojoules(JsonText& json, const MaybeFigure& joules, std::string_view reason) {
  json.open_object();
  if (joules) {
    write_value_and_interval(json, *joules);
  } else {
    json.key("value").null().key("u95").null().key("reason").string(reason);
  }
  json.close_object();
}

void write_columns(JsonText& json, const TallyFigures& figures) {
  write_column(json, "broken", "broken_u95", figures.broken);
  write_column(json, "formed", "formed_u95", figures.formed);
}

void write_routes(JsonText& json, const TallyFigures& figures) {
  json.key("average");
  write_kilojoules(json, figures.average);
  json.key("context");
  write_kilojoules(json, figures.context);
  json.key("formation");
  write_kilojoules(json, figures.formation);
  if (figures.measured) {
    json.key("measured");
    write_kilojoules(json, figures.measured);
  }
  json.key("taken");
  if (!figures.taken) {
    json.null();
    return;
  }
  json.open_object();
  write_value_and_interval(json, *figures.taken);
  json.key("route").string(figures.taken_route);
  json.close_object();
}

}  // namespace heatledger::page
