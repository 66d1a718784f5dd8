#include "core/page/answer_text.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "core/base/number_text.hpp"
#include "core/molecule/elements.hpp"
#include "core/page/figures.hpp"
#include "core/page/page.hpp"
#include "core/page/writers.hpp"
#include "core/units/display.hpp"

namespace heatledger::page {
namespace {

constexpr int kMostDecimals = 1;

Cell cell(std::string text, CellKind kind = CellKind::Label, Tone tone = Tone::Plain) {
  Cell made;
  made.text = std::move(text);
  made.kind = kind;
  made.tone = tone;
  return made;
}

Cell number(std::string text, Tone tone = Tone::Plain) {
  return cell(std::move(text), CellKind::Number, tone);
}

/// Value and ± of a figure in J, set in kJ to the decimals that the ± justifies.
struct KilojouleText {
  std::string value, interval;
};

KilojouleText kilojoules(const uncertainty::Figure& joules, bool with_sign = false) {
  const int decimals = units::decimals_for(joules.u95 / 1000, kMostDecimals);
  return {with_sign ? display_signed(joules.value / 1000, decimals)
                    : display_number(joules.value / 1000, decimals),
          joules.u95 > 0 ? display_number(joules.u95 / 1000, decimals) : std::string()};
}

std::string coefficient_text(double value) {
  const double whole = std::round(value);
  // Fractions such as 1/3 are shown to three decimals; the working keeps them exact.
  return std::fabs(value - whole) < 1e-9 ? display_number(whole, 0) : machine_number(value, 4);
}

std::string element_line(const molecule::BalanceCheck& balance) {
  std::string text;
  for (const molecule::ElementBalance& element : balance.elements) {
    if (!text.empty()) text += ", ";
    text += element_text(element.key) + " " + coefficient_text(element.left);
  }
  return text;
}

Note note(NoteKind kind, std::string text) {
  Note made;
  made.kind = kind;
  made.text = std::move(text);
  return made;
}

Heading heading(std::string text, std::string aside, int level) {
  Heading made;
  made.text = std::move(text);
  made.aside = std::move(aside);
  made.level = level;
  return made;
}

Column column(std::string title, Align align, bool spine = false) {
  Column made;
  made.heading = std::move(title);
  made.align = align;
  made.spine_after = spine;
  return made;
}

Row row(RowRole role, std::vector<Cell> cells) {
  Row made;
  made.role = role;
  made.cells = std::move(cells);
  return made;
}

/// Lines of a row in context, rounded so that they add up to it.
void add_context_lines(Table& table, const balance::LedgerRow& line, const balance::ReactionSpecies& entry) {
  const int decimals = units::decimals_for(line.in_equation->u95() / 1000, kMostDecimals);
  std::vector<double> totals;
  for (const estimate::ContextLine& one : line.context->lines)
    totals.push_back(entry.coefficient() * one.total / 1000);
  const std::vector<double> shown = rounded_to_add_up(0, totals, line.in_equation->value() / 1000, decimals);
  for (std::size_t i = 0; i < shown.size(); ++i) {
    const estimate::ContextLine& one = line.context->lines[i];
    const bool bond = one.kind == estimate::LineKind::Bond;
    std::string label = "  ";
    label += one.bond;
    if (bond && !one.text.empty()) label += " ";
    label += one.text;
    std::string each = bond ? display_number(one.base / 1000, 1) : display_signed(one.total / 1000, 1);
    if (bond && one.surroundings != 0)
      each += (one.surroundings < 0 ? " − " : " + ") + display_number(std::fabs(one.surroundings) / 1000, 1);
    const std::string total = display_number(shown[i], decimals);
    table.rows.push_back(row(
        RowRole::Detail, {cell(std::move(label), CellKind::Label, Tone::Quiet),
                          number(bond ? coefficient_text(one.count) : ""), number(std::move(each)),
                          number(entry.product ? "" : total), number(entry.product ? total : ""), cell("")}));
  }
}

Table ledger_table(const balance::Ledger& ledger) {
  Table table;
  table.look = TableLook::Ledger;
  table.columns = {column("Species", Align::Left),     column("×", Align::Right),
                   column("kJ/mol", Align::Right),     column("broken, kJ", Align::Right, true),
                   column("formed, kJ", Align::Right), column("±", Align::Right)};
  for (const balance::LedgerRow& line : ledger.rows) {
    const balance::ReactionSpecies& entry = ledger.reaction->species[line.species];
    Row body = row(RowRole::Body, {cell(balance::display_species(entry) + balance::phase_suffix(entry.term)),
                                   number(coefficient_text(entry.coefficient()))});
    if (line.per_mole && line.in_equation) {
      const KilojouleText each = kilojoules(line.per_mole->figure());
      const KilojouleText total = kilojoules(line.in_equation->figure());
      body.cells.push_back(number(each.value));
      body.cells.push_back(number(entry.product ? "" : total.value, Tone::Broken));
      body.cells.push_back(number(entry.product ? total.value : "", Tone::Formed));
      body.cells.push_back(number(total.interval, Tone::Quiet));
    } else {
      body.cells.push_back(cell("no sum", CellKind::Label, Tone::Caution));
      for (int i = 0; i < 3; ++i) body.cells.push_back(cell(""));
    }
    table.rows.push_back(std::move(body));
    for (const balance::BondLine& bond : line.lines) {
      const std::string label = bond.label.empty() ? molecule::spelling(bond.type) : bond.label;
      Row detail = row(RowRole::Detail, {cell("  " + label, CellKind::Label, Tone::Quiet),
                                         number(bond.count_text), number(bond.price_text)});
      const std::string total =
          bond.priced() ? display_number(bond.per_mole * entry.coefficient() / 1000, 0) : "";
      detail.cells.push_back(number(entry.product ? "" : total));
      detail.cells.push_back(number(entry.product ? total : ""));
      detail.cells.push_back(cell(""));
      table.rows.push_back(std::move(detail));
    }
    if (line.context != nullptr) add_context_lines(table, line, entry);
  }
  const auto side = [](const std::optional<uncertainty::Quantity>& sum) {
    return sum ? kilojoules(sum->figure()).value : std::string("none");
  };
  table.rows.push_back(row(RowRole::Subtotal, {cell("Sum of bonds", CellKind::Label, Tone::Strong), cell(""),
                                               cell(""), number(side(ledger.broken), Tone::Broken),
                                               number(side(ledger.formed), Tone::Formed), cell("")}));
  const auto result = [&](std::string what, const std::optional<uncertainty::Quantity>& value, RowRole role,
                          const PrintedSum& sum, const std::optional<double>& rounded) {
    Row line = row(role, {cell(std::move(what)), cell(""), cell(""), cell("")});
    if (value) {
      const KilojouleText text = kilojoules(value->figure(), true);
      line.cells.push_back(number(sum.decimals
                                      ? display_signed(rounded.value_or(value->value() / 1000), *sum.decimals)
                                      : text.value));
      line.cells.push_back(number(text.interval, Tone::Quiet));
    } else {
      line.cells.push_back(cell("none", CellKind::Label, Tone::Caution));
      line.cells.push_back(cell(""));
    }
    table.rows.push_back(std::move(line));
  };
  const auto add_up = [&](const std::string& from, const std::optional<uncertainty::Quantity>& start,
                          const std::vector<balance::Correction>& lines, const std::string& to,
                          const std::optional<uncertainty::Quantity>& end) {
    const PrintedSum sum = printed_sum(start, lines, end, 1);
    result(from, start, RowRole::Result, sum, std::nullopt);
    for (std::size_t i = 0; i < lines.size(); ++i)
      result(lines[i].what, lines[i].value, RowRole::Correction, sum, sum.line(i));
    result(to, end, RowRole::Result, sum, std::nullopt);
  };
  add_up("Broken − formed, gas, 25 °C", ledger.gas_298, ledger.corrections, "As written, 25 °C",
         ledger.as_written);
  if (!ledger.to_temperature.empty()) {
    const balance::Route* taken = balance::find_route(ledger, ledger.taken);
    add_up("The figure taken, by " + (taken != nullptr ? taken->name : std::string("no route")),
           taken != nullptr ? taken->as_written : std::nullopt, ledger.to_temperature, "As run",
           ledger.as_run);
  }
  return table;
}

Table routes_table(const balance::Ledger& ledger) {
  Table table;
  table.columns = {column("Route", Align::Left), column("as written, kJ", Align::Right),
                   column("±", Align::Right), column("", Align::Left)};
  for (const balance::Route& route : ledger.routes) {
    const bool taken = route.name == ledger.taken;
    Row line = row(RowRole::Body, {cell(route.name)});
    if (route.as_written) {
      const KilojouleText text = kilojoules(route.as_written->figure(), true);
      line.cells.push_back(number(text.value));
      line.cells.push_back(number(text.interval, Tone::Quiet));
      line.cells.push_back(
          cell(route.remark.empty() ? taken ? "taken" : "" : (taken ? "taken; " : "") + route.remark));
    } else {
      line.cells.push_back(cell("none"));
      line.cells.push_back(cell(""));
      line.cells.push_back(cell(route.why_not, CellKind::Label, Tone::Quiet));
    }
    table.rows.push_back(std::move(line));
  }
  return table;
}

/// The figure taken on the basis that was asked for.
std::string basis_line(const balance::Ledger& ledger) {
  for (const balance::Route& route : ledger.routes) {
    if (route.name != ledger.taken || !route.as_written) continue;
    const KilojouleText text = kilojoules(balance::on_basis(*route.as_written, ledger.basis).figure());
    const std::string figure = text.interval.empty() ? text.value : text.value + " ± " + text.interval;
    return figure + " " + ledger.basis.unit + " " + ledger.basis.text + ", by " + route.name;
  }
  return {};
}

void add_source(std::vector<std::string>& sources, const std::string& source) {
  if (!source.empty() && std::find(sources.begin(), sources.end(), source) == sources.end())
    sources.push_back(source);
}

}  // namespace

std::string element_text(int key) {
  if (key < 0) return "charge";
  const int element = key % 1000;
  const int mass = key / 1000;
  if (element == 1 && mass == 2) return "D";
  if (element == 1 && mass == 3) return "T";
  return (mass > 0 ? std::to_string(mass) : std::string()) + std::string(molecule::symbol(element));
}

std::string ledger_text(const balance::Ledger& ledger) {
  Page page;
  page.blocks.push_back(heading(balance::display_equation(*ledger.reaction), {}, 1));
  page.blocks.push_back(note(NoteKind::Info, ledger.reaction->checkable
                                                 ? "balanced: " + element_line(ledger.reaction->balance)
                                                 : "balance not checkable: a species has no composition"));
  page.blocks.push_back(ledger.in_context ? heading("Ledger of bonds in context", {}, 2)
                                          : heading("Bond ledger", ledger.set->title(), 2));
  page.blocks.push_back(ledger_table(ledger));
  page.blocks.push_back(heading("Routes", {}, 2));
  page.blocks.push_back(routes_table(ledger));
  const std::string on_basis = basis_line(ledger);
  if (!on_basis.empty()) page.blocks.push_back(note(NoteKind::Info, "Taken: " + on_basis));
  std::vector<std::string> sources;
  for (const balance::LedgerRow& line : ledger.rows) {
    for (const balance::BondLine& bond : line.lines) {
      if (bond.price != nullptr) add_source(sources, bond.price->source);
    }
  }
  for (const balance::Correction& line : ledger.corrections) add_source(sources, line.source);
  for (const balance::LedgerRow& line : ledger.rows) add_source(sources, line.table_source);
  for (const std::string& source : sources) page.blocks.push_back(note(NoteKind::Info, "source: " + source));
  for (const std::string& text : ledger.notes) page.blocks.push_back(note(NoteKind::Info, text));
  for (const std::string& text : ledger.cautions) page.blocks.push_back(note(NoteKind::Caution, text));
  return write_text(page);
}

std::string unbalanced_text(const balance::Reaction& reaction) {
  Page page;
  page.blocks.push_back(heading(balance::display_equation(reaction), {}, 1));
  Table table;
  table.columns = {column("Element", Align::Left), column("left", Align::Right),
                   column("right", Align::Right)};
  for (const molecule::ElementBalance& element : reaction.balance.elements) {
    table.rows.push_back(
        row(RowRole::Body, {cell(element_text(element.key)), number(coefficient_text(element.left)),
                            number(coefficient_text(element.right))}));
  }
  page.blocks.push_back(std::move(table));
  if (!reaction.why_unbalanced.empty()) page.blocks.push_back(note(NoteKind::Error, reaction.why_unbalanced));
  for (const std::string& proposal : reaction.proposals)
    page.blocks.push_back(note(NoteKind::Info, "balances as: " + proposal));
  return write_text(page);
}

std::string species_text(const SpeciesFigures& figures) {
  const facts::Species& species = *figures.species;
  Page page;
  std::string identity;
  if (species.composition) identity = molecule::display_formula(*species.composition);
  if (species.molar_mass > 0) identity += ", " + display_number(species.molar_mass * 1000, 3) + " g/mol";
  if (species.compound != nullptr && !species.compound->cas.empty())
    identity += ", CAS " + std::string(species.compound->cas);
  page.blocks.push_back(heading(species.name, identity, 1));
  if (!species.canonical.empty())
    page.blocks.push_back(note(NoteKind::Info, "structure: " + species.canonical));

  Table table;
  table.columns = {column("25 °C", Align::Left), column("value", Align::Right),
                   column("±", Align::Right),    column("unit", Align::Left),
                   column("route", Align::Left), column("source", Align::Left)};
  const auto add = [&](std::string what, const StatedFigure& stated, double divisor, std::string unit) {
    if (!stated.figure) {
      table.rows.push_back(row(RowRole::Body, {cell(std::move(what)), cell("none"), cell(""), cell(""),
                                               cell(""), cell(stated.reason, CellKind::Label, Tone::Quiet)}));
      return;
    }
    const int decimals = units::decimals_for(stated.figure->u95 / divisor, 2);
    table.rows.push_back(
        row(RowRole::Body,
            {cell(std::move(what)), number(display_number(stated.figure->value / divisor, decimals)),
             number(display_number(stated.figure->u95 / divisor, decimals), Tone::Quiet),
             cell(std::move(unit)), cell(stated.route), cell(stated.source, CellKind::Label, Tone::Quiet)}));
  };
  add("formation enthalpy, gas", figures.gas_formation, 1000, "kJ/mol");
  if (figures.average_gas_formation)
    add("  the same by average bonds", *figures.average_gas_formation, 1000, "kJ/mol");
  add("formation enthalpy, liquid", figures.liquid_formation, 1000, "kJ/mol");
  if (figures.solid_formation.figure)
    add("formation enthalpy, solid", figures.solid_formation, 1000, "kJ/mol");
  add("enthalpy of vaporisation", figures.vaporisation_298, 1000, "kJ/mol");
  for (const HeatCapacityAt& point : figures.cp_gas) {
    if (!point.figure.figure && point.temperature > 299) continue;
    add("heat capacity, gas, " + machine_number(point.temperature) + " K", point.figure, 1, "J/(mol K)");
  }
  add("heat capacity, liquid", figures.cp_liquid_298, 1, "J/(mol K)");
  page.blocks.push_back(std::move(table));

  if (!species.bonds.empty()) {
    Table bonds;
    bonds.columns = {column("bond", Align::Left), column("count", Align::Right)};
    for (const molecule::BondCount& bond : species.bonds) {
      bonds.rows.push_back(
          row(RowRole::Body, {cell(molecule::spelling(bond.type)), number(std::to_string(bond.count))}));
    }
    page.blocks.push_back(std::move(bonds));
  }
  for (const std::string& text : figures.notes) page.blocks.push_back(note(NoteKind::Info, text));
  for (const std::string& text : figures.cautions) page.blocks.push_back(note(NoteKind::Caution, text));
  return write_text(page);
}

}  // namespace heatledger::page
