#include "core/page/step_edits.hpp"

#include "core/document/step_kinds.hpp"
#include "core/page/step_blocks.hpp"
#include "core/page/step_exact.hpp"

namespace heatledger::page {
namespace {

using document::StepSheet;
using document::Worksheet;

Error no_such_cell(const IdParts& id) {
  std::string cell;
  for (const std::string& part : id) cell += (cell.empty() ? "" : ".") + part;
  return {"edit.no_such_cell", "The sheet has no cell \"" + cell.substr(0, 80) + "\".", "cell",
          "Ask for the page again: the sheet may have changed since."};
}

/// The entry of a list that a cell belongs to; the one after the last is made.
template <typename T>
T* entry(std::vector<T>& list, const std::string& index) {
  const std::optional<std::size_t> at = id_index(index);
  if (!at || *at > list.size()) return nullptr;
  if (*at == list.size()) list.emplace_back();
  return &list[*at];
}

template <typename T>
void drop_blank(std::vector<T>& list, bool (*blank)(const T&)) {
  for (std::size_t i = 0; i < list.size();) {
    if (blank(list[i])) {
      list.erase(list.begin() + static_cast<std::ptrdiff_t>(i));
    } else {
      ++i;
    }
  }
}

bool blank_row(const document::FeedRow& row) {
  return row.species.empty() && row.amount.empty() && row.unknown.empty();
}
bool blank_feed(const document::FeedSheet& feed) {
  return feed.name.empty() && feed.from.empty() && feed.at.empty() && feed.pressure.empty() &&
         feed.total.empty() && feed.role.empty() && feed.rows.empty() && feed.unknown.empty();
}
bool blank_progress(const document::ProgressSheet& progress) {
  return progress.reaction.empty() && progress.how.empty() && progress.figure.empty() &&
         progress.heat.empty() && progress.rate_constant.empty() && progress.unknown.empty();
}
bool blank_profile(const document::ProfileRow& row) {
  return row.time.empty() && row.amount.empty() && row.unknown.empty();
}
bool blank_leaving(const document::LeavingRow& row) {
  return row.species.empty() && row.how.empty() && row.unknown.empty();
}
bool blank_species(const document::SpeciesRow& row) {
  return row.species.empty() && row.heat_capacity.empty() && row.density.empty() &&
         row.vapour_pressure.empty() && row.molar_mass.empty() && row.unknown.empty();
}

/// Where the text of a cell is kept; null when the step has no such cell.
std::string* place(StepSheet& step, const IdParts& id) {
  const std::string& field = id[1];
  if (id.size() == 2) return field == "title" ? &step.title : field == "note" ? &step.note : nullptr;
  if (field == "feed" && (id.size() == 4 || id.size() == 6)) {
    document::FeedSheet* feed = entry(step.feeds, id[2]);
    if (feed == nullptr) return nullptr;
    if (id.size() == 6) {
      document::FeedRow* row = id[3] == "row" ? entry(feed->rows, id[4]) : nullptr;
      if (row == nullptr) return nullptr;
      return id[5] == "species" ? &row->species : id[5] == "amount" ? &row->amount : nullptr;
    }
    return id[3] == "name"       ? &feed->name
           : id[3] == "at"       ? &feed->at
           : id[3] == "pressure" ? &feed->pressure
           : id[3] == "total"    ? &feed->total
           : id[3] == "from"     ? &feed->from
           : id[3] == "role"     ? &feed->role
                                 : nullptr;
  }
  if (field == "reaction" && id.size() == 4) {
    document::ProgressSheet* progress = entry(step.reactions, id[2]);
    if (progress == nullptr) return nullptr;
    return id[3] == "reaction"        ? &progress->reaction
           : id[3] == "how"           ? &progress->how
           : id[3] == "figure"        ? &progress->figure
           : id[3] == "heat"          ? &progress->heat
           : id[3] == "heat_per"      ? &progress->heat_per
           : id[3] == "heat_at"       ? &progress->heat_at
           : id[3] == "includes"      ? &progress->includes
           : id[3] == "rate_constant" ? &progress->rate_constant
           : id[3] == "rate_at"       ? &progress->rate_at
           : id[3] == "activation"    ? &progress->activation
           : id[3] == "orders"        ? &progress->orders
                                      : nullptr;
  }
  if (field == "leaving" && id.size() == 4) {
    document::LeavingRow* row = entry(step.leaving, id[2]);
    if (row == nullptr) return nullptr;
    return id[3] == "species" ? &row->species : id[3] == "how" ? &row->how : nullptr;
  }
  if (field == "profile" && id.size() == 4) {
    document::ProfileRow* row = entry(step.profile, id[2]);
    if (row == nullptr) return nullptr;
    return id[3] == "time" ? &row->time : id[3] == "amount" ? &row->amount : nullptr;
  }
  if (field == "species" && id.size() == 4) {
    document::SpeciesRow* row = entry(step.species, id[2]);
    if (row == nullptr) return nullptr;
    return id[3] == "species"           ? &row->species
           : id[3] == "heat_capacity"   ? &row->heat_capacity
           : id[3] == "density"         ? &row->density
           : id[3] == "vapour_pressure" ? &row->vapour_pressure
           : id[3] == "molar_mass"      ? &row->molar_mass
                                        : nullptr;
  }
  return nullptr;
}

/// How the file names a kind; the first goes without a name, and what names none is taken for it.
std::string kept_kind(const std::string& kind) {
  const auto& kinds = document::kinds_of_step();
  for (std::size_t i = 1; i < kinds.size(); ++i) {
    if (kind == kinds[i].name) return kind;
  }
  return {};
}

/// What a choice or a button of the step stands for: "from s1" is "s1", "none" is nothing.
std::string meant(const StepSheet& step, const IdParts& id, const std::string& text) {
  if (id.back() == "from")
    return text == "own rows" ? "" : text.compare(0, 5, "from ") == 0 ? text.substr(5) : text;
  if (id.size() == 4 && id[1] == "reaction" && id[3] == "reaction" && text == "none") return {};
  if (id.back() == "role") {
    const std::vector<const char*>& roles = document::kind_of(step).roles;
    if (!roles.empty() && text == roles.front()) return {};
  }
  return text;
}

}  // namespace

Result<Edited> edit_step(const Worksheet& sheet, std::size_t index, const IdParts& id,
                         const std::string& text) {
  Edited edited{sheet, "edit step"};
  if (id.size() < 2) return no_such_cell(id);
  if (id[1] == "remove" && id.size() == 2) {
    edited.label = "remove step";
    edited.sheet.steps.erase(edited.sheet.steps.begin() + static_cast<std::ptrdiff_t>(index));
    return edited;
  }
  if (id[1] == "answer" || id[1] == "find" || id[1] == "out") {
    return Error{"edit.not_editable", "This cell is worked out by the sheet and cannot be typed over.",
                 "cell", "Change what it is worked out from; its working names it."};
  }
  StepSheet& step = edited.sheet.steps[index].change();
  if (id.size() == 2 && id[1] == "kind") {
    step.kind = kept_kind(text);
  } else if (id.size() == 2 && id[1] == "exact") {
    edited.label = "give ± to typed inputs";
    if (const Result<int> given = give_half_width_to_step(step, text); !given.ok()) return given.error();
  } else if (id.size() == 2 && id[1] == "sought") {
    const std::string blank = sought_from_words(step, text);
    const auto& choices = document::kind_of(step).sought;
    step.sought = blank == (choices.empty() ? "duty" : choices.front().first) ? "" : blank;
  } else if (id.size() == 2 && id[1] == "curve") {
    step.curve = text == "nothing" || text.empty() ? "" : sought_from_words(step, text);
  } else if (id.size() == 2 && id[1] == "show_checker") {
    step.show_checker = text == "shown";
  } else if (id[1] == "check" && id.size() > 2) {
    std::string figure;
    for (std::size_t i = 2; i < id.size(); ++i) figure += (figure.empty() ? "" : ".") + id[i];
    constexpr std::size_t kLongest = 64;
    if (figure.size() > kLongest) return no_such_cell(id);
    edited.label = "edit checker's figure";
    if (text.empty()) {
      step.checker.erase(figure);
    } else {
      step.checker[figure] = text;
    }
  } else if (id[1] == "blank" && id.size() > 2) {
    std::string blank;
    for (std::size_t i = 2; i < id.size(); ++i) blank += (blank.empty() ? "" : ".") + id[i];
    bool known = false;
    for (const document::StepBlank& one : document::step_blanks()) known = known || blank == one.id;
    if (!known) return no_such_cell(id);
    if (text.empty()) {
      step.blanks.erase(blank);
    } else {
      step.blanks[blank] = text;
    }
  } else {
    std::string* at = place(step, id);
    if (at == nullptr) return no_such_cell(id);
    *at = meant(step, id, text);
    for (document::FeedSheet& feed : step.feeds) drop_blank(feed.rows, blank_row);
    drop_blank(step.feeds, blank_feed);
    drop_blank(step.reactions, blank_progress);
    drop_blank(step.profile, blank_profile);
    drop_blank(step.leaving, blank_leaving);
    drop_blank(step.species, blank_species);
  }
  return edited;
}

Edited add_step(const Worksheet& sheet, const std::string& kind) {
  Edited edited{sheet, "add step"};
  StepSheet step;
  step.id = document::free_step_id(sheet);
  step.kind = kept_kind(kind);
  edited.sheet.steps.push_back(document::Shared<StepSheet>(std::move(step)));
  return edited;
}

Result<Edited> step_command(const Worksheet& sheet, std::string_view name,
                            const std::map<std::string, std::string>& arguments) {
  const auto argument = [&](const char* key) {
    const auto found = arguments.find(key);
    return found == arguments.end() ? std::string() : found->second;
  };
  if (name == "add_step") return add_step(sheet, argument("kind"));
  const std::size_t index = document::find_step(sheet, argument("step"));
  if (index == sheet.steps.size()) {
    return Error{"command.argument", "The sheet has no step \"" + argument("step") + "\".", "arguments.step",
                 "The arguments of every command stand in core/page/README.md."};
  }
  if (name == "remove_step") return edit_step(sheet, index, {sheet.steps[index]->id, "remove"}, "");
  const std::string direction = argument("direction");
  if (direction != "up" && direction != "down") {
    return Error{"command.argument", "A step moves \"up\" or \"down\".", "arguments.direction", ""};
  }
  const bool up = direction == "up";
  Edited edited{sheet, "move step"};
  if (up ? index > 0 : index + 1 < sheet.steps.size())
    std::swap(edited.sheet.steps[index], edited.sheet.steps[up ? index - 1 : index + 1]);
  return edited;
}

}  // namespace heatledger::page
