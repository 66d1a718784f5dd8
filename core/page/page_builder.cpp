#include "core/page/page_builder.hpp"

#include "core/document/step_kinds.hpp"
#include "core/page/cells.hpp"
#include "core/page/sheet_blocks.hpp"
#include "core/page/step_blocks.hpp"

namespace heatledger::page {
namespace {

std::string reaction_state(const PageInput& input, const std::string& id, std::size_t index) {
  std::string state = std::to_string(index) + "/" + std::to_string(input.sheet->reactions.size());
  const std::string stem = id + ".";
  for (auto row = input.open_rows->lower_bound(stem); row != input.open_rows->end(); ++row) {
    if (row->compare(0, stem.size(), stem) != 0) break;
    state += "\n" + *row;
  }
  for (auto entry = input.rejected->lower_bound(stem); entry != input.rejected->end(); ++entry) {
    if (entry->first.compare(0, stem.size(), stem) != 0) break;
    state += "\n" + entry->first + "\t" + entry->second.text;
  }
  return state;
}

std::string errors_state(const std::vector<Error>& errors) {
  std::string state;
  for (const Error& error : errors) state += error.where + "\t" + error.message + "\n";
  return state;
}

std::string lines_state(const std::vector<std::string>& lines) {
  std::string state;
  for (const std::string& line : lines) state += line + "\n";
  return state;
}

std::vector<Block> add_reaction_blocks() {
  Table table;
  table.id = "reactions.add";
  table.look = TableLook::Form;
  table.columns = {column("add", "")};
  Row row = row_of("reactions.add.row");
  row.screen_only = true;
  row.cells = {button_cell("reactions.add_reaction", "Add a reaction")};
  table.rows.push_back(std::move(row));
  return {std::move(table)};
}

}  // namespace

/// Takes over an unchanged section's blocks, or builds them and keeps the revision of those that came out
/// equal.
template <typename Build>
void PageBuilder::add_section(const std::string& name, std::vector<std::shared_ptr<const void>> inputs,
                              std::string state, Build make) {
  Section section;
  section.inputs = std::move(inputs);
  section.state = std::move(state);
  section.first = next_blocks_.size();
  const auto old = sections_.find(name);
  if (old != sections_.end() && old->second.inputs == section.inputs && old->second.state == section.state) {
    section.blocks = old->second.blocks;
    for (std::size_t i = 0; i < section.blocks; ++i) {
      next_blocks_.push_back(std::move(page_.blocks[old->second.first + i]));
      next_changed_.push_back(page_.changed[old->second.first + i]);
    }
  } else {
    std::vector<Block> built = make();
    section.blocks = built.size();
    std::size_t candidate = old == sections_.end() ? 0 : old->second.first;
    const std::size_t end = old == sections_.end() ? 0 : old->second.first + old->second.blocks;
    for (Block& block : built) {
      std::uint64_t changed = page_.revision + 1;
      // Blocks of a section keep their order, so one pass over the old ones finds every counterpart.
      for (std::size_t at = candidate; at < end; ++at) {
        if (block_id(page_.blocks[at]) != block_id(block)) continue;
        if (page_.blocks[at] == block) changed = page_.changed[at];
        candidate = at + 1;
        break;
      }
      next_blocks_.push_back(std::move(block));
      next_changed_.push_back(changed);
    }
  }
  next_sections_[name] = std::move(section);
}

const Page& PageBuilder::build(PageInput input) {
  const document::Worksheet& sheet = *input.sheet;
  std::vector<std::string> old_order;
  old_order.reserve(page_.blocks.size());
  for (const Block& block : page_.blocks) old_order.push_back(block_id(block));

  next_blocks_.clear();
  next_changed_.clear();
  next_blocks_.reserve(page_.blocks.size() + 16);
  next_sections_.clear();

  add_section("title", {sheet.header.handle()}, "", [&] { return title_blocks(*sheet.header); });
  std::string opening = errors_state(*input.not_understood);
  for (const std::string& figure : *input.changed_figures) opening += figure + "\n";
  add_section("opening", {}, opening,
              [&] { return opening_blocks(*input.not_understood, *input.changed_figures); });
  for (std::size_t i = 0; i < sheet.reactions.size(); ++i) {
    const document::ReactionSheet& reaction = *sheet.reactions[i];
    add_section(
        reaction.id, {sheet.reactions[i].handle(), input.results->reactions[i]},
        reaction_state(input, reaction.id, i), [&] {
          const ReactionView view{
              reaction,       *input.results->reactions[i], i + 1, sheet.reactions.size(), *input.open_rows,
              *input.rejected};
          return reaction_blocks(view);
        });
  }
  add_section("+add", {}, "", add_reaction_blocks);
  std::string reaction_ids, above;
  for (const auto& reaction : sheet.reactions) reaction_ids += reaction->id + " ";
  for (std::size_t i = 0; i < sheet.steps.size(); ++i) {
    const document::StepSheet& step = *sheet.steps[i];
    const auto refused = input.rejected->find(step.id + ".exact");
    const RejectedText* rejected = refused == input.rejected->end() ? nullptr : &refused->second;
    add_section(step.id, {sheet.steps[i].handle(), input.results->steps[i]},
                std::to_string(i) + "/" + reaction_ids + "/" + above +
                    (rejected == nullptr ? std::string() : "/" + rejected->text),
                [&] {
                  StepView view{step, *input.results->steps[i], i + 1, {}, {}, rejected};
                  for (const auto& reaction : sheet.reactions) view.reactions.push_back(reaction->id);
                  for (std::size_t k = 0; k < i; ++k) view.steps_above.push_back(sheet.steps[k]->id);
                  return step_blocks(view);
                });
    above += step.id + " ";
  }
  add_section("+add_step", {}, "", add_step_blocks);
  const auto half_width = input.rejected->find("exact.u95");
  const Error* rejected = half_width == input.rejected->end() ? nullptr : &half_width->second.error;
  add_section("+exact", {},
              lines_state(input.results->exact) + (rejected != nullptr ? rejected->message : ""),
              [&] { return exact_blocks(input.results->exact, sheet, rejected); });
  add_section("+quantities", {sheet.quantities.handle(), input.results->quantities}, "", [&] {
    return quantity_blocks(*sheet.quantities, *input.results->quantities, input.results->errors);
  });
  add_section("+species", {sheet.typed_figures.handle(), input.results->library}, "",
              [&] { return typed_species_blocks(*sheet.typed_figures, *input.results->library); });
  add_section("+bonds", {sheet.typed_bonds.handle()}, errors_state(input.results->errors),
              [&] { return typed_bond_blocks(*sheet.typed_bonds, input.results->errors); });
  add_section("+assumptions", {sheet.assumptions.handle()}, "",
              [&] { return assumption_blocks(*sheet.assumptions); });
  add_section("+notes", {sheet.notes.handle()}, "", [&] { return note_blocks(*sheet.notes); });
  if (!sheet.steps.empty()) {
    std::set<std::string> kinds;
    for (const auto& step : sheet.steps) kinds.insert(document::kind_of(*step).name);
    std::string state;
    for (const std::string& kind : kinds) state += kind + "/";
    add_section("+step_conventions", {}, state, [&] { return step_convention_blocks(kinds); });
  }
  add_section("+conventions", {}, "", convention_blocks);

  page_.blocks = std::move(next_blocks_);
  page_.changed = std::move(next_changed_);
  sections_ = std::move(next_sections_);
  ++page_.revision;
  bool same_order = old_order.size() == page_.blocks.size();
  for (std::size_t i = 0; same_order && i < old_order.size(); ++i)
    same_order = old_order[i] == block_id(page_.blocks[i]);
  if (!same_order) order_changed_ = page_.revision;
  page_.title = sheet.header->title.empty() ? "Untitled sheet" : sheet.header->title;
  page_.commands = std::move(input.commands);
  return page_;
}

}  // namespace heatledger::page
