#include "core/balance/slips.hpp"

#include <algorithm>
#include <cmath>

#include "core/balance/bond_words.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::balance {
namespace {

using molecule::BondType;
using molecule::Order;
using molecule::Setting;
using Op = Change::Op;

constexpr double kJ = 1000.0, kCalorie = 4.184;

std::string figure(double value) {
  return display_number(value, std::fabs(value - std::round(value)) < 0.005 ? 0 : 1);
}

class Collector {
 public:
  Collector(const Ledger& ledger, const SheetModel& model, const std::vector<double>& base,
            const std::vector<TypedCell>& typed)
      : ledger_(ledger), model_(model), base_(base), typed_(typed) {}

  std::vector<Candidate> collect() {
    for (std::size_t r = 0; r < model_.rows.size(); ++r) {
      coefficient(r);
      for (std::size_t l = 0; l < model_.rows[r].lines.size(); ++l) line(r, l);
      row_as_a_whole(r);
    }
    phases();
    basis();
    units();
    signs();
    digits();
    for (const TypedCell& cell : typed_) written_down(cell);
    std::stable_sort(found_.begin(), found_.end(), [](const Candidate& a, const Candidate& b) {
      return a.only_here != b.only_here ? b.only_here : a.slip.kind < b.slip.kind;
    });
    return std::move(found_);
  }

 private:
  void add(SlipKind kind, std::size_t row, std::size_t line, std::string words, std::vector<Change> changes,
           bool only_here = false) {
    Candidate candidate;
    candidate.slip.kind = kind;
    candidate.slip.row = row;
    candidate.slip.line = line;
    candidate.slip.words = std::move(words);
    candidate.changes = std::move(changes);
    candidate.only_here = only_here;
    found_.push_back(std::move(candidate));
  }

  std::string name(std::size_t row) const {
    return display_species(ledger_.reaction->species[ledger_.rows[row].species]);
  }
  std::string phase_name(std::size_t p) const { return name(model_.phases[p].row); }

  void coefficient(std::size_t r) {
    const SheetModel::Row& row = model_.rows[r];
    if (row.coefficient_value == 1) return;
    const std::string left_out =
        "the coefficient " + times_text(row.coefficient_value) + " of " + name(r) + " left out";
    add(SlipKind::CoefficientLeftOut, r, 0, left_out, {{Op::Replace, row.coefficient, 1}});
    for (const SheetModel::Phase& phase : model_.phases) {
      if (phase.row != r) continue;
      add(SlipKind::CoefficientLeftOut, r, 0, left_out + ", in the bonds and in the phase",
          {{Op::Replace, row.coefficient, 1}, {Op::Replace, phase.times, 1}});
      add(SlipKind::CoefficientLeftOut, r, 0, left_out + " where it changes phase",
          {{Op::Replace, phase.times, 1}});
    }
  }

  void line(std::size_t r, std::size_t l) {
    const SheetModel::Line& at = model_.rows[r].lines[l];
    const BondLine& bond = ledger_.rows[r].lines[l];
    wrong_price(r, l, at, bond);
    const std::string of = " of " + name(r);
    const auto count = [&](double n) { return figure(n) + " × instead of " + figure(at.count_value) + " ×"; };
    if (bond.second) {
      add(SlipKind::NitroAsTwoDouble, r, l, "the nitro group" + of + " priced as two N=O",
          {{Op::Replace, at.price, at.price2_value}});
      add(SlipKind::NitroAsTwoDouble, r, l, "the nitro group" + of + " priced as two N–O",
          {{Op::Replace, at.price2, at.price_value}});
      add(SlipKind::BondMissed, r, l, "one N–O" + of + " missed", {{Op::Add, at.count, -1}});
      add(SlipKind::BondMissed, r, l, "one N=O" + of + " missed", {{Op::Add, at.count2, -1}});
      add(SlipKind::BondTwice, r, l, "one N–O" + of + " counted twice", {{Op::Add, at.count, 1}});
      add(SlipKind::BondTwice, r, l, "one N=O" + of + " counted twice", {{Op::Add, at.count2, 1}});
      add(SlipKind::LineLeftOut, r, l, "the nitro group" + of + " left out", {{Op::Multiply, at.sum, 0}});
      add(SlipKind::LineTwice, r, l, "the nitro group" + of + " entered twice", {{Op::Multiply, at.sum, 2}});
      return;
    }
    const std::string one = "one " + bond.label + of;
    add(SlipKind::BondMissed, r, l, one + " missed: " + count(at.count_value - 1), {{Op::Add, at.count, -1}});
    add(SlipKind::BondTwice, r, l, one + " counted twice: " + count(at.count_value + 1),
        {{Op::Add, at.count, 1}});
    if (at.count_value > 1) {
      add(SlipKind::LineLeftOut, r, l, "all " + bond.label + of + " left out", {{Op::Multiply, at.sum, 0}});
      add(SlipKind::LineTwice, r, l, "all " + bond.label + of + " entered twice",
          {{Op::Multiply, at.sum, 2}});
    }
  }

  std::optional<double> price(int a, int b, Order order, Setting setting = Setting::Plain) const {
    const estimate::BondValue* value = ledger_.set->find(molecule::make_bond_type(a, b, order, setting));
    if (value == nullptr) return std::nullopt;
    return value->value / kJ;
  }

  /// An average where the molecule has its own value, or the other way round.
  void wrong_price(std::size_t r, std::size_t l, const SheetModel::Line& at, const BondLine& bond) {
    const auto instead = [&](SlipKind kind, const std::string& what, std::optional<double> wrong) {
      if (!wrong || std::fabs(*wrong - at.price_value) < 0.5) return;
      add(kind, r, l, what + ": " + figure(*wrong) + " instead of " + figure(at.price_value),
          {{Op::Replace, at.price, *wrong}});
    };
    const auto mean = [](std::optional<double> a, std::optional<double> b) -> std::optional<double> {
      if (!a || !b) return std::nullopt;
      return (*a + *b) / 2;
    };
    const std::string of = " of " + name(r);
    const std::optional<double> ketone = price(6, 8, Order::Double);
    switch (bond.type.setting) {
      case Setting::CarbonDioxide:
        instead(SlipKind::CarbonDioxideAsKetone, "the C=O of CO₂ taken as a ketone's", ketone);
        return;
      case Setting::CarbonMonoxide:
        instead(SlipKind::AverageForSpecific, "carbon monoxide taken as a C=O double bond", ketone);
        return;
      case Setting::NitricOxide:
        instead(SlipKind::AverageForSpecific, "the average N=O in place of that of NO",
                price(7, 8, Order::Double));
        return;
      case Setting::NitrogenDioxide:
        instead(SlipKind::AverageForSpecific, "NO₂ priced as one N=O and one N–O",
                mean(price(7, 8, Order::Double), price(7, 8, Order::Single)));
        instead(SlipKind::AverageForSpecific, "NO₂ priced as two average N=O", price(7, 8, Order::Double));
        return;
      case Setting::Ozone:
        instead(SlipKind::AverageForSpecific, "ozone priced as one O=O and one O–O",
                mean(price(8, 8, Order::Double), price(8, 8, Order::Single)));
        return;
      case Setting::AromaticRing:
        instead(SlipKind::AverageForSpecific, "the aromatic ring" + of + " priced as alternating C–C and C=C",
                mean(price(6, 6, Order::Single), price(6, 6, Order::Double)));
        return;
      default:
        break;
    }
    if (bond.type == molecule::make_bond_type(6, 8, Order::Double)) {
      instead(SlipKind::AverageForSpecific, "the C=O" + of + " priced with the value of CO₂",
              price(6, 8, Order::Double, Setting::CarbonDioxide));
    }
    if (bond.type == molecule::make_bond_type(8, 8, Order::Double)) {
      if (const std::optional<double> single = price(8, 8, Order::Single)) {
        instead(SlipKind::AverageForSpecific, "O=O taken as two O–O", *single * 2);
      }
    }
    if (bond.type == molecule::make_bond_type(7, 7, Order::Triple)) {
      instead(SlipKind::AverageForSpecific, "N≡N priced as N=N", price(7, 7, Order::Double));
      if (const std::optional<double> single = price(7, 7, Order::Single)) {
        instead(SlipKind::AverageForSpecific, "N≡N taken as three N–N", *single * 3);
      }
    }
  }

  void row_as_a_whole(std::size_t r) {
    const SheetModel::Row& row = model_.rows[r];
    add(SlipKind::LineLeftOut, r, 0, name(r) + " left out of the sum", {{Op::Multiply, row.in_equation, 0}});
    add(SlipKind::LineTwice, r, 0, name(r) + " entered twice", {{Op::Multiply, row.in_equation, 2}});
  }

  void phases() {
    std::vector<Change> all_out, all_turned;
    for (std::size_t p = 0; p < model_.phases.size(); ++p) {
      const SheetModel::Phase& phase = model_.phases[p];
      const std::string word(thermo::phase_word(ledger_.rows[phase.row].phase));
      add(SlipKind::PhaseLeftOut, phase.row, 0,
          "the gas value taken for " + phase_name(p) + ", which is written as " + word,
          {{Op::Multiply, phase.value, 0}});
      add(SlipKind::Sign, phase.row, 0, "the sign of \"" + ledger_.corrections[p].what + "\" turned round",
          {{Op::Multiply, phase.value, -1}});
      all_out.push_back({Op::Multiply, phase.value, 0});
      all_turned.push_back({Op::Multiply, phase.value, -1});
    }
    if (model_.phases.size() < 2) return;
    add(SlipKind::PhaseLeftOut, 0, 0, "the gas figure taken: no correction to the phases written", all_out);
    add(SlipKind::Sign, 0, 0, "the signs of all phase corrections turned round", all_turned);
  }

  void basis() {
    const auto other = [this](double factor, const std::string& words) {
      if (std::fabs(factor - model_.basis_value) < 1e-12 * std::fabs(factor)) return;
      for (const Candidate& known : found_) {
        if (known.slip.kind == SlipKind::WrongBasis && known.changes[0].number == factor) return;
      }
      add(SlipKind::WrongBasis, 0, 0, words + " instead of " + ledger_.basis.text,
          {{Op::Replace, model_.basis, factor}});
    };
    for (const BasisChoice& choice : basis_choices(*ledger_.reaction)) {
      const Result<Basis> basis = find_basis(*ledger_.reaction, choice.name);
      if (basis.ok()) other(basis->factor, choice.name.empty() ? "the figure as written" : choice.text);
    }
  }

  void unit(Node node, const std::string& what, std::size_t row, std::size_t line) {
    add(SlipKind::JouleForKilojoule, row, line, what + " in J where kJ stand", {{Op::Multiply, node, 1000}});
    add(SlipKind::JouleForKilojoule, row, line, what + " divided by 1000 once too often",
        {{Op::Multiply, node, 0.001}});
    add(SlipKind::CalorieForJoule, row, line, what + " in kcal where kJ stand",
        {{Op::Multiply, node, 1 / kCalorie}});
    add(SlipKind::CalorieForJoule, row, line, what + " turned from kcal to kJ though it was kJ",
        {{Op::Multiply, node, kCalorie}});
  }

  void units() {
    std::vector<Change> all;
    for (std::size_t r = 0; r < model_.rows.size(); ++r) {
      const SheetModel::Row& row = model_.rows[r];
      for (std::size_t l = 0; l < row.lines.size(); ++l) {
        if (!ledger_.rows[r].lines[l].second)
          unit(row.lines[l].price, ledger_.rows[r].lines[l].label + " of " + name(r), r, l);
      }
      unit(row.per_mole, "the bond sum of " + name(r), r, 0);
      all.push_back({Op::Multiply, row.per_mole, 1 / kCalorie});
    }
    for (std::size_t p = 0; p < model_.phases.size(); ++p) {
      unit(model_.phases[p].value, "\"" + ledger_.corrections[p].what + "\"", model_.phases[p].row, 0);
      all.push_back({Op::Multiply, model_.phases[p].value, 1 / kCalorie});
    }
    unit(model_.gas, "broken − formed", 0, 0);
    if (!model_.phases.empty()) unit(model_.as_written, "the figure as written", 0, 0);
    add(SlipKind::CalorieForJoule, 0, 0, "the whole sheet in kcal", all);
    for (Change& change : all) change.number = 1000;
    add(SlipKind::JouleForKilojoule, 0, 0, "the whole sheet in J", std::move(all));
  }

  void signs() {
    add(SlipKind::Sign, 0, 0, "formed − broken instead of broken − formed", {{Op::Multiply, model_.gas, -1}});
    if (!model_.phases.empty())
      add(SlipKind::Sign, 0, 0, "the sign of the figure as written turned round",
          {{Op::Multiply, model_.as_written, -1}});
    const double broken = base_[model_.broken], formed = base_[model_.formed];
    if (broken == 0 || formed == 0) return;
    std::vector<Change> exchanged = {{Op::Multiply, model_.broken, formed / broken},
                                     {Op::Multiply, model_.formed, broken / formed}};
    add(SlipKind::SidesExchanged, 0, 0, "broken and formed exchanged", exchanged);
    for (const SheetModel::Phase& phase : model_.phases) exchanged.push_back({Op::Multiply, phase.value, -1});
    if (!model_.phases.empty())
      add(SlipKind::SidesExchanged, 0, 0, "reactants and products exchanged", exchanged);
  }

  void swapped(Node node, const std::string& what, std::size_t row, std::size_t line) {
    const double right = base_[node];
    // Whole kJ as prices and bond sums stand on paper; a figure with decimals has them transposed where it is
    // typed.
    if (std::fabs(right) < 10 || std::fabs(right) > 1e9 || std::fabs(right - std::round(right)) > 1e-9)
      return;
    const std::string from = std::to_string(static_cast<long long>(std::round(std::fabs(right))));
    for (std::size_t i = 0; i + 1 < from.size(); ++i) {
      if (from[i] == from[i + 1]) continue;
      std::string turned = from;
      std::swap(turned[i], turned[i + 1]);
      const double wrong = std::copysign(*parse_number(turned), right);
      add(SlipKind::DigitsTransposed, row, line,
          "digits transposed in " + what + ": " + figure(wrong) + " instead of " + figure(right),
          {{Op::Replace, node, wrong}});
    }
  }

  void digits() {
    for (std::size_t r = 0; r < model_.rows.size(); ++r) {
      for (std::size_t l = 0; l < model_.rows[r].lines.size(); ++l) {
        const std::string what = ledger_.rows[r].lines[l].label + " of " + name(r);
        swapped(model_.rows[r].lines[l].price, "the price of " + what, r, l);
        if (model_.rows[r].lines[l].count_value > 1)
          swapped(model_.rows[r].lines[l].sum, "the sum of " + what, r, l);
      }
      swapped(model_.rows[r].per_mole, "the bond sum of " + name(r), r, 0);
      if (model_.rows[r].coefficient_value != 1)
        swapped(model_.rows[r].in_equation, "the figure of " + name(r), r, 0);
    }
    swapped(model_.broken, "broken", 0, 0);
    swapped(model_.formed, "formed", 0, 0);
    swapped(model_.gas, "broken − formed", 0, 0);
  }

  /// What the digits of one typed figure suggest: two of them transposed, a price that nobody knows.
  void written_down(const TypedCell& cell) {
    const double ours = base_[cell.node];
    if (std::fabs(cell.theirs - ours) <= cell.tolerance) return;
    if (transposed(ours, cell.theirs)) {
      const std::string words = "digits transposed: " + figure(cell.theirs) + " instead of " + figure(ours);
      if (std::fabs(ours - std::round(ours)) > 1e-9)
        add(SlipKind::DigitsTransposed, 0, 0, words, {{Op::Add, cell.node, cell.theirs - ours}});
      add(SlipKind::DigitsTransposed, 0, 0, words + ", in this place only",
          {{Op::Add, cell.node, cell.theirs - ours}}, true);
    }
    const auto here = [&](SlipKind kind, double factor, const char* words) {
      add(kind, 0, 0, words, {{Op::Multiply, cell.node, factor}}, true);
    };
    here(SlipKind::JouleForKilojoule, 1000, "written in J where kJ stand, in this place only");
    here(SlipKind::JouleForKilojoule, 0.001, "divided by 1000 once too often, in this place only");
    here(SlipKind::CalorieForJoule, 1 / kCalorie, "written in kcal where kJ stand, in this place only");
    here(SlipKind::Sign, -1, "the sign turned round, in this place only");
    for (std::size_t r = 0; r < model_.rows.size(); ++r) {
      for (std::size_t l = 0; l < model_.rows[r].lines.size(); ++l) {
        const SheetModel::Line& at = model_.rows[r].lines[l];
        if (at.price == cell.node && !ledger_.rows[r].lines[l].second) {
          add(SlipKind::OtherPrice, r, l,
              ledger_.rows[r].lines[l].label + " of " + name(r) + " priced with " + figure(cell.theirs) +
                  ", which no table here has",
              {{Op::Replace, at.price, cell.theirs}});
        } else if (at.count == cell.node && std::fabs(cell.theirs - at.count_value) > 1.5 &&
                   !ledger_.rows[r].lines[l].second) {
          add(cell.theirs < at.count_value ? SlipKind::BondMissed : SlipKind::BondTwice, r, l,
              ledger_.rows[r].lines[l].label + " of " + name(r) + " counted " + figure(cell.theirs) +
                  " × instead of " + figure(at.count_value) + " ×",
              {{Op::Replace, at.count, cell.theirs}});
        }
      }
    }
  }

  /// Whether two neighbouring digits of `right`, written with as many decimals as fits, give `wrong`.
  static bool transposed(double right, double wrong) {
    for (const double scale : {1.0, 10.0, 100.0}) {
      const double a = std::round(std::fabs(right) * scale), b = std::round(std::fabs(wrong) * scale);
      if (std::fabs(std::fabs(wrong) * scale - b) > 1e-6 * scale || a > 1e12 || b > 1e12 || a == b) continue;
      const std::string from = std::to_string(static_cast<long long>(a)),
                        to = std::to_string(static_cast<long long>(b));
      for (std::size_t i = 0; i + 1 < from.size(); ++i) {
        std::string swapped = from;
        std::swap(swapped[i], swapped[i + 1]);
        if (swapped == to && (right < 0) == (wrong < 0)) return true;
      }
    }
    return false;
  }

  const Ledger& ledger_;
  const SheetModel& model_;
  const std::vector<double>& base_;
  const std::vector<TypedCell>& typed_;
  std::vector<Candidate> found_;
};

}  // namespace

std::vector<Candidate> candidate_slips(const Ledger& ledger, const SheetModel& model,
                                       const std::vector<double>& base, const std::vector<TypedCell>& typed) {
  return Collector(ledger, model, base, typed).collect();
}

std::vector<Candidate> mixed_tables(const Ledger& ledger, const SheetModel& model) {
  std::vector<Candidate> found;
  std::vector<BondType> seen;
  for (std::size_t r = 0; r < model.rows.size(); ++r) {
    for (std::size_t l = 0; l < model.rows[r].lines.size(); ++l) {
      const BondType type = ledger.rows[r].lines[l].type;
      if (std::find(seen.begin(), seen.end(), type) != seen.end()) continue;
      seen.push_back(type);
      for (const std::string& set : estimate::BondSet::sets_with(type)) {
        const std::optional<double> value = estimate::BondSet::value_in(set, type);
        if (set == ledger.set->name() || !value) continue;
        Candidate candidate;
        candidate.slip = Slip{SlipKind::OtherPrice, r, l,
                              ledger.rows[r].lines[l].label + " priced with " + figure(*value / kJ) +
                                  " of the table \"" + set + "\""};
        for (std::size_t r2 = 0; r2 < model.rows.size(); ++r2) {
          for (std::size_t l2 = 0; l2 < model.rows[r2].lines.size(); ++l2) {
            if (ledger.rows[r2].lines[l2].type == type)
              candidate.changes.push_back({Op::Replace, model.rows[r2].lines[l2].price, *value / kJ});
          }
        }
        found.push_back(std::move(candidate));
      }
    }
  }
  return found;
}

}  // namespace heatledger::balance
