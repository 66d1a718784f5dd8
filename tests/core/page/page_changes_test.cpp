// Only what an edit reached counts as changed, and the changes applied to the old page give the new one.
#include <gtest/gtest.h>

#include "core/file/json.hpp"
#include "core/page/page_json.hpp"
#include "core/page/writers.hpp"
#include "tests/core/page/page_reader.hpp"

namespace heatledger::page {
namespace {

std::vector<std::string> changed_since(const Page& page, std::uint64_t since) {
  std::vector<std::string> ids;
  for (std::size_t i = 0; i < page.blocks.size(); ++i) {
    if (page.changed[i] > since) ids.push_back(block_id(page.blocks[i]));
  }
  return ids;
}

Session two_reactions() {
  Session session;
  EXPECT_TRUE(session.edit("r1.equation", "CH4(g) + Cl2(g) -> CH3Cl(g) + HCl(g)").ok());
  EXPECT_TRUE(session.command("add_reaction", {{"equation", "H2(g) + Cl2(g) -> 2 HCl(g)"}}).ok());
  return session;
}

TEST(PageChanges, AnEditOfTheTitleReachesTheTitleOnly) {
  Session session = two_reactions();
  const std::uint64_t before = session.page().revision;
  ASSERT_TRUE(session.edit("header.subtitle", "preliminary").ok());
  EXPECT_EQ(changed_since(session.page(), before), std::vector<std::string>{"sheet"});
}

TEST(PageChanges, AnEditOfOneReactionLeavesTheOtherAlone) {
  Session session = two_reactions();
  const std::uint64_t before = session.page().revision;
  ASSERT_TRUE(session.edit("r1.equation", "CH4(g) + 2 Cl2(g) -> CH2Cl2(g) + 2 HCl(g)").ok());
  const std::vector<std::string> ids = changed_since(session.page(), before);
  EXPECT_FALSE(ids.empty());
  for (const std::string& id : ids) EXPECT_EQ(id.substr(0, 3), "r1.") << id;
}

TEST(PageChanges, AnEditToTheSameTextChangesNothing) {
  Session session = two_reactions();
  const std::uint64_t before = session.page().revision;
  ASSERT_TRUE(session.edit("r2.equation", "H2(g) + Cl2(g) -> 2 HCl(g)").ok());
  EXPECT_TRUE(changed_since(session.page(), before).empty());
}

TEST(PageChanges, UndoGivesBackTheSamePage) {
  Session session = two_reactions();
  const std::vector<Block> before = session.page().blocks;
  ASSERT_TRUE(session.edit("r1.equation", "H2 -> H2").ok());
  EXPECT_FALSE(session.page().blocks == before);
  ASSERT_TRUE(session.command("undo", {}).ok());
  EXPECT_TRUE(session.page().blocks == before);
}

/// A page as a face keeps it, brought up to date by changes alone.
class Mirror {
 public:
  void take(const std::string& json) {
    const Result<file::Json> read = file::read_json(json);
    ASSERT_TRUE(read.ok());
    for (const file::Json& block : read->find("blocks")->items()) {
      blocks_[block.string_or("id", "")] = file::write_json_text(block);
    }
    if (const file::Json* order = read->find("order")) {
      order_.clear();
      for (const file::Json& id : order->items()) order_.push_back(id.text());
    } else if (read->find("since") == nullptr) {
      order_.clear();
      for (const file::Json& block : read->find("blocks")->items())
        order_.push_back(block.string_or("id", ""));
    }
  }
  std::vector<std::string> blocks() const {
    std::vector<std::string> list;
    for (const std::string& id : order_) list.push_back(blocks_.at(id));
    return list;
  }

 private:
  std::map<std::string, std::string> blocks_;
  std::vector<std::string> order_;
};

TEST(PageChanges, AFaceThatAppliesThemSeesTheWholePage) {
  Session session = two_reactions();
  Mirror mirror;
  mirror.take(write_json(session.page()));
  std::uint64_t seen = session.page().revision;
  const std::vector<std::pair<std::string, std::string>> edits{
      {"header.title", "T"},           {"r1.row.0", "open"},
      {"r1.row.1.times", "two"},       {"r1.row.1.times", "1"},
      {"bond.0.bond", "C-H"},          {"bond.0.value", "410"},
      {"r2.show", "enthalpy profile"}, {"r2.move_up", ""},
      {"assumption.0", "Dry."},        {"r1.equation", "C3H8 + O2 -> CO2 + H2O"},
      {"r1.proposal.0", ""},           {"r2.remove", ""}};
  for (const auto& edit : edits) {
    ASSERT_TRUE(session.edit(edit.first, edit.second).ok()) << edit.first;
    const Page& page = session.page();
    mirror.take(write_changes(page, seen, seen >= session.order_changed()));
    seen = page.revision;
    Mirror whole;
    whole.take(write_json(page));
    ASSERT_EQ(mirror.blocks(), whole.blocks()) << "after " << edit.first;
  }
}

}  // namespace
}  // namespace heatledger::page
