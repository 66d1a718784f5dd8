#include "core/document/observations.hpp"

#include <cstring>

#include "core/estimate/context_molecule.hpp"
#include "core/thermo/estimated.hpp"

namespace heatledger::document {
namespace {

using estimate::Measurement;
using estimate::Property;
using molecule::Phase;

void add(std::vector<Measurement>& list, Property property, const facts::Species& species,
         const std::shared_ptr<const estimate::ContextMolecule>& molecule, double value, double u95) {
  if (u95 <= 0) return;
  Measurement one;
  one.property = property;
  one.terms.push_back({1, molecule});
  one.value = value;
  one.u95 = u95;
  one.label = species.name;
  list.push_back(std::move(one));
}

void append(std::string& out, const void* bytes, std::size_t size) {
  out.append(static_cast<const char*>(bytes), size);
}

std::string signature_of(const std::vector<Measurement>& list) {
  std::string out;
  for (const Measurement& one : list) {
    append(out, &one.property, sizeof one.property);
    append(out, &one.value, sizeof one.value);
    append(out, &one.u95, sizeof one.u95);
    for (const Measurement::Term& term : one.terms) {
      append(out, &term.coefficient, sizeof term.coefficient);
      append(out, &term.molecule->constitution, sizeof term.molecule->constitution);
      append(out, &term.molecule->stereo, sizeof term.molecule->stereo);
    }
  }
  return out;
}

}  // namespace

std::vector<Measurement> observations_of(SheetLibrary& library) {
  std::vector<Measurement> list;
  for (const std::string& name : library.measured_species()) {
    const facts::Compound* compound = library.library().find_name(name);
    if (compound == nullptr) continue;
    const auto species = library.species(name, false);
    if (!species.ok() || (*species)->compound != compound || !(*species)->graph) continue;
    Result<estimate::ContextMolecule> read = estimate::context_molecule(*(*species)->graph);
    if (!read.ok()) continue;  // outside the model: the figure stands for itself
    const auto molecule = std::make_shared<const estimate::ContextMolecule>(std::move(read).value());
    const auto typed = [](const std::optional<facts::Datum>& datum) { return datum && datum->typed; };
    if (typed(compound->gas.formation_enthalpy)) {
      const facts::Datum& gas = *compound->gas.formation_enthalpy;
      add(list, Property::GasFormation, **species, molecule, gas.value, gas.u95);
    } else if (typed(compound->liquid.formation_enthalpy) && compound->liquid.formation_enthalpy->u95 > 0) {
      // The liquid says something of the gas through its vaporisation, known or estimated.
      const facts::Datum& liquid = *compound->liquid.formation_enthalpy;
      const auto change = thermo::best_gas_to_phase(**species, Phase::Liquid, {});
      if (change.ok()) {
        uncertainty::Quantity gas(liquid.value, liquid.u95,
                                  uncertainty::source_key(uncertainty::SourceKind::Typed, 0));
        gas.add(change->value, -1);
        add(list, Property::GasFormation, **species, molecule, gas.value(), gas.u95());
      }
    }
    if (typed(compound->vaporisation_enthalpy_298)) {
      const facts::Datum& evaporation = *compound->vaporisation_enthalpy_298;
      add(list, Property::Vaporisation298, **species, molecule, evaporation.value, evaporation.u95);
    }
  }
  return list;
}

std::shared_ptr<const estimate::Observations> ObservationStore::of(const std::vector<Measurement>& list) {
  if (list.empty()) return nullptr;
  const std::string signature = signature_of(list);
  for (const Kept& kept : kept_) {
    if (kept.signature == signature) return kept.observations;
  }
  auto observations = std::make_shared<estimate::Observations>();
  // What the model refuses (a figure that is not finite) was refused when it was read; the rest is added.
  for (const Measurement& one : list) (void)observations->add(one).ok();
  constexpr std::size_t kMostKept = 32;
  if (kept_.size() >= kMostKept) kept_.erase(kept_.begin());
  kept_.push_back({signature, observations});
  return observations;
}

}  // namespace heatledger::document
