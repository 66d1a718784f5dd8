#include "core/molecule/equation.hpp"

#include <gtest/gtest.h>

#include "tests/core/support/test_files.hpp"

namespace heatledger::molecule {
namespace {

std::string shown(const Term& term) {
  std::string text = std::to_string(term.coefficient.numerator);
  if (term.coefficient.denominator != 1) text += "/" + std::to_string(term.coefficient.denominator);
  text += term.quoted ? " '" + term.species + "'" : " " + term.species;
  if (term.phase != Phase::Unstated) text += "(" + std::string(phase_text(term.phase)) + ")";
  return text;
}

/// The equation as it was understood, every coefficient written.
std::string shown(std::string_view text) {
  const Result<EquationText> equation = parse_equation(text);
  if (!equation) return equation.error().code + " " + equation.error().where;
  std::string result;
  for (const Term& term : equation->reactants) result += (result.empty() ? "" : " + ") + shown(term);
  result += equation->reversible ? " <=> " : " -> ";
  for (std::size_t i = 0; i < equation->products.size(); ++i)
    result += (i > 0 ? " + " : "") + shown(equation->products[i]);
  return result;
}

TEST(Equation, ReadsNamesFormulasAndSmiles) {
  EXPECT_EQ(shown("nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)"),
            "1 nitrobenzene(l) + 3 H2 -> 1 aniline(l) + 2 H2O(l)");
  EXPECT_EQ(shown("\"CC(=O)O\"(l) + \"CCO\" (l) -> \"CCOC(C)=O\"(l) + water(l)"),
            "1 'CC(=O)O'(l) + 1 'CCO'(l) -> 1 'CCOC(C)=O'(l) + 1 water(l)");
  EXPECT_EQ(shown("\u201CCCO\u201D + O2 -> CH3CHO + H2O"), "1 'CCO' + 1 O2 -> 1 CH3CHO + 1 H2O");
  EXPECT_EQ(shown("C=C + [H][H] -> CC"), "1 C=C + 1 [H][H] -> 1 CC");
  EXPECT_EQ(shown("ethyl acetate (l) + water -> ethanol + acetic acid"),
            "1 ethyl acetate(l) + 1 water -> 1 ethanol + 1 acetic acid");
}

TEST(Equation, ReadsEveryArrow) {
  for (const char* arrow : {"->", "-->", "--->", "=>", "==>", "=", "\u2192", "\u27F6", "\u2212>"}) {
    EXPECT_EQ(shown(std::string("A ") + arrow + " B"), "1 A -> 1 B") << arrow;
  }
  for (const char* arrow : {"<=>", "\u21CC", "\u21C4"})
    EXPECT_EQ(shown(std::string("A ") + arrow + " B"), "1 A <=> 1 B") << arrow;
  for (const char* text : {"A->B", "A\u2192B", "A=>B"}) EXPECT_EQ(shown(text), "1 A -> 1 B") << text;
  EXPECT_EQ(shown("A<=>B"), "1 A <=> 1 B");
}

TEST(Equation, ReadsCoefficientsInEverySpelling) {
  EXPECT_EQ(shown("3 H2 -> 3H2"), "3 H2 -> 3 H2");
  EXPECT_EQ(shown("2NaOH -> 2Na(OH)"), "2 NaOH -> 2 Na(OH)");
  EXPECT_EQ(shown("0.5 O2 -> .5 O2"), "1/2 O2 -> 1/2 O2");
  EXPECT_EQ(shown("1/2 O2 -> 1/2O2"), "1/2 O2 -> 1/2 O2");
  EXPECT_EQ(shown("\u00BD O2 -> \u00BDO2"), "1/2 O2 -> 1/2 O2");
  EXPECT_EQ(shown("1 1/2 O2 -> 1\u00BD O2"), "3/2 O2 -> 3/2 O2");
  EXPECT_EQ(shown("2\"CCO\" -> 2 \"CCO\""), "2 'CCO' -> 2 'CCO'");
  EXPECT_EQ(shown("2(CH3)2CO(l) -> 12.5 O2(g)"), "2 (CH3)2CO(l) -> 25/2 O2(g)");
}

TEST(Equation, LeavesNumbersInNames) {
  EXPECT_EQ(shown("2-propanol -> propene + H2O"), "1 2-propanol -> 1 propene + 1 H2O");
  EXPECT_EQ(shown("2 2-propanol -> 2 propene + 2 H2O"), "2 2-propanol -> 2 propene + 2 H2O");
  EXPECT_EQ(shown("1,4-dioxane + 5 O2 -> 4 CO2 + 4 H2O"), "1 1,4-dioxane + 5 O2 -> 4 CO2 + 4 H2O");
  EXPECT_EQ(shown("1 1,4-dioxane -> 64-17-5"), "1 1,4-dioxane -> 1 64-17-5");
  EXPECT_EQ(shown("9H-fluorene -> 4H-pyran"), "1 9H-fluorene -> 1 4H-pyran");
  EXPECT_EQ(shown("(+)-limonene -> DL-(+)-x"), "1 (+)-limonene -> 1 DL-(+)-x");
}

TEST(Equation, TellsChargesFromSeparators) {
  EXPECT_EQ(shown("Na+ + Cl- -> NaCl"), "1 Na+ + 1 Cl- -> 1 NaCl");
  EXPECT_EQ(shown("H+ + OH- -> H2O"), "1 H+ + 1 OH- -> 1 H2O");
  EXPECT_EQ(shown("H++OH-->H2O"), "1 H+ + 1 OH- -> 1 H2O");
  EXPECT_EQ(shown("Fe3+(aq) + 3 OH-(aq) -> Fe(OH)3(s)"), "1 Fe3+(aq) + 3 OH-(aq) -> 1 Fe(OH)3(s)");
  EXPECT_EQ(shown("Fe3+ (aq) + e -> Fe+2 (aq)"), "1 Fe3+(aq) + 1 e -> 1 Fe+2(aq)");
  EXPECT_EQ(shown("Fe+3 + 3 OH- -> Fe(OH)3"), "1 Fe+3 + 3 OH- -> 1 Fe(OH)3");
  EXPECT_EQ(shown("Fe+++ + Ce+++ -> Fe++ + Ce++++"), "1 Fe+++ + 1 Ce+++ -> 1 Fe++ + 1 Ce++++");
  EXPECT_EQ(shown("H2+O2 -> H2O"), "1 H2 + 1 O2 -> 1 H2O");
  EXPECT_EQ(shown("2H2+O2->2H2O"), "2 H2 + 1 O2 -> 2 H2O");
  EXPECT_EQ(shown("C3H6+3H2O -> x"), "1 C3H6 + 3 H2O -> 1 x");
  EXPECT_EQ(shown("H2+ O2 -> H2O"), "1 H2 + 1 O2 -> 1 H2O");
  EXPECT_EQ(shown("H2 +O2 -> H2O"), "1 H2 + 1 O2 -> 1 H2O");
  EXPECT_EQ(shown("H2+ (CH3)2CO -> x"), "1 H2 + 1 (CH3)2CO -> 1 x");
  EXPECT_EQ(shown("Ag+ + Cl- -> AgCl(s)"), "1 Ag+ + 1 Cl- -> 1 AgCl(s)");
  EXPECT_EQ(shown("[Na+].[Cl-] -> Na+"), "1 [Na+].[Cl-] -> 1 Na+");
}

TEST(Equation, ReadsPhasesAndStrengths) {
  EXPECT_EQ(shown("A(gas) + B (liq) -> C(solid) + D ( aq ) + E(diss)"),
            "1 A(g) + 1 B(l) -> 1 C(s) + 1 D(aq) + 1 E(diss)");
  EXPECT_EQ(shown("iron(III) oxide(s) + benzo(a)pyrene -> Ni(CO)4(g)"),
            "1 iron(III) oxide(s) + 1 benzo(a)pyrene -> 1 Ni(CO)4(g)");
  const Result<EquationText> equation =
      parse_equation("H2SO4(aq, 96 wt%) + NaOH(aq, r=5) + KOH(aq, 2 mol/kg) + HCl(aq) -> X(aq, 20wt%)");
  ASSERT_TRUE(equation.ok()) << equation.error().message;
  ASSERT_EQ(equation->reactants.size(), 4u);
  EXPECT_EQ(equation->reactants[0].strength->kind, Strength::Kind::MassFraction);
  EXPECT_DOUBLE_EQ(equation->reactants[0].strength->value, 0.96);
  EXPECT_EQ(equation->reactants[1].strength->kind, Strength::Kind::WaterRatio);
  EXPECT_EQ(equation->reactants[1].strength->value, 5);
  EXPECT_EQ(equation->reactants[2].strength->kind, Strength::Kind::Molality);
  EXPECT_EQ(equation->reactants[2].strength->value, 2);
  EXPECT_FALSE(equation->reactants[3].strength.has_value());
  EXPECT_DOUBLE_EQ(equation->products[0].strength->value, 0.2);
}

TEST(Equation, TellsWhereEachTermStands) {
  const std::string text = "  2 H2(g)  +\"[H][H]\"(g) -> water";
  const Result<EquationText> equation = parse_equation(text);
  ASSERT_TRUE(equation.ok());
  const Term& first = equation->reactants[0];
  EXPECT_EQ(text.substr(first.offset, first.length), "2 H2(g)");
  EXPECT_EQ(first.species_offset, text.find("H2"));
  EXPECT_EQ(first.coefficient.typed, "2");
  const Term& second = equation->reactants[1];
  EXPECT_EQ(text.substr(second.offset, second.length), "\"[H][H]\"(g)");
  EXPECT_EQ(second.species_offset, text.find("[H]"));
  EXPECT_EQ(equation->products[0].species_offset, text.find("water"));
}

TEST(Equation, RefusesBadTextWithCodeAndOffset) {
  const std::string folder = "tests/data/equation/bad";
  const std::vector<std::string> names = test::list_source_folder(folder);
  ASSERT_GE(names.size(), 30u);
  for (const std::string& name : names) {
    const test::BadCase bad = test::read_bad_case(folder + "/" + name);
    const Result<EquationText> result = parse_equation(bad.text);
    ASSERT_FALSE(result.ok()) << name;
    EXPECT_EQ(result.error().code, bad.code) << name;
    EXPECT_EQ(result.error().where, "offset " + bad.offset) << name;
    EXPECT_FALSE(result.error().message.empty()) << name;
    EXPECT_FALSE(result.error().hint.empty()) << name;
  }
}

TEST(Equation, ReadsLongTextInLinearTime) {
  // A quadratic reader would need minutes for these.
  std::string many = "A";
  for (int i = 0; i < 100000; ++i) many += " + 2 B(g)";
  EXPECT_EQ(parse_equation(many + " -> C")->reactants.size(), 100001u);
  for (const std::string& piece :
       {std::string("+"), std::string("("), std::string("+("), std::string("- "), std::string("-"),
        std::string("= "), std::string("+1"), std::string("\""), std::string("+ "), std::string("x+(")}) {
    std::string text;
    while (text.size() < 300000) text += piece;
    EXPECT_FALSE(parse_equation(text).ok()) << piece;
  }
}

}  // namespace
}  // namespace heatledger::molecule
