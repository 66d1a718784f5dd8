#include "core/document/safety_reading.hpp"

#include "core/document/blank_texts.hpp"
#include "core/safety/utilities.hpp"

namespace heatledger::document {
namespace {

namespace d = units::dimension;

const step::Answer* find_answer(const step::StepResult& result, step::FigureId id) {
  for (const step::Answer& answer : result.answers) {
    if (answer.id == id) return &answer;
  }
  return nullptr;
}

/// The heat rate that the utilities have to carry; false when a charge has no time to it.
bool heat_rate(const step::StepResult& result, safety::UtilityInput& input) {
  if (result.model->input().kind == step::StepKind::ThroughFlow) {
    const step::Answer* sought = find_answer(result, step::FigureId::Sought);
    const bool duty = result.model->sought() == result.model->duty_slot() && sought != nullptr;
    input.heat = duty ? sought->value : uncertainty::Quantity(result.duty);
    input.heat_words = "duty";
    return result.duty != 0;
  }
  const step::Answer* rate = find_answer(result, step::FigureId::PeakDuty);
  input.heat_words = "peak heat rate";
  if (rate == nullptr) {
    rate = find_answer(result, step::FigureId::MeanDuty);
    input.heat_words = "mean heat rate, not the one to design for";
  }
  if (rate == nullptr || rate->value.value() == 0) return false;
  input.heat = rate->value.scaled(-1);  // set free in the vessel, taken from it
  return true;
}

void add_utilities(const StepSheet& sheet, const StepContext& context, const step::StepResult& result,
                   step::Findings& findings, std::vector<Error>& errors) {
  BlankTexts blanks(sheet, *context.names, errors);
  safety::UtilityInput input;
  input.medium = blanks.text("medium");
  input.medium_heat_capacity = blanks.positive("medium_heat_capacity", d::kMassHeatCapacity);
  input.steam_pressure = blanks.pressure("steam_pressure");
  input.coolant_pressure = blanks.pressure("coolant_pressure");
  input.heat_transfer_coefficient = blanks.positive("heat_transfer_coefficient", d::kHeatTransferCoefficient);
  if (const std::string name = blanks.text("coolant"); !name.empty()) {
    const Result<std::shared_ptr<const facts::Species>> species = context.species->species(name, false);
    if (species.ok()) {
      input.coolant = *species;
    } else {
      Error error = species.error();
      error.where = "blanks.coolant";
      errors.push_back(std::move(error));
    }
  }
  if (!heat_rate(result, input)) return;
  const step::Surface& surface = result.model->input().surface;
  input.medium_in = surface.medium_in;
  input.medium_out = surface.medium_out;
  if (const step::Answer* conductance = find_answer(result, step::FigureId::Conductance)) {
    input.conductance = conductance->value;
    if (!conductance->working.empty()) input.mean_difference = conductance->working.front();
  }
  step::FindingGroup group = safety::utilities(input);
  if (!group.findings.empty()) findings.groups.push_back(std::move(group));
}

void append(step::Findings& to, step::Findings from) {
  for (step::FindingGroup& group : from.groups) to.groups.push_back(std::move(group));
  to.notes.insert(to.notes.end(), from.notes.begin(), from.notes.end());
  to.cautions.insert(to.cautions.end(), from.cautions.begin(), from.cautions.end());
}

}  // namespace

safety::SafetyInput read_safety(const StepSheet& sheet, const StepContext& context,
                                std::vector<Error>& errors) {
  BlankTexts blanks(sheet, *context.names, errors);
  safety::SafetyInput input;
  input.td24 = blanks.quantity("td24", d::kTemperature);
  input.td24_source = blanks.text("td24_source");
  input.technical_limit = blanks.quantity("technical_limit", d::kTemperature);
  input.permissible_pressure = blanks.pressure("permissible_pressure");
  input.free_volume = blanks.positive("free_volume", d::kVolume);
  input.free_section = blanks.positive("free_section", d::kArea);
  input.time_to_maximum = blanks.positive("time_to_maximum", d::kTime);
  return input;
}

step::Findings safety_findings(const StepSheet& sheet, const StepContext& context,
                               const step::StepResult& result, std::vector<Error>& errors) {
  const bool charge = result.model->input().kind == step::StepKind::Charge;
  step::Findings findings;
  if (charge) findings = safety::charge_safety(result, read_safety(sheet, context, errors));
  step::Findings substances = safety::substance_findings(result, false);
  if (!charge) substances.groups.clear();  // nothing stands there long enough to be tested in bulk
  append(findings, std::move(substances));
  add_utilities(sheet, context, result, findings, errors);
  return findings;
}

}  // namespace heatledger::document
