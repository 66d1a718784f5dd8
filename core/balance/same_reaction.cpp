#include "core/balance/same_reaction.hpp"

#include <cmath>
#include <map>

#include "core/base/number_text.hpp"
#include "core/thermo/species_enthalpy.hpp"

namespace heatledger::balance {
namespace {

/// What a term stands for, as text: side, compound or structure, phase reckoned with, strength.
std::string meaning_of(const ReactionSpecies& entry) {
  const facts::Species& species = *entry.species;
  std::string text = entry.product ? ">" : "<";
  if (species.compound != nullptr) {
    text += "c" + std::to_string(species.compound->id);
  } else {
    text += species.canonical.empty() ? "n" + species.name : "s" + species.canonical;
  }
  const molecule::Phase phase = thermo::phase_taken(species, entry.term.phase).phase;
  text += " " + std::string(molecule::phase_text(phase));
  if (phase != molecule::Phase::Aqueous || !entry.term.strength) return text;
  const std::optional<double> ratio = thermo::water_ratio(*entry.term.strength, species.molar_mass);
  // wt% and moles of water of one solution differ in the last bits.
  return ratio ? text + " " + machine_number(*ratio, 8) : text;
}

std::map<std::string, double> sums(const Reaction& reaction) {
  std::map<std::string, double> sums;
  for (const ReactionSpecies& entry : reaction.species) sums[meaning_of(entry)] += entry.coefficient();
  return sums;
}

}  // namespace

std::optional<double> times_of(const Reaction& reaction, const Reaction& other) {
  const std::map<std::string, double> ours = sums(reaction), theirs = sums(other);
  if (ours.empty() || ours.size() != theirs.size()) return std::nullopt;
  const double times = ours.begin()->second / theirs.begin()->second;
  auto their = theirs.begin();
  for (const auto& one : ours) {
    if (one.first != their->first || !(one.second > 0) || !(their->second > 0)) return std::nullopt;
    // Coefficients typed as decimals, 0.333 for 1/3, are meant as the fraction.
    if (std::fabs(one.second - times * their->second) > 0.002 * one.second) return std::nullopt;
    ++their;
  }
  return times;
}

}  // namespace heatledger::balance
