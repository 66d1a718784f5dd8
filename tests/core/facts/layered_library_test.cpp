#include "core/facts/layered_library.hpp"

#include <gtest/gtest.h>

#include "core/facts/resolve.hpp"

namespace heatledger::facts {
namespace {

SiteRecord record(std::string name) {
  SiteRecord r;
  r.name = std::move(name);
  return r;
}

TEST(LayeredLibrary, LaysAFigureOverThePublishedOneAndKeepsItInSight) {
  SiteRecord own = record("acetone");
  own.figures.push_back({FigureKind::HeatCapacityLiquid, 128.0, 1.5, "site table, measured 2026", ""});
  const Library& base = Library::embedded();
  const LayeredLibrary layered(base, {own}, "the site table goes before published tables");
  const Compound* acetone = layered.find_name("2-propanone");
  ASSERT_NE(acetone, nullptr);
  EXPECT_EQ(acetone->liquid.heat_capacity->value, 128.0);
  EXPECT_EQ(acetone->liquid.heat_capacity->source, "site table, measured 2026");
  const Compound* published = base.find_name("acetone");
  ASSERT_EQ(acetone->liquid.heat_capacity->rivals.size(), 1u);
  EXPECT_EQ(acetone->liquid.heat_capacity->rivals[0].value, published->liquid.heat_capacity->value);
  EXPECT_EQ(acetone->liquid.heat_capacity->why_taken, "the site table goes before published tables");
  EXPECT_EQ(layered.covered(*acetone), published);
  EXPECT_EQ(acetone->gas.formation_enthalpy->value, published->gas.formation_enthalpy->value);
  EXPECT_NE(acetone->id, published->id);
  EXPECT_EQ(layered.find_name("ethanol"), base.find_name("ethanol"));
  EXPECT_EQ(layered.covered(*layered.find_name("ethanol")), nullptr);
}

TEST(LayeredLibrary, AddsCompoundsOfItsOwn) {
  SiteRecord own = record("intermediate B7");
  own.formula = "C9H11NO2";
  own.smiles = "CCOC(=O)c1ccc(N)cc1";
  own.synonyms = {"B7"};
  const LayeredLibrary layered(Library::embedded(), {own}, "site table");
  const Compound* found = layered.find_name("b7");
  ASSERT_NE(found, nullptr);
  EXPECT_EQ(found->name, "intermediate B7");
  EXPECT_EQ(layered.covered(*found), nullptr);
  EXPECT_EQ(layered.find_formula("C9H11NO2").front(), found);
  const auto resolved = resolve_species("CCOC(=O)c1ccc(N)cc1", true, layered);
  ASSERT_TRUE(resolved.ok());
  EXPECT_EQ((*resolved)->compound, found);
  const auto completions = layered.complete("intermed", 5);
  ASSERT_FALSE(completions.empty());
  EXPECT_EQ(completions[0].compound, found);
}

TEST(LayeredLibrary, SurvivesRecordsThatCannotBeRead) {
  SiteRecord bad = record("sludge");
  bad.formula = "C(((";
  bad.smiles = "C1CC(";
  const LayeredLibrary layered(Library::embedded(), {bad}, "site table");
  const auto resolved = resolve_species("sludge", false, layered);
  ASSERT_TRUE(resolved.ok());
  EXPECT_FALSE((*resolved)->composition.has_value());
  EXPECT_FALSE((*resolved)->graph.has_value());
}

}  // namespace
}  // namespace heatledger::facts
