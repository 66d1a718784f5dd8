#include "core/page/site_import.hpp"

#include <algorithm>
#include <cmath>
#include <set>

#include "core/balance/ledger.hpp"
#include "core/balance/same_reaction.hpp"
#include "core/base/number_text.hpp"
#include "core/document/typed_energy.hpp"
#include "core/file/site_table.hpp"

namespace heatledger::page {
namespace {

using document::Worksheet;

/// What the equations of a sheet name, read with the site's species known.
struct Used {
  std::set<std::string> species;  ///< names in the library of sheet and site
  std::set<molecule::BondType> bonds;
  std::vector<std::optional<balance::Reaction>> reactions;  ///< empty where an equation cannot be read
};

Used used_by(const Worksheet& sheet, document::SheetLibrary& library) {
  Used used;
  for (const auto& entry : sheet.reactions) {
    const Result<balance::Reaction> reaction = balance::read_reaction(entry->equation, library);
    used.reactions.push_back(reaction.ok() ? std::optional<balance::Reaction>(*reaction) : std::nullopt);
    if (!reaction.ok()) continue;
    for (const balance::ReactionSpecies& one : reaction->species) {
      used.species.insert(one.species->name);
      for (const molecule::BondCount& bond : one.species->bonds) {
        used.bonds.insert(bond.type);
        molecule::BondType general = bond.type;
        general.setting = molecule::Setting::Plain;
        used.bonds.insert(general);
      }
    }
  }
  return used;
}

/// The heat of a site for its own equation, as it reads beside the same reaction on the sheet: `per` by the
/// name that both know the species by, a heat for the coefficients written times their ratio.
document::TypedHeat brought_to(const balance::Reaction& reaction, const balance::Reaction& of_site,
                               double times, document::TypedHeat heat) {
  if (!heat.per.empty()) {
    const Result<balance::Basis> basis = balance::find_basis(of_site, heat.per);
    if (!basis.ok() || basis->kind != balance::Basis::Kind::MoleOf)
      return heat;  // the sheet says what is wrong
    const std::string& name = of_site.species[basis->species].species->name;
    for (const balance::ReactionSpecies& entry : reaction.species) {
      if (entry.species->name == name) heat.per = entry.term.species;
    }
    return heat;
  }
  const Result<uncertainty::Figure> value = document::parse_molar_energy(heat.value);
  if (times == 1 || !value.ok() || !std::isfinite(value->value * times)) return heat;
  heat.value = machine_number(value->value * times / 1000, 8);
  if (value->u95 > 0) heat.value += " \u00b1 " + machine_number(value->u95 * times / 1000, 4);
  heat.value += " kJ";
  if (!heat.source.empty()) heat.source += "; ";
  heat.source += "stated for " + balance::plain_equation(of_site);
  return heat;
}

template <typename List>
void take_out(List& list, const std::string& name) {
  list.erase(std::remove_if(list.begin(), list.end(), [&](const auto& row) { return row.from == name; }),
             list.end());
}

}  // namespace

Result<Edited> import_site_table(const Worksheet& sheet, std::string_view text, bool all_rows) {
  const Result<file::SiteTable> table = file::read_site_table(text);
  if (!table.ok()) return table.error();
  Edited edited{sheet, "copy rows of site table " + table->name};
  document::TypedFigures& figures = edited.sheet.typed_figures.change();
  document::TypedBonds& bonds = edited.sheet.typed_bonds.change();
  take_out(figures, table->name);
  take_out(bonds, table->name);

  document::TypedFigures together = table->figures;
  together.insert(together.end(), figures.begin(), figures.end());
  document::SheetLibrary library(together);
  const Used used = used_by(sheet, library);
  std::size_t copied = 0;
  // Site rows stand first: what is typed on the sheet lies over them.
  document::TypedFigures kept_figures;
  for (std::size_t i = 0; i < table->figures.size(); ++i) {
    if (!all_rows && used.species.count(library.figures()[i].species) == 0) continue;
    kept_figures.push_back(table->figures[i]);
    ++copied;
  }
  figures.insert(figures.begin(), kept_figures.begin(), kept_figures.end());
  document::TypedBonds kept_bonds;
  for (const document::TypedBond& bond : table->bonds) {
    const Result<molecule::BondType> type = molecule::parse_bond_type(bond.bond);
    if (!all_rows && (!type.ok() || used.bonds.count(*type) == 0)) continue;
    kept_bonds.push_back(bond);
    ++copied;
  }
  bonds.insert(bonds.begin(), kept_bonds.begin(), kept_bonds.end());
  for (const file::SiteTable::Heat& heat : table->heats) {
    const Result<balance::Reaction> reaction = balance::read_reaction(heat.equation, library);
    if (!reaction.ok()) continue;
    for (std::size_t i = 0; i < edited.sheet.reactions.size(); ++i) {
      const document::TypedHeat& present = edited.sheet.reactions[i]->measured;
      const bool free = present.blank() || present.from == table->name;
      if (!free || !used.reactions[i]) continue;
      const std::optional<double> times = balance::times_of(*used.reactions[i], *reaction);
      if (!times) continue;
      edited.sheet.reactions[i].change().measured =
          brought_to(*used.reactions[i], *reaction, *times, heat.heat);
      ++copied;
    }
  }
  if (copied == 0) {
    return Error{"site_table.nothing_used",
                 "No row of the site table \"" + table->name + "\" belongs to an equation of this sheet.",
                 "arguments.text", "Type the equations first, or copy all rows."};
  }
  return edited;
}

}  // namespace heatledger::page
