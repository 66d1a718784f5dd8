#include "core/step/closure.hpp"

#include <cmath>
#include <map>

#include "core/base/number_text.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/formula.hpp"

namespace heatledger::step {
namespace {

/// Sums of some dozen lines in double precision end well below this.
constexpr double kClosed = 1e-9;

/// [mol] by atomic number; false when a substance has no composition.
bool count_elements(const StepResult& result, const std::vector<StreamLine>& lines,
                    std::map<int, double>& sums, std::string& without) {
  for (const StreamLine& line : lines) {
    const SubstanceInput& substance = result.model->input().substances[line.substance];
    if (substance.species == nullptr || !substance.species->composition) {
      without = substance.name;
      return false;
    }
    for (const auto& [element, count] : substance.species->composition->atoms)
      sums[element] += line.amount * count;
  }
  return true;
}

void close_elements(const StepResult& result, Closure& closure) {
  std::map<int, double> in, out;
  std::string without;
  if (!count_elements(result, result.in, in, without) || !count_elements(result, result.out, out, without)) {
    closure.why_not_checkable = "not checkable: no formula of " + without;
    return;
  }
  closure.elements_close = true;
  for (const auto& [element, amount] : out) in.emplace(element, 0);
  for (const auto& [element, amount] : in) {
    ElementLine line;
    line.symbol = std::string(molecule::symbol(element % 1000));
    line.in = amount;
    const auto found = out.find(element);
    line.out = found == out.end() ? 0 : found->second;
    closure.elements_close =
        closure.elements_close && std::fabs(line.in - line.out) <= kClosed * std::max(line.in, line.out);
    closure.elements.push_back(std::move(line));
  }
}

}  // namespace

Closure close(const StepResult& result, const Work& work) {
  Closure closure;
  double sum = 0, size = 0;
  for (const HeatLine& line : result.heats) {
    sum += line.in;
    size += std::fabs(line.in);
  }
  closure.heat = size > 0 ? std::fabs(sum) / size : 0;
  closure.heat_closes = closure.heat <= kClosed;
  close_elements(result, closure);

  double enthalpy = work.vessel_heat + work.departure + result.values[*result.model->slot("loss")] -
                    result.values[*result.model->slot("shaft")];
  bool all = true;
  for (const StreamLine& line : result.out) {
    all = all && line.enthalpy;
    if (line.enthalpy) enthalpy += *line.enthalpy;
  }
  for (const StreamLine& line : result.in) {
    all = all && line.enthalpy;
    if (line.enthalpy) enthalpy -= *line.enthalpy;
  }
  if (all) closure.duty_by_formation = enthalpy;

  closure.sentence = closure.heat_closes ? "Heat closes to zero" : "Heat does not close";
  if (closure.elements.empty()) {
    closure.sentence += "; elements " + (closure.why_not_checkable.empty() ? std::string("not checkable")
                                                                           : closure.why_not_checkable);
  } else {
    std::string list;
    for (const ElementLine& line : closure.elements) list += (list.empty() ? "" : ", ") + line.symbol;
    closure.sentence +=
        closure.elements_close ? "; in and out agree in " + list : "; in and out differ in the elements";
  }
  closure.sentence += '.';
  return closure;
}

}  // namespace heatledger::step
