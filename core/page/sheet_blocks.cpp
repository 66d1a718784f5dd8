#include "core/page/sheet_blocks.hpp"

#include "core/base/number_text.hpp"
#include "core/page/cells.hpp"
#include "core/page/figures.hpp"
#include "core/units/display.hpp"

namespace heatledger::page {
namespace {

Row form_row(const std::string& id, Cell first_name, Cell first, Cell second_name, Cell second) {
  Row row = row_of(id);
  row.cells = {std::move(first_name), std::move(first), std::move(second_name), std::move(second)};
  return row;
}

/// A list of numbered or plain lines with an empty one at the end to type the next into.
Table lines_table(const std::string& id, const std::string& stem, const document::Lines& lines, bool numbered,
                  const std::string& hint) {
  Table table;
  table.id = id;
  if (numbered) table.columns.push_back(column("number", "", Align::Right, 0.05));
  table.columns.push_back(column("text", ""));
  for (std::size_t i = 0; i <= lines.size(); ++i) {
    const std::string cell = stem + "." + std::to_string(i);
    Row row = row_of(cell + ".row");
    const bool last = i == lines.size();
    if (numbered) row.cells.push_back(label_cell(last ? "" : std::to_string(i + 1) + ".", Tone::Quiet));
    row.cells.push_back(typed_cell(cell, last ? "" : lines[i], last ? hint : ""));
    table.rows.push_back(std::move(row));
  }
  return table;
}

/// Errors of one list of typed entries, each tied to its cell.
void add_error_notes(const std::string& list, const std::vector<Error>& errors, std::vector<Block>& blocks) {
  static const document::Worksheet no_reactions;
  std::size_t shown = 0;
  for (const Error& error : errors) {
    if (error.where.compare(0, list.size() + 1, list + "[") != 0) continue;
    std::string text = error.message;
    if (!error.hint.empty()) text += " " + error.hint;
    blocks.push_back(note_block(list + ".error." + std::to_string(shown++), NoteKind::Error, text,
                                {cell_of_path(error.where, no_reactions)}));
  }
}

/// The row's figure, or any: a figure without a name covers nothing.
const document::FigureName* name_or_first(const document::FigureName* name) {
  return name != nullptr ? name : &document::typed_figure_names().front();
}

/// What the typed figure covers: the published one with its source, or nothing.
Cell replaced_cell(const std::string& id, const document::FigureName& name, const document::ReadFigure& read,
                   const document::TypedFigure& entry) {
  if (read.published) {
    Cell cell =
        figure_cell(id + ".published", published_figure(read.published->value, read.published->u95, name),
                    Tone::Quiet, Origin::Published);
    cell.hint = std::string(read.published->source);
    return cell;
  }
  std::string text = read.new_species ? "new species" : read.value ? "nothing published" : "";
  if (!entry.from.empty()) text += (text.empty() ? "" : "; ") + ("site table " + entry.from);
  return label_cell(text, Tone::Quiet);
}

}  // namespace

std::vector<Block> title_blocks(const document::Header& header) {
  Table banner;
  banner.id = "sheet";
  banner.look = TableLook::Banner;
  banner.columns = {column("title", "")};
  Row title = row_of("sheet.title", RowRole::Result);
  title.cells = {typed_cell("header.title", header.title, "title of the sheet")};
  title.cells.back().tone = Tone::Strong;
  Row subtitle = row_of("sheet.subtitle");
  subtitle.cells = {typed_cell("header.subtitle", header.subtitle, "plant, purpose, status")};
  subtitle.cells.back().tone = Tone::Quiet;
  banner.rows = {std::move(title), std::move(subtitle)};

  Table form;
  form.id = "header";
  form.look = TableLook::Form;
  form.columns = {column("name", ""), column("value", ""), column("name_2", ""), column("value_2", "")};
  form.rows = {
      form_row("header.1", label_cell("Sheet", Tone::Quiet),
               typed_cell("header.sheet_number", header.sheet_number, "no."), label_cell("Rev", Tone::Quiet),
               typed_cell("header.revision", header.revision, "\u2013")),
      form_row("header.2", label_cell("Prepared", Tone::Quiet),
               typed_cell("header.prepared", header.prepared, "name"), label_cell("on", Tone::Quiet),
               typed_cell("header.prepared_date", header.prepared_date, "date")),
      form_row("header.3", label_cell("Checked", Tone::Quiet),
               typed_cell("header.checked", header.checked, "open"), label_cell("on", Tone::Quiet),
               typed_cell("header.checked_date", header.checked_date, "date"))};
  return {std::move(banner), std::move(form)};
}

std::vector<Block> typed_bond_blocks(const document::TypedBonds& bonds, const std::vector<Error>& errors) {
  std::vector<Block> blocks;
  blocks.push_back(heading_block("bonds.heading", "Bond values of this sheet",
                                 "each goes before the published one, wherever that bond stands"));
  Table table;
  table.id = "bonds";
  table.columns = {column("bond", "Bond", Align::Left, 0.2), column("value", "Value", Align::Right, 0.2),
                   column("source", "Source"), column("remove", "")};
  for (std::size_t i = 0; i <= bonds.size(); ++i) {
    const std::string id = "bond." + std::to_string(i);
    const bool last = i == bonds.size();
    const document::TypedBond bond = last ? document::TypedBond() : bonds[i];
    Row row = row_of(id + ".row");
    row.cells = {typed_cell(id + ".bond", bond.bond, last ? "C-Cl" : "bond"),
                 typed_cell(id + ".value", bond.value, last ? "" : "340 \u00b1 8 kJ/mol", CellKind::Number),
                 typed_cell(id + ".source", bond.source, last ? "" : "where it comes from"),
                 last ? label_cell("") : button_cell(id + ".remove", "Remove")};
    for (const Error& error : errors) {
      const std::string path = "bonds[" + std::to_string(i) + "].";
      if (error.where.compare(0, path.size(), path) != 0) continue;
      row.cells[error.where.compare(path.size(), 4, "bond") == 0 ? 0 : 1].tone = Tone::Caution;
    }
    table.rows.push_back(std::move(row));
  }
  blocks.push_back(std::move(table));
  add_error_notes("bonds", errors, blocks);
  return blocks;
}

std::vector<Block> quantity_blocks(const document::NamedQuantities& typed,
                                   const document::ReadQuantities& read, const std::vector<Error>& errors) {
  std::vector<Block> blocks;
  blocks.push_back(heading_block("quantities.heading", "Quantities of this sheet",
                                 "cells of steps, temperatures and pressures call these by name"));
  Table table;
  table.id = "quantities";
  table.columns = {column("name", "Name", Align::Left, 0.16),
                   column("value", "Written", Align::Left, 0.24),
                   column("figure", "Value", Align::Right),
                   column("unit", "Unit", Align::Left, 0.1),
                   column("note", "Note"),
                   column("remove", "")};
  for (std::size_t i = 0; i <= typed.size(); ++i) {
    const std::string id = "quantity." + std::to_string(i);
    const bool last = i == typed.size();
    const document::NamedQuantity entry = last ? document::NamedQuantity() : typed[i];
    std::string value, unit;
    if (!last && read.rows[i].figure) {
      const units::Evaluated& figure = *read.rows[i].figure;
      const units::Unit& shown = read.rows[i].shown_in ? *read.rows[i].shown_in : figure.unit;
      units::Unit bare = shown;
      bare.display.clear();
      constexpr int kMostDecimals = 4;
      value = units::print(figure.value.figure(), bare, kMostDecimals);
      unit = shown.display;
    }
    Row row = row_of(id + ".row");
    Cell figure = figure_cell(id + ".figure", value);
    figure.has_working = false;
    row.cells = {typed_cell(id + ".name", entry.name, last ? "feed_ratio" : "name"),
                 typed_cell(id + ".value", entry.value, last ? "2*(1.05-0.03) kmol/h" : "", CellKind::Number),
                 std::move(figure),
                 typed_cell(id + ".unit", entry.unit, unit),
                 typed_cell(id + ".note", entry.note, ""),
                 last ? label_cell("") : button_cell(id + ".remove", "Remove")};
    for (const Error& error : errors) {
      const std::string path = "quantities[" + std::to_string(i) + "].";
      if (error.where.compare(0, path.size(), path) != 0) continue;
      const char field = error.where[path.size()];
      row.cells[field == 'n' ? 0 : field == 'v' ? 1 : 3].tone = Tone::Caution;
    }
    table.rows.push_back(std::move(row));
  }
  blocks.push_back(std::move(table));
  add_error_notes("quantities", errors, blocks);
  return blocks;
}

std::vector<Block> typed_species_blocks(const document::TypedFigures& figures,
                                        const document::SheetLibrary& library) {
  std::vector<Block> blocks;
  blocks.push_back(heading_block("species.heading", "Species of this sheet",
                                 "figures typed here go before published ones; a new name is a new species"));
  Table table;
  table.id = "species";
  table.columns = {
      column("species", "Species", Align::Left, 0.17),  column("figure", "Figure", Align::Left, 0.2),
      column("value", "Value", Align::Right, 0.18),     column("source", "Source"),
      column("published", "In place of", Align::Right), column("remove", "")};
  std::vector<std::string> choices;
  for (const document::FigureName& name : document::typed_figure_names()) choices.emplace_back(name.words);
  for (std::size_t i = 0; i <= figures.size(); ++i) {
    const std::string id = "fact." + std::to_string(i);
    const bool last = i == figures.size();
    const document::TypedFigure entry = last ? document::TypedFigure() : figures[i];
    const document::FigureName* name = document::find_typed_figure(entry.figure);
    Row row = row_of(id + ".row");
    Cell what = typed_cell(id + ".figure", name != nullptr ? std::string(name->words) : entry.figure,
                           last ? "" : "which figure", CellKind::Choice);
    what.choices = choices;
    row.cells = {
        typed_cell(id + ".species", entry.species, last ? "name, formula or code" : "species"),
        std::move(what),
        typed_cell(id + ".value", entry.value,
                   name != nullptr && !name->unit.empty() ? "figure \u00b1, " + std::string(name->unit) : "",
                   CellKind::Number),
        typed_cell(id + ".source", entry.source, last ? "" : "where it comes from"),
        last ? label_cell("") : replaced_cell(id, *name_or_first(name), library.figures()[i], entry),
        last ? label_cell("") : button_cell(id + ".remove", "Remove")};
    for (const Error& error : library.errors()) {
      const std::string path = "species[" + std::to_string(i) + "].";
      if (error.where.compare(0, path.size(), path) != 0) continue;
      const char first = error.where[path.size()];
      row.cells[first == 's' ? 0 : first == 'f' ? 1 : 2].tone = Tone::Caution;
    }
    table.rows.push_back(std::move(row));
  }
  blocks.push_back(std::move(table));
  add_error_notes("species", library.errors(), blocks);
  return blocks;
}

std::vector<Block> exact_blocks(const std::vector<std::string>& exact, const document::Worksheet& sheet,
                                const Error* rejected) {
  if (exact.empty()) return {};
  std::vector<std::string> cells;
  for (const std::string& path : exact) cells.push_back(cell_of_path(path, sheet));
  const bool one = exact.size() == 1;
  std::string text = std::to_string(exact.size()) +
                     (one ? " typed figure has no \u00b1 and is taken as exact."
                          : " typed figures have no \u00b1 and are taken as exact.") +
                     " Type it behind the figure (340 \u00b1 8 kJ/mol), or give " +
                     (one ? "it" : "all of them") + " one here.";
  Table table;
  table.id = "exact.form";
  table.look = TableLook::Form;
  table.columns = {column("name", ""), column("value", "")};
  Row row = row_of("exact.row");
  row.screen_only = true;
  row.cells = {label_cell("\u00b1 of typed figures without one", Tone::Quiet),
               typed_cell("exact.u95", "", "3 %")};
  table.rows.push_back(std::move(row));
  std::vector<Block> blocks{note_block("exact.note", NoteKind::Caution, text, std::move(cells)),
                            std::move(table)};
  if (rejected != nullptr)
    blocks.push_back(note_block("exact.rejected", NoteKind::Error, rejected->message + " " + rejected->hint,
                                {"exact.u95"}));
  return blocks;
}

std::string cell_of_path(const std::string& path, const document::Worksheet& sheet) {
  const std::size_t open = path.find('['), close = path.find("].");
  if (open == std::string::npos || close == std::string::npos) return {};
  const std::string list = path.substr(0, open), index = path.substr(open + 1, close - open - 1);
  const std::string field = path.substr(close + 2, path.find(',') - close - 2);
  if (list == "bonds") return "bond." + index + "." + field;
  if (list == "species") return "fact." + index + "." + field;
  if (list == "quantities") return "quantity." + index + "." + field;
  std::size_t at = 0;
  for (const char c : index) at = c >= '0' && c <= '9' ? 10 * at + static_cast<std::size_t>(c - '0') : at;
  return list == "reactions" && at < sheet.reactions.size() ? sheet.reactions[at]->id + "." + field
                                                            : std::string();
}

std::vector<Block> assumption_blocks(const document::Lines& assumptions) {
  return {heading_block("assumptions.heading", "Assumptions"),
          lines_table("assumptions", "assumption", assumptions, true, "an assumption this sheet rests on")};
}

std::vector<Block> note_blocks(const document::Lines& notes) {
  return {heading_block("notes.heading", "Notes"), lines_table("notes", "remark", notes, false, "a note")};
}

std::vector<Block> convention_blocks() {
  static const std::vector<std::string> lines{
      "Heat of reaction below zero is exothermic. Bonds broken take heat, bonds formed give it.",
      "Reference state 25 \u00b0C (298.15 K) and 100 kPa. The phase written is the phase meant; nothing is "
      "boiled or condensed "
      "unasked. (aq) without a strength is infinite dilution.",
      "\u00b1 is the half width of a 95 % interval of the data of what is written. What stands on both sides "
      "cancels. Not "
      "covered: reactions that are not listed, decomposition, mixing that is not listed, human error.",
      "An average bond enthalpy is a mean over many molecules; a single molecule can lie well away from it.",
      "A typed value without \u00b1 counts as exact; the sheet counts them.",
      "Corrections and the lines of a row in context are printed so that they add up to the last digit "
      "shown. "
      "Other figures are added before they are rounded, so that a printed sum may differ by one in its last "
      "digit.",
      "Gases are taken as ideal. A measured heat goes before every other route, then formation enthalpies "
      "species by species, then bonds in context, then average bonds, unless another route is pinned.",
      "Figures for drafting: what can hurt someone is measured, and local codes and licensed practice "
      "govern."};
  Table table;
  table.id = "conventions";
  table.columns = {column("text", "")};
  for (std::size_t i = 0; i < lines.size(); ++i) {
    Row row = row_of("convention." + std::to_string(i));
    row.cells = {label_cell(lines[i], Tone::Quiet)};
    table.rows.push_back(std::move(row));
  }
  return {heading_block("conventions.heading", "Conventions"), std::move(table)};
}

std::vector<Block> opening_blocks(const std::vector<Error>& not_understood,
                                  const std::vector<std::string>& changed_figures) {
  std::vector<Block> blocks;
  for (std::size_t i = 0; i < not_understood.size(); ++i) {
    std::string text = not_understood[i].message;
    if (!not_understood[i].hint.empty()) text += " " + not_understood[i].hint;
    blocks.push_back(note_block("opening." + std::to_string(i), NoteKind::Caution, text));
  }
  for (std::size_t i = 0; i < changed_figures.size(); ++i) {
    blocks.push_back(
        note_block("opening.changed." + std::to_string(i), NoteKind::Disagreement, changed_figures[i]));
  }
  return blocks;
}

}  // namespace heatledger::page
