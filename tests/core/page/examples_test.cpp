// Every worksheet in worksheets/ prints the same text natively and in WebAssembly: this suite is compiled to
// both. The texts in tests/data/worksheets were written by print_examples.cpp on the native build and read
// line by line by a person; they pin the whole chain from file to print.
#include <gtest/gtest.h>

#include "core/page/writers.hpp"
#include "tests/core/page/page_reader.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::page {
namespace {

std::vector<std::string> example_names() {
  const std::string ending = ".heatledger.json";
  std::vector<std::string> names;
  for (const std::string& name : heatledger::test::list_source_folder("worksheets")) {
    if (name.size() > ending.size() &&
        name.compare(name.size() - ending.size(), ending.size(), ending) == 0) {
      names.push_back(name.substr(0, name.size() - ending.size()));
    }
  }
  return names;
}

class Example : public ::testing::TestWithParam<std::string> {
 protected:
  void SetUp() override {
    const Status status =
        session_.open(heatledger::test::read_source_file("worksheets/" + GetParam() + ".heatledger.json"));
    ASSERT_TRUE(status.ok()) << status.error().message;
  }
  Session session_;
};

TEST_P(Example, PrintsItsText) {
  const std::string expected =
      heatledger::test::read_source_file("tests/data/worksheets/" + GetParam() + ".txt");
  EXPECT_EQ(write_text(session_.page(), 100), expected);
}

TEST_P(Example, ComputesWhatItWasSavedWith) {
  for (const Block& block : session_.page().blocks) {
    EXPECT_NE(block_id(block).substr(0, 8), "opening.") << std::get<Note>(block).text;
  }
}

/// A cell of the figures that a kind of step answers with.
bool has_found_figure(const Page& page) {
  for (const Block& block : page.blocks) {
    const Table* table = std::get_if<Table>(&block);
    if (table == nullptr) continue;
    for (const Row& row : table->rows) {
      for (const Cell& cell : row.cells) {
        if (cell.id.find(".find.") != std::string::npos && !cell.text.empty()) return true;
      }
    }
  }
  return false;
}

TEST_P(Example, EveryReactionIsBalancedAndHasAFigure) {
  int reactions = 0;
  for (int i = 1; i < 20; ++i) {
    const std::string id = "r" + std::to_string(i);
    const Cell* equation = test::find_cell(session_.page(), id + ".equation");
    if (equation == nullptr || equation->text.empty()) continue;  // a sheet of steps keeps an empty line
    ++reactions;
    EXPECT_EQ(test::text_of(session_, id + ".balance").substr(0, 9), "balanced:") << id;
    const std::string taken = test::text_of(session_, id + ".taken");
    EXPECT_FALSE(taken.find_first_of("0123456789") == std::string::npos) << id << " " << taken;
    EXPECT_EQ(test::find_note(session_.page(), id + ".error"), nullptr);
  }
  // A sheet of steps alone has the figures of its first step instead.
  EXPECT_TRUE(reactions > 0 || has_found_figure(session_.page()));
}

TEST_P(Example, SavesToTheSameBytes) {
  const std::string text =
      heatledger::test::read_source_file("worksheets/" + GetParam() + ".heatledger.json");
  EXPECT_EQ(session_.save(), text);
}

INSTANTIATE_TEST_SUITE_P(Worksheets, Example, ::testing::ValuesIn(example_names()), [](const auto& example) {
  std::string name = example.param;
  for (char& c : name) c = c == '-' ? '_' : c;
  return name;
});

}  // namespace
}  // namespace heatledger::page
