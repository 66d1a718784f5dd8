#include "core/document/worksheet.hpp"

namespace heatledger::document {

Worksheet empty_worksheet() {
  Worksheet sheet;
  ReactionSheet first;
  first.id = "r1";
  sheet.reactions.push_back(Shared<ReactionSheet>(std::move(first)));
  return sheet;
}

std::size_t find_reaction(const Worksheet& sheet, const std::string& id) {
  std::size_t at = 0;
  while (at < sheet.reactions.size() && sheet.reactions[at]->id != id) ++at;
  return at;
}

std::string free_reaction_id(const Worksheet& sheet) {
  for (std::size_t number = 1;; ++number) {
    std::string id = "r" + std::to_string(number);
    if (find_reaction(sheet, id) == sheet.reactions.size()) return id;
  }
}

std::size_t find_step(const Worksheet& sheet, const std::string& id) {
  std::size_t at = 0;
  while (at < sheet.steps.size() && sheet.steps[at]->id != id) ++at;
  return at;
}

std::string free_step_id(const Worksheet& sheet) {
  for (std::size_t number = 1;; ++number) {
    std::string id = "s" + std::to_string(number);
    if (find_step(sheet, id) == sheet.steps.size()) return id;
  }
}

}  // namespace heatledger::document
