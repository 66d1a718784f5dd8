#include "core/balance/disagreement.hpp"

#include <cmath>
#include <map>

#include "core/balance/background.hpp"
#include "core/balance/bond_words.hpp"
#include "core/balance/context_rows.hpp"
#include "core/balance/strains.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::balance {
namespace {

using uncertainty::Quantity;

constexpr double kJ = 1000.0;

std::string_view words(std::string_view route) {
  if (route == kAverageRoute) return "average bonds";
  if (route == kContextRoute) return "bonds in context";
  if (route == kFormationRoute) return "formation enthalpies";
  return "the measured heat";
}

std::string capitalised(std::string text) {
  if (!text.empty() && text[0] >= 'a' && text[0] <= 'z') text[0] = static_cast<char>(text[0] - 'a' + 'A');
  return text;
}

/// What a route takes one mole of free atoms' worth of a species for [J/mol]; empty for a measured heat,
/// which belongs to no single species.
std::optional<double> atoms_from(std::string_view route, const Entry& entry, double atoms) {
  const std::optional<Quantity>* value = route == kAverageRoute     ? &entry.priced->per_mole
                                         : route == kContextRoute   ? &entry.figures->context_sum
                                         : route == kFormationRoute ? &entry.figures->formation_row
                                                                    : nullptr;
  if (value == nullptr || !*value) return std::nullopt;
  return route == kFormationRoute ? atoms - (*value)->value() : (*value)->value();
}

struct Gap {
  std::size_t row = 0;
  double joule = 0;  ///< first route less second, for the coefficients written
};

std::optional<Gap> widest_gap(const Background& background, const std::vector<Entry>& entries,
                              std::string_view one, std::string_view other) {
  std::optional<Gap> widest;
  for (std::size_t i = 0; i < entries.size(); ++i) {
    const std::optional<double>& atoms = background.gas_atoms[i];
    if (!atoms) continue;
    const std::optional<double> a = atoms_from(one, entries[i], *atoms),
                                b = atoms_from(other, entries[i], *atoms);
    if (!a || !b) continue;
    const double here = -entries[i].signed_coefficient() * (*a - *b);
    if (!widest || std::fabs(here) > std::fabs(widest->joule)) widest = Gap{i, here};
  }
  return widest;
}

const estimate::Explanation* explanation(const Background& background, std::size_t index) {
  return background.explanations.of(*background.reaction, index, background.observations.get());
}

/// Which bonds of a species the average set and bonds in context price most differently, in one sentence;
/// empty where the structure is outside the model.
std::string bonds_apart(const Background& background, const estimate::BondSet& set, std::size_t index) {
  const estimate::Explanation* explained = explanation(background, index);
  if (explained == nullptr) return {};
  struct Pair {
    double average = 0, context = 0;
  };
  std::map<std::string, Pair> pairs;
  for (const molecule::BondCount& bond : background.reaction->species[index].species->bonds) {
    const estimate::BondValue* price = set.find(bond.type);
    if (price == nullptr) return {};
    pairs[element_pair(bond.type)].average += bond.count * price->value;
  }
  std::string widest_words;
  double widest = 0;
  for (const estimate::ContextLine& line : explained->lines) {
    const std::string pair = element_pair(line);
    if (!pair.empty()) {
      pairs[pair].context += line.total;
    } else if (std::fabs(line.total) > widest) {
      widest = std::fabs(line.total);
      widest_words = line.text + ", " + display_signed(line.total / kJ, 1) +
                     " kJ/mol in context, which average bonds do not hold";
    }
  }
  for (const auto& pair : pairs) {
    const double apart = std::fabs(pair.second.average - pair.second.context);
    if (apart <= widest) continue;
    widest = apart;
    widest_words = "the " + pair.first + " bonds, " + ledger_kj(pair.second.average) +
                   " kJ/mol by the average set and " + display_number(pair.second.context / kJ, 1) +
                   " in context";
  }
  return widest_words.empty() ? std::string() : " There it is " + widest_words + ".";
}

/// The line of an estimate that rests on least: surroundings that no compound of the table has.
std::string weakest_line(const Background& background, std::size_t index) {
  const estimate::Explanation* explained = explanation(background, index);
  if (explained == nullptr) return {};
  for (const estimate::ContextLine& line : explained->lines) {
    if (line.unseen == 0) continue;
    return " Weakest in context: " + (line.bond.empty() ? line.text : line.bond + " " + line.text) +
           ", surroundings that no compound of the table has.";
  }
  return {};
}

/// Two routes that part beyond their ±, in words; empty where they agree or one has no figure.
/// @param set  of the average route; not asked for others
std::string apart(const Background& background, const estimate::BondSet* set,
                  const std::vector<Entry>& entries, const Route& a, const Route& b) {
  const bool gas = a.gas_298 && b.gas_298;
  if (!gas && (!a.as_written || !b.as_written)) return {};
  const Quantity &first = gas ? *a.gas_298 : *a.as_written, &second = gas ? *b.gas_298 : *b.as_written;
  const double distance = first.value() - second.value();
  const double allowed = std::sqrt(first.u95() * first.u95() + second.u95() * second.u95());
  if (std::fabs(distance) <= allowed) return {};
  std::string text = capitalised(std::string(words(a.name))) +
                     (a.name == kMeasuredRoute ? " is " : " give ") + kj_with_u95(first, "kJ") + ", " +
                     std::string(words(b.name)) + " " + kj_with_u95(second, "kJ") +
                     (gas ? " for the gas: " : " as written: ") + ledger_kj(std::fabs(distance)) +
                     " kJ apart, beyond their ±.";
  if (const std::optional<Gap> gap = widest_gap(background, entries, a.name, b.name)) {
    const ReactionSpecies& entry = background.reaction->species[gap->row];
    text += " Most of it stands on the row of " + display_species(entry) + " (" +
            ledger_kj(std::fabs(gap->joule)) + " kJ).";
    if (a.name == kAverageRoute) {
      for (const std::string& strain : strains_of(*entry.species)) text += " " + capitalised(strain) + ".";
      if (background.by_context) text += bonds_apart(background, *set, gap->row);
    } else {
      text += weakest_line(background, gap->row);
    }
  } else if (a.name == kMeasuredRoute) {
    text +=
        " Look for what the measured figure includes (mixing, evaporation, side reactions) and what it is "
        "stated per.";
  }
  return text;
}

}  // namespace

std::string context_apart(const Background& background) {
  if (!background.by_context) return {};
  return apart(background, nullptr, entries_of(background, background.priced), *background.by_context,
               background.formation);
}

void note_disagreements(Ledger& ledger, const std::vector<Entry>& entries) {
  const Background& background = *ledger.background;
  const bool formed = background.formation.gas_298 || background.formation.as_written;
  const Route* best = formed                  ? &background.formation
                      : background.by_context ? &*background.by_context
                                              : nullptr;
  if (best == nullptr) return;
  const auto note = [&ledger](std::string text) {
    if (!text.empty()) ledger.notes.push_back(std::move(text));
  };
  const auto compare = [&](std::string_view name) {
    const Route* route = find_route(ledger, name);
    if (route != nullptr) note(apart(background, ledger.set.get(), entries, *route, *best));
  };
  compare(kAverageRoute);
  if (formed) note(background.context_apart);
  compare(kMeasuredRoute);
}

}  // namespace heatledger::balance
