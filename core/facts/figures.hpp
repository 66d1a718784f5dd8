// The figures a compound can have, by name: one list that the table reader, site tables and tests walk.
#pragma once

#include <array>
#include <cstdint>
#include <optional>
#include <string_view>

#include "core/facts/compound.hpp"

namespace heatledger::facts {

enum class FigureKind : std::uint8_t {
  FormationGas,
  FormationLiquid,
  FormationSolid,
  EntropyGas,
  EntropyLiquid,
  EntropySolid,
  HeatCapacityGas,
  HeatCapacityLiquid,
  HeatCapacitySolid,
  MeltingPoint,
  FusionEnthalpy,
  BoilingPoint,
  VaporisationBoiling,
  Vaporisation298,
  LiquidDensity,
  CriticalTemperature,
  CriticalPressure,
  Dissolving,  ///< typed only: no table has it
};

struct FigureColumn {
  FigureKind kind;
  std::string_view column;  ///< its heading in the tables
  std::string_view unit;    ///< as the tables print it
  double scale;             ///< table unit × scale = SI
};

/// In the order of the columns of tables/compounds.tsv.
inline constexpr std::array<FigureColumn, 17> kFigureColumns = {{
    {FigureKind::FormationGas, "hf_g", "kJ/mol", 1000},
    {FigureKind::FormationLiquid, "hf_l", "kJ/mol", 1000},
    {FigureKind::FormationSolid, "hf_s", "kJ/mol", 1000},
    {FigureKind::EntropyGas, "s_g", "J/(mol K)", 1},
    {FigureKind::EntropyLiquid, "s_l", "J/(mol K)", 1},
    {FigureKind::EntropySolid, "s_s", "J/(mol K)", 1},
    {FigureKind::HeatCapacityGas, "cp_g", "J/(mol K)", 1},
    {FigureKind::HeatCapacityLiquid, "cp_l", "J/(mol K)", 1},
    {FigureKind::HeatCapacitySolid, "cp_s", "J/(mol K)", 1},
    {FigureKind::MeltingPoint, "tm", "K", 1},
    {FigureKind::FusionEnthalpy, "hfus", "kJ/mol", 1000},
    {FigureKind::BoilingPoint, "tb", "K", 1},
    {FigureKind::VaporisationBoiling, "hvap_tb", "kJ/mol", 1000},
    {FigureKind::Vaporisation298, "hvap_298", "kJ/mol", 1000},
    {FigureKind::LiquidDensity, "rho", "kg/m3", 1},
    {FigureKind::CriticalTemperature, "tc", "K", 1},
    {FigureKind::CriticalPressure, "pc", "kPa", 1000},
}};

/// The place of one figure in a compound, those without a column included.
std::optional<Datum>& figure(Compound& compound, FigureKind kind);
const std::optional<Datum>& figure(const Compound& compound, FigureKind kind);

}  // namespace heatledger::facts
