// Puts the page together and keeps it: a section is built anew only when what it shows changed, and a block
// counts as changed only when its content did.
#pragma once

#include <cstdint>
#include <map>
#include <memory>
#include <set>
#include <string>
#include <vector>

#include "core/page/reaction_blocks.hpp"

namespace heatledger::page {

/// All that a page shows.
struct PageInput {
  document::State sheet;
  const document::Results* results = nullptr;
  const std::set<std::string>* open_rows = nullptr;
  const std::map<std::string, RejectedText>* rejected = nullptr;
  const std::vector<Error>* not_understood = nullptr;         ///< on opening
  const std::vector<std::string>* changed_figures = nullptr;  ///< since the file was saved
  std::vector<Command> commands;
};

class PageBuilder {
 public:
  const Page& build(PageInput input);
  const Page& page() const { return page_; }
  /// Revision at which blocks last came, went or moved.
  std::uint64_t order_changed() const { return order_changed_; }

 private:
  /// What a section was built from; equal keys give equal blocks.
  struct Section {
    std::vector<std::shared_ptr<const void>> inputs;
    std::string state;                  ///< place, open rows, rejected texts
    std::size_t first = 0, blocks = 0;  ///< in page_.blocks
  };

  template <typename Build>
  void add_section(const std::string& name, std::vector<std::shared_ptr<const void>> inputs,
                   std::string state, Build make);

  Page page_;
  std::uint64_t order_changed_ = 0;
  std::map<std::string, Section> sections_, next_sections_;
  std::vector<Block> next_blocks_;
  std::vector<std::uint64_t> next_changed_;
};

}  // namespace heatledger::page
