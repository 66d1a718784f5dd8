#include "core/estimate/context_model.hpp"

#include <algorithm>
#include <cmath>
#include <memory>
#include <random>

#include "core/estimate/context_fit.hpp"
#include "core/estimate/context_observations.hpp"
#include "core/estimate/context_table.hpp"
#include "tests/core/estimate/context_support.hpp"

namespace heatledger::estimate {
namespace {

const ContextModel& model() {
  return ContextModel::embedded();
}

Prediction predicted(Property property, const std::string& smiles, const ContextOptions& options = {}) {
  const ContextMolecule molecule = molecule_of(smiles);
  Result<Prediction> result = model().predict(property, molecule, options);
  EXPECT_TRUE(result.ok()) << smiles;
  return result.ok() ? *result : Prediction{};
}

/// A reaction from "coefficient, SMILES" pairs; molecules live as long as it does.
struct Equation {
  std::vector<ContextMolecule> molecules;
  std::vector<ContextTerm> terms;

  explicit Equation(const std::vector<std::pair<double, std::string>>& written) {
    for (const auto& [coefficient, smiles] : written) molecules.push_back(molecule_of(smiles));
    for (std::size_t i = 0; i < written.size(); ++i) terms.push_back({written[i].first, &molecules[i]});
  }
  Equation(const Equation&) = delete;
  Equation& operator=(const Equation&) = delete;

  Prediction predict(const ContextOptions& options = {}, Property property = Property::GasFormation) const {
    Result<Prediction> result = model().predict(property, terms, options);
    EXPECT_TRUE(result.ok());
    return result.ok() ? *result : Prediction{};
  }
};

/// The same structure with its atoms renumbered, bonds shuffled and turned round.
molecule::Graph renumbered(const molecule::Graph& graph, std::mt19937& random) {
  std::vector<std::uint32_t> place(graph.atoms.size());
  for (std::uint32_t i = 0; i < place.size(); ++i) place[i] = i;
  std::shuffle(place.begin(), place.end(), random);
  molecule::Graph out;
  out.atoms.resize(graph.atoms.size());
  for (std::size_t i = 0; i < place.size(); ++i) out.atoms[place[i]] = graph.atoms[i];
  for (molecule::Bond bond : graph.bonds) {
    bond.a = place[bond.a];
    bond.b = place[bond.b];
    if (random() % 2 == 0) {
      std::swap(bond.a, bond.b);
      if (bond.mark != molecule::BondMark::None) {
        bond.mark = bond.mark == molecule::BondMark::Up ? molecule::BondMark::Down : molecule::BondMark::Up;
      }
    }
    out.bonds.push_back(bond);
  }
  std::shuffle(out.bonds.begin(), out.bonds.end(), random);
  return out;
}

TEST(ContextModel, GivesTheSameDigitsForEveryOrderOfAtoms) {
  std::mt19937 random(20240607);  // fixed seed
  for (const char* smiles :
       {"CC(=O)Nc1ccc(O)cc1", "C/C=C\\C(C)(C)CO", "C1CC2CCC1C2", "c1ccc2cccc2cc1", "O=[N+]([O-])c1ccccc1Cl",
        "CC1(C)OOC1(C)C", "C12C3C4C1C5C2C3C45", "FC(F)(F)C(=O)OCCS"}) {
    const molecule::Graph graph = graph_of(smiles);
    const Result<ContextMolecule> written = context_molecule(graph);
    ASSERT_TRUE(written.ok()) << smiles;
    for (int turn = 0; turn < 5; ++turn) {
      const Result<ContextMolecule> other = context_molecule(renumbered(graph, random));
      ASSERT_TRUE(other.ok()) << smiles;
      EXPECT_EQ(written->constitution, other->constitution) << smiles;
      EXPECT_EQ(written->stereo, other->stereo) << smiles;
      for (const Property property :
           {Property::GasFormation, Property::Vaporisation298, Property::LiquidHeatCapacity298}) {
        const Prediction a = *model().predict(property, *written), b = *model().predict(property, *other);
        EXPECT_EQ(a.value, b.value) << smiles;
        EXPECT_EQ(a.s, b.s) << smiles;
      }
    }
  }
}

TEST(ContextModel, GivesTheSameDigitsForTwoSpellings) {
  const std::pair<const char*, const char*> pairs[] = {{"c1ccccc1C", "CC1=CC=CC=C1"},
                                                       {"C[N+](=O)[O-]", "CN(=O)=O"},
                                                       {"OCC", "[H]OC([H])([H])C"},
                                                       {"F/C=C/F", "F\\C=C\\F"},
                                                       {"c1ccc2cccc2cc1", "C1=CC=C2C=CC=C2C=C1"},
                                                       {"C[C@H](O)CC", "CC[C@@H](C)O"},
                                                       {"[C-]#[O+]", "[O+]#[C-]"}};
  for (const auto& [one, other] : pairs) {
    const Prediction a = predicted(Property::GasFormation, one), b = predicted(Property::GasFormation, other);
    EXPECT_EQ(a.value, b.value) << one;
    EXPECT_EQ(a.s, b.s) << one;
  }
}

TEST(ContextModel, CancelsWhatStandsOnBothSides) {
  for (const char* smiles : {"CCO", "COC(=O)C12C3C4C1C5C2C3C45", "CCOP(=S)(OCC)OCC"}) {
    const Equation nothing({{-1, smiles}, {1, smiles}});
    for (const Property property : {Property::GasFormation, Property::Vaporisation298,
                                    Property::GasHeatCapacity, Property::LiquidHeatCapacity298}) {
      const Prediction zero = nothing.predict({}, property);
      EXPECT_EQ(zero.value, 0) << smiles;
      EXPECT_EQ(zero.u95, 0) << smiles;
    }
  }
}

TEST(ContextModel, ReversesWithTheSignOnly) {
  const Equation forward({{-1, "CC(=O)O"}, {-1, "CCCCO"}, {1, "CCCCOC(C)=O"}, {1, "O"}});
  const Equation back({{-1, "O"}, {-1, "CCCCOC(C)=O"}, {1, "CCCCO"}, {1, "CC(=O)O"}});
  const ContextOptions estimate{.estimate_only = true};
  for (const ContextOptions& options : {ContextOptions{}, estimate}) {
    const Prediction a = forward.predict(options), b = back.predict(options);
    // Sums run in another order: equal to rounding of figures near 1e6 J/mol.
    EXPECT_NEAR(a.value, -b.value, 1e-6);
    EXPECT_NEAR(a.u95, b.u95, 1e-6);
  }
}

TEST(ContextModel, AddsAReactionSplitInTwo) {
  // CH3CHO + H2 -> C2H5OH -> C2H4 + H2O against the sum written as one.
  const Equation whole({{-1, "CC=O"}, {-1, "[H][H]"}, {1, "C=C"}, {1, "O"}});
  const Equation split({{-1, "CC=O"}, {-1, "[H][H]"}, {1, "CCO"}, {-1, "CCO"}, {1, "C=C"}, {1, "O"}});
  EXPECT_NEAR(whole.predict().value, split.predict().value, 1e-6);  // as above
  EXPECT_NEAR(whole.predict().u95, split.predict().u95, 1e-6);
}

TEST(ContextModel, GivesQuantitiesThatKeepTheirCorrelation) {
  Observations observations;
  Measurement measurement;
  measurement.terms.push_back({1, std::make_shared<const ContextMolecule>(molecule_of("CCCC(=O)OCCCl"))});
  measurement.value = -560000;
  measurement.u95 = 3000;
  ASSERT_TRUE(observations.add(measurement).ok());
  measurement.terms[0].molecule = std::make_shared<const ContextMolecule>(molecule_of("CCCC(=O)OCCO"));
  measurement.value = -720000;
  ASSERT_TRUE(observations.add(measurement).ok());
  const ContextMolecule left = molecule_of("CCO");
  const std::vector<const ContextMolecule*> leave{&left};
  const std::vector<ContextOptions> all = {{},
                                           {.leave_out = leave},
                                           {.observations = &observations},
                                           {.leave_out = leave, .observations = &observations}};
  for (const ContextOptions& options : all) {
    for (const Property property : {Property::GasFormation, Property::Vaporisation298,
                                    Property::GasHeatCapacity, Property::LiquidHeatCapacity298}) {
      const Equation reaction(
          {{-1, "CCO"}, {-1, "CCCC(=O)O"}, {1, "CCCC(=O)OCC"}, {1, "O"}, {0.5, "CCCC(=O)OCCCl"}});
      uncertainty::Quantity sum;
      for (const ContextTerm& term : reaction.terms) {
        const ContextTerm one{1, term.molecule};
        Result<uncertainty::Quantity> quantity =
            model().quantity(property, std::span<const ContextTerm>(&one, 1), options);
        ASSERT_TRUE(quantity.ok());
        EXPECT_NEAR(quantity->u95(), model().predict(property, *term.molecule, options)->u95,
                    1e-6);  // one figure, two ways
        sum.add(*quantity, term.coefficient);
      }
      const Prediction whole = reaction.predict(options, property);
      EXPECT_NEAR(sum.value(), whole.value, 1e-5);          // sums near 1e6 J/mol
      EXPECT_NEAR(sum.u95(), whole.u95, 1e-5 * whole.u95);  // differences of squares near 1e8
    }
  }
}

/// Leaving rows out by the small update against a fit that never saw them.
TEST(ContextModel, LeavesCompoundsOutExactly) {
  for (const FitKind kind : {FitKind::Formation, FitKind::Liquid}) {
    const std::vector<std::string> left = {"CC(=O)OCC", "C/C=C/C", "c1ccncc1"};
    std::vector<ContextMolecule> molecules;
    for (const std::string& smiles : left) molecules.push_back(molecule_of(smiles));
    std::vector<TrainingFigure> figures;
    for (const TrainingFigure& figure : training_figures(kind)) {
      const bool out = std::any_of(molecules.begin(), molecules.end(), [&](const ContextMolecule& m) {
        return m.constitution == training_molecule(figure.compound).constitution;
      });
      if (!out) figures.push_back(figure);
    }
    const ContextFit fit(context_settings(kind), fit_rows(kind, figures, {298.15}));
    const std::vector<const ContextMolecule*> leave{&molecules[0], &molecules[1], &molecules[2]};
    const Property property =
        kind == FitKind::Formation ? Property::GasFormation : Property::LiquidHeatCapacity298;
    const double unit = kind == FitKind::Formation ? 1000 : 1;
    for (const char* smiles : {"CC(=O)OCC", "C/C=C\\C", "c1ccncc1", "CCCOC(C)=O", "Cc1ccncc1"}) {
      const ContextMolecule asked = molecule_of(smiles);
      const Prediction downdated = *model().predict(property, asked, {.leave_out = leave});
      const Functional functional = fit.functional({{1, &asked}}, {});
      const double value = sign_of(kind) * (offset(kind, asked, 298.15) + fit.mean(functional, 0));
      // 1e-7: two ways through one linear system in double precision.
      EXPECT_NEAR(downdated.value / unit, value, 1e-7) << smiles;
      EXPECT_NEAR(downdated.s / unit, std::sqrt(fit.variance(functional)), 1e-7) << smiles;
    }
  }
}

TEST(ContextModel, WidensTheSpreadWithoutTheCompoundsOwnRow) {
  const Prediction with = predicted(Property::GasFormation, "CCOC(C)=O");
  const Prediction without = predicted(Property::GasFormation, "CCOC(C)=O", {.estimate_only = true});
  EXPECT_TRUE(with.in_table);
  EXPECT_FALSE(without.in_table);
  EXPECT_LT(with.u95, without.u95);
}

TEST(ContextModel, SaysWhenStructureAloneGivesNoFigure) {
  EXPECT_EQ(predicted(Property::GasFormation, "CCCCOCC").reading, Reading::Good);
  const Prediction cage = predicted(Property::GasFormation, "N1N2N3N1N4N2N34", {.estimate_only = true});
  EXPECT_EQ(cage.reading, Reading::None);
  EXPECT_GT(cage.unseen, 0);
}

TEST(ContextModel, NamesWhatItDoesNotCover) {
  const std::pair<const char*, const char*> cases[] = {
      {"CC[Mg]Br", "estimate.element"},    {"[CH3]", "estimate.radical"},   {"C[NH3+]", "estimate.charged"},
      {"[Na+].[Cl-]", "estimate.element"}, {"CCO.O", "estimate.fragments"}, {"[Fe]", "estimate.element"},
      {"*CC", "estimate.repeat_unit"},     {"*=C*", "estimate.repeat_unit"}};
  for (const auto& [smiles, code] : cases) {
    const Result<ContextMolecule> refused = context_molecule(graph_of(smiles));
    ASSERT_FALSE(refused.ok()) << smiles;
    EXPECT_EQ(refused.error().code, code) << smiles;
    EXPECT_FALSE(refused.error().message.empty());
    EXPECT_FALSE(refused.error().hint.empty());
  }
  EXPECT_EQ(context_molecule(molecule::Graph{}).error().code, "estimate.empty");
}

TEST(ContextModel, TakesHydrogenInAllSpellings) {
  EXPECT_EQ(molecule_of("[H][H]").features.size(), molecule_of("[HH]").features.size());
  EXPECT_EQ(predicted(Property::GasFormation, "[H][H]").value,
            predicted(Property::GasFormation, "[HH]").value);
}

TEST(ContextModel, FollowsTheGasHeatCapacityBetweenItsNodes) {
  const ContextMolecule ethanol = molecule_of("CCO");
  double before = 0;
  for (double T = 280; T <= 1000; T += 20) {
    const Result<Prediction> at = model().predict(Property::GasHeatCapacity, ethanol, {.temperature = T});
    ASSERT_TRUE(at.ok());
    EXPECT_GT(at->value, before) << T;  // no bump: ethanol's vibrations fill up one after the other
    before = at->value;
  }
  // Ethanol at 298.15 K and 1000 K: 65.6 and 142.8 J/(mol K). TRC, Thermodynamics of Organic Compounds in the
  // Gas State (1994); the row's ± and the rounding of the source allow 2 %.
  EXPECT_NEAR(model().predict(Property::GasHeatCapacity, ethanol)->value, 65.6, 1.3);
  EXPECT_NEAR(before, 142.8, 2.9);
  EXPECT_EQ(model().predict(Property::GasHeatCapacity, ethanol, {.temperature = 1500}).error().code,
            "estimate.temperature");
  EXPECT_EQ(model().predict(Property::GasHeatCapacity, ethanol, {.temperature = 200}).error().code,
            "estimate.temperature");
}

TEST(ContextModel, KeepsTheGasHeatCapacityBelowItsClassicalLimit) {
  for (const char* smiles : {"FC(F)(F)F", "ClC(Cl)(Cl)C(Cl)(Cl)Cl", "BrC(Br)(Br)Br"}) {
    const ContextMolecule molecule = molecule_of(smiles);
    const double limit = (3 * molecule.atoms - 2) * 8.314462618;
    EXPECT_LE(model()
                  .predict(Property::GasHeatCapacity, molecule, {.temperature = 1000, .estimate_only = true})
                  ->value,
              limit)
        << smiles;
  }
}

Measurement measured(const std::vector<std::pair<double, std::string>>& terms, double value, double u95) {
  Measurement out;
  for (const auto& [coefficient, smiles] : terms) {
    out.terms.push_back({coefficient, std::make_shared<const ContextMolecule>(molecule_of(smiles))});
  }
  out.value = value;
  out.u95 = u95;
  return out;
}

TEST(ContextObservations, SharpenRelatedEstimatesAndLeaveNoTrace) {
  const std::string target = "COC(=O)C12C3C4C1C5C2C3C45", relative = "CCOC(=O)C12C3C4C1C5C2C3C45";
  const Prediction before = predicted(Property::GasFormation, relative);
  Observations observations;
  ASSERT_TRUE(observations.add(measured({{1, target}}, 250000, 2000)).ok());
  const Prediction after = predicted(Property::GasFormation, relative, {.observations = &observations});
  EXPECT_LT(after.s, 0.9 * before.s);
  const Prediction itself = predicted(Property::GasFormation, target, {.observations = &observations});
  EXPECT_LT(itself.u95, 2.6 * 1000 * 1.01);  // not wider than the measurement: s <= u95 / 2, then times 2.6
  EXPECT_NEAR(itself.value, 250000, 2000);
  // A second one comes and goes: the digits of the first state are back.
  ASSERT_TRUE(observations.add(measured({{-1, "CCO"}, {1, "CCOC(C)=O"}}, -200000, 3000)).ok());
  EXPECT_NE(predicted(Property::GasFormation, relative, {.observations = &observations}).value, after.value);
  observations.remove(1);
  EXPECT_EQ(predicted(Property::GasFormation, relative, {.observations = &observations}).value, after.value);
  EXPECT_EQ(predicted(Property::GasFormation, relative, {.observations = &observations}).s, after.s);
  observations.remove(0);
  EXPECT_EQ(predicted(Property::GasFormation, relative, {.observations = &observations}).value, before.value);
  EXPECT_EQ(predicted(Property::GasFormation, relative, {.observations = &observations}).s, before.s);
}

/// A measurement of an untabulated molecule against a fit with that row added.
TEST(ContextObservations, EqualOneMoreRowOfTheTable) {
  const ContextMolecule extra = molecule_of("CCCCCC(=O)OCCCl");
  const double value = -610.0, u95 = 4.0;
  std::vector<FitRow> rows = fit_rows(FitKind::Formation, training_figures(FitKind::Formation), {298.15});
  const ContextSettings& settings = context_settings(FitKind::Formation);
  FitRow row;
  row.molecule = &extra;
  row.own = own_variance(settings, extra.measures);
  row.noise = row.own + u95 * u95 / 4;
  row.y.push_back(-value - offset(FitKind::Formation, extra, 298.15));
  rows.push_back(row);
  const ContextFit fit(settings, rows);
  Observations observations;
  ASSERT_TRUE(observations.add(measured({{1, "CCCCCC(=O)OCCCl"}}, value * 1000, u95 * 1000)).ok());
  for (const char* smiles : {"CCCCCC(=O)OCCCl", "CC(=O)OCCCl", "CCCCCC(=O)OCC"}) {
    const ContextMolecule asked = molecule_of(smiles);
    const Prediction sharpened =
        *model().predict(Property::GasFormation, asked, {.observations = &observations});
    const Functional functional = fit.functional({{1, &asked}}, {});
    // 1e-7 kJ/mol: two ways through one linear system.
    EXPECT_NEAR(sharpened.value / 1000,
                -(offset(FitKind::Formation, asked, 298.15) + fit.mean(functional, 0)), 1e-7)
        << smiles;
    EXPECT_NEAR(sharpened.s / 1000, std::sqrt(fit.variance(functional)), 1e-7) << smiles;
  }
}

TEST(ContextObservations, RefuseWhatIsNoMeasurement) {
  Observations observations;
  EXPECT_EQ(observations.add(measured({}, 1, 1)).error().code, "estimate.measurement");
  EXPECT_EQ(observations.add(measured({{1, "CCO"}}, 1, 0)).error().code, "estimate.measurement");
  EXPECT_EQ(observations.add(measured({{1, "CCO"}}, std::nan(""), 1)).error().code, "estimate.measurement");
  EXPECT_TRUE(observations.list().empty());
}

TEST(ContextRepeatUnit, IsTheIncrementBetweenLongChains) {
  const ContextMolecule unit = molecule_of("*CC(*)c1ccccc1");
  std::string chains[2] = {"", ""};
  for (int k = 0; k < 2; ++k) {
    for (int i = 0; i < 12 + k; ++i) chains[k] += "CC(c1ccccc1)";
  }
  const Equation difference({{-1, chains[0]}, {1, chains[1]}});
  EXPECT_NEAR(model().predict(Property::GasFormation, unit)->value, difference.predict().value,
              1e-4);  // sums near 1e7 J/mol
  EXPECT_TRUE(unit.repeat_unit);
}

TEST(ContextRepeatUnit, IsTheSameWhereverTheChainIsCut) {
  const Prediction a = predicted(Property::GasFormation, "*CC(*)C"),
                   b = predicted(Property::GasFormation, "*C(C)C*");
  EXPECT_EQ(a.value, b.value);
  EXPECT_EQ(a.u95, b.u95);
}

TEST(ContextRepeatUnit, GivesEnthalpiesOfPolymerisation) {
  // -93, -84 and -73 kJ/mol for liquid monomer to condensed polymer. Source: G. Odian, Principles of
  // Polymerization, 4th ed. (2004), Table 3-14. Gas to gas differs by the unequal cohesion of monomer and
  // unit, up to some 8 kJ/mol.
  const std::tuple<const char*, const char*, double> cases[] = {
      {"C=C", "*CC*", -93}, {"C=CC", "*CC(*)C", -84}, {"C=Cc1ccccc1", "*CC(*)c1ccccc1", -73}};
  for (const auto& [monomer, unit, enthalpy] : cases) {
    const Equation polymerisation({{-1, monomer}, {1, unit}});
    EXPECT_NEAR(polymerisation.predict().value / 1000, enthalpy, 8) << unit;
  }
}

}  // namespace
}  // namespace heatledger::estimate
