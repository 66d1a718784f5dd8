// Per mole of a species, per kilogram of it, per kilogram of all reactants.
#include "core/balance/ledger.hpp"

namespace heatledger::balance {
namespace {

std::string lower(std::string_view text) {
  std::string result(text);
  for (char& c : result) {
    if (c >= 'A' && c <= 'Z') c = static_cast<char>(c - 'A' + 'a');
  }
  return result;
}

std::string_view trimmed(std::string_view text) {
  while (!text.empty() && text.front() == ' ') text.remove_prefix(1);
  while (!text.empty() && text.back() == ' ') text.remove_suffix(1);
  return text;
}

bool goes_by(const ReactionSpecies& entry, const std::string& wanted) {
  return lower(entry.term.species) == wanted || lower(entry.species->name) == wanted ||
         lower(entry.term.species + phase_suffix(entry.term)) == wanted;
}

std::optional<std::size_t> find_species(const Reaction& reaction, std::string_view name) {
  const std::string wanted = lower(name);
  for (std::size_t i = 0; i < reaction.species.size(); ++i) {
    if (goes_by(reaction.species[i], wanted)) return i;
  }
  return std::nullopt;
}

Error no_mass(const ReactionSpecies& entry) {
  return Error{"ledger.no_molar_mass",
               "The molar mass of " + entry.species->name +
                   " is not known, so nothing can be stated per kilogram of it.",
               "basis", "State the figure per mole, or give the species a formula or a molar mass."};
}

Result<Basis> per_reactants(const Reaction& reaction) {
  double mass = 0;
  for (const ReactionSpecies& entry : reaction.species) {
    if (entry.product) continue;
    if (!(entry.species->molar_mass > 0)) return no_mass(entry);
    mass += entry.coefficient() * entry.species->molar_mass;
  }
  Basis basis;
  basis.kind = Basis::Kind::KilogramOfReactants;
  basis.factor = 1 / mass;
  basis.text = "per kg of all reactants";
  basis.unit = "kJ/kg";
  return basis;
}

}  // namespace

Result<Basis> find_basis(const Reaction& reaction, std::string_view name) {
  name = trimmed(name);
  Basis basis;
  if (name.empty()) {
    basis.text = "as written";
    basis.unit = "kJ";
    return basis;
  }
  const bool per_kilogram = name.size() > 3 && lower(name.substr(0, 3)) == "kg ";
  const std::string_view wanted = per_kilogram ? trimmed(name.substr(3)) : name;
  const std::optional<std::size_t> found = find_species(reaction, wanted);
  if (!found && per_kilogram && lower(wanted) == "reactants") return per_reactants(reaction);
  if (!found) {
    std::string known;
    for (const BasisChoice& choice : basis_choices(reaction)) {
      if (!choice.name.empty()) known += (known.empty() ? "" : ", ") + choice.name;
    }
    return Error{"ledger.basis_unknown", "\"" + std::string(name) + "\" is no species of this equation.",
                 "basis", "Choose one of: " + known + "."};
  }
  const ReactionSpecies& entry = reaction.species[*found];
  basis.species = *found;
  if (!per_kilogram) {
    basis.kind = Basis::Kind::MoleOf;
    basis.factor = 1 / entry.coefficient();
    basis.text = "per mol " + display_species(entry);
    basis.unit = "kJ/mol";
    return basis;
  }
  if (!(entry.species->molar_mass > 0)) return no_mass(entry);
  basis.kind = Basis::Kind::KilogramOf;
  basis.factor = 1 / (entry.coefficient() * entry.species->molar_mass);
  basis.text = "per kg " + display_species(entry);
  basis.unit = "kJ/kg";
  return basis;
}

std::vector<BasisChoice> basis_choices(const Reaction& reaction) {
  std::vector<BasisChoice> choices;
  choices.push_back(BasisChoice{"", "as written"});
  bool all_masses = true;
  for (const ReactionSpecies& entry : reaction.species) {
    choices.push_back(BasisChoice{entry.term.species, "per mol " + display_species(entry)});
    all_masses = all_masses && (entry.product || entry.species->molar_mass > 0);
  }
  for (const ReactionSpecies& entry : reaction.species) {
    if (entry.species->molar_mass > 0) {
      choices.push_back(BasisChoice{"kg " + entry.term.species, "per kg " + display_species(entry)});
    }
  }
  if (all_masses) choices.push_back(BasisChoice{"kg reactants", "per kg of all reactants"});
  return choices;
}

}  // namespace heatledger::balance
