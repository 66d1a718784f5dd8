#include "core/molecule/stoichiometry.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <map>
#include <optional>

#include "core/base/number_text.hpp"
#include "core/molecule/element_names.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/extreme_rays.hpp"

namespace heatledger::molecule {
namespace {

constexpr int kChargeKey = -1;

/// C, H, then by symbol, charge last.
std::string element_order(int key) {
  if (key == kChargeKey) return "~";
  const int element = key % 1000;
  std::string order = element == 6 ? "!" : element == 1 ? "\"" : std::string(symbol(element));
  return order + ' ' + std::to_string(1000 + key / 1000);
}

std::string symbol_of(int key) {
  if (key == 2001) return "D";
  if (key == 3001) return "T";
  const std::string text(symbol(key % 1000));
  return key >= 1000 ? "[" + std::to_string(key / 1000) + text + "]" : text;
}

std::string name_of(int key) {
  if (key == 2001) return "deuterium";
  if (key == 3001) return "tritium";
  const std::string name(element_name(key % 1000));
  return key >= 1000 ? name + "-" + std::to_string(key / 1000) : name;
}

std::string capital(std::string text) {
  if (!text.empty() && text[0] >= 'a' && text[0] <= 'z') text[0] = static_cast<char>(text[0] - 'a' + 'A');
  return text;
}

std::string join(const std::vector<std::string>& parts) {
  std::string text;
  for (std::size_t i = 0; i < parts.size(); ++i) {
    if (i > 0) text += i + 1 == parts.size() ? " and " : ", ";
    text += parts[i];
  }
  return text;
}

bool equal_counts(double a, double b) {
  // Coefficients such as 1/3 and decimals are binary here; a millionth of an atom is no imbalance that a
  // person writes.
  return std::fabs(a - b) <= 1e-6 * std::max(1.0, std::max(std::fabs(a), std::fabs(b)));
}

/// Small molecules that equations most often lack.
struct SmallMolecule {
  std::string_view text;
  std::array<std::pair<int, int>, 2> atoms;
};
constexpr std::array<SmallMolecule, 16> kSmall = {{{"H2O", {{{1, 2}, {8, 1}}}},
                                                   {"HCl", {{{1, 1}, {17, 1}}}},
                                                   {"HBr", {{{1, 1}, {35, 1}}}},
                                                   {"HF", {{{1, 1}, {9, 1}}}},
                                                   {"CO2", {{{6, 1}, {8, 2}}}},
                                                   {"CO", {{{6, 1}, {8, 1}}}},
                                                   {"SO2", {{{16, 1}, {8, 2}}}},
                                                   {"NH3", {{{1, 3}, {7, 1}}}},
                                                   {"H2S", {{{1, 2}, {16, 1}}}},
                                                   {"NaCl", {{{11, 1}, {17, 1}}}},
                                                   {"CH4", {{{6, 1}, {1, 4}}}},
                                                   {"H2", {{{1, 2}, {0, 0}}}},
                                                   {"O2", {{{8, 2}, {0, 0}}}},
                                                   {"N2", {{{7, 2}, {0, 0}}}},
                                                   {"Cl2", {{{17, 2}, {0, 0}}}},
                                                   {"Br2", {{{35, 2}, {0, 0}}}}}};

/// How many of one small molecule make up the atoms; 0 when no whole or half number does.
double times_small(const SmallMolecule& small, const std::map<int, double>& atoms) {
  std::size_t kinds = 0;
  double times = 0;
  for (const auto& [element, count] : small.atoms) {
    if (count == 0) continue;
    ++kinds;
    const auto found = atoms.find(element);
    if (found == atoms.end()) return 0;
    const double here = found->second / count;
    if (times != 0 && !equal_counts(times, here)) return 0;
    times = here;
  }
  return kinds == atoms.size() && equal_counts(2 * times, std::round(2 * times)) ? times : 0;
}

std::string missing_molecule(const std::map<int, double>& atoms) {
  for (const SmallMolecule& small : kSmall) {
    const double times = times_small(small, atoms);
    if (times > 0)
      return (equal_counts(times, 1) ? "one" : machine_number(times, 6)) + " " + std::string(small.text);
  }
  return {};
}

/// "2 H and 1 O more stand on the left"
std::string excess_text(const std::map<int, double>& atoms, const char* side) {
  std::vector<std::pair<std::string, int>> order;
  for (const auto& [key, count] : atoms) order.emplace_back(element_order(key), key);
  std::sort(order.begin(), order.end());
  std::vector<std::string> parts;
  for (const auto& [text, key] : order)
    parts.push_back(machine_number(atoms.at(key), 6) + " " + symbol_of(key));
  return join(parts) + " more on the " + side;
}

}  // namespace

BalanceCheck check_balance(const std::vector<std::pair<double, Composition>>& left,
                           const std::vector<std::pair<double, Composition>>& right) {
  std::map<int, ElementBalance> sums;
  bool charged = false;
  auto add = [&](const std::vector<std::pair<double, Composition>>& side, double ElementBalance::*member) {
    for (const auto& [coefficient, composition] : side) {
      for (const auto& [key, count] : composition.atoms) sums[key].*member += coefficient * count;
      if (composition.charge == 0) continue;
      charged = true;
      sums[kChargeKey].*member += coefficient * composition.charge;
    }
  };
  add(left, &ElementBalance::left);
  add(right, &ElementBalance::right);
  BalanceCheck check;
  check.balanced = true;
  for (auto& [key, sum] : sums) {
    sum.key = key;
    check.balanced = check.balanced && equal_counts(sum.left, sum.right);
    check.elements.push_back(sum);
  }
  std::sort(check.elements.begin(), check.elements.end(),
            [](const ElementBalance& a, const ElementBalance& b) {
              return element_order(a.key) < element_order(b.key);
            });
  return check;
}

std::string describe_imbalance(const BalanceCheck& check) {
  std::map<int, double> more_left, more_right;
  double charge = 0;
  for (const ElementBalance& element : check.elements) {
    if (equal_counts(element.left, element.right)) continue;
    const double excess = element.left - element.right;
    if (element.key == kChargeKey) {
      charge = excess;
    } else if (excess > 0) {
      more_left[element.key] = excess;
    } else {
      more_right[element.key] = -excess;
    }
  }
  std::vector<std::string> parts;
  if (!more_left.empty()) parts.push_back(excess_text(more_left, "left"));
  if (!more_right.empty()) parts.push_back(excess_text(more_right, "right"));
  std::string text = join(parts);
  if (charge != 0) {
    if (!text.empty()) text += "; ";
    text += "the charge on the left is " + std::string(charge > 0 ? "higher" : "lower") + " by " +
            machine_number(std::fabs(charge), 6);
  }
  if (text.empty()) return text;
  std::vector<std::string> missing;
  if (charge == 0) {
    const std::string right_lacks = missing_molecule(more_left), left_lacks = missing_molecule(more_right);
    if (!right_lacks.empty()) missing.push_back(right_lacks + " on the right");
    if (!left_lacks.empty()) missing.push_back(left_lacks + " on the left");
    if (missing.size() != parts.size()) missing.clear();
  }
  if (!missing.empty()) text += ": perhaps " + join(missing) + " is missing";
  return capital(text) + ".";
}

Result<std::vector<std::vector<std::int64_t>>> balance(const std::vector<Composition>& left,
                                                       const std::vector<Composition>& right) {
  const std::size_t species = left.size() + right.size();
  auto at = [&](std::size_t i) -> const Composition& {
    return i < left.size() ? left[i] : right[i - left.size()];
  };

  // One row per element; the right side enters negatively. Fractional hydrates make a row fractional.
  struct Seen {
    bool left = false, right = false;
  };
  std::map<int, Seen> seen;
  std::map<int, std::vector<double>> counts;
  for (std::size_t i = 0; i < species; ++i) {
    for (const auto& [key, count] : at(i).atoms) {
      (i < left.size() ? seen[key].left : seen[key].right) = true;
      counts.try_emplace(key, species, 0.0).first->second[i] = i < left.size() ? count : -count;
    }
    if (at(i).charge != 0) {
      counts.try_emplace(kChargeKey, species, 0.0).first->second[i] =
          i < left.size() ? at(i).charge : -at(i).charge;
    }
  }
  std::vector<std::string> only_left, only_right;
  std::vector<std::pair<std::string, int>> order;
  for (const auto& [key, sides] : seen) order.emplace_back(element_order(key), key);
  std::sort(order.begin(), order.end());
  for (const auto& [text, key] : order) {
    if (!seen[key].right) only_left.push_back(name_of(key));
    if (!seen[key].left) only_right.push_back(name_of(key));
  }
  if (!only_left.empty() || !only_right.empty()) {
    std::vector<std::string> sentences;
    auto stands = [](const std::vector<std::string>& names, const char* side) {
      return join(names) + (names.size() > 1 ? " stand only on the " : " stands only on the ") + side;
    };
    if (!only_left.empty()) sentences.push_back(stands(only_left, "left"));
    if (!only_right.empty()) sentences.push_back(stands(only_right, "right"));
    return Error{"balance.missing_element", capital(join(sentences)) + ".", "",
                 "Add the species that holds it on the other side."};
  }
  if (const auto charge = counts.find(kChargeKey); charge != counts.end()) {
    bool positive = false, negative = false;
    for (const double value : charge->second) {
      positive = positive || value > 0;
      negative = negative || value < 0;
    }
    if (!positive || !negative) {
      return Error{"balance.missing_element", "Charge is not balanced by any ion written here.", "",
                   "Add the counter ion, or the ion on the other side."};
    }
  }

  std::vector<std::vector<std::int64_t>> rows;
  for (const auto& [key, row] : counts) {
    std::optional<std::vector<std::int64_t>> whole = whole_row(row);
    if (!whole)
      return Error{"balance.too_large", "The counts in these formulas are no exact fractions.", "",
                   "Write the coefficients yourself."};
    rows.push_back(std::move(*whole));
  }
  std::optional<std::vector<std::vector<std::int64_t>>> rays = extreme_rays(rows, species);
  if (!rays) {
    return Error{"balance.too_large", "There are too many species or ways to list them exactly.", "",
                 "Write the reactions separately."};
  }
  if (rays->empty()) {
    std::string message = "Every element stands on both sides, yet no positive coefficients balance this";
    const std::vector<std::size_t> wrong = wrong_side(rows, species);
    if (!wrong.empty()) {
      std::vector<std::string> names;
      for (const std::size_t i : wrong) names.push_back(hill_formula(at(i)));
      message += ": " + join(names) + " would have to stand on the other side";
    }
    return Error{"balance.impossible", message + ".", "",
                 "Check the formulas and whether a species is missing."};
  }

  struct Way {
    bool identity = false;  ///< A -> A
    int members = 0;
    std::int64_t sum = 0;
    std::vector<std::int64_t> numbers;
  };
  std::vector<Way> ways;
  for (std::vector<std::int64_t>& ray : *rays) {
    Way way;
    std::vector<std::size_t> members;
    for (std::size_t i = 0; i < species; ++i) {
      if (ray[i] != 0) members.push_back(i);
      way.sum += ray[i];
    }
    way.members = static_cast<int>(members.size());
    way.identity = members.size() == 2 && at(members[0]) == at(members[1]);
    way.numbers = std::move(ray);
    ways.push_back(std::move(way));
  }
  std::sort(ways.begin(), ways.end(), [](const Way& a, const Way& b) {
    if (a.identity != b.identity) return b.identity;
    if (a.members != b.members) return a.members < b.members;
    if (a.sum != b.sum) return a.sum < b.sum;
    return a.numbers > b.numbers;
  });
  RankCounter rank;
  std::vector<std::vector<std::int64_t>> result;
  for (Way& way : ways) {
    const std::optional<bool> grows = rank.add(way.numbers);
    if (!grows)
      return Error{"balance.too_large", "The coefficients grow beyond what can be kept exact.", "",
                   "Write the reactions separately."};
    if (*grows) result.push_back(std::move(way.numbers));
  }
  return result;
}

}  // namespace heatledger::molecule
