// Published and re-derived worked examples of heat balances, from tests/data/checks/balances.tsv.
#include <cmath>
#include <functional>
#include <map>

#include "tests/core/step/steps.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::step {
namespace {

using namespace test_steps;
using molecule::Phase;

constexpr double C(double celsius) {
  return celsius + kZeroCelsius;
}

/// Sought outlet temperature without duty.
void adiabatic(Writer& w) {
  w.input.duty = Typed{0, 0};
  w.input.sought = "outlet.temperature";
}

void outlet(Writer& w, double kelvin) {
  w.input.outlet.temperature = Typed{kelvin, 0};
}

void heat_capacity(Writer& w, const std::string& name, double molar) {
  w.input.substances[w.substance(name)].heat_capacity = Typed{molar, 0};
}

double duty(const StepResult& r) {
  return answer(r, FigureId::Sought);
}

using Figures = std::map<std::string, double>;

Figures ammonia_oxidiser(bool textbook_heat) {
  Writer w;
  w.feed("feed", C(25));
  w.part("ammonia", Phase::Gas, 100).part("oxygen", Phase::Gas, 200);
  w.reaction("4 NH3(g) + 5 O2(g) -> 4 NO(g) + 6 H2O(g)", ProgressKind::Conversion, 1, "ammonia");
  if (textbook_heat) {  // with the book's own enthalpies at 300 °C, 275 K above the reference
    w.typed_heat(-904.7e3);
    heat_capacity(w, "oxygen", 8470 / 275.0);
    heat_capacity(w, "NO", 8453 / 275.0);
    heat_capacity(w, "H2O", 9570 / 275.0);
  }
  outlet(w, C(300));
  return {{"Q_kW", duty(solved(w)) / 1000}};
}

Figures ethanol_dehydrogenation() {
  Writer w;
  w.feed("feed", C(300));
  w.part("ethanol", Phase::Gas, 135).part("acetaldehyde", Phase::Gas, 15);
  w.reaction("ethanol(g) -> acetaldehyde(g) + H2(g)", ProgressKind::Conversion, 0.5, "ethanol");
  w.typed_heat(68.95e3);
  heat_capacity(w, "ethanol", 110);
  heat_capacity(w, "acetaldehyde", 80);
  heat_capacity(w, "H2", 29);
  outlet(w, C(265));
  w.input.duty = Typed{2440e3, 0};
  w.input.sought = "reaction.0.progress";
  const StepResult r = solved(w);
  return {{"conversion", answer(r, FigureId::Sought)}, {"extent_mol_s", r.reactions[0].extent}};
}

Figures steam_reformer() {
  Writer w;
  w.feed("feed", 600);
  w.part("methane", Phase::Gas, 1).part("water", Phase::Gas, 2);
  w.reaction("CH4(g) + H2O(g) -> CO(g) + 3 H2(g)", ProgressKind::Extent, 0.87);
  w.reaction("CH4(g) + 2 H2O(g) -> CO2(g) + 4 H2(g)", ProgressKind::Extent, 0.13);
  outlet(w, 1300);
  return {{"Q_kJ_per_mol_CH4", duty(solved(w)) / 1000}};
}

Figures butane_isomerisation() {
  Writer w;
  w.feed("feed", 330);
  w.part("butane", Phase::Liquid, 0.9).part("isopentane", Phase::Liquid, 0.1);
  w.reaction("butane(l) -> isobutane(l)", ProgressKind::Conversion, 0.681, "butane");
  w.typed_heat(-6900);
  heat_capacity(w, "butane", 141);
  heat_capacity(w, "isobutane", 141);
  heat_capacity(w, "isopentane", 161);
  adiabatic(w);
  const double end = answer(solved(w), FigureId::Sought);
  return {{"T_out_K", end}, {"slope_K", (end - 330) / 0.681}};
}

Figures gas_bed(const std::vector<std::pair<std::string, double>>& feed, double celsius,
                const std::string& equation, const std::string& key, double conversion) {
  Writer w;
  w.feed("feed", C(celsius));
  for (const auto& [name, moles] : feed) w.part(name, Phase::Gas, moles);
  w.reaction(equation, ProgressKind::Conversion, conversion, key);
  adiabatic(w);
  return {{"T_out_C", answer(solved(w), FigureId::Sought) - kZeroCelsius}};
}

Figures condensing_trap() {
  Figures figures;
  for (const bool condensed : {false, true}) {
    Writer w;
    w.feed("feed", C(25));
    w.part("methane", Phase::Gas, 1).part("oxygen", Phase::Gas, 2);
    w.reaction("CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)", ProgressKind::Conversion, 1, "methane");
    Leaving water;
    water.substance = w.substance("H2O");
    water.state.phase = condensed ? Phase::Liquid : Phase::Gas;
    w.input.outlet.leaving.push_back(water);
    outlet(w, C(25));
    figures[condensed ? "Q_full_condensation" : "Q_no_condensation"] = duty(solved(w)) / 1000;
  }
  return figures;
}

/// One coded reactant that becomes one coded product, with the cp of the whole mass typed.
Writer coded_charge(double kilograms_of_mass, double moles, double heat, double mass_cp, double celsius) {
  Writer w;
  w.input.kind = StepKind::Charge;
  w.source.add("reactant", 0.1);
  w.source.add("product", 0.1);
  w.source.add("rest", 0.1);
  w.feed("charge", C(celsius));
  w.part("reactant", Phase::Liquid, moles)
      .part("rest", Phase::Liquid, kilograms_of_mass - 0.1 * moles, Measure::Mass);
  w.reaction("reactant(l) -> product(l)", ProgressKind::Conversion, 1, "reactant");
  w.typed_heat(heat);
  w.input.mass_heat_capacity = Typed{mass_cp, 0};
  w.input.outlet.temperature = Typed{C(celsius), 0};
  return w;
}

Figures styrene_bulk() {
  Writer w = coded_charge(1, 1 / 0.10415, -69.9e3, 1900, 80);
  const StepResult r = solved(w);
  return {{"dT_ad_K", answer(r, FigureId::AdiabaticRise)},
          {"q_kJ_kg", answer(r, FigureId::HeatPerMass) / 1000}};
}

Figures anhydride_hydrolysis() {
  const StepResult r = solved(coded_charge(1, 3, -58.5e3, 2800, 40));
  return {{"dT_ad_K", answer(r, FigureId::AdiabaticRise)},
          {"MTSR_C", answer(r, FigureId::AdiabaticEnd) - kZeroCelsius}};
}

Figures neutralisation_one_molar() {
  const StepResult r = solved(coded_charge(2.04, 1, -55.8e3, 4030, 25));
  return {{"dT_K", answer(r, FigureId::AdiabaticRise)}};
}

/// The vessel takes a quarter of what the mass takes: the rise that is measured is that much smaller.
Figures thermal_inertia() {
  Writer w = coded_charge(1, 1, -240e3, 2000, 25);  // 120 K without the vessel
  w.input.vessel.heat_capacity = Typed{500, 0};
  const StepResult r = solved(w);
  EXPECT_NEAR(answer(r, FigureId::ThermalInertia), 1.25, 1e-12);
  return {{"dT_measured_K", answer(r, FigureId::EndWithVessel) - C(25)}};
}

Figures nitrobenzene_hydrogenation() {
  Writer w;
  w.input.kind = StepKind::Charge;
  w.feed("charge", C(25));
  w.part("nitrobenzene", Phase::Liquid, 1000, Measure::Mass).part("H2", Phase::Gas, 1000 / 0.12311 * 3);
  w.reaction("nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)", ProgressKind::Conversion, 0.999999,
             "nitrobenzene");
  w.typed_heat(-552.6e3);
  outlet(w, C(25));
  w.input.time = Typed{4 * 3600, 0};
  const StepResult r = solved(w);
  return {{"Q_kW", answer(r, FigureId::MeanDuty) / 1000},
          {"H2_kmol", 3 * r.reactions[0].extent / 1000},
          {"total_GJ", answer(r, FigureId::HeatSetFree) / 1e9}};
}

Figures quench_amount() {
  Writer w;
  w.source.add("hot mass", 0.1);
  w.source.add("quench water", 0.018);
  w.feed("hot", C(150));
  w.part("hot mass", Phase::Liquid, 2000, Measure::Mass);
  w.feed("quench", C(20));
  w.part("quench water", Phase::Liquid, 0, Measure::Mass);
  w.input.substances[0].mass_heat_capacity = Typed{1900, 0};
  w.input.substances[1].mass_heat_capacity = Typed{4180, 0};
  outlet(w, C(60));
  w.input.duty = Typed{0, 0};
  w.input.sought = "feed.1.part.0";
  return {{"m_kg", answer(solved(w), FigureId::Sought)}};
}

Figures quench_with_reaction() {
  Writer w;
  w.source.add("unreacted", 0.1);
  w.source.add("reacted", 0.1);
  w.source.add("hot mass", 0.1);
  w.source.add("quench water", 0.018);
  w.feed("hot", C(100));
  w.part("unreacted", Phase::Liquid, 2400).part("hot mass", Phase::Liquid, 2000 - 240, Measure::Mass);
  w.feed("quench", C(20));
  w.part("quench water", Phase::Liquid, 3000, Measure::Mass);
  w.reaction("unreacted(l) -> reacted(l)", ProgressKind::Conversion, 1, "unreacted");
  w.typed_heat(-100e3);
  for (const char* name : {"unreacted", "reacted", "hot mass"})
    w.input.substances[w.substance(name)].mass_heat_capacity = Typed{1900, 0};
  w.input.substances[w.substance("quench water")].mass_heat_capacity = Typed{4180, 0};
  adiabatic(w);
  return {{"T_C", answer(solved(w), FigureId::Sought) - kZeroCelsius}};
}

Figures cooled_tank() {
  Writer w;
  w.source.add("reactant", 0.1);
  w.source.add("product", 0.1);
  w.source.add("rest", 0.1);
  w.feed("feed", C(25));
  w.part("reactant", Phase::Liquid, 3).part("rest", Phase::Liquid, 1.7, Measure::Mass);
  w.reaction("reactant(l) -> product(l)", ProgressKind::Conversion, 0.9, "reactant");
  w.typed_heat(-95e3);
  w.input.mass_heat_capacity = Typed{2200, 0};
  outlet(w, C(70));
  const StepResult r = solved(w);
  double sensible = 0;
  for (const StreamLine& line : r.out) sensible += line.heat;
  for (const StreamLine& line : r.in) sensible -= line.heat;
  return {{"heat_release_kW", answer(r, FigureId::HeatSetFree) / 1000},
          {"sensible_kW", sensible / 1000},
          {"cooling_kW", -duty(r) / 1000}};
}

const std::map<std::string, std::function<Figures()>>& cases() {
  static const std::map<std::string, std::function<Figures()>> all = {
      {"ammonia-oxidiser", [] { return ammonia_oxidiser(true); }},
      {"ammonia-oxidiser-own-data", [] { return ammonia_oxidiser(false); }},
      {"ethanol-dehydrogenation-conversion", ethanol_dehydrogenation},
      {"steam-reformer-duty-own-data", steam_reformer},
      {"butane-isomerisation", butane_isomerisation},
      {"ammonia-converter",
       [] {
         return gas_bed({{"nitrogen", 1}, {"hydrogen", 3}}, 400, "N2(g) + 3 H2(g) -> 2 NH3(g)", "nitrogen",
                        0.2);
       }},
      {"so2-first-bed",
       [] {
         return gas_bed({{"SO2", 10}, {"oxygen", 11}, {"nitrogen", 79}}, 430, "2 SO2(g) + O2(g) -> 2 SO3(g)",
                        "SO2", 0.65);
       }},
      {"ethylbenzene-bed",
       [] {
         return gas_bed({{"ethylbenzene", 1}, {"water", 10}}, 640, "ethylbenzene(g) -> styrene(g) + H2(g)",
                        "ethylbenzene", 0.35);
       }},
      {"co-catalytic-oxidation",
       [] {
         return gas_bed({{"CO", 2}, {"oxygen", 20.6}, {"nitrogen", 77.4}}, 300, "2 CO(g) + O2(g) -> 2 CO2(g)",
                        "CO", 1);
       }},
      {"condensing-trap", condensing_trap},
      {"batch-styrene-bulk", styrene_bulk},
      {"anhydride-hydrolysis", anhydride_hydrolysis},
      {"naoh-hcl-1-molar", neutralisation_one_molar},
      {"thermal-inertia", thermal_inertia},
      {"nitrobenzene-hydrogenation", nitrobenzene_hydrogenation},
      {"quench-amount", quench_amount},
      {"quench-with-reaction", quench_with_reaction},
      {"cooled-cstr", cooled_tank},
  };
  return all;
}

TEST(WorkedExamples, AgreeWithTheirPublishedAnswers) {
  const test::Table table = test::read_table("tests/data/checks/balances.tsv");
  const std::size_t id = table.column("id"), figure = table.column("figure"), value = table.column("value"),
                    tolerance = table.column("tolerance");
  std::map<std::string, Figures> computed;
  std::size_t compared = 0;
  for (const std::vector<std::string>& row : table.rows) {
    const auto known = cases().find(row[id]);
    ASSERT_NE(known, cases().end()) << row[id];
    if (computed.count(row[id]) == 0) computed[row[id]] = known->second();
    const auto found = computed[row[id]].find(row[figure]);
    ASSERT_NE(found, computed[row[id]].end()) << row[id] << " " << row[figure];
    EXPECT_NEAR(found->second, std::stod(row[value]), std::stod(row[tolerance]))
        << row[id] << " " << row[figure];
    ++compared;
  }
  EXPECT_GE(compared, cases().size());
}

}  // namespace
}  // namespace heatledger::step
