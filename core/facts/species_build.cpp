#include "core/facts/species_build.hpp"

#include <algorithm>
#include <iterator>

#include "core/base/check.hpp"
#include "core/facts/double_bond_stereo.hpp"
#include "core/molecule/aromaticity.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::facts {

namespace {

constexpr double kKilogramsPerGram = 1e-3;

void set_composition(Species& species, molecule::Composition composition) {
  species.molar_mass = molecule::molar_mass(composition) * kKilogramsPerGram;
  species.composition = std::move(composition);
}

/// The open ends of a unit are one bond to the next unit: the two bonds to '*' become the single bond between
/// the atoms that they hang on.
void link_open_ends(const molecule::Graph& graph, molecule::BondTally& tally) {
  int element[2] = {0, 0}, ends = 0;
  for (const molecule::Bond& bond : graph.bonds) {
    const int a = graph.atoms[bond.a].element, b = graph.atoms[bond.b].element;
    if (a == 0 || b == 0) element[ends++ & 1] = a == 0 ? b : a;
  }
  tally.erase(std::remove_if(tally.begin(), tally.end(),
                             [](const molecule::BondCount& entry) {
                               return entry.type.first == 0 || entry.type.second == 0;
                             }),
              tally.end());
  const molecule::BondType link =
      molecule::make_bond_type(element[0], element[1], molecule::Order::Single, molecule::Setting::Plain);
  const auto place = std::lower_bound(
      tally.begin(), tally.end(), link,
      [](const molecule::BondCount& entry, const molecule::BondType& type) { return entry.type < type; });
  if (place != tally.end() && place->type == link) {
    ++place->count;
  } else {
    tally.insert(place, molecule::BondCount{link, 1});
  }
}

void set_structure(Species& species, molecule::Graph graph, std::string canonical) {
  molecule::perceive_aromaticity(graph);
  species.bonds = molecule::count_bonds_with_rings(graph);
  if (species.repeat_unit) link_open_ends(graph, species.bonds);
  species.canonical = std::move(canonical);
  species.graph = std::move(graph);
}

/// Two atoms '*', each with one bond: a unit of a chain.
bool is_repeat_unit(const molecule::Graph& graph) {
  std::size_t ends = 0;
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    if (graph.atoms[i].element != 0) continue;
    const auto bonds = std::count_if(graph.bonds.begin(), graph.bonds.end(),
                                     [&](const molecule::Bond& bond) { return bond.a == i || bond.b == i; });
    if (bonds != 1) return false;
    ++ends;
  }
  return ends == 2;
}

bool writes_stereo(std::string_view smiles) {
  return smiles.find_first_of("/\\@") != std::string_view::npos;
}

DoubleBondStereo stereo_of(const Compound& compound) {
  const Result<molecule::Graph> graph = molecule::parse_smiles(compound.smiles);
  return graph ? double_bond_stereo(*graph) : DoubleBondStereo();
}

/// Of several compounds that differ in stereo only: the one written, else the commonest, with a note.
const Compound& choose_stereo(std::string_view text, const molecule::Graph& graph,
                              std::vector<const Compound*> found, std::string& note) {
  if (found.size() == 1) return *found.front();
  for (const Compound* candidate : found) {
    if (candidate->smiles == text) return *candidate;
  }
  const bool written = writes_stereo(text);
  const auto keep = [&](auto fits) {
    std::vector<const Compound*> fitting;
    std::copy_if(found.begin(), found.end(), std::back_inserter(fitting), fits);
    if (!fitting.empty()) found = std::move(fitting);
  };
  if (written) {
    const DoubleBondStereo wanted = double_bond_stereo(graph);
    keep([&](const Compound* c) { return stereo_of(*c) == wanted; });
  } else {
    keep([](const Compound* c) { return !writes_stereo(c->smiles); });
  }
  const Compound& taken = *found.front();
  if (found.size() > 1) {
    note = written ? "stereo marks at rings and centres are not told apart here: taken as "
                   : "no stereo marks written: taken as ";
    note += taken.name;
    note += "; the same bonds has ";
    note += found[1]->name;
  }
  return taken;
}

}  // namespace

std::shared_ptr<Species> species_of(std::string_view text, const Compound& compound) {
  auto species = std::make_shared<Species>();
  species->text = text;
  species->name = compound.name;
  species->compound = &compound;
  species->aqueous = find_aqueous_name(compound.name);
  // Site records may hold texts that cannot be read: such a species has no composition or no structure.
  if (const Result<molecule::Composition> composition = molecule::parse_formula(compound.formula)) {
    set_composition(*species, *composition);
  }
  if (compound.structure == Structure::Molecule) {
    if (Result<molecule::Graph> graph = molecule::parse_smiles(compound.smiles)) {
      if (!species->composition) set_composition(*species, molecule::composition(*graph));
      std::string canonical = molecule::canonical_smiles(*graph);
      set_structure(*species, std::move(*graph), std::move(canonical));
    }
  }
  return species;
}

std::shared_ptr<Species> species_of(std::string_view text, const AqueousSubstance& substance) {
  auto species = std::make_shared<Species>();
  species->text = text;
  species->name = substance.name;
  species->aqueous = &substance;
  const Result<molecule::Composition> composition = molecule::parse_formula(substance.formula);
  CHECK(composition.ok(), "the formula of every substance in water can be read");
  set_composition(*species, *composition);
  return species;
}

std::shared_ptr<Species> species_of(std::string_view text, molecule::Graph graph, const Library& library) {
  molecule::Composition composition = molecule::composition(graph);
  const std::string hill = molecule::hill_formula(composition);
  std::string canonical = molecule::canonical_smiles(graph);
  if (const std::vector<const Compound*> found = library.find_structures(canonical, hill); !found.empty()) {
    std::string note;
    std::shared_ptr<Species> species = species_of(text, choose_stereo(text, graph, found, note));
    species->note = std::move(note);
    return species;
  }
  auto species = std::make_shared<Species>();
  species->text = text;
  species->name = text;
  species->repeat_unit = is_repeat_unit(graph);
  if (composition.charge != 0) species->aqueous = find_aqueous_formula(hill);
  if (species->aqueous != nullptr) species->name = species->aqueous->name;
  set_composition(*species, std::move(composition));
  set_structure(*species, std::move(graph), std::move(canonical));
  return species;
}

std::shared_ptr<Species> species_of(std::string_view text, const molecule::Composition& composition) {
  auto species = std::make_shared<Species>();
  species->text = text;
  species->name = molecule::typeset_formula(text);
  if (composition.charge != 0) species->aqueous = find_aqueous_formula(molecule::hill_formula(composition));
  set_composition(*species, composition);
  return species;
}

}  // namespace heatledger::facts
