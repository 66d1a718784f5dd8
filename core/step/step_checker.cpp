#include "core/step/step_checker.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/step/slip_sheet.hpp"
#include "core/step/words.hpp"
#include "core/units/quantity_text.hpp"

namespace heatledger::step {
namespace {

struct TypedFigure {
  std::string cell;
  double theirs = 0;
  double half_digit = 0;  ///< what rounding to the digits typed leaves open [SI]
};

/// Our own arithmetic against theirs in full precision.
constexpr double kRounding = 1e-6;

bool agrees(double ours, const TypedFigure& typed) {
  return std::fabs(ours - typed.theirs) <= 1.0001 * typed.half_digit + kRounding * std::fabs(ours);
}

double power_of_ten(int decimals) {
  double value = 1;
  for (int i = 0; i < decimals; ++i) value /= 10;
  return value;
}

/// The ± of the data behind a figure [SI]; 0 where it is not known.
double data_u95(const StepResult& result, const std::string& cell) {
  if (cell == "sought") return result.answers.empty() ? 0 : result.answers.front().value.u95();
  if (cell == "heat_set_free") {
    for (const Answer& answer : result.answers) {
      if (answer.id == FigureId::HeatSetFree) return answer.value.u95();
    }
  }
  for (std::size_t j = 0; j < result.reactions.size(); ++j) {
    if (cell == "reaction." + std::to_string(j) + ".heat") return result.reactions[j].heat_25.u95();
  }
  return 0;
}

std::string shown(const StepResult& result, const std::string& cell, double value) {
  const std::optional<units::Dimension> dimension = check_dimension(result, cell);
  return value_text(value, *dimension, result.model->input().kind == StepKind::ThroughFlow);
}

bool explains(const std::map<std::string, double>& sheet, const std::vector<TypedFigure>& typed) {
  return std::all_of(typed.begin(), typed.end(), [&](const TypedFigure& figure) {
    const auto ours = sheet.find(figure.cell);
    return ours != sheet.end() && agrees(ours->second, figure);
  });
}

}  // namespace

std::optional<units::Dimension> check_dimension(const StepResult& result, const std::string& cell) {
  namespace d = units::dimension;
  const bool flow = result.model->input().kind == StepKind::ThroughFlow;
  const auto ends = [&](const char* with) {
    const std::string end = with;
    return cell.size() > end.size() && cell.compare(cell.size() - end.size(), end.size(), end) == 0;
  };
  if (cell == "sought") return result.model->slots()[result.model->sought()].dimension;
  if (cell == "heat_set_free" || cell == "inlet" || cell == "outlet") return flow ? d::kPower : d::kEnergy;
  if (slip_sheet(result, Variation{}).count(cell) == 0) return std::nullopt;
  if (cell.compare(0, 9, "reaction.") == 0 && ends(".heat")) return d::kEnergyPerMole;
  if (ends(".heat") || ends(".free")) return flow ? d::kPower : d::kEnergy;
  if (ends(".mass")) return flow ? d::kMassFlow : d::kMass;
  return flow ? d::kMolarFlow : d::kAmount;
}

StepReview review_step(const StepResult& result, Lookups& lookups,
                       const std::map<std::string, std::string>& entries) {
  StepReview review;
  std::vector<TypedFigure> typed;
  const std::map<std::string, double> right = slip_sheet(result, Variation{});
  for (const auto& [cell, text] : entries) {
    if (text.find_first_not_of(" \t") == std::string::npos) continue;
    StepCheckedLine line;
    line.cell = cell;
    const std::optional<units::Dimension> dimension = check_dimension(result, cell);
    const auto ours = right.find(cell);
    if (!dimension || ours == right.end()) {
      line.verdict = StepVerdict::NotComparable;
      line.finding = "This step has no such figure.";
      review.lines.push_back(std::move(line));
      continue;
    }
    const Result<units::TypedValue> read = units::parse_quantity(text, *dimension);
    if (!read.ok()) {
      line.verdict = StepVerdict::Unreadable;
      line.finding = read.error().message;
      review.lines.push_back(std::move(line));
      continue;
    }
    TypedFigure figure;
    figure.cell = cell;
    figure.theirs = read->value;
    figure.half_digit = 0.5 * power_of_ten(read->decimals) * std::fabs(read->unit.factor);
    line.ours = ours->second;
    line.theirs = figure.theirs;
    typed.push_back(figure);
    review.lines.push_back(std::move(line));
  }

  std::optional<std::map<std::string, double>> explained;
  if (!explains(right, typed)) {
    for (Variation& variation : single_slips(result, lookups)) {
      const std::map<std::string, double> sheet = slip_sheet(result, variation);
      if (!explains(sheet, typed)) continue;
      // A slip that touches nothing typed explains nothing.
      if (!explained) explained = sheet;
      review.slips.push_back(std::move(variation.slip));
    }
  }
  std::size_t at = 0;
  bool within_data = true;
  for (StepCheckedLine& line : review.lines) {
    if (line.verdict == StepVerdict::NotComparable || line.verdict == StepVerdict::Unreadable) continue;
    const TypedFigure& figure = typed[at++];
    if (agrees(line.ours, figure)) {
      line.finding = "agrees";
      continue;
    }
    review.agrees = false;
    const std::string gap =
        "ours " + shown(result, line.cell, line.ours) + ", theirs " + shown(result, line.cell, line.theirs);
    if (explained) {
      line.verdict = line.cell == "sought" || explained->at(line.cell) == line.ours ? StepVerdict::Follows
                                                                                    : StepVerdict::Slip;
      line.finding = gap + ": " + review.slips.front().words + ".";
      continue;
    }
    const double spread = data_u95(result, line.cell);
    if (std::fabs(line.ours - line.theirs) <= spread) {
      line.verdict = StepVerdict::WithinData;
      line.finding = gap + ": within the ± of the data, so another table and no slip.";
    } else {
      within_data = false;
      line.verdict = StepVerdict::Unexplained;
      line.finding = gap + ".";
    }
  }
  if (review.agrees) {
    review.summary = typed.empty() ? "" : "Every figure typed agrees.";
  } else if (explained) {
    review.summary = "One slip explains the sheet: " + review.slips.front().words + ".";
    if (review.slips.size() > 1)
      review.summary += " " + std::to_string(review.slips.size() - 1) + " other slips would look the same.";
  } else if (within_data) {
    review.summary = "The sheet stands on other data; the differences are within the ± of ours.";
  } else {
    review.summary = "No single slip known here explains the sheet.";
  }
  return review;
}

Result<StepResult> with_own_data(const StepResult& result, Lookups& lookups, const OwnData& data) {
  StepInput input = result.model->input();
  for (const auto& [reaction, heat] : data.reaction_heats) {
    if (reaction >= input.reactions.size()) continue;
    ReactionHeat& own = input.reactions[reaction].heat;
    own.as_written = uncertainty::Quantity(heat);
    own.temperature = 298.15;
    own.typed = true;
    own.includes_mixing = Includes::No;
  }
  for (const auto& [substance, capacity] : data.heat_capacities) {
    if (substance < input.substances.size()) input.substances[substance].heat_capacity = Typed{capacity, 0};
  }
  return solve_step(std::move(input), lookups);
}

}  // namespace heatledger::step
