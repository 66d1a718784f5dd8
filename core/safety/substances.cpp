// Substances of a step that call for a test before anything is heated.
#include <algorithm>

#include "core/base/number_text.hpp"
#include "core/safety/cautions.hpp"
#include "core/safety/charge_safety.hpp"
#include "core/safety/functional_groups.hpp"
#include "core/safety/oxygen_balance.hpp"

namespace heatledger::safety {
namespace {

std::vector<Presence> presences(const step::StepResult& result) {
  const step::StepInput& input = result.model->input();
  std::vector<Presence> list(input.substances.size());
  for (std::size_t i = 0; i < list.size(); ++i) {
    list[i].name = input.substances[i].name;
    list[i].species = input.substances[i].species;
  }
  for (const step::StreamLine& line : result.in) list[line.substance].fed = true;
  for (const step::StreamLine& line : result.out) {
    if (line.state.phase == molecule::Phase::Gas) list[line.substance].gas = true;
  }
  for (std::size_t j = 0; j < input.reactions.size(); ++j) {
    for (std::size_t i = 0; i < list.size(); ++i)
      list[i].formed = list[i].formed || result.model->coefficient_of(j, i) > 0;
  }
  return list;
}

std::string group_words(const GroupFound& group) {
  return (group.count > 1 ? std::to_string(group.count) + " × " : std::string()) + group.name + ", " +
         display_number(group.low / 1000, 0) + " to " + display_number(group.high / 1000, 0) + " kJ/mol";
}

}  // namespace

step::Findings substance_findings(const step::StepResult& result, bool dosed) {
  step::Findings findings;
  const std::vector<Presence> list = presences(result);
  step::FindingGroup group{
      "substances", "Substances that call for a test", "published decomposition energies, each group", {}};
  for (std::size_t i = 0; i < list.size(); ++i) {
    if (list[i].species == nullptr || !list[i].species->graph) continue;
    const std::vector<GroupFound> groups = functional_groups(*list[i].species->graph);
    if (groups.empty()) continue;
    const std::string id = "substance." + std::to_string(i);
    step::Finding row;
    row.id = id + ".groups";
    row.label = list[i].name;
    for (const GroupFound& one : groups) row.text += (row.text.empty() ? "" : "; ") + group_words(one);
    row.working = {
        "test this before it is heated: the ranges say that it can decompose, not when or how far"};
    row.sources = {functional_groups_source()};
    group.findings.push_back(std::move(row));
    if (const Result<double> balance = oxygen_balance(*list[i].species); balance.ok()) {
      step::Finding oxygen;
      oxygen.id = id + ".oxygen_balance";
      oxygen.label = "oxygen balance of " + list[i].name;
      oxygen.value = uncertainty::Quantity(*balance);
      oxygen.working = {"−1600 (2 C + (H − X)/2 + 2 S − O) / M, to CO2, H2O, N2, SO2 and HX"};
      group.findings.push_back(std::move(oxygen));
    }
  }
  if (!group.findings.empty()) findings.groups.push_back(std::move(group));
  Setting setting;
  setting.dosed = dosed;
  setting.vessel = result.model->input().kind == step::StepKind::Charge;
  findings.cautions = customary_cautions(list, setting);
  return findings;
}

}  // namespace heatledger::safety
