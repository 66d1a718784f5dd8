#include "core/balance/checker.hpp"

#include <algorithm>
#include <cmath>

#include "core/balance/slips.hpp"
#include "core/balance/typed_figure.hpp"
#include "core/base/number_text.hpp"

namespace heatledger::balance {
namespace {

/// Beyond this many pairs the search for two slips stops: it is then only said that there is more than one.
constexpr std::size_t kMostPairs = 200000;

bool matches(const TypedCell& cell, double value) {
  return std::fabs(cell.theirs - value) <= cell.tolerance;
}

class Search {
 public:
  Search(const Ledger& ledger, SheetModel model, std::vector<TypedCell> typed)
      : ledger_(ledger), model_(std::move(model)), typed_(std::move(typed)) {
    model_.evaluate({}, base_);
  }

  const std::vector<double>& base() const { return base_; }
  const std::vector<TypedCell>& typed() const { return typed_; }

  bool explained_by(const std::vector<double>& values) const {
    return std::all_of(typed_.begin(), typed_.end(),
                       [&values](const TypedCell& cell) { return matches(cell, values[cell.node]); });
  }
  bool agrees() const { return explained_by(base_); }

  bool explained_by(const Candidate& candidate) {
    model_.evaluate(candidate.changes, values_);
    if (!candidate.only_here) return explained_by(values_);
    const Node node = candidate.changes[0].node;
    return std::all_of(typed_.begin(), typed_.end(), [&](const TypedCell& cell) {
      return matches(cell, cell.node == node ? values_[node] : base_[cell.node]);
    });
  }

  /// Single slips that explain every typed figure.
  std::vector<Slip> singles() {
    std::vector<Slip> found;
    for (const Candidate& candidate : candidates()) {
      if (explained_by(candidate)) found.push_back(candidate.slip);
    }
    return found;
  }

  std::vector<Slip> other_prices() {
    std::vector<Slip> found;
    for (const Candidate& candidate : mixed_tables(ledger_, model_)) {
      if (explained_by(candidate)) found.push_back(candidate.slip);
    }
    return found;
  }

  /// Two slips that together explain every typed figure; empty when none do or too many would have to be
  /// tried.
  std::vector<Slip> pair() {
    std::vector<Candidate> all = candidates();
    for (Candidate& candidate : mixed_tables(ledger_, model_)) all.push_back(std::move(candidate));
    std::vector<Change> both;
    std::size_t tried = 0;
    for (std::size_t sum = 1; sum < 2 * all.size(); ++sum) {  // likelier pairs first
      for (std::size_t i = sum < all.size() ? 0 : sum - all.size() + 1; i < sum - i; ++i) {
        const Candidate &first = all[i], &second = all[sum - i];
        if (first.only_here && second.only_here) continue;
        if (++tried > kMostPairs) return {};
        both.assign(first.changes.begin(), first.changes.end());
        if (!second.only_here) both.insert(both.end(), second.changes.begin(), second.changes.end());
        model_.evaluate(both, values_);
        if (second.only_here) {
          const Change& change = second.changes[0];
          double& here = values_[change.node];
          const double value = change.op == Change::Op::Add ? here + change.number : here * change.number;
          if (std::all_of(typed_.begin(), typed_.end(), [&](const TypedCell& cell) {
                return matches(cell, cell.node == change.node ? value : values_[cell.node]);
              })) {
            return {first.slip, second.slip};
          }
        } else if (explained_by(values_)) {
          return {first.slip, second.slip};
        }
      }
    }
    return {};
  }

 private:
  const std::vector<Candidate>& candidates() {
    if (candidates_.empty()) candidates_ = candidate_slips(ledger_, model_, base_, typed_);
    return candidates_;
  }

  const Ledger& ledger_;
  SheetModel model_;
  std::vector<TypedCell> typed_;
  std::vector<double> base_, values_;
  std::vector<Candidate> candidates_;
};

/// Typed entries in the order of the sheet; those that cannot be compared go straight into the review.
std::vector<TypedCell> read_entries(const Ledger& ledger, const SheetModel& model,
                                    const std::map<std::string, std::string>& entries, Review& review) {
  std::vector<TypedCell> typed;
  for (const auto& entry : entries) {
    if (entry.second.find_first_not_of(' ') == std::string::npos) continue;
    CheckedLine line;
    line.cell = entry.first;
    const std::optional<Node> node = model.node_of(entry.first);
    const std::optional<TypedFigure> figure = read_typed_figure(entry.second);
    if (!node || !figure) {
      line.verdict = figure ? Verdict::NotComparable : Verdict::Unreadable;
      line.finding = figure ? "this ledger has no such figure" : "not a figure: \"" + entry.second + "\"";
      review.lines.push_back(std::move(line));
      continue;
    }
    TypedCell cell;
    cell.cell = entry.first;
    cell.node = *node;
    cell.theirs = figure->kilojoules;
    // Half a unit of the last digit typed. Below the phase corrections each of them may have been rounded
    // too.
    cell.tolerance = 0.5 * figure->last_digit * (1 + 1e-6) + 1e-6;
    if (*node == model.as_written || *node == model.as_written_on_basis) {
      cell.tolerance += 0.5 * figure->last_digit * static_cast<double>(model.phases.size()) *
                        (*node == model.as_written ? 1 : std::min(1.0, ledger.basis.factor));
    }
    typed.push_back(std::move(cell));
  }
  std::sort(typed.begin(), typed.end(),
            [](const TypedCell& a, const TypedCell& b) { return a.node < b.node; });
  return typed;
}

std::string capital(std::string text) {
  if (!text.empty() && text[0] >= 'a' && text[0] <= 'z') text[0] = static_cast<char>(text[0] - 'a' + 'A');
  return text;
}

bool is_price(const SheetModel& model, Node node) {
  for (const SheetModel::Row& row : model.rows) {
    for (const SheetModel::Line& line : row.lines) {
      if (line.price == node) return true;
    }
  }
  return false;
}

/// One verdict for each typed figure, once the sheet as a whole is explained.
void write_lines(const Search& search, const SheetModel& model, Review& review) {
  bool first = true;
  for (const TypedCell& cell : search.typed()) {
    CheckedLine line;
    line.cell = cell.cell;
    line.ours = search.base()[cell.node];
    line.theirs = cell.theirs;
    const double apart = cell.theirs - line.ours;
    line.ours_text = display_number(line.ours, std::fabs(line.ours - std::round(line.ours)) < 0.005 ? 0 : 1);
    if (matches(cell, line.ours)) {
      line.finding = "agrees";
    } else {
      line.difference_text = display_signed(apart, std::fabs(apart - std::round(apart)) < 0.005 ? 0 : 1);
      if (review.different_table) {
        line.verdict = Verdict::DifferentTable;
        line.finding = "different table";
      } else if (review.more_than_one) {
        line.verdict = first || review.slips.empty() ? Verdict::MoreThanOneSlip : Verdict::Follows;
        line.finding = first ? review.summary : "differs";
      } else {
        line.verdict = first ? Verdict::Slip : Verdict::Follows;
        line.finding = first ? capital(review.slips[0].words) : "follows from the slip above";
      }
      if (is_price(model, cell.node) && line.verdict == Verdict::MoreThanOneSlip)
        line.finding = "another price: " + line.difference_text;
      first = false;
    }
    review.lines.push_back(std::move(line));
  }
}

/// Another published table explains the sheet, alone or with one slip in it.
bool try_other_tables(const Ledger& ledger, const std::vector<TypedCell>& typed, Review& review) {
  std::vector<Slip> with_slip;
  std::string with_slip_table;
  for (const std::string& id : estimate::BondSet::names()) {
    if (id == ledger.set->name()) continue;
    const Result<estimate::BondSet> set = estimate::BondSet::published(id);
    if (!set.ok()) continue;
    std::optional<SheetModel> model = SheetModel::of(ledger, *set);
    if (!model) continue;
    Search search(ledger, std::move(*model), typed);
    if (search.agrees()) {
      review.different_table = true;
      review.table = id;
      review.summary = "No slip: a different table, \"" + set->title() + "\".";
      return true;
    }
    if (with_slip.empty()) {
      with_slip = search.singles();
      if (!with_slip.empty()) with_slip_table = set->title();
    }
  }
  if (with_slip.empty()) return false;
  review.slips.assign(1, with_slip[0]);
  review.summary =
      "A different table, \"" + with_slip_table + "\", and one slip: " + with_slip[0].words + ".";
  return true;
}

void explain(const Ledger& ledger, Search& search, Review& review) {
  std::vector<Slip> singles = search.singles();
  const bool guessed = singles.empty() || singles[0].kind == SlipKind::OtherPrice;
  // Only figures that no named slip of the own table explains are looked for in other tables.
  if (guessed) {
    const std::vector<Slip> mixed = search.other_prices();
    if (!mixed.empty()) {
      review.different_table = true;
      review.slips = mixed;
      review.summary = "No slip, but tables mixed: " + mixed[0].words + ".";
      return;
    }
    if (try_other_tables(ledger, search.typed(), review)) return;
  }
  if (!singles.empty()) {
    review.slips.assign(1, singles[0]);
    review.alternatives.assign(singles.begin() + 1, singles.end());
    review.summary = capital(singles[0].words) + ".";
    if (!review.alternatives.empty())
      review.summary += " The figures typed would also allow: " + review.alternatives[0].words + ".";
    return;
  }
  review.more_than_one = true;
  review.slips = search.pair();
  review.summary = "No single slip explains the sheet: there is more than one.";
  if (!review.slips.empty())
    review.summary =
        "More than one slip; two that fit: " + review.slips[0].words + ", and " + review.slips[1].words + ".";
}

}  // namespace

Review review_sheet(const Ledger& ledger, const std::map<std::string, std::string>& entries) {
  Review review;
  std::optional<SheetModel> model = SheetModel::of(ledger, *ledger.set);
  if (!model) {
    for (const auto& entry : entries) {
      CheckedLine line;
      line.cell = entry.first;
      line.verdict = Verdict::NotComparable;
      line.finding = "this ledger has no sum to compare with";
      review.lines.push_back(std::move(line));
    }
    review.summary = "Nothing can be compared: a bond of this ledger has no value.";
    review.agrees = entries.empty();
    return review;
  }
  Search search(ledger, *model, read_entries(ledger, *model, entries, review));
  review.agrees = search.agrees();
  if (review.agrees) {
    review.summary = search.typed().empty() ? "" : "Every figure typed agrees.";
  } else {
    explain(ledger, search, review);
  }
  write_lines(search, *model, review);
  return review;
}

}  // namespace heatledger::balance
