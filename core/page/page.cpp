#include "core/page/page.hpp"

namespace heatledger::page {

const std::string& block_id(const Block& block) {
  return std::visit([](const auto& any) -> const std::string& { return any.id; }, block);
}

}  // namespace heatledger::page
