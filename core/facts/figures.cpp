#include "core/facts/figures.hpp"

#include "core/base/check.hpp"

namespace heatledger::facts {

const std::optional<Datum>& figure(const Compound& c, FigureKind kind) {
  switch (kind) {
    case FigureKind::FormationGas:
      return c.gas.formation_enthalpy;
    case FigureKind::FormationLiquid:
      return c.liquid.formation_enthalpy;
    case FigureKind::FormationSolid:
      return c.solid.formation_enthalpy;
    case FigureKind::EntropyGas:
      return c.gas.entropy;
    case FigureKind::EntropyLiquid:
      return c.liquid.entropy;
    case FigureKind::EntropySolid:
      return c.solid.entropy;
    case FigureKind::HeatCapacityGas:
      return c.gas.heat_capacity;
    case FigureKind::HeatCapacityLiquid:
      return c.liquid.heat_capacity;
    case FigureKind::HeatCapacitySolid:
      return c.solid.heat_capacity;
    case FigureKind::MeltingPoint:
      return c.melting_point;
    case FigureKind::FusionEnthalpy:
      return c.fusion_enthalpy;
    case FigureKind::BoilingPoint:
      return c.boiling_point;
    case FigureKind::VaporisationBoiling:
      return c.vaporisation_enthalpy_boiling;
    case FigureKind::Vaporisation298:
      return c.vaporisation_enthalpy_298;
    case FigureKind::LiquidDensity:
      return c.liquid_density;
    case FigureKind::CriticalTemperature:
      return c.critical_temperature;
    case FigureKind::CriticalPressure:
      return c.critical_pressure;
    case FigureKind::Dissolving:
      return c.dissolving_enthalpy;
  }
  CHECK(false, "every kind of figure has its place");
}

std::optional<Datum>& figure(Compound& c, FigureKind kind) {
  return const_cast<std::optional<Datum>&>(figure(static_cast<const Compound&>(c), kind));
}

}  // namespace heatledger::facts
