#include "core/page/edits.hpp"

#include <algorithm>

#include "core/balance/ledger.hpp"
#include "core/base/number_text.hpp"
#include "core/document/step_kinds.hpp"
#include "core/page/figures.hpp"
#include "core/page/step_edits.hpp"

namespace heatledger::page {
namespace {

using document::Worksheet;

Error no_such_cell(std::string_view cell) {
  return {"edit.no_such_cell", "The sheet has no cell \"" + std::string(cell.substr(0, 80)) + "\".", "cell",
          "Ask for the page again: the sheet may have changed since."};
}

Error not_editable(std::string_view cell) {
  return {"edit.not_editable", "This cell is worked out by the sheet and cannot be typed over.",
          std::string(cell), "Change what it is worked out from; its working names it."};
}

/// Typed lines lose what would break a line of the sheet; nothing else is touched.
std::string one_line(std::string_view text) {
  std::string line(text);
  std::replace_if(
      line.begin(), line.end(), [](char c) { return c == '\n' || c == '\r' || c == '\t'; }, ' ');
  const std::size_t first = line.find_first_not_of(' ');
  if (first == std::string::npos) return {};
  return line.substr(first, line.find_last_not_of(' ') - first + 1);
}

std::string* header_field(document::Header& header, const std::string& name) {
  if (name == "title") return &header.title;
  if (name == "subtitle") return &header.subtitle;
  if (name == "sheet_number") return &header.sheet_number;
  if (name == "revision") return &header.revision;
  if (name == "prepared") return &header.prepared;
  if (name == "prepared_date") return &header.prepared_date;
  if (name == "checked") return &header.checked;
  if (name == "checked_date") return &header.checked_date;
  return nullptr;
}

/// Sets, appends or (with an empty text) removes a line of a list.
Result<Edited> edit_line(const Worksheet& sheet, document::Shared<document::Lines> Worksheet::*list,
                         std::size_t index, const std::string& text, std::string_view cell,
                         const std::string& label) {
  Edited edited{sheet, label};
  document::Lines& lines = (edited.sheet.*list).change();
  if (index > lines.size()) return no_such_cell(cell);
  if (index == lines.size()) {
    if (!text.empty()) lines.push_back(text);
  } else if (text.empty()) {
    lines.erase(lines.begin() + static_cast<std::ptrdiff_t>(index));
  } else {
    lines[index] = text;
  }
  return edited;
}

/// "340 kJ/mol" with 3 % becomes "340 ± 10.2 kJ/mol": in the unit typed.
std::string with_half_width(const std::string& value, double percent) {
  std::size_t end = value.find_first_of("0123456789");
  std::size_t length = 0;
  const std::optional<double> number = end == std::string::npos
                                           ? std::nullopt
                                           : parse_number_prefix(std::string_view(value).substr(end), length);
  if (!number || length == 0) return value;
  end += length;
  const double half = *number * percent / 100;
  return value.substr(0, end) + " \u00b1 " + machine_number(half, 3) + value.substr(end);
}

Result<Edited> edit_bond(const Worksheet& sheet, const IdParts& id, const std::string& text,
                         std::string_view cell) {
  const std::optional<std::size_t> index = id.size() == 3 ? id_index(id[1]) : std::nullopt;
  if (!index || *index > sheet.typed_bonds->size()) return no_such_cell(cell);
  if (id[2] == "remove") return apply_command(sheet, {}, "remove_bond", {{"bond", id[1]}});
  Edited edited{sheet, "edit bond value"};
  document::TypedBonds& bonds = edited.sheet.typed_bonds.change();
  if (*index == bonds.size()) bonds.emplace_back();
  document::TypedBond& bond = bonds[*index];
  if (id[2] == "bond") {
    bond.bond = text;
  } else if (id[2] == "value") {
    bond.value = text;
  } else if (id[2] == "source") {
    bond.source = text;
  } else {
    return no_such_cell(cell);
  }
  if (id[2] != "source") bond.from.clear();  // what is typed over is no longer the site's
  const bool blank = bond.bond.empty() && bond.value.empty() && bond.source.empty() && bond.unknown.empty();
  if (blank) bonds.erase(bonds.begin() + static_cast<std::ptrdiff_t>(*index));
  return edited;
}

/// A cell of the table of quantities; the last row of the table is empty and adds one.
Result<Edited> edit_quantity(const Worksheet& sheet, const IdParts& id, const std::string& text,
                             std::string_view cell) {
  const std::optional<std::size_t> index = id.size() == 3 ? id_index(id[1]) : std::nullopt;
  if (!index || *index > sheet.quantities->size()) return no_such_cell(cell);
  if (id[2] == "figure") return not_editable(cell);
  Edited edited{sheet, id[2] == "remove" ? "remove quantity" : "edit quantity"};
  document::NamedQuantities& list = edited.sheet.quantities.change();
  if (*index == list.size()) list.emplace_back();
  document::NamedQuantity& entry = list[*index];
  std::string* field = id[2] == "name"    ? &entry.name
                       : id[2] == "value" ? &entry.value
                       : id[2] == "unit"  ? &entry.unit
                       : id[2] == "note"  ? &entry.note
                                          : nullptr;
  if (field == nullptr && id[2] != "remove") return no_such_cell(cell);
  if (field != nullptr) *field = text;
  const bool blank = entry.name.empty() && entry.value.empty() && entry.unit.empty() && entry.note.empty() &&
                     entry.unknown.empty();
  if (blank || field == nullptr) list.erase(list.begin() + static_cast<std::ptrdiff_t>(*index));
  return edited;
}

/// A cell of the table of species; the last row of the table is empty and adds one.
Result<Edited> edit_figure(const Worksheet& sheet, const IdParts& id, const std::string& text,
                           std::string_view cell) {
  const std::optional<std::size_t> index = id.size() == 3 ? id_index(id[1]) : std::nullopt;
  if (!index || *index > sheet.typed_figures->size()) return no_such_cell(cell);
  if (id[2] == "remove") return apply_command(sheet, {}, "remove_figure", {{"figure", id[1]}});
  if (id[2] == "published") return not_editable(cell);
  Edited edited{sheet, "edit figure of species"};
  document::TypedFigures& figures = edited.sheet.typed_figures.change();
  if (*index == figures.size()) figures.emplace_back();
  document::TypedFigure& figure = figures[*index];
  if (id[2] == "species") {
    figure.species = text;
  } else if (id[2] == "figure") {
    const document::FigureName* name = document::find_typed_figure(text);
    figure.figure = name != nullptr ? std::string(name->id) : text;
  } else if (id[2] == "value") {
    figure.value = text;
  } else if (id[2] == "source") {
    figure.source = text;
  } else {
    return no_such_cell(cell);
  }
  // What is typed over is no longer the site's.
  if (id[2] != "source") figure.from.clear();
  const bool blank = figure.species.empty() && figure.figure.empty() && figure.value.empty() &&
                     figure.source.empty() && figure.unknown.empty();
  if (blank) figures.erase(figures.begin() + static_cast<std::ptrdiff_t>(*index));
  return edited;
}

/// Puts a ± behind every typed figure that has none: "3 %" or "5 kJ/mol".
Result<Edited> give_half_width(const Worksheet& sheet, const document::Results& results,
                               const std::string& text) {
  std::string half = text;
  for (const std::string_view mark : {std::string_view("\u00b1"), std::string_view("+/-")}) {
    if (half.compare(0, mark.size(), mark) == 0) half = one_line(std::string_view(half).substr(mark.size()));
  }
  const std::size_t digits = half.find_first_not_of("0123456789.");
  const std::string number = half.substr(0, digits);
  const std::string unit = digits == std::string::npos ? std::string() : one_line(half.substr(digits));
  const std::optional<double> size = parse_number(number);
  if (!size || *size <= 0 || unit != "%") {
    return Error{"edit.half_width", "The \u00b1 for all of them is a share of each figure.", "exact.u95",
                 "Type a percentage such as 3 %; single figures get theirs in their own cell."};
  }
  Edited edited{sheet, "give \u00b1 to typed figures"};
  for (const std::string& path : results.exact) {
    const std::size_t open = path.find('['), close = path.find(']');
    const std::optional<std::size_t> index = id_index(path.substr(open + 1, close - open - 1));
    if (!index) continue;
    std::string* value = nullptr;
    if (path.compare(0, 6, "bonds[") == 0 && *index < sheet.typed_bonds->size())
      value = &edited.sheet.typed_bonds.change()[*index].value;
    if (path.compare(0, 8, "species[") == 0 && *index < sheet.typed_figures->size())
      value = &edited.sheet.typed_figures.change()[*index].value;
    if (path.compare(0, 10, "reactions[") == 0 && *index < sheet.reactions.size())
      value = &edited.sheet.reactions[*index].change().measured.value;
    if (value != nullptr) *value = with_half_width(*value, *size);
  }
  return edited;
}

std::string basis_from_choice(const balance::Reaction* reaction, const std::string& text) {
  if (text == "as written") return {};
  if (reaction != nullptr) {
    for (const balance::BasisChoice& choice : balance::basis_choices(*reaction)) {
      if (choice.text == text) return choice.name;
    }
  }
  return text;
}

std::string bond_set_from_choice(const std::string& text) {
  const std::vector<std::string>& names = estimate::BondSet::names();
  if (text == route_words(document::kContextSet)) return document::kContextSet;
  for (std::size_t i = 0; i < names.size(); ++i) {
    const Result<estimate::BondSet> set = estimate::BondSet::published(names[i]);
    if (names[i] != text && !(set.ok() && set->title() == text)) continue;
    return i == 0 ? std::string() : names[i];
  }
  return text;
}

class ReactionEdit {
 public:
  ReactionEdit(const Worksheet& sheet, const document::Results& results, std::size_t index,
               std::string_view cell)
      : sheet_(sheet), results_(results), index_(index), cell_(cell) {}

  Result<Edited> apply(const IdParts& id, const std::string& text) {
    const std::string& field = id[1];
    if (id.size() == 2) return apply_field(field, text);
    if (field == "row" && id.size() == 4) {
      const std::optional<std::size_t> row = id_index(id[2]);
      const balance::Ledger* ledger = result().shown();
      if (!row || ledger == nullptr || *row >= ledger->rows.size()) return no_such_cell(cell_);
      if (id[3] != "times") return not_editable(cell_);
      const Result<std::string> equation =
          with_coefficient(*ledger->reaction, ledger->rows[*row].species, text);
      if (!equation) return equation.error();
      return set(&document::ReactionSheet::equation, *equation, "edit coefficient");
    }
    if (field == "proposal" && id.size() == 3) {
      return apply_command(sheet_, results_, "take_proposal",
                           {{"reaction", sheet().id}, {"proposal", id[2]}});
    }
    if (field == "check") return apply_check(id, text);
    if (field == "measured" && id.size() == 3) return apply_measured(id[2], text);
    if (field == "run" || field == "as_run" || field == "route") return not_editable(cell_);
    return no_such_cell(cell_);
  }

 private:
  const document::ReactionSheet& sheet() const { return *sheet_.reactions[index_]; }
  const document::ReactionResult& result() const { return *results_.reactions[index_]; }

  Result<Edited> set(std::string document::ReactionSheet::*field, std::string text, std::string label) const {
    Edited edited{sheet_, std::move(label)};
    edited.sheet.reactions[index_].change().*field = std::move(text);
    return edited;
  }

  Result<Edited> apply_field(const std::string& field, const std::string& text) const {
    using document::ReactionSheet;
    if (field == "equation") return set(&ReactionSheet::equation, text, "edit equation");
    if (field == "title") return set(&ReactionSheet::title, text, "edit title of reaction");
    if (field == "note") return set(&ReactionSheet::note, text, "edit remark");
    if (field == "basis") {
      return set(&ReactionSheet::basis, basis_from_choice(result().reaction.get(), text), "change basis");
    }
    if (field == "bond_set")
      return set(&ReactionSheet::bond_set, bond_set_from_choice(text), "change bond values");
    if (field == "route") {
      return set(&ReactionSheet::pinned_route,
                 text == "the best there is" ? std::string() : route_from_words(text), "pin route");
    }
    if (field == "reactants_at")
      return set(&ReactionSheet::reactants_at, text, "edit temperature of reactants");
    if (field == "products_at") return set(&ReactionSheet::products_at, text, "edit temperature of products");
    if (field == "pressure") return set(&ReactionSheet::pressure, text, "edit pressure");
    if (field == "measure")
      return apply_command(sheet_, results_, "show_measured", {{"reaction", sheet().id}, {"state", "on"}});
    if (field == "show") {
      Edited edited{sheet_, "change what is shown"};
      ReactionSheet& reaction = edited.sheet.reactions[index_].change();
      reaction.show_profile = text.find("profile") != std::string::npos;
      reaction.show_checker = text.find("checker") != std::string::npos;
      return edited;
    }
    if (field == "remove")
      return apply_command(sheet_, results_, "remove_reaction", {{"reaction", sheet().id}});
    if (field == "move_up" || field == "move_down") {
      return apply_command(sheet_, results_, "move_reaction",
                           {{"reaction", sheet().id}, {"direction", field == "move_up" ? "up" : "down"}});
    }
    return field == "balance" || field == "gas_298" || field == "as_written" || field == "taken"
               ? not_editable(cell_)
               : no_such_cell(cell_);
  }

  /// "r1.measured.value"
  Result<Edited> apply_measured(const std::string& field, const std::string& text) const {
    Edited edited{sheet_, "edit measured heat"};
    document::TypedHeat& heat = edited.sheet.reactions[index_].change().measured;
    std::string* place = field == "value"      ? &heat.value
                         : field == "per"      ? &heat.per
                         : field == "at"       ? &heat.at
                         : field == "medium"   ? &heat.medium
                         : field == "includes" ? &heat.includes
                         : field == "source"   ? &heat.source
                                               : nullptr;
    if (place == nullptr) return no_such_cell(cell_);
    *place = text;
    if (field != "source") heat.from.clear();  // what is typed over is no longer the site's
    return edited;
  }

  /// "r1.check.row.2.per_mole": the figure on the sheet under review; an empty text takes it away.
  Result<Edited> apply_check(const IdParts& id, const std::string& text) const {
    std::string figure;
    for (std::size_t i = 2; i < id.size(); ++i) figure += (figure.empty() ? "" : ".") + id[i];
    constexpr std::size_t kLongest = 64;
    if (figure.empty() || figure.size() > kLongest) return no_such_cell(cell_);
    Edited edited{sheet_, "edit checker's figure"};
    document::CheckerEntries& entries = edited.sheet.reactions[index_].change().checker;
    if (text.empty()) {
      entries.erase(figure);
    } else {
      entries[figure] = text;
    }
    return edited;
  }

  const Worksheet& sheet_;
  const document::Results& results_;
  std::size_t index_;
  std::string_view cell_;
};

}  // namespace

IdParts split_id(std::string_view id) {
  IdParts parts;
  for (std::size_t dot; (dot = id.find('.')) != std::string_view::npos; id.remove_prefix(dot + 1)) {
    parts.emplace_back(id.substr(0, dot));
  }
  parts.emplace_back(id);
  return parts;
}

std::optional<std::size_t> id_index(const std::string& text) {
  if (text.empty() || text.size() > 6) return std::nullopt;
  std::size_t index = 0;
  for (const char c : text) {
    if (c < '0' || c > '9') return std::nullopt;
    index = 10 * index + static_cast<std::size_t>(c - '0');
  }
  return index;
}

Result<std::string> with_coefficient(const balance::Reaction& reaction, std::size_t species,
                                     std::string_view typed) {
  const std::string text = one_line(typed);
  const std::size_t slash = text.find('/');
  const std::optional<double> over = parse_number(std::string_view(text).substr(0, slash));
  std::optional<double> under = 1;
  if (slash != std::string::npos) under = parse_number(std::string_view(text).substr(slash + 1));
  if (!text.empty() && (!over || !under || *over <= 0 || *under <= 0)) {
    return Error{"edit.coefficient", "A coefficient is a number above zero.", "",
                 "Type a whole number, a decimal or a fraction such as 1/2."};
  }
  const molecule::Term& term = reaction.species[species].term;
  std::string rest = reaction.text.substr(term.offset, term.length);
  const std::string& old = term.coefficient.typed;
  if (!old.empty() && rest.compare(0, old.size(), old) == 0) {
    rest.erase(0, old.size());
    rest.erase(0, rest.find_first_not_of(' '));
  }
  const std::string written = text.empty() || text == "1" ? rest : text + " " + rest;
  return reaction.text.substr(0, term.offset) + written + reaction.text.substr(term.offset + term.length);
}

Result<Edited> apply_edit(const Worksheet& sheet, const document::Results& results, std::string_view cell,
                          std::string_view typed) {
  const IdParts id = split_id(cell);
  const std::string text = one_line(typed);
  if (id.size() < 2) return no_such_cell(cell);
  if (id[0] == "header" && id.size() == 2) {
    Edited edited{sheet, "edit title block"};
    std::string* field = header_field(edited.sheet.header.change(), id[1]);
    if (field == nullptr) return no_such_cell(cell);
    *field = text;
    return edited;
  }
  if (id[0] == "bond") return edit_bond(sheet, id, text, cell);
  if (id[0] == "quantity") return edit_quantity(sheet, id, text, cell);
  if (id[0] == "fact") return edit_figure(sheet, id, text, cell);
  if (cell == "exact.u95") return give_half_width(sheet, results, text);
  if (id[0] == "assumption" || id[0] == "remark") {
    const std::optional<std::size_t> index = id.size() == 2 ? id_index(id[1]) : std::nullopt;
    if (!index) return no_such_cell(cell);
    return id[0] == "remark"
               ? edit_line(sheet, &Worksheet::notes, *index, text, cell, "edit note")
               : edit_line(sheet, &Worksheet::assumptions, *index, text, cell, "edit assumption");
  }
  if (cell == "reactions.add_reaction") return apply_command(sheet, results, "add_reaction", {});
  for (const document::KindOfStep& kind : document::kinds_of_step()) {
    if (cell == std::string("steps.add.") + kind.letter) return add_step(sheet, kind.name);
  }
  const std::size_t step = document::find_step(sheet, id[0]);
  if (step < sheet.steps.size()) return edit_step(sheet, step, id, text);
  const std::size_t index = document::find_reaction(sheet, id[0]);
  if (index == sheet.reactions.size()) return no_such_cell(cell);
  return ReactionEdit(sheet, results, index, cell).apply(id, text);
}

}  // namespace heatledger::page
