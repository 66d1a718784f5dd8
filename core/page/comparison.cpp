#include "core/page/comparison.hpp"

#include <map>

#include "core/base/number_text.hpp"
#include "core/page/cells.hpp"
#include "core/page/session.hpp"

namespace heatledger::page {
namespace {

/// More inputs than this are listed without their effects: each takes a sheet to be computed.
constexpr std::size_t kMostEffects = 100;

struct Place {
  std::string words, text;
  std::size_t order = 0;
};
using Places = std::map<std::string, Place>;

struct Reading {
  Places inputs, results;
};

/// What stands in front of a cell in its row.
std::string row_words(const Row& row, const Cell& before) {
  for (const Cell& cell : row.cells) {
    if (&cell == &before) break;
    if (cell.kind != CellKind::Button && !cell.text.empty()) return cell.text;
  }
  return {};
}

std::string joined(std::string words, const std::string& more) {
  if (more.empty()) return words;
  return words.empty() ? more : words + ", " + more;
}

/// Every cell that is typed, and every figure of the boxes of results.
Reading read_page(const Page& page) {
  Reading reading;
  std::string heading;
  std::size_t order = 0;
  for (const Block& block : page.blocks) {
    if (const Heading* one = std::get_if<Heading>(&block)) heading = one->text;
    const Table* table = std::get_if<Table>(&block);
    if (table == nullptr) continue;
    for (const Row& row : table->rows) {
      std::size_t at = 0;
      for (const Cell& cell : row.cells) {
        const std::string column = at < table->columns.size() ? table->columns[at].heading : std::string();
        at += static_cast<std::size_t>(cell.span);
        if (cell.id.empty() || cell.kind == CellKind::Button) continue;
        const bool result = table->look == TableLook::Boxes && !cell.editable;
        if (!result && !cell.editable) continue;
        Place place;
        place.words = joined(joined(heading, row_words(row, cell)), column);
        place.text = cell.text;
        place.order = ++order;
        if (result) {
          // The unit and ± stand in the cells behind.
          const auto behind = static_cast<std::size_t>(&cell - row.cells.data()) + 1;
          for (std::size_t i = behind; i < row.cells.size() && row.cells[i].id.empty(); ++i) {
            if (!row.cells[i].text.empty()) place.text += " " + row.cells[i].text;
          }
          reading.results[cell.id] = std::move(place);
        } else {
          reading.inputs[cell.id] = std::move(place);
        }
      }
    }
  }
  return reading;
}

/// Differences in the order of the second sheet, what only the first has at the end.
std::vector<ChangedCell> differences(const Places& before, const Places& after) {
  std::map<std::pair<bool, std::size_t>, ChangedCell> ordered;
  for (const auto& [id, place] : after) {
    const auto was = before.find(id);
    const std::string text = was == before.end() ? std::string() : was->second.text;
    if (text != place.text) ordered[{false, place.order}] = {id, place.words, text, place.text};
  }
  for (const auto& [id, place] : before) {
    if (after.find(id) == after.end() && !place.text.empty())
      ordered[{true, place.order}] = {id, place.words, place.text, {}};
  }
  std::vector<ChangedCell> list;
  for (auto& entry : ordered) list.push_back(std::move(entry.second));
  return list;
}

/// The number that a figure begins with, as it is set in type.
std::optional<double> leading_number(const std::string& text) {
  std::string plain;
  for (std::size_t i = 0; i < text.size();) {
    if (text.compare(i, 3, "\u2009") == 0) {
      i += 3;
    } else if (text.compare(i, 3, "\u2212") == 0) {
      plain += '-';
      i += 3;
    } else {
      plain += text[i++];
    }
  }
  std::size_t length = 0;
  return parse_number_prefix(plain, length);
}

int decimals_of(const std::string& text) {
  const std::size_t point = text.find('.');
  if (point == std::string::npos) return 0;
  std::size_t end = point + 1;
  while (end < text.size() && text[end] >= '0' && text[end] <= '9') ++end;
  return static_cast<int>(end - point - 1);
}

/// Figures in the same unit have a difference.
std::string difference_text(const std::string& before, const std::string& after) {
  const auto unit_of = [](const std::string& text) {
    const std::size_t blank = text.find(' ');
    const std::size_t next = blank == std::string::npos ? blank : text.find(' ', blank + 1);
    return blank == std::string::npos ? std::string() : text.substr(blank, next - blank);
  };
  const std::optional<double> a = leading_number(before), b = leading_number(after);
  if (!a || !b || unit_of(before) != unit_of(after)) return {};
  return display_signed(*b - *a, std::min(decimals_of(before), decimals_of(after))) + unit_of(after);
}

InputEffect effect_of(const ChangedCell& input, std::string_view first, const Places& results) {
  InputEffect effect;
  effect.input = input;
  Session session;
  Status done = session.open(first);
  if (done.ok()) done = session.edit(input.cell, input.after);
  if (!done.ok()) {
    effect.why_not = "cannot be put into the first sheet alone: it stands on other changes";
    return effect;
  }
  const Reading now = read_page(session.page());
  for (const ChangedCell& moved : differences(results, now.results)) {
    effect.moved.push_back(
        {moved.cell, moved.place, moved.before, moved.after, difference_text(moved.before, moved.after)});
  }
  return effect;
}

Table changed_table(const std::string& id, const std::vector<ChangedCell>& cells) {
  Table table;
  table.id = id;
  table.columns = {column("place", "Where", Align::Left, 0.5), column("before", "first"),
                   column("after", "second")};
  for (const ChangedCell& one : cells) {
    Row row = row_of(id + "." + one.cell);
    row.cells = {label_cell(one.place), label_cell(one.before.empty() ? "–" : one.before),
                 label_cell(one.after.empty() ? "–" : one.after, Tone::Strong)};
    table.rows.push_back(std::move(row));
  }
  return table;
}

}  // namespace

Result<Comparison> compare_sheets(std::string_view first, std::string_view second) {
  Session before, after;
  const auto opened = [](Session& session, std::string_view text, const char* which) -> Status {
    Status status = session.open(text);
    if (status.ok()) return status;
    Error error = status.error();
    error.where = std::string(which) + " sheet" + (error.where.empty() ? "" : ", " + error.where);
    return error;
  };
  if (const Status status = opened(before, first, "first"); !status.ok()) return status.error();
  if (const Status status = opened(after, second, "second"); !status.ok()) return status.error();
  const Reading a = read_page(before.page()), b = read_page(after.page());
  Comparison comparison;
  for (const ChangedCell& input : differences(a.inputs, b.inputs)) {
    if (comparison.inputs.size() < kMostEffects) {
      comparison.inputs.push_back(effect_of(input, first, a.results));
    } else {
      comparison.inputs.push_back({input, {}, "not worked out: too many inputs differ"});
    }
  }
  comparison.results = differences(a.results, b.results);
  if (comparison.inputs.empty() && comparison.results.empty())
    comparison.notes.emplace_back("The two sheets say the same.");
  if (comparison.inputs.empty() && !comparison.results.empty())
    comparison.notes.emplace_back("Nothing was typed differently, yet results differ.");
  return comparison;
}

Page comparison_page(const Comparison& comparison) {
  Page page;
  page.title = "Two worksheets compared";
  const auto add = [&page](Block block) { page.blocks.push_back(std::move(block)); };
  for (std::size_t i = 0; i < comparison.notes.size(); ++i)
    add(note_block("note." + std::to_string(i), NoteKind::Info, comparison.notes[i]));
  if (!comparison.inputs.empty()) {
    std::vector<ChangedCell> inputs;
    for (const InputEffect& effect : comparison.inputs) inputs.push_back(effect.input);
    add(heading_block("inputs.heading", "What was typed differently"));
    add(changed_table("inputs", inputs));
  }
  if (!comparison.results.empty()) {
    add(heading_block("results.heading", "Results that differ"));
    add(changed_table("results", comparison.results));
  }
  Table effects;
  effects.id = "effects";
  effects.columns = {column("what", "Input alone, and what it moves", Align::Left, 0.5),
                     column("before", "first"), column("after", "then"), column("by", "by", Align::Right)};
  for (const InputEffect& effect : comparison.inputs) {
    Row head = row_of("effect." + effect.input.cell, RowRole::Subtotal);
    const auto text = [](const std::string& of) { return of.empty() ? std::string("–") : of; };
    head.cells = {
        label_cell(effect.input.place + ": " + text(effect.input.before) + " → " + text(effect.input.after),
                   Tone::Strong, 4)};
    effects.rows.push_back(std::move(head));
    if (effect.moved.empty()) {
      Row none = row_of("effect." + effect.input.cell + ".none", RowRole::Detail);
      none.cells = {label_cell(effect.why_not.empty() ? "moves no result" : effect.why_not, Tone::Quiet, 4)};
      effects.rows.push_back(std::move(none));
    }
    for (const MovedResult& moved : effect.moved) {
      Row row = row_of("effect." + effect.input.cell + "." + moved.cell, RowRole::Detail);
      row.cells = {label_cell(moved.place), label_cell(moved.before.empty() ? "–" : moved.before),
                   label_cell(moved.after.empty() ? "–" : moved.after), label_cell(moved.by)};
      effects.rows.push_back(std::move(row));
    }
  }
  if (!effects.rows.empty()) {
    add(heading_block("effects.heading", "Each input alone, put into the first sheet",
                      "effects of several need not add up"));
    add(std::move(effects));
  }
  page.changed.assign(page.blocks.size(), page.revision);
  return page;
}

}  // namespace heatledger::page
