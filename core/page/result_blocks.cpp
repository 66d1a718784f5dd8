// The figures that go on from a reaction: the one taken, what it is per mole and per kilogram, and every
// route.
#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/page/cells.hpp"
#include "core/page/figures.hpp"
#include "core/page/reaction_blocks.hpp"

namespace heatledger::page {
namespace {

std::string celsius(double kelvin) {
  const double degrees = kelvin - 273.15;
  return display_number(degrees, degrees == std::round(degrees) ? 0 : 1) + " \u00b0C";
}

/// Names of the species for which `take` holds: "nitrobenzene, H₂".
template <typename Take>
std::string names_where(const balance::Ledger& ledger, Take take) {
  std::string names;
  for (std::size_t i = 0; i < ledger.reaction->species.size(); ++i) {
    if (!take(i)) continue;
    const std::string name = balance::display_species(ledger.reaction->species[i]);
    if ((", " + names + ",").find(", " + name + ",") != std::string::npos) continue;
    names += (names.empty() ? "" : ", ") + name;
  }
  return names;
}

/// What a route rests on, in a few words.
std::string route_remark(const balance::Ledger& ledger, const balance::Route& route, bool pinned) {
  if (!route.as_written) return route.why_not;
  std::string text = route.name == ledger.taken ? (pinned ? "taken, pinned" : "taken") : "";
  const auto add = [&](const std::string& words) { text += (text.empty() ? "" : "; ") + words; };
  if (!route.remark.empty()) add(route.remark);
  if (route.name == balance::kFormationRoute) {
    const auto estimated = [&](std::size_t i) {
      return std::find(route.estimated.begin(), route.estimated.end(), i) != route.estimated.end();
    };
    const std::string context = names_where(ledger, estimated);
    const std::string tables = names_where(ledger, [&](std::size_t i) { return !estimated(i); });
    if (context.empty()) {
      add("every species from tables");
    } else {
      if (!tables.empty()) add("tables: " + tables);
      add("in context: " + context);
    }
  }
  if (ledger.observations != nullptr &&
      (route.name == balance::kContextRoute ||
       (route.name == balance::kFormationRoute && !route.estimated.empty())))
    add("sharpened by what was measured");
  return text;
}

class ResultTable {
 public:
  explicit ResultTable(const ReactionView& view) : view_(view), ledger_(*view.result.ledger) {
    table_.id = view.sheet.id + ".result";
    table_.look = TableLook::Boxes;
    table_.columns = {column("what", ""), column("figure", "", Align::Right), column("unit", ""),
                      column("u95", "")};
  }

  Table build() {
    const balance::Route* route = balance::find_route(ledger_, ledger_.taken);
    if (route == nullptr || !route->as_written) {
      Row row = row_of(view_.sheet.id + ".taken.row");
      Cell why = figure_cell(view_.sheet.id + ".taken", "no value", Tone::Caution);
      why.kind = CellKind::Label;
      why.hint =
          route != nullptr ? route->why_not : "No route reaches a figure: see the reasons beside each route.";
      row.cells = {label_cell("Taken here", Tone::Quiet), std::move(why), label_cell(""),
                   label_cell(why.hint, Tone::Quiet)};
      table_.rows.push_back(std::move(row));
      return std::move(table_);
    }
    const uncertainty::Quantity& figure = *route->as_written;
    add("taken",
        "Taken here, by " + route_words(route->name) +
            (view_.sheet.pinned_route == route->name ? ", pinned" : ""),
        figure.scaled(ledger_.basis.factor), ledger_.basis.unit);
    if (route->name == balance::kMeasuredRoute || route->name == balance::kOtherMeasuredRoute)
      add_other_reading(route->name);
    if (ledger_.as_run) {
      add("as_run", run_words(ledger_), ledger_.as_run->scaled(ledger_.basis.factor), ledger_.basis.unit);
    }
    add_per_kilogram(figure);
    return std::move(table_);
  }

 private:
  void add(const std::string& name, const std::string& what, const uncertainty::Quantity& value,
           const std::string& unit) {
    const std::string id = view_.sheet.id + "." + name;
    const int decimals = decimals_kj(value.u95());
    Row row = row_of(id + ".row");
    row.cells = {label_cell(what, Tone::Quiet), figure_cell(id, kj(value.value(), decimals), Tone::Strong),
                 label_cell(unit),
                 value.u95() > 0 ? label_cell("\u00b1 " + half_width_kj(value.u95(), decimals), Tone::Quiet)
                                 : label_cell("", Tone::Quiet)};
    table_.rows.push_back(std::move(row));
  }

  /// The other result of a measured heat of which nobody said what it holds.
  void add_other_reading(const std::string& taken) {
    const balance::Route* other = balance::find_route(
        ledger_, taken == balance::kMeasuredRoute ? balance::kOtherMeasuredRoute : balance::kMeasuredRoute);
    if (other == nullptr || !other->as_written) return;
    add("other_reading", "Not taken: with " + other->remark, other->as_written->scaled(ledger_.basis.factor),
        ledger_.basis.unit);
  }

  /// Per kilogram of the species of the basis (else the first reactant) and of all reactants.
  void add_per_kilogram(const uncertainty::Quantity& figure) {
    const auto& species = ledger_.reaction->species;
    const balance::Basis& basis = ledger_.basis;
    const bool of_species =
        basis.kind == balance::Basis::Kind::MoleOf || basis.kind == balance::Basis::Kind::KilogramOf;
    const std::size_t which = of_species ? basis.species : 0;
    const balance::ReactionSpecies& one = species[which];
    const double mass = one.species->molar_mass * one.coefficient();
    if (mass > 0 && basis.kind != balance::Basis::Kind::KilogramOf) {
      add("per_kg", "per kg " + balance::display_species(one), figure.scaled(1 / mass), "kJ/kg");
    }
    double charge = 0;
    for (const balance::ReactionSpecies& entry : species) {
      if (entry.product) continue;
      if (entry.species->molar_mass <= 0) return;
      charge += entry.species->molar_mass * entry.coefficient();
    }
    if (charge > 0 && basis.kind != balance::Basis::Kind::KilogramOfReactants) {
      add("per_kg_reactants", "per kg of all reactants", figure.scaled(1 / charge), "kJ/kg");
    }
  }

  const ReactionView& view_;
  const balance::Ledger& ledger_;
  Table table_;
};

}  // namespace

std::string run_words(const balance::Ledger& ledger) {
  const auto at = [](const std::optional<double>& kelvin) {
    return kelvin ? celsius(*kelvin) : "25 \u00b0C";
  };
  const std::string in = at(ledger.reactants_at), out = at(ledger.products_at);
  return in == out ? "As run, at " + in : "As run, from " + in + " to " + out;
}

Table run_table(const ReactionView& view) {
  const balance::Ledger& ledger = *view.result.ledger;
  const std::string& id = view.sheet.id;
  const balance::Route* route = balance::find_route(ledger, ledger.taken);
  const std::optional<uncertainty::Quantity> taken = route != nullptr ? route->as_written : std::nullopt;
  const double factor = ledger.basis.factor;
  const PrintedSum sum = printed_sum(taken, ledger.to_temperature, ledger.as_run, factor);
  Table table;
  table.id = id + ".run";
  table.columns = {column("what", ""), column("value", ledger.basis.unit, Align::Right),
                   column("u95", "\u00b1", Align::Right), column("source", "")};
  const auto add = [&](const std::string& row_name, RowRole role, const std::string& what,
                       const std::optional<uncertainty::Quantity>& value,
                       const std::optional<double>& rounded, const std::string& remark) {
    Row row = row_of(row_name, role);
    const bool result = role == RowRole::Result;
    row.cells.push_back(label_cell(what, result ? Tone::Strong : Tone::Plain));
    if (value) {
      const uncertainty::Quantity scaled = value->scaled(factor);
      const int decimals = decimals_kj(scaled.u95()), shown = sum.decimals.value_or(decimals);
      const double figure = rounded ? 1000 * *rounded : scaled.value();
      row.cells.push_back(figure_cell(row_name, result ? kj(figure, shown) : signed_kj(figure, shown),
                                      result ? Tone::Strong : Tone::Plain));
      row.cells.push_back(figure_cell(row_name + ".u95", half_width_kj(scaled.u95(), decimals), Tone::Quiet));
    } else {
      Cell missing = figure_cell(row_name, "no value", Tone::Caution);
      missing.kind = CellKind::Label;
      row.cells.push_back(std::move(missing));
      row.cells.push_back(label_cell(""));
    }
    row.cells.push_back(label_cell(remark, Tone::Quiet));
    table.rows.push_back(std::move(row));
  };
  add(id + ".run.taken", RowRole::Result, "Taken, 25 \u00b0C", taken, std::nullopt,
      taken ? "by " + route_words(ledger.taken) : "no route reaches a figure");
  for (std::size_t i = 0; i < ledger.to_temperature.size(); ++i) {
    const balance::Correction& line = ledger.to_temperature[i];
    add(id + ".run." + std::to_string(i), RowRole::Correction, line.what, line.value, sum.line(i),
        line.value ? line.source : line.why_not);
  }
  add(id + ".as_run.line", RowRole::Result, run_words(ledger), ledger.as_run, std::nullopt,
      ledger.as_run ? "" : "a line above has no value");
  return table;
}

Table measured_table(const ReactionView& view) {
  const std::string id = view.sheet.id + ".measured";
  const document::TypedHeat& heat = view.sheet.measured;
  Table table;
  table.id = id;
  table.look = TableLook::Form;
  table.columns = {column("name", ""), column("value", ""), column("name_2", ""), column("value_2", "")};
  const auto add = [&](const char* row_name, const char* name, Cell first, const char* name_2, Cell second) {
    Row row = row_of(id + row_name);
    row.cells = {label_cell(name, Tone::Quiet), std::move(first), label_cell(name_2, Tone::Quiet),
                 std::move(second)};
    table.rows.push_back(std::move(row));
  };
  Cell value = typed_cell(id + ".value", heat.value, "\u2212545 \u00b1 8 kJ/mol", CellKind::Number);
  for (const Error& error : view.result.option_errors) {
    if (error.where.compare(0, 14, "measured.value") == 0) value.tone = Tone::Caution;
  }
  add(".row.1", "Measured heat", std::move(value), "per mole of",
      typed_cell(id + ".per", heat.per, "the coefficients written"));
  add(".row.2", "at", typed_cell(id + ".at", heat.at, "25 degC"), "in",
      typed_cell(id + ".medium", heat.medium, "solvent, phase, vessel"));
  Cell includes =
      typed_cell(id + ".includes", heat.includes.empty() ? "unknown" : heat.includes, "", CellKind::Choice);
  includes.choices = {"yes", "no", "unknown"};
  add(".row.3", "Mixing, dilution, evaporation, gas loss in it", std::move(includes), "by",
      typed_cell(id + ".source", heat.source, "who, with what, when"));
  return table;
}

Table measured_lines_table(const ReactionView& view) {
  const balance::Ledger& ledger = *view.result.ledger;
  const std::string id = view.sheet.id + ".measured_line";
  const balance::Route* other = balance::find_route(ledger, balance::kOtherMeasuredRoute);
  const bool held = other == nullptr && view.sheet.measured.includes == "yes";
  Table table;
  table.id = view.sheet.id + ".measured_lines";
  table.columns = {column("what", "Mixing and evaporation beside the measured heat"),
                   column("value", ledger.basis.unit, Align::Right), column("u95", "\u00b1", Align::Right),
                   column("source", "")};
  for (std::size_t i = 0; i < ledger.measured_lines.size(); ++i) {
    const balance::Correction& line = ledger.measured_lines[i];
    const std::string name = id + "." + std::to_string(i);
    Row row = row_of(name, RowRole::Correction);
    row.cells.push_back(label_cell(line.what));
    if (held || !line.value) {
      row.cells.push_back(
          label_cell(held ? "in the measured figure" : "no value", held ? Tone::Quiet : Tone::Caution));
      row.cells.push_back(label_cell(""));
      row.cells.push_back(label_cell(held ? "" : line.why_not, Tone::Quiet));
    } else {
      const uncertainty::Quantity scaled = line.value->scaled(ledger.basis.factor);
      const int decimals = decimals_kj(scaled.u95());
      row.cells.push_back(figure_cell(name, signed_kj(scaled.value(), decimals)));
      row.cells.push_back(figure_cell(name + ".u95", half_width_kj(scaled.u95(), decimals), Tone::Quiet));
      row.cells.push_back(
          label_cell((other != nullptr ? "may be in it; " : "added; ") + line.source, Tone::Quiet));
    }
    table.rows.push_back(std::move(row));
  }
  return table;
}

Table result_table(const ReactionView& view) {
  return ResultTable(view).build();
}

Table routes_table(const ReactionView& view) {
  const balance::Ledger& ledger = *view.result.ledger;
  const std::string id = view.sheet.id + ".route";
  Table table;
  table.id = view.sheet.id + ".routes";
  table.columns = {column("route", "Route"),
                   column("gas", "gas, 25 \u00b0C, " + ledger.basis.unit, Align::Right),
                   column("gas_u95", "\u00b1", Align::Right),
                   column("as_written", "as written, " + ledger.basis.unit, Align::Right),
                   column("u95", "\u00b1", Align::Right),
                   column("remark", "")};
  for (const balance::Route& route : ledger.routes) {
    const std::string row_name = id + "." + route.name;
    Row row = row_of(row_name);
    const bool taken = route.name == ledger.taken;
    row.cells.push_back(label_cell(route_words(route.name), taken ? Tone::Strong : Tone::Plain));
    const auto add = [&](const std::string& name, const std::optional<uncertainty::Quantity>& value) {
      if (!value) {
        row.cells.push_back(label_cell("\u2013", Tone::Quiet));
        row.cells.push_back(label_cell(""));
        return;
      }
      const uncertainty::Quantity scaled = value->scaled(ledger.basis.factor);
      const int decimals = decimals_kj(scaled.u95());
      row.cells.push_back(figure_cell(row_name + "." + name, kj(scaled.value(), decimals),
                                      taken ? Tone::Strong : Tone::Plain));
      row.cells.push_back(
          figure_cell(row_name + "." + name + ".u95", half_width_kj(scaled.u95(), decimals), Tone::Quiet));
    };
    add("gas_298", route.gas_298);
    add("as_written", route.as_written);
    row.cells.push_back(
        label_cell(route_remark(ledger, route, view.sheet.pinned_route == route.name), Tone::Quiet));
    table.rows.push_back(std::move(row));
  }
  return table;
}

}  // namespace heatledger::page
