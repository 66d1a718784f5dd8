#include "core/document/typed_species.hpp"

#include <algorithm>

#include "core/document/typed_energy.hpp"
#include "core/document/typed_rows.hpp"
#include "core/facts/resolve.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/smiles.hpp"
#include "core/units/quantity_text.hpp"

namespace heatledger::document {
namespace {

using facts::FigureKind;
using facts::Species;
namespace d = units::dimension;

constexpr std::string_view kFormula = "formula", kStructure = "structure", kMolarMass = "molar_mass";

std::string path_of(std::size_t index, const char* field) {
  return "species[" + std::to_string(index) + "]." + field;
}

bool must_be_positive(FigureKind kind) {
  switch (kind) {
    case FigureKind::FormationGas:
    case FigureKind::FormationLiquid:
    case FigureKind::FormationSolid:
    case FigureKind::Dissolving:
      return false;
    default:
      return true;
  }
}

/// A figure of that dimension; a heat capacity may also be typed per mass once the molar mass is known.
Result<units::TypedValue> read_figure(const std::string& text, const FigureName& name, double molar_mass) {
  if (name.dimension == d::kMolarHeatCapacity && molar_mass > 0) {
    const Result<units::TypedValue> per_mass = units::parse_quantity(text, d::kMassHeatCapacity);
    if (per_mass.ok()) {
      units::TypedValue value = *per_mass;
      value.value *= molar_mass;
      if (value.u95) *value.u95 *= molar_mass;
      return value;
    }
  }
  if (name.dimension == d::kEnergyPerMole) {
    const Result<uncertainty::Figure> energy = parse_molar_energy(text);  // a bare number is kJ/mol
    if (energy.ok()) {
      units::TypedValue value;
      value.value = energy->value;
      if (energy->u95 > 0) value.u95 = energy->u95;
      return value;
    }
  }
  return units::parse_quantity(text, name.dimension);
}

/// "CCO" in quotes is SMILES; otherwise the text as the equations write it.
std::string_view unquoted(std::string_view text, bool& quoted) {
  quoted = text.size() >= 2 && text.front() == '"' && text.back() == '"';
  return quoted ? text.substr(1, text.size() - 2) : text;
}

}  // namespace

const std::vector<FigureName>& typed_figure_names() {
  static const std::vector<FigureName> names{
      {"formation_gas", "formation enthalpy, gas", "kJ/mol", d::kEnergyPerMole, FigureKind::FormationGas},
      {"formation_liquid", "formation enthalpy, liquid", "kJ/mol", d::kEnergyPerMole,
       FigureKind::FormationLiquid},
      {"formation_solid", "formation enthalpy, solid", "kJ/mol", d::kEnergyPerMole,
       FigureKind::FormationSolid},
      {"heat_capacity_gas", "heat capacity, gas", "J/(mol K)", d::kMolarHeatCapacity,
       FigureKind::HeatCapacityGas},
      {"heat_capacity_liquid", "heat capacity, liquid", "J/(mol K)", d::kMolarHeatCapacity,
       FigureKind::HeatCapacityLiquid},
      {"heat_capacity_solid", "heat capacity, solid", "J/(mol K)", d::kMolarHeatCapacity,
       FigureKind::HeatCapacitySolid},
      {"vaporisation_298", "vaporisation at 25 \u00b0C", "kJ/mol", d::kEnergyPerMole,
       FigureKind::Vaporisation298},
      {"vaporisation_boiling", "vaporisation at the boiling point", "kJ/mol", d::kEnergyPerMole,
       FigureKind::VaporisationBoiling},
      {"fusion", "enthalpy of fusion", "kJ/mol", d::kEnergyPerMole, FigureKind::FusionEnthalpy},
      {"dissolving", "heat of dissolving, as (diss)", "kJ/mol", d::kEnergyPerMole, FigureKind::Dissolving},
      {"melting_point", "melting point", "degC", d::kTemperature, FigureKind::MeltingPoint},
      {"boiling_point", "boiling point", "degC", d::kTemperature, FigureKind::BoilingPoint},
      {"entropy_gas", "entropy, gas", "J/(mol K)", d::kMolarHeatCapacity, FigureKind::EntropyGas},
      {"entropy_liquid", "entropy, liquid", "J/(mol K)", d::kMolarHeatCapacity, FigureKind::EntropyLiquid},
      {"entropy_solid", "entropy, solid", "J/(mol K)", d::kMolarHeatCapacity, FigureKind::EntropySolid},
      {"density_liquid", "density, liquid", "kg/m3", d::kDensity, FigureKind::LiquidDensity},
      {"critical_temperature", "critical temperature", "degC", d::kTemperature,
       FigureKind::CriticalTemperature},
      {"critical_pressure", "critical pressure", "bar", d::kPressure, FigureKind::CriticalPressure},
      {kMolarMass, "molar mass", "g/mol", d::kMolarMass, std::nullopt},
      {kFormula, "formula", "", d::kNumber, std::nullopt},
      {kStructure, "structure, SMILES", "", d::kNumber, std::nullopt},
  };
  return names;
}

const FigureName* find_typed_figure(std::string_view text) {
  for (const FigureName& name : typed_figure_names()) {
    if (name.id == text || name.words == text) return &name;
  }
  return nullptr;
}

/// All that was typed of one species.
struct SheetLibrary::Gathered {
  std::string text;  ///< as typed first
  facts::SiteRecord record;
  const facts::Compound* published = nullptr;
  double molar_mass = 0;  ///< [kg/mol]; of the species below, or typed
  std::size_t molar_mass_row = 0;
  bool molar_mass_typed = false;
};

SheetLibrary::SheetLibrary(const TypedFigures& typed) : figures_(typed.size()) {
  std::vector<Gathered> gathered;
  // Rows of a site table lie under what is typed on the sheet; what a species is comes before its figures,
  // since a heat capacity per kilogram waits for the molar mass.
  for (const bool identity : {true, false}) {
    for (const bool site : {true, false}) {
      for (std::size_t i = 0; i < typed.size(); ++i) {
        if (typed[i].from.empty() == site) continue;
        const FigureName* name = find_typed_figure(typed[i].figure);
        if ((name != nullptr && !name->kind) == identity) read(typed, i, gathered);
      }
    }
  }
  std::vector<facts::SiteRecord> records;
  for (Gathered& one : gathered) {
    if (one.molar_mass_typed) {
      const auto coded = facts::make_coded_species(one.record.name, one.molar_mass, one.record.formula);
      if (!coded.ok()) {
        errors_.push_back(placed(coded.error(), path_of(one.molar_mass_row, "value")));
      } else if (one.record.formula.empty() && one.record.smiles.empty()) {
        molar_mass_[one.record.name] = one.molar_mass;
      }
    }
    records.push_back(std::move(one.record));
  }
  if (records.empty()) return;
  layer_ = std::make_unique<facts::LayeredLibrary>(facts::Library::embedded(), std::move(records),
                                                   "typed on this sheet");
}

SheetLibrary::~SheetLibrary() = default;

const facts::Library& SheetLibrary::library() const {
  if (layer_ != nullptr) return *layer_;
  return facts::Library::embedded();
}

void SheetLibrary::read(const TypedFigures& typed, std::size_t index, std::vector<Gathered>& gathered) {
  const TypedFigure& entry = typed[index];
  ReadFigure& out = figures_[index];
  if (entry.species.empty() && entry.value.empty()) return;
  bool quoted = false;
  const std::string text(unquoted(entry.species, quoted));
  const Result<std::shared_ptr<const Species>> below = facts::resolve_species(text, quoted);
  // A name that nothing knows is a species of this sheet: a code, a mixture, an intermediate.
  if (!below.ok() && (quoted || text.empty() || below.error().code == "species.several_isomers")) {
    errors_.push_back(placed(below.error(), path_of(index, "species")));
    return;
  }
  const facts::Compound* published = below.ok() ? (*below)->compound : nullptr;
  auto found = std::find_if(gathered.begin(), gathered.end(), [&](const Gathered& one) {
    return published != nullptr ? one.published == published : one.text == text;
  });
  if (found == gathered.end()) {
    Gathered fresh;
    fresh.text = text;
    fresh.published = published;
    fresh.record.name = published != nullptr ? std::string(published->name) : text;
    if (published != nullptr) fresh.record.cas = std::string(published->cas);
    if (below.ok()) fresh.molar_mass = (*below)->molar_mass;
    if (below.ok() && published == nullptr) {
      if ((*below)->composition) fresh.record.formula = molecule::hill_formula(*(*below)->composition);
      if ((*below)->graph) fresh.record.smiles = (*below)->canonical;
    }
    gathered.push_back(std::move(fresh));
    found = std::prev(gathered.end());
  }
  out.species = found->record.name;
  out.new_species = published == nullptr;
  const FigureName* name = find_typed_figure(entry.figure);
  if (name == nullptr) {
    if (entry.figure.empty() && entry.value.empty()) return;
    errors_.push_back({"typed_species.figure",
                       entry.figure.empty() ? "It is not said what this figure of " + text + " is."
                                            : "No figure of a species is called \"" + entry.figure + "\".",
                       path_of(index, "figure"),
                       "Choose one from the list, such as formation enthalpy, liquid."});
    return;
  }
  if (entry.value.empty()) return;
  if (!name->kind) {
    if (below.ok()) {
      errors_.push_back({"typed_species.published_identity",
                         text + " is known already: what it is cannot be typed over.",
                         path_of(index, "value"), "Give your species a name of its own."});
    } else if (name->id == kFormula) {
      const Result<molecule::Composition> formula = molecule::parse_formula(entry.value);
      if (!formula.ok()) {
        errors_.push_back(placed(formula.error(), path_of(index, "value")));
        return;
      }
      found->record.formula = molecule::hill_formula(*formula);
      if (!found->molar_mass_typed) found->molar_mass = molecule::molar_mass(*formula) / 1000;
    } else if (name->id == kStructure) {
      bool marks = false;
      const std::string smiles(unquoted(entry.value, marks));
      const Result<molecule::Graph> graph = molecule::parse_smiles(smiles);
      if (!graph.ok()) {
        errors_.push_back(placed(graph.error(), path_of(index, "value")));
        return;
      }
      found->record.smiles = smiles;
      found->record.formula = molecule::hill_formula(molecule::composition(*graph));
      if (!found->molar_mass_typed)
        found->molar_mass = molecule::molar_mass(molecule::composition(*graph)) / 1000;
    } else {
      const Result<units::TypedValue> mass = units::parse_quantity(entry.value, d::kMolarMass);
      if (!mass.ok()) {
        errors_.push_back(placed(mass.error(), path_of(index, "value")));
        return;
      }
      found->molar_mass = mass->value;
      found->molar_mass_row = index;
      found->molar_mass_typed = true;
      out.value = uncertainty::Figure{mass->value, mass->u95.value_or(0)};
    }
    return;
  }
  const Result<units::TypedValue> value = read_figure(entry.value, *name, found->molar_mass);
  if (!value.ok()) {
    errors_.push_back(placed(value.error(), path_of(index, "value")));
    return;
  }
  if (must_be_positive(*name->kind) && value->value <= 0) {
    errors_.push_back({"typed_species.not_positive", "This figure is above zero.", path_of(index, "value"),
                       "Type it without a sign; heats of melting and boiling are taken up."});
    return;
  }
  out.value = uncertainty::Figure{value->value, value->u95.value_or(0)};
  out.exact = out.value->u95 <= 0;
  if (published != nullptr) out.published = facts::figure(*published, *name->kind);
  facts::SiteFigure figure;
  figure.kind = *name->kind;
  figure.value = out.value->value;
  figure.u95 = out.value->u95;
  figure.source = stated_source(entry.source, entry.from, "no source given");
  found->record.figures.push_back(std::move(figure));
  const bool sharpens = *name->kind == FigureKind::FormationGas ||
                        *name->kind == FigureKind::FormationLiquid ||
                        *name->kind == FigureKind::Vaporisation298;
  if (sharpens && !out.exact && std::find(measured_.begin(), measured_.end(), out.species) == measured_.end())
    measured_.push_back(out.species);
}

Result<std::shared_ptr<const Species>> SheetLibrary::species(std::string_view text, bool quoted) {
  std::string key(1, quoted ? '"' : ' ');
  key.append(text);
  if (const auto found = known_.find(key); found != known_.end()) return found->second;
  // A sheet names dozens of species; half-typed names while someone types must not pile up for ever.
  constexpr std::size_t kMostKnown = 4096;
  if (known_.size() >= kMostKnown) known_.clear();
  Result<std::shared_ptr<const Species>> read = facts::resolve_species(text, quoted, library());
  if (!read.ok()) return read;
  std::shared_ptr<const Species> species = *read;
  if (const auto mass = molar_mass_.find(species->name); mass != molar_mass_.end() && !species->composition) {
    auto coded = std::make_shared<Species>(*species);
    coded->molar_mass = mass->second;
    coded->coded = true;
    species = std::move(coded);
  }
  known_.emplace(std::move(key), species);
  return species;
}

}  // namespace heatledger::document
