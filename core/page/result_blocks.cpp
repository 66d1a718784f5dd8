// The figures that go on from a reaction: the one taken, what it is per mole and per kilogram, and every
// route.
#include "core/base/number_text.hpp"
#include "core/page/cells.hpp"
#include "core/page/figures.hpp"
#include "core/page/reaction_blocks.hpp"

namespace heatledger::page {
namespace {

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
        "Taken here, by " + route_words(route->name) + (view_.sheet.pinned_route.empty() ? "" : ", pinned"),
        figure.scaled(ledger_.basis.factor), ledger_.basis.unit);
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
    row.cells.push_back(label_cell(taken ? "taken" : route.why_not, Tone::Quiet));
    table.rows.push_back(std::move(row));
  }
  return table;
}

}  // namespace heatledger::page
