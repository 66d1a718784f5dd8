#include "core/page/session.hpp"

#include "core/facts/library.hpp"
#include "core/file/site_table.hpp"
#include "core/file/worksheet_file.hpp"
#include "core/page/digest.hpp"
#include "core/page/edits.hpp"
#include "core/page/margin.hpp"
#include "core/page/page_builder.hpp"

namespace heatledger::page {
namespace {

using document::State;

State make_state(document::Worksheet sheet) {
  return std::make_shared<const document::Worksheet>(std::move(sheet));
}

/// The part of a half-typed equation that names the last species, by what parts terms: where it begins.
std::size_t last_name_start(std::string_view text) {
  std::size_t start = 0;
  for (const std::string_view mark :
       {std::string_view("+ "), std::string_view("-> "), std::string_view("= "), std::string_view("\u2192 "),
        std::string_view("=> "), std::string_view("\u21cc ")}) {
    const std::size_t at = text.rfind(mark);
    if (at != std::string_view::npos) start = std::max(start, at + mark.size());
  }
  while (start < text.size() && text[start] == ' ') ++start;
  // A coefficient stands before a blank: "3 nitro" asks for names that begin with "nitro".
  std::size_t digits = start;
  while (digits < text.size() &&
         ((text[digits] >= '0' && text[digits] <= '9') || text[digits] == '.' || text[digits] == '/')) {
    ++digits;
  }
  if (digits > start && digits < text.size() && text[digits] == ' ') {
    while (digits < text.size() && text[digits] == ' ') ++digits;
    return digits;
  }
  return start;
}

}  // namespace

struct Session::State {
  explicit State(document::Worksheet sheet) : history(make_state(std::move(sheet))) {
    saved = history.current();
    refresh();
  }

  document::History history;
  document::Calculator calculator;
  document::Results results;
  std::set<std::string> open_rows;
  std::map<std::string, RejectedText> rejected;
  std::vector<Error> not_understood;
  std::vector<std::string> changed_figures;
  document::State saved;
  PageBuilder builder;
  bool stale = true;  ///< the page is behind the sheet

  const document::Worksheet& sheet() const { return *history.current(); }

  void refresh() {
    results = calculator.compute(sheet());
    stale = true;
  }

  void push(Edited edited) {
    history.push(make_state(std::move(edited.sheet)), std::move(edited.label));
    rejected.clear();
    refresh();
  }

  std::vector<Command> commands() const {
    std::vector<Command> list;
    const auto add = [&](const char* id, std::string text, const char* key, bool enabled) {
      Command command;
      command.id = id;
      command.text = std::move(text);
      command.key = key;
      command.enabled = enabled;
      list.push_back(std::move(command));
    };
    add("undo", history.can_undo() ? "Undo " + history.undo_label() : "Undo", "Ctrl+Z", history.can_undo());
    add("redo", history.can_redo() ? "Redo " + history.redo_label() : "Redo", "Ctrl+Y", history.can_redo());
    add("add_reaction", "Add a reaction", "", true);
    add("unfold_all", "Unfold all rows", "", true);
    add("fold_all", "Fold all rows", "", !open_rows.empty());
    return list;
  }

  const Page& page() {
    if (!stale) return builder.page();
    PageInput input;
    input.sheet = history.current();
    input.results = &results;
    input.open_rows = &open_rows;
    input.rejected = &rejected;
    input.not_understood = &not_understood;
    input.changed_figures = &changed_figures;
    input.commands = commands();
    stale = false;
    return builder.build(std::move(input));
  }

  /// The cell of that id on the present page; nullptr when there is none.
  const Cell* find_cell(std::string_view id) {
    if (id.empty()) return nullptr;
    for (const Block& block : page().blocks) {
      const Table* table = std::get_if<Table>(&block);
      if (table == nullptr) continue;
      for (const Row& row : table->rows) {
        for (const Cell& cell : row.cells) {
          if (cell.id == id) return &cell;
        }
      }
    }
    return nullptr;
  }

  /// Whether "r1.row.0" names a row that unfolds.
  bool can_unfold(std::string_view id) const {
    const IdParts parts = split_id(id);
    if (parts.size() != 3 || parts[1] != "row") return false;
    const std::size_t reaction = document::find_reaction(sheet(), parts[0]);
    const std::optional<std::size_t> row = id_index(parts[2]);
    if (reaction == sheet().reactions.size() || !row) return false;
    const balance::Ledger* ledger = results.reactions[reaction]->shown();
    return ledger != nullptr && *row < ledger->rows.size() && ledger->rows[*row].unfolds();
  }

  void unfold_all() {
    for (std::size_t i = 0; i < sheet().reactions.size(); ++i) {
      const balance::Ledger* ledger = results.reactions[i]->shown();
      for (std::size_t row = 0; ledger != nullptr && row < ledger->rows.size(); ++row) {
        if (ledger->rows[row].unfolds()) open_rows.insert(row_id(*sheet().reactions[i], row));
      }
    }
  }

  Status fold(const std::string& row, const std::string& state) {
    if (!can_unfold(row)) {
      return Error{"command.argument", "No row \"" + row + "\" unfolds.", "arguments.row",
                   "Give the fold_id of a row of the page."};
    }
    if (!state.empty() && state != "open" && state != "closed") {
      return Error{"command.argument", "A row is \"open\" or \"closed\".", "arguments.state", ""};
    }
    const bool open = state.empty() ? open_rows.count(row) == 0 : state == "open";
    if (open) {
      open_rows.insert(row);
    } else {
      open_rows.erase(row);
    }
    stale = true;
    return success();
  }

  std::string file_text() const { return file::write_worksheet(sheet(), results_to_save(sheet(), results)); }
};

Session::Session() : state_(std::make_unique<State>(document::empty_worksheet())) {}
Session::~Session() = default;
Session::Session(Session&&) noexcept = default;
Session& Session::operator=(Session&&) noexcept = default;

Status Session::open(std::string_view file_text) {
  Result<file::Opened> opened = file::read_worksheet(file_text);
  if (!opened && file::looks_like_site_table(file_text)) {
    return Error{"file.is_site_table", "This file is a site table, not a worksheet.", "format",
                 "Its rows are copied into the sheet that is open (import_site_table)."};
  }
  if (!opened) return opened.error();
  if (opened->sheet.reactions.empty()) opened->sheet.reactions = document::empty_worksheet().reactions;
  auto next = std::make_unique<State>(std::move(opened->sheet));
  next->not_understood = std::move(opened->not_understood);
  next->changed_figures =
      changed_figures(next->sheet(), opened->results, results_to_save(next->sheet(), next->results));
  // A face that knows the old page must see the new one as a change of it.
  next->builder = std::move(state_->builder);
  state_ = std::move(next);
  return success();
}

std::string Session::save() {
  state_->saved = state_->history.current();
  return state_->file_text();
}

std::string Session::file_text() const {
  return state_->file_text();
}

bool Session::changed_since_save() const {
  return state_->saved != state_->history.current();
}

Status Session::edit(std::string_view cell, std::string_view text) {
  if (state_->can_unfold(cell)) return state_->fold(std::string(cell), std::string(text));
  Result<Edited> edited = apply_edit(state_->sheet(), state_->results, cell, text);
  if (!edited) {
    if (edited.error().code != "edit.coefficient" && edited.error().code != "edit.half_width")
      return edited.error();
    state_->rejected[std::string(cell)] = RejectedText{std::string(text), edited.error()};
    state_->stale = true;
    return success();
  }
  state_->push(std::move(edited).value());
  return success();
}

Status Session::command(std::string_view name, const std::map<std::string, std::string>& arguments) {
  State& state = *state_;
  const auto argument = [&](const char* key) {
    const auto found = arguments.find(key);
    return found == arguments.end() ? std::string() : found->second;
  };
  if (name == "undo" || name == "redo") {
    const bool moved = name == "undo" ? state.history.undo() : state.history.redo();
    if (!moved) {
      return Error{"command.nothing_to_" + std::string(name),
                   "There is nothing to " + std::string(name) + ".", "name", ""};
    }
    state.rejected.clear();
    state.refresh();
    return success();
  }
  if (name == "fold") return state.fold(argument("row"), argument("state"));
  if (name == "unfold_all" || name == "fold_all") {
    state.open_rows.clear();
    if (name == "unfold_all") state.unfold_all();
    state.stale = true;
    return success();
  }
  if (name == "edit") return edit(argument("cell"), argument("text"));
  Result<Edited> edited = apply_command(state.sheet(), state.results, name, arguments);
  if (!edited) return edited.error();
  state.push(std::move(edited).value());
  return success();
}

const Page& Session::page() {
  return state_->page();
}
std::uint64_t Session::order_changed() const {
  return state_->builder.order_changed();
}

Result<Margin> Session::margin(std::string_view id) {
  const Cell* cell = state_->find_cell(id);
  if (cell == nullptr) {
    return Error{"edit.no_such_cell", "The sheet has no cell \"" + std::string(id.substr(0, 80)) + "\".",
                 "cell", "Ask for the page again: the sheet may have changed since."};
  }
  return make_margin(state_->sheet(), state_->results, *cell);
}

std::vector<Margin> Session::workings() {
  std::vector<Margin> list;
  for (const Block& block : page().blocks) {
    const Table* table = std::get_if<Table>(&block);
    if (table == nullptr) continue;
    for (const Row& row : table->rows) {
      for (const Cell& cell : row.cells) {
        if (!cell.has_working || cell.id.empty()) continue;
        Result<Margin> margin = make_margin(state_->sheet(), state_->results, cell);
        if (margin.ok() && !margin->steps.empty()) list.push_back(std::move(margin).value());
      }
    }
  }
  return list;
}

std::vector<Session::Suggestion> Session::suggest(std::string_view text, std::size_t limit) {
  std::vector<Suggestion> list;
  const std::size_t start = last_name_start(text);
  const std::string_view name = text.substr(start);
  if (name.empty() || limit == 0) return list;
  // Several synonyms of one compound are one suggestion: its name goes in, the synonym that matched stands
  // beside it.
  std::set<const facts::Compound*> seen;
  for (const facts::Library::Completion& found :
       state_->results.library->library().complete(name, 4 * limit)) {
    if (list.size() == limit) break;
    if (!seen.insert(found.compound).second) continue;
    Suggestion suggestion;
    suggestion.name = std::string(found.compound->name);
    suggestion.insert = std::string(text.substr(0, start)) + suggestion.name;
    suggestion.remark = std::string(found.compound->formula);
    if (found.matched != found.compound->name)
      suggestion.remark = std::string(found.matched) + ", " + suggestion.remark;
    list.push_back(std::move(suggestion));
  }
  return list;
}

}  // namespace heatledger::page
