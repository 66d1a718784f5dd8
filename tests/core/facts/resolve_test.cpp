#include "core/facts/resolve.hpp"

#include <gtest/gtest.h>

#include "core/molecule/bonds.hpp"

namespace heatledger::facts {
namespace {

std::shared_ptr<const Species> read(std::string_view text, bool quoted = false) {
  const auto species = resolve_species(text, quoted);
  EXPECT_TRUE(species.ok()) << text << ": " << (species.ok() ? "" : species.error().message);
  return species.ok() ? *species : std::make_shared<const Species>();
}

Error refuse(std::string_view text, bool quoted = false) {
  const auto species = resolve_species(text, quoted);
  EXPECT_FALSE(species.ok()) << text << " read as " << (species.ok() ? (*species)->name : "");
  return species.ok() ? Error{} : species.error();
}

TEST(Resolve, FindsNamesFormulasAndStructures) {
  for (const char* text : {"nitrobenzene", "Nitro Benzene", "98-95-3", "C6H5NO2", "O=[N+]([O-])c1ccccc1",
                           "O=N(=O)C1=CC=CC=C1"}) {
    const auto species = read(text);
    EXPECT_EQ(species->name, "nitrobenzene") << text;
    ASSERT_NE(species->compound, nullptr) << text;
    ASSERT_TRUE(species->graph.has_value()) << text;
    EXPECT_NEAR(species->molar_mass, 0.12311, 1e-5) << text;
    EXPECT_EQ(species->text, text);
  }
}

TEST(Resolve, FormulaWinsWhereTwoReadingsDiffer) {
  struct Case {
    const char* text;
    const char* name;
    const char* quoted;
  };
  for (const Case& c :
       {Case{"CO", "carbon monoxide", "methanol"}, Case{"NO", "nitric oxide", "hydroxylamine"},
        Case{"CS", "carbon monosulfide", "methyl mercaptan"}, Case{"COS", "carbonyl sulfide", ""},
        Case{"C", "graphite", "methane"}, Case{"S", "sulfur", "hydrogen sulfide"}}) {
    const auto species = read(c.text);
    EXPECT_EQ(species->name, c.name) << c.text;
    EXPECT_NE(species->note.find(std::string("\"") + c.text + "\" in quotes is"), std::string::npos)
        << species->note;
    EXPECT_NE(species->note.find(c.quoted), std::string::npos) << species->note;
    if (*c.quoted != '\0') {
      EXPECT_EQ(read(c.text, true)->name, c.quoted) << c.text;
    }
  }
  for (const char* text : {"CN", "SO", "PN"}) {  // no compound of the library, yet never silently a structure
    const auto species = read(text);
    EXPECT_NE(species->note.find("read as formula"), std::string::npos) << text;
    EXPECT_EQ(species->composition->atoms.size(), 2u) << text;
    EXPECT_EQ(species->composition->atoms.count(1), 0u) << text;
  }
}

TEST(Resolve, ReadsRepeatedSymbolsAsStructures) {
  EXPECT_EQ(read("CCO")->name, "ethanol");
  EXPECT_EQ(read("OO")->name, "hydrogen peroxide");
  EXPECT_EQ(read("ClCl")->name, "chlorine");
  EXPECT_EQ(read("CCOC(C)=O")->name, "ethyl acetate");
}

TEST(Resolve, ListsIsomersInsteadOfGuessing) {
  const Error ethanol = refuse("C2H6O");
  EXPECT_EQ(ethanol.code, "species.several_isomers");
  EXPECT_EQ(ethanol.message, "C2H6O could be ethanol or dimethyl ether.");
  EXPECT_FALSE(ethanol.hint.empty());
  EXPECT_NE(refuse("C8H18").message.find(" and 12 more"), std::string::npos) << refuse("C8H18").message;
  EXPECT_EQ(read("CH3CH2OH")->name, "ethanol");
  EXPECT_EQ(read("CH3OCH3")->name, "dimethyl ether");
  EXPECT_EQ(read("(CH3)2CO")->name, "acetone");
  EXPECT_EQ(read("C6H5CH3")->name, "toluene");
}

TEST(Resolve, TakesWhatABareFormulaMeansAndSaysWhatElseItCouldBe) {
  EXPECT_EQ(read("C6H6")->name, "benzene");
  EXPECT_NE(read("C6H6")->note.find("1,5-hexadiyne"), std::string::npos);
  EXPECT_EQ(read("HNO3")->name, "nitric acid");
  EXPECT_EQ(read("H2O")->note, "");
  EXPECT_EQ(read("CH4O")->name, "methanol");
  EXPECT_EQ(read("CaCO3")->name, "calcium carbonate");
}

TEST(Resolve, KnowsElementsInTheirReferenceState) {
  for (const char* text :
       {"H2", "O2", "N2", "Cl2", "F2", "Br2", "I2", "S", "Fe", "Na", "C", "P", "Ar", "Hg", "graphite"}) {
    const auto species = read(text);
    ASSERT_NE(species->compound, nullptr) << text;
    EXPECT_TRUE(species->compound->reference_element) << text;
  }
  EXPECT_EQ(read("O3")->name, "ozone");
}

TEST(Resolve, ReadsIonsAndWaterOfHeavyHydrogen) {
  const auto sulfate = read("SO4^2-");
  ASSERT_NE(sulfate->aqueous, nullptr);
  EXPECT_EQ(sulfate->aqueous->name, "sulfate ion");
  EXPECT_EQ(sulfate->composition->charge, -2);
  EXPECT_EQ(read("Na+")->aqueous->name, "sodium ion");
  EXPECT_EQ(read("sulfate ion")->composition->charge, -2);
  EXPECT_EQ(read("[NH4+]", true)->aqueous->name, "ammonium ion");
  EXPECT_NE(read("ammonia")->aqueous, nullptr);
  EXPECT_EQ(read("ethanol")->aqueous, nullptr);
  EXPECT_NEAR(read("D2O")->molar_mass, 0.0200276, 1e-6);  // 2 x 2.014102 + 15.999 g/mol
  EXPECT_EQ(read("D2O")->compound, nullptr);
}

TEST(Resolve, GivesSaltsNoStructureToCount) {
  for (const char* text : {"sodium chloride", "NaCl", "sodium sulfate", "caustic soda"}) {
    const auto species = read(text);
    ASSERT_NE(species->compound, nullptr) << text;
    EXPECT_FALSE(species->graph.has_value()) << text;
    EXPECT_TRUE(species->composition.has_value()) << text;
  }
  EXPECT_EQ(read("[Na+].[Cl-]", true)->name, "sodium chloride");
}

TEST(Resolve, LetsStructuresOutsideTheLibraryStandForThemselves) {
  const auto species = read("CCCC(C)C(=O)OCC1CC1", true);
  EXPECT_EQ(species->compound, nullptr);
  ASSERT_TRUE(species->graph.has_value());
  EXPECT_EQ(molecule::hill_formula(*species->composition), "C10H18O2");
  EXPECT_FALSE(species->canonical.empty());
  EXPECT_FALSE(species->bonds.empty());
}

TEST(Resolve, MarksRepeatUnits) {
  EXPECT_TRUE(read("*CC*", true)->repeat_unit);
  EXPECT_TRUE(read("*CC(*)c1ccccc1")->repeat_unit);
  EXPECT_FALSE(read("*CC", true)->repeat_unit);
  EXPECT_FALSE(read("CC", true)->repeat_unit);
  EXPECT_EQ(molecule::hill_formula(*read("*CC*", true)->composition), "C2H4");
}

TEST(Resolve, PrefersFormulaOverANameInAnotherSpelling) {
  EXPECT_EQ(read("tin")->name, "tin");
  EXPECT_EQ(read("TiN")->name, "titanium nitride");
  EXPECT_NE(read("TiN")->note.find("tin"), std::string::npos);
  for (const char* text : {"THF", "TNT", "DBU", "IPA", "MEK", "DMF", "EDC", "MTBE"})
    EXPECT_NE(read(text)->compound, nullptr) << text;
}

TEST(Resolve, HelpsWithWhatItCannotRead) {
  EXPECT_EQ(refuse("").code, "species.empty");
  EXPECT_EQ(refuse("  \t", true).code, "species.empty");
  const Error slip = refuse("nitrobenzne");
  EXPECT_EQ(slip.code, "species.unknown");
  EXPECT_NE(slip.hint.find("nitrobenzene"), std::string::npos) << slip.hint;
  EXPECT_EQ(refuse("acid").code, "species.unknown");
  EXPECT_EQ(refuse("xylene").code, "species.unknown");  // three isomers: not one of them silently
  EXPECT_EQ(refuse("C1CC(", true).code.substr(0, 7), "smiles.");
  EXPECT_EQ(refuse("C=1CC").code.substr(0, 7), "smiles.");
  EXPECT_EQ(refuse("\xff\xfe??").code, "species.unknown");
}

TEST(Resolve, ReadsEstersByAlcoholAndAcid) {
  const struct {
    const char *name, *same;
  } pairs[] = {{"methyl isobutyrate", "COC(=O)C(C)C"},
               {"Methyl 2-methylpropanoate", "COC(=O)C(C)C"},
               {"isopropyl valerate", "CCCCC(=O)OC(C)C"},
               {"tert-butyl 2-methylbutyrate", "CCC(C)C(=O)OC(C)(C)C"},
               {"2-ethylhexyl crotonate", "C/C=C/C(=O)OCC(CC)CCCC"},
               {"di-n-butyl sebacate", "CCCCOC(=O)CCCCCCCCC(=O)OCCCC"},
               {"bis(2-ethylhexyl) fumarate", "CCCCC(CC)COC(=O)/C=C/C(=O)OCC(CC)CCCC"},
               {"methyl linoleate", "CCCCC/C=C\\C/C=C\\CCCCCCCC(=O)OC"}};
  for (const auto& pair : pairs) {
    const Result<std::shared_ptr<const Species>> read = resolve_species(pair.name, false),
                                                 drawn = resolve_species(pair.same, true);
    ASSERT_TRUE(read.ok()) << pair.name << ": " << read.error().message;
    ASSERT_TRUE(drawn.ok()) << pair.same;
    EXPECT_EQ((*read)->canonical, (*drawn)->canonical) << pair.name;
  }
  // By another name than its row has: the compound itself, with its published figures.
  const Result<std::shared_ptr<const Species>> known = resolve_species("methyl n-valerate", false);
  ASSERT_TRUE(known.ok());
  ASSERT_NE((*known)->compound, nullptr);
  EXPECT_EQ((*known)->compound->name, "methyl pentanoate");
  for (const char* none :
       {"methyl", "methyl frobate", "frobyl acetate", "dimethyl acetate", "methyl adipate"})
    EXPECT_FALSE(resolve_species(none, false).ok()) << none;
}

TEST(Resolve, SaysHowAPolymerIsWritten) {
  for (const char* text : {"[CH2CH(C6H5)]n", "(C2H4)n", "-(CH2CH2)-n", "-[CH2O]n-"}) {
    const Result<std::shared_ptr<const Species>> read = resolve_species(text, false);
    ASSERT_FALSE(read.ok()) << text;
    EXPECT_EQ(read.error().code, "species.repeat_unit") << text;
    EXPECT_NE(read.error().hint.find("*CC(*)c1ccccc1"), std::string::npos);
  }
  EXPECT_TRUE(resolve_species("*CC(*)c1ccccc1", true).ok());
}

TEST(Resolve, TellsCisFromTrans) {
  EXPECT_EQ(read("C/C=C\\C", true)->name, "cis-2-butene");
  EXPECT_EQ(read("C/C=C/C", true)->name, "trans-2-butene");
  // OpenSMILES 3.9.2: a branch turns the direction of writing round.
  EXPECT_EQ(read("C(\\C)=C/C", true)->name, "trans-2-butene");
  EXPECT_EQ(read("C(/C)=C/C", true)->name, "cis-2-butene");
  // Named by the longer chain: methyl and ethyl on one side.
  EXPECT_EQ(read("CC/C(C)=C\\C", true)->name, "3-methyl-cis-2-pentene");
  EXPECT_EQ(read("OC(=O)/C=C/C(O)=O", true)->name, "fumaric acid");
  EXPECT_EQ(read("OC(=O)/C=C\\C(O)=O", true)->name, "maleic acid");
  EXPECT_EQ(read("OC(=O)/C=C\\C(O)=O", true)->note, "");
  EXPECT_EQ(read("NC(C)C(O)=O", true)->name, "DL-alanine");
}

TEST(Resolve, TellsStereoIsomersItCannotTellApart) {
  EXPECT_NE(read("CC=CC", true)->note.find("2-butene"), std::string::npos) << read("CC=CC", true)->note;
  EXPECT_EQ(read("trans-2-butene")->note, "");
}

TEST(CodedSpecies, CarryAMolarMassAndNoStructure) {
  const auto coded = make_coded_species(" Intermediate 4711 ", 0.2503);
  ASSERT_TRUE(coded.ok());
  EXPECT_EQ((*coded)->name, "Intermediate 4711");
  EXPECT_TRUE((*coded)->coded);
  EXPECT_FALSE((*coded)->composition.has_value());
  EXPECT_EQ((*coded)->molar_mass, 0.2503);
  const auto with_formula = make_coded_species("K-17", 0, "C12H14N2O3");
  ASSERT_TRUE(with_formula.ok());
  EXPECT_NEAR((*with_formula)->molar_mass, 0.234255, 1e-5);
  EXPECT_TRUE((*with_formula)->composition.has_value());
  EXPECT_EQ(make_coded_species("K-17", 0.300, "C12H14N2O3").error().code, "species.molar_mass");
  EXPECT_EQ(make_coded_species("K-17", -1).error().code, "species.molar_mass");
  EXPECT_EQ(make_coded_species("K-17", 0).error().code, "species.molar_mass");
  EXPECT_EQ(make_coded_species("", 0.1).error().code, "species.empty");
  EXPECT_EQ(make_coded_species("K-17", 0, "C12X").error().code.substr(0, 8), "formula.");
}

}  // namespace
}  // namespace heatledger::facts
