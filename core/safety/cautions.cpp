#include "core/safety/cautions.hpp"

#include <algorithm>
#include <functional>
#include <string_view>

#include "core/safety/functional_groups.hpp"

namespace heatledger::safety {
namespace {

using facts::Species;

constexpr int kHydrogen = 1, kCarbon = 6, kOxygen = 8, kChlorine = 17;

double atoms(const Species& species, int element) {
  if (!species.composition) return 0;
  double count = 0;
  for (const auto& [key, number] : species.composition->atoms) count += key % 1000 == element ? number : 0;
  return count;
}

bool is_formula(const Species& species, std::string_view formula) {
  return species.composition && molecule::hill_formula(*species.composition) == formula;
}

bool is_one_of(const Species& species, std::initializer_list<std::string_view> cas) {
  return species.compound != nullptr && std::find(cas.begin(), cas.end(), species.compound->cas) != cas.end();
}

bool organic(const Species& species) {
  return atoms(species, kCarbon) > 0 && atoms(species, kHydrogen) > 0 && !is_formula(species, "CHN");
}

/// Hydroxides, hydrides, amides and alcoholates of the alkali metals.
bool strong_base(const Species& species) {
  const bool hydroxide = is_formula(species, "HNaO") || is_formula(species, "HKO") ||
                         is_formula(species, "HLiO") || is_formula(species, "CsHO");
  return hydroxide || is_one_of(species, {"7646-69-7", "7693-26-7", "7580-67-8", "7782-92-5", "124-41-4",
                                          "141-52-6", "865-47-4", "865-48-5", "109-72-8"});
}

bool strong_acid(const Species& species) {
  return is_one_of(species, {"7664-93-9", "7697-37-2", "7647-01-0", "7601-90-3", "10035-10-6", "7790-94-5",
                             "8014-95-7", "7446-11-9", "75-75-2"});
}

bool has_group(const Species& species, std::initializer_list<std::string_view> names) {
  if (!species.graph) return false;
  for (const GroupFound& group : functional_groups(*species.graph)) {
    if (std::find(names.begin(), names.end(), group.name) != names.end()) return true;
  }
  return false;
}

class Cautions {
 public:
  Cautions(const std::vector<Presence>& substances, const Setting& setting)
      : substances_(substances), setting_(setting) {}

  std::vector<std::string> all() {
    unstable();
    bases();
    acids();
    gases();
    operation();
    if (!list_.empty())
      list_.emplace_back(
          "These are customary cautions, not an assessment: measurement, local codes and licensed practice "
          "go "
          "before them.");
    return std::move(list_);
  }

 private:
  using Test = std::function<bool(const Presence&)>;

  std::string names(const Test& test) const {
    std::string list;
    for (const Presence& one : substances_) {
      if (one.species == nullptr || !test(one)) continue;
      if (list.find(one.name) == std::string::npos) list += (list.empty() ? "" : ", ") + one.name;
    }
    return list;
  }

  void unstable() {
    const std::string found = names([](const Presence& one) {
      return has_group(*one.species, {"nitro group", "N-nitro group", "nitrate of an alcohol or acid",
                                      "peroxide", "azide", "azo, diazo or diazonium group"});
    });
    if (!found.empty())
      list_.push_back("Peroxide, azide, diazo or nitro compound (" + found +
                      "): differential scanning or accelerating-rate calorimetry before it is heated.");
  }

  void bases() {
    const std::string base = names([](const Presence& one) { return strong_base(*one.species); });
    if (base.empty()) return;
    const std::string chlorinated = names(
        [](const Presence& one) { return organic(*one.species) && atoms(*one.species, kChlorine) > 0; });
    if (!chlorinated.empty())
      list_.push_back("Strong base (" + base + ") with a chlorinated organic substance (" + chlorinated +
                      ") can decompose violently.");
    const std::string amide = names([](const Presence& one) {
      return is_one_of(*one.species, {"68-12-2", "67-68-5"});
    });
    if (!amide.empty())
      list_.push_back("Strong base (" + base + ") with " + amide +
                      " can decompose by itself when warm, with gas and heat.");
  }

  void acids() {
    const std::string acid = names([](const Presence& one) { return one.fed && strong_acid(*one.species); });
    const bool nitric = std::any_of(substances_.begin(), substances_.end(), [](const Presence& one) {
      return one.species != nullptr && is_one_of(*one.species, {"7697-37-2"});
    });
    const std::string burnable = names([](const Presence& one) { return organic(*one.species); });
    if (nitric && !burnable.empty())
      list_.push_back("Nitric acid with organic substances (" + burnable +
                      ") can oxidise instead of nitrate, late and violently.");
    const bool water = std::any_of(substances_.begin(), substances_.end(), [](const Presence& one) {
      return one.species != nullptr && one.fed && is_formula(*one.species, "H2O");
    });
    if (!acid.empty() && water)
      list_.push_back("Strong acid (" + acid + ") and water: add the acid to the water, never the reverse.");
    if (!acid.empty() && setting_.quenched)
      list_.push_back("A hot quench of strong acid boils and sprays: its heat of dilution comes at once.");
    if (setting_.quenched)
      list_.emplace_back(
          "The quench has to hold the heat of everything that has not reacted yet as well as of what is "
          "cooled.");
  }

  void gases() {
    const struct {
      const char* formula;
      const char* words;
    } known[] = {
        {"H2", "Hydrogen is set free: explosive with air from 4 % on; vent it apart and keep air out."},
        {"CHN", "Hydrogen cyanide is set free: deadly at a few hundred ppm; scrub it and watch the air."},
        {"ClH", "Hydrogen chloride is set free: scrub it; its rate follows that of the reaction."}};
    for (const auto& gas : known) {
      const bool formed = std::any_of(substances_.begin(), substances_.end(), [&](const Presence& one) {
        return one.species != nullptr && one.formed && one.gas && is_formula(*one.species, gas.formula);
      });
      if (formed) list_.emplace_back(gas.words);
    }
  }

  void operation() {
    if (setting_.dosed)
      list_.emplace_back(
          "Interlock the feed on loss of cooling or stirring: what is dosed then only adds to what can run "
          "away.");
    const bool oxygen = std::any_of(substances_.begin(), substances_.end(), [](const Presence& one) {
      return one.species != nullptr && one.fed && one.species->composition &&
             one.species->composition->atoms.size() == 1 && atoms(*one.species, kOxygen) == 2;
    });
    const std::string burnable = names([](const Presence& one) { return one.fed && organic(*one.species); });
    if (oxygen && !burnable.empty())
      list_.push_back("Total oxidation of " + burnable +
                      " is the worst parallel reaction: reckon its heat beside the one that is wanted.");
  }

  const std::vector<Presence>& substances_;
  const Setting& setting_;
  std::vector<std::string> list_;
};

}  // namespace

std::vector<std::string> customary_cautions(const std::vector<Presence>& substances, const Setting& setting) {
  return Cautions(substances, setting).all();
}

const char* what_spread_covers() {
  return "± is the 95 % interval of the data of what is written. Not covered: reactions that are not listed, "
         "decomposition, mixing that is not listed, a rate law outside its range, human error.";
}

}  // namespace heatledger::safety
