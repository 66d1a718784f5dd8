#include "core/page/reaction_blocks.hpp"

#include <algorithm>

#include "core/base/number_text.hpp"
#include "core/molecule/elements.hpp"
#include "core/page/cells.hpp"
#include "core/page/figures.hpp"

namespace heatledger::page {
namespace {

std::string element_words(int key) {
  if (key == -1) return "charge";
  const int mass = key / 1000, element = key % 1000;
  std::string words(molecule::symbol(element));
  if (mass == 0) return words;
  if (element == 1 && mass == 2) return "D";
  if (element == 1 && mass == 3) return "T";
  return std::to_string(mass) + words;
}

std::string amount(double value) {
  return machine_number(value, 6);
}

/// "balanced: C 6, H 11, N 1, O 2", or what each side has where they differ.
std::string balance_words(const balance::Reaction& reaction) {
  if (!reaction.checkable) return "element balance not checkable";
  std::string text = reaction.balance.balanced ? "balanced: " : "not balanced: ";
  bool first = true;
  for (const molecule::ElementBalance& element : reaction.balance.elements) {
    const bool equal = element.left == element.right;
    if (!reaction.balance.balanced && equal) continue;
    if (!first) text += ", ";
    first = false;
    text += element_words(element.key) + " " + amount(element.left);
    if (!equal) text += " \u2192 " + amount(element.right);
  }
  return text;
}

/// The error in one line: sentence, place, what to do.
std::string error_words(const Error& error) {
  std::string text = error.message;
  if (!error.where.empty() && error.where.compare(0, 7, "offset ") == 0) text += " (" + error.where + ")";
  if (!error.hint.empty()) text += " " + error.hint;
  return text;
}

Table reaction_table(const ReactionView& view) {
  const std::string& id = view.sheet.id;
  Table table;
  table.id = id + ".reaction";
  table.look = TableLook::Banner;
  table.columns = {column("equation", ""), column("balance", "", Align::Right, 0.3)};
  if (view.count > 1 || !view.sheet.title.empty()) {
    Row title = row_of(id + ".reaction.title");
    title.cells = {typed_cell(id + ".title", view.sheet.title, "name of this step")};
    title.cells.back().span = 2;
    title.cells.back().tone = Tone::Strong;
    table.rows.push_back(std::move(title));
  }
  Row row = row_of(id + ".reaction.equation", RowRole::Result);
  Cell equation =
      typed_cell(id + ".equation", view.sheet.equation,
                 "type a reaction: nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)", CellKind::Equation);
  const std::shared_ptr<const balance::Reaction>& reaction = view.result.reaction;
  if (reaction != nullptr) {
    equation.text = balance::display_equation(*reaction);
  } else if (!view.sheet.equation.empty()) {
    equation.tone = Tone::Caution;
  }
  row.cells.push_back(std::move(equation));
  Cell balance;
  if (reaction != nullptr) {
    balance = figure_cell(id + ".balance", balance_words(*reaction),
                          !reaction->checkable || !reaction->balance.balanced ? Tone::Caution : Tone::Good);
    balance.kind = CellKind::Label;
  }
  row.cells.push_back(std::move(balance));
  table.rows.push_back(std::move(row));
  if (reaction != nullptr && !reaction->balance.balanced) {
    for (std::size_t i = 0; i < reaction->proposals.size(); ++i) {
      const std::string cell = id + ".proposal." + std::to_string(i);
      Row proposal = row_of(cell + ".row");
      proposal.screen_only = true;
      proposal.cells = {button_cell(cell, "Take " + reaction->proposals[i], "balances the equation"),
                        label_cell("")};
      table.rows.push_back(std::move(proposal));
    }
  }
  return table;
}

/// Notes under the equation: its error, what a species was read as, an option that could not be followed.
void add_equation_notes(const ReactionView& view, std::vector<Block>& blocks) {
  const std::string& id = view.sheet.id;
  if (view.result.error && view.result.error->code != "ledger.not_balanced") {
    blocks.push_back(
        note_block(id + ".error", NoteKind::Error, error_words(*view.result.error), {id + ".equation"}));
  }
  if (view.result.reaction != nullptr) {
    const balance::Reaction& reaction = *view.result.reaction;
    if (!reaction.balance.balanced && reaction.checkable) {
      std::string text = reaction.why_unbalanced;
      if (text.empty() && view.result.error) text = error_words(*view.result.error);
      if (!text.empty())
        blocks.push_back(note_block(id + ".unbalanced", NoteKind::Error, text, {id + ".equation"}));
    }
    // A ledger lists these among its own notes.
    for (std::size_t i = 0; view.result.ledger == nullptr && i < reaction.species.size(); ++i) {
      const std::string& note = reaction.species[i].species->note;
      if (!note.empty()) {
        blocks.push_back(
            note_block(id + ".species." + std::to_string(i), NoteKind::Info, note, {id + ".equation"}));
      }
    }
  }
  for (std::size_t i = 0; i < view.result.option_errors.size(); ++i) {
    const Error& error = view.result.option_errors[i];
    const std::string field = error.where.substr(0, error.where.find(','));
    blocks.push_back(note_block(id + ".option" + (i == 0 ? "" : "." + std::to_string(i)), NoteKind::Error,
                                error_words(error),
                                {id + "." + (field == "pinned_route" ? "route" : field)}));
  }
  for (auto entry = view.rejected.lower_bound(id + "."); entry != view.rejected.end(); ++entry) {
    if (entry->first.compare(0, id.size() + 1, id + ".") != 0) break;
    blocks.push_back(note_block(
        entry->first + ".rejected", NoteKind::Error,
        "\"" + entry->second.text + "\" was not taken: " + error_words(entry->second.error), {entry->first}));
  }
}

const std::vector<std::pair<std::string, std::string>>& bond_set_titles() {
  static const std::vector<std::pair<std::string, std::string>> titles = [] {
    std::vector<std::pair<std::string, std::string>> list;
    for (const std::string& name : estimate::BondSet::names()) {
      const Result<estimate::BondSet> set = estimate::BondSet::published(name);
      if (set) list.emplace_back(name, set->title());
    }
    return list;
  }();
  return titles;
}

Cell choice_cell(std::string id, std::string text, std::string raw, std::vector<std::string> choices) {
  Cell cell = typed_cell(std::move(id), std::move(text), "", CellKind::Choice);
  cell.edit_text = std::move(raw);
  cell.choices = std::move(choices);
  return cell;
}

Cell bond_set_cell(const ReactionView& view) {
  std::string shown = view.sheet.bond_set;
  std::vector<std::string> choices;
  for (const auto& title : bond_set_titles()) {
    choices.push_back(title.second);
    if (title.first == view.sheet.bond_set || (view.sheet.bond_set.empty() && choices.size() == 1))
      shown = title.second;
  }
  choices.push_back(route_words(document::kContextSet));
  if (view.sheet.bond_set == document::kContextSet) shown = choices.back();
  return choice_cell(view.sheet.id + ".bond_set", shown, shown, std::move(choices));
}

Cell basis_cell(const ReactionView& view) {
  std::vector<std::string> choices;
  std::string shown = view.sheet.basis;
  if (view.result.reaction != nullptr) {
    for (const balance::BasisChoice& choice : balance::basis_choices(*view.result.reaction)) {
      if (choice.name == view.sheet.basis) shown = choice.text;
      choices.push_back(choice.text);
    }
  }
  return choice_cell(view.sheet.id + ".basis", shown, shown, std::move(choices));
}

Cell route_cell(const ReactionView& view) {
  const std::string best = "the best there is";
  std::vector<std::string> choices{best};
  if (view.result.ledger != nullptr) {
    for (const balance::Route& route : view.result.ledger->routes) choices.push_back(route_words(route.name));
  }
  const std::string shown = view.sheet.pinned_route.empty() ? best : route_words(view.sheet.pinned_route);
  return choice_cell(view.sheet.id + ".route", shown, shown, std::move(choices));
}

/// A blank for a condition of the reaction; a text that cannot be read stands in the ink of a caution.
Cell condition_cell(const ReactionView& view, const char* field, const std::string& text, const char* hint) {
  Cell cell = typed_cell(view.sheet.id + "." + field, text, hint, CellKind::Number);
  for (const Error& error : view.result.option_errors) {
    if (error.where.compare(0, std::string(field).size(), field) == 0) cell.tone = Tone::Caution;
  }
  return cell;
}

bool shows_measured(const document::ReactionSheet& sheet) {
  return sheet.show_measured || !sheet.measured.blank();
}

Table options_table(const ReactionView& view) {
  const std::string& id = view.sheet.id;
  Table table;
  table.id = id + ".options";
  table.look = TableLook::Form;
  table.columns = {column("name", ""), column("value", ""), column("name_2", ""), column("value_2", "")};
  Row first = row_of(id + ".options.1");
  first.cells = {label_cell("Bond values", Tone::Quiet), bond_set_cell(view),
                 label_cell("Figures", Tone::Quiet), basis_cell(view)};
  Row second = row_of(id + ".options.2");
  second.cells = {label_cell("Figure taken", Tone::Quiet), route_cell(view), label_cell("", Tone::Quiet, 2)};
  Row temperatures = row_of(id + ".options.temperatures");
  temperatures.cells = {label_cell("Reactants at", Tone::Quiet),
                        condition_cell(view, "reactants_at", view.sheet.reactants_at, "25 degC"),
                        label_cell("Products at", Tone::Quiet),
                        condition_cell(view, "products_at", view.sheet.products_at, "25 degC")};
  Row pressure = row_of(id + ".options.pressure");
  pressure.cells = {label_cell("Pressure of gases", Tone::Quiet),
                    condition_cell(view, "pressure", view.sheet.pressure, "ideal gas"),
                    label_cell("", Tone::Quiet, 2)};
  Row third = row_of(id + ".options.3");
  third.screen_only = true;
  const std::vector<std::string> shows{"nothing more", "enthalpy profile", "checker's column",
                                       "enthalpy profile and checker's column"};
  const std::string shown = shows[(view.sheet.show_profile ? 1U : 0U) + (view.sheet.show_checker ? 2U : 0U)];
  third.cells = {label_cell("Also show", Tone::Quiet), choice_cell(id + ".show", shown, shown, shows),
                 shows_measured(view.sheet)
                     ? label_cell("", Tone::Quiet, 2)
                     : button_cell(id + ".measure", "Type a measured heat",
                                   "goes before every other route, unless one is pinned")};
  third.cells.back().span = 2;
  table.rows = {std::move(first), std::move(second), std::move(temperatures), std::move(pressure),
                std::move(third)};
  return table;
}

Table move_table(const ReactionView& view) {
  const std::string& id = view.sheet.id;
  Table table;
  table.id = id + ".arrange";
  table.look = TableLook::Form;
  table.columns = {column("up", ""), column("down", ""), column("remove", "")};
  Row row = row_of(id + ".arrange.row");
  row.screen_only = true;
  row.cells = {view.number > 1 ? button_cell(id + ".move_up", "Move up") : label_cell(""),
               view.number < view.count ? button_cell(id + ".move_down", "Move down") : label_cell(""),
               button_cell(id + ".remove", "Remove this reaction")};
  table.rows.push_back(std::move(row));
  return table;
}

void add_review_notes(const ReactionView& view, const balance::Review& review, std::vector<Block>& blocks) {
  const std::string id = view.sheet.id + ".review";
  if (view.sheet.checker.empty()) {
    blocks.push_back(
        note_block(id, NoteKind::Info,
                   "Checker's column: type the figures that stand on the sheet under review; a difference is "
                   "traced to the slip that makes it."));
    return;
  }
  blocks.push_back(note_block(id, review.agrees ? NoteKind::Info : NoteKind::Disagreement, review.summary));
  for (std::size_t i = 0; i < review.alternatives.size(); ++i) {
    blocks.push_back(note_block(id + "." + std::to_string(i), NoteKind::Info,
                                "The same figures would come from: " + review.alternatives[i].words + "."));
  }
}

void add_ledger_blocks(const ReactionView& view, std::vector<Block>& blocks) {
  const std::string& id = view.sheet.id;
  const balance::Ledger& ledger = *view.result.ledger;
  blocks.push_back(heading_block(id + ".ledger.heading",
                                 ledger.in_context ? "Ledger of bonds in context" : "Bond ledger",
                                 "gas, 25 \u00b0C \u00b7 " + ledger.basis.text));
  blocks.push_back(options_table(view));
  if (shows_measured(view.sheet)) blocks.push_back(measured_table(view));
  if (!ledger.measured_lines.empty()) blocks.push_back(measured_lines_table(view));
  if (view.sheet.show_checker) {
    const balance::Review review = balance::review_sheet(ledger, view.sheet.checker);
    blocks.push_back(ledger_table(view, &review));
    add_review_notes(view, review, blocks);
  } else {
    blocks.push_back(ledger_table(view, nullptr));
  }
  for (std::size_t i = 0; i < ledger.notes.size(); ++i) {
    blocks.push_back(note_block(id + ".note." + std::to_string(i), NoteKind::Info, ledger.notes[i]));
  }
  blocks.push_back(heading_block(id + ".result.heading", "Result"));
  blocks.push_back(result_table(view));
  if (ledger.reactants_at || ledger.products_at) blocks.push_back(run_table(view));
  blocks.push_back(note_block(
      id + ".covers", NoteKind::Info,
      "\u00b1 covers the data of the reaction written above. Side reactions, decomposition and the rate "
      "are not in it."));
  blocks.push_back(heading_block(id + ".routes.heading", "What each route says"));
  blocks.push_back(routes_table(view));
  Drawing routes = routes_drawing(id + ".routes.drawing", ledger);
  if (!routes.strokes.empty()) blocks.push_back(std::move(routes));
  if (view.sheet.show_profile) {
    Drawing profile = profile_drawing(id + ".profile", ledger);
    if (!profile.strokes.empty()) {
      blocks.push_back(heading_block(id + ".profile.heading", "Enthalpy profile, to scale"));
      blocks.push_back(std::move(profile));
    }
  }
  for (std::size_t i = 0; i < ledger.cautions.size(); ++i) {
    blocks.push_back(note_block(id + ".caution." + std::to_string(i), NoteKind::Caution, ledger.cautions[i]));
  }
}

Table note_table(const ReactionView& view) {
  const std::string& id = view.sheet.id;
  Table table;
  table.id = id + ".remark";
  table.columns = {column("text", "")};
  Row row = row_of(id + ".remark.row");
  row.cells = {typed_cell(id + ".note", view.sheet.note, "remark on this reaction")};
  table.rows.push_back(std::move(row));
  return table;
}

}  // namespace

std::string row_id(const document::ReactionSheet& sheet, std::size_t row) {
  return sheet.id + ".row." + std::to_string(row);
}

std::vector<Block> reaction_blocks(const ReactionView& view) {
  const std::string& id = view.sheet.id;
  std::vector<Block> blocks;
  blocks.push_back(heading_block(id + ".heading",
                                 view.count > 1 ? "Reaction " + std::to_string(view.number) : "Reaction"));
  blocks.push_back(reaction_table(view));
  add_equation_notes(view, blocks);
  if (view.result.ledger != nullptr) {
    add_ledger_blocks(view, blocks);
  } else if (view.result.rows != nullptr) {
    // The coefficient that was just typed stays where it was typed.
    blocks.push_back(
        heading_block(id + ".ledger.heading", "Bond ledger", "no sums: the equation does not balance"));
    blocks.push_back(options_table(view));
    if (shows_measured(view.sheet)) blocks.push_back(measured_table(view));
    blocks.push_back(ledger_table(view, nullptr));
  }
  blocks.push_back(note_table(view));
  if (view.count > 1) blocks.push_back(move_table(view));
  return blocks;
}

}  // namespace heatledger::page
