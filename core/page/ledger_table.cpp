// The ledger as a table: a row per species that unfolds to its bond lines, the spine between broken and
// formed, totals, corrections, the figure as written.
#include <cmath>

#include "core/balance/bond_words.hpp"
#include "core/balance/checker.hpp"
#include "core/base/number_text.hpp"
#include "core/page/cells.hpp"
#include "core/page/figures.hpp"
#include "core/page/reaction_blocks.hpp"

namespace heatledger::page {
namespace {

/// Columns left of the ± that a label of a total spans: species, ×, structure, kJ/mol, bonds − table, broken.
constexpr int kLabelSpan = 6;

std::vector<Column> ledger_columns(bool checker) {
  std::vector<Column> columns{column("species", "Species"),
                              column("times", "\u00d7", Align::Right),
                              column("structure", "Structure"),
                              column("per_mole", "kJ/mol", Align::Right),
                              column("minus_table", "bonds \u2212 table", Align::Right),
                              column("broken", "Broken, kJ", Align::Right),
                              column("formed", "Formed, kJ", Align::Right),
                              column("u95", "\u00b1", Align::Right)};
  columns[5].spine_after = true;
  if (checker) {
    columns.push_back(column("review", "Under review", Align::Right));
    columns.push_back(column("finding", "Finding"));
  }
  return columns;
}

std::string structure_text(const balance::ReactionSpecies& entry) {
  if (!entry.species->composition) return "no formula";
  std::string formula = molecule::display_formula(*entry.species->composition);
  // Hill order puts H behind a halogen without carbon; nobody writes an acid so.
  for (const char* acid : {"ClH", "BrH", "FH"}) {
    if (formula == acid) formula = "H" + formula.substr(0, formula.size() - 1);
  }
  return formula;
}

class LedgerTable {
 public:
  LedgerTable(const ReactionView& view, const balance::Review* review)
      : view_(view), ledger_(*view.result.shown()), review_(review), decimals_(ledger_decimals(ledger_)) {}

  Table build() {
    table_.id = view_.sheet.id + ".ledger";
    table_.look = TableLook::Ledger;
    table_.columns = ledger_columns(review_ != nullptr);
    for (std::size_t i = 0; i < ledger_.rows.size(); ++i) add_species(i);
    if (view_.result.ledger != nullptr) {
      add_sums();
      add_totals();
    }
    return std::move(table_);
  }

 private:
  const balance::ReactionSpecies& species(std::size_t row) const {
    return ledger_.reaction->species[ledger_.rows[row].species];
  }

  void add_species(std::size_t index) {
    const balance::LedgerRow& entry = ledger_.rows[index];
    const balance::ReactionSpecies& written = species(index);
    const std::string id = row_id(view_.sheet, index);
    Row row = row_of(id);
    const bool unfolds = entry.unfolds();
    if (unfolds) {
      row.fold_id = id;
      row.open = view_.open_rows.count(id) != 0;
    }
    Cell name = label_cell(balance::display_species(written));
    name.id = id + ".species";
    name.has_working = true;
    row.cells.push_back(std::move(name));
    row.cells.push_back(times_cell(id + ".times", written));
    Cell structure = label_cell(structure_text(written));
    structure.hint = written.species->canonical;
    row.cells.push_back(std::move(structure));
    if (entry.per_mole) {
      row.cells.push_back(figure_cell(id + ".per_mole", kj(entry.per_mole->value(), decimals_)));
    } else {
      Cell missing =
          figure_cell(id + ".per_mole", entry.missing.empty() ? "no value" : "bond missing", Tone::Caution);
      missing.hint = entry.remark;
      missing.kind = CellKind::Label;
      row.cells.push_back(std::move(missing));
    }
    std::string difference;
    if (entry.per_mole && entry.table && entry.route == balance::RowRoute::Bonds) {
      difference = display_signed((entry.per_mole->value() - entry.table->value()) / 1000, decimals_);
    }
    row.cells.push_back(figure_cell(id + ".minus_table", difference));
    const std::string in_equation = entry.in_equation ? kj(entry.in_equation->value(), decimals_) : "";
    row.cells.push_back(figure_cell(id + ".broken", written.product ? "" : in_equation, Tone::Broken));
    row.cells.push_back(figure_cell(id + ".formed", written.product ? in_equation : "", Tone::Formed));
    row.cells.push_back(
        figure_cell(id + ".u95", entry.in_equation ? half_width_kj(entry.in_equation->u95(), decimals_) : "",
                    Tone::Quiet));
    const bool open = row.open;
    finish(std::move(row), "row." + std::to_string(index) + ".in_equation");
    if (open) {
      for (std::size_t line = 0; line < entry.lines.size(); ++line) add_line(index, line);
      if (entry.context != nullptr) add_context_lines(index);
    }
    if (!entry.remark.empty() && (open || entry.route != balance::RowRoute::Bonds))
      add_remark(id, entry.remark);
  }

  Cell times_cell(const std::string& id, const balance::ReactionSpecies& written) const {
    Cell times = typed_cell(id, coefficient_text(written.term.coefficient), "1", CellKind::Number);
    const auto rejected = view_.rejected.find(id);
    if (rejected != view_.rejected.end()) {
      times.text = rejected->second.text;
      times.edit_text = rejected->second.text;
      times.tone = Tone::Caution;
    }
    return times;
  }

  void add_line(std::size_t index, std::size_t line_index) {
    const balance::BondLine& line = ledger_.rows[index].lines[line_index];
    const balance::ReactionSpecies& written = species(index);
    const std::string id = row_id(view_.sheet, index) + ".line." + std::to_string(line_index);
    Row row = row_of(id, RowRole::Detail);
    Cell bond = label_cell(line.label, Tone::Quiet, 2);
    bond.hint = line.remark;
    row.cells.push_back(std::move(bond));
    const std::string times = coefficient_text(written.term.coefficient);
    row.cells.push_back(label_cell(line.count_text + (times == "1" ? "" : " \u00d7 " + times), Tone::Quiet));
    const bool user = line.price != nullptr && line.price->origin == estimate::BondOrigin::User;
    row.cells.push_back(figure_cell(id + ".each", line.price_text,
                                    line.priced() ? Tone::Quiet : Tone::Caution,
                                    user ? Origin::Typed : Origin::Published));
    row.cells.push_back(label_cell(user ? "typed" : "", Tone::Quiet));
    const std::string total = line.priced() ? balance::ledger_kj(line.per_mole * written.coefficient()) : "";
    row.cells.push_back(figure_cell(id + ".total", written.product ? "" : total, Tone::Quiet));
    row.cells.push_back(figure_cell(id + ".total", written.product ? total : "", Tone::Quiet));
    row.cells.push_back(label_cell(""));
    finish(std::move(row),
           "row." + std::to_string(index) + ".line." + std::to_string(line_index) + ".per_mole");
  }

  /// The lines of an estimate, rounded so that they add up to the row.
  void add_context_lines(std::size_t index) {
    const balance::LedgerRow& entry = ledger_.rows[index];
    const balance::ReactionSpecies& written = species(index);
    const double times = written.coefficient();
    std::vector<double> totals;
    for (const estimate::ContextLine& line : entry.context->lines)
      totals.push_back(times * line.total / 1000);
    const std::vector<double> shown =
        rounded_to_add_up(0, totals, entry.in_equation->value() / 1000, decimals_);
    for (std::size_t i = 0; i < shown.size(); ++i) add_context_line(index, i, shown[i]);
  }

  void add_context_line(std::size_t index, std::size_t line_index, double total) {
    const estimate::ContextLine& line = ledger_.rows[index].context->lines[line_index];
    const balance::ReactionSpecies& written = species(index);
    const std::string id = row_id(view_.sheet, index) + ".line." + std::to_string(line_index);
    const bool bond = line.kind == estimate::LineKind::Bond;
    Row row = row_of(id, RowRole::Detail);
    Cell what =
        label_cell(bond ? line.bond + (line.text.empty() ? "" : " " + line.text) : line.text, Tone::Quiet, 2);
    if (line.unseen > 0) what.hint = "No compound of the table has these surroundings: the \u00b1 is wider.";
    row.cells.push_back(std::move(what));
    const std::string times = coefficient_text(written.term.coefficient);
    const std::string count = bond ? machine_number(line.count, 6) : std::string();
    row.cells.push_back(label_cell(times == "1"    ? count
                                   : count.empty() ? "\u00d7 " + times
                                                   : count + " \u00d7 " + times,
                                   Tone::Quiet));
    std::string each = bond ? display_number(line.base / 1000, 1) : display_signed(line.total / 1000, 1);
    if (bond && line.surroundings != 0) {
      each += line.surroundings < 0 ? " \u2212 " : " + ";
      each += display_number(std::fabs(line.surroundings) / 1000, 1);
    }
    row.cells.push_back(figure_cell(id + ".each", each, Tone::Quiet, Origin::Estimated));
    row.cells.push_back(label_cell(line.unseen > 0 ? "unseen" : "", Tone::Quiet));
    const std::string shown = display_number(total, decimals_);
    row.cells.push_back(figure_cell(id + ".total", written.product ? "" : shown, Tone::Quiet));
    row.cells.push_back(figure_cell(id + ".total", written.product ? shown : "", Tone::Quiet));
    row.cells.push_back(label_cell(""));
    finish(std::move(row), "");
  }

  /// Puts a row into the table; with the checker's column shown, adds the figure under review and what it
  /// turned out to be. @param figure  what it is held against, see balance/checker.hpp; empty: nothing
  void finish(Row row, const std::string& figure) {
    if (review_ != nullptr) {
      if (figure.empty()) {
        row.cells.push_back(label_cell(""));
        row.cells.push_back(label_cell(""));
      } else {
        const auto typed = view_.sheet.checker.find(figure);
        row.cells.push_back(typed_cell(view_.sheet.id + ".check." + figure,
                                       typed == view_.sheet.checker.end() ? "" : typed->second, "\u2013",
                                       CellKind::Number));
        row.cells.push_back(finding_cell(figure));
      }
    }
    table_.rows.push_back(std::move(row));
  }

  Cell finding_cell(const std::string& figure) const {
    for (const balance::CheckedLine& line : review_->lines) {
      if (line.cell != figure) continue;
      const bool fine = line.verdict == balance::Verdict::Agrees;
      return label_cell(line.finding.empty() && fine ? "agrees" : line.finding,
                        fine ? Tone::Good : Tone::Caution);
    }
    return label_cell("");
  }

  void add_remark(const std::string& id, const std::string& remark) {
    Row row = row_of(id + ".remark", RowRole::Detail);
    row.cells = {label_cell(remark, Tone::Quiet, kLabelSpan - 1), label_cell(""), label_cell(""),
                 label_cell("")};
    finish(std::move(row), "");
  }

  /// One row for both sums; with the checker's column shown a row for each, since each has its own figure
  /// there.
  void add_sums() {
    const std::string broken = ledger_.broken ? kj(ledger_.broken->value(), decimals_) : "";
    const std::string formed = ledger_.formed ? kj(ledger_.formed->value(), decimals_) : "";
    if (review_ == nullptr) {
      add_sum("Sum of bonds", broken, formed, "");
    } else {
      add_sum("Sum of bonds broken", broken, "", "broken");
      add_sum("Sum of bonds formed", "", formed, "formed");
    }
  }

  void add_sum(const std::string& what, const std::string& broken, const std::string& formed,
               const std::string& figure) {
    const std::string id = view_.sheet.id + ".sum";
    Row row = row_of(figure.empty() ? id : id + "." + figure + ".row", RowRole::Subtotal);
    row.cells = {label_cell(what, Tone::Strong, kLabelSpan - 1),
                 figure_cell(id + ".broken", broken, Tone::Broken),
                 figure_cell(id + ".formed", formed, Tone::Formed), label_cell("")};
    finish(std::move(row), figure);
  }

  /// One line under the sums: what, figure, ±.
  /// @param decimals  of the value; the \u00b1 keeps its own
  void add_total(const std::string& id, const std::string& what,
                 const std::optional<uncertainty::Quantity>& value, double factor, RowRole role,
                 const std::string& why_not, const std::string& figure,
                 const std::optional<int>& decimals_of_sum = {}, const std::optional<double>& rounded = {}) {
    Row row = row_of(id, role);
    const Tone tone = role == RowRole::Result ? Tone::Strong : Tone::Plain;
    row.cells.push_back(label_cell(what, tone, kLabelSpan));
    if (value) {
      const uncertainty::Quantity scaled = value->scaled(factor);
      const int decimals = role == RowRole::Result ? total_decimals(scaled) : decimals_kj(scaled.u95());
      const double shown = rounded ? 1000 * *rounded : scaled.value();
      row.cells.push_back(
          figure_cell(id, signed_unless_result(shown, decimals_of_sum.value_or(decimals), role), tone));
      row.cells.push_back(figure_cell(id + ".u95", half_width_kj(scaled.u95(), decimals), Tone::Quiet));
    } else {
      Cell missing = figure_cell(id, "no value", Tone::Caution);
      missing.kind = CellKind::Label;
      missing.hint = why_not;
      row.cells.push_back(std::move(missing));
      row.cells.push_back(label_cell(""));
    }
    finish(std::move(row), figure);
  }

  int total_decimals(const uncertainty::Quantity& total) const {
    return total.u95() > 0 ? decimals_kj(total.u95()) : decimals_;
  }

  static std::string signed_unless_result(double joule, int decimals, RowRole role) {
    return role == RowRole::Result ? kj(joule, decimals) : signed_kj(joule, decimals);
  }

  void add_totals() {
    const std::string& id = view_.sheet.id;
    const balance::Basis& basis = ledger_.basis;
    const bool scaled = basis.kind != balance::Basis::Kind::AsWritten;
    if (basis.factor != 1) {
      add_total(id + ".difference", "Broken \u2212 formed, as written, kJ", ledger_.gas_298, 1,
                RowRole::Subtotal, missing_words(), "gas_298");
    }
    const PrintedSum sum =
        printed_sum(ledger_.gas_298, ledger_.corrections, ledger_.as_written, basis.factor);
    add_total(id + ".gas_298", "Broken \u2212 formed, " + (scaled ? basis.text + ", " : "") + basis.unit,
              ledger_.gas_298, basis.factor, RowRole::Result, missing_words(),
              basis.factor != 1 ? "gas_298.on_basis" : "gas_298", sum.decimals);
    for (std::size_t i = 0; i < ledger_.corrections.size(); ++i) {
      const balance::Correction& correction = ledger_.corrections[i];
      add_total(id + ".correction." + std::to_string(i), correction.what, correction.value, basis.factor,
                RowRole::Correction, correction.why_not, "correction." + std::to_string(i), sum.decimals,
                sum.line(i));
    }
    add_total(id + ".as_written", "As written, 25 \u00b0C, " + basis.unit, ledger_.as_written, basis.factor,
              RowRole::Result, "A line above has no value.",
              basis.factor != 1 ? "as_written.on_basis" : "as_written", sum.decimals);
  }

  /// Which bonds the set does not price, for the total that is missing because of them.
  std::string missing_words() const {
    std::string text;
    for (const balance::LedgerRow& row : ledger_.rows) {
      for (const molecule::BondType& type : row.missing) {
        const std::string bond = balance::bond_label(type);
        if (text.find(bond) == std::string::npos) text += (text.empty() ? "" : ", ") + bond;
      }
    }
    for (const balance::LedgerRow& row : ledger_.rows) {
      if (ledger_.in_context && !row.per_mole) return row.remark;
    }
    if (text.empty()) return "A species has no bond sum.";
    return "The bond set has no value for " + text + ": type one below, with its source.";
  }

  const ReactionView& view_;
  const balance::Ledger& ledger_;
  const balance::Review* review_;  ///< null: the checker's column is not shown
  int decimals_;
  Table table_;
};

}  // namespace

Table ledger_table(const ReactionView& view, const balance::Review* review) {
  return LedgerTable(view, review).build();
}

}  // namespace heatledger::page
