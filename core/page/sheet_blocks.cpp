#include "core/page/sheet_blocks.hpp"

#include "core/page/cells.hpp"

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
  for (std::size_t i = 0; i < errors.size(); ++i) {
    // "bonds[2].value, offset 3" belongs to the cell "bond.2.value".
    const std::string& where = errors[i].where;
    const std::size_t open = where.find('['), close = where.find(']');
    std::vector<std::string> cells;
    if (open != std::string::npos && close != std::string::npos) {
      const std::string field = where.compare(close + 2, 4, "bond") == 0 ? ".bond" : ".value";
      cells.push_back("bond." + where.substr(open + 1, close - open - 1) + field);
    }
    std::string text = errors[i].message;
    if (!errors[i].hint.empty()) text += " " + errors[i].hint;
    blocks.push_back(note_block("bonds.error." + std::to_string(i), NoteKind::Error, text, cells));
  }
  return blocks;
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
      "A typed value without \u00b1 counts as exact.",
      "Figures are added before they are rounded for print, so that a printed sum may differ by one in its "
      "last digit.",
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
