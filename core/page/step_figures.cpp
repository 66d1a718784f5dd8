#include "core/page/step_figures.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/step/words.hpp"
#include "core/units/display.hpp"

namespace heatledger::page {
namespace {

namespace d = units::dimension;

struct Scale {
  double factor, offset;  ///< SI = factor × shown + offset
  const char* unit;
};

Scale scale_of(const units::Dimension& dimension, double size, bool ratio) {
  const auto by_size = [&](const char* base, const char* kilo, const char* mega, const char* giga) -> Scale {
    if (size >= 1e9) return {1e9, 0, giga};
    if (size >= 1e6) return {1e6, 0, mega};
    if (size >= 1e3 || base == nullptr) return {1e3, 0, kilo};
    return {1, 0, base};
  };
  if (dimension == d::kPower) return by_size("W", "kW", "MW", "GW");
  if (dimension == d::kEnergy) return by_size("J", "kJ", "MJ", "GJ");
  if (dimension == d::kTemperature) return {1, 273.15, "°C"};
  if (dimension == d::kTemperatureDifference) return {1, 0, "K"};
  if (dimension == d::kNumber) return ratio ? Scale{1, 0, ""} : Scale{0.01, 0, "%"};
  if (dimension == d::kEnergyPerMass) return {1e3, 0, "kJ/kg"};
  if (dimension == d::kMolarFlow) return {1e3 / 3600, 0, "kmol/h"};
  if (dimension == d::kAmount) return {1e3, 0, "kmol"};
  if (dimension == d::kMassFlow) return {1 / 3600.0, 0, "kg/h"};
  if (dimension == d::kMass) return {1, 0, "kg"};
  if (dimension == d::kVolumeFlow) return {1 / 3600.0, 0, "m³/h"};
  if (dimension == d::kVolume) return {1, 0, "m³"};
  if (dimension == d::kTime) return {3600, 0, "h"};
  if (dimension == d::kHeatTransferPerKelvin) return {1e3, 0, "kW/K"};
  if (dimension == d::kHeatCapacity) return {1e3, 0, "kJ/K"};
  if (dimension == d::kPressure) return {1e3, 0, "kPa"};
  if (dimension == units::Dimension{0, 1, -1, 0, 0, units::Kind::Plain}) return {1, 0, "m/s"};
  if (dimension == d::kMassFraction) return {0.01, 0, "wt%"};
  if (dimension == d::kMoleFraction) return {0.01, 0, "mol%"};
  if (dimension == d::kVolumeFraction) return {0.01, 0, "vol%"};
  if (dimension == d::kEnergyPerMole) return {1e3, 0, "kJ/mol"};
  if (dimension == d::kMolarHeatCapacity) return {1, 0, "J/(mol K)"};
  if (dimension == d::kMassHeatCapacity) return {1e3, 0, "kJ/(kg K)"};
  if (dimension == d::kHeatTransferCoefficient) return {1, 0, "W/(m² K)"};
  if (dimension == d::kArea) return {1, 0, "m²"};
  if (dimension == d::kDensity) return {1, 0, "kg/m³"};
  if (dimension == d::kConcentration) return {1e3, 0, "mol/L"};
  if (dimension == d::kMolarMass) return {1e-3, 0, "g/mol"};
  if (dimension == d::kLength) return {1, 0, "m"};
  return {1, 0, ""};
}

/// Decimals for four significant digits.
int four_digits(double value) {
  int decimals = 3;
  for (double limit = 10; decimals > 0 && std::fabs(value) >= limit; limit *= 10) --decimals;
  return decimals;
}

}  // namespace

ShownFigure shown_figure(const uncertainty::Figure& in_si, const units::Dimension& dimension, bool ratio) {
  const Scale scale = scale_of(dimension, std::max(std::fabs(in_si.value), in_si.u95), ratio);
  const double value = (in_si.value - scale.offset) / scale.factor, u95 = in_si.u95 / scale.factor;
  const bool temperature = dimension == d::kTemperature;
  const int most = temperature ? 1 : std::max(1, four_digits(value));
  const int decimals = u95 > 0 ? std::min(units::decimals_for(u95, most), most) : most;
  ShownFigure shown;
  shown.value = display_number(value, decimals);
  shown.unit = scale.unit;
  if (u95 > 0) {
    // A ± smaller than the last digit shown is still one.
    double last = 0.5;
    for (int i = 0; i < decimals; ++i) last /= 10;
    shown.u95 =
        u95 < last ? "± < " + display_number(2 * last, decimals) : "± " + display_number(u95, decimals);
  }
  return shown;
}

ShownFigure shown_answer(const step::Answer& answer) {
  return shown_figure(answer.value.figure(), answer.dimension, answer.id == step::FigureId::ThermalInertia);
}

std::string drawn_text(const step::Answer& answer) {
  if (!answer.drawn || answer.value.u95() == 0) return {};
  const Scale scale = scale_of(answer.dimension, std::fabs(answer.value.value()),
                               answer.id == step::FigureId::ThermalInertia);
  const int decimals = std::min(units::decimals_for(answer.value.u95() / scale.factor, 3), 3);
  const auto text = [&](double value) {
    return display_number((value - scale.offset) / scale.factor, decimals);
  };
  std::string words = text(answer.drawn->low) + " to " + text(answer.drawn->high) + " " + scale.unit +
                      " in 95 % of 10 000 draws";
  if (answer.drawn->without > 0)
    words += "; none in " + display_number(100 * answer.drawn->without, 1) + " % of them";
  return words;
}

bool is_for_safety(step::FigureId id) {
  switch (id) {
    case step::FigureId::AdiabaticRise:
    case step::FigureId::AdiabaticEnd:
    case step::FigureId::EndByEnthalpy:
    case step::FigureId::PeakDuty:
      return true;
    default:
      return false;
  }
}

std::string beside_answer(const step::Answer& answer) {
  std::string text = shown_answer(answer).u95;
  const double u95 = answer.value.u95();
  if (u95 == 0) return text;
  const bool ratio = answer.id == step::FigureId::ThermalInertia;
  const auto shown = [&](double value) { return shown_figure({value, u95}, answer.dimension, ratio).value; };
  if (answer.drawn) {
    // Draws that only repeat the ± are left to the margin.
    constexpr double kSame = 0.05;
    const double below = answer.value.value() - answer.drawn->low,
                 above = answer.drawn->high - answer.value.value();
    if (std::fabs(below - u95) > kSame * u95 || std::fabs(above - u95) > kSame * u95)
      text += "; " + shown(answer.drawn->low) + " to " + shown(answer.drawn->high) + " by draws";
  }
  if (is_for_safety(answer.id))
    text += "; unfavourable end " + shown(answer.drawn ? answer.drawn->high : answer.value.value() + u95);
  return text;
}

double in_shown_unit(double in_si, const units::Dimension& dimension, double largest, bool ratio) {
  const Scale scale = scale_of(dimension, largest, ratio);
  return (in_si - scale.offset) / scale.factor;
}

std::string shown_amount(double amount, bool flow) {
  return step::digits(flow ? amount * 3.6 : amount / 1000);
}

std::string shown_mass(double mass, bool flow) {
  return step::digits(flow ? mass * 3600 : mass);
}

std::string shown_heat(double heat, bool flow) {
  return display_number(flow ? heat / 1e3 : heat / 1e6, 1);
}

const char* heat_unit(bool flow) {
  return flow ? "kW" : "MJ";
}

}  // namespace heatledger::page
