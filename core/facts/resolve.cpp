#include "core/facts/resolve.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/facts/ester_name.hpp"
#include "core/facts/species_build.hpp"
#include "core/molecule/line_formula.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::facts {

namespace {

using Answer = Result<std::shared_ptr<const Species>>;

std::string_view trimmed(std::string_view text) {
  const auto is_blank = [](char c) { return c == ' ' || c == '\t'; };
  while (!text.empty() && is_blank(text.front())) text.remove_prefix(1);
  while (!text.empty() && is_blank(text.back())) text.remove_suffix(1);
  return text;
}

/// "CCO", "OO": one element symbol twice in a row, as SMILES has it and formulas do not.
bool repeats_a_symbol(std::string_view text) {
  for (std::size_t i = 1; i < text.size(); ++i) {
    if (text[i] == text[i - 1] && text[i] >= 'A' && text[i] <= 'Z') {
      const bool two_letters = i + 1 < text.size() && text[i + 1] >= 'a' && text[i + 1] <= 'z';
      if (!two_letters) return true;  // "CCl" writes two elements, "CCO" carbon twice
    }
    if (i >= 3 && text[i] == text[i - 2] && text[i - 1] == text[i - 3] && text[i] >= 'a' && text[i] <= 'z')
      return true;  // "ClCl"
  }
  return false;
}

/// Signs that stand in SMILES and in no name or formula: what to blame when nothing can read the text.
bool looks_like_smiles(std::string_view text) {
  if (text.find(' ') != std::string_view::npos) return false;
  return text.find_first_of("=#@\\/%") != std::string_view::npos || text.substr(0, 1) == "[";
}

/// "[CH2CH(C6H5)]n", "(C2H4)n", "-(CH2CH2)-n", "-[CH2O]n-".
bool looks_like_polymer(std::string_view text) {
  while (!text.empty() && text.back() == '-') text.remove_suffix(1);
  if (text.size() < 4 || text.back() != 'n') return false;
  text.remove_suffix(1);
  while (!text.empty() && (text.back() == '-' || text.back() == '_')) text.remove_suffix(1);
  while (!text.empty() && text.front() == '-') text.remove_prefix(1);
  return !text.empty() &&
         ((text.front() == '[' && text.back() == ']') || (text.front() == '(' && text.back() == ')'));
}

Error written_as_polymer(std::string_view text) {
  return Error{"species.repeat_unit",
               "\"" + std::string(text) + "\" reads like the repeat unit of a polymer.", std::string(text),
               "Write one unit as SMILES in double quotes with * at both ends: \"*CC(*)c1ccccc1\" is that of "
               "polystyrene, \"*CC*\" that of polyethylene; (l) behind it for a melt or an amorphous solid."};
}

std::string list_names(const std::vector<const Compound*>& compounds, std::size_t most,
                       std::string_view last_joint) {
  std::string out;
  const std::size_t shown = std::min(compounds.size(), most);
  for (std::size_t i = 0; i < shown; ++i) {
    if (i > 0) out += i + 1 == compounds.size() ? std::string(last_joint) : ", ";
    out += compounds[i]->name;
  }
  if (compounds.size() > shown)
    out += " and " + machine_number(static_cast<double>(compounds.size() - shown)) + " more";
  return out;
}

Error unknown(std::string_view text, const Library& library) {
  Error error{"species.unknown", "No name, formula or structure in \"" + std::string(text) + "\".",
              std::string(text), "Write a name of the library, a formula, or SMILES in double quotes."};
  std::string names;
  for (const Library::Completion& near : library.complete(text, 3)) {
    names += (names.empty() ? "" : ", ") + std::string(near.matched);
  }
  if (!names.empty()) error.hint = "Nearest names: " + names + ".";
  return error;
}

/// One compound out of several of the same composition, where a bare formula has a settled meaning.
const Compound* settled(const std::vector<const Compound*>& found) {
  for (const Compound* candidate : found) {
    if (candidate->usual_of_formula || candidate->reference_element) return candidate;
  }
  const bool crystals = std::none_of(found.begin(), found.end(),
                                     [](const Compound* c) { return c->structure == Structure::Molecule; });
  return crystals ? found.front() : nullptr;
}

Error several_isomers(std::string_view text, const std::vector<const Compound*>& found) {
  return Error{"species.several_isomers",
               std::string(text) + " could be " + list_names(found, 6, " or ") + ".", std::string(text),
               "Write the name, the condensed formula, or SMILES in double quotes."};
}

std::string also_same_formula(std::string_view text, const Compound& taken,
                              std::vector<const Compound*> found) {
  found.erase(std::remove(found.begin(), found.end(), &taken), found.end());
  return std::string(text) + " read as " + std::string(taken.name) + "; the same formula has " +
         list_names(found, 3, " and ");
}

/// What the text would be as SMILES, for a note: the library's name, else the formula.
std::string name_as_smiles(const molecule::Graph& graph, const Library& library) {
  const std::string hill = molecule::hill_formula(molecule::composition(graph));
  if (const Compound* compound = library.find_structure(molecule::canonical_smiles(graph), hill))
    return std::string(compound->name);
  return molecule::typeset_formula(hill);
}

std::string formula_won(std::string_view text, const Species& species, const molecule::Graph& other,
                        const Library& library) {
  return "read as formula: " + species.name + "; \"" + std::string(text) + "\" in quotes is " +
         name_as_smiles(other, library);
}

/// The readings of one unquoted text.
class Reader {
 public:
  Reader(std::string_view text, const Library& library) : text_(text), library_(library) {}

  Answer read() {
    const Compound* named = library_.find_name(text_);
    formula_ = molecule::parse_formula(text_);
    if (formula_->ok()) found_ = library_.find_formula(molecule::hill_formula(**formula_));
    if (named != nullptr) return read_name(*named);
    if (const AqueousSubstance* ion = find_aqueous_name(text_)) return read_aqueous(*ion);

    structure_ = molecule::parse_smiles(text_);
    if (formula_->ok()) {
      const bool differs = structure_->ok() && !(molecule::composition(**structure_) == **formula_);
      if (!differs && structure_->ok()) return Answer(species_of(text_, std::move(**structure_), library_));
      if (!differs || !repeats_a_symbol(text_)) return read_formula(differs);
    }
    if (structure_->ok()) return Answer(species_of(text_, std::move(**structure_), library_));
    if (const Result<molecule::Graph> line = molecule::parse_line_formula(text_)) {
      return Answer(species_of(text_, *line, library_));
    }
    if (looks_like_polymer(text_)) return written_as_polymer(text_);
    if (looks_like_smiles(text_)) return structure_->error();
    if (const std::optional<std::string> ester = smiles_of_ester(text_)) return read_ester(*ester);
    return unknown(text_, library_);
  }

 private:
  Answer read_name(const Compound& named) {
    const bool other_formula = !found_.empty() && found_.front()->formula != named.formula;
    if (!other_formula) return Answer(species_of(text_, named));
    const Compound* taken = found_.size() == 1 ? found_.front() : settled(found_);
    if (taken == nullptr) return several_isomers(text_, found_);
    const std::shared_ptr<Species> species = species_of(text_, *taken);
    species->note =
        "read as formula: " + species->name + "; the name also stands for " + std::string(named.name);
    return Answer(species);
  }

  Answer read_aqueous(const AqueousSubstance& substance) {
    if (const Compound* compound = library_.find_name(substance.name))
      return Answer(species_of(text_, *compound));
    return Answer(species_of(text_, substance));
  }

  Answer read_formula(bool smiles_differs) {
    std::shared_ptr<Species> species;
    if (Result<molecule::Graph> line = molecule::parse_line_formula(text_)) {
      species = species_of(text_, std::move(*line), library_);
      if (species->compound == nullptr && species->aqueous == nullptr)
        species->name = molecule::typeset_formula(text_);
    } else if (found_.size() == 1) {
      species = species_of(text_, *found_.front());
    } else if (found_.size() > 1) {
      const Compound* taken = settled(found_);
      if (taken == nullptr) return several_isomers(text_, found_);
      species = species_of(text_, *taken);
      species->note = also_same_formula(text_, *taken, found_);
    } else {
      species = species_of(text_, **formula_);
    }
    if (smiles_differs) {
      if (!species->note.empty()) species->note += "; ";
      species->note += formula_won(text_, *species, **structure_, library_);
    }
    return Answer(species);
  }

  Answer read_ester(const std::string& smiles) {
    Result<molecule::Graph> graph = molecule::parse_smiles(smiles);
    if (!graph) return unknown(text_, library_);
    std::shared_ptr<Species> species = species_of(text_, std::move(graph).value(), library_);
    if (species->compound == nullptr)
      species->note = std::string(text_) + " read by its name as \"" + smiles + "\"";
    return Answer(species);
  }

  std::string_view text_;
  const Library& library_;
  std::optional<Result<molecule::Composition>> formula_;
  std::optional<Result<molecule::Graph>> structure_;
  std::vector<const Compound*> found_;  ///< compounds of the composition, if the text is a formula
};

Error empty_species() {
  return Error{"species.empty", "No species is written here.", "",
               "Write a name, a formula, or SMILES in double quotes."};
}

}  // namespace

Answer resolve_species(std::string_view text, bool quoted) {
  return resolve_species(text, quoted, Library::embedded());
}

Answer resolve_species(std::string_view text, bool quoted, const Library& library) {
  text = trimmed(text);
  if (text.empty()) return empty_species();
  if (!quoted) return Reader(text, library).read();
  Result<molecule::Graph> graph = molecule::parse_smiles(text);
  if (!graph) return graph.error();
  return Answer(species_of(text, std::move(*graph), library));
}

Answer make_coded_species(std::string_view name, double molar_mass, std::string_view formula) {
  name = trimmed(name);
  formula = trimmed(formula);
  if (name.empty()) return empty_species();
  auto species = std::make_shared<Species>();
  if (!formula.empty()) {
    const Result<molecule::Composition> composition = molecule::parse_formula(formula);
    if (!composition) return composition.error();
    species = species_of(name, *composition);
  }
  const bool typed = molar_mass != 0;
  if (typed && !(std::isfinite(molar_mass) && molar_mass > 0)) {
    return Error{"species.molar_mass",
                 "The molar mass of " + std::string(name) + " is not a positive number.", std::string(name),
                 "Type a molar mass such as 250 g/mol."};
  }
  if (!typed && formula.empty()) {
    return Error{"species.molar_mass", std::string(name) + " has neither a molar mass nor a formula.",
                 std::string(name), "Type one of them."};
  }
  // A formula fixes the mass to five digits; typed masses are rounded to three or four.
  if (typed && !formula.empty() && std::abs(molar_mass - species->molar_mass) > 0.005 * species->molar_mass) {
    return Error{"species.molar_mass",
                 "The molar mass of " + std::string(name) + " is " + machine_number(molar_mass * 1e3, 6) +
                     " g/mol, its formula gives " + machine_number(species->molar_mass * 1e3, 6) + " g/mol.",
                 std::string(name), "Correct one of them."};
  }
  species->text = name;
  species->name = name;
  species->coded = true;
  if (typed) species->molar_mass = molar_mass;
  return Answer(species);
}

}  // namespace heatledger::facts
