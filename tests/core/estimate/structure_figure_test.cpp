#include "core/estimate/structure_figure.hpp"

#include <gtest/gtest.h>

#include <string>

#include "core/molecule/smiles.hpp"

namespace heatledger::estimate {
namespace {

molecule::Graph graph_of(const std::string& smiles) {
  Result<molecule::Graph> graph = molecule::parse_smiles(smiles);
  EXPECT_TRUE(graph.ok()) << smiles;
  return std::move(graph).value();
}

void expect_figure_of_the_model(Property property, const molecule::Graph& graph) {
  const Result<ContextMolecule> counted = context_molecule(graph);
  ASSERT_TRUE(counted.ok());
  const ContextTerm one{1, &*counted};
  const Result<ContextFigure> made =
      ContextModel::embedded().figure(property, std::span<const ContextTerm>(&one, 1));
  const Result<std::shared_ptr<const ContextFigure>> remembered = structure_figure(property, graph);
  ASSERT_TRUE(made.ok() && remembered.ok());
  // The very digits: a figure from memory is the figure.
  EXPECT_EQ((*remembered)->prediction.value, made->prediction.value);
  EXPECT_EQ((*remembered)->prediction.u95, made->prediction.u95);
  EXPECT_EQ((*remembered)->quantity.u95(), made->quantity.u95());
  EXPECT_EQ((*remembered)->quantity.parts().size(), made->quantity.parts().size());
}

TEST(StructureFigure, GivesTheFigureOfTheModelAtFirstAndFromMemory) {
  for (int pass = 0; pass < 2; ++pass) {
    for (const char* smiles : {"CCCC(C)CO", "OCC(C)CCC", "C/C=C/CCO", "C/C=C\\CCO", "c1ccccc1CC"}) {
      for (const Property property : {Property::GasFormation, Property::Vaporisation298})
        expect_figure_of_the_model(property, graph_of(smiles));
    }
  }
}

TEST(StructureFigure, TellsStereoisomersApart) {
  const auto cis = structure_figure(Property::GasFormation, graph_of("CC/C=C\\CC"));
  const auto trans = structure_figure(Property::GasFormation, graph_of("CC/C=C/CC"));
  ASSERT_TRUE(cis.ok() && trans.ok());
  EXPECT_GT((*cis)->prediction.value, (*trans)->prediction.value + 1000);  // J/mol; trans is the stable one
}

TEST(StructureFigure, StaysRightWhenMoreIsAskedThanIsKept) {
  const molecule::Graph first = graph_of("CCCCCC(C)CO");
  const double value = (*structure_figure(Property::GasFormation, first))->prediction.value;
  for (int length = 1; length <= 600; ++length)
    ASSERT_TRUE(structure_figure(Property::LiquidHeatCapacity298,
                                 graph_of(std::string(static_cast<std::size_t>(1 + length % 300), 'C') +
                                          (length < 300 ? "O" : "N")))
                    .ok());
  EXPECT_EQ((*structure_figure(Property::GasFormation, first))->prediction.value, value);
}

TEST(StructureFigure, RefusesWhatTheModelRefuses) {
  const auto answer = structure_figure(Property::GasFormation, graph_of("[Na+].[Cl-]"));
  ASSERT_FALSE(answer.ok());
  EXPECT_EQ(answer.error(), context_molecule(graph_of("[Na+].[Cl-]")).error());
}

}  // namespace
}  // namespace heatledger::estimate
