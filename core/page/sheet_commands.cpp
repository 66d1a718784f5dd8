// Commands that change the sheet as a whole: reactions and lists added, moved and taken away.
#include <algorithm>

#include "core/page/edits.hpp"
#include "core/page/figures.hpp"
#include "core/page/site_import.hpp"
#include "core/page/step_edits.hpp"

namespace heatledger::page {
namespace {

using document::Worksheet;
using Arguments = std::map<std::string, std::string>;

Error bad_argument(const std::string& name, const std::string& message) {
  return {"command.argument", message, "arguments." + name,
          "The arguments of every command stand in core/page/README.md."};
}

std::string argument(const Arguments& arguments, const char* name) {
  const auto found = arguments.find(name);
  return found == arguments.end() ? std::string() : found->second;
}

/// Index of the reaction that a command names; with a single reaction on the sheet it need not.
Result<std::size_t> reaction_argument(const Worksheet& sheet, const Arguments& arguments) {
  const std::string id = argument(arguments, "reaction");
  if (id.empty() && sheet.reactions.size() == 1) return std::size_t{0};
  const std::size_t index = document::find_reaction(sheet, id);
  if (index == sheet.reactions.size())
    return bad_argument("reaction", "The sheet has no reaction \"" + id + "\".");
  return index;
}

Result<Edited> add_reaction(const Worksheet& sheet, const Arguments& arguments) {
  document::ReactionSheet reaction;
  reaction.id = document::free_reaction_id(sheet);
  reaction.equation = argument(arguments, "equation");
  std::size_t at = sheet.reactions.size();
  if (!argument(arguments, "after").empty()) {
    at = document::find_reaction(sheet, argument(arguments, "after"));
    if (at == sheet.reactions.size()) return bad_argument("after", "The sheet has no such reaction.");
    ++at;
  }
  Edited edited{sheet, "add reaction"};
  edited.sheet.reactions.insert(edited.sheet.reactions.begin() + static_cast<std::ptrdiff_t>(at),
                                document::Shared<document::ReactionSheet>(std::move(reaction)));
  return edited;
}

Result<Edited> remove_reaction(const Worksheet& sheet, std::size_t index) {
  Edited edited{sheet, "remove reaction"};
  edited.sheet.reactions.erase(edited.sheet.reactions.begin() + static_cast<std::ptrdiff_t>(index));
  // A sheet without a reaction has nothing to type into.
  if (edited.sheet.reactions.empty()) edited.sheet.reactions = document::empty_worksheet().reactions;
  return edited;
}

Result<Edited> move_reaction(const Worksheet& sheet, std::size_t index, const std::string& direction) {
  if (direction != "up" && direction != "down")
    return bad_argument("direction", "A reaction moves \"up\" or \"down\".");
  const bool up = direction == "up";
  Edited edited{sheet, "move reaction"};
  if (up ? index > 0 : index + 1 < sheet.reactions.size()) {
    std::swap(edited.sheet.reactions[index], edited.sheet.reactions[up ? index - 1 : index + 1]);
  }
  return edited;
}

Result<Edited> take_proposal(const Worksheet& sheet, const document::Results& results, std::size_t index,
                             const std::string& which) {
  const std::optional<std::size_t> proposal = which.empty() ? std::optional<std::size_t>(0) : id_index(which);
  const balance::Reaction* reaction = results.reactions[index]->reaction.get();
  if (!proposal || reaction == nullptr || *proposal >= reaction->proposals.size()) {
    return bad_argument("proposal", "There is no such way to balance this equation.");
  }
  Edited edited{sheet, "balance equation"};
  edited.sheet.reactions[index].change().equation = reaction->proposals[*proposal];
  return edited;
}

Result<Edited> add_bond(const Worksheet& sheet, const Arguments& arguments) {
  Edited edited{sheet, "add bond value"};
  document::TypedBond bond;
  bond.bond = argument(arguments, "bond");
  bond.value = argument(arguments, "value");
  bond.source = argument(arguments, "source");
  if (bond.bond.empty()) return bad_argument("bond", "A bond value needs its bond, such as C-Cl.");
  edited.sheet.typed_bonds.change().push_back(std::move(bond));
  return edited;
}

Result<Edited> remove_bond(const Worksheet& sheet, const Arguments& arguments) {
  const std::optional<std::size_t> index = id_index(argument(arguments, "bond"));
  if (!index || *index >= sheet.typed_bonds->size())
    return bad_argument("bond", "The sheet has no such bond value.");
  Edited edited{sheet, "remove bond value"};
  document::TypedBonds& bonds = edited.sheet.typed_bonds.change();
  bonds.erase(bonds.begin() + static_cast<std::ptrdiff_t>(*index));
  return edited;
}

Result<Edited> add_figure(const Worksheet& sheet, const Arguments& arguments) {
  document::TypedFigure figure;
  figure.species = argument(arguments, "species");
  const document::FigureName* name = document::find_typed_figure(argument(arguments, "figure"));
  figure.figure = name != nullptr ? std::string(name->id) : argument(arguments, "figure");
  figure.value = argument(arguments, "value");
  figure.source = argument(arguments, "source");
  if (figure.species.empty()) return bad_argument("species", "A figure belongs to a species.");
  Edited edited{sheet, "add figure of species"};
  edited.sheet.typed_figures.change().push_back(std::move(figure));
  return edited;
}

Result<Edited> remove_figure(const Worksheet& sheet, const Arguments& arguments) {
  const std::optional<std::size_t> index = id_index(argument(arguments, "figure"));
  if (!index || *index >= sheet.typed_figures->size())
    return bad_argument("figure", "The sheet has no such figure of a species.");
  Edited edited{sheet, "remove figure of species"};
  document::TypedFigures& figures = edited.sheet.typed_figures.change();
  figures.erase(figures.begin() + static_cast<std::ptrdiff_t>(*index));
  return edited;
}

Result<Edited> show(const Worksheet& sheet, std::size_t index, bool document::ReactionSheet::*flag,
                    const std::string& state) {
  Edited edited{sheet, "change what is shown"};
  bool& shown = edited.sheet.reactions[index].change().*flag;
  if (!state.empty() && state != "on" && state != "off")
    return bad_argument("state", "The state is \"on\" or \"off\".");
  shown = state.empty() ? !shown : state == "on";
  return edited;
}

}  // namespace

Result<Edited> apply_command(const Worksheet& sheet, const document::Results& results, std::string_view name,
                             const Arguments& arguments) {
  if (name == "add_reaction") return add_reaction(sheet, arguments);
  if (name == "add_step" || name == "remove_step" || name == "move_step")
    return step_command(sheet, name, arguments);
  if (name == "add_bond") return add_bond(sheet, arguments);
  if (name == "remove_bond") return remove_bond(sheet, arguments);
  if (name == "add_figure") return add_figure(sheet, arguments);
  if (name == "remove_figure") return remove_figure(sheet, arguments);
  if (name == "import_site_table") {
    return import_site_table(sheet, argument(arguments, "text"), argument(arguments, "rows") == "all");
  }
  const bool of_reaction = name == "remove_reaction" || name == "move_reaction" || name == "take_proposal" ||
                           name == "show_profile" || name == "show_checker" || name == "show_measured";
  if (!of_reaction) {
    return Error{"command.unknown", "There is no command \"" + std::string(name.substr(0, 80)) + "\".",
                 "name", "The commands stand in core/page/README.md."};
  }
  const Result<std::size_t> index = reaction_argument(sheet, arguments);
  if (!index) return index.error();
  if (name == "remove_reaction") return remove_reaction(sheet, *index);
  if (name == "move_reaction") return move_reaction(sheet, *index, argument(arguments, "direction"));
  if (name == "take_proposal") return take_proposal(sheet, results, *index, argument(arguments, "proposal"));
  return show(sheet, *index,
              name == "show_profile"   ? &document::ReactionSheet::show_profile
              : name == "show_checker" ? &document::ReactionSheet::show_checker
                                       : &document::ReactionSheet::show_measured,
              argument(arguments, "state"));
}

}  // namespace heatledger::page
