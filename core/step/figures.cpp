#include "core/step/figures.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/step/root.hpp"
#include "core/units/constants.hpp"

namespace heatledger::step {
namespace {

double heat_set_free(const Model& model, const std::vector<double>& v, const Work& work, double temperature) {
  double heat = 0;
  for (std::size_t j = 0; j < work.extents.size(); ++j)
    heat -= work.extents[j] * model.reaction_heat_at(v, j, temperature);
  return heat;
}

/// Heat that is over when all that was charged at `start` has reacted and stands at `end`, nothing
/// evaporated.
double heat_over(const Model& model, const std::vector<double>& v, const Work& work, double start,
                 double end) {
  double heat = -work.reaction_heat;
  for (std::size_t p = 0; p < work.parts.size(); ++p)
    heat += work.parts[p] * model.enthalpy(v, model.part_state(p), start);
  for (std::size_t i = 0; i < work.leaving.size(); ++i) {
    if (work.leaving[i] != 0) heat -= work.leaving[i] * model.leaving_enthalpy(v, work, i, end);
  }
  return heat + work.dissolving.taken - work.dissolving.tables;
}

/// Where the heat that is set free ends when nothing is taken away [K].
std::optional<double> adiabatic_end(const Model& model, const std::vector<double>& v, const Work& work,
                                    double start, double vessel) {
  constexpr double kColdest = 50,
                   kHottest = 20000;  // extrapolated heat capacities; the sheet says "notional"
  const auto over = [&](double end) {
    return heat_over(model, v, work, start, end) - vessel * (end - start);
  };
  double a = start, fa = over(a), b = a + 1, fb = over(b);
  const double size = std::fabs(work.reaction_heat) + std::fabs(work.dissolving.tables);
  const double small = 1e-12 * (std::fabs(fa) + size) + 1e-300;
  for (int turn = 0; turn < 60; ++turn) {
    if (std::fabs(fb) <= small) return b;
    if (fb == fa) return std::nullopt;
    const double next = std::min(kHottest, std::max(kColdest, b - fb * (b - a) / (fb - fa)));
    if (next == b) return std::fabs(fb) <= 1e-9 * size ? std::optional<double>(b) : std::nullopt;
    a = b, fa = fb;
    b = next, fb = over(b);
  }
  return std::nullopt;
}

/// UA = heat / mean temperature difference. A cooler or heater without reaction: log mean of the two ends in
/// counter-flow. With reaction: well mixed at the outlet temperature, log mean over the medium's way.
std::optional<double> conductance(const Model& model, const std::vector<double>& v, double heat) {
  const Model::Side& side = model.side();
  const double process = v[model.outlet_temperature_slot()];
  const double in = v[side.medium_in ? *side.medium_in : *side.medium_out];
  const double out = side.medium_out ? v[*side.medium_out] : in;
  const bool along = model.input().kind == StepKind::ThroughFlow && model.input().reactions.empty();
  const double one = in - process, two = out - (along ? v[model.feed_temperature_slot(0)] : process);
  if (one * two <= 0 || heat / one <= 0) return std::nullopt;  // the medium cannot take or give this heat
  const double mean = one == two ? one : (one - two) / std::log(one / two);
  return heat / mean;
}

std::vector<FigureId> all_figures(const Model& model) {
  const StepInput& input = model.input();
  std::vector<FigureId> ids{FigureId::Sought};
  const bool dissolves = !model.solution().solutes.empty();
  if (!input.reactions.empty()) ids.push_back(FigureId::HeatSetFree);
  if (dissolves) ids.push_back(FigureId::HeatOfDilution);
  if (!input.reactions.empty() || dissolves) ids.push_back(FigureId::HeatPerMass);
  const bool medium = input.surface.medium_in || input.surface.medium_out;
  if (input.kind == StepKind::ThroughFlow) {
    if (medium) ids.push_back(FigureId::Conductance);
    return ids;
  }
  if (input.charge.cooling) ids.push_back(FigureId::Time);
  const bool timed = input.time && input.sought != "time";  // what is sought is not also an input
  if (timed) {
    ids.push_back(FigureId::MeanDuty);
    if (medium) ids.push_back(FigureId::Conductance);
  }
  if (input.charge.rate_constant) ids.push_back(FigureId::PeakDuty);
  if (!input.reactions.empty() || dissolves) {
    ids.push_back(FigureId::AdiabaticRise);
    ids.push_back(FigureId::AdiabaticEnd);
    ids.push_back(FigureId::EndByEnthalpy);
    if (input.vessel.heat_capacity) {
      ids.push_back(FigureId::EndWithVessel);
      ids.push_back(FigureId::ThermalInertia);
    }
    if (input.charge.solvent) {
      ids.push_back(FigureId::BoilingPoint);
      ids.push_back(FigureId::BoiledOff);
    }
  }
  return ids;
}

}  // namespace

double vapour_over_mixture(const Model& model, const std::vector<double>& v, const Work& work,
                           double temperature) {
  double liquid = 0, sum = 0;
  for (std::size_t i = 0; i < work.leaving.size(); ++i) {
    if (!model.is_liquid(i) || work.leaving[i] == 0) continue;
    liquid += work.leaving[i];
    sum += work.leaving[i] * model.vapour_pressure(v, i, temperature);
  }
  return liquid > 0 ? sum / liquid : 0;
}

std::optional<double> mixture_boiling_point(const Model& model, const std::vector<double>& v,
                                            const Work& work, double pressure) {
  const auto excess = [&](double temperature) {
    const double sum = vapour_over_mixture(model, v, work, temperature);
    return sum > 0 ? std::log(sum / pressure) : -1e3;
  };
  // ln p is close to a straight line in 1/T; secants in that scale settle in a few turns.
  double a = 1 / 350.0, fa = excess(350), b = 1 / 360.0, fb = excess(360);
  for (int turn = 0; turn < 60; ++turn) {
    if (std::fabs(fb) < 1e-13) break;
    if (fb == fa) return std::nullopt;
    const double next = std::min(1 / 100.0, std::max(1 / 2000.0, b - fb * (b - a) / (fb - fa)));
    if (next == b) break;
    a = b, fa = fb;
    b = next, fb = excess(1 / b);
  }
  return std::fabs(fb) < 1e-9 ? std::optional<double>(1 / b) : std::nullopt;
}

double process_temperature(const Model& model, const std::vector<double>& v) {
  if (const std::optional<std::size_t>& typed = model.side().process_temperature) return v[*typed];
  if (model.input().outlet.temperature && !model.outlet_sought()) return v[model.outlet_temperature_slot()];
  return v[model.feed_temperature_slot(0)];
}

double mass_fed(const Model& model, const Work& work) {
  double mass = 0;
  for (std::size_t i = 0; i < work.fed.size(); ++i) mass += work.fed[i] * model.molar_mass(i);
  return mass;
}

double charge_heat_capacity(const Model& model, const Work& work, const std::vector<double>& v,
                            double temperature) {
  double sum = 0;
  for (std::size_t p = 0; p < work.parts.size(); ++p) {
    if (work.parts[p] != 0) sum += work.parts[p] * model.heat_capacity(v, model.part_state(p), temperature);
  }
  return sum;
}

FigureId headline(const Model& model) {
  const std::string& sought = model.input().sought;
  return sought == "conductance" ? FigureId::Conductance
         : sought == "time"      ? FigureId::Time
                                 : FigureId::Sought;
}

std::vector<FigureId> figures_of(const Model& model) {
  const FigureId first = headline(model);
  std::vector<FigureId> ids = all_figures(model);
  ids.erase(std::remove(ids.begin(), ids.end(), first), ids.end());
  ids.insert(ids.begin(), first);
  return ids;
}
void compute_figures(const Model& model, const std::vector<FigureId>& ids, const std::vector<double>& v,
                     Work& work, std::vector<std::optional<double>>& out) {
  const bool charge = model.input().kind == StepKind::Charge;
  const Model::Side& side = model.side();
  const double held = charge ? process_temperature(model, v) : units::kReferenceTemperature;
  const double by_reaction = heat_set_free(model, v, work, held);
  const double free = by_reaction + work.dissolving.taken;
  const double vessel = side.vessel ? v[*side.vessel] : 0;
  const double capacity = charge ? charge_heat_capacity(model, work, v, held) : 0;
  std::optional<double> boiling;
  out.assign(ids.size(), std::nullopt);
  for (std::size_t i = 0; i < ids.size(); ++i) {
    switch (ids[i]) {
      case FigureId::Sought:
        out[i] = v[model.sought()];
        break;
      case FigureId::HeatSetFree:
        out[i] = by_reaction;
        break;
      case FigureId::HeatOfDilution:
        out[i] = work.dissolving.taken;
        break;
      case FigureId::HeatPerMass:
        if (const double mass = mass_fed(model, work); mass > 0) out[i] = free / mass;
        break;
      case FigureId::Conductance:
        out[i] = conductance(model, v, charge ? -free / v[*side.time] : v[model.duty_slot()]);
        break;
      case FigureId::Time:
        if (free > 0) out[i] = free / v[*side.cooling];
        break;
      case FigureId::MeanDuty:
        out[i] = free / v[*side.time];
        break;
      case FigureId::PeakDuty:
        out[i] = free * v[*side.rate_constant];
        break;
      case FigureId::AdiabaticRise:
        if (capacity > 0) out[i] = free / capacity;
        break;
      case FigureId::AdiabaticEnd:
        if (capacity > 0) out[i] = held + free / capacity;
        break;
      case FigureId::EndByEnthalpy:
        out[i] = adiabatic_end(model, v, work, held, 0);
        break;
      case FigureId::EndWithVessel:
        out[i] = adiabatic_end(model, v, work, held, vessel);
        break;
      case FigureId::ThermalInertia:
        if (capacity > 0) out[i] = 1 + vessel / capacity;
        break;
      case FigureId::BoilingPoint:
        out[i] = boiling = mixture_boiling_point(model, v, work, v[*model.slot("outlet.pressure")]);
        break;
      case FigureId::BoiledOff:
        if (boiling) {
          const std::size_t solvent = *model.input().charge.solvent;
          const double each = model.enthalpy(v, *model.vapour_state(solvent), *boiling) -
                              model.leaving_enthalpy(v, work, solvent, *boiling);
          const double over = heat_over(model, v, work, held, *boiling);
          if (each > 0) out[i] = std::max(0.0, over) / each * model.molar_mass(solvent);
        }
        break;
    }
  }
}

std::string figure_label(const Model& model, FigureId id) {
  switch (id) {
    case FigureId::Sought:
      return model.slots()[model.sought()].label;
    case FigureId::HeatSetFree:
      return model.input().kind == StepKind::Charge ? "heat set free at process temperature"
                                                    : "heat set free at 25 °C";
    case FigureId::HeatOfDilution:
      return "heat of dilution set free";
    case FigureId::HeatPerMass:
      return "heat set free per kg fed";
    case FigureId::Conductance:
      return "UA asked for";
    case FigureId::Time:
      return "time for the cooling capacity";
    case FigureId::MeanDuty:
      return "mean heat rate";
    case FigureId::PeakDuty:
      return "peak heat rate";
    case FigureId::AdiabaticRise:
      return "adiabatic temperature rise";
    case FigureId::AdiabaticEnd:
      return "adiabatic end temperature";
    case FigureId::EndByEnthalpy:
      return "adiabatic end temperature by h(T)";
    case FigureId::EndWithVessel:
      return "adiabatic end temperature with the vessel";
    case FigureId::ThermalInertia:
      return "thermal inertia of the vessel";
    case FigureId::BoilingPoint:
      return "boiling point of the mixture";
    case FigureId::BoiledOff:
      return "solvent boiled off";
  }
  return {};
}

units::Dimension figure_dimension(const Model& model, FigureId id) {
  namespace d = units::dimension;
  const bool flow = model.input().kind == StepKind::ThroughFlow;
  switch (id) {
    case FigureId::Sought:
      return model.slots()[model.sought()].dimension;
    case FigureId::HeatSetFree:
    case FigureId::HeatOfDilution:
      return flow ? d::kPower : d::kEnergy;
    case FigureId::HeatPerMass:
      return d::kEnergyPerMass;
    case FigureId::Conductance:
      return d::kHeatTransferPerKelvin;
    case FigureId::Time:
      return d::kTime;
    case FigureId::MeanDuty:
    case FigureId::PeakDuty:
      return d::kPower;
    case FigureId::AdiabaticRise:
      return d::kTemperatureDifference;
    case FigureId::AdiabaticEnd:
    case FigureId::EndByEnthalpy:
    case FigureId::EndWithVessel:
    case FigureId::BoilingPoint:
      return d::kTemperature;
    case FigureId::ThermalInertia:
      return d::kNumber;
    case FigureId::BoiledOff:
      return d::kMass;
  }
  return d::kNumber;
}

}  // namespace heatledger::step
