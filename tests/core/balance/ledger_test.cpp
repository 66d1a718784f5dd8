#include "core/balance/ledger.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "tests/core/balance/sheets.hpp"

namespace heatledger::balance {
namespace {

using test_sheets::kj;
using test_sheets::ledger;
using test_sheets::try_ledger;

const BondLine* find_line(const LedgerRow& row, const std::string& label) {
  const auto at = std::find_if(row.lines.begin(), row.lines.end(),
                               [&label](const BondLine& line) { return line.label == label; });
  return at == row.lines.end() ? nullptr : &*at;
}

bool any_contains(const std::vector<std::string>& texts, const std::string& part) {
  return std::any_of(texts.begin(), texts.end(),
                     [&part](const std::string& text) { return text.find(part) != std::string::npos; });
}

const char* const kNitrobenzene = "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)";

// By hand with Zumdahl's averages. Nitrobenzene: 5 × 413 + 3 × 347 + 3 × 614 + 305 + 201 + 607 = 6061;
// hydrogen 432. Aniline: 5 × 413 + 3 × 347 + 3 × 614 + 305 + 2 × 391 = 6035; water 2 × 467 = 934.
TEST(Ledger, AddsNitrobenzeneHydrogenationUp) {
  const Ledger sheet = ledger(kNitrobenzene);
  ASSERT_EQ(sheet.rows.size(), 4u);
  EXPECT_DOUBLE_EQ(kj(sheet.rows[0].per_mole), 6061);
  EXPECT_DOUBLE_EQ(kj(sheet.rows[1].in_equation), 3 * 432);
  EXPECT_DOUBLE_EQ(kj(sheet.rows[2].per_mole), 6035);
  EXPECT_DOUBLE_EQ(kj(sheet.rows[3].in_equation), 2 * 934);
  EXPECT_DOUBLE_EQ(kj(sheet.broken), 7357);
  EXPECT_DOUBLE_EQ(kj(sheet.formed), 7903);
  EXPECT_DOUBLE_EQ(kj(sheet.gas_298), -546);
  ASSERT_EQ(sheet.corrections.size(), 3u);
  EXPECT_EQ(sheet.corrections[0].what, "nitrobenzene, liquid to gas");
  EXPECT_EQ(sheet.corrections[2].what, "H₂O, gas to liquid, 2 ×");
  // CODATA: water 285.83 − 241.826 = 44.0 kJ/mol; 0.05 for the last digits of the two tables.
  EXPECT_NEAR(kj(sheet.corrections[2].value), -88.0, 0.1);
  EXPECT_NEAR(kj(sheet.as_written), -546 + 55 - 55.8 - 88, 1.2);  // vaporisation enthalpies, each ± 0.6
}

// CRC Handbook, 95th ed., formation enthalpies: −552.56 kJ/mol; 464.55 with the water as vapour. 8: spread of
// the tables.
TEST(Ledger, TakesTheFormationRouteWhereEverySpeciesIsTabulated) {
  const Ledger liquid = ledger(kNitrobenzene),
               vapour = ledger("nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(g)");
  EXPECT_EQ(liquid.taken, "formation");
  EXPECT_NEAR(kj(find_route(liquid, kFormationRoute)->as_written), -552.56, 8);
  EXPECT_NEAR(kj(find_route(vapour, kFormationRoute)->as_written), -464.55, 8);
  EXPECT_EQ(find_route(liquid, kAverageRoute)->as_written->value(), liquid.as_written->value());
}

const char* const kUntabulated = "\"CCC(C)(Cl)CC(F)CC\"(l) -> \"CCC(C)=CC(F)CC\"(l) + HCl(g)";

Ledger with_options(const char* equation, const LedgerOptions& given) {
  LedgerOptions options = given;
  options.set = test_sheets::bond_set();
  Result<Ledger> made = make_ledger(test_sheets::reaction(equation), options);
  EXPECT_TRUE(made.ok());
  return made.ok() ? std::move(made).value() : Ledger{};
}

TEST(Ledger, FallsBackOnBondsWhereNobodyTabulatedASpecies) {
  LedgerOptions options;
  options.context = ContextUse::Never;
  const Ledger sheet = with_options("\"CCC(C)(Cl)CC(F)CC\"(g) -> \"CCC(C)=CC(F)CC\"(g) + HCl(g)", options);
  EXPECT_EQ(sheet.taken, "average");
  EXPECT_FALSE(find_route(sheet, kFormationRoute)->as_written.has_value());
  EXPECT_FALSE(find_route(sheet, kFormationRoute)->why_not.empty());
}

TEST(Ledger, EstimatesInContextWhatNobodyTabulatedAndSaysWhich) {
  const Ledger sheet = ledger(kUntabulated);
  EXPECT_EQ(sheet.taken, "formation");
  EXPECT_EQ(find_route(sheet, kFormationRoute)->estimated, (std::vector<std::size_t>{0, 1}));
  EXPECT_TRUE(any_contains(sheet.notes, "estimated from bonds in context"));
  EXPECT_TRUE(sheet.as_written.has_value());  // the average route with estimated vaporisation enthalpies
}

TEST(Ledger, LetsCorrelatedErrorsOfTheEstimateCancel) {
  LedgerOptions options;
  options.context = ContextUse::Always;
  const Ledger sheet = with_options(kUntabulated, options);
  const Route* context = find_route(sheet, kContextRoute);
  ASSERT_TRUE(context != nullptr && context->gas_298.has_value());
  // Two molecules that share most of their bonds are known better together than each alone.
  const Ledger one =
      with_options("\"CCC(C)(Cl)CC(F)CC\"(g) + 11.5 O2(g) -> 8 CO2(g) + 7 H2O(g) + HCl(g) + HF(g)", options);
  EXPECT_LT(context->gas_298->u95(), 1.5 * find_route(one, kContextRoute)->gas_298->u95());
  const Ledger nothing = with_options("\"CCC(C)(Cl)CC(F)CC\"(l) -> \"CCC(C)(Cl)CC(F)CC\"(l)", options);
  EXPECT_EQ(find_route(nothing, kContextRoute)->as_written->value(), 0);
  EXPECT_EQ(find_route(nothing, kContextRoute)->as_written->u95(), 0);
}

// JANAF 1998: ΔrH of CO + ½ O2 -> CO2 is −282.98 at 298.15 K and −282.36 kJ/mol at 1000 K, both sides at T.
TEST(Ledger, BringsBothSidesToTheirTemperatures) {
  LedgerOptions options;
  options.reactants_at = options.products_at = 1000.0;
  const Ledger sheet = with_options("CO(g) + 0.5 O2(g) -> CO2(g)", options);
  ASSERT_EQ(sheet.to_temperature.size(), 3u);
  EXPECT_NEAR(kj(sheet.as_run), -282.36, 0.3);  // 0.3: polynomials against the tables, three species
  double sum = find_route(sheet, sheet.taken)->as_written->value();
  for (const Correction& correction : sheet.to_temperature) sum += correction.value->value();
  EXPECT_NEAR(sum, sheet.as_run->value(), 1e-6);
  options.products_at.reset();
  EXPECT_NE(kj(with_options("CO(g) + 0.5 O2(g) -> CO2(g)", options).as_run), kj(sheet.as_run));
}

TEST(Ledger, PutsTheTwoBondsOfANitroGroupOnOneLine) {
  const Ledger sheet = ledger(kNitrobenzene);
  const BondLine* nitro = find_line(sheet.rows[0], "N–O and N=O of nitro");
  ASSERT_NE(nitro, nullptr);
  EXPECT_EQ(nitro->count_text, "1 + 1");
  EXPECT_EQ(nitro->price_text, "201, 607");
  EXPECT_DOUBLE_EQ(nitro->per_mole / 1000, 808);
  const Ledger two = ledger("\"Cc1c(cccc1[N+](=O)[O-])[N+](=O)[O-]\"(g) -> \"Cc1c(cccc1N(=O)=O)N(=O)=O\"(g)");
  EXPECT_EQ(find_line(two.rows[0], "N–O and N=O of nitro")->count_text, "2 + 2");
  EXPECT_EQ(two.gas_298->value(), 0);  // two spellings of one structure
}

TEST(Ledger, SharesOneLineBetweenRingAndChainWhereTheSetHasNoAromaticValue) {
  const Ledger kekule = ledger("toluene(g) -> toluene(g)"),
               aromatic = ledger("toluene(g) -> toluene(g)", "", "atkins");
  ASSERT_NE(find_line(kekule.rows[0], "C–C"), nullptr);
  EXPECT_EQ(find_line(kekule.rows[0], "C–C")->count, 4);
  EXPECT_EQ(find_line(kekule.rows[0], "C=C")->count, 3);
  ASSERT_NE(find_line(aromatic.rows[0], "C–C in aromatic ring"), nullptr);
  EXPECT_EQ(find_line(aromatic.rows[0], "C–C in aromatic ring")->count, 6);
  EXPECT_EQ(find_line(aromatic.rows[0], "C–C")->count, 1);
}

TEST(Ledger, GivesNoFigureForAnUnbalancedEquation) {
  const Result<Ledger> sheet = try_ledger("CH4 + O2 -> CO2 + H2O");
  ASSERT_FALSE(sheet.ok());
  EXPECT_EQ(sheet.error().code, "ledger.not_balanced");
  EXPECT_NE(sheet.error().hint.find("CH4 + 2 O2 -> CO2 + 2 H2O"), std::string::npos) << sheet.error().hint;
  const Result<Ledger> several = try_ledger("CH4 + O2 -> CO + CO2 + H2O");
  ASSERT_FALSE(several.ok());
  EXPECT_NE(several.error().hint.find("independent ways"), std::string::npos);
}

TEST(Ledger, NamesAMissingBondAndTheSetThatHasIt) {
  const Ledger sheet = ledger("\"CB(C)C\"(g) + 3 H2(g) -> \"B\"(g) + 3 methane(g)");
  EXPECT_FALSE(sheet.gas_298.has_value());
  EXPECT_EQ(sheet.rows[0].route, RowRoute::Missing);
  ASSERT_EQ(sheet.rows[0].missing.size(), 1u);
  EXPECT_NE(sheet.rows[0].remark.find("C–B"), std::string::npos) << sheet.rows[0].remark;
  EXPECT_NE(sheet.rows[0].remark.find("huheey"), std::string::npos) << sheet.rows[0].remark;
  EXPECT_EQ(find_route(sheet, kAverageRoute)->why_not, sheet.rows[0].remark);
  EXPECT_TRUE(ledger("\"CB(C)C\"(g) + 3 H2(g) -> \"B\"(g) + 3 methane(g)", "", "huheey").gas_298.has_value());
}

TEST(Ledger, ReachesGraphiteAndSulfurThroughTheirAtoms) {
  const Ledger coal = ledger("graphite(s) + O2(g) -> CO2(g)"),
               sulfur = ledger("sulfur(s) + O2(g) -> SO2(g)", "", "huheey");
  EXPECT_EQ(coal.rows[0].route, RowRoute::AtomsFromElement);
  // ATcT 1.112: carbon atom 716.87; CODATA: sulfur atom 277.17 kJ/mol.
  EXPECT_NEAR(kj(coal.rows[0].per_mole), 716.9, 0.3);
  EXPECT_FALSE(coal.rows[0].remark.empty());
  EXPECT_EQ(sulfur.rows[0].route, RowRoute::AtomsFromElement);
  // CODATA: −393.51 and −296.81 kJ/mol.
  EXPECT_NEAR(kj(find_route(coal, kFormationRoute)->as_written), -393.51, 0.3);
  EXPECT_NEAR(kj(find_route(sulfur, kFormationRoute)->as_written), -296.81, 0.3);
}

TEST(Ledger, TellsWhatATableSaysOfEachSpecies) {
  const Ledger sheet = ledger(kNitrobenzene);
  for (const LedgerRow& row : sheet.rows) {
    ASSERT_TRUE(row.table.has_value());
    EXPECT_FALSE(row.table_source.empty());
  }
  // ATcT 1.112: two O–H of water from atomisation 927.0 kJ/mol.
  EXPECT_NEAR(kj(sheet.rows[3].table), 927.0, 0.3);
}

TEST(Ledger, LocatesADisagreementAtTheSpeciesThatCausesIt) {
  const Ledger sheet = ledger("cyclopropane(g) + H2(g) -> propane(g)");
  const auto note = std::find_if(sheet.notes.begin(), sheet.notes.end(), [](const std::string& text) {
    return text.find("apart, beyond") != std::string::npos;
  });
  ASSERT_NE(note, sheet.notes.end());
  EXPECT_NE(note->find("cyclopropane"), std::string::npos) << *note;
  EXPECT_NE(note->find("strain"), std::string::npos) << *note;
}

TEST(Ledger, SaysWhichPhasesNobodyWrote) {
  EXPECT_TRUE(any_contains(ledger("methane + 2 O2 -> CO2 + 2 H2O").notes, "No phase is written"));
  EXPECT_FALSE(
      any_contains(ledger("methane(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)").notes, "No phase is written"));
}

TEST(Ledger, SaysWhatTheIntervalOfTheAverageSetCovers) {
  const std::string remark(estimate::BondSet::spread_remark());
  EXPECT_TRUE(any_contains(ledger("methane(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)").notes, remark));
}

TEST(Ledger, SaysWhenAllBondsCancelThatTheyTellNothing) {
  // Transesterification: as many bonds of each kind on both sides.
  const Ledger even = ledger("methyl acetate(l) + ethanol(l) -> ethyl acetate(l) + methanol(l)");
  EXPECT_NEAR(kj(even.gas_298), 0, 1e-9);
  EXPECT_TRUE(any_contains(even.notes, "Every bond broken is formed again"));
  EXPECT_FALSE(any_contains(ledger("methane(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)").notes,
                            "Every bond broken is formed again"));
}

TEST(Ledger, LetsSharedBondsCancelInTheInterval) {
  // Only C–C, H–H and C–H differ between the sides; five C–H and the ring of toluene do not widen the
  // interval.
  const Ledger plain = ledger("ethane(g) + H2(g) -> 2 methane(g)"),
               with_ring = ledger("toluene(g) + H2(g) -> benzene(g) + methane(g)");
  EXPECT_DOUBLE_EQ(plain.gas_298->u95(), with_ring.gas_298->u95());
}

TEST(Ledger, StatesFiguresPerMoleAndPerKilogram) {
  const Ledger sheet = ledger(kNitrobenzene, "H2");
  EXPECT_EQ(sheet.basis.kind, Basis::Kind::MoleOf);
  EXPECT_EQ(sheet.basis.unit, "kJ/mol");
  EXPECT_DOUBLE_EQ(on_basis(*sheet.gas_298, sheet.basis).value() / 1000, -182);
  const Ledger mass = ledger(kNitrobenzene, "kg nitrobenzene");
  // Nitrobenzene 123.11 g/mol (IUPAC 2021 masses); 0.02 % for their last digit.
  EXPECT_NEAR(on_basis(*mass.gas_298, mass.basis).value() / 1000, -546 / 0.12311, 1);
  EXPECT_EQ(ledger(kNitrobenzene, "kg reactants").basis.text, "per kg of all reactants");
  const Result<Ledger> unknown = try_ledger(kNitrobenzene, "toluene");
  ASSERT_FALSE(unknown.ok());
  EXPECT_EQ(unknown.error().code, "ledger.basis_unknown");
  EXPECT_NE(unknown.error().hint.find("nitrobenzene"), std::string::npos);
}

TEST(Ledger, ActsOnATypedBondValueAndSaysSo) {
  Result<estimate::BondSet> set = estimate::BondSet::published("");
  ASSERT_TRUE(set.ok());
  estimate::BondValue typed;
  typed.type = molecule::make_bond_type(6, 17, molecule::Order::Single);
  typed.value = 350e3;
  typed.u95 = 3e3;
  typed.source = "own measurement";
  set->lay_over(typed);
  LedgerOptions options;
  options.set = std::make_shared<const estimate::BondSet>(std::move(set).value());
  const Result<Ledger> sheet =
      make_ledger(test_sheets::reaction("methane(g) + Cl2(g) -> chloromethane(g) + HCl(g)"), options);
  ASSERT_TRUE(sheet.ok());
  // Zumdahl: −114 with C–Cl at 339; 11 kJ/mol more bond makes −125.
  EXPECT_DOUBLE_EQ(kj(sheet->gas_298), -125);
  const BondLine* line = find_line(sheet->rows[2], "C–Cl");
  ASSERT_NE(line, nullptr);
  EXPECT_NE(line->remark.find("339"), std::string::npos) << line->remark;
  EXPECT_TRUE(any_contains(sheet->notes, "Typed bond values"));
}

TEST(Ledger, PinsARouteAndSaysSo) {
  LedgerOptions options;
  options.set = test_sheets::bond_set();
  options.pinned_route = "average";
  const Result<Ledger> sheet = make_ledger(test_sheets::reaction(kNitrobenzene), options);
  ASSERT_TRUE(sheet.ok());
  EXPECT_EQ(sheet->taken, "average");
  EXPECT_TRUE(any_contains(sheet->notes, "pinned"));
  options.pinned_route = "best guess";
  const Result<Ledger> refused = make_ledger(test_sheets::reaction(kNitrobenzene), options);
  ASSERT_FALSE(refused.ok());
  EXPECT_EQ(refused.error().code, "ledger.route_unknown");
}

TEST(Ledger, WorkingHoldsTheFiguresPutIn) {
  const Ledger sheet = ledger(kNitrobenzene);
  EXPECT_TRUE(any_contains(sheet.rows[0].working, "C–H  5 × 413 = 2\u2009065"));
  EXPECT_TRUE(any_contains(sheet.rows[0].working, "1 × 201 + 1 × 607 = 808"));
  EXPECT_TRUE(any_contains(sheet.rows[3].working, "2 × 934 = 1\u2009868 kJ formed"));
  EXPECT_TRUE(any_contains(find_route(sheet, kFormationRoute)->working, "nitrobenzene(l)"));
}

}  // namespace
}  // namespace heatledger::balance
